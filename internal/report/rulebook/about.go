package rulebook

import (
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/report/phrase"
)

// kinds says how a bundle of each kind binds.
var kinds = map[string]string{
	"law":      "law, which binds those to whom it is addressed and is enforced by an authority",
	"guidance": "guidance, by which an authority recommends a way to comply; it does not bind by itself",
	"practice": "practice, which a professional body or a standard recommends; it binds nobody unless a law, a contract or the employer says so",
	"company":  "company, a standard that a company sets for itself; a finding under it is no breach of the law",
}

// signatures says what is known of a bundle's signature.
var signatures = map[string]string{
	bundle.SignatureEmbedded:   "none is needed; the bundle is built into the program",
	bundle.SignatureVerified:   "it fits the key that was given",
	bundle.SignatureNotChecked: "there is one, but no key to check it with was given",
	bundle.SignatureNone:       "the bundle is not signed",
}

func (m *maker) head() []Row {
	a := &m.About
	where := a.Country
	if a.Region != "" {
		where += "-" + a.Region
	}
	kind, ok := kinds[a.Kind]
	if !ok {
		kind = a.Kind
	}
	return append(rows(
		row("Bundle", m.ID),
		row("Authority", a.Authority),
		row("Country", where),
		row("Kind", kind),
		row("Extends", with(strings.Join(m.Extends, ", "), "; what is asked there holds here, too, unless this bundle says otherwise")),
		row("Drops", with(strings.Join(a.Drops, ", "), "; asked by a bundle that is extended, but not here")),
		row("Judges from", a.InForce),
		row("Checked on", with(a.CheckedOn, ", the day on which it was last held against the text")),
		row("Shown as of", with(m.day.String(), "; the numbers are those in force on that day")),
		row("Revision", m.Revision),
	), m.rest(*a)...)
}

// with adds words to a text, unless there is none.
func with(s, words string) string {
	if s == "" {
		return ""
	}
	return s + words
}

func (m *maker) texts() Section {
	s := Section{Title: "The texts that it reads"}
	for _, t := range m.About.Instruments {
		s.Items = append(s.Items, t.Name+", "+t.Cite)
	}
	if m.About.SeenNote != "" {
		s.Notes = []string{"Which edition was read: " + phrase.Sentence(m.About.SeenNote)}
	}
	return s
}

func (m *maker) cautions() Section {
	s := Section{Title: "Cautions"}
	for _, c := range m.About.Cautions {
		s.Items = append(s.Items, phrase.Sentence(c))
	}
	return s
}

// looser tells where the bundle asks for less than those that it extends, as the loader found.
func (m *maker) looser() Section {
	s := Section{Title: "Where it may ask for less than a bundle that it extends", Doubt: true}
	for _, w := range m.Warnings {
		s.Items = append(s.Items, phrase.Sentence(w.Problem))
	}
	return s
}

func (m *maker) readings() Section {
	s := Section{Title: "What can be read in two ways, and how it is read here"}
	for _, r := range m.About.Readings {
		s.Items = append(s.Items, point(r.Point)+phrase.Sentence(r.Reading)+source(r.Source))
	}
	return s
}

// point writes the question that a reading answers, before the answer.
func point(s string) string { return strings.TrimRight(strings.TrimSpace(s), "?.:") + ": " }

func source(s string) string {
	if s == "" {
		return ""
	}
	return " (" + strings.TrimRight(strings.TrimSpace(s), ".") + ")"
}
