package html

import (
	"flag"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest" // has the flag -update
)

func TestFigures(t *testing.T) {
	worker, deadlines := madeWorker()
	for name, got := range map[string]string{
		"worker":     string(figureOf(worker, deadlines, madeDay)),
		"instrument": string(figureOf(madeInstrument(), nil, madeDay)),
		"group":      string(figureOf(madeGroup(), nil, madeDay)),
		"hearing":    string(figureOf(madeHearing(), nil, madeDay)),
	} {
		path := filepath.Join("testdata", "figure", name+".html")
		if flag.Lookup("update").Value.String() == "true" {
			require.NoError(t, os.MkdirAll(filepath.Dir(path), 0o755))
			require.NoError(t, os.WriteFile(path, []byte(got), 0o644))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		assert.Equal(t, string(want), got, "%s differs; look at it and run go test ./internal/report/html -update", path)
		fitsItsBox(t, got)
	}
}

func TestNothingToDraw(t *testing.T) {
	for name, p := range map[string]*finding.Portrait{
		"no portrait": nil, "empty": {}, "no days": {Spells: []finding.Spell{{Label: "x"}}, Events: []finding.Event{{Label: "y"}}},
		"exposure without results": {Exposure: &finding.Exposure{Unit: "dBA"}},
	} {
		assert.Empty(t, figureOf(p, []*finding.Finding{{Duty: "d"}}, madeDay), name)
	}
}

func TestOddDays(t *testing.T) {
	for name, p := range map[string]*finding.Portrait{
		"one day":               {Events: []finding.Event{{Date: madeDay, Lane: "test", Label: "t", State: "?"}}},
		"only a start":          {Spells: []finding.Spell{{From: onDay("2026-06-30"), Lane: "employment"}}},
		"ends before it begins": {Spells: []finding.Spell{{From: onDay("2026-06-30"), To: onDay("2020-01-01"), Lane: "exposure", Label: "a: b", Grade: "?"}}},
		"no start":              {Spells: []finding.Spell{{To: onDay("2020-01-01"), Lane: "protector", Label: "a long id of a protector"}}},
		"first day of all":      {Spells: []finding.Spell{{From: 1, Lane: "certificate", Label: "c"}}},
		"last day of all":       {Spells: []finding.Spell{{From: onDay("9999-12-31"), Lane: "certificate", Label: "c"}}},
		"a test without levels": {Tests: []finding.Test{{Record: "audiogram/1"}}},
		"results without days":  {Exposure: &finding.Exposure{Results: []finding.Result{{DB: 900}, {DB: -5, Known: "at_least"}}}},
	} {
		for _, day := range []calendar.Date{0, 1, madeDay} {
			p.Subject.Kind = "worker"
			got := string(figureOf(p, nil, day))
			assert.NotEmpty(t, got, name)
			assert.NotContains(t, got, "alarm", name)
			fitsItsBox(t, got)
		}
	}
}

func TestNoThresholdsWithoutTests(t *testing.T) {
	p := madeHearing()
	assert.Contains(t, figureOf(p, nil, madeDay), "dB HL")
	p.Tests = nil
	assert.Empty(t, figureOf(p, nil, madeDay))
}

func TestHearingInWords(t *testing.T) {
	got := string(figureOf(madeHearing(), nil, madeDay))
	for _, want := range []string{"no response to 100", "not tested", "2024-02-11: +12.3\u00a0dB, threshold shift", "after age correction of 3.1 dB", "2026-03-05: −1.7\u00a0dB", "baseline 2020-07-06", "baseline 2024-02-11"} {
		assert.Contains(t, strings.ReplaceAll(got, "&#43;", "+"), want)
	}
	assert.NotContains(t, got, "age correction of 0")
}

// The line of an ear leads neither to a level without response nor over one that was not tested.
func TestLineOfAnEarHasGaps(t *testing.T) {
	hz := []int{500, 1000, 2000, 3000, 4000}
	levels := madeLevels(hz, 5, 10, 90, 20, 25)
	levels[2].State = "no_response"
	line := func() string {
		p := panelOf("w", &sides[0], []*finding.Test{{Record: "r", Date: madeDay, Right: levels}})
		for _, s := range p.Shapes {
			if s.Class == "curve right now" {
				return s.D
			}
		}
		return ""
	}
	assert.Equal(t, path("M", hzPlace(500), dbPlace(5), "L", hzPlace(1000), dbPlace(10), "M", hzPlace(3000), dbPlace(20), "L", hzPlace(4000), dbPlace(25)), line())
	levels[2].State = "not_tested"
	assert.Equal(t, 2, strings.Count(line(), "M"))
	levels[2].State = "measured"
	assert.Equal(t, 1, strings.Count(line(), "M"))
}

// One octave is as wide as 20 dB is high.
func TestProportionOfTheAudiogram(t *testing.T) {
	assert.InDelta(t, dbPlace(40)-dbPlace(20), hzPlace(2000)-hzPlace(1000), 1e-9)
	assert.InDelta(t, hzPlace(250)-hzPlace(125), hzPlace(8000)-hzPlace(4000), 1e-9)
	assert.Greater(t, dbPlace(30), dbPlace(20), "louder is lower")
}

func TestOldBeginningIsCut(t *testing.T) {
	p := &finding.Portrait{Spells: []finding.Spell{{From: onDay("1988-03-01"), Lane: "employment", Label: "employed"}},
		Events: []finding.Event{madeEvent("1988-03-05", "training", "training", "plain", 2), madeEvent("2025-03-05", "training", "training", "plain", 3)}}
	got := string(figureOf(p, nil, madeDay))
	assert.Contains(t, got, "Begins 1988-03-01; the last 12 years are drawn. Earlier events, in the table only: 1.")
	assert.NotContains(t, got, ">1988<")
	assert.Contains(t, got, "training/E-2")
}

func TestDemoFiguresAreSmall(t *testing.T) {
	r := reporttest.Demo(t, false)
	v, err := view(r)
	require.NoError(t, err)
	workers, size := 0, 0
	for _, s := range v.Subjects {
		if s.Portrait == nil {
			continue
		}
		got := string(figureOf(s.Portrait, s.Due, r.AsOf))
		fitsItsBox(t, got)
		if s.Kind == "worker" {
			workers, size = workers+1, size+len(got)
		}
	}
	require.Greater(t, workers, 50)
	assert.Less(t, size/workers, 8<<10, "bytes a worker")
}
