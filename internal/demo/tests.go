package demo

import "hearduty/internal/record"

// hearingTests writes the hearing tests of all spells: the baseline soon after the first day in noise, then
// one a year, always on the last test day before the year is over, and on leaving an exit test.
func (c *career) hearingTests() {
	var h *hearing
	var last Date
	n := 0
	for i, s := range c.spells {
		next := s.site.clinic.testDayAfter(s.from.AddDays(14))
		switch {
		case h == nil:
			next = c.baselineDay(s)
			h = newHearing(c.person, next)
		case c.spells[i-1].to+1 == s.from: // moved to the other site: the year runs on
			next = s.site.clinic.testDayBefore(last.AddMonths(12))
		}
		for ; next <= c.last(s); next = s.site.clinic.testDayBefore(last.AddMonths(12)) {
			at := s.site.clinic
			if n == 0 && c.van != "" {
				at = s.site.van
			}
			c.test(h, at, next, n)
			last = next
			n++
		}
		if d := s.site.clinic.testDayBefore(c.last(s)); c.exit && i == len(c.spells)-1 && n > 0 && d > last.AddDays(60) {
			a := c.audiogram(s.site.clinic, d, "exit")
			a.Left, a.Right = h.test(n)
			c.put(a)
		}
	}
}

// baselineDay gives the day of the baseline audiogram, within five months of the first day in noise.
func (c *career) baselineDay(s spell) Date {
	if c.van != "" {
		return day(c.van)
	}
	offset := c.offset
	if offset == 0 {
		offset = 4 + dice(c.id, "baseline").IntN(30)
		if s.from == takeover {
			offset = 4 + dice(c.id, "baseline").IntN(130)
		}
	}
	return s.site.clinic.testDayAfter(s.from.AddDays(offset))
}

// audiogram makes the record of a test without its thresholds.
func (c *career) audiogram(at *clinic, d Date, purpose string) *record.Audiogram {
	at.used[d] = true
	return &record.Audiogram{
		AudiogramID: c.n.audiogram(), WorkerID: c.id, Date: d, Purpose: purpose,
		AudiometerID: at.audiometer, RoomID: at.room, TesterID: at.tester(d),
		QuietHours: record.Num(15), QuietByProtectors: record.No, Mobile: at.mobile, DeterminedOn: d,
	}
}

// test writes test n, where 0 is the baseline, and what follows from it.
func (c *career) test(h *hearing, at *clinic, d Date, n int) {
	a := c.audiogram(at, d, "periodic")
	a.Left, a.Right = h.test(n)
	if n == 0 {
		a.Purpose, a.DeterminedOn = "baseline", 0
		c.put(&record.Notice{WorkerID: c.id, Date: d - 3, About: "quiet_period", AudiogramID: a.AudiogramID, Written: record.Yes})
	}
	if h.plan.happens == passes && n == h.plan.test+1 {
		c.put(&record.Notice{WorkerID: c.id, Date: min(d+6, c.asOf), About: "persistent_shift_lifted", AudiogramID: a.AudiogramID, Written: record.Yes})
	}
	if !h.shifted(n) || h.plan.happens == accepted && n > h.plan.test {
		c.put(a)
		return
	}
	c.judged(a)
	if h.plan.retest || h.plan.happens == refuted {
		a = c.audiogram(at, at.testDayAfter(d+10), "retest")
		a.Left, a.Right = h.retest()
		c.judged(a)
		if h.plan.happens == refuted {
			return
		}
	}
	c.followShift(h, a, n)
}

// judged writes a test that the audiologist has compared and reviewed two days later.
func (c *career) judged(a *record.Audiogram) {
	on := min(a.Date+2, c.asOf)
	a.DeterminedOn, a.Reviewer, a.ReviewedOn = on, audiologist, on
	c.put(a)
}

// followShift writes all that the law asks for after a threshold shift.
func (c *career) followShift(h *hearing, a *record.Audiogram, n int) {
	found := a.DeterminedOn
	after := func(days int) Date { return min(workday(found.AddDays(days)), c.asOf) }
	do := func(days int, kind, result, by string) {
		c.put(&record.FollowUp{WorkerID: c.id, AudiogramID: a.AudiogramID, Ear: "left", Date: after(days), Type: kind, Result: result, By: by})
	}
	trainer := c.spells[len(c.spells)-1].site.clinic.trainer
	c.put(&record.Notice{WorkerID: c.id, Date: after(6), About: "shift", AudiogramID: a.AudiogramID, Written: record.Yes})
	do(8, "refitting", "", trainer)
	do(8, "retraining", "", trainer)
	c.refits = append(c.refits, after(8))
	if h.plan.recordable && n == h.plan.test {
		do(0, "referral_decision", "referral_needed", audiologist)
		do(14, "referral", "", audiologist)
		do(3, "medical_opinion", "work_related", physician)
		do(5, "log_entry", "", "safety office")
	} else {
		do(0, "referral_decision", "no_referral_needed", audiologist)
	}
	switch {
	case h.plan.happens == accepted:
		do(1, "baseline_revision", "persistent", audiologist)
	case h.plan.happens == lasts && n > h.plan.test:
		do(1, "persistence_opinion", "persistent", audiologist)
	}
}
