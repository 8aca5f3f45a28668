package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// Sources as in the vector files: NJC directive for Canada's federal table, Occupational Health Regulations
// s. 4(3) for Yukon, WorkSafeNB for New Brunswick.
var (
	canada       = acoustics.TimeLimit{Criterion: 87}
	yukon        = acoustics.TimeLimit{Criterion: 85, Exchange: 3, None: 103}
	newBrunswick = acoustics.TimeLimit{Criterion: 85, Exchange: 3, None: 115, NoneAt: true}
	yukonImpacts = acoustics.ImpactLimit{Peak: 118, Count: 14400, Exchange: 3, None: 140}
)

// TestCanadaIsEqualEnergy takes all 19 rows of the federal table. They are printed to two figures, and at 88,
// 97, 98 and 101 dB only equal energy gives what is printed.
func TestCanadaIsEqualEnergy(t *testing.T) {
	rows := vectors(t, "canada_federal_87.csv")
	require.Len(t, rows, 19)
	halving := acoustics.TimeLimit{Criterion: 87, Exchange: 3}
	var onlyEqualEnergy []float64
	for _, r := range rows {
		level, printed := r.number(t, "level_dBA"), r.number(t, "max_hours_printed")
		minutes, ok := canada.Minutes(level)
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "hours_equal_energy"), minutes/60, 5.1e-5, "%v", r)
		assert.Equal(t, printed, twoFigures(minutes/60), "%v", r)
		minutes, _ = halving.Minutes(level)
		assert.InDelta(t, r.number(t, "hours_3dB_halving"), minutes/60, 5.1e-5, "%v", r)
		if printed != twoFigures(minutes/60) {
			onlyEqualEnergy = append(onlyEqualEnergy, level)
		}
	}
	assert.Equal(t, []float64{88, 97, 98, 101}, onlyEqualEnergy)
}

func twoFigures(x float64) float64 {
	unit := math.Pow(10, math.Floor(math.Log10(x))-1)
	return math.Round(math.Round(x/unit)*unit*1e6) / 1e6
}

// TestYukon takes all 15 rows of the regulation. At 140 dB it prints 90 impacts, where halving gives 89.3.
func TestYukon(t *testing.T) {
	rows := vectors(t, "yukon_limits.csv")
	require.Len(t, rows, 15)
	for _, r := range rows {
		level, printed := r.number(t, "level"), r.number(t, "limit")
		if r["kind"] == "steady" {
			minutes, ok := yukon.Minutes(level)
			require.True(t, ok)
			assert.Equal(t, printed, minutes/60, "%v", r)
			continue
		}
		impacts, ok := yukonImpacts.Impacts(level)
		require.True(t, ok)
		assert.InDelta(t, printed, impacts, 0.8, "%v", r)
	}
	for level, want := range map[float64]float64{103.1: 0, 103: 7.5, 80: 480 * math.Exp2(5.0/3)} {
		minutes, ok := yukon.Minutes(level)
		require.True(t, ok)
		assert.InDelta(t, min(want, 1440), minutes, 1e-9, "%g dB", level)
	}
	none, ok := yukonImpacts.Impacts(140.1)
	assert.True(t, ok)
	assert.Zero(t, none)
}

// TestNewBrunswick takes all 12 rows, printed in minutes to two decimals; no day is longer than 24 hours.
func TestNewBrunswick(t *testing.T) {
	rows := vectors(t, "newbrunswick_limits.csv")
	require.Len(t, rows, 12)
	for _, r := range rows {
		minutes, ok := newBrunswick.Minutes(r.number(t, "level_dBA"))
		require.True(t, ok)
		assert.InDelta(t, r.number(t, "duration_min"), minutes, 0.0051, "%v", r)
	}
	for _, level := range []float64{115, 116} {
		minutes, ok := newBrunswick.Minutes(level)
		assert.True(t, ok)
		assert.Zero(t, minutes, "%g dB", level)
	}
}

func TestNoTimeForNoLevel(t *testing.T) {
	for _, level := range []float64{math.NaN(), math.Inf(-1), math.Inf(1)} {
		_, ok := canada.Minutes(level)
		assert.False(t, ok)
		_, ok = yukonImpacts.Impacts(level)
		assert.False(t, ok)
	}
	_, ok := acoustics.ImpactLimit{Peak: 118, Count: 14400}.Impacts(120)
	assert.False(t, ok)
}

func TestTimeFallsWithLevel(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		law := rapid.SampledFrom([]acoustics.TimeLimit{canada, yukon, newBrunswick}).Draw(t, "law")
		level := rapid.Float64Range(60, 130).Draw(t, "level")
		quiet, _ := law.Minutes(level)
		loud, _ := law.Minutes(level + rapid.Float64Range(0, 20).Draw(t, "more"))
		require.LessOrEqual(t, loud, quiet)
	})
}

// TestEqualEnergyShift: a limit of 87 dB over 12 hours is 85.239 (computed); the addition for long shifts is
// from memory (AS/NZS 1269.1).
func TestEqualEnergyShift(t *testing.T) {
	level, ok := acoustics.EqualEnergySteadyLevel(87, 12*60)
	require.True(t, ok)
	assert.InDelta(t, 85.2391, level, 5.1e-5)
	lex, _ := acoustics.LEX8h(level, 12*60)
	assert.InDelta(t, 87, lex, 1e-12)
	for hours, want := range map[float64]float64{8: 0, 9.99: 0, 10: 1, 13.9: 1, 14: 2, 20: 3, 24: 3} {
		add, ok := acoustics.LongShiftAddition(hours * 60)
		require.True(t, ok)
		assert.Equal(t, want, add, "%g h", hours)
	}
	for _, minutes := range []float64{0, -1, 1500, math.NaN()} {
		_, ok := acoustics.EqualEnergySteadyLevel(87, minutes)
		assert.False(t, ok)
		_, ok = acoustics.LongShiftAddition(minutes)
		assert.False(t, ok)
		_, ok = actionLevel.SteadyLevel(50, minutes)
		assert.False(t, ok)
	}
	_, ok = actionLevel.SteadyLevel(0, 480)
	assert.False(t, ok)
}
