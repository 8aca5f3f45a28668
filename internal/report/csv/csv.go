// Package csv writes the findings of a report as CSV, for spreadsheets and databases.
//
// The file is UTF-8 and begins with a byte order mark, without which spreadsheet programs take it for text in
// the code page of the machine. Lines end with CR LF (RFC 4180), and no cell holds a line break. Every cell is
// text: a spreadsheet program may still make a number of an id such as 000123 when it opens the file, and
// does not if the columns are imported as text.
package csv

import (
	"encoding/csv"
	"fmt"
	"io"
	"strconv"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// Format writes CSV.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "csv" }

// column is a column with what it says of a finding.
type column struct {
	name string
	cell func(*finding.Finding) string
}

// Write writes the listed findings, a row each.
func (Format) Write(w io.Writer, r *finding.Report) error {
	if _, err := io.WriteString(w, "\ufeff"); err != nil {
		return err
	}
	columns := columnsOf(r)
	cells := make([]string, len(columns))
	for i, c := range columns {
		cells[i] = c.name
	}
	out := csv.NewWriter(w)
	out.UseCRLF = true
	if err := out.Write(cells); err != nil {
		return err
	}
	for i := range r.Findings {
		for j, c := range columns {
			cells[j] = guard(phrase.Clean(c.cell(&r.Findings[i])))
		}
		if err := out.Write(cells); err != nil {
			return err
		}
	}
	out.Flush()
	return out.Error()
}

// columnsOf gives the columns. Each row says as of when it was judged, and what every reader must know, since
// rows are sorted, filtered and copied. There is a column about hearing only if the report has such figures.
func columnsOf(r *finding.Report) []column {
	titles := phrase.TitlesOf(r)
	columns := []column{
		{"id", func(f *finding.Finding) string { return f.ID }},
		{"site", func(f *finding.Finding) string { return f.Site }},
		{"bundle", func(f *finding.Finding) string { return f.Bundle }},
		{"topic", func(f *finding.Finding) string { return f.Topic }},
		{"duty", func(f *finding.Finding) string { return f.Duty }},
		{"title", titles.Of},
		{"subject_kind", func(f *finding.Finding) string { return f.Subject.Kind }},
		{"subject", func(f *finding.Finding) string { return f.Subject.ID }},
		{"status", func(f *finding.Finding) string { return string(f.Status) }},
		{"accepted", accepted},
		{"accepted_until", acceptedUntil},
		{"severity", func(f *finding.Finding) string { return f.Severity }},
		{"due", func(f *finding.Finding) string { return day(f.Due) }},
		{"done", func(f *finding.Finding) string { return day(f.Done) }},
		{"days_over", func(f *finding.Finding) string { return strconv.Itoa(f.DaysOver) }},
		{"message", func(f *finding.Finding) string { return phrase.Sentence(f.Message) }},
		{"cite", func(f *finding.Finding) string { return f.Cite }},
		{"remedy", func(f *finding.Finding) string { return phrase.Sentence(f.Remedy) }},
		{"facts", func(f *finding.Finding) string { facts, _ := phrase.Facts(f.Facts); return facts }},
		{"parameters", func(f *finding.Finding) string { _, parameters := phrase.Facts(f.Facts); return parameters }},
		{"evidence", evidence},
		{"as_of", func(*finding.Finding) string { return day(r.AsOf) }},
		{"caution", func(*finding.Finding) string { return strings.Join(r.Cautions[:min(1, len(r.Cautions))], "") }},
	}
	for i := range r.Findings {
		if len(r.Findings[i].Health) > 0 {
			return append(columns, column{"health", func(f *finding.Finding) string { return finding.Pairs(f.Health) }})
		}
	}
	return columns
}

// day writes a day, and nothing where it is not known.
func day(d calendar.Date) string {
	if !d.Known() {
		return ""
	}
	return d.String()
}

func accepted(f *finding.Finding) string {
	if f.Accepted == nil {
		return "no"
	}
	return "yes"
}

func acceptedUntil(f *finding.Finding) string {
	if f.Accepted == nil {
		return ""
	}
	return day(f.Accepted.Until)
}

// mostEvidence is the number of characters that a list of records may have. Spreadsheet programs cut a cell
// off at 32,767 characters and do not say so.
const mostEvidence = 32000

// evidence lists the records of a finding with their places.
func evidence(f *finding.Finding) string {
	var b strings.Builder
	for i, e := range f.Evidence {
		s := phrase.Record(e)
		if b.Len()+len(s) > mostEvidence {
			fmt.Fprintf(&b, "; and %d more records", len(f.Evidence)-i)
			break
		}
		if i > 0 {
			b.WriteString("; ")
		}
		b.WriteString(s)
	}
	return b.String()
}

// guard puts an apostrophe before a text that a spreadsheet program could run as a formula, also behind
// blanks and in wide signs.
func guard(text string) string {
	rest := strings.TrimLeft(text, " \u00a0\u3000'\uFFFD")
	if rest != "" && strings.ContainsRune("=+-@＝＋－＠", []rune(rest)[0]) {
		return "'" + text
	}
	return text
}
