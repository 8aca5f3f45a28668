package intake

import (
	"slices"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// sink turns the rows of one input into records or rejects.
type sink struct {
	in    *intake
	input *Input
	index int
	table *record.Table
}

// take turns one canonical row into a record, which it emits, or into a reject. The error is emit's.
func (s *sink) take(r *row) error {
	if r.notData != "" {
		s.input.declare(r.notData, 1)
		return nil
	}
	s.input.Rows++
	if f := r.fault; f != nil {
		reject := Reject{Column: f.column, Field: f.field, Read: record.Shorten(f.read), Why: f.why, Remedy: f.remedy}
		s.in.withholdReject(&reject, s.table)
		s.reject(r.line, reject)
		return nil
	}
	rec, errors := s.record(r.line, r.cells)
	if len(errors) > 0 {
		reject := s.explain(errors)
		if i := s.table.Index(reject.Field); i >= 0 && r.columns != nil {
			reject.Column = r.columns[i]
		}
		s.reject(r.line, reject)
		return nil
	}
	s.input.Accepted++
	return s.emit(rec)
}

// record makes a record of cells and lets the register look at it. It gives the errors of a record that
// cannot be used.
func (s *sink) record(line int, cells []cell) (record.Record, []*record.Problem) {
	rec := s.table.New()
	rec.SetAt(record.Origin{Source: int32(s.index), Row: int32(line)})
	errors := s.fill(line, cells, rec)
	s.in.identify(rec)
	if len(errors) == 0 {
		if p := s.in.register.admit(rec); p != nil {
			s.in.withholdCell(p)
			errors = append(errors, p)
		}
	}
	if len(errors) > 0 {
		s.in.register.rejected(rec)
	}
	return rec, errors
}

func (s *sink) emit(rec record.Record) error {
	s.input.Records++
	s.in.observer.look(rec)
	return s.in.emit(rec)
}

// fill sets the fields of the record and checks it as a whole. It notes the warnings of a record that
// has no errors, and returns the errors of one that has.
func (s *sink) fill(line int, cells []cell, rec record.Record) []*record.Problem {
	var errors, warnings []*record.Problem
	note := func(p *record.Problem) {
		if p.Severity == diag.Error {
			errors = append(errors, p)
		} else {
			warnings = append(warnings, p)
		}
	}
	setter := s.table.Setter(rec)
	for _, c := range cells {
		if p := setter.Set(c.field, c.text); p != nil {
			note(p)
		}
	}
	for _, p := range s.table.Check(rec) {
		if !names(errors, p.Field) { // a cell that cannot be read is not missing as well
			note(p)
		}
	}
	s.in.withhold(errors)
	if len(errors) == 0 {
		s.in.withhold(warnings)
		for _, p := range warnings {
			s.remark(line, p)
		}
	}
	return errors
}

func (s *sink) remark(line int, p *record.Problem) {
	s.in.remarks.add(diag.Position{File: s.input.File, Sheet: s.input.Sheet, Line: line, Field: p.Field}, p)
}

func names(problems []*record.Problem, field string) bool {
	return slices.ContainsFunc(problems, func(p *record.Problem) bool { return p.Field == field })
}

// explain makes a reject of what is wrong with a record: the first error, and the fields of the others.
func (s *sink) explain(problems []*record.Problem) Reject {
	p := problems[0]
	reject := Reject{Field: p.Field, Read: p.Read, Why: p.Why, Remedy: p.Remedy}
	for _, other := range problems[1:] {
		if other.Field != p.Field {
			reject.Also = append(reject.Also, other.Field)
		}
	}
	return reject
}

// reject counts a row that did not become a record. What it keeps shares no memory with the row.
func (s *sink) reject(line int, reject Reject) {
	s.input.Rejected++
	reject.File, reject.Sheet, reject.Row, reject.Source = s.input.File, s.input.Sheet, line, s.index
	reject.Read = strings.Clone(reject.Read)
	s.in.ledger.Rejects = append(s.in.ledger.Rejects, reject)
}
