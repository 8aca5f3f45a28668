package acoustics

import (
	"fmt"
	"math"
)

const (
	// hmlBend is the difference L_C - L_A in dB at which the H and L halves of the method meet
	// (ISO 4869-2:2018, secondary source).
	hmlBend = 2
	// leastDifference is the least L_C - L_A in dB of any noise: the A-weighting lies at most 1.5 dB above
	// the C-weighting, and half a decibel is left for the instruments.
	leastDifference = -2
)

// HML is the rating of a protector in dB for noise of high, medium and low frequencies, as published, in
// whole dB (ISO 4869-2:2018, secondary source).
type HML struct {
	High, Medium, Low float64
}

// Whole rounds the three values to whole dB, as they are published.
func (r HML) Whole() HML {
	return HML{RoundWhole(r.High), RoundWhole(r.Medium), RoundWhole(r.Low)}
}

// RoundWhole rounds to a whole dB, and halves up (ISO 4869-2:2018, secondary source). A value within 1e-9 dB
// under a half is taken as the half.
func RoundWhole(x float64) float64 {
	return math.Floor(x + 0.5 + levelSlack)
}

// UnderHML gives the exposure in dB(A) under a protector with the rating r, for a noise of la dB(A) and lc
// dB(C), not rounded: with the difference d = L_C - L_A up to 2 dB the attenuation is M - (H - M)/4 (d - 2),
// above it M - (M - L)/8 (d - 2) (ISO 4869-2:2018 formulas 16 to 18, secondary source).
//
// It fails if a number is not finite, if H, M and L are not in falling order, or if the C-weighted level lies
// more than 2 dB below the A-weighted one, which no noise can have.
func UnderHML(la, lc float64, r HML) (Protected, error) {
	if !finite(la) || !finite(lc) {
		return Protected{}, fmt.Errorf("the HML method needs the A-weighted and the C-weighted level")
	}
	if !finite(r.High) || !finite(r.Low) || !(r.High >= r.Medium && r.Medium >= r.Low) {
		return Protected{}, fmt.Errorf("the ratings H %g, M %g and L %g are not in falling order", r.High, r.Medium, r.Low)
	}
	d := lc - la
	if d < leastDifference-levelSlack {
		return Protected{}, fmt.Errorf("the C-weighted level of %g dB lies too far below the A-weighted level of %g dB to be right", lc, la)
	}
	how := working{}.and("L_C - L_A = %s - %s = %s dB", lc, la, d)
	if d <= hmlBend {
		attenuation := r.Medium - (r.High-r.Medium)/4*(d-hmlBend)
		return under(la, attenuation, how.and("attenuation = M - (H - M)/4 · (d - 2) = %s - (%s - %s)/4 · (%s - 2) = %s dB",
			r.Medium, r.High, r.Medium, d, attenuation)), nil
	}
	attenuation := r.Medium - (r.Medium-r.Low)/8*(d-hmlBend)
	return under(la, attenuation, how.and("attenuation = M - (M - L)/8 · (d - 2) = %s - (%s - %s)/8 · (%s - 2) = %s dB",
		r.Medium, r.Medium, r.Low, d, attenuation)), nil
}

// UnderSNR gives the exposure in dB(A) under a protector with the single number rating snr in dB, for a noise
// of lc dB(C), L_C - SNR (ISO 4869-2:2018, secondary source). The attenuation is that of the C-weighted level.
// An SNR is not an NRR; never use one for the other.
func UnderSNR(lc, snr float64) Protected {
	return under(lc, snr, working{}.and("attenuation of the C-weighted level = SNR = %s dB", snr))
}

// UnderSLC80 gives the exposure in dB(A) under a protector with the sound level conversion slc80 in dB, for a
// noise of lc dB(C), L_C - SLC80 (AS/NZS 1270, from memory). The attenuation is that of the C-weighted level.
func UnderSLC80(lc, slc80 float64) Protected {
	return under(lc, slc80, working{}.and("attenuation of the C-weighted level = SLC80 = %s dB", slc80))
}
