package html

import (
	"fmt"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// A strip is a figure of days: lanes one below the other, with stretches as bars and events as marks. Its names stand
// in a picture of their own, so that they stay in sight where the reader has to scroll.
type strip struct {
	Title, Desc string
	NamesWidth  float64
	Width       float64
	Height      float64
	Names       []text
	shapes
	Texts   []text
	Flags   []dueMark
	Keys    []key
	FromNow bool // where there is no room for all, show its end first
	Notes   []string
	Rows    []tableRow
}

// key explains a shape that stands in the figure.
type key struct{ Class, Sign, Word string }

const (
	stripNames = 104.0
	stripWidth = 540.0
	stripEdge  = 6.0  // room for a mark at the first and the last day
	stripHead  = 30.0 // room for the years and the as-of day
	mostYearsDrawn,
	mostYearsAhead = 12, 5
)

// drawing is a strip that is being drawn from top to bottom.
type drawing struct {
	strip
	scale scale
	asOf  calendar.Date
	y     float64
	rules []float64
	seen  map[string]bool // states of marks in it
	early int             // events before the drawn years
	more  int             // deadlines for which there is no row
}

// stripOf draws the spells, events and deadlines of a subject; nothing if there are none with a day.
func stripOf(p *finding.Portrait, deadlines []*finding.Finding, asOf calendar.Date) *strip {
	s, begins, ok := stripScale(p, deadlines, asOf)
	if !ok {
		return nil
	}
	d := &drawing{scale: s, asOf: asOf, y: stripHead, seen: map[string]bool{}}
	d.NamesWidth, d.Width = stripNames, stripWidth
	d.Title = fmt.Sprintf("%s %s over time", p.Subject.Kind, p.Subject.ID)
	d.FromNow = p.Subject.Kind == "worker" || p.Subject.Kind == "instrument"
	d.spellLanes(p)
	d.eventLanes(p)
	d.deadlines(deadlines)
	d.Rows = tableRows(p, deadlines)
	d.frame()
	d.Desc = fmt.Sprintf("From %s to %s: %d stretches, %d events and %d deadlines. The table below has each of them.", s.from, s.to, len(p.Spells), len(p.Events), len(deadlines))
	if begins < s.from {
		note := fmt.Sprintf("Begins %s; the last %d years are drawn.", begins, mostYearsDrawn)
		if d.early > 0 {
			note += fmt.Sprintf(" Earlier events, in the table only: %d.", d.early)
		}
		d.Notes = append(d.Notes, note)
	}
	if d.more > 0 {
		d.Notes = append(d.Notes, fmt.Sprintf("Further deadlines, in the table only: %d.", d.more))
	}
	d.keys()
	return &d.strip
}

// lane opens the next lane of that height and gives its top.
func (d *drawing) lane(name string, count int, height float64) float64 {
	top := d.y
	d.y += height
	d.rules = append(d.rules, d.y)
	label := text{X: 1, Y: top + height/2 + 4}
	if height > 22 {
		label.Y = top + 14
	}
	room := 17
	if count > 0 {
		label.Further = fmt.Sprint(count)
		room -= 1 + len(label.Further)
	}
	label.Text = cut(name, room)
	if name != "" {
		d.Names = append(d.Names, label)
	}
	return top
}

// frame draws the years, the rules between lanes and the as-of line, under everything else.
func (d *drawing) frame() {
	d.Height = d.y + 3
	grid, labels := d.scale.years()
	var lines, rules strings.Builder
	for _, x := range grid {
		lines.WriteString(path("M", x, 17.0, "V", d.y))
	}
	for _, y := range d.rules {
		rules.WriteString(path("M", 0.0, y, "H", d.Width))
	}
	under := []shape{{Class: "grid", D: lines.String()}, {Class: "rule", D: rules.String()}}
	if d.asOf.Known() && d.asOf >= d.scale.from && d.asOf <= d.scale.to {
		x := d.scale.x(d.asOf)
		under = append(under, shape{Class: "asof", D: path("M", x, 3.0, "V", d.y)})
		word := text{X: x + 4, Y: 11, Text: "as of " + d.asOf.String()}
		if x > d.Width/2 {
			word.X, word.Class = x-4, "end"
		}
		d.Texts = append(d.Texts, word)
	}
	for _, l := range labels {
		l.Y, l.Class = 26, "soft"
		d.Texts = append(d.Texts, l)
	}
	if under[0].D == "" {
		under = under[1:]
	}
	d.Shapes = append(under, d.Shapes...)
}

// keys explains the shapes of events that are in the figure. Where all are dots there is nothing to tell apart.
func (d *drawing) keys() {
	if len(d.seen) == 1 && d.seen["plain"] {
		return
	}
	for _, k := range []key{{"plain", "●", "done"}, {"good", "✓", "in order"}, {"bad", "▲", "not in order"}, {"tick", "|", "one each, in order"}, {"short", "ı", "one each, done"}} {
		if d.seen[k.Class] {
			d.Keys = append(d.Keys, k)
		}
	}
}
