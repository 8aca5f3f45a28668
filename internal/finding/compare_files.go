package finding

import (
	"fmt"
	"slices"
	"strings"
)

// files names the files that changed and could be the reason: those of the finding's records, and those of the kinds
// of record that prove the duty.
func (w *reasons) files() {
	f := w.about()
	kinds := map[string]bool{f.Subject.Kind: true}
	for _, s := range []*compared{w.comparer.new, w.comparer.old} {
		if d := s.duties[[2]string{f.Bundle, f.Duty}]; d != nil {
			for _, kind := range d.Evidence {
				kinds[kind] = true
			}
			break
		}
	}
	about := func(in *Input) bool {
		return kinds[string(in.Kind)] || slices.ContainsFunc(f.Evidence, func(e Evidence) bool { return e.File == in.File && e.Sheet == in.Sheet })
	}
	for _, text := range changedInputs(w.comparer.old.report.Inputs, w.comparer.new.report.Inputs, about) {
		w.say("file_changed", "%s", text)
	}
}

// changedInputs says what became of the inputs that are wanted: changed, read for the first time, or no longer read.
func changedInputs(old, new []Input, wanted func(*Input) bool) []string {
	find := func(list []Input, in *Input) *Input {
		for i := range list {
			if list[i].File == in.File && list[i].Sheet == in.Sheet {
				return &list[i]
			}
		}
		return nil
	}
	var out []string
	for i := range new {
		n := &new[i]
		if !wanted(n) {
			continue
		}
		switch o := find(old, n); {
		case o == nil:
			out = append(out, fmt.Sprintf("%s was not read before.", n.Name()))
		case o.SHA256 != n.SHA256 && o.Records == n.Records:
			out = append(out, fmt.Sprintf("%s changed, and still has %s.", n.Name(), oneOrMore(n.Records, "record", "records")))
		case o.SHA256 != n.SHA256:
			out = append(out, fmt.Sprintf("%s changed: it had %s, and has %d.", n.Name(), oneOrMore(o.Records, "record", "records"), n.Records))
		}
	}
	for i := range old {
		if wanted(&old[i]) && find(new, &old[i]) == nil {
			out = append(out, fmt.Sprintf("%s was read before, and is not now.", old[i].Name()))
		}
	}
	return out
}

// laterDay says that only the day differs, where both reports were made from the same files.
func (w *reasons) laterDay() {
	o, n := w.comparer.old.report, w.comparer.new.report
	if w.sameFiles() && o.AsOf < n.AsOf {
		w.say("later_day", "Both reports were made from the same files; what they say of %s differs from what they say of %s.", n.AsOf, o.AsOf)
	}
}

// sameFiles says whether both reports were made from the same files.
func (c *comparer) sameFiles() bool {
	o, n := c.old.report.Inputs, c.new.report.Inputs
	return len(n) > 0 && len(changedInputs(o, n, func(*Input) bool { return true })) == 0
}

// unlisted says, of a finding that only one report lists, what it can be in the other: that which the report
// counts and does not list, or nothing at all.
func (w *reasons) unlisted(kind ChangeKind) {
	if w.old != nil && w.new != nil || slices.ContainsFunc(w.list, func(c Cause) bool { return c.Kind == "duty_new" || c.Kind == "duty_gone" }) {
		return
	}
	f, other, name, owed := w.old, w.comparer.new, "new", "is no longer owed"
	if f == nil {
		f, other, name, owed = w.new, w.comparer.old, "old", "was not owed"
	}
	statuses := []Status{Lifted, Met}
	if f.Status != Due || kind == Unclear {
		statuses = append([]Status{Due}, statuses...)
	}
	if kind == Unclear {
		statuses = append([]Status{Gap, Unproven, Opinion}, statuses...)
	}
	var can []string
	for _, s := range statuses {
		if other.hides(f, other.topic(f), s) {
			can = append(can, hiddenWords(s))
		}
	}
	if len(can) == 0 {
		w.say("not_listed", "The %s report has no such finding: the duty %s, or on another day or record.", name, owed)
		return
	}
	_, owed, _ = strings.Cut(owed, " ")
	w.say("not_listed", "In the %s report it is %s or %s; that report does not list which.", name, strings.Join(can, ", "), owed)
}

func hiddenWords(s Status) string {
	if s == Due {
		return "due later"
	}
	return string(s)
}
