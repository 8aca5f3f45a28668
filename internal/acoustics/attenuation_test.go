package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestHMLVectors takes the example of ISO 4869-2:2018 Annex C (secondary source) and values of its formulas 16 to
// 18, computed by another program.
func TestHMLVectors(t *testing.T) {
	rows := vectors(t, "hml.csv")
	require.Len(t, rows, 8)
	for _, r := range rows {
		rating := acoustics.HML{High: r.number(t, "H"), Medium: r.number(t, "M"), Low: r.number(t, "L")}
		got, err := acoustics.UnderHML(r.number(t, "LpA"), r.number(t, "LpC"), rating)
		require.NoError(t, err)
		assert.Equal(t, r.number(t, "PNR"), got.Attenuation, "%v", r)
		assert.Equal(t, r.number(t, "L_prime_A"), got.Level, "%v", r)
		assert.Equal(t, r.number(t, "reported_int"), acoustics.RoundWhole(got.Level), "%v", r)
	}
	got, _ := acoustics.UnderHML(100, 105, acoustics.HML{High: 25, Medium: 19, Low: 13})
	assert.Equal(t, []string{
		"L_C - L_A = 105 - 100 = 5 dB",
		"attenuation = M - (M - L)/8 · (d - 2) = 19 - (19 - 13)/8 · (5 - 2) = 16.75 dB",
		"100 - 16.75 = 83.25 dB under the protector",
	}, got.Working())
}

func TestHMLErrors(t *testing.T) {
	good := acoustics.HML{High: 25, Medium: 19, Low: 13}
	for want, c := range map[string]struct {
		la, lc float64
		r      acoustics.HML
	}{
		"the HML method needs the A-weighted and the C-weighted level":                                {math.NaN(), 100, good},
		"the C-weighted level of 95 dB lies too far below the A-weighted level of 100 dB to be right": {100, 95, good},
		"the ratings H 13, M 19 and L 25 are not in falling order":                                    {100, 100, acoustics.HML{High: 13, Medium: 19, Low: 25}},
	} {
		_, err := acoustics.UnderHML(c.la, c.lc, c.r)
		assert.EqualError(t, err, want)
	}
}

func TestHMLIsContinuousAndFalls(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		low := float64(rapid.IntRange(5, 25).Draw(t, "L"))
		medium := low + float64(rapid.IntRange(0, 10).Draw(t, "M - L"))
		r := acoustics.HML{High: medium + float64(rapid.IntRange(0, 10).Draw(t, "H - M")), Medium: medium, Low: low}
		at := func(d float64) float64 {
			p, err := acoustics.UnderHML(100, 100+d, r)
			require.NoError(t, err)
			return p.Attenuation
		}
		require.Equal(t, medium, at(2))
		require.InDelta(t, at(2-1e-9), at(2+1e-9), 1e-8)
		d := rapid.Float64Range(-2, 10).Draw(t, "d")
		require.GreaterOrEqual(t, at(d), at(d+0.5)-1e-9)
		require.InDelta(t, r.High, at(-2), 1e-9)
		require.InDelta(t, r.Low, at(10), 1e-9)
	})
}

// TestSNRVectors: ISO 4869-2:2018 Annex D (secondary source) and an example with the real-world allowance of the
// United Kingdom, 4 dB (from memory).
func TestSNRVectors(t *testing.T) {
	rows := vectors(t, "snr.csv")
	require.Len(t, rows, 2)
	for _, r := range rows {
		got := acoustics.UnderSNR(r.number(t, "LpC"), r.number(t, "SNR"))
		assert.Equal(t, r.number(t, "L_prime_A"), got.Level)
		real := got.RealWorld(acoustics.UKRealWorldAllowance)
		assert.Equal(t, r.number(t, "uk_realworld_plus4"), real.Level)
		assert.Equal(t, got.Attenuation-4, real.Attenuation)
	}
	real := acoustics.UnderSNR(97, 28).RealWorld(4)
	assert.Equal(t, []string{
		"attenuation of the C-weighted level = SNR = 28 dB", "97 - 28 = 69 dB under the protector",
		"attenuation less the real-world allowance = 28 - 4 = 24 dB", "97 - 24 = 73 dB under the protector",
	}, real.Working())
	weak := acoustics.UnderSNR(97, 3).RealWorld(4)
	assert.True(t, weak.Clamped)
	assert.Equal(t, 97.0, weak.Level)
	assert.Equal(t, real, real.RealWorld(0))
	assert.Equal(t, real, real.RealWorld(math.NaN()))
	assert.Equal(t, 78.0, acoustics.UnderSLC80(100, 22).Level) // AS/NZS 1270, from memory
}

