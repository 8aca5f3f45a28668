package acoustics

import "math"

// NRRFrequencies are the laboratory test frequencies behind a noise reduction rating, in Hz. Older data
// have 3000 and 6000 Hz in place of 3150 and 6300 Hz.
var NRRFrequencies = [9]int{125, 250, 500, 1000, 2000, 3150, 4000, 6300, 8000}

// pinkA is pink noise of 100 dB in each octave band from 125 to 8000 Hz, A-weighted, in dB (40 CFR
// 211.207, Figure 2, step 5).
var pinkA = [7]float64{83.9, 91.4, 96.8, 100, 101.2, 101, 98.9}

const (
	pinkC              = 107.9 // the same noise C-weighted and summed, as step 3 prints it; exactly 107.954
	spectrumAllowance  = 3     // dB for the uncertainty of the spectrum, 40 CFR 211.207
	nrrDeviationFactor = 2     // standard deviations taken off the mean attenuation
)

// NRRFromBands gives the noise reduction rating in dB, not rounded, from the mean attenuation and the
// standard deviation in dB at each of NRRFrequencies (40 CFR 211.207). In the bands of 4000 and 8000 Hz
// the means of two test frequencies are averaged, and the sum of their deviations stands for twice the
// deviation. It returns false if a value is not a finite number or a deviation is negative.
func NRRFromBands(mean, deviation [9]float64) (float64, bool) {
	for i := range mean {
		if !finite(mean[i]) || !finite(deviation[i]) || deviation[i] < 0 {
			return 0, false
		}
	}
	var under [7]float64
	for i := range 5 {
		under[i] = pinkA[i] - (mean[i] - nrrDeviationFactor*deviation[i])
	}
	under[5] = pinkA[5] - ((mean[5]+mean[6])/2 - (deviation[5] + deviation[6]))
	under[6] = pinkA[6] - ((mean[7]+mean[8])/2 - (deviation[7] + deviation[8]))
	sum, ok := EnergySum(under[:])
	return pinkC - sum - spectrumAllowance, ok
}

// NRRLabel rounds a noise reduction rating to the whole dB of the label. Halves go down (40 CFR 211.207).
// A value within 1e-9 dB over a half is taken as the half. The maker may print less, but not more.
func NRRLabel(nrr float64) float64 {
	return math.Ceil(nrr - 0.5 - 1e-9)
}
