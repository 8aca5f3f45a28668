package dossier

import (
	"fmt"

	"hearduty/internal/audiometry"
)

// comparison is a test held against the baselines of both ears by the law's scheme of a shift.
type comparison struct {
	test      *test    // the test, or the first test where a retest stands in
	base      [2]*test // baseline of the left and right ear
	change    [2]audiometry.Change
	corrected [2]audiometry.Change
	outcome   [2]audiometry.Outcome // what the test alone shows
	verdict   [2]audiometry.Verdict // whether that counts as a shift
	first     [2]*test              // the earlier test that shows it, too, where the law asks for a second test
	applied   bool                  // whether age correction decided
	lacks     [2][]string           // thresholds that the comparison lacks
}

func (c *comparison) shifted() bool {
	return c.verdict[0] == audiometry.Yes || c.verdict[1] == audiometry.Yes
}

func (c *comparison) ears() string {
	return earsText(c.verdict[0] == audiometry.Yes, c.verdict[1] == audiometry.Yes)
}

// missing lists the thresholds that the comparison lacks.
func (c *comparison) missing() []string {
	return append(append([]string{}, c.lacks[0]...), c.lacks[1]...)
}

// atLeast says whether the shift is known only as at least the figure, for lack of a response.
func (c *comparison) atLeast() bool {
	for i := range c.verdict {
		if c.verdict[i] != audiometry.Yes {
			continue
		}
		for _, hz := range c.outcome[i].Shown {
			if c.test.standing().ear(i).At(hz).State == audiometry.NoResponse {
				return true
			}
		}
	}
	return false
}

// compare holds a test against the given baselines, with and without age correction. The site's choice says
// which of the two decides.
func (h *hearing) compare(t *test, base [2]*test) *comparison {
	c := &comparison{test: t, base: base}
	for i := range base {
		h.compareEar(c, i)
	}
	return c
}

func (h *hearing) compareEar(c *comparison, i int) {
	scheme := &h.b.Measures.Hearing.Shift.Scheme
	s := c.test.standing()
	before, now := c.base[i].ear(i), s.ear(i)
	c.change[i] = audiometry.Shift(before, now, scheme.Frequencies, nil)
	c.corrected[i] = c.change[i]
	aging, _ := h.aging(scheme.Frequencies, c.base[i].rec.Date, s.rec.Date)
	if aging != nil {
		c.corrected[i] = audiometry.Shift(before, now, scheme.Frequencies, aging)
	}
	if !h.ageCorrection() {
		aging = nil
	}
	c.applied = c.applied || aging != nil
	amount, inForce := h.b.Law.Number(scheme.Parameter(), s.rec.Date)
	c.outcome[i] = audiometry.Outcome{Verdict: audiometry.Undecided}
	if inForce {
		c.outcome[i] = scheme.Judge(before, now, aging, amount)
	}
	c.verdict[i], c.lacks[i] = c.outcome[i].Verdict, nil
	if c.verdict[i] == audiometry.Undecided {
		c.lacks[i] = undecidedWords(earNames[i], c.outcome[i], inForce)
	}
}

func undecidedWords(ear string, o audiometry.Outcome, inForce bool) []string {
	if !inForce {
		return []string{"the law's figure for a shift on that day"}
	}
	if len(o.Missing) == 0 {
		return []string{ear + " ear: no response in the baseline or not far enough"}
	}
	var out []string
	for _, hz := range o.Missing {
		out = append(out, fmt.Sprintf("%s %d Hz", ear, hz))
	}
	return out
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

// aging gives the part in dB of a change that age explains, for each of the frequencies in Hz, or why there
// is none.
func (h *hearing) aging(frequencies []int, baseline, now Date) ([]int, string) {
	a := h.b.Measures.Hearing.AgeCorrection
	if a == nil {
		return nil, ""
	}
	before, ok1 := audiometry.AgeOn(h.birth, baseline)
	after, ok2 := audiometry.AgeOn(h.birth, now)
	if !ok1 || !ok2 {
		return nil, "no age correction: the date of birth is not recorded"
	}
	aging, err := a.Aging(h.sex, before, after, frequencies)
	if err != nil {
		return nil, "no age correction: " + err.Error()
	}
	return aging, ""
}

// confirm asks that a second test shows each shift in the same ear and, for single frequencies, at the same
// frequency: the test and its retest both, or the test before and this one, both against the baseline of the
// test before. A shift that one test alone shows is none yet. baselines gives those of an earlier test.
func (h *hearing) confirm(c *comparison, baselines func(*test) [2]*test) {
	scheme := &h.b.Measures.Hearing.Shift.Scheme
	before := h.testBefore(c.test)
	for i := range c.verdict {
		if s := c.test.standing(); s != c.test &&
			audiometry.Confirmed(h.judgeEar(scheme, i, c.base[i], c.test), c.outcome[i]) == audiometry.Yes {
			c.first[i] = c.test
			continue
		}
		if before != h.baseline && h.confirmEar(c, i, before, baselines(before.original())[i]) {
			continue
		}
		if c.verdict[i] == audiometry.Yes {
			c.verdict[i] = audiometry.No
		}
	}
}

// confirmEar looks whether the test before shows the same against its baseline. If so, that baseline is the
// one of the comparison.
func (h *hearing) confirmEar(c *comparison, i int, before, base *test) bool {
	scheme := &h.b.Measures.Hearing.Shift.Scheme
	again := c.outcome[i]
	if base != c.base[i] {
		again = h.judgeEar(scheme, i, base, c.test.standing())
	}
	if audiometry.Confirmed(h.judgeEar(scheme, i, base, before), again) != audiometry.Yes {
		return false
	}
	if base != c.base[i] {
		c.base[i] = base
		h.compareEar(c, i)
	}
	c.first[i] = before
	return true
}
