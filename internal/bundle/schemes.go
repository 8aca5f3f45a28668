package bundle

import (
	"fmt"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
)

// checkSchemes checks the schemes by which hearing tests are judged: each can be judged and names its
// parameter, and the others have names of their own.
func checkSchemes(m *dossier.HearingMeasures) []string {
	var out []string
	check := func(name string, s *audiometry.Scheme) {
		if err := s.Check(); err != nil {
			out = append(out, fmt.Sprintf("%s: %v", name, err))
		}
		if s.Parameter() == "" {
			out = append(out, fmt.Sprintf("%s needs either at_least or above", name))
		}
	}
	if m.Shift.Rule != "" {
		check("hearing.shift", &m.Shift.Scheme)
	}
	if m.Shift.Of != "" && m.Shift.Of != audiometry.OfChange {
		out = append(out, "hearing.shift is of a "+m.Shift.Of+", but a shift is a change")
	}
	seen := map[string]bool{}
	for i := range m.Others {
		s := &m.Others[i]
		name := "hearing.others." + s.Name
		check(name, s)
		switch {
		case s.Name == "":
			out = append(out, fmt.Sprintf("scheme %d of hearing.others has no name", i+1))
		case seen[s.Name]:
			out = append(out, "hearing.others has the name "+s.Name+" twice")
		}
		seen[s.Name] = true
		if s.Confirm && s.Of == audiometry.OfEars {
			out = append(out, name+" compares the ears of one test and cannot be confirmed by another")
		}
	}
	return out
}

// schemeNames lists the names of the other schemes, empty and not nil if there are none.
func (b *Bundle) schemeNames() []string {
	names := []string{}
	for _, s := range b.Measures.Hearing.Others {
		names = append(names, s.Name)
	}
	return names
}
