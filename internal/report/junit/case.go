package junit

import (
	"encoding/xml"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// verdict is what becomes of a case.
type verdict int

const (
	passed verdict = iota
	failed
	broken // shown as an error
	skipped
)

// verdictOf gives the verdict on a finding.
func verdictOf(f *finding.Finding) verdict {
	if f.Accepted != nil {
		return skipped
	}
	switch f.Status {
	case finding.Gap:
		return failed
	case finding.Opinion, finding.Due:
		return skipped
	case finding.Late, finding.Lifted, finding.Met:
		return passed
	}
	return broken
}

type testcase struct {
	XMLName xml.Name `xml:"testcase"`
	Class   string   `xml:"classname,attr"`
	Name    string   `xml:"name,attr"`
	Skipped *outcome `xml:"skipped"`
	Error   *outcome `xml:"error"`
	Failure *outcome `xml:"failure"`
	Output  *body    `xml:"system-out"`
}

type body struct {
	Text string `xml:",cdata"`
}

func output(text string) *body { return &body{text} }

type outcome struct {
	Message string `xml:"message,attr"`
	Type    string `xml:"type,attr"`
	Text    string `xml:",cdata"`
}

// caseOf makes a case of a finding. Class and name together are as lasting as the finding's id, so that a
// pipeline can tell what is new.
func caseOf(f *finding.Finding, titles phrase.Titles) testcase {
	name := f.Duty + " " + phrase.Subject(f.Subject)
	if f.Key != "" {
		name += " " + f.Key
	}
	c := testcase{Class: phrase.Clean(f.Site + "." + f.Bundle + "." + f.Topic), Name: phrase.Clean(name)}
	text := told(f, titles)
	message := phrase.Sentence(f.Message)
	if f.Accepted != nil {
		message = phrase.Accepted(f.Accepted) + " " + message
	}
	o := &outcome{message, string(f.Status), text}
	switch verdictOf(f) {
	case failed:
		c.Failure = o
	case broken:
		c.Error = o
	case skipped:
		c.Skipped = o
	default:
		c.Output = output(text)
	}
	return c
}

// standing says how a finding stands: its id, status, severity and days.
func standing(f *finding.Finding) string {
	parts := []string{"Finding " + f.ID, string(f.Status)}
	if f.Severity != "" {
		parts = append(parts, f.Severity)
	}
	if f.Due.Known() {
		parts = append(parts, "due "+f.Due.String())
	}
	if f.Done.Known() {
		parts = append(parts, "done "+f.Done.String())
	}
	return phrase.Clean(strings.Join(parts, ", ")) + "."
}

// told says all of a finding, a line each.
func told(f *finding.Finding, titles phrase.Titles) string {
	lines := []string{
		titles.Of(f) + ", " + phrase.Clean(f.Cite),
		phrase.Sentence(phrase.Subject(f.Subject) + ": " + phrase.Clean(f.Message)),
	}
	if f.Accepted != nil {
		lines = append(lines, phrase.Accepted(f.Accepted))
	}
	if f.Remedy != "" && verdictOf(f) != passed {
		lines = append(lines, "What to do: "+phrase.Sentence(f.Remedy))
	}
	plain, parameters := phrase.Facts(f.Facts)
	for _, part := range []struct{ head, text string }{{"Facts", plain}, {"Parameters", parameters}, {"Hearing", phrase.Clean(finding.Pairs(f.Health))}} {
		if part.text != "" {
			lines = append(lines, part.head+": "+part.text)
		}
	}
	for _, e := range f.Evidence {
		lines = append(lines, "Record: "+phrase.Record(e))
	}
	lines = append(lines, standing(f))
	return strings.Join(lines, "\n")
}
