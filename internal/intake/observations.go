package intake

import (
	"fmt"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// The kinds of an Observation.
const (
	SameDayTests   = "same_day_tests"   // two tests of one worker on one day, neither a retest
	SameTestTwice  = "same_test_twice"  // one test under two ids
	BaselineTwice  = "baseline_twice"   // two tests of one worker are marked as baseline
	TWANotOfDose   = "twa_not_of_dose"  // dose and average of one row contradict each other
	DosesSwapped   = "doses_swapped"    // a higher threshold has the higher dose
	AverageForTWA  = "average_for_twa"  // the average of the run time stands for that of 8 hours
	CheckDrift     = "check_drift"      // calibrator checks before and after differ
	RunBeyondShift = "run_beyond_shift" // the instrument ran longer than the shift
)

// observationNames are the kinds in words, in the order in which they are counted.
var observationNames = []struct{ kind, one, many string }{
	{SameDayTests, "pair of tests on one day", "pairs of tests on one day"},
	{SameTestTwice, "test under two ids", "tests under two ids"},
	{BaselineTwice, "second test marked as baseline", "second tests marked as baseline"},
	{TWANotOfDose, "average that is not that of its dose", "averages that are not those of their doses"},
	{AverageForTWA, "average of the run time in place of one of 8 hours", "averages of the run time in place of one of 8 hours"},
	{DosesSwapped, "pair of doses that cannot both be right", "pairs of doses that cannot both be right"},
	{CheckDrift, "drift between calibrator checks", "drifts between calibrator checks"},
	{RunBeyondShift, "run longer than the shift", "runs longer than the shift"},
}

// Observation is something about accepted rows that somebody should look at. It holds no hearing threshold
// and no birth date, and changes nothing.
type Observation struct {
	Kind   string  `json:"kind" enum:"same_day_tests|same_test_twice|baseline_twice|twa_not_of_dose|average_for_twa|doses_swapped|check_drift|run_beyond_shift" doc:"what was observed, in a word"`
	File   string  `json:"file" doc:"path relative to the program's folder"`
	Sheet  string  `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row    int     `json:"row" doc:"line of the file, row of the sheet, or place in the list"`
	Others []Place `json:"others,omitempty" doc:"earlier rows that it is about as well"`
	Text   string  `json:"text" doc:"the observation in a sentence"`

	source int
}

// Place is a row of an input.
type Place struct {
	File  string `json:"file" doc:"path relative to the program's folder"`
	Sheet string `json:"sheet,omitempty" doc:"sheet of a workbook"`
	Row   int    `json:"row" doc:"line of the file, row of the sheet, or place in the list"`
}

// ObservationCounts says in words how many observations of each kind there are.
func (l *Ledger) ObservationCounts() []string {
	number := map[string]int{}
	for _, o := range l.Observations {
		number[o.Kind]++
	}
	var out []string
	for _, name := range observationNames {
		switch n := number[name.kind]; n {
		case 0:
		case 1:
			out = append(out, "1 "+name.one)
		default:
			out = append(out, fmt.Sprintf("%d %s", n, name.many))
		}
	}
	return out
}

// observer compares accepted records with each other and with themselves. Of audiograms it keeps a few
// bytes each.
type observer struct {
	ledger    *Ledger
	tests     marks[sum, test]          // by worker and day
	baselines marks[sum, record.Origin] // tests marked as baseline, by worker
	readings  map[digest][]reading      // by measurement
	buffer    []byte
}

// test is what is kept of an audiogram.
type test struct {
	at     record.Origin
	levels uint32 // digest of its thresholds; 0 for none
	retest bool
}

func newObserver(l *Ledger) *observer {
	return &observer{ledger: l, readings: map[digest][]reading{}}
}

func (o *observer) look(r record.Record) {
	switch r := r.(type) {
	case *record.Audiogram:
		o.audiogram(r)
	case *record.Measurement:
		o.measurement(r)
	}
}

func (o *observer) add(kind string, at record.Origin, other *record.Origin, text string) {
	in := &o.ledger.Inputs[at.Source]
	seen := Observation{Kind: kind, File: in.File, Sheet: in.Sheet, Row: int(at.Row), Text: text, source: int(at.Source)}
	if other != nil {
		in := &o.ledger.Inputs[other.Source]
		seen.Others = []Place{{in.File, in.Sheet, int(other.Row)}}
	}
	o.ledger.Observations = append(o.ledger.Observations, seen)
}

// audiogram compares a test with the first one of the same worker and day, and a baseline with the first one of the worker.
func (o *observer) audiogram(a *record.Audiogram) {
	if a.Purpose == "baseline" {
		if first, double := o.baselines.mark(sum(sum(offset).text(a.WorkerID).hash()), a.At()); double {
			o.add(BaselineTwice, a.At(), &first, "two tests of one worker have the purpose baseline; if one replaces the other, a follow_up of the kind baseline_revision must say so")
		}
	}
	key := sum(sum(offset).text(a.WorkerID).number(int64(a.Date)).hash())
	this := test{at: a.At(), levels: levels(a), retest: a.Purpose == "retest"}
	first, double := o.tests.mark(key, this)
	switch {
	case !double:
	case first.levels == this.levels && this.levels != 0:
		o.add(SameTestTwice, this.at, &first.at, "two audiograms of one worker and day have the same thresholds under two ids, so one test may stand here twice")
	case first.levels != this.levels && !first.retest && !this.retest:
		o.add(SameDayTests, this.at, &first.at, "two audiograms of one worker and day differ, and neither has the purpose retest: a retest, or a correction of the other?")
	}
}

// levels gives a digest of the thresholds, or 0 if there are none.
func levels(a *record.Audiogram) uint32 {
	if a.Left == (audiometry.Ear{}) && a.Right == (audiometry.Ear{}) {
		return 0
	}
	s := sum(offset)
	for i := range a.Left {
		l, r := a.Left[i], a.Right[i]
		s = s.number(int64(l.Tenths)<<16 | int64(l.State)).number(int64(r.Tenths)<<16 | int64(r.State))
	}
	return max(uint32(s>>32), 1)
}

// ObservationSentence gives the observation with its places, as a line for people.
func ObservationSentence(o Observation) string {
	places := []string{at(o.File, o.Sheet, o.Row)}
	for _, p := range o.Others {
		places = append(places, at(p.File, p.Sheet, p.Row))
	}
	return strings.Join(places, " and ") + ": " + o.Text
}

func at(file, sheet string, row int) string {
	if sheet != "" {
		return fmt.Sprintf("%s %s!%d", file, sheet, row)
	}
	return fmt.Sprintf("%s:%d", file, row)
}
