package intake

import (
	"errors"
	"fmt"
	"io"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// tableReader reads canonical rows of a workbook sheet: a header of field names, then one record a row. YAML
// comes as rows, too (yaml.go).
type tableReader struct {
	head
	rows   grid.Rows
	row    grid.Row
	format grid.Format
	names  []string // keys of YAML
}

func newTableReader(f *grid.File, o grid.Options, t *record.Table) (rowReader, error) {
	rows, err := f.Rows(o)
	if err != nil {
		return nil, err
	}
	r := &tableReader{head: newHead(t), rows: rows, format: f.Format}
	if f.Format == grid.YAML {
		err = r.keys()
	} else {
		err = r.header()
	}
	if err != nil {
		return nil, errors.Join(err, rows.Close())
	}
	return r, nil
}

// header reads the first row that holds anything.
func (t *tableReader) header() error {
	for {
		err := t.rows.Next(&t.row)
		switch {
		case err == io.EOF:
			return t.empty()
		case err != nil:
			return err
		case t.row.Fault != nil:
			return headFault(t.row.Line, t.row.Fault)
		case t.row.NotData != "":
			t.before = append(t.before, noData{t.row.Line, t.row.NotData})
		case t.row.Blank():
			t.before = append(t.before, noData{t.row.Line, blank})
		default:
			return t.read(t.row.Line, withoutEnd(t.row.Texts()))
		}
	}
}

// withoutEnd cuts off the blank cells at the end.
func withoutEnd(cells []string) []string {
	for len(cells) > 0 && strings.TrimSpace(cells[len(cells)-1]) == "" {
		cells = cells[:len(cells)-1]
	}
	return cells
}

func (t *tableReader) next(r *row) error {
	if t.earlier(r) {
		return nil
	}
	if err := t.rows.Next(&t.row); err != nil {
		_ = t.rows.Close() // what is wrong with the file, Next has told
		return err
	}
	r.reset(t.row.Line)
	if r.columns = t.columns; t.format == grid.YAML {
		r.columns = nil
	}
	switch {
	case t.row.Fault != nil:
		r.fault = t.fault(t.row.Fault)
	case t.row.NotData != "":
		r.notData = t.row.NotData
	case t.row.Blank():
		r.notData = blank
	default:
		t.fill(r)
		r.refuseUnknown(t.table, t.about())
	}
	return nil
}

// fill takes the cells of the row, or says what is wrong with the first that cannot be taken.
func (t *tableReader) fill(r *row) {
	for i, c := range t.row.Cells {
		if c.Text == "" && c.Kind != grid.Uncomputed {
			continue
		}
		text, f := c.Text, (*fault)(nil)
		switch {
		case t.format == grid.YAML && t.fields[i] < 0:
			f = t.unknownKey(i, c)
		case i >= len(t.fields):
			if strings.TrimSpace(c.Text) == "" {
				continue
			}
			f = &fault{column: i + 1, why: fmt.Sprintf("a cell stands in column %d, but the header ends with column %d", i+1, len(t.fields)), remedy: "Give the column the name of a field, or remove the cell"}
		default:
			text, f = t.text(i, c)
		}
		if f != nil {
			r.cells, r.fault = r.cells[:0], f
			return
		}
		if i < len(t.fields) && t.fields[i] >= 0 {
			r.cells = append(r.cells, cell{t.fields[i], text})
		}
	}
}

// text gives the canonical text of a cell.
func (t *tableReader) text(i int, c grid.Cell) (string, *fault) {
	field := &t.table.Fields[t.fields[i]]
	wrong := func(remedy, why string) (string, *fault) {
		f := &fault{column: i + 1, field: field.Name, why: why, remedy: remedy}
		if t.format == grid.YAML {
			f.column = 0
		}
		return "", f
	}
	switch c.Kind {
	case grid.Bool:
		if field.Type != record.YesNo && !hasWord(field.One, "yes") {
			return wrong("Write "+valueOf(field), "the value is true or false")
		}
		return map[string]string{"true": "yes", "false": "no"}[c.Text], nil
	case grid.Clock:
		return wrong("Format the cell as text or as a number, and write "+valueOf(field), "the cell holds a time of day or a duration")
	case grid.Uncomputed:
		return wrong("Open the workbook in a spreadsheet, let it calculate, and save it", "the cell holds a formula whose value was never stored")
	case grid.Broken:
		if t.format == grid.YAML {
			return wrong("Write single values in the list, without semicolons", "the value is a list that holds more than single values")
		}
		return wrong("Mend the formula, or leave the cell empty if the value is not known", "the cell holds the error value "+record.Shorten(c.Text))
	}
	return c.Text, nil
}

func (t *tableReader) about() grid.About { return t.rows.About() }
