// Package convert turns the cells of exports into the canonical texts that records are read from: dates,
// numbers, durations, thresholds, ids and words. It guesses nothing: what can be read in two ways is refused.
package convert

import (
	"time"

	"hearduty/internal/grid"
)

// Problem says why a cell cannot be converted.
type Problem struct{ Why, Remedy string } // each one sentence without its full stop

// Error gives the problem as a sentence.
func (p *Problem) Error() string { return p.Why }

// Order is the order of the parts of a date.
type Order string

// The orders. The zero Order is not known.
const (
	DayMonthYear Order = "day_month_year"
	MonthDayYear Order = "month_day_year"
	YearMonthDay Order = "year_month_day"
)

// Dates reads dates. What is zero is not known.
type Dates struct {
	Order    Order
	Latest   int            // latest year that two digits can mean; 0 if they are refused
	Buddhist bool           // years count from 543 BC
	Serial   int            // 1900 or 1904: plain numbers are days of a spreadsheet; 0 if they are refused
	Zone     *time.Location // zone in which the day is taken where a time has a zone; nil if that is refused
	Written  bool           // where a time has a zone, the day is taken as it is written
}

// Read gives the date as YYYY-MM-DD.
func (d *Dates) Read(c grid.Cell) (string, *Problem) { return "", nil }

// Evidence gathers what the dates of a column say about their order.
type Evidence struct{}

// Add looks at a cell of the column.
func (e *Evidence) Add(c grid.Cell, line int) {}

// Settled gives the only order in which all dates can be read, and the line that settled it. It returns
// false if several orders are possible, or none; then why says so in a sentence.
func (e *Evidence) Settled() (o Order, line int, why string, ok bool) { return "", 0, "", false }

// Numbers reads numbers.
type Numbers struct {
	Decimal   byte // '.' or ','; 0 for a point
	Thousands rune // 0 for none
}

// Read gives the number with a decimal point. A percent sign or a unit behind it is a problem, unless it is
// one of the units named, which are taken away.
func (n *Numbers) Read(c grid.Cell, units ...string) (string, *Problem) { return "", nil }

// Minutes reads a duration in the unit minutes, hours, clock (h:mm, h:mm:ss, 7h45) or day_fraction and gives
// minutes. A cell that a workbook formats as time is read as one in every unit but is a problem if the unit contradicts it.
func (n *Numbers) Minutes(c grid.Cell, unit string) (string, *Problem) { return "", nil }

// Percent reads a share in the unit percent or fraction and gives percent.
func (n *Numbers) Percent(c grid.Cell, unit string) (string, *Problem) { return "", nil }

// Hertz reads a frequency in the unit hz or khz (also with that unit behind it) and gives Hz.
func (n *Numbers) Hertz(c grid.Cell, unit string) (string, *Problem) { return "", nil }

// Thresholds reads hearing threshold levels.
type Thresholds struct {
	Numbers   *Numbers
	NoWords   []string                     // say no response
	NoMarks   []string                     // stand before or behind the highest level presented
	Limit     func(hz int) (float64, bool) // highest level presented where the cell does not say it; may be nil
	NotTested []string
	Masked    []string // signs behind a masked threshold, or pairs around it such as []
}

// Read gives the threshold as audiometry.ParseThreshold reads it, and whether the cell says that it was masked.
func (t *Thresholds) Read(c grid.Cell, hz int) (text string, masked bool, p *Problem) {
	return "", false, nil
}

// ID reads an id: blanks and no-break spaces around it, and full-width characters, are made plain. Numbers of
// a workbook in scientific notation or with a fraction, such as 1.23E+05, are problems.
type ID struct {
	Pad    int
	Strip  []string
	Prefix string
	Case   string // upper, lower or empty
}

// Read gives the id.
func (i *ID) Read(c grid.Cell) (string, *Problem) { return "", nil }

// Fold gives a text in the form in which headers and words are compared: NFKC, lower case, without accents, with
// one blank for each run of blanks and signs, and none at the ends. 0.5k and 0.5 kHz stay distinct from 5k.
func Fold(s string) string { return s }

// Words finds what a cell means in a table of values, by Fold.
type Words struct{}

// NewWords makes the table. Keys that are the same by Fold and mean different things are a problem.
func NewWords(values map[string]string) (*Words, *Problem) { return &Words{}, nil }

// Find gives the meaning of a cell. It returns false if the table does not have it.
func (w *Words) Find(c grid.Cell) (string, bool) { return "", false }
