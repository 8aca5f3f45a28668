package judge

import (
	"context"
	"fmt"
	"math/rand/v2"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/dossier"
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

// TestWhatOneBundleFindsRightIsNotObserved: the source may have stated a shift by any law of the site.
func TestWhatOneBundleFindsRightIsNotObserved(t *testing.T) {
	stated := func(ear string) dossier.Observation {
		return dossier.Observation{Kind: "stated_shift_differs", Ref: "audiogram/a1", Ear: ear}
	}
	refs := dossier.NewRefs()
	one := &dossier.File{Kind: "worker", ID: "w1", Refs: refs, Observations: []dossier.Observation{stated("left"), stated("right")}}
	two := &dossier.File{Kind: "worker", ID: "w1", Refs: refs, Observations: []dossier.Observation{stated("right")}, Agreed: []dossier.Observation{stated("left")}}
	for _, order := range [][]*dossier.File{{one, two}, {two, one}} {
		var o observed
		for _, f := range order {
			f := *f
			f.Observations = slices.Clone(f.Observations)
			o.add(&f)
		}
		c := &check{Options: Options{All: true}}
		c.seen.keep(c, "s1", &o)
		require.Len(t, c.seen.list, 1)
		assert.Equal(t, "right", c.seen.list[0].Ear)
		assert.Equal(t, map[finding.ObservationCount]int{{Site: "s1", Kind: "stated_shift_differs"}: 1}, c.seen.counts)
	}
}

// programRecords are workers of s1 and s2, each tested on the 15th of twelve months by one audiometer a site; those
// of s1 share their varied thresholds, and their audiometer was calibrated only after the tests.
func programRecords() []record.Record {
	var out []record.Record
	varied := func(n int) (e audiometry.Ear) {
		for i, hz := range audiometry.Frequencies {
			if hz != 750 && hz != 1500 {
				e[i] = audiometry.Threshold{Tenths: int16(50 * ((i + n) % 6)), State: audiometry.Measured}
			}
		}
		return e
	}
	for n := range 12 {
		for s, site := range []string{"s1", "s2"} {
			id := fmt.Sprintf("%s-w%02d", site, n)
			out = append(out, &record.Worker{WorkerID: id, Site: site, HiredOn: on("2020-01-01")})
			a := &record.Audiogram{AudiogramID: "a-" + id, WorkerID: id, Date: on(fmt.Sprintf("2020-%02d-15", n+1)), Purpose: "baseline",
				Left: varied(s * n), Right: varied(s*n + 1), AudiometerID: "x-" + site, TesterID: "t-" + site}
			out = append(out, a)
		}
	}
	out = append(out, &record.Calibration{InstrumentID: "x-s1", Date: on("2021-01-04"), Type: "acoustic"},
		&record.Calibration{InstrumentID: "x-s2", Date: on("2020-01-02"), Type: "acoustic"})
	for i, r := range out {
		r.SetAt(record.Origin{Row: int32(i + 1)})
	}
	return out
}

// TestObservationsOverManyRecords: of instruments, testers and sites. Only s1 has copies.
func TestObservationsOverManyRecords(t *testing.T) {
	const osha = "us-osha-general-industry"
	kinds := []string{"calibration_after_tests", "one_day_of_month", "results_identical_across_workers"}
	ours := func(r *finding.Report) (counts []finding.ObservationCount, list []finding.Observation) {
		for _, c := range r.ObservationCounts {
			if slices.Contains(kinds, c.Kind) {
				counts = append(counts, c)
			}
		}
		for _, o := range r.Observations {
			if slices.Contains(kinds, o.Kind) {
				list = append(list, o)
			}
		}
		return counts, list
	}
	want := []finding.ObservationCount{
		{Site: "s2", Kind: "one_day_of_month", Number: 1}, {Site: "s1", Kind: "calibration_after_tests", Number: 1},
		{Site: "s1", Kind: "one_day_of_month", Number: 1}, {Site: "s1", Kind: "results_identical_across_workers", Number: 1},
	}
	counts, list := ours(checkObservations(t, programRecords(), false, osha))
	assert.Equal(t, want, counts)
	assert.Empty(t, list)
	all := checkObservations(t, programRecords(), true, osha)
	counts, list = ours(all)
	assert.Equal(t, want, counts)
	require.Len(t, list, 4)
	for i, o := range []finding.Observation{
		{Site: "s2", Subject: finding.Subject{Kind: "site", ID: "s2"}, Kind: "one_day_of_month", Record: "audiogram/a-s2-w00", File: "case", Row: 4},
		{Site: "s1", Subject: finding.Subject{Kind: "site", ID: "s1"}, Kind: "one_day_of_month", Record: "audiogram/a-s1-w00", File: "case", Row: 2},
		{Site: "s1", Subject: finding.Subject{Kind: "instrument", ID: "x-s1"}, Kind: "calibration_after_tests", Record: "calibration/x-s1/acoustic@2021-01-04", File: "case", Row: 49},
		{Site: "s1", Subject: finding.Subject{Kind: "tester", ID: "t-s1"}, Kind: "results_identical_across_workers", Record: "audiogram/a-s1-w00", File: "case", Row: 2},
	} {
		o.Text, o.More = list[i].Text, list[i].More
		assert.Equal(t, o, list[i])
	}
	require.Len(t, list[3].More, 11, "every test is named")
	assert.Equal(t, finding.Evidence{Record: "audiogram/a-s1-w11", File: "case", Row: 46}, list[3].More[10])

	shuffled := programRecords()
	rand.New(rand.NewPCG(7, 8)).Shuffle(len(shuffled), func(i, j int) { shuffled[i], shuffled[j] = shuffled[j], shuffled[i] })
	assert.Equal(t, all.Observations, checkObservations(t, shuffled, true, osha).Observations, "whatever the order")
	two := checkObservations(t, programRecords(), true, osha, "small")
	assert.Equal(t, all.ObservationCounts, two.ObservationCounts, "what two bundles observe counts once")
	assert.Equal(t, all.Observations, two.Observations)
}
