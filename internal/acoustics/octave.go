package acoustics

import (
	"fmt"
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// OctaveFrequencies are the middle frequencies of the octave bands, in Hz.
var OctaveFrequencies = [8]int{63, 125, 250, 500, 1000, 2000, 4000, 8000}

// Bands holds a number in dB for each of OctaveFrequencies. NaN stands for a band that was not measured,
// which only that of 63 Hz may be.
type Bands [8]float64

// The weightings A and C in octave bands, in dB (A: ISO 4869-2:2018, secondary source; C: 40 CFR 211.207,
// that of 63 Hz from memory).
var (
	aWeights = Bands{-26.2, -16.1, -8.6, -3.2, 0, 1.2, 1.0, -1.1}
	cWeights = Bands{-0.8, -0.2, 0, 0, 0, -0.2, -0.8, -3.0}
)

// first gives the index of the first measured band, 0 or 1. It returns false if a band from 125 Hz on is not
// a finite number.
func (b Bands) first() (int, bool) {
	for _, x := range b[1:] {
		if !finite(x) {
			return 0, false
		}
	}
	switch {
	case math.IsNaN(b[0]):
		return 1, true
	case math.IsInf(b[0], 0):
		return 0, false
	}
	return 0, true
}

// Weighted gives the level of octave bands with the weighting A or C in dB. It returns false if a band from
// 125 Hz on is missing or the weighting is another.
func (b Bands) Weighted(w Weighting) (float64, bool) {
	from, ok := b.first()
	if !ok || w != A && w != C {
		return 0, false
	}
	weights := aWeights
	if w == C {
		weights = cWeights
	}
	for i := range b {
		b[i] += weights[i]
	}
	return EnergySum(b[from:])
}

// Alpha gives the number of standard deviations that are taken off a mean attenuation so that a share of
// wearers in percent gets at least what is left: 0 for 50, 0.67 for 75, 0.84 for 80, 1 for 84, 1.28 for 90,
// 1.64 for 95 and 2 for 98 (ISO 4869-2:2018 Table 1, secondary source), and the quantile of the standard
// normal distribution for any other; tabled tells the two apart. It returns false if the share is not between
// 0 and 100.
func Alpha(percent float64) (alpha float64, tabled, ok bool) {
	if !(percent > 0 && percent < 100) {
		return 0, false, false
	}
	switch percent {
	case 50:
		return 0, true, true
	case 75:
		return 0.67, true, true
	case 80:
		return 0.84, true, true
	case 84:
		return 1, true, true
	case 90:
		return 1.28, true, true
	case 95:
		return 1.64, true, true
	case 98:
		return 2, true, true
	}
	return distuv.UnitNormal.Quantile(percent / 100), false, true
}

// AssumedProtection gives the assumed protection value of each band in dB, mean - alpha * deviation
// (ISO 4869-2:2018, secondary source; see Alpha). A band of 63 Hz that lacks one of the two is NaN. It returns
// false if another band is not a finite number or a deviation is negative.
func AssumedProtection(mean, deviation Bands, alpha float64) (Bands, bool) {
	var apv Bands
	for i := range apv {
		if deviation[i] < 0 {
			return Bands{}, false
		}
		apv[i] = mean[i] - alpha*deviation[i]
	}
	_, ok := apv.first()
	return apv, ok
}

// OctaveProtected is the exposure under a hearing protector by the octave-band method.
type OctaveProtected struct {
	Protected
	LA, LC float64 // dB(A) and dB(C) of the noise, over the bands used
	From63 bool    // the band of 63 Hz was used
	noise  Bands
	apv    Bands
}

// UnderOctave gives the exposure in dB(A) under a protector with the assumed protection values apv in dB, for
// the octave-band levels of a noise in dB, not rounded: 10 lg of the sum of 10^((L + A - APV)/10) from 63 Hz
// on, or from 125 Hz if one of the two lacks 63 Hz (ISO 4869-2:2018, secondary source). The attenuation is
// that of the A-weighted level. It fails if a band from 125 Hz on is missing.
func UnderOctave(noise, apv Bands) (OctaveProtected, error) {
	fromNoise, ok := noise.first()
	if !ok {
		return OctaveProtected{}, fmt.Errorf("the noise lacks the level of an octave band from 125 to 8000 Hz")
	}
	fromAPV, ok := apv.first()
	if !ok {
		return OctaveProtected{}, fmt.Errorf("the protector lacks the attenuation of an octave band from 125 to 8000 Hz")
	}
	from := max(fromNoise, fromAPV)
	if from == 1 {
		noise[0], apv[0] = math.NaN(), math.NaN()
	}
	r := OctaveProtected{From63: from == 0, noise: noise, apv: apv}
	r.LA, _ = noise.Weighted(A)
	r.LC, _ = noise.Weighted(C)
	var left Bands
	for i := range left {
		left[i] = noise[i] - apv[i]
	}
	level, _ := left.Weighted(A)
	r.Protected = under(r.LA, r.LA-level, working{}.and("attenuation = %s - %s = %s dB", r.LA, level, r.LA-level))
	return r, nil
}

// Working shows the formulas of the result with their numbers, one line a band and a step.
func (r OctaveProtected) Working() []string {
	lines := make([]string, 0, len(r.noise)+4)
	for i, f := range OctaveFrequencies {
		if math.IsNaN(r.noise[i]) {
			continue
		}
		lines = append(lines, fmt.Sprintf("%d Hz: L + A - APV = %s + (%s) - %s = %s dB", f, number(r.noise[i]), number(aWeights[i]),
			number(r.apv[i]), number(r.noise[i]+aWeights[i]-r.apv[i])))
	}
	lines = append(lines, fmt.Sprintf("the noise has %s dB(A); under the protector the bands have %s dB(A) together", number(r.LA), number(r.Level)))
	return append(lines, r.Protected.Working()...)
}
