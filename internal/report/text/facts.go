package text

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// choices writes what a site has elected, as it stands in the program file.
func choices(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		parts = append(parts, fmt.Sprintf("%s = %v", key, m[key]))
	}
	return strings.Join(parts, ", ")
}

// fromMemory lists the parameters that decide a listed finding and were not read in the law.
func fromMemory(p *page, r *finding.Report) {
	type used struct {
		finding.ParameterFact
		findings int
	}
	found := map[string]*used{}
	for i := range r.Findings {
		f := &r.Findings[i]
		for name, fact := range f.Facts {
			v, ok := finding.AsParameter(fact)
			if !ok || v.Seen != "memory" {
				continue
			}
			key := f.Bundle + "\x00" + name + "\x00" + v.String() + "\x00" + v.Cite
			if found[key] == nil {
				found[key] = &used{ParameterFact: v}
			}
			found[key].findings++
		}
	}
	if len(found) == 0 {
		return
	}
	p.heading(yellow, "Not checked against the official text")
	p.para(0, 0, "These numbers were written from memory, and findings rest on them. Read the paragraph before you rely on one.")
	for _, key := range slices.Sorted(maps.Keys(found)) {
		u, name := found[key], strings.Split(key, "\x00")[1]
		p.item(0, "- ", fmt.Sprintf("%s = %s, %s (%s)", name, u.ParameterFact, u.Cite, count(u.findings, "listed finding", "listed findings")))
	}
}
