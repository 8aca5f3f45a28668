package intake

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// mappedSink turns the rows of an export, of which a map has made cells of records, into records or rejects.
type mappedSink struct {
	sink
	header func(column int) string // name of a column in the export
	column func(field int) int     // column of a field in the export, from 1, 0 if there is none; may be nil
	cells  []cell
	skips  bool // a row that repeats another is no data
}

// take turns one row, or the rows of one record, into records, which it emits, or into rejects. The error is
// emit's.
func (s *mappedSink) take(o *mapping.Out) error {
	for _, m := range o.Remarks {
		s.remark(o.Line, &record.Problem{Field: m.Field, Why: m.Why, Remedy: m.Remedy})
	}
	rows := 1 + len(o.Lines)
	switch {
	case o.NotData != "":
		s.input.declare(o.NotData, rows)
		return nil
	case len(o.Records) == 0 && o.Fault == nil:
		s.input.declare("without a record", rows)
		return nil
	}
	s.input.Rows += rows
	return s.records(o, rows)
}

// records makes the records of a row. Where one of several fails, the row is a reject, and the others are
// records all the same.
func (s *mappedSink) records(o *mapping.Out, rows int) error {
	var failed *Reject
	if f := o.Fault; f != nil {
		failed = &Reject{Column: f.Column, Header: f.Header, Field: f.Field, Read: record.Shorten(f.Read), Why: f.Why, Remedy: f.Remedy, Also: slices.Clone(f.Also)}
		s.in.withholdReject(failed, s.table)
		s.unread(o.Line, f)
	}
	good := 0
	for i := range o.Records {
		rec, errors := s.entry(o.Line, &o.Records[i])
		if s.skips && len(o.Records) == 1 && len(errors) == 1 && errors[0] == s.in.register.repeat && failed == nil {
			s.input.Rows -= rows
			s.input.declare("repeat", rows)
			return nil
		}
		if len(errors) > 0 {
			if failed == nil {
				r := s.exported(s.explain(errors), &o.Records[i])
				failed = &r
			}
			continue
		}
		good++
		if err := s.emit(rec); err != nil {
			return err
		}
	}
	if failed == nil {
		s.input.Accepted += rows
		return nil
	}
	switch {
	case good == 1:
		failed.Why += "; another record of the row was read all the same"
	case good > 1:
		failed.Why += fmt.Sprintf("; %d other records of the row were read all the same", good)
	}
	s.rejectRows(o, *failed)
	return nil
}

// unread lets the register know the worker of a row that cannot be read, so that it can say why other rows belong to
// nobody.
func (s *mappedSink) unread(line int, f *mapping.Fault) {
	if s.table.Kind != "worker" || f.Worker == "" {
		return
	}
	w := &record.Worker{WorkerID: f.Worker}
	w.SetAt(record.Origin{Source: int32(s.index), Row: int32(line)})
	s.in.identify(w)
	s.in.register.rejected(w)
}

func (s *mappedSink) entry(line int, e *mapping.Entry) (record.Record, []*record.Problem) {
	s.cells = s.cells[:0]
	for _, v := range e.Values {
		s.cells = append(s.cells, cell{v.Field, v.Text})
	}
	return s.record(line, s.cells)
}

// exported names the column of the export in a reject, and gives what stands in its cell; the reason says what
// the map made of it.
func (s *mappedSink) exported(r Reject, e *mapping.Entry) Reject {
	field := s.table.Index(r.Field)
	for _, v := range e.Values {
		if v.Field != field || v.Column == 0 && v.Read == "" {
			continue
		}
		r.Column = v.Column
		if v.Column > 0 {
			r.Header = s.header(v.Column)
		}
		if v.Read != "" && r.Read != "" && r.Read == record.Shorten(v.Text) {
			read := record.Shorten(v.Read)
			if private(&s.table.Fields[field]) { // so that nothing of it is left where the cell is not shown
				r.Why = strings.ReplaceAll(r.Why, strconv.Quote(r.Read), strconv.Quote(read))
			}
			r.Read = read
		}
	}
	if r.Column == 0 && s.column != nil {
		if r.Column = s.column(field); r.Column > 0 { // the cell is empty
			r.Header = s.header(r.Column)
		}
	}
	return r
}

// rejectRows rejects the rows of one record: the first with the reason, the others with a hint at it.
func (s *mappedSink) rejectRows(o *mapping.Out, r Reject) {
	s.reject(o.Line, r)
	for _, line := range o.Lines {
		s.reject(line, Reject{
			Why:    fmt.Sprintf("the row belongs to the record of row %d, which was rejected", o.Line),
			Remedy: fmt.Sprintf("Mend row %d first", o.Line),
		})
	}
}
