package judge

import (
	"context"
	"path/filepath"
	"runtime"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/demo"
	"hearduty/internal/dossier"
	"hearduty/internal/program"
)

// BenchmarkCheck judges a program of 500 workers with ten years of records each, from files to report, on
// all processors.
func BenchmarkCheck(b *testing.B) {
	const workers = 500
	dir := filepath.Join(b.TempDir(), "scale")
	require.NoError(b, demo.WriteScale(dir, workers))
	p, problems := program.Load(dir)
	require.NoError(b, problems.Err())
	library, err := bundle.Embedded()
	require.NoError(b, err)
	b.ReportAllocs()
	for b.Loop() {
		_, err := Check(context.Background(), Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90})
		require.NoError(b, err)
	}
	b.ReportMetric(float64(b.Elapsed().Microseconds())/float64(b.N*workers), "µs/worker")
	b.ReportMetric(float64(runtime.GOMAXPROCS(0)), "procs")
}

// benchWorkers reads a small program and gives its workers and the bench of its first site.
func benchWorkers(b *testing.B) (*check, *bench, []*dossier.WorkerRecords) {
	dir := filepath.Join(b.TempDir(), "scale")
	require.NoError(b, demo.WriteScale(dir, 100))
	p, problems := program.Load(dir)
	require.NoError(b, problems.Err())
	library, err := bundle.Embedded()
	require.NoError(b, err)
	c, err := newCheck(context.Background(), Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90})
	require.NoError(b, err)
	b.Cleanup(func() { c.store.Close() })
	var workers []*dossier.WorkerRecords
	for i := range c.store.Shards() {
		shard, err := c.store.Shard(i)
		require.NoError(b, err)
		workers = append(workers, shard...)
	}
	return c, c.benches[p.Sites[0].ID][0], workers
}

// BenchmarkDossier makes the dossier of one worker.
func BenchmarkDossier(b *testing.B) {
	_, at, workers := benchWorkers(b)
	b.ReportAllocs()
	i := 0
	for b.Loop() {
		at.builder.Worker(workers[i%len(workers)])
		i++
	}
}

// BenchmarkInput writes one worker's dossier as the input of rules.
func BenchmarkInput(b *testing.B) {
	_, at, workers := benchWorkers(b)
	file := at.builder.Worker(workers[0])
	b.ReportAllocs()
	for b.Loop() {
		Input(file.Input)
	}
}

// BenchmarkRules evaluates all duties of one worker.
func BenchmarkRules(b *testing.B) {
	_, at, workers := benchWorkers(b)
	input := Input(at.builder.Worker(workers[0]).Input)
	b.ReportAllocs()
	for b.Loop() {
		_, err := at.engine.Evaluate(context.Background(), dossier.KindWorker, input)
		require.NoError(b, err)
	}
}

// BenchmarkSettle settles all obligations of one worker and writes the findings that are listed.
func BenchmarkSettle(b *testing.B) {
	c, at, workers := benchWorkers(b)
	file := at.builder.Worker(workers[0])
	answers, err := at.engine.Evaluate(context.Background(), dossier.KindWorker, Input(file.Input))
	require.NoError(b, err)
	b.ReportAllocs()
	for b.Loop() {
		kept := &keeper{check: c, bench: at, file: file, keys: map[string]bool{}}
		s := &settler{bundle: at.bundle, file: file, asOf: c.AsOf, brief: c.brief}
		for _, a := range answers {
			clear(kept.keys)
			for _, x := range settleAnswer(s, a) {
				kept.keep(a.Duty, x.outcome, x.obligation)
			}
		}
	}
}
