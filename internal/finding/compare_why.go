package finding

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/calendar"
)

// why says what the two reports show of the reasons for a change.
func (c *comparer) why(kind ChangeKind, o, n *Finding) []Cause {
	w := &reasons{comparer: c, old: o, new: n, list: []Cause{}}
	w.acceptance()
	w.records()
	w.days(kind)
	w.parameters()
	if kind == StillOpen || kind == StillAccepted {
		return w.list // what did not change needs no more reasons
	}
	if len(w.list) == 0 {
		w.facts()
		w.files()
	}
	w.law()
	w.choices()
	if len(w.list) == 0 && n != nil {
		w.laterDay()
	}
	if n == nil || o == nil && (len(w.list) == 0 || kind == Unclear) {
		w.unlisted(kind)
	}
	if len(w.list) == 0 {
		w.say("not_told", "Nothing in the two reports tells why.")
	}
	return w.list
}

// reasons gathers the causes of one change.
type reasons struct {
	*comparer
	old, new *Finding // nil if it is not listed
	list     []Cause
}

func (w *reasons) say(kind, format string, args ...any) {
	w.list = append(w.list, Cause{Kind: kind, Text: fmt.Sprintf(format, args...)})
}

// about is the finding, as far as it is the same in both reports.
func (w *reasons) about() *Finding { return either(w.new, w.old) }

// acceptance says what became of an acceptance.
func (w *reasons) acceptance() {
	var before, now *Acceptance
	if w.old != nil {
		before = w.old.Accepted
	}
	if w.new != nil {
		now = w.new.Accepted
	}
	day := w.comparer.new.report.AsOf
	switch {
	case now != nil && before == nil:
		w.say("acceptance", "The employer accepted it until %s, approved by %s: %s", now.Until, now.ApprovedBy, closed(now.Reason))
	case now != nil && now.Until != before.Until:
		w.say("acceptance", "It was accepted until %s, and is until %s.", before.Until, now.Until)
	case before == nil || now != nil || w.new == nil || w.new.Status == Met:
	case before.Until < day:
		w.say("acceptance", "The acceptance ended on %s.", before.Until)
	default:
		w.say("acceptance", "It was accepted until %s, and no entry accepts it now.", before.Until)
	}
}

// closed ends a sentence with a full stop.
func closed(text string) string {
	if strings.HasSuffix(text, ".") {
		return text
	}
	return text + "."
}

// records names the records that only one of the reports rests the finding on.
func (w *reasons) records() {
	if w.old == nil {
		w.since()
	}
	if w.old == nil || w.new == nil {
		return
	}
	for _, e := range without(w.new.Evidence, w.old.Evidence) {
		w.record("record_arrived", e, "The record %s counts now and did not before.")
	}
	for _, e := range without(w.old.Evidence, w.new.Evidence) {
		w.record("record_gone", e, "The record %s counted before and does not now.")
	}
}

// since names the records of a finding that are of a day after the old report, as far as their references tell.
func (w *reasons) since() {
	for _, e := range w.new.Evidence {
		_, text, _ := strings.Cut(e.Record, "@")
		if day, err := calendar.Parse(text); err == nil && day > w.comparer.old.report.AsOf {
			w.record("record_arrived", e, "The record %s is of a day after the old report.")
		}
	}
}

func (w *reasons) record(kind string, e Evidence, format string) {
	w.say(kind, format, placed(e))
	last := &w.list[len(w.list)-1]
	last.Record, last.File, last.Sheet, last.Row = e.Record, e.File, e.Sheet, e.Row
}

// placed names a record and where it stands.
func placed(e Evidence) string {
	switch {
	case e.File == "":
		return e.Record
	case e.Sheet != "":
		return fmt.Sprintf("%s (%s %s!%d)", e.Record, e.File, e.Sheet, e.Row)
	}
	return fmt.Sprintf("%s (%s:%d)", e.Record, e.File, e.Row)
}

// without gives the evidence of one list whose records the other does not name.
func without(list, other []Evidence) []Evidence {
	var out []Evidence
	for _, e := range list {
		if !slices.ContainsFunc(other, func(x Evidence) bool { return x.Record == e.Record }) {
			out = append(out, e)
		}
	}
	return out
}

// days says whether the last day passed between the reports, came near, or was moved.
func (w *reasons) days(kind ChangeKind) {
	f := w.about()
	from, to := w.comparer.old.report.AsOf, w.comparer.new.report.AsOf
	if w.new != nil && f.Due.Known() && from <= f.Due && f.Due < to && (f.Status == Gap || f.Status == Late) {
		w.say("date_passed", "Its last day, %s, passed between the reports.", f.Due)
	}
	if o, n := w.comparer.old, w.comparer.new; kind == NewlyDue && w.old == nil && within(f, n, n.ahead) && o.ahead >= 0 && !within(f, o, o.ahead) {
		w.say("date_near", "Its last day, %s, is now within %d days.", f.Due, n.ahead)
	}
	if w.old != nil && w.new != nil && w.old.Due != w.new.Due && w.old.Due.Known() && w.new.Due.Known() {
		w.say("day_moved", "Its last day was %s and is %s.", w.old.Due, w.new.Due)
	}
}
