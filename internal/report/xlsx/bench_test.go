package xlsx

import (
	"fmt"
	"io"
	"runtime"
	"slices"
	"testing"
	"time"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

// large is a report of so many findings, each with the texts of a common one.
func large(n int) *finding.Report {
	r := reporttest.Odd()
	of := slices.DeleteFunc(r.Findings, func(f finding.Finding) bool { return len(f.Evidence) == 0 })
	r.Findings = make([]finding.Finding, n)
	for i := range r.Findings {
		f := of[i%len(of)]
		f.ID, f.Subject.ID = fmt.Sprintf("f-%016x", i), fmt.Sprintf("%06d", i)
		r.Findings[i] = f
	}
	return r
}

// BenchmarkWrite writes many findings and tells by how much the heap grew at most, as seen every few milliseconds.
func BenchmarkWrite(b *testing.B) {
	for _, n := range []int{2_000, 20_000, 200_000} {
		r := large(n)
		b.Run(fmt.Sprint(n), func(b *testing.B) {
			var peak uint64
			for b.Loop() {
				peak = max(peak, heapDuring(func() {
					if err := (Format{}).Write(io.Discard, r); err != nil {
						b.Fatal(err)
					}
				}))
			}
			b.ReportMetric(float64(peak)/(1<<20), "MB-heap")
			b.ReportMetric(float64(n*b.N)/b.Elapsed().Seconds(), "findings/s")
		})
	}
}

// heapDuring gives by how many bytes the heap grows at most while something runs.
func heapDuring(run func()) uint64 {
	var m runtime.MemStats
	runtime.GC()
	runtime.ReadMemStats(&m)
	before, peak := m.HeapAlloc, uint64(0)
	stop, done := make(chan struct{}), make(chan struct{})
	go func() {
		defer close(done)
		for {
			select {
			case <-stop:
				return
			case <-time.After(5 * time.Millisecond):
				runtime.ReadMemStats(&m)
				peak = max(peak, m.HeapAlloc)
			}
		}
	}()
	run()
	close(stop)
	<-done
	return peak - min(before, peak)
}
