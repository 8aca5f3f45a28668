package intake

import (
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// arrayReader reads JSON: one array of objects. A row is the place of an object in the array, from 1.
type arrayReader struct {
	elements *grid.Elements
	object   *objectReader
}

func newArrayReader(f *grid.File, encoding string, t *record.Table) (rowReader, error) {
	elements, err := f.Elements(encoding, false)
	if err != nil {
		return nil, err
	}
	return &arrayReader{elements, newObjectReader(t)}, nil
}

func (a *arrayReader) next(r *row) error {
	raw, err := a.elements.Next()
	if err != nil {
		return err
	}
	r.reset(a.elements.Count())
	if len(raw) > grid.MaxRow {
		r.fault = tooLong()
		return nil
	}
	a.object.read(raw, r)
	r.refuseUnknown(a.object.table, a.about())
	return nil
}

func (a *arrayReader) about() grid.About {
	about := a.elements.About()
	about.Format = grid.JSON
	return about
}

func tooLong() *fault {
	f := grid.TooLong()
	return &fault{why: f.Problem, remedy: f.Remedy}
}
