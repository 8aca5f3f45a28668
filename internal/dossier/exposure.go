package dossier

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// known is what is known of the exposure on one channel.
type known struct {
	bounds
	src    *result // the result that decides
	own    bool    // whether it is the worker's own
	note   string  // how it was taken
	reason string  // why it is not known exactly, if more is to be said than that it lies within bounds
	quiet  bool    // whether nothing suggests noise, by the word of the group's record, and nothing was measured or changed
	needed bool    // whether a highest value that is not known must be known, since the noise holds impulses
}

// step is a group's exposure from a day on, until the next step.
type step struct {
	from Date
	on   []known // one a channel
}

// event is a change of a group's noise: of its process, or by a control that was put in place.
type event struct {
	day    Date
	raises bool // whether exposure may have risen
	what   string
}

// history is the exposure of a group over time.
type history struct {
	c       *channels
	at      workplace
	results []*result // oldest first
	events  []event   // oldest first
	steps   []step    // oldest first; the first begins before all days
}

// eventsOf gathers the changes of a group and its area, and the controls put in place there.
func (r *Registers) eventsOf(id, area string, asOf Date) []event {
	var out []event
	for _, c := range r.changesOf(id, area, asOf) {
		out = append(out, event{c.Date, c.RaisesExposure != "no", "change " + c.ChangeID + " of " + c.Date.String()})
	}
	for _, c := range r.controlsOf(id, area, asOf) {
		if c.InstalledOn.Known() && c.InstalledOn <= asOf {
			out = append(out, event{c.InstalledOn, false, "control put in place on " + c.InstalledOn.String()})
		}
	}
	slices.SortStableFunc(out, func(a, b event) int { return int(a.day) - int(b.day) })
	return out
}

func (r *Registers) changesOf(id, area string, asOf Date) []*record.Change {
	var out []*record.Change
	for _, c := range r.Changes {
		if c.Date <= asOf && (c.Group == id || c.Group == "" && area != "" && c.Area == area) {
			out = append(out, c)
		}
	}
	return out
}

func (r *Registers) controlsOf(id, area string, asOf Date) []*record.Control {
	var out []*record.Control
	for _, c := range r.Controls {
		if c.Date <= asOf && (c.Group == id || c.Group == "" && area != "" && c.Area == area) {
			out = append(out, c)
		}
	}
	return out
}

// resultsOf gathers the determinations of a group's exposure: its full-shift measurements and, where tasks
// describe its day, the day worked out from them.
func (c *channels) resultsOf(group *record.Group, id string) []*result {
	var out []*result
	r, asOf, at := c.registers, c.asOf, workplaceOf(id, group)
	rows := r.measurementsOf(group, id)
	for len(rows) > 0 {
		n := sameMeasurement(rows)
		if (rows[0].Type != "task" || c.highestAny) && rows[0].Date <= asOf {
			out = append(out, c.ofMeasurement(rows[:n:n], at))
		}
		rows = rows[n:]
	}
	tasks := r.tasksOf[id]
	for len(tasks) > 0 {
		n := 1
		for n < len(tasks) && tasks[n].Date == tasks[0].Date {
			n++
		}
		if tasks[0].Date <= asOf {
			out = append(out, c.ofTasks(tasks[:n], at))
		}
		tasks = tasks[n:]
	}
	slices.SortStableFunc(out, func(a, b *result) int { return int(a.day) - int(b.day) })
	return out
}

// historyOf works out a group's exposure over time:
//   - on a day, the highest of the results since the latest change counts, or on a channel that is sampled, the
//     samples since then together;
//   - after a change that may have raised exposure and before the next result, the exposure is at least
//     what it was;
//   - after another change it stays what it was until measured again;
//   - before the first result that result is taken backwards, unless a change that may have raised
//     exposure lies between.
func (c *channels) historyOf(results []*result, events []event, at workplace) *history {
	h := &history{c: c, at: at, results: results, events: events}
	days := []Date{0}
	for _, r := range results {
		days = append(days, r.day)
	}
	for _, e := range events {
		days = append(days, e.day)
	}
	slices.Sort(days)
	for _, day := range slices.Compact(days) {
		h.steps = append(h.steps, h.step(day))
	}
	return h
}

func (h *history) step(day Date) step {
	s := step{from: day, on: make([]known, len(h.c.names))}
	for i := range s.on {
		s.on[i] = h.needs(i, h.knownOn(i, day))
	}
	return s
}

// lastEvent gives the latest event up to a day; of several on one day, one that may have raised exposure.
func (h *history) lastEvent(day Date) event {
	var last event
	for _, e := range h.events {
		if e.day <= day && (e.day > last.day || e.raises) {
			last = e
		}
	}
	return last
}

