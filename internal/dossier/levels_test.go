package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// dated is a law whose numbers hold from a day or until a day, beside those of the bundle.
type dated struct {
	limits
	values map[string]datedValue
}

type datedValue struct {
	from, to string
	value    float64
}

func (d dated) Number(name string, on calendar.Date) (float64, bool) {
	v, ok := d.values[name]
	if !ok {
		return d.limits.Number(name, on)
	}
	return v.value, on >= day(v.from) && (v.to == "" || on < day(v.to))
}

func (d dated) Days(name string) []calendar.Date {
	v, ok := d.values[name]
	if !ok {
		return d.limits.Days(name)
	}
	out := []calendar.Date{day(v.from)}
	if v.to != "" {
		out = append(out, day(v.to))
	}
	return out
}

// byLevelOrPeak judges by 85 dBA or a C-weighted peak of 137 dB, each reached.
func byLevelOrPeak() asked {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Channels["peak"] = dossier.Channel{Kind: dossier.HighestChannel, Of: dossier.PeakDBC}
		m.Levels = map[string]dossier.Threshold{
			"daily": {Channel: "day", AtLeast: "action_level"}, "peak": {Channel: "peak", AtLeast: "peak_level"},
			"action": {Any: []string{"daily", "peak"}},
		}
	})
	a.law = dated{limits{osha(), 85}, map[string]datedValue{"peak_level": {from: "1990-01-01", value: 137}}}
	return a
}

// peaking is a measurement of g1 with a level and a peak.
func peaking(id, date string, laeq, peak float64, weighting string) *record.Measurement {
	m := leveled(id, date, laeq)
	m.PeakDB, m.PeakWeighting = record.Num(peak), weighting
	return m
}

func inGroup(change func(*record.Group), more ...record.Record) []record.Record {
	g := group("g1")
	if change != nil {
		change(g)
	}
	return append([]record.Record{hired("2020-01-01"), assigned("g1", "2020-01-01"), g}, more...)
}

func impulsive(a record.Answer) func(*record.Group) {
	return func(g *record.Group) { g.Impulsive = a }
}

func TestLevelOrPeak(t *testing.T) {
	const always = "2020-01-01.."
	for name, c := range map[string]struct {
		records         []record.Record
		exposed, unsure []string
	}{
		"both below":                    {inGroup(nil, peaking("m1", "2019-11-15", 84.9, 136.9, "C")), []string{}, []string{}},
		"the level reaches":             {inGroup(nil, peaking("m1", "2019-11-15", 85, 120, "C")), []string{always}, []string{}},
		"the peak reaches":              {inGroup(nil, peaking("m1", "2019-11-15", 70, 137, "C")), []string{always}, []string{}},
		"another weighting tells none":  {inGroup(nil, peaking("m1", "2019-11-15", 70, 150, "Z")), []string{}, []string{}},
		"no peak, nobody says impulses": {inGroup(nil, leveled("m1", "2019-11-15", 70)), []string{}, []string{}},
		"no peak, no impulses":          {inGroup(impulsive(record.No), leveled("m1", "2019-11-15", 70)), []string{}, []string{}},
		"no peak, but impulses":         {inGroup(impulsive(record.Yes), leveled("m1", "2019-11-15", 70)), []string{}, []string{always}},
		"a peak, but no level":          {inGroup(nil, but(peaking("m1", "2019-11-15", 70, 120, "C"), func(m *record.Measurement) { m.LAeqDBA = record.Number{} })), []string{}, []string{always}},
		"a peak enough, and no level":   {inGroup(nil, but(peaking("m1", "2019-11-15", 70, 140, "C"), func(m *record.Measurement) { m.LAeqDBA = record.Number{} })), []string{always}, []string{}},
		"the peak of a task": {inGroup(nil, leveled("m1", "2019-11-15", 70), but(peaking("m2", "2019-11-16", 70, 138, "C"), func(m *record.Measurement) {
			m.Type, m.FullShift, m.LAeqDBA = "task", record.Unanswered, record.Number{}
		})), []string{always}, []string{}},
	} {
		w := byLevelOrPeak().judge(t, c.records...).worker()
		assert.Equal(t, c.exposed, shown(w.Exposed["action"]), name)
		assert.Equal(t, c.unsure, openText(w.ExposureUnknown["action"]), name)
		assert.Equal(t, c.exposed, enrolledText(w.Enrolled), name)
	}
	w := byLevelOrPeak().judge(t, inGroup(impulsive(record.Yes), leveled("m1", "2019-11-15", 70))...).worker()
	assert.Equal(t, "the noise holds impulses, but no peak level in dB(C) is on record", open(w.ExposureUnknown["action"])[0].Reason)
	w = byLevelOrPeak().judge(t, inGroup(nil, peaking("m1", "2019-11-15", 70, 137, "C"))...).worker()
	require.Len(t, w.Results, 1)
	assert.Equal(t, record.Num(137), w.Results[0].LevelDBA, "the result that enrols is the peak")
	g := byLevelOrPeak().judge(t, inGroup(nil, peaking("m1", "2019-11-15", 70, 137, "C"), peaking("m2", "2019-11-15", 70, 150, "Z"))...).group()
	assert.Equal(t, record.Num(137), g.Measurements[0].PeakDBC)
	assert.Equal(t, record.Num(150), g.Measurements[1].PeakDBZ)
	assert.Equal(t, record.Number{}, g.Measurements[1].PeakDBC)
	assert.Equal(t, record.Yes, g.Measurements[0].Reaches)
	assert.Equal(t, record.No, g.Measurements[1].Reaches)
}

