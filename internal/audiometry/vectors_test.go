package audiometry_test

import (
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

// shiftFrequencies are those of 29 CFR 1910.95(g)(10)(i), in Hz.
var shiftFrequencies = []int{2000, 3000, 4000}

type row map[string]string

func (r row) whole(t *testing.T, column string) int {
	t.Helper()
	n, err := strconv.Atoi(r[column])
	require.NoError(t, err, "column %s", column)
	return n
}

func (r row) number(t *testing.T, column string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(r[column], 64)
	require.NoError(t, err, "column %s", column)
	return x
}

func (r row) list(t *testing.T, column string) []int {
	t.Helper()
	var list []int
	require.NoError(t, json.Unmarshal([]byte(r[column]), &list))
	return list
}

func vectors(t *testing.T, name string) []row {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "vectors", name))
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	var rows []row
	for _, line := range lines[1:] {
		r := row{}
		for i, column := range lines[0] {
			r[column] = line[i]
		}
		rows = append(rows, r)
	}
	return rows
}

// appendixF reads Tables F-1 and F-2 of 29 CFR 1910.95 App. F.
func appendixF(t *testing.T) *audiometry.AgeTable {
	t.Helper()
	table := audiometry.AgeTable{FromAge: 20, Values: map[string]map[int][]int{"male": {}, "female": {}}}
	for _, r := range vectors(t, "age_correction_us.csv") {
		rows := table.Values[r["sex"]]
		for _, hz := range []int{1000, 2000, 3000, 4000, 6000} {
			require.Len(t, rows[hz], r.whole(t, "age")-table.FromAge)
			rows[hz] = append(rows[hz], r.whole(t, "f"+strconv.Itoa(hz)))
		}
	}
	return &table
}

// ear fills the thresholds at freqs from dB or from entries as a record writes them.
func ear[T int | string](t require.TestingT, freqs []int, entries []T) *audiometry.Ear {
	var e audiometry.Ear
	for i, hz := range freqs {
		for j, f := range audiometry.Frequencies {
			if f != hz {
				continue
			}
			switch x := any(entries[i]).(type) {
			case int:
				e[j] = audiometry.Threshold{Tenths: int16(10 * x), State: audiometry.Measured}
			case string:
				parsed, err := audiometry.ParseThreshold(x)
				require.NoError(t, err)
				e[j] = parsed
			}
		}
	}
	return &e
}
