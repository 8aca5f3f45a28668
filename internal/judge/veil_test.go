package judge

import (
	"encoding/json"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
)

const veilKey = "a key for tests, of which everybody knows"

func newVeil(t *testing.T, key string) *pseudonym.Veil {
	t.Helper()
	v, err := pseudonym.New([]byte(key))
	require.NoError(t, err)
	return v
}

func veiledReport(t *testing.T, path string, all bool, v *pseudonym.Veil, accepted *accept.List) *finding.Report {
	t.Helper()
	p, problems := program.Load(path)
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	r, err := Check(t.Context(), Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, All: all, HealthDetail: all, Portraits: all, Veil: v, Accepted: accepted})
	require.NoError(t, err)
	return r
}

// Codes change nothing but the ids: with the ids put back, a report is the same as one without codes, but for the ids
// of findings, which are made of them, and the order.
func TestVeilChangesNothingElse(t *testing.T) {
	for _, path := range []string{"../../testdata/demo/program.yaml", "../../testdata/demo/exports.yaml"} {
		v := newVeil(t, veilKey)
		plain, veiled := veiledReport(t, path, true, nil, nil), veiledReport(t, path, true, v, nil)
		assert.Equal(t, plain.Totals, veiled.Totals)
		assert.Equal(t, plain.Counts, veiled.Counts)
		assert.Equal(t, plain.Rates, veiled.Rates)
		assert.Equal(t, plain.ObservationCounts, veiled.ObservationCounts)
		assert.Equal(t, plain.Inputs, veiled.Inputs)
		assert.Len(t, veiled.Remarks, len(plain.Remarks))
		assert.Len(t, veiled.Cautions, len(plain.Cautions)+1)
		assert.Len(t, veiled.Portraits, len(plain.Portraits))
		want := textsOf(t, plain.Findings, nil)
		require.Greater(t, len(want), 3000)
		for text, n := range textsOf(t, veiled.Findings, v) {
			assert.Equal(t, want[text], n, text)
		}
		want = textsOf(t, plain.Observations, nil)
		for text, n := range textsOf(t, veiled.Observations, v) {
			assert.Equal(t, want[text], n, text)
		}
	}
}

// textsOf gives the texts of a list with the ids put back, and how often each comes. Of findings about others than
// workers, facts and evidence are left out: they list the first of many records in the order of their ids.
func textsOf[T any](t *testing.T, list []T, v *pseudonym.Veil) map[string]int {
	t.Helper()
	out := map[string]int{}
	for _, x := range list {
		if f, ok := any(x).(finding.Finding); ok {
			f.ID = ""
			if f.Subject.Kind != "worker" {
				f.Facts, f.Evidence = nil, nil
			}
			x = any(f).(T)
		}
		text, err := json.Marshal(x)
		require.NoError(t, err)
		words := strings.FieldsFunc(v.Real(string(text)), func(c rune) bool { return strings.ContainsRune("[]{},; ", c) })
		slices.Sort(words) // records and texts of a finding stand in the order of their ids
		out[strings.Join(words, " ")]++
	}
	return out
}

// Two runs with one key agree byte for byte; with another key no code is the same.
func TestVeilIsStable(t *testing.T) {
	const path = "../../testdata/demo/program.yaml"
	first, second, other := veiledReport(t, path, false, newVeil(t, veilKey), nil), veiledReport(t, path, false, newVeil(t, veilKey), nil), veiledReport(t, path, false, newVeil(t, veilKey+"!"), nil)
	require.Equal(t, first, second)
	subjects := func(r *finding.Report) map[string]bool {
		out := map[string]bool{}
		for _, f := range r.Findings {
			if f.Subject.Kind == "worker" {
				out[f.Subject.ID] = true
			}
		}
		return out
	}
	a, b := subjects(first), subjects(other)
	require.Greater(t, len(a), 60)
	for id := range b {
		assert.False(t, a[id], id)
	}
}

// Accepted gaps are known by the ids of the records, also where the report shows codes.
func TestVeiledAcceptedGaps(t *testing.T) {
	const path = "../../testdata/demo/program.yaml"
	plain := veiledReport(t, path, false, nil, nil)
	var gap *finding.Finding
	for i, f := range plain.Findings {
		if f.Status == finding.Gap && f.Duty == "shift-notice" {
			gap = &plain.Findings[i]
		}
	}
	require.NotNil(t, gap)
	text := `
- {id: ` + gap.ID + `, reason: "The letter to ` + gap.Subject.ID + ` is on its way", approved_by: T-01, until: 2026-12-31}
- {match: {subject: K0128, duty: annual-training}, reason: The course is booked for July, approved_by: plant manager, until: 2026-12-31}
- {match: {subject: "K01*", duty: protector-choice}, reason: New models are on order, approved_by: plant manager, until: 2026-01-31}
- {match: {subject: K9999}, reason: Nobody knows any more, approved_by: plant manager, until: 2026-12-31}
- {id: ` + gap.ID[:12] + `, reason: The letter is on its way, until: 2026-12-31}
`
	list, problems := accept.Parse([]byte(text), "accepted.yaml", "accepted.yaml")
	require.NoError(t, problems.Err())
	v := newVeil(t, veilKey)
	plain, veiled := veiledReport(t, path, false, nil, list), veiledReport(t, path, false, v, list)
	require.Positive(t, plain.AcceptedTotals[finding.Gap])
	assert.Equal(t, plain.AcceptedTotals, veiled.AcceptedTotals)
	assert.Equal(t, plain.Totals, veiled.Totals)
	out, err := json.Marshal(veiled)
	require.NoError(t, err)
	for _, secret := range []string{gap.Subject.ID, gap.ID, gap.ID[:12], "K01*", "K9999", "K0128", `"T-01"`} {
		assert.NotContains(t, string(out), secret)
	}
	assert.Contains(t, string(out), "The letter to "+v.Code(pseudonym.Worker, gap.Subject.ID)+" is on its way")
}