// A law that changes its scale on a day is judged by the one in force: here by doses until 2022-06-16, by levels
// since.
func TestAnotherScaleFromADayOn(t *testing.T) {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Channels["dose"] = dossier.Channel{CriterionDB: 90, ExchangeDB: 5, ThresholdDB: 80}
		m.Levels = map[string]dossier.Threshold{
			"now": {Channel: "day", Above: "new"}, "before": {Channel: "dose", Above: "old"}, "action": {Any: []string{"now", "before"}},
		}
	})
	a.law = dated{limits{osha(), 85}, map[string]datedValue{
		"new": {from: "2022-06-16", value: 85}, "old": {from: "1990-01-01", to: "2022-06-16", value: 100},
	}}
	dose := measured("m1", "g1", "2019-11-15", 101)
	dose.ThresholdDB = record.Num(80)
	w := a.judge(t, inGroup(nil, dose)...).worker()
	assert.Equal(t, []string{"2020-01-01..2022-06-15"}, shown(w.Exposed["action"]))
	assert.Equal(t, []string{"2022-06-16.."}, openText(w.ExposureUnknown["action"]), "a dose at 5 dB exchange tells no level")
	w = a.judge(t, inGroup(nil, dose, leveled("m2", "2022-06-16", 85.1))...).worker()
	assert.Equal(t, []string{"2020-01-01.."}, shown(w.Exposed["action"]))
	w = a.judge(t, inGroup(nil, dose, leveled("m2", "2022-06-16", 85))...).worker()
	assert.Equal(t, []string{"2020-01-01..2022-06-15"}, shown(w.Exposed["action"]), "exactly 85 dBA does not exceed 85 dBA")
}

func TestElectedWeek(t *testing.T) {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Channels["week"] = dossier.Channel{Kind: dossier.LevelChannel, Weekly: true}
		m.Levels = map[string]dossier.Threshold{"action": {Channel: "day", AtLeast: "action_level", Instead: &dossier.Instead{Choice: "age_correction", Channel: "week"}}}
	})
	twoDays := func(g *record.Group) { g.DaysPerWeek = record.Num(2) }
	records := inGroup(twoDays, leveled("m1", "2019-11-15", 88)) // 88 + 10 lg(2/5) = 84.02
	assert.Equal(t, []string{"2020-01-01.."}, shown(a.judge(t, records...).worker().Exposed["action"]))
	a.choices = map[string]any{"age_correction": true}
	assert.Empty(t, a.judge(t, records...).worker().Exposed["action"])
}

