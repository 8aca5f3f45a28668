package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

func TestBaseline(t *testing.T) {
	oneEar := func(a *record.Audiogram) *record.Audiogram {
		a.Right = audiometry.Ear{}
		return a
	}
	notTested := func(a *record.Audiogram) *record.Audiogram {
		for i := range a.Right {
			a.Right[i].State = audiometry.NotTested
		}
		return a
	}
	for name, c := range map[string]struct {
		records []record.Record
		id      string
		marked  bool
	}{
		"The first test marked baseline, though another came before":   {[]record.Record{tested("a1", "2020-02-01", "periodic", 10, 10), tested("a2", "2020-03-01", "baseline", 10, 10), tested("a3", "2021-03-01", "baseline", 10, 10)}, "a2", true},
		"The first test where none is marked":                          {[]record.Record{tested("a1", "2020-02-01", "periodic", 10, 10), tested("a2", "2020-03-01", "", 10, 10)}, "a1", false},
		"An invalidated one gives way to the next one marked":          {[]record.Record{tested("a1", "2020-02-01", "baseline", 10, 10), tested("a2", "2020-03-01", "periodic", 10, 10), tested("a3", "2020-04-01", "baseline", 10, 10), follow("invalidated", "a1", "2020-02-02")}, "a3", true},
		"Or to the first valid test":                                   {[]record.Record{tested("a1", "2020-02-01", "baseline", 10, 10), tested("a2", "2020-03-01", "periodic", 10, 10), follow("invalidated", "a1", "2020-02-02")}, "a2", false},
		"One that lacks an ear is none":                                {[]record.Record{oneEar(tested("a1", "2020-02-01", "baseline", 10, 10)), tested("a2", "2020-03-01", "periodic", 10, 10)}, "a2", false},
		"One whose ear was not tested is none":                         {[]record.Record{notTested(tested("a1", "2020-02-01", "baseline", 10, 10)), tested("a2", "2020-03-01", "periodic", 10, 10)}, "a2", false},
		"A test from before the hire is one":                           {[]record.Record{tested("a1", "2019-12-01", "baseline", 10, 10)}, "a1", true},
		"What is found invalid later is valid on the day of the check": {[]record.Record{tested("a1", "2020-02-01", "baseline", 10, 10), follow("invalidated", "a1", "2024-01-02")}, "a1", true},
		"Without tests there is none":                                  {nil, "", false},
	} {
		t.Run(name, func(t *testing.T) {
			j := judge(t, "2024-01-01", noisy(c.records...)...)
			d := j.worker()
			if c.id == "" {
				assert.Nil(t, d.Baseline)
				assert.Nil(t, d.Enrolled[0].Baseline)
				assert.Nil(t, d.Enrolled[0].Tested)
				return
			}
			require.NotNil(t, d.Baseline)
			assert.Equal(t, c.id, d.Baseline.ID)
			assert.Equal(t, c.marked, d.Baseline.Marked)
			assert.Equal(t, "audiogram/"+c.id, d.Enrolled[0].Baseline.Ref)
			assert.Equal(t, max(d.Baseline.Date, day("2020-01-01")), d.Enrolled[0].Tested.From)
			assert.Len(t, j.file("worker", "w1").Series["audiogram.baseline"], 1)
		})
	}
}

func TestRetestInTime(t *testing.T) {
	for name, c := range map[string]struct {
		test, retest string
		inTime       bool
	}{
		"day 30":                        {"2021-03-01", "2021-03-31", true},
		"day 31":                        {"2021-03-01", "2021-04-01", false},
		"day 30 over a month end":       {"2021-01-31", "2021-03-02", true},
		"day 31 over a month end":       {"2021-01-31", "2021-03-03", false},
		"day 30 in a leap year":         {"2024-01-31", "2024-03-01", true},
		"day 31 in a leap year":         {"2024-01-31", "2024-03-02", false},
		"day 30 over the end of a year": {"2021-12-31", "2022-01-30", true},
		"the same day":                  {"2021-03-01", "2021-03-01", true},
	} {
		t.Run(name, func(t *testing.T) {
			j := judge(t, "2025-01-01", noisy(tested("a0", "2020-02-01", "baseline", 10, 10), tested("a1", c.test, "periodic", 20, 10), tested("a2", c.retest, "retest", 10, 10))...)
			d := j.worker()
			require.Len(t, d.Audiograms, 3)
			first, second := d.Audiograms[1], d.Audiograms[2]
			if c.inTime {
				assert.Empty(t, d.Shifts, "the retest, without shift, stands in for the test")
				assert.Equal(t, "audiogram/a2", first.ReplacedBy)
				assert.Equal(t, "audiogram/a1", second.RetestOf)
				assert.Equal(t, []bool{false, true}, []bool{first.ToCompare, second.ToCompare})
				assert.Len(t, j.file("worker", "w1").Series["audiogram.valid"], 2)
				return
			}
			require.Len(t, d.Shifts, 1)
			assert.Equal(t, "a1", d.Shifts[0].ID)
			assert.Empty(t, first.ReplacedBy)
			assert.Equal(t, []bool{true, true}, []bool{first.ToCompare, second.ToCompare})
			assert.Len(t, j.file("worker", "w1").Series["audiogram.valid"], 3)
		})
	}
}

