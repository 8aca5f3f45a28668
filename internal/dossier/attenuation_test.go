package dossier_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// otherLaw is the law of the bundle with further parameters.
type otherLaw struct {
	dossier.Law
	more map[string]float64
}

func (l otherLaw) Number(name string, day dossier.Date) (float64, bool) {
	if v, ok := l.more[name]; ok {
		return v, true
	}
	return l.Law.Number(name, day)
}

// energyMeasures has the measures of the bundle with a dose of equal energy: 85 dBA for 8 h, 3 dB exchange rate.
func energyMeasures() dossier.Measures {
	m := osha().Measures
	channel := dossier.Channel{CriterionDB: 85, ExchangeDB: 3}
	m.Exposure.Channels = map[string]dossier.Channel{"action": channel, "limit": channel}
	return m
}

// protectionUnder gives what protects w1 from a noise: p1 unless something else is handed over.
func protectionUnder(t *testing.T, m dossier.Measures, p dossier.ProtectionMeasures, records ...record.Record) *dossier.Protection {
	t.Helper()
	if p.Channel == "" {
		p.Channel = "action"
	}
	m.Protection = p
	store := dossier.NewStore()
	defer store.Close()
	for i, rec := range append([]record.Record{hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), issued("p1", "2020-02-01", "")}, records...) {
		rec.SetAt(record.Origin{Row: int32(i + 1)})
		require.NoError(t, store.Add(rec))
	}
	registers, err := store.Registers()
	require.NoError(t, err)
	law := otherLaw{osha(), map[string]float64{"allowance": 4, "action_level": 85}}
	b := dossier.NewGround(registers, m, law, day("2024-01-01")).Builder(dossier.Place{ID: "s1"}, osha().ChoicesOf(nil))
	for i := range store.Shards() {
		workers, err := store.Shard(i)
		require.NoError(t, err)
		for _, w := range workers {
			return b.Worker(w).Input.(*dossier.Worker).Protection
		}
	}
	return nil
}

// noiseAt is a measurement of an 8-hour average of the bundle's dose, equally of one of equal energy.
func noiseAt(twa float64, changes ...func(*record.Measurement)) *record.Measurement {
	return withSettings(90, 5, 80, twa, changes)
}

func energyAt(twa float64, changes ...func(*record.Measurement)) *record.Measurement {
	return withSettings(85, 3, 0, twa, changes)
}

func withSettings(criterion, exchange, threshold, twa float64, changes []func(*record.Measurement)) *record.Measurement {
	m := measured("m1", "g1", "2019-11-15", 0)
	m.CriterionDB, m.ExchangeDB, m.ThresholdDB, m.DosePct, m.TWADBA = record.Num(criterion), record.Num(exchange), record.Num(threshold), record.Number{}, record.Num(twa)
	for _, change := range changes {
		change(m)
	}
	return m
}

func twaC(dbc float64) func(*record.Measurement) {
	return func(m *record.Measurement) { m.TWADBC = record.Num(dbc) }
}

func leq(a, c float64) func(*record.Measurement) {
	return func(m *record.Measurement) { m.LAeqDBA, m.LCeqDBC = record.Num(a), record.Num(c) }
}

func octaveBands(db ...float64) func(*record.Measurement) {
	return func(m *record.Measurement) { m.Octave = octaves(db...) }
}

// octaves gives octave bands up to 8000 Hz; NaN is not recorded.
func octaves(db ...float64) *record.Octaves {
	var o record.Octaves
	for i, v := range db {
		if !math.IsNaN(v) {
			o[len(o)-len(db)+i] = record.Num(v)
		}
	}
	return &o
}

// The noise and the protector of the annexes of ISO 4869-2:2018 (secondary source; testdata/vectors/iso4869_2_annex.json).
var (
	annexNoise = []float64{75, 84, 86, 88, 97, 99, 97, 96}
	annexMean  = []float64{7.4, 10.0, 14.4, 19.6, 22.8, 29.6, 38.8, 34.1}
	annexSD    = []float64{3.3, 3.6, 3.6, 4.6, 4.0, 6.2, 7.4, 5.2}
)

func annex() *record.Protector {
	return &record.Protector{ProtectorID: "p1", H: record.Num(24), M: record.Num(18), L: record.Num(13), SNR: record.Num(21), Mean: octaves(annexMean...), SD: octaves(annexSD...)}
}

// ontario is the protector of the Ontario noise guideline App. D (official text; testdata/vectors/ontario_octave.json).
func ontario() *record.Protector {
	return &record.Protector{ProtectorID: "p1", Mean: octaves(12, 15, 20, 26, 31, 37, 35), SD: octaves(2.8, 3, 4, 3.7, 4.9, 5.9, 4)}
}

func typed(kind string, nrr float64) *record.Protector {
	p := model("p1", nrr)
	p.Type = kind
	return p
}

