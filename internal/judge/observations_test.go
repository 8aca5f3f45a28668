package judge

import (
	"context"
	"fmt"
	"math/rand/v2"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// observationRecords are workers of two sites whose tests are flat, the second test a copy of the first.
func observationRecords() []record.Record {
	var out []record.Record
	for n := range 40 {
		id := fmt.Sprintf("w%02d", n)
		out = append(out, &record.Worker{WorkerID: id, Site: []string{"s1", "s2"}[n%2], HiredOn: on("2020-01-01")})
		for i, date := range []string{"2020-02-01", "2021-02-01"}[:1+n%3/2] {
			a := testOn(fmt.Sprintf("%s-%d", id, i), date, "periodic")
			a.WorkerID = id
			out = append(out, a)
		}
	}
	for i, r := range out {
		r.SetAt(record.Origin{Row: int32(i + 1)})
	}
	return out
}

func checkObservations(t *testing.T, records []record.Record, all bool, bundles ...string) *finding.Report {
	t.Helper()
	library, err := bundle.Embedded()
	require.NoError(t, err)
	small, problems := bundle.Load(bundletest.Small(), "small")
	require.NoError(t, problems.Err())
	library["small"] = small
	p := &program.Program{Title: "observations", Sites: []program.Site{{ID: "s2", Country: "US", Bundles: bundles}, {ID: "s1", Country: "US", Bundles: bundles}}}
	report, err := Check(context.Background(), Options{
		Program: p, Library: library, AsOf: on("2022-01-01"), All: all,
		read: func(_ context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			for _, rec := range records {
				if err := emit(rec); err != nil {
					return nil, err
				}
			}
			return &intake.Ledger{Inputs: []intake.Input{{File: "case"}}}, nil
		},
	})
	require.NoError(t, err)
	return report
}

func TestObservationsAreCounted(t *testing.T) {
	const osha = "us-osha-general-industry"
	want := []finding.ObservationCount{
		{Site: "s2", Kind: "flat", Number: 52}, {Site: "s2", Kind: "identical_earlier", Number: 6},
		{Site: "s1", Kind: "flat", Number: 54}, {Site: "s1", Kind: "identical_earlier", Number: 7},
	}
	brief := checkObservations(t, observationRecords(), false, osha)
	assert.Equal(t, want, brief.ObservationCounts)
	assert.Equal(t, []finding.Observation{}, brief.Observations, "listed on request only")
	all := checkObservations(t, observationRecords(), true, osha)
	assert.Equal(t, want, all.ObservationCounts)
	require.Len(t, all.Observations, 119)
	assert.Equal(t, finding.Observation{
		Site: "s2", Subject: finding.Subject{Kind: "worker", ID: "w01"}, Kind: "flat", Record: "audiogram/w01-0", File: "case", Row: 4, Ear: "left",
		Text: "All thresholds of the ear are the same.",
	}, all.Observations[0])
	assert.Equal(t, all.Totals, brief.Totals)
	shuffled := observationRecords()
	rng := rand.New(rand.NewPCG(3, 4))
	rng.Shuffle(len(shuffled), func(i, j int) { shuffled[i], shuffled[j] = shuffled[j], shuffled[i] })
	again := checkObservations(t, shuffled, true, osha)
	assert.Equal(t, all.Observations, again.Observations, "whatever the order")
	two := checkObservations(t, observationRecords(), true, osha, "small")
	assert.Equal(t, want, two.ObservationCounts, "what two bundles observe counts once")
	assert.Equal(t, all.Observations, two.Observations)
}

// TestObservationsChangeNoFinding judges the same records with a repeated threshold that differs, masking and so on.
func TestObservationsChangeNoFinding(t *testing.T) {
	const osha = "us-osha-general-industry"
	plain, marked := observationRecords(), observationRecords()
	for _, r := range marked {
		if a, ok := r.(*record.Audiogram); ok {
			a.LeftRepeat = audiometry.Threshold{Tenths: 400, State: audiometry.Measured}
			a.Masked, a.FineSteps, a.Earphones = record.Yes, record.Yes, "insert"
		}
	}
	one, two := checkObservations(t, plain, true, osha), checkObservations(t, marked, true, osha)
	assert.NotEqual(t, one.ObservationCounts, two.ObservationCounts)
	assert.Equal(t, one.Findings, two.Findings)
}
