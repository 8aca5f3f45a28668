package intake

import (
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// linesReader reads NDJSON: one JSON object a line.
type linesReader struct {
	lines  *grid.LineReader
	object *objectReader
}

func newLinesReader(f *grid.File, encoding string, t *record.Table) (rowReader, error) {
	lines, err := f.Lines(encoding)
	if err != nil {
		return nil, err
	}
	return &linesReader{lines, newObjectReader(t)}, nil
}

func (l *linesReader) next(r *row) error {
	text, err := l.lines.Next()
	if err != nil {
		return err
	}
	r.reset(l.lines.Line())
	switch {
	case text == nil:
		r.fault = tooLong()
	case len(text) == 0:
		r.notData = blank
	default:
		l.object.read(text, r)
		r.refuseUnknown(l.object.table, l.about())
	}
	return nil
}

func (l *linesReader) about() grid.About {
	about := l.lines.About()
	about.Format = grid.Lines
	return about
}
