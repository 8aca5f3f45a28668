package audiometry_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/audiometry"
)

// career gives the audiograms of a worker: twelve tests of two ears that grow slowly worse.
func career(t testing.TB) (left, right []*audiometry.Ear) {
	for i := range 12 {
		left = append(left, ear(t, testedFrequencies, []int{10, 5, 10, 15, 15 + 5*(i/4), 20, 15}))
		right = append(right, ear(t, testedFrequencies, []int{5, 5, 10, 10, 15, 20 + 5*(i/6), 20}))
	}
	return left, right
}

// TestJudgingAllocatesNothing: unless a frequency is missing, or a single frequency shows a shift.
func TestJudgingAllocatesNothing(t *testing.T) {
	left, _ := career(t)
	for _, s := range []audiometry.Scheme{standard, significant, consecutive, rapidLoss} {
		allocated := testing.AllocsPerRun(100, func() {
			for _, now := range left {
				s.Judge(left[0], now, nil, 15)
			}
		})
		assert.Zero(t, allocated, s.Rule)
	}
	assert.Equal(t, audiometry.Yes, standard.Judge(left[0], left[11], nil, 10.0/3).Verdict)
}

func benchmarkCareer(b *testing.B, s audiometry.Scheme, amountDB float64) {
	left, right := career(b)
	b.ReportAllocs()
	for b.Loop() {
		for i := range left {
			s.Judge(left[0], left[i], nil, amountDB)
			s.Judge(right[0], right[i], nil, amountDB)
		}
	}
}

// The benchmarks judge a worker's twelve audiograms, both ears: 24 judgements in each.
func BenchmarkCareerMean(b *testing.B)     { benchmarkCareer(b, standard, 10) }
func BenchmarkCareerAny(b *testing.B)      { benchmarkCareer(b, significant, 15) }
func BenchmarkCareerAdjacent(b *testing.B) { benchmarkCareer(b, consecutive, 15) }
func BenchmarkCareerSum(b *testing.B)      { benchmarkCareer(b, rapidLoss, 30) }
func BenchmarkCareerShifted(b *testing.B)  { benchmarkCareer(b, significant, 5) }

func BenchmarkObserve(b *testing.B) {
	x := ordinary(b)
	b.ReportAllocs()
	for b.Loop() {
		audiometry.Observe(x)
	}
}
