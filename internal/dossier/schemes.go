package dossier

import (
	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// earNames are the names of the ears in the order in which they are kept.
var earNames = [2]string{audiometry.LeftEar, audiometry.RightEar}

// ear gives one ear's thresholds, 0 left and 1 right.
func (t *test) ear(i int) *audiometry.Ear {
	if i == 0 {
		return &t.rec.Left
	}
	return &t.rec.Right
}

// judgeEar holds one ear of a test against a baseline by a scheme, with age correction where the site has
// elected it and the law's table allows it. Where the amount has no value on the day it is undecided.
func (h *hearing) judgeEar(s *audiometry.Scheme, i int, base, now *test) audiometry.Outcome {
	amount, ok := h.b.Law.Number(s.Parameter(), now.rec.Date)
	if !ok {
		return audiometry.Outcome{Verdict: audiometry.Undecided}
	}
	if s.Of == audiometry.OfLevel {
		return s.Judge(nil, now.ear(i), nil, amount)
	}
	return s.Judge(base.ear(i), now.ear(i), h.deciding(s, base, now), amount)
}

// deciding gives the age correction that decides between two tests, nil for none.
func (h *hearing) deciding(s *audiometry.Scheme, base, now *test) []int {
	if !h.ageCorrection() {
		return nil
	}
	aging, _ := h.aging(s.Frequencies, base.rec.Date, now.rec.Date)
	return aging
}

// baselines gives the test with which each ear of a test is compared. For a retest give the test that it
// repeats.
//
//	standing  the baseline in force: the first one, or what a decision has put in its place
//	original  the first one
//	improved  the first one, or what a decision has put in its place because hearing had improved
//	previous  the test before
func (h *hearing) baselines(kind string, t *test) [2]*test {
	switch kind {
	case "original":
		return [2]*test{h.baseline, h.baseline}
	case "previous":
		before := h.testBefore(t)
		return [2]*test{before, before}
	}
	return h.revised(t, kind == "improved")
}

// revised gives the baseline of each ear that is in force when a test is made: the first one, or the
// audiogram that a decision before the test has put in its place, for improvement, or anew after a long absence,
// only if asked for.
func (h *hearing) revised(t *test, improvedOnly bool) [2]*test {
	base := [2]*test{h.baseline, h.baseline}
	for _, f := range h.follow {
		if f.Type != "baseline_revision" || f.Date > t.rec.Date || improvedOnly && f.Result != "improved" && f.Result != "new_baseline" {
			continue
		}
		to := h.find(f.AudiogramID)
		if to == nil || to.rec.Date >= t.rec.Date || to.invalidated {
			continue
		}
		if f.Ear != "right" {
			base[0] = to
		}
		if f.Ear != "left" {
			base[1] = to
		}
	}
	return base
}

// testBefore gives the test that counts before a test that stands for itself: the baseline for the first one.
func (h *hearing) testBefore(t *test) *test {
	before := h.baseline
	for _, e := range h.effective {
		if e == t {
			break
		}
		before = e.standing()
	}
	return before
}

// testAfter gives the test that counts after a test that stands for itself, nil for the last one.
func (h *hearing) testAfter(t *test) *test {
	for i, e := range h.effective {
		if e == t && i+1 < len(h.effective) {
			return h.effective[i+1].standing()
		}
	}
	return nil
}

// judged gives what the other schemes of the bundle say of a test.
func (h *hearing) judged(t *test) map[string]Judged {
	others := h.b.Measures.Hearing.Others
	if len(others) == 0 {
		return nil
	}
	out := make(map[string]Judged, len(others))
	for i := range others {
		out[others[i].Name] = h.judgedBy(&others[i], t)
	}
	return out
}

func (h *hearing) judgedBy(s *audiometry.Scheme, t *test) Judged {
	if !t.counts() || s.Of != audiometry.OfLevel && s.Of != audiometry.OfEars && !t.later {
		return Judged{}
	}
	if s.Of == audiometry.OfEars {
		amount, ok := h.b.Law.Number(s.Parameter(), t.rec.Date)
		if !ok {
			return Judged{}
		}
		o, worse := s.JudgeEars(&t.rec.Left, &t.rec.Right, amount)
		if o.Verdict == audiometry.Undecided {
			return Judged{}
		}
		is := [2]record.Answer{record.No, record.No}
		for i, ear := range earNames {
			if worse == ear || worse == audiometry.BothEars {
				is[i] = record.Yes
			}
		}
		return Judged{is[0], is[1]}
	}
	base := [2]*test{}
	if t.later {
		base = h.baselines(s.Baseline, t.original())
	}
	return Judged{h.seen(s, 0, base[0], t), h.seen(s, 1, base[1], t)}
}

// seen says whether one ear of a test shows what a scheme looks for and, where the scheme asks for it, the
// test before or after shows it, too. As long as no test has followed it is not known.
func (h *hearing) seen(s *audiometry.Scheme, i int, base, t *test) record.Answer {
	now := h.judgeEar(s, i, base, t)
	if !s.Confirm || now.Verdict != audiometry.Yes {
		return answerOf(now.Verdict)
	}
	before, after := h.neighbours(t)
	earlier, later := audiometry.No, audiometry.Undecided
	if before != nil {
		earlier = audiometry.Confirmed(h.judgeEar(s, i, base, before), now)
	}
	if after != nil {
		later = audiometry.Confirmed(now, h.judgeEar(s, i, base, after))
	}
	switch {
	case earlier == audiometry.Yes || later == audiometry.Yes:
		return record.Yes
	case earlier == audiometry.No && later == audiometry.No:
		return record.No
	}
	return record.Unanswered
}

// neighbours gives the tests that may confirm a test: of a test and its retest the other one, else the tests
// before and after it.
func (h *hearing) neighbours(t *test) (before, after *test) {
	switch {
	case t.retestOf != nil:
		return t.retestOf, h.testAfter(t.retestOf)
	case t.replacedBy != nil:
		return nil, t.replacedBy
	case !t.later:
		if t == h.baseline && len(h.effective) > 0 {
			after = h.effective[0].standing()
		}
		return nil, after
	}
	if before = h.testBefore(t); before == h.baseline {
		before = nil
	}
	return before, h.testAfter(t)
}

func answerOf(v audiometry.Verdict) record.Answer {
	switch v {
	case audiometry.Yes:
		return record.Yes
	case audiometry.No:
		return record.No
	}
	return record.Unanswered
}
