package reporttest

import (
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// frame is all of the odd report but its findings.
func frame() *finding.Report {
	count := func(bundle, topic string, status finding.Status, n int) finding.Count {
		return finding.Count{Site: site, Bundle: bundle, Topic: topic, Status: status, Number: n}
	}
	return &finding.Report{
		Tool: finding.Tool{Name: "hearduty", Version: "1.0.0"}, Program: "Harrow & Slate <hearing conservation>", AsOf: calendar.MustParse("2026-06-30"),
		Cautions: []string{"A bundle is a reading of the law. Local codes govern, and licensed professionals decide.", "It does not call a site compliant."},
		Sites: []finding.Site{
			{ID: site, Name: "Kiln Hill foundry", Bundles: []string{law, company}, Choices: map[string]any{"age_correction": false}, Workers: 48},
			{ID: "larch-street", Bundles: []string{law}, Workers: 1},
		},
		Bundles: []finding.Bundle{
			{ID: law, Title: "United States, federal OSHA, general industry", Revision: "2026-12-01", SHA256: strings.Repeat("ab", 32), Signature: "embedded", Kind: "law", CheckedOn: "2026-12-01", Cautions: []string{"State plans may ask for more."}},
			{ID: company, Title: "Quieter than the law", Revision: "3", Signature: "unsigned", Kind: "company", CheckedOn: "2026-01-01"},
		},
		Inputs: []finding.Input{
			{File: "records/audiograms.csv", Kind: "audiogram", SHA256: strings.Repeat("cd", 32), Rows: 413, Accepted: 411, Rejected: 1, NotData: 1, Records: 411},
			{File: "records/issues.xlsx", Sheet: "Year 2026", Kind: "protector_issue", SHA256: strings.Repeat("ef", 32), Rows: 53, Accepted: 52, Rejected: 1, Records: 52},
			{File: "records/issues.xlsx", Sheet: "Year 2025", Kind: "protector_issue", SHA256: strings.Repeat("ef", 32), Rows: 5, Accepted: 4, NotData: 1, Records: 4},
			{File: "lost & found.csv", Kind: "notice"},
		},
		Rejects: []finding.Reject{
			{File: "records/audiograms.csv", Row: 77, Column: 5, Field: "left.500", Why: `what stands there is not a number`, Remedy: "Write the digit 0 where the letter O stands", Also: []string{"date"}},
			{File: "records/issues.xlsx", Sheet: "Year 2026", Row: 12, Field: "date", Read: "{31.02.2026}", Why: `"{31.02.2026}" is not a day of the calendar`, Remedy: "Correct the date"},
			{File: "lost & found.csv", Why: "the file does not exist", Remedy: "Correct the path, or put the file there"},
		},
		Remarks:        []string{"worker W-9 has no group on the as-of day"},
		Totals:         map[finding.Status]int{finding.Gap: 2, finding.Unproven: 1, finding.Opinion: 1, finding.Due: 2, finding.Late: 1, finding.Lifted: 1, finding.Met: 391},
		AcceptedTotals: map[finding.Status]int{finding.Gap: 1, finding.Due: 1},
		Counts: []finding.Count{
			count(law, "audiometry", finding.Gap, 1), count(law, "audiometry", finding.Due, 2), count(law, "audiometry", finding.Met, 300),
			count(law, "follow-up", finding.Lifted, 1), count(law, "information", finding.Met, 91), count(law, "protectors", finding.Gap, 1),
			count(law, "reporting", finding.Opinion, 1), count(law, "training", finding.Late, 1), count(company, "audiometry", finding.Unproven, 1),
		},
		Listed: "all findings and observations",
		Duties: []finding.Duty{
			{Bundle: law, ID: "annual-audiogram", Title: "Annual audiogram", Description: "Every enrolled worker is tested again at least once a year.", Cite: "29 CFR 1910.95(g)(6)", Topic: "audiometry", Subject: "worker", Severity: "major", Evidence: []string{"audiogram"}, Remedy: "Test the worker now."},
			{Bundle: law, ID: "protector-choice", Title: "Choice {of} protectors", Description: "Workers choose among <several> models.", Cite: "29 CFR 1910.95(i)(3)", Topic: "protectors", Subject: "worker", Severity: "minor", Evidence: []string{"protector_issue"}, Remedy: "Offer more models"},
			{Bundle: law, ID: "never-found", Title: "Never found", Description: "A duty with no finding.", Cite: "29 CFR 1910.95(z)", Topic: "records", Subject: "site", Severity: "minor"},
		},
		ObservationCounts: []finding.ObservationCount{{Site: site, Kind: "notch", Number: 41}},
		Observations: []finding.Observation{{Site: site, Subject: finding.Subject{Kind: "tester", ID: "T-9"}, Kind: "notch", Record: "audiogram/z", File: "records/audiograms.csv", Row: 3,
			Text: "Several workers have the same varied thresholds at every frequency.", More: []finding.Evidence{{Record: "audiogram/y", File: "a.xlsx", Sheet: "Tests", Row: 9}}}},
	}
}
