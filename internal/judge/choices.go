package judge

import (
	"fmt"
	"maps"
	"slices"

	"hearduty/internal/bundle"
	"hearduty/internal/diag"
	"hearduty/internal/program"
)

// checkChoices refuses choices of a site that none of its bundles knows, and values that a bundle does not
// allow: a slip of the pen would otherwise leave the default in force without a word.
func (c *check) checkChoices() diag.List {
	var problems diag.List
	for _, s := range c.sites {
		for _, name := range slices.Sorted(maps.Keys(s.Choices)) {
			c.checkChoice(s, name, &problems)
		}
	}
	return problems
}

func (c *check) checkChoice(s *program.Site, name string, problems *diag.List) {
	var known []string
	var found []bundle.Choice
	for _, id := range append(slices.Clone(s.Bundles), c.bundlesOf(s)...) {
		b := c.Library[id]
		if b == nil {
			continue
		}
		known = append(known, slices.Sorted(maps.Keys(b.Choices))...)
		if choice, ok := b.Choices[name]; ok {
			found = append(found, choice)
		}
	}
	at := s.ChoicesAt[name]
	if len(found) == 0 {
		remedy := "Remove it; the bundles leave no choice of this name"
		if near := diag.Near(name, known); near != "" {
			remedy = fmt.Sprintf("Write %s if that is meant", near)
		}
		problems.Errorf(at, remedy, "the site %s makes the choice %q, which none of its bundles has", s.ID, name)
		return
	}
	value := s.Choices[name]
	for _, choice := range found {
		if !slices.Contains(choice.Values, value) {
			problems.Errorf(at, fmt.Sprintf("Write one of %v", choice.Values), "the site %s makes the choice %s: %v, which is not allowed", s.ID, name, value)
			return
		}
	}
}
