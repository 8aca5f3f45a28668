package reporttest

import (
	"bytes"
	"encoding/csv"
	"flag"
	"index/suffixarray"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
)

var update = flag.Bool("update", false, "write the golden files")

// Format is one form of a report.
type Format interface {
	Name() string
	Write(w io.Writer, r *finding.Report) error
}

// Written writes a report twice and gives it, once it is sure that both are the same.
func Written(t *testing.T, f Format, r *finding.Report) []byte {
	t.Helper()
	var first, second bytes.Buffer
	require.NoError(t, f.Write(&first, r))
	require.NoError(t, f.Write(&second, r))
	require.True(t, bytes.Equal(first.Bytes(), second.Bytes()), "the same report was written in two ways")
	return first.Bytes()
}

// Golden compares the odd report and the empty one with the golden files testdata/odd.NAME and
// testdata/empty.NAME of the package under test. With -update it writes them.
func Golden(t *testing.T, f Format) {
	t.Helper()
	for name, r := range map[string]*finding.Report{"odd": Odd(), "empty": Empty()} {
		got, path := Written(t, f, r), filepath.Join("testdata", name+"."+f.Name())
		if *update {
			require.NoError(t, os.WriteFile(path, got, 0o644))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.True(t, bytes.Equal(want, got), "%s differs; look at it and run go test with -update\n%s", path, got)
	}
}

// Demo judges the demo program and lists every finding. The folder is that of the package under test,
// internal/report/NAME.
func Demo(t *testing.T, health bool) *finding.Report {
	t.Helper()
	p, problems := program.Load(demo)
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	r, err := judge.Check(t.Context(), judge.Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, All: true, Portraits: true, HealthDetail: health, Version: "1.0.0"})
	require.NoError(t, err)
	return r
}

const demo = "../../../testdata/demo"

// Private looks whether the report of the demo program, written without a word about hearing, holds a birth
// date, or hearing thresholds of any worker. It cannot pass for want of secrets to look for.
func Private(t *testing.T, f Format) {
	t.Helper()
	for _, leak := range leaks(t, Written(t, f, Demo(t, false))) {
		t.Errorf("the report in the form %s gives away %q", f.Name(), leak)
	}
}

// words stand before figures of hearing in some form.
var words = []string{`"health"`, `"left_baseline"`, "left_db", "right_db", "Hearing:", ",health\r\n"}

// leaks lists what a text gives away of the demo program.
func leaks(t *testing.T, text []byte) []string {
	t.Helper()
	secrets := append(Secrets(t), words...)
	require.Greater(t, len(secrets), 300)
	index := suffixarray.New(text)
	return slices.DeleteFunc(secrets, func(s string) bool { return len(index.Lookup([]byte(s), 1)) == 0 })
}

// Secrets lists what no report of the demo program may hold: birth dates in several ways of writing, and the
// thresholds of ears as lists.
func Secrets(t *testing.T) []string {
	t.Helper()
	var secrets []string
	for _, row := range table(t, "workers.csv") {
		if born := row["birth_date"]; born != "" {
			secrets = append(secrets, born, strings.ReplaceAll(born, "-", ""))
		}
	}
	for _, row := range table(t, "audiograms.csv") {
		for _, ear := range []string{"left.", "right."} {
			var levels []string
			for _, hz := range []string{"500", "1000", "2000", "3000", "4000", "6000"} {
				levels = append(levels, row[ear+hz])
			}
			if slices.Contains(levels, "") {
				continue
			}
			for _, between := range []string{",", ", ", ";", " ", " + "} {
				secrets = append(secrets, strings.Join(levels, between))
			}
		}
	}
	return secrets
}

// table reads a file of the demo program, a map of cells a row.
func table(t *testing.T, name string) []map[string]string {
	t.Helper()
	file, err := os.Open(filepath.Join(demo, "records", name))
	require.NoError(t, err)
	defer file.Close()
	rows, err := csv.NewReader(file).ReadAll()
	require.NoError(t, err)
	var out []map[string]string
	for _, row := range rows[1:] {
		cells := map[string]string{}
		for i, head := range rows[0] {
			cells[head] = row[i]
		}
		out = append(out, cells)
	}
	return out
}
