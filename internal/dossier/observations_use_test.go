package dossier_test

import (
	"fmt"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// seenOf writes subject kind and id, kind and record of all observations that are not of workers.
func seenOf(j *judged) []string {
	out := []string{}
	for _, f := range j.files {
		for _, o := range f.Observations {
			if f.Kind != dossier.KindWorker {
				out = append(out, fmt.Sprintf("%s %s %s %s", f.Kind, f.ID, o.Kind, o.Ref))
			}
		}
	}
	return out
}

func TestCalibrationAfterTests(t *testing.T) {
	fires := func(kind string) []string {
		return []string{"instrument x1 calibration_after_tests calibration/x1/" + kind + "@2021-02-02"}
	}
	for name, c := range map[string]struct {
		checks []record.Record
		want   []string
	}{
		"none on record is the duty's":              {nil, []string{}},
		"on the day of the test":                    {[]record.Record{check("acoustic", "2021-02-01")}, []string{}},
		"the day after":                             {[]record.Record{check("acoustic", "2021-02-02")}, fires("acoustic")},
		"exhaustive":                                {[]record.Record{check("exhaustive", "2021-02-02")}, fires("exhaustive")},
		"of a laboratory":                           {[]record.Record{check("laboratory", "2021-02-02")}, fires("laboratory")},
		"the first of several":                      {[]record.Record{check("acoustic", "2022-02-02"), check("acoustic", "2021-02-02")}, fires("acoustic")},
		"one before; that it is over is the duty's": {[]record.Record{check("acoustic", "2018-01-01"), check("acoustic", "2021-02-02")}, []string{}},
		"a functional check calibrates not":         {[]record.Record{check("functional", "2021-02-01"), check("acoustic", "2021-02-02")}, fires("acoustic")},
		"after the as-of day":                       {[]record.Record{check("acoustic", "2026-01-02")}, []string{}},
	} {
		t.Run(name, func(t *testing.T) {
			assert.Equal(t, c.want, seenOf(judge(t, "2026-01-01", noisy(append(c.checks, onX1("a1", "2021-02-01"))...)...)))
		})
	}
	assert.Empty(t, seenOf(judge(t, "2026-01-01", noisy(check("acoustic", "2021-02-02"))...)), "no test was made with it")
}

// checksFrom makes functional checks on days in a row, each with its deviation at 1000 Hz in dB; nil is a check
// without figures.
func checksFrom(date string, deviations ...*float64) []record.Record {
	var out []record.Record
	for i, db := range deviations {
		c := check("functional", "2020-01-01")
		c.Date = day(date).AddDays(i)
		if db != nil {
			c.Deviation = &record.Deviation{}
			c.Deviation[3] = record.Num(*db)
		}
		out = append(out, c)
	}
	return out
}

func TestChecksAllSame(t *testing.T) {
	zero, five := 0.0, 5.0
	times := func(n int, db *float64) []*float64 { return slices.Repeat([]*float64{db}, n) }
	fires := func(date string) []string {
		return []string{"instrument x1 checks_all_same_result calibration/x1/functional@" + date}
	}
	for name, c := range map[string]struct {
		deviations []*float64
		want       []string
	}{
		"twenty":                        {times(20, &zero), fires("2021-02-01")},
		"nineteen":                      {times(19, &five), []string{}},
		"twenty after another":          {append(times(1, &zero), times(20, &five)...), fires("2021-02-02")},
		"once more":                     {times(45, &five), fires("2021-02-01")},
		"broken by one":                 {slices.Concat(times(19, &zero), times(1, &five), times(19, &zero)), []string{}},
		"without figures":               {times(40, nil), []string{}},
		"those without are passed over": {slices.Concat(times(10, &zero), times(3, nil), times(10, &zero)), fires("2021-02-01")},
	} {
		t.Run(name, func(t *testing.T) {
			assert.Equal(t, c.want, seenOf(judge(t, "2026-01-01", noisy(append(checksFrom("2021-02-01", c.deviations...), onX1("a1", "2021-02-01"))...)...)))
		})
	}
	calibrations := checksFrom("2020-02-01", times(20, &zero)...)
	for _, c := range calibrations {
		c.(*record.Calibration).Type = "acoustic"
	}
	assert.Empty(t, seenOf(judge(t, "2026-01-01", noisy(append(calibrations, onX1("a1", "2021-02-01"))...)...)), "calibrations are no checks")
}

// monthly makes tests of w1 on one day in each of some months, with as many on each day as wanted.
func monthly(months, each int, dom func(month int) int, change func(i int, a *record.Audiogram)) []record.Record {
	var out []record.Record
	for m := range months {
		for e := range each {
			i := m*each + e
			a := audiogram(fmt.Sprintf("b%03d", i), fmt.Sprintf("%d-%02d-%02d", 2021+m/12, 1+m%12, dom(1+m%12)), "other", laterLeft, laterRight)
			a.AudiometerID, a.TesterID = "x1", "t1"
			change(i, a)
			out = append(out, a)
		}
	}
	return out
}

func TestOneDayOfMonth(t *testing.T) {
	fifteenth := func(int) int { return 15 }
	lastDay := func(month int) int { return []int{31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31}[month-1] }
	same := func(int, *record.Audiogram) {}
	moved := func(n int) func(int, *record.Audiogram) {
		return func(i int, a *record.Audiogram) {
			if i == n {
				a.Date++
			}
		}
	}
	site := []string{"site s1 one_day_of_month audiogram/b000"}
	for name, c := range map[string]struct {
		records []record.Record
		want    []string
	}{
		"twelve tests in twelve months":           {monthly(12, 1, fifteenth, same), site},
		"twelve tests in six months":              {monthly(6, 2, fifteenth, same), site},
		"eleven tests":                            {monthly(11, 1, fifteenth, same), []string{}},
		"fifteen tests in five months":            {monthly(5, 3, fifteenth, same), []string{}},
		"one on another day":                      {monthly(12, 2, fifteenth, moved(7)), []string{}},
		"the last day of each month":              {monthly(12, 1, lastDay, same), site},
		"the last day of each month but one":      {monthly(12, 1, lastDay, moved(0)), []string{}},
		"of one audiometer and tester of several": {append(monthly(12, 1, fifteenth, same), onX2()), []string{"instrument x1 one_day_of_month audiogram/b000", "tester t1 one_day_of_month audiogram/b000"}},
		"of one tester with several audiometers": {append(monthly(12, 1, fifteenth, func(i int, a *record.Audiogram) { a.AudiometerID = fmt.Sprint("x", 1+i%2) }), onX2()),
			[]string{"tester t1 one_day_of_month audiogram/b000"}},
		"of nobody named": {append(monthly(12, 1, fifteenth, func(_ int, a *record.Audiogram) { a.AudiometerID, a.TesterID = "", "" }), onX2()), []string{}},
	} {
		t.Run(name, func(t *testing.T) {
			assert.Equal(t, c.want, seenOf(judge(t, "2026-01-01", noisy(c.records...)...)))
		})
	}
}

// onX2 is a test on another day, by another audiometer and tester.
func onX2() record.Record {
	a := onX1("a1", "2021-02-01")
	a.AudiometerID, a.TesterID = "x2", "t2"
	return a
}
