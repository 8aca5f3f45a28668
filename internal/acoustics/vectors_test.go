package acoustics_test

import (
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"strconv"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
)

// The scales of the United States. Sources: 29 CFR 1910.95(c)(1), (d)(2)(i) and Table G-16a for the action
// level; Table G-16, which starts at 90 dB, for the limit; 30 CFR 62.101 for the mine scales. The lower end
// of 80 dB of the recommended exposure limit is from memory.
var (
	actionLevel = acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 80, Upper: 130}
	limit       = acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 90}
	mineLimit   = acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 90, Upper: 140}
	recommended = acoustics.Scale{Criterion: 85, Exchange: 3, Threshold: 80, Upper: 140}
)

type row map[string]string

func (r row) number(t *testing.T, column string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(r[column], 64)
	require.NoError(t, err, "column %s", column)
	return x
}

// segments reads a list of pairs of level and hours.
func (r row) segments(t *testing.T, column string) []acoustics.Segment {
	t.Helper()
	var pairs [][2]float64
	require.NoError(t, json.Unmarshal([]byte(r[column]), &pairs))
	var day []acoustics.Segment
	for _, p := range pairs {
		day = append(day, acoustics.Segment{Level: p[0], Minutes: 60 * p[1]})
	}
	return day
}

// object reads a vector file in JSON into v.
func object(t *testing.T, name string, v any) {
	t.Helper()
	b, err := os.ReadFile(filepath.Join("..", "..", "testdata", "vectors", name))
	require.NoError(t, err)
	require.NoError(t, json.Unmarshal(b, v))
}

func vectors(t *testing.T, name string) []row {
	t.Helper()
	f, err := os.Open(filepath.Join("..", "..", "testdata", "vectors", name))
	require.NoError(t, err)
	defer f.Close()
	reader := csv.NewReader(f)
	reader.Comment = '#' // how the rows were made
	lines, err := reader.ReadAll()
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
