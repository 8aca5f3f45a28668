package acoustics

import "math"

// unreliableDifference is the least rise in dB over the background that a correction can be trusted with
// (from memory: common practice in acoustics).
const unreliableDifference = 3

// Corrected is the level of a source without the background that was measured with it.
type Corrected struct {
	Level      float64 // dB
	Difference float64 // dB by which source and background together exceed the background
	Unreliable bool    // the difference is below 3 dB, so the level hangs on small errors of both readings
}

// SubtractBackground takes the energy of the background in dB out of a total level in dB,
// 10 lg(10^(total/10) - 10^(background/10)) (from memory). It returns false if a level is not a finite
// number or the total is not above the background.
func SubtractBackground(total, background float64) (Corrected, bool) {
	if !finite(total) || !finite(background) || total <= background {
		return Corrected{}, false
	}
	difference := total - background
	return Corrected{
		Level:      total + 10*math.Log10(-math.Expm1(-difference*math.Ln10/10)),
		Difference: difference,
		Unreliable: difference < unreliableDifference-levelSlack,
	}, true
}

// SoundExposureLevel gives the level in dB of one second with the same energy as a level that lasted for
// a number of minutes, L + 10 lg(T / 1 s), also called SEL or L_AE (from memory). It returns false if the
// level is not a finite number or the time is not above 0 and at most 24 hours.
func SoundExposureLevel(level, minutes float64) (float64, bool) {
	if !finite(level) || !withinDay(minutes) {
		return 0, false
	}
	return level + 10*math.Log10(minutes*60), true
}
