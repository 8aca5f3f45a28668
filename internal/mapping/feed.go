package mapping

import (
	"fmt"
	"io"
	"slices"

	"hearduty/internal/grid"
)

// searched is the number of rows among which the header is looked for.
const searched = 50

// feed gives the rows of a table, of which the first can be looked at beforehand.
type feed struct {
	rows  grid.Rows
	ahead []grid.Row // looked at, but not given
	end   error      // met while looking ahead
}

// look reads rows ahead until there are n, or one of a line behind last. It returns those that there are.
func (f *feed) look(n, last int) []grid.Row {
	for f.end == nil && (len(f.ahead) < n || f.ahead[len(f.ahead)-1].Line <= last) {
		var row grid.Row
		if f.end = f.rows.Next(&row); f.end == nil {
			row.Cells = slices.Clone(row.Cells)
			f.ahead = append(f.ahead, row)
		}
	}
	return f.ahead
}

// Next reads the next row.
func (f *feed) Next(row *grid.Row) error {
	if len(f.ahead) > 0 {
		*row = f.ahead[0]
		f.ahead = f.ahead[1:]
		return nil
	}
	if f.end != nil {
		return f.end
	}
	return f.rows.Next(row)
}

// maxTurned is the number of cells that a transposed table can have.
const maxTurned = 4_000_000

// turned gives the columns of a transposed table as rows.
type turned struct {
	grid.Rows
	table []grid.Row
	next  int
	width int
}

// turn reads a transposed table as a whole.
func turn(rows grid.Rows) (grid.Rows, error) {
	t := &turned{Rows: rows}
	cells := 0
	for {
		var row grid.Row
		err := rows.Next(&row)
		switch {
		case err == io.EOF:
			return t, nil
		case err != nil:
			return nil, err
		case row.Fault != nil:
			return nil, &grid.Fault{Line: row.Line, Column: row.Fault.Column, Problem: row.Fault.Problem, Remedy: row.Fault.Remedy}
		case row.NotData != "":
			continue
		}
		if cells += len(row.Cells) + 1; cells > maxTurned {
			return nil, &grid.Fault{Line: row.Line, Problem: fmt.Sprintf("a transposed table cannot have more than %d cells", maxTurned), Remedy: "Turn the table around before it is exported, or check whether it is transposed at all"}
		}
		row.Cells = slices.Clone(row.Cells)
		t.width = max(t.width, len(row.Cells))
		t.table = append(t.table, row)
	}
}

// Next gives the next column as a row. Its line is the number of the column.
func (t *turned) Next(row *grid.Row) error {
	if t.next == t.width {
		return io.EOF
	}
	*row = grid.Row{Line: t.next + 1, Last: t.next + 1, Cells: row.Cells[:0]}
	for i := range t.table {
		var c grid.Cell
		if t.next < len(t.table[i].Cells) {
			c = t.table[i].Cells[t.next]
		}
		row.Cells = append(row.Cells, c)
	}
	t.next++
	return nil
}
