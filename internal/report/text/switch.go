package text

import (
	"fmt"
	"io"
	"strings"

	"hearduty/internal/finding"
)

// Switch writes what changes where other bundles judge the same records: site by site, first how many findings of each
// side stand under each topic, then what appears, changes and vanishes, then what the records lack.
func Switch(w io.Writer, s *finding.Switch, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	p.para(0, 0, s.Program)
	p.para(0, 2, "What changes under another law, as of "+s.AsOf.String())
	for _, b := range s.Bundles {
		p.para(0, 2, fmt.Sprintf("%s: %s. Revision %s, %s, last held against the text on %s.", b.ID, b.Title, b.Revision, b.Kind, b.CheckedOn)+signature(b.Signature))
	}
	switchLevels(p, s)
	for i := range s.Sites {
		site := &s.Sites[i]
		switchTable(p, site)
		switchTopics(p, site)
		switchNeeds(p, site)
	}
	for _, part := range []struct {
		title string
		list  []string
	}{{"What to know about this comparison", s.Notes}, {"Cautions", s.Cautions}} {
		if len(part.list) > 0 {
			p.heading(bold, part.title)
		}
		for _, text := range part.list {
			p.item(0, "- ", sentence(text))
		}
	}
	return p.flush()
}

// switchLevels tells the exposure levels of the bundles, and how each takes exposure.
func switchLevels(p *page, s *finding.Switch) {
	p.heading(bold, "Exposure levels")
	for _, l := range s.Levels {
		title := l.Bundle + ": " + strings.ReplaceAll(l.Name, "_", " ")
		if l.Enrols {
			title += ", which puts a worker into the program"
		}
		var parts []string
		for _, part := range l.Parts {
			parts = append(parts, SwitchPart(part))
		}
		p.item(0, "- ", sentence(title+": "+strings.Join(parts, "; or ")))
	}
}

// SwitchPart writes one part of an exposure level.
func SwitchPart(part finding.SwitchPart) string {
	if part.Value == "" {
		return "no value in force, " + part.Taken
	}
	mark := ""
	if part.Seen == "memory" {
		mark = ", not checked against the text"
	}
	return fmt.Sprintf("%s, taken as %s (%s%s)", part.Value, part.Taken, part.Cite, mark)
}

// switchTable writes the number of findings of both sides by topic and status.
func switchTable(p *page, site *finding.SwitchSite) {
	title := "Site " + site.ID
	if site.Name != "" {
		title += ", " + site.Name
	}
	p.heading(bold, title+", "+count(site.Workers, "worker", "workers"))
	p.para(2, 4, "A: judged by "+strings.Join(site.From, " and ")+".")
	p.para(2, 4, "B: judged by "+strings.Join(site.To, " and ")+".")
	if len(site.Topics) == 0 {
		p.para(2, 4, "Neither side owes anything here.")
		return
	}
	if p.width >= tableWidth {
		statusHeads(p)
	}
	for i := range site.Topics {
		t := &site.Topics[i]
		switchRows(p, t.Topic, t.Numbers)
	}
	switchRows(p, "in all", site.Totals)
}

// switchRows writes two rows of the table, one a side.
func switchRows(p *page, title string, n finding.SwitchNumbers) {
	statusRow(p, title, "A", n.From)
	if p.width >= tableWidth {
		title = ""
	}
	statusRow(p, title, "B", n.To)
}

// StandingWords says how a subject stands.
func StandingWords(standing string) string {
	switch standing {
	case finding.NotOwed:
		return "nothing owed"
	case finding.NotKnown:
		return "exposure not known"
	}
	return standing
}

// switchTopics tells topic by topic what changes, and in one sentence under which topics nothing does.
func switchTopics(p *page, site *finding.SwitchSite) {
	var still []string
	for i := range site.Topics {
		if t := &site.Topics[i]; len(t.Moves) > 0 {
			switchTopic(p, site, t)
		} else {
			still = append(still, t.Topic)
		}
	}
	if len(still) > 0 {
		p.heading(bold, site.ID+": topics under which nobody and nothing stands otherwise")
		p.para(2, 4, strings.Join(still, ", ")+".")
	}
	for i := range site.Topics {
		if t := &site.Topics[i]; len(t.Moves) == 0 {
			switchValues(p, t, "Numbers that decide under "+t.Topic+" and differ:")
		}
	}
}

// switchTopic tells what changes under a topic.
func switchTopic(p *page, site *finding.SwitchSite, t *finding.SwitchTopic) {
	p.heading(bold, site.ID+": "+t.Topic)
	for _, x := range OneSided(t) {
		p.para(2, 4, x)
	}
	var last string
	for i := range t.Moves {
		m := &t.Moves[i]
		if m.Change != last {
			last = m.Change
			p.para(2, 4, upper(m.Change)+":")
		}
		p.item(2, "- ", switchMove(m))
	}
	if t.Same > 0 {
		p.para(2, 4, "Stands the same: "+count(t.Same, "subject", "subjects")+".")
	}
	switchValues(p, t, "Numbers that decide here and differ:")
}

