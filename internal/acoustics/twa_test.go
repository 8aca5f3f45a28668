package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestTableA1 takes all 151 rows of 29 CFR 1910.95 App. A Table A-1 and the two examples in its text. The
// table prints 91.1 dB at 115 %; the formula gives 91.008, so this one value is a misprint.
func TestTableA1(t *testing.T) {
	table, examples := 0, 0
	for _, r := range vectors(t, "twa.csv") {
		switch r["set"] {
		case "osha_A1":
			table++
		case "text_example":
			examples++
		default:
			continue
		}
		dose, printed := r.number(t, "dose_pct"), r.number(t, "twa_dBA_printed")
		got, ok := actionLevel.TWAReported(dose)
		require.True(t, ok)
		if dose == 115 {
			assert.Equal(t, 91.1, printed)
			assert.Equal(t, 91.0, got)
			continue
		}
		assert.Equal(t, printed, got, "%g %%", dose)
	}
	assert.Equal(t, 151, table)
	assert.Equal(t, 2, examples)
}

// TestMineTable takes all 36 rows of 30 CFR 62 Appendix Table 62-2, printed in whole dB.
func TestMineTable(t *testing.T) {
	n := 0
	for _, r := range vectors(t, "twa.csv") {
		if r["set"] != "msha_62_2" {
			continue
		}
		n++
		twa, ok := mineLimit.TWA(r.number(t, "dose_pct"))
		require.True(t, ok)
		assert.Equal(t, r.number(t, "twa_dBA_printed"), math.Round(twa), "%v", r)
	}
	assert.Equal(t, 36, n)
}

// TestHalfDoseTrap: the coefficient of the law, 16.61, puts the average of exactly 50 % a little below the
// 85 dB that 29 CFR 1910.95(c)(1) calls the same. The rounded average is 85.
func TestHalfDoseTrap(t *testing.T) {
	twa, ok := actionLevel.TWA(50)
	require.True(t, ok)
	assert.Less(t, twa, 85.0)
	assert.InDelta(t, 84.99989, twa, 5e-6) // computed from the formula of App. A II
	reported, ok := actionLevel.TWAReported(50)
	require.True(t, ok)
	assert.Equal(t, 85.0, reported)

	// 30 CFR 62.101: dual protection above 800 %, which is 105 dB; the formula gives a little more.
	twa, _ = mineLimit.TWA(800)
	assert.Greater(t, twa, 105.0)
	assert.Equal(t, 105.0, acoustics.RoundTenth(twa))
}

// TestRecommendedAverages: with 10 lg the average of a steady 8-hour level is not that level above 85 dB.
// Computed from the two formulas, 100.0515 and 115.103.
func TestRecommendedAverages(t *testing.T) {
	for level, want := range map[float64]float64{85: 85, 100: 100.0515, 115: 115.103} {
		dose, err := recommended.Dose([]acoustics.Segment{{Level: level, Minutes: 480}})
		require.NoError(t, err)
		twa, ok := recommended.TWA(dose)
		require.True(t, ok)
		assert.InDelta(t, want, twa, 5e-4)
	}
}

// TestExtendedShift: the steady level that reaches the action level on longer shifts, 16.61 lg(50 / (12.5 h))
// + 90. The formula is quoted from the OSHA Technical Manual by a secondary source.
func TestExtendedShift(t *testing.T) {
	for _, r := range vectors(t, "extended_shift_al.csv") {
		minutes := 60 * r.number(t, "shift_hours")
		steady, ok := actionLevel.SteadyLevel(50, minutes)
		require.True(t, ok)
		level := steady.Level
		assert.InDelta(t, r.number(t, "osha_action_level_dBA_full_shift"), level, 5.1e-5, "%v", r)
		assert.Equal(t, minutes > 16*60, steady.BelowThreshold, "steady noise below 80 dB is not integrated: %v", r)
		if level < actionLevel.Threshold {
			continue // 16 h too: the printed coefficient gives a hair less than 80
		}
		dose, err := actionLevel.Dose([]acoustics.Segment{{Level: level, Minutes: minutes}})
		require.NoError(t, err)
		assert.InDelta(t, 50, dose, 0.01)
	}
}