// knownOn gives what is known of the exposure on a channel on a day.
func (h *history) knownOn(channel int, day Date) known {
	last := h.lastEvent(day)
	if d, src := h.c.highest(h.results, channel, last.day, day); src != nil {
		return known{bounds: d, src: src}
	}
	short := h.c.shortOf(h.results, channel, last.day, day)
	if last.day.Known() {
		if k := h.knownOn(channel, last.day-1); k.src != nil && k.src.day < last.day {
			if last.raises {
				k.high, k.note = unknown.high, "at least the value before the "+last.what
				k.reason = "not measured since the " + last.what + ", which may have raised exposure"
				if short != "" {
					k.reason = "since the " + last.what + ", which may have raised exposure: " + short
				}
				return k
			}
			k.note = "value before the " + last.what + "; not measured since"
			if short != "" {
				k.note = "value before the " + last.what + "; since then: " + short
			}
			return k
		}
	}
	for _, r := range h.results {
		if r.day <= day {
			continue
		}
		d, src := h.c.highest(h.results, channel, h.spanOf(channel, r.day), r.day)
		if src == nil {
			continue
		}
		for _, e := range h.events {
			if e.day > day && e.day <= r.day && e.raises {
				return known{bounds: unknown, reason: fmt.Sprintf("the first measurement is of %s, and the %s, which may have raised exposure, lies between", r.day, e.what)}
			}
		}
		return known{bounds: d, src: src, note: "taken backwards from the first measurement, of " + r.day.String()}
	}
	if h.at.suspected == record.No && len(h.results)+len(h.events) == 0 {
		return known{bounds: unknown, quiet: true, note: "never measured; the group's record says that nothing suggests noise"}
	}
	return known{bounds: unknown, reason: h.c.whyNone(h.results, channel, h.c.shortOf(h.results, channel, last.day, h.c.asOf))}
}

// spanOf gives the first day whose results count together with those of a day, where that day is the first to
// tell anything: the same day, or on a channel that is sampled, the latest change.
func (h *history) spanOf(channel int, day Date) Date {
	if h.c.sampled(channel) {
		return h.lastEvent(day).day
	}
	return day
}

// highest gives the highest exposure among the usable results from one day to another; on a channel that is
// sampled the samples together are one of them.
func (c *channels) highest(results []*result, channel int, from, to Date) (d bounds, src *result) {
	take := func(r *result) {
		if !r.usable(channel) {
			return
		}
		if src == nil {
			d, src = r.on[channel].bounds, r
			return
		}
		if r.on[channel].low > d.low {
			src = r
		}
		d = higher(d, r.on[channel].bounds)
	}
	for _, r := range results {
		if r.day >= from && r.day <= to {
			take(r)
		}
	}
	if c.sampled(channel) {
		if p := c.pooled(results, channel, from, to); p != nil {
			take(p)
		}
	}
	return d, src
}

// whyNone says why none of the results tells the exposure on a channel. Short says what is missing of its
// samples.
func (c *channels) whyNone(results []*result, channel int, short string) string {
	if len(results) == 0 {
		return "there is no full-shift measurement"
	}
	var notes []string
	for _, r := range results {
		notes = append(notes, r.on[channel].notes...)
	}
	notes = distinct(append(notes, short))
	switch {
	case len(notes) > 0:
		return strings.Join(notes, "; ")
	case c.isLevel(channel):
		return "no measurement gives the level"
	}
	return "no measurement gives the dose"
}

// first gives the first result that tells the exposure on a channel, or the first samples that do so together.
func (h *history) first(channel int) *result {
	if !h.c.sampled(channel) {
		for _, r := range h.results {
			if r.usable(channel) {
				return r
			}
		}
		return nil
	}
	for i := range h.steps {
		if src := h.steps[i].on[channel].src; src != nil {
			return src
		}
	}
	return nil
}

// on gives the step in force on a day.
func (h *history) on(day Date) *step {
	for i := len(h.steps) - 1; i > 0; i-- {
		if h.steps[i].from <= day {
			return &h.steps[i]
		}
	}
	return &h.steps[0]
}

// stretch is a piece of a subject's time with one exposure.
type stretch struct {
	calendar.Spell
	group string
	on    []known // one a channel
}

// during gives the steps of a group's history within a spell.
func (h *history) during(spell calendar.Spell, group string) []stretch {
	var out []stretch
	for i, s := range h.steps {
		piece := calendar.Spell{From: s.from}
		if i+1 < len(h.steps) {
			piece.To = h.steps[i+1].from
		}
		if piece = piece.Intersect(spell); !piece.Empty() {
			out = append(out, stretch{piece, group, s.on})
		}
	}
	return out
}
