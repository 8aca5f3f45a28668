package html

import (
	"cmp"
	"slices"
	"strconv"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// tableRow is a line of the table that says the same as a strip.
type tableRow struct{ Day, What, Record, Place string }

// tableRows lists every spell, event and deadline.
func tableRows(p *finding.Portrait, deadlines []*finding.Finding) []tableRow {
	rows := make([]tableRow, 0, len(p.Spells)+len(p.Events)+len(deadlines))
	spells := make([]*finding.Spell, len(p.Spells))
	for i := range p.Spells {
		spells[i] = &p.Spells[i]
	}
	slices.SortStableFunc(spells, func(a, b *finding.Spell) int { return cmp.Compare(a.From, b.From) })
	for _, s := range spells {
		what := said(s)
		if s.Lane == "protector" || s.Lane == "group" {
			what = s.Lane + " " + what
		}
		rows = append(rows, tableRow{Day: spellDays(s), What: what})
	}
	for _, e := range p.Events {
		rows = append(rows, tableRow{dayOr(e.Date), stateSaid(&e), e.Record, placeOf(&e)})
	}
	for _, f := range deadlines {
		rows = append(rows, tableRow{Day: dayOr(f.Due), What: "deadline: " + f.Duty + ", " + string(f.Status), Record: f.ID, Place: f.Cite})
	}
	return rows
}

// stateSaid gives the label of an event, with its state where the label does not tell it.
func stateSaid(e *finding.Event) string {
	switch {
	case e.Lane != "wear-check" && e.Lane != "fit-test":
		return e.Label
	case e.State == "good":
		return e.Label + ": in order"
	case e.State == "bad":
		return e.Label + ": not in order"
	}
	return e.Label
}

// placeOf says where the record of an event stands.
func placeOf(e *finding.Event) string {
	s := e.File
	if e.Sheet != "" {
		s += ", sheet " + e.Sheet
	}
	if e.Row > 0 {
		s += ", row " + strconv.Itoa(e.Row)
	}
	return s
}

// spellDays says from when to when, with the last day on which it is true.
func spellDays(s *finding.Spell) string {
	from := dayOr(s.From)
	switch {
	case !s.From.Known() && s.To.Known():
		return "until " + calendar.Date(s.To-1).String()
	case !s.From.Known():
		return from
	case !s.To.Known():
		return "since " + from
	case s.To-1 <= s.From:
		return from
	}
	return from + " to " + calendar.Date(s.To-1).String()
}

func dayOr(d calendar.Date) string {
	if !d.Known() {
		return "not known"
	}
	return d.String()
}
