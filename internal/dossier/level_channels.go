package dossier

import (
	"maps"
	"math"
	"slices"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// bounds are what is known of an exposure on one channel, a dose in percent or a level in dBA: it lies
// between low and high.
type bounds struct{ low, high float64 }

// unknown are the bounds of an exposure of which nothing is known. A level of 0 dBA is taken as the least
// there is.
var unknown = bounds{0, math.Inf(1)}

func (d bounds) exact() bool { return d.low == d.high }
func (d bounds) known() bool { return d.low > 0 || !math.IsInf(d.high, 1) }

// higher gives the higher of two exposures, bound by bound: that of a day that holds one or the other.
func higher(a, b bounds) bounds { return bounds{math.Max(a.low, b.low), math.Max(a.high, b.high)} }

// channels are the channels of a bundle's measures, in order of name.
type channels struct {
	names    []string
	channels []Channel
	scales   []acoustics.Scale // of doses; empty for a level
	levels   bool              // whether any channel is a level
	// highestAny says whether any channel takes the highest value of a figure.
	highestAny bool
	measures   ExposureMeasures
	enrols     int // the channel of the level that enrols

	registers *Registers
	rows      map[string]*record.Measurement // measurements with a level, by id
	law       Law
	asOf      Date
}

func newChannels(m ExposureMeasures, r *Registers, law Law, asOf Date) channels {
	c := channels{names: slices.Sorted(maps.Keys(m.Channels)), measures: m, registers: r, law: law, asOf: asOf}
	for _, name := range c.names {
		ch := m.Channels[name]
		c.levels = c.levels || ch.Kind == LevelChannel
		c.highestAny = c.highestAny || ch.Kind == HighestChannel
		c.channels = append(c.channels, ch)
		c.scales = append(c.scales, acoustics.Scale{Criterion: ch.CriterionDB, Exchange: ch.ExchangeDB, Threshold: ch.ThresholdDB, Upper: ch.UpperDB})
	}
	c.enrols = c.index(m.MainChannel(m.Enrols))
	c.rows = map[string]*record.Measurement{}
	for _, row := range r.Measurements {
		if c.rows[row.MeasurementID] == nil && row.LAeqDBA.Known && row.Date <= asOf {
			c.rows[row.MeasurementID] = row
		}
	}
	return c
}

func (c *channels) index(name string) int { return slices.Index(c.names, name) }

// isLevel says whether a channel is a level in dBA, or a highest value in dB; else it is a dose in percent.
func (c *channels) isLevel(i int) bool { return c.channels[i].Kind == LevelChannel || c.isHighest(i) }

// isHighest says whether a channel takes the highest value of a figure.
func (c *channels) isHighest(i int) bool { return c.channels[i].Kind == HighestChannel }

// sampled says whether several results on a channel are taken together by sampling (ISO 9612).
func (c *channels) sampled(i int) bool {
	return c.isLevel(i) && !c.isHighest(i) && c.measures.Several == "sampled"
}

// workplace is what is known of the shifts of a group.
type workplace struct {
	group string
	shift record.Number // minutes
	days  record.Number // worked in a week

	impulsive record.Answer
	suspected record.Answer // of noise
}

func workplaceOf(id string, g *record.Group) workplace {
	if g == nil {
		return workplace{group: id}
	}
	return workplace{id, g.ShiftMinutes, g.DaysPerWeek, g.Impulsive, g.SuspectedNoisy}
}

// reading is what one result tells on one channel.
type reading struct {
	bounds
	estimate record.Number            // dBA, the level of a channel of levels, where known
	expanded record.Number            // dB, its uncertainty U, one-sided 95 %
	sampling *acoustics.SampledResult // where the level is that of several samples
	offset   float64                  // dB from L_EX,8h to the level of the channel: of a week; else 0
	sample   *sample                  // where it counts only together with others
	working  []string                 // how it came about
	notes    []string                 // why it tells nothing, or less
	shown    Level                    // as the dossier shows it
}

// result is one determination of exposure: a full-shift measurement, a day described by tasks, or several
// samples together.
type result struct {
	day   Date
	rec   record.Record
	rows  []*record.Measurement // the channels of a measurement
	more  []record.Record       // further records that it rests on
	id    string
	on    []reading // one a channel
	pools []pool    // those that end with this result
}

// usable says whether the result tells anything on a channel by itself.
func (r *result) usable(channel int) bool { return r.on[channel].known() }

// settles says whether the result gives the exposure on a channel exactly, or a sample of it.
func (r *result) settles(channel int) bool {
	return r.on[channel].exact() || r.on[channel].sample != nil
}

func (c *channels) newResult(day Date, rec record.Record, id string) *result {
	r := &result{day: day, rec: rec, id: id, on: make([]reading, len(c.names))}
	for i := range r.on {
		r.on[i].bounds = unknown
	}
	return r
}

// ofMeasurement takes the rows of one measurement into a result.
func (c *channels) ofMeasurement(rows []*record.Measurement, at workplace) *result {
	r := c.newResult(rows[0].Date, rows[0], rows[0].MeasurementID)
	r.rows = rows
	for _, m := range rows {
		t, note := doseOf(m)
		for i := range c.names {
			on := &r.on[i]
			switch {
			case c.isHighest(i):
				on.takeHighest(c.channels[i].Of, m)
			case m.Type == "task": // the level of a task is taken with the tasks of the day
			case c.sampled(i):
				c.takeSample(on, m, at)
			case c.isLevel(i):
				on.takeLevel(m, t, note, at)
			case c.scales[i].Exchange == equalEnergy && m.LAeqDBA.Known && note != "" && !m.DosePct.Known && !m.TWADBA.Known:
				on.takeEnergyLevel(c.scales[i], m, at)
			case note != "":
				on.notes = append(on.notes, note)
			default:
				on.takeDose(c.scales[i], t)
			}
		}
	}
	shift := at.shift
	for _, m := range rows {
		if m.ShiftMinutes.Known {
			shift = m.ShiftMinutes
		}
	}
	for i := range r.on {
		if !c.isLevel(i) || c.isHighest(i) || !r.on[i].known() {
			continue
		}
		c.margin(&r.on[i], rows)
		c.week(i, &r.on[i], at)
	}
	c.finish(r, shift, at)
	return r
}

// finish writes what the result tells on each channel as the dossier shows it.
func (c *channels) finish(r *result, shift record.Number, at workplace) {
	for i := range r.on {
		on := &r.on[i]
		if !on.known() {
			continue
		}
		on.shown = c.levelOf(i, on.bounds, on)
		if i == c.enrols && shift.Known {
			if line := c.steadyLine(r.day, shift.Value, at); line != "" {
				on.shown.Working = append(on.shown.Working, line)
			}
		}
	}
}

// level writes what is known on a channel as the dossier shows it.
func (c *channels) level(i int, k *known) Level {
	switch {
	case !k.known():
		return Level{}
	case k.src == nil:
		return c.levelOf(i, k.bounds, &reading{})
	case k.bounds == k.src.on[i].bounds:
		return k.src.on[i].shown
	}
	l := c.levelOf(i, k.bounds, &reading{working: k.src.on[i].working})
	if !k.exact() {
		l.Working = append(l.Working, "known of these days: "+c.words(i, k.bounds))
	}
	return l
}

// words writes bounds that are not exact.
func (c *channels) words(i int, d bounds) string {
	unit := " %"
	switch {
	case c.isHighest(i):
		unit = " " + figureUnits[c.channels[i].Of]
	case c.isLevel(i):
		unit = " dBA"
	}
	var parts []string
	if d.low > 0 {
		parts = append(parts, "at least "+hundredth(d.low)+unit)
	}
	if !math.IsInf(d.high, 1) {
		parts = append(parts, "at most "+hundredth(d.high)+unit)
	}
	return strings.Join(parts, ", ")
}

// levelOf writes bounds, and what a reading says about how they came about.
func (c *channels) levelOf(i int, d bounds, on *reading) Level {
	l := Level{LevelDBA: on.estimate, UDB: on.expanded, Working: slices.Clone(on.working)}
	if d.low > 0 || d.exact() {
		l.AtLeast = record.Num(d.low)
	}
	if !math.IsInf(d.high, 1) {
		l.AtMost = record.Num(d.high)
	}
	if c.isLevel(i) || !d.exact() {
		return l
	}
	l.DosePct = record.Num(d.low)
	if line, twa, ok := doseLine(c.scales[i], d.low); ok {
		l.TWADBA = record.Num(twa)
		l.Working = append(l.Working, line)
	}
	return l
}
