package acoustics_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/acoustics"
)

// TestTableC4 takes all 180 cells of ISO 9612:2009 Table C.4 (secondary source), and compares each with Land's
// exact limit of the energy mean less the estimate, over 1.65 (computed by another program).
func TestTableC4(t *testing.T) {
	rows := vectors(t, "iso9612_c1u1.csv")
	require.Len(t, rows, 180)
	agree := 0
	for _, r := range rows {
		n, u1, cell := int(r.number(t, "N")), r.number(t, "u1_dB"), r.number(t, "c1u1_dB_table")
		got, clamped, ok := acoustics.SamplingUncertainty(n, u1)
		require.True(t, ok)
		assert.False(t, clamped)
		assert.Equal(t, cell, got, "%v", r)
		assert.Equal(t, r["exceeds_3.5_revise_plan"] == "yes", got > 3.5, "%v", r)

		upper, err := acoustics.Group{N: n, SD: u1}.EnergyMeanLimit(0.95)
		require.NoError(t, err)
		exact := (upper - math.Ln10/20*u1*u1) / 1.65
		assert.InDelta(t, r.number(t, "c1u1_land_exact"), exact, 6e-4, "%v", r)
		assert.InDelta(t, cell, exact, 0.156, "%v", r)
		if math.Abs(cell-exact) <= 0.05 {
			agree++
		}
	}
	assert.Equal(t, 147, agree, "cells that are the exact value rounded")
}

func TestSamplingUncertaintyBetweenCells(t *testing.T) {
	for _, c := range []struct {
		n       int
		u1      float64
		want    float64
		clamped bool
	}{
		{6, 0, 0, false}, {3, 0.25, 0.3, false}, {6, 2.25, 1.65, false}, // halves between two columns
		{11, 2, 0.85, false}, {13, 1.25, 0.4, false}, // halves between two rows, and in both
		{30, 6, 2.0, false}, {31, 6, 2.0, true}, {100, 1, 0.2, true}, {3, 6.1, 46.5, true}, {3, 900, 46.5, true},
	} {
		got, clamped, ok := acoustics.SamplingUncertainty(c.n, c.u1)
		require.True(t, ok)
		assert.InDelta(t, c.want, got, 1e-12, "%v", c)
		assert.Equal(t, c.clamped, clamped, "%v", c)
	}
	for _, n := range []int{-1, 0, 2} {
		_, _, ok := acoustics.SamplingUncertainty(n, 1)
		assert.False(t, ok)
	}
	for _, u1 := range []float64{-0.1, math.NaN(), math.Inf(1)} {
		_, _, ok := acoustics.SamplingUncertainty(6, u1)
		assert.False(t, ok)
	}
}

func TestMoreSamplesNeverAddUncertainty(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		n, u1 := rapid.IntRange(3, 40).Draw(t, "n"), rapid.Float64Range(0, 7).Draw(t, "u1")
		few, _, _ := acoustics.SamplingUncertainty(n, u1)
		more, _, _ := acoustics.SamplingUncertainty(n+1, u1)
		wider, _, _ := acoustics.SamplingUncertainty(n, u1+0.1)
		require.LessOrEqual(t, more, few+1e-12)
		require.GreaterOrEqual(t, wider, few-1e-12)
	})
}

// annexes are the examples of ISO 9612:2009 (secondary source) with figures computed by another program.
type annexes struct {
	Tasks struct {
		Tasks []struct {
			Samples []float64 `json:"samples"`
			Hours   float64   `json:"T_h"`
			Range   []float64 `json:"T_range"`
		} `json:"tasks"`
		LEX      float64        `json:"LEX8h_printed"`
		WithoutT float64        `json:"U_printed_case_a"`
		WithT    float64        `json:"U_printed_case_b"`
		Computed map[string]any `json:"computed"`
	} `json:"annex_D_task"`
	Job     sampledAnnex       `json:"annex_E_job"`
	FullDay sampledAnnex       `json:"annex_F_fullday"`
	U2      map[string]float64 `json:"u2"`
}

type sampledAnnex struct {
	Samples  []float64          `json:"samples"`
	Hours    float64            `json:"Te_h"`
	LEX      float64            `json:"LEX8h_printed"`
	U        float64            `json:"U_printed"`
	Computed map[string]float64 `json:"computed"`
}

func (a annexes) tasks(withTime bool) []acoustics.Task {
	var tasks []acoustics.Task
	for _, task := range a.Tasks.Tasks {
		one := acoustics.Task{Levels: task.Samples, Minutes: task.Hours * 60}
		if withTime && task.Range != nil {
			one.Low, one.High = task.Range[0]*60, task.Range[1]*60
		}
		tasks = append(tasks, one)
	}
	return tasks
}

