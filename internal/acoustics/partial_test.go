package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestPartialSampleIsReadBothWays: 60 % in 4 hours is a TWA of 86.32 as it is and 91.32 projected to 8 hours,
// which is the average of the 4 hours (computed).
func TestPartialSampleIsReadBothWays(t *testing.T) {
	p, ok := actionLevel.Partial(60, 240, 480)
	require.True(t, ok)
	assert.True(t, p.HasLevels)
	assert.Equal(t, 60.0, p.MeasuredDose)
	assert.Equal(t, 120.0, p.ProjectedDose)
	assert.InDelta(t, 86.32, p.MeasuredTWA, 0.005)
	assert.InDelta(t, 91.32, p.ProjectedTWA, 0.005)
	assert.InDelta(t, 91.32, p.Average, 0.005)

	p, ok = actionLevel.Partial(0, 240, 480)
	assert.True(t, ok)
	assert.Equal(t, acoustics.PartialSample{}, p, "no dose has no level")
	for _, bad := range [][3]float64{{-1, 240, 480}, {60, 0, 480}, {60, 240, 1500}, {math.NaN(), 240, 480}} {
		_, ok := actionLevel.Partial(bad[0], bad[1], bad[2])
		assert.False(t, ok, "%v", bad)
	}
	_, ok = acoustics.Scale{Criterion: 90}.Partial(60, 240, 480)
	assert.False(t, ok)
}

// TestAverageLevels takes self-consistent instrument readings, 90 dB and 5 dB exchange: dose, hours, TWA and
// average over the run (computed by another program from 29 CFR 1910.95 App. A).
func TestAverageLevels(t *testing.T) {
	for _, c := range [][4]float64{{62.5, 7.75, 86.61, 86.84}, {41.2, 7.75, 83.60, 83.83}, {131, 8.10, 91.95, 91.86}, {48, 6.5, 84.71, 86.20}, {212.4, 11.4, 95.43, 92.88}} {
		p, ok := actionLevel.Partial(c[0], c[1]*60, c[1]*60)
		require.True(t, ok)
		assert.InDelta(t, c[2], p.MeasuredTWA, 0.0051, "%v", c)
		assert.InDelta(t, c[3], p.Average, 0.011, "%v", c)
	}
}

func TestAverageLevelHasTheDose(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := drawScale(t)
		s.Threshold = 0
		dose, minutes := rapid.Float64Range(0.1, 5000).Draw(t, "dose"), rapid.Float64Range(1, 1440).Draw(t, "minutes")
		level, ok := s.AverageLevel(dose, minutes)
		require.True(t, ok)
		again, err := s.Dose([]acoustics.Segment{{Level: level, Minutes: minutes}})
		require.NoError(t, err)
		require.InEpsilon(t, dose, again, 1e-9)
	})
}

func TestNoAverageLevelOfNothing(t *testing.T) {
	for _, bad := range [][2]float64{{0, 480}, {-1, 480}, {50, 0}, {50, 1500}, {math.NaN(), 480}} {
		_, ok := actionLevel.AverageLevel(bad[0], bad[1])
		assert.False(t, ok, "%v", bad)
	}
	_, ok := acoustics.Scale{Criterion: 90}.AverageLevel(50, 480)
	assert.False(t, ok)
}

// TestHigherThresholdNeverCountsMore: OSHA Technical Manual, instrument settings: a threshold of 80 dB never
// gives a lower dose than one of 90 dB on the same noise.
func TestHigherThresholdNeverCountsMore(t *testing.T) {
	low, high := acoustics.Reading{Scale: actionLevel, DosePct: 77.9}, acoustics.Reading{Scale: limit, DosePct: 80}
	want := "the dose of 80 % counted from 90 dB is above the 77.9 % counted from 80 dB, which cannot be"
	assert.Equal(t, want, acoustics.DoubtReadings(low, high))
	assert.Equal(t, want, acoustics.DoubtReadings(high, low))
	high.DosePct = 77.9
	assert.Empty(t, acoustics.DoubtReadings(low, high), "all noise was above 90 dB")
	high = acoustics.Reading{Scale: recommended, DosePct: 500}
	assert.Empty(t, acoustics.DoubtReadings(low, high), "another scale says nothing")
	rapid.Check(t, func(t *rapid.T) {
		day := rapid.SliceOfN(rapid.Custom(drawSegment), 1, 10).Draw(t, "day")
		a, err := actionLevel.Dose(day)
		require.NoError(t, err)
		b, err := limit.Dose(day)
		require.NoError(t, err)
		require.Empty(t, acoustics.DoubtReadings(acoustics.Reading{Scale: actionLevel, DosePct: a}, acoustics.Reading{Scale: limit, DosePct: b}))
	})
}

func TestDoubtTWA(t *testing.T) {
	for name, c := range map[string]struct {
		dose, twa, ran float64
		want           string
	}{
		"right":            {60, 86.3, 240, ""},
		"0.2 dB off":       {100, 90.2, 240, ""},
		"wrong":            {60, 88, 240, "a dose of 60 % has a time-weighted average of 86.3 dB, but 88 dB is reported"},
		"average of run":   {60, 91.3, 240, "91.3 dB is the average of the 240 minutes the instrument ran; a dose of 60 % has a time-weighted average of 86.3 dB over 8 hours"},
		"run not known":    {60, 91.3, 0, "a dose of 60 % has a time-weighted average of 86.3 dB, but 91.3 dB is reported"},
		"level of none":    {0, 70, 480, "a dose of 0 % has no time-weighted average, but 70 dB is reported"},
		"nothing to doubt": {math.NaN(), 70, 480, ""},
	} {
		assert.Equal(t, c.want, actionLevel.DoubtTWA(c.dose, c.twa, c.ran), name)
	}
}