func TestRatings(t *testing.T) {
	type measures = dossier.ProtectionMeasures
	snr := func(db float64) *record.Protector { return &record.Protector{ProtectorID: "p1", SNR: record.Num(db)} }
	slc := &record.Protector{ProtectorID: "p1", SLC80: record.Num(22)}
	for name, c := range map[string]struct {
		measures  measures
		noise     *record.Measurement
		protector *record.Protector
		exposure  string
		under     string
		mark      string
		working   string
	}{
		"Washington's line, one protector (WAC 296-307-63215 Table 2)": {measures{Rating: "nrr"}, noiseAt(95), model("p1", 20), "95", "82", "", "95 dBA − (20 − 7) dB = 82 dBA"},
		"Appendix B, C-weighted":                       {measures{Rating: "nrr"}, noiseAt(105, twaC(108)), model("p1", 32), "108", "76", "", "108 dBC − 32 dB = 76 dBA"},
		"Appendix B, A-weighted":                       {measures{Rating: "nrr"}, noiseAt(100), model("p1", 19), "100", "88", "", "100 dBA − (19 − 7) dB = 88 dBA"},
		"Exactly at the target":                        {measures{Rating: "nrr"}, noiseAt(100), model("p1", 17), "100", "90", "", "100 dBA − (17 − 7) dB = 90 dBA"},
		"A tenth above it":                             {measures{Rating: "nrr"}, noiseAt(100.1), model("p1", 17), "100.1", "90.1", "", "100.1 dBA − (17 − 7) dB = 90.1 dBA"},
		"The difference is no method of Appendix B":    {measures{Rating: "nrr"}, noiseAt(100, leq(101, 103)), model("p1", 19), "100", "88", "", "100 dBA − (19 − 7) dB = 88 dBA"},
		"With equal energy it is one":                  {measures{Rating: "nrr"}, energyAt(100, leq(101, 103)), model("p1", 19), "102", "83", "", "L_C = 8-hour level 100 dBA + (LCeq 103 dBC − LAeq 101 dBA = 2 dB) = 102 dBC; 102 dBC − 19 dB = 83 dBA"},
		"Not one that cannot be right":                 {measures{Rating: "nrr"}, energyAt(100, leq(103, 100)), model("p1", 19), "100", "88", "", "100 dBA − (19 − 7) dB = 88 dBA"},
		"NIOSH, muff, C-weighted":                      {measures{Rating: "nrr", Derating: "niosh"}, noiseAt(98, twaC(100)), typed("earmuff", 24), "100", "82", "secondary source", "derated NRR = 0.75 · 24 = 18 dB; attenuation of a C-weighted level = NRR = 18 dB; 100 - 18 = 82 dB under the protector"},
		"NIOSH, formable plug, A-weighted":             {measures{Rating: "nrr", Derating: "niosh"}, noiseAt(100), typed("formable", 30), "100", "92", "from memory", "derated NRR = 0.5 · 30 = 15 dB; attenuation of an A-weighted level = 15 - 7 = 8 dB; 100 - 8 = 92 dB under the protector"},
		"CSA, muff, C-weighted":                        {measures{Rating: "nrr", Derating: "csa"}, noiseAt(98, twaC(100)), typed("helmet_muff", 24), "100", "83.2", "from memory", "derated NRR = 0.7 · 24 = 16.8 dB; attenuation of a C-weighted level = NRR = 16.8 dB; 100 - 16.8 = 83.2 dB under the protector"},
		"CSA, custom plug, A-weighted":                 {measures{Rating: "nrr", Derating: "csa"}, noiseAt(100), typed("custom", 30), "100", "88", "from memory", "derated NRR = 0.5 · 30 = 15 dB; attenuation of an A-weighted level = 15 - 3 = 12 dB; 100 - 12 = 88 dB under the protector"},
		"SNR, the noise of the annex":                  {measures{Rating: "snr"}, energyAt(104, twaC(103)), annex(), "103", "82", "secondary source", "L_C = 103 dBC, 8-hour average measured with C-weighting; attenuation of the C-weighted level = SNR = 21 dB; 103 - 21 = 82 dB under the protector; in whole decibels, as ISO 4869-2 prints it, 82 dBA"},
		"SNR with the allowance of the United Kingdom": {measures{Rating: "snr", RealWorld: "allowance"}, energyAt(95, leq(95, 97)), snr(28), "97", "73", "secondary source", "L_C = 8-hour level 95 dBA + (LCeq 97 dBC − LAeq 95 dBA = 2 dB) = 97 dBC; attenuation of the C-weighted level = SNR = 28 dB; 97 - 28 = 69 dB under the protector; attenuation less the real-world allowance = 28 - 4 = 24 dB; 97 - 24 = 73 dB under the protector; in whole decibels, as ISO 4869-2 prints it, 73 dBA"},
		"SNR smaller than the allowance":               {measures{Rating: "snr", RealWorld: "allowance"}, energyAt(95, twaC(97)), snr(3), "97", "97", "secondary source", "L_C = 97 dBC, 8-hour average measured with C-weighting; attenuation of the C-weighted level = SNR = 3 dB; 97 - 3 = 94 dB under the protector; attenuation less the real-world allowance = 3 - 4 = -1 dB; -1 dB is negative, so 0 dB is taken off 97 dB; in whole decibels, as ISO 4869-2 prints it, 97 dBA; that is more than the 95 dBA without the protector, so the rating shows no benefit"},
		"SNR, of a level known as at most a value":     {measures{Rating: "snr"}, threshold(noiseAt(95, twaC(98)), 70), snr(28), "98", "70", "secondary source", "L_C = 8-hour level 95 dBA + (C-weighted average 98 dBC − A-weighted average 95 dBA = 3 dB) = 98 dBC; attenuation of the C-weighted level = SNR = 28 dB; 98 - 28 = 70 dB under the protector; in whole decibels, as ISO 4869-2 prints it, 70 dBA"},
		"SNR, the difference of the octave bands":      {measures{Rating: "snr"}, energyAt(100, octaveBands(annexNoise...)), snr(28), "99", "71", "secondary source", "L_C = 8-hour level 100 dBA + (octave bands 103 dBC − 104 dBA = -1 dB) = 99 dBC; attenuation of the C-weighted level = SNR = 28 dB; 99 - 28 = 71 dB under the protector; in whole decibels, as ISO 4869-2 prints it, 71 dBA"},
		"HML, the noise of the annex":                  {measures{Rating: "hml"}, energyAt(104, leq(104, 103)), annex(), "104", "81.5", "secondary source", "L_C = 8-hour level 104 dBA + (LCeq 103 dBC − LAeq 104 dBA = -1 dB) = 103 dBC; L_C - L_A = 103 - 104 = -1 dB; attenuation = M - (H - M)/4 · (d - 2) = 18 - (24 - 18)/4 · (-1 - 2) = 22.5 dB; 104 - 22.5 = 81.5 dB under the protector; in whole decibels, as ISO 4869-2 prints it, 82 dBA"},
		"HML, rich in low frequencies":                 {measures{Rating: "hml"}, energyAt(100, twaC(105)), &record.Protector{ProtectorID: "p1", H: record.Num(25), M: record.Num(19), L: record.Num(13)}, "100", "83.3", "secondary source", "L_C = 105 dBC, 8-hour average measured with C-weighting; L_C - L_A = 105 - 100 = 5 dB; attenuation = M - (M - L)/8 · (d - 2) = 19 - (19 - 13)/8 · (5 - 2) = 16.75 dB; 100 - 16.75 = 83.25 dB under the protector; rounded to 83.3 dB; in whole decibels, as ISO 4869-2 prints it, 83 dBA"},
		"SLC80":                                        {measures{Rating: "slc80"}, energyAt(95, twaC(97)), slc, "97", "75", "from memory", "L_C = 97 dBC, 8-hour average measured with C-weighting; attenuation of the C-weighted level = SLC80 = 22 dB; 97 - 22 = 75 dB under the protector"},
		"Octave bands, the noise of the annex":         {measures{Rating: "octave"}, energyAt(104, octaveBands(annexNoise...)), annex(), "104", "81.4", "secondary source", ""},
		"Octave bands of Ontario's guideline":          {measures{Rating: "octave"}, energyAt(96.1, octaveBands(85, 88, 93, 90, 89, 87, 86)), ontario(), "96.1", "76", "secondary source", ""},
		"Octave bands for all but 2 % of wearers":      {measures{Rating: "octave", Percent: 98}, energyAt(96.1, octaveBands(85, 88, 93, 90, 89, 87, 86)), ontario(), "96.1", "79.9", "secondary source", ""},
		"Octave bands, another level of the day":       {measures{Rating: "octave"}, energyAt(94, octaveBands(annexNoise...)), annex(), "94", "71.4", "secondary source", ""},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, settingsOf(c.noise), c.measures, c.noise, c.protector)
			assert.Equal(t, []string{c.exposure, c.under, c.mark}, []string{p.Exposure.String(), p.Under.String(), p.Mark})
			assert.Equal(t, c.under == "", len(p.Missing) > 0, p.Missing)
			if c.working != "" {
				assert.Equal(t, c.working, p.Working)
			}
			assert.Equal(t, c.measures.Rating, p.Rating)
		})
	}
}

// settingsOf gives measures whose channel fits a measurement.
func settingsOf(m *record.Measurement) dossier.Measures {
	if m.ExchangeDB.Value == 3 {
		return energyMeasures()
	}
	return osha().Measures
}

func TestOctaveWorking(t *testing.T) {
	p := protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "octave"}, energyAt(104, octaveBands(annexNoise...)), annex())
	assert.Equal(t, "octave bands, attenuation for 84 % of wearers (ISO 4869-2)", p.Method)
	for _, part := range []string{
		"APV = mean − 1 · standard deviation", "63 Hz: L + A - APV = 75 + (-26.2) - 4.1 = 44.7 dB", "8000 Hz: L + A - APV = 96 + (-1.1) - 28.9 = 66 dB",
		"8-hour level 104 dBA − 22.62 dB = 81.38 dBA", "rounded to 81.4 dB", "in whole decibels, as ISO 4869-2 prints it, 81 dBA",
	} {
		assert.Contains(t, p.Working, part)
	}
}
