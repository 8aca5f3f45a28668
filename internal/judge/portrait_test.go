package judge

import (
	"encoding/json"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// demoReport judges the demo program with portraits.
func demoReport(t *testing.T, health bool) *finding.Report {
	t.Helper()
	p, problems := program.Load("../../testdata/demo")
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	r, err := Check(t.Context(), Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, Portraits: true, HealthDetail: health})
	require.NoError(t, err)
	return r
}

func TestPortraitForEachSubjectWithAFinding(t *testing.T) {
	r := demoReport(t, true)
	drawn := map[portraitKey]*finding.Portrait{}
	for i := range r.Portraits {
		p := &r.Portraits[i]
		key := portraitKey{p.Site, p.Subject}
		assert.Nil(t, drawn[key], "%v is drawn twice", key)
		drawn[key] = p
	}
	wanted := map[portraitKey]bool{}
	for _, f := range r.Findings {
		key := portraitKey{f.Site, f.Subject}
		wanted[key] = true
		assert.NotNil(t, drawn[key], "no portrait of %v", key)
	}
	assert.Len(t, r.Portraits, len(wanted), "a portrait without a finding")
	var tests, spells, results, ears, lines int
	for _, p := range r.Portraits {
		tests += len(p.Tests)
		spells += len(p.Spells)
		if p.Exposure != nil {
			results, ears, lines = results+len(p.Exposure.Results), ears+len(p.Exposure.Ears), lines+len(p.Exposure.Lines)
		}
		for _, e := range p.Events {
			assert.LessOrEqual(t, e.Date, r.AsOf)
			assert.NotZero(t, e.Row, "an event cannot be traced: %v", e)
		}
	}
	for name, n := range map[string]int{"tests": tests, "spells": spells, "results": results, "ears": ears, "lines": lines} {
		assert.Positive(t, n, name)
	}
	_, err := json.Marshal(r)
	assert.NoError(t, err, "a figure that JSON cannot hold")
}

func TestPortraitsHoldNoThresholdsUnlessAsked(t *testing.T) {
	for _, p := range demoReport(t, false).Portraits {
		assert.Empty(t, p.Tests, p.Subject)
	}
}

// A dose of 50 % is a TWA of 85 dBA and one of 100 % is 90 dBA (29 CFR 1910.95(c)(1), Table A-1).
func TestLevelLinesStandOnTheScaleOfTheLaw(t *testing.T) {
	for _, p := range demoReport(t, false).Portraits {
		if p.Exposure == nil || p.Site != "kiln-hill" {
			continue
		}
		require.Len(t, p.Exposure.Lines, 2)
		assert.Equal(t, finding.Line{Name: "action level", DB: 85, Cite: p.Exposure.Lines[0].Cite, Grade: "action"}, p.Exposure.Lines[0])
		assert.InDelta(t, 90, p.Exposure.Lines[1].DB, 1e-9)
		return
	}
	t.Fatal("no group has a portrait")
}