func TestAccuracyClasses(t *testing.T) {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Margins = map[string]string{"1": "class1", "2": "class2", "3": "class3"}
	})
	a.law = dated{limits{osha(), 85}, map[string]datedValue{
		"class1": {from: "1990-01-01", value: 0}, "class2": {from: "1990-01-01", value: 3}, "class3": {from: "1990-01-01", value: 6},
	}}
	// TRLV Lärm 2, table 3: 83.0 dBA of class 2 counts as exceeding 85 dBA, of class 1 it does not.
	for _, c := range []struct {
		laeq            float64
		class           string
		exposed, unsure int
	}{
		{83, "1", 0, 0}, {83, "2", 1, 0}, {81.9, "2", 0, 0}, {79, "3", 1, 0}, {78.9, "3", 0, 0},
		{78.9, "", 0, 0}, {79, "", 0, 1}, {84.9, "", 0, 1}, {85, "", 1, 0},
	} {
		m := leveled("m1", "2019-11-15", c.laeq)
		m.AccuracyClass = c.class
		w := a.judge(t, inGroup(nil, m)...).worker()
		assert.Len(t, w.Exposed["action"], c.exposed, "%v class %s", c.laeq, c.class)
		assert.Len(t, open(w.ExposureUnknown["action"]), c.unsure, "%v class %s", c.laeq, c.class)
	}
}

// TestTableOfTimes: NR-15 Annex 1 item 4 sends a level between two rows to the higher one; the sums are worked from
// its rows 85 (8 h), 88 (5 h), 92 (3 h), 98 (1 h 15 min) and 115 (7 min).
func TestTableOfTimes(t *testing.T) {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Channels = map[string]dossier.Channel{"day": {CriterionDB: 85, ExchangeDB: 5, Durations: []dossier.Limit{
			{DBA: 115, Minutes: 7}, {DBA: 85, Minutes: 480}, {DBA: 88, Minutes: 300}, {DBA: 92, Minutes: 180}, {DBA: 98, Minutes: 75},
		}}}
		m.Levels = map[string]dossier.Threshold{"action": {Channel: "day", Above: "action_level"}}
	})
	a.law = limits{osha(), 100}
	task := func(name string, minutes float64, level string) *record.Task {
		return &record.Task{Group: "g1", Task: name, Date: day("2019-11-15"), Minutes: record.Num(minutes), Samples: record.List{level}}
	}
	w := a.judge(t, inGroup(nil, task("a", 120, "88"), task("b", 120, "92"), task("c", 240, "84"))...).worker()
	l := w.Exposures[0].Channels["day"]
	assert.InDelta(t, 100*(2.0/5+2.0/3), l.DosePct.Value, 1e-9)
	assert.Contains(t, working(l), "240 min at 84 dBA (below the table, does not count)")
	w = a.judge(t, inGroup(nil, task("a", 60, "97"))...).worker()
	assert.InDelta(t, 80, w.Exposures[0].Channels["day"].DosePct.Value, 1e-9)
	assert.Empty(t, w.Exposed["action"])
	w = a.judge(t, inGroup(nil, task("a", 7, "116"))...).worker()
	l = w.Exposures[0].Channels["day"]
	assert.Equal(t, record.Num(100), l.AtLeast)
	assert.False(t, l.AtMost.Known)
	assert.Len(t, open(w.ExposureUnknown["action"]), 1, "at least 100 % may be more than 100 %")
}

