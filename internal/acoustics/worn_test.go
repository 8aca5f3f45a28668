package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestWearTime: 30 dB worn for 95, 90 and 50 % of the noise are 12.93, 9.96 and 3.01 dB (computed).
func TestWearTime(t *testing.T) {
	full := acoustics.UnderSNR(100, 30)
	for share, want := range map[float64]float64{0.95: 12.93, 0.9: 9.96, 0.5: 3.01} {
		worn, ok := full.WornFor(share)
		require.True(t, ok)
		assert.InDelta(t, want, worn.Attenuation, 0.0051, "%g", share)
		assert.InDelta(t, 100-worn.Attenuation, worn.Level, 1e-9)
	}
	always, ok := full.WornFor(1)
	require.True(t, ok)
	assert.Equal(t, [2]float64{70, 30}, [2]float64{always.Level, always.Attenuation})
	never, ok := full.WornFor(0)
	require.True(t, ok)
	assert.Equal(t, [2]float64{100, 0}, [2]float64{never.Level, never.Attenuation})
	assert.False(t, never.Clamped)
	half, _ := full.WornFor(0.5)
	assert.Contains(t, half.Working()[2], "worn for 0.5 of the noise: attenuation = -10 lg(0.5 · 10^(-30/10) + 0.5) = 3.006")
	for _, share := range []float64{-0.1, 1.1, math.NaN()} {
		_, ok := full.WornFor(share)
		assert.False(t, ok)
	}
	clamped, _ := acoustics.UnderNRR(90, acoustics.A, 5).WornFor(0.5)
	assert.True(t, clamped.Clamped)
	assert.Equal(t, 90.0, clamped.Level)
}

func TestLongerWearProtectsMore(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		full := acoustics.UnderSNR(rapid.Float64Range(80, 120).Draw(t, "level"), rapid.Float64Range(0, 40).Draw(t, "snr"))
		share := rapid.Float64Range(0, 1).Draw(t, "share")
		less, ok := full.WornFor(share)
		require.True(t, ok)
		more, ok := full.WornFor(share + (1-share)*rapid.Float64Range(0, 1).Draw(t, "more"))
		require.True(t, ok)
		require.LessOrEqual(t, more.Level, less.Level+1e-9)
		require.LessOrEqual(t, full.Level, more.Level+1e-9)
	})
}

func TestWorkingHoldsALongChain(t *testing.T) {
	p := acoustics.UnderCSADual(110, acoustics.A, 30, 24).RealWorld(2)
	worn, ok := p.WornFor(0.9)
	require.True(t, ok)
	assert.Equal(t, []string{
		"derated NRR = 0.65 · 35 = 22.75 dB", "attenuation of an A-weighted level = 22.75 - 3 = 19.75 dB", "110 - 19.75 = 90.25 dB under the protector",
		"attenuation less the real-world allowance = 19.75 - 2 = 17.75 dB", "110 - 17.75 = 92.25 dB under the protector",
	}, worn.Working()[:5])
	assert.Len(t, worn.Working(), 7)
	assert.Equal(t, []string{"attenuation of an A-weighted level = 5 - 7 = -2 dB", "-2 dB is negative, so 0 dB is taken off 90 dB"},
		acoustics.UnderNRR(90, acoustics.A, 5).Working())
	assert.Empty(t, acoustics.Protected{}.Working())
}

// TestPeakUnderProtector: EN 458, informative, from memory.
func TestPeakUnderProtector(t *testing.T) {
	rating := acoustics.HML{High: 30, Medium: 24, Low: 18}
	for kind, want := range map[acoustics.Impulse]float64{acoustics.HighFrequency: 115, acoustics.MediumFrequency: 126, acoustics.LowFrequency: 132} {
		got, err := acoustics.UnderPeak(acoustics.Peak{Level: 145, Weighting: acoustics.C}, rating, kind)
		require.NoError(t, err)
		assert.Equal(t, want, got.Level, "%s", kind)
		assert.Len(t, got.Working(), 2)
	}
	_, err := acoustics.UnderPeak(acoustics.Peak{Level: 145, Weighting: acoustics.Z}, rating, acoustics.LowFrequency)
	assert.EqualError(t, err, `the peak under a protector needs a C-weighted peak, and this one is weighted "Z"`)
	_, err = acoustics.UnderPeak(acoustics.Peak{Level: math.Inf(-1), Weighting: acoustics.C}, rating, acoustics.LowFrequency)
	assert.EqualError(t, err, "the peak has no level")
	_, err = acoustics.UnderPeak(acoustics.Peak{Level: 145, Weighting: acoustics.C}, rating, "bang")
	assert.EqualError(t, err, `"bang" is not a kind of impulse`)
}

