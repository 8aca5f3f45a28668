package audiometry

import (
	"math"
	"slices"
)

// Outcome is what a scheme says of one ear. Its lists are not to be changed.
type Outcome struct {
	Verdict Verdict
	// Low and High enclose the figure in dB that is held against the amount: the mean or the sum, or the
	// change at the frequency, or pair of neighbours, that shows most. They are equal if the figure is
	// known. No response and missing frequencies leave it open to one side or both, which is an infinity.
	Low, High float64
	Shown     []int // frequencies in Hz that show it
	Open      []int // frequencies in Hz of which the records cannot tell whether they show it
	Missing   []int // frequencies in Hz without a level in one of the tests
}

// Figure gives the figure in dB for display; false if it is not known exactly.
func (o Outcome) Figure() (float64, bool) {
	if o.Low != o.High {
		return 0, false
	}
	return o.Low, true
}

// audiometricZero is the baseline of schemes of level: 0 dB HL at every frequency.
var audiometricZero = func() (e Ear) {
	for i := range e {
		e[i] = Threshold{State: Measured}
	}
	return e
}()

// Judge holds one ear against a scheme of change or of level; a scheme of level has no baseline and no
// correction for age, and both are ignored. The dB of aging, one for each of the scheme's frequencies, are
// taken off the current thresholds; nil means no correction, and any other length is a mistake of the caller
// that panics. The amount is taken to the nearest 0.1 dB; it is to be reached, or exceeded if the scheme
// says Above. All comparisons are of whole tenths, so that an average of exactly 10 dB reaches 10 dB.
//
// No response is a bound: a verdict of Yes or No holds for whatever level the threshold may have had, and
// everything else is Undecided (ours). A missing frequency leaves a mean, a sum and a pair undecided; a
// single frequency still decides for itself. A scheme that Check refuses for its rule is Undecided.
func (s Scheme) Judge(baseline, current *Ear, aging []int, amountDB float64) Outcome {
	if s.Of == OfLevel {
		baseline, aging = &audiometricZero, nil
	}
	return s.judge(baseline, current, aging, amountDB)
}

func (s Scheme) judge(baseline, current *Ear, aging []int, amountDB float64) Outcome {
	if aging != nil && len(aging) != len(s.Frequencies) {
		panic("audiometry: aging and frequencies differ in length")
	}
	limit := limitTenths(amountDB, 1)
	switch s.Rule {
	case Mean, Total:
		return s.together(Shift(baseline, current, s.Frequencies, aging), limit)
	case Any:
		return s.singly(baseline, current, aging, limit)
	case Adjacent:
		return s.inPairs(baseline, current, aging, limit)
	case Peak:
		return s.peak(current, limit)
	}
	return undecided(s.Frequencies)
}

func undecided(open []int) Outcome {
	return Outcome{Verdict: Undecided, Low: math.Inf(-1), High: math.Inf(1), Open: open}
}

// together judges a mean or a sum.
func (s Scheme) together(c Change, limit int) Outcome {
	over := 1
	if s.Rule == Mean {
		over = max(c.Count, 1)
	}
	o := Outcome{Verdict: c.against(limit*over, s.Above != ""), Missing: c.Missing}
	low, high := c.bounds()
	o.Low, o.High = decibels(low, over), decibels(high, over)
	switch o.Verdict {
	case Yes:
		o.Shown = s.Frequencies
	case Undecided:
		o.Open = s.Frequencies
	}
	return o
}

// singly judges each frequency for itself.
func (s Scheme) singly(baseline, current *Ear, aging []int, limit int) Outcome {
	if len(s.Frequencies) == 0 {
		return undecided(nil)
	}
	var o Outcome
	low, high := -unbounded, -unbounded
	for i, hz := range s.Frequencies {
		c := changeAt(baseline, current, aging, i, hz)
		if c.Count == 0 {
			o.Missing = append(o.Missing, hz)
		}
		cLow, cHigh := c.bounds()
		low, high = max(low, cLow), max(high, cHigh)
		switch c.against(limit, s.Above != "") {
		case Yes:
			o.Shown = append(o.Shown, hz)
		case Undecided:
			o.Open = append(o.Open, hz)
		}
	}
	return o.settle(low, high)
}

// inPairs judges each two neighbours: both must show it.
func (s Scheme) inPairs(baseline, current *Ear, aging []int, limit int) Outcome {
	if len(s.Frequencies) < 2 {
		return undecided(s.Frequencies)
	}
	var o Outcome
	low, high := -unbounded, -unbounded
	var before Change
	for i, hz := range s.Frequencies {
		c := changeAt(baseline, current, aging, i, hz)
		if c.Count == 0 {
			o.Missing = append(o.Missing, hz)
		}
		if i > 0 {
			cLow, cHigh := c.bounds()
			beforeLow, beforeHigh := before.bounds()
			low, high = max(low, min(beforeLow, cLow)), max(high, min(beforeHigh, cHigh))
			switch both(before.against(limit, s.Above != ""), c.against(limit, s.Above != "")) {
			case Yes:
				o.Shown = appendPair(o.Shown, s.Frequencies[i-1], hz)
			case Undecided:
				o.Open = appendPair(o.Open, s.Frequencies[i-1], hz)
			}
		}
		before = c
	}
	return o.settle(low, high)
}

// settle fills the verdict from the frequencies that show it and the figure from its bounds in tenths.
func (o Outcome) settle(low, high int) Outcome {
	switch {
	case len(o.Shown) > 0:
		o.Verdict = Yes
	case len(o.Open) > 0:
		o.Verdict = Undecided
	}
	o.Low, o.High = decibels(low, 1), decibels(high, 1)
	return o
}

// appendPair adds two neighbours to a rising list that may end with the first of them.
func appendPair(list []int, first, second int) []int {
	if n := len(list); n == 0 || list[n-1] != first {
		list = append(list, first)
	}
	return append(list, second)
}

// changeAt gives the change at one frequency; its Count is 0 if a level is missing.
func changeAt(baseline, current *Ear, aging []int, i, hz int) Change {
	place := slices.Index(Frequencies[:], hz)
	if place < 0 || !baseline[place].hasLevel() || !current[place].hasLevel() {
		return Change{}
	}
	from, to := baseline[place], current[place]
	c := Change{Tenths: int(to.Tenths) - int(from.Tenths), Count: 1, AtLeast: to.State == NoResponse, AtMost: from.State == NoResponse}
	if aging != nil {
		c.Tenths -= 10 * aging[i]
	}
	return c
}

// unbounded stands for no bound, in tenths of dB.
const unbounded = math.MaxInt32

// bounds encloses the sum of a change in tenths of dB. It and against take a pointer for speed alone.
func (c *Change) bounds() (low, high int) {
	low, high = -unbounded, unbounded
	if c.Count == 0 || len(c.Missing) > 0 {
		return low, high
	}
	if !c.AtMost {
		low = c.Tenths
	}
	if !c.AtLeast {
		high = c.Tenths
	}
	return low, high
}

// decibels turns a bound in tenths of dB, summed over count frequencies, into an average in dB.
func decibels(tenths, count int) float64 {
	switch tenths {
	case unbounded:
		return math.Inf(1)
	case -unbounded:
		return math.Inf(-1)
	}
	return float64(tenths) / float64(10*count)
}
