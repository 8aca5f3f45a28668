package text

import (
	"fmt"
	"io"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// kindColours are the colours of the headings of what somebody should look at first.
var kindColours = map[finding.ChangeKind]string{
	finding.Opened: red, finding.Worsened: red, finding.NoLongerAccepted: red, finding.Unclear: yellow, finding.NewlyLate: yellow,
}

// Comparison writes what changed between two reports: the numbers, what limits the comparison, and each change with
// its reasons, the worst first.
func Comparison(w io.Writer, c *finding.Comparison, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	p.para(0, 0, c.New.Program)
	p.para(0, 2, fmt.Sprintf("What changed from %s to %s", c.Old.AsOf, c.New.AsOf))
	p.blank()
	p.para(0, 2, changeNumbers(c))
	for _, x := range []struct {
		name string
		side finding.Side
	}{{"Before", c.Old}, {"Now", c.New}} {
		var parts []string
		for _, s := range finding.Statuses {
			parts = append(parts, fmt.Sprintf("%d %s", x.side.Totals[s], s))
		}
		line := x.name + ": " + strings.Join(parts, ", ") + "."
		if n := sum(x.side.AcceptedTotals); n > 0 {
			line += fmt.Sprintf(" Accepted, and not among them: %d.", n)
		}
		p.para(0, 2, line)
	}
	if len(c.Notes) > 0 {
		p.heading(yellow, "What to know about the two reports")
		for _, note := range c.Notes {
			p.item(0, "- ", note)
		}
	}
	names := changeIDs(c)
	for _, kind := range finding.ChangeKinds {
		changes(p, c, kind, names)
	}
	if len(c.Cautions) > 0 {
		p.heading(bold, "Cautions")
		for _, caution := range c.Cautions {
			p.item(0, "- ", sentence(caution))
		}
	}
	return p.flush()
}

// changeNumbers writes the number of changes of each kind that there are.
func changeNumbers(c *finding.Comparison) string {
	var parts []string
	for _, kind := range finding.ChangeKinds {
		if n := c.Numbers[kind]; n > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n, kind.Words()))
		}
	}
	if len(parts) == 0 {
		return "No listed finding changed, and none is open."
	}
	return sentence(strings.Join(parts, ", "))
}

// changeIDs gives short ids of the findings that changed.
func changeIDs(c *finding.Comparison) map[string]string {
	list := make([]finding.Finding, len(c.Changes))
	for i := range c.Changes {
		list[i].ID = c.Changes[i].ID
	}
	return shortIDs(list)
}

// changes lists the changes of one kind by site and duty. Of what is as it was, only the numbers are told.
func changes(p *page, c *finding.Comparison, kind finding.ChangeKind, names map[string]string) {
	if c.Numbers[kind] == 0 {
		return
	}
	colour := bold
	if special, ok := kindColours[kind]; ok {
		colour = special
	}
	p.heading(colour, fmt.Sprintf("%s (%d): %s", upper(kind.Words()), c.Numbers[kind], kind.Meaning()))
	brief := kind == finding.StillOpen || kind == finding.StillAccepted
	for _, list := range changeGroups(c, kind) {
		first := list[0]
		title := first.Site + ": " + first.Duty + ", " + first.Cite
		if brief {
			p.item(0, "- ", title+": "+standings(list))
			continue
		}
		p.blank()
		p.para(0, 2, title)
		for _, same := range alike(kind, list) {
			x := same[0]
			p.item(2, "- ", changeLine(same, names))
			for i, cause := range x.Why {
				if i == shownEvidence && len(x.Why) > shownEvidence+1 {
					p.para(4, 4, fmt.Sprintf("And %d more reasons.", len(x.Why)-i))
					break
				}
				p.para(4, 6, "Why: "+cause.Text)
			}
		}
	}
}

// changeGroups gathers the changes of a kind by site, bundle and duty, in the order of the first of each.
func changeGroups(c *finding.Comparison, kind finding.ChangeKind) [][]*finding.Change {
	var out [][]*finding.Change
	at := map[[3]string]int{}
	for i := range c.Changes {
		x := &c.Changes[i]
		if x.Kind != kind {
			continue
		}
		key := [3]string{x.Site, x.Bundle, x.Duty}
		n, ok := at[key]
		if !ok {
			n = len(out)
			at[key] = n
			out = append(out, nil)
		}
		out[n] = append(out[n], x)
	}
	slices.SortStableFunc(out, func(a, b []*finding.Change) int { return strings.Compare(a[0].Site, b[0].Site) })
	return out
}

func standings(list []*finding.Change) string {
	numbers := map[finding.Status]int{}
	for _, x := range list {
		numbers[x.After.Status]++
	}
	return inWords(numbers)
}

// alike puts changes together of which the same is to be said, unless somebody must look at each.
func alike(kind finding.ChangeKind, list []*finding.Change) [][]*finding.Change {
	var out [][]*finding.Change
	at := map[string]int{}
	for i, x := range list {
		key := fmt.Sprint(x.Subject.Kind, "\x00", said(x), "\x00", x.Why)
		if _, look := kindColours[kind]; look {
			key = fmt.Sprint(i)
		}
		n, ok := at[key]
		if !ok {
			n = len(out)
			at[key] = n
			out = append(out, nil)
		}
		out[n] = append(out[n], x)
	}
	return out
}

// changeLine tells of one finding, or of several that are alike, how they stand now and how they stood.
func changeLine(same []*finding.Change, names map[string]string) string {
	first := same[0]
	if len(same) == 1 {
		return first.Subject.Kind + " " + first.Subject.ID + ": " + said(first) + " [" + names[first.ID] + "]"
	}
	var subjects []string
	for _, x := range same {
		subjects = append(subjects, x.Subject.ID+" ["+names[x.ID]+"]")
	}
	return fmt.Sprintf("%d %ss: %s %s", len(same), first.Subject.Kind, said(first), strings.Join(subjects, ", "))
}

// said tells how a finding stands now and how it stood.
func said(x *finding.Change) string {
	text := Turn(x) + "."
	if x.After != nil && x.After.Message != "" {
		text += " " + sentence(upper(x.After.Message))
	} else if x.After == nil && x.Before.Message != "" {
		text += " Before: " + sentence(upper(x.Before.Message))
	}
	return text
}

func sum(totals map[finding.Status]int) (n int) {
	for _, of := range totals {
		n += of
	}
	return n
}

// Turn says from which status to which a finding changed.
func Turn(x *finding.Change) string {
	switch {
	case x.Before == nil:
		return "not listed before, now " + string(x.After.Status)
	case x.After == nil:
		return string(x.Before.Status) + " before, now not listed"
	case x.Before.Status == x.After.Status:
		return string(x.After.Status) + " as before"
	}
	return fmt.Sprintf("%s before, now %s", x.Before.Status, x.After.Status)
}
