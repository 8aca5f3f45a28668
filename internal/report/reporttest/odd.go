// Package reporttest helps to test the forms of a report: a small report full of oddities, the report of
// the demo program, golden files, and a search for what no report may give away.
package reporttest

import (
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

const (
	law     = "us-osha-general-industry"
	company = "company-quiet"
	site    = "kiln-hill"
)

// Odd gives a report with a finding of every status, accepted findings, evidence in files of every kind, and
// texts that are long, foreign, or meant to break a format.
func Odd() *finding.Report {
	day := calendar.MustParse
	interval := map[string]any{"audiogram_interval": map[string]any{"value": map[string]any{"months": 12.0}, "unit": "", "cite": "29 CFR 1910.95(g)(6)", "seen": "text"}, "counted_from": "2025-07-15"}
	variety := map[string]any{"protector_variety": map[string]any{"value": 2.0, "unit": "models", "cite": "29 CFR 1910.95(i)(3)", "seen": "memory"}, "offered": 1.0}
	van := &finding.Acceptance{Reason: "the test van <comes> & goes, \"in August\"", ApprovedBy: "plant manager", Until: day("2026-08-31"), File: "accepted gaps.yaml", Row: 4}

	findings := []finding.Finding{
		{Duty: "annual-audiogram", Topic: "audiometry", Subject: worker("000123"), Key: "2025-03-05", Status: finding.Gap, Severity: "major",
			Due: day("2026-03-05"), DaysOver: 117, Message: "no valid audiogram since 2025-03-05", Facts: interval,
			Evidence: []finding.Evidence{{Record: "audiogram/A-0412", File: "records/audiograms.csv", Row: 118}, {Record: "assignment/7", File: "records/assignments.csv", Row: 9}}},
		{Duty: "annual-audiogram", Topic: "audiometry", Subject: worker("000987"), Key: "2025-06-29", Status: finding.Gap, Severity: "major",
			Due: day("2026-06-29"), DaysOver: 1, Message: "no valid audiogram since 2025-06-29", Facts: interval, Accepted: van,
			Evidence: []finding.Evidence{{Record: "audiogram/A-0977", File: "exports/Prüfungen #2, 100%?.csv", Row: 544}}},
		{Duty: "protector-choice", Topic: "protectors", Subject: worker("000123"), Status: finding.Gap, Severity: "minor",
			Message: "1 suitable model was offered, and 2 are asked for", Facts: variety,
			Evidence: []finding.Evidence{{Record: "protector_issue/2", File: "records/issues.xlsx", Sheet: "Year 2026", Row: 7}, {Record: "protector/3", File: "clinic.zip/out/protectors.json", Row: 3}}},
		{Duty: "quiet-period", Topic: "audiometry", Subject: worker("=1+<id>&\"'@\t\x01\u202E{0}"), Status: finding.Unproven, Severity: "major",
			Message: "the records lack\r\nthe \x1b[31mhours\x00 of quiet; see [this](https://example.org) {0}\\, ]]> and more", Bundle: company},
		{Duty: "loss-recorded", Topic: "reporting", Subject: worker("000555"), Key: "A-0800", Status: finding.Opinion, Severity: "major",
			Message: "is the loss of hearing work-related?", Evidence: []finding.Evidence{{Record: "audiogram/A-0800", File: "search.json", Row: 15}}},
		{Duty: "annual-audiogram", Topic: "audiometry", Subject: worker("000124"), Key: "2025-07-15", Status: finding.Due, Severity: "major",
			Due: day("2026-07-15"), Message: "not yet done; the last day is 2026-07-15, in 15 days", Facts: interval,
			Evidence: []finding.Evidence{{Record: "audiogram/A-0225", File: "records/audiograms.csv", Row: 367}}},
		{Duty: "annual-audiogram", Topic: "audiometry", Subject: worker("作業者" + strings.Repeat("０é🦻", 40)), Key: "2025-12-31", Status: finding.Due, Severity: "major",
			Due: day("2026-12-31"), Message: strings.Repeat("one sentence; with commas, that goes on, ", 8) + "and ends", Facts: interval},
		{Duty: "annual-training", Topic: "training", Subject: worker("000126"), Status: finding.Due, Severity: "minor",
			Due: day("2026-08-01"), Message: "not yet done", Accepted: &finding.Acceptance{Reason: "merged with the safety day", File: "accepted gaps.yaml", Row: 9}},
		{Duty: "annual-training", Topic: "training", Subject: worker("000123"), Key: "2024-02-01", Status: finding.Late, Severity: "major",
			Due: day("2025-02-01"), Done: day("2025-02-15"), DaysOver: 14, Message: "the training came after its time"},
		{Duty: "shift-protectors", Topic: "follow-up", Subject: worker("000555"), Key: "A-0700", Status: finding.Lifted, Severity: "major",
			Message: "a physician found the shift not work-related"},
		{Duty: "standard-posted", Topic: "information", Subject: finding.Subject{Kind: "site", ID: site}, Status: finding.Met, Severity: "minor",
			Done: day("2020-01-02"), Message: "the standard is posted"},
	}
	for i := range findings {
		f := &findings[i]
		f.Site, f.Cite, f.Remedy = site, "29 CFR 1910.95, for a test", "@do <it> now; \"please\""
		if f.Bundle == "" {
			f.Bundle = law
		}
		f.ID = finding.Fingerprint(f.Site, f.Bundle, f.Duty, f.Subject, f.Key)
	}
	r := frame()
	r.Findings = findings
	return r
}

func worker(id string) finding.Subject { return finding.Subject{Kind: "worker", ID: id} }

// Empty gives a report on nothing.
func Empty() *finding.Report {
	return &finding.Report{Tool: finding.Tool{Name: "hearduty", Version: "1.0"}, Program: "Nothing yet", AsOf: calendar.MustParse("2026-06-30")}
}

// WithHealth gives the odd report with hearing levels, as on request.
func WithHealth() *finding.Report {
	r := Odd()
	r.Findings[0].Health = map[string]any{"left_db": 11.7, "working": []any{"left: (20 + 25 + 25) / 3 = 23.3 dB"}}
	return r
}
