package acoustics_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
)

// computation is one that may run for every worker and year; allocations says how many it needs however many
// levels go in.
type computation struct {
	name        string
	allocations float64
	run         func()
}

func computations(t require.TestingT) []computation {
	levels := make([]float64, 480)
	peaks := make([]acoustics.Peak, 480)
	day := make([]acoustics.Segment, 480)
	tasks := make([]acoustics.Task, 8)
	grid := make([]acoustics.Bands, 64)
	for i := range levels {
		levels[i] = 75 + float64(i*7%30)
		peaks[i] = acoustics.Peak{Level: levels[i] + 30, Weighting: acoustics.C}
		day[i] = acoustics.Segment{Level: levels[i], Minutes: 1}
	}
	for i := range tasks {
		tasks[i] = acoustics.Task{Name: "task", Levels: levels[i : i+9], Low: 30, High: 60}
	}
	for i := range grid {
		for j := range grid[i] {
			grid[i][j] = 10 + float64(4*j) + float64(i*5%11)
		}
	}
	group, err := acoustics.Describe([]float64{88.1, 86.1, 89.7, 86.5, 91.1, 86.7})
	require.NoError(t, err)
	rating := acoustics.HML{High: 30, Medium: 24, Low: 18}
	return []computation{
		{"energy mean", 0, func() { acoustics.EnergyMean(levels) }},
		{"dose", 0, func() { actionLevel.Dose(day) }},
		{"level of segments", 0, func() { acoustics.LevelOfSegments(day) }},
		{"partial sample", 0, func() { actionLevel.Partial(60, 240, 480) }},
		{"week", 0, func() { acoustics.WeeklyLEX(levels[:5], 5) }},
		{"highest peak", 0, func() { acoustics.HighestPeak(peaks) }},
		{"no doubt", 0, func() { actionLevel.DoubtTWA(60, 86.3, 240) }},
		{"full days", 0, func() { acoustics.Sampled(acoustics.FullDay, levels, 480, acoustics.Exposimeter) }},
		{"tasks", 1, func() { acoustics.TaskBased(tasks, acoustics.Exposimeter) }},
		{"describe group", 0, func() { acoustics.Describe(levels) }},
		{"mean limit", 0, func() { group.MeanLimit(0.95) }},
		{"energy mean limit", 0, func() { group.EnergyMeanLimit(0.95) }},
		{"tolerance limit", 0, func() { group.ToleranceLimit(0.95, 0.95) }},
		{"exceedance limit", 0, func() { group.ExceedanceLimit(90, 0.95) }},
		{"NRR", 0, func() { acoustics.UnderNRR(100, acoustics.A, 25) }},
		{"HML", 0, func() { acoustics.UnderHML(100, 103, rating) }},
		{"octave", 0, func() { acoustics.UnderOctave(grid[5], grid[0]) }},
		{"rate subjects", 0, func() { acoustics.RateSubjects(grid) }},
		{"wear time", 0, func() { acoustics.UnderSNR(100, 30).RealWorld(4).WornFor(0.9) }},
	}
}

func TestNothingAllocatesPerLevel(t *testing.T) {
	for _, c := range computations(t) {
		assert.LessOrEqual(t, testing.AllocsPerRun(10, c.run), c.allocations, c.name)
	}
}

func BenchmarkComputations(b *testing.B) {
	for _, c := range computations(b) {
		b.Run(c.name, func(b *testing.B) {
			b.ReportAllocs()
			for b.Loop() {
				c.run()
			}
		})
	}
}