// A level by equal energy tells a dose at 3 dB exchange within what the threshold itself would give: 100 % of 85 dBA for
// 8 h (98-126, 1.1; secondary source), of which 80 dBA for 8 h is 31.6 %.
func TestLevelAsADose(t *testing.T) {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Channels = map[string]dossier.Channel{"day": {CriterionDB: 85, ExchangeDB: 3, ThresholdDB: 80, UpperDB: 140}}
	})
	a.law = limits{osha(), 100}
	for _, c := range []struct {
		laeq, shift     float64
		exposed, unsure int
	}{
		{84.9, 480, 0, 0}, {85, 480, 0, 1}, {86.1, 480, 0, 1}, {86.2, 480, 1, 0}, {88, 240, 0, 0}, {89, 240, 1, 0}, {84.8, 720, 0, 1}, {85, 720, 1, 0},
	} {
		m := leveled("m1", "2019-11-15", c.laeq)
		m.ShiftMinutes = record.Num(c.shift)
		w := a.judge(t, inGroup(nil, m)...).worker()
		assert.Len(t, w.Exposed["action"], c.exposed, "%v dBA over %v min", c.laeq, c.shift)
		assert.Len(t, open(w.ExposureUnknown["action"]), c.unsure, "%v dBA over %v min", c.laeq, c.shift)
	}
	both := leveled("m1", "2019-11-15", 86.2)
	both.CriterionDB, both.ExchangeDB, both.ThresholdDB, both.DosePct = record.Num(85), record.Num(3), record.Num(80), record.Num(99)
	assert.Empty(t, a.judge(t, inGroup(nil, both)...).worker().Exposed["action"], "the dose itself comes first")
	part := leveled("m1", "2019-11-15", 95)
	part.FullShift = record.No
	assert.Len(t, open(a.judge(t, inGroup(nil, part)...).worker().ExposureUnknown["action"]), 1)
}

// A group of which its own record says that nothing suggests noise, and in which nothing was measured or changed, is at
// no level: monitoring begins where information suggests noise (29 CFR 1910.95(d)(1)).
func TestNothingSuggestsNoise(t *testing.T) {
	said := func(a record.Answer) func(*record.Group) {
		return func(g *record.Group) { g.SuspectedNoisy = a }
	}
	for name, c := range map[string]struct {
		records         []record.Record
		exposed, unsure int
	}{
		"said so":                                   {inGroup(said(record.No)), 0, 0},
		"not said":                                  {inGroup(said(record.Unanswered)), 0, 1},
		"the contrary said":                         {inGroup(said(record.Yes)), 0, 1},
		"said, but measured":                        {inGroup(said(record.No), measured("m1", "g1", "2019-11-15", 75)), 1, 0},
		"said, and measured in vain":                {inGroup(said(record.No), but(measured("m1", "g1", "2019-11-15", 75), func(m *record.Measurement) { m.ExchangeDB = record.Num(3) })), 0, 1},
		"said, but changed":                         {inGroup(said(record.No), changed("c1", "2021-01-01", "yes")), 0, 1},
		"in a group not measured, too":              {inGroup(said(record.No), group("g2"), assigned("g2", "2020-01-01")), 0, 1},
		"the other way round":                       {inGroup(nil, &record.Group{Group: "g2", Site: "s1", SuspectedNoisy: record.No}, assigned("g2", "2020-01-01")), 0, 1},
		"and in a group that says so":               {inGroup(said(record.No), &record.Group{Group: "g2", Site: "s1", SuspectedNoisy: record.No}, assigned("g2", "2020-01-01")), 0, 0},
		"said, but the worker was measured in vain": {inGroup(said(record.No), but(own("m1", "2021-01-01", 75), func(m *record.Measurement) { m.ExchangeDB = record.Num(3) })), 0, 1},
	} {
		w := judge(t, "2024-01-01", c.records...).worker()
		assert.Len(t, w.Exposed["action"], c.exposed, name)
		assert.Len(t, open(w.ExposureUnknown["action"]), c.unsure, name)
	}
	w := judge(t, "2024-01-01", inGroup(said(record.No))...).worker()
	assert.Equal(t, "never measured; the group's record says that nothing suggests noise", w.Exposures[0].Note)
}
