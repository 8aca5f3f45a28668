package audiometry_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
)

// TestRise: a rise of the sum at 3000, 4000 and 6000 Hz within three years (British guidance, from memory).
func TestRise(t *testing.T) {
	freqs := rapidLoss.Frequencies
	within := calendar.Interval{Count: 3, Unit: calendar.Years}
	at := func(day string, entries ...string) audiometry.Dated {
		return audiometry.Dated{Date: calendar.MustParse(day), Ear: ear(t, freqs, entries)}
	}
	for name, c := range map[string]struct {
		tests []audiometry.Dated
		want  audiometry.Verdict
		place int
	}{
		"exactly three years":  {[]audiometry.Dated{at("2020-03-01", "10", "10", "10"), at("2023-03-01", "20", "20", "20")}, audiometry.Yes, 0},
		"a day more":           {[]audiometry.Dated{at("2020-02-29", "10", "10", "10"), at("2023-03-01", "20", "20", "20")}, audiometry.Undecided, -1},
		"the strongest counts": {[]audiometry.Dated{at("2021-01-01", "10", "10", "15"), at("2022-01-01", "10", "10", "5"), at("2023-01-01", "20", "20", "15")}, audiometry.Yes, 1},
		"all short of it":      {[]audiometry.Dated{at("2021-01-01", "10", "10", "15"), at("2022-01-01", "10", "10", "16"), at("2023-01-01", "20", "20", "20")}, audiometry.No, 0},
		"one undecided":        {[]audiometry.Dated{at("2021-01-01", "10", "10", ""), at("2022-01-01", "10", "10", "16"), at("2023-01-01", "20", "20", "20")}, audiometry.Undecided, 0},
		"one test":             {[]audiometry.Dated{at("2021-01-01", "10", "10", "15")}, audiometry.Undecided, -1},
		"none":                 {nil, audiometry.Undecided, -1},
	} {
		got, place, err := audiometry.Rise(rapidLoss, c.tests, within, 30)
		require.NoError(t, err)
		assert.Equal(t, c.want, got.Verdict, name)
		assert.Equal(t, c.place, place, name)
	}
	tests := []audiometry.Dated{at("2021-01-01", "10", "10", "15"), at("2022-01-01", "10", "10", "15")}
	_, _, err := audiometry.Rise(rapidLoss, tests, calendar.Interval{Count: 3, Unit: calendar.WorkingDays}, 30)
	assert.Error(t, err)
}

// flatTests makes tests whose average is known.
func flatTests(t *testing.T, levels ...string) []*audiometry.Ear {
	var tests []*audiometry.Ear
	for _, x := range levels {
		tests = append(tests, ear(t, shiftFrequencies, []string{x, x, x}))
	}
	return tests
}

// TestImprovement: 49 CFR 227 App. C rule 1; the first three cases are worked in the sheet from its text.
func TestImprovement(t *testing.T) {
	base := ear(t, shiftFrequencies, []int{15, 15, 15})
	none := audiometry.Revision{Verdict: audiometry.No, From: -1, To: -1, Best: -1}
	for name, c := range map[string]struct {
		tests []*audiometry.Ear
		inRow int
		want  audiometry.Revision
	}{
		"9 then 8":            {flatTests(t, "9", "8"), 2, audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 1, Best: 1}},
		"9 then 9":            {flatTests(t, "9", "9"), 2, audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 1, Best: 0}},
		"9 then 12":           {flatTests(t, "9", "12"), 2, none},
		"exactly 5 dB better": {flatTests(t, "20", "10", "10"), 2, audiometry.Revision{Verdict: audiometry.Yes, From: 1, To: 2, Best: 1}},
		"one is enough":       {flatTests(t, "20", "10"), 1, audiometry.Revision{Verdict: audiometry.Yes, From: 1, To: 1, Best: 1}},
		"length 0 is 1":       {flatTests(t, "10"), 0, audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 0, Best: 0}},
		"a gap between":       {flatTests(t, "5", "15", "5"), 2, none},
		"not tested":          {flatTests(t, "5", "NT"), 2, audiometry.Revision{Verdict: audiometry.Undecided, From: -1, To: -1, Best: -1}},
		"no tests":            {nil, 2, none},
	} {
		assert.Equal(t, c.want, audiometry.Improvement(base, c.tests, shiftFrequencies, 5, c.inRow), name)
	}
}

