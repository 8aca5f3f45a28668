package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// infoText writes the information beside an estimate: method, level and mark.
func infoText(p *dossier.Protection) []string {
	out := []string{}
	for _, e := range p.Information {
		text := e.Method + ": " + e.Level.String()
		if e.Mark != "" {
			text += ", " + e.Mark
		}
		out = append(out, text)
	}
	return out
}

// workingOf gives the working of the information whose method is named.
func workingOf(p *dossier.Protection, method string) string {
	for _, e := range p.Information {
		if e.Method == method {
			return e.Working
		}
	}
	return "none"
}

// fitTestOf is a fit test of w1, for half of wearings, with a standard uncertainty of 3 dB.
func fitTestOf(protector, date string, par float64, changes ...func(*record.FitTest)) *record.FitTest {
	f := &record.FitTest{WorkerID: "w1", ProtectorID: protector, Date: day(date), Passed: record.Yes, PARDB: record.Num(par), Percent: record.Num(50), UncertaintyDB: record.Num(3)}
	for _, change := range changes {
		change(f)
	}
	return f
}

func TestInformationBesideARating(t *testing.T) {
	nrr := dossier.ProtectionMeasures{Rating: "nrr"}
	p := protectionUnder(t, osha().Measures, nrr, noiseAt(100, leq(101, 103)), typed("formable", 30))
	assert.Equal(t, []string{
		"half the attenuation: 88.5",
		"noise reduction rating cut for the type of protector (NIOSH): 92, from memory",
		"noise reduction rating cut for the type of protector (CSA Z94.2): 88, from memory",
		"noise reduction rating taken off the C-weighted level by difference: 72, from memory",
		"worn for 90 % of the time: 90.2, from memory",
		"worn for 50 % of the time: 97, from memory",
	}, infoText(p))
	assert.Equal(t, []string{"77", "88.5"}, []string{p.Under.String(), p.Halved.String()}, "none of it decides")
	assert.Equal(t, "attenuation of an A-weighted level = 30 - 7 = 23 dB; half of 23 dB = 11.5 dB; 100 - 11.5 = 88.5 dB under the protector", p.Information[0].Working)
	assert.Equal(t, "L_C = 8-hour level 100 dBA + (LCeq 103 dBC − LAeq 101 dBA = 2 dB) = 102 dBC; attenuation of a C-weighted level = NRR = 30 dB; 102 - 30 = 72 dB under the protector", p.Information[3].Working)
	assert.Equal(t, "10 · lg(0.9 · 10^(77/10) + 0.1 · 10^(100/10)) = 90.2 dBA", p.Information[4].Working)

	p = protectionUnder(t, osha().Measures, nrr, noiseAt(98, twaC(100)), typed("premolded", 20))
	assert.Equal(t, []string{
		"half the attenuation: 90",
		"noise reduction rating cut for the type of protector (NIOSH): 94, secondary source",
		"noise reduction rating cut for the type of protector (CSA Z94.2): 90, from memory",
		"worn for 90 % of the time: 88.6, from memory",
		"worn for 50 % of the time: 95.1, from memory",
	}, infoText(p), "of a C-weighted average; without the protector the noise has 98 dBA")

	p = protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "nrr", Derating: "csa"}, energyAt(100), typed("earmuff", 24))
	assert.Equal(t, "86.2", p.Under.String())
	assert.Equal(t, []string{"half the attenuation: 91.5", "noise reduction rating cut for the type of protector (NIOSH): 89, from memory"}, infoText(p)[:2])

	p = protectionUnder(t, osha().Measures, nrr, noiseAt(100), model("p1", 30))
	assert.Equal(t, []string{"half the attenuation: 88.5", "worn for 90 % of the time: 90.2, from memory", "worn for 50 % of the time: 97, from memory"}, infoText(p), "a protector of unknown type has no derating")
	p = protectionUnder(t, energyMeasures(), dossier.ProtectionMeasures{Rating: "snr"}, energyAt(95, twaC(97)), annex())
	assert.Equal(t, []string{"worn for 90 % of the time: 85.5, from memory", "worn for 50 % of the time: 92, from memory"}, infoText(p), "half of a noise reduction rating is not half of another")
	assert.False(t, p.Halved.Known)
}