func TestNoAverageOfNoDose(t *testing.T) {
	for _, dose := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		_, ok := actionLevel.TWA(dose)
		assert.False(t, ok, "%g", dose)
		_, ok = actionLevel.TWAReported(dose)
		assert.False(t, ok, "%g", dose)
	}
	_, ok := acoustics.Scale{Criterion: 90}.TWA(50)
	assert.False(t, ok)
}

func TestTWAIsMonotoneAndInverts(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := drawScale(t)
		low := rapid.Float64Range(0.01, 10000).Draw(t, "low")
		high := low * rapid.Float64Range(1.0001, 100).Draw(t, "factor")
		a, ok := s.TWA(low)
		require.True(t, ok)
		b, ok := s.TWA(high)
		require.True(t, ok)
		require.Less(t, a, b)
		require.InEpsilon(t, low, s.DoseOfTWA(a), 1e-9)
	})
}

// TestRoundTenth: halves go up, as in Table A-1, although few halves are exact in binary.
func TestRoundTenth(t *testing.T) {
	for n := -2000; n <= 20000; n++ {
		assert.Equal(t, float64(n+1)/10, acoustics.RoundTenth(float64(n*10+5)/100), "half above %d tenths", n)
		assert.Equal(t, float64(n)/10, acoustics.RoundTenth(float64(n*100+49)/1000), "below the half above %d tenths", n)
	}
	assert.True(t, math.IsNaN(acoustics.RoundTenth(math.NaN())))
	assert.False(t, math.Signbit(acoustics.RoundTenth(-0.01)))
}

// TestProject: 60 % in 4 hours is 120 % in 8; TWA 86.32 as it is and 91.32 projected (computed).
func TestProject(t *testing.T) {
	asIs, _ := actionLevel.TWA(60)
	assert.InDelta(t, 86.32, asIs, 0.005)
	dose, ok := actionLevel.Project(60, 240, 480)
	require.True(t, ok)
	assert.Equal(t, 120.0, dose)
	projected, _ := actionLevel.TWA(dose)
	assert.InDelta(t, 91.32, projected, 0.005)

	dose, ok = actionLevel.Project(0, 240, 480)
	assert.True(t, ok)
	assert.Zero(t, dose)
	for _, bad := range [][3]float64{{-1, 240, 480}, {60, 0, 480}, {60, 240, 0}, {60, -1, 480}, {60, 240, 1500}, {60, math.NaN(), 480}, {math.NaN(), 240, 480}} {
		_, ok := actionLevel.Project(bad[0], bad[1], bad[2])
		assert.False(t, ok, "%v", bad)
	}
}

// TestMeasures: a dose can only be read on its own scale (29 CFR 1910.95(d)(2)(i); 30 CFR 62.101).
func TestMeasures(t *testing.T) {
	meter := actionLevel
	assert.True(t, actionLevel.Measures(meter))
	meter.Upper = 140
	assert.True(t, actionLevel.Measures(meter), "a wider range")
	meter.Upper = 0
	assert.True(t, actionLevel.Measures(meter), "no upper end")
	meter.Upper = 115
	assert.False(t, actionLevel.Measures(meter), "a range that stops at 115 dB")

	assert.False(t, actionLevel.Measures(limit), "threshold 90 for 80")
	assert.False(t, limit.Measures(actionLevel), "threshold 80 for 90")
	assert.False(t, limit.Measures(mineLimit), "an upper end where the scale has none")
	assert.True(t, mineLimit.Measures(limit), "no upper end where the scale has one")
	assert.False(t, actionLevel.Measures(recommended))
	assert.False(t, actionLevel.Measures(acoustics.Scale{Criterion: 90, Exchange: 4, Threshold: 80}))
	assert.False(t, actionLevel.Measures(acoustics.Scale{Criterion: 85, Exchange: 5, Threshold: 80}))
}
