package draft

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/record"
)

// idFields hold ids of people.
var idFields = []string{"worker_id", "tester_id", "reviewer", "by", "fitted_by", "supervisor"}

// checkNames keeps names of people out of fields that want ids.
func (a *analysis) checkNames(c *column) {
	if !slices.Contains(idFields, c.field) || !c.p.most(c.p.names) {
		return
	}
	n := a.ask("Does %s hold names of people? The field %s wants an id, and names are not needed", c.shown(), c.field)
	c.off, c.sure = true, unsure
	c.why += fmt.Sprintf(", but its cells look like names: question %d", n)
}

// checkType lowers the certainty if the cells do not look like what the field holds.
func (a *analysis) checkType(c *column) {
	f := a.table.Fields[a.table.Index(c.field)]
	n, what := c.p.filled, ""
	switch f.Type {
	case record.Day:
		n, what = c.p.asDates(), "dates"
	case record.Decimal:
		n, what = c.p.numbers+c.p.clocks+c.p.fixed, "numbers"
	}
	if c.p.broken+c.p.uncomputed > 0 {
		c.notes = append(c.notes, fmt.Sprintf("%s with an error or a formula without its value, the first in row %d", several(c.p.broken+c.p.uncomputed, "cell"), c.p.firstBroken))
	}
	switch {
	case c.p.filled == 0:
		c.notes = append(c.notes, "no cell is filled")
	case what == "":
		c.notes = append(c.notes, fmt.Sprintf("filled in %s", rowCount(c.p.filled)))
	case n == 1 && c.p.filled == 1:
		c.notes = append(c.notes, "its only value is a "+strings.TrimSuffix(what, "s"))
	case n == c.p.filled:
		c.notes = append(c.notes, fmt.Sprintf("all %d values are %s", n, what))
	case 2*n >= c.p.filled:
		c.sure = min(c.sure, likely)
		c.notes = append(c.notes, fmt.Sprintf("%d of %d values are %s", n, c.p.filled, what))
	default:
		q := a.ask("Is %s the field %s? Only %d of %d values are %s", c.shown(), c.field, n, c.p.filled, what)
		c.sure, c.off = unsure, true
		c.notes = append(c.notes, fmt.Sprintf("question %d", q))
	}
}
