package dossier

import (
	"fmt"
	"slices"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// comparison is a test held against the baselines of both ears.
type comparison struct {
	test      *test    // the test, or the first test where a retest stands in
	base      [2]*test // baseline of the left and right ear
	change    [2]audiometry.Change
	corrected [2]audiometry.Change
	verdict   [2]audiometry.Verdict
	applied   bool     // whether age correction decided
	missing   []string // thresholds that the comparison lacks
}

func (c *comparison) shifted() bool {
	return c.verdict[0] == audiometry.Yes || c.verdict[1] == audiometry.Yes
}

func (c *comparison) ears() string {
	return earsText(c.verdict[0] == audiometry.Yes, c.verdict[1] == audiometry.Yes)
}

// compare holds a test against the given baselines, with and without age correction. The bundle's choice
// says which of the two decides.
func (h *hearing) compare(t *test, base [2]*test) *comparison {
	m := h.b.Measures.Hearing
	c := &comparison{test: t, base: base, missing: []string{}}
	s := t.standing()
	limit, inForce := h.b.Law.Number(m.Shift.AtLeast, s.rec.Date)
	for i, side := range sides(s.rec) {
		baseEar := sides(base[i].rec)[i].ear
		c.change[i] = audiometry.Shift(baseEar, side.ear, m.Shift.Frequencies, nil)
		c.corrected[i] = c.change[i]
		aging, _ := h.aging(base[i].rec.Date, s.rec.Date)
		if aging != nil {
			c.corrected[i] = audiometry.Shift(baseEar, side.ear, m.Shift.Frequencies, aging)
		}
		decides := c.change[i]
		if h.ageCorrection() && aging != nil {
			decides, c.applied = c.corrected[i], true
		}
		if inForce {
			c.verdict[i] = decides.Reaches(limit)
		} else {
			c.verdict[i] = audiometry.Undecided
		}
		if c.verdict[i] == audiometry.Undecided {
			c.missing = append(c.missing, undecidedWords(side.name, c.change[i], inForce)...)
		}
	}
	return c
}

// ageCorrection says whether the site has elected age correction.
func (h *hearing) ageCorrection() bool {
	a := h.b.Measures.Hearing.AgeCorrection
	if a == nil {
		return false
	}
	on, _ := h.b.Choices[a.Choice].(bool)
	return on
}

// aging gives the part of a change that age explains, a frequency each, or why there is none.
func (h *hearing) aging(baseline, now Date) ([]int, string) {
	a := h.b.Measures.Hearing.AgeCorrection
	if a == nil {
		return nil, ""
	}
	before, ok1 := audiometry.AgeOn(h.birth, baseline)
	after, ok2 := audiometry.AgeOn(h.birth, now)
	if !ok1 || !ok2 {
		return nil, "no age correction: the date of birth is not recorded"
	}
	aging, err := a.Aging(h.sex, before, after, h.b.Measures.Hearing.Shift.Frequencies)
	if err != nil {
		return nil, "no age correction: " + err.Error()
	}
	return aging, ""
}

func undecidedWords(ear string, c audiometry.Change, inForce bool) []string {
	if !inForce {
		return []string{"the law's figure for a shift on that day"}
	}
	if len(c.Missing) == 0 {
		return []string{ear + " ear: no response in the baseline or not far enough"}
	}
	var out []string
	for _, hz := range c.Missing {
		out = append(out, fmt.Sprintf("%s %d Hz", ear, hz))
	}
	return out
}

// workingOf writes the sum of one ear's average change.
func (h *hearing) workingOf(c *comparison, i int, s side) string {
	baseline := c.base[i].rec
	base := sides(baseline)[i].ear
	aging, why := h.aging(baseline.Date, c.test.standing().rec.Date)
	text := fmt.Sprintf("%s ear against the baseline of %s:", s.name, baseline.Date)
	for n, hz := range h.b.Measures.Hearing.Shift.Frequencies {
		sep := ","
		if n == 0 {
			sep = ""
		}
		text += fmt.Sprintf("%s %d Hz %s − %s", sep, hz, s.ear.At(hz), base.At(hz))
		if aging != nil {
			text += fmt.Sprintf(" (age %d)", aging[n])
		}
	}
	if avg, ok := c.change[i].Average(); ok {
		text += fmt.Sprintf("; average change %.1f dB", avg)
		if avg, ok := c.corrected[i].Average(); ok && aging != nil {
			text += fmt.Sprintf(", after age correction %.1f dB", avg)
		}
	} else {
		text += "; no average"
	}
	if why != "" {
		text += "; " + why
	}
	return text
}

// figures gives a comparison's audiometric figures.
func (h *hearing) figures(c *comparison) Hearing {
	s := c.test.standing().rec
	freqs := h.b.Measures.Hearing.Shift.Frequencies
	left, right := s.Left.Sum(freqs), s.Right.Sum(freqs)
	var working []string
	for i, side := range sides(s) {
		working = append(working, h.workingOf(c, i, side))
	}
	return Hearing{
		Left: average(c.change[0].Average()), Right: average(c.change[1].Average()),
		LeftCorrected: average(c.corrected[0].Average()), RightCorrected: average(c.corrected[1].Average()),
		LeftLevel: average(left.Average()), RightLevel: average(right.Average()), Working: working,
	}
}

func average(v float64, ok bool) record.Number { return record.Number{Value: v, Known: ok} }

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

// course compares every test with the baseline of its day.
func (h *hearing) course(limit func(Date) record.Answer) *course {
	c := &course{compared: map[*test]*comparison{}}
	for _, t := range h.effective {
		s := t.standing()
		if !s.compare {
			continue
		}
		cmp := h.compare(t, h.baselinesFor(t))
		c.compared[s] = cmp
		c.list = append(c.list, cmp)
		h.advance(c, cmp, limit)
	}
	return c
}

// baselinesFor gives the baseline of each ear that is in force when a test is made: the first one, or the
// audiogram that a decision before the test has put in its place.
func (h *hearing) baselinesFor(t *test) [2]*test {
	base := [2]*test{h.baseline, h.baseline}
	for _, f := range h.follow {
		if f.Type != "baseline_revision" || f.Date > t.rec.Date {
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
		case now.verdict[i] == audiometry.No && was != nil && was.base[i] == now.base[i]:
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
	p := Persisted{Link: Link{s.rec.Date, s.ref}, Shift: Link{first.rec.Date, first.ref}, Ears: earsText(ears[0], ears[1])}
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
