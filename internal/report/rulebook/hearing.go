package rulebook

import (
	"fmt"
	"maps"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
)

func (m *maker) hearing() Section {
	h := m.Measures.Hearing
	s := Section{Title: "How hearing tests are compared"}
	s.Rows = rows(
		row("Tested frequencies", hertz(h.Required, "and")),
		row("May review tests and revise baselines", professions(h.Professionals)),
		row("Whose finding lifts the follow-up of a shift", professions(h.Physicians)),
		row("Whose finding lifts the entry in the log", professions(h.Licensed)),
	)
	if h.Shift.Rule == "" {
		s.Notes = []string{"The bundle knows no threshold shift by which a worker's tests are compared with a baseline."}
	} else {
		s.Entries = append(s.Entries, m.scheme("The threshold shift", h.Shift.Scheme, row("Retest", m.retest(h.Shift.Retest))))
	}
	for _, other := range h.Others {
		s.Entries = append(s.Entries, m.scheme("Also judged: "+spaced(other.Name), other))
	}
	if h.Recordable != nil {
		s.Entries = append(s.Entries, Entry{Title: "The level of the recording rule", Rows: rows(
			row("Shown when", m.recordable()),
		)})
	}
	if a := h.AgeCorrection; a != nil {
		s.Entries = append(s.Entries, Entry{Title: "Correction for age", Rows: rows(
			row("Applied where", "the site elects "+a.Choice),
			row("How", "what age alone explains between baseline and test, by the table of the law, is taken off the later test: "+ageTable(&a.AgeTable)),
			row("Paragraph", a.Cite),
		)})
	}
	if h.Afterwards {
		s.Rows = append(s.Rows, row("After a test", "all that was done and told after each test is looked at"))
	}
	return s
}

func (m *maker) retest(parameter string) string {
	if parameter == "" {
		return ""
	}
	return "one " + m.limit("within", parameter) + " of the test may stand in for it (" + parameter + ")"
}

// scheme tells one scheme by which hearing tests are judged.
func (m *maker) scheme(title string, s audiometry.Scheme, more ...Row) Entry {
	compared := ""
	if s.Of == "" || s.Of == audiometry.OfChange {
		compared = baselines[s.Baseline]
	}
	confirm := ""
	if s.Confirm {
		confirm = "it counts only once a second test shows it in the same ear at the same frequency"
	}
	return Entry{Title: title, Rows: append(rows(
		row("Shown when", m.shown(s)),
		row("Compared with", compared),
		row("Confirmation", confirm),
		row("Paragraph", s.Cite),
	), rows(more...)...)}
}

// shown says when a test shows what a scheme looks for.
func (m *maker) shown(s audiometry.Scheme) string {
	parameter, role := s.AtLeast, "at_least"
	if s.Above != "" {
		parameter, role = s.Above, "above"
	}
	amount := m.limit(role, parameter)
	what := map[string]string{
		audiometry.OfLevel: "the hearing level of an ear",
		audiometry.OfEars:  "the difference between the ears in one test",
	}[s.Of]
	if what == "" {
		what = "the worsening of an ear against its baseline"
	}
	how := map[string]string{
		audiometry.Mean:     "averaged over " + hertz(s.Frequencies, "and") + ", is " + amount,
		audiometry.Any:      "at any one of " + hertz(s.Frequencies, "or") + ", is " + amount,
		audiometry.Adjacent: "at two neighbours of " + hertz(s.Frequencies, "and") + ", is " + amount + " at both",
		audiometry.Total:    "added up over " + hertz(s.Frequencies, "and") + ", is " + amount,
	}[s.Rule]
	if len(s.Frequencies) == 1 {
		how = "at " + hertz(s.Frequencies, "and") + ", is " + amount
	}
	if how == "" {
		how = "by the rule " + s.Rule + " over " + hertz(s.Frequencies, "and") + ", is " + amount
	}
	return what + ", " + how + " (" + parameter + ")"
}

// recordable says when a test meets the numbers of the recording rule.
func (m *maker) recordable() string {
	name := m.Measures.Hearing.Recordable.AtLeast
	return "the average hearing level of the ear with the shift, over the frequencies of the shift, is " + m.limit("at_least", name) + " (" + name + "), without any correction for age"
}

var baselines = map[string]string{
	"":         "the baseline in force: the first valid one, or what a professional put in its place",
	"standing": "the baseline in force: the first valid one, or what a professional put in its place",
	"original": "the first valid baseline, whatever was revised later",
	"improved": "the first valid baseline, or a later one that was put in its place because hearing had improved",
	"previous": "the test before",
}

func ageTable(t *audiometry.AgeTable) string {
	sexes := slices.Sorted(maps.Keys(t.Values))
	if len(sexes) == 0 {
		return "no table"
	}
	frequencies := slices.Sorted(maps.Keys(t.Values[sexes[0]]))
	last := t.FromAge
	if len(frequencies) > 0 {
		last += len(t.Values[sexes[0]][frequencies[0]]) - 1
	}
	return fmt.Sprintf("values for %s, from age %d to %d in steps of a year, at %s", list(sexes, "and"), t.FromAge, last, hertz(frequencies, "and"))
}

func hertz(frequencies []int, last string) string {
	if len(frequencies) == 0 {
		return ""
	}
	words := make([]string, len(frequencies))
	for i, hz := range frequencies {
		words[i] = strconv.Itoa(hz)
	}
	return list(words, last) + " Hz"
}

func professions(words []string) string {
	out := make([]string, len(words))
	for i, w := range words {
		out[i] = spaced(w)
	}
	return strings.Join(out, ", ")
}
