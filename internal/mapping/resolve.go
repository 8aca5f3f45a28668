package mapping

import (
	"fmt"
	"strconv"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// near gives the candidate that is spelled most like one of the names, or an empty text.
func near(names, candidates []string) string {
	for _, name := range names {
		if n := diag.Near(name, candidates); n != "" {
			return n
		}
	}
	return ""
}

// resolve finds the column of each reference. Of a list of objects, a key may be missing in all of them.
func (p *plan) resolve(h *header, objects bool) (absent []*reference, err error) {
	var lost []*reference
	h.known = objects || len(p.named()) > 0
	for _, r := range p.references {
		if len(r.names) == 0 {
			if r.position > len(h.columns) && len(h.columns) > 0 {
				return nil, &grid.Fault{Line: h.first, Column: r.position, Problem: fmt.Sprintf("the map takes %s from column %d, but the header ends with column %d", r.field, r.position, len(h.columns)), Remedy: "Correct position in the map"}
			}
			continue
		}
		if err := r.find(h); err != nil {
			return nil, err
		}
		if r.at >= 0 {
			continue
		}
		if objects && !r.needed {
			absent = append(absent, r)
		} else {
			lost = append(lost, r)
		}
	}
	if lost != nil {
		return nil, lacking(h, lost, p.free(h))
	}
	return absent, nil
}

// free lists the names of the columns that nothing takes.
func (p *plan) free(h *header) []string {
	taken := map[int]bool{}
	for _, r := range p.references {
		taken[r.at] = true
	}
	var out []string
	for i, c := range h.columns {
		if c.name != "" && !taken[i] {
			out = append(out, c.name)
		}
	}
	return out
}

// find finds the column of a reference in the header.
func (r *reference) find(h *header) error {
	r.at = -1
	by := ""
	for _, name := range r.names {
		found := h.find(name)
		switch {
		case len(found) > 1:
			return &grid.Fault{Line: h.first, Column: found[1] + 1,
				Problem: fmt.Sprintf("the columns %d and %d are both named %s, which the map uses for %s", found[0]+1, found[1]+1, quoted(h.name(found[0]+1)), r.field),
				Remedy:  "Name the one that is meant by position in the map"}
		case len(found) == 1 && r.at >= 0 && r.at != found[0]:
			return &grid.Fault{Line: h.first, Column: found[0] + 1,
				Problem: fmt.Sprintf("the map takes %s from %s or %s, and the file has both columns", r.field, quoted(by), quoted(name)),
				Remedy:  "Keep the one that is meant in the map, and list the other under ignore"}
		case len(found) == 1:
			r.at, by = found[0], name
		}
	}
	return nil
}

func quoted(name string) string { return strconv.Quote(record.Shorten(name)) }

// shownMost is the number of columns that a message lists.
const shownMost = 12

// lacking says which columns the header lacks, and which of the free ones are spelled like them.
func lacking(h *header, lost []*reference, free []string) error {
	var missing, hints []string
	for _, r := range lost {
		var names []string
		for _, n := range r.names {
			names = append(names, quoted(n))
		}
		missing = append(missing, strings.Join(names, " or "))
		if n := near(r.names, free); n != "" {
			hints = append(hints, "near to "+quoted(r.names[0])+" is "+quoted(n))
		}
	}
	word, them := "the columns", "them"
	if len(missing) == 1 {
		word, them = "the column", "it"
	}
	remedy := "Correct " + them + " in the map, or remove the fields if the export has no such column"
	if hints != nil {
		remedy += "; " + listed(hints)
	}
	where := "the header"
	if h.first > 0 {
		where = fmt.Sprintf("the header in row %d", h.first)
	}
	return &grid.Fault{Line: h.first, Problem: fmt.Sprintf("%s lacks %s %s, which the map names", where, word, listed(missing)), Remedy: remedy}
}

// listed joins what a message lists, and leaves out what would be too much.
func listed(items []string) string {
	if len(items) > shownMost {
		return strings.Join(items[:shownMost], ", ") + fmt.Sprintf(" and %d more", len(items)-shownMost)
	}
	return strings.Join(items, ", ")
}
