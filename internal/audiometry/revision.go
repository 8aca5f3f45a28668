package audiometry

// Revision is what a row of tests shows about revising one ear's baseline. It finds candidates only: a
// professional decides whether a baseline is revised, and may depart from it.
type Revision struct {
	Verdict Verdict // whether there is a run of tests that meets the rule
	From    int     // place of the first test of the run; places are -1 unless the verdict is Yes
	To      int     // place of the last test of the run
	Best    int     // place of the test in the run with the lowest average; the earliest of equals
	Unsure  bool    // no response or a missing frequency leaves open whether Best has the lowest average
}

// Improvement looks for the first run of tests, of one ear and in a row, whose average at freqs, in Hz, is
// better than the baseline by amountDB or more (49 CFR 227 App. C rule 1: 5 dB on two tests in a row; no
// correction for age). The tests are in the order of days, all after the baseline. A run of length 0 or less
// is taken as 1.
func Improvement(baseline *Ear, tests []*Ear, freqs []int, amountDB float64, inARow int) Revision {
	better := make([]Verdict, len(tests))
	for i, test := range tests {
		better[i] = Shift(test, baseline, freqs, nil).Reaches(amountDB)
	}
	return firstRun(better, inARow).best(tests, freqs)
}

// Persistence looks for the first test of one ear that shows a shift by the scheme, with the next test
// showing it again (49 CFR 227 App. C rule 2: a shift that the next periodic test still shows). For a scheme
// of single frequencies the same frequency must show it again. The tests are in the order of days, all after
// the baseline; whether the second is late enough for the law is for the caller to see to. The slice aging
// holds the correction for age of each test, or is nil for none; another length is a mistake of the caller
// that panics. Best goes by averages without a correction.
func Persistence(s Scheme, baseline *Ear, tests []*Ear, aging [][]int, amountDB float64) Revision {
	if aging != nil && len(aging) != len(tests) {
		panic("audiometry: aging and tests differ in length")
	}
	again := make([]Verdict, max(len(tests)-1, 0))
	var before Outcome
	for i, test := range tests {
		var a []int
		if aging != nil {
			a = aging[i]
		}
		now := s.Judge(baseline, test, a, amountDB)
		if i > 0 {
			again[i-1] = Confirmed(before, now)
		}
		before = now
	}
	r := firstRun(again, 1)
	if r.Verdict == Yes {
		r.To++
	}
	return r.best(tests, s.Frequencies)
}

// firstRun finds the first run of Yes of a length. Without one it is Undecided if undecided tests leave room
// for one, and No otherwise.
func firstRun(verdicts []Verdict, length int) Revision {
	length = max(length, 1)
	r := Revision{Verdict: No, From: -1, To: -1, Best: -1}
	certain, possible := 0, 0
	for i, v := range verdicts {
		switch v {
		case Yes:
			certain, possible = certain+1, possible+1
		case Undecided:
			certain, possible = 0, possible+1
		case No:
			certain, possible = 0, 0
		}
		if certain == length {
			return Revision{Verdict: Yes, From: i - length + 1, To: i, Best: -1}
		}
		if possible >= length {
			r.Verdict = Undecided
		}
	}
	return r
}

// best picks the test of the run with the lowest sum.
func (r Revision) best(tests []*Ear, freqs []int) Revision {
	if r.Verdict != Yes {
		return r
	}
	var lowest Sum
	for i := r.From; i <= r.To; i++ {
		sum := tests[i].Sum(freqs)
		r.Unsure = r.Unsure || len(sum.Missing) > 0
		if r.Best < 0 || sum.Tenths < lowest.Tenths {
			r.Best, lowest = i, sum
		}
	}
	r.Unsure = r.Unsure || lowest.AtLeast
	return r
}
