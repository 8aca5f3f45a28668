package finding

import (
	"errors"
	"slices"
)

// ErrNothingInCommon says that two reports judged no site by the same bundle.
var ErrNothingInCommon = errors.New("the two reports have no site in common that both judged by the same bundle")

// CompareReports says what changed from one report to a later one. The tool is the one that compares.
func CompareReports(old, new *Report, tool Tool) (*Comparison, error) {
	c := &comparer{old: sideOf(old), new: sideOf(new)}
	out := &Comparison{Tool: tool, Old: c.old.side(), New: c.new.side(), Cautions: append([]string{}, new.Cautions...), Notes: []string{}, Apart: c.apart(),
		Numbers: map[ChangeKind]int{}, Changes: []Change{}}
	if !c.anyCommon() {
		return nil, ErrNothingInCommon
	}
	for _, id := range c.ids() {
		o, n := c.old.byID[id], c.new.byID[id]
		if f := either(n, o); !c.common(f.Site, f.Bundle) {
			continue
		}
		if kind := c.kind(o, n); kind != "" {
			out.Numbers[kind]++
			out.Changes = append(out.Changes, c.change(kind, o, n))
		}
	}
	out.Notes = append(out.Notes, c.notes(out)...)
	slices.SortStableFunc(out.Changes, func(a, b Change) int {
		return slices.Index(ChangeKinds, a.Kind) - slices.Index(ChangeKinds, b.Kind)
	})
	return out, nil
}

// comparer holds two reports against each other.
type comparer struct {
	old, new *compared
	unlisted int // due findings that one report lists only because it looks further ahead
}

// either gives the first of two findings that is there.
func either(a, b *Finding) *Finding {
	if a != nil {
		return a
	}
	return b
}

// ids gives the ids of all findings in the order of the reports: those of the new one, with those of the old one
// alone put between.
func (c *comparer) ids() []string {
	var all []*Finding
	for i := range c.new.report.Findings {
		all = append(all, &c.new.report.Findings[i])
	}
	for i := range c.old.report.Findings {
		if f := &c.old.report.Findings[i]; c.new.byID[f.ID] == nil {
			all = append(all, f)
		}
	}
	slices.SortStableFunc(all, Compare)
	out := make([]string, len(all))
	for i, f := range all {
		out[i] = f.ID
	}
	return slices.Compact(out)
}

// opens says whether a finding of a status is open.
func opens(s Status) bool { return s == Gap || s == Unproven || s == Opinion }

// kind says what became of a finding. It is empty if there is nothing to tell.
func (c *comparer) kind(o, n *Finding) ChangeKind {
	switch {
	case o == nil:
		return c.appeared(n)
	case n == nil:
		return c.vanished(o)
	case o.Accepted != nil && n.Accepted != nil:
		return StillAccepted
	case n.Accepted != nil:
		return NewlyAccepted
	case o.Accepted != nil && (opens(n.Status) || n.Status == Late && o.Status == Late):
		return NoLongerAccepted
	}
	before, now := opens(o.Status), opens(n.Status)
	switch {
	case now && !before:
		return Opened
	case before && !now:
		return Closed
	case o.Status == n.Status && now:
		return StillOpen
	case o.Status == n.Status:
		return ""
	case n.Status == Due:
		return NewlyDue
	case o.Status == Due && n.Status == Late:
		return NewlyLate
	case n.Status.Urgency() < o.Status.Urgency():
		return Worsened
	}
	return Eased
}

// appeared judges a finding that only the new report lists.
func (c *comparer) appeared(n *Finding) ChangeKind {
	hides := func(statuses ...Status) bool { return c.old.hides(n, c.old.topic(n), statuses...) }
	switch {
	case n.Accepted != nil:
		return NewlyAccepted
	case opens(n.Status):
		if hides(Gap, Unproven, Opinion) {
			return Unclear
		}
		return Opened
	case n.Status == Late:
		if hides(Late) {
			return ""
		}
		return NewlyLate
	case n.Status == Due:
		return c.dueAppeared(n)
	}
	return ""
}

// dueAppeared judges a due finding that only the new report lists: it is news unless the old report did not look as
// far ahead as the new one does.
func (c *comparer) dueAppeared(n *Finding) ChangeKind {
	if n.Due.Known() && c.old.hides(n, c.old.topic(n), Due) && !within(n, c.new, c.old.ahead) {
		c.unlisted++
		return ""
	}
	return NewlyDue
}

// vanished judges a finding that only the old report lists.
func (c *comparer) vanished(o *Finding) ChangeKind {
	hides := func(statuses ...Status) bool { return c.new.hides(o, c.new.topic(o), statuses...) }
	switch {
	case opens(o.Status):
		if hides(Gap, Unproven, Opinion) {
			return Unclear
		}
		return Closed
	case o.Status == Late:
		if hides(Late) {
			return ""
		}
		return Eased
	case o.Status == Due:
		if hides(Gap, Unproven, Opinion, Late) {
			return Unclear
		}
		if hides(Due) && !within(o, c.new, c.new.ahead) {
			c.unlisted++
			return ""
		}
		return Eased
	}
	return ""
}

// within says whether a finding falls due within so many days of the day of a report. What is not known does not.
func within(f *Finding, r *compared, days int) bool {
	return f.Due.Known() && days >= 0 && int(f.Due-r.report.AsOf) <= days
}

// change writes what became of a finding.
func (c *comparer) change(kind ChangeKind, o, n *Finding) Change {
	f := either(n, o)
	return Change{Kind: kind, ID: f.ID, Site: f.Site, Bundle: f.Bundle, Duty: f.Duty, Topic: f.Topic, Subject: f.Subject, Key: f.Key,
		Severity: f.Severity, Cite: f.Cite, Remedy: f.Remedy, Before: standing(o), After: standing(n), Why: c.why(kind, o, n)}
}

func standing(f *Finding) *Standing {
	if f == nil {
		return nil
	}
	return &Standing{Status: f.Status, Due: f.Due, Done: f.Done, DaysOver: f.DaysOver, Message: f.Message, Accepted: f.Accepted}
}
