package dossier

import (
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// course follows both ears through the tests: the baseline in force, revisions, shifts, their return and
// their lapse.
type course struct {
	compared  map[*test]*comparison // by the test that counts
	list      []*comparison         // of the tests to be compared, oldest first
	lapsed    []Lapsed
	persisted []Persisted
	since     [2]*comparison // the comparison that first showed the shift still standing, by ear
	standing  []mark         // days on which a shift begins or ends to stand
}

// mark is a day from which on a shift stands, or no longer stands.
type mark struct {
	day Date
	on  bool
}

// course compares every test with its baseline. A test that is not to be compared appears only where it
// confirms the shift of one that is.
func (h *hearing) course(limit func(Date) record.Answer) *course {
	c := &course{compared: map[*test]*comparison{}}
	shift := &h.b.Measures.Hearing.Shift
	baselines := func(t *test) [2]*test { return h.baselines(shift.Baseline, t) }
	for _, t := range h.effective {
		s := t.standing()
		if !s.compare && !shift.Confirm {
			continue
		}
		cmp := h.compare(t, baselines(t))
		if shift.Confirm {
			h.confirm(cmp, baselines)
		}
		if s.compare {
			c.compared[s] = cmp
		} else if !cmp.onlyConfirms() {
			continue
		}
		c.list = append(c.list, cmp)
		h.advance(c, cmp, limit)
	}
	return c
}

// onlyConfirms keeps the shifts of a test that is not to be compared as far as they confirm those of a test
// that is, and says whether there are any.
func (c *comparison) onlyConfirms() bool {
	for i, first := range c.first {
		if first == nil || !first.compare {
			c.verdict[i] = audiometry.Undecided
		}
	}
	return c.shifted()
}

// unconfirmed lists the tests that show a shift which no second test has confirmed or refuted yet.
func (h *hearing) unconfirmed(c *course) []Unconfirmed {
	out := []Unconfirmed{}
	shift := &h.b.Measures.Hearing.Shift
	if !shift.Confirm {
		return out
	}
	for _, t := range h.effective {
		s, next := t.standing(), h.testAfter(t)
		cmp := c.compared[s]
		if cmp == nil {
			continue
		}
		var open [2]bool
		for i := range open {
			open[i] = cmp.pending(i) && (next == nil ||
				audiometry.Confirmed(cmp.outcome[i], h.judgeEar(&shift.Scheme, i, cmp.base[i], next)) == audiometry.Undecided)
		}
		if !open[0] && !open[1] {
			continue
		}
		u := Unconfirmed{Link: Link{s.rec.Date, s.ref}, ID: s.rec.AudiogramID, Ears: earsText(open[0], open[1]), Hearing: h.figures(cmp)}
		if within, ok := h.b.Law.Interval(shift.Retest, t.rec.Date); ok {
			u.RetestUntil, _ = within.After(t.rec.Date, nil)
		}
		if next != nil {
			u.Again = &Link{next.rec.Date, next.ref}
		}
		out = append(out, u)
	}
	return out
}

// pending says whether an ear shows a shift in this test alone, which does not count yet.
func (c *comparison) pending(i int) bool {
	return c.outcome[i].Verdict == audiometry.Yes && c.verdict[i] != audiometry.Yes
}

func (h *hearing) find(id string) *test {
	i := slices.IndexFunc(h.tests, func(t *test) bool { return id != "" && t.rec.AudiogramID == id })
	if i < 0 {
		return nil
	}
	return h.tests[i]
}

// advance notes whether a shift appears, returns or lapses with a comparison.
func (h *hearing) advance(c *course, now *comparison, limit func(Date) record.Answer) {
	var lapsed, again [2]bool
	for i := range now.verdict {
		was := c.since[i]
		switch {
		case now.verdict[i] == audiometry.Yes && was == nil:
			c.since[i] = now
		case now.verdict[i] == audiometry.Yes && was.base[i] == now.base[i]:
			again[i] = true
		case now.verdict[i] == audiometry.Yes:
			c.since[i] = now
		case now.verdict[i] == audiometry.No && !now.pending(i) && was != nil && was.base[i] == now.base[i]:
			lapsed[i] = true
		}
	}
	day, since := now.test.standing().rec.Date, c.since
	for _, ears := range together(lapsed, since) {
		h.lapse(c, now, firstShown(since, ears), ears, limit(day))
	}
	for _, ears := range together(again, since) {
		h.persist(c, now, firstShown(since, ears), ears)
	}
	if now.shifted() {
		from := h.determined(now.test)
		if !from.Known() {
			from = day
		}
		c.standing = append(c.standing, mark{from, true})
	}
}

// together divides ears into those whose shift one test first showed.
func together(ears [2]bool, since [2]*comparison) [][2]bool {
	switch {
	case ears[0] && ears[1] && since[0] != since[1]:
		return [][2]bool{{true, false}, {false, true}}
	case ears[0] || ears[1]:
		return [][2]bool{ears}
	}
	return nil
}

// firstShown gives the test that first showed the shift of the ears.
func firstShown(since [2]*comparison, ears [2]bool) *test {
	if ears[0] {
		return since[0].test.standing()
	}
	return since[1].test.standing()
}

func (h *hearing) lapse(c *course, now *comparison, first *test, ears [2]bool, over record.Answer) {
	below := record.Unanswered
	switch over {
	case record.Yes:
		below = record.No
	case record.No:
		below = record.Yes
	}
	s := now.test.standing()
	c.lapsed = append(c.lapsed, Lapsed{
		Link: Link{s.rec.Date, s.ref}, ID: s.rec.AudiogramID, Shift: Link{first.rec.Date, first.ref},
		Ears: earsText(ears[0], ears[1]), BelowLimit: below, Notice: h.notice(now.test, "persistent_shift_lifted"),
	})
	if below != record.Yes {
		return // the requirement to wear protectors may end only below the limit
	}
	for i := range ears {
		if ears[i] {
			c.since[i] = nil
		}
	}
	if c.since[0] == nil && c.since[1] == nil {
		c.standing = append(c.standing, mark{s.rec.Date, false})
	}
}

// persist notes that a shift is there again; of several tests in a row the latest is kept.
func (h *hearing) persist(c *course, now *comparison, first *test, ears [2]bool) {
	s := now.test.standing()
	p := Persisted{Link: Link{s.rec.Date, s.ref}, Shift: Link{first.rec.Date, first.ref}, Ears: earsText(ears[0], ears[1]), Hearing: h.figures(now)}
	for _, f := range h.follow {
		if (f.Type == "persistence_opinion" || f.Type == "baseline_revision") && f.Date >= first.rec.Date && concerns(f.Ear, ears) &&
			slices.Contains(h.b.Measures.Hearing.Professionals, h.b.Registers.professionOf(f.By)) {
			p.Opinion = link(h.refs, f, f.Date)
			break
		}
	}
	if n := slices.IndexFunc(c.persisted, func(x Persisted) bool { return x.Shift.Ref == p.Shift.Ref }); n >= 0 {
		c.persisted[n] = p
		return
	}
	c.persisted = append(c.persisted, p)
}

// concerns says whether a record about an ear, or about no ear in particular, concerns one of the ears.
func concerns(ear string, ears [2]bool) bool {
	switch ear {
	case "left":
		return ears[0]
	case "right":
		return ears[1]
	}
	return true
}
