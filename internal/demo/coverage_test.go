package demo

import (
	"context"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
)

const law = "us-osha-general-industry"

// judged judges a program under the law of the demo.
func judged(t *testing.T, dir string) (*bundle.Bundle, *finding.Report) {
	t.Helper()
	library, err := bundle.Embedded(law)
	require.NoError(t, err)
	p := sources(dir, "kiln-hill", "larch-street")
	for i := range p.Sites {
		p.Sites[i].Bundles = []string{law}
		p.Sites[i].Choices = map[string]any{"age_correction": false}
	}
	report, err := judge.Check(context.Background(), judge.Options{Program: p, Library: library, AsOf: asOf, AheadDays: 90, All: true})
	require.NoError(t, err)
	return library[law], report
}

func TestEveryDutyIsMetOnceAndNotOnce(t *testing.T) {
	b, report := judged(t, testdata)
	seen := map[string]map[finding.Status]bool{}
	for _, f := range report.Findings {
		if seen[f.Duty] == nil {
			seen[f.Duty] = map[finding.Status]bool{}
		}
		seen[f.Duty][f.Status] = true
	}
	statuses := map[finding.Status]bool{}
	for _, d := range b.Duties {
		require.True(t, seen[d.ID][finding.Gap], "%s is never a gap", d.ID)
		require.True(t, seen[d.ID][finding.Met], "%s is never met", d.ID)
		for s := range seen[d.ID] {
			statuses[s] = true
		}
	}
	require.Len(t, statuses, 7, "every status occurs")
}

func TestEveryFaultTripsItsDuty(t *testing.T) {
	_, report := judged(t, testdata)
	for _, f := range faults {
		found := false
		for _, r := range report.Findings {
			found = found || r.Duty == f.duty && r.Subject.ID == f.about && string(r.Status) == f.then
		}
		require.True(t, found, "%s %s of %s: %s", f.duty, f.then, f.about, f.why)
	}
}

// TestEveryOddityIsObserved: and in the program without faults none of these kinds occurs, but for thresholds that
// agree with an earlier test by chance.
func TestEveryOddityIsObserved(t *testing.T) {
	_, report := judged(t, testdata)
	number := map[string]int{}
	for _, o := range report.Observations {
		require.NotRegexp(t, `[0-9]|dB|Hz`, o.Text)
		for _, odd := range oddities {
			if o.Kind == odd.kind && o.Site == "kiln-hill" && o.Subject.ID == odd.about {
				number[odd.kind]++
			}
		}
	}
	for _, odd := range oddities {
		require.Positive(t, number[odd.kind], "%s of %s: %s", odd.kind, odd.about, odd.why)
	}
	dir := t.TempDir()
	require.NoError(t, harrowAndSlate().write(dir))
	_, report = judged(t, dir)
	for _, o := range report.Observations {
		for _, odd := range oddities {
			require.False(t, o.Kind == odd.kind && o.Kind != "identical_earlier", "%s of %s without a fault", o.Kind, o.Subject.ID)
		}
	}
}

func TestLarchStreetDoesEverythingInTime(t *testing.T) {
	_, report := judged(t, testdata)
	for _, f := range report.Findings {
		if f.Site == "larch-street" {
			require.Contains(t, []finding.Status{finding.Met, finding.Due}, f.Status, "%s of %s: %s", f.Duty, f.Subject.ID, f.Message)
		}
	}
}

func TestWithoutFaultsNothingIsWrong(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, harrowAndSlate().write(dir))
	_, report := judged(t, dir)
	for _, f := range report.Findings {
		require.Contains(t, []finding.Status{finding.Met, finding.Due}, f.Status, "%s of %s: %s", f.Duty, f.Subject.ID, f.Message)
	}
}
