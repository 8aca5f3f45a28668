package acoustics

import "math"

// coefficientError is what the printed coefficient of 16.61 may be off in dB: it gives 79.9998 dB where 80 is
// meant.
const coefficientError = 0.001

// ShiftLevel is the steady level that uses up a limit in a shift of a given length.
type ShiftLevel struct {
	Level          float64 // dB(A)
	BelowThreshold bool    // lower than the threshold of the scale: steady noise this low does not count at all
}

// SteadyLevel gives the steady level that builds up the dose dosePct in percent in a shift of
// shiftMinutes, coefficient * lg(D / (12.5 * hours)) + criterion (quoted from the OSHA Technical Manual by
// a secondary source, which prints 80.0 dB for half the dose in 16 hours). The coefficient is that of TWA.
// It returns false if the dose is not a finite number above 0, the time is not above 0 and at most 24
// hours, or the scale has no exchange rate.
func (s Scale) SteadyLevel(dosePct, shiftMinutes float64) (ShiftLevel, bool) {
	if !withinDay(shiftMinutes) {
		return ShiftLevel{}, false
	}
	level, ok := s.TWA(dosePct * criterionMinutes / shiftMinutes)
	if !ok {
		return ShiftLevel{}, false
	}
	return ShiftLevel{Level: level, BelowThreshold: !s.counts(level + coefficientError)}, true
}

// EqualEnergySteadyLevel gives the steady level in dB that uses up a daily limit in dB for 8 hours in a
// shift of shiftMinutes, limit - 10 lg(hours/8) (secondary source: Canadian public guidance). It returns
// false if the limit is not a finite number or the time is not above 0 and at most 24 hours.
func EqualEnergySteadyLevel(limit, shiftMinutes float64) (float64, bool) {
	if !finite(limit) || !withinDay(shiftMinutes) {
		return 0, false
	}
	return limit - 10*math.Log10(shiftMinutes/criterionMinutes), true
}

// LongShiftAddition gives what is added in dB to the daily exposure level of a long shift before it is
// compared with the exposure standard: 1 dB from 10 hours, 2 dB from 14, 3 dB from 20 (AS/NZS 1269.1, from
// memory; another form of the table has "more than 10 hours"). It returns false if the time is not above 0
// and at most 24 hours.
func LongShiftAddition(shiftMinutes float64) (float64, bool) {
	switch {
	case !withinDay(shiftMinutes):
		return 0, false
	case shiftMinutes >= 20*60:
		return 3, true
	case shiftMinutes >= 14*60:
		return 2, true
	case shiftMinutes >= 10*60:
		return 1, true
	}
	return 0, true
}
