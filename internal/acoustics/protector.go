package acoustics

// Weighting is the frequency weighting that a level was measured with.
type Weighting string

// The weightings that the noise reduction rating (NRR) is used with.
const (
	A Weighting = "A"
	C Weighting = "C"
)

const (
	// aWeightingAllowance is taken off an NRR that is used with an A-weighted level, in dB
	// (29 CFR 1910.95 App. B (ii), (iii) and (v)).
	aWeightingAllowance = 7
	// secondProtectorGain is what a second protector adds to the higher NRR, in dB (from memory: OSHA
	// Technical Manual. Washington's higher NRR - 2 for A-weighted levels, WAC 296-307-63215 Table 2,
	// is the same after the 7 dB).
	secondProtectorGain = 5
)

// Protected is the exposure under a hearing protector.
type Protected struct {
	Level       float64 // dB(A) under the protector; dB(C) for a peak
	Attenuation float64 // dB taken off the level that was given; never negative
	Clamped     bool    // the rule gave a negative attenuation, and 0 dB was used instead
	working     working
}

// Working shows the formulas of the result with their numbers, one line a step.
func (p Protected) Working() []string {
	return p.working.lines()
}

// UnderNRR gives the exposure under a protector with a noise reduction rating in dB, for a time-weighted
// average in dB of the weighting w (29 CFR 1910.95 App. B): C-weighted L - NRR, A-weighted L - (NRR - 7).
// A weighting other than C is treated as A, which credits less. An NRR below 7 would raise an A-weighted
// level; then 0 dB is used and Clamped is set. The text of the law has no such clamp.
func UnderNRR(twa float64, w Weighting, nrr float64) Protected {
	attenuation, how := nrrAttenuation(working{}, w, nrr, aWeightingAllowance)
	return under(twa, attenuation, how)
}

// UnderHalvedNRR gives the exposure under a protector with half the attenuation of UnderNRR (CPL
// 02-02-035 App. A): C-weighted L - NRR/2, A-weighted L - (NRR - 7)/2. The directive uses it to weigh
// engineering controls only; compliance with 29 CFR 1910.95(j) is judged with UnderNRR. Information only.
// For two protectors use UnderHalvedDualNRR.
func UnderHalvedNRR(twa float64, w Weighting, nrr float64) Protected {
	attenuation, how := nrrAttenuation(working{}, w, nrr, aWeightingAllowance)
	return under(twa, attenuation/2, how.and("half of %s dB = %s dB", attenuation, attenuation/2))
}

// DualNRR gives the rating in dB of a plug and a muff worn together, the higher of the two plus 5 (from
// memory: OSHA Technical Manual). Use the result as the NRR in UnderNRR, not in UnderHalvedNRR.
func DualNRR(a, b float64) float64 {
	return max(a, b) + secondProtectorGain
}

// UnderDualNRR gives the exposure under a plug and a muff worn together, as UnderNRR with DualNRR.
func UnderDualNRR(twa float64, w Weighting, a, b float64) Protected {
	how := working{}.and("NRR of both = %s + %s = %s dB", max(a, b), secondProtectorGain, DualNRR(a, b))
	attenuation, how := nrrAttenuation(how, w, DualNRR(a, b), aWeightingAllowance)
	return under(twa, attenuation, how)
}

// UnderHalvedDualNRR gives the exposure under a plug and a muff worn together with half the attenuation of
// the better one, as UnderHalvedNRR, and the 5 dB of the second one in full (from memory: OSHA Technical
// Manual). Information only.
func UnderHalvedDualNRR(twa float64, w Weighting, a, b float64) Protected {
	single, how := nrrAttenuation(working{}, w, max(a, b), aWeightingAllowance)
	attenuation := single/2 + secondProtectorGain
	return under(twa, attenuation, how.and("half of %s dB + %s = %s dB", single, secondProtectorGain, attenuation))
}

// nrrAttenuation takes the allowance for A-weighted levels off a rating.
func nrrAttenuation(how working, w Weighting, nrr, allowance float64) (float64, working) {
	if w == C {
		return nrr, how.and("attenuation of a C-weighted level = NRR = %s dB", nrr)
	}
	return nrr - allowance, how.and("attenuation of an A-weighted level = %s - %s = %s dB", nrr, allowance, nrr-allowance)
}

func under(level, attenuation float64, how working) Protected {
	if attenuation < 0 {
		return Protected{Level: level, Clamped: true, working: how.and("%s dB is negative, so 0 dB is taken off %s dB", attenuation, level)}
	}
	return Protected{Level: level - attenuation, Attenuation: attenuation,
		working: how.and("%s - %s = %s dB under the protector", level, attenuation, level-attenuation)}
}
