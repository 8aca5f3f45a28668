package mapping

import (
	"errors"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// Map is a map file that was read and checked.
type Map struct {
	File  File
	Shown string      // path relative to the program's folder
	Kind  record.Kind // empty if the map leaves it to the program file
}

// Load reads the map at path and checks it. Positions name it as shown. The map is nil if the list holds
// an error.
func Load(path, shown string) (*Map, diag.List) {
	var l diag.List
	l.Errorf(diag.Position{File: shown}, "Wait", "maps are not read yet")
	return nil, l
}

// Options gives the options with which the map wants its file opened.
func (m *Map) Options() grid.Options { return grid.Options{} }

// Source gives rows of an export that were turned into cells of records.
type Source interface {
	// Next reads the next row, or the next record gathered from several rows. At the end it returns
	// io.EOF. A *grid.Fault means that the rest of the file cannot be read.
	Next(*Out) error
}

// Out is what became of one row or, where records are gathered from several rows, of one record.
type Out struct {
	Line    int
	Lines   []int    // further rows that belong to the record, in order
	NotData string   // not empty: the row is no data, and why: header, blank, comment, footer, skipped, hidden, or the like
	Records []Entry  // records of the row, one or several
	Fault   *Fault   // why the row cannot be read; Records is then empty
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
}

// Remark is something about a row that somebody should look at. Rows that share one are counted together.
type Remark struct{ Field, Why, Remedy string }

// Bind finds the header in the file, settles what the data must settle, and gives the rows. What it says
// of the file as a whole, such as columns that the map does not know, comes as warnings. The error is a
// *grid.Fault if the file and the map do not fit.
func (m *Map) Bind(f *grid.File, kind record.Kind) (Source, diag.List, error) {
	return nil, nil, errors.New("maps are not read yet")
}
