package text

import (
	"fmt"
	"strings"

	"hearduty/internal/finding"
)

// switchNeeds tells what the new law needs that the records lack.
func switchNeeds(p *page, site *finding.SwitchSite) {
	p.heading(yellow, site.ID+": what the new law needs that the records lack")
	list := SwitchNeeds(site)
	for _, text := range list {
		p.item(2, "- ", text)
	}
	if len(list) == 0 {
		p.para(2, 4, "Nothing: no finding of the new law is unproven, and nothing that it asks for in time is left undone.")
	}
}

// SwitchNeeds tells what the new law needs that the records lack: of exposure once a group, of what must be done once a
// duty, and of anything else once a thing. What the old law lacks as well is told in one sentence.
func SwitchNeeds(site *finding.SwitchSite) []string {
	out := switchExposures(site)
	var both []string
	for i := range site.Acts {
		if a := &site.Acts[i]; a.Before < a.Number() {
			out = append(out, switchAct(a))
		} else {
			both = append(both, fmt.Sprintf("a record for %s (%s)", a.Duty, subjectNumbers(a.Subjects)))
		}
	}
	for i := range site.Needs {
		if need := &site.Needs[i]; need.Before < need.Number() {
			out = append(out, switchNeed(need))
		} else {
			both = append(both, fmt.Sprintf("%s (%s)", needWords(need), subjectNumbers(need.Subjects)))
		}
	}
	if len(both) > 0 {
		out = append(out, "The old law lacks the same of: "+strings.Join(both, "; ")+".")
	}
	return out
}

// switchExposures tells of each group whose exposure the new law cannot take from the records and the old one can, and
// in one sentence of those that neither can.
func switchExposures(site *finding.SwitchSite) []string {
	var out, neither []string
	for i := range site.Exposure {
		e := &site.Exposure[i]
		if !e.New() {
			neither = append(neither, groupWords(e.Group))
			continue
		}
		out = append(out, switchExposure(e))
	}
	if len(neither) > 0 {
		out = append(out, sentence("Neither law can take all of the exposure of "+strings.Join(neither, ", ")))
	}
	return out
}

func groupWords(group string) string {
	if group == "" {
		return "workers in no group"
	}
	return "the group " + group
}

func switchExposure(e *finding.SwitchExposure) string {
	text := upper(groupWords(e.Group)) + ", " + count(e.Workers, "worker", "workers")
	if e.Group == "" {
		text = count(e.Workers, "worker", "workers") + " in no group"
	}
	if e.Now != e.Workers {
		text += fmt.Sprintf(" (%d of them now)", e.Now)
	}
	var wanted []string
	for _, m := range e.Wanted {
		levels := "level "
		if len(m.Levels) > 1 {
			levels = "levels "
		}
		wanted = append(wanted, m.Taken+" ("+levels+strings.ReplaceAll(strings.Join(m.Levels, ", "), "_", " ")+")")
	}
	text += ": " + e.Bundle + " takes exposure as " + strings.Join(wanted, ", and as ") + ", which the records do not give: " + strings.Join(shortened(e.Reasons), "; ")
	if e.Before > 0 {
		text += fmt.Sprintf("; for %d of them the old law cannot tell either", e.Before)
	}
	return sentence(text)
}

// switchAct tells of a duty that no record shows to be done.
func switchAct(a *finding.SwitchAct) string {
	spaced := func(kinds []string) string { return strings.ReplaceAll(strings.Join(kinds, " or "), "_", " ") }
	text := fmt.Sprintf("A record that %s (%s) was done, such as %s: %s", a.Duty, a.Cite, spaced(a.Evidence), subjectWords(a.Subjects))
	if len(a.Unread) > 0 {
		text += "; no record of the kind " + spaced(a.Unread) + " was read at all"
	}
	if a.Before > 0 {
		text += fmt.Sprintf("; the old law lacks the same for %d of them", a.Before)
	}
	return sentence(text)
}

// switchNeed tells of a thing that the records lack.
func switchNeed(n *finding.SwitchNeed) string {
	text := upper(needWords(n)) + ": " + subjectWords(n.Subjects)
	if n.Lacks != "" {
		text += ", for " + strings.Join(n.Duties, ", ")
	}
	if n.Before > 0 {
		text += fmt.Sprintf("; the old law lacks the same for %d of them", n.Before)
	}
	return sentence(text)
}

// subjectWords counts the subjects by kind, workers by group, and names those that are no workers.
func subjectWords(list []finding.SwitchSubjects) string {
	var who []string
	for _, s := range list {
		var parts []string
		for _, g := range s.Groups {
			name := g.Group
			if name == "" {
				name = "in no group now"
			}
			parts = append(parts, fmt.Sprintf("%s %d", name, g.Workers))
		}
		parts = append(parts, shortened(s.IDs)...)
		who = append(who, count(s.Number, s.Kind, s.Kind+"s")+" ("+strings.Join(parts, ", ")+")")
	}
	return strings.Join(who, ", ")
}

// needWords says what is lacking.
func needWords(n *finding.SwitchNeed) string {
	if n.Lacks == "" {
		return "what decides " + strings.Join(n.Duties, ", ") + ", which the rule does not say"
	}
	return n.Lacks
}

// subjectNumbers counts the subjects by kind.
func subjectNumbers(list []finding.SwitchSubjects) string {
	var parts []string
	for _, s := range list {
		parts = append(parts, count(s.Number, s.Kind, s.Kind+"s"))
	}
	return strings.Join(parts, ", ")
}

// shortened gives as many ids as a line names.
func shortened(ids []string) []string {
	if len(ids) <= shownSubjects+1 {
		return ids
	}
	return append(ids[:shownSubjects:shownSubjects], fmt.Sprintf("and %d more", len(ids)-shownSubjects))
}
