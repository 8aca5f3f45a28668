package audiometry

// peak judges a level for each of the scheme's frequencies: it keeps the limit, and is higher than the level at
// every frequency of Over (Brazil, NR-7 Annex II: the pattern of a loss by noise). The figure is the highest level
// at the scheme's frequencies.
func (s Scheme) peak(current *Ear, limit int) Outcome {
	if s.Of != OfLevel || len(s.Frequencies) == 0 || len(s.Over) == 0 {
		return undecided(s.Frequencies)
	}
	var o Outcome
	for _, hz := range s.Over {
		if !current.At(hz).hasLevel() {
			o.Missing = append(o.Missing, hz)
		}
	}
	low, high := -unbounded, -unbounded
	for i, hz := range s.Frequencies {
		c := changeAt(&audiometricZero, current, nil, i, hz)
		if c.Count == 0 {
			o.Missing = append(o.Missing, hz)
		}
		cLow, cHigh := c.bounds()
		low, high = max(low, cLow), max(high, cHigh)
		verdict := c.against(limit, s.Above != "")
		for _, other := range s.Over {
			verdict = both(verdict, higher(current.At(hz), current.At(other)))
		}
		switch verdict {
		case Yes:
			o.Shown = append(o.Shown, hz)
		case Undecided:
			o.Open = append(o.Open, hz)
		}
	}
	return o.settle(low, high)
}

// higher says whether one threshold is higher than another. No response is a bound: the threshold lies above it.
func higher(a, b Threshold) Verdict {
	switch {
	case !a.hasLevel() || !b.hasLevel():
		return Undecided
	case a.State == Measured && a.Tenths <= b.Tenths: // also where the other one lies above its bound
		return No
	case b.State == Measured && (a.Tenths > b.Tenths || a.State == NoResponse && a.Tenths == b.Tenths):
		return Yes
	}
	return Undecided
}
