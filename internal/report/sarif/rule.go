package sarif

import (
	"strings"
	"unicode"
	"unicode/utf8"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

func ruleID(bundle, duty string) string { return bundle + "/" + duty }

// ruleOf makes a rule of a duty, with no more than is known of it.
func ruleOf(d finding.Duty) rule {
	r := rule{
		ID: ruleID(d.Bundle, d.ID), Name: pascal(d.ID), DefaultConfiguration: configuration{failLevel(d.Severity)},
		ShortDescription: described(d.Title), FullDescription: described(d.Description),
		Properties: map[string]any{"bundle": d.Bundle, "topic": d.Topic, "cite": d.Cite, "severity": d.Severity, "tags": []string{d.Topic}},
	}
	help := phrase.Sentence(d.Cite)
	if d.Remedy != "" {
		help += " What to do: " + phrase.Sentence(d.Remedy)
	}
	r.Help = described(help)
	return r
}

// described gives a text as a sentence, or nil for none.
func described(text string) *message {
	if text = phrase.Sentence(text); text == "" {
		return nil
	}
	return &message{braces(text)}
}

// pascal writes an id as one word, such as AnnualAudiogram.
func pascal(id string) string {
	var b strings.Builder
	for part := range strings.FieldsFuncSeq(id, func(c rune) bool { return c == '-' || c == '_' || c == '.' }) {
		first, size := utf8.DecodeRuneInString(part)
		b.WriteString(string(unicode.ToUpper(first)) + part[size:])
	}
	return b.String()
}

// failLevel gives the level of a gap.
func failLevel(severity string) string {
	if severity == "minor" {
		return "warning"
	}
	return "error"
}

// kindAndLevel tells the status of a finding in the words of the standard.
func kindAndLevel(f *finding.Finding) (kind, level string) {
	switch f.Status {
	case finding.Gap:
		return "fail", failLevel(f.Severity)
	case finding.Late:
		return "fail", "note"
	case finding.Opinion:
		return "review", "none"
	case finding.Due:
		return "informational", "none"
	case finding.Lifted:
		return "notApplicable", "none"
	case finding.Met:
		return "pass", "none"
	}
	return "open", "none"
}

// braces writes what a message has to say so that no viewer takes a part of it for a placeholder, such as
// {0}, or for a link, such as [text](address).
func braces(s string) string { return literal.Replace(s) }

var literal = strings.NewReplacer("{", "{{", "}", "}}", "](", "] (")
