package audiometry_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
)

// TestShiftCases takes the example of 29 CFR 1910.95 App. F and cases computed from (g)(10)(i), App. F
// Tables F-1 and F-2, and 29 CFR 1904.10(a). Among them is record25, whose shift after the correction for
// age is exactly 10 dB and comes out at 9.999999999999998 in binary means.
func TestShiftCases(t *testing.T) {
	table := appendixF(t)
	rows := vectors(t, "sts_cases.csv")
	require.Len(t, rows, 8)
	verdict := map[string]audiometry.Verdict{"True": audiometry.Yes, "False": audiometry.No}
	for _, r := range rows {
		before := ear(t, shiftFrequencies, r.list(t, "baseline_2k3k4k"))
		now := ear(t, shiftFrequencies, r.list(t, "current_2k3k4k"))
		aging, err := table.Aging(r["sex"], r.whole(t, "age_baseline"), r.whole(t, "age_current"), shiftFrequencies)
		require.NoError(t, err)
		assert.Equal(t, r.list(t, "age_diff"), aging, r["id"])

		plain := audiometry.Shift(before, now, shiftFrequencies, nil)
		adjusted := audiometry.Shift(before, now, shiftFrequencies, aging)
		for column, c := range map[string]audiometry.Change{"shift_avg": plain, "shift_adjusted": adjusted} {
			average, ok := c.Average()
			require.True(t, ok)
			assert.InDelta(t, r.number(t, column), average, 5.1e-5, "%s %s", r["id"], column)
		}
		assert.Equal(t, verdict[r["sts_unadjusted"]], plain.Reaches(10), r["id"])
		assert.Equal(t, verdict[r["sts_adjusted"]], adjusted.Reaches(10), r["id"])

		level := now.Sum(shiftFrequencies)
		average, ok := level.Average()
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "current_avg"), average, 5.1e-5, r["id"])
		recordable := plain.Reaches(10) == audiometry.Yes && level.Reaches(25) == audiometry.Yes
		assert.Equal(t, r["recordable_1904_10_on_unadjusted_sts"] == "True", recordable, r["id"])
	}
}

// TestExactTenAfterAging is record25 of the vectors: a woman of 40 and 45, 29 CFR 1910.95 Table F-2.
func TestExactTenAfterAging(t *testing.T) {
	before, now := ear(t, shiftFrequencies, []int{10, 15, 15}), ear(t, shiftFrequencies, []int{20, 25, 30})
	c := audiometry.Shift(before, now, shiftFrequencies, []int{1, 2, 2})
	assert.Equal(t, audiometry.Change{Tenths: 300, Count: 3}, c)
	assert.Equal(t, audiometry.Yes, c.Reaches(10))
	assert.Equal(t, audiometry.No, c.Reaches(10.1))
}

// TestAppendixFExample is the worked example of 29 CFR 1910.95 App. F: a man, right ear, baseline at 27 and
// test at 32. It works out 4000 Hz: 25 less 3 is 22, so the shift of 20 becomes 17.
func TestAppendixFExample(t *testing.T) {
	freqs := []int{1000, 2000, 3000, 4000, 6000}
	before, now := ear(t, freqs, []int{0, 0, 0, 5, 5}), ear(t, freqs, []int{5, 10, 10, 25, 20})
	aging, err := appendixF(t).Aging("male", 27, 32, freqs)
	require.NoError(t, err)
	assert.Equal(t, []int{1, 1, 1, 3, 3}, aging)
	at := func(aging []int) int { return audiometry.Shift(before, now, []int{4000}, aging).Tenths }
	assert.Equal(t, 200, at(nil))
	assert.Equal(t, 170, at([]int{3}))
}

