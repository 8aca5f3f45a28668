package dossier

import (
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// dose is what is known of a noise dose in percent: it lies between low and high.
type dose struct{ low, high float64 }

// unknownDose is a dose of which nothing is known.
var unknownDose = dose{0, math.Inf(1)}

func (d dose) exact() bool { return d.low == d.high }
func (d dose) known() bool { return d.low > 0 || !math.IsInf(d.high, 1) }

// higher gives the higher of two doses, bound by bound: the dose of a day that holds one or the other.
func higher(a, b dose) dose { return dose{math.Max(a.low, b.low), math.Max(a.high, b.high)} }

// channels are the dose channels of a bundle's measures, in order of name.
type channels struct {
	names  []string
	scales []acoustics.Scale
}

func newChannels(m map[string]Channel) channels {
	c := channels{names: slices.Sorted(maps.Keys(m))}
	for _, name := range c.names {
		ch := m[name]
		c.scales = append(c.scales, acoustics.Scale{Criterion: ch.CriterionDB, Exchange: ch.ExchangeDB, Threshold: ch.ThresholdDB, Upper: ch.UpperDB})
	}
	return c
}

func (c channels) index(name string) int { return slices.Index(c.names, name) }

// result is one determination of exposure: a full-shift measurement, or a day described by tasks.
type result struct {
	day   Date
	rec   record.Record
	rows  []*record.Measurement // the dose channels of a measurement
	id    string
	doses []dose // one a channel
	notes []string
	sums  []string // how each channel's dose came about
}

// usable says whether the result tells anything on a channel.
func (r *result) usable(channel int) bool { return r.doses[channel].known() }

func (c channels) newResult(day Date, rec record.Record, id string) *result {
	r := &result{day: day, rec: rec, id: id, doses: make([]dose, len(c.names)), sums: make([]string, len(c.names))}
	for i := range r.doses {
		r.doses[i] = unknownDose
	}
	return r
}

// ofMeasurement takes the rows of one measurement, one a dose channel, into a result. A dose taken with
// another criterion level or exchange rate is never converted. A dose taken with a lower threshold is an
// upper bound, one taken with a higher threshold a lower bound of the dose asked for.
func (c channels) ofMeasurement(rows []*record.Measurement) *result {
	r := c.newResult(rows[0].Date, rows[0], rows[0].MeasurementID)
	r.rows = rows
	for _, m := range rows {
		if !coversShift(m) {
			r.notes = append(r.notes, "the sample is not marked as covering the full shift")
			continue
		}
		if !m.CriterionDB.Known || !m.ExchangeDB.Known {
			r.notes = append(r.notes, "criterion level or exchange rate is not recorded")
			continue
		}
		taken := acoustics.Scale{Criterion: m.CriterionDB.Value, Exchange: m.ExchangeDB.Value, Threshold: m.ThresholdDB.Value, Upper: m.UpperDB.Value}
		pct, working, ok := doseOf(m, taken)
		if !ok {
			r.notes = append(r.notes, "neither dose nor time-weighted average is recorded")
			continue
		}
		for i, asked := range c.scales {
			r.take(i, asked, taken, m.ThresholdDB.Known, pct, working)
		}
	}
	return r
}

func coversShift(m *record.Measurement) bool {
	if m.FullShift != record.Unanswered {
		return m.FullShift == record.Yes
	}
	return m.RunMinutes.Known && m.ShiftMinutes.Known && m.RunMinutes.Value >= m.ShiftMinutes.Value
}

// doseOf gives the dose of a row in percent: as recorded, or worked out from the average in its own settings.
func doseOf(m *record.Measurement, taken acoustics.Scale) (pct float64, working string, ok bool) {
	if m.DosePct.Known {
		return m.DosePct.Value, fmt.Sprintf("dose %s %% measured", number(m.DosePct.Value)), true
	}
	if m.TWADBA.Known {
		pct := taken.DoseOfTWA(m.TWADBA.Value)
		return pct, fmt.Sprintf("TWA %s dBA measured, dose %s %%", number(m.TWADBA.Value), number(acoustics.RoundTenth(pct))), true
	}
	return 0, "", false
}

// take notes what a dose taken with some settings says about the dose asked for.
func (r *result) take(i int, asked, taken acoustics.Scale, thresholdKnown bool, pct float64, working string) {
	if taken.Criterion != asked.Criterion || taken.Exchange != asked.Exchange {
		r.notes = append(r.notes, fmt.Sprintf("the dose was taken with criterion level %s dBA and %s dB exchange rate, not %s dBA and %s dB; it cannot be converted",
			number(taken.Criterion), number(taken.Exchange), number(asked.Criterion), number(asked.Exchange)))
		return
	}
	if !thresholdKnown {
		r.notes = append(r.notes, "the integration threshold of the dose is not recorded")
		return
	}
	reaches := asked.Upper == 0 || taken.Upper == 0 || taken.Upper >= asked.Upper
	d := r.doses[i]
	switch {
	case taken.Threshold == asked.Threshold && reaches:
		d = dose{pct, pct}
	case taken.Threshold < asked.Threshold && reaches:
		if d.exact() || pct >= d.high {
			return
		}
		d.high = pct
		working += fmt.Sprintf(" from %s dBA on, so that the dose from %s dBA on is at most that", number(taken.Threshold), number(asked.Threshold))
	default:
		if d.exact() || pct <= d.low {
			return
		}
		d.low = pct
		working += " over a narrower range, so that the dose is at least that"
	}
	r.doses[i], r.sums[i] = d, working
}

// ofTasks works out the dose of a day that tasks describe, on every channel: D = 100 · Σ C/T.
func (c channels) ofTasks(tasks []*record.Task, level func(sample string) (float64, bool)) *result {
	first := tasks[0]
	r := c.newResult(first.Date, first, "")
	var day []acoustics.Segment
	var parts []string
	for _, t := range tasks {
		if len(t.Samples) == 0 {
			r.notes = append(r.notes, fmt.Sprintf("the task %s has no level", t.Task))
			return r
		}
		for _, sample := range t.Samples {
			db, ok := level(sample)
			if !ok {
				r.notes = append(r.notes, fmt.Sprintf("the sample %s of the task %s has no level", sample, t.Task))
				return r
			}
			minutes := t.Minutes.Value / float64(len(t.Samples))
			day = append(day, acoustics.Segment{Level: db, Minutes: minutes})
			parts = append(parts, fmt.Sprintf("%s min at %s dBA", number(acoustics.RoundTenth(minutes)), number(db)))
		}
	}
	for i, s := range c.scales {
		pct, err := s.Dose(day)
		if err != nil {
			r.notes = append(r.notes, err.Error())
			return r
		}
		r.doses[i] = dose{pct, pct}
		r.sums[i] = fmt.Sprintf("tasks: %s; D = 100 · Σ C/T = %s %%", strings.Join(parts, ", "), number(acoustics.RoundTenth(pct)))
	}
	return r
}

// level writes a dose as a dossier's level on a channel.
func (c channels) level(i int, d dose, sum string) Level {
	if !d.known() {
		return Level{}
	}
	l := Level{Working: sum}
	if !d.exact() {
		if d.low > 0 {
			l.AtLeast = record.Num(d.low)
		}
		if !math.IsInf(d.high, 1) {
			l.AtMost = record.Num(d.high)
		}
		return l
	}
	l.DosePct, l.AtLeast, l.AtMost = record.Num(d.low), record.Num(d.low), record.Num(d.low)
	if twa, ok := c.scales[i].TWAReported(d.low); ok {
		l.TWADBA = record.Num(twa)
		l.Working += fmt.Sprintf("; TWA = %s · lg(%s/100) + %s = %.1f dBA", coefficient(c.scales[i]), number(acoustics.RoundTenth(d.low)), number(c.scales[i].Criterion), twa)
	}
	return l
}

// coefficient writes the factor of the TWA formula: 16.61 for a 5 dB exchange rate, 10 for 3 dB.
func coefficient(s acoustics.Scale) string {
	switch s.Exchange {
	case 5:
		return "16.61"
	case 3:
		return "10"
	}
	return strconv.FormatFloat(s.Exchange/math.Log10(2), 'f', 2, 64)
}

func number(v float64) string { return strconv.FormatFloat(v, 'f', -1, 64) }
