package rulebook

import (
	"encoding/json"
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/report/phrase"
)

func (m *maker) parameters() Section {
	users := m.users()
	s := Section{
		Title: fmt.Sprintf("Numbers, times and lists in force on %s (%d)", m.day, len(m.Parameters)),
		Table: Table{Columns: []Column{{"Parameter", ""}, {"In force", ""}, {"What it is", ""}, {"Since", "In force since "}, {"Paragraph", "By "}, {"How it was seen", ""}, {"On other days", "On other days: "}, {"Stricter is", "Stricter is "}, {"Used by", "Used by "}, {"Comes from", "Comes from "}}},
	}
	for _, name := range slices.Sorted(maps.Keys(m.Parameters)) {
		p := m.Parameters[name]
		value, since, cite, how := "no value is in force; what rests on it is unproven", "", "", ""
		now, ok := p.At(m.day)
		if ok {
			value, since, cite, how = amount(p, now), now.From, now.Cite, upper(seen(now.Seen))
		}
		used := "no duty; it is told for the reader"
		if len(users[name]) > 0 {
			used = strings.Join(users[name], ", ")
		}
		stricter := map[string]string{"lower": "a lower value", "higher": "a higher value"}[p.Stricter]
		s.Table.Rows = append(s.Table.Rows, []string{name, value, phrase.Sentence(p.About), since, cite, how, otherDays(p, now), stricter, used, m.origin("parameters", name)})
	}
	s.Table = s.Table.pruned()
	return s
}

// otherDays tells the values of a parameter that hold on other days than the one in force, with their citations.
func otherDays(p bundle.Parameter, now *bundle.Value) string {
	var out []string
	for i := range p.Values {
		v := &p.Values[i]
		end := v.To
		if end == "" && i+1 < len(p.Values) {
			end = p.Values[i+1].From
		}
		if v == now {
			if end != "" && (i+1 == len(p.Values) || p.Values[i+1].From != end) {
				out = append(out, "none from "+end)
			}
			continue
		}
		span := "from " + v.From
		if last, err := calendar.Parse(end); err == nil && end != "" {
			span += " to " + last.AddDays(-1).String()
		}
		out = append(out, fmt.Sprintf("%s: %s (%s; %s)", span, amount(p, v), v.Cite, seen(v.Seen)))
	}
	return strings.Join(out, "; ")
}

// users lists by parameter what names it: duties, and parts of the measures.
func (m *maker) users() map[string][]string {
	out := map[string][]string{}
	for _, d := range m.Duties {
		for _, u := range m.rules[d.ID].uses(m.Parameters) {
			if !slices.Contains(out[u.name], d.ID) {
				out[u.name] = append(out[u.name], d.ID)
			}
		}
	}
	for name, what := range m.measured() {
		out[name] = append(out[name], what...)
	}
	return out
}

// measured lists by parameter the parts of the measures that name it.
func (m *maker) measured() map[string][]string {
	out := map[string][]string{}
	put := func(name, what string) {
		if name != "" {
			out[name] = append(out[name], what)
		}
	}
	e, h, p := m.Measures.Exposure, m.Measures.Hearing, m.Measures.Protection
	for _, name := range slices.Sorted(maps.Keys(e.Levels)) {
		put(e.Levels[name].AtLeast, "the exposure level "+name)
		put(e.Levels[name].Above, "the exposure level "+name)
	}
	for _, class := range slices.Sorted(maps.Keys(e.Margins)) {
		put(e.Margins[class], "the margin of accuracy class "+class)
	}
	put(h.Shift.Parameter(), "the threshold shift")
	put(h.Shift.Retest, "the retest after a shift")
	for _, s := range h.Others {
		put(s.Parameter(), "the comparison "+spaced(s.Name))
	}
	if h.Recordable != nil {
		put(h.Recordable.AtLeast, "the recording rule")
	}
	put(p.RealWorld, "the rating of protectors")
	for _, kind := range slices.Sorted(maps.Keys(p.RealWorldByType)) {
		put(p.RealWorldByType[kind], "the rating of protectors of the type "+spaced(kind))
	}
	put(p.Bands, "the grading of protection")
	for _, name := range []string{m.Measures.Documents.PostedFor, m.Measures.Documents.Every, m.Measures.Documents.Short} {
		put(name, "the time for which documents hold")
	}
	put(e.NoticeLasts, "the time for which a notice holds")
	text, _ := json.Marshal(m.Measures)
	for name := range m.Parameters { // named in a part of the measures that is not known here
		if out[name] == nil && strings.Contains(string(text), `:"`+name+`"`) {
			put(name, "the measures")
		}
	}
	return out
}

func (m *maker) choices() Section {
	s := Section{Title: "What the employer may elect, site by site, in the program file"}
	for _, name := range slices.Sorted(maps.Keys(m.Choices)) {
		c := m.Choices[name]
		values := make([]string, len(c.Values))
		for i, v := range c.Values {
			values[i] = elected(v)
		}
		readers := []string{}
		for _, d := range m.Duties {
			if slices.Contains(m.rules[d.ID].choices, name) {
				readers = append(readers, d.ID)
			}
		}
		if a := m.Measures.Hearing.AgeCorrection; a != nil && a.Choice == name {
			readers = append(readers, "the comparison of hearing tests")
		}
		s.Entries = append(s.Entries, Entry{Title: upper(spaced(name)) + " (" + name + ")", Rows: rows(
			row("What", phrase.Sentence(c.About)),
			row("Can be", list(values, "or")),
			row("Unless set", elected(c.Default)),
			row("Paragraph", c.Cite),
			row("Bears on", strings.Join(readers, ", ")),
		)})
	}
	return s
}

// elected writes what a choice can be as the program file has it, behind a word for true and false.
func elected(v any) string {
	switch v {
	case true:
		return "yes (true)"
	case false:
		return "no (false)"
	}
	return fmt.Sprint(v)
}