// TestFitTest: a rating of 25 dB for half of all wearings with an uncertainty of 4 dB is 25 - 0.9945 * 4 for 84 %
// (table of the normal distribution).
func TestFitTest(t *testing.T) {
	u, ok := acoustics.CombinedUncertainty(2, 2, 2, 2)
	require.True(t, ok)
	assert.Equal(t, 4.0, u)
	half := acoustics.PAR{Attenuation: 25, Percent: 50, Uncertainty: u}
	most, ok := half.At(84)
	require.True(t, ok)
	assert.InDelta(t, 25-0.99446*4, most.Attenuation, 5e-5)
	back, ok := most.At(50)
	require.True(t, ok)
	assert.InDelta(t, 25, back.Attenuation, 1e-12)

	got, ok := acoustics.UnderPAR(100, half, 84)
	require.True(t, ok)
	assert.InDelta(t, 100-most.Attenuation, got.Level, 1e-12)
	assert.Equal(t, "PAR for 84 % of wearings, with an uncertainty of 4 dB = 21.0222 dB", got.Working()[1])
	same, ok := acoustics.UnderPAR(100, half, 50)
	require.True(t, ok)
	assertProtected(t, 75, 25, same)

	for _, bad := range []acoustics.PAR{{25, 0, 4}, {25, 50, -1}, {math.NaN(), 50, 4}, {25, 100, 4}} {
		_, ok := acoustics.UnderPAR(100, bad, 84)
		assert.False(t, ok, "%v", bad)
	}
	_, ok = half.At(100)
	assert.False(t, ok)
	_, ok = acoustics.UnderPAR(math.NaN(), half, 84)
	assert.False(t, ok)
	_, ok = acoustics.CombinedUncertainty()
	assert.False(t, ok)
	_, ok = acoustics.CombinedUncertainty(2, -1)
	assert.False(t, ok)
}

// TestResidualBands: EN 458 for an action level of 85 dB(A), from memory: above 85 too little, 80 to 85 enough, 75
// to 80 good, 70 to 75 enough, below 70 too much.
func TestResidualBands(t *testing.T) {
	bands := acoustics.EN458Bands(85)
	for level, want := range map[float64]acoustics.Sufficiency{
		85.1: acoustics.TooLittle, 85: acoustics.JustSo, 80.1: acoustics.JustSo, 80: acoustics.Good, 75: acoustics.Good,
		74.9: acoustics.Much, 70: acoustics.Much, 69.9: acoustics.TooMuch,
	} {
		got, ok := bands.Judge(level)
		require.True(t, ok)
		assert.Equal(t, want, got, "%g dB", level)
	}
	_, ok := bands.Judge(math.NaN())
	assert.False(t, ok)
	_, ok = acoustics.ResidualBands{ActionLevel: 85, GoodBelow: 10, GoodAbove: 5, TooMuch: 15}.Judge(75)
	assert.False(t, ok)
}

// TestClasses: AS/NZS 1270 and 1269.3, and CSA Z94.2 by the Alberta code, both from memory.
func TestClasses(t *testing.T) {
	for slc, want := range map[float64]int{10: 1, 13: 1, 13.9: 1, 14: 2, 18: 3, 22: 4, 25: 4, 26: 5, 35: 5} {
		got, ok := acoustics.ASNZSClass(slc)
		require.True(t, ok)
		assert.Equal(t, want, got, "%g", slc)
	}
	_, ok := acoustics.ASNZSClass(9.9)
	assert.False(t, ok)
	for lex, want := range map[float64]int{84: 1, 89.9: 1, 90: 2, 94.9: 2, 95: 3, 100: 4, 105: 5, 109.9: 5, 110: 0, 120: 0} {
		got, ok := acoustics.ASNZSClassNeeded(lex)
		require.True(t, ok)
		assert.Equal(t, want, got, "%g dB", lex)
	}
	_, ok = acoustics.ASNZSClassNeeded(math.Inf(-1))
	assert.False(t, ok)
	for lex, want := range map[float64]string{85: "C, B or A", 90: "C, B or A", 90.1: "B or A", 100: "A", 105: "A", 110: "A", 111: "A"} {
		got, ok := acoustics.CSAClassNeeded(lex)
		require.True(t, ok)
		assert.Equal(t, want, got.Classes, "%g dB", lex)
		assert.Equal(t, lex > 105, got.MuffClasses != "", "%g dB", lex)
		assert.Equal(t, lex > 110, got.LimitedTime, "%g dB", lex)
	}
	_, ok = acoustics.CSAClassNeeded(math.NaN())
	assert.False(t, ok)
	for _, call := range []func(float64, acoustics.Weighting, float64, acoustics.ProtectorKind) (acoustics.Protected, bool){acoustics.UnderNIOSH, acoustics.UnderCSA} {
		_, ok := call(100, acoustics.C, 25, "cotton wool")
		assert.False(t, ok)
	}
}