// TestShiftBounds: how no response and a missing frequency are treated is common practice, no source.
func TestShiftBounds(t *testing.T) {
	for name, c := range map[string]struct {
		before, now []string
		want        audiometry.Change
		reaches     audiometry.Verdict
	}{
		"now at least, reaches": {[]string{"70", "70", "70"}, []string{"70", "70", "NR>100"}, audiometry.Change{Tenths: 300, Count: 3, AtLeast: true}, audiometry.Yes},
		"now at least, below":   {[]string{"75", "70", "70"}, []string{"70", "70", "NR>100"}, audiometry.Change{Tenths: 250, Count: 3, AtLeast: true}, audiometry.Undecided},
		"then at most, below":   {[]string{"70", "70", "NR>100"}, []string{"75", "75", "110"}, audiometry.Change{Tenths: 200, Count: 3, AtMost: true}, audiometry.No},
		"then at most, reaches": {[]string{"70", "70", "NR>100"}, []string{"85", "85", "100"}, audiometry.Change{Tenths: 300, Count: 3, AtMost: true}, audiometry.Undecided},
		"both, large":           {[]string{"0", "0", "NR>60"}, []string{"90", "90", "NR>100"}, audiometry.Change{Tenths: 2200, Count: 3, AtLeast: true, AtMost: true}, audiometry.Undecided},
		"both, small":           {[]string{"0", "NR>100", "0"}, []string{"0", "0", "NR>60"}, audiometry.Change{Tenths: -400, Count: 3, AtLeast: true, AtMost: true}, audiometry.Undecided},
		"missing then":          {[]string{"", "0", "0"}, []string{"90", "90", "90"}, audiometry.Change{Tenths: 1800, Count: 2, Missing: []int{2000}}, audiometry.Undecided},
		"missing now":           {[]string{"0", "0", "0"}, []string{"0", "NT", "0"}, audiometry.Change{Count: 2, Missing: []int{3000}}, audiometry.Undecided},
	} {
		got := audiometry.Shift(ear(t, shiftFrequencies, c.before), ear(t, shiftFrequencies, c.now), shiftFrequencies, nil)
		assert.Equal(t, c.want, got, name)
		assert.Equal(t, c.reaches, got.Reaches(10), name)
		_, ok := got.Average()
		assert.Equal(t, len(c.want.Missing) == 0 && !(c.want.AtLeast && c.want.AtMost), ok, name)
	}
	none := audiometry.Shift(&audiometry.Ear{}, &audiometry.Ear{}, nil, nil)
	assert.Equal(t, audiometry.Undecided, none.Reaches(-100))
	assert.Panics(t, func() {
		audiometry.Shift(&audiometry.Ear{}, &audiometry.Ear{}, shiftFrequencies, []int{1})
	})
}

// drawEar fills the shift frequencies with whole dB that leave room for a constant on either side.
func drawEar(t *rapid.T, name string) []int {
	return rapid.SliceOfN(rapid.IntRange(0, 100), 3, 3).Draw(t, name)
}

func TestShiftIgnoresAConstant(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		before, now := drawEar(t, "before"), drawEar(t, "now")
		aging := rapid.SliceOfN(rapid.IntRange(0, 15), 3, 3).Draw(t, "aging")
		plain := audiometry.Shift(ear(t, shiftFrequencies, before), ear(t, shiftFrequencies, now), shiftFrequencies, aging)
		constant := rapid.IntRange(-20, 30).Draw(t, "constant")
		for i := range before {
			before[i] += constant
			now[i] += constant
		}
		moved := audiometry.Shift(ear(t, shiftFrequencies, before), ear(t, shiftFrequencies, now), shiftFrequencies, aging)
		require.Equal(t, plain, moved)
	})
}

// TestReachesIsTheSumRule: an average of 10 dB at three frequencies means a sum of 30 dB.
func TestReachesIsTheSumRule(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		before, now := drawEar(t, "before"), drawEar(t, "now")
		sum := now[0] + now[1] + now[2] - before[0] - before[1] - before[2]
		c := audiometry.Shift(ear(t, shiftFrequencies, before), ear(t, shiftFrequencies, now), shiftFrequencies, nil)
		require.Equal(t, sum >= 30, c.Reaches(10) == audiometry.Yes)
		require.NotEqual(t, audiometry.Undecided, c.Reaches(10))
	})
}
