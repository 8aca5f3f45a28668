package dossier

import (
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// shifts writes the tests that show a shift, with what was done about each.
func (h *hearing) shifts(c *course, enrolledNow bool, had func(Date) bool) []Shift {
	out := []Shift{}
	for _, cmp := range c.list {
		if !cmp.shifted() {
			continue
		}
		t, s := cmp.test, cmp.test.standing()
		shift := Shift{
			Link: Link{s.rec.Date, s.ref}, ID: s.rec.AudiogramID, FirstTest: Link{t.rec.Date, t.ref}, Ears: cmp.ears(),
			AgeCorrected: cmp.applied, DeterminedOn: h.determined(t), Hearing: h.figures(cmp),
			Notice: h.notice(t, "shift", record.Yes), OralNotice: h.notice(t, "shift", record.No), UnclearNotice: h.notice(t, "shift", record.Unanswered),
			HadProtector: had(t.rec.Date), Fitting: h.fitting(t), Retraining: h.retraining(t),
			Referral: h.followLink(t, "referral"), CurrentEnrolled: enrolledNow,
		}
		shift.AtLeast = cmp.atLeast()
		for _, first := range cmp.first {
			if first != nil {
				shift.Confirms = &Link{first.rec.Date, first.ref}
			}
		}
		shift.NotWorkRelated, shift.OtherOpinion = h.opinion(t, "not_work_related", h.b.Measures.Hearing.Physicians)
		h.referralDecision(t, &shift)
		out = append(out, shift)
	}
	return out
}

// fitting finds the fitting or refitting after a test: a follow-up, or a protector that was handed over and
// fitted before the next test.
func (h *hearing) fitting(t *test) *Link {
	found := h.followLink(t, "fitting", "refitting")
	for _, i := range h.w.Issues {
		if i.FittedBy != "" && about("", i.Date, t) && (found == nil || i.Date < found.Date) {
			found = link(h.refs, i, i.Date)
		}
	}
	return found
}

// retraining finds the retraining after a test: a follow-up, or a session on protectors before the next test.
func (h *hearing) retraining(t *test) *Link {
	found := h.followLink(t, "retraining")
	for _, s := range h.w.Trainings {
		if s.Topics.Has("protectors") && about("", s.Date, t) && (found == nil || s.Date < found.Date) {
			found = link(h.refs, s, s.Date)
		}
	}
	return found
}

// opinion finds a medical opinion with a result: by one of the professions, and by anybody else.
func (h *hearing) opinion(t *test, result string, professions []string) (accepted, other *Link) {
	for _, f := range h.follow {
		if f.Type != "medical_opinion" || f.Result != result || !about(f.AudiogramID, f.Date, t) {
			continue
		}
		if slices.Contains(professions, h.b.Registers.professionOf(f.By)) {
			if accepted == nil {
				accepted = link(h.refs, f, f.Date)
			}
		} else if other == nil {
			other = link(h.refs, f, f.Date)
		}
	}
	return accepted, other
}

func (h *hearing) referralDecision(t *test, shift *Shift) {
	f := h.followUp(t, func(f *record.FollowUp) bool { return f.Type == "referral_decision" })
	if f == nil {
		if f = h.followUp(t, func(f *record.FollowUp) bool { return f.Type == "referral" }); f == nil {
			return
		}
		shift.ReferralNeeded = record.Yes // whoever refers has decided to
	}
	shift.Decision, shift.DecisionBy = link(h.refs, f, f.Date), h.b.Registers.professionOf(f.By)
	switch f.Result {
	case "referral_needed":
		shift.ReferralNeeded = record.Yes
	case "no_referral_needed":
		shift.ReferralNeeded = record.No
	}
}

// recordables follows the recording rule: the change against the baseline or, after an earlier recordable
// case of that ear, against the audiogram of that case, together with the hearing level, which is never
// corrected for age.
func (h *hearing) recordables(c *course) []Recorded {
	out := []Recorded{}
	m := h.b.Measures.Hearing
	if m.Recordable == nil {
		return out
	}
	var since [2]*test
	for _, cmp := range c.list {
		t, s := cmp.test, cmp.test.standing()
		base := cmp.base
		for i := range base {
			if since[i] != nil {
				base[i] = since[i]
			}
		}
		now := cmp
		if base != cmp.base {
			now = h.compare(t, base)
			if m.Shift.Confirm {
				h.confirm(now, func(*test) [2]*test { return base })
			}
		}
		level, inForce := h.b.Law.Number(m.Recordable.AtLeast, s.rec.Date)
		var hit [2]bool
		for i, side := range sides(s.rec) {
			hit[i] = inForce && now.verdict[i] == audiometry.Yes && side.ear.Sum(m.Shift.Frequencies).Reaches(level) == audiometry.Yes
		}
		if !hit[0] && !hit[1] {
			continue
		}
		r := Recorded{
			Link: Link{s.rec.Date, s.ref}, ID: s.rec.AudiogramID, Ears: earsText(hit[0], hit[1]), KnownOn: h.determined(t),
			Entry: h.followLink(t, "log_entry"), Removal: h.followLink(t, "log_removal"), Hearing: h.figures(now, h.levelWorking(s, hit)...),
		}
		for i := range hit {
			if hit[i] {
				r.Since = base[i].ref
			}
		}
		r.WorkRelated, _ = h.opinion(t, "work_related", m.Licensed)
		r.NotWorkRelated, r.OtherOpinion = h.opinion(t, "not_work_related", m.Licensed)
		if s != t {
			r.Retest, r.KnownOn = &Link{s.rec.Date, s.ref}, s.rec.Date
		} else if within, ok := h.b.Law.Interval(m.Shift.Retest, t.rec.Date); ok {
			r.RetestUntil, _ = within.After(t.rec.Date, nil)
		}
		if r.NotWorkRelated == nil {
			for i := range hit {
				if hit[i] {
					since[i] = s
				}
			}
		}
		out = append(out, r)
	}
	return out
}

// revisions writes the decisions to put a later test in the baseline's place.
func (h *hearing) revisions() []Revision {
	out := []Revision{}
	for _, f := range h.follow {
		if f.Type != "baseline_revision" || !h.b.here(h.w, f.Date) {
			continue
		}
		r := Revision{Link: *link(h.refs, f, f.Date), Ears: []string{}, Unfounded: []string{}, Undecided: []string{}, Result: f.Result, By: h.b.Registers.professionOf(f.By), ByRecorded: f.By != ""}
		for _, ear := range []string{"left", "right"} {
			if f.Ear == ear || f.Ear == "both" || f.Ear == "" {
				r.Ears = append(r.Ears, ear)
			}
		}
		to := h.find(f.AudiogramID)
		if to == nil || h.baseline == nil {
			r.Undecided = r.Ears
			out = append(out, r)
			continue
		}
		r.Audiogram = to.ref
		cmp := h.compare(to.original(), h.revised(to.original(), false))
		r.Hearing = h.figures(cmp)
		for i, ear := range []string{"left", "right"} {
			if !slices.Contains(r.Ears, ear) {
				continue
			}
			improved := cmp.change[i].Count > 0 && len(cmp.change[i].Missing) == 0 && cmp.change[i].Tenths < 0
			switch {
			case cmp.verdict[i] == audiometry.Undecided && !improved:
				r.Undecided = append(r.Undecided, ear)
			case cmp.verdict[i] == audiometry.No && !improved:
				r.Unfounded = append(r.Unfounded, ear)
			}
		}
		out = append(out, r)
	}
	return out
}

// original gives the test that a retest repeats, or the test itself.
func (t *test) original() *test {
	if t.retestOf != nil {
		return t.retestOf
	}
	return t
}

// markedLater lists tests marked baseline after the first one to which no decision points.
func (h *hearing) markedLater() []Link {
	out := []Link{}
	for _, t := range h.tests {
		if t == h.baseline || !t.counts() || t.rec.Purpose != "baseline" || !h.marked || !t.enrolled {
			continue
		}
		if !slices.ContainsFunc(h.follow, func(f *record.FollowUp) bool {
			return f.Type == "baseline_revision" && f.AudiogramID == t.rec.AudiogramID
		}) {
			out = append(out, Link{t.rec.Date, t.ref})
		}
	}
	return out
}

// dangling lists audiograms that follow-ups and notices refer to but that the records lack.
func (h *hearing) dangling() []Dangling {
	out := []Dangling{}
	seen := map[string]bool{}
	for _, a := range h.w.Audiograms {
		seen[a.AudiogramID] = true
	}
	miss := func(id string, rec record.Record, day Date) {
		if id != "" && !seen[id] && h.b.here(h.w, day) {
			seen[id] = true
			out = append(out, Dangling{Link: *link(h.refs, rec, day), ID: id})
		}
	}
	for _, f := range h.follow {
		miss(f.AudiogramID, f, f.Date)
	}
	for _, n := range h.notices {
		miss(n.AudiogramID, n, n.Date)
	}
	return out
}

// baselineFacts writes the baseline as the dossier shows it.
func (h *hearing) baselineFacts(inProgram bool) *Baseline {
	if h.baseline == nil {
		return nil
	}
	a := h.baseline.rec
	out := &Baseline{
		Link: Link{a.Date, h.baseline.ref}, ID: a.AudiogramID, Marked: h.marked, Mobile: a.Mobile,
		QuietHours: a.QuietHours, QuietByProtectors: a.QuietByProtectors, InProgram: inProgram,
	}
	for _, n := range h.notices {
		if n.About != "quiet_period" || n.AudiogramID != "" && n.AudiogramID != a.AudiogramID {
			continue
		}
		switch {
		case n.Date <= a.Date:
			out.QuietNotice = link(h.refs, n, n.Date)
		case out.LateQuietNotice == nil:
			out.LateQuietNotice = link(h.refs, n, n.Date)
		}
	}
	return out
}

// afterShift gives the stretches in which a shift stands.
func (c *course) afterShift() []calendar.Spell {
	var out []calendar.Spell
	var from Date
	for _, m := range c.standing {
		switch {
		case m.on && !from.Known():
			from = m.day
		case !m.on && from.Known():
			out = append(out, calendar.Spell{From: from, To: m.day})
			from = 0
		}
	}
	if from.Known() {
		out = append(out, calendar.Spell{From: from})
	}
	return calendar.Union(out)
}

// validSeries lists the tests by which an audiometric duty is fulfilled; a retest in time is merged into
// its test.
func (h *hearing) validSeries() []Link {
	var out []Link
	for _, t := range h.tests {
		if t.counts() && t.retestOf == nil {
			out = append(out, Link{t.rec.Date, t.ref})
		}
	}
	return out
}
