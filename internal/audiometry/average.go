package audiometry

// The frequencies of common averages, in Hz; use them as e.Sum(PTA4[:]). They are practice, from memory: no
// law or standard that names them was read.
var (
	PTA3 = [3]int{500, 1000, 2000}       // pure-tone average of three frequencies
	PTA4 = [4]int{500, 1000, 2000, 4000} // pure-tone average of four frequencies
	Low  = [3]int{500, 1000, 2000}       // low average, the speech frequencies
	High = [3]int{3000, 4000, 6000}      // high average, where noise is seen first
)

// The words for ears.
const (
	LeftEar  = "left"
	RightEar = "right"
	BothEars = "both"
)

// WorseEar names the ear with the higher average at freqs, in Hz: LeftEar, RightEar, or BothEars if the
// averages are equal. It returns false if the records cannot tell, because a frequency is missing or no
// response leaves the order open.
func WorseEar(left, right *Ear, freqs []int) (string, bool) {
	d := Shift(left, right, freqs, nil)
	if len(d.Missing) > 0 || d.Count == 0 || d.AtLeast && d.AtMost {
		return "", false
	}
	switch {
	case d.Tenths == 0 && !d.AtLeast && !d.AtMost:
		return BothEars, true
	case d.Tenths >= 0 && !d.AtMost:
		return RightEar, true
	case d.Tenths <= 0 && !d.AtLeast:
		return LeftEar, true
	}
	return "", false
}

// BetterEar names the ear with the lower average at freqs, in Hz, in the manner of WorseEar.
func BetterEar(left, right *Ear, freqs []int) (string, bool) {
	return WorseEar(right, left, freqs) // seen from the other side, the worse ear bears the other's name
}

// TotalReaches says whether the sum over the frequencies, not their average, is totalDB or more. The limit
// is taken to the nearest 0.1 dB. Yes holds for a lower bound that reaches the limit; a lower bound that
// does not, and a sum with a missing frequency, are Undecided.
func (s Sum) TotalReaches(totalDB float64) Verdict {
	if s.Count == 0 {
		return Undecided
	}
	total := Change{Tenths: s.Tenths, Count: s.Count, AtLeast: s.AtLeast, Missing: s.Missing}
	return total.against(limitTenths(totalDB, 1), false)
}
