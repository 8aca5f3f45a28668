package dossier

import (
	"slices"

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

// timeline works out a worker's exposure while employed at the site. The worker's own full-shift result
// counts before the group's from its day on, until the group is measured or changed again. Where several
// assignments overlap, the highest exposure counts. Days without assignment and without own result are
// not known.
func (b *Builder) timeline(w *WorkerRecords, employed []calendar.Spell) []stretch {
	own := b.ownResults(w)
	days := []Date{}
	for _, s := range employed {
		days = append(days, s.From)
	}
	for _, a := range w.Assignments {
		s := inclusive(a.From, a.To)
		days = append(days, s.From, s.To)
		if h := b.histories[a.Group]; h != nil {
			for _, st := range h.steps {
				days = append(days, st.from)
			}
		}
	}
	for _, r := range own {
		days = append(days, r.day)
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
		for i, from := range inside {
			piece := calendar.Spell{From: from, To: spell.To}
			if i+1 < len(inside) {
				piece.To = inside[i+1]
			}
			out = join(out, b.onDay(w, own, piece))
		}
	}
	return out
}

// join adds a stretch, or lengthens the one before if nothing but the days differ.
func join(list []stretch, s stretch) []stretch {
	if n := len(list); n > 0 {
		l := &list[n-1]
		if l.To == s.From && l.group == s.group && l.own == s.own && l.note == s.note && l.reason == s.reason &&
			slices.Equal(l.doses, s.doses) && slices.Equal(l.src, s.src) {
			l.To = s.To
			return list
		}
	}
	return append(list, s)
}

// onDay works out the exposure in a piece of time in which nothing changes.
func (b *Builder) onDay(w *WorkerRecords, own []*result, piece calendar.Spell) stretch {
	day := piece.From
	out := stretch{Spell: piece, doses: make([]dose, len(b.channels.names)), src: make([]*result, len(b.channels.names))}
	assigned := 0
	for _, a := range w.Assignments {
		s := inclusive(a.From, a.To)
		if !s.Contains(day) {
			continue
		}
		assigned++
		part := b.inGroup(a.Group, s, own, day)
		if assigned == 1 {
			part.Spell = piece
			out = part
			continue
		}
		out.merge(part)
	}
	if assigned == 0 {
		out.ownOnly(own, day)
	}
	return out
}

// inGroup gives the exposure of a worker who is in a group on a day.
func (b *Builder) inGroup(group string, assigned calendar.Spell, own []*result, day Date) stretch {
	out := stretch{group: group, doses: make([]dose, len(b.channels.names)), src: make([]*result, len(b.channels.names))}
	h := b.histories[group]
	if h == nil {
		for i := range out.doses {
			out.doses[i] = unknownDose
		}
		out.reason = "the group " + group + " has no record and no measurement"
	} else {
		st := h.on(day)
		copy(out.doses, st.doses)
		copy(out.src, st.src)
		out.note, out.reason = st.note, st.reason
	}
	since := assigned.From
	if h != nil {
		since = max(since, h.latest(day))
	}
	for i := range out.doses {
		var r *result
		for _, o := range own {
			if o.usable(i) && assigned.Contains(o.day) && o.day >= since && o.day <= day && (r == nil || o.doses[i].low >= r.doses[i].low) {
				r = o
			}
		}
		if r == nil && out.src[i] == nil { // the group tells nothing: the first own result, backwards
			for _, o := range own {
				if o.usable(i) && assigned.Contains(o.day) && o.day > day && (h == nil || !h.raisedBetween(day, o.day)) {
					r = o
					break
				}
			}
		}
		if r != nil {
			out.doses[i], out.src[i], out.own, out.note, out.reason = r.doses[i], r, true, "the worker's own measurement", ""
		}
	}
	return out
}

// latest gives the day of the group's latest result or change up to a day.
func (h *history) latest(day Date) Date {
	var last Date
	for _, r := range h.results {
		if r.day <= day {
			last = max(last, r.day)
		}
	}
	for _, e := range h.events {
		if e.day <= day {
			last = max(last, e.day)
		}
	}
	return last
}

func (h *history) raisedBetween(after, until Date) bool {
	for _, e := range h.events {
		if e.raises && e.day > after && e.day <= until {
			return true
		}
	}
	return false
}

// merge takes another assignment of the same day into the stretch: the higher exposure counts.
func (s *stretch) merge(o stretch) {
	for i := range s.doses {
		if s.src[i] == nil || o.src[i] != nil && o.doses[i].low > s.doses[i].low {
			s.src[i] = o.src[i]
		}
		s.doses[i] = higher(s.doses[i], o.doses[i])
	}
	s.group += " and " + o.group
	if s.note == "" {
		s.note = o.note
	}
	if s.reason == "" {
		s.reason = o.reason
	}
}

// ownOnly takes the exposure of a day without assignment from the worker's own results.
func (s *stretch) ownOnly(own []*result, day Date) {
	s.own = true
	for i := range s.doses {
		s.doses[i] = unknownDose
		for _, o := range own {
			if o.usable(i) && (o.day <= day || s.src[i] == nil) {
				s.doses[i], s.src[i] = o.doses[i], o
			}
		}
	}
	if !slices.ContainsFunc(s.src, func(r *result) bool { return r != nil }) {
		s.own, s.reason = false, "the worker is in no group and has no full-shift measurement"
	}
}

// ownResults gives the results of the worker's own measurements.
func (b *Builder) ownResults(w *WorkerRecords) []*result {
	rows := slices.Clone(until(w.Measurements, b.AsOf, func(m *record.Measurement) Date { return m.Date }))
	slices.SortStableFunc(rows, compareMeasurements)
	var out []*result
	for len(rows) > 0 {
		n := 1
		for n < len(rows) && rows[n].MeasurementID == rows[0].MeasurementID {
			n++
		}
		if rows[0].Type == "personal" {
			out = append(out, b.channels.ofMeasurement(rows[:n]))
		}
		rows = rows[n:]
	}
	return out
}
