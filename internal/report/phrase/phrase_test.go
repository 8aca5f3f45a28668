package phrase

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

func TestClean(t *testing.T) {
	for text, want := range map[string]string{
		"":                   "",
		"K-1":                "K-1",
		"a\r\n\tb\u2028c\vd": "a   b c d",
		"a\x00b\x1b[31mc":    "a\uFFFDb\uFFFD[31mc",
		"a\u202Eb\u2066c":    "a\uFFFDb\uFFFDc",
		"a\xffb\uFFFFc":      "a\uFFFDb\uFFFDc",
		"作業者 é 🦻":            "作業者 é 🦻",
	} {
		assert.Equal(t, want, Clean(text), "%q", text)
	}
}

func TestSentence(t *testing.T) {
	for text, want := range map[string]string{
		"": "", "  ": "", "test now": "Test now.", "is it so?": "Is it so?", "Done.": "Done.", "école": "École.",
	} {
		assert.Equal(t, want, Sentence(text), "%q", text)
	}
}

func TestPlace(t *testing.T) {
	assert.Equal(t, "a.csv:7", Place("a.csv", "", 7))
	assert.Equal(t, "a.xlsx 2026!7", Place("a.xlsx", "2026", 7))
	assert.Equal(t, "a.xlsx 2026", Place("a.xlsx", "2026", 0))
	assert.Equal(t, "a.csv", Place("a.csv", "", 0))
	assert.Equal(t, "worker/7", Record(finding.Evidence{Record: "worker/7"}))
	assert.Equal(t, "audiogram/A a.csv:7", Record(finding.Evidence{Record: "audiogram/A", File: "a.csv", Row: 7}))
}

func TestFactsApartFromParameters(t *testing.T) {
	facts, parameters := Facts(map[string]any{
		"level_dba": 87.5, "counted_from": "2025-07-15",
		"interval": map[string]any{"value": map[string]any{"months": 12.0}, "cite": "(g)(6)", "seen": "text"},
		"variety":  map[string]any{"value": 2.0, "unit": "models", "seen": "memory"},
	})
	assert.Equal(t, "time counted from 2025-07-15; level 87.5 dBA", facts)
	assert.Equal(t, "interval 12 months (\u0028g)(6)); variety 2 models (not checked against the official text)", parameters)
}

func TestAccepted(t *testing.T) {
	a := &finding.Acceptance{Reason: "a van comes in August", ApprovedBy: "plant manager", Until: calendar.MustParse("2026-08-31")}
	assert.Equal(t, "Accepted by the employer until 2026-08-31, approved by plant manager: a van comes in August.", Accepted(a))
	assert.Equal(t, "Accepted by the employer.", Accepted(&finding.Acceptance{}))
}

func TestTitles(t *testing.T) {
	titles := TitlesOf(&finding.Report{Duties: []finding.Duty{{Bundle: "b", ID: "d", Title: "Title"}}})
	assert.Equal(t, "Title", titles.Of(&finding.Finding{Bundle: "b", Duty: "d"}))
	assert.Equal(t, "Annual audiogram", titles.Of(&finding.Finding{Bundle: "b", Duty: "annual-audiogram"}))
}
