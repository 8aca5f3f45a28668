package fhir

import (
	"fmt"

	"hearduty/internal/audiometry"
	"hearduty/internal/mapping"
)

// audiogramID gives the id of the panel or report, or one made of worker and date.
func (s *source) audiogramID(g *group) string {
	if g.id != "" {
		return g.id
	}
	id := g.person.worker + "-" + g.day
	s.ids[id]++
	if n := s.ids[id]; n > 1 {
		return fmt.Sprintf("%s-%d", id, n)
	}
	return id
}

// settleReadings gives the threshold of each field. A tone may be there several times only if nothing is guessed by
// taking one: the values are the same, one of them corrects the others, or, at 1000 Hz, it was tested again.
func (g *group) settleReadings() map[string]audiometry.Threshold {
	byTone := map[tone][]reading{}
	var order []tone
	for _, r := range g.readings {
		if r.level.State == audiometry.NotRecorded {
			continue
		}
		if byTone[r.tone] == nil {
			order = append(order, r.tone)
		}
		byTone[r.tone] = append(byTone[r.tone], r)
	}
	levels := map[string]audiometry.Threshold{}
	for _, t := range order {
		all := byTone[t]
		if len(all) == 2 && t.hz == 1000 {
			if one, two, ok := inOrder(all[0], all[1]); ok {
				levels[t.field()], levels[t.ear.String()+".repeat_1000"] = one.level, two.level
				continue
			}
		}
		chosen, line, fault := g.choose(t, all)
		g.failed(line, fault)
		levels[t.field()] = chosen.level
	}
	return levels
}

// inOrder says which of two readings at 1000 Hz was the first: the one that stands first in the panel, or by the
// clock. It returns false if that cannot be told.
func inOrder(a, b reading) (one, two reading, ok bool) {
	switch {
	case a.revised != b.revised:
		return a, b, false
	case a.line == b.line || a.clock != 0 && a.clock < b.clock:
		return a, b, true
	case b.clock != 0 && b.clock < a.clock:
		return b, a, true
	}
	return a, b, false
}

// choose gives the reading that counts of several of one tone.
func (g *group) choose(t tone, all []reading) (reading, int, *mapping.Fault) {
	chosen, same := all[0], true
	var revised []reading
	for _, r := range all {
		same = same && r.level == chosen.level
		if r.revised {
			revised = append(revised, r)
		}
	}
	switch {
	case len(all) == 1:
		return chosen, 0, nil
	case same:
		g.remark(mapping.Remark{Field: t.field(), Why: "the threshold stands in the test several times, with the same value", Remedy: "Nothing needs to be done"})
		return chosen, 0, nil
	case len(revised) == 1:
		g.remark(mapping.Remark{Field: t.field(), Why: "the threshold stands in the test several times; the amended or corrected one was taken", Remedy: "Nothing needs to be done"})
		return revised[0], 0, nil
	}
	return chosen, int(all[1].line), &mapping.Fault{
		Field: t.field(), Why: "the threshold stands in the test several times, with different values",
		Remedy: "If these are several tests of one day, give each a panel, report or encounter of its own; otherwise keep the value that is right",
	}
}
