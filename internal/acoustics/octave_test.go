package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestOctaveAnnex is the octave-band example of the same annexes. It takes the standard deviation off the rounded
// mean, and sums to 81.4 dB(A), reported as 81.
func TestOctaveAnnex(t *testing.T) {
	var a subjects
	object(t, "iso4869_2_annex.json", &a)
	apv, ok := acoustics.AssumedProtection(a.Mean, a.Deviation, 1)
	require.True(t, ok)
	assert.InDeltaSlice(t, a.APV84[:], apv[:], 1e-9)
	got, err := acoustics.UnderOctave(a.Noise, apv)
	require.NoError(t, err)
	assert.True(t, got.From63)
	assert.InDelta(t, a.LA, got.LA, 0.0501)
	assert.InDelta(t, a.LC, got.LC, 0.0501)
	assert.InDelta(t, a.Octave.Level, got.Level, 0.0501)
	assert.Equal(t, a.Octave.Reported, acoustics.RoundWhole(got.Level))
	assert.InDelta(t, got.LA-got.Level, got.Attenuation, 1e-12)
	working := got.Working()
	assert.Equal(t, "63 Hz: L + A - APV = 75 + (-26.2) - 4.1 = 44.7 dB", working[0])
	for i, f := range acoustics.OctaveFrequencies {
		net := a.Noise[i] + []float64{-26.2, -16.1, -8.6, -3.2, 0, 1.2, 1, -1.1}[i] - apv[i]
		assert.InDelta(t, a.Net[i], net, 0.0501, "%d Hz", f)
	}
	assert.Len(t, working, 11)
}

// TestOntarioOctave is the example of the Ontario noise guideline App. D, from 125 Hz on: noise, means and
// deviations are the guideline's, the sums are computed.
func TestOntarioOctave(t *testing.T) {
	var o struct {
		Noise     [7]float64 `json:"noise"`
		Mean      [7]float64 `json:"mean"`
		Deviation [7]float64 `json:"sd"`
		APV       [7]float64 `json:"apv_printed"`
		Net       [7]float64 `json:"effective_band_computed"`
		Level     float64    `json:"overall_computed"`
		LA        float64    `json:"LpA_computed"`
		LC        float64    `json:"LpC_computed"`
	}
	object(t, "ontario_octave.json", &o)
	from125 := func(x [7]float64) acoustics.Bands {
		b := acoustics.Bands{math.NaN()}
		copy(b[1:], x[:])
		return b
	}
	apv, ok := acoustics.AssumedProtection(from125(o.Mean), from125(o.Deviation), 1)
	require.True(t, ok)
	assert.InDeltaSlice(t, o.APV[:], apv[1:], 1e-9)
	got, err := acoustics.UnderOctave(from125(o.Noise), apv)
	require.NoError(t, err)
	assert.False(t, got.From63)
	for i, net := range o.Net {
		assert.InDelta(t, net, o.Noise[i]+[]float64{-16.1, -8.6, -3.2, 0, 1.2, 1, -1.1}[i]-apv[i+1], 1e-9)
	}
	assert.InDelta(t, o.Level, got.Level, 0.00501)
	assert.InDelta(t, o.LA, got.LA, 0.00501)
	assert.InDelta(t, o.LC, got.LC, 0.00501)
	assert.Len(t, got.Working(), 10)

	// A noise with 63 Hz and a protector without: the band is left out of both.
	noise := from125(o.Noise)
	noise[0] = 120
	again, err := acoustics.UnderOctave(noise, apv)
	require.NoError(t, err)
	assert.Equal(t, got.Level, again.Level)
	assert.Equal(t, got.LA, again.LA)
}

func TestOctaveErrors(t *testing.T) {
	var full acoustics.Bands
	for i := range full {
		full[i] = 80
	}
	hole := full
	hole[3] = math.NaN()
	_, err := acoustics.UnderOctave(hole, full)
	assert.EqualError(t, err, "the noise lacks the level of an octave band from 125 to 8000 Hz")
	_, err = acoustics.UnderOctave(full, hole)
	assert.EqualError(t, err, "the protector lacks the attenuation of an octave band from 125 to 8000 Hz")
	_, ok := acoustics.AssumedProtection(hole, full, 1)
	assert.False(t, ok)
	_, ok = acoustics.AssumedProtection(full, acoustics.Bands{-1}, 1)
	assert.False(t, ok)
	silent := full
	silent[0] = math.Inf(-1)
	_, ok = silent.Weighted(acoustics.A)
	assert.False(t, ok)
	_, ok = full.Weighted(acoustics.Z)
	assert.False(t, ok)
	_, _, ok = acoustics.Rate(hole)
	assert.False(t, ok)
	_, err = acoustics.RateSubjects([]acoustics.Bands{full})
	assert.EqualError(t, err, "a rating needs at least 2 test subjects; there are 1")
	_, err = acoustics.RateSubjects([]acoustics.Bands{full, hole})
	assert.EqualError(t, err, "subject 2 lacks the attenuation of an octave band from 125 to 8000 Hz")
}

// TestAlpha takes ISO 4869-2:2018 Table 1 (secondary source); it rounds the quantile, at 84 and 98 % generously.
func TestAlpha(t *testing.T) {
	var a subjects
	object(t, "iso4869_2_annex.json", &a)
	require.Len(t, a.Alpha, 7)
	for percent, want := range map[float64]float64{50: a.Alpha["50"], 75: a.Alpha["75"], 80: a.Alpha["80"], 84: a.Alpha["84"], 90: a.Alpha["90"], 95: a.Alpha["95"], 98: a.Alpha["98"]} {
		alpha, tabled, ok := acoustics.Alpha(percent)
		require.True(t, ok)
		assert.True(t, tabled)
		assert.Equal(t, want, alpha, "%g %%", percent)
		near, tabled, ok := acoustics.Alpha(percent + 1e-9)
		require.True(t, ok)
		assert.False(t, tabled)
		assert.InDelta(t, want, near, 0.06)
	}
	alpha, _, _ := acoustics.Alpha(97.5)
	assert.InDelta(t, 1.95996, alpha, 5e-6) // table of the normal distribution
	for _, percent := range []float64{0, 100, -5, math.NaN()} {
		_, _, ok := acoustics.Alpha(percent)
		assert.False(t, ok)
	}
}

func TestHalfGetTheMeanAttenuation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var mean, deviation acoustics.Bands
		for i := range mean {
			mean[i] = rapid.Float64Range(0, 50).Draw(t, "mean")
			deviation[i] = rapid.Float64Range(0, 10).Draw(t, "deviation")
		}
		alpha, _, _ := acoustics.Alpha(50)
		apv, ok := acoustics.AssumedProtection(mean, deviation, alpha)
		require.True(t, ok)
		require.Equal(t, mean, apv)
		low := rapid.Float64Range(50, 99).Draw(t, "percent")
		more, _, _ := acoustics.Alpha(low + rapid.Float64Range(0.5, 0.9).Draw(t, "more"))
		less, _, _ := acoustics.Alpha(low)
		require.GreaterOrEqual(t, more, less-0.06, "but for the rounding of the table")
	})
}
