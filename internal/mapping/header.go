package mapping

import (
	"slices"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// header is what names the columns of a table.
type header struct {
	first, last int // its lines; 0 if there is none, or if it is made of the keys of objects
	columns     []heading
	texts       [][]string // cells of its rows, without blanks around them
	known       bool       // the map names columns of it, so that it is certain that its cells are names and no data
}

// heading is the name of one column. With two header rows it can be called in several ways.
type heading struct {
	name   string
	folded string
	joined string   // folded, without blanks
	others []string // folded
}

func newHeading(name string, others ...string) heading {
	h := heading{name: name, folded: convert.Fold(name)}
	h.joined = joined(h.folded)
	for _, other := range others {
		h.others = append(h.others, convert.Fold(other))
	}
	return h
}

// newHeader makes a header of one or two rows.
func newHeader(rows []grid.Row, merged []grid.Range) *header {
	h := &header{first: rows[0].Line, last: rows[len(rows)-1].Last}
	for i := range rows {
		var texts []string
		for _, c := range rows[i].Cells {
			texts = append(texts, strings.TrimSpace(c.Text))
		}
		h.texts = append(h.texts, withoutEnd(texts))
	}
	if len(rows) == 1 {
		for _, t := range h.texts[0] {
			h.columns = append(h.columns, newHeading(t))
		}
		return h
	}
	h.join(rows[0].Line, merged)
	return h
}

// withoutEnd cuts off the blank texts at the end.
func withoutEnd(texts []string) []string {
	for len(texts) > 0 && texts[len(texts)-1] == "" {
		texts = texts[:len(texts)-1]
	}
	return texts
}

// join names the columns by the texts of two rows. A blank cell above goes on from its left; where the sheet has
// merged cells in that row, only as far as they reach.
func (h *header) join(line int, merged []grid.Range) {
	above, below := h.texts[0], h.texts[1]
	var ranges []grid.Range
	for _, m := range merged {
		if m.FirstRow <= line && line <= m.LastRow {
			ranges = append(ranges, m)
		}
	}
	left := ""
	for i := range max(len(above), len(below)) {
		own, low := at(above, i), at(below, i)
		if own != "" {
			left = own
		}
		group := left
		if own == "" && ranges != nil {
			group = ""
			for _, m := range ranges {
				if m.FirstCol <= i+1 && i+1 <= m.LastCol {
					group = at(above, m.FirstCol-1)
				}
			}
		}
		if low == "" {
			h.columns = append(h.columns, newHeading(own))
			continue
		}
		h.columns = append(h.columns, newHeading(strings.TrimSpace(group+" "+low), strings.TrimSpace(left+" "+low), low))
	}
}

func at(texts []string, i int) string {
	if i < len(texts) {
		return texts[i]
	}
	return ""
}

// has says whether the line is one of the header's.
func (h *header) has(line int) bool { return h.first <= line && line <= h.last && h.last > 0 }

// repeated says whether a row is one of the header's rows once more, as on each page of a printed list.
func (h *header) repeated(row *grid.Row) bool {
	for _, texts := range h.texts {
		if sameTexts(texts, row) {
			return true
		}
	}
	return false
}

func sameTexts(texts []string, row *grid.Row) bool {
	if len(texts) == 0 || len(row.Cells) < len(texts) {
		return false
	}
	for i, c := range row.Cells {
		text := ""
		if i < len(texts) {
			text = texts[i]
		}
		if c.Text != text && strings.TrimSpace(c.Text) != text {
			return false
		}
	}
	return true
}

// joined takes the blanks out of a folded name, except between digits: TEST DATE is TestDate, but R 1 500 is not R 1500.
func joined(folded string) string {
	var b strings.Builder
	for i := range len(folded) {
		if folded[i] != ' ' || i > 0 && i < len(folded)-1 && isDigit(folded[i-1]) && isDigit(folded[i+1]) {
			b.WriteByte(folded[i])
		}
	}
	return b.String()
}

func isDigit(c byte) bool { return c >= '0' && c <= '9' }

// find gives the indexes of the columns that have the name: those that have it letter by letter, else those
// that have it by convert.Fold, else those that have it without blanks, else those that can be called so.
func (h *header) find(name string) []int {
	name = strings.TrimSpace(name)
	folded := convert.Fold(name)
	together := joined(folded)
	var exact, alike, glued, called []int
	for i, c := range h.columns {
		if c.name == "" {
			continue
		}
		switch {
		case c.name == name:
			exact = append(exact, i)
		case c.folded == folded:
			alike = append(alike, i)
		case c.joined == together:
			glued = append(glued, i)
		case slices.Contains(c.others, folded):
			called = append(called, i)
		}
	}
	switch {
	case exact != nil:
		return exact
	case alike != nil:
		return alike
	case glued != nil:
		return glued
	}
	return called
}

// names lists the names of the columns.
func (h *header) names() []string {
	var out []string
	for _, c := range h.columns {
		if c.name != "" {
			out = append(out, c.name)
		}
	}
	return out
}

// name gives the name of a column, from 1, if it is certain that it is one.
func (h *header) name(column int) string {
	if column < 1 || column > len(h.columns) || !h.known {
		return ""
	}
	return h.columns[column-1].name
}
