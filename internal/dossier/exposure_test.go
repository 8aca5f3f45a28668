package dossier_test

import (
	"maps"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// The stretches of a group's dossier begin on the first day of the calendar.
const always = "0001-01-01"

// inForce is the day from which the law has an action level.
const inForce = "1983-04-07"

func TestGroupExposureOverTime(t *testing.T) {
	control := func(studied, installed string) *record.Control {
		return &record.Control{Group: "g1", Date: day(studied), InstalledOn: day(installed), Type: "engineering"}
	}
	for name, c := range map[string]struct {
		records []record.Record
		want    []string
	}{
		"The highest of several results counts from its day on": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), measured("m2", "g1", "2021-01-10", 80), measured("m3", "g1", "2022-01-10", 70)},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-01-09 60", "2021-01-10..2022-01-09 80", "2022-01-10.. 80"},
		},
		"Of several on the first day the highest is taken backwards": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), measured("m2", "g1", "2020-01-10", 80)},
			[]string{always + "..2020-01-09 80", "2020-01-10.. 80"},
		},
		"After a change that raises exposure, what was known is a lower bound": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "yes")},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01.. >=60"},
		},
		"A change of unknown effect may raise exposure": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "unknown")},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01.. >=60"},
		},
		"So may a change of which nothing is said": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "")},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01.. >=60"},
		},
		"After a change that does not raise exposure the value stays until measured, and then only the new one counts": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "no"), measured("m2", "g1", "2021-06-01", 40)},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01..2021-05-31 60", "2021-06-01.. 40"},
		},
		"A control that is put in place does not lower the value by itself": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), control("2020-03-01", "2020-05-01"), measured("m2", "g1", "2020-06-01", 40)},
			[]string{always + "..2020-01-09 60", "2020-01-10..2020-04-30 60", "2020-05-01..2020-05-31 60", "2020-06-01.. 40"},
		},
		"A control that was only studied changes nothing": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), control("2020-03-01", ""), measured("m2", "g1", "2020-06-01", 40)},
			[]string{always + "..2020-01-09 60", "2020-01-10..2020-05-31 60", "2020-06-01.. 60"},
		},
		"A raising change and a control of the same day: exposure may have risen": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "yes"), control("2021-01-01", "2021-05-01")},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01.. >=60"},
		},
		"A lesser change after a raising one leaves the lower bound": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "yes"), changed("c2", "2021-07-01", "no")},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01..2021-06-30 >=60", "2021-07-01.. >=60"},
		},
		"A measurement on the very day of a change is taken as made after it": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), changed("c1", "2021-05-01", "yes"), measured("m2", "g1", "2021-05-01", 40)},
			[]string{always + "..2020-01-09 60", "2020-01-10..2021-04-30 60", "2021-05-01.. 40"},
		},
		"A raising change before the first measurement cuts off what is taken backwards": {
			[]record.Record{changed("c1", "2019-05-01", "unknown"), measured("m1", "g1", "2020-01-10", 60)},
			[]string{always + "..2019-04-30 unknown", "2019-05-01..2020-01-09 60", "2020-01-10.. 60"},
		},
		"A change that does not raise exposure does not": {
			[]record.Record{changed("c1", "2019-05-01", "no"), measured("m1", "g1", "2020-01-10", 60)},
			[]string{always + "..2019-04-30 60", "2019-05-01..2020-01-09 60", "2020-01-10.. 60"},
		},
		"A change of another group or area does not concern the group": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), &record.Change{ChangeID: "c1", Group: "g2", Date: day("2021-01-01")}, &record.Change{ChangeID: "c2", Area: "hall-g2", Date: day("2021-01-01")}},
			[]string{always + "..2020-01-09 60", "2020-01-10.. 60"},
		},
		"A change of its area does": {
			[]record.Record{measured("m1", "g1", "2020-01-10", 60), &record.Change{ChangeID: "c2", Area: "hall-g1", Date: day("2021-01-01")}},
			[]string{always + "..2020-01-09 60", "2020-01-10..2020-12-31 60", "2021-01-01.. >=60"},
		},
		"A full-shift measurement of its area stands for the group": {
			[]record.Record{&record.Measurement{MeasurementID: "m1", Area: "hall-g1", Type: "area", Date: day("2020-01-10"), FullShift: record.Yes,
				CriterionDB: record.Num(90), ExchangeDB: record.Num(5), ThresholdDB: record.Num(80), DosePct: record.Num(55)}},
			[]string{always + "..2020-01-09 55", "2020-01-10.. 55"},
		},
		"Nothing measured, nothing known": {nil, []string{always + ".. unknown"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", append(c.records, group("g1"))...).group()
			assert.Equal(t, c.want, levelsText(d.Exposures, "action"))
		})
	}
}

