package text

import (
	"bytes"
	"strings"
	"testing"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/report/rulebook"
)

var duty = &bundle.Duty{
	ID: "annual-audiogram", Package: "annual_audiogram", Title: "Annual audiogram", Description: "Every enrolled worker is tested again at least once a year.",
	Cite: "29 CFR 1910.95(g)(6)", Subject: "worker", Topic: "audiometry", Severity: "major", Remedy: "Test the worker now.",
	File: "duty/annual_audiogram/annual_audiogram.rego",
	Text: "# METADATA\n# title: Annual audiogram\npackage duty.annual_audiogram\n\nimport rego.v2\n\nobligations contains {\"every\": \"audiogram_interval\"} if {\n\tsome spell in input.enrolled\n}\n",
}

var law = &bundle.Bundle{
	ID: "xx-law", Revision: "7", SHA256: "abc", Duties: []*bundle.Duty{duty},
	About: bundle.About{
		ID: "xx-law", Title: "A law", Authority: "An authority", Country: "XX", Kind: "law", InForce: "1983-04-07", CheckedOn: "2026-12-01",
		Instruments: []bundle.Instrument{{Name: "The act", Cite: "Act 1"}}, Cautions: []string{"One reading of the law"},
		Readings: []bundle.Reading{{Point: "What is a year?", Reading: "Twelve months", Source: "a letter"}},
	},
	Parameters: map[string]bundle.Parameter{
		"audiogram_interval": {About: "Longest time between two tests", Values: []bundle.Value{{From: "1983-04-07", Value: map[string]any{"months": 12.0}, Cite: "(g)(6)", Seen: "text"}}},
		"protector_variety":  {About: "Number of models", Unit: "models", Values: []bundle.Value{{From: "1983-04-07", Value: 2.0, Cite: "(i)(3)", Seen: "memory"}}},
		"never":              {About: "Has no value yet"},
	},
	Choices:    map[string]bundle.Choice{"annual": {About: "What annually means", Values: []any{"twelve_months", "calendar_year"}, Default: "twelve_months", Cite: "(g)(6)"}},
	Paragraphs: map[string]bundle.Paragraph{"(g)(10)": {Says: "shift", Outside: "because it is a definition"}, "(g)(6)": {Says: "a test a year", Checked: []string{"annual-audiogram"}}, "(e)": {Says: "observe", Attested: "a document"}},
}

func TestBook(t *testing.T) {
	var b bytes.Buffer
	if err := Book(&b, rulebook.Of(law, calendar.MustParse("2026-06-30")), Format{}); err != nil {
		t.Fatal(err)
	}
	got := b.String()
	for _, want := range []string{
		"A law\n\nBundle: xx-law\n", "\nCountry: XX\n", "- The act, Act 1\n", "Duties (1)\n----------\n", "\nAudiometry\n\n  Annual audiogram (annual-audiogram)\n    Asked: Every enrolled worker is tested",
		"    When and how much: at least every 12 months: longest time between two\n      tests (audiogram_interval; (g)(6))\n", "  audiogram_interval: 12 months\n    Longest time between two tests. In force since 1983-04-07. By (g)(6). Read\n    in the official text. Used by annual-audiogram.\n",
		"- The parameter protector_variety, 2 models ((i)(3); in force from 1983-04-07):\n", "  never: no value is in force; what rests on it is unproven\n",
		"    Can be: twelve_months or calendar_year\n    Unless set: twelve_months\n    Paragraph: (g)(6)\n", "- What is a year: Twelve months. (a letter)\n",
		"    Attested by a document.\n", "    Outside because it is a definition.\n",
	} {
		if !strings.Contains(got, want) {
			t.Errorf("the book lacks %q:\n%s", want, got)
		}
	}
}

func TestLibrary(t *testing.T) {
	var b bytes.Buffer
	heads := []*bundle.Head{{ID: "xx-law", Revision: "7", About: law.About, Duties: 1}, {ID: "own", Revision: "8", About: law.About, Duties: 2, Place: "rules/own", Signature: bundle.SignatureNotChecked}}
	if err := Library(&b, heads, Format{}); err != nil {
		t.Fatal(err)
	}
	want := "xx-law\n  A law.\n  Law, 1 duty, revision 7, last held against the text on 2026-12-01.\n\n" +
		"own\n  A law.\n  Law, 2 duties, revision 8, last held against the text on 2026-12-01.\n  Read from rules/own. Not embedded, signature not checked.\n"
	if b.String() != want {
		t.Errorf("want\n%s\ngot\n%s", want, &b)
	}
}

func TestExplain(t *testing.T) {
	day := calendar.MustParse
	e := &judge.Explanation{
		Finding: finding.Finding{
			ID: "f-0123456789abcdef", Site: "kiln-hill", Bundle: "xx-law", Duty: "annual-audiogram", Topic: "audiometry",
			Subject: finding.Subject{Kind: "worker", ID: "000123"}, Status: finding.Gap, Severity: "major", Due: day("2026-03-05"), DaysOver: 117,
			Message: "no valid audiogram since 2025-03-05", Remedy: "Test the worker now.",
			Facts: map[string]any{
				"audiogram_interval": map[string]any{"value": map[string]any{"months": 12.0}, "unit": "", "cite": "(g)(6)", "seen": "text"},
				"working":            "100 * (3.2 / 8 + 2 / 4) = 90 %", "dose_pct": 90.0, "known": true, "topics": []any{"a", "b"}, "none": nil,
			},
		},
		Duty: duty, Bundle: law, AsOf: day("2026-06-30"), ProgramName: "Harrow & Slate",
		Parameters: []judge.UsedParameter{{Name: "audiogram_interval", About: "Longest time between two tests", Value: "12 months", Cite: "(g)(6)", Seen: "memory", From: "1983-04-07"}},
		Records: []judge.ShownRecord{{
			Evidence: finding.Evidence{Record: "audiogram/A-0412", File: "records/audiograms.csv", Row: 118},
			Fields:   [][2]string{{"audiogram_id", "A-0412"}, {"date", "2025-03-05"}},
		}},
		Obligation: "{\n  \"every\": \"audiogram_interval\"\n}",
	}
	const want = `f-0123456789abcdef: annual-audiogram, gap
worker 000123 at site kiln-hill of Harrow & Slate, as of 2026-06-30

What the duty asks
  Annual audiogram, 29 CFR 1910.95(g)(6).
  Every enrolled worker is tested again at least once a year.
  What to do: Test the worker now.
  Bundle xx-law, revision 7: A law.

What was found
  No valid audiogram since 2025-03-05.
  Status gap: not fulfilled, and the time is over or the condition fails.
  Due 2026-03-05, 117 days over.

Parameters of the law
  audiogram_interval = 12 months, in force from 1983-04-07
    Longest time between two tests.
    (g)(6): not checked against the official text.

Numbers
  dose: 90 %
  known: yes
  none: not known
  topics: a, b
  100 * (3.2 / 8 + 2 / 4) = 90 %

Records
  audiogram/A-0412, records/audiograms.csv:118
    audiogram_id  A-0412
    date          2025-03-05

What the rule returned
  {
    "every": "audiogram_interval"
  }

The rule, duty/annual_audiogram/annual_audiogram.rego
  package duty.annual_audiogram

  import rego.v2

  obligations contains {"every": "audiogram_interval"} if {
      some spell in input.enrolled
  }
`
	var b bytes.Buffer
	if err := Explain(&b, e, Format{}); err != nil {
		t.Fatal(err)
	}
	if b.String() != want {
		t.Errorf("got\n%s", &b)
	}
}