// switchValues tells the parameters of a topic that are not the same on both sides.
func switchValues(p *page, t *finding.SwitchTopic, title string) {
	list := SwitchValues(t)
	if len(list) > 0 {
		p.para(2, 4, title)
	}
	for _, text := range list {
		p.item(2, "- ", text)
	}
}

// SwitchValues tells the parameters of a topic that are not the same on both sides: each that both have under one name,
// and in one sentence a side those that it alone has.
func SwitchValues(t *finding.SwitchTopic) []string {
	var out, onlyA, onlyB []string
	for i := range t.Values {
		v := &t.Values[i]
		name := strings.ReplaceAll(v.Name, "_", " ")
		switch {
		case !v.Differs():
		case len(v.To) == 0:
			onlyA = append(onlyA, name+" "+valueWords(v.From))
		case len(v.From) == 0:
			onlyB = append(onlyB, name+" "+valueWords(v.To))
		default:
			out = append(out, sentence(name+": A "+valueWords(v.From)+"; B "+valueWords(v.To)))
		}
	}
	if len(onlyA) > 0 {
		out = append(out, sentence("Only A: "+strings.Join(onlyA, "; ")))
	}
	if len(onlyB) > 0 {
		out = append(out, sentence("Only B: "+strings.Join(onlyB, "; ")))
	}
	return out
}

// valueWords writes the values of a parameter, one a bundle of a side.
func valueWords(list []finding.Parameter) string {
	var parts []string
	for _, x := range list {
		part := x.Value + " (" + x.Cite
		if x.Seen == "memory" {
			part += ", not checked against the text"
		}
		parts = append(parts, part+")")
	}
	return strings.Join(parts, " and ")
}

// OneSided says which side has no duty, or no finding, under a topic, and by which duties the other one has some.
func OneSided(t *finding.SwitchTopic) []string {
	say := func(has int, without, with string, duties []finding.SwitchDuty) []string {
		if len(duties) == 0 {
			return nil
		}
		var names []string
		for _, d := range duties {
			names = append(names, d.Duty+" ("+d.Cite+")")
		}
		if has == 0 {
			return []string{without + " has no duty under this topic; " + with + " has " + strings.Join(names, ", ") + "."}
		}
		return []string{without + " finds nobody and nothing that owes anything here; " + with + " does by " + strings.Join(names, ", ") + "."}
	}
	switch {
	case len(t.FromDuties) == 0:
		return say(t.FromHas, "A", "B", t.ToDuties)
	case len(t.ToDuties) == 0:
		return say(t.ToHas, "B", "A", t.FromDuties)
	}
	return nil
}

// switchMove tells of the subjects that stand otherwise.
func switchMove(m *finding.SwitchMove) string {
	text := fmt.Sprintf("%s, %s before, %s now", count(m.Number, m.Kind, m.Kind+"s"), StandingWords(m.Before), StandingWords(m.After))
	before, now := "", ""
	if !quiet(m.Before) && len(m.FromDuties) > 0 {
		before = dutyNumbers(m.FromDuties, m.Number)
	}
	if !quiet(m.After) && len(m.ToDuties) > 0 {
		now = dutyNumbers(m.ToDuties, m.Number)
	}
	switch {
	case before != "" && before == now:
		text += "; both by " + now
	default:
		for _, by := range [][2]string{{"before", before}, {"now", now}} {
			if by[1] != "" {
				text += "; " + by[0] + " by " + by[1]
			}
		}
	}
	var who []string
	for _, g := range m.Groups {
		who = append(who, switchGroup(g)+" (exposure, see below)")
	}
	if n := len(m.Subjects); n > shownSubjects+1 {
		who = append(who, strings.Join(m.Subjects[:shownSubjects], ", ")+fmt.Sprintf(" and %d more", n-shownSubjects))
	} else if n > 0 {
		who = append(who, strings.Join(m.Subjects, ", "))
	}
	return sentence(text + ": " + strings.Join(who, "; "))
}

// quiet says whether a standing asks for nothing, so that nobody needs to know by which duties.
func quiet(standing string) bool {
	return standing == string(finding.Met) || standing == string(finding.Lifted)
}

// shownSubjects is the number of ids that a line names; the form for programs has them all.
const shownSubjects = 12

// dutyNumbers names duties, with the number of subjects where it is not all of them.
func dutyNumbers(list []finding.SwitchDutyNumber, all int) string {
	var parts []string
	for _, d := range list {
		part := d.Duty + " (" + d.Cite + ")"
		if d.Number != all {
			part += fmt.Sprintf(" %d", d.Number)
		}
		parts = append(parts, part)
	}
	return strings.Join(parts, ", ")
}

func switchGroup(g finding.SwitchGroup) string {
	if g.Group == "" {
		return count(g.Workers, "worker", "workers") + " in no group"
	}
	return fmt.Sprintf("%s of the group %s", count(g.Workers, "worker", "workers"), g.Group)
}
