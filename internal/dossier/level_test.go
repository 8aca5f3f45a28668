package dossier_test

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// limits is a law with an action level in dBA beside the parameters of the bundle.
type limits struct {
	*bundle.Bundle
	action float64
}

func (l limits) Number(name string, on calendar.Date) (float64, bool) {
	if name == "action_level" {
		return l.action, true
	}
	return l.Bundle.Number(name, on)
}

// byLevel judges by one channel of levels, named day, and an action level in dBA that is reached.
func byLevel(action float64, change ...func(*dossier.ExposureMeasures)) asked {
	m := osha().Measures
	m.Exposure = dossier.ExposureMeasures{
		Channels: map[string]dossier.Channel{"day": {Kind: dossier.LevelChannel}},
		Levels:   map[string]dossier.Threshold{"action": {Channel: "day", AtLeast: "action_level"}},
		Enrols:   "action", Several: "highest",
	}
	m.Protection.Channel = "day"
	for _, c := range change {
		c(&m.Exposure)
	}
	return asked{asOf: "2024-01-01", measures: m, law: limits{osha(), action}}
}

func weekly(m *dossier.ExposureMeasures) {
	m.Channels = map[string]dossier.Channel{"day": {Kind: dossier.LevelChannel, Weekly: true}}
}

func above(m *dossier.ExposureMeasures) {
	m.Levels = map[string]dossier.Threshold{"action": {Channel: "day", Above: "action_level"}}
}

// leveled is a full-shift measurement of g1 with an equivalent level over eight hours.
func leveled(id, date string, laeq float64) *record.Measurement {
	return &record.Measurement{MeasurementID: id, Group: "g1", Date: day(date), Type: "personal", FullShift: record.Yes,
		LAeqDBA: record.Num(laeq), ShiftMinutes: record.Num(480), InstrumentID: "dos"}
}

// working joins the lines of a channel's working.
func working(l dossier.Level) string { return strings.Join(l.Working, "\n") }

// verdictOn says whether the group reaches the action level now.
func verdictOn(g *dossier.Group) string {
	for _, o := range g.Unknown["action"] {
		if !o.To.Known() {
			return "unknown: " + o.Reason
		}
	}
	for _, s := range g.Exposed["action"] {
		if !s.To.Known() {
			return "reached"
		}
	}
	return "not reached"
}

