package intake

import (
	"io"
	"strings"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// csvReader reads canonical delimited text: a header of field names, then one record a row.
type csvReader struct {
	head
	text    *grid.Decoded
	scanner *grid.Scanner
}

func newCSVReader(f *grid.File, encoding string, t *record.Table) (rowReader, error) {
	text, err := f.Text(encoding)
	if err != nil {
		return nil, err
	}
	c := &csvReader{head: newHead(t), text: text, scanner: grid.NewScanner(text, grid.ScanOptions{ByHeader: true})}
	for {
		row, err := c.scanner.Next()
		switch {
		case err == io.EOF:
			return nil, c.empty()
		case err != nil:
			return nil, err
		case row.NotData != "":
			c.before = append(c.before, noData{row.Line, row.NotData})
		case row.Fault != nil:
			return nil, headFault(row.Line, row.Fault)
		case grid.Blank(row.Cells):
			c.before = append(c.before, noData{row.Line, blank})
		default:
			if err := c.read(row.Line, row.Cells); err != nil {
				return nil, err
			}
			c.scanner.Want(len(c.fields))
			return c, nil
		}
	}
}

func (c *csvReader) next(r *row) error {
	if c.earlier(r) {
		return nil
	}
	got, err := c.scanner.Next()
	if err != nil {
		return err
	}
	r.reset(got.Line)
	r.columns = c.columns
	switch {
	case got.Fault != nil:
		r.fault = c.fault(got.Fault)
		return nil
	case grid.Blank(got.Cells):
		r.notData = blank
		return nil
	}
	for i, text := range got.Cells {
		if text == "" {
			continue
		}
		if text[0] == '\'' {
			text = unguard(text)
		}
		r.cells = append(r.cells, cell{c.fields[i], text})
	}
	if c.text.Lossy() {
		r.refuseUnknown(c.table, c.about())
	}
	return nil
}

func (c *csvReader) about() grid.About {
	a := c.text.About()
	a.Format, a.Delimiter = grid.Delimited, c.scanner.Delimiter()
	return a
}

// formula says whether a spreadsheet would take the text for a formula.
func formula(text string) bool {
	text = strings.TrimLeft(text, "'")
	return text != "" && strings.IndexByte("=+-@", text[0]) >= 0
}

// unguard takes away the apostrophe that CSVWriter puts before such a text.
func unguard(text string) string {
	if formula(text) {
		return text[1:]
	}
	return text
}
