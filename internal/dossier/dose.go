package dossier

import (
	"fmt"
	"math"
	"strconv"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// portion says how much of a shift a sample tells: all of it, or a part that was marked representative and is
// projected to the shift.
type portion struct {
	projected  bool
	run, shift float64 // minutes; set where projected
}

// portionOf gives the portion of the shift that a sample tells; the note says why it tells none.
func portionOf(m *record.Measurement) (p portion, note string) {
	const notFull = "the sample is not marked as covering the full shift"
	switch {
	case coversShift(m):
		return portion{}, ""
	case m.Representative != record.Yes:
		return portion{}, notFull
	case !m.RunMinutes.Known || m.RunMinutes.Value <= 0 || !m.ShiftMinutes.Known:
		return portion{}, "the sample is marked representative, but its run time or the length of its shift is not recorded"
	case m.RunMinutes.Value >= m.ShiftMinutes.Value:
		return portion{}, notFull // it ran for the shift and is yet marked as not covering it
	}
	return portion{true, m.RunMinutes.Value, m.ShiftMinutes.Value}, ""
}

func coversShift(m *record.Measurement) bool {
	if m.FullShift != record.Unanswered {
		return m.FullShift == record.Yes
	}
	return m.RunMinutes.Known && m.ShiftMinutes.Known && m.RunMinutes.Value >= m.ShiftMinutes.Value
}

// taken is a dose as a row of a measurement has it, for the whole shift.
type taken struct {
	scale          acoustics.Scale
	thresholdKnown bool
	pct            float64
	working        string
}

// doseOf gives the dose of a row for the whole shift: as recorded, or worked out from the average in its own
// settings; of a representative part of the shift projected to all of it. The note says why there is none.
func doseOf(m *record.Measurement) (t taken, note string) {
	part, note := portionOf(m)
	if note != "" {
		return t, note
	}
	if !m.CriterionDB.Known || !m.ExchangeDB.Known {
		return t, "criterion level or exchange rate is not recorded"
	}
	t.thresholdKnown = m.ThresholdDB.Known
	t.scale = acoustics.Scale{Criterion: m.CriterionDB.Value, Exchange: m.ExchangeDB.Value, Threshold: m.ThresholdDB.Value, Upper: m.UpperDB.Value}
	switch {
	case m.DosePct.Known:
		t.pct, t.working = m.DosePct.Value, "dose "+number(m.DosePct.Value)+" % measured"
	case m.TWADBA.Known:
		t.pct = t.scale.DoseOfTWA(m.TWADBA.Value)
		t.working = "TWA " + number(m.TWADBA.Value) + " dBA measured, dose " + number(acoustics.RoundTenth(t.pct)) + " %"
	default:
		return t, "neither dose nor time-weighted average is recorded"
	}
	if !part.projected {
		return t, ""
	}
	both, ok := t.scale.Partial(t.pct, part.run, part.shift)
	if !ok {
		return t, "the dose of the sample cannot be projected to the shift"
	}
	t.working += " in " + number(part.run) + " min"
	if both.HasLevels {
		t.working += fmt.Sprintf(" (as measured, the rest quiet: TWA %.1f dBA; projected: TWA %.1f dBA)", both.MeasuredTWA, both.ProjectedTWA)
	}
	t.working += fmt.Sprintf("; the sample stands for the shift of %s min, so the dose is %s · %s / %s = %s %%", number(part.shift),
		number(acoustics.RoundTenth(t.pct)), number(part.shift), number(part.run), number(acoustics.RoundTenth(both.ProjectedDose)))
	t.pct = both.ProjectedDose
	return t, ""
}

// takeDose notes on a dose channel what a dose taken with some settings says about the dose asked for. A dose
// taken with another criterion level or exchange rate is never converted. A dose taken with a lower threshold
// is an upper bound, one taken with a higher threshold a lower bound of the dose asked for; one that begins lower and
// ends lower is neither.
func (r *reading) takeDose(asked acoustics.Scale, t taken) {
	if t.scale.Criterion != asked.Criterion || t.scale.Exchange != asked.Exchange {
		r.notes = append(r.notes, fmt.Sprintf("the dose was taken with criterion level %s dBA and %s dB exchange rate, not %s dBA and %s dB; it cannot be converted",
			number(t.scale.Criterion), number(t.scale.Exchange), number(asked.Criterion), number(asked.Exchange)))
		return
	}
	if !t.thresholdKnown {
		r.notes = append(r.notes, "the integration threshold of the dose is not recorded")
		return
	}
	reaches := asked.Upper == 0 || t.scale.Upper == 0 || t.scale.Upper >= asked.Upper
	working := t.working
	switch {
	case t.scale.Threshold == asked.Threshold && reaches:
		r.bounds = bounds{t.pct, t.pct}
	case t.scale.Threshold < asked.Threshold && reaches:
		if r.exact() || t.pct >= r.high {
			return
		}
		r.high = t.pct
		working += " from " + number(t.scale.Threshold) + " dBA on, so that the dose from " + number(asked.Threshold) + " dBA on is at most that"
	case t.scale.Threshold < asked.Threshold:
		r.notes = append(r.notes, fmt.Sprintf("the dose was taken from %s to %s dBA, not from %s to %s dBA, so that the dose asked for may be more or less",
			number(t.scale.Threshold), number(t.scale.Upper), number(asked.Threshold), number(asked.Upper)))
		return
	default:
		if r.exact() || t.pct <= r.low {
			return
		}
		r.low = t.pct
		working += " over a narrower range, so that the dose is at least that"
	}
	r.working = append(r.working[:0], working)
}

// doseLine writes the time-weighted average of a dose with its formula; false for a dose of 0.
func doseLine(s acoustics.Scale, pct float64) (string, float64, bool) {
	twa, ok := s.TWAReported(pct)
	if !ok {
		return "", 0, false
	}
	return "TWA = " + coefficient(s) + " · lg(" + number(acoustics.RoundTenth(pct)) + "/100) + " + number(s.Criterion) + " = " + tenth(twa) + " dBA", twa, true
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

// tenth and hundredth write a level to 0.1 and 0.01 dB.
func tenth(v float64) string     { return strconv.FormatFloat(v, 'f', 1, 64) }
func hundredth(v float64) string { return strconv.FormatFloat(v, 'f', 2, 64) }

// hours writes minutes as hours, to 0.01 h.
func hours(minutes float64) string { return number(math.Round(minutes/60*100) / 100) }
