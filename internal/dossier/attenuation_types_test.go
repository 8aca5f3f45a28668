package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// TestAllowanceByType takes the allowance for use by type of protector, as the deductions Ks of DGUV Information 212-024
// do: 98 dBA of broadband noise and an M of 26 dB. The numbers 4 and 85 are parameters that the test law has.
func TestAllowanceByType(t *testing.T) {
	noise := energyAt(98, twaC(100)) // L_C − L_A of 2 dB, so that the attenuation is M itself
	plug := func(kind string) *record.Protector {
		return &record.Protector{ProtectorID: "p1", Type: kind, H: record.Num(30), M: record.Num(26), L: record.Num(20)}
	}
	byType := dossier.ProtectionMeasures{Rating: "hml", RealWorldByType: map[string]string{"formable": "allowance"}}
	and := byType
	and.RealWorld = "action_level" // 85 dB for all others
	none := byType
	none.RealWorldByType = map[string]string{"formable": "not_there"}
	for name, c := range map[string]struct {
		measures dossier.ProtectionMeasures
		kind     string
		under    string
		missing  []string
	}{
		"its own":                 {byType, "formable", "76", []string{}},
		"another type":            {byType, "earmuff", "", []string{"allowance for use of a protector of the type earmuff in the bundle"}},
		"a type nobody recorded":  {byType, "", "", []string{"type of the protector p1, by which the allowance for use is taken"}},
		"its own before that all": {and, "formable", "76", []string{}},
		"that of all others":      {and, "earmuff", "98", []string{}},
		"a value not in force":    {none, "formable", "", []string{"value of not_there on 2024-01-01 in the bundle"}},
	} {
		t.Run(name, func(t *testing.T) {
			p := protectionUnder(t, energyMeasures(), c.measures, noise, plug(c.kind))
			assert.Equal(t, c.missing, p.Missing)
			assert.Equal(t, c.under, p.Under.String())
		})
	}
}

// TestPeakOfAnotherMeasurement takes the peak at the ear from the channel of the highest peak, not from the measurement
// that decides the level.
func TestPeakOfAnotherMeasurement(t *testing.T) {
	m := energyMeasures()
	m.Exposure.Channels["peak"] = dossier.Channel{Kind: dossier.HighestChannel, Of: dossier.PeakDBC}
	peak := energyAt(90, func(m *record.Measurement) {
		m.MeasurementID, m.PeakDB, m.PeakWeighting = "m2", record.Num(139), "C"
	})
	ratings := &record.Protector{ProtectorID: "p1", Type: "earmuff", H: record.Num(30), M: record.Num(26), L: record.Num(20)}
	p := protectionUnder(t, m, dossier.ProtectionMeasures{Rating: "hml"}, energyAt(98, twaC(100)), peak, ratings)
	assert.Equal(t, "139", p.Peak.String())
	assert.True(t, p.PeakUnder.Known)
	delete(m.Exposure.Channels, "peak")
	p = protectionUnder(t, m, dossier.ProtectionMeasures{Rating: "hml"}, energyAt(98, twaC(100)), peak, ratings)
	assert.False(t, p.Peak.Known)
}
