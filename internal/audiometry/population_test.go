package audiometry_test

import (
	"encoding/json"
	"math"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

func readJSON(t *testing.T, name string, into any) {
	t.Helper()
	text, err := os.ReadFile(filepath.Join("..", "..", "testdata", "vectors", name))
	require.NoError(t, err)
	require.NoError(t, json.Unmarshal(text, into))
}

// TestAgeMedianPinned: 20.2085 dB is a value of ISO 7029:2017, secondary source; the rows of 50 years were
// computed by another program from Table 1, secondary source.
func TestAgeMedianPinned(t *testing.T) {
	got, err := audiometry.AgeMedian(audiometry.ISO7029Of2017, "male", 60, 4000)
	require.NoError(t, err)
	assert.InDelta(t, 20.2085, got, 5e-5)
	for sex, row := range map[string][]float64{"male": {4.0, 6.5, 8.7, 10.7, 13.8}, "female": {3.7, 5.0, 6.2, 7.4, 9.7}} {
		for i, hz := range []int{1000, 2000, 3000, 4000, 6000} {
			got, err := audiometry.AgeMedian(audiometry.ISO7029Of2017, sex, 50, hz)
			require.NoError(t, err)
			assert.InDelta(t, row[i], got, .05, "%s %d", sex, hz)
		}
	}
}

// TestAgeMedianVectors: computed by another program from ISO 7029:2017 Table 1, secondary source.
func TestAgeMedianVectors(t *testing.T) {
	rows := vectors(t, "iso7029_2017_median.csv")
	require.Len(t, rows, 146)
	for _, r := range rows {
		got, err := audiometry.AgeMedian(audiometry.ISO7029Of2017, r["sex"], r.whole(t, "age"), r.whole(t, "hz"))
		require.NoError(t, err)
		assert.InDelta(t, r.number(t, "median_dB"), got, 5.1e-5, "%v", r)
	}
}

// TestAgeMedianCoefficients: ISO 7029:2017 Table 1, secondary source.
func TestAgeMedianCoefficients(t *testing.T) {
	var c struct {
		Hz      []int
		MaleA   []float64 `json:"male_a"`
		MaleB   []float64 `json:"male_b"`
		FemaleA []float64 `json:"female_a"`
		FemaleB []float64 `json:"female_b"`
	}
	readJSON(t, "iso7029_2017_coeff.json", &c)
	require.Len(t, c.Hz, 11)
	for i, hz := range c.Hz {
		for sex, ab := range map[string][2]float64{"male": {c.MaleA[i], c.MaleB[i]}, "female": {c.FemaleA[i], c.FemaleB[i]}} {
			for _, age := range []int{18, 19, 45, 70} {
				got, err := audiometry.AgeMedian(audiometry.ISO7029Of2017, sex, age, hz)
				require.NoError(t, err)
				assert.InDelta(t, ab[0]*math.Pow(float64(age-18), ab[1]), got, 1e-12)
			}
		}
	}
}

// TestAgeMediansNeverFall holds for both editions.
func TestAgeMediansNeverFall(t *testing.T) {
	for _, edition := range []audiometry.Edition{audiometry.ISO7029Of2000, audiometry.ISO7029Of2017} {
		for _, sex := range []string{"male", "female"} {
			for _, hz := range []int{500, 1000, 2000, 3000, 4000, 6000} {
				before := -1.0
				for age := 18; age <= 70; age++ {
					got, err := audiometry.AgeMedian(edition, sex, age, hz)
					require.NoError(t, err)
					require.Greater(t, got, before, "%d %s %d Hz %d", edition, sex, hz, age)
					before = got
				}
			}
		}
	}
}

// TestEditionsDiffer: 0.0160 times 42 squared, from memory, against 20.2 dB of the edition of 2017.
func TestEditionsDiffer(t *testing.T) {
	got, err := audiometry.AgeMedian(audiometry.ISO7029Of2000, "male", 60, 4000)
	require.NoError(t, err)
	assert.InDelta(t, 28.224, got, 1e-9)
}

func TestAgeMedianErrors(t *testing.T) {
	for _, c := range []struct {
		edition audiometry.Edition
		sex     string
		age, hz int
		want    string
	}{
		{1984, "male", 40, 1000, "there is no table for an edition 1984 of ISO 7029; use 2000 or 2017"},
		{2017, "male", 40, 1100, "the table of ISO 7029:2017 has no values for 1100 Hz"},
		{2000, "male", 40, 8000, "the table of ISO 7029:2000 has no values for 8000 Hz"},
		{2017, "male", 17, 1000, "ISO 7029 covers 18 to 80 years at 1000 Hz, not 17"},
		{2017, "male", 81, 2000, "ISO 7029 covers 18 to 80 years at 2000 Hz, not 81"},
		{2017, "male", 71, 3000, "ISO 7029 covers 18 to 70 years at 3000 Hz, not 71"},
		{2000, "male", 71, 1000, "ISO 7029 covers 18 to 70 years at 1000 Hz, not 71"},
		{2017, "unspecified", 40, 1000, `ISO 7029 has no values for the sex "unspecified"`},
	} {
		_, err := audiometry.AgeMedian(c.edition, c.sex, c.age, c.hz)
		assert.EqualError(t, err, c.want)
	}
}

// TestNoiseShiftVectors: four blocks of ISO 1999:2013 Annex D, secondary source, in whole dB.
func TestNoiseShiftVectors(t *testing.T) {
	rows := vectors(t, "iso1999_nipts.csv")
	require.Len(t, rows, 24)
	for _, r := range rows {
		n, err := audiometry.NoiseShiftOf(r.number(t, "lex8h"), r.number(t, "years"), r.whole(t, "hz"))
		require.NoError(t, err)
		for column, z := range map[string]float64{"nipts_90pct_worse": -1.2816, "nipts_50": 0, "nipts_10pct_worse": 1.2816} {
			got, ok := n.At(z)
			require.True(t, ok)
			assert.Equal(t, r.number(t, column), math.Round(got), "%s dB %s years %s Hz %s: %g", r["lex8h"], r["years"], r["hz"], column, got)
		}
	}
	n, err := audiometry.NoiseShiftOf(90, 20, 4000)
	require.NoError(t, err)
	assert.InDelta(t, 12.94, n.Median, .005)
}

// TestNoiseShiftCoefficients: ISO 1999:2013 Tables 1 and 3, and the chain of Annex C, secondary source.
func TestNoiseShiftCoefficients(t *testing.T) {
	var c struct {
		Hz             []int
		U, V, L0       []float64
		Xu, Yu, Xl, Yl []float64
		Chain          struct {
			H, N       []float64
			Compressed float64 `json:"N4k_compressed"`
			NMean      float64 `json:"N_mean"`
			HMean      float64 `json:"H_mean"`
			Total      float64 `json:"HTLAN"`
			Above      float64 `json:"compress_when_H_plus_N_above"`
		} `json:"annex_C"`
	}
	readJSON(t, "iso1999_coeff.json", &c)
	require.Len(t, c.Hz, 6)
	for i, hz := range c.Hz {
		for _, years := range []float64{10, 25, 40} {
			n, err := audiometry.NoiseShiftOf(98, years, hz)
			require.NoError(t, err)
			log, square := math.Log10(years), (98-c.L0[i])*(98-c.L0[i])
			assert.InDelta(t, (c.U[i]+c.V[i]*log)*square, n.Median, 1e-9)
			assert.InDelta(t, (c.Xu[i]+c.Yu[i]*log)*square, n.Worse, 1e-9)
			assert.InDelta(t, (c.Xl[i]+c.Yl[i]*log)*square, n.Better, 1e-9)
		}
	}
	var sumH, sumN float64
	for i, h := range c.Chain.H {
		noise := c.Chain.N[i]
		if h+noise > c.Chain.Above {
			noise = audiometry.WithAge(h, noise) - h
			assert.InDelta(t, c.Chain.Compressed, noise, 1e-9)
		}
		sumH, sumN = sumH+h, sumN+noise
	}
	assert.InDelta(t, c.Chain.HMean, sumH/3, .05)
	assert.InDelta(t, c.Chain.NMean, sumN/3, .05)
	assert.InDelta(t, c.Chain.Total, (sumH+sumN)/3, .05)
}

func TestNoiseShiftEnds(t *testing.T) {
	n, err := audiometry.NoiseShiftOf(79, 40, 2000)
	require.NoError(t, err)
	assert.Zero(t, n.Median, "below the start of the curve")
	at10, err := audiometry.NoiseShiftOf(95, 10, 4000)
	require.NoError(t, err)
	short, err := audiometry.NoiseShiftOf(95, 9.999999, 4000)
	require.NoError(t, err)
	assert.InDelta(t, at10.Median, short.Median, 1e-5, "both formulas meet at 10 years")
	_, ok := short.At(1)
	assert.False(t, ok)
	median, ok := short.At(0)
	assert.True(t, ok)
	assert.Equal(t, short.Median, median)
	none, err := audiometry.NoiseShiftOf(95, 0, 4000)
	require.NoError(t, err)
	assert.Zero(t, none.Median)
	for _, c := range [][3]float64{{95, 10, 8000}, {95, 41, 4000}, {95, -1, 4000}, {100.1, 10, 4000}, {math.NaN(), 10, 4000}, {95, math.NaN(), 4000}, {math.Inf(-1), 10, 4000}} {
		_, err := audiometry.NoiseShiftOf(c[0], c[1], int(c[2]))
		assert.Error(t, err, "%v", c)
	}
}

// TestImpairment: worked by another program from the rule of 1979, from memory.
func TestImpairment(t *testing.T) {
	freqs := []int{500, 1000, 2000, 3000}
	left, right := ear(t, freqs, []int{20, 25, 30, 45}), ear(t, freqs, []int{25, 35, 45, 55})
	one, ok := audiometry.MonauralImpairment(right)
	assert.True(t, ok)
	assert.Equal(t, audiometry.Impairment{Percent: 22.5}, one)
	two, ok := audiometry.BinauralImpairment(left, right)
	assert.True(t, ok)
	assert.InDelta(t, 10, two.Percent, 1e-12)
	for want, entries := range map[audiometry.Impairment][]string{
		{}:                           {"0", "25", "25", "25"},
		{Percent: 100}:               {"100", "100", "100", "NR>110"},
		{Percent: 75, AtLeast: true}: {"75", "75", "75", "NR>75"},
	} {
		got, ok := audiometry.MonauralImpairment(ear(t, freqs, entries))
		assert.True(t, ok)
		assert.Equal(t, want, got)
	}
	_, ok = audiometry.BinauralImpairment(left, ear(t, freqs, []string{"NT", "0", "0", "0"}))
	assert.False(t, ok)
}
