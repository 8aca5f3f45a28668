// Package intake reads the record files of a program: it turns every row into a record, or into a reject
// that says why, or declares it no data. No row is lost: rows read = accepted + rejected + not data.
package intake

import (
	"context"
	"errors"
	"io"
	"slices"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/record"
)

// first lists the kinds that are read before the others, because the others refer to them.
var first = []record.Kind{"worker", "group", "instrument", "tester", "protector"}

// Read reads all record files of p and gives every record to emit: workers first, then groups and the
// other registers, then the rest. The ledger is complete also if there is an error. The error is a
// diag.List if files were refused, which never keeps the others from being read; otherwise it is the
// context's error, or what emit returned.
func Read(ctx context.Context, p *program.Program, emit func(record.Record) error) (*Ledger, error) {
	return read(ctx, p, nil, emit)
}

func read(ctx context.Context, p *program.Program, veil *pseudonym.Veil, emit func(record.Record) error) (*Ledger, error) {
	in := &intake{ledger: &Ledger{Inputs: Inputs(p)}, people: newPeople(p.Aliases), veil: veil, emit: emit, tell: progressOf(ctx)}
	defer in.tell("", 0)
	sources := in.prepare(p)
	in.register = newRegister(p, sources, in.ledger)
	in.observer = newObserver(in.ledger)
	var err error
	for _, i := range order(sources) {
		if err = in.source(ctx, i, &sources[i]); err != nil {
			break
		}
	}
	in.people.done(&in.remarks)
	in.ledger.Remarks = append(in.ledger.Remarks, in.remarks.done()...)
	in.withholdDiagnostics(in.ledger.Remarks)
	in.withholdDiagnostics(in.ledger.Unreadable)
	in.ledger.sort()
	if err == nil {
		err = in.doubled()
	}
	if err == nil {
		err = in.ledger.Unreadable.Err()
	}
	return in.ledger, err
}

// Inputs lists the tables of p in their order, nothing read yet.
func Inputs(p *program.Program) []Input {
	out := make([]Input, len(p.Sources))
	for i, s := range p.Sources {
		out[i] = Input{File: s.Shown, Sheet: s.Sheet, Kind: s.Kind}
	}
	return out
}

// order gives the indexes of the sources in the order in which they are read.
func order(sources []source) []int {
	rank := func(i int) int {
		if at := slices.Index(first, sources[i].kind); at >= 0 {
			return at
		}
		return len(first)
	}
	out := make([]int, len(sources))
	for i := range out {
		out[i] = i
	}
	slices.SortStableFunc(out, func(a, b int) int { return rank(a) - rank(b) })
	return out
}

// intake is one run of Read.
type intake struct {
	ledger   *Ledger
	people   *people
	veil     *pseudonym.Veil // nil for none
	register *register
	observer *observer
	remarks  remarks
	emit     func(record.Record) error
	tell     Progress
}

// source reads one table. Refusals go to the ledger; the error is the context's or emit's.
func (in *intake) source(ctx context.Context, index int, s *source) error {
	if s.skip {
		in.register.refused(s.kind)
		return nil
	}
	table, _ := record.TableOf(s.kind)
	sink := sink{in: in, input: &in.ledger.Inputs[index], index: index, table: table}
	in.register.begin(table)
	var err error
	if s.mapped != nil {
		err = in.export(ctx, &sink, s)
	} else {
		err = in.canonical(ctx, &sink, s)
	}
	in.people.input(&in.remarks, sink.input)
	return err
}

// canonical reads a table whose columns are named as the fields.
func (in *intake) canonical(ctx context.Context, sink *sink, s *source) error {
	f, err := open(sink, s)
	if err != nil {
		in.refuse(sink, faulty(err))
		return nil
	}
	defer f.Close()
	rows, err := openRows(f, grid.Options{Encoding: s.Encoding, Sheet: s.Sheet}, sink.table)
	if err != nil {
		in.refuse(sink, asRefusal(err))
		return nil
	}
	defer func() { in.about(sink.input, rows.about()) }()
	var r row
	return in.rows(ctx, sink, func() error {
		if err := rows.next(&r); err != nil {
			return err
		}
		return taken(sink.take(&r))
	})
}

// rows calls next for each row until it returns io.EOF, what the context says, or that the rest cannot be read.
// An error of emit comes as an *emitError.
func (in *intake) rows(ctx context.Context, sink *sink, next func() error) error {
	const often = 1024
	for n := 0; ; n++ {
		if n%often == 0 {
			if ctx.Err() != nil {
				return ctx.Err()
			}
			in.tell(sink.input.File, sink.input.Rows)
		}
		var emitted *emitError
		switch err := next(); {
		case err == nil:
		case err == io.EOF:
			if sink.input.Accepted+sink.input.Rejected == 0 {
				in.noRows(sink.input)
			}
			return nil
		case errors.As(err, &emitted):
			return emitted.error
		default:
			in.refuse(sink, asRefusal(err))
			return nil
		}
	}
}

// emitError is an error of emit, which ends the whole reading.
type emitError struct{ error }

func taken(err error) error {
	if err == nil {
		return nil
	}
	return &emitError{err}
}

func asRefusal(err error) *refusal {
	var refused *refusal
	if errors.As(err, &refused) {
		return refused
	}
	return faulty(err)
}

// refuse notes a file that cannot be read, as a whole or from some place on.
func (in *intake) refuse(sink *sink, why *refusal) {
	input := sink.input
	in.register.refused(input.Kind)
	in.ledger.Unreadable = append(in.ledger.Unreadable, why.diagnostic(input.File, input.Sheet))
	reject := Reject{File: input.File, Sheet: input.Sheet, Column: why.column, Field: why.field, Why: why.problem, Remedy: why.remedy, Source: sink.index}
	in.withholdReject(&reject, sink.table)
	in.ledger.Rejects = append(in.ledger.Rejects, reject)
}

func (in *intake) noRows(input *Input) {
	at := diag.Position{File: input.File, Sheet: input.Sheet}
	in.remarks.list.Warnf(at, "Remove the file from the program file if that is meant", "the file holds no records")
}