func TestLowerBoundKeepsEnrolledAndLeavesOthersUnknown(t *testing.T) {
	for _, c := range []struct {
		dose    float64
		exposed []string
		unknown []string
	}{
		{50, []string{inForce + ".."}, []string{}},
		{49.9, []string{}, []string{"2021-05-01.."}},
	} {
		d := judge(t, "2024-01-01", group("g1"), measured("m1", "g1", "2020-01-10", c.dose), changed("c1", "2021-05-01", "yes"), changed("c2", "2021-07-01", "no")).group()
		assert.Equal(t, c.exposed, shown(d.Exposed["action"]), c.dose)
		assert.Equal(t, c.unknown, openText(d.Unknown["action"]), c.dose)
		for _, o := range open(d.Unknown["action"]) {
			assert.Equal(t, "not measured since the change c1 of 2021-05-01, which may have raised exposure", o.Reason)
		}
		assert.Equal(t, c.dose >= 50, d.Changes[0].Enrolling)
	}
}

// TestOneMeasurement holds what one measurement tells on both channels of the law: 90/5 from 80 to 130 dBA,
// and 90/5 from 90 dBA on.
func TestOneMeasurement(t *testing.T) {
	base := measured("m1", "g1", "2020-01-10", 60)
	other := but(base, func(m *record.Measurement) { m.CriterionDB, m.ExchangeDB = record.Num(85), record.Num(3) })
	for name, c := range map[string]struct {
		rows          []*record.Measurement
		action, limit string
		reason        string
	}{
		"A dose from 80 dBA on is at most that from 90 dBA on":          {[]*record.Measurement{base}, "60", "<=60", ""},
		"A dose from 90 dBA on is at least that from 80 dBA on":         {[]*record.Measurement{threshold(base, 90)}, ">=60", "60", "the dose on this channel is known only within bounds"},
		"Both channels of one measurement":                              {[]*record.Measurement{threshold(base, 90), base}, "60", "60", ""},
		"Both in the other order":                                       {[]*record.Measurement{base, threshold(base, 90)}, "60", "60", ""},
		"A lower threshold bounds both from above":                      {[]*record.Measurement{threshold(base, 0)}, "<=60", "<=60", "the dose on this channel is known only within bounds"},
		"Bounds from both sides":                                        {[]*record.Measurement{threshold(base, 70), but(threshold(base, 90), func(m *record.Measurement) { m.DosePct = record.Num(40) })}, "40 to 60", "40", "the dose on this channel is known only within bounds"},
		"A range that ends at 115 dBA gives a lower bound of the first": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.UpperDB = record.Num(115) })}, ">=60", "<=60", ""},
		"An unknown upper end is taken to reach":                        {[]*record.Measurement{but(base, func(m *record.Measurement) { m.UpperDB = record.Number{} })}, "60", "<=60", ""},
		"An unknown threshold tells nothing":                            {[]*record.Measurement{threshold(base, -1)}, "unknown", "unknown", "the integration threshold of the dose is not recorded"},
		"A sample that is not of the full shift tells nothing":          {[]*record.Measurement{but(base, func(m *record.Measurement) { m.FullShift = record.No })}, "unknown", "unknown", "the sample is not marked as covering the full shift"},
		"A run shorter than the shift neither": {[]*record.Measurement{but(base, func(m *record.Measurement) {
			m.FullShift, m.RunMinutes, m.ShiftMinutes = record.Unanswered, record.Num(479), record.Num(480)
		})}, "unknown", "unknown", "the sample is not marked as covering the full shift"},
		"A run as long as the shift does": {[]*record.Measurement{but(base, func(m *record.Measurement) {
			m.FullShift, m.RunMinutes, m.ShiftMinutes = record.Unanswered, record.Num(480), record.Num(480)
		})}, "60", "<=60", ""},
		"Unknown settings tell nothing": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.ExchangeDB = record.Number{} })}, "unknown", "unknown", "criterion level or exchange rate is not recorded"},
		"Neither dose nor average":      {[]*record.Measurement{but(base, func(m *record.Measurement) { m.DosePct = record.Number{} })}, "unknown", "unknown", "neither dose nor time-weighted average is recorded"},
		"A dose taken at 3 dB exchange is never converted": {[]*record.Measurement{other}, "unknown", "unknown",
			"the dose was taken with criterion level 85 dBA and 3 dB exchange rate, not 90 dBA and 5 dB; it cannot be converted"},
		"Beside a fitting channel it does no harm": {[]*record.Measurement{other, base}, "60", "<=60", ""},
		"The level of a task is no full shift":     {[]*record.Measurement{but(base, func(m *record.Measurement) { m.Type = "task" })}, "unknown", "unknown", "there is no full-shift measurement"},
	} {
		t.Run(name, func(t *testing.T) {
			records := []record.Record{group("g1")}
			for _, m := range c.rows {
				row := *m
				records = append(records, &row)
			}
			d := judge(t, "2024-01-01", records...).group()
			now := []dossier.Exposure{*d.Now}
			from := stretchText(d.Now.From, d.Now.To)
			assert.Equal(t, []string{from + " " + c.action}, levelsText(now, "action"))
			assert.Equal(t, []string{from + " " + c.limit}, levelsText(now, "limit"))
			reasons := ""
			for _, o := range open(d.Unknown["action"]) {
				reasons = o.Reason
			}
			if c.action == ">=60" {
				reasons, c.reason = "", "" // 60 % or more is known to reach the level
			}
			assert.Equal(t, c.reason, reasons)
		})
	}
}

