package intake

import (
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// rowReader is what each format provides: the rows of one file, one after the other.
type rowReader interface {
	// next reads the next row, also one that is no data. At the end it returns io.EOF. A *refusal or
	// *grid.Fault means that the rest of the file cannot be read.
	next(*row) error
	// about is complete once the rows are read.
	about() grid.About
}

// row is one row of a file: its cells, or the fault that makes it unreadable. It is used again for the
// next row.
type row struct {
	line    int
	cells   []cell
	columns []int // number of each field's cell in its row, from 1; nil where the format has no columns
	fault   *fault
	notData string // not empty: the row is no data, and why, such as header or blank
}

// cell is one value of a row that is not empty.
type cell struct {
	field int // index in the table's fields
	text  string
}

// fault says why a row cannot be read.
type fault struct {
	column                   int
	field, read, why, remedy string
}

func (r *row) reset(line int) {
	r.line, r.cells, r.fault, r.notData = line, r.cells[:0], nil, ""
}

// refuseUnknown makes a row faulty that has a cell with a byte which the encoding does not know.
func (r *row) refuseUnknown(t *record.Table, a grid.About) {
	if a.Replaced == 0 {
		return
	}
	for _, c := range r.cells {
		if !strings.Contains(c.text, "\uFFFD") {
			continue
		}
		f := &fault{field: t.Fields[c.field].Name, why: "the cell holds a byte that " + a.Encoding + " does not know", remedy: "Check whether the file is in that encoding, and state another if it is not"}
		if r.columns != nil {
			f.column = r.columns[c.field]
		}
		r.cells, r.fault = r.cells[:0], f
		return
	}
}

// refusal says why a file cannot be read, as a whole or from some place on.
type refusal struct {
	line, column           int
	field, problem, remedy string
}

func (r *refusal) Error() string { return r.problem }

func (r *refusal) diagnostic(file, sheet string) diag.Diagnostic {
	at := diag.Position{File: file, Sheet: sheet, Line: r.line, Column: r.column, Field: r.field}
	return diag.Diagnostic{Severity: diag.Error, Position: at, Problem: r.problem, Remedy: r.remedy}
}
