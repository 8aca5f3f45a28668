package audiometry_test

import (
	"encoding/json"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

var (
	// 29 CFR 1910.95(g)(10)(i): average at 2000, 3000 and 4000 Hz, 10 dB or more.
	standard = audiometry.Scheme{Rule: audiometry.Mean, Frequencies: shiftFrequencies}
	// NIOSH 98-126, section 1.6.4 (secondary source): 15 dB or more at any frequency, seen twice.
	significant = audiometry.Scheme{Rule: audiometry.Any, Frequencies: []int{500, 1000, 2000, 3000, 4000, 6000}, Confirm: true}
	// Alberta's abnormal shift (secondary source): 15 dB at two consecutive test frequencies, 1000 to 6000 Hz.
	consecutive = audiometry.Scheme{Rule: audiometry.Adjacent, Frequencies: []int{1000, 2000, 3000, 4000, 6000}}
	// The rapid loss of British guidance (from memory): sum at 3000, 4000 and 6000 Hz, 30 dB or more.
	rapidLoss = audiometry.Scheme{Rule: audiometry.Total, Frequencies: []int{3000, 4000, 6000}}
)

func TestSchemeReadsJSON(t *testing.T) {
	var s audiometry.Scheme
	require.NoError(t, json.Unmarshal([]byte(`{"name": "sts", "rule": "mean", "frequencies": [2000, 3000, 4000], "at_least": "standard_threshold_shift"}`), &s))
	require.NoError(t, s.Check())
	assert.Equal(t, "standard_threshold_shift", s.Parameter())
	assert.Equal(t, "limit", audiometry.Scheme{Above: "limit"}.Parameter())
}

func TestSchemeCheck(t *testing.T) {
	for _, s := range []audiometry.Scheme{standard, significant, consecutive, rapidLoss} {
		assert.NoError(t, s.Check())
	}
	two := []int{1000, 2000}
	for want, s := range map[string]audiometry.Scheme{
		`the scheme has the rule ""; write mean, any, adjacent, sum or peak`:                {Frequencies: two},
		`the scheme is of "hearing"; write change, level or ears`:                           {Rule: "any", Of: "hearing", Frequencies: two},
		`the scheme has the baseline "old"; write standing, original, improved or previous`: {Rule: "any", Baseline: "old", Frequencies: two},
		`the scheme names a baseline, but only a change has one`:                            {Rule: "any", Of: "level", Baseline: "original", Frequencies: two},
		`the scheme has both at_least and above; keep one of them`:                          {Rule: "any", AtLeast: "a", Above: "b", Frequencies: two},
		`the scheme has no frequencies`:                                                     {Rule: "any"},
		`the scheme looks for two neighbours but has one frequency only`:                    {Rule: "adjacent", Frequencies: []int{500}},
		`the scheme has 12000 Hz, which no record holds`:                                    {Rule: "any", Frequencies: []int{500, 12000}},
		`the frequencies of the scheme are not in rising order at 1000 Hz`:                  {Rule: "any", Frequencies: []int{2000, 1000}},
	} {
		assert.EqualError(t, s.Check(), want)
	}
	assert.EqualError(t, audiometry.Schemes{}.Check(), "the list of schemes is empty")
	assert.Error(t, audiometry.Schemes{standard, {}}.Check())
	assert.Error(t, audiometry.Schemes{{Rule: "any", Of: "ears", Frequencies: two}}.Check())
	assert.NoError(t, audiometry.Schemes{standard, significant}.Check())
}

// TestMeanRule takes all cases of sts_cases.csv through a scheme; their sources are named in TestShiftCases.
func TestMeanRule(t *testing.T) {
	table := appendixF(t)
	verdict := map[string]audiometry.Verdict{"True": audiometry.Yes, "False": audiometry.No}
	for _, r := range vectors(t, "sts_cases.csv") {
		before := ear(t, shiftFrequencies, r.list(t, "baseline_2k3k4k"))
		now := ear(t, shiftFrequencies, r.list(t, "current_2k3k4k"))
		aging, err := table.Aging(r["sex"], r.whole(t, "age_baseline"), r.whole(t, "age_current"), shiftFrequencies)
		require.NoError(t, err)
		for suffix, a := range map[string][]int{"unadjusted": nil, "adjusted": aging} {
			got := standard.Judge(before, now, a, 10)
			assert.Equal(t, verdict[r["sts_"+suffix]], got.Verdict, r["id"])
			column := map[string]string{"unadjusted": "shift_avg", "adjusted": "shift_adjusted"}[suffix]
			figure, ok := got.Figure()
			assert.True(t, ok)
			assert.InDelta(t, r.number(t, column), figure, 5.1e-5, r["id"])
			assert.Equal(t, got.Verdict == audiometry.Yes, got.Shown != nil, r["id"])
		}
	}
	// record25: exactly 10 dB reaches 10 dB but does not exceed it
	before, now := ear(t, shiftFrequencies, []int{10, 15, 15}), ear(t, shiftFrequencies, []int{20, 25, 30})
	exceeds := audiometry.Scheme{Rule: "mean", Frequencies: shiftFrequencies, Above: "x"}
	assert.Equal(t, audiometry.Yes, standard.Judge(before, now, []int{1, 2, 2}, 10).Verdict)
	assert.Equal(t, audiometry.No, exceeds.Judge(before, now, []int{1, 2, 2}, 10).Verdict)
	assert.Equal(t, audiometry.Yes, exceeds.Judge(before, now, []int{1, 2, 1}, 10).Verdict)
}

// TestAdjacentRule: the first case is worked in the sheet on Alberta from the definition, secondary source.
func TestAdjacentRule(t *testing.T) {
	freqs := []int{500, 1000, 2000, 3000, 4000, 6000}
	base := ear(t, freqs, []int{10, 10, 10, 15, 20, 20})
	for name, c := range map[string]struct {
		now     []string
		verdict audiometry.Verdict
		shown   []int
		open    []int
	}{
		"two neighbours":         {[]string{"10", "25", "25", "15", "20", "20"}, audiometry.Yes, []int{1000, 2000}, nil},
		"three in a row":         {[]string{"10", "25", "25", "30", "20", "20"}, audiometry.Yes, []int{1000, 2000, 3000}, nil},
		"two pairs":              {[]string{"10", "25", "25", "15", "35", "35"}, audiometry.Yes, []int{1000, 2000, 4000, 6000}, nil},
		"one each side":          {[]string{"10", "25", "10", "30", "20", "35"}, audiometry.No, nil, nil},
		"500 does not count":     {[]string{"40", "25", "10", "15", "20", "20"}, audiometry.No, nil, nil},
		"a tenth short":          {[]string{"10", "24.9", "25", "15", "20", "20"}, audiometry.No, nil, nil},
		"missing beside a shift": {[]string{"10", "25", "NT", "15", "20", "20"}, audiometry.Undecided, nil, []int{1000, 2000}},
		"missing beside none":    {[]string{"10", "10", "NT", "15", "20", "20"}, audiometry.No, nil, nil},
		"missing elsewhere":      {[]string{"10", "25", "25", "15", "", "35"}, audiometry.Yes, []int{1000, 2000}, []int{4000, 6000}},
		"bound reaches":          {[]string{"10", "NR>25", "25", "15", "20", "20"}, audiometry.Yes, []int{1000, 2000}, nil},
		"bound does not":         {[]string{"10", "NR>20", "25", "15", "20", "20"}, audiometry.Undecided, nil, []int{1000, 2000}},
	} {
		got := consecutive.Judge(base, ear(t, freqs, c.now), nil, 15)
		assert.Equal(t, c.verdict, got.Verdict, name)
		assert.Equal(t, c.shown, got.Shown, name)
		assert.Equal(t, c.open, got.Open, name)
	}
	got := consecutive.Judge(base, ear(t, freqs, []string{"10", "40", "30", "", "20", "20"}), nil, 15)
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Yes, Low: 20, High: 20, Shown: []int{1000, 2000}, Open: []int{2000, 3000}, Missing: []int{3000}}, got,
		"the lesser of 30 and 20; the pair with 3000 Hz cannot do better")
}

