package pull

import (
	"bytes"
	"encoding/csv"
	"fmt"
	"math/big"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// filled writes the sheet and fills in what faulty gives for each row.
func filled(t *testing.T, s *Sheet, fill func(row int, cell map[string]*string)) string {
	t.Helper()
	var b bytes.Buffer
	require.NoError(t, writeCSV(&b, s, 0))
	rows, err := csv.NewReader(strings.NewReader(strings.TrimPrefix(b.String(), "\ufeff"))).ReadAll()
	require.NoError(t, err)
	for i := range rows[1:] {
		cells := map[string]*string{}
		for j, name := range rows[0] {
			cells[name] = &rows[i+1][j]
		}
		fill(i+1, cells)
	}
	path := filepath.Join(t.TempDir(), "sheet.csv")
	var out bytes.Buffer
	w := csv.NewWriter(&out)
	w.Comma = ';' // as a spreadsheet program of some countries saves it
	require.NoError(t, w.WriteAll(rows))
	require.NoError(t, os.WriteFile(path, out.Bytes(), 0o600))
	return path
}

func TestRead(t *testing.T) {
	s := drawn(t, func(r *Request) { r.Goal = goal("97.5", "10", 0) })
	r, err := Read(filled(t, s, func(row int, cell map[string]*string) {
		*cell["faulty"], *cell["file_found"] = "no", "Yes"
		*cell["confidence_percent"] = "97,5"
		switch row {
		case 1:
			*cell["faulty"] = "YES"
		case 2:
			*cell["faulty"], *cell["file_found"] = "", "no" // a file that was not found
		}
	}))
	require.NoError(t, err)
	assert.Equal(t, 2, r.Faulty)
	assert.Equal(t, 1, r.NotFound)
	assert.Equal(t, len(s.Files), r.Drawn)
	assert.Equal(t, 30, r.Population)
	assert.Zero(t, r.Goal.Confidence.Cmp(big.NewRat(975, 1000)))
	assert.Equal(t, Part{Words: "north, over the limit level", Drawn: s.Strata[0].Drawn, Faulty: 2}, r.Parts[0])
	var out bytes.Buffer
	require.NoError(t, r.Write(&out, 80))
	assert.Contains(t, out.String(), "With 97.5 % confidence at most")
	assert.Contains(t, out.String(), "north, over the limit level: 2 of")
	assert.Contains(t, out.String(), "1 that could not be found")
}

func TestReadRefuses(t *testing.T) {
	s := drawn(t, nil)
	no := func(cell map[string]*string) { *cell["faulty"] = "no" }
	for _, c := range []struct {
		why  string
		fill func(row int, cell map[string]*string)
	}{
		{"is empty for 1 file; write yes or no for each", func(row int, cell map[string]*string) {
			if row != 3 {
				no(cell)
			}
		}},
		{"row 4: faulty and file_found hold yes or no", func(row int, cell map[string]*string) {
			if no(cell); row == 3 {
				*cell["faulty"] = "perhaps"
			}
		}},
		{"the number 1 stands there twice", func(row int, cell map[string]*string) { no(cell); *cell["number"] = "1" }},
		{"is of another draw", func(row int, cell map[string]*string) {
			if no(cell); row == 5 {
				*cell["population"] = "31"
			}
		}},
		{"are not as they were drawn", func(_ int, cell map[string]*string) { no(cell); *cell["sample"] = "many" }},
		{fmt.Sprintf("holds %d files, but 29 were drawn", len(s.Files)), func(_ int, cell map[string]*string) { no(cell); *cell["sample"] = "29" }},
	} {
		_, err := Read(filled(t, s, c.fill))
		require.Error(t, err, c.why)
		assert.Contains(t, err.Error(), c.why)
	}
	path := filepath.Join(t.TempDir(), "other.csv")
	for text, why := range map[string]string{"a,b\n1,2\n": "has no column number", "": "", "number,faulty,sample,population,confidence_percent,tolerable_percent\n": "holds no files"} {
		require.NoError(t, os.WriteFile(path, []byte(text), 0o600))
		_, err := Read(path)
		require.Error(t, err)
		assert.Contains(t, err.Error(), why)
	}
	_, err := Read(filepath.Join(t.TempDir(), "none.csv"))
	require.Error(t, err)
}

// The three outcomes are told apart: shown, not shown, and more than tolerated.
func TestResult(t *testing.T) {
	for _, c := range []struct {
		population, drawn, faulty int
		want                      string
	}{
		{110, 44, 0, "That is no more than the 5 files (5 %) that are tolerated."},
		{110, 44, 2, "So it is not shown that no more than the 5 files (5 %)"},
		{110, 44, 6, "by the faulty files found alone"},
		{110, 110, 4, "nothing is left to chance: 4 of 110 (3.6 %)"},
		{20, 19, 0, "at most 0 of 20 (0.0 %) files are faulty: if it were one more, a sample like this would hold so few of them in 5.00 % of all draws"},
	} {
		r := Result{Population: c.population, Drawn: c.drawn, Faulty: c.faulty, Goal: goal("95", "5", 0)}
		require.NoError(t, r.Check())
		var out bytes.Buffer
		require.NoError(t, r.Write(&out, 1000))
		assert.Contains(t, out.String(), c.want)
		assert.Contains(t, out.String(), "does not make a site compliant")
	}
	for _, r := range []Result{{0, 1, 0, 0, goal("95", "5", 0), nil}, {10, 11, 0, 0, goal("95", "5", 0), nil}, {10, 5, 6, 0, goal("95", "5", 0), nil}, {10, 0, 0, 0, goal("95", "5", 0), nil}} {
		assert.Error(t, r.Check())
	}
}
