package rulebook

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/report/phrase"
)

// subjects says in plain words whom or what a duty is about.
var subjects = map[string]string{
	"worker":     "the employer, for each worker",
	"group":      "the employer, for each group of workers whose exposure is alike",
	"area":       "the employer, for each area of the workplace",
	"site":       "the employer, for each site",
	"instrument": "the employer, for each instrument: sound level meter, dosimeter, calibrator or audiometer",
	"room":       "the employer, for each room in which hearing is tested",
	"tester":     "the employer, for each person who tests hearing",
}

// evidence says in plain words what the records of a kind are.
var evidence = map[string]string{
	"worker": "personnel list", "assignment": "assignments of workers to groups", "group": "groups of workers whose exposure is alike",
	"measurement": "noise measurements", "task": "noise of tasks", "change": "changes of process, equipment or controls",
	"notice": "notices to workers", "audiogram": "hearing tests", "follow_up": "follow-ups of hearing tests",
	"training": "training sessions", "protector": "models of protectors with their ratings", "protector_issue": "protectors handed over",
	"fit_test": "fit tests", "wear_check": "checks of whether protectors are worn", "instrument": "instruments",
	"calibration": "calibrations and checks", "room_survey": "surveys of test rooms", "tester": "people who test hearing",
	"document": "documents", "control": "noise controls", "examination": "hearing tests and health appointments that were offered",
}

func (m *maker) duties() Section {
	s := Section{
		Title: fmt.Sprintf("Duties (%d)", len(m.Duties)),
		Notes: []string{"Each duty is judged for each worker, group, area, site, instrument, room or tester by itself. Where the records do not suffice to decide, it is unproven; it is never passed over."},
	}
	for _, d := range m.Duties {
		title := phrase.Sentence(strings.ReplaceAll(d.Topic, "test-quality", "test quality"))
		title = strings.TrimSuffix(title, ".")
		if len(s.Parts) == 0 || s.Parts[len(s.Parts)-1].Title != title {
			s.Parts = append(s.Parts, Section{Title: title})
		}
		part := &s.Parts[len(s.Parts)-1]
		part.Entries = append(part.Entries, m.duty(d))
	}
	return s
}

func (m *maker) duty(d *bundle.Duty) Entry {
	r := m.rules[d.ID]
	who, ok := subjects[d.Subject]
	if !ok {
		who = "the employer, for each " + d.Subject
	}
	proof := []string{}
	for _, kind := range d.Evidence {
		words, ok := evidence[kind]
		if !ok {
			words = spaced(kind)
		}
		proof = append(proof, words)
	}
	from := ""
	if d.From != "" && d.From != m.ID {
		from = d.From + ", which this bundle extends"
	}
	return Entry{Title: d.Title + " (" + d.ID + ")", Rows: rows(
		row("Asked", phrase.Sentence(d.Description)),
		row("Of whom", who),
		Row{"At which exposure", m.exposureOf(r)},
		Row{"At which loss of hearing", m.lossOf(r)},
		Row{"When and how much", m.when(d, r)},
		row("Paragraph", d.Cite),
		Row{"Not asked where", r.quiet},
		Row{"Lifted where", r.lifted},
		Row{"Left to a professional", r.questions},
		Row{"Depends on a choice", r.choices},
		row("Proven by", strings.Join(proof, "; ")),
		row("Severity", d.Severity),
		row("If it is not met", phrase.Sentence(d.Remedy)),
		row("Comes from", from),
	)}
}

// when tells the times and limits of a duty, as they are in force on the day.
func (m *maker) when(d *bundle.Duty, r *rule) []string {
	if r.err != nil {
		return []string{"its rule cannot be read: " + r.err.Error()}
	}
	var out []string
	for _, u := range r.uses(m.Parameters) {
		out = append(out, m.used(u, d.Cite))
	}
	if len(out) == 0 {
		out = []string{"no time and no limit of its own; see what is asked"}
	}
	return out
}

// exposureOf tells the exposure levels at which a duty begins or changes.
func (m *maker) exposureOf(r *rule) []string {
	var out []string
	enrols := m.Measures.Exposure.Enrols
	if r.enrolled && !slices.Contains(r.levels, enrols) {
		out = append(out, "the program begins at "+m.reached(enrols, 0)+" (exposure level "+enrols+")")
	}
	for _, level := range r.levels {
		out = append(out, m.reached(level, 0)+" (exposure level "+level+")")
	}
	return out
}

// lossOf tells the changes of hearing at which a duty begins.
func (m *maker) lossOf(r *rule) []string {
	var out []string
	if shift := m.Measures.Hearing.Shift.Scheme; r.shifts && shift.Rule != "" {
		out = append(out, "a threshold shift, that is when "+m.shown(shift))
	}
	if r.recorded && m.Measures.Hearing.Recordable != nil {
		out = append(out, "a shift that meets the recording rule, that is when "+m.recordable())
	}
	return out
}

// used tells one parameter that a duty names.
func (m *maker) used(u use, cite string) string {
	p := m.Parameters[u.name]
	v, ok := p.At(m.day)
	if !ok {
		return fmt.Sprintf("no value of %s is in force on %s, so the duty is unproven: %s", u.name, m.day, lower(p.About))
	}
	notes := []string{u.name}
	if v.Cite != cite {
		notes = append(notes, v.Cite)
	}
	if v.Seen != "text" {
		notes = append(notes, seen(v.Seen))
	}
	return bound(u.role, p, v) + ": " + lower(p.About) + " (" + strings.Join(notes, "; ") + ")"
}
