package draft

import (
	"maps"
	"slices"
	"strings"

	"hearduty/internal/grid"
)

// Bounds of what a profile keeps of a column.
const (
	maxDistinct = 64  // different values
	maxValue    = 40  // bytes of a value that may be shown
	maxOdd      = 5   // rows named
	shownValues = 12  // different values of a small closed set
	mostly      = 0.9 // share of the cells from which on a column is taken to hold something
)

// value is one of the different values of a column.
type value struct {
	text  string // as it is written first
	rows  int
	first int // row
}

// profile is what the cells of a column are like. It holds cells only of columns that have few different ones.
type profile struct {
	filled   int // without words that say that nothing is known
	values   map[string]*value
	many     bool // more different values than are kept
	nothing  map[string]*value
	sentinel map[string]*value

	shapes  [serialDay + 1]int
	short   int // dates with a year of two digits
	zone    int // dates with a time and a zone
	late    int // dates with a year past 2400
	clocks  int
	fixed   int // times by the workbook itself
	numbers int
	min     float64
	max     float64
	comma   int
	point   int
	open    int
	percent int
	groups  map[byte]int
	fine    int // numbers between 0 and 1
	tones   int // numbers that are frequencies

	digits  int // cells of digits only
	zeros   int // of these, with a leading zero
	shorter int // least and greatest number of digits
	longer  int
	science int // numbers in scientific notation
	names   int // texts of several words without a digit

	broken, uncomputed int
	firstBroken        int
}

func newProfile() *profile {
	return &profile{values: map[string]*value{}, nothing: map[string]*value{}, sentinel: map[string]*value{}, groups: map[byte]int{}}
}

// add looks at one cell.
func (p *profile) add(c grid.Cell, line int) {
	text := strings.TrimSpace(c.Text)
	if c.Kind == grid.Broken || c.Kind == grid.Uncomputed {
		if p.broken+p.uncomputed == 0 {
			p.firstBroken = line
		}
		if c.Kind == grid.Broken {
			p.broken++
		} else {
			p.uncomputed++
		}
		return
	}
	if text == "" {
		return
	}
	if known.codes["blank"][plain(text)] {
		count(p.nothing, plain(text), text, line)
		return
	}
	if sentinel(text) {
		count(p.sentinel, text, text, line)
		return
	}
	p.filled++
	if !p.many {
		count(p.values, plain(text), text, line)
		if len(p.values) > maxDistinct {
			p.many, p.values = true, nil
		}
	}
	p.date(c, text)
	p.number(c, text)
	p.id(c, text)
}

func count(in map[string]*value, key, text string, line int) {
	if v := in[key]; v != nil {
		v.rows++
		return
	}
	if len(in) <= maxDistinct {
		in[key] = &value{text: text, rows: 1, first: line}
	}
}

func (p *profile) date(c grid.Cell, text string) {
	shape, short, year := shapeOf(c)
	p.shapes[shape]++
	if short {
		p.short++
	}
	if shape != noDate && shape != serialDay && zoneForm.MatchString(text) {
		p.zone++
	}
	if year > 2400 && year < 2700 {
		p.late++
	}
}

func (p *profile) number(c grid.Cell, text string) {
	switch {
	case c.Kind == grid.Clock:
		p.fixed++
		return
	case clockForm.MatchString(text):
		p.clocks++
		return
	}
	n, ok := readNumber(c)
	if !ok {
		return
	}
	if p.numbers == 0 || n.value < p.min {
		p.min = n.value
	}
	if p.numbers == 0 || n.value > p.max {
		p.max = n.value
	}
	p.numbers++
	p.comma += bit(n.comma)
	p.point += bit(n.point)
	p.open += bit(n.open)
	p.percent += bit(n.percent)
	p.fine += bit(n.value > 0 && n.value < 1)
	p.tones += bit(common(int(n.value)) || n.value <= 20 && common(int(n.value*1000+0.5)))
	if n.groups != 0 {
		p.groups[n.groups]++
	}
}

func (p *profile) id(c grid.Cell, text string) {
	if c.Kind == grid.Text && looksLikeName(text) {
		p.names++
	}
	if onlyDigits(text) {
		p.zeros += bit(text[0] == '0' && len(text) > 1)
		if p.digits == 0 || len(text) < p.shorter {
			p.shorter = len(text)
		}
		p.longer = max(p.longer, len(text))
		p.digits++
	} else if c.Kind != grid.Day && strings.ContainsAny(text, "eE") {
		mantissa, exponent, _ := strings.Cut(strings.ToLower(text), "e")
		if onlyDigits(strings.Replace(mantissa, ".", "", 1)) && onlyDigits(strings.TrimLeft(exponent, "+-")) {
			p.science++
		}
	}
}

// looksLikeName says whether a text may be the name of a person: words with letters only.
func looksLikeName(text string) bool {
	words := strings.FieldsFunc(text, func(r rune) bool { return r == ' ' || r == ',' || r == '\u00a0' })
	return len(words) > 1 && !strings.ContainsAny(text, "0123456789_/")
}

func bit(b bool) int {
	if b {
		return 1
	}
	return 0
}

// most says whether n is nearly all of the cells.
func (p *profile) most(n int) bool { return p.filled > 0 && float64(n) >= mostly*float64(p.filled) }

// dates counts the cells that are dates whatever the column is, so without plain numbers.
func (p *profile) dates() int {
	return p.shapes[dayCell] + p.shapes[yearFirst] + p.shapes[partsOpen] + p.shapes[withWords]
}

// asDates counts the cells that are dates if the column is known to hold dates.
func (p *profile) asDates() int { return p.dates() + p.shapes[eightDigit] + p.shapes[serialDay] }

// textDates counts the dates that are written as text.
func (p *profile) textDates() int { return p.asDates() - p.shapes[dayCell] - p.shapes[serialDay] }

// list gives the different values by number of rows and text, or nil if there are too many.
func (p *profile) list() []*value {
	if p.many || len(p.values) > shownValues {
		return nil
	}
	return sorted(p.values)
}

func sorted(m map[string]*value) []*value {
	out := slices.Collect(maps.Values(m))
	slices.SortFunc(out, func(a, b *value) int {
		if a.rows != b.rows {
			return b.rows - a.rows
		}
		return strings.Compare(a.text, b.text)
	})
	return out
}

// distinct says how many different values there are.
func (p *profile) distinct() int { return len(p.values) }
