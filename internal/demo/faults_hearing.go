package demo

import (
	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// hearingFaults are faults of the hearing tests themselves.
var hearingFaults = []fault{
	{"baseline-audiogram", "gap", "K0141", "A core maker has never been tested.", withoutTests("K0141", 0, all)},
	{"baseline-audiogram", "late", "K0142", "The baseline of a core maker was made after eight months.",
		onTest("K0142", 0, func(b *book, a *record.Audiogram) { b.postpone(a, day("2021-03-02")) })},
	{"baseline-audiogram", "due", "K0183", "A grinder hired in March 2026 has not been tested yet; there is time until September.", withoutTests("K0183", 0, all)},
	{"baseline-quiet-period", "gap", "K0133", "The baseline was made nine hours after the shift.",
		onTest("K0133", 0, func(_ *book, a *record.Audiogram) { a.QuietHours = record.Num(9) })},
	{"baseline-quiet-period", "unproven", "K0134", "The record of the baseline does not tell the quiet hours.",
		onTest("K0134", 0, func(_ *book, a *record.Audiogram) {
			a.QuietHours, a.QuietByProtectors = record.Number{}, record.Unanswered
		})},
	{"quiet-period-notice", "gap", "K0136", "Nobody told the worker to keep away from loud noise before the baseline.",
		drop(allNotices, func(n *record.Notice) bool { return n.WorkerID == "K0136" && n.About == "quiet_period" })},
	{"annual-audiogram", "gap", "K0143", "The core maker was last tested in 2024.", withoutTests("K0143", 5, all)},
	{"annual-audiogram", "late", "K0144", "The test of 2023 was left out; the next one came a year late.", withoutTests("K0144", 3, 1)},
	{"audiogram-compared", "gap", "K0121", "Nobody compared the test of 2024 with the baseline.",
		onTest("K0121", 4, func(_ *book, a *record.Audiogram) { a.DeterminedOn = 0 })},
	{"audiogram-compared", "unproven", "K0122", "The left ear was not tested at 3000 Hz, so that the test cannot be compared.",
		onTest("K0122", 4, notTested(3000))},
	{"test-frequencies", "gap", "K0122", "The left ear was not tested at 6000 Hz either.", onTest("K0122", 4, notTested(6000))},
	{"test-frequencies", "unproven", "K0123", "The record of one test says nothing about 500 Hz in the left ear.",
		onTest("K0123", 2, func(_ *book, a *record.Audiogram) { a.Left[frequencyIndex(500)] = audiometry.Threshold{} })},
	{"audiogram-record-content", "gap", "K0139", "The record of one test does not tell who made it.",
		onTest("K0139", 3, func(_ *book, a *record.Audiogram) { a.TesterID = "" })},
	{"baseline-revision", "opinion", "K0101", "A later test is marked as baseline, but nobody decided on a new baseline.",
		onTest("K0101", 3, func(_ *book, a *record.Audiogram) { a.Purpose = "baseline" })},
}

const all = 1000 // tests; more than anybody has

// notTested marks a frequency of the left ear as not tested; the audiologist has seen the test.
func notTested(hz int) func(*book, *record.Audiogram) {
	return func(_ *book, a *record.Audiogram) {
		a.Left[frequencyIndex(hz)] = audiometry.Threshold{State: audiometry.NotTested}
		a.Reviewer, a.ReviewedOn = audiologist, a.Date+2
	}
}

// postpone moves a test to a later day, with the notice before it, and has the audiometer checked on that day.
func (b *book) postpone(a *record.Audiogram, to Date) {
	a.Date = to
	for _, n := range b.notices {
		if n.AudiogramID == a.AudiogramID {
			n.Date = to - 3
		}
	}
	b.put(&record.Calibration{InstrumentID: a.AudiometerID, Date: to, Type: "functional", Deviation: deviation(0), Result: "pass", By: a.TesterID})
}

// followUpFaults are faults of what follows from a hearing test.
var followUpFaults = []fault{
	{"problem-audiogram-review", "gap", "K0112", "The technician found a shift, and no professional has looked at the test.",
		onTest("K0112", -1, func(_ *book, a *record.Audiogram) { a.Reviewer, a.ReviewedOn = "", 0 })},
	{"problem-audiogram-review", "unproven", "K0119", "The reviewer is not in the tester records.",
		onTest("K0119", -1, func(_ *book, a *record.Audiogram) { a.Reviewer = "P-88" })},
	{"shift-notice", "gap", "K0102", "The worker was not told of the shift.", drop(allNotices, shiftNotice("K0102"))},
	{"shift-notice", "late", "K0113", "The worker was told of the shift only after seven weeks.", onNotice("K0113", func(n *record.Notice) { n.Date += 43 })},
	{"shift-notice", "unproven", "K0114", "The record does not say whether the worker was told in writing.",
		onNotice("K0114", func(n *record.Notice) { n.Written = record.Unanswered })},
	{"shift-protectors", "gap", "K0103", "The grinder was neither refitted nor given a new protector after the shift.",
		both(drop(allFollowUps, stepAfter("K0103", "refitting")), sinceShift("K0103"))},
	{"shift-protectors", "lifted", "K0107", "A physician found that noise at work neither caused nor aggravated the shift; for the injury log that counts too.",
		both(set(followUps, stepAfter("K0107", "medical_opinion"), func(f *record.FollowUp) { f.Result = "not_work_related" }),
			drop(allFollowUps, stepAfter("K0107", "log_entry")))},
	{"shift-referral", "opinion", "K0104", "No professional has decided whether the worker needs more testing.",
		drop(allFollowUps, stepAfter("K0104", "referral_decision"))},
	{"shift-referral", "gap", "K0105", "A referral was found necessary but never made.", drop(allFollowUps, stepAfter("K0105", "referral"))},
	{"shift-not-persistent-notice", "gap", "K0126", "The next test no longer showed the shift, and the moulder was not told.",
		drop(allNotices, func(n *record.Notice) bool { return n.WorkerID == "K0126" && n.About == "persistent_shift_lifted" })},
	{"baseline-revision", "gap", "K0110", "The technician, not a professional, decided on the new baseline.",
		set(followUps, stepAfter("K0110", "baseline_revision"), func(f *record.FollowUp) { f.By = "T-02" })},
	{"baseline-revision", "opinion", "K0111", "The shift is back in the next test, and nobody has judged whether it is persistent.",
		drop(allFollowUps, stepAfter("K0111", "persistence_opinion"))},
	{"hearing-loss-recorded", "gap", "K0108", "A work-related hearing loss is not in the injury log.", drop(allFollowUps, stepAfter("K0108", "log_entry"))},
	{"hearing-loss-recorded", "late", "K0117", "A hearing loss was entered in the log three weeks after the retest.",
		set(followUps, stepAfter("K0117", "log_entry"), func(f *record.FollowUp) { f.Date += 14 })},
	{"hearing-loss-recorded", "opinion", "K0116", "Nobody has said whether a hearing loss is work-related.",
		drop(allFollowUps, func(f *record.FollowUp) bool {
			return f.WorkerID == "K0116" && (f.Type == "log_entry" || f.Type == "medical_opinion")
		})},
}

func shiftNotice(worker string) func(*record.Notice) bool {
	return func(n *record.Notice) bool { return n.WorkerID == worker && n.About == "shift" }
}

func onNotice(worker string, change func(*record.Notice)) func(*book) {
	return set(func(b *book) []*record.Notice { return b.notices }, shiftNotice(worker), change)
}

func stepAfter(worker, kind string) func(*record.FollowUp) bool {
	return func(f *record.FollowUp) bool { return f.WorkerID == worker && f.Type == kind }
}

// sinceShift takes away the protectors that a worker was given since the latest test; the worker keeps the
// one from before.
func sinceShift(worker string) func(*book) {
	return func(b *book) {
		tests := b.tests(worker)
		since := tests[len(tests)-1].Date
		drop(allIssues, func(i *record.ProtectorIssue) bool { return i.WorkerID == worker && i.Date >= since })(b)
		lastIssue(worker, func(i *record.ProtectorIssue) { i.ReturnedOn = 0 })(b)
		b.fitTests = deleteIf(b.fitTests, func(t *record.FitTest) bool { return t.WorkerID == worker && t.Date >= since })
	}
}
