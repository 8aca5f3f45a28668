package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// levelMeasures has the measures of the bundle with L_EX,8h in place of its doses.
func levelMeasures(several string) dossier.Measures {
	m := osha().Measures
	channel := dossier.Channel{Kind: dossier.LevelChannel}
	m.Exposure.Channels = map[string]dossier.Channel{"action": channel, "limit": channel}
	m.Exposure.Levels = map[string]dossier.Threshold{"action": m.Exposure.Levels["action"]} // the law has one level
	m.Exposure.Several, m.Exposure.Strategy, m.Exposure.Decision = several, "full_day", "best"
	return m
}

// dayOf is a full-shift measurement of 8 hours with equivalent levels; a C-weighted one of 0 dB is not recorded.
func dayOf(id string, a, c float64, changes ...func(*record.Measurement)) *record.Measurement {
	m := &record.Measurement{MeasurementID: id, Group: "g1", Date: day("2019-11-15"), Type: "personal", FullShift: record.Yes,
		RunMinutes: record.Num(480), ShiftMinutes: record.Num(480), LAeqDBA: record.Num(a), LCeqDBC: record.Number{Value: c, Known: c > 0}}
	for _, change := range changes {
		change(m)
	}
	return m
}

func TestProtectionOnALevelChannel(t *testing.T) {
	snr := dossier.ProtectionMeasures{Rating: "snr"}
	p := protectionUnder(t, levelMeasures("highest"), snr, dayOf("m1", 95, 97), annex())
	assert.Equal(t, []string{"97", "76"}, []string{p.Exposure.String(), p.Under.String()})
	assert.Contains(t, p.Working, "L_C = 8-hour level 95 dBA + (LCeq 97 dBC − LAeq 95 dBA = 2 dB) = 97 dBC")
	p = protectionUnder(t, levelMeasures("highest"), snr, dayOf("m1", 95, 0), annex())
	assert.Equal(t, []string{"C-weighted level of the measurement"}, p.Missing)
	p = protectionUnder(t, levelMeasures("highest"), snr, annex())
	assert.Equal(t, []string{"exposure without the protector"}, p.Missing)
	p = protectionUnder(t, levelMeasures("highest"), dossier.ProtectionMeasures{Rating: "octave"}, dayOf("m1", 104, 0, octaveBands(annexNoise...)), annex())
	assert.Equal(t, "81.4", p.Under.String())
}

func TestProtectionFromSeveralSamples(t *testing.T) {
	snr := dossier.ProtectionMeasures{Rating: "snr"}
	peak := func(db float64) func(*record.Measurement) {
		return func(m *record.Measurement) { m.PeakDB, m.PeakWeighting = record.Num(db), "C" }
	}
	samples := []record.Record{
		dayOf("m1", 95, 97, peak(130)), dayOf("m2", 95, 99.5, peak(135)), dayOf("m3", 95, 0, peak(120), twaC(120)), annex(),
	}
	p := protectionUnder(t, levelMeasures("sampled"), snr, samples...)
	assert.Equal(t, []string{"99.5", "78.5"}, []string{p.Exposure.String(), p.Under.String()}, "the C-weighted average of one sample is not that of all")
	assert.Contains(t, p.Working, "L_C = 8-hour level 95 dBA + (the highest of 3 measurements, LCeq 99.5 dBC − LAeq 95 dBA = 4.5 dB) = 99.5 dBC")
	assert.Contains(t, infoText(p), "peak in dBC, if the impulses are of high frequency: 111, from memory")
}

func TestProtectionFromTasks(t *testing.T) {
	task := &record.Task{Group: "g1", Task: "chipping", Date: day("2019-11-15"), Minutes: record.Num(480), Samples: record.List{"95"}}
	p := protectionUnder(t, osha().Measures, dossier.ProtectionMeasures{Rating: "nrr"}, task, model("p1", 20))
	assert.Equal(t, "82", p.Under.String())
	p = protectionUnder(t, osha().Measures, dossier.ProtectionMeasures{Rating: "snr"}, task, annex())
	assert.Equal(t, []string{"C-weighted level of the measurement"}, p.Missing)
}
