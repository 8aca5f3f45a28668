package intake

import (
	"fmt"
	"io"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// csvReader reads canonical CSV: a header of field names, then one record a row.
type csvReader struct {
	scanner *scanner
	table   *record.Table
	fields  []int // field of each column
	columns []int // number of each field's column, from 1; 0 for none
}

func newCSVReader(r io.Reader, t *record.Table) (rowReader, error) {
	c := &csvReader{scanner: newScanner(r), table: t, columns: make([]int, len(t.Fields))}
	header, err := c.scanner.next()
	if err == io.EOF {
		return nil, &refusal{problem: "the file is empty", remedy: "Give it a header with the columns " + strings.Join(needed(t), ", ")}
	}
	if err != nil {
		return nil, err
	}
	if f := header.fault; f != nil {
		return nil, &refusal{line: header.line, column: f.column, problem: "the header cannot be read: " + f.why, remedy: f.remedy}
	}
	if err := c.header(header); err != nil {
		return nil, err
	}
	c.scanner.want = len(c.fields)
	return c, nil
}

// header finds the field of each column.
func (c *csvReader) header(h scanned) error {
	for i, text := range h.cells {
		name := strings.ToLower(strings.TrimSpace(text))
		refuse := func(remedy, format string, args ...any) error {
			return &refusal{h.line, i + 1, name, fmt.Sprintf(format, args...), remedy}
		}
		if name == "" {
			return refuse("Give the column the name of a field, or remove it", "column %d has no name", i+1)
		}
		field := c.table.Index(name)
		if field < 0 {
			return refuse(unknownName(name, c.table, "Remove or rename the column"), "%s records have no field %q (column %d)", c.table.Kind, record.Shorten(name), i+1)
		}
		if first := c.columns[field]; first > 0 {
			return refuse("Remove or rename one of the two", "the columns %d and %d are both named %s", first, i+1, name)
		}
		c.columns[field] = i + 1
		c.fields = append(c.fields, field)
	}
	for _, name := range needed(c.table) {
		if c.columns[c.table.Index(name)] == 0 {
			return &refusal{line: h.line, field: name, problem: fmt.Sprintf("the column %s is missing, but every %s needs it", name, c.table.Kind), remedy: "Add the column; needed are " + strings.Join(needed(c.table), ", ")}
		}
	}
	return nil
}

// unknownName says what to do about a name that no field has.
func unknownName(name string, t *record.Table, remedy string) string {
	if near := diag.Near(name, t.Names()); near != "" {
		return remedy + "; the nearest field is " + near
	}
	return remedy + "; the fields are " + fieldNames(t)
}

// fieldNames lists the fields, with one name for those of several frequencies.
func fieldNames(t *record.Table) string {
	var out []string
	for _, name := range t.Names() {
		outer, inner, nested := strings.Cut(name, ".")
		if nested && inner[0] >= '0' && inner[0] <= '9' {
			name = outer + ".<Hz>"
		}
		if len(out) == 0 || out[len(out)-1] != name {
			out = append(out, name)
		}
	}
	return strings.Join(out, ", ")
}

// needed lists the fields that every record of the kind has.
func needed(t *record.Table) []string {
	var out []string
	for i := range t.Fields {
		if t.Fields[i].Required {
			out = append(out, t.Fields[i].Name)
		}
	}
	return out
}

func (c *csvReader) next(r *row) error {
	got, err := c.scanner.next()
	if err != nil {
		return err
	}
	r.reset(got.line)
	r.columns = c.columns
	if r.fault = got.fault; r.fault != nil {
		if n := r.fault.column; n > 0 && n <= len(c.fields) {
			r.fault.field = c.table.Fields[c.fields[n-1]].Name
		}
		return nil
	}
	for i, text := range got.cells {
		if text == "" {
			continue
		}
		if text[0] == '\'' {
			text = unguard(text)
		}
		r.cells = append(r.cells, cell{c.fields[i], text})
	}
	return nil
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