func TestAnyRule(t *testing.T) {
	freqs := significant.Frequencies
	base := ear(t, freqs, []string{"0", "0", "0", "0", "0", "NR>80"})
	judge := func(now ...string) audiometry.Outcome { return significant.Judge(base, ear(t, freqs, now), nil, 15) }

	got := judge("0", "0", "15", "10", "20", "80")
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Yes, Low: 20, High: 20, Shown: []int{2000, 4000}}, got)
	got = judge("0", "", "5", "10", "10", "80")
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Undecided, Low: 10, High: math.Inf(1), Open: []int{1000}, Missing: []int{1000}}, got)
	got = judge("0", "0", "5", "10", "NR>10", "80")
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Undecided, Low: 10, High: math.Inf(1), Open: []int{4000}}, got)
	got = judge("0", "0", "5", "14.9", "10", "80")
	assert.Equal(t, audiometry.No, got.Verdict)
	got = judge("0", "0", "5", "10", "10", "100") // the baseline lay above 80: the change is below 20
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Undecided, Low: 10, High: 20, Open: []int{6000}}, got)
	_, ok := got.Figure()
	assert.False(t, ok)
	got = significant.Judge(ear(t, freqs, []int{0, 0, 0, 0, 0, 0}), ear(t, freqs, []int{0, 0, 20, 20, 0, 0}), []int{0, 0, 5, 6, 0, 0}, 15)
	assert.Equal(t, []int{2000}, got.Shown, "with a correction for age")
}