func TestLevelOfOneMeasurement(t *testing.T) {
	base := leveled("m1", "2020-01-10", 85)
	dose := func(exchange, threshold, pct float64) *record.Measurement {
		return but(base, func(m *record.Measurement) {
			m.LAeqDBA, m.CriterionDB, m.ExchangeDB = record.Number{}, record.Num(85), record.Num(exchange)
			m.ThresholdDB, m.DosePct = record.Number{Value: threshold, Known: threshold >= 0}, record.Num(pct)
		})
	}
	for name, c := range map[string]struct {
		rows    []*record.Measurement
		level   string // dBA to 0.01 dB, or bounds
		verdict string // against an action level of 85 dBA that is reached
		working string
	}{
		"Eight hours at exactly the level reach it": {[]*record.Measurement{base}, "85.00", "reached", "L_EX,8h = 85 + 10 lg(8 h / 8 h) = 85.00 dBA"},
		"93 dBA over two hours": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.LAeqDBA, m.ShiftMinutes = record.Num(93), record.Num(120) })},
			"86.98", "reached", "L_EX,8h = 93 + 10 lg(2 h / 8 h) = 86.98 dBA"},
		"86 dBA over four hours": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.LAeqDBA, m.ShiftMinutes = record.Num(86), record.Num(240) })},
			"82.99", "not reached", "for information: in a shift of 4 h a steady level of 85 − 10 lg(4 h / 8 h) = 88.0 dBA reaches 85 dBA"},
		"The shift of the group where the row has none": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.LAeqDBA, m.ShiftMinutes = record.Num(85), record.Number{} })},
			"86.76", "reached", "L_EX,8h = 85 + 10 lg(12 h / 8 h) = 86.76 dBA"},
		"A dose at 3 dB exchange without threshold is exact": {[]*record.Measurement{dose(3, 0, 200)}, "88.01", "reached", "L_EX,8h = 85 + 10 lg(200/100) = 88.01 dBA"},
		"With a threshold it is a lower bound, which may suffice": {[]*record.Measurement{dose(3, 80, 100)}, "85.00 to 86.19", "reached",
			"the dose counts from 80 dBA on, so that the level is at least that, and with 80 dBA all the rest at most 86.19 dBA"},
		"A dose of nothing from 80 dBA on leaves at most 80 dBA":        {[]*record.Measurement{dose(3, 80, 0)}, "<=80.00", "not reached", "no level reached 80 dBA"},
		"A dose of a range that ends at 130 dBA is a lower bound alone": {[]*record.Measurement{but(dose(3, 80, 100), func(m *record.Measurement) { m.UpperDB = record.Num(130) })}, ">=85.00", "reached", ""},
		"Or not": {[]*record.Measurement{dose(3, 80, 99)}, "84.96 to 86.16", "unknown: the level on this channel is known only within bounds", ""},
		"So it is where the threshold is not recorded": {[]*record.Measurement{dose(3, -1, 99)}, ">=84.96", "unknown: the level on this channel is known only within bounds",
			"an integration threshold that is not recorded"},
		"Of two thresholds the higher bound counts": {[]*record.Measurement{dose(3, 80, 99), dose(3, 70, 101)}, "85.04 to 85.18", "reached", ""},
		"The equivalent level counts before a dose": {[]*record.Measurement{dose(3, 80, 50), base}, "85.00", "reached", ""},
		"In either order": {[]*record.Measurement{base, dose(3, 0, 50)}, "85.00", "reached", ""},
		"A dose at 5 dB exchange is never converted": {[]*record.Measurement{dose(5, 0, 800)}, "unknown",
			"unknown: the dose was taken with 5 dB exchange rate; it cannot be converted into a level", ""},
		"Nor is one at 4 dB": {[]*record.Measurement{dose(4, 0, 800)}, "unknown",
			"unknown: the dose was taken with 4 dB exchange rate; it cannot be converted into a level", ""},
		"A dose of nothing has no level": {[]*record.Measurement{dose(3, 0, 0)}, "unknown", "unknown: a dose of 0 % has no level", ""},
		"Neither level nor dose": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.LAeqDBA = record.Number{} })}, "unknown",
			"unknown: criterion level or exchange rate is not recorded", ""},
		"A part of the shift tells nothing": {[]*record.Measurement{but(base, func(m *record.Measurement) { m.FullShift = record.No })}, "unknown",
			"unknown: the sample is not marked as covering the full shift", ""},
	} {
		t.Run(name, func(t *testing.T) {
			g := group("g1")
			g.ShiftMinutes = record.Num(720)
			records := []record.Record{g}
			for _, m := range c.rows {
				row := *m
				records = append(records, &row)
			}
			d := byLevel(85).judge(t, records...).group()
			assert.Equal(t, c.level, levelText(d.Now.Channels["day"]))
			assert.Equal(t, c.verdict, verdictOn(d))
			assert.Contains(t, working(d.Now.Channels["day"]), c.working)
		})
	}
}

// levelText writes a level to 0.01 dB, or its bounds.
func levelText(l dossier.Level) string {
	two := func(n record.Number) string { return fmt.Sprintf("%.2f", n.Value) }
	switch {
	case l.LevelDBA.Known:
		return two(l.LevelDBA)
	case l.AtLeast.Known && l.AtMost.Known:
		return two(l.AtLeast) + " to " + two(l.AtMost)
	case l.AtLeast.Known:
		return ">=" + two(l.AtLeast)
	case l.AtMost.Known:
		return "<=" + two(l.AtMost)
	}
	return "unknown"
}

func TestLevelWithoutAnyShiftLength(t *testing.T) {
	m := but(leveled("m1", "2020-01-10", 99), func(m *record.Measurement) { m.ShiftMinutes = record.Number{} })
	d := byLevel(85).judge(t, group("g1"), m).group()
	assert.Equal(t, "unknown: the length of the shift is not recorded", verdictOn(d))
}

func TestLevelAboveIsNotLevelReached(t *testing.T) {
	for level, want := range map[float64]string{87: "not reached", 87 + 1e-10: "not reached", 87.001: "reached"} {
		assert.Equal(t, want, verdictOn(byLevel(87, above).judge(t, group("g1"), leveled("m1", "2020-01-10", level)).group()), level)
	}
}

