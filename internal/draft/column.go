package draft

import (
	"fmt"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// certainty says how sure a proposal is.
type certainty uint8

// The certainties.
const (
	unsure  certainty = iota // written as a comment; somebody must decide
	likely                   // written; somebody should look
	certain                  // the name or the values say so
)

func (c certainty) String() string { return [...]string{"unsure", "likely", "certain"}[c] }

// column is one column of the export and what is proposed for it.
type column struct {
	index  int    // from 1; 0 for a line above the header
	name   string // empty if it may not be shown
	double bool   // another column has the same name, so the place must tell them apart
	p      *profile
	tone   *tone  // what its name says if it holds thresholds
	part   string // baseline, current or previous where a row holds several tests
	rest   string // name without the word for the part

	field  string // field proposed, or empty
	sure   certainty
	why    string
	notes  []string // further remarks
	extras []string // lines of the map beside the column
	off    bool     // the proposal is written as a comment
	ignore string   // why the column is not wanted
	dated  bool     // its dates are gathered for evidence
	dates  convert.Evidence
}

// shown names the column in a comment.
func (c *column) shown() string {
	if c.name == "" {
		return fmt.Sprintf("column %d", c.index)
	}
	if c.double {
		return fmt.Sprintf("%q (column %d)", record.Shorten(clean(c.name)), c.index)
	}
	return fmt.Sprintf("%q", record.Shorten(clean(c.name)))
}

// analysis is all that was found out about an export.
type analysis struct {
	shown     string
	o         Options
	open      grid.Options
	file      *grid.File
	s         *sample
	h         head
	columns   []*column
	data      []*grid.Row // rows of the sample that are data
	odd       oddRows
	total     int // rows of data in the file
	kind      record.Kind
	kindSure  certainty
	kindWhy   string
	table     *record.Table
	guessed   bool // the code page was found by trying
	ear       *column
	frequency *column
	level     *column
	earValues [2][]string         // words for the left and right ear
	parts     []string            // tests of one row, in order
	made      map[string][]string // lines of fields that come from no column
	questions []string
}

// ask adds a question that somebody must answer and gives its number.
func (a *analysis) ask(format string, args ...any) int {
	text := fmt.Sprintf(format, args...)
	for i, q := range a.questions {
		if q == text {
			return i + 1
		}
	}
	a.questions = append(a.questions, text)
	return len(a.questions)
}

// layOut makes the columns and looks at the cells of the sample.
func (a *analysis) layOut() {
	width := len(a.h.names)
	for _, r := range a.data {
		width = max(width, len(r.Cells))
	}
	seen := map[string]*column{}
	for i := range width {
		c := &column{index: i + 1, p: newProfile()}
		if i < len(a.h.names) {
			c.name = a.h.names[i]
		}
		c.rest = c.name
		if key := convert.Fold(c.name); c.name != "" {
			if other := seen[key]; other != nil {
				c.double, other.double = true, true
			}
			seen[key] = c
		}
		a.columns = append(a.columns, c)
	}
	for _, r := range a.data {
		for i, c := range r.Cells {
			a.columns[i].p.add(c, r.Line)
		}
	}
}

// of gives the column proposed for a field, or nil.
func (a *analysis) of(field string) *column {
	for _, c := range a.columns {
		if c.field == field && !c.off {
			return c
		}
	}
	return nil
}
