package dossier_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

func TestWhatAnEstimateLacks(t *testing.T) {
	nan := math.NaN()
	of := func(rating string) dossier.ProtectionMeasures { return dossier.ProtectionMeasures{Rating: rating} }
	derated := dossier.ProtectionMeasures{Rating: "nrr", Derating: "csa"}
	only := func(change func(*record.Protector)) *record.Protector {
		p := &record.Protector{ProtectorID: "p1"}
		change(p)
		return p
	}
	const none = "exposure without the protector"
	for name, c := range map[string]struct {
		measures dossier.ProtectionMeasures
		records  []record.Record
		missing  []string
	}{
		"NRR: nothing":            {of("nrr"), nil, []string{"noise reduction rating of the protector p1", none}},
		"NRR: the rating":         {of("nrr"), []record.Record{energyAt(95), annex()}, []string{"noise reduction rating of the protector p1"}},
		"NRR: the level":          {of("nrr"), []record.Record{model("p1", 20)}, []string{none}},
		"Derating: the type":      {derated, []record.Record{energyAt(95), model("p1", 20)}, []string{"type of the protector p1, as a plug or a muff"}},
		"Derating: two in one":    {derated, []record.Record{energyAt(95), typed("dual", 20)}, []string{"type of the protector p1, as a plug or a muff"}},
		"Derating: all":           {derated, nil, []string{"noise reduction rating of the protector p1", "type of the protector p1, as a plug or a muff", none}},
		"SNR: nothing":            {of("snr"), nil, []string{"single number rating of the protector p1", none}},
		"SNR: an NRR is none":     {of("snr"), []record.Record{energyAt(95, twaC(97)), model("p1", 20)}, []string{"single number rating of the protector p1"}},
		"SNR: the C-weighting":    {of("snr"), []record.Record{energyAt(95), annex()}, []string{"C-weighted level of the measurement"}},
		"SNR: half of it":         {of("snr"), []record.Record{energyAt(95, func(m *record.Measurement) { m.LCeqDBC = record.Num(97) }), annex()}, []string{"C-weighted level of the measurement"}},
		"SNR: an impossible one":  {of("snr"), []record.Record{energyAt(95, twaC(92.9)), annex()}, []string{"C-weighted level of the measurement that can be right: 92.9 dBC is too far below 95 dBA"}},
		"SLC80: nothing":          {of("slc80"), nil, []string{"SLC80 of the protector p1", none}},
		"SLC80: the C-weighting":  {of("slc80"), []record.Record{energyAt(95), annex()}, []string{"SLC80 of the protector p1", "C-weighted level of the measurement"}},
		"HML: nothing":            {of("hml"), nil, []string{"H, M and L of the protector p1", none}},
		"HML: two of three":       {of("hml"), []record.Record{energyAt(95, twaC(97)), only(func(p *record.Protector) { p.M = record.Num(20) })}, []string{"H and L of the protector p1"}},
		"HML: the C-weighting":    {of("hml"), []record.Record{energyAt(95), annex()}, []string{"C-weighted level of the measurement"}},
		"HML: no falling order":   {of("hml"), []record.Record{energyAt(95, twaC(97)), only(func(p *record.Protector) { p.H, p.M, p.L = record.Num(10), record.Num(20), record.Num(5) })}, []string{"H, M and L of the protector p1 that can be right: the ratings H 10, M 20 and L 5 are not in falling order"}},
		"Octave: nothing":         {of("octave"), nil, []string{"mean attenuation in octave bands of the protector p1", "standard deviation of the attenuation in octave bands of the protector p1", none}},
		"Octave: the noise":       {of("octave"), []record.Record{energyAt(95), annex()}, []string{"octave band levels of the measurement"}},
		"Octave: bands of it":     {of("octave"), []record.Record{energyAt(95, octaveBands(nan, 80, 80, 80, nan, 80, nan, 80)), annex()}, []string{"octave band levels of the measurement at 1000 and 4000 Hz"}},
		"Octave: bands of a mean": {of("octave"), []record.Record{energyAt(95, octaveBands(annexNoise...)), only(func(p *record.Protector) { p.Mean, p.SD = octaves(nan, 20, 20, 20, 20, 20, 20), octaves(annexSD...) })}, []string{"mean attenuation in octave bands of the protector p1 at 125 Hz"}},
		"Octave: 63 Hz may lack":  {of("octave"), []record.Record{energyAt(95, octaveBands(annexNoise[1:]...)), annex()}, []string{}},
		"No percentage":           {dossier.ProtectionMeasures{Rating: "octave", Percent: 100}, []record.Record{energyAt(95, octaveBands(annexNoise...)), annex()}, []string{"a percentage of wearers between 0 and 100 in the measures"}},
		"An unknown allowance":    {dossier.ProtectionMeasures{Rating: "nrr", RealWorld: "not_there"}, []record.Record{energyAt(95), model("p1", 20)}, []string{"value of not_there on 2024-01-01 in the bundle"}},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, energyMeasures(), c.measures, c.records...)
			assert.Equal(t, c.missing, p.Missing)
			assert.Equal(t, len(c.missing) == 0, p.Under.Known)
			assert.Equal(t, len(c.missing) == 0, p.Working != "")
			if len(c.missing) > 0 {
				assert.Empty(t, p.Halved.String()+p.Method+p.Mark+p.Band)
			}
		})
	}
}

func TestBand(t *testing.T) {
	for under, want := range map[float64]string{
		85.1: "too little", 85: "enough, but little", 80.1: "enough, but little", 80: "good", 75: "good", 74.9: "enough, but much", 70: "enough, but much", 69.9: "too much",
	} {
		p := protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "nrr", Bands: "action_level"}, energyAt(under+13), model("p1", 20))
		assert.Equal(t, want, p.Band, "%v dBA", under)
	}
	p := protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "nrr"}, energyAt(95), model("p1", 20))
	assert.Empty(t, p.Band, "the measures name no action level")
	p = protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "nrr", Bands: "not_there"}, energyAt(95), model("p1", 20))
	assert.Empty(t, p.Band, "the bundle has no value")
	assert.True(t, p.Under.Known)
}

func TestAllowanceOnEveryRating(t *testing.T) {
	for rating, want := range map[string]string{"nrr": "83", "snr": "80", "slc80": "79", "hml": "82", "octave": "76.4"} {
		p := protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: rating, RealWorld: "allowance"}, energyAt(95, twaC(97), octaveBands(annexNoise...)), &record.Protector{
			ProtectorID: "p1", NRR: record.Num(18), SNR: record.Num(21), SLC80: record.Num(22), H: record.Num(24), M: record.Num(17), L: record.Num(13), Mean: octaves(annexMean...), SD: octaves(annexSD...),
		})
		assert.Equal(t, want, p.Under.String(), rating)
		assert.Contains(t, p.Working, "attenuation less the real-world allowance", rating)
	}
}