// TestWeeklyLevels takes the worked examples of the reference sheet, section 3 (computed): 85 dB on 4 days is 84.031,
// on 6 days 85.792, 90 dB on 3 days 87.782.
func TestWeeklyLevels(t *testing.T) {
	for _, c := range []struct {
		laeq, days    float64
		level, reason string
	}{
		{85, 4, "84.03", "not reached"}, {85, 5, "85.00", "reached"}, {85, 6, "85.79", "reached"}, {90, 3, "87.78", "reached"},
		{85, 4.5, "85.00", "reached"}, // half days count as days
		{85, -1, "unknown", "unknown: the days worked in a week are not recorded for the group g1"},
		{85, 0, "unknown", "unknown: the days worked in a week are not recorded for the group g1"},
	} {
		g := group("g1")
		g.DaysPerWeek = record.Number{Value: c.days, Known: c.days >= 0}
		d := byLevel(85, weekly).judge(t, g, leveled("m1", "2020-01-10", c.laeq)).group()
		assert.Equal(t, c.level, levelText(d.Now.Channels["day"]), c)
		assert.Equal(t, c.reason, verdictOn(d), c)
	}
	four := group("g1")
	four.DaysPerWeek = record.Num(4)
	bound := but(leveled("m1", "2020-01-10", 0), func(m *record.Measurement) {
		m.LAeqDBA, m.CriterionDB, m.ExchangeDB, m.ThresholdDB, m.DosePct = record.Number{}, record.Num(85), record.Num(3), record.Num(80), record.Num(125)
	})
	lower := byLevel(85, weekly).judge(t, four, bound).group()
	assert.Equal(t, "85.00 to 85.98", levelText(lower.Now.Channels["day"]), "bounds of the day give those of the week")
	assert.Equal(t, "L_EX,w = L_EX,8h + 10 lg(4/5), at least 85.00 dBA (4 days a week alike)", lower.Now.Channels["day"].Working[2])
	g := group("g1")
	g.DaysPerWeek, g.ShiftMinutes = record.Num(4), record.Num(600)
	d := byLevel(85, weekly).judge(t, g, but(leveled("m1", "2020-01-10", 85), func(m *record.Measurement) { m.ShiftMinutes = record.Number{} })).group()
	assert.Equal(t, []string{
		"L_EX,8h = 85 + 10 lg(10 h / 8 h) = 85.97 dBA", "L_EX,w = 85.97 + 10 lg(4/5) = 85.00 dBA (4 days a week alike)",
		"for information: in a shift of 10 h a steady level of 85 − 10 lg(4/5) − 10 lg(10 h / 8 h) = 85.0 dBA reaches 85 dBA",
	}, d.Now.Channels["day"].Working)
}

func TestOwnLevelIsTakenInTheWeekOfItsGroup(t *testing.T) {
	g1, g2 := group("g1"), group("g2")
	g1.DaysPerWeek, g2.DaysPerWeek = record.Num(5), record.Num(2)
	mine := func(id, date string) *record.Measurement {
		return but(leveled(id, date, 87), func(m *record.Measurement) { m.Group, m.WorkerID = "", "w1" })
	}
	d := byLevel(85, weekly).judge(t, g1, g2, hired("2020-01-01"), assigned("g1", "2020-01-01", "2020-12-31"), assigned("g2", "2021-01-01"),
		mine("o1", "2020-03-01"), mine("o2", "2021-03-01")).worker()
	require.Len(t, d.Exposures, 2)
	assert.Equal(t, "87.00", levelText(d.Exposures[0].Channels["day"]))
	assert.Equal(t, "83.02", levelText(d.Exposures[1].Channels["day"]))
	assert.Equal(t, []string{"2020-01-01..2020-12-31"}, enrolledText(d.Enrolled))
	require.Len(t, d.Results, 1)
	assert.Equal(t, record.Number{}, d.Results[0].Dose)
	assert.InDelta(t, 87, d.Results[0].LevelDBA.Value, 1e-9)
}

