package rulebook

import (
	"cmp"
	"fmt"
	"maps"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
)

func (m *maker) hearing() Section {
	h := m.Measures.Hearing
	s := Section{Title: "How hearing tests are compared"}
	s.Rows = rows(
		row("Tested frequencies", cmp.Or(hertz(h.Required, "and"), "the bundle names none that each test must hold")),
		row("Professionals who may review tests and revise baselines", professions(h.Professionals)),
		row("Physicians whose finding lifts the follow-up of a shift", professions(h.Physicians)),
		row("Licensed professionals whose finding lifts an entry in the log", professions(h.Licensed)),
	)
	if h.Shift.Rule == "" {
		s.Notes = []string{"The bundle knows no threshold shift by which a worker's tests are compared with a baseline."}
	} else {
		s.Entries = append(s.Entries, m.scheme("The threshold shift", h.Shift.Scheme, append(rows(row("Retest", m.retest(&h.Shift))), m.rest(h.Shift)...)...))
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
			row("How", "what age alone explains between baseline and test, by the table of the law, is taken off the later test; a younger age has the first value of the table, an older one the last: "+ageTable(&a.AgeTable)),
			row("Paragraph", a.Cite),
		)})
	}
	if a := h.AgeCorrection; a != nil {
		for _, sex := range slices.Sorted(maps.Keys(a.Values)) {
			s.Parts = append(s.Parts, Section{Title: "Correction for age, " + sex + ": dB by age in years and frequency in Hz", Table: ages(a.FromAge, a.Values[sex])})
		}
	}
	if h.Afterwards {
		s.Rows = append(s.Rows, row("After a test", "all that was done and told after each test is looked at"))
	}
	s.Rows = append(s.Rows, m.rest(h)...)
	return s
}

func (m *maker) retest(s *dossier.ShiftMeasure) string {
	if s.Retest == "" {
		return ""
	}
	which, from, comma := "one ", "the test", ""
	if s.RetestOnce {
		which, comma = "the first one only, ", ","
	}
	if s.RetestFrom == "received" {
		from = "the day on which the employer received its result"
	}
	return which + m.limit("within", s.Retest) + " of " + from + comma + " may stand in for the test (" + s.Retest + ")"
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
	), append(m.rest(s), more...)...)}
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
		audiometry.Peak:     "at any one of " + hertz(s.Frequencies, "or") + ", is " + amount + " and higher than at all of " + hertz(s.Over, "and"),
		audiometry.Total:    "added up over " + hertz(s.Frequencies, "and") + ", is " + amount,
	}[s.Rule]
	if len(s.Frequencies) == 1 && s.Rule != audiometry.Peak {
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
	"":         "the baseline in force, which is the first valid one or what a professional put in its place",
	"standing": "the baseline in force, which is the first valid one or what a professional put in its place",
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
	return fmt.Sprintf("values for %s, from age %d to %d in steps of a year, at %s; they stand below", list(sexes, "and"), t.FromAge, last, hertz(frequencies, "and"))
}

// ages writes the values of one sex as a table, one row a year of age.
func ages(from int, values map[int][]int) Table {
	t := Table{Figures: true, Columns: []Column{{"Age", ""}}}
	frequencies := slices.Sorted(maps.Keys(values))
	years := 0
	for _, hz := range frequencies {
		t.Columns = append(t.Columns, Column{strconv.Itoa(hz), ""})
		years = max(years, len(values[hz]))
	}
	for i := range years {
		cells := []string{strconv.Itoa(from + i)}
		for _, hz := range frequencies {
			cell := ""
			if i < len(values[hz]) {
				cell = strconv.Itoa(values[hz][i])
			}
			cells = append(cells, cell)
		}
		t.Rows = append(t.Rows, cells)
	}
	return t
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
