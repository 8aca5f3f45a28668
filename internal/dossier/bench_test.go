package dossier

import (
	"testing"

	"hearduty/internal/acoustics"
	"hearduty/internal/audiometry"
)

// BenchmarkComputations does the sums of one worker: twelve audiograms of two ears held against a baseline,
// and five days of eight segments each on two dose channels and as L_EX,8h.
func BenchmarkComputations(b *testing.B) {
	scheme := audiometry.Scheme{Rule: audiometry.Mean, Frequencies: []int{2000, 3000, 4000}}
	var baseline audiometry.Ear
	tests := make([]audiometry.Ear, 12)
	for i := range baseline {
		baseline[i] = audiometry.Threshold{Tenths: 100, State: audiometry.Measured}
		for t := range tests {
			tests[t][i] = audiometry.Threshold{Tenths: int16(100 + 10*t), State: audiometry.Measured}
		}
	}
	aging := []int{1, 2, 2}
	day := make([]acoustics.Segment, 8)
	for i := range day {
		day[i] = acoustics.Segment{Level: 80 + 2.5*float64(i), Minutes: 60}
	}
	scales := []acoustics.Scale{{Criterion: 90, Exchange: 5, Threshold: 80, Upper: 130}, {Criterion: 90, Exchange: 5, Threshold: 90}}
	b.ReportAllocs()
	for b.Loop() {
		for t := range tests {
			for range 2 {
				scheme.Judge(&baseline, &tests[t], aging, 10)
			}
		}
		for range 5 {
			for _, s := range scales {
				pct, _ := s.Dose(day)
				s.TWAReported(pct)
			}
			level, _ := acoustics.LevelOfSegments(day)
			acoustics.LEX8h(level, 480)
		}
	}
}
