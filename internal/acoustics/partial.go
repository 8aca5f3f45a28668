package acoustics

import "math"

// AverageLevel gives the level in dB that, lasting for the time the instrument ran, has the dose dosePct in
// percent, criterion + exchange * log2(dose/100 * 480/minutes); instruments call it L_avg (29 CFR 1910.95
// App. A, formulas of the dose rearranged). It is not the eight-hour average unless the instrument ran for
// 8 hours. It returns false if the dose is not a finite number above 0, the time is not above 0 and at most
// 24 hours, or the scale has no exchange rate.
func (s Scale) AverageLevel(dosePct, ranMinutes float64) (float64, bool) {
	if !(dosePct > 0) || !finite(dosePct) || !withinDay(ranMinutes) || !(s.Exchange > 0) {
		return 0, false
	}
	return s.Criterion + s.Exchange*math.Log2(dosePct/100*criterionMinutes/ranMinutes), true
}

// PartialSample is a dose that was measured for another time than the shift, read both ways. Which one
// holds is not in the numbers: as measured if the rest of the shift is known to be quiet, projected if the
// sample stands for the whole shift.
type PartialSample struct {
	MeasuredDose  float64 // percent
	ProjectedDose float64 // percent
	HasLevels     bool    // false for a dose of 0, which has no level
	Average       float64 // dB over the time the instrument ran
	MeasuredTWA   float64 // dB over 8 hours, the rest quiet
	ProjectedTWA  float64 // dB over 8 hours, the rest like the sample
}

// Partial reads the dose dosePct in percent, measured for ranMinutes of a shift of shiftMinutes, as it is
// and projected to the shift. It returns false where Project does, or if the scale has no exchange rate.
func (s Scale) Partial(dosePct, ranMinutes, shiftMinutes float64) (PartialSample, bool) {
	projected, ok := s.Project(dosePct, ranMinutes, shiftMinutes)
	if !ok || !(s.Exchange > 0) {
		return PartialSample{}, false
	}
	p := PartialSample{MeasuredDose: dosePct, ProjectedDose: projected}
	if dosePct == 0 {
		return p, true
	}
	p.HasLevels = true
	p.Average, _ = s.AverageLevel(dosePct, ranMinutes)
	p.MeasuredTWA, _ = s.TWA(dosePct)
	p.ProjectedTWA, _ = s.TWA(projected)
	return p, true
}
