package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
)

func TestDecide(t *testing.T) {
	for _, c := range []struct {
		rule                   acoustics.DecisionRule
		lower, estimate, upper float64
		reached                bool
		want                   acoustics.Zone
	}{
		{acoustics.BestEstimate, 80, 84, 88, false, acoustics.Below},
		{acoustics.BestEstimate, 80, 85, 88, false, acoustics.Below},
		{acoustics.BestEstimate, 80, 85, 88, true, acoustics.Above},
		{acoustics.BestEstimate, 80, 84.9999999999, 88, true, acoustics.Above},
		{acoustics.UpperLimit, 80, 84, 88, false, acoustics.Above},
		{acoustics.UpperLimit, 80, 82, 84, false, acoustics.Below},
		{acoustics.UpperLimit, math.NaN(), 82, 84, false, acoustics.Below},
		{acoustics.ThreeZones, 80, 84, 88, false, acoustics.Undetermined},
		{acoustics.ThreeZones, 80, 82, 84.9, false, acoustics.Below},
		{acoustics.ThreeZones, 80, 82, 85, false, acoustics.Below},
		{acoustics.ThreeZones, 80, 82, 85, true, acoustics.Undetermined},
		{acoustics.ThreeZones, 85, 86, 87, false, acoustics.Undetermined},
		{acoustics.ThreeZones, 85, 86, 87, true, acoustics.Above},
		{acoustics.ThreeZones, 85.1, 86, 87, false, acoustics.Above},
	} {
		got, err := acoustics.Decide(c.rule, c.lower, c.estimate, c.upper, acoustics.Limit{Level: 85, Reached: c.reached})
		require.NoError(t, err)
		assert.Equal(t, c.want, got, "%v", c)
	}
	nan := math.NaN()
	for want, c := range map[string]struct {
		rule                          acoustics.DecisionRule
		lower, estimate, upper, limit float64
	}{
		`"guess" is not a decision rule`:                                              {"guess", 80, 84, 88, 85},
		"a result and a limit are needed to decide":                                   {acoustics.BestEstimate, 80, 84, 88, nan},
		`the uncertainty of the result is needed to decide by the rule "upper limit"`: {acoustics.UpperLimit, 80, 84, nan, 85},
		`the uncertainty of the result is needed to decide by the rule "three zones"`: {acoustics.ThreeZones, nan, 84, 88, 85},
	} {
		_, err := acoustics.Decide(c.rule, c.lower, c.estimate, c.upper, acoustics.Limit{Level: c.limit})
		assert.EqualError(t, err, want)
	}
	_, err := acoustics.Decide(acoustics.BestEstimate, 80, math.Inf(-1), 88, acoustics.Limit{Level: 85})
	assert.Error(t, err)
	_, err = acoustics.Decide(acoustics.ThreeZones, 85, 84, 88, acoustics.Limit{Level: 85})
	assert.Error(t, err, "ends that do not lie around the result")
}

// TestMoreSamplesForAJob: the group of ISO 9612:2009 Annex E has 88.16 dB(A) with U = 3.77 dB; with instrument and
// place alone U would be 1.65 * sqrt(1.5² + 1²) = 2.97 dB, so a limit within 3 dB can never be settled.
func TestMoreSamplesForAJob(t *testing.T) {
	r, err := acoustics.Sampled(acoustics.JobBased, []float64{88.1, 86.1, 89.7, 86.5, 91.1, 86.7}, 450, acoustics.Exposimeter)
	require.NoError(t, err)
	zone := func(level float64) acoustics.Zone {
		z, err := r.Decide(acoustics.ThreeZones, acoustics.Limit{Level: level})
		require.NoError(t, err)
		return z
	}
	assert.Equal(t, acoustics.Above, zone(84.3))
	assert.Equal(t, acoustics.Undetermined, zone(85))
	assert.Equal(t, acoustics.Below, zone(92))

	more, ok := r.MoreSamples(acoustics.Limit{Level: 84.3}, 30)
	assert.True(t, ok)
	assert.Zero(t, more, "settled already")
	more, ok = r.MoreSamples(acoustics.Limit{Level: 85}, 30)
	require.True(t, ok)
	assert.Equal(t, 10, more, "U must not exceed 3.159 dB: 16 samples have c1u1 0.60 and U 3.13 dB, 15 have 0.65 and 3.163 dB")
	_, ok = r.MoreSamples(acoustics.Limit{Level: 85}, 6+more-1)
	assert.False(t, ok)
	_, ok = r.MoreSamples(acoustics.Limit{Level: 86}, 1000)
	assert.False(t, ok)

	tasks, err := acoustics.TaskBased([]acoustics.Task{{Levels: []float64{85}, Minutes: 480}}, acoustics.ClassOneMeter)
	require.NoError(t, err)
	z, err := tasks.Decide(acoustics.UpperLimit, acoustics.Limit{Level: 87})
	require.NoError(t, err)
	assert.Equal(t, acoustics.Above, z, "85 + 1.65 sqrt(0.7² + 1²) = 87.01")
}

// TestMoreSamplesForAGroup: with a mean 1 dB below the limit and a standard deviation of 2 dB, 13 levels have
// the upper limit t(0.95; 12) * 2 / sqrt(13) = 0.989 dB and 12 have 1.037 dB above their mean (tables of t).
func TestMoreSamplesForAGroup(t *testing.T) {
	g := acoustics.Group{N: 6, Mean: 84, SD: 2, EnergyEstimate: 84 + 0.1151*4}
	limit := acoustics.Limit{Level: 85}
	z, err := g.Decide(acoustics.MeanOfLevels, acoustics.ThreeZones, limit, 0.95)
	require.NoError(t, err)
	assert.Equal(t, acoustics.Undetermined, z)
	more, ok, err := g.MoreSamples(acoustics.MeanOfLevels, limit, 0.95, 100)
	require.NoError(t, err)
	require.True(t, ok)
	assert.Equal(t, 7, more)
	_, ok, err = g.MoreSamples(acoustics.MeanOfLevels, limit, 0.95, 12)
	require.NoError(t, err)
	assert.False(t, ok)
	energy, ok, err := g.MoreSamples(acoustics.MeanOfEnergy, limit, 0.95, 1000)
	require.NoError(t, err)
	require.True(t, ok)
	assert.Greater(t, energy, more, "the energy mean lies nearer to the limit")

	_, err = g.Decide("median", acoustics.ThreeZones, limit, 0.95)
	assert.EqualError(t, err, `"median" is not an average of a group`)
	_, err = g.Decide(acoustics.MeanOfLevels, acoustics.ThreeZones, limit, 0.5)
	assert.EqualError(t, err, "a confidence of 0.5 is not above one half")
	_, err = g.Decide(acoustics.MeanOfLevels, acoustics.ThreeZones, limit, 1)
	assert.EqualError(t, err, "a confidence of 1 is not between 0 and 1")
	_, _, err = acoustics.Group{N: 2}.MoreSamples(acoustics.MeanOfLevels, limit, 0.95, 10)
	assert.Error(t, err)
}