// subjects is the example of the annexes of ISO 4869-2:2018 (secondary source).
type subjects struct {
	Subjects  []acoustics.Bands  `json:"subjects"`
	Mean      acoustics.Bands    `json:"mean_printed"`
	Deviation acoustics.Bands    `json:"sd_printed"`
	APV84     acoustics.Bands    `json:"apv84_printed"`
	Alpha     map[string]float64 `json:"alpha"`
	Noise     acoustics.Bands    `json:"noise"`
	Net       acoustics.Bands    `json:"net_printed"`
	LA        float64            `json:"LpA"`
	LC        float64            `json:"LpC"`
	Octave    struct {
		Level    float64 `json:"L_prime"`
		Reported float64 `json:"reported"`
	} `json:"octave"`
	HML84     [3]float64 `json:"hml84"`
	Unrounded [3]float64 `json:"hml_unrounded"`
	HMLMean   [3]float64 `json:"hml_mean"`
	HMLSD     [3]float64 `json:"hml_sd"`
	Apply     struct {
		PNR      float64 `json:"PNR84"`
		Level    float64 `json:"L_prime"`
		Reported float64 `json:"reported"`
	} `json:"hml_apply"`
	SNR84        float64   `json:"snr84"`
	SNRUnrounded float64   `json:"snr_unrounded"`
	SNRMean      float64   `json:"snr_mean"`
	SNRSD        float64   `json:"snr_sd"`
	SNRReported  float64   `json:"snr_reported"`
	H            []float64 `json:"H_j"`
	M            []float64 `json:"M_j"`
	L            []float64 `json:"L_j"`
	SNR          []float64 `json:"SNR_j"`
}

// TestSubjectGrid reproduces every printed number of Annexes A to D from the attenuations of 16 subjects.
func TestSubjectGrid(t *testing.T) {
	var a subjects
	object(t, "iso4869_2_annex.json", &a)
	require.Len(t, a.Subjects, 16)
	for i, s := range a.Subjects {
		h, snr, ok := acoustics.Rate(s)
		require.True(t, ok)
		assert.InDeltaSlice(t, []float64{a.H[i], a.M[i], a.L[i], a.SNR[i]}, []float64{h.High, h.Medium, h.Low, snr}, 0.0501, "subject %d", i+1)
	}
	r, err := acoustics.RateSubjects(a.Subjects)
	require.NoError(t, err)
	assert.Equal(t, 16, r.Subjects)
	for i, s := range []acoustics.Spread{r.High, r.Medium, r.Low} {
		assert.InDelta(t, a.HMLMean[i], s.Mean, 0.0501)
		assert.InDelta(t, a.HMLSD[i], s.Deviation, 0.0501)
		assert.InDelta(t, a.Unrounded[i], s.At(1), 0.00501)
	}
	assert.InDelta(t, a.SNRMean, r.SNR.Mean, 0.0501)
	assert.InDelta(t, a.SNRSD, r.SNR.Deviation, 0.0501)
	assert.InDelta(t, a.SNRUnrounded, r.SNR.At(1), 0.00501)
	published := r.HML(1)
	assert.Equal(t, acoustics.HML{High: a.HML84[0], Medium: a.HML84[1], Low: a.HML84[2]}, published)
	assert.Equal(t, a.SNR84, r.SNRLabel(1))

	byHML, err := acoustics.UnderHML(a.LA, a.LC, published)
	require.NoError(t, err)
	assert.Equal(t, []float64{a.Apply.PNR, a.Apply.Level, a.Apply.Reported}, []float64{byHML.Attenuation, byHML.Level, acoustics.RoundWhole(byHML.Level)})
	assert.Equal(t, a.SNRReported, acoustics.UnderSNR(a.LC, r.SNRLabel(1)).Level)
}
