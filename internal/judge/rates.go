package judge

import (
	"cmp"
	"math"
	"slices"
	"sync"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// The names of the rates.
const (
	testedInTime    = "tested_in_time"
	shiftsShown     = "shifts"
	shiftsConfirmed = "shifts_confirmed"
	protectedBelow  = "protected_below_target"
	trainedInTime   = "trained_in_time"
)

// rateNames are in the order in which rates are shown, each with what it counts.
var rateNames = []struct{ name, about string }{
	{testedInTime, "hearing tests that fell due in the year and were made in time, of all that fell due"},
	{shiftsShown, "workers whose test of the year shows a threshold shift, of the workers tested while in the program"},
	{shiftsConfirmed, "shifts first shown in the year that the next test shows again, of those with a next test"},
	{protectedBelow, "workers whose estimated level under the protector meets the law's target on the day of judging, of those for whom it is known"},
	{trainedInTime, "training sessions that fell due in the year and were held in time, of all that fell due"},
}

// The least numbers that are shown. Below them a person could be told from a number (common practice, no source).
const (
	leastOf   = 10 // of the denominator
	leastPart = 5  // of a number that is about hearing, and of what remains to the denominator
)

type rateKey struct {
	year int
	name string
}

type ratio struct{ part, of int }

// rates counts for one site under one bundle.
type rates struct {
	mu     sync.Mutex
	counts map[rateKey]ratio
}

func (r *rates) add(key rateKey, part, of int) {
	if r.counts == nil {
		r.counts = map[rateKey]ratio{}
	}
	c := r.counts[key]
	r.counts[key] = ratio{c.part + part, c.of + of}
}

// tally is what one dossier adds, so that the lock is taken once.
type tally struct {
	key rateKey
	in  bool
}

// rateOf says what a settled obligation of a worker counts towards, if anything. What is still due, unproven or
// lifted counts nowhere.
func rateOf(d *bundle.Duty, x *outcome, o *obligation, asOf calendar.Date) (tally, bool) {
	in := x.status == finding.Met
	if o == nil || !in && x.status != finding.Late && x.status != finding.Gap {
		return tally{}, false
	}
	switch {
	case o.shape == limit && d.Topic == "protectors" && (o.compare == "at_most" || o.compare == "below"):
		return tally{rateKey{0, protectedBelow}, in}, true
	case o.shape != recurring && o.shape != once || !x.due.Known() || x.due > asOf: // what is done before it falls due counts once it has
		return tally{}, false
	case d.Topic == "audiometry" && slices.Contains(d.Evidence, "audiogram"):
		return tally{rateKey{x.due.Year(), testedInTime}, in}, true
	case d.Topic == "training" && slices.Contains(d.Evidence, "training"):
		return tally{rateKey{x.due.Year(), trainedInTime}, in}, true
	}
	return tally{}, false
}

func (r *rates) take(list []tally) {
	if len(list) == 0 {
		return
	}
	r.mu.Lock()
	defer r.mu.Unlock()
	for _, t := range list {
		part := 0
		if t.in {
			part = 1
		}
		r.add(t.key, part, 1)
	}
}

// hearing counts the shifts of a worker, each worker once a year.
func (r *rates) hearing(d *dossier.Worker) {
	tested, shifted := map[int]bool{}, map[int]bool{}
	for i := range d.Audiograms {
		if t := &d.Audiograms[i]; t.ToCompare {
			tested[t.Date.Year()] = true
		}
	}
	shiftDay := map[string]calendar.Date{}
	for i := range d.Shifts {
		s := &d.Shifts[i]
		shifted[s.Date.Year()] = true
		shiftDay[s.Ref] = s.Date
	}
	again := map[string]bool{}
	for _, p := range d.Persistent {
		again[p.Shift.Ref] = true
	}
	followed := map[string]bool{}
	for _, l := range d.Lapsed {
		followed[l.Shift.Ref] = true
	}
	r.mu.Lock()
	defer r.mu.Unlock()
	for year := range tested {
		r.add(rateKey{year, shiftsShown}, one(shifted[year]), 1)
	}
	for ref, day := range shiftDay {
		if again[ref] || followed[ref] {
			r.add(rateKey{day.Year(), shiftsConfirmed}, one(again[ref]), 1)
		}
	}
}

func one(yes bool) int {
	if yes {
		return 1
	}
	return 0
}

// ratesOf writes the rates of each site under each bundle and, where a bundle judges several sites, of all of them.
func (c *check) ratesOf() []finding.Rate {
	out := []finding.Rate{}
	for _, b := range c.used {
		all, hidden, sites := map[rateKey]ratio{}, map[rateKey]int{}, 0
		for _, s := range c.sites {
			for _, bench := range c.benches[s.ID] {
				if bench.bundle != b {
					continue
				}
				sites++
				for key, n := range bench.rates.counts {
					all[key] = ratio{all[key].part + n.part, all[key].of + n.of}
					if small(key.name, n) {
						hidden[key]++
					}
				}
				out = append(out, written(s.ID, b.ID, bench.rates.counts, nil)...)
			}
		}
		if sites > 1 { // one hidden site could be told from the sum and the others
			out = append(out, written("", b.ID, all, func(k rateKey) bool { return hidden[k] == 1 })...)
		}
	}
	return out
}

func written(site, bundle string, counts map[rateKey]ratio, hide func(rateKey) bool) []finding.Rate {
	var out []finding.Rate
	for place, r := range rateNames {
		years := []int{}
		for key := range counts {
			if key.name == r.name {
				years = append(years, key.year)
			}
		}
		slices.SortFunc(years, func(a, b int) int { return cmp.Compare(b, a) })
		for _, year := range years {
			key := rateKey{year, rateNames[place].name}
			n := counts[key]
			rate := finding.Rate{Site: site, Bundle: bundle, Year: year, Name: r.name, About: r.about}
			if small(r.name, n) || hide != nil && hide(key) {
				rate.Suppressed = true
			} else {
				percent := math.Round(1000*float64(n.part)/float64(n.of)) / 10
				rate.Part, rate.Of, rate.Percent = &n.part, &n.of, &percent
			}
			out = append(out, rate)
		}
	}
	return out
}

// small says whether persons could be told from the numbers.
func small(name string, n ratio) bool {
	if n.of < leastOf {
		return true
	}
	few := func(k int) bool { return k > 0 && k < leastPart }
	return (name == shiftsShown || name == shiftsConfirmed) && (few(n.part) || few(n.of-n.part))
}
