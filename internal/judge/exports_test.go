package judge

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// The demo program stands twice in its folder: as canonical records, and as exports with maps. Both must give the same
// findings and observations; only where a record was read differs.
func TestExportsGiveTheSameFindingsAsRecords(t *testing.T) {
	records, exports := wholeReport(t, "../../testdata/demo/program.yaml"), wholeReport(t, "../../testdata/demo/exports.yaml")
	require.Empty(t, records.Rejects)
	require.Empty(t, exports.Rejects)
	assert.Equal(t, records.Totals, exports.Totals)
	assert.Equal(t, records.Counts, exports.Counts)
	assert.Equal(t, records.ObservationCounts, exports.ObservationCounts)
	require.Equal(t, len(records.Findings), len(exports.Findings))
	for i := range records.Findings {
		a, b := records.Findings[i], exports.Findings[i]
		assert.Equal(t, recordsOf(a.Evidence), recordsOf(b.Evidence), a.ID)
		a.Evidence, b.Evidence = nil, nil
		require.Equal(t, a, b)
	}
}

func wholeReport(t *testing.T, path string) *finding.Report {
	t.Helper()
	p, problems := program.Load(path)
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	r, err := Check(t.Context(), Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, All: true, HealthDetail: true})
	require.NoError(t, err)
	return r
}

func recordsOf(list []finding.Evidence) []string {
	out := []string{}
	for _, e := range list {
		out = append(out, e.Record)
	}
	return out
}
