package draft

import (
	"errors"
	"io"
	"slices"
	"strings"

	"hearduty/internal/grid"
)

// Bounds of the sample.
const (
	sampleRows  = 5_000
	sampleBytes = 32 << 20 // of text in cells
	sampleCells = 512      // of a row; more are looked at by nobody
)

// sample is the beginning of an export.
type sample struct {
	about grid.About
	rows  []grid.Row // without rows that cannot be read
	cut   bool       // the file goes on
	bad   []int      // lines of the rows that cannot be read
}

// takeSample reads the first rows. The error is a *grid.Fault if the file cannot be read.
func takeSample(f *grid.File, o grid.Options) (*sample, error) {
	rows, err := f.Rows(o)
	if err != nil {
		return nil, err
	}
	defer rows.Close()
	s := &sample{}
	bytes := 0
	var r grid.Row
	for {
		if len(s.rows) >= sampleRows || bytes > sampleBytes {
			s.cut = true
			break
		}
		err := rows.Next(&r)
		if err == io.EOF {
			break
		}
		if err != nil {
			if len(s.rows) == 0 {
				return nil, err
			}
			s.bad = append(s.bad, faultLine(err))
			break
		}
		switch {
		case r.Fault != nil:
			s.bad = append(s.bad, r.Line)
		case r.NotData == "":
			c := grid.Row{Line: r.Line, Last: r.Last, Hidden: r.Hidden, Cells: slices.Clone(r.Cells[:min(len(r.Cells), sampleCells)])}
			for i := range c.Cells {
				c.Cells[i].Text = strings.Clone(c.Cells[i].Text)
				bytes += len(c.Cells[i].Text)
			}
			s.rows = append(s.rows, c)
		}
	}
	s.about = rows.About()
	return s, nil
}

func faultLine(err error) int {
	var f *grid.Fault
	if errors.As(err, &f) {
		return f.Line
	}
	return 0
}

// filled counts the cells that hold anything.
func filled(r *grid.Row) int {
	n := 0
	for _, c := range r.Cells {
		if !blank(c) {
			n++
		}
	}
	return n
}

func blank(c grid.Cell) bool { return strings.TrimSpace(c.Text) == "" }

// first gives the first cell of a row that holds anything.
func first(r *grid.Row) string {
	for _, c := range r.Cells {
		if !blank(c) {
			return strings.TrimSpace(c.Text)
		}
	}
	return ""
}

// cell gives the cell in a column from 0, blank if the row is shorter.
func cell(r *grid.Row, column int) grid.Cell {
	if column >= 0 && column < len(r.Cells) {
		return r.Cells[column]
	}
	return grid.Cell{}
}
