package xlsx

import (
	"fmt"

	"github.com/xuri/excelize/v2"
)

// column is a column of a table.
type column struct {
	head  string
	width float64 // in characters
}

// table is a sheet with a head in row 1 and rows below it.
type table struct {
	name    string
	about   string // what a reader finds in it
	columns []column
	printed int // number of columns that are printed; 0 for all
	rows    int
	row     func(i int) []any
	none    string // what stands there if there are no rows
}

// headHeight is the height of a head: two lines, with room for the button of the filter.
const headHeight = 2*lineHeight + 4

// table writes a table, on more sheets than one if it has more rows than a sheet holds.
func (b *book) table(t table) error {
	for from, part := 0, 1; part == 1 || from < t.rows; from, part = from+b.rows, part+1 {
		name := t.name
		if part > 1 {
			name = fmt.Sprintf("%s %d", t.name, part)
		}
		if err := b.part(t, name, from, min(from+b.rows, t.rows)); err != nil {
			return fmt.Errorf("sheet %s: %w", name, err)
		}
	}
	return nil
}

// part writes some rows of a table as a sheet.
func (b *book) part(t table, name string, from, to int) error {
	widths, head := make([]float64, len(t.columns)), make([]any, len(t.columns))
	for i, c := range t.columns {
		widths[i], head[i] = c.width, excelize.Cell{StyleID: b.head, Value: c.head}
	}
	s, err := b.open(name, widths, 1+max(1, to-from))
	if err != nil {
		return err
	}
	if err := s.out.SetPanes(&excelize.Panes{Freeze: true, YSplit: 1, TopLeftCell: "A2", ActivePane: "bottomLeft"}); err != nil {
		return err
	}
	if err := s.put(headHeight, head...); err != nil {
		return err
	}
	for i := from; i < to; i++ {
		values := t.row(i)
		cells := make([]any, len(values))
		for j, v := range values {
			cells[j] = b.cell(v)
		}
		if err := s.put(heightOf(cells, widths, t.printed), cells...); err != nil {
			return err
		}
	}
	if t.rows == 0 {
		if err := s.put(0, excelize.Cell{StyleID: b.note, Value: t.none}); err != nil {
			return err
		}
	}
	if err := s.names(t, 1+to-from); err != nil {
		return err
	}
	return s.out.Flush()
}

// names lets the head be filtered by and be repeated on every printed page.
func (s *sheet) names(t table, rows int) error {
	file := s.book.file
	last, err := excelize.ColumnNumberToName(len(t.columns))
	if err != nil {
		return err
	}
	if err := file.AutoFilter(s.name, fmt.Sprintf("A1:%s%d", last, rows), nil); err != nil {
		return err
	}
	if err := file.SetDefinedName(&excelize.DefinedName{Name: "_xlnm.Print_Titles", RefersTo: reference(s.name, "$1", "$1"), Scope: s.name}); err != nil {
		return err
	}
	if t.printed == 0 {
		return nil
	}
	if last, err = excelize.ColumnNumberToName(t.printed); err != nil {
		return err
	}
	return file.SetDefinedName(&excelize.DefinedName{Name: "_xlnm.Print_Area", RefersTo: reference(s.name, "$A$1", fmt.Sprintf("$%s$%d", last, rows)), Scope: s.name})
}
