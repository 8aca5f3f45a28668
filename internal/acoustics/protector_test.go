package acoustics_test

import (
	"fmt"
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestNRRVectors takes the examples of Washington (WAC 296-307-63215 Table 2) and values computed from 29
// CFR 1910.95 App. B and CPL 02-02-035 App. A; NIOSH factors as the Ontario noise guideline App. D quotes
// them. The rule for two protectors, the order of the NIOSH rule for A-weighted levels and all of CSA Z94.2
// are from memory.
func TestNRRVectors(t *testing.T) {
	seen := 0
	for _, r := range vectors(t, "nrr.csv") {
		level, nrr, w := r.number(t, "twa_dB"), r.number(t, "nrr_dB"), acoustics.Weighting(r["weighting"])
		var got acoustics.Protected
		ok := true
		switch r["case"] {
		case "wa_single", "osha_appB_C", "osha_appB_A", "osha_appB_A_zero", "osha_appB_A_negative":
			got = acoustics.UnderNRR(level, w, nrr)
		case "wa_dual", "osha_dual_C", "osha_dual_A_lab":
			got = acoustics.UnderDualNRR(level, w, nrr, r.number(t, "second_device_nrr"))
			assert.Equal(t, got.Level, acoustics.UnderNRR(level, w, acoustics.DualNRR(nrr, r.number(t, "second_device_nrr"))).Level)
		case "osha_cpl50_A", "osha_cpl50_C":
			got = acoustics.UnderHalvedNRR(level, w, nrr)
		case "osha_dual_A_50": // the 5 dB of the second protector are not halved
			got = acoustics.UnderHalvedDualNRR(level, w, nrr, r.number(t, "second_device_nrr"))
			assert.Equal(t, got.Level, acoustics.UnderHalvedNRR(level, w, nrr).Level-5)
		case "niosh_muff_C", "niosh_muff_A":
			got, ok = acoustics.UnderNIOSH(level, w, nrr, acoustics.Muff)
		case "niosh_formable_C", "niosh_formable_A":
			got, ok = acoustics.UnderNIOSH(level, w, nrr, acoustics.FormablePlug)
		case "niosh_other_C":
			got, ok = acoustics.UnderNIOSH(level, w, nrr, acoustics.OtherPlug)
		case "csa_muff_C", "csa_muff_A":
			got, ok = acoustics.UnderCSA(level, w, nrr, acoustics.Muff)
		case "csa_plug_C", "csa_plug_A":
			got, ok = acoustics.UnderCSA(level, w, nrr, acoustics.FormablePlug)
		case "csa_dual_C":
			got = acoustics.UnderCSADual(level, w, nrr, r.number(t, "second_device_nrr"))
		default:
			t.Errorf("no rule for the case %s", r["case"])
		}
		seen++
		require.True(t, ok, "%v", r)
		assert.InDelta(t, r.number(t, "protected_dBA"), got.Level, 1e-9, "%v", r)
		assert.InDelta(t, level-got.Level, got.Attenuation, 1e-9, "%v", r)
		steps := got.Working()
		require.NotEmpty(t, steps, "%v", r)
		if !got.Clamped {
			assert.Contains(t, steps[len(steps)-1], fmt.Sprintf("= %g dB under the protector", r.number(t, "protected_dBA")), "%v", r)
		}
		assert.Equal(t, r["case"] == "osha_appB_A_negative", got.Clamped, "%v", r)
	}
	assert.Equal(t, 21, seen)
}

// TestWashingtonExample: 95 dB(A) under an NRR of 20 is 82; 100 dB(A) under a plug of 20 and a muff of 12
// is 82 (WAC 296-307-63215 Table 2).
func TestWashingtonExample(t *testing.T) {
	assertProtected(t, 82, 13, acoustics.UnderNRR(95, acoustics.A, 20))
	assertProtected(t, 82, 18, acoustics.UnderNRR(100, acoustics.A, acoustics.DualNRR(20, 12)))
	assert.Equal(t, []string{"attenuation of an A-weighted level = 20 - 7 = 13 dB", "95 - 13 = 82 dB under the protector"},
		acoustics.UnderNRR(95, acoustics.A, 20).Working())
	assert.Equal(t, acoustics.DualNRR(20, 12), acoustics.DualNRR(12, 20))
}

func TestNegativeAttenuationIsClamped(t *testing.T) {
	for _, clamped := range []acoustics.Protected{
		acoustics.UnderNRR(90, acoustics.A, 5), acoustics.UnderHalvedNRR(90, acoustics.A, 5), acoustics.UnderNRR(90, acoustics.C, -1),
	} {
		assert.Equal(t, 90.0, clamped.Level)
		assert.Zero(t, clamped.Attenuation)
		assert.True(t, clamped.Clamped)
	}
	assertProtected(t, 90, 0, acoustics.UnderNRR(90, acoustics.A, 7))
	assert.Equal(t, acoustics.UnderNRR(90, acoustics.A, 20), acoustics.UnderNRR(90, "", 20), "an unknown weighting credits less")
}

func assertProtected(t *testing.T, level, attenuation float64, got acoustics.Protected) {
	t.Helper()
	assert.Equal(t, level, got.Level)
	assert.Equal(t, attenuation, got.Attenuation)
	assert.False(t, got.Clamped)
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
	object(t, "nrr_epa_example.json", &sample)
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
