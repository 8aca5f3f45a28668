package mapping

import (
	"fmt"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// pair is a key with its value in a line above the header.
type pair struct {
	key    string
	folded string
	cell   grid.Cell
	line   int
	column int // of the value, from 1
}

// pairsAbove reads the lines above the header. In a line, keys and values take turns, or a colon stands between the
// key and the value in the first filled cell.
func pairsAbove(rows []grid.Row, h *header) []pair {
	var out []pair
	add := func(key string, c grid.Cell, line, column int) {
		key = strings.TrimSpace(strings.TrimSuffix(strings.TrimSpace(key), ":"))
		if key != "" {
			out = append(out, pair{key, convert.Fold(key), c, line, column})
		}
	}
	for i := range rows {
		row := &rows[i]
		if row.Line >= h.first || row.Fault != nil || row.NotData != "" {
			continue
		}
		var filled []int
		for j, c := range row.Cells {
			if strings.TrimSpace(c.Text) != "" || c.Kind == grid.Uncomputed {
				filled = append(filled, j)
			}
		}
		if len(filled) == 0 {
			continue
		}
		first := row.Cells[filled[0]]
		if key, value, ok := strings.Cut(first.Text, ":"); ok && strings.TrimSpace(value) != "" && first.Kind == grid.Text {
			add(key, grid.Cell{Text: strings.TrimSpace(value)}, row.Line, filled[0]+1)
			continue
		}
		for ; len(filled) >= 2; filled = filled[2:] {
			add(row.Cells[filled[0]].Text, row.Cells[filled[1]], row.Line, filled[1]+1)
			if len(filled)%2 == 1 {
				break
			}
		}
	}
	return out
}

// takeAbove gives the fields that come from lines above the header their values.
func (p *plan) takeAbove(pairs []pair) error {
	for _, recipe := range p.recipes {
		for _, r := range recipe.rules {
			if r.above == "" {
				continue
			}
			found, err := findPair(pairs, r)
			if err != nil {
				return err
			}
			if r.reader.proven && !r.reader.nothing(found.cell) {
				var e convert.Evidence
				e.Add(found.cell, found.line)
				if order, _, why, ok := e.Settled(); e.Needed() && !ok {
					return &grid.Fault{Line: found.line, Column: found.column, Problem: fmt.Sprintf("the order of the date above the header for %s is not settled: %s", r.name, why), Remedy: "State order for this field in the map"}
				} else if ok {
					r.reader.dates.Order = order
				}
			}
			got := r.reader.read(found.cell)
			if got.wrong != nil {
				return &grid.Fault{Line: found.line, Column: found.column, Problem: fmt.Sprintf("the value above the header for %s cannot be read: %s", r.name, got.wrong.Why), Remedy: got.wrong.Remedy}
			}
			r.fixed = &Value{Field: r.field, Text: got.text}
		}
	}
	return nil
}

// findPair finds the key of a field. Several lines with the key must have the same value.
func findPair(pairs []pair, r *rule) (pair, error) {
	var found pair
	var keys []string
	folded := convert.Fold(r.above)
	for _, p := range pairs {
		keys = append(keys, p.key)
		switch {
		case p.folded != folded:
		case found.line == 0:
			found = p
		case found.cell != p.cell:
			return p, &grid.Fault{Line: p.line, Column: p.column, Problem: fmt.Sprintf("the key %s stands above the header twice, with different values: first in row %d", quoted(r.above), found.line), Remedy: "Export the tables of the two into files of their own, or take the value as constant"}
		}
	}
	if found.line > 0 {
		return found, nil
	}
	remedy := "Correct above in the map, or check whether this is the file that the map is for"
	if n := near([]string{r.above}, keys); n != "" {
		remedy = "Write " + quoted(n) + " if that is meant"
	}
	return found, &grid.Fault{Problem: fmt.Sprintf("no line above the header has the key %s, from which the map takes %s", quoted(r.above), r.name), Remedy: remedy}
}
