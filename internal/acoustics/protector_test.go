package acoustics_test

import (
	"encoding/json"
	"math"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestNRRVectors takes the examples of Washington (WAC 296-307-63215 Table 2) and values computed from 29
// CFR 1910.95 App. B and CPL 02-02-035 App. A. The rule for two protectors is from memory. Rows of other
// rules are left for the code that will know them.
func TestNRRVectors(t *testing.T) {
	seen := 0
	for _, r := range vectors(t, "nrr.csv") {
		level, nrr, w := r.number(t, "twa_dB"), r.number(t, "nrr_dB"), acoustics.Weighting(r["weighting"])
		var got acoustics.Protected
		switch r["case"] {
		case "wa_single", "osha_appB_C", "osha_appB_A", "osha_appB_A_zero", "osha_appB_A_negative":
			got = acoustics.UnderNRR(level, w, nrr)
		case "wa_dual", "osha_dual_C", "osha_dual_A_lab":
			got = acoustics.UnderNRR(level, w, acoustics.DualNRR(nrr, r.number(t, "second_device_nrr")))
		case "osha_cpl50_A", "osha_cpl50_C":
			got = acoustics.UnderHalvedNRR(level, w, nrr)
		case "osha_dual_A_50": // the 5 dB of the second protector are not halved
			got = acoustics.UnderHalvedNRR(level, w, nrr)
			got.Level -= 5
		default:
			continue
		}
		seen++
		assert.Equal(t, r.number(t, "protected_dBA"), got.Level, "%v", r)
		assert.Equal(t, r["case"] == "osha_appB_A_negative", got.Clamped, "%v", r)
	}
	assert.Equal(t, 11, seen)
}

// TestWashingtonExample: 95 dB(A) under an NRR of 20 is 82; 100 dB(A) under a plug of 20 and a muff of 12
// is 82 (WAC 296-307-63215 Table 2).
func TestWashingtonExample(t *testing.T) {
	assert.Equal(t, acoustics.Protected{Level: 82, Attenuation: 13}, acoustics.UnderNRR(95, acoustics.A, 20))
	assert.Equal(t, acoustics.Protected{Level: 82, Attenuation: 18}, acoustics.UnderNRR(100, acoustics.A, acoustics.DualNRR(20, 12)))
	assert.Equal(t, acoustics.DualNRR(20, 12), acoustics.DualNRR(12, 20))
}

func TestNegativeAttenuationIsClamped(t *testing.T) {
	clamped := acoustics.Protected{Level: 90, Clamped: true}
	assert.Equal(t, clamped, acoustics.UnderNRR(90, acoustics.A, 5))
	assert.Equal(t, clamped, acoustics.UnderHalvedNRR(90, acoustics.A, 5))
	assert.Equal(t, clamped, acoustics.UnderNRR(90, acoustics.C, -1))
	assert.Equal(t, acoustics.Protected{Level: 90}, acoustics.UnderNRR(90, acoustics.A, 7))
	assert.Equal(t, acoustics.UnderNRR(90, acoustics.A, 20), acoustics.UnderNRR(90, "", 20), "an unknown weighting credits less")
}

// TestNRRExample takes the sample of 40 CFR 211.207 Figure 2: 19.8 dB, label 20.
func TestNRRExample(t *testing.T) {
	var sample struct {
		Mean      map[string]float64 `json:"mean"`
		Deviation map[string]float64 `json:"sd"`
		Printed   float64            `json:"nrr_printed"`
		Exact     float64            `json:"nrr_exact_107.9"`
		Label     float64            `json:"nrr_label"`
	}
	b, err := os.ReadFile("../../testdata/vectors/nrr_epa_example.json")
	require.NoError(t, err)
	require.NoError(t, json.Unmarshal(b, &sample))
	var mean, deviation [9]float64
	meanKeys := [9]string{"125", "250", "500", "1000", "2000", "3150/3000", "4000", "6300/6000", "8000"}
	deviationKeys := [9]string{"125", "250", "500", "1000", "2000", "3000", "4000", "6000", "8000"}
	for i := range mean {
		mean[i], deviation[i] = sample.Mean[meanKeys[i]], sample.Deviation[deviationKeys[i]]
	}
	nrr, ok := acoustics.NRRFromBands(mean, deviation)
	require.True(t, ok)
	assert.Equal(t, sample.Printed, acoustics.RoundTenth(nrr))
	assert.InDelta(t, sample.Exact, nrr, 5.1e-4)
	assert.Equal(t, sample.Label, acoustics.NRRLabel(nrr))

	deviation[3] = -1
	_, ok = acoustics.NRRFromBands(mean, deviation)
	assert.False(t, ok)
	deviation[3], mean[0] = 4.7, math.NaN()
	_, ok = acoustics.NRRFromBands(mean, deviation)
	assert.False(t, ok)
}

// TestNRRLabel: a half goes to the next lower whole number (40 CFR 211.207).
func TestNRRLabel(t *testing.T) {
	for nrr, label := range map[float64]float64{19.8: 20, 20.5: 20, 20.51: 21, 21.5: 21, 20.49: 20, 0.5: 0} {
		assert.Equal(t, label, acoustics.NRRLabel(nrr), "%g", nrr)
	}
}

func TestNRRFallsWithDeviation(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		var mean, deviation [9]float64
		for i := range mean {
			mean[i] = rapid.Float64Range(0, 50).Draw(t, "mean")
			deviation[i] = rapid.Float64Range(0, 10).Draw(t, "deviation")
		}
		before, ok := acoustics.NRRFromBands(mean, deviation)
		require.True(t, ok)
		deviation[rapid.IntRange(0, 8).Draw(t, "band")] += rapid.Float64Range(0, 5).Draw(t, "more")
		after, ok := acoustics.NRRFromBands(mean, deviation)
		require.True(t, ok)
		require.LessOrEqual(t, after, before+1e-12)
	})
}
