package acoustics

// ProtectorKind is a kind of hearing protector, as far as deratings tell them apart.
type ProtectorKind string

// The kinds of hearing protector.
const (
	Muff         ProtectorKind = "muff"
	FormablePlug ProtectorKind = "formable plug" // rolled or custom-made
	OtherPlug    ProtectorKind = "other plug"
)

const (
	csaAAllowance = 3    // dB taken off for A-weighted levels (CSA Z94.2-14, from memory)
	csaDualFactor = 0.65 // of the higher NRR + 5 (CSA Z94.2-14, from memory)
)

// UnderNIOSH gives the exposure under a protector whose NRR in dB is cut for real use by 25 % for muffs, 50 %
// for formable plugs and 70 % for other plugs (NIOSH, as the Ontario noise guideline App. D quotes it), for a
// level in dB of the weighting w. For an A-weighted level 7 dB are taken off after the cut (order from
// memory). NIOSH gave the cut up in favour of fit testing in 2025 (secondary source), so it is advice only.
// It returns false if the kind is unknown.
func UnderNIOSH(level float64, w Weighting, nrr float64, kind ProtectorKind) (Protected, bool) {
	factor := 0.0
	switch kind {
	case Muff:
		factor = 0.75
	case FormablePlug:
		factor = 0.50
	case OtherPlug:
		factor = 0.30
	default:
		return Protected{}, false
	}
	return underDerated(level, w, nrr, factor, aWeightingAllowance), true
}

// UnderCSA gives the exposure under a protector whose NRR in dB is cut to 70 % for muffs and 50 % for plugs,
// for a level in dB of the weighting w; for an A-weighted level 3 dB are taken off after the cut (CSA
// Z94.2-14, all from memory). It returns false if the kind is unknown.
func UnderCSA(level float64, w Weighting, nrr float64, kind ProtectorKind) (Protected, bool) {
	switch kind {
	case Muff:
		return underDerated(level, w, nrr, 0.70, csaAAllowance), true
	case FormablePlug, OtherPlug:
		return underDerated(level, w, nrr, 0.50, csaAAllowance), true
	}
	return Protected{}, false
}

// UnderCSADual gives the exposure under a plug and a muff worn together: 65 % of the higher NRR + 5, and 3 dB
// less for an A-weighted level (CSA Z94.2-14, all from memory).
func UnderCSADual(level float64, w Weighting, a, b float64) Protected {
	return underDerated(level, w, DualNRR(a, b), csaDualFactor, csaAAllowance)
}

func underDerated(level float64, w Weighting, nrr, factor, allowance float64) Protected {
	derated := factor * nrr
	how := working{}.and("derated NRR = %s · %s = %s dB", factor, nrr, derated)
	attenuation, how := nrrAttenuation(how, w, derated, allowance)
	return under(level, attenuation, how)
}
