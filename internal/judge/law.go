package judge

import (
	"cmp"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// lawOf writes the duties and parameters of the bundles into the report.
func (c *check) lawOf(r *finding.Report) {
	r.Duties, r.Parameters = []finding.Duty{}, []finding.Parameter{}
	for _, b := range c.used {
		for _, d := range b.Duties {
			r.Duties = append(r.Duties, finding.Duty{Bundle: b.ID, ID: d.ID, Title: d.Title, Description: d.Description, Cite: d.Cite, Topic: d.Topic,
				Subject: d.Subject, Severity: d.Severity, Evidence: d.Evidence, Remedy: d.Remedy})
		}
		for _, name := range slices.Sorted(maps.Keys(b.Parameters)) {
			p := b.Parameters[name]
			now, inForce := p.At(c.AsOf)
			for i, v := range p.Values {
				to := v.To
				if to == "" && i+1 < len(p.Values) {
					to = p.Values[i+1].From
				}
				r.Parameters = append(r.Parameters, finding.Parameter{Bundle: b.ID, Name: name, About: p.About, Value: strings.TrimSpace(finding.Words(v.Plain()) + " " + p.Unit),
					From: v.From, To: to, Cite: v.Cite, Seen: v.Seen, InForce: inForce && now.From == v.From})
			}
		}
	}
	if c.Accepted != nil {
		for _, d := range acceptDuties {
			r.Duties = append(r.Duties, d.shown(c.Accepted.File))
		}
	}
	slices.SortStableFunc(r.Duties, func(a, b finding.Duty) int {
		return cmp.Or(cmp.Compare(a.Bundle, b.Bundle), cmp.Compare(slices.Index(finding.Topics, a.Topic), slices.Index(finding.Topics, b.Topic)), cmp.Compare(a.ID, b.ID))
	})
}
