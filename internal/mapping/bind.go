package mapping

import (
	"errors"
	"fmt"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// Bind finds the header in the file, settles what the data must settle, and gives the rows. What it says
// of the file as a whole, such as columns that the map does not know, comes as warnings. The error is a
// *grid.Fault if the file and the map do not fit.
//
// The source has further methods: Header gives the name of a column, Column that of a field, and About what reading
// found out about the file. In a transposed table, rows are its columns.
func (m *Map) Bind(f *grid.File, kind record.Kind) (Source, diag.List, error) {
	table, err := m.fits(f, kind)
	if err != nil {
		return nil, nil, err
	}
	b := &binder{m: m, f: f, plan: newPlan(&m.File, table)}
	source, err := b.bind()
	if err != nil {
		return nil, b.list, err
	}
	return source, b.list, nil
}

// fits checks what depends on the file and its kind.
func (m *Map) fits(f *grid.File, kind record.Kind) (*record.Table, error) {
	table, ok := record.TableOf(kind)
	if !ok {
		return nil, &grid.Fault{Problem: fmt.Sprintf("%q is no kind of record", record.Shorten(string(kind))), Remedy: "Write the key kind into the map or beside the file in the program file"}
	}
	if kind != m.Kind || m.places == nil {
		list := m.check(kind)
		list.Sort()
		for _, d := range list {
			if d.Severity == diag.Error {
				return nil, &grid.Fault{Problem: fmt.Sprintf("the map does not fit %s records: %s", kind, place(d)), Remedy: d.Remedy}
			}
		}
	}
	stated := grid.Format(m.File.Format)
	switch {
	case stated == "" || stated == f.Format:
	case stated == "fhir":
		return nil, &grid.Fault{Problem: "the map is for FHIR resources, which are no table", Remedy: "Correct format in the map"}
	case stated == grid.Workbook || f.Format == grid.Workbook:
		return nil, &grid.Fault{Problem: fmt.Sprintf("the map is for the format %s, but the file is %s by its content", stated, f.Format), Remedy: "Correct format in the map, or export the file again"}
	default:
		f.Format = stated
	}
	return table, nil
}

// place writes a problem of a map with its place.
func place(d diag.Diagnostic) string {
	if at := d.Position.String(); at != "" {
		return at + ": " + d.Problem
	}
	return d.Problem
}

// binder brings a map and a file together.
type binder struct {
	m    *Map
	f    *grid.File
	plan *plan
	list diag.List
}

func (b *binder) bind() (_ *source, err error) {
	rows, err := b.open()
	if err != nil {
		return nil, err
	}
	in := &feed{rows: rows}
	defer func() {
		if err != nil {
			err = errors.Join(err, in.rows.Close())
		}
	}()
	head, err := b.plan.findHeader(in, newSelection(b.plan, &header{}))
	if err != nil {
		return nil, err
	}
	absent, err := b.plan.resolve(head, isObjects(b.f.Format))
	if err != nil {
		return nil, err
	}
	b.columns(head, absent)
	if err = b.plan.takeAbove(pairsAbove(in.ahead, head)); err != nil {
		return nil, err
	}
	if b.plan.proves() {
		if err = b.prove(in, head); err != nil {
			return nil, err
		}
		if err = in.rows.Close(); err != nil {
			return nil, err
		}
		if in.rows, err = b.open(); err != nil {
			return nil, err
		}
		in.ahead, in.end = nil, nil
	}
	return newSource(b.plan, in, head, b.f.Format), nil
}

// open opens the rows of the file.
func (b *binder) open() (grid.Rows, error) {
	rows, err := b.f.Rows(b.m.Options())
	if err != nil || b.m.File.Head == nil || !b.m.File.Head.Transposed {
		return rows, err
	}
	t, err := turn(rows)
	if err != nil {
		return nil, errors.Join(err, rows.Close())
	}
	return t, nil
}
