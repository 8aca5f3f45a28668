package audiometry_test

import (
	"encoding/json"
	"slices"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
)

// drawScheme draws any scheme that Check accepts.
func drawScheme(t *rapid.T) audiometry.Scheme {
	s := audiometry.Scheme{
		Of:   rapid.SampledFrom([]string{"", "change", "level"}).Draw(t, "of"),
		Rule: rapid.SampledFrom([]string{"mean", "any", "adjacent", "sum"}).Draw(t, "rule"),
	}
	s.Frequencies = rapid.SliceOfNDistinct(rapid.SampledFrom(audiometry.Frequencies[:]), 2, 6, rapid.ID).Draw(t, "frequencies")
	slices.Sort(s.Frequencies)
	if rapid.Bool().Draw(t, "exceed") {
		s.Above = "limit"
	}
	require.NoError(t, s.Check())
	return s
}

// drawMixedEar draws an ear of measured and absent thresholds and of no response, in steps of 5 dB.
func drawMixedEar(t *rapid.T, name string) *audiometry.Ear {
	var e audiometry.Ear
	for i := range e {
		e[i] = audiometry.Threshold{
			Tenths: int16(50 * rapid.IntRange(0, 20).Draw(t, name)),
			State:  rapid.SampledFrom([]audiometry.State{1, 1, 1, 1, 1, 2, 0, 3}).Draw(t, name+" state"),
		}
	}
	return &e
}

func drawAmount(t *rapid.T) float64 { return float64(rapid.IntRange(0, 12).Draw(t, "amount")) * 2.5 }

// TestVerdictsHoldForEveryTruth: whatever level hides behind no response or a missing frequency, a verdict of Yes
// or No stays, the figure lies within its bounds, and nothing shows that was not shown or open before.
func TestVerdictsHoldForEveryTruth(t *testing.T) {
	truth := func(t *rapid.T, e *audiometry.Ear, name string) *audiometry.Ear {
		full := *e
		for i, x := range full {
			level := int(x.Tenths)
			switch x.State {
			case audiometry.NoResponse:
				level += rapid.IntRange(1, 300).Draw(t, name)
			case audiometry.NotRecorded, audiometry.NotTested:
				level = rapid.IntRange(-100, 1200).Draw(t, name)
			}
			full[i] = audiometry.Threshold{Tenths: int16(level), State: audiometry.Measured}
		}
		return &full
	}
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		before, now := drawMixedEar(t, "before"), drawMixedEar(t, "now")
		seen := s.Judge(before, now, nil, amount)
		actual := s.Judge(truth(t, before, "true before"), truth(t, now, "true now"), nil, amount)
		require.NotEqual(t, audiometry.Undecided, actual.Verdict)
		if seen.Verdict != audiometry.Undecided {
			require.Equal(t, seen.Verdict, actual.Verdict)
		}
		require.Equal(t, actual.Low, actual.High)
		require.LessOrEqual(t, seen.Low, actual.Low)
		require.GreaterOrEqual(t, seen.High, actual.High)
		for _, hz := range actual.Shown {
			require.True(t, slices.Contains(seen.Shown, hz) || slices.Contains(seen.Open, hz), "%d Hz", hz)
		}
		for _, hz := range seen.Shown {
			require.Contains(t, actual.Shown, hz)
		}
	})
}

func TestEarsHoldForEitherOrder(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)+2.5
		left, right := drawMixedEar(t, "left"), drawMixedEar(t, "right")
		one, worse := s.JudgeEars(left, right, amount)
		two, other := s.JudgeEars(right, left, amount)
		require.Equal(t, one, two)
		swap := map[string]string{"": "", "both": "both", "left": "right", "right": "left"}
		require.Equal(t, swap[worse], other)
		require.Equal(t, one.Verdict == audiometry.Yes, worse != "")
	})
}

func TestChangesIgnoreAConstant(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		s.Of = audiometry.OfChange
		before, now := drawMixedEar(t, "before"), drawMixedEar(t, "now")
		want := s.Judge(before, now, nil, amount)
		constant := int16(rapid.IntRange(-200, 200).Draw(t, "constant"))
		for i := range before {
			before[i].Tenths += constant
			now[i].Tenths += constant
		}
		require.Equal(t, want, s.Judge(before, now, nil, amount))
	})
}