func TestSeveralRetestsAndOthers(t *testing.T) {
	base, test := tested("a0", "2020-02-01", "baseline", 10, 10), tested("a1", "2021-03-01", "periodic", 20, 10)
	missing := func(a *record.Audiogram, hz int) *record.Audiogram {
		a.Right = earBut(a.Right, hz, audiometry.Threshold{State: audiometry.NotTested})
		return a
	}
	oneEar := tested("a2", "2021-03-10", "retest", 10, 10)
	oneEar.Right = audiometry.Ear{}
	for name, c := range map[string]struct {
		records []record.Record
		shifts  []string // id of the audiogram and ears
	}{
		"The latest of several retests counts":               {[]record.Record{test, tested("a2", "2021-03-10", "retest", 10, 10), tested("a3", "2021-03-20", "retest", 20, 30)}, []string{"a3 both"}},
		"Each within 30 days of the test, not of the retest": {[]record.Record{test, tested("a2", "2021-03-10", "retest", 10, 10), tested("a3", "2021-04-01", "retest", 20, 20)}, []string{"a3 both"}},
		"A retest of one ear stands in for nothing":          {[]record.Record{test, oneEar}, []string{"a1 left"}},
		"Nor does one that lacks a threshold of the shift":   {[]record.Record{test, missing(tested("a2", "2021-03-10", "retest", 10, 10), 3000)}, []string{"a1 left"}},
		"Another threshold may be missing":                   {[]record.Record{test, missing(tested("a2", "2021-03-10", "retest", 10, 10), 6000)}, nil},
		"An invalidated retest stands in for nothing":        {[]record.Record{test, tested("a2", "2021-03-10", "retest", 10, 10), follow("invalidated", "a2", "2021-03-11")}, []string{"a1 left"}},
		"A retest never stands in for the baseline":          {[]record.Record{tested("a2", "2020-02-10", "retest", 25, 10)}, []string{"a2 left"}},
		"An exit test is not compared":                       {[]record.Record{tested("a2", "2021-03-01", "exit", 40, 40)}, nil},
		"Unless it was":                                      {[]record.Record{&record.Audiogram{AudiogramID: "a2", WorkerID: "w1", Date: day("2021-03-01"), Purpose: "exit", Left: ear(40), Right: ear(10), DeterminedOn: day("2021-03-05")}}, []string{"a2 left"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2025-01-01", noisy(append(c.records, base)...)...).worker()
			var shifts []string
			for _, s := range d.Shifts {
				shifts = append(shifts, s.ID+" "+s.Ears)
			}
			assert.Equal(t, c.shifts, shifts)
		})
	}
}

func TestShiftFiguresAndBounds(t *testing.T) {
	no := func(db int) audiometry.Threshold {
		return audiometry.Threshold{Tenths: int16(db * 10), State: audiometry.NoResponse}
	}
	base := tested("a0", "2020-02-01", "baseline", 10, 10)
	for name, c := range map[string]struct {
		base, now audiometry.Ear // left ears; the right ones stay at 10 dB
		ears      string
		atLeast   bool
		lacking   []string
	}{
		"10 dB exactly":                              {earWith(10, 10, 10), earWith(15, 20, 25), "left", false, nil},
		"9.67 dB":                                    {earWith(10, 10, 10), earWith(15, 20, 24), "", false, nil},
		"No response is at least the level":          {earWith(10, 10, 10), earBut(ear(10), 4000, no(100)), "left", true, nil},
		"No response not far enough":                 {earWith(80, 80, 80), earBut(ear(80), 4000, no(100)), "", false, []string{"left ear: no response in the baseline or not far enough"}},
		"No response in the baseline":                {earBut(ear(10), 4000, no(20)), earWith(20, 20, 30), "", false, []string{"left ear: no response in the baseline or not far enough"}},
		"No response in the baseline, nothing worse": {earBut(ear(10), 4000, no(100)), earWith(10, 10, 100), "", false, nil},
		"A threshold that was not tested":            {earWith(10, 10, 10), earBut(ear(40), 3000, audiometry.Threshold{State: audiometry.NotTested}), "", false, []string{"left 3000 Hz"}},
		"A threshold missing in the baseline":        {earBut(ear(10), 2000, audiometry.Threshold{}), ear(40), "", false, []string{"left 2000 Hz"}},
	} {
		t.Run(name, func(t *testing.T) {
			first, now := *base, *tested("a1", "2021-02-01", "periodic", 10, 10)
			first.Left, now.Left = c.base, c.now
			d := judge(t, "2022-01-01", noisy(&first, &now)...).worker()
			a := d.Audiograms[1]
			if c.ears == "" {
				assert.Empty(t, d.Shifts)
				assert.Empty(t, a.Problem == "a threshold shift")
			} else {
				require.Len(t, d.Shifts, 1)
				assert.Equal(t, c.ears, d.Shifts[0].Ears)
				assert.Equal(t, c.atLeast, d.Shifts[0].AtLeast)
				assert.Equal(t, "a threshold shift", a.Problem)
			}
			assert.Equal(t, len(c.lacking), len(a.CannotCompare))
			for i := range c.lacking {
				assert.Equal(t, c.lacking[i], a.CannotCompare[i])
			}
		})
	}
}

