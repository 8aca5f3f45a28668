package rulebook

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/report/phrase"
)

func (m *maker) paragraphs() Section {
	checked := m.accounted("Checked by duties", Column{"Duties", "Checked by "}, func(p bundle.Paragraph) string { return strings.Join(p.Checked, ", ") })
	attested := m.accounted("Attested by documents", Column{"Document", "Attested by "}, func(p bundle.Paragraph) string { return p.Attested })
	outside := m.accounted("Outside what is judged, and why", Column{"Outside", "Outside "}, func(p bundle.Paragraph) string { return p.Outside })
	s := Section{
		Title: fmt.Sprintf("Paragraphs accounted for (%d)", len(m.Paragraphs)),
		Notes: []string{fmt.Sprintf("Paragraphs in all: %d. Checked by duties: %d. Attested by documents: %d. Outside what is judged: %d.",
			len(m.Paragraphs), len(checked.Table.Rows), len(attested.Table.Rows), len(outside.Table.Rows))},
	}
	for _, part := range []Section{checked, attested, outside} {
		if !part.empty() {
			s.Parts = append(s.Parts, part)
		}
	}
	return s
}

// accounted lists the paragraphs that are accounted for in one way.
func (m *maker) accounted(title string, column Column, how func(bundle.Paragraph) string) Section {
	s := Section{Table: Table{Columns: []Column{{"Paragraph", ""}, {"What it asks", ""}, column, {"Comes from", "Comes from "}}}}
	for _, name := range slices.SortedFunc(maps.Keys(m.Paragraphs), naturally) {
		p := m.Paragraphs[name]
		if words := how(p); words != "" {
			s.Table.Rows = append(s.Table.Rows, []string{name, phrase.Sentence(p.Says), words, m.origin("paragraphs", name)})
		}
	}
	s.Table = s.Table.pruned()
	s.Title = fmt.Sprintf("%s (%d)", title, len(s.Table.Rows))
	return s
}

// doubts lists what was not read in the official text.
func (m *maker) doubts() Section {
	var items []string
	for _, name := range slices.Sorted(maps.Keys(m.Parameters)) {
		p := m.Parameters[name]
		now, _ := p.At(m.day)
		for i := range p.Values {
			v := &p.Values[i]
			if v.Seen == "text" {
				continue
			}
			when := "in force from " + v.From
			if v != now {
				when += ", not on " + m.day.String()
			}
			items = append(items, fmt.Sprintf("The parameter %s, %s (%s; %s): %s.", name, amount(p, v), v.Cite, when, seen(v.Seen)))
		}
	}
	for _, r := range m.About.Readings {
		if doubtful(r.Reading + " " + r.Source) {
			items = append(items, "The reading "+point(r.Point)+phrase.Sentence(r.Reading)+source(r.Source))
		}
	}
	if doubtful(m.About.SeenNote) {
		items = append(items, "The note on the edition: "+phrase.Sentence(m.About.SeenNote))
	}
	for _, c := range m.About.Cautions {
		if doubtful(c) {
			items = append(items, "The caution: "+phrase.Sentence(c))
		}
	}
	for _, name := range slices.SortedFunc(maps.Keys(m.Paragraphs), naturally) {
		if p := m.Paragraphs[name]; doubtful(p.Says + " " + p.Attested + " " + p.Outside) {
			items = append(items, "What is said of the paragraph "+name)
		}
	}
	s := Section{Title: fmt.Sprintf("What rests on memory or on a secondary source (%d)", len(items)), Doubt: true, Items: items}
	if len(items) == 0 {
		s.Notes = []string{"Nothing: every number was read in the official text, and no reading says that it rests on memory."}
	}
	return s
}

func doubtful(s string) bool {
	s = strings.ToLower(s)
	for _, word := range []string{"memory", "secondary source", "has not been read", "was not read", "not checked"} {
		if strings.Contains(s, word) {
			return true
		}
	}
	return false
}