func TestAverageAloneIsTakenInItsOwnSettings(t *testing.T) {
	m := but(measured("m1", "g1", "2020-01-10", 0), func(m *record.Measurement) { m.DosePct, m.TWADBA = record.Number{}, record.Num(90) })
	d := judge(t, "2024-01-01", group("g1"), m).group()
	assert.InDelta(t, 100, d.Now.Channels["action"].DosePct.Value, 1e-9)
	assert.Contains(t, d.Now.Channels["action"].Working, "TWA 90 dBA measured, dose 100 %")
	m = but(m, func(m *record.Measurement) { m.TWADBA = record.Num(85) })
	d = judge(t, "2024-01-01", group("g1"), m).group()
	assert.Equal(t, []string{inForce + ".."}, shown(d.Exposed["action"]), "an average of 85 dBA reaches the action level")
}

func TestReasonsBelongToTheirChannel(t *testing.T) {
	// A dose of 0 % from 90 dBA on tells all of the second channel and nothing of the first.
	d := judge(t, "2024-01-01", group("g1"), measured("m1", "g1", "2020-01-10", 40), changed("c1", "2021-05-01", "yes"),
		threshold(measured("m2", "g1", "2021-06-01", 0), 90)).group()
	assert.Equal(t, []string{"2021-05-01..2021-05-31"}, openText(d.Unknown["limit"]))
	assert.Equal(t, []string{"2021-05-01.."}, openText(d.Unknown["action"]))
	const reason = "not measured since the change c1 of 2021-05-01, which may have raised exposure"
	assert.Equal(t, reason, open(d.Unknown["action"])[0].Reason)
	assert.Equal(t, reason, d.Now.Note)
	assert.Equal(t, "measurement/m1", d.Now.Ref)
}

func TestTasks(t *testing.T) {
	task := func(name, date string, minutes float64, samples ...string) *record.Task {
		return &record.Task{Group: "g1", Task: name, Date: day(date), Minutes: record.Num(minutes), Samples: samples}
	}
	level := func(id string, db float64) *record.Measurement {
		return &record.Measurement{MeasurementID: id, Group: "g1", Type: "task", Date: day("2020-01-05"), LAeqDBA: record.Num(db)}
	}
	three := osha().Measures
	three.Exposure.Channels = maps.Clone(three.Exposure.Channels)
	three.Exposure.Channels["three"] = dossier.Channel{CriterionDB: 85, ExchangeDB: 3}
	for name, c := range map[string]struct {
		records              []record.Record
		action, limit, three string
		reason               string
	}{
		"Levels and minutes are computed on every channel": {[]record.Record{task("a", "2020-01-10", 240, "95"), task("b", "2020-01-10", 240, "80")}, "112.5", "100", "519.72", ""},
		"Levels may be ids of measurements":                {[]record.Record{level("m9", 95), task("a", "2020-01-10", 240, "m9"), task("b", "2020-01-10", 240, "80")}, "112.5", "100", "519.72", ""},
		"Several samples share the minutes of the task":    {[]record.Record{task("a", "2020-01-10", 480, "90", "95")}, "150", "150", "662.71", ""},
		"A day without date holds from the beginning":      {[]record.Record{task("a", "", 480, "90")}, "100", "100", "317.48", ""},
		"A missing level leaves the day unknown":           {[]record.Record{task("a", "2020-01-10", 240, "95"), task("b", "2020-01-10", 240)}, "", "", "", "the task b has no level"},
		"So does a measurement that is not there":          {[]record.Record{task("a", "2020-01-10", 240, "m7")}, "", "", "", "the sample m7 of the task a has no level"},
		"A day has no more than 24 hours":                  {[]record.Record{task("a", "2020-01-10", 1441, "95")}, "", "", "", "the segments last 1441 minutes together; a day has 1440"},
	} {
		t.Run(name, func(t *testing.T) {
			d := asked{asOf: "2024-01-01", measures: three}.judge(t, append(c.records, group("g1"))...).group()
			require.NotNil(t, d.TaskDay)
			if c.reason != "" {
				require.NotEmpty(t, open(d.Unknown["action"]))
				assert.Equal(t, c.reason, open(d.Unknown["action"])[0].Reason)
				return
			}
			assert.Equal(t, c.action, d.Now.Channels["action"].DosePct.String())
			assert.Equal(t, c.limit, d.Now.Channels["limit"].DosePct.String())
			assert.InDelta(t, mustFloat(t, c.three), d.Now.Channels["three"].DosePct.Value, 0.01)
			assert.Contains(t, strings.Join(d.Now.Channels["action"].Working, "\n"), "D = 100 · Σ C/T")
		})
	}
}