// TestAnnexD: tasks of a welder, 84.3 dB(A), U 2.7 dB without and 3.2 dB with the uncertainty of the times.
func TestAnnexD(t *testing.T) {
	var a annexes
	object(t, "iso9612_examples.json", &a)
	without, err := acoustics.TaskBased(a.tasks(false), acoustics.Exposimeter)
	require.NoError(t, err)
	got, err := acoustics.TaskBased(a.tasks(true), acoustics.Exposimeter)
	require.NoError(t, err)
	tenth := func(x float64) float64 { return math.Round(x*10) / 10 }
	assert.Equal(t, a.Tasks.LEX, tenth(got.LEX))
	assert.Equal(t, a.Tasks.WithoutT, tenth(without.Expanded))
	assert.Equal(t, a.Tasks.WithT, tenth(got.Expanded))

	single := func(key string) float64 { return a.Tasks.Computed[key].(float64) }
	assert.InDelta(t, single("LEX8h"), got.LEX, 6e-4)
	assert.InDelta(t, single("u_a"), without.Standard, 6e-4)
	assert.InDelta(t, single("U_a"), without.Expanded, 6e-4)
	assert.InDelta(t, single("u_b"), got.Standard, 6e-4)
	assert.InDelta(t, single("U_b"), got.Expanded, 6e-4)
	for i, task := range got.Tasks {
		each := func(key string) float64 { return a.Tasks.Computed[key].([]any)[i].(float64) }
		assert.InDelta(t, each("LpAeq"), task.Level, 6e-4)
		assert.InDelta(t, each("contribution"), task.Contribution, 6e-3)
		assert.InDelta(t, each("c1a"), task.C1a, 6e-5)
		assert.InDelta(t, each("u1a"), task.U1a, 6e-4)
		assert.InDelta(t, each("c1b"), task.C1b, 6e-4)
		assert.InDelta(t, each("u1b"), task.U1b, 1e-12)
	}
	working := strings.Join(got.Working(), "\n")
	assert.Contains(t, working, "task 3: L = 90.10 dB(A) from 6 samples, 90.10 + 10 lg(1.5 h / 8 h) = 82.83 dB(A)")
	assert.Contains(t, working, "c1b = 4.34 · 0.7144 / 1.5 h = 2.0669 dB/h, u1b = 0.5 h")
	assert.Contains(t, working, "U = 1.65 · 1.9606 = 3.23 dB")
	assert.Equal(t, []string{`task 1 has 1 sample; at least 3 are needed`}, got.PlanFaults(), "task 3 spans 7 dB but has 6 samples")
}

// TestAnnexesEAndF: a group of 18 at a production line and forklift drivers. Annex E rounds the mean to 88.4
// dB before it adds the time and prints 88.1 dB; without rounding it is 88.16.
func TestAnnexesEAndF(t *testing.T) {
	var a annexes
	object(t, "iso9612_examples.json", &a)
	for strategy, annex := range map[acoustics.Strategy]sampledAnnex{acoustics.JobBased: a.Job, acoustics.FullDay: a.FullDay} {
		got, err := acoustics.Sampled(strategy, annex.Samples, annex.Hours*60, acoustics.Exposimeter)
		require.NoError(t, err)
		assert.InDelta(t, annex.LEX, got.LEX, 0.1)
		assert.Equal(t, annex.U, math.Round(got.Expanded*10)/10)
		for key, value := range map[string]float64{"LpAeqTe": got.Level, "u1": got.U1, "c1u1": got.C1U1, "LEX8h": got.LEX, "u": got.Standard, "U": got.Expanded} {
			assert.InDelta(t, annex.Computed[key], value, 6e-4, "%s %s", strategy, key)
		}
		assert.Contains(t, got.Working()[len(got.Working())-1], "U = 1.65")
	}
	job, _ := acoustics.Sampled(acoustics.JobBased, a.Job.Samples, a.Job.Hours*60, acoustics.Exposimeter)
	assert.Equal(t, []string{
		"L = energy mean of 6 samples = 88.44 dB(A)", "L_EX,8h = 88.44 + 10 lg(7.5 h / 8 h) = 88.16 dB(A)",
		"u1 = standard deviation of the samples = 2.0027 dB", "c1u1 = 1.4027 dB for 6 samples (Table C.4)",
		"u² = 1.4027² + 1.5² + 1² = 5.2175, u = 2.2842 dB", "U = 1.65 · 2.2842 = 3.77 dB",
	}, job.Working())
	assert.Empty(t, job.PlanFaults(18, 10.75*60))
}

// TestInstrumentUncertainty: ISO 9612:2009 Table C.5 (secondary source).
func TestInstrumentUncertainty(t *testing.T) {
	var a annexes
	object(t, "iso9612_examples.json", &a)
	for key, kind := range map[string]acoustics.Instrument{
		"class1_slm": acoustics.ClassOneMeter, "class2_slm": acoustics.ClassTwoMeter, "personal_exposimeter": acoustics.Exposimeter,
	} {
		u2, ok := kind.Uncertainty()
		assert.True(t, ok)
		assert.Equal(t, a.U2[key], u2)
	}
	_, ok := acoustics.Instrument("telephone").Uncertainty()
	assert.False(t, ok)
}

func TestLEXDoesNotDependOnHowTasksAreCut(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		tasks := make([]acoustics.Task, rapid.IntRange(1, 6).Draw(t, "tasks"))
		var day []acoustics.Segment
		total := 0.0
		for i := range tasks {
			level, minutes := rapid.Float64Range(60, 110).Draw(t, "level"), rapid.Float64Range(1, 200).Draw(t, "minutes")
			tasks[i] = acoustics.Task{Levels: []float64{level}, Minutes: minutes}
			day = append(day, acoustics.Segment{Level: level, Minutes: minutes})
			total += minutes
		}
		whole, err := acoustics.TaskBased(tasks, acoustics.ClassOneMeter)
		require.NoError(t, err)
		level, _ := acoustics.LevelOfSegments(day)
		lex, _ := acoustics.LEX8h(level, total)
		require.InDelta(t, lex, whole.LEX, 1e-9)
		half := tasks[0]
		half.Minutes /= 2
		tasks[0] = half
		cut, err := acoustics.TaskBased(append(tasks, half), acoustics.ClassOneMeter)
		require.NoError(t, err)
		require.InDelta(t, whole.LEX, cut.LEX, 1e-9)
	})
}
