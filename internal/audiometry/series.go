package audiometry

import "hearduty/internal/calendar"

// Dated is one ear's thresholds on a day.
type Dated struct {
	Date calendar.Date
	Ear  *Ear
}

// Rise holds the last test of one ear against each earlier test that lies no further back than within, and
// gives the outcome that shows most: a Yes before an Undecided before a No, and among equals the one with
// the highest lower bound, the earlier test first. It serves schemes such as a rise of the sum at 3000, 4000
// and 6000 Hz within three years. The tests are in the order of days; a test on the last day the interval
// reaches still counts. At gives the place of the earlier test; it is -1, and the outcome Undecided, if there
// is none. It fails if the interval cannot be counted without a calendar of working days.
func Rise(s Scheme, tests []Dated, within calendar.Interval, amountDB float64) (o Outcome, at int, err error) {
	o, at = undecided(s.Frequencies), -1
	if len(tests) == 0 {
		return o, at, nil
	}
	last := tests[len(tests)-1]
	for i, t := range tests[:len(tests)-1] {
		until, err := within.After(t.Date, nil)
		if err != nil {
			return undecided(s.Frequencies), -1, err
		}
		if !t.Date.Known() || until < last.Date {
			continue
		}
		found := s.Judge(t.Ear, last.Ear, nil, amountDB)
		if at < 0 || stronger(found, o) {
			o, at = found, i
		}
	}
	return o, at, nil
}

// stronger says whether one outcome shows more than another.
func stronger(a, b Outcome) bool {
	rank := [...]int{No: 0, Undecided: 1, Yes: 2}
	if rank[a.Verdict] != rank[b.Verdict] {
		return rank[a.Verdict] > rank[b.Verdict]
	}
	return a.Low > b.Low
}
