package audiometry

import "math"

// Verdict answers whether a value reaches a limit.
type Verdict uint8

// The verdicts. Undecided means that the record cannot tell.
const (
	No Verdict = iota
	Yes
	Undecided
)

// String writes the verdict in one word.
func (v Verdict) String() string {
	switch v {
	case No:
		return "no"
	case Yes:
		return "yes"
	}
	return "undecided"
}

// Sum adds one ear's thresholds over some frequencies. Averages are compared through it, in whole
// numbers, so that an average of exactly 25 dB is found to reach 25 dB.
type Sum struct {
	Tenths  int   // sum in tenths of dB HL over the Count frequencies that have a level
	Count   int   // frequencies that have a level
	AtLeast bool  // a frequency had no response, so the true sum is above Tenths
	Missing []int // frequencies in Hz without a level; as long as there are any, there is no average
}

// Sum adds the thresholds at freqs, in Hz. No response enters with the highest level presented, as a lower
// bound (common practice, no source). A frequency that was not recorded or not tested goes to Missing; no
// other frequency is put in its place. Nothing is allocated unless a frequency is missing.
func (e *Ear) Sum(freqs []int) Sum {
	var s Sum
	for _, hz := range freqs {
		t := e.At(hz)
		if !t.hasLevel() {
			s.Missing = append(s.Missing, hz)
			continue
		}
		s.Tenths += int(t.Tenths)
		s.Count++
		s.AtLeast = s.AtLeast || t.State == NoResponse
	}
	return s
}

// Average gives the mean in dB HL for display; with AtLeast it is a lower bound. It returns false if a
// frequency is missing or there is none. Compare with Reaches, not with this value.
func (s Sum) Average() (float64, bool) {
	return average(s.Tenths, s.Count, s.Missing)
}

// Reaches says whether the average is averageDB or more, such as the 25 dB of 29 CFR 1904.10(a). The limit
// is taken to the nearest 0.1 dB. Yes holds for a lower bound that reaches the limit; a lower bound that
// does not, and a sum with a missing frequency, are Undecided.
func (s Sum) Reaches(averageDB float64) Verdict {
	if len(s.Missing) > 0 || s.Count == 0 {
		return Undecided
	}
	if s.Tenths >= limitTenths(averageDB, s.Count) {
		return Yes
	}
	if s.AtLeast {
		return Undecided
	}
	return No
}

func (t Threshold) hasLevel() bool {
	return t.State == Measured || t.State == NoResponse
}

func average(tenths, count int, missing []int) (float64, bool) {
	if len(missing) > 0 || count == 0 {
		return 0, false
	}
	return float64(tenths) / float64(10*count), true
}

// limitTenths gives the sum in tenths of dB at which count frequencies have the average.
func limitTenths(averageDB float64, count int) int {
	return int(math.Round(averageDB*10)) * count
}
