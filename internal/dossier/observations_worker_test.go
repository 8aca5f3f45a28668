package dossier_test

import (
	"regexp"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// onX1 is a test of w1 with the audiometer x1; a0 is the baseline.
func onX1(id, date string) *record.Audiogram {
	a := audiogram(id, date, "periodic", laterLeft, laterRight)
	if id == "a0" {
		a.Purpose, a.Left, a.Right = "baseline", usualLeft, usualRight
	}
	a.AudiometerID = "x1"
	return a
}

func check(kind, date string) *record.Calibration {
	return &record.Calibration{InstrumentID: "x1", Date: day(date), Type: kind}
}

func TestNoFunctionalCheck(t *testing.T) {
	fires := []string{"no_functional_check a1"}
	for name, c := range map[string]struct {
		checks []record.Record
		want   []string
	}{
		"checked that day":                         {[]record.Record{check("functional", "2021-02-01")}, []string{}},
		"checked twice that day":                   {[]record.Record{check("functional", "2021-02-01"), check("functional", "2021-02-01")}, []string{}},
		"checked the day before":                   {[]record.Record{check("functional", "2021-01-31")}, fires},
		"checked the day after":                    {[]record.Record{check("functional", "2021-02-02")}, fires},
		"checked 31 days before":                   {[]record.Record{check("functional", "2021-01-01")}, fires},
		"checked 32 days before":                   {[]record.Record{check("functional", "2020-12-31")}, []string{}},
		"checked 31 days after":                    {[]record.Record{check("functional", "2021-03-04")}, fires},
		"checked 32 days after":                    {[]record.Record{check("functional", "2021-03-05")}, []string{}},
		"no log at all is the duty's":              {[]record.Record{check("acoustic", "2021-01-31")}, []string{}},
		"an acoustic calibration is no check":      {[]record.Record{check("acoustic", "2021-02-01"), check("functional", "2021-02-02")}, fires},
		"another audiometer's checks":              {[]record.Record{&record.Calibration{InstrumentID: "x2", Date: day("2021-01-31"), Type: "functional"}}, []string{}},
		"a test that a professional found invalid": {[]record.Record{check("functional", "2021-01-31"), follow("invalidated", "a1", "2021-03-01")}, []string{}},
	} {
		t.Run(name, func(t *testing.T) {
			assert.Equal(t, c.want, observedOf(t, append(c.checks, onX1("a0", "2020-02-01"), onX1("a1", "2021-02-01"))...))
		})
	}
	unnamed := onX1("a1", "2021-02-01")
	unnamed.AudiometerID = ""
	assert.Empty(t, observedOf(t, check("functional", "2021-01-31"), onX1("a0", "2020-02-01"), unnamed))
	later := judge(t, "2021-02-01", noisy(onX1("a1", "2021-02-01"), check("functional", "2021-02-02"))...).file("worker", "w1")
	assert.Empty(t, later.Observations, "a check after the as-of day is not seen")
}

func TestOutsideEmployment(t *testing.T) {
	again := hired("2023-01-01")
	stretches := []record.Record{hired("2020-01-01", "2021-12-31"), again}
	for date, outside := range map[string]bool{
		"2019-12-31": true, "2020-01-01": false, "2021-12-31": false, "2022-01-01": true, "2022-12-31": true, "2023-01-01": false, "2025-06-01": false,
	} {
		trained := &record.Training{WorkerID: "w1", Date: day(date)}
		file := judge(t, "2026-01-01", append(stretches, trained, issued("p1", date, ""))...).file("worker", "w1")
		var got []string
		for _, o := range file.Observations {
			got = append(got, o.Kind+" "+o.Ref)
		}
		var want []string
		if outside {
			want = []string{"training_outside_employment training/w1@" + date, "protector_issued_outside_employment protector_issue/p1/w1@" + date}
		}
		assert.Equal(t, want, got, date)
	}
	elsewhere := hired("2022-01-01")
	elsewhere.Site = "s2"
	file := judge(t, "2026-01-01", hired("2020-01-01", "2021-12-31"), elsewhere, issued("p1", "2022-06-01", "")).file("worker", "w1")
	assert.Empty(t, file.Observations, "employed at another site")
}

// statedOf writes what is observed of the shifts stated, and what agrees, with the ears.
func statedOf(f *dossier.File) (differs, agrees string) {
	for _, o := range f.Observations {
		if o.Kind == "stated_shift_differs" {
			differs += " " + strings.TrimPrefix(o.Ref, "audiogram/") + " " + o.Ear
		}
	}
	for _, o := range f.Agreed {
		agrees += " " + strings.TrimPrefix(o.Ref, "audiogram/") + " " + o.Ear
	}
	return strings.TrimSpace(differs), strings.TrimSpace(agrees)
}

// TestStatedShift: 10 dB on average over 2000, 3000 and 4000 Hz is a standard threshold shift, 29 CFR 1910.95(g)(10)(i).
func TestStatedShift(t *testing.T) {
	base := []record.Record{audiogram("a0", "2020-02-01", "baseline", earOf(10), earOf(10))}
	missing := earBut(earOf(20), 3000, audiometry.Threshold{})
	stated := func(id, date, purpose string, left, right audiometry.Ear, l, r record.Answer) *record.Audiogram {
		a := audiogram(id, date, purpose, left, right)
		a.LeftStatedShift, a.RightStatedShift = l, r
		return a
	}
	at := func(left, right audiometry.Ear, l, r record.Answer) record.Record {
		return stated("a1", "2021-02-01", "periodic", left, right, l, r)
	}
	none, yes, no := record.Unanswered, record.Yes, record.No
	for name, c := range map[string]struct {
		records         []record.Record
		differs, agrees string
	}{
		"nothing stated":                     {[]record.Record{at(earOf(20), earOf(10), none, none)}, "", ""},
		"stated rightly":                     {[]record.Record{at(earOf(20), earOf(10), yes, no)}, "", "a1 left a1 right"},
		"a shift that is none":               {[]record.Record{at(earOf(15), earOf(10), yes, none)}, "a1 left", ""},
		"no shift where there is one":        {[]record.Record{at(earOf(15), earOf(20), none, no)}, "a1 right", ""},
		"a threshold is missing":             {[]record.Record{at(missing, earOf(10), yes, none)}, "", ""},
		"of the baseline nothing is known":   {[]record.Record{stated("a9", "2019-12-01", "baseline", earOf(10), earOf(10), yes, yes)}, "", ""},
		"against the baseline put in place":  {[]record.Record{at(earOf(20), earOf(10), none, none), revised("a1", "2021-03-01"), stated("a2", "2022-02-01", "periodic", earOf(20), earOf(10), no, no)}, "", "a2 left a2 right"},
		"a retest and the test it stands in": {[]record.Record{at(earOf(20), earOf(10), yes, none), stated("a2", "2021-02-20", "retest", earOf(10), earOf(10), no, none)}, "", "a1 left a2 left"},
		"a test found invalid":               {[]record.Record{at(earOf(15), earOf(10), yes, none), follow("invalidated", "a1", "2021-03-01")}, "", ""},
	} {
		t.Run(name, func(t *testing.T) {
			differs, agrees := statedOf(judge(t, "2026-01-01", noisy(append(c.records, base...)...)...).file("worker", "w1"))
			assert.Equal(t, c.differs, differs)
			assert.Equal(t, c.agrees, agrees)
		})
	}
}

// TestStatedShiftWithAgeCorrection: Appendix F of 29 CFR 1910.95. A man ages by more than 5 dB from 30 to 50.
func TestStatedShiftWithAgeCorrection(t *testing.T) {
	w := hired("2000-01-01")
	w.Sex, w.BirthDate = "male", day("1970-01-01")
	a := audiogram("a1", "2020-02-01", "periodic", earOf(20), earOf(10))
	a.LeftStatedShift = record.Yes
	records := []record.Record{w, assigned("g1", "2000-01-01"), group("g1"), measured("m1", "g1", "1999-11-15", 75), audiogram("a0", "2000-02-01", "baseline", earOf(10), earOf(10)), a}
	corrected := map[string]any{"age_correction": true}
	differs, agrees := statedOf((asked{asOf: "2026-01-01", choices: corrected}).judge(t, records...).file("worker", "w1"))
	assert.Equal(t, []string{"a1 left", ""}, []string{differs, agrees}, "the site corrects for age")
	differs, agrees = statedOf((asked{asOf: "2026-01-01"}).judge(t, records...).file("worker", "w1"))
	assert.Equal(t, []string{"", "a1 left"}, []string{differs, agrees}, "the site does not")
	w.BirthDate = 0
	differs, agrees = statedOf((asked{asOf: "2026-01-01", choices: corrected}).judge(t, records...).file("worker", "w1"))
	assert.Equal(t, []string{"", ""}, []string{differs, agrees}, "the age is not known")
}

// TestStatedShiftThatNeedsASecondTest: on the day of the first test somebody may call it a shift or not yet.
func TestStatedShiftThatNeedsASecondTest(t *testing.T) {
	m := osha().Measures
	m.Hearing.Shift.Scheme = audiometry.Scheme{Rule: "any", Frequencies: sixFrequencies, AtLeast: "x", Confirm: true}
	by := asked{asOf: "2026-01-01", measures: m, law: lawWith{osha(), map[string]float64{"x": 15}}}
	at4k := earOf(10, 10, 10, 10, 25, 10)
	for _, stated := range []record.Answer{record.Yes, record.No} {
		first, second, quiet := audiogram("a1", "2021-02-01", "periodic", at4k, earOf(10)), audiogram("a2", "2022-02-01", "periodic", at4k, earOf(10)), audiogram("a3", "2023-02-01", "periodic", earOf(10), earOf(10))
		first.LeftStatedShift, second.LeftStatedShift, quiet.LeftStatedShift = stated, stated, stated
		differs, agrees := statedOf(by.judge(t, noisy(audiogram("a0", "2020-02-01", "baseline", earOf(10), earOf(10)), first, second, quiet)...).file("worker", "w1"))
		want := map[record.Answer][]string{record.Yes: {"a3 left", "a2 left"}, record.No: {"a2 left", "a3 left"}}[stated]
		assert.Equal(t, want, []string{differs, agrees}, stated.String())
	}
}

// TestNoTextOfAnObservationHasAFigure: audiograms are medical records.
func TestNoTextOfAnObservationHasAFigure(t *testing.T) {
	for _, text := range dossier.ObservationTexts() {
		assert.NotRegexp(t, regexp.MustCompile(`[0-9]|dB|Hz`), text)
		assert.Regexp(t, regexp.MustCompile(`^[A-Z].*\.$`), text)
	}
}

// revised puts an audiogram in the place of the baseline.
func revised(audiogram, date string) *record.FollowUp {
	f := follow("baseline_revision", audiogram, date)
	f.By, f.Result = "audiologist", "persistent"
	return f
}
