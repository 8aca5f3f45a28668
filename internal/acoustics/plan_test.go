package acoustics_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
)

// TestMinimumSampling takes every row of ISO 9612:2009 Table 1 (secondary source).
func TestMinimumSampling(t *testing.T) {
	rows := vectors(t, "iso9612_min_duration.csv")
	require.Len(t, rows, 11)
	for _, r := range rows {
		minutes, split, ok := acoustics.MinimumSampling(int(r.number(t, "group_size")))
		require.True(t, ok)
		if r["min_cumulative_hours"] == "17 or split the group" {
			assert.True(t, split)
			assert.Equal(t, 17.0, minutes/60)
			continue
		}
		assert.False(t, split)
		assert.Equal(t, r.number(t, "min_cumulative_hours"), minutes/60, "%v", r)
	}
	_, _, ok := acoustics.MinimumSampling(0)
	assert.False(t, ok)
}

func TestTaskPlanFaults(t *testing.T) {
	r, err := acoustics.TaskBased([]acoustics.Task{
		{Name: "cutting", Levels: []float64{85.1, 86, 88.1}, Minutes: 240, ShortestSample: 5},
		{Name: "sweeping", Levels: []float64{70, 71}, Minutes: 60, ShortestSample: 2},
		{Name: "grinding", Levels: []float64{95, 95.5, 96}, Minutes: 3, ShortestSample: 3},
	}, acoustics.ClassOneMeter)
	require.NoError(t, err)
	assert.Equal(t, []string{
		`the samples of task "cutting" lie 3.0 dB apart; take at least 3 more, measure longer or split the task`,
		`task "sweeping" has 2 samples; at least 3 are needed`,
		`a sample of task "sweeping" lasts 2 minutes; it should last 5 or the whole task`,
	}, r.PlanFaults(), "the whole of the 3 minutes of grinding was measured")
}

func TestSampledPlanFaults(t *testing.T) {
	faults := func(s acoustics.Strategy, levels []float64, workers int, minutes float64) []string {
		r, err := acoustics.Sampled(s, levels, 480, acoustics.Exposimeter)
		require.NoError(t, err)
		return r.PlanFaults(workers, minutes)
	}
	assert.Equal(t, []string{
		"there are 3 samples; the job-based strategy needs at least 5",
		"the samples last 10 h together; a group of 18 needs at least 10.75 h",
		"the sampling alone has an uncertainty of 12.8 dB, above 3.5 dB; take more samples or form other groups",
	}, faults(acoustics.JobBased, []float64{82, 85.2, 88.3}, 18, 600))
	assert.Equal(t, []string{"the samples last 10 h together; a group of 41 needs at least 17 h or has to be split"},
		faults(acoustics.JobBased, []float64{85, 85, 85, 86, 86}, 41, 600))
	assert.Equal(t, []string{"the number of workers in the group is not known, so the sampling time cannot be checked"},
		faults(acoustics.JobBased, []float64{85, 85, 85, 86, 86}, 0, 600))
	assert.Equal(t, []string{"the length of the samples is not known, so the sampling time cannot be checked"},
		faults(acoustics.JobBased, []float64{85, 85, 85, 86, 86}, 5, 0))
	assert.Empty(t, faults(acoustics.FullDay, []float64{85, 85.5, 86}, 0, 0))
	assert.Equal(t, []string{"the days lie 3.0 dB apart; measure at least 2 more"}, faults(acoustics.FullDay, []float64{85.1, 86, 88.1}, 0, 0)[:1])
	assert.Empty(t, faults(acoustics.FullDay, []float64{85, 86, 88, 86, 86, 87}, 0, 0))
	assert.Contains(t, faults(acoustics.FullDay, []float64{70, 90, 85}, 0, 0),
		"3 samples with a standard deviation of 10.4 dB lie outside Table C.4, so the uncertainty is rough")
	clamped, _ := acoustics.Sampled(acoustics.FullDay, []float64{70, 90, 85}, 480, acoustics.Exposimeter)
	assert.Contains(t, clamped.Working(), "the samples lie outside Table C.4, whose last row or column was used")
}

