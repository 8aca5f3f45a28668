package dossier_test

import (
	"encoding/json"
	"fmt"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// annexes are the examples of ISO 9612:2009 (secondary source): tasks of a welder, the job of a group of 18, full days
// of forklift drivers.
type annexes struct {
	Tasks struct {
		Tasks []struct {
			Samples []float64 `json:"samples"`
			Hours   float64   `json:"T_h"`
			Range   []float64 `json:"T_range"`
		} `json:"tasks"`
	} `json:"annex_D_task"`
	Job     sampledAnnex `json:"annex_E_job"`
	FullDay sampledAnnex `json:"annex_F_fullday"`
}

type sampledAnnex struct {
	Samples []float64 `json:"samples"`
	Hours   float64   `json:"Te_h"`
}

func readAnnexes(t require.TestingT) (a annexes) {
	content, err := os.ReadFile("../../testdata/vectors/iso9612_examples.json")
	require.NoError(t, err)
	require.NoError(t, json.Unmarshal(content, &a))
	return a
}

func dosimeter() *record.Instrument {
	return &record.Instrument{InstrumentID: "dos", Type: "dosimeter"}
}

// tasksOfD are the tasks of Annex D, each sample a measurement, with or without the range of the times.
func tasksOfD(a annexes, ranged bool) []record.Record {
	out := []record.Record{group("g1"), dosimeter()}
	for i, task := range a.Tasks.Tasks {
		one := &record.Task{Group: "g1", Task: fmt.Sprint(i + 1), Date: day("2020-01-10"), Minutes: record.Num(task.Hours * 60)}
		if ranged && task.Range != nil {
			one.MinutesLow, one.MinutesHigh = record.Num(task.Range[0]*60), record.Num(task.Range[1]*60)
		}
		for j, level := range task.Samples {
			m := leveled(fmt.Sprintf("d%d%d", i, j), "2020-01-05", level)
			m.Type = "task"
			out = append(out, m)
			one.Samples = append(one.Samples, m.MeasurementID)
		}
		out = append(out, one)
	}
	return out
}

// samplesOf are samples of one day each, in a shift of so many hours.
func samplesOf(annex sampledAnnex, full record.Answer) []record.Record {
	g := group("g1")
	g.ShiftMinutes = record.Num(annex.Hours * 60)
	out := []record.Record{g, dosimeter()}
	for i, level := range annex.Samples {
		m := leveled(fmt.Sprintf("s%d", i), fmt.Sprintf("2020-01-%02d", i+10), level)
		m.ShiftMinutes, m.FullShift = record.Number{}, full
		out = append(out, m)
	}
	return out
}

func sampled(strategy, decision string) func(*dossier.ExposureMeasures) {
	return func(m *dossier.ExposureMeasures) { m.Several, m.Strategy, m.Decision = "sampled", strategy, decision }
}

func decides(decision string) func(*dossier.ExposureMeasures) {
	return func(m *dossier.ExposureMeasures) { m.Decision = decision }
}

// TestAnnexesEndToEnd: Annex D 84.3 dBA, U 2.7 dB without and 3.2 dB with the uncertainty of the times; Annex E 88.1 dBA
// (88.16 without rounding on the way), U 3.8 dB; Annex F 90.1 dBA, U 3.4 dB.
func TestAnnexesEndToEnd(t *testing.T) {
	a := readAnnexes(t)
	for name, c := range map[string]struct {
		how      asked
		records  []record.Record
		lex, u   float64
		last     string // of the working
		ref, day string
	}{
		"D without times": {byLevel(85, decides("zones")), tasksOfD(a, false), 84.294, 2.72, "both limits count: 84.29 ± 2.72 = 81.57 to 87.01 dBA", "task/g1/1", "2020-01-10"},
		"D with times":    {byLevel(85, decides("zones")), tasksOfD(a, true), 84.294, 3.235, "both limits count: 84.29 ± 3.23 = 81.06 to 87.53 dBA", "task/g1/1", "2020-01-10"},
		"E":               {byLevel(85, sampled("job", "upper")), samplesOf(a.Job, record.No), 88.159, 3.769, "the upper limit counts: 88.16 + 3.77 = 91.93 dBA", "measurement/s5", "2020-01-15"},
		"F":               {byLevel(85, sampled("full_day", "")), samplesOf(a.FullDay, record.Yes), 90.123, 3.432, "", "measurement/s5", "2020-01-15"},
	} {
		t.Run(name, func(t *testing.T) {
			now := c.how.judge(t, c.records...).group().Now
			l := now.Channels["day"]
			assert.InDelta(t, c.lex, l.LevelDBA.Value, 6e-4)
			assert.InDelta(t, c.u, l.UDB.Value, 6e-4)
			assert.Contains(t, working(l), c.last)
			assert.Contains(t, working(l), "U = 1.65 · ")
			assert.Equal(t, []string{c.ref, c.day}, []string{now.Ref, now.MeasuredOn.String()})
			assert.NotEmpty(t, now.Others)
		})
	}
}

// TestDecisions holds Annex D, 84.29 ± 3.23 dBA, and Annex F, 90.12 ± 3.43 dBA, against action levels around them.
func TestDecisions(t *testing.T) {
	a := readAnnexes(t)
	for _, c := range []struct {
		decision    string
		action      float64
		tasks, days string
	}{
		{"", 84.3, "not reached", "reached"}, {"best", 84.2, "reached", "reached"}, {"best", 90.2, "not reached", "not reached"},
		{"upper", 87.5, "reached", "reached"}, {"upper", 87.6, "not reached", "reached"}, {"upper", 93.6, "not reached", "not reached"},
		{"zones", 81, "reached", "reached"}, {"zones", 87.6, "not reached", "unknown: the level of 90.1 ± 3.4 dBA lies on both sides of 87.6 dBA; more samples with the same spread, up to 30, would not settle it"},
		{"zones", 87, "unknown: the level of 84.3 ± 3.2 dBA lies on both sides of 87 dBA", "unknown: the level of 90.1 ± 3.4 dBA lies on both sides of 87 dBA; 7 more with the same spread would settle it"},
		{"zones", 85, "unknown: the level of 84.3 ± 3.2 dBA lies on both sides of 85 dBA", "reached"},
		{"zones", 90, "not reached", "unknown: the level of 90.1 ± 3.4 dBA lies on both sides of 90 dBA; more samples with the same spread, up to 30, would not settle it"},
		{"zones", 93.6, "not reached", "not reached"},
	} {
		assert.Equal(t, c.tasks, verdictOn(byLevel(c.action, decides(c.decision)).judge(t, tasksOfD(a, true)...).group()), c)
		assert.Equal(t, c.days, verdictOn(byLevel(c.action, sampled("full_day", c.decision)).judge(t, samplesOf(a.FullDay, record.Yes)...).group()), c)
	}
}

func TestZonesOfAWeek(t *testing.T) {
	a := readAnnexes(t)
	records := samplesOf(a.FullDay, record.Yes)
	records[0].(*record.Group).DaysPerWeek = record.Num(3)
	g := byLevel(87-2.21848749616, sampled("full_day", "zones"), func(m *dossier.ExposureMeasures) { weekly(m) }).judge(t, records...).group()
	assert.Equal(t, "unknown: the level of 87.9 ± 3.4 dBA lies on both sides of 84.78151250384 dBA; 7 more with the same spread would settle it", verdictOn(g),
		"as many as without the 2.2 dB of the week")
	records[0].(*record.Group).DaysPerWeek = record.Number{}
	g = byLevel(85, sampled("full_day", "zones"), weekly).judge(t, records...).group()
	assert.Equal(t, "unknown: the days worked in a week are not recorded for the group g1", verdictOn(g))
}

func TestTooFewSamples(t *testing.T) {
	a := readAnnexes(t)
	days, job := samplesOf(a.FullDay, record.Yes), samplesOf(a.Job, record.No)
	for _, c := range []struct {
		how     asked
		records []record.Record
		want    string
	}{
		{byLevel(85, sampled("full_day", "")), days[:4], "unknown: 2 of at least 3 full-day samples recorded; 1 more needed"},
		{byLevel(85, sampled("full_day", "")), days[:3], "unknown: 1 of at least 3 full-day samples recorded; 2 more needed"},
		{byLevel(85, sampled("full_day", "")), days[:5], "reached"},
		{byLevel(85, sampled("job", "")), job[:6], "unknown: 4 of at least 5 samples of the job recorded; 1 more needed"},
		{byLevel(85, sampled("job", "")), job[:7], "reached"},
		{byLevel(85, sampled("full_day", "")), job, "unknown: the sample is not marked as covering the full shift"},
		{byLevel(85, sampled("full_day", "")), days[:2], "unknown: there is no full-shift measurement"},
	} {
		assert.Equal(t, c.want, verdictOn(c.how.judge(t, c.records...).group()))
	}
	// A further row of a measurement, of a dose only, does not matter.
	again := *days[2].(*record.Measurement)
	again.LAeqDBA, again.CriterionDB, again.ExchangeDB, again.DosePct = record.Number{}, record.Num(85), record.Num(3), record.Num(100)
	for _, records := range [][]record.Record{{days[0], &again, days[2]}, {days[0], days[2], &again}} {
		assert.Equal(t, "unknown: 1 of at least 3 full-day samples recorded; 2 more needed", verdictOn(byLevel(85, sampled("full_day", "")).judge(t, records...).group()))
	}
	// A day described by tasks is a determination of its own.
	with := append(days[:4:4], &record.Task{Group: "g1", Task: "a", Date: day("2020-02-01"), Minutes: record.Num(480), Samples: record.List{"86"}})
	assert.Equal(t, "reached", verdictOn(byLevel(85, sampled("full_day", "")).judge(t, with...).group()))
}

func TestSamplesSinceAChange(t *testing.T) {
	a := readAnnexes(t)
	records := append(samplesOf(a.FullDay, record.Yes), changed("c1", "2020-01-13", "yes")) // before the fourth sample
	d := byLevel(85, sampled("full_day", "")).judge(t, records...).group()
	assert.Equal(t, "2020-01-15", d.Now.From.String())
	assert.InDelta(t, 90.0, d.Now.Channels["day"].LevelDBA.Value, 0.1) // the last three days
	assert.Equal(t, 3, d.Statistics.Number)
	d = byLevel(95, sampled("full_day", "")).judge(t, append(records[:6:6], changed("c1", "2020-01-13", "yes"))...).group()
	assert.Equal(t, "unknown: since the change c1 of 2020-01-13, which may have raised exposure: 1 of at least 3 full-day samples recorded; 2 more needed", verdictOn(d))
	assert.Nil(t, byLevel(95).judge(t, leveled("m1", "2020-01-01", 80), group("g1"), changed("c1", "2020-01-13", "yes")).group().Statistics)
}

func TestInstrumentsBehindAnUncertainty(t *testing.T) {
	a := readAnnexes(t)
	for _, c := range []struct {
		instrument *record.Instrument
		decision   string
		u          float64 // 0 for none
		want       string
	}{
		{dosimeter(), "zones", 3.432, "reached"},
		{&record.Instrument{InstrumentID: "dos", Type: "sound_level_meter", Class: "1"}, "zones", 2.643, "reached"},
		{&record.Instrument{InstrumentID: "dos", Type: "sound_level_meter", Class: "class 2"}, "zones", 3.432, "reached"},
		{&record.Instrument{InstrumentID: "dos", Type: "sound_level_meter"}, "zones", 0, unknownInstrument},
		{&record.Instrument{InstrumentID: "dos", Type: "calibrator", Class: "1"}, "upper", 0, unknownInstrument},
		{&record.Instrument{InstrumentID: "other", Type: "dosimeter"}, "upper", 0, unknownInstrument},
		{&record.Instrument{InstrumentID: "other", Type: "dosimeter"}, "best", 0, "reached"},
	} {
		records := samplesOf(a.FullDay, record.Yes)
		records[1] = c.instrument
		d := byLevel(85, sampled("full_day", c.decision)).judge(t, records...).group()
		assert.Equal(t, c.want, verdictOn(d), c)
		assert.InDelta(t, c.u, d.Now.Channels["day"].UDB.Value, 6e-4, c)
		if c.decision == "best" {
			assert.Contains(t, working(d.Now.Channels["day"]), "the uncertainty is not known: the instrument dos is not in the records")
		}
	}
	bare := []record.Record{group("g1"), &record.Task{Group: "g1", Task: "a", Date: day("2020-01-10"), Minutes: record.Num(480), Samples: record.List{"80"}}}
	assert.Equal(t, "not reached", verdictOn(byLevel(85).judge(t, bare...).group()))
	assert.Equal(t, "unknown: the uncertainty decides, but it is not known: a level names no instrument", verdictOn(byLevel(85, decides("upper")).judge(t, bare...).group()))
}

const unknownInstrument = "unknown: the uncertainty decides, but it is not known: the instrument dos is not in the records as a dosimeter, or a sound level meter of class 1 or 2"

func TestOwnSamples(t *testing.T) {
	a := readAnnexes(t)
	mine := func(id, date string, laeq float64) record.Record {
		return but(leveled(id, date, laeq), func(m *record.Measurement) { m.Group, m.WorkerID = "", "w1" })
	}
	records := append(samplesOf(a.FullDay, record.Yes), hired("2020-01-01"), assigned("g1", "2020-01-01"), mine("o1", "2021-01-01", 80), mine("o2", "2021-02-01", 81))
	how := byLevel(85, sampled("full_day", ""))
	d := how.judge(t, records...).worker()
	assert.Equal(t, []string{"2020-01-01.."}, enrolledText(d.Enrolled), "two are too few")
	d = how.judge(t, append(records, mine("o3", "2021-03-01", 82))...).worker()
	assert.Equal(t, []string{"2020-01-01..2021-02-28"}, enrolledText(d.Enrolled))
	d = how.judge(t, group("g1"), dosimeter(), hired("2020-01-01"), assigned("g1", "2020-01-01"), mine("o1", "2021-01-01", 80)).worker()
	require.Len(t, d.ExposureUnknown["action"], 1)
	assert.Equal(t, "there is no full-shift measurement; of the worker's own measurements: 1 of at least 3 full-day samples recorded; 2 more needed", d.ExposureUnknown["action"][0].Reason)
}
