package convert

import (
	"fmt"
	"strings"

	"hearduty/internal/grid"
)

// Evidence gathers what the dates of a column say about their order. It keeps counts only, whatever the length of
// the column. Dates with the year first in four digits, with the name of a month or of an era, and dates of a
// workbook say nothing about the order, and neither do cells that are no date in any order.
type Evidence struct {
	dates    int    // dates whose order matters
	two      int    // of them, those with a year of two digits
	count    [3]int // of them, those possible in each of readings
	excluded [3]int // line of the first date that is not possible in each of readings
	seen     [3]bool
}

// Add looks at a cell of the column.
func (e *Evidence) Add(c grid.Cell, line int) {
	if c.Kind != grid.Text && c.Kind != grid.Number || isDay(c.Text) {
		return
	}
	w, ok := ordered(plain(c.Text))
	if !ok {
		return
	}
	var possible [3]bool
	some := false
	for i, r := range readings {
		possible[i] = w.possible(r)
		some = some || possible[i]
	}
	if !some {
		return
	}
	e.dates++
	if w.width[0] <= 2 && w.width[2] <= 2 {
		e.two++
	}
	for i, p := range possible {
		switch {
		case p:
			e.count[i]++
		case !e.seen[i]:
			e.seen[i], e.excluded[i] = true, line
		}
	}
}

// ordered gives the parts of a date whose order matters.
func ordered(s string) (written, bool) {
	if len(s) == 8 && onlyDigits(s) {
		forms := compactForms(s)
		return forms[0], !forms[1].possible(readings[2]) || isPresent(forms[0].value[2]) && !isPresent(forms[1].value[0])
	}
	if leadingDigits(s) == 0 || leadingDigits(s) > 2 || strings.ContainsAny(s, "年년") {
		return written{}, false
	}
	w, p := scanDate(s)
	return w, p == nil && w.name < 0 && (w.rest == "" || strings.ContainsRune(" ,Tt", rune(w.rest[0])))
}

// Needed says whether the column has dates that cannot be read without knowing the order.
func (e *Evidence) Needed() bool { return e.dates > 0 }

// Count gives how many of the dates whose order matters can be read in the order, and how many there are.
func (e *Evidence) Count(o Order) (possible, dates int) {
	for i, r := range readings {
		if r.order == o {
			possible = e.count[i]
		}
	}
	return possible, e.dates
}

// TwoDigits says whether dates whose order matters have a year of two digits.
func (e *Evidence) TwoDigits() bool { return e.two > 0 }

// Settled gives the only order in which all dates can be read, and the line that settled it. It returns
// false if several orders are possible, or none; then why says so in a sentence.
func (e *Evidence) Settled() (o Order, line int, why string, ok bool) {
	var left, lost []int
	for i := range readings {
		if e.count[i] == e.dates {
			left = append(left, i)
		} else if e.count[i] > 0 {
			lost = append(lost, i)
		}
	}
	switch {
	case e.dates == 0:
		return "", 0, "the column has no date that tells the order of day, month and year", false
	case len(left) == 0:
		return "", 0, e.mixed(lost), false
	case len(left) == 1:
		for i, at := range e.excluded {
			if i != left[0] {
				line = max(line, at)
			}
		}
		return readings[left[0]].order, line, "", true
	}
	names := make([]string, len(left))
	for i, l := range left {
		names[i] = words(readings[l].order)
	}
	return "", 0, "all dates of the column can be read as " + strings.Join(names, " and as "), false
}

// mixed says that no order reads all dates, with a line that each order cannot read.
func (e *Evidence) mixed(orders []int) string {
	var b strings.Builder
	b.WriteString("the dates of the column stand in different orders: ")
	for i, o := range orders {
		switch {
		case i == 0:
			fmt.Fprintf(&b, "line %d is no date as %s", e.excluded[o], words(readings[o].order))
		default:
			fmt.Fprintf(&b, ", line %d none as %s", e.excluded[o], words(readings[o].order))
		}
	}
	return b.String()
}
