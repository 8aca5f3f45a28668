package judge

import (
	"fmt"
	"strings"

	"hearduty/internal/accept"
	"hearduty/internal/finding"
)

// real gives a finding as the file of accepted gaps knows it, with the ids of the records in place of codes.
func (c *check) real(f finding.Finding, key string) finding.Finding {
	f.Subject.ID = c.Veil.Real(f.Subject.ID)
	f.ID = finding.Fingerprint(f.Site, f.Bundle, f.Duty, f.Subject, c.Veil.Real(key))
	return f
}

// acceptance is what a finding shows of an entry of the accepted gaps.
func (c *check) acceptance(i int) *finding.Acceptance {
	a := c.Accepted.Acceptance(i)
	a.Reason, a.ApprovedBy = c.Veil.Text(a.Reason), c.Veil.Text(a.ApprovedBy)
	return a
}

// selector says in short what an entry is about. The id of a subject, and that of a finding, which could be found out
// by trying, are not shown where ids are to be pseudonyms; then the line tells the entry apart.
func (c *check) selector(e *accept.Entry) string {
	if c.Veil == nil {
		return e.Selector()
	}
	return fmt.Sprintf("line %d", e.Line)
}

// entryKey tells an entry apart from all others.
func (c *check) entryKey(e *accept.Entry) string {
	return strings.Replace(e.Key(), e.Selector(), c.selector(e), 1)
}

// beginning names the beginning of an id that an entry has.
func (c *check) beginning(e *accept.Entry) string {
	if c.Veil == nil {
		return e.ID
	}
	return "it"
}

// cautions are what every reader of the report must know.
func (c *check) cautions() []string {
	if c.Veil == nil {
		return cautions
	}
	return append(cautions[:len(cautions):len(cautions)],
		"The ids of persons, tests and measurements are pseudonyms. Whoever has the records finds each by file and row, and few people with one job or group may be known all the same.")
}
