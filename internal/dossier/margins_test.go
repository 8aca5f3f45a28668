package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// byClass takes the level of the day with the allowances of TRLV Lärm 2, table 3.
func byClass() asked {
	a := byLevel(85, func(m *dossier.ExposureMeasures) {
		m.Margins = map[string]string{"1": "class1", "2": "class2", "3": "class3"}
	})
	a.law = dated{limits{osha(), 85}, map[string]datedValue{
		"class1": {from: "1990-01-01", value: 0}, "class2": {from: "1990-01-01", value: 3}, "class3": {from: "1990-01-01", value: 6},
	}}
	return a
}

// TestAccuracyClassOfTasks: a day described by tasks is as exact as the least exact of its samples.
func TestAccuracyClassOfTasks(t *testing.T) {
	sample := func(id, class string) *record.Measurement {
		m := leveled(id, "2019-11-15", 83)
		m.Type, m.AccuracyClass = "task", class
		return m
	}
	task := func(name, samples string) *record.Task {
		return &record.Task{Group: "g1", Task: name, Date: day("2019-11-15"), Minutes: record.Num(240), Samples: record.List{samples}}
	}
	for name, c := range map[string]struct {
		first, second string // classes
		bare          bool   // whether the second task has a bare level
		exposed, open int
	}{
		"both of class 1":     {"1", "1", false, 0, 0},
		"one of class 2":      {"1", "2", false, 1, 0},
		"one without a class": {"1", "", false, 0, 1},
		"a bare level":        {"1", "1", true, 0, 1},
	} {
		t.Run(name, func(t *testing.T) {
			second := task("b", "s2")
			if c.bare {
				second = task("b", "83")
			}
			w := byClass().judge(t, inGroup(nil, sample("s1", c.first), sample("s2", c.second), task("a", "s1"), second)...).worker()
			assert.Len(t, w.Exposed["action"], c.exposed)
			assert.Len(t, open(w.ExposureUnknown["action"]), c.open)
		})
	}
}

// TestAccuracyClassAtTheEar: the allowance is for comparing with action values; at the ear the best estimate counts.
func TestAccuracyClassAtTheEar(t *testing.T) {
	a := byClass()
	a.measures.Protection = dossier.ProtectionMeasures{Rating: "nrr", Channel: "day"}
	for _, class := range []string{"1", "3", ""} {
		m := leveled("m1", "2019-11-15", 95)
		m.AccuracyClass = class
		w := a.judge(t, inGroup(nil, m, issued("p1", "2020-02-01", ""), model("p1", 17))...).worker()
		assert.Equal(t, []string{"95", "85"}, []string{w.Protection.Exposure.String(), w.Protection.Under.String()}, "class %q", class)
	}
	change := &record.Change{ChangeID: "c1", Date: day("2020-03-01"), Group: "g1", RaisesExposure: "yes"}
	m := leveled("m1", "2019-11-15", 95)
	m.AccuracyClass = "1"
	w := a.judge(t, inGroup(nil, m, change, issued("p1", "2020-02-01", ""), model("p1", 17))...).worker()
	assert.Equal(t, []string{"exposure without the protector"}, w.Protection.Missing, "after a change that may have raised it nobody knows")
}