func TestNoInformation(t *testing.T) {
	nrr := dossier.ProtectionMeasures{Rating: "nrr"}
	assert.Equal(t, []string{}, infoText(protectionUnder(t, osha().Measures, nrr)), "nothing is known")
	assert.Equal(t, []string{}, infoText(protectionUnder(t, osha().Measures, nrr, typed("formable", 30), fitTestOf("p1", "2021-01-01", 20))), "no noise")
	assert.Equal(t, []string{}, infoText(protectionUnder(t, osha().Measures, nrr, noiseAt(100))), "no rating")
	assert.Equal(t, []string{"half the attenuation: 95"}, infoText(protectionUnder(t, osha().Measures, nrr, noiseAt(95), model("p1", 5))), "a rating that credits nothing protects nobody, however long it is worn")
}

func TestTwoProtectorsTogether(t *testing.T) {
	muff := &record.Protector{ProtectorID: "p2", Type: "earmuff", NRR: record.Num(12)}
	other := func(kind string, nrr float64) *record.Protector {
		return &record.Protector{ProtectorID: "p2", Type: kind, NRR: record.Num(nrr)}
	}
	for name, c := range map[string]struct {
		derating string
		records  []record.Record
		want     string // level
		working  string
	}{
		"Washington's line, a plug of 20 and a muff of 12 (WAC 296-307-63215 Table 2)": {"", []record.Record{typed("formable", 20), muff, issued("p2", "2020-02-01", "")}, "82", "NRR of both = 20 + 5 = 25 dB; attenuation of an A-weighted level = 25 - 7 = 18 dB; 100 - 18 = 82 dB under the protector"},
		"By the rule of CSA Z94.2":    {"csa", []record.Record{typed("formable", 20), muff, issued("p2", "2020-02-01", "")}, "86.8", "derated NRR = 0.65 · 25 = 16.25 dB; attenuation of an A-weighted level = 16.25 - 3 = 13.25 dB; 100 - 13.25 = 86.75 dB under the protector; rounded to 86.8 dB"},
		"NIOSH has no rule for two":   {"niosh", []record.Record{typed("formable", 20), muff, issued("p2", "2020-02-01", "")}, "", ""},
		"The muff was given back":     {"", []record.Record{typed("formable", 20), muff, issued("p2", "2020-02-01", "2024-01-01")}, "", ""},
		"The muff comes later":        {"", []record.Record{typed("formable", 20), muff, issued("p2", "2024-01-02", "")}, "", ""},
		"Two plugs":                   {"", []record.Record{typed("formable", 20), other("premolded", 12), issued("p2", "2020-02-01", "")}, "", ""},
		"Two muffs":                   {"", []record.Record{typed("helmet_muff", 20), other("earmuff", 12), issued("p2", "2020-02-01", "")}, "", ""},
		"The type of one is unknown":  {"", []record.Record{model("p1", 20), muff, issued("p2", "2020-02-01", "")}, "", ""},
		"One has no rating":           {"", []record.Record{typed("formable", 20), &record.Protector{ProtectorID: "p2", Type: "earmuff"}, issued("p2", "2020-02-01", "")}, "", ""},
		"One of two models in itself": {"", []record.Record{typed("formable", 20), other("dual", 12), issued("p2", "2020-02-01", "")}, "", ""},
		"The latest of two muffs": {"", []record.Record{typed("formable", 20), muff, issued("p2", "2020-02-01", ""), &record.Protector{ProtectorID: "p3", Type: "earmuff", NRR: record.Num(25)},
			issued("p3", "2020-01-15", "")}, "82", "NRR of both = 20 + 5 = 25 dB; attenuation of an A-weighted level = 25 - 7 = 18 dB; 100 - 18 = 82 dB under the protector"},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, osha().Measures, dossier.ProtectionMeasures{Rating: "nrr", Derating: c.derating}, append(c.records, noiseAt(100))...)
			level, working := "", ""
			for _, e := range p.Information {
				if e.Method == "p1 and p2 worn together" || e.Method == "p2 and p1 worn together" || e.Method == "p2 and p1 worn together (CSA Z94.2)" {
					level, working = e.Level.String(), e.Working
					assert.Equal(t, "from memory", e.Mark)
				}
			}
			assert.Equal(t, []string{c.want, c.working}, []string{level, working})
		})
	}
}

