package acoustics

import "math"

// EnergySum gives the level in dB of sounds that are heard together, 10 lg of the sum of 10^(L/10)
// (from memory; ISO 9612 builds on it). It returns false if there are no levels or one is not a number.
func EnergySum(levels []float64) (float64, bool) {
	top, ok := loudest(levels)
	if !ok {
		return 0, false
	}
	// Taking the loudest level out first keeps the sum of one level exactly that level.
	var sum float64
	for _, l := range levels {
		sum += energyRatio(l, top)
	}
	return top + 10*math.Log10(sum), true
}

// EnergyMean gives the energy mean of levels in dB, 10 lg of the mean of 10^(L/10) (ISO 9612:2009,
// formulas 7 and 11, seen in a secondary source). It returns false if there are no levels or one is not
// a number.
func EnergyMean(levels []float64) (float64, bool) {
	top, ok := loudest(levels)
	if !ok {
		return 0, false
	}
	var sum float64
	for _, l := range levels {
		sum += energyRatio(l, top)
	}
	return top + 10*math.Log10(sum/float64(len(levels))), true
}

// LevelOfSegments gives the equivalent continuous level in dB of the whole time of the segments,
// 10 lg of the mean of 10^(L/10) weighted by time (from memory). It has no threshold. It returns false
// if a level is not a finite number, a time is negative or not a finite number, or no time passes.
func LevelOfSegments(day []Segment) (float64, bool) {
	top, total := math.Inf(-1), 0.0
	for _, seg := range day {
		if !finite(seg.Level) || !finite(seg.Minutes) || seg.Minutes < 0 {
			return 0, false
		}
		total += seg.Minutes
		if seg.Minutes > 0 {
			top = max(top, seg.Level)
		}
	}
	if total == 0 {
		return 0, false
	}
	var sum float64
	for _, seg := range day {
		if seg.Minutes > 0 {
			sum += seg.Minutes * energyRatio(seg.Level, top)
		}
	}
	return top + 10*math.Log10(sum/total), true
}

// LEX8h gives the daily exposure level in dB: a level that lasted for a number of minutes, spread by
// equal energy over 8 hours, L + 10 lg(minutes / 480) (French order of 19 July 2006, art. 1 no. 1). It
// returns false if the level is not a finite number or the time is not above 0 and at most 24 hours.
func LEX8h(level, minutes float64) (float64, bool) {
	if !finite(level) || !withinDay(minutes) {
		return 0, false
	}
	return level + 10*math.Log10(minutes/criterionMinutes), true
}

// loudest gives the highest level; false if there is none or a level is not a finite number.
func loudest(levels []float64) (float64, bool) {
	top := math.Inf(-1)
	for _, l := range levels {
		if !finite(l) {
			return 0, false
		}
		top = max(top, l)
	}
	return top, len(levels) > 0
}

// energyRatio gives the energy of a level as a share of that of the reference level.
func energyRatio(level, reference float64) float64 {
	return math.Pow(10, (level-reference)/10)
}