func TestSampledErrors(t *testing.T) {
	three := []float64{85, 86, 87}
	for want, call := range map[string]func() error{
		`"walking" is not a sampling strategy`: func() error {
			_, err := acoustics.Sampled("walking", three, 480, acoustics.Exposimeter)
			return err
		},
		`the uncertainty of an instrument of the kind "telephone" is not known`: func() error {
			_, err := acoustics.Sampled(acoustics.FullDay, three, 480, "telephone")
			return err
		},
		"an uncertainty needs at least 3 samples; 2 are given": func() error {
			_, err := acoustics.Sampled(acoustics.FullDay, three[:2], 480, acoustics.Exposimeter)
			return err
		},
		"a sample has no level": func() error {
			_, err := acoustics.Sampled(acoustics.FullDay, []float64{85, math.Inf(-1), 90}, 480, acoustics.Exposimeter)
			return err
		},
		"a working day of 0 minutes is not above 0 and at most 24 hours": func() error {
			_, err := acoustics.Sampled(acoustics.JobBased, three, 0, acoustics.Exposimeter)
			return err
		},
	} {
		assert.EqualError(t, call(), want)
	}
}

func TestTaskTimes(t *testing.T) {
	share := func(task acoustics.Task) acoustics.TaskShare {
		task.Levels = []float64{85}
		r, err := acoustics.TaskBased([]acoustics.Task{task}, acoustics.ClassOneMeter)
		require.NoError(t, err)
		return r.Tasks[0]
	}
	middle := share(acoustics.Task{Low: 60, High: 120})
	assert.Equal(t, 90.0, middle.Minutes)
	assert.Equal(t, 0.5, middle.U1b, "half of the range, in hours")
	assert.Equal(t, 100.0, share(acoustics.Task{Minutes: 100, Low: 60, High: 120}).Minutes)
	several := share(acoustics.Task{Durations: []float64{60, 120, 180}})
	assert.Equal(t, 120.0, several.Minutes)
	assert.InDelta(t, math.Sqrt(2.0/6), several.U1b, 1e-12, "sqrt((1 + 0 + 1)/(3 * 2)) h")
	assert.Zero(t, share(acoustics.Task{Durations: []float64{60}}).U1b)
}

func TestTaskErrors(t *testing.T) {
	one := []float64{85}
	for name, c := range map[string]struct {
		tasks []acoustics.Task
		want  string
	}{
		"none":           {nil, "there are no tasks, so there is no exposure level"},
		"no samples":     {[]acoustics.Task{{Minutes: 60}}, "task 1 has no samples"},
		"no level":       {[]acoustics.Task{{Name: "saw", Levels: []float64{math.NaN()}, Minutes: 60}}, `task "saw" has a sample without a level`},
		"no time":        {[]acoustics.Task{{Levels: one}}, "task 1 lasts 0 minutes, which is not above 0 and at most 24 hours"},
		"negative time":  {[]acoustics.Task{{Levels: one, Minutes: 60}, {Levels: one, Minutes: -5}}, "task 2 lasts -5 minutes, which is not above 0 and at most 24 hours"},
		"two times":      {[]acoustics.Task{{Levels: one, Minutes: 60, Durations: []float64{50}}}, "task 1 has its time given in more than one way"},
		"outside":        {[]acoustics.Task{{Levels: one, Minutes: 60, Low: 70, High: 80}}, "task 1 lasts 60 minutes, which is not within its range from 70 to 80"},
		"turned":         {[]acoustics.Task{{Levels: one, Low: 80, High: 70}}, "task 1 lasts 75 minutes, which is not within its range from 80 to 70"},
		"bad duration":   {[]acoustics.Task{{Levels: one, Durations: []float64{50, -1}}}, "task 1 has a duration that is negative or missing"},
		"day of 25 h":    {[]acoustics.Task{{Levels: one, Minutes: 900}, {Levels: one, Minutes: 600}}, "the tasks last 1500 minutes together; a day has 1440"},
		"no upper bound": {[]acoustics.Task{{Levels: one, Low: 60, High: math.NaN()}}, "task 1 lasts NaN minutes, which is not within its range from 60 to NaN"},
	} {
		_, err := acoustics.TaskBased(c.tasks, acoustics.Exposimeter)
		assert.EqualError(t, err, c.want, name)
	}
	_, err := acoustics.TaskBased([]acoustics.Task{{Levels: one, Minutes: 60}}, "")
	assert.EqualError(t, err, `the uncertainty of an instrument of the kind "" is not known`)
}
