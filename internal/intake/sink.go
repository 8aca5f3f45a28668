package intake

import (
	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// sink turns the rows of one input into records or rejects.
type sink struct {
	in    *intake
	input *Input
	index int32
	table *record.Table
}

// take turns one row into a record, which it emits, or into a reject. The error is emit's.
func (s *sink) take(r *row) error {
	s.input.Rows++
	if f := r.fault; f != nil {
		s.reject(r, Reject{Column: f.column, Field: f.field, Read: record.Shorten(f.read), Why: f.why, Remedy: f.remedy})
		return nil
	}
	rec := s.table.New()
	rec.SetAt(record.Origin{Source: s.index, Row: int32(r.line)})
	errors := s.fill(r, rec)
	if len(errors) == 0 {
		if p := s.in.register.admit(rec); p != nil {
			errors = append(errors, p)
		}
	}
	if len(errors) > 0 {
		s.in.register.rejected(rec)
		s.rejectProblems(r, errors)
		return nil
	}
	s.input.Accepted++
	return s.in.emit(rec)
}

// fill sets the fields of the record and checks it as a whole. It notes the warnings of a record that
// has no errors, and returns the errors of one that has.
func (s *sink) fill(r *row, rec record.Record) []*record.Problem {
	var errors, warnings []*record.Problem
	note := func(p *record.Problem) {
		if p.Severity == diag.Error {
			errors = append(errors, p)
		} else {
			warnings = append(warnings, p)
		}
	}
	for _, c := range r.cells {
		if p := s.table.Set(rec, c.field, c.text); p != nil {
			note(p)
		}
	}
	for _, p := range s.table.Check(rec) {
		if !names(errors, p.Field) { // a cell that cannot be read is not missing as well
			note(p)
		}
	}
	if len(errors) == 0 {
		for _, p := range warnings {
			s.in.remarks.add(diag.Position{File: s.input.File, Sheet: s.input.Sheet, Line: r.line, Field: p.Field}, p)
		}
	}
	return errors
}

func names(problems []*record.Problem, field string) bool {
	for _, p := range problems {
		if p.Field == field {
			return true
		}
	}
	return false
}

func (s *sink) rejectProblems(r *row, problems []*record.Problem) {
	p := problems[0]
	reject := Reject{Field: p.Field, Read: p.Read, Why: p.Why, Remedy: p.Remedy}
	if i := s.table.Index(p.Field); i >= 0 && r.columns != nil {
		reject.Column = r.columns[i]
	}
	for _, other := range problems[1:] {
		if other.Field != p.Field {
			reject.Also = append(reject.Also, other.Field)
		}
	}
	s.reject(r, reject)
}

func (s *sink) reject(r *row, reject Reject) {
	s.input.Rejected++
	reject.File, reject.Sheet, reject.Row = s.input.File, s.input.Sheet, r.line
	s.in.ledger.Rejects = append(s.in.ledger.Rejects, reject)
}
