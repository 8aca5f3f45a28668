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
	Level       float64 // dB(A) under the protector
	Attenuation float64 // dB taken off; never negative
	Clamped     bool    // the rule gave a negative attenuation, and 0 dB was used instead
}

// UnderNRR gives the exposure under a protector with a noise reduction rating in dB, for a time-weighted
// average in dB of the weighting w (29 CFR 1910.95 App. B): C-weighted L - NRR, A-weighted L - (NRR - 7).
// A weighting other than C is treated as A, which credits less. An NRR below 7 would raise an A-weighted
// level; then 0 dB is used and Clamped is set. The text of the law has no such clamp.
func UnderNRR(twa float64, w Weighting, nrr float64) Protected {
	return under(twa, nrrAttenuation(w, nrr))
}

// UnderHalvedNRR gives the exposure under a protector with half the attenuation of UnderNRR (CPL
// 02-02-035 App. A): C-weighted L - NRR/2, A-weighted L - (NRR - 7)/2. The directive uses it to weigh
// engineering controls only; compliance with 29 CFR 1910.95(j) is judged with UnderNRR. Information only.
// For two protectors the 5 dB of the second are not halved: give the higher NRR and take 5 dB off the
// resulting level (from memory).
func UnderHalvedNRR(twa float64, w Weighting, nrr float64) Protected {
	return under(twa, nrrAttenuation(w, nrr)/2)
}

// DualNRR gives the rating in dB of a plug and a muff worn together, the higher of the two plus 5 (from
// memory: OSHA Technical Manual). Use the result as the NRR in UnderNRR, not in UnderHalvedNRR.
func DualNRR(a, b float64) float64 {
	return max(a, b) + secondProtectorGain
}

func nrrAttenuation(w Weighting, nrr float64) float64 {
	if w == C {
		return nrr
	}
	return nrr - aWeightingAllowance
}

func under(level, attenuation float64) Protected {
	if attenuation < 0 {
		return Protected{Level: level, Clamped: true}
	}
	return Protected{Level: level - attenuation, Attenuation: attenuation}
}
