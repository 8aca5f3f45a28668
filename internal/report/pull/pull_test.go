package pull

import (
	"bytes"
	"encoding/csv"
	"flag"
	"fmt"
	"math/big"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/sample"
)

var update = flag.Bool("update", false, "write the golden files")

// people are 30 workers of two sites, with odd ids among them.
func people() *judge.People {
	p := &judge.People{Sites: []finding.Site{{ID: "north", Name: "North <works> & yard"}, {ID: "south"}}, Rejects: 3}
	add := func(site, id string, band judge.Band) {
		p.Members = append(p.Members, judge.Member{Site: site, Worker: id, Band: band, Enrolled: band == judge.OverLimit || band == judge.AtAction,
			Record: finding.Evidence{File: "records/workers.csv", Row: len(p.Members) + 2}})
	}
	for i := range 12 {
		add("north", fmt.Sprintf("%04d", i), judge.OverLimit)
	}
	add("north", "=1+1", judge.AtAction)
	add("north", "<b>9</b>", judge.AtAction)
	for i := range 15 {
		add("south", fmt.Sprintf("S-%02d", i), judge.BelowAction)
	}
	add("south", "x\u202ey\n", judge.UnknownBand)
	return p
}

func request() Request {
	return Request{Program: "Invented & Sons", AsOf: calendar.MustParse("2026-06-30"), Seed: 4711, Goal: goal("95", "10", 0)}
}

func goal(confidence, tolerable string, expect int) sample.Goal {
	c, _ := Percent(confidence)
	t, _ := Percent(tolerable)
	return sample.Goal{Confidence: c, Tolerable: t, Expect: expect}
}

func drawn(t *testing.T, change func(*Request)) *Sheet {
	t.Helper()
	r := request()
	if change != nil {
		change(&r)
	}
	s, err := Draw(people(), r)
	require.NoError(t, err)
	return s
}

func TestGolden(t *testing.T) {
	veiled := func(r *Request) { r.Veiled, r.Goal = true, goal("90", "12.5", 1) }
	for name, s := range map[string]*Sheet{"sheet": drawn(t, nil), "expect": drawn(t, veiled)} {
		for _, f := range Formats {
			var first, second bytes.Buffer
			require.NoError(t, f.Write(&first, s, 80))
			require.NoError(t, f.Write(&second, s, 80))
			require.Equal(t, first.String(), second.String())
			path := filepath.Join("testdata", name+"."+f.Name)
			if *update {
				require.NoError(t, os.WriteFile(path, first.Bytes(), 0o644))
			}
			want, err := os.ReadFile(path)
			require.NoError(t, err)
			assert.Equal(t, string(want), first.String(), "%s differs; look at it and run go test -update", path)
		}
	}
}

// What people write as an id can neither run as a formula, nor become a part of the page, nor steer a terminal.
func TestOddIDs(t *testing.T) {
	s := drawn(t, func(r *Request) { r.Size = 30 })
	var text, page, table bytes.Buffer
	require.NoError(t, writeText(&text, s, 0))
	require.NoError(t, writeHTML(&page, s, 0))
	require.NoError(t, writeCSV(&table, s, 0))
	assert.Contains(t, page.String(), "&lt;b&gt;9&lt;/b&gt;")
	assert.NotContains(t, page.String(), "<b>9")
	assert.Contains(t, page.String(), "North &lt;works&gt; &amp; yard")
	assert.Contains(t, table.String(), ",'=1+1,")
	for _, out := range []string{text.String(), page.String(), table.String()} {
		assert.NotContains(t, out, "\u202e")
	}
	for line := range strings.Lines(text.String()) {
		assert.LessOrEqual(t, len([]rune(strings.TrimSuffix(line, "\n"))), 80)
	}
	assert.NotContains(t, page.String(), "://")
	assert.NotContains(t, page.String(), "<script")
}

func TestDraw(t *testing.T) {
	s := drawn(t, nil)
	assert.Equal(t, 30, s.Population)
	assert.Equal(t, 3, s.Tolerated())
	assert.LessOrEqual(t, s.Missed().Cmp(big.NewRat(5, 100)), 0)
	assert.LessOrEqual(t, s.Shows(), 3)
	n, seen := 0, map[string]bool{}
	for _, of := range s.Strata {
		assert.Positive(t, of.Drawn, "%s %s", of.Site, of.Band)
		for range of.Drawn {
			f := s.Files[n]
			n++
			assert.Equal(t, n, f.Number)
			assert.Equal(t, of.Site, f.Site)
			assert.Equal(t, of.Band, f.Band)
			assert.False(t, seen[f.Site+f.Worker], f.Worker)
			seen[f.Site+f.Worker] = true
		}
	}
	assert.Len(t, s.Files, n)
	assert.Equal(t, s.Files, drawn(t, nil).Files)
	assert.NotEqual(t, s.Files, drawn(t, func(r *Request) { r.Seed = 1 }).Files)
	enrolled := drawn(t, func(r *Request) { r.Enrolled = true })
	assert.Equal(t, 14, enrolled.Population)
	all := drawn(t, func(r *Request) { r.Size = 30 })
	assert.Contains(t, all.promise(), "nothing is left to chance")
	own := drawn(t, func(r *Request) { r.Size = 6 })
	assert.Len(t, own.Files, 8)
	assert.Contains(t, own.promise(), "2 more than asked for, so that every part is seen")
	assert.Equal(t, sample.AtMost(30, 8, 0, own.Goal.Confidence), own.Shows())
	assert.NotContains(t, own.promise(), "was chosen")
}

func TestNothingToDraw(t *testing.T) {
	for _, c := range []struct {
		why    string
		change func(*Request, *judge.People)
	}{
		{"no worker of the sites chosen is employed", func(_ *Request, p *judge.People) { p.Members = nil }},
		{"there are only 30 files to draw from, not 31", func(r *Request, _ *judge.People) { r.Size = 31 }},
		{"of 30 files 3 faulty ones are tolerated, so a sample that may hold 4 shows nothing", func(r *Request, _ *judge.People) { r.Goal.Expect = 4 }},
	} {
		r, p := request(), people()
		c.change(&r, p)
		_, err := Draw(p, r)
		require.Error(t, err)
		assert.Contains(t, err.Error(), c.why)
	}
}

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

func TestPercent(t *testing.T) {
	for text, want := range map[string]*big.Rat{"95": big.NewRat(95, 100), "97.5": big.NewRat(975, 1000), "0": new(big.Rat), "100": nil, "-1": nil, "5%": nil, "1e1": nil, "": nil, "1/3": nil, "99.99999": nil} {
		got, ok := Percent(text)
		require.Equal(t, want != nil, ok, text)
		if ok {
			assert.Zero(t, want.Cmp(got), text)
			assert.Equal(t, text+unit, plainPercent(got))
		}
	}
}
