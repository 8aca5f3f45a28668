package intake

import (
	"context"
	"regexp"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/record"
)

// ReadVeiled reads all record files as Read does, with codes in place of the ids of persons if veil is not nil. Then
// the ledger repeats no cell of a row that could not be used, since any cell can hold an id that slipped into it;
// file, row and column tell where to look.
func ReadVeiled(ctx context.Context, p *program.Program, veil *pseudonym.Veil, emit func(record.Record) error) (*Ledger, error) {
	return read(ctx, p, veil, emit)
}

// identify puts the id of the person in place of another one, as the same_person file says, and then a code in place of
// that.
func (in *intake) identify(rec record.Record) {
	in.people.translate(rec)
	if in.veil != nil {
		in.veil.Record(rec)
	}
}

// doubled gives the error of the veil, if two ids have the same code.
func (in *intake) doubled() error {
	if in.veil == nil {
		return nil
	}
	return in.veil.Err()
}

// withhold takes what stands in cells out of problems of cells.
func (in *intake) withhold(problems []*record.Problem) {
	if in.veil == nil {
		return
	}
	for _, p := range problems {
		p.Why, p.Read = withheld(p.Why, p.Read), ""
	}
}

// withholdCell takes what stands in a cell out of the problem of a record whose ids are codes already.
func (in *intake) withholdCell(p *record.Problem) {
	if in.veil != nil && !pseudonym.Covers(p.Field) {
		p.Why, p.Remedy, p.Read = withoutRead(p.Why, p.Read), withoutRead(p.Remedy, p.Read), ""
	}
}

// withholdReject takes what stands in cells out of a reject, and the name of a field that only the file knows.
func (in *intake) withholdReject(r *Reject, t *record.Table) {
	if in.veil == nil {
		return
	}
	r.Why, r.Remedy, r.Read = withheld(r.Why, r.Read), withheld(r.Remedy, r.Read), ""
	if t == nil || t.Index(r.Field) < 0 {
		r.Field = ""
	}
}

// withholdDiagnostics takes whatever is in quotes out of diagnostics.
func (in *intake) withholdDiagnostics(l diag.List) {
	if in.veil != nil {
		WithholdQuoted(l)
	}
}

// WithholdQuoted takes whatever is in quotes out of diagnostics, since it can be an id of a person.
func WithholdQuoted(l diag.List) {
	for i := range l {
		l[i].Problem, l[i].Remedy = withheld(l[i].Problem, ""), withheld(l[i].Remedy, "")
	}
}

// quotes finds what is in quotes.
var quotes = regexp.MustCompile(`"(?:[^"\\]|\\.)*"`)

// withheld takes what was read, and whatever else is in quotes, out of a sentence.
func withheld(sentence, read string) string {
	return quotes.ReplaceAllString(withoutRead(sentence, read), `"…"`)
}
