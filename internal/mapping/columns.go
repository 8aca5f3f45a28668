package mapping

import (
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/diag"
)

// columns warns of columns that the map does not know, and of those that it knows and the file lacks.
func (b *binder) columns(h *header, absent []*reference) {
	at := diag.Position{File: b.f.Name, Line: h.first}
	used := map[int]bool{}
	for _, r := range b.plan.references {
		used[r.at] = true
	}
	var unused []string // ignored names that the file lacks
	for _, name := range b.m.File.Ignore {
		found := h.find(name)
		if len(found) == 0 {
			unused = append(unused, name)
		}
		for _, i := range found {
			used[i] = true
		}
	}
	var unknown []string
	for i, c := range h.columns {
		switch {
		case c.name == "" || used[i]:
		case h.known:
			unknown = append(unknown, c.name)
		default:
			unknown = append(unknown, "column "+strconv.Itoa(i+1))
		}
	}
	b.unknown(at, h.known, unknown, unused)
	if unused != nil && len(h.columns) > 0 {
		var names []string
		for _, name := range unused {
			names = append(names, b.beside(name, unknown))
		}
		b.list.Warnf(at, "Remove them from ignore in the map, or correct them", "the map ignores columns that the file lacks: %s", listed(names))
	}
	if absent != nil {
		var names []string
		for _, r := range absent {
			names = append(names, b.beside(r.names[0], unknown))
		}
		b.list.Warnf(at, "Nothing needs to be done if the export leaves out what is empty; otherwise correct the names in the map", "no object of the file has the keys %s, which the map names", listed(names))
	}
}

// unknown warns of columns that the map neither uses nor ignores.
func (b *binder) unknown(at diag.Position, known bool, unknown, unused []string) {
	if unknown == nil {
		return
	}
	if !known {
		b.list.Warnf(at, "Map them, if they are wanted", "the file has columns that the map does not use: %s", listed(unknown))
		return
	}
	open := slices.Clone(unused)
	for _, name := range b.plan.table.Names() {
		if !b.plan.maps(name) && !strings.ContainsAny(name, "0123456789") {
			open = append(open, name)
		}
	}
	var names []string
	for _, name := range unknown {
		names = append(names, b.beside(name, open))
	}
	b.list.Warnf(at, "Map them, or list them under ignore in the map", "the file has columns that the map neither uses nor ignores: %s", listed(names))
}

// beside writes a name with the one that is spelled most like it.
func (b *binder) beside(name string, others []string) string {
	folded := make([]string, len(others))
	for i, other := range others {
		folded[i] = convert.Fold(other)
	}
	if n := diag.Near(convert.Fold(name), folded); n != "" {
		return quoted(name) + " (near to " + others[slices.Index(folded, n)] + ")"
	}
	return quoted(name)
}

// maps says whether any record of a row has the field.
func (p *plan) maps(name string) bool {
	index := p.table.Index(name)
	for _, recipe := range p.recipes {
		if slices.ContainsFunc(recipe.rules, func(r *rule) bool { return r.field == index || r.right == index }) {
			return true
		}
	}
	return false
}
