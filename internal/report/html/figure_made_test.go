package html

import (
	"fmt"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

var madeDay = calendar.MustParse("2026-06-30")

func onDay(s string) calendar.Date { return calendar.MustParse(s) }

// madeEvent is an event of the n-th row of a made file.
func madeEvent(day, lane, label, state string, n int) finding.Event {
	return finding.Event{Date: onDay(day), Lane: lane, Label: label, State: state, Record: fmt.Sprintf("%s/E-%d", lane, n), File: "records/" + lane + ".csv", Row: n}
}

// madeWorker has something in every lane: two exposures, two protectors, many notices on one day, a bad fit test, and
// ids with characters that must be escaped.
func madeWorker() (*finding.Portrait, []*finding.Finding) {
	p := &finding.Portrait{Site: "s", Subject: finding.Subject{Kind: "worker", ID: `A<1>&"x'`}, Spells: []finding.Spell{
		{Lane: "employment", From: onDay("2019-03-01"), Label: "employed", Grade: "plain"},
		{Lane: "exposure", From: onDay("2019-03-01"), To: onDay("2021-02-01"), Label: "press: TWA 92.1 dBA, dose 133.9 %", Grade: "limit"},
		{Lane: "exposure", From: onDay("2021-02-01"), To: onDay("2022-05-01"), Label: "store: TWA 86.0 dBA, dose 57.4 %", Grade: "action"},
		{Lane: "exposure", From: onDay("2022-05-01"), To: onDay("2022-06-01"), Label: "yard: exposure not known", Grade: "unknown"},
		{Lane: "exposure", From: onDay("2022-06-01"), Label: "store: TWA 81.0 dBA", Grade: "plain"},
		{Lane: "program", From: onDay("2019-03-01"), To: onDay("2022-05-01"), Label: "in the program", Grade: "plain"},
		{Lane: "protector", From: onDay("2019-03-02"), To: onDay("2020-03-02"), Label: "P<1", Grade: "plain"},
		{Lane: "protector", From: onDay("2020-03-02"), To: onDay("2021-09-02"), Label: "P<1", Grade: "plain"},
		{Lane: "protector", From: onDay("2021-09-02"), Label: "M-2", Grade: "plain"},
	}}
	add := func(day, lane, label, state string) {
		p.Events = append(p.Events, madeEvent(day, lane, label, state, len(p.Events)+2))
	}
	add("2019-03-10", "training", "training: noise effects", "plain")
	add("2019-03-20", "test", "baseline hearing test", "plain")
	for range 5 {
		add("2020-02-01", "notice", "told of: exposure", "plain")
	}
	add("2020-03-22", "test", "periodic hearing test", "plain")
	add("2021-03-21", "test", "periodic hearing test, threshold shift", "bad")
	add("2021-04-02", "follow-up", "refitting", "plain")
	add("2021-04-03", "fit-test", "fit test of P<1", "bad")
	add("2021-04-20", "fit-test", "fit test of M-2", "good")
	add("2021-05-20", "wear-check", "look at whether protectors are worn", "good")
	p.Events[len(p.Events)-1].Sheet = "Checks & more"
	return p, []*finding.Finding{
		{ID: "f-1", Duty: "annual-training", Status: finding.Gap, Due: onDay("2020-03-10"), Cite: "29 CFR 1910.95(k)(1)-(2)"},
		{ID: "f-2", Duty: "annual-audiogram", Status: finding.Due, Due: onDay("2026-09-21"), Accepted: &finding.Acceptance{}},
	}
}

// madeInstrument has more functional checks than there is room for marks.
func madeInstrument() *finding.Portrait {
	p := &finding.Portrait{Subject: finding.Subject{Kind: "instrument", ID: "AM-9"}, Spells: []finding.Spell{{Lane: "in use", From: onDay("2023-01-02"), Label: "in use", Grade: "plain"}}}
	for i := range 300 {
		e := madeEvent("2023-01-02", "calibration", "functional: pass", "good", i+2)
		e.Date = e.Date.AddDays(4 * i)
		if i%97 == 50 {
			e.Label, e.State = "functional: fail", "bad"
		}
		p.Events = append(p.Events, e)
	}
	p.Events = append(p.Events, madeEvent("2024-02-05", "calibration", "acoustic: pass", "good", 400), madeEvent("2025-02-05", "calibration", "laboratory: adjusted", "plain", 401))
	return p
}

// madeGroup has a result of each kind and protectors in each band.
func madeGroup() *finding.Portrait {
	return &finding.Portrait{Subject: finding.Subject{Kind: "group", ID: "press"}, Events: []finding.Event{
		madeEvent("2021-02-01", "measurement", "noise measurement: personal", "plain", 2), madeEvent("2023-02-01", "change", "change: new <press>", "plain", 3),
		madeEvent("2024-02-01", "control", "engineering control: enclosure", "plain", 4),
	}, Exposure: &finding.Exposure{Unit: "L_EX,8h, dBA",
		Results: []finding.Result{
			{Date: onDay("2021-02-01"), DB: 86.2, Known: "exact", Low: 86.2, High: 86.2, Record: "measurement/M-1"},
			{Date: onDay("2022-02-01"), DB: 87.5, Known: "between", Low: 85.1, High: 89.9, Record: "measurement/M-2"},
			{Date: onDay("2023-03-01"), DB: 91, Known: "at_least", Record: "measurement/M-3", Current: true},
			{Date: onDay("2024-03-01"), DB: 84, Known: "at_most", Record: "measurement/M-4", Current: true},
			{Date: onDay("2025-03-01"), DB: 90.4, Known: "exact", Low: 90.4, High: 90.4, Record: "measurement/M-5", Current: true},
			{Date: onDay("2025-03-01"), DB: 90.4, Known: "exact", Low: 90.4, High: 90.4, Record: "measurement/M-6", Current: true},
		},
		Lines: []finding.Line{{Name: "lower action level", DB: 80, Cite: "Article 3(1)(c)", Grade: "action"}, {Name: "upper action level", DB: 85, Cite: "Article 3(1)(b)", Grade: "action"}, {Name: "limit level", DB: 87, Cite: "Article 3(1)(a)", Grade: "limit"}},
		Ears: []finding.Ear{
			{Protector: "M-1", DB: 82, Method: "octave bands", Workers: 3, Band: "too_little"}, {Protector: "M-2", DB: 76.5, Method: "octave bands", Workers: 1, Band: "good"},
			{Protector: "P-1", DB: 71, Method: "HML", Workers: 4, Band: "much"}, {Protector: "P-2", DB: 66, Method: "HML", Workers: 2, Band: "too_much"}, {Protector: "P<3", DB: 76.4, Method: "HML", Workers: 2},
		}}}
}

func madeLevels(hz []int, db ...float64) []finding.Level {
	out := []finding.Level{}
	for i, v := range db {
		out = append(out, finding.Level{Hz: hz[i], DB: v, State: "measured"})
	}
	return out
}

// madeHearing has a shift that lasts, one that went away, a revised baseline, no response and a gap.
func madeHearing() *finding.Portrait {
	hz, law := []int{500, 1000, 2000, 3000, 4000, 6000, 8000}, []int{2000, 3000, 4000}
	p := &finding.Portrait{Subject: finding.Subject{Kind: "worker", ID: "W-7"}, Tests: []finding.Test{
		{Record: "audiogram/A-4", Date: onDay("2026-03-05"), Purpose: "periodic", LeftBaseline: "audiogram/A-1", RightBaseline: "audiogram/A-3",
			Left: madeLevels(hz, 5, 10, 15, 35, 90, 100, 40), Right: madeLevels(hz, 5, 5, 20, 25, 35, 30, 25),
			LeftShift: &finding.Shift{DB: 4, Hz: law}, RightShift: &finding.Shift{DB: -1.7, Hz: law, AgeDB: 2}},
		{Record: "audiogram/A-1", Date: onDay("2020-07-06"), Purpose: "baseline", Left: madeLevels(hz, 5, 5, 10, 20, 20, 25, 20), Right: madeLevels(hz, 0, 5, 5, 10, 15, 15, 10)},
		{Record: "audiogram/A-3", Date: onDay("2024-02-11"), Purpose: "periodic", LeftBaseline: "audiogram/A-1", RightBaseline: "audiogram/A-1",
			Left: madeLevels(hz, 5, 5, 10, 20, 20, 25, 20), Right: madeLevels(hz, 5, 5, 15, 25, 37, 30, 25),
			LeftShift: &finding.Shift{DB: 0, Hz: law}, RightShift: &finding.Shift{DB: 12.3, Significant: true, Hz: law, AgeDB: 3.1}},
	}}
	p.Tests[0].Left[4] = finding.Level{Hz: 4000, DB: 100, State: "no_response"}
	p.Tests[0].Left[5] = finding.Level{Hz: 6000, State: "not_tested"}
	return p
}