// rank orders verdicts by how much they show.
func rank(v audiometry.Verdict) int {
	return map[audiometry.Verdict]int{audiometry.No: 0, audiometry.Undecided: 1, audiometry.Yes: 2}[v]
}

func TestWorseHearingNeverShowsLess(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		before, now := drawMixedEar(t, "before"), drawMixedEar(t, "now")
		first := s.Judge(before, now, nil, amount)
		now[rapid.IntRange(0, len(now)-1).Draw(t, "place")].Tenths += int16(rapid.IntRange(0, 300).Draw(t, "rise"))
		worse := s.Judge(before, now, nil, amount)
		require.GreaterOrEqual(t, rank(worse.Verdict), rank(first.Verdict))
		require.GreaterOrEqual(t, worse.Low, first.Low)
		require.GreaterOrEqual(t, worse.High, first.High)
	})
}

func TestMoreFrequenciesNeverLoseASingleShift(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		s.Rule = audiometry.Any
		before, now := drawMixedEar(t, "before"), drawMixedEar(t, "now")
		few := s.Judge(before, now, nil, amount)
		s.Frequencies = audiometry.Frequencies[:]
		many := s.Judge(before, now, nil, amount)
		require.GreaterOrEqual(t, rank(many.Verdict), rank(few.Verdict))
		for _, hz := range few.Shown {
			require.Contains(t, many.Shown, hz)
		}
	})
}

// TestAPairIsTwoSingles: neighbours show a shift only where each of them does for itself.
func TestAPairIsTwoSingles(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		before, now := drawMixedEar(t, "before"), drawMixedEar(t, "now")
		s.Rule = audiometry.Any
		single := s.Judge(before, now, nil, amount)
		s.Rule = audiometry.Adjacent
		pair := s.Judge(before, now, nil, amount)
		require.LessOrEqual(t, rank(pair.Verdict), rank(single.Verdict))
		require.Equal(t, single.Missing, pair.Missing)
		for _, hz := range pair.Shown {
			require.Contains(t, single.Shown, hz)
		}
	})
}

func TestConfirmationIsSymmetric(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s, amount := drawScheme(t), drawAmount(t)
		before := drawMixedEar(t, "before")
		a := s.Judge(before, drawMixedEar(t, "a"), nil, amount)
		b := s.Judge(before, drawMixedEar(t, "b"), nil, amount)
		require.Equal(t, audiometry.Confirmed(a, b), audiometry.Confirmed(b, a))
		require.LessOrEqual(t, rank(audiometry.Confirmed(a, b)), min(rank(a.Verdict), rank(b.Verdict)))
		require.Equal(t, a.Verdict, audiometry.Confirmed(a, a), "what is shown is confirmed by the same again")
	})
}

// FuzzScheme reads schemes from text and judges with those that Check accepts.
func FuzzScheme(f *testing.F) {
	f.Add(`{"rule": "mean", "frequencies": [2000, 3000, 4000]}`, "10", "NR>100", 10.0)
	f.Add(`{"rule": "adjacent", "of": "level", "above": "x", "frequencies": [500, 8000]}`, "NT", "-5", -1e300)
	f.Add(`{"rule": "any", "frequencies": [500]}`, "", "12.5", 15.0)
	f.Fuzz(func(t *testing.T, text, before, now string, amount float64) {
		var s audiometry.Scheme
		from, err := audiometry.ParseThreshold(before)
		to, err2 := audiometry.ParseThreshold(now)
		if json.Unmarshal([]byte(text), &s) != nil || s.Check() != nil || err != nil || err2 != nil {
			return
		}
		var a, b audiometry.Ear
		for i := range a {
			a[i], b[i] = from, to
		}
		o := s.Judge(&a, &b, nil, amount)
		require.LessOrEqual(t, o.Low, o.High)
		require.NotEmpty(t, s.Working(&a, &b, nil, amount))
		_, worse := s.JudgeEars(&a, &b, amount)
		require.Contains(t, []string{"", "left", "right", "both"}, worse)
	})
}
