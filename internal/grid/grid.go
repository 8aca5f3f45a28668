// Package grid reads tables as they stand in files: delimited text in any encoding, workbooks, and lists
// of objects. It knows rows and cells and nothing of what they mean.
package grid

import (
	"fmt"
	"strings"
)

// CellKind says what the file itself says about a cell.
type CellKind uint8

// The kinds of a cell.
const (
	Text       CellKind = iota // text, as in every delimited file
	Number                     // a number of a workbook or of JSON; Text has it with a decimal point
	Day                        // a workbook's number that is formatted as a date; Text is YYYY-MM-DD, or YYYY-MM-DDThh:mm:ss
	Clock                      // a workbook's number that is formatted as a time or duration; Text is the fraction of a day
	Bool                       // Text is true or false
	Broken                     // an error value of a workbook, such as #N/A, which Text has
	Uncomputed                 // a formula whose value was never stored; Text is empty
)

// Cell is one cell. A blank cell has an empty text.
type Cell struct {
	Text string
	Kind CellKind
}

// Row is one row of a table. It is used again for the next row.
type Row struct {
	Line   int    // line of the text file, row of the sheet, or place in the list, from 1; 0 for the header that is made for a list of objects
	Last   int    // last line, where the row has several because of line breaks in cells; otherwise as Line
	Cells  []Cell // blank cells at the end may be missing
	Hidden bool   // a hidden row of a workbook
	Fault  *Fault // why the row cannot be read; Cells is then empty

	NotData string // not empty: the file itself says that the row is no data, such as SeparatorLine
}

// Texts gives the texts of the cells.
func (r *Row) Texts() []string {
	out := make([]string, len(r.Cells))
	for i, c := range r.Cells {
		out[i] = c.Text
	}
	return out
}

// Blank says whether no cell of a row that can be read holds anything. A formula without its value holds something.
func (r *Row) Blank() bool {
	for _, c := range r.Cells {
		if c.Kind == Uncomputed || strings.TrimSpace(strings.Trim(c.Text, endMark)) != "" {
			return false
		}
	}
	return r.Fault == nil
}

// Fault says why a row, or a file as a whole or from some place on, cannot be read.
type Fault struct {
	Line, Column    int    // of the cell, from 1; 0 if not known
	Problem, Remedy string // each one sentence without its full stop
}

// Error gives the problem.
func (f *Fault) Error() string { return f.Problem }

func faultf(remedy, format string, args ...any) *Fault {
	return &Fault{Problem: fmt.Sprintf(format, args...), Remedy: remedy}
}

// Format is what a file is, by its first bytes and its name.
type Format string

// The formats.
const (
	Delimited Format = "delimited" // CSV and its kin
	Workbook  Format = "workbook"  // XLSX
	JSON      Format = "json"      // an array of objects, or one object
	Lines     Format = "lines"     // NDJSON
	YAML      Format = "yaml"      // a list of objects
)

// Options say how to read a file where the file itself does not tell.
type Options struct {
	Encoding  string // name of a code page such as windows-1252; empty for UTF-8 and UTF-16, which are recognized
	Delimiter byte   // 0 to find it; a first line such as sep=; goes before it
	Sheet     string // of a workbook; empty for the only visible one
	Lenient   bool   // take a quote within a cell that does not begin with one as text, as exports need it
}

// About is what reading found out about a file.
type About struct {
	Format       Format
	Encoding     string   // as it was read
	Delimiter    byte     // of delimited text
	Sheet        string   // of a workbook
	Sheets       []string // all sheets of the workbook, in order
	HiddenSheet  bool     // the sheet read is hidden
	HiddenCols   []int    // hidden columns, from 1
	Merged       []Range  // merged cells of a workbook, known from the beginning; the value stands in the first one
	Replaced     int      // bytes that the encoding does not know, read as U+FFFD
	FirstReplace int      // line of the first of them
	UTF8         int      // line that holds UTF-8 text, although the file was read in a page of single bytes; 0 if there is none
}

// Range is a rectangle of cells, its ends included, all counted from 1.
type Range struct{ FirstRow, FirstCol, LastRow, LastCol int }

// Rows gives the rows of one table, one after the other: all of them, blank ones too.
type Rows interface {
	// Next reads the next row. At the end it returns io.EOF. A *Fault means that the rest cannot be read.
	Next(*Row) error
	// About is complete once the rows are read.
	About() About
	Close() error
}
