package dossier_test

import (
	"fmt"
	"math/rand/v2"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// ofWorker is a test of a worker of s1, who is hired with it.
func ofWorker(worker, date, tester string, left, right audiometry.Ear) []record.Record {
	a := audiogram("a-"+worker+date, date, "periodic", left, right)
	a.WorkerID, a.TesterID = worker, tester
	return []record.Record{&record.Worker{WorkerID: worker, Site: "s1", HiredOn: day("2020-01-01")}, a}
}

// alike finds the copies at a site and writes tester and tests of each group.
func alike(t *testing.T, site, asOf string, records ...record.Record) []string {
	t.Helper()
	store := dossier.NewStore()
	for i, rec := range records {
		rec.SetAt(record.Origin{Row: int32(i + 1)})
		require.NoError(t, store.Add(rec))
	}
	registers, err := store.Registers()
	require.NoError(t, err)
	b := dossier.NewGround(registers, osha().Measures, osha(), day(asOf)).Builder(dossier.Place{ID: site}, nil)
	var c dossier.Copies
	all := func(do func(*dossier.WorkerRecords)) {
		for i := range store.Shards() {
			workers, err := store.Shard(i)
			require.NoError(t, err)
			for _, w := range workers {
				do(w)
			}
		}
	}
	all(func(w *dossier.WorkerRecords) { c.Add(b, w) })
	shared := c.Shared()
	all(func(w *dossier.WorkerRecords) { c.Collect(b, w, shared) })
	out := []string{}
	groups := c.Alike()
	for _, g := range groups {
		text := g.Tester
		for _, x := range g.Tests {
			assert.Equal(t, "audiogram/"+x.Rec.AudiogramID, x.Ref)
			text += " " + strings.TrimPrefix(x.Ref, "audiogram/a-")
		}
		out = append(out, text)
		assert.Equal(t, "results_identical_across_workers", g.Observation().Kind)
	}
	require.Len(t, shared, len(groups), "counted as listed")
	return out
}

func TestThresholdsOfSeveralWorkersAlike(t *testing.T) {
	l, r := usualLeft, usualRight
	one := func(worker string) []record.Record { return ofWorker(worker, "2021-02-01", "t1", l, r) }
	three := slices.Concat(one("v"), one("w"), one("x"))
	for name, c := range map[string]struct {
		records []record.Record
		want    []string
	}{
		"three":                             {three, []string{"t1 v2021-02-01 w2021-02-01 x2021-02-01"}},
		"two":                               {slices.Concat(one("v"), one("w")), []string{}},
		"one of them twice":                 {slices.Concat(one("v"), one("w"), ofWorker("w", "2022-02-01", "t1", l, r)[1:]), []string{}},
		"one tester over the years":         {slices.Concat(one("v"), ofWorker("w", "2023-02-01", "t1", l, r), ofWorker("x", "2022-02-01", "t1", l, r)), []string{"t1 v2021-02-01 x2022-02-01 w2023-02-01"}},
		"three testers":                     {slices.Concat(one("v"), ofWorker("w", "2021-02-01", "t2", l, r), ofWorker("x", "2021-02-01", "t3", l, r)), []string{}},
		"no tester, on one day":             {slices.Concat(ofWorker("v", "2021-02-01", "", l, r), ofWorker("w", "2021-02-01", "", l, r), ofWorker("x", "2021-02-01", "", l, r)), []string{" v2021-02-01 w2021-02-01 x2021-02-01"}},
		"no tester, on several days":        {slices.Concat(ofWorker("v", "2021-02-01", "", l, r), ofWorker("w", "2021-02-02", "", l, r), ofWorker("x", "2021-02-01", "", l, r)), []string{}},
		"one threshold differs":             {slices.Concat(one("v"), one("w"), ofWorker("x", "2021-02-01", "t1", l, earBut(r, 6000, audiometry.Threshold{Tenths: 250, State: audiometry.Measured}))), []string{}},
		"no response is no threshold":       {slices.Concat(one("v"), one("w"), ofWorker("x", "2021-02-01", "t1", l, earBut(r, 6000, audiometry.Threshold{Tenths: 200, State: audiometry.NoResponse}))), []string{}},
		"ears changed places":               {slices.Concat(one("v"), one("w"), ofWorker("x", "2021-02-01", "t1", r, l)), []string{}},
		"hearing that many have":            {slices.Concat(ofWorker("v", "2021-02-01", "t1", earOf(5), earOf(5, 10, 15)), ofWorker("w", "2021-02-01", "t1", earOf(5), earOf(5, 10, 15)), ofWorker("x", "2021-02-01", "t1", earOf(5), earOf(5, 10, 15))), []string{}},
		"one of them found invalid":         {append(three, &record.FollowUp{WorkerID: "x", AudiogramID: "a-x2021-02-01", Type: "invalidated", Date: day("2021-03-01")}), []string{}},
		"found invalid after the as-of day": {append(three, &record.FollowUp{WorkerID: "x", AudiogramID: "a-x2021-02-01", Type: "invalidated", Date: day("2026-03-01")}), []string{"t1 v2021-02-01 w2021-02-01 x2021-02-01"}},
	} {
		t.Run(name, func(t *testing.T) {
			assert.Equal(t, c.want, alike(t, "s1", "2026-01-01", c.records...))
		})
	}
	assert.Empty(t, alike(t, "s2", "2026-01-01", three...), "at another site")
	assert.Empty(t, alike(t, "s1", "2021-01-31", three...), "before the tests")
	rand.New(rand.NewPCG(5, 6)).Shuffle(len(three), func(i, j int) { three[i], three[j] = three[j], three[i] })
	assert.Equal(t, []string{"t1 v2021-02-01 w2021-02-01 x2021-02-01"}, alike(t, "s1", "2026-01-01", three...), "whatever the order")
}

// TestMarksTellThresholdsApart: among many tests that differ in one place none is taken for another.
func TestMarksTellThresholdsApart(t *testing.T) {
	var records []record.Record
	for i, ear := range []audiometry.Ear{usualLeft, usualRight} {
		for hz := range ear {
			for tenths := int16(-100); tenths < 1200; tenths += 50 {
				changed := ear
				changed[hz] = audiometry.Threshold{Tenths: tenths, State: audiometry.Measured}
				for copy := range 3 {
					left, right := changed, usualRight
					if i == 1 {
						left, right = usualLeft, changed
					}
					records = append(records, ofWorker(fmt.Sprintf("w%d-%d-%d-%d", i, hz, tenths, copy), "2021-02-01", "t1", left, right)...)
				}
			}
		}
	}
	distinct := map[[2]audiometry.Ear]bool{}
	for _, r := range records {
		if a, ok := r.(*record.Audiogram); ok {
			distinct[[2]audiometry.Ear{a.Left, a.Right}] = true
		}
	}
	assert.Len(t, alike(t, "s1", "2026-01-01", records...), len(distinct))
}
