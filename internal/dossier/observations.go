package dossier

import (
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// Observation is something about a hearing test that somebody may want to look at. It is never a verdict and
// changes none. Its text gives no threshold and no number.
type Observation struct {
	Kind string // one of ObservationKinds
	Ref  string // reference of the audiogram
	Text string // a sentence
	Ear  string // left, right or both; empty where it is about the test as a whole
}

// dateKinds are the checks of a test's day; all of them are ours.
var dateKinds = []struct{ kind, text string }{
	{"before_birth", "The test is dated before the worker's birth; one of the dates is wrong."},
	{"before_hire", "The test was made before the worker's first day of employment."},
	{"after_leaving", "The test was made on a day on which the worker was no longer, or not yet again, employed."},
	{"same_day", "Another test was made on the same day, and neither is marked as a retest."},
}

const (
	beforeBirth = iota
	beforeHire
	afterLeaving
	sameDay
)

// ObservationKinds lists the kinds of observations in their order, with where each check comes from.
func ObservationKinds() []audiometry.ObservationKind {
	kinds := audiometry.ObservationKinds()
	for _, d := range dateKinds {
		kinds = append(kinds, audiometry.ObservationKind{Kind: d.kind, Source: "ours"})
	}
	return kinds
}

// observations looks at the tests that count at the site. Tests that a professional has found invalid are
// left out, and none is compared with them.
func (h *hearing) observations() []Observation {
	var out []Observation
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
				out = append(out, Observation{o.Kind, t.ref, o.Text, o.Ear})
			}
			out = h.observeDay(out, n)
		}
		earlier = append(earlier, ears)
	}
	return out
}

// observeDay adds what there is to say of the day of a test.
func (h *hearing) observeDay(out []Observation, n int) []Observation {
	t := h.tests[n]
	add := func(kind int) { out = append(out, Observation{dateKinds[kind].kind, t.ref, dateKinds[kind].text, ""}) }
	if t.rec.Date < h.birth {
		add(beforeBirth)
	}
	hired := h.w.Employments[0].HiredOn // the employments are in the order of days
	switch {
	case t.rec.Date < hired:
		add(beforeHire)
	case !slices.ContainsFunc(h.w.Employments, func(e *record.Worker) bool { return employment(e).Contains(t.rec.Date) }):
		add(afterLeaving)
	}
	for _, other := range h.tests[:n] {
		if other.rec.Date == t.rec.Date && !other.invalidated && other.rec.Purpose != "retest" && t.rec.Purpose != "retest" {
			add(sameDay)
			break
		}
	}
	return out
}
