package pull

import (
	"bytes"
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
