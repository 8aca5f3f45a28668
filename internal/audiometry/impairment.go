package audiometry

// Impairment is a hearing impairment in percent by a rule of 1979 (AAO/AMA; from memory, its frequencies from
// a secondary source). Other countries and schemes reckon otherwise. For information only.
type Impairment struct {
	Percent float64 // 0 to 100
	AtLeast bool    // no response: the true value may be higher
}

// impairmentFrequencies are those that the rule averages, in Hz.
var impairmentFrequencies = [4]int{500, 1000, 2000, 3000}

// MonauralImpairment gives the impairment of one ear: 1.5 % for each dB of the average at 500, 1000, 2000 and
// 3000 Hz over 25 dB, from 0 to 100. It returns false if a frequency is missing.
func MonauralImpairment(e *Ear) (Impairment, bool) {
	s := e.Sum(impairmentFrequencies[:])
	mean, ok := s.Average()
	if !ok {
		return Impairment{}, false
	}
	percent := min(max(1.5*(mean-25), 0), 100)
	return Impairment{Percent: percent, AtLeast: s.AtLeast && percent < 100}, true
}

// BinauralImpairment gives the impairment of both ears: five parts of the better ear and one of the worse. It
// returns false if a frequency is missing.
func BinauralImpairment(left, right *Ear) (Impairment, bool) {
	l, okLeft := MonauralImpairment(left)
	r, okRight := MonauralImpairment(right)
	if !okLeft || !okRight {
		return Impairment{}, false
	}
	percent := (5*min(l.Percent, r.Percent) + max(l.Percent, r.Percent)) / 6
	return Impairment{Percent: percent, AtLeast: l.AtLeast || r.AtLeast}, true
}
