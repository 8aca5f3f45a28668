package text

import (
	"fmt"
	"io"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// Book writes a bundle as a rule book: its duties in words, its parameters on a day, what is left to the
// employer, and how each paragraph of the law is accounted for.
func Book(w io.Writer, b *bundle.Bundle, asOf calendar.Date, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	about(p, b, asOf)
	duties(p, b)
	inForce(p, b, asOf)
	elections(p, b)
	paragraphs(p, b)
	memory(p, b, asOf)
	readings(p, b)
	return p.flush()
}

func about(p *page, b *bundle.Bundle, asOf calendar.Date) {
	a := &b.About
	p.para(0, 2, b.ID)
	p.para(0, 2, a.Title)
	p.blank()
	where := a.Country
	if a.Region != "" {
		where += "-" + a.Region
	}
	for _, row := range [][2]string{
		{"Authority", a.Authority}, {"Country", where}, {"Kind", a.Kind}, {"Extends", strings.Join(b.Extends, ", ")}, {"Revision", b.Revision}, {"Judges from", a.InForce},
		{"Checked on", a.CheckedOn}, {"Shown as of", asOf.String()}, {"SHA-256", b.SHA256},
	} {
		if row[1] == "" {
			continue
		}
		for i, line := range wrap(row[1], p.width-14) {
			p.raw(padRight([]string{row[0], ""}[min(i, 1)], 14) + line)
		}
	}
	p.heading(bold, "Texts")
	for _, t := range a.Instruments {
		p.item(0, "- ", t.Name+", "+t.Cite)
	}
	if a.SeenNote != "" {
		p.blank()
		p.para(0, 0, sentence(a.SeenNote))
	}
	p.heading(bold, "Cautions")
	for _, c := range a.Cautions {
		p.item(0, "- ", sentence(c))
	}
}

func duties(p *page, b *bundle.Bundle) {
	p.heading(bold, fmt.Sprintf("Duties (%d)", len(b.Duties)))
	topic := ""
	for _, d := range b.Duties {
		if d.Topic != topic {
			topic = d.Topic
			p.blank()
			p.raw(upper(topic))
		}
		title := d.ID + ", " + d.Cite + ", of each " + d.Subject
		if d.Severity == "minor" {
			title += ", minor"
		}
		if d.From != "" && d.From != b.ID {
			title += ", from " + d.From
		}
		p.para(2, 4, title)
		p.para(4, 4, sentence(d.Description))
		p.para(4, 4, "If not: "+sentence(d.Remedy))
	}
}

func inForce(p *page, b *bundle.Bundle, asOf calendar.Date) {
	p.heading(bold, "Parameters in force on "+asOf.String())
	for _, name := range slices.Sorted(maps.Keys(b.Parameters)) {
		parameter := b.Parameters[name]
		v, ok := parameter.At(asOf)
		if !ok {
			p.para(2, 4, name+": no value is in force on that day; what rests on it is unproven")
			continue
		}
		p.para(2, 4, fmt.Sprintf("%s = %s, from %s, %s", name, strings.TrimSpace(finding.Words(v.Plain())+" "+parameter.Unit), v.From, v.Cite))
		note := sentence(parameter.About)
		if v.Seen != "text" {
			note += " " + sentence(upper(seenWords(v.Seen)))
		}
		p.para(4, 4, note)
	}
}

func elections(p *page, b *bundle.Bundle) {
	if len(b.Choices) == 0 {
		return
	}
	p.heading(bold, "Choices of the employer, set per site in the program file")
	for _, name := range slices.Sorted(maps.Keys(b.Choices)) {
		c := b.Choices[name]
		values := make([]string, len(c.Values))
		for i, v := range c.Values {
			values[i] = fmt.Sprint(v)
		}
		title := fmt.Sprintf("%s: %s; unless set, %v", name, strings.Join(values, " or "), c.Default)
		if c.Cite != "" {
			title += ", " + c.Cite
		}
		p.para(2, 4, title)
		p.para(4, 4, sentence(c.About))
	}
}

func paragraphs(p *page, b *bundle.Bundle) {
	p.heading(bold, fmt.Sprintf("Paragraphs accounted for (%d)", len(b.Paragraphs)))
	for _, name := range slices.SortedFunc(maps.Keys(b.Paragraphs), naturally) {
		g := b.Paragraphs[name]
		p.para(2, 4, name+": "+sentence(g.Says))
		if len(g.Checked) > 0 {
			p.para(4, 4, "Checked by "+strings.Join(g.Checked, ", ")+".")
		}
		if g.Attested != "" {
			p.para(4, 4, "Attested by "+sentence(g.Attested))
		}
		if g.Outside != "" {
			p.para(4, 4, "Outside: "+sentence(g.Outside))
		}
	}
}

func memory(p *page, b *bundle.Bundle, asOf calendar.Date) {
	var list []string
	for _, name := range slices.Sorted(maps.Keys(b.Parameters)) {
		if v, ok := b.Parameters[name].At(asOf); ok && v.Seen == "memory" {
			list = append(list, name+", "+v.Cite)
		}
	}
	p.heading(yellow, fmt.Sprintf("Not checked against the official text (%d)", len(list)))
	for _, line := range list {
		p.item(0, "- ", line)
	}
	if len(list) == 0 {
		p.raw("Every parameter in force was read in a text.")
	}
}

func readings(p *page, b *bundle.Bundle) {
	if len(b.About.Readings) == 0 {
		return
	}
	p.heading(bold, "How the bundle reads what can be read in two ways")
	for _, r := range b.About.Readings {
		p.item(0, "- ", strings.TrimSuffix(r.Point, "?")+": "+sentence(r.Reading)+sourceOf(r.Source))
	}
}

func sourceOf(source string) string {
	if source == "" {
		return ""
	}
	return " (" + source + ")"
}

// naturally orders names so that (2) comes before (10).
func naturally(a, b string) int {
	return strings.Compare(padDigits(a), padDigits(b))
}

func padDigits(s string) string {
	var out strings.Builder
	digits := ""
	flush := func() {
		if digits != "" {
			out.WriteString(strings.Repeat("0", max(0, 6-len(digits))) + digits)
			digits = ""
		}
	}
	for _, c := range s {
		if c >= '0' && c <= '9' {
			digits += string(c)
			continue
		}
		flush()
		out.WriteRune(c)
	}
	flush()
	return out.String()
}
