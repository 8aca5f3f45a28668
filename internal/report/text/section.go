package text

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// aSection is the part of a report that lists the findings of one status.
type aSection struct {
	status finding.Status
	title  string
	colour string
}

var sections = []aSection{
	{finding.Gap, "Gaps", red},
	{finding.Unproven, "Unproven", yellow},
	{finding.Opinion, "Opinions wanted", yellow},
	{finding.Due, "Due", bold},
	{finding.Late, "Late", bold},
	{finding.Lifted, "Lifted", bold},
	{finding.Met, "Met", bold},
}

// group is the findings of one duty at a site.
type group struct {
	site, bundle, duty string
	major              bool
	findings           []*finding.Finding
}

// section lists the findings of one status, major duties first, one block a duty and site.
func section(p *page, r *finding.Report, s aSection, names map[string]string) {
	groups, n := grouped(r, func(f *finding.Finding) bool { return f.Status == s.status && f.Accepted == nil })
	if n == 0 {
		return
	}
	p.heading(s.colour, fmt.Sprintf("%s (%d): %s", s.title, n, meaning[s.status]))
	for _, g := range groups {
		first := g.findings[0]
		p.blank()
		p.para(0, 2, g.title(r))
		if s.status.Urgency() < finding.Due.Urgency() && first.Remedy != "" {
			p.para(2, 4, "What to do: "+sentence(first.Remedy))
		}
		if s.status == finding.Due || s.status == finding.Met {
			together(p, g, r.AsOf, names)
			continue
		}
		for _, f := range g.findings {
			p.item(2, "- ", line(f, r.AsOf, names))
		}
	}
}

// title names the site, the duty and the paragraph.
func (g *group) title(r *finding.Report) string {
	title := g.site + ": " + g.duty
	if len(r.Bundles) > 1 {
		title += " of " + g.bundle
	}
	title += ", " + g.findings[0].Cite
	if g.findings[0].Severity == "minor" {
		title += ", minor"
	}
	return title
}

// together lists findings on which nobody need act at once: those of which the same is to be said share
// an item, without the places of their records.
func together(p *page, g *group, asOf calendar.Date, names map[string]string) {
	for i := 0; i < len(g.findings); {
		first := g.findings[i]
		said := told(first, asOf)
		subjects := []string{}
		j := i
		for ; j < len(g.findings) && g.findings[j].Subject.Kind == first.Subject.Kind && told(g.findings[j], asOf) == said; j++ {
			subjects = append(subjects, g.findings[j].Subject.ID+" ["+names[g.findings[j].ID]+"]")
		}
		if len(subjects) == 1 {
			p.item(2, "- ", line(first, asOf, names))
		} else {
			p.item(2, "- ", fmt.Sprintf("%d %ss: %s %s", len(subjects), first.Subject.Kind, said, strings.Join(subjects, ", ")))
		}
		i = j
	}
}

// grouped gathers the findings that are wanted by duty and site. Groups stand in the order of their most
// urgent finding, major before minor.
func grouped(r *finding.Report, wanted func(*finding.Finding) bool) (groups []*group, n int) {
	index := map[[3]string]*group{}
	for i := range r.Findings {
		f := &r.Findings[i]
		if !wanted(f) {
			continue
		}
		n++
		key := [3]string{f.Site, f.Bundle, f.Duty}
		g := index[key]
		if g == nil {
			g = &group{site: f.Site, bundle: f.Bundle, duty: f.Duty, major: f.Severity != "minor"}
			index[key] = g
			groups = append(groups, g)
		}
		g.findings = append(g.findings, f)
	}
	slices.SortStableFunc(groups, func(a, b *group) int {
		switch {
		case a.site != b.site || a.major == b.major:
			return 0
		case a.major:
			return -1
		}
		return 1
	})
	return groups, n
}

// shownEvidence is the number of records that a line names; an explanation shows them all.
const shownEvidence = 4

// line tells one finding: whom it is about, what was found, the dates, where the records stand, its id.
func line(f *finding.Finding, asOf calendar.Date, names map[string]string) string {
	var b strings.Builder
	b.WriteString(f.Subject.Kind + " " + f.Subject.ID + ": " + told(f, asOf))
	for i, e := range f.Evidence {
		if i == shownEvidence && len(f.Evidence) > shownEvidence+1 {
			b.WriteString(fmt.Sprintf(" and %d more records", len(f.Evidence)-i))
			break
		}
		b.WriteString(" " + place(e))
	}
	return b.String() + " [" + names[f.ID] + "]"
}

// told says what was found, and the dates unless the words have them already.
func told(f *finding.Finding, asOf calendar.Date) string {
	var parts []string
	if f.Message != "" {
		parts = append(parts, sentence(upper(f.Message)))
	}
	if d := dates(f, asOf); d != "" && !(f.Due.Known() && strings.Contains(f.Message, f.Due.String())) {
		parts = append(parts, sentence(upper(d)))
	}
	if h := finding.Pairs(f.Health); h != "" {
		parts = append(parts, "Hearing: "+sentence(h))
	}
	if len(parts) == 0 {
		return upper(string(f.Status)) + "."
	}
	return strings.Join(parts, " ")
}

// dates says in words when a finding was due and done.
func dates(f *finding.Finding, asOf calendar.Date) string {
	days := func(n int) string { return count(n, "day", "days") }
	switch {
	case f.Due.Known() && f.Done.Known() && f.DaysOver > 0:
		return fmt.Sprintf("due %s, done %s, %s late", f.Due, f.Done, days(f.DaysOver))
	case f.Due.Known() && f.Done.Known():
		return fmt.Sprintf("due %s, done %s", f.Due, f.Done)
	case f.Done.Known():
		return "done " + f.Done.String()
	case f.Due.Known() && f.DaysOver > 0:
		return fmt.Sprintf("due %s, %s over", f.Due, days(f.DaysOver))
	case f.Due.Known() && f.Due == asOf:
		return fmt.Sprintf("due %s, today", f.Due)
	case f.Due.Known() && f.Due > asOf:
		return fmt.Sprintf("due %s, in %s", f.Due, days(int(f.Due-asOf)))
	case f.Due.Known():
		return "due " + f.Due.String()
	}
	return ""
}

// place says where a record stands: file:line, or file sheet!row.
func place(e finding.Evidence) string {
	switch {
	case e.File == "":
		return e.Record
	case e.Sheet != "":
		return fmt.Sprintf("%s %s!%d", e.File, e.Sheet, e.Row)
	case e.Row > 0:
		return fmt.Sprintf("%s:%d", e.File, e.Row)
	}
	return e.File
}

// shortIDs gives for each id of a finding a beginning that no other listed finding has.
func shortIDs(list []finding.Finding) map[string]string {
	const least = len("f-") + 8
	ids := make([]string, len(list))
	for i := range list {
		ids[i] = list[i].ID
	}
	slices.Sort(ids)
	shared := func(a, b string) int {
		n := 0
		for n < len(a) && n < len(b) && a[n] == b[n] {
			n++
		}
		return n
	}
	names := make(map[string]string, len(ids))
	for i, id := range ids {
		n := least
		if i > 0 {
			n = max(n, shared(id, ids[i-1])+1)
		}
		if i+1 < len(ids) {
			n = max(n, shared(id, ids[i+1])+1)
		}
		names[id] = id[:min(n, len(id))]
	}
	return names
}
