package intake

import (
	"encoding/csv"
	"fmt"
	"io"

	"hearduty/internal/record"
)

// CSVWriter writes records of one kind as canonical CSV. Text that a spreadsheet would take for a formula
// gets an apostrophe in front, which reading takes away again.
type CSVWriter struct {
	csv    *csv.Writer
	table  *record.Table
	fields []int
	cells  []string
	begun  bool
}

// NewCSVWriter gives a writer for the columns named, in that order, or for all fields if columns is nil.
// A column that is no field of the table is a mistake of the caller and panics.
func NewCSVWriter(w io.Writer, t *record.Table, columns []string) *CSVWriter {
	if columns == nil {
		columns = t.Names()
	}
	c := &CSVWriter{csv: csv.NewWriter(w), table: t, cells: make([]string, len(columns))}
	for _, name := range columns {
		i := t.Index(name)
		if i < 0 {
			panic(fmt.Sprintf("intake: %s records have no field %q", t.Kind, name))
		}
		c.fields = append(c.fields, i)
	}
	return c
}

// Write writes one record, and the header before the first.
func (c *CSVWriter) Write(r record.Record) error {
	if r.Kind() != c.table.Kind {
		return fmt.Errorf("a %s cannot be written to a table of kind %s", r.Kind(), c.table.Kind)
	}
	if err := c.header(); err != nil {
		return err
	}
	for i, field := range c.fields {
		c.cells[i] = c.table.Text(r, field)
		if t := c.table.Fields[field].Type; (t == record.Text || t == record.Words) && formula(c.cells[i]) {
			c.cells[i] = "'" + c.cells[i]
		}
	}
	return c.csv.Write(c.cells)
}

func (c *CSVWriter) header() error {
	if c.begun {
		return nil
	}
	c.begun = true
	for i, field := range c.fields {
		c.cells[i] = c.table.Fields[field].Name
	}
	return c.csv.Write(c.cells)
}

// Flush writes what is still buffered, and the header if no record was written.
func (c *CSVWriter) Flush() error {
	if err := c.header(); err != nil {
		return err
	}
	c.csv.Flush()
	return c.csv.Error()
}

// UsedColumns lists the fields that are present in any of the records, in canonical order; the required
// fields are always among them.
func UsedColumns[R record.Record](t *record.Table, records []R) []string {
	var out []string
	for i := range t.Fields {
		used := t.Fields[i].Required
		for _, r := range records {
			if used {
				break
			}
			used = t.Text(r, i) != ""
		}
		if used {
			out = append(out, t.Fields[i].Name)
		}
	}
	return out
}

// NDJSONWriter writes records of any kind as canonical JSON, one object a line, with the place from which
// each was read.
type NDJSONWriter struct {
	w      io.Writer
	inputs []Input
	buffer []byte
}

// NewNDJSONWriter gives a writer for records whose origins are indexes of inputs.
func NewNDJSONWriter(w io.Writer, inputs []Input) *NDJSONWriter {
	return &NDJSONWriter{w: w, inputs: inputs}
}

// Write writes one record.
func (n *NDJSONWriter) Write(r record.Record) error {
	var in Input
	if source := int(r.At().Source); source >= 0 && source < len(n.inputs) {
		in = n.inputs[source]
	}
	n.buffer = append(record.AppendJSON(n.buffer[:0], r, in.File, in.Sheet), '\n')
	_, err := n.w.Write(n.buffer)
	return err
}
