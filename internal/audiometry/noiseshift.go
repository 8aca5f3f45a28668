package audiometry

import (
	"fmt"
	"math"
)

// NoiseShift is the noise-induced permanent threshold shift of a population. All of it is for information
// only: it says how the hearing of many people with the same exposure spreads, and never predicts, explains
// or judges the hearing of one person.
type NoiseShift struct {
	Median    float64 // dB; half of the people have more
	Worse     float64 // spread towards more loss, dB for one standard deviation
	Better    float64 // spread towards less loss, dB for one standard deviation
	HasSpread bool    // false for exposures of less than 10 years, for which no spread is given
}

// noiseCurve holds the coefficients of one frequency.
type noiseCurve struct{ u, v, level0, worse, worseLog, better, betterLog float64 }

// noiseCurves holds the coefficients by frequency in Hz (ISO 1999:2013 Tables 1 and 3, secondary source).
var noiseCurves = map[int]noiseCurve{
	500:  {-.033, .110, 93, .044, .016, .033, .002},
	1000: {-.020, .070, 89, .022, .016, .020, 0},
	2000: {-.045, .066, 80, .031, -.002, .016, 0},
	3000: {.012, .037, 77, .007, .016, .029, -.010},
	4000: {.025, .025, 75, .005, .009, .016, -.002},
	6000: {.019, .024, 77, .013, .008, .028, -.007},
}

const (
	shortestYears = 10  // years; below, the median is interpolated
	longestYears  = 40  // years
	highestLevel  = 100 // dB(A); from memory
)

// NoiseShiftOf gives the noise-induced permanent threshold shift of a population after years of exposure, 0
// to 40, to a daily exposure level of levelDB, up to 100 dB(A), at 500, 1000, 2000, 3000, 4000 or 6000 Hz (ISO
// 1999:2013, secondary source; the end at 100 dB is from memory). Levels below the start of the curve give
// zero. It fails for other values.
func NoiseShiftOf(levelDB, years float64, hz int) (NoiseShift, error) {
	c, ok := noiseCurves[hz]
	switch {
	case !ok:
		return NoiseShift{}, fmt.Errorf("ISO 1999 has no values for %d Hz", hz)
	case !(years >= 0 && years <= longestYears):
		return NoiseShift{}, fmt.Errorf("ISO 1999 covers exposures of 0 to %d years, not %g", longestYears, years)
	case !(levelDB <= highestLevel) || math.IsInf(levelDB, -1):
		return NoiseShift{}, fmt.Errorf("ISO 1999 covers daily exposure levels up to %d dB(A), not %g", highestLevel, levelDB)
	}
	above := max(levelDB-c.level0, 0)
	square := above * above
	if years < shortestYears {
		at10 := (c.u + c.v) * square // the logarithm of 10 years is 1
		return NoiseShift{Median: at10 * math.Log10(years+1) / math.Log10(shortestYears+1)}, nil
	}
	log := math.Log10(years)
	return NoiseShift{
		Median: (c.u + c.v*log) * square,
		Worse:  (c.worse + c.worseLog*log) * square, Better: (c.better + c.betterLog*log) * square,
		HasSpread: true,
	}, nil
}

// At gives the shift in dB that lies z standard deviations towards more loss, or less loss if z is negative:
// 1.2816 is exceeded by 10 % of the people and -1.2816 by 90 %. It is never below zero. It returns false if
// there is no spread and z is not 0.
func (n NoiseShift) At(z float64) (float64, bool) {
	spread := n.Worse
	if z < 0 {
		spread = n.Better
	}
	if z != 0 && !n.HasSpread {
		return 0, false
	}
	return max(n.Median+z*spread, 0), true
}

// WithAge combines the hearing level of a population of an age, in dB, with its noise-induced shift, in dB:
// H + N - H N / 120 (ISO 1999:2013, secondary source). The standard's example leaves the last term out where
// H + N is 40 dB or less. For information only, as NoiseShift.
func WithAge(ageDB, noiseDB float64) float64 {
	return ageDB + noiseDB - ageDB*noiseDB/120
}
