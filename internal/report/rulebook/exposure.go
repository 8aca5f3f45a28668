package rulebook

import (
	"cmp"
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// figures says in words what a channel of the highest value takes.
var figures = map[string]string{
	dossier.PeakDBC:    "peak sound pressure level, C-weighted",
	dossier.PeakDBZ:    "peak sound pressure level, unweighted",
	dossier.MaxDBA:     "highest continuous sound level, A-weighted, slow",
	dossier.MaxDBCFast: "highest level of impact noise, C-weighted, fast",
	dossier.ImpulseDBZ: "highest level of impact noise by an unweighted impulse detector",
}

func (m *maker) exposure() Section {
	e := m.Measures.Exposure
	s := Section{Title: "How noise exposure is taken", Rows: rows(
		row("Several results", several(e)),
		row("Strategy", map[string]string{"job": "samples are taken over jobs (ISO 9612)", "full_day": "samples are taken over full days (ISO 9612)"}[e.Strategy]),
		row("Uncertain levels", uncertain(e)),
		Row{"Margins", m.margins()},
		row("Notices", m.noticeLasts()),
		row("Note", phrase.Sentence(e.Note)),
	)}
	s.Rows = append(s.Rows, m.rest(e)...)
	levels := Section{Title: fmt.Sprintf("Exposure levels (%d)", len(e.Levels))}
	for _, name := range slices.Sorted(maps.Keys(e.Levels)) {
		enrols := ""
		if name == e.Enrols {
			enrols = "whoever reaches it belongs in the program, and the duties for workers in the program begin"
		}
		levels.Entries = append(levels.Entries, Entry{Title: name, Rows: append(rows(
			row("Reached", m.reached(name, 0)),
			row("On what terms", m.terms(name)),
			row("What follows", enrols),
		), m.rest(e.Levels[name])...)})
	}
	channels := Section{Title: fmt.Sprintf("Ways in which exposure is expressed (%d)", len(e.Channels))}
	for _, name := range slices.Sorted(maps.Keys(e.Channels)) {
		channels.Entries = append(channels.Entries, m.channel(name, e.Channels[name]))
	}
	for _, part := range []Section{levels, channels} {
		if len(part.Entries) > 0 {
			s.Parts = append(s.Parts, part)
		}
	}
	return s
}

func several(e dossier.ExposureMeasures) string {
	switch e.Several {
	case "highest":
		return "where a group has several results since its latest change, the highest one counts"
	case "sampled":
		return "where a group has several results since its latest change, their mean counts, with the uncertainty of sampling"
	}
	return e.Several
}

func uncertain(e dossier.ExposureMeasures) string {
	if e.Decision == "" && e.Several != "sampled" {
		return ""
	}
	return otherwise(decisions, cmp.Or(e.Decision, "best"))
}

var decisions = map[string]string{
	"best":  "the best estimate of a level is compared with the limit",
	"upper": "the upper end of a level's uncertainty, L + U, is compared with the limit",
	"zones": "a level whose uncertainty, L − U to L + U, reaches over the limit decides nothing; it is unproven until more samples settle it",
}

func (m *maker) margins() []string {
	var out []string
	for _, class := range slices.Sorted(maps.Keys(m.Measures.Exposure.Margins)) {
		out = append(out, fmt.Sprintf("accuracy class %s: a level is raised by %s before it is compared", class, m.plain(m.Measures.Exposure.Margins[class])))
	}
	return out
}

func (m *maker) noticeLasts() string {
	name := m.Measures.Exposure.NoticeLasts
	if name == "" {
		return ""
	}
	return "a written notice of an exposure spares another one of an exposure at the same levels for " + m.plain(name)
}

// plain writes a parameter's value on the day with its name.
func (m *maker) plain(name string) string {
	p := m.Parameters[name]
	v, ok := p.At(m.day)
	if !ok {
		return fmt.Sprintf("%s (no value in force on %s)", name, m.day)
	}
	return amount(p, v) + " (" + name + ")"
}

// reached says what reaches an exposure level, such as a noise dose of at least 50 %.
func (m *maker) reached(name string, depth int) string {
	level, ok := m.Measures.Exposure.Levels[name]
	if !ok || depth > len(m.Measures.Exposure.Levels) {
		return "the level " + name
	}
	if len(level.Any) > 0 {
		var parts []string
		for _, other := range level.Any {
			if m.inForce(other) {
				parts = append(parts, m.reached(other, depth+1))
			}
		}
		if len(parts) > 0 {
			return strings.Join(parts, "; or ")
		}
		return fmt.Sprintf("what %s say, of which none has a value in force on %s", list(level.Any, "and"), m.day)
	}
	parameter, role := level.AtLeast, "at_least"
	if level.Above != "" {
		parameter, role = level.Above, "above"
	}
	s := what(m.Measures.Exposure.Channels[level.Channel]) + " of " + m.limit(role, parameter)
	if twa := m.average(level.Channel, parameter); twa != "" {
		s += ", an 8-hour average of " + strings.TrimSpace(roles[role]+" "+twa)
	}
	if level.Instead != nil {
		s += fmt.Sprintf(" (where the site elects %s: %s)", level.Instead.Choice, strings.TrimSuffix(what(m.Measures.Exposure.Channels[level.Instead.Channel]), ","))
	}
	return s
}

// inForce says whether the parameter of an exposure level has a value on the day.
func (m *maker) inForce(level string) bool {
	l := m.Measures.Exposure.Levels[level]
	_, ok := m.Parameters[cmp.Or(l.AtLeast, l.Above)].At(m.day)
	return ok || len(l.Any) > 0
}

// average gives the 8-hour average that a dose in percent stands for, as dosimeters state it.
func (m *maker) average(channel, parameter string) string {
	c := m.Measures.Exposure.Channels[channel]
	dose, ok := m.Number(parameter, m.day)
	if !ok || c.Kind != "" && c.Kind != dossier.DoseChannel {
		return ""
	}
	level, ok := acoustics.Scale{Criterion: c.CriterionDB, Exchange: c.ExchangeDB, Threshold: c.ThresholdDB}.TWAReported(dose)
	if !ok {
		return ""
	}
	return finding.Words(level) + " dBA"
}

// terms says how the level is compared: the channel, the parameter and its paragraph.
func (m *maker) terms(name string) string {
	level := m.Measures.Exposure.Levels[name]
	if len(level.Any) > 0 {
		return "one of the levels " + list(level.Any, "and") + " is enough; one whose parameter has no value on the day is left out, and a highest value that was not measured leaves it to the others, unless the noise holds impulses"
	}
	parameter, words := level.AtLeast, "reaches"
	if level.Above != "" {
		parameter, words = level.Above, "exceeds"
	}
	s := fmt.Sprintf("the value on the channel %s %s the parameter %s", level.Channel, words, parameter)
	if v, ok := m.Parameters[parameter].At(m.day); ok {
		s += ", " + v.Cite
		if v.Seen != "text" {
			s += ", " + seen(v.Seen)
		}
	}
	if level.Instead != nil {
		s += fmt.Sprintf("; where the site elects %s, the channel %s stands in", level.Instead.Choice, level.Instead.Channel)
	}
	return s
}

// what says in a few words what a channel expresses.
func what(c dossier.Channel) string {
	switch {
	case c.Kind == dossier.LevelChannel && c.Weekly:
		return "a noise exposure level of the week, L_EX,w,"
	case c.Kind == dossier.LevelChannel:
		return "a noise exposure level of the day, L_EX,8h,"
	case c.Kind == dossier.HighestChannel:
		return "a " + figure(c.Of) + ","
	}
	return "a noise dose"
}

func figure(of string) string {
	if words := figures[of]; words != "" {
		return words
	}
	return "highest " + spaced(of)
}

func (m *maker) channel(name string, c dossier.Channel) Entry {
	db := func(x float64, unit, more string) string {
		if x == 0 {
			return ""
		}
		return finding.Words(x) + " " + unit + more
	}
	kind := "a noise dose, in percent of what is permitted in a day"
	switch c.Kind {
	case dossier.LevelChannel:
		kind = "a level in dBA over a day of 8 hours by equal energy, L_EX,8h (3 dB more for twice the energy)"
		if c.Weekly {
			kind = "a level in dBA by equal energy, averaged over the week of five 8-hour days by the days worked, L_EX,w (3 dB more for twice the energy)"
		}
	case dossier.HighestChannel:
		kind = "the highest value on record: " + figure(c.Of)
	}
	var table []string
	for _, l := range c.Durations {
		table = append(table, finding.Words(l.DBA)+" dBA for "+finding.Words(l.Minutes)+" minutes")
	}
	return Entry{Title: name, Rows: append(rows(
		row("Expressed as", kind),
		row("Criterion level", db(c.CriterionDB, "dBA", " for 8 hours is a dose of 100 %")),
		row("Exchange rate", db(c.ExchangeDB, "dB", " more halves the time that is permitted")),
		row("Threshold", db(c.ThresholdDB, "dBA", "; lower levels do not count")),
		row("Range up to", db(c.UpperDB, "dBA", "")),
		row("Permitted in a day", with(strings.Join(table, ", "), "; a level between two rows takes the higher one (used where the day is described by tasks)")),
		row("Paragraph", c.Cite),
	), m.rest(c)...)}
}