// TestPersistence: 49 CFR 227 App. C rule 2; the first case is worked in the sheet from its text.
func TestPersistence(t *testing.T) {
	base := ear(t, shiftFrequencies, []int{10, 10, 10})
	for name, c := range map[string]struct {
		tests []*audiometry.Ear
		want  audiometry.Revision
	}{
		"22 then 21":       {flatTests(t, "22", "21"), audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 1, Best: 1}},
		"equal":            {flatTests(t, "15", "20", "20"), audiometry.Revision{Verdict: audiometry.Yes, From: 1, To: 2, Best: 1}},
		"gone":             {flatTests(t, "22", "15"), audiometry.Revision{Verdict: audiometry.No, From: -1, To: -1, Best: -1}},
		"not tested again": {flatTests(t, "22", "NT"), audiometry.Revision{Verdict: audiometry.Undecided, From: -1, To: -1, Best: -1}},
		"one test":         {flatTests(t, "22"), audiometry.Revision{Verdict: audiometry.No, From: -1, To: -1, Best: -1}},
		"no tests":         {nil, audiometry.Revision{Verdict: audiometry.No, From: -1, To: -1, Best: -1}},
		"bound below":      {flatTests(t, "95", "NR>90"), audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 1, Best: 1, Unsure: true}},
		"bound above":      {flatTests(t, "85", "NR>90"), audiometry.Revision{Verdict: audiometry.Yes, From: 0, To: 1, Best: 0}},
	} {
		assert.Equal(t, c.want, audiometry.Persistence(standard, base, c.tests, nil, 10), name)
	}
	aging := [][]int{{0, 0, 0}, {4, 4, 4}}
	assert.Equal(t, audiometry.No, audiometry.Persistence(standard, base, flatTests(t, "22", "22"), aging, 10).Verdict, "12 less 4")
	assert.Panics(t, func() { audiometry.Persistence(standard, base, flatTests(t, "22"), aging, 10) })
	moved := []*audiometry.Ear{ear(t, shiftFrequencies, []int{25, 10, 10}), ear(t, shiftFrequencies, []int{10, 25, 10})}
	single := audiometry.Scheme{Rule: "any", Frequencies: shiftFrequencies}
	assert.Equal(t, audiometry.No, audiometry.Persistence(single, base, moved, nil, 15).Verdict, "another frequency")
}

// TestSumTable uses made-up values: those of British guidance are known from memory only.
func TestSumTable(t *testing.T) {
	table := audiometry.SumTable{Frequencies: []int{1000, 2000, 3000}, Rows: []audiometry.SumRow{
		{Sex: "male", FromAge: 18, ToAge: 24, Warning: 50, Referral: 100},
		{Sex: "male", FromAge: 25, Warning: 60, Referral: 120},
	}}
	for name, c := range map[string]struct {
		entries           []string
		age               int
		warning, referral audiometry.Verdict
	}{
		"below":            {[]string{"10", "20", "19"}, 24, audiometry.No, audiometry.No},
		"at the warning":   {[]string{"10", "20", "20"}, 24, audiometry.Yes, audiometry.No},
		"older":            {[]string{"10", "20", "20"}, 25, audiometry.No, audiometry.No},
		"at the referral":  {[]string{"40", "40", "40"}, 90, audiometry.Yes, audiometry.Yes},
		"bound between":    {[]string{"20", "20", "NR>30"}, 18, audiometry.Yes, audiometry.Undecided},
		"bound at the end": {[]string{"20", "20", "NR>60"}, 18, audiometry.Yes, audiometry.Yes},
		"missing":          {[]string{"90", "90", "NT"}, 18, audiometry.Undecided, audiometry.Undecided},
	} {
		got, err := table.Judge(ear(t, table.Frequencies, c.entries), "male", c.age)
		require.NoError(t, err)
		assert.Equal(t, c.warning, got.Warning, name)
		assert.Equal(t, c.referral, got.Referral, name)
	}
	for _, sex := range []string{"female", ""} {
		got, err := table.Judge(&audiometry.Ear{}, sex, 30)
		assert.Error(t, err)
		assert.Equal(t, audiometry.Undecided, got.Warning)
	}
	_, err := table.Row("male", 17)
	assert.EqualError(t, err, `the table of sums has no values for the sex "male" at 17 years`)
}
