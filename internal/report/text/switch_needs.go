package text

import (
	"fmt"
	"strings"

	"hearduty/internal/finding"
)

// switchNeeds tells what the new law needs that the records lack: of exposure once a group, of anything else once a
// thing.
func switchNeeds(p *page, site *finding.SwitchSite) {
	p.heading(yellow, site.ID+": what the new law needs that the records lack")
	n := 0
	tell := func(list []string) {
		for _, text := range list {
			p.item(2, "- ", text)
			n++
		}
	}
	tell(SwitchExposures(site))
	for i := range site.Kinds {
		tell([]string{SwitchKind(&site.Kinds[i])})
	}
	var both []string
	for i := range site.Acts {
		if a := &site.Acts[i]; a.Before < a.Number() {
			tell([]string{SwitchAct(a)})
		} else {
			both = append(both, fmt.Sprintf("a record for %s (%s)", a.Duty, subjectNumbers(a.Subjects)))
		}
	}
	for i := range site.Needs {
		if need := &site.Needs[i]; need.Before < need.Number() {
			tell([]string{SwitchNeed(need)})
		} else {
			both = append(both, fmt.Sprintf("%s (%s)", needWords(need), subjectNumbers(need.Subjects)))
		}
	}
	if len(both) > 0 {
		tell([]string{"The old law lacks the same of: " + strings.Join(both, "; ") + "."})
	}
	if n == 0 {
		p.para(2, 4, "Nothing: no finding of the new law is unproven, and no kind of record is missing.")
	}
}

// SwitchExposures tells of each group whose exposure the new law cannot take from the records and the old one can, and
// in one sentence of those that neither can.
func SwitchExposures(site *finding.SwitchSite) []string {
	var out, neither []string
	told := map[string]bool{} // a group stands once a channel
	for i := range site.Exposure {
		e := &site.Exposure[i]
		if !e.New() {
			if !told[e.Group] {
				neither = append(neither, groupWords(e.Group))
			}
			told[e.Group] = true
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
	if e.Now != e.Workers {
		text += fmt.Sprintf(" (%d of them now)", e.Now)
	}
	text += ": it is not known whether exposure reaches the level " + strings.Join(e.Levels, " or ") + " of " + e.Bundle
	text += ", which is taken as " + e.Taken + ": " + strings.Join(e.Reasons, "; ")
	if e.Before > 0 {
		text += fmt.Sprintf(". Of %s of them the old law cannot tell either", fmt.Sprint(e.Before))
	}
	return sentence(text)
}

// SwitchKind tells of a kind of record of which none was read.
func SwitchKind(k *finding.SwitchKind) string {
	var parts []string
	for _, d := range k.Duties {
		parts = append(parts, fmt.Sprintf("%s (%s), open for %s", d.Duty, d.Cite, count(d.Number, "subject", "subjects")))
	}
	return sentence("No record of the kind " + strings.ReplaceAll(k.Kind, "_", " ") + " was read; it proves " + strings.Join(parts, ", "))
}

// SwitchAct tells of a duty that no record shows to be done.
func SwitchAct(a *finding.SwitchAct) string {
	var kinds []string
	for _, k := range a.Evidence {
		kinds = append(kinds, strings.ReplaceAll(k, "_", " "))
	}
	text := fmt.Sprintf("A record that %s (%s) was done, such as %s: %s", a.Duty, a.Cite, strings.Join(kinds, " or "), subjectWords(a.Subjects))
	if a.Before > 0 {
		text += fmt.Sprintf("; the old law lacks the same for %d of them", a.Before)
	}
	return sentence(text)
}

// SwitchNeed tells of a thing that the records lack.
func SwitchNeed(n *finding.SwitchNeed) string {
	text := upper(needWords(n)) + ": " + subjectWords(n.Subjects) + ", for " + strings.Join(n.Duties, ", ")
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
