package report

import (
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

func fact(value any, unit, cite, seen string) map[string]any {
	return map[string]any{"value": value, "unit": unit, "cite": cite, "seen": seen}
}

// sample is a report with a finding of every status.
func sample() *finding.Report {
	day := calendar.MustParse
	us := "us-osha-general-industry"
	f := func(duty, topic, cite string, subject finding.Subject, key string, status finding.Status, message string) finding.Finding {
		return finding.Finding{
			ID: finding.Fingerprint("kiln-hill", us, duty, subject, key), Site: "kiln-hill", Bundle: us, Duty: duty, Topic: topic,
			Subject: subject, Key: key, Status: status, Severity: "major", Message: message, Cite: cite,
		}
	}
	worker := func(id string) finding.Subject { return finding.Subject{Kind: "worker", ID: id} }
	interval := map[string]any{"audiogram_interval": fact(map[string]any{"months": 12.0}, "", "29 CFR 1910.95(g)(6)", "text")}

	first := f("annual-audiogram", "audiometry", "29 CFR 1910.95(g)(6)", worker("000123"), "2025-03-05", finding.Gap, "no valid audiogram since 2025-03-05")
	first.Due, first.DaysOver, first.Facts = day("2026-03-05"), 117, interval
	first.Remedy = "Test the worker now and compare the result with the baseline."
	first.Evidence = []finding.Evidence{{Record: "audiogram/A-0412", File: "records/audiograms.csv", Row: 118}}
	second := f("annual-audiogram", "audiometry", "29 CFR 1910.95(g)(6)", worker("000987"), "2025-06-29", finding.Gap, "no valid audiogram since 2025-06-29")
	second.Due, second.DaysOver, second.Facts, second.Remedy = day("2026-06-29"), 1, interval, first.Remedy
	second.Evidence = []finding.Evidence{{Record: "audiogram/A-0977", File: "records/audiograms.csv", Row: 544}}
	choice := f("protector-choice", "protectors", "29 CFR 1910.95(i)(3)", worker("000123"), "", finding.Gap, "1 suitable model was offered, and 2 are asked for")
	choice.Severity, choice.Remedy = "minor", "Offer at least one plug and one muff"
	choice.Facts = map[string]any{"protector_variety": fact(2.0, "models", "29 CFR 1910.95(i)(3)", "memory"), "value": 1.0}
	choice.Evidence = []finding.Evidence{{Record: "protector_issue/2", File: "records/issues.xlsx", Sheet: "2026", Row: 7}}
	quiet := f("baseline-quiet-period", "audiometry", "29 CFR 1910.95(g)(5)(iii)", worker("000321"), "", finding.Unproven, "the records lack the hours of quiet before the baseline")
	quiet.Remedy = "Find out from the test report, or repeat the baseline after a quiet night"
	quiet.Evidence = []finding.Evidence{{Record: "audiogram/A-0007", File: "records/audiograms.csv", Row: 8}}
	recorded := f("hearing-loss-recorded", "reporting", "29 CFR 1904.10(a)", worker("000555"), "A-0800", finding.Opinion, "is the loss of hearing work-related? A physician or other licensed health care professional decides")
	recorded.Remedy = "Ask for the opinion and file it"
	notice := f("shift-notice", "notice", "29 CFR 1910.95(g)(8)(i)", worker("000555"), "A-0800", finding.Due, "a shift was determined on 2026-06-20, and no written notice is on record")
	notice.Due, notice.Remedy = day("2026-07-11"), "Tell the worker in writing"
	late := f("annual-training", "training", "29 CFR 1910.95(k)(2)", worker("000123"), "2024-02-01", finding.Late, "the training came after its time")
	late.Due, late.Done, late.DaysOver = day("2025-02-01"), day("2025-02-15"), 14
	lifted := f("shift-protectors", "follow-up", "29 CFR 1910.95(g)(8)(ii)", worker("000555"), "A-0700", finding.Lifted, "a physician found the shift not work-related")
	met := f("standard-posted", "information", "29 CFR 1910.95(l)(1)", finding.Subject{Kind: "site", ID: "kiln-hill"}, "", finding.Met, "the standard is posted")
	met.Done = day("2020-01-02")

	return &finding.Report{
		Tool: finding.Tool{Name: "hearduty", Version: "1.0"}, Program: "Harrow & Slate hearing conservation", AsOf: day("2026-06-30"),
		Cautions: []string{"A bundle is a reading of the law, not the law; local codes govern, and licensed professionals decide."},
		Sites: []finding.Site{
			{ID: "kiln-hill", Name: "Kiln Hill foundry", Bundles: []string{us}, Choices: map[string]any{"age_correction": false, "annual": "twelve_months"}, Workers: 48},
			{ID: "larch-street", Bundles: []string{us}, Workers: 1},
		},
		Bundles: []finding.Bundle{{
			ID: us, Title: "United States, federal OSHA, general industry and maritime", Revision: "2026.12.1", SHA256: strings.Repeat("ab", 32),
			Kind: "law", CheckedOn: "2026-12-01", Cautions: []string{"About 22 States and territories enforce their own rule, which may ask for more."},
		}},
		Inputs: []finding.Input{
			{File: "records/audiograms.csv", Kind: "audiogram", SHA256: strings.Repeat("cd", 32), Rows: 413, Accepted: 411, Rejected: 1, NotData: 1, Declared: map[string]int{"header": 1}, Records: 411},
			{File: "records/issues.xlsx", Sheet: "2026", Kind: "protector_issue", SHA256: strings.Repeat("ef", 32), Rows: 53, Accepted: 52, NotData: 1, Declared: map[string]int{"header": 1}, Records: 52},
		},
		Rejects: []finding.Reject{{File: "records/audiograms.csv", Row: 77, Column: 5, Field: "left.500", Read: "1O", Why: `"1O" is not a number`, Remedy: "Write the digit 0 where the letter O stands", Also: []string{"date"}}},
		Remarks: []string{"worker W-9 has no group on the as-of day"},
		Totals:  map[finding.Status]int{finding.Gap: 3, finding.Unproven: 1, finding.Opinion: 1, finding.Due: 1, finding.Late: 1, finding.Lifted: 1, finding.Met: 391},
		Counts: []finding.Count{
			{Site: "kiln-hill", Bundle: us, Topic: "audiometry", Status: finding.Gap, Number: 2}, {Site: "kiln-hill", Bundle: us, Topic: "audiometry", Status: finding.Unproven, Number: 1},
			{Site: "kiln-hill", Bundle: us, Topic: "audiometry", Status: finding.Met, Number: 300}, {Site: "kiln-hill", Bundle: us, Topic: "notice", Status: finding.Due, Number: 1},
			{Site: "kiln-hill", Bundle: us, Topic: "protectors", Status: finding.Gap, Number: 1}, {Site: "kiln-hill", Bundle: us, Topic: "reporting", Status: finding.Opinion, Number: 1},
			{Site: "kiln-hill", Bundle: us, Topic: "training", Status: finding.Late, Number: 1}, {Site: "kiln-hill", Bundle: us, Topic: "follow-up", Status: finding.Lifted, Number: 1},
			{Site: "kiln-hill", Bundle: us, Topic: "information", Status: finding.Met, Number: 91},
		},
		ObservationCounts: []finding.ObservationCount{
			{Site: "kiln-hill", Kind: "identical_ears", Number: 1}, {Site: "kiln-hill", Kind: "notch", Number: 41}, {Site: "kiln-hill", Kind: "calibration_after_tests", Number: 1}, {Site: "larch-street", Kind: "same_day", Number: 1},
		},
		Listed:   "gap, unproven, opinion, late, and due within 90 days; all with --all",
		Findings: []finding.Finding{first, second, choice, quiet, recorded, notice, late, lifted, met},
	}
}

// empty is a report on nothing.
func empty() *finding.Report {
	return &finding.Report{Tool: finding.Tool{Name: "hearduty", Version: "1.0"}, Program: "Nothing yet", AsOf: calendar.MustParse("2026-06-30")}
}

// long is a report with texts that are wide, long, without a blank, or meant to steer a terminal.
func long() *finding.Report {
	r := sample()
	r.Program = "騒音性難聴の予防計画と聴力検査の記録についての、たいへん長い名前をもつ株式会社ハロー・スレートの計画書"
	r.Sites[0].ID = "site-" + strings.Repeat("long", 25)
	r.Sites[0].Name = "Kiln \x1b[31mHill"
	r.Sites[0].Bundles = []string{r.Bundles[0].ID, "company-quiet"}
	for i := range r.Counts {
		r.Counts[i].Site, r.Counts[i].Number = r.Sites[0].ID, 1234567
	}
	r.Counts = append(r.Counts, finding.Count{Site: r.Sites[0].ID, Bundle: "company-quiet", Topic: "a-topic-with-a-very-long-name", Status: finding.Gap, Number: 1})
	r.Bundles = append(r.Bundles, finding.Bundle{ID: "company-quiet", Title: "Quieter than the law", Revision: "3", Kind: "company", CheckedOn: "2026-01-01"})
	r.Inputs[0].File = "records/" + strings.Repeat("folder/", 20) + "audiograms.csv"
	r.ObservationCounts = []finding.ObservationCount{{Site: r.Sites[0].ID, Kind: "a_kind_nobody_knows", Number: 1234567}}
	r.Observations = []finding.Observation{
		{Site: r.Sites[0].ID, Subject: finding.Subject{Kind: "worker", ID: "作業者"}, Kind: "notch", Record: "audiogram/x", File: r.Inputs[0].File, Row: 7, Ear: "left", Text: "The ear has a notch at high frequencies."},
		{Site: "larch-street", Subject: finding.Subject{Kind: "worker", ID: "2"}, Kind: "same_day", Record: "audiogram/y", File: "a.xlsx", Sheet: "Tests", Row: 9, Text: "Another test was made on the same day."},
		{Site: "larch-street", Subject: finding.Subject{Kind: "tester", ID: "T-9"}, Kind: "results_identical_across_workers", Record: "audiogram/z", File: "a.xlsx", Sheet: "Tests", Row: 3,
			Text: "Several workers have the same varied thresholds at every frequency.", More: slices.Repeat([]finding.Evidence{{Record: "audiogram/y", File: "a.xlsx", Sheet: "Tests", Row: 9}}, 7)},
	}
	r.Findings = r.Findings[:3]
	r.Findings[0].Site, r.Findings[0].Subject.ID = r.Sites[0].ID, "作業者"+strings.Repeat("０", 50)
	r.Findings[0].Message = strings.Repeat("one sentence that goes on and on, ", 12) + "and ends"
	r.Findings[0].Evidence = []finding.Evidence{{Record: "audiogram/x", File: r.Inputs[0].File, Row: 123456}, {Record: "worker/作業者"}}
	r.Findings[1].Health = map[string]any{"left_db": 11.7, "right_db": nil, "working": []any{"left: (20 + 25 + 25 - 10 - 12 - 13) / 3 = 11.7 dB"}}
	return r
}
