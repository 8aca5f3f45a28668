package acoustics

import "math"

const (
	referencePressure = 20e-6 // Pa, the pressure of 0 dB (30 CFR 62.101; O. Reg. 381/15 s. 1)
	// referenceExposure is the sound exposure of 0 dB over 8 hours in Pa²h: (20 µPa)² * 8 h.
	referenceExposure = 3.2e-9
	// ukActionLevel is the daily level in dB that stands for 100 points (Health and Safety Executive,
	// ready-reckoner of weekly exposure, 2020).
	ukActionLevel = 85
)

// SoundExposure gives the sound exposure in Pa²h of a level in dB that lasted for a number of minutes,
// (20 µPa)² * hours * 10^(L/10) (from memory). It returns false if the level is not a finite number or
// the time is not above 0 and at most 24 hours.
func SoundExposure(level, minutes float64) (float64, bool) {
	if !finite(level) || !withinDay(minutes) {
		return 0, false
	}
	return referenceExposure * minutes / criterionMinutes * math.Pow(10, level/10), true
}

// LEXOfExposure gives the daily exposure level in dB of a day with the sound exposure pa2h in Pa²h,
// 10 lg(E / 3.2e-9) (from memory). It returns false if the exposure is not a finite number above 0.
func LEXOfExposure(pa2h float64) (float64, bool) {
	if !(pa2h > 0) || !finite(pa2h) {
		return 0, false
	}
	return 10 * math.Log10(pa2h/referenceExposure), true
}

// PressureLevel gives the level in dB of a sound pressure in Pa, 20 lg(p / 20 µPa) (30 CFR 62.101; for
// peaks French order of 19 July 2006, art. 1 no. 2). It returns false if the pressure is not a finite
// number above 0.
func PressureLevel(pascal float64) (float64, bool) {
	if !(pascal > 0) || !finite(pascal) {
		return 0, false
	}
	return 20 * math.Log10(pascal/referencePressure), true
}

// Pressure gives the sound pressure in Pa of a level in dB, the inverse of PressureLevel. It returns
// false if the level is not a finite number.
func Pressure(level float64) (float64, bool) {
	if !finite(level) {
		return 0, false
	}
	return referencePressure * math.Pow(10, level/20), true
}

// UKPoints gives the exposure points of a level in dB that lasted for a number of minutes,
// 100 * (minutes/480) * 10^((L - 85)/10) (Health and Safety Executive, ready-reckoner of weekly exposure,
// 2020; the formula is inferred from its rows). Points of a day or a week are added. The printed table
// rounds them to one to three figures. It returns false where SoundExposure does.
func UKPoints(level, minutes float64) (float64, bool) {
	if !finite(level) || !withinDay(minutes) {
		return 0, false
	}
	return 100 * minutes / criterionMinutes * energyRatio(level, ukActionLevel), true
}

// LEXOfUKPoints gives the daily exposure level in dB of the points of a day, 85 + 10 lg(points/100)
// (source as UKPoints). It returns false if the points are not a finite number above 0.
func LEXOfUKPoints(points float64) (float64, bool) {
	return levelOfPoints(points, 100)
}

// WeeklyLEXOfUKPoints gives the weekly exposure level in dB of the points of all days of a week,
// 85 + 10 lg(points/500) (source as UKPoints). It returns false if the points are not a finite number
// above 0.
func WeeklyLEXOfUKPoints(points float64) (float64, bool) {
	return levelOfPoints(points, 100*nominalWeek)
}

func levelOfPoints(points, atActionLevel float64) (float64, bool) {
	if !(points > 0) || !finite(points) {
		return 0, false
	}
	return ukActionLevel + 10*math.Log10(points/atActionLevel), true
}
