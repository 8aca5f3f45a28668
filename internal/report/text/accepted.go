package text

import (
	"fmt"
	"strings"

	"hearduty/internal/finding"
)

// acceptedTotals says how many findings the numbers above leave out.
func acceptedTotals(p *page, r *finding.Report) {
	var parts []string
	for _, s := range finding.Statuses {
		if n := r.AcceptedTotals[s]; n > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n, s))
		}
	}
	if len(parts) > 0 {
		p.para(0, 2, "Accepted by the employer for a time, and not among these numbers: "+strings.Join(parts, ", ")+".")
	}
}

// accepted lists the findings that the employer has accepted: they are not mended, and not met.
func accepted(p *page, r *finding.Report, names map[string]string) {
	groups, n := grouped(r, func(f *finding.Finding) bool { return f.Accepted != nil })
	if n == 0 {
		return
	}
	p.heading(yellow, fmt.Sprintf("Accepted by the employer (%d): not met, and left as it is until a day", n))
	for _, g := range groups {
		p.blank()
		p.para(0, 2, g.title(r))
		for _, f := range g.findings {
			p.item(2, "- ", upper(string(f.Status))+", "+line(f, r.AsOf, names))
			p.para(4, 4, sentence("Accepted "+acceptance(f.Accepted)))
		}
	}
}

// acceptance says until when a finding is accepted, by whom, why, and where that stands.
func acceptance(a *finding.Acceptance) string {
	return fmt.Sprintf("until %s, approved by %s (%s): %s", a.Until, a.ApprovedBy, place(finding.Evidence{File: a.File, Row: a.Row}), a.Reason)
}
