package mapping

import (
	"errors"
	"fmt"
	"io"
	"slices"

	"hearduty/internal/convert"
	"hearduty/internal/diag"
	"hearduty/internal/grid"
)

// proves says whether the order of the dates of a column is still to be settled.
func (p *plan) proves() bool {
	for _, recipe := range p.recipes {
		if slices.ContainsFunc(recipe.rules, (*rule).proves) {
			return true
		}
	}
	return false
}

func (r *rule) proves() bool {
	return r.reader != nil && r.reader.proven && r.from != nil && r.from.at >= 0
}

// prove reads the file for the order of its dates, column by column.
func (b *binder) prove(in *feed, head *header) error {
	columns := map[int]*convert.Evidence{}
	var rules []*rule
	for _, recipe := range b.plan.recipes {
		for _, r := range recipe.rules {
			if r.proves() {
				rules = append(rules, r)
				columns[r.from.at] = &convert.Evidence{}
			}
		}
	}
	selection := newSelection(b.plan, head)
	var row grid.Row
	for {
		err := in.Next(&row)
		if err == io.EOF {
			break
		}
		var fault *grid.Fault
		if errors.As(err, &fault) {
			break // reading the rows will come to the same place, and tell it there
		}
		if err != nil {
			return err
		}
		if isMade(&row) || selection.notData(&row) != "" || row.Fault != nil {
			continue
		}
		seen := -1
		for _, r := range rules {
			if c := r.from.of(&row); r.from.at != seen && !r.reader.nothing(c) && !r.reader.listed(c) {
				columns[r.from.at].Add(c, row.Line)
				seen = r.from.at
			}
		}
	}
	return b.settle(rules, columns, head)
}

// settle takes the orders that the dates have settled.
func (b *binder) settle(rules []*rule, columns map[int]*convert.Evidence, head *header) error {
	told := map[int]bool{}
	for _, r := range rules {
		at := r.from.at
		e := columns[at]
		if !e.Needed() {
			continue
		}
		order, line, why, ok := e.Settled()
		if !ok {
			return &grid.Fault{Line: head.first, Column: at + 1,
				Problem: fmt.Sprintf("the order of the dates in %s is not settled: %s", columnName(head, at), why),
				Remedy:  "State order under dates in the map, or for this column, as whoever made the export knows it: day_month_year or month_day_year"}
		}
		r.reader.dates.Order = order
		if !told[at] {
			b.list.Warnf(diag.Position{File: b.f.Name, Line: line, Field: r.name}, "State order: "+string(order)+" in the map, so that the next export is read alike",
				"the order %s of the dates in %s is settled by row %d", order, columnName(head, at), line)
		}
		told[at] = true
	}
	return nil
}

func columnName(h *header, at int) string {
	if name := h.name(at + 1); name != "" {
		return "the column " + quoted(name)
	}
	return fmt.Sprintf("column %d", at+1)
}

// listed says whether a table of values gives the cell a meaning.
func (r *reader) listed(c grid.Cell) bool {
	if r.words == nil {
		return false
	}
	_, ok := r.words.Find(c)
	return ok
}

// isMade says whether a row is the header that the reader of objects made of their keys.
func isMade(row *grid.Row) bool { return row.Line == 0 }
