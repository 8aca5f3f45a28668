package dossier

import (
	"fmt"
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// test is one hearing test in the order of days, with what later records say of it.
type test struct {
	rec         *record.Audiogram
	ref         string
	invalidated bool
	retestOf    *test // the test that this retest repeats in time
	replacedBy  *test // the retest in time that stands in for this test
	later       bool  // after the baseline, and valid
	enrolled    bool
	compare     bool // to be compared with the baseline
	next        Date // day of the next test that counts; unknown for the latest
}

// counts says whether the test is a valid test: both ears have a result and no professional has found it
// invalid.
func (t *test) counts() bool { return !t.invalidated && earsWithResult(t.rec) == 2 }

// standing gives the test that counts: the retest in time, where one stands in for this test.
func (t *test) standing() *test {
	if t.replacedBy != nil {
		return t.replacedBy
	}
	return t
}

func earsWithResult(a *record.Audiogram) int {
	n := 0
	for _, ear := range []*audiometry.Ear{&a.Left, &a.Right} {
		if slices.ContainsFunc(ear[:], func(t audiometry.Threshold) bool {
			return t.State == audiometry.Measured || t.State == audiometry.NoResponse
		}) {
			n++
		}
	}
	return n
}

// hearing is a worker's hearing tests and what is derived from them.
type hearing struct {
	b         *Builder
	w         *WorkerRecords
	refs      Refs
	follow    []*record.FollowUp
	notices   []*record.Notice
	tests     []*test // all tests, oldest first
	baseline  *test   // the first valid baseline
	marked    bool    // whether its record is marked as baseline
	effective []*test // tests after the baseline that stand for themselves; their standing() is compared
	sex       string
	birth     Date

	everEnrolled bool // whether the worker was ever enrolled
}

func (b *Builder) hearing(w *WorkerRecords, refs Refs, enrolled []calendar.Spell) *hearing {
	h := &hearing{
		b: b, w: w, refs: refs, follow: w.FollowUps, notices: w.Notices,

		everEnrolled: len(enrolled) > 0,
	}
	for _, e := range w.Employments {
		if e.Sex != "" {
			h.sex = e.Sex
		}
		if e.BirthDate.Known() {
			h.birth = e.BirthDate
		}
	}
	for _, a := range w.Audiograms {
		_, in := calendar.Find(enrolled, a.Date)
		h.tests = append(h.tests, &test{rec: a, ref: refs.Of(a), enrolled: in, invalidated: h.invalidated(a)})
	}
	h.findBaseline()
	h.pairRetests()
	h.findEffective()
	return h
}

func (h *hearing) invalidated(a *record.Audiogram) bool {
	return invalidated(h.follow, a)
}

// findBaseline takes the first valid test marked baseline, else the first valid test.
func (h *hearing) findBaseline() {
	for _, t := range h.tests {
		if t.counts() && t.rec.Purpose == "baseline" {
			h.baseline, h.marked = t, true
			return
		}
	}
	for _, t := range h.tests {
		if t.counts() {
			h.baseline = t
			return
		}
	}
}

// pairRetests lets a retest within the law's time stand in for the test before it, unless that is the
// baseline or the retest lacks a threshold that the comparison needs. Of several retests the latest counts.
func (h *hearing) pairRetests() {
	var first *test
	for _, t := range h.tests {
		if !t.counts() {
			continue
		}
		if t.rec.Purpose != "retest" || first == nil || first == h.baseline {
			first = t
			continue
		}
		if !h.comparable(t) {
			continue
		}
		begins := h.retestFrom(first)
		within, ok := h.b.Law.Interval(h.b.Measures.Hearing.Shift.Retest, begins)
		if !ok {
			continue
		}
		once := h.b.Measures.Hearing.Shift.RetestOnce && first.replacedBy != nil
		if last, err := within.After(begins, nil); err == nil && t.rec.Date <= last && !once {
			t.retestOf = first
			first.replacedBy = t
		} else {
			first = t
		}
	}
}

// retestFrom gives the day on which the time for a retest begins. As long as the law counts from a receipt that is
// not on record, that is not known, and no retest stands in for the test.
func (h *hearing) retestFrom(first *test) Date {
	if h.b.Measures.Hearing.Shift.RetestFrom == "received" {
		return h.past(first.rec.ReceivedOn)
	}
	return first.rec.Date
}

// comparable says whether the test has every threshold that a comparison needs, in both ears.
func (h *hearing) comparable(t *test) bool {
	freqs := h.b.Measures.Hearing.Shift.Frequencies
	return len(t.rec.Left.Sum(freqs).Missing)+len(t.rec.Right.Sum(freqs).Missing) == 0
}

// findEffective lists the tests after the baseline that stand for themselves and says which are to be
// compared.
func (h *hearing) findEffective() {
	if h.baseline == nil {
		return
	}
	after := false
	for _, t := range h.tests {
		if t == h.baseline {
			after = true
			continue
		}
		if t.later = after && t.counts(); !t.later || t.retestOf != nil {
			continue
		}
		if n := len(h.effective); n > 0 {
			h.effective[n-1].next = t.rec.Date
		} else {
			h.baseline.next = t.rec.Date
		}
		h.effective = append(h.effective, t)
		s := t.standing()
		s.compare = h.b.Measures.Hearing.Shift.Rule != "" && t.enrolled && (t.rec.Purpose != "exit" || h.determined(t).Known())
	}
	for _, t := range h.effective {
		t.standing().next = t.next
	}
}

// determined gives the day of the comparison, if it lies before the as-of day.
func (h *hearing) determined(t *test) Date { return h.past(t.standing().rec.DeterminedOn) }

// past forgets a day that lies after the as-of day.
func (h *hearing) past(d Date) Date {
	if d > h.b.AsOf {
		return 0
	}
	return d
}

// about says whether a record names one of the audiograms of a test, or names none but lies between the
// test and the next one.
func about(audiogram string, day Date, t *test) bool {
	if audiogram != "" {
		return audiogram == t.rec.AudiogramID || t.replacedBy != nil && audiogram == t.replacedBy.rec.AudiogramID
	}
	return day >= t.rec.Date && (!t.next.Known() || day < t.next)
}

// followUp finds the first follow-up of a test that fits.
func (h *hearing) followUp(t *test, fits func(*record.FollowUp) bool) *record.FollowUp {
	for _, f := range h.follow {
		if fits(f) && about(f.AudiogramID, f.Date, t) {
			return f
		}
	}
	return nil
}

func (h *hearing) followLink(t *test, kinds ...string) *Link {
	f := h.followUp(t, func(f *record.FollowUp) bool { return slices.Contains(kinds, f.Type) })
	if f == nil {
		return nil
	}
	return link(h.refs, f, f.Date)
}

// notice finds the first notice of a test on a matter, with the answer to whether it was in writing.
func (h *hearing) notice(t *test, matter string, written ...record.Answer) *Link {
	for _, n := range h.notices {
		if n.About == matter && about(n.AudiogramID, n.Date, t) && (len(written) == 0 || slices.Contains(written, n.Written)) {
			return link(h.refs, n, n.Date)
		}
	}
	return nil
}

// audiograms writes the tests as the dossier shows them.
func (h *hearing) audiograms(compared map[*test]*comparison, lacks func(*test) []string) []Audiogram {
	out := []Audiogram{}
	for _, t := range h.tests {
		a := Audiogram{
			Link: Link{Date: t.rec.Date, Ref: t.ref}, ID: t.rec.AudiogramID, Purpose: t.rec.Purpose, Enrolled: t.enrolled,
			InProgram:   !t.invalidated && (t.enrolled || t == h.baseline && h.everEnrolled),
			Invalidated: t.invalidated, ToCompare: t.compare, ComparedOn: h.past(t.rec.DeterminedOn), Mobile: t.rec.Mobile,
			ReceivedOn: h.past(t.rec.ReceivedOn), TesterIs: h.b.Registers.professionOf(t.rec.TesterID), QuietHours: t.rec.QuietHours,
			QuietByProtectors: t.rec.QuietByProtectors, Determined: t.rec.DeterminedOn.Known() && t.rec.DeterminedOn <= h.b.AsOf,
			FollowUps: []Done{}, Notices: []Told{}, ReviewedOn: h.past(t.rec.ReviewedOn), ReviewerKnown: t.rec.Reviewer != "", ReviewerIs: h.b.Registers.professionOf(t.rec.Reviewer),
			EarsWithResult: earsWithResult(t.rec), CannotCompare: []string{}, RecordLacks: lacks(t), Schemes: h.judged(t),
		}
		a.NotTested, a.NotRecorded = h.required(t.rec)
		if t.later {
			base := h.revised(t.original(), false)
			a.BaselineLeft, a.BaselineRight = base[0].ref, base[1].ref
		}
		if h.b.Measures.Hearing.Afterwards {
			a.FollowUps, a.Notices = h.afterwards(t)
		}
		if t.retestOf != nil {
			a.RetestOf = t.retestOf.ref
			if !a.ReviewedOn.Known() { // a review of the first test covers its retest
				a.ReviewedOn, a.ReviewerKnown = h.past(t.retestOf.rec.ReviewedOn), t.retestOf.rec.Reviewer != ""
				a.ReviewerIs = h.b.Registers.professionOf(t.retestOf.rec.Reviewer)
			}
		}
		if t.replacedBy != nil {
			a.ReplacedBy = t.replacedBy.ref
		}
		if c := compared[t]; c != nil {
			a.CannotCompare = c.missing()
			if h.b.Measures.Hearing.Sums {
				figures := h.figures(c)
				a.Hearing = &figures
			}
			switch {
			case c.shifted():
				a.Problem = "a threshold shift"
			case c.pending(0) || c.pending(1):
				a.Problem = "a threshold shift that no second test has confirmed"
			case len(a.CannotCompare) > 0:
				a.Problem = "thresholds that allow no comparison"
			}
		}
		out = append(out, a)
	}
	return out
}

// required lists the thresholds that the law asks of every test and that were not tested or not recorded.
func (h *hearing) required(a *record.Audiogram) (notTested, notRecorded []string) {
	notTested, notRecorded = []string{}, []string{}
	for _, side := range sides(a) {
		for _, hz := range h.b.Measures.Hearing.Required {
			name := fmt.Sprintf("%s %d Hz", side.name, hz)
			switch side.ear.At(hz).State {
			case audiometry.NotTested:
				notTested = append(notTested, name)
			case audiometry.NotRecorded:
				notRecorded = append(notRecorded, name)
			}
		}
	}
	return notTested, notRecorded
}

// side is one ear of an audiogram with its name.
type side struct {
	name string
	ear  *audiometry.Ear
}

func sides(a *record.Audiogram) [2]side { return [2]side{{"left", &a.Left}, {"right", &a.Right}} }

// earsText names the ears for which a mark is set.
func earsText(left, right bool) string {
	switch {
	case left && right:
		return "both"
	case left:
		return "left"
	case right:
		return "right"
	}
	return ""
}