// TestLevelSchemes: the levels of Alberta and Manitoba (official text for 25 dB; 60 dB from a secondary source).
func TestLevelSchemes(t *testing.T) {
	low := audiometry.Scheme{Of: "level", Rule: "any", Frequencies: []int{500, 1000, 2000}, Above: "low_level"}
	judge := func(entries ...string) audiometry.Verdict {
		return low.Judge(nil, ear(t, low.Frequencies, entries), nil, 25).Verdict
	}
	assert.Equal(t, audiometry.No, judge("25", "25", "25"), "exactly 25 is not more than 25")
	assert.Equal(t, audiometry.Yes, judge("25", "30", "25"))
	assert.Equal(t, audiometry.Yes, judge("NR>25", "0", "0"), "a threshold above 25 exceeds 25")
	assert.Equal(t, audiometry.Undecided, judge("NR>20", "0", "0"))
	assert.Equal(t, audiometry.Undecided, judge("NT", "0", "0"))
	assert.Equal(t, audiometry.Yes, judge("NT", "0", "35"))

	recordable := audiometry.Scheme{Of: "level", Rule: "mean", Frequencies: shiftFrequencies} // 29 CFR 1904.10(a)
	assert.Equal(t, audiometry.Yes, recordable.Judge(nil, ear(t, shiftFrequencies, []int{20, 25, 30}), []int{9, 9, 9}, 25).Verdict)
	assert.Equal(t, audiometry.No, recordable.Judge(nil, ear(t, shiftFrequencies, []string{"20", "25", "29.9"}), nil, 25).Verdict)
}

// TestJudgeEars: Alberta's one-sided loss (secondary source), averages at 3000, 4000 and 6000 Hz that differ by
// more than 30 dB; the case of 55 and 20 dB is worked in the sheet.
func TestJudgeEars(t *testing.T) {
	s := audiometry.Scheme{Of: "ears", Rule: "mean", Frequencies: []int{3000, 4000, 6000}, Above: "one_sided"}
	at := func(entries ...string) *audiometry.Ear { return ear(t, s.Frequencies, entries) }
	for name, c := range map[string]struct {
		left, right *audiometry.Ear
		verdict     audiometry.Verdict
		worse       string
		low, high   float64
	}{
		"35":                  {at("20", "20", "20"), at("55", "55", "55"), audiometry.Yes, "right", 35, 35},
		"35 left":             {at("55", "55", "55"), at("20", "20", "20"), audiometry.Yes, "left", 35, 35},
		"exactly 30":          {at("20", "20", "20"), at("50", "50", "50"), audiometry.No, "", 30, 30},
		"at least 35":         {at("20", "20", "20"), at("55", "NR>55", "55"), audiometry.Yes, "right", 35, math.Inf(1)},
		"at least 30 exceeds": {at("20", "20", "20"), at("50", "NR>50", "50"), audiometry.Yes, "right", 30, math.Inf(1)},
		"bound the other way": {at("70", "70", "70"), at("NR>50", "50", "50"), audiometry.Undecided, "", 0, math.Inf(1)},
		"missing":             {at("70", "70", ""), at("0", "0", "0"), audiometry.Undecided, "", 0, math.Inf(1)},
	} {
		got, worse := s.JudgeEars(c.left, c.right, 30)
		assert.Equal(t, c.verdict, got.Verdict, name)
		assert.Equal(t, c.worse, worse, name)
		assert.Equal(t, []float64{c.low, c.high}, []float64{got.Low, got.High}, name)
	}
	single := audiometry.Scheme{Of: "ears", Rule: "any", Frequencies: []int{3000, 4000, 6000}}
	got, worse := single.JudgeEars(at("20", "60", "20"), at("60", "20", "20"), 40)
	assert.Equal(t, "both", worse)
	assert.Equal(t, []int{3000, 4000}, got.Shown)
}

