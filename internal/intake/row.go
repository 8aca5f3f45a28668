package intake

import (
	"hearduty/internal/diag"
)

// rowReader is what each format provides: the rows of one file, one after the other.
type rowReader interface {
	// next reads the next row that is not blank. At the end it returns io.EOF. A *refusal means that the
	// rest of the file cannot be read.
	next(*row) error
}

// row is one row of a file: its cells, or the fault that makes it unreadable. It is used again for the
// next row.
type row struct {
	line    int
	cells   []cell
	columns []int // number of each field's cell in its row, from 1; nil where the format has no columns
	fault   *fault
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
	r.line, r.cells, r.fault = line, r.cells[:0], nil
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
