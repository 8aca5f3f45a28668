package intake

import (
	"fmt"
	"maps"
	"slices"
	"sort"
	"strconv"
	"strings"
	"unicode/utf8"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// Ledger accounts for everything that was read.
type Ledger struct {
	Inputs       []Input       // in the order of the program file; record.Origin.Source is an index here
	Rejects      []Reject      // in the order of the inputs and their rows
	Remarks      diag.List     // warnings: the row was accepted, but somebody should look
	Unreadable   diag.List     // files that were refused as a whole or from some place on
	Observations []Observation // in the order of the inputs and their rows
}

// Input is one table of records, such as a file or a sheet, and what became of its rows: rows = accepted +
// rejected + not data.
type Input struct {
	File     string         `json:"file" doc:"path relative to the program's folder"`
	Sheet    string         `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Kind     record.Kind    `json:"kind" doc:"record kind"`
	SHA256   string         `json:"sha256" doc:"SHA-256 of the file, in hex; empty if it could not be opened"`
	Rows     int            `json:"rows" doc:"rows read, with headers and blank rows"`
	Accepted int            `json:"accepted" doc:"rows that became records"`
	Rejected int            `json:"rejected" doc:"rows that did not"`
	NotData  int            `json:"not_data" doc:"rows that are no data, such as headers, blank rows and comments"`
	Declared map[string]int `json:"declared,omitempty" doc:"number of the rows that are no data, by what they are"`
	Records  int            `json:"records" doc:"records that the rows became; one may come from several rows, and several from one"`
}

// Name gives the file with its sheet.
func (in *Input) Name() string {
	if in.Sheet == "" {
		return in.File
	}
	return in.File + " " + in.Sheet
}

// declare counts rows that are no data.
func (in *Input) declare(why string, rows int) {
	if in.Declared == nil {
		in.Declared = map[string]int{}
	}
	in.Declared[why] += rows
	in.NotData += rows
	in.Rows += rows
}

// Declared lists what the rows are that are no data, such as "1 header, 2 blank".
func Declared(why map[string]int) string {
	parts := make([]string, 0, len(why))
	for _, word := range slices.Sorted(maps.Keys(why)) {
		parts = append(parts, fmt.Sprintf("%d %s", why[word], word))
	}
	return strings.Join(parts, ", ")
}

// Reject is a row that did not become a record. With row 0 it is a file that was refused; such a reject
// does not count as a row. A reject repeats the offending cell and no other.
type Reject struct {
	File   string   `json:"file" doc:"path relative to the program's folder"`
	Sheet  string   `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row    int      `json:"row" doc:"line of the file, row of the sheet, or place in the list; 0 for the file as a whole"`
	Column int      `json:"column,omitempty" doc:"number of the cell in its row, from 1"`
	Header string   `json:"header,omitempty" doc:"name of the column in the export, if it is not that of the field"`
	Field  string   `json:"field,omitempty" doc:"name of the field or key"`
	Read   string   `json:"read,omitempty" doc:"what stands in the cell, shortened"`
	Why    string   `json:"why" doc:"what is wrong, in one sentence"`
	Remedy string   `json:"remedy" doc:"what to do about it, in one sentence"`
	Also   []string `json:"also,omitempty" doc:"further fields of the row that have problems"`
	Source int      `json:"-"` // index in Ledger.Inputs
}

// Diagnostic gives the reject as a diagnostic with its place.
func (r Reject) Diagnostic() diag.Diagnostic {
	at := diag.Position{File: r.File, Sheet: r.Sheet, Line: r.Row, Field: r.Field}
	problem := r.Why
	if r.Field != "" {
		problem = r.Field + ": " + r.Why
	}
	return diag.Diagnostic{Severity: diag.Warning, Position: at, Problem: problem, Remedy: r.Remedy}
}

// hides says whether what stands in the cell is medical or personal: a threshold or a birth date, or a
// cell of which the field is not known in a file of such records.
func (l *Ledger) hides(r *Reject) bool {
	if r.Source >= len(l.Inputs) {
		return true
	}
	t, ok := record.TableOf(l.Inputs[r.Source].Kind)
	if !ok {
		return true
	}
	if i := t.Index(r.Field); i >= 0 {
		return private(&t.Fields[i])
	}
	return slices.ContainsFunc(t.Fields, func(f record.Field) bool { return private(&f) })
}

// private fields are about somebody's hearing or birth.
func private(f *record.Field) bool {
	return f.Type == record.Hearing || f.Name == "birth_date" || strings.HasSuffix(f.Name, ".stated_shift")
}

// Shown gives the rejects as they can be shown to anybody: thresholds and birth dates are left out; file, row
// and column tell where to look.
func (l *Ledger) Shown() []Reject {
	out := slices.Clone(l.Rejects)
	for i := range out {
		if r := &out[i]; r.Read != "" && l.hides(r) {
			r.Why, r.Read = withoutRead(r.Why, r.Read), ""
		}
	}
	return out
}

// withoutRead takes what stands in a cell out of a sentence.
func withoutRead(sentence, read string) string {
	if read == "" {
		return sentence
	}
	sentence = strings.ReplaceAll(sentence, strconv.Quote(read), "what stands there")
	if utf8.RuneCountInString(read) > 1 {
		sentence = strings.ReplaceAll(sentence, read, "what stands there")
	}
	return sentence
}

// Total adds up the inputs.
func (l *Ledger) Total() Input {
	var t Input
	for _, in := range l.Inputs {
		t.Accepted, t.Rejected, t.Records = t.Accepted+in.Accepted, t.Rejected+in.Rejected, t.Records+in.Records
		t.Rows += in.Rows - in.NotData
		for why, n := range in.Declared {
			t.declare(why, n)
		}
	}
	return t
}

// sort puts the rejects and observations in the order of the inputs, though workers are read before all others.
func (l *Ledger) sort() {
	sort.SliceStable(l.Rejects, func(i, j int) bool {
		a, b := &l.Rejects[i], &l.Rejects[j]
		if a.Source != b.Source {
			return a.Source < b.Source
		}
		return a.Row < b.Row
	})
	sort.SliceStable(l.Observations, func(i, j int) bool {
		a, b := &l.Observations[i], &l.Observations[j]
		if a.source != b.source {
			return a.source < b.source
		}
		return a.Row < b.Row
	})
	l.Remarks.Sort()
	l.Unreadable.Sort()
}
