package mapping

import (
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// Bounds of what a reader remembers.
const (
	maxKnown     = 2048  // texts
	maxKnownDays = 16384 // dates: the days of a working life
	maxKnownText = 32    // bytes of one
)

// reader turns the cells of one column into canonical texts.
type reader struct {
	field   *record.Field
	blank   wordSet
	words   *convert.Words // nil without a table of values
	others  string
	convert func(grid.Cell) (string, bool, *convert.Problem)
	dates   *convert.Dates // of a date
	proven  bool           // the order of the dates is to be taken from the column
	known   map[string]reading
	most    int // texts that it remembers
}

// reading is what became of a cell.
type reading struct {
	text   string
	masked bool // the cell says that a threshold was taken with masking
	wrong  *convert.Problem
}

// newReader makes the reader of a field.
func newReader(f *File, col *Column, field *record.Field) *reader {
	r := &reader{field: field, others: col.Others, blank: newWordSet(f.Blank, col.Blank), known: map[string]reading{}, most: maxKnown}
	if col.Values != nil {
		r.words, _ = convert.NewWords(col.Values) // the check of the map refuses what contradicts itself
	}
	if field.Type == record.Day {
		r.most = maxKnownDays
		r.dates, r.proven = newDates(f.Dates, col.Order)
	}
	r.convert = r.conversion(f, col)
	return r
}

// read gives the canonical text of a cell.
func (r *reader) read(c grid.Cell) reading {
	if c.Kind != grid.Text {
		return r.work(c)
	}
	if c.Text == "" {
		return reading{}
	}
	if known, ok := r.known[c.Text]; ok {
		return known
	}
	if len(c.Text) > maxKnownText || len(r.known) == r.most {
		return r.work(c)
	}
	c.Text = strings.Clone(c.Text)
	out := r.work(c)
	r.known[c.Text] = out
	return out
}

// work reads a cell that has not been seen before.
func (r *reader) work(c grid.Cell) reading {
	if r.nothing(c) {
		return reading{}
	}
	if r.words != nil && r.field.Type != record.Words {
		text, found, p := r.find(c)
		if found || p != nil {
			return reading{text: text, wrong: p}
		}
	}
	text, masked, p := r.convert(c)
	return reading{text, masked, p}
}

// nothing says whether a cell holds nothing, or one of the words for that.
func (r *reader) nothing(c grid.Cell) bool {
	if c.Kind == grid.Uncomputed {
		return false
	}
	return strings.TrimSpace(c.Text) == "" || r.blank.has(c.Text)
}

// find looks a cell up in the table of values. What the table does not have may still be converted.
func (r *reader) find(c grid.Cell) (text string, found bool, p *convert.Problem) {
	if text, ok := r.words.Find(c); ok {
		return text, true, nil
	}
	switch {
	case r.others == "blank" && c.Kind != grid.Broken && c.Kind != grid.Uncomputed:
		return "", true, nil
	case r.others == "keep" || c.Kind == grid.Broken || c.Kind == grid.Uncomputed:
		return "", false, nil
	}
	return "", false, r.unlisted()
}

func (r *reader) unlisted() *convert.Problem {
	return &convert.Problem{Why: "the map does not say what the cell means", Remedy: "List it under values of " + r.field.Name + " in the map, or under blank if it says that nothing is known"}
}