func TestFitTestAsEstimate(t *testing.T) {
	const method = "personal attenuation rating by the fit test of 2021-01-01"
	bare := func(f *record.FitTest) { f.Percent, f.UncertaintyDB = record.Number{}, record.Number{} }
	for name, c := range map[string]struct {
		tests   []record.Record
		want    []string
		working string // of the first
	}{
		"With its percentage and uncertainty": {[]record.Record{fitTestOf("p1", "2021-01-01", 20)}, []string{method + ": 80, secondary source", method + ", for 84 % of wearings: 83, from memory"}, "PAR found for 50 % of wearings = 20 dB; 100 - 20 = 80 dB under the protector; standard uncertainty 3 dB"},
		"Found for the percentage asked for":  {[]record.Record{fitTestOf("p1", "2021-01-01", 20, func(f *record.FitTest) { f.Percent = record.Num(84) })}, []string{method + ": 80, secondary source"}, "PAR found for 84 % of wearings = 20 dB; 100 - 20 = 80 dB under the protector; standard uncertainty 3 dB"},
		"Without uncertainty":                 {[]record.Record{fitTestOf("p1", "2021-01-01", 20, func(f *record.FitTest) { f.UncertaintyDB = record.Number{} })}, []string{method + ": 80, secondary source"}, "PAR found for 50 % of wearings = 20 dB; 100 - 20 = 80 dB under the protector; uncertainty not recorded"},
		"Without percentage":                  {[]record.Record{fitTestOf("p1", "2021-01-01", 20, bare)}, []string{method + ": 80, secondary source"}, "100 dBA − 20 dB = 80 dBA; it is not known what percentage of wearings reaches the rating; uncertainty not recorded"},
		"A negative one credits nothing":      {[]record.Record{fitTestOf("p1", "2021-01-01", -2, bare)}, []string{method + ": 100, secondary source"}, "100 dBA; a negative rating of -2 dB credits nothing; it is not known what percentage of wearings reaches the rating; uncertainty not recorded"},
		"The ears alone": {[]record.Record{fitTestOf("p1", "2021-01-01", 0, bare, func(f *record.FitTest) {
			f.PARDB, f.LeftPARDB, f.RightPARDB = record.Number{}, record.Num(18), record.Num(22)
		})}, []string{method + ": 82, secondary source"}, "lower of left 18 dB and right 22 dB = 18 dB; 100 dBA − 18 dB = 82 dBA; it is not known what percentage of wearings reaches the rating; uncertainty not recorded"},
		"One ear is not both":                  {[]record.Record{fitTestOf("p1", "2021-01-01", 0, func(f *record.FitTest) { f.PARDB, f.LeftPARDB = record.Number{}, record.Num(18) })}, []string{}, ""},
		"One that was not passed says so":      {[]record.Record{fitTestOf("p1", "2021-01-01", 8, bare, func(f *record.FitTest) { f.Passed = record.No })}, []string{method + ", which was not passed: 92, secondary source"}, "100 dBA − 8 dB = 92 dBA; it is not known what percentage of wearings reaches the rating; uncertainty not recorded"},
		"The latest counts":                    {[]record.Record{fitTestOf("p1", "2020-06-01", 30), fitTestOf("p1", "2021-01-01", 20, bare)}, []string{method + ": 80, secondary source"}, "100 dBA − 20 dB = 80 dBA; it is not known what percentage of wearings reaches the rating; uncertainty not recorded"},
		"Also where it has no rating":          {[]record.Record{fitTestOf("p1", "2020-06-01", 30), fitTestOf("p1", "2021-01-01", 0, func(f *record.FitTest) { f.PARDB = record.Number{} })}, []string{}, ""},
		"Another model is no evidence":         {[]record.Record{fitTestOf("p2", "2021-01-01", 20)}, []string{}, ""},
		"Nor is a test from before the issue":  {[]record.Record{fitTestOf("p1", "2020-01-31", 20)}, []string{}, ""},
		"Nor one of a protector that was lost": {[]record.Record{fitTestOf("p1", "2021-01-01", 20), &record.ProtectorIssue{WorkerID: "w1", ProtectorID: "p1", Date: day("2022-01-01")}}, []string{}, ""},
		"Nor a later one":                      {[]record.Record{fitTestOf("p1", "2024-01-02", 20)}, []string{}, ""},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, osha().Measures, dossier.ProtectionMeasures{Rating: "nrr"}, append(c.tests, noiseAt(100))...)
			assert.Equal(t, c.want, infoText(p))
			if len(c.want) > 0 {
				assert.Equal(t, c.working, p.Information[0].Working)
			}
			assert.False(t, p.Under.Known, "a fit test decides nothing")
		})
	}
}

