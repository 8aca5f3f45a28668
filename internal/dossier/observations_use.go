package dossier

import (
	"slices"
	"time"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// The figures of the observations over many records; all of them are ours and decide nothing.
const (
	fewestSameChecks   = 20 // functional checks in a row with one and the same result
	fewestOneDayTests  = 12 // hearing tests on one day of the month
	fewestOneDayMonths = 6  // months in which they lie
)

// observeInstrument looks at the calibrations and checks of an audiometer that was used at the site, and at the
// days of its use unless those of all tests of the site are alike.
func (b *Builder) observeInstrument(f *File, id string, u *Usage, siteAlike bool) {
	tests := u.audiometers[id]
	if tests == nil {
		return
	}
	checks := until(b.Registers.calibrations[id], b.AsOf, func(c *record.Calibration) Date { return c.Date })
	first := slices.IndexFunc(checks, func(c *record.Calibration) bool {
		return c.Type == "acoustic" || c.Type == "exhaustive" || c.Type == "laboratory"
	})
	if first >= 0 && tests.firstDay() < checks[first].Date {
		f.Observations = append(f.Observations, observed(calibrationAfterTests, f.Refs.Of(checks[first]), ""))
	}
	if c := firstOfSame(checks); c != nil {
		f.Observations = append(f.Observations, observed(checksAllSame, f.Refs.Of(c), ""))
	}
	if !siteAlike {
		tests.observeDays(f, id)
	}
}

// firstOfSame gives the first functional check of a row of many that found the same deviation at every
// frequency, or nil. Checks without figures are passed over.
func firstOfSame(checks []*record.Calibration) *record.Calibration {
	var first *record.Calibration
	n := 0
	for _, c := range checks {
		switch {
		case c.Type != "functional" || c.Deviation == nil:
			continue
		case first == nil || *c.Deviation != *first.Deviation:
			first, n = c, 0
		}
		if n++; n == fewestSameChecks {
			return first
		}
	}
	return nil
}

// observeDays adds an observation if all tests of one audiometer or tester lie on one day of the month.
func (u *used) observeDays(f *File, id string) {
	if id != "" && oneDay(map[string]*used{id: u}) {
		f.Observations = append(f.Observations, observed(oneDayOfMonth, u.link(f.Refs, u.firstDay()).Ref, ""))
	}
}

// observeSite adds an observation if all tests of the site lie on one day of the month. It points to the first
// of them.
func (u *Usage) observeSite(f *File) {
	if !oneDay(u.audiometers) {
		return
	}
	var first *used
	for _, use := range u.audiometers {
		if first == nil || use.before(first) {
			first = use
		}
	}
	f.Observations = append(f.Observations, observed(oneDayOfMonth, first.link(f.Refs, first.firstDay()).Ref, ""))
}

// oneDay says whether there are many tests, over several months, all on the same day of the month or all on the
// last one.
func oneDay(uses map[string]*used) bool {
	tests, same, last, day := 0, true, true, 0
	months := map[int]bool{}
	for _, use := range uses {
		tests += use.tests
		for d := range use.days {
			year, month, dom := d.Civil()
			same = same && (day == 0 || dom == day)
			last = last && dom == calendar.DaysIn(year, month)
			if !same && !last {
				return false
			}
			day = dom
			months[year*int(time.December)+int(month)] = true
		}
	}
	return tests >= fewestOneDayTests && len(months) >= fewestOneDayMonths
}

// firstDay gives the first day of use.
func (u *used) firstDay() Date {
	var first Date
	for d := range u.days {
		if !first.Known() || d < first {
			first = d
		}
	}
	return first
}

// before says whether the first test of one use comes before that of another; on the same day the ids decide.
func (u *used) before(other *used) bool {
	a, b := u.firstDay(), other.firstDay()
	return a < b || a == b && u.days[a].id < other.days[b].id
}