func TestRepresentativePartIsProjected(t *testing.T) {
	part := but(measured("m1", "g1", "2020-01-10", 30), func(m *record.Measurement) {
		m.FullShift, m.RunMinutes, m.ShiftMinutes, m.Representative = record.Unanswered, record.Num(240), record.Num(480), record.Yes
	})
	d := judge(t, "2024-01-01", group("g1"), part).group()
	assert.Equal(t, "60", d.Now.Channels["action"].DosePct.String())
	assert.Equal(t, []string{inForce + ".."}, shown(d.Exposed["action"]))
	// A dose of 60 % in 4 h read both ways is the example of the reference sheet, section 2.1; this is half of it.
	assert.Equal(t, []string{
		"dose 30 % measured in 240 min (as measured, the rest quiet: TWA 81.3 dBA; projected: TWA 86.3 dBA); the sample stands for the shift of 480 min, so the dose is 30 · 480 / 240 = 60 %",
		"TWA = 16.61 · lg(60/100) + 90 = 86.3 dBA",
	}, d.Now.Channels["action"].Working)
	for name, c := range map[string]struct {
		change func(*record.Measurement)
		reason string
	}{
		"not marked":        {func(m *record.Measurement) { m.Representative = record.Unanswered }, "the sample is not marked as covering the full shift"},
		"marked as not":     {func(m *record.Measurement) { m.Representative = record.No }, "the sample is not marked as covering the full shift"},
		"run not recorded":  {func(m *record.Measurement) { m.RunMinutes = record.Number{} }, "the sample is marked representative, but its run time or the length of its shift is not recorded"},
		"shift not":         {func(m *record.Measurement) { m.ShiftMinutes = record.Number{} }, "the sample is marked representative, but its run time or the length of its shift is not recorded"},
		"never ran":         {func(m *record.Measurement) { m.RunMinutes = record.Num(0) }, "the sample is marked representative, but its run time or the length of its shift is not recorded"},
		"ran for the shift": {func(m *record.Measurement) { m.RunMinutes, m.FullShift = record.Num(480), record.No }, "the sample is not marked as covering the full shift"},
	} {
		d := judge(t, "2024-01-01", group("g1"), but(part, c.change)).group()
		assert.Equal(t, "unknown: "+c.reason, verdictOn(d), name)
	}
	none := judge(t, "2024-01-01", group("g1"), but(part, func(m *record.Measurement) { m.DosePct = record.Num(0) })).group()
	assert.Equal(t, "0", none.Now.Channels["action"].DosePct.String())

	level := byLevel(85).judge(t, group("g1"), but(part, func(m *record.Measurement) { m.LAeqDBA = record.Num(86) })).group()
	assert.Equal(t, []string{
		"LAeq 86 dBA measured in 240 min (as measured, the rest quiet: L_EX,8h = 86 + 10 lg(4 h / 8 h) = 82.99 dBA); the sample stands for the shift of 480 min",
		"L_EX,8h = 86 + 10 lg(8 h / 8 h) = 86.00 dBA",
	}, level.Now.Channels["day"].Working)
}

// TestFiftyPercentTrap: a dose of exactly 50 % has an average of 84.99989 dBA by the coefficient of the law, and reaches
// the action level all the same, as measured, projected, from tasks and from its own average.
func TestFiftyPercentTrap(t *testing.T) {
	projected := but(measured("m1", "g1", "2020-01-10", 12.5), func(m *record.Measurement) {
		m.FullShift, m.RunMinutes, m.ShiftMinutes, m.Representative = record.Unanswered, record.Num(150), record.Num(600), record.Yes
	})
	average := but(measured("m1", "g1", "2020-01-10", 0), func(m *record.Measurement) { m.DosePct, m.TWADBA = record.Number{}, record.Num(85) })
	for name, rec := range map[string]record.Record{
		"measured": measured("m1", "g1", "2020-01-10", 50), "projected": projected, "average": average,
		"tasks": &record.Task{Group: "g1", Task: "a", Date: day("2020-01-10"), Minutes: record.Num(480), Samples: record.List{"85", "85", "85"}},
	} {
		d := judge(t, "2024-01-01", group("g1"), rec).group()
		assert.Equal(t, "reached", verdictOn(d), name)
		assert.Equal(t, "85", d.Now.Channels["action"].TWADBA.String(), name)
	}
	// Statistics compare averages: that of 50 % is not above that of 50 %.
	d := judge(t, "2024-01-01", group("g1"), measured("m1", "g1", "2020-01-10", 50), measured("m2", "g1", "2020-01-11", 50), measured("m3", "g1", "2020-01-12", 50)).group()
	assert.Equal(t, record.Num(0), d.Statistics.Exceedance)
}
