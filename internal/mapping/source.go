package mapping

import (
	"fmt"
	"io"
	"strings"

	"hearduty/internal/grid"
)

// source gives the rows of an export as records.
type source struct {
	*plan
	in        *feed
	head      *header
	selection *selection
	format    grid.Format
	width     int // cells that a row of delimited text must have at least, and all rows at most; 0 without a header
	row       grid.Row
	entries   []Entry
	gathered  *gathering // nil where each row is a record of its own
	closed    bool
}

func newSource(p *plan, in *feed, h *header, format grid.Format) *source {
	s := &source{plan: p, in: in, head: h, selection: newSelection(p, h), format: format, width: len(h.columns)}
	s.entries = make([]Entry, len(p.recipes))
	if p.ear != nil {
		s.gathered = newGathering(p)
	}
	if h.columns == nil { // without a header, rows must reach to the last column that the map names
		s.width = 0
		for _, r := range p.references {
			s.width = max(s.width, r.position)
		}
	}
	return s
}

// Header gives the name of a column, from 1, as the export has it.
func (s *source) Header(column int) string { return s.head.name(column) }

// Column gives the number of the column that a field comes from, from 1; 0 if it comes from none, or from several.
func (s *source) Column(field int) int {
	column := 0
	for _, recipe := range s.recipes {
		for _, r := range recipe.rules {
			if r.from == nil || r.field != field && r.right != field {
				continue
			}
			if column > 0 && column != r.from.at+1 {
				return 0
			}
			column = r.from.at + 1
		}
	}
	return column
}

// About tells what reading found out about the file. It is complete once the rows are read.
func (s *source) About() grid.About { return s.in.rows.About() }

// Next reads the next row.
func (s *source) Next(o *Out) error {
	for {
		if s.closed {
			if s.gathered != nil && s.gathered.give(o) {
				return nil
			}
			return io.EOF
		}
		err := s.in.Next(&s.row)
		if err == io.EOF {
			s.closed = true
			if err := s.in.rows.Close(); err != nil {
				return err
			}
			continue
		}
		if err != nil {
			return err
		}
		if isMade(&s.row) && isObjects(s.format) {
			continue
		}
		if s.take(o) {
			return nil
		}
	}
}

// take turns the row into what became of it. It returns false for a row that was put to others of its record.
func (s *source) take(o *Out) bool {
	row := &s.row
	*o = Out{Line: row.Line, Lines: o.Lines[:0], Remarks: o.Remarks[:0]}
	if o.NotData = s.selection.notData(row); o.NotData != "" {
		return true
	}
	if o.Fault = s.unreadable(row); o.Fault != nil {
		return true
	}
	if s.gathered != nil {
		o.Fault = s.gathered.take(s, row)
		return o.Fault != nil
	}
	if row.Hidden {
		o.Remarks = append(o.Remarks, hiddenRead())
	}
	s.wide(o)
	return true
}

func hiddenRead() Remark {
	return Remark{Why: "a hidden row was read like any other", Remedy: "Write hidden: skip under rows in the map, if hidden rows are not meant to count"}
}

// unreadable says why a row has not the form of the table.
func (s *source) unreadable(row *grid.Row) *Fault {
	if f := row.Fault; f != nil {
		return &Fault{Column: f.Column, Field: s.fieldAt(f.Column), Header: s.Header(f.Column), Why: f.Problem, Remedy: f.Remedy}
	}
	if s.head.columns != nil {
		for i := s.width; i < len(row.Cells); i++ {
			if c := row.Cells[i]; strings.TrimSpace(c.Text) != "" || c.Kind == grid.Uncomputed {
				return &Fault{Column: i + 1, Why: fmt.Sprintf("a cell stands in column %d, but the header ends with column %d", i+1, s.width), Remedy: "Look for a surplus separator, and put a cell that contains one in quotes; or give the column a name"}
			}
		}
	}
	if s.format == grid.Delimited && len(row.Cells) < s.width && !s.transposed() {
		where := "the header has"
		if s.head.columns == nil {
			where = "the map needs"
		}
		return &Fault{Column: len(row.Cells) + 1, Why: fmt.Sprintf("the row has %d cells, but %s %d", len(row.Cells), where, s.width), Remedy: "Look for a missing separator or a line break within the row, and mend it"}
	}
	return nil
}

func (s *source) transposed() bool { return s.file.Head != nil && s.file.Head.Transposed }

// fieldAt gives a field that comes from the column, from 1, or nothing.
func (s *source) fieldAt(column int) string {
	for _, recipe := range s.recipes {
		for _, r := range recipe.rules {
			if r.from != nil && r.from.at == column-1 {
				return r.name
			}
		}
	}
	return ""
}

// fault says why the cell of a column cannot be read. Of further ones, only the fields are named.
func (s *source) fault(f *Fault, field string, from *reference, row *grid.Row, why, remedy string) *Fault {
	if f != nil {
		f.Also = append(f.Also, field)
		return f
	}
	f = &Fault{Field: field, Why: why, Remedy: remedy}
	if from != nil {
		f.Column, f.Header, f.Read = from.at+1, s.Header(from.at+1), from.of(row).Text
	}
	return f
}
