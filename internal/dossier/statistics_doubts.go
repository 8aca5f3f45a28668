package dossier

import (
	"fmt"
	"strings"
	"sync"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// toleranceFactors keeps the factors of the 95/95 tolerance limit by number of levels; each takes a while.
var toleranceFactors sync.Map

func toleranceFactor(n int) (float64, error) {
	if k, ok := toleranceFactors.Load(n); ok {
		return k.(float64), nil
	}
	k, err := acoustics.ToleranceFactor(n, coverage, confidence)
	if err == nil {
		toleranceFactors.Store(n, k)
	}
	return k, err
}

// listed writes levels to 0.1 dB, not more than twelve of them.
func listed(levels []float64) string {
	const most = 12
	var parts []string
	for _, l := range levels[:min(len(levels), most)] {
		parts = append(parts, tenth(l))
	}
	text := strings.Join(parts, ", ")
	if more := len(levels) - most; more > 0 {
		text += fmt.Sprintf(" and %d more", more)
	}
	return text + " dBA"
}

// doubts says which figures of one measurement cannot all be right. They inform and decide nothing.
func doubts(rows []*record.Measurement) []string {
	out := []string{}
	var readings []acoustics.Reading
	var peaks []acoustics.Peak
	for _, m := range rows {
		if m.PeakDB.Known && m.PeakWeighting != "" {
			peaks = append(peaks, acoustics.Peak{Level: m.PeakDB.Value, Weighting: acoustics.Weighting(m.PeakWeighting)})
		}
	}
	if len(peaks) > 1 {
		if _, err := acoustics.HighestPeak(peaks); err != nil {
			out = append(out, err.Error())
		}
	}
	for _, m := range rows {
		if !m.CriterionDB.Known || !m.ExchangeDB.Known || !m.DosePct.Known {
			continue
		}
		scale := acoustics.Scale{Criterion: m.CriterionDB.Value, Exchange: m.ExchangeDB.Value, Threshold: m.ThresholdDB.Value, Upper: m.UpperDB.Value}
		if m.TWADBA.Known {
			out = append(out, scale.DoubtTWA(m.DosePct.Value, m.TWADBA.Value, m.RunMinutes.Value))
		}
		if !m.ThresholdDB.Known {
			continue
		}
		one := acoustics.Reading{Scale: scale, DosePct: m.DosePct.Value}
		for _, other := range readings {
			out = append(out, acoustics.DoubtReadings(other, one))
		}
		readings = append(readings, one)
	}
	return emptyNotNil(distinct(out))
}
