package xlsx

import (
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// law lists the dated values of the bundles.
func law(r *finding.Report) table {
	return table{name: "Law", about: "every dated number of the bundles, with its paragraph and what it was checked against.",
		columns: []column{{"Bundle", 26}, {"Parameter", 28}, {"What it is", 50}, {"Value", 24}, {"In force from", 12}, {"No longer from", 12}, {"In force on the as-of day", 13}, {"Paragraph", 28}, {"How seen", 32}},
		rows:    len(r.Parameters), none: "The bundles have no parameters.",
		row: func(i int) []any {
			p := r.Parameters[i]
			return []any{p.Bundle, spaced(p.Name), phrase.Sentence(p.About), p.Value, dayOf(p.From), dayOf(p.To), yesNo(p.InForce), p.Cite, seenWords(p.Seen)}
		}}
}

// duties lists the duties of the bundles.
func duties(r *finding.Report) table {
	return table{name: "Duties", about: "what each duty of the bundles asks, with its paragraph.",
		columns: []column{{"Bundle", 26}, {"Duty", 28}, {"Title", 30}, {"What it asks", 56}, {"Paragraph", 26}, {"Topic", 13}, {"Falls on", 11}, {"Severity", 10}, {"Proven by", 22}, {"What to do if it is not fulfilled", 50}},
		rows:    len(r.Duties), none: "The bundles have no duties.",
		row: func(i int) []any {
			d := r.Duties[i]
			return []any{d.Bundle, d.ID, d.Title, phrase.Sentence(d.Description), d.Cite, d.Topic, d.Subject, d.Severity, spaced(strings.Join(d.Evidence, ", ")), phrase.Sentence(d.Remedy)}
		}}
}
