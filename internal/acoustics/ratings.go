package acoustics

import (
	"fmt"
	"math"
)

// The eight noises of 100 dB(A) behind the ratings H, M and L, A-weighted in dB from 125 to 8000 Hz, with the
// factor d of each (ISO 4869-2:2018 Table 2, secondary source). The first four make H, the others M and L.
var (
	ratingNoises = [8][7]float64{
		{62.6, 70.8, 81.0, 90.4, 96.2, 94.7, 92.3},
		{68.9, 78.3, 84.3, 92.8, 96.3, 94.0, 90.0},
		{71.1, 80.8, 88.0, 95.0, 94.4, 94.1, 89.0},
		{77.2, 84.5, 89.8, 95.5, 94.3, 92.5, 88.8},
		{77.4, 86.5, 92.5, 96.4, 93.0, 90.4, 83.7},
		{82.0, 89.3, 93.3, 95.6, 93.0, 90.1, 83.0},
		{84.2, 90.1, 93.6, 96.2, 91.3, 87.9, 81.9},
		{88.0, 93.4, 93.8, 94.2, 91.4, 87.9, 79.9},
	}
	ratingFactors = [8]float64{-1.20, -0.49, 0.14, 1.56, -2.98, -1.01, 0.85, 3.14}
	// ratingPink is pink noise of 100 dB(C), A-weighted in dB from 125 to 8000 Hz (same source).
	ratingPink = [7]float64{75.9, 83.4, 88.8, 92.0, 93.2, 93.0, 90.9}
)

// ratingNoiseLevel is the level in dB of the noises that ratings are defined with.
const ratingNoiseLevel = 100

// Rate gives the ratings H, M, L and SNR in dB, not rounded, of one set of attenuations in dB: those of a
// single test subject, or assumed protection values (ISO 4869-2:2018, secondary source). The band of 63 Hz is
// not used. It returns false if another band is not a finite number.
func Rate(attenuation Bands) (HML, float64, bool) {
	if _, ok := attenuation.first(); !ok {
		return HML{}, 0, false
	}
	var r [8]float64
	for i := range r {
		r[i] = reduction(&ratingNoises[i], &attenuation)
	}
	var h HML
	for i := range 4 {
		h.High += r[i] * (0.25 - 0.48*ratingFactors[i])
		h.Medium += r[i+4] * (0.25 - 0.16*ratingFactors[i+4])
		h.Low += r[i+4] * (0.25 + 0.23*ratingFactors[i+4])
	}
	return h, reduction(&ratingPink, &attenuation), true
}

// reduction gives what is taken off 100 dB of a noise that is A-weighted from 125 to 8000 Hz.
func reduction(noise *[7]float64, attenuation *Bands) float64 {
	var left [7]float64
	for i := range left {
		left[i] = noise[i] - attenuation[i+1]
	}
	sum, _ := EnergySum(left[:])
	return ratingNoiseLevel - sum
}

// Spread is the mean and standard deviation of a rating over test subjects, in dB.
type Spread struct {
	Mean, Deviation float64
}

// Ratings are the ratings of a protector from its test subjects.
type Ratings struct {
	Subjects               int
	High, Medium, Low, SNR Spread
}

// RateSubjects gives the ratings of a protector from the attenuation in dB of each test subject
// (ISO 4869-2:2018, secondary source; the test of ISO 4869-1 has at least 16). It fails if there are fewer
// than 2 subjects, or if a subject lacks a band from 125 Hz on.
func RateSubjects(subjects []Bands) (Ratings, error) {
	if len(subjects) < 2 {
		return Ratings{}, fmt.Errorf("a rating needs at least 2 test subjects; there are %d", len(subjects))
	}
	var sums, squares [4]float64
	var first [4]float64
	for i := range subjects {
		h, snr, ok := Rate(subjects[i])
		if !ok {
			return Ratings{}, fmt.Errorf("subject %d lacks the attenuation of an octave band from 125 to 8000 Hz", i+1)
		}
		values := [4]float64{h.High, h.Medium, h.Low, snr}
		if i == 0 {
			first = values
		}
		for j, v := range values {
			sums[j] += v - first[j] // from the first subject, so that little is lost in the squares
			squares[j] += (v - first[j]) * (v - first[j])
		}
	}
	n := float64(len(subjects))
	spreadOf := func(j int) Spread {
		return Spread{first[j] + sums[j]/n, math.Sqrt(max(0, squares[j]-sums[j]*sums[j]/n) / (n - 1))}
	}
	return Ratings{len(subjects), spreadOf(0), spreadOf(1), spreadOf(2), spreadOf(3)}, nil
}

// At gives the rating in dB that is left when alpha standard deviations are taken off, not rounded (see Alpha).
func (s Spread) At(alpha float64) float64 {
	return s.Mean - alpha*s.Deviation
}

// HML gives the rating in whole dB, as it is published, for alpha standard deviations (see Alpha).
func (r Ratings) HML(alpha float64) HML {
	return HML{r.High.At(alpha), r.Medium.At(alpha), r.Low.At(alpha)}.Whole()
}

// SNRLabel gives the single number rating in whole dB, as it is published, for alpha standard deviations.
func (r Ratings) SNRLabel(alpha float64) float64 {
	return RoundWhole(r.SNR.At(alpha))
}
