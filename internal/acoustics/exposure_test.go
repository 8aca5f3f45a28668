package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestBackground: 90 less 87 is 86.979 dB (computed); a difference below 3 dB is unreliable (from memory).
func TestBackground(t *testing.T) {
	got, ok := acoustics.SubtractBackground(90, 87)
	require.True(t, ok)
	assert.InDelta(t, 86.9794, got.Level, 5.1e-5)
	assert.False(t, got.Unreliable, "3 dB are enough")
	got, _ = acoustics.SubtractBackground(88.1, 85.1)
	assert.False(t, got.Unreliable, "3 dB, a hair less in binary")
	got, _ = acoustics.SubtractBackground(89.9, 87)
	assert.True(t, got.Unreliable)
	got, _ = acoustics.SubtractBackground(90, -300)
	assert.Equal(t, 90.0, got.Level)
	for _, bad := range [][2]float64{{87, 87}, {86, 87}, {math.NaN(), 80}, {90, math.Inf(-1)}} {
		_, ok := acoustics.SubtractBackground(bad[0], bad[1])
		assert.False(t, ok, "%v", bad)
	}
}

func TestBackgroundUndoesTheSum(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		source := rapid.Float64Range(30, 130).Draw(t, "source")
		background := source + rapid.Float64Range(-20, 20).Draw(t, "difference")
		total, _ := acoustics.EnergySum([]float64{source, background})
		got, ok := acoustics.SubtractBackground(total, background)
		require.True(t, ok)
		require.InDelta(t, source, got.Level, 1e-9)
	})
}

// TestSoundExposureLevel: one hour is 3600 s, 35.563 dB above one second (computed).
func TestSoundExposureLevel(t *testing.T) {
	sel, ok := acoustics.SoundExposureLevel(90, 60)
	require.True(t, ok)
	assert.InDelta(t, 125.563, sel, 5e-4)
	sel, _ = acoustics.SoundExposureLevel(90, 1.0/60)
	assert.InDelta(t, 90, sel, 1e-12)
	for _, bad := range [][2]float64{{90, 0}, {90, -1}, {math.Inf(-1), 60}, {90, 1500}} {
		_, ok := acoustics.SoundExposureLevel(bad[0], bad[1])
		assert.False(t, ok, "%v", bad)
	}
}

// TestPointsOfDay takes all 18 rows of the ready-reckoner of weekly exposure (Health and Safety Executive,
// 2020). It rounds the points to one to three figures: at most 3.2 % or half a point.
func TestPointsOfDay(t *testing.T) {
	rows := vectors(t, "uk_points_daily.csv")
	require.Len(t, rows, 18)
	for _, r := range rows {
		points, ok := acoustics.UKPoints(r.number(t, "lepd_dBA"), 480)
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "points_formula"), points, 5.1e-4, "%v", r)
		assert.InEpsilon(t, r.number(t, "points_printed"), points, 0.036, "%v", r)
		lex, ok := acoustics.LEXOfUKPoints(r.number(t, "points_printed"))
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "lepd_dBA"), lex, 0.16, "%v", r)
	}
}

// TestPointsOfWeek takes all 18 rows of the second table of the same reckoner: whole dB.
func TestPointsOfWeek(t *testing.T) {
	rows := vectors(t, "uk_points_weekly.csv")
	require.Len(t, rows, 18)
	for _, r := range rows {
		lex, ok := acoustics.WeeklyLEXOfUKPoints(r.number(t, "points"))
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "lepw_formula"), lex, 5.1e-4, "%v", r)
		assert.Equal(t, r.number(t, "lepw_dBA_printed"), math.Round(lex), "%v", r)
	}
}