func TestAgeCorrection(t *testing.T) {
	base, now := tested("a0", "2020-02-01", "baseline", 0, 0), tested("a1", "2028-02-01", "periodic", 0, 0)
	base.Left, now.Left = ear(10), earWith(20, 20, 20) // 10 dB, and age explains 3, 5 and 6 dB of it from 42 to 50
	for name, c := range map[string]struct {
		on             bool
		sex, birth     string
		shift, applied bool
	}{
		"Off":                         {false, "male", "1977-06-01", true, false},
		"On":                          {true, "male", "1977-06-01", false, true},
		"On, but the sex is unknown":  {true, "", "1977-06-01", true, false},
		"On, but it is not in tables": {true, "unspecified", "1977-06-01", true, false},
		"On, without date of birth":   {true, "male", "", true, false},
	} {
		t.Run(name, func(t *testing.T) {
			w := hired("2020-01-01")
			w.Sex, w.BirthDate = c.sex, day(c.birth)
			d := asked{asOf: "2029-01-01", choices: map[string]any{"age_correction": c.on}}.judge(t,
				w, assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 75), base, now).worker()
			require.Equal(t, c.shift, len(d.Shifts) == 1)
			if c.shift {
				assert.Equal(t, c.applied, d.Shifts[0].AgeCorrected)
				assert.Equal(t, record.Num(10), d.Shifts[0].Hearing.Left)
			}
		})
	}
}

func TestFactsOfAnEarlierEmploymentStay(t *testing.T) {
	first, second := hired("2010-01-01", "2012-01-01"), hired("2020-01-01")
	first.Sex, first.BirthDate = "male", day("1977-06-01")
	base, now := tested("a0", "2020-02-01", "baseline", 10, 10), tested("a1", "2028-02-01", "periodic", 20, 20)
	d := asked{asOf: "2029-01-01", choices: map[string]any{"age_correction": true}}.judge(t,
		first, second, assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 75), base, now).worker()
	assert.Empty(t, d.Shifts, "sex and date of birth stand in the first employment")
	assert.Empty(t, d.JobTitle)
}

func TestWhatATestLacks(t *testing.T) {
	a := tested("a1", "2020-03-01", "baseline", 10, 10)
	a.Left = earBut(earBut(a.Left, 500, audiometry.Threshold{}), 6000, audiometry.Threshold{State: audiometry.NotTested})
	a.AudiometerID = "au"
	late := tested("a2", "2021-03-01", "periodic", 10, 10)
	late.AudiometerID, late.TesterID = "au", "t1"
	w := hired("2020-01-01")
	d := judge(t, "2022-01-01", append(noisy(a, late, &record.Calibration{InstrumentID: "au", Date: day("2021-03-01"), Type: "acoustic"},
		&record.Calibration{InstrumentID: "au", Date: day("2020-02-01"), Type: "functional"})[1:], w)...).worker()
	assert.Equal(t, []string{"left 6000 Hz"}, d.Audiograms[0].NotTested)
	assert.Equal(t, []string{"left 500 Hz"}, d.Audiograms[0].NotRecorded)
	assert.Equal(t, []string{"job classification", "examiner", "date of the last acoustic or exhaustive calibration of the audiometer"}, d.Audiograms[0].RecordLacks)
	assert.Equal(t, []string{"job classification"}, d.Audiograms[1].RecordLacks, "a calibration on the day of the test counts")
}
