package judge

import (
	"fmt"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// changes gives the day from which the later interval of a recurring obligation holds: the end of the time for which
// the first one does, counted from since or, where that is left out, from the first day. Without a later interval
// there is no such day.
func (s *settler) changes(o *obligation) (calendar.Date, string) {
	if o.then == "" {
		return 0, ""
	}
	since := o.since
	if !since.Known() {
		since = o.during.From
	}
	day, _, problem := s.deadline(o.until, since)
	return day, problem
}

// beforehand settles an obligation that must be done before a day, and where it has an interval, not longer before
// than that. What was done earlier than that does not count; it is told.
func (s *settler) beforehand(o *obligation) []outcome {
	key := o.keyOr(o.before)
	if !o.before.Known() {
		return []outcome{unproven(o, key, orElse(o.missing, "the day by which it must be done")...)}
	}
	out := outcome{key: key, refs: o.because, due: o.before - 1}
	var from calendar.Date
	if o.within != "" {
		u, ok := s.parameter(o.within, o.before)
		if !ok {
			return []outcome{unproven(o, key, fmt.Sprintf("a value of %s in force on %s", words(o.within), o.before))}
		}
		interval, ok := u.value.Interval()
		if !ok {
			return []outcome{unproven(o, key, fmt.Sprintf("an interval as the value of %s", words(o.within)))}
		}
		var err error
		if from, err = interval.Before(o.before); err != nil {
			return []outcome{unproven(o, key, err.Error())}
		}
		out.params = []used{u}
	}
	done, early := s.from(o, from)
	if done != nil {
		out.done, out.refs = done.Date, append(slices.Clone(o.because), done.Ref)
	}
	switch {
	case done != nil && done.Date < o.before:
		out.status = finding.Met
	case o.during != nil && o.during.To.Known() && out.due >= o.during.To:
		return nil
	case done != nil:
		out.status = finding.Late
	case s.asOf <= out.due:
		out.status = finding.Due
	default:
		out.status = finding.Gap
	}
	if !s.isBrief(&out) && from.Known() {
		out.facts = map[string]any{"not_before": from.String()}
		if done == nil && early != nil {
			out.facts["done_too_early"] = early.Date.String()
			out.refs = append(slices.Clone(out.refs), early.Ref)
		}
	}
	out.message = s.clockMessage(o, &out)
	return []outcome{out}
}

// from gives the first record that fulfils an obligation on or after a day, and the last one before it.
func (s *settler) from(o *obligation, day calendar.Date) (done, early *dossier.Link) {
	links := []dossier.Link{}
	if o.by != nil {
		links = append(links, *o.by)
	}
	for _, name := range o.series {
		links = append(links, s.file.Series[name]...)
	}
	for i := range links {
		l := &links[i]
		switch {
		case l.Date >= day && (done == nil || l.Date < done.Date):
			done = l
		case l.Date < day && (early == nil || l.Date > early.Date):
			early = l
		}
	}
	return done, early
}
