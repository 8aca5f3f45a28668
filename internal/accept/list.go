package accept

import (
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// Statuses are the statuses that can be accepted.
var Statuses = []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Late}

// List is the accepted gaps of a program, in the order of their file.
type List struct {
	File    string // as reports name it
	Entries []Entry

	byID    map[string][]int // the entries with an id, by its shortest beginning
	matches []int            // the others
}

// Entry is one entry: which findings, why, by whom, and on which days.
type Entry struct {
	ID         string // of a finding, or its beginning; else Match
	Match      Match
	Reason     string
	ApprovedBy string // empty if nobody has approved it
	Since      calendar.Date
	Until      calendar.Date
	Line       int
}

// Match says which findings are meant. An empty part means any.
type Match struct {
	Site, Bundle, Duty, Topic, SubjectKind string
	Subject                                string // an asterisk stands for any characters
	Status                                 finding.Status
}

// State says whether an entry counts.
type State uint8

// The states of an entry on a day.
const (
	InForce    State = iota // it accepts what it is about
	Waiting                 // it begins on a later day
	Expired                 // its last day is over
	Unapproved              // nobody has approved it
)

// On gives the state of the entry on a day.
func (e *Entry) On(day calendar.Date) State {
	switch {
	case e.Until < day:
		return Expired
	case e.ApprovedBy == "":
		return Unapproved
	case e.Since > day:
		return Waiting
	}
	return InForce
}

// Key tells the entry apart from all others of its list, by what stands in it and not by its place.
func (e *Entry) Key() string {
	key := e.Selector() + " until " + e.Until.String()
	if e.Since.Known() {
		key += " since " + e.Since.String()
	}
	return key
}

// Selector says in short what the entry is about.
func (e *Entry) Selector() string {
	if e.ID != "" {
		return e.ID
	}
	var parts []string
	for _, p := range [][2]string{
		{"site", e.Match.Site}, {"bundle", e.Match.Bundle}, {"duty", e.Match.Duty}, {"topic", e.Match.Topic},
		{"subject_kind", e.Match.SubjectKind}, {"subject", e.Match.Subject}, {"status", string(e.Match.Status)},
	} {
		if p[1] != "" {
			parts = append(parts, p[0]+"="+p[1])
		}
	}
	return strings.Join(parts, " ")
}

// Acceptance is what a finding shows of the entry.
func (l *List) Acceptance(i int) *finding.Acceptance {
	e := &l.Entries[i]
	return &finding.Acceptance{Reason: e.Reason, ApprovedBy: e.ApprovedBy, Until: e.Until, File: l.File, Row: e.Line}
}

// shortest is the length of the shortest beginning of an id: f- and 8 digits.
const shortest = len("f-") + 8

// sort puts the entries where For finds them quickly.
func (l *List) sort() {
	l.byID, l.matches = map[string][]int{}, nil
	for i := range l.Entries {
		if id := l.Entries[i].ID; len(id) >= shortest {
			l.byID[id[:shortest]] = append(l.byID[id[:shortest]], i)
		} else {
			l.matches = append(l.matches, i)
		}
	}
}

// Covers says whether a finding of a status can be accepted.
func Covers(s finding.Status) bool { return slices.Contains(Statuses, s) }

// For gives the entries that are about a finding, by their place in the list, on whatever day. Only a finding of
// one of Statuses has any.
func (l *List) For(f *finding.Finding) []int {
	if !Covers(f.Status) {
		return nil
	}
	var out []int
	for _, i := range l.byID[f.ID[:min(shortest, len(f.ID))]] {
		if strings.HasPrefix(f.ID, l.Entries[i].ID) {
			out = append(out, i)
		}
	}
	for _, i := range l.matches {
		if l.Entries[i].Match.fits(f) {
			out = append(out, i)
		}
	}
	slices.Sort(out)
	return out
}

func (m *Match) fits(f *finding.Finding) bool {
	same := func(want, is string) bool { return want == "" || want == is }
	return same(m.Site, f.Site) && same(m.Bundle, f.Bundle) && same(m.Duty, f.Duty) && same(m.Topic, f.Topic) &&
		same(m.SubjectKind, f.Subject.Kind) && same(string(m.Status), string(f.Status)) && (m.Subject == "" || like(m.Subject, f.Subject.ID))
}

// like says whether a text fits a pattern in which an asterisk stands for any characters, also for none.
func like(pattern, s string) bool {
	head, rest, stars := strings.Cut(pattern, "*")
	if !stars {
		return pattern == s
	}
	if !strings.HasPrefix(s, head) {
		return false
	}
	s = s[len(head):]
	parts := strings.Split(rest, "*")
	for _, part := range parts[:len(parts)-1] {
		i := strings.Index(s, part)
		if i < 0 {
			return false
		}
		s = s[i+len(part):]
	}
	return strings.HasSuffix(s, parts[len(parts)-1])
}
