// Package phrase holds what several forms of a report say in the same words.
package phrase

import (
	"fmt"
	"maps"
	"slices"
	"strings"
	"unicode"
	"unicode/utf8"

	"hearduty/internal/finding"
)

// Clean makes one line of a text that any program can read: white space of every kind becomes blanks, and
// what could steer a program, or is no character, becomes U+FFFD.
func Clean(s string) string {
	return strings.Map(func(c rune) rune {
		switch {
		case unicode.IsSpace(c):
			return ' '
		case unicode.IsControl(c), unicode.In(c, unicode.Bidi_Control), c == utf8.RuneError, c&0xFFFE == 0xFFFE:
			return '\uFFFD'
		}
		return c
	}, s)
}

// Sentence writes a text with a capital at its beginning and a full stop at its end.
func Sentence(s string) string {
	s = strings.TrimSpace(Clean(s))
	if s == "" {
		return ""
	}
	c, n := utf8.DecodeRuneInString(s)
	s = string(unicode.ToUpper(c)) + s[n:]
	if strings.HasSuffix(s, ".") || strings.HasSuffix(s, "?") || strings.HasSuffix(s, "!") {
		return s
	}
	return s + "."
}

// Subject names whom or what a finding is about, such as "worker 000123".
func Subject(s finding.Subject) string { return Clean(s.Kind + " " + s.ID) }

// Place says where a record stands: file:line, or file sheet!row.
func Place(file, sheet string, row int) string {
	switch {
	case sheet != "" && row > 0:
		return Clean(fmt.Sprintf("%s %s!%d", file, sheet, row))
	case sheet != "":
		return Clean(file + " " + sheet)
	case file != "" && row > 0:
		return Clean(fmt.Sprintf("%s:%d", file, row))
	}
	return Clean(file)
}

// Record names a record with its place.
func Record(e finding.Evidence) string {
	return strings.TrimSpace(Clean(e.Record) + " " + Place(e.File, e.Sheet, e.Row))
}

// Accepted says who has accepted a finding, until when and why.
func Accepted(a *finding.Acceptance) string {
	s := "Accepted by the employer"
	if a.Until.Known() {
		s += " until " + a.Until.String()
	}
	if a.ApprovedBy != "" {
		s += ", approved by " + Clean(a.ApprovedBy)
	}
	if a.Reason != "" {
		s += ": " + Clean(a.Reason)
	}
	return Sentence(s)
}

// Facts writes the facts of a finding in words, first those that are no parameters, then the parameters of
// the law with their citations.
func Facts(m map[string]any) (facts, parameters string) {
	plain := map[string]any{}
	var list []string
	for _, name := range slices.Sorted(maps.Keys(m)) {
		p, ok := finding.AsParameter(m[name])
		if !ok {
			plain[name] = m[name]
			continue
		}
		s := strings.ReplaceAll(name, "_", " ") + " " + p.String()
		notes := []string{}
		if p.Cite != "" {
			notes = append(notes, p.Cite)
		}
		if p.Seen == "memory" {
			notes = append(notes, "not checked against the official text")
		}
		if len(notes) > 0 {
			s += " (" + strings.Join(notes, ", ") + ")"
		}
		list = append(list, s)
	}
	return Clean(finding.Pairs(plain)), Clean(strings.Join(list, "; "))
}

// Titles gives the titles of duties.
type Titles map[[2]string]string

// TitlesOf gathers the titles of a report's duties.
func TitlesOf(r *finding.Report) Titles {
	t := Titles{}
	for _, d := range r.Duties {
		t[[2]string{d.Bundle, d.ID}] = Clean(d.Title)
	}
	return t
}

// Of gives the title of a finding's duty, made of its id if the report does not hold it.
func (t Titles) Of(f *finding.Finding) string {
	if title := t[[2]string{f.Bundle, f.Duty}]; title != "" {
		return title
	}
	return strings.TrimSuffix(Sentence(strings.ReplaceAll(f.Duty, "-", " ")), ".")
}
