package audiometry

// Change is the change of one ear's thresholds against a baseline, summed over some frequencies. A positive
// change is a loss of hearing.
type Change struct {
	Tenths  int   // sum of current - aging - baseline in tenths of dB over the Count frequencies
	Count   int   // frequencies that have a level in both tests
	AtLeast bool  // no response in the current test: the true change is above Tenths
	AtMost  bool  // no response in the baseline: the true change is below Tenths
	Missing []int // frequencies in Hz without a level in one of the tests
}

// Shift compares a current test with its baseline at freqs, in Hz (29 CFR 1910.95(g)(10)(i)). The dB of
// aging, one for each frequency, are taken off the current thresholds (App. F); nil means no correction for
// age, and any other length than that of freqs is a mistake of the caller that panics. No response enters
// with the highest level presented. Nothing is allocated unless a frequency is missing.
func Shift(baseline, current *Ear, freqs []int, aging []int) Change {
	if aging != nil && len(aging) != len(freqs) {
		panic("audiometry: aging and freqs differ in length")
	}
	var c Change
	for i, hz := range freqs {
		from, to := baseline.At(hz), current.At(hz)
		if !from.hasLevel() || !to.hasLevel() {
			c.Missing = append(c.Missing, hz)
			continue
		}
		c.Tenths += int(to.Tenths) - int(from.Tenths)
		if aging != nil {
			c.Tenths -= 10 * aging[i]
		}
		c.Count++
		c.AtLeast = c.AtLeast || to.State == NoResponse
		c.AtMost = c.AtMost || from.State == NoResponse
	}
	return c
}

// Average gives the mean change in dB for display; with AtLeast it is a lower bound and with AtMost an upper
// bound. It returns false if a frequency is missing, if there is none, or if the change is bounded on
// neither side. Compare with Reaches, not with this value.
func (c Change) Average() (float64, bool) {
	if c.AtLeast && c.AtMost {
		return 0, false
	}
	return average(c.Tenths, c.Count, c.Missing)
}

// Reaches says whether the average change is averageDB or more, such as the 10 dB of 29 CFR 1910.95(g)(10).
// The limit is taken to the nearest 0.1 dB. A lower bound that reaches the limit is Yes and an upper bound
// that does not is No; any other bound, and a change with a missing frequency, are Undecided.
func (c Change) Reaches(averageDB float64) Verdict {
	return c.against(limitTenths(averageDB, c.Count), false)
}

// against holds the sum of the changes against a limit in tenths of dB, which it must reach or, with above,
// exceed.
func (c *Change) against(limit int, above bool) Verdict {
	if len(c.Missing) > 0 || c.Count == 0 || c.AtLeast && c.AtMost {
		return Undecided
	}
	met := c.Tenths >= limit
	if above {
		met = c.Tenths > limit || c.Tenths == limit && c.AtLeast // the true change lies above Tenths
	}
	switch {
	case met && !c.AtMost:
		return Yes
	case !met && !c.AtLeast:
		return No
	}
	return Undecided
}
