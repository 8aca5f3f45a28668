package dossier

import (
	"cmp"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// employedAt gives the stretches in which a worker is employed at the site.
func employedAt(site string, employments []*record.Worker) []calendar.Spell {
	var out []calendar.Spell
	for _, e := range employments {
		if e.Site == site {
			out = append(out, employment(e))
		}
	}
	return calendar.Union(out)
}

func employment(e *record.Worker) calendar.Spell { return inclusive(e.HiredOn, e.LeftOn) }

// inclusive makes a spell of a first and a last day.
func inclusive(first, last Date) calendar.Spell {
	if last.Known() {
		last++
	}
	return calendar.Spell{From: first, To: last}
}

// membership is a stretch in a group.
type membership struct {
	calendar.Spell
	group string
}

// memberships gives a worker's stretches in groups, by first day. Assignments to one group that touch or
// overlap make one stretch.
func (w *WorkerRecords) memberships() []membership {
	spells := map[string][]calendar.Spell{}
	for _, a := range w.Assignments {
		spells[a.Group] = append(spells[a.Group], inclusive(a.From, a.To))
	}
	var out []membership
	for group, list := range spells {
		for _, s := range calendar.Union(list) {
			out = append(out, membership{s, group})
		}
	}
	slices.SortFunc(out, func(a, b membership) int { return cmp.Or(cmp.Compare(a.From, b.From), cmp.Compare(a.group, b.group)) })
	return out
}

// timeline works out a worker's exposure while employed at the site. The worker's own full-shift result
// counts before the group's from its day on, until the group is measured or changed again. Where several
// assignments overlap, the highest exposure counts. Days without assignment and without own result are
// not known.
func (b *Builder) timeline(w *WorkerRecords, employed []calendar.Spell) []stretch {
	own, groups := b.ownResults(w), w.memberships()
	var days []Date
	var assigned []calendar.Spell
	for _, m := range groups {
		assigned = append(assigned, m.Spell)
		days = append(days, m.From, m.To)
		if h := b.histories[m.group]; h != nil {
			for _, st := range h.steps {
				days = append(days, st.from)
			}
		}
	}
	for _, m := range own.rows {
		days = append(days, m.Date)
	}
	slices.Sort(days)
	days = slices.Compact(days)

	var out []stretch
	for _, spell := range employed {
		inside := []Date{spell.From}
		for _, d := range days {
			if spell.Contains(d) && d > spell.From {
				inside = append(inside, d)
			}
		}
		gaps := calendar.Subtract([]calendar.Spell{spell}, assigned)
		for i, from := range inside {
			piece := calendar.Spell{From: from, To: spell.To}
			if i+1 < len(inside) {
				piece.To = inside[i+1]
			}
			s := stretch{Spell: piece}
			if gap, ok := calendar.Find(gaps, from); ok {
				s.on = b.inNoGroup(gap, own, from)
			}
			for _, m := range groups {
				if m.Contains(from) {
					s.add(m.group, b.inGroup(m, own, from))
				}
			}
			out = join(out, s)
		}
	}
	return out
}

// join adds a stretch, or lengthens the one before if nothing but the days differ.
func join(list []stretch, s stretch) []stretch {
	if n := len(list); n > 0 {
		if l := &list[n-1]; l.To == s.From && l.group == s.group && slices.Equal(l.on, s.on) {
			l.To = s.To
			return list
		}
	}
	return append(list, s)
}

// add takes the exposure in a group into the stretch. Where there are several groups on one day, the higher
// exposure counts.
func (s *stretch) add(group string, on []known) {
	if s.on == nil {
		s.group, s.on = group, on
		return
	}
	s.group += " and " + group
	for i, a := range s.on {
		k, other := a, on[i]
		if a.src == nil || other.src != nil && other.low > a.low {
			k, other = other, a
		}
		k.bounds = higher(k.bounds, other.bounds)
		k.quiet = k.quiet && other.quiet
		switch {
		case k.exact():
			k.reason = ""
		case k.reason == "":
			k.reason = other.reason
		}
		s.on[i] = k
	}
}

// inNoGroup gives the exposure on a day in a gap between assignments: own results of that gap tell it.
func (b *Builder) inNoGroup(gap calendar.Spell, own *ownRows, day Date) []known {
	const reason = "the worker is in no group and has no full-shift measurement"
	return b.withOwn(b.channels.historyOf(nil, nil, workplace{}), reason, gap, own.in(""), day)
}

// inGroup gives the exposure of a worker who is in a group on a day.
func (b *Builder) inGroup(m membership, own *ownRows, day Date) []known {
	if h := b.histories[m.group]; h != nil {
		return b.withOwn(h, "", m.Spell, own.in(m.group), day)
	}
	return b.withOwn(b.channels.historyOf(nil, nil, workplace{}), "the group "+m.group+" has no record and no measurement", m.Spell, own.in(m.group), day)
}

// withOwn gives what is known on a day from a group's history and from the own results of the stretch in
// the group.
func (b *Builder) withOwn(h *history, silent string, in calendar.Spell, own []*result, day Date) []known {
	own = slices.DeleteFunc(slices.Clone(own), func(r *result) bool { return !in.Contains(r.day) })
	out := slices.Clone(h.on(day).on)
	for i := range out {
		if silent != "" {
			out[i].reason = silent
		}
		out[i] = h.withOwn(i, out[i], own, day)
	}
	return out
}

// withOwn takes own results into what is known on a channel. They count from their day on until the group
// is measured or changed again, the highest of several, and where the group tells nothing also backwards.
// A result known only within bounds leaves the group's value in force as a lower bound, unless it lies
// below that. On a channel that is sampled they count from the day on that there are enough of them since the
// latest change.
func (h *history) withOwn(channel int, k known, own []*result, day Date) known {
	from := h.latest(channel, day)
	d, src := h.c.highest(own, channel, from, day)
	if src == nil && k.src == nil {
		for _, r := range own {
			if r.day <= day || h.raisedBetween(day, r.day) {
				continue
			}
			if d, src = h.c.highest(own, channel, h.spanOf(channel, r.day), r.day); src != nil {
				break
			}
		}
	}
	if src == nil {
		k.quiet = k.quiet && len(own) == 0 // an own measurement suggests noise, also one that tells nothing
		if k.src == nil && len(own) > 0 && !slices.ContainsFunc(own, func(r *result) bool { return r.usable(channel) }) {
			k.reason = h.whyNoOwn(channel, k.reason, own, from)
		}
		return k
	}
	mine := known{bounds: d, src: src, own: true, note: "the worker's own measurement"}
	if !d.exact() && !src.on[channel].expanded.Known && k.low > d.low && k.low <= d.high {
		mine.low, mine.src, mine.own = k.low, k.src, false
		mine.note = "at least the group's value; the worker's own measurement gives only bounds"
	}
	return mine
}

// whyNoOwn says why neither the group nor any of the worker's own results tells the exposure on a channel.
func (h *history) whyNoOwn(channel int, reason string, own []*result, from Date) string {
	if !h.c.sampled(channel) {
		return h.c.whyNone(slices.Concat(h.results, own), channel, "")
	}
	mine := h.c.whyNone(own, channel, h.c.shortOf(own, channel, from, h.c.asOf))
	return strings.Join(distinct([]string{reason, "of the worker's own measurements: " + mine}), "; ")
}

// latest gives the day of the group's latest change, or latest result on a channel, up to a day. On a channel
// that is sampled, results add up, so that only a change counts.
func (h *history) latest(channel int, day Date) Date {
	last := h.lastEvent(day).day
	if h.c.sampled(channel) {
		return last
	}
	for _, r := range h.results {
		if r.day <= day && r.usable(channel) {
			last = max(last, r.day)
		}
	}
	return last
}

func (h *history) raisedBetween(after, until Date) bool {
	return slices.ContainsFunc(h.events, func(e event) bool { return e.raises && e.day > after && e.day <= until })
}

// ownRows are the worker's own measurements. What a level says depends on the shifts and days of the group in
// which it was taken.
type ownRows struct {
	b    *Builder
	rows []*record.Measurement // by day; rows of one measurement follow each other
	made map[string][]*result  // by group
}

func (b *Builder) ownResults(w *WorkerRecords) *ownRows {
	o := &ownRows{b: b, rows: slices.Clone(w.Measurements)}
	slices.SortStableFunc(o.rows, compareMeasurements)
	return o
}

// in gives the results of the own personal measurements as taken in a group.
func (o *ownRows) in(group string) []*result {
	if len(o.rows) == 0 {
		return nil
	}
	c := &o.b.channels
	if !c.levels {
		group = "" // a dose does not depend on it
	}
	out, ok := o.made[group]
	if ok {
		return out
	}
	at := workplaceOf(group, o.b.Registers.Groups[group])
	for rows := o.rows; len(rows) > 0; {
		n := sameMeasurement(rows)
		if rows[0].Type == "personal" {
			out = append(out, c.ofMeasurement(rows[:n:n], at))
		}
		rows = rows[n:]
	}
	if o.made == nil {
		o.made = map[string][]*result{}
	}
	o.made[group] = out
	return out
}
