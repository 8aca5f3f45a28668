package fhir

import (
	"sort"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// settle gives the audiogram of a panel or report once all of it was read.
func (s *source) settle(no int32, g *group) {
	if g.waits > 0 || g.awaitsHead {
		return
	}
	if s.headed[no] == g {
		delete(s.headed, no)
	}
	s.finish(g)
}

// flush gives the audiograms that are still kept, in the order of their first lines.
func (s *source) flush() {
	s.ended = true
	var rest []*group
	for _, g := range s.loose {
		rest = append(rest, g)
	}
	for _, g := range s.headed {
		rest = append(rest, g)
	}
	s.loose, s.headed = nil, nil
	sort.Slice(rest, func(a, b int) bool { return rest[a].first() < rest[b].first() })
	for _, g := range rest {
		s.finish(g)
	}
}

// first gives the first line of the group.
func (g *group) first() int32 {
	if len(g.lines) == 0 {
		return 0
	}
	return g.lines[0]
}

func (g *group) has(line int) bool {
	for _, l := range g.lines {
		if int(l) == line {
			return true
		}
	}
	return false
}

// finish gives the audiogram of a group, or why there is none.
func (s *source) finish(g *group) {
	if len(g.lines) == 0 {
		return
	}
	sort.Slice(g.lines, func(a, b int) bool { return g.lines[a] < g.lines[b] })
	if g.notData != "" {
		for _, line := range g.lines {
			s.pass(int(line), g.notData)
		}
		return
	}
	levels := g.settleReadings()
	g.failed(int(g.first()), g.lacking(levels))
	out := mapping.Out{Line: int(g.first()), Remarks: g.remarks}
	switch {
	case g.fault != nil:
		if g.has(g.faultLine) {
			out.Line = g.faultLine
		}
		out.Fault, out.Remarks = g.fault, nil
	default:
		if g.leader > 0 {
			out.Line = g.leader
		}
		out.Records = []mapping.Entry{{Values: s.values(g, levels)}}
	}
	for _, line := range g.lines {
		if int(line) != out.Line {
			out.Lines = append(out.Lines, int(line))
		}
	}
	s.queue = append(s.queue, out)
}

// lacking says what an audiogram lacks to be one.
func (g *group) lacking(levels map[string]audiometry.Threshold) *mapping.Fault {
	switch {
	case g.person == nil:
		return workerFault("the resource does not say whom it is about", "Have it exported with its subject")
	case g.day == "":
		return &mapping.Fault{Field: "date", Why: "the resource does not say when it was observed", Remedy: "Have it exported with effectiveDateTime"}
	case len(levels) == 0:
		why := "the test holds no hearing threshold"
		for _, m := range g.remarks {
			if strings.HasPrefix(m.Field, "left.") || strings.HasPrefix(m.Field, "right.") {
				why += ": " + m.Why
				break
			}
		}
		return &mapping.Fault{Why: why, Remedy: "Look up whether there was a result"}
	}
	return nil
}

// values gives the fields of the record.
func (s *source) values(g *group, levels map[string]audiometry.Threshold) []mapping.Value {
	var out []mapping.Value
	set := func(field, text string) {
		if i := s.table.Index(field); text != "" && text != conflicting && i >= 0 {
			for _, fixed := range s.fixed {
				if fixed.Field == i {
					return
				}
			}
			out = append(out, mapping.Value{Field: i, Text: text})
		}
	}
	set("audiogram_id", s.audiogramID(g))
	set("worker_id", g.person.worker)
	set("date", g.day)
	set("purpose", g.purpose)
	for i := range s.table.Fields {
		if f := &s.table.Fields[i]; f.Type == record.Hearing {
			set(f.Name, levels[f.Name].String())
		}
	}
	set("audiometer_id", g.device)
	set("tester_id", g.tester)
	return append(out, s.fixed...)
}