// TestConfirmed: 15 dB twice, in the same ear at the same frequency (NIOSH 98-126, secondary source).
func TestConfirmed(t *testing.T) {
	freqs := significant.Frequencies
	base := ear(t, freqs, []int{0, 0, 0, 0, 0, 0})
	judge := func(now ...string) audiometry.Outcome { return significant.Judge(base, ear(t, freqs, now), nil, 15) }
	first := judge("0", "0", "0", "0", "20", "0")
	for name, c := range map[string]struct {
		retest audiometry.Outcome
		want   audiometry.Verdict
	}{
		"same frequency":          {judge("0", "0", "0", "0", "15", "0"), audiometry.Yes},
		"another frequency":       {judge("0", "0", "0", "20", "0", "0"), audiometry.No},
		"none":                    {judge("0", "0", "0", "0", "10", "0"), audiometry.No},
		"not tested there":        {judge("0", "0", "0", "0", "NT", "0"), audiometry.Undecided},
		"not tested elsewhere":    {judge("0", "0", "0", "NT", "0", "0"), audiometry.No},
		"another, and not tested": {judge("0", "0", "0", "20", "NT", "0"), audiometry.Undecided},
	} {
		assert.Equal(t, c.want, audiometry.Confirmed(first, c.retest), name)
		assert.Equal(t, c.want, audiometry.Confirmed(c.retest, first), name)
	}
	shifted := standard.Judge(base, ear(t, freqs, []int{0, 0, 10, 10, 10, 0}), nil, 10)
	again := standard.Judge(base, ear(t, freqs, []int{0, 0, 30, 0, 0, 0}), nil, 10)
	assert.Equal(t, audiometry.Yes, audiometry.Confirmed(shifted, again), "an average is confirmed by an average")
}

// TestCombination: Brazil's onset of a loss (NR-7 Annex II, secondary source), an average rise of 10 dB at 3000,
// 4000 and 6000 Hz or a rise of 15 dB at one of them. Both cases are worked in the sheet.
func TestCombination(t *testing.T) {
	freqs := []int{3000, 4000, 6000}
	onset := audiometry.Schemes{{Rule: "mean", Frequencies: freqs}, {Rule: "any", Frequencies: freqs}}
	require.NoError(t, onset.Check())
	base := ear(t, freqs, []int{10, 10, 10})
	judge := func(now ...string) audiometry.Outcome {
		return onset.Judge(base, ear(t, freqs, now), nil, []float64{10, 15})
	}
	assert.Equal(t, freqs, judge("20", "20", "20").Shown)
	assert.Equal(t, []int{4000}, judge("10", "25", "10").Shown)
	assert.Equal(t, audiometry.No, judge("20", "20", "15").Verdict)
	got := judge("NT", "25", "10")
	assert.Equal(t, audiometry.Yes, got.Verdict)
	assert.Equal(t, []int{3000}, got.Missing)
	assert.Equal(t, audiometry.Undecided, judge("NT", "20", "10").Verdict)
	assert.Equal(t, audiometry.Undecided, audiometry.AnyOf().Verdict)
	assert.Panics(t, func() { onset.Judge(base, base, nil, nil) })
	assert.Panics(t, func() { standard.Judge(base, base, []int{1}, 10) })
	aged := onset.Judge(base, ear(t, freqs, []int{20, 20, 20}), [][]int{{0, 0, 1}, nil}, []float64{10, 15})
	assert.Equal(t, audiometry.No, aged.Verdict)
}

func TestWorking(t *testing.T) {
	before, now := ear(t, shiftFrequencies, []int{10, 15, 15}), ear(t, shiftFrequencies, []string{"20", "25", "NR>90"})
	assert.Equal(t, "2000 Hz 20 − 10 − 1 for age, 3000 Hz 25 − 15 − 2 for age, 4000 Hz NR>90 − 15 − 2 for age; average change at least 30.0 dB; at least 10 dB: yes",
		standard.Working(before, now, []int{1, 2, 2}, 10))
	level := audiometry.Scheme{Of: "level", Rule: "any", Frequencies: shiftFrequencies, Above: "x"}
	assert.Equal(t, "2000 Hz 10, 3000 Hz 15, 4000 Hz 15; largest level 15.0 dB; above 12.5 dB: yes at 3000, 4000 Hz", level.Working(nil, before, nil, 12.5))
	ears := audiometry.Scheme{Of: "ears", Rule: "sum", Frequencies: []int{2000, 3000}}
	assert.Equal(t, "2000 Hz 20 − 10, 3000 Hz 25 − 15; sum 20.0 dB; at least 20 dB: yes; worse: right", ears.WorkingEars(before, now, 20))
	gone := audiometry.Scheme{Rule: "adjacent", Frequencies: []int{1000, 2000}}
	assert.Equal(t, "1000 Hz (not recorded) − (not recorded), 2000 Hz 20 − 10; largest change of two neighbours at most 10.0 dB; at least 15 dB: no; no level at 1000 Hz",
		gone.Working(before, now, nil, 15))
	assert.Equal(t, "6000 Hz (not recorded) − (not recorded); average change not known; at least 10 dB: undecided; no level at 6000 Hz",
		audiometry.Scheme{Rule: "mean", Frequencies: []int{6000}}.Working(before, now, nil, 10))
}