func TestNoExposureOfNothing(t *testing.T) {
	for _, x := range []float64{0, -1, math.NaN(), math.Inf(1)} {
		for name, f := range map[string]func(float64) (float64, bool){
			"exposure": acoustics.LEXOfExposure, "pressure": acoustics.PressureLevel,
			"points": acoustics.LEXOfUKPoints, "weekly points": acoustics.WeeklyLEXOfUKPoints,
		} {
			_, ok := f(x)
			assert.False(t, ok, "%s of %g", name, x)
		}
	}
	for _, bad := range [][2]float64{{math.NaN(), 480}, {math.Inf(-1), 480}, {85, 0}, {85, 1441}} {
		_, ok := acoustics.SoundExposure(bad[0], bad[1])
		assert.False(t, ok, "%v", bad)
		_, ok = acoustics.UKPoints(bad[0], bad[1])
		assert.False(t, ok, "%v", bad)
	}
	_, ok := acoustics.Pressure(math.NaN())
	assert.False(t, ok)
	pa, ok := acoustics.Pressure(94)
	assert.True(t, ok)
	assert.InDelta(t, 1.0024, pa, 5e-5) // 94 dB is close to 1 Pa (computed)
}

// TestWaysToADayAgree: exposure, points and equal energy lead to one daily level.
func TestWaysToADayAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		level, minutes := rapid.Float64Range(60, 120).Draw(t, "level"), rapid.Float64Range(1, 1440).Draw(t, "minutes")
		lex, ok := acoustics.LEX8h(level, minutes)
		require.True(t, ok)
		exposure, _ := acoustics.SoundExposure(level, minutes)
		byExposure, _ := acoustics.LEXOfExposure(exposure)
		points, _ := acoustics.UKPoints(level, minutes)
		byPoints, _ := acoustics.LEXOfUKPoints(points)
		week, _ := acoustics.WeeklyLEXOfUKPoints(5 * points)
		require.InDeltaSlice(t, []float64{lex, lex, lex}, []float64{byExposure, byPoints, week}, 1e-9)
	})
}

func TestWeekNeedsEveryDay(t *testing.T) {
	for name, c := range map[string]struct {
		daily []float64
		days  int
		want  string
	}{
		"missing day":   {[]float64{85, 90, 88, 80}, 5, "there are 4 daily levels for 5 days worked, so there is no weekly level"},
		"too many":      {[]float64{85, 90}, 1, "there are 2 daily levels for 1 days worked, so there is no weekly level"},
		"no days":       {nil, 0, "0 days worked in a week are not 1 to 7"},
		"eight days":    {make([]float64, 8), 8, "8 days worked in a week are not 1 to 7"},
		"not a level":   {[]float64{85, math.NaN()}, 2, "a daily level is not a number, so there is no weekly level"},
		"level of none": {[]float64{85, math.Inf(-1)}, 2, "a daily level is not a number, so there is no weekly level"},
	} {
		_, err := acoustics.WeeklyLEX(c.daily, c.days)
		assert.EqualError(t, err, c.want, name)
	}
}

func TestFiveEqualDaysAreTheDay(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		l := float64(rapid.IntRange(600, 1200).Draw(t, "tenths")) / 10
		week, err := acoustics.WeeklyLEX([]float64{l, l, l, l, l}, 5)
		require.NoError(t, err)
		require.Equal(t, l, week)
		six, err := acoustics.WeeklyLEX([]float64{l, l, l, l, l, l}, 6)
		require.NoError(t, err)
		require.Greater(t, six, week)
	})
}

func TestHighestPeak(t *testing.T) {
	got, err := acoustics.HighestPeak([]acoustics.Peak{{131, acoustics.C}, {138.2, acoustics.C}, {120, acoustics.C}})
	require.NoError(t, err)
	assert.Equal(t, acoustics.Peak{Level: 138.2, Weighting: acoustics.C}, got)
	for name, c := range map[string]struct {
		peaks []acoustics.Peak
		want  string
	}{
		"none":         {nil, "there are no peaks, so there is no highest"},
		"mixed":        {[]acoustics.Peak{{131, acoustics.C}, {140, acoustics.Z}}, "the peaks are weighted C and Z, which cannot be compared"},
		"no weighting": {[]acoustics.Peak{{131, acoustics.C}, {140, ""}}, "peak 2 has no weighting on record"},
		"no level":     {[]acoustics.Peak{{math.Inf(-1), acoustics.C}}, "peak 1 has no level"},
	} {
		_, err := acoustics.HighestPeak(c.peaks)
		assert.EqualError(t, err, c.want, name)
	}
}
