package intake

import (
	"context"
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/program"
	"hearduty/internal/record"
)

// readText reads one file of the given kind and extension and checks that no row was lost.
func readText(t require.TestingT, dir string, kind record.Kind, extension string, text []byte) ([]record.Record, *Ledger) {
	file := filepath.Join(dir, "x"+extension)
	require.NoError(t, os.WriteFile(file, text, 0o600))
	p := &program.Program{Sites: []program.Site{{ID: "s"}}, Sources: []program.Source{{Path: file, Shown: "x" + extension, Kind: kind}}}
	var records []record.Record
	l, err := Read(context.Background(), p, func(r record.Record) error { records = append(records, r); return nil })
	require.Equal(t, len(l.Unreadable) > 0, err != nil)
	in, rejects := l.Inputs[0], 0
	for _, r := range l.Rejects {
		if r.Row > 0 {
			rejects++
		}
	}
	require.Equal(t, in.Rows, in.Accepted+in.Rejected+in.NotData)
	require.Equal(t, in.Rejected, rejects)
	require.Len(t, records, in.Accepted)
	return records, l
}

var junk = []string{"a", "1", "s", "2020-01-02", ",", ",", ",", "\n", "\n", "\r\n", "\"", "\"", "\"\"", "=", " ", "\x00", ";", "\t", "\xff", "é", "NR>100", "200"}

func TestNoRowOfGarbageIsLost(t *testing.T) {
	dir := t.TempDir()
	rapid.Check(t, func(t *rapid.T) {
		body := strings.Join(rapid.SliceOfN(rapid.SampledFrom(junk), 0, 80).Draw(t, "body"), "")
		records, l := readText(t, dir, "worker", ".csv", []byte("worker_id,site,hired_on,job_title\n"+body))
		if strings.ContainsAny(body, "\"\r\xff") || len(l.Unreadable) > 0 {
			return
		}
		lines := 0 // without quotes, every line that is not blank is a row
		for line := range strings.SplitSeq(body, "\n") {
			if strings.Trim(line, " ,\t") != "" {
				lines++
			}
		}
		require.Equal(t, lines, l.Inputs[0].Accepted+l.Inputs[0].Rejected, "%d records", len(records))
	})
}

func TestNoLineOfNDJSONIsLost(t *testing.T) {
	dir := t.TempDir()
	pieces := []string{"{", "}", "[", "]", ":", ",", "\n", "\n", "\"", `"worker_id"`, `"1"`, `{"worker_id":"1","site":"s","hired_on":"2020-01-01"}`, "null", "1e9", "\\", "\\u00"}
	rapid.Check(t, func(t *rapid.T) {
		text := strings.Join(rapid.SliceOfN(rapid.SampledFrom(pieces), 0, 60).Draw(t, "text"), "")
		_, l := readText(t, dir, "worker", ".ndjson", []byte(text))
		lines := 0
		for line := range strings.SplitSeq(text, "\n") {
			if line != "" {
				lines++
			}
		}
		require.Equal(t, lines, l.Inputs[0].Accepted+l.Inputs[0].Rejected)
		readText(t, dir, "worker", ".json", []byte(text))
	})
}

func FuzzCSV(f *testing.F) {
	seed(f, ".csv")
	f.Fuzz(func(t *testing.T, text []byte) {
		readText(t, t.TempDir(), "worker", ".csv", text)
	})
}

func FuzzNDJSON(f *testing.F) {
	seed(f, ".ndjson")
	seed(f, ".json")
	f.Add([]byte(`{"audiogram_id":"A","worker_id":"1","date":"2025-03-04","left":{"500":10},"x":[{}]}`))
	table, _ := record.TableOf("audiogram")
	f.Fuzz(func(t *testing.T, text []byte) {
		readText(t, t.TempDir(), "audiogram", ".ndjson", text)
		readText(t, t.TempDir(), "training", ".json", text)
		var r row
		newObjectReader(table).read(text, &r)
		if r.fault == nil {
			require.True(t, json.Valid(text))
		}
	})
}

func seed(f *testing.F, extension string) {
	files, err := filepath.Glob(filepath.Join(hostile, "*"+extension))
	require.NoError(f, err)
	for _, file := range files {
		text, err := os.ReadFile(file)
		require.NoError(f, err)
		if len(text) < 4<<10 {
			f.Add(text)
		}
	}
}
