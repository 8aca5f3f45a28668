package dossier

import (
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// Observation is something about a record, such as a hearing test, that somebody may want to look at. It is
// never a verdict and changes none. Its text gives no threshold and no number.
type Observation struct {
	Kind string // one of ObservationKinds
	Ref  string // reference of the record
	Text string // a sentence
	Ear  string // left, right or both; empty where it is about the record as a whole
}

// ownKinds are the kinds beside those of audiometry.Observe: of a test's day, of the worker's other records,
// of instruments and testers, and of a site's tests taken together.
var ownKinds = []struct{ kind, source, text string }{
	{"before_birth", "ours", "The test is dated before the worker's birth; one of the dates is wrong."},
	{"before_hire", "ours", "The test was made before the worker's first day of employment."},
	{"after_leaving", "ours", "The test was made on a day on which the worker was no longer, or not yet again, employed."},
	{"same_day", "ours", "Another test was made on the same day, and neither is marked as a retest."},
	{"no_functional_check", "29 CFR 1910.95(h)(5)(i)", "The audiometer was checked on other days around the test, but no functional check of this day is on record."},
	{"stated_shift_differs", "ours", "What the source says of a shift in this ear is not what the thresholds give; age correction or another baseline may explain it."},
	{"training_outside_employment", "ours", "The training is dated on a day on which the worker was not employed."},
	{"protector_issued_outside_employment", "ours", "The protector was handed over on a day on which the worker was not employed."},
	{"calibration_after_tests", "29 CFR 1910.95(h)(5)(ii)", "The first calibration of the audiometer on record is dated after tests that were made with it, so that it cannot cover them."},
	{"checks_all_same_result", "ours", "Many functional checks in a row found the very same at every frequency; they may have been copied."},
	{"one_day_of_month", "ours", "All tests are dated on one and the same day of the month; the true dates may not be known."},
	{"results_identical_across_workers", "ours", "Several workers have the same varied thresholds at every frequency; they may have been copied from one to the other."},
}

// The places of the kinds in ownKinds.
const (
	beforeBirth = iota
	beforeHire
	afterLeaving
	sameDay
	noFunctionalCheck
	statedShiftDiffers
	trainingOutside
	issueOutside
	calibrationAfterTests
	checksAllSame
	oneDayOfMonth
	identicalAcross
)

// observed makes an observation of one of ownKinds.
func observed(kind int, ref, ear string) Observation {
	return Observation{ownKinds[kind].kind, ref, ownKinds[kind].text, ear}
}

// ObservationKinds lists the kinds of observations in their order, with where each check comes from.
func ObservationKinds() []audiometry.ObservationKind {
	kinds := audiometry.ObservationKinds()
	for _, k := range ownKinds {
		kinds = append(kinds, audiometry.ObservationKind{Kind: k.kind, Source: k.source})
	}
	return kinds
}

// observe looks at the tests that count at the site. Tests that a professional has found invalid are left
// out, and none is compared with them.
func (h *hearing) observe(f *File) {
	var earlier []audiometry.Ears
	for n, t := range h.tests {
		if t.invalidated {
			continue
		}
		ears := audiometry.Ears{Left: &t.rec.Left, Right: &t.rec.Right}
		if h.b.here(h.w, t.rec.Date) {
			for _, o := range audiometry.Observe(&audiometry.Tested{
				Ears: ears, Required: h.b.Measures.Hearing.Required, Repeat: [2]audiometry.Threshold{t.rec.LeftRepeat, t.rec.RightRepeat},
				Insert: t.rec.Earphones == "insert", Masked: t.rec.Masked == record.Yes, FineSteps: t.rec.FineSteps == record.Yes, Earlier: earlier,
			}) {
				f.Observations = append(f.Observations, Observation{o.Kind, t.ref, o.Text, o.Ear})
			}
			h.observeDay(f, n)
			h.observeStated(f, t)
		}
		earlier = append(earlier, ears)
	}
}

// observeDay adds what there is to say of the day of a test.
func (h *hearing) observeDay(f *File, n int) {
	t := h.tests[n]
	add := func(kind int) { f.Observations = append(f.Observations, observed(kind, t.ref, "")) }
	if t.rec.Date < h.birth {
		add(beforeBirth)
	}
	switch {
	case t.rec.Date < h.w.Employments[0].HiredOn: // the employments are in the order of days
		add(beforeHire)
	case !h.w.employedOn(t.rec.Date):
		add(afterLeaving)
	}
	for _, other := range h.tests[:n] {
		if other.rec.Date == t.rec.Date && !other.invalidated && other.rec.Purpose != "retest" && t.rec.Purpose != "retest" {
			add(sameDay)
			break
		}
	}
	if h.b.unchecked(t.rec.AudiometerID, t.rec.Date) {
		add(noFunctionalCheck)
	}
}

// employedOn says whether the worker was employed on a day, at any site.
func (w *WorkerRecords) employedOn(day Date) bool {
	return slices.ContainsFunc(w.Employments, func(e *record.Worker) bool { return employment(e).Contains(day) })
}
