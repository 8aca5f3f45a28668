package mapping

import (
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// Map is a map file that was read and checked.
type Map struct {
	File  File
	Shown string      // path relative to the program's folder
	Kind  record.Kind // empty if the map leaves it to the program file

	places *places // of the file's keys and values; nil for a map that comes from no file
}

// Options gives the options with which the map wants its file opened. Quotes within cells are text.
func (m *Map) Options() grid.Options {
	o := grid.Options{Encoding: m.File.Encoding, Sheet: m.File.Sheet, Lenient: true}
	switch m.File.Delimiter {
	case "":
	case "tab":
		o.Delimiter = '\t'
	case "pipe":
		o.Delimiter = '|'
	default:
		o.Delimiter = m.File.Delimiter[0]
	}
	return o
}

// Source gives rows of an export that were turned into cells of records.
type Source interface {
	// Next reads the next row, or the next record gathered from several rows. At the end it returns
	// io.EOF. A *grid.Fault means that the rest of the file cannot be read.
	Next(*Out) error
}

// Out is what became of one row or, where records are gathered from several rows, of one record. It is used
// again for the next row.
type Out struct {
	Line    int
	Lines   []int    // further rows that belong to the record, in order
	NotData string   // not empty: the row is no data, and why: header, blank, comment, footer, skipped, hidden, or the like
	Records []Entry  // records of the row, one or several
	Fault   *Fault   // why the row, or one of its several records, cannot be read; Records then has the others only
	Remarks []Remark // what somebody should look at
}

// Entry is one record: the values of its fields. They are canonical, that is as record.Table.Set reads them.
type Entry struct{ Values []Value }

// Value is the value of one field.
type Value struct {
	Field  int    // index in the table's fields
	Text   string // canonical
	Read   string // what stands in the cell, if it is not Text
	Column int    // number of the column in its row, from 1; 0 if it comes from no column
}

// Fault says why a row cannot be read.
type Fault struct {
	Column                           int
	Field, Header, Read, Why, Remedy string
	Also                             []string // further fields of the row whose cells cannot be read
	Worker                           string   // id of the row's worker, if that could be read
}

// Remark is something about a row that somebody should look at. Rows that share one are counted together.
type Remark struct{ Field, Why, Remedy string }
