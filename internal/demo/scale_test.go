package demo

import (
	"path/filepath"
	"runtime"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/record"
)

func TestScaleWritesEveryKindOfTheWorkersAskedFor(t *testing.T) {
	one, two := filepath.Join(t.TempDir(), "one"), filepath.Join(t.TempDir(), "two")
	require.NoError(t, WriteScale(one, 1230))
	require.NoError(t, WriteScale(two, 1230))
	files := read(t, one)
	sameFiles(t, files, read(t, two))
	require.Equal(t, 1230+1, strings.Count(files["records/workers.csv"], "\n"))
	require.Equal(t, 25+1, strings.Count(files["records/groups.csv"], "\n"))
	require.Equal(t, 2, strings.Count(files["program.yaml"], "{id: site-"))
	rows := 0
	for name, text := range files {
		if name != "program.yaml" {
			rows += strings.Count(text, "\n") - 1
		}
	}
	require.InDelta(t, 45, float64(rows)/1230, 5, "rows a worker")
	require.ErrorContains(t, WriteScale(t.TempDir(), 0), "must be 1 or more")
}

func TestScaleKeepsNoRecord(t *testing.T) {
	if testing.Short() {
		t.Skip("makes a hundred thousand rows")
	}
	var before, after runtime.MemStats
	runtime.GC()
	runtime.ReadMemStats(&before)
	rows := 0
	scaleRecords(3000, func(record.Record) { rows++ })
	runtime.GC()
	runtime.ReadMemStats(&after)
	require.Greater(t, rows, 100_000)
	require.Less(t, int64(after.HeapAlloc)-int64(before.HeapAlloc), int64(1<<20))
}
