package judge_test

import (
	"context"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
)

// programsDir holds a small program for each bundle but the one of the demo, which has all of its duties.
const (
	programsDir = "../../testdata/bundles"
	demoLaw     = "us-osha-general-industry"
)

// TestEveryDutyInItsProgram judges the small program of each bundle: every duty fires there, and is quiet there.
func TestEveryDutyInItsProgram(t *testing.T) {
	shelf, err := bundle.NewShelf()
	require.NoError(t, err)
	for _, id := range shelf.IDs() {
		if id == demoLaw {
			continue
		}
		t.Run(id, func(t *testing.T) {
			t.Parallel()
			library, err := shelf.Take(id)
			require.NoError(t, err)
			report := judgedProgram(t, library, id)
			fires, met := map[string]bool{}, map[string]bool{}
			about, subjects := map[string]map[string]bool{}, map[string]map[string]bool{}
			for _, f := range report.Findings {
				subject := f.Site + "/" + f.Subject.ID
				if about[f.Duty] == nil {
					about[f.Duty] = map[string]bool{}
				}
				if subjects[f.Subject.Kind] == nil {
					subjects[f.Subject.Kind] = map[string]bool{}
				}
				subjects[f.Subject.Kind][subject], about[f.Duty][subject] = true, true
				switch f.Status {
				case finding.Gap, finding.Late, finding.Opinion, finding.Due:
					fires[f.Duty] = true
				case finding.Met, finding.Lifted:
					met[f.Duty] = true
				}
			}
			for _, d := range library[id].Duties {
				if d.From != id && id == "company-example" {
					continue // those of the law that it extends have the demo
				}
				assert.True(t, fires[d.ID], "the duty %s never fires in its program", d.ID)
				quiet := len(subjects[d.Subject]) > len(about[d.ID]) // a subject of the kind without a finding of it
				assert.True(t, met[d.ID] || quiet, "the duty %s is never quiet in its program", d.ID)
			}
		})
	}
}

// judgedProgram judges the small program of a bundle, of which every row must be read.
func judgedProgram(t *testing.T, library bundle.Library, id string) *finding.Report {
	t.Helper()
	dir := filepath.Join(programsDir, id)
	_, err := os.Stat(dir)
	require.NoError(t, err, "write a small program in which every duty of the bundle fires and is quiet")
	p, diags := program.Load(dir)
	require.Empty(t, diags)
	require.True(t, p.AsOf.Known(), "the program states its as_of, so that it does not age")
	for _, s := range p.Sites {
		require.Contains(t, s.Bundles, id)
	}
	report, err := judge.Check(context.Background(), judge.Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, All: true})
	require.NoError(t, err)
	for _, in := range report.Inputs {
		require.Zero(t, in.Rejected, "%s has rows that cannot be read", in.File)
	}
	return report
}
