package rulebook

import (
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

var ratings = map[string]string{
	"nrr":    "the noise reduction rating of the label (NRR), less 7 dB where the level is A-weighted",
	"snr":    "the single number rating (SNR), taken off the C-weighted level",
	"hml":    "the ratings for high, medium and low frequencies (HML)",
	"octave": "the attenuation in octave bands, as the laboratory measured it",
	"slc80":  "the sound level conversion (SLC80), taken off the C-weighted level",
}

var deratings = map[string]string{
	"niosh": "the rating is cut to 75 % for muffs, 50 % for formable plugs and 30 % for other plugs",
	"csa":   "the rating is cut to 70 % for muffs and 50 % for plugs",
}

func (m *maker) protection() Section {
	p := m.Measures.Protection
	s := Section{Title: "How protectors are rated"}
	if p.Rating == "" {
		s.Notes = []string{"The bundle names no method: the level under a protector is not estimated."}
		return s
	}
	s.Rows = rows(
		row("By", otherwise(ratings, p.Rating)),
		row("What is lowered", "the 8-hour level on the channel "+p.Channel),
		row("Cut for use at work", otherwise(deratings, p.Derating)),
	)
	if p.Percent != 0 {
		s.Rows = append(s.Rows, row("Wearers", "attenuation that "+finding.Words(p.Percent)+" % of wearers reach is assumed"))
	}
	var outside []string
	for _, kind := range slices.Sorted(maps.Keys(p.RealWorldByType)) {
		outside = append(outside, spaced(kind)+": "+m.plain(p.RealWorldByType[kind])+" are added to the level at the ear")
	}
	switch {
	case p.RealWorld != "" && len(outside) > 0:
		outside = append(outside, "any other type: "+m.plain(p.RealWorld)+" are added to the level at the ear")
	case p.RealWorld != "":
		outside = []string{m.plain(p.RealWorld) + " are added to the level at the ear"}
	}
	s.Rows = append(s.Rows, rows(Row{"Use outside the laboratory", outside})...)
	if p.Bands != "" {
		s.Rows = append(s.Rows, row("Too little or too much", "the level at the ear is graded against the action level of "+m.plain(p.Bands)))
	}
	s.Rows = append(s.Rows, m.rest(p)...)
	return s
}

// otherwise gives the words for a word, or the word itself.
func otherwise(words map[string]string, word string) string {
	if s := words[word]; s != "" {
		return s
	}
	return spaced(word)
}

// otherMeasures tells how training adds up, how long documents hold and which days are working days.
func (m *maker) otherMeasures() Section {
	s := Section{Title: "Training, documents and working days"}
	if t := m.Measures.Training.TopicsOver; t.Count > 0 {
		s.Rows = append(s.Rows, row("Training", "the topics of sessions add up over "+t.String()+" before the latest one"))
	}
	s.Rows = append(append(s.Rows, m.rest(m.Measures.Training)...), m.documents()...)
	s.Rows = append(s.Rows, m.rest(m.Measures)...)
	w := m.Measures.WorkingDays
	if w == nil {
		return s
	}
	holidays := make([]string, len(w.Holidays))
	for i, h := range w.Holidays {
		holidays[i] = strings.TrimSpace(h.Date + " " + h.Name)
	}
	s.Rows = append(s.Rows, rows(
		row("Days of rest", strings.Join(w.Rest, ", ")),
		row("Holidays", strings.Join(holidays, ", ")),
		row("Known until", with(w.KnownUntil, "; a time in working days that reaches further is unproven")),
		row("Paragraph", w.Cite),
	)...)
	if len(w.Holidays) == 0 {
		s.Rows = append(s.Rows, row("Holidays", fmt.Sprintf("none are listed up to %s", w.KnownUntil)))
	}
	s.Rows = append(s.Rows, m.rest(*w)...)
	return s
}

// documents tells how long what documents attest holds.
func (m *maker) documents() []Row {
	d := m.Measures.Documents
	posted, period, short := "", "", ""
	if d.PostedFor != "" {
		posted = "a report stays posted for " + m.plain(d.PostedFor)
	}
	if d.Periodic != "" {
		period = "a document of the kind " + d.Periodic + " begins a period"
	}
	if d.Every != "" {
		period += " of " + m.plain(d.Every) + ", at whose end the next one is due"
	}
	if d.Short != "" {
		short = "a period that ends sooner than " + m.plain(d.Short) + " after a change is short"
	}
	return append(rows(row("Posting", posted), row("Periods", period), row("Short periods", short)), m.rest(d)...)
}
