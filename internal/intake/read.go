package intake

import (
	"context"
	"errors"
	"io"
	"slices"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// first lists the kinds that are read before the others, because the others refer to them.
var first = []record.Kind{"worker", "group", "instrument", "tester", "protector"}

// Read reads all record files of p and gives every record to emit: workers first, then groups and the
// other registers, then the rest. The ledger is complete also if there is an error. The error is a
// diag.List if files were refused, which never keeps the others from being read; otherwise it is the
// context's error, or what emit returned.
func Read(ctx context.Context, p *program.Program, emit func(record.Record) error) (*Ledger, error) {
	in := &intake{ledger: &Ledger{Inputs: Inputs(p)}, emit: emit}
	in.register = newRegister(p, in.ledger)
	var err error
	for _, i := range order(p.Sources) {
		if err = in.source(ctx, i, &p.Sources[i]); err != nil {
			break
		}
	}
	in.ledger.Remarks = in.remarks.done()
	in.ledger.sort()
	if err == nil {
		err = in.ledger.Unreadable.Err()
	}
	return in.ledger, err
}

// Inputs lists the record files of p in their order, nothing read yet.
func Inputs(p *program.Program) []Input {
	out := make([]Input, len(p.Sources))
	for i, s := range p.Sources {
		out[i] = Input{File: s.Shown, Sheet: s.Sheet, Kind: s.Kind}
	}
	return out
}

// order gives the indexes of the sources in the order in which they are read.
func order(sources []program.Source) []int {
	rank := func(i int) int {
		if at := slices.Index(first, sources[i].Kind); at >= 0 {
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
	register *register
	remarks  remarks
	emit     func(record.Record) error
}

// source reads one file. Refusals go to the ledger; the error is the context's or emit's.
func (in *intake) source(ctx context.Context, index int, s *program.Source) error {
	input := &in.ledger.Inputs[index]
	f, digest, refused := openFile(s.Path)
	input.SHA256 = digest
	if refused != nil {
		in.refuse(input, refused)
		return nil
	}
	defer f.Close()
	table, _ := record.TableOf(s.Kind)
	rows, err := openRows(f, s.Shown, table)
	if err != nil {
		in.refuse(input, asRefusal(err))
		return nil
	}
	sink := sink{in: in, input: input, index: int32(index), table: table}
	in.register.begin(table)
	var r row
	for {
		if input.Rows%1024 == 0 && ctx.Err() != nil {
			return ctx.Err()
		}
		switch err := rows.next(&r); {
		case err == io.EOF:
			if input.Rows == 0 {
				in.ledger.noRows(&in.remarks, input)
			}
			return nil
		case err != nil:
			in.refuse(input, asRefusal(err))
			return nil
		}
		if err := sink.take(&r); err != nil {
			return err
		}
	}
}

func asRefusal(err error) *refusal {
	var refused *refusal
	if errors.As(err, &refused) {
		return refused
	}
	return cannotRead(err)
}

// refuse notes a file that cannot be read, as a whole or from some place on.
func (in *intake) refuse(input *Input, why *refusal) {
	in.register.refused(input.Kind)
	in.ledger.Unreadable = append(in.ledger.Unreadable, why.diagnostic(input.File, input.Sheet))
	in.ledger.Rejects = append(in.ledger.Rejects, Reject{
		File: input.File, Sheet: input.Sheet, Column: why.column, Field: why.field, Why: why.problem, Remedy: why.remedy,
	})
}

func (l *Ledger) noRows(m *remarks, input *Input) {
	at := diag.Position{File: input.File, Sheet: input.Sheet}
	m.list.Warnf(at, "Remove the file from the program file if that is meant", "the file holds no records")
}
