package accept

import (
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
)

// check turns an entry of the file into one of the list, and says what the schema cannot.
func (f *FileEntry) check(at diag.Position, problems *diag.List) Entry {
	e := Entry{ID: f.ID, Reason: strings.TrimSpace(f.Reason), ApprovedBy: strings.TrimSpace(f.ApprovedBy), Line: at.Line}
	if f.Match != nil {
		e.Match = Match{Site: f.Match.Site, Bundle: f.Match.Bundle, Duty: f.Match.Duty, Topic: f.Match.Topic,
			SubjectKind: f.Match.SubjectKind, Subject: f.Match.Subject, Status: finding.Status(f.Match.Status)}
	}
	e.Until, _ = calendar.Parse(f.Until) // the schema has seen to the form
	e.Since, _ = calendar.Parse(f.Since)
	switch {
	case f.ID == "" && f.Match == nil:
		problems.Errorf(at, "Add id with the id of a finding, or match with keys such as {site: kiln-hill, duty: annual-training}", "the entry does not say what is accepted")
	case f.ID != "" && f.Match != nil:
		problems.Errorf(at, "Keep one of the two", "the entry has both id and match")
	case f.Match != nil && !e.Match.narrow():
		problems.Errorf(at, "Add a site, a duty or a subject; not everything can be accepted at once", "match names no site, no duty and no subject")
	}
	if len([]rune(e.Reason)) < leastReason {
		problems.Errorf(at, "Say in a sentence why the gap is accepted", "the reason is too short to tell anybody why")
	}
	if !e.Until.Known() {
		problems.Errorf(at, "Write a day such as 2026-12-31", "until is not a day of the calendar: %q", f.Until)
	}
	if e.Since.Known() && e.Since > e.Until {
		problems.Errorf(at, "Correct one of the two days", "since lies after until")
	}
	return e
}

// leastReason is the number of characters that a reason has at least.
const leastReason = 10

// narrow says whether a match means some findings only. A subject of asterisks alone means every one.
func (m *Match) narrow() bool {
	return m.Site != "" || m.Duty != "" || strings.Trim(m.Subject, "*") != ""
}

// repeated refuses entries that say the same as an earlier one.
func (l *List) repeated(file string, nodes []*yaml.Node, problems *diag.List) {
	first := map[string]int{}
	for i := range l.Entries {
		key := l.Entries[i].Key()
		if line, double := first[key]; double {
			problems.Errorf(diag.Position{File: file, Line: nodes[i].Line, Column: nodes[i].Column}, "Keep one of the two",
				"the entry accepts the same until the same day as that of line %d", line)
			continue
		}
		first[key] = l.Entries[i].Line
	}
}
