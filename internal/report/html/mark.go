package html

import (
	"html/template"

	"hearduty/internal/finding"
)

// marks are the shapes of the statuses, drawn in a square of 16. A shape tells the status without its colour: full
// where something is wrong, half where it is open, a ring where time is running.
var marks = map[finding.Status]string{
	finding.Gap:      `<rect x="2" y="2" width="12" height="12"/>`,
	finding.Unproven: `<path d="M2 2h12v12H2z" class="line"/><path d="M2 14L14 2v12z"/>`,
	finding.Opinion:  `<path d="M8 1l7 7-7 7-7-7z" class="line"/><circle cx="8" cy="8" r="2.2"/>`,
	finding.Due:      `<circle cx="8" cy="8" r="6" class="line"/><path d="M8 4.2V8l2.8 1.8" class="line"/>`,
	finding.Late:     `<circle cx="8" cy="8" r="6" class="line"/><path d="M8 2a6 6 0 0 1 0 12z"/>`,
	finding.Lifted:   `<path d="M2 8h12" class="line"/>`,
	finding.Met:      `<path d="M2.5 8.5l3.6 3.8L13.5 4" class="line"/>`,
}

// mark gives the sign of a status. It is decoration: the word always stands beside it.
func mark(s finding.Status) template.HTML {
	return template.HTML(`<svg class="mark s-` + string(s) + `" viewBox="0 0 16 16" aria-hidden="true">` + marks[s] + `</svg>`)
}

// StatusWords says what each status means, in a few words.
var StatusWords = map[finding.Status]string{
	finding.Gap: "not fulfilled, or a condition fails", finding.Unproven: "records are missing or cannot decide",
	finding.Opinion: "a professional must judge", finding.Due: "time is still running",
	finding.Late: "fulfilled after its time", finding.Lifted: "an exception of the law", finding.Met: "fulfilled in time",
}
