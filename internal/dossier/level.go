package dossier

import (
	"fmt"
	"math"
	"slices"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// equalEnergy is the exchange rate in dB of a dose that is summed up by equal energy.
const equalEnergy = 3

// takeLevel notes on a channel of levels what a row says about L_EX,8h: exactly by its equivalent level and the
// length of the shift, or by a dose taken at 3 dB exchange. A dose taken at another exchange rate is never
// converted. The note says why the row has no dose t.
func (r *reading) takeLevel(m *record.Measurement, t taken, note string, at workplace) {
	if m.LAeqDBA.Known {
		r.takeLAeq(m, at)
		return
	}
	switch {
	case note != "":
		r.notes = append(r.notes, note)
	case t.scale.Exchange != equalEnergy:
		r.notes = append(r.notes, fmt.Sprintf("the dose was taken with %s dB exchange rate; it cannot be converted into a level", number(t.scale.Exchange)))
	case r.estimate.Known:
	default:
		r.takeEnergyDose(t, shiftOf(m, at))
	}
}

// takeLAeq takes the equivalent level of a shift: L_EX,8h = LAeq + 10 lg(T / 8 h). Of several in one
// measurement the highest counts.
func (r *reading) takeLAeq(m *record.Measurement, at workplace) {
	part, note := portionOf(m)
	if note != "" {
		r.notes = append(r.notes, note)
		return
	}
	shift := shiftOf(m, at)
	lex, ok := acoustics.LEX8h(m.LAeqDBA.Value, shift.Value)
	if !shift.Known || !ok {
		r.notes = append(r.notes, "the length of the shift is not recorded")
		return
	}
	if r.estimate.Known && lex <= r.estimate.Value {
		return
	}
	laeq := number(m.LAeqDBA.Value)
	r.working = r.working[:0]
	if part.projected {
		quiet, _ := acoustics.LEX8h(m.LAeqDBA.Value, part.run)
		r.working = append(r.working, fmt.Sprintf("LAeq %s dBA measured in %s min (as measured, the rest quiet: L_EX,8h = %s + 10 lg(%s h / 8 h) = %s dBA); the sample stands for the shift of %s min",
			laeq, number(part.run), laeq, hours(part.run), hundredth(quiet), number(part.shift)))
	}
	r.working = append(r.working, lexLine(laeq, shift.Value, lex))
	r.bounds, r.estimate = bounds{lex, lex}, record.Num(lex)
}

// shiftOf gives the length of the shift that a row was taken in, minutes: its own, else that of the group.
func shiftOf(m *record.Measurement, at workplace) record.Number {
	if m.ShiftMinutes.Known {
		return m.ShiftMinutes
	}
	return at.shift
}

func lexLine(level string, minutes, lex float64) string {
	return "L_EX,8h = " + level + " + 10 lg(" + hours(minutes) + " h / 8 h) = " + hundredth(lex) + " dBA"
}

// takeEnergyDose takes the level of a dose at 3 dB exchange, criterion + 10 lg(D/100): exactly if all levels
// count, else as a lower bound, since levels below the threshold are lost. They can add no more than the threshold
// itself, all the shift long, which gives an upper bound where no level was beyond the range of the dose.
func (r *reading) takeEnergyDose(t taken, shift record.Number) {
	level, ok := t.scale.TWA(t.pct)
	if !ok {
		most, known := mostWithQuiet(t, shift)
		if !known || most >= r.high {
			r.notes = append(r.notes, "a dose of 0 % has no level")
			return
		}
		r.high = most
		r.working = append(r.working[:0], t.working, "no level reached "+number(t.scale.Threshold)+" dBA, so that L_EX,8h is at most "+hundredth(most)+" dBA")
		return
	}
	line := "L_EX,8h = " + number(t.scale.Criterion) + " + 10 lg(" + number(acoustics.RoundTenth(t.pct)) + "/100) = " + hundredth(level) + " dBA"
	switch {
	case t.thresholdKnown && t.scale.Threshold == 0:
		r.bounds, r.estimate = bounds{level, level}, record.Num(level)
	case level > r.low:
		r.low = level
		from := "an integration threshold that is not recorded"
		if t.thresholdKnown {
			from = number(t.scale.Threshold) + " dBA"
		}
		line += "; the dose counts from " + from + " on, so that the level is at least that"
		if most, ok := mostWithQuiet(t, shift); ok {
			r.high = min(r.high, most)
			line += ", and with " + number(t.scale.Threshold) + " dBA all the rest at most " + hundredth(most) + " dBA"
		}
	default:
		return
	}
	r.working = append(r.working[:0], t.working, line)
}

// wholeRange is the level in dBA up to which a dose must count so that nothing is taken to lie above its range.
const wholeRange = 140

// mostWithQuiet gives the highest level that a dose at 3 dB exchange with a threshold allows: as if the levels that
// were lost had all been at the threshold, all the shift long.
func mostWithQuiet(t taken, shift record.Number) (float64, bool) {
	if !t.thresholdKnown || t.scale.Threshold == 0 || !shift.Known || t.scale.Upper != 0 && t.scale.Upper < wholeRange {
		return 0, false
	}
	return t.scale.TWA(t.pct + lostBelow(t.scale, shift.Value))
}

// lostBelow gives the dose in percent of the threshold level, all the shift long: no more is lost below it.
func lostBelow(s acoustics.Scale, minutes float64) float64 {
	if s.Threshold == 0 {
		return 0
	}
	return s.DoseOfTWA(s.Threshold) * minutes / 480
}

// takeEnergyLevel takes an equivalent level as a dose at 3 dB exchange. It holds all levels, so that the dose from a
// threshold on is at most that, and at least that less what the threshold itself would give all the shift long.
func (r *reading) takeEnergyLevel(asked acoustics.Scale, m *record.Measurement, at workplace) {
	part, note := portionOf(m)
	shift := shiftOf(m, at)
	if note == "" && !shift.Known {
		note = "the length of the shift is not recorded"
	}
	if note != "" {
		r.notes = append(r.notes, note)
		return
	}
	minutes := shift.Value
	if part.projected {
		minutes = part.shift
	}
	dose := asked.DoseOfTWA(m.LAeqDBA.Value) * minutes / 480
	found := bounds{max(0, dose-lostBelow(asked, minutes)), dose}
	if r.exact() || found.high >= r.high {
		return
	}
	r.bounds = found
	line := "LAeq " + number(m.LAeqDBA.Value) + " dBA over " + hours(minutes) + " h, D = 100 · " + hours(minutes) + " h / 8 h · 10^((LAeq − " + number(asked.Criterion) +
		")/10) = " + number(acoustics.RoundTenth(dose)) + " %"
	if !found.exact() {
		line += "; it holds levels below " + number(asked.Threshold) + " dBA, too, so that the dose from there on is at least " + number(acoustics.RoundTenth(found.low)) + " %"
	}
	r.working = append(r.working[:0], line)
}

// week turns a daily level into that of the week on a weekly channel, L_EX,w: 10 lg of a fifth of the sum over
// the days worked, all taken alike. It divides by five, whatever the number of days.
func (c *channels) week(i int, r *reading, at workplace) {
	if !c.channels[i].Weekly {
		return
	}
	days := int(math.Ceil(at.days.Value))
	offset, err := acoustics.WeeklyLEX(slices.Repeat([]float64{0}, max(days, 0)), days)
	if !at.days.Known || err != nil {
		why := "the days worked in a week are not recorded"
		if at.group != "" {
			why += " for the group " + at.group
		}
		r.notes = append(r.notes, why)
		r.bounds, r.estimate, r.expanded, r.sampling = unknown, record.Number{}, record.Number{}, nil
		return
	}
	r.offset = offset
	r.low, r.high = r.low+offset, r.high+offset // an open bound stays open
	text := "L_EX,8h"
	if r.estimate.Known {
		text = hundredth(r.estimate.Value)
		r.estimate.Value += offset
	}
	line := "L_EX,w = " + text + " + 10 lg(" + fmt.Sprint(days) + "/5)"
	if r.estimate.Known {
		line += " = " + hundredth(r.estimate.Value) + " dBA"
	} else {
		line += fmt.Sprintf(", at least %s dBA", hundredth(r.low))
	}
	r.working = append(r.working, line+fmt.Sprintf(" (%d days a week alike)", days))
}

// steadyLine says which steady level reaches the level that enrols in a shift of other than 8 hours; an empty
// text if the shift has 8 hours or the law has no value.
func (c *channels) steadyLine(day Date, shift float64, at workplace) string {
	const eight = 480
	if shift == eight {
		return ""
	}
	limit, verb, ok := c.enrolling(day)
	if !ok {
		return ""
	}
	start := "for information: in a shift of " + hours(shift) + " h "
	if !c.isLevel(c.enrols) {
		scale := c.scales[c.enrols]
		steady, ok := scale.SteadyLevel(limit, shift)
		if !ok {
			return ""
		}
		line := fmt.Sprintf("%sa steady level of %.1f dBA %s %s %%", start, steady.Level, verb, number(limit))
		if steady.BelowThreshold {
			line += fmt.Sprintf(", but levels below %s dBA do not count", number(scale.Threshold))
		}
		return line
	}
	daily, text := limit, number(limit)
	if c.channels[c.enrols].Weekly {
		if days := math.Ceil(at.days.Value); at.days.Known && days > 0 {
			daily -= 10 * math.Log10(days/5)
			text += " − 10 lg(" + number(days) + "/5)"
		}
	}
	steady, ok := acoustics.EqualEnergySteadyLevel(daily, shift)
	if !ok {
		return ""
	}
	return fmt.Sprintf("%sa steady level of %s − 10 lg(%s h / 8 h) = %.1f dBA %s %s dBA", start, text, hours(shift), steady, verb, number(limit))
}

// enrolling gives the parameter that enrols, percent or dBA, on a day, or where it has none then, on the as-of
// day; and whether it is reached or gone beyond.
func (c *channels) enrolling(day Date) (limit float64, verb string, ok bool) {
	t := c.measures.Levels[c.measures.partsOf(c.measures.Enrols)[0]]
	name, verb := t.AtLeast+t.Above, "reaches"
	if t.Above != "" {
		verb = "is the most that does not exceed"
	}
	limit, ok = c.law.Number(name, day)
	if !ok {
		limit, ok = c.law.Number(name, c.asOf)
	}
	return limit, verb, ok
}