func TestPeakUnderTheProtector(t *testing.T) {
	peak := func(db float64, weighting string) func(*record.Measurement) {
		return func(m *record.Measurement) { m.PeakDB, m.PeakWeighting = record.Num(db), weighting }
	}
	snr := dossier.ProtectionMeasures{Rating: "snr"}
	p := protectionUnder(t, energyMeasures(), snr, energyAt(95, peak(140, "C")), annex())
	assert.Equal(t, []string{
		"peak in dBC, if the impulses are of high frequency: 116, from memory",
		"peak in dBC, if the impulses are of medium frequency: 127, from memory",
		"peak in dBC, if the impulses are of low frequency: 132, from memory",
	}, infoText(p))
	assert.Equal(t, "attenuation of the peak = M - 5 = 18 - 5 = 13 dB; 140 - 13 = 127 dB under the protector", p.Information[1].Working)
	assert.Empty(t, infoText(protectionUnder(t, energyMeasures(), snr, energyAt(95, peak(140, "Z")), annex())), "an unweighted peak")
	assert.Empty(t, infoText(protectionUnder(t, energyMeasures(), snr, energyAt(95, peak(140, "")), annex())), "a peak of unknown weighting")
	assert.Empty(t, infoText(protectionUnder(t, energyMeasures(), snr, energyAt(95, peak(140, "C")), model("p1", 20))), "no H, M and L")
}

func TestClassNeeded(t *testing.T) {
	slc := &record.Protector{ProtectorID: "p1", SLC80: record.Num(20), Class: "4"}
	labelled := func(class string) *record.Protector { return &record.Protector{ProtectorID: "p1", Class: class} }
	for name, c := range map[string]struct {
		rating    string
		measures  dossier.Measures
		noise     *record.Measurement
		protector *record.Protector
		want      string
	}{
		"AS/NZS, with the class of the rating": {"slc80", energyMeasures(), energyAt(97), slc, "97 dBA asks for class 3 or higher; SLC80 20 dB is class 3; the label says 4"},
		"AS/NZS, the highest":                  {"slc80", energyMeasures(), energyAt(105), labelled("5"), "105 dBA asks for class 5; the label says 5"},
		"AS/NZS, beyond":                       {"slc80", energyMeasures(), energyAt(110), labelled("5"), "110 dBA asks for a choice by octave bands, made by a specialist; the label says 5"},
		"CSA":                                  {"nrr", energyMeasures(), energyAt(95), labelled("B"), "95 dBA asks for class B or A or grade 2, 3 or 4; the label says B"},
		"CSA, two":                             {"nrr", energyMeasures(), energyAt(111), labelled("A"), "111 dBA asks for a plug of class A or grade 3 or 4 under a muff of class A or B or grade 2, 3 or 4, and a limit of the time; the label says A"},
		"No class on the label":                {"nrr", energyMeasures(), energyAt(95), model("p1", 20), "none"},
		"A rating without classes":             {"snr", energyMeasures(), energyAt(95), labelled("B"), "none"},
		"Not for a dose of another kind":       {"nrr", osha().Measures, noiseAt(95), labelled("B"), "none"},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, c.measures, dossier.ProtectionMeasures{Rating: c.rating}, c.noise, c.protector)
			method := map[string]string{"slc80": "class of protector needed (AS/NZS 1269.3)", "nrr": "class of protector needed (CSA Z94.2)"}[c.rating]
			assert.Equal(t, c.want, workingOf(p, method))
		})
	}
}
