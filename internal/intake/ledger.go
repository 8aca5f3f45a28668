// Package intake reads the record files of a program: it turns every row into a record, or into a reject
// that says why. No row is lost: rows read = accepted + rejected.
package intake

import (
	"fmt"
	"sort"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// Ledger accounts for everything that was read.
type Ledger struct {
	Inputs     []Input   // in the order of the program file; record.Origin.Source is an index here
	Rejects    []Reject  // in the order of the inputs and their rows
	Remarks    diag.List // warnings: the row was accepted, but somebody should look
	Unreadable diag.List // files that were refused as a whole or from some place on
}

// Input is one record file and what became of its rows. Blank rows and headers do not count.
type Input struct {
	File     string      `json:"file" doc:"path relative to the program's folder"`
	Sheet    string      `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Kind     record.Kind `json:"kind" doc:"record kind"`
	SHA256   string      `json:"sha256" doc:"SHA-256 of the file, in hex; empty if it could not be opened"`
	Rows     int         `json:"rows" doc:"rows read"`
	Accepted int         `json:"accepted" doc:"rows that became records"`
	Rejected int         `json:"rejected" doc:"rows that did not"`
}

// Reject is a row that did not become a record. With row 0 it is a file that was refused; such a reject
// does not count as a row. A reject repeats the offending cell and no other.
type Reject struct {
	File   string   `json:"file" doc:"path relative to the program's folder"`
	Sheet  string   `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row    int      `json:"row" doc:"line of the file, row of the sheet, or place in the JSON array; 0 for the file as a whole"`
	Column int      `json:"column,omitempty" doc:"number of the cell in its row, from 1"`
	Field  string   `json:"field,omitempty" doc:"name of the column or key"`
	Read   string   `json:"read,omitempty" doc:"what stands in the cell, shortened"`
	Why    string   `json:"why" doc:"what is wrong, in one sentence"`
	Remedy string   `json:"remedy" doc:"what to do about it, in one sentence"`
	Also   []string `json:"also,omitempty" doc:"further fields of the row that have problems"`
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

// Totals adds up the rows of all inputs.
func (l *Ledger) Totals() (rows, accepted, rejected int) {
	for _, in := range l.Inputs {
		rows, accepted, rejected = rows+in.Rows, accepted+in.Accepted, rejected+in.Rejected
	}
	return rows, accepted, rejected
}

// sort puts the rejects in the order of the inputs, though workers are read before all others.
func (l *Ledger) sort() {
	order := map[string]int{}
	for i, in := range l.Inputs {
		order[in.File+"\x00"+in.Sheet] = i
	}
	sort.SliceStable(l.Rejects, func(i, j int) bool {
		a, b := &l.Rejects[i], &l.Rejects[j]
		x, y := order[a.File+"\x00"+a.Sheet], order[b.File+"\x00"+b.Sheet]
		if x != y {
			return x < y
		}
		return a.Row < b.Row
	})
	l.Remarks.Sort()
	l.Unreadable.Sort()
}

// remarks collects warnings and counts the rows that share one.
type remarks struct {
	list  diag.List
	count map[remarkKey]*remark
}

type remarkKey struct{ file, field, read, why string }

type remark struct{ at, rows int }

func (m *remarks) add(at diag.Position, p *record.Problem) {
	key := remarkKey{at.File + "\x00" + at.Sheet, p.Field, p.Read, p.Why}
	if known := m.count[key]; known != nil {
		known.rows++
		return
	}
	if m.count == nil {
		m.count = map[remarkKey]*remark{}
	}
	m.count[key] = &remark{len(m.list), 1}
	m.list.Warnf(at, p.Remedy, "%s: %s", p.Field, p.Why)
}

// done gives the warnings; one that several rows share says so.
func (m *remarks) done() diag.List {
	for _, r := range m.count {
		if r.rows > 1 {
			m.list[r.at].Problem += fmt.Sprintf(" (%d rows)", r.rows)
		}
	}
	return m.list
}
