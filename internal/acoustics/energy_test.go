package acoustics_test

import (
	"encoding/json"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestLevelVectors takes every row of its file. Daily levels: formula of the French order of 19 July 2006,
// art. 1 no. 1, computed by another program; weekly levels: S.I. 299/2007 reg. 120; all others: computed.
func TestLevelVectors(t *testing.T) {
	seen := map[string]int{}
	for _, r := range vectors(t, "lex.csv") {
		var got float64
		var ok bool
		switch r["kind"] {
		case "daily":
			var minutes float64
			day := r.segments(t, "input")
			for _, s := range day {
				minutes += s.Minutes
			}
			got, ok = acoustics.LevelOfSegments(day)
			require.True(t, ok)
			got, ok = acoustics.LEX8h(got, minutes)
		case "energy_sum":
			got, ok = acoustics.EnergySum(r.levels(t))
		case "energy_mean":
			got, ok = acoustics.EnergyMean(r.levels(t))
		case "weekly_div5":
			var err error
			got, err = acoustics.WeeklyLEX(r.levels(t), len(r.levels(t)))
			ok = err == nil
		case "energy_diff":
			levels := r.levels(t)
			var corrected acoustics.Corrected
			corrected, ok = acoustics.SubtractBackground(levels[0], levels[1])
			got = corrected.Level
		case "peak_pa_to_dB":
			got, ok = acoustics.PressureLevel(r.number(t, "input"))
		case "lex8h_to_Pa2h":
			got, ok = acoustics.SoundExposure(r.number(t, "input"), 480)
		case "Pa2h_to_lex8h":
			got, ok = acoustics.LEXOfExposure(r.number(t, "input"))
		default:
			t.Errorf("no rule for the kind %s", r["kind"])
		}
		seen[r["kind"]]++
		require.True(t, ok, "%v", r)
		assert.InDelta(t, r.number(t, "value"), got, 5.1e-5, "%v", r)
	}
	assert.Equal(t, map[string]int{"daily": 8, "energy_sum": 2, "energy_mean": 1, "energy_diff": 1, "weekly_div5": 6,
		"peak_pa_to_dB": 6, "lex8h_to_Pa2h": 4, "Pa2h_to_lex8h": 1}, seen)
}

func (r row) levels(t *testing.T) []float64 {
	t.Helper()
	var levels []float64
	require.NoError(t, json.Unmarshal([]byte(r["input"]), &levels))
	return levels
}

func TestNoLevelOfNothing(t *testing.T) {
	for _, levels := range [][]float64{nil, {}, {80, math.NaN()}, {math.Inf(-1)}, {math.Inf(1)}} {
		_, ok := acoustics.EnergySum(levels)
		assert.False(t, ok, "sum of %v", levels)
		_, ok = acoustics.EnergyMean(levels)
		assert.False(t, ok, "mean of %v", levels)
	}
	for _, day := range [][]acoustics.Segment{nil, {{80, 0}}, {{80, -1}}, {{math.NaN(), 5}}, {{80, math.Inf(1)}}} {
		_, ok := acoustics.LevelOfSegments(day)
		assert.False(t, ok, "%v", day)
	}
	for _, minutes := range []float64{0, -5, 1441, math.NaN()} {
		_, ok := acoustics.LEX8h(85, minutes)
		assert.False(t, ok, "%g minutes", minutes)
	}
	_, ok := acoustics.LEX8h(math.NaN(), 480)
	assert.False(t, ok)
	zero, ok := acoustics.EnergySum([]float64{0})
	assert.True(t, ok, "0 dB is a level")
	assert.Zero(t, zero)
}

func TestLevelsStayExact(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		level := float64(rapid.IntRange(0, 1400).Draw(t, "tenths")) / 10
		sum, _ := acoustics.EnergySum([]float64{level})
		mean, _ := acoustics.EnergyMean([]float64{level, level, level})
		day, _ := acoustics.LevelOfSegments([]acoustics.Segment{{level, 300}, {level, 180}, {150, 0}})
		lex, _ := acoustics.LEX8h(day, 480)
		require.Equal(t, [4]float64{level, level, level, level}, [4]float64{sum, mean, day, lex})
	})
}

func TestMergingEqualLevelsChangesNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := drawSegment(t), drawSegment(t)
		a.Minutes++
		half := acoustics.Segment{Level: a.Level, Minutes: a.Minutes / 2}
		whole, ok := acoustics.LevelOfSegments([]acoustics.Segment{a, b})
		require.True(t, ok)
		split, ok := acoustics.LevelOfSegments([]acoustics.Segment{half, b, half})
		require.True(t, ok)
		require.InDelta(t, whole, split, 1e-9)
	})
}
