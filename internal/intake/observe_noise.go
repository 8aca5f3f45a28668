package intake

import (
	"fmt"
	"math"
	"slices"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// reading is a dose with the row that holds it.
type reading struct {
	acoustics.Reading
	at record.Origin
}

// The figures of the checks on measurements.
const (
	mostDrift   = 0.5 // dB between the calibrator checks before and after (common practice, no source)
	mostBeyond  = 1   // minute that a run may be longer than the shift, for rounding
	fullDay     = 480 // minutes
	sameAverage = 0.05
	farFromDay  = 0.2 // dB between the average of the run time and that of 8 hours
	equalEnergy = 3   // dB
	slack       = 1e-9
)

func (o *observer) measurement(m *record.Measurement) {
	at := m.At()
	if m.CheckBeforeDB.Known && m.CheckAfterDB.Known {
		if drift := math.Abs(m.CheckAfterDB.Value - m.CheckBeforeDB.Value); drift > mostDrift+slack {
			o.add(CheckDrift, at, nil, fmt.Sprintf("the calibrator checks before and after the measurement are %.1f dB apart", drift))
		}
	}
	if m.RunMinutes.Known && m.ShiftMinutes.Known && m.RunMinutes.Value > m.ShiftMinutes.Value+mostBeyond {
		o.add(RunBeyondShift, at, nil, "the instrument ran longer than the shift that it stands for")
	}
	o.average(m)
	o.doses(m)
}

// average holds the time-weighted average against the dose, or else against the average of the run time.
func (o *observer) average(m *record.Measurement) {
	if !m.TWADBA.Known || !m.ExchangeDB.Known {
		return
	}
	ran := m.RunMinutes.Value
	if m.DosePct.Known && m.CriterionDB.Known {
		scale := acoustics.Scale{Criterion: m.CriterionDB.Value, Exchange: m.ExchangeDB.Value}
		doubt := scale.DoubtTWA(m.DosePct.Value, m.TWADBA.Value, ran)
		kind := TWANotOfDose
		if mean, ok := scale.AverageLevel(m.DosePct.Value, ran); ok && math.Abs(mean-m.TWADBA.Value) <= farFromDay+slack {
			kind = AverageForTWA
		}
		if doubt != "" {
			o.add(kind, m.At(), nil, doubt)
		}
		return
	}
	shift := m.FullShift == record.Yes && m.LAeqDBA.Known && m.ExchangeDB.Value == equalEnergy && ran > 0
	if shift && math.Abs(m.LAeqDBA.Value-m.TWADBA.Value) <= sameAverage && math.Abs(10*math.Log10(ran/fullDay)) > farFromDay {
		o.add(AverageForTWA, m.At(), nil, fmt.Sprintf("the average of 8 hours is the same as that of the full shift of %g minutes, which cannot be with an exchange rate of 3 dB", ran))
	}
}

// doses compares the doses of one measurement that were counted from different thresholds.
func (o *observer) doses(m *record.Measurement) {
	if !m.DosePct.Known || !m.CriterionDB.Known || !m.ExchangeDB.Known || !m.ThresholdDB.Known {
		return
	}
	this := reading{at: m.At(), Reading: acoustics.Reading{
		Scale:   acoustics.Scale{Criterion: m.CriterionDB.Value, Exchange: m.ExchangeDB.Value, Threshold: m.ThresholdDB.Value},
		DosePct: m.DosePct.Value,
	}}
	o.buffer = append(o.buffer[:0], m.MeasurementID...)
	key := digestOf(o.buffer)
	for _, other := range o.readings[key] {
		if doubt := acoustics.DoubtReadings(other.Reading, this.Reading); doubt != "" {
			at := other.at
			o.add(DosesSwapped, this.at, &at, doubt)
		}
	}
	o.readings[key] = append(slices.Clip(o.readings[key]), this)
}
