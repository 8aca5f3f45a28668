package dossier_test

import (
	"math/rand/v2"
	"regexp"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

var (
	usualLeft, usualRight = earOf(10, 5, 10, 15, 15, 20), earOf(5, 5, 10, 10, 15, 20)
	laterLeft, laterRight = earOf(10, 10, 10, 15, 20, 20), earOf(5, 5, 5, 10, 15, 20)
)

// observedOf writes kind, audiogram and ear of the observations of w1.
func observedOf(t *testing.T, records ...record.Record) []string {
	t.Helper()
	out := []string{}
	for _, o := range judge(t, "2026-01-01", noisy(records...)...).file("worker", "w1").Observations {
		out = append(out, strings.TrimSpace(o.Kind+" "+strings.TrimPrefix(o.Ref, "audiogram/")+" "+o.Ear))
	}
	return out
}

func TestNothingToObserve(t *testing.T) {
	assert.Empty(t, observedOf(t, audiogram("a0", "2020-02-01", "baseline", usualLeft, usualRight), audiogram("a1", "2021-02-01", "periodic", laterLeft, laterRight),
		audiogram("a2", "2021-02-01", "retest", usualLeft, laterRight), audiogram("a3", "2022-02-01", "periodic", laterLeft, usualRight)))
}

// TestObservations makes each kind once. What the checks look for is tested in its package.
func TestObservations(t *testing.T) {
	but := func(change func(*record.Audiogram)) *record.Audiogram {
		a := audiogram("a1", "2021-02-01", "periodic", laterLeft, laterRight)
		change(a)
		return a
	}
	at := func(hz, db int) func(*record.Audiogram) {
		return func(a *record.Audiogram) {
			a.Left = earBut(a.Left, hz, audiometry.Threshold{Tenths: int16(10 * db), State: audiometry.Measured})
		}
	}
	seen := map[string]bool{}
	for name, c := range map[string]struct {
		records []record.Record
		want    []string
	}{
		"missing":            {[]record.Record{but(func(a *record.Audiogram) { a.Left = earBut(a.Left, 500, audiometry.Threshold{}) })}, []string{"missing_frequency a1 left"}},
		"out of range":       {[]record.Record{but(at(2000, -15))}, []string{"out_of_range a1 left"}},
		"off steps":          {[]record.Record{but(at(2000, 12))}, []string{"off_steps a1 left"}},
		"fine steps":         {[]record.Record{but(func(a *record.Audiogram) { at(2000, 12)(a); a.FineSteps = record.Yes })}, []string{}},
		"at the limit":       {[]record.Record{but(func(a *record.Audiogram) { a.Left[8].State, a.Left[8].Tenths = audiometry.NoResponse, 250 })}, []string{"at_limit a1 left"}},
		"all zero":           {[]record.Record{but(func(a *record.Audiogram) { a.Left = earOf(0) })}, []string{"all_zero a1 left", "asymmetry a1 right"}},
		"flat":               {[]record.Record{but(func(a *record.Audiogram) { a.Left = earOf(15) })}, []string{"flat a1 left"}},
		"same ears":          {[]record.Record{but(func(a *record.Audiogram) { a.Right = a.Left })}, []string{"identical_ears a1 both"}},
		"copied":             {[]record.Record{but(func(a *record.Audiogram) { a.Left, a.Right = usualLeft, usualRight })}, []string{"identical_earlier a1 both"}},
		"copied after years": {[]record.Record{but(func(*record.Audiogram) {}), audiogram("a2", "2024-02-01", "periodic", usualLeft, usualRight)}, []string{"identical_earlier a2 both"}},
		"not of invalid":     {[]record.Record{but(func(a *record.Audiogram) { a.Left, a.Right = usualLeft, usualRight }), follow("invalidated", "a0", "2020-03-01")}, []string{}},
		"nor by one":         {[]record.Record{but(func(a *record.Audiogram) { a.Left = earOf(0) }), follow("invalidated", "a1", "2021-03-01")}, []string{}},
		"improvement": {[]record.Record{audiogram("a9", "2020-08-01", "periodic", earOf(10, 10, 10, 40, 45, 45), earOf(10, 10, 10, 40, 40, 40)), but(func(*record.Audiogram) {})},
			[]string{"improbable_improvement a1 left", "improbable_improvement a1 right"}},
		"repeat": {[]record.Record{but(func(a *record.Audiogram) {
			a.RightRepeat = audiometry.Threshold{Tenths: 200, State: audiometry.Measured}
		})}, []string{"repeat_difference a1 right"}},
		"asymmetry": {[]record.Record{but(func(a *record.Audiogram) { a.Left = earOf(10, 10, 25, 25, 20, 20) })}, []string{"asymmetry a1 left"}},
		"crossed":   {[]record.Record{but(at(6000, 60))}, []string{"cross_hearing a1 left"}},
		"masked":    {[]record.Record{but(func(a *record.Audiogram) { at(6000, 60)(a); a.Masked = record.Yes })}, []string{}},
		"insert":    {[]record.Record{but(func(a *record.Audiogram) { at(6000, 60)(a); a.Earphones = "insert" })}, []string{}},
		"notch":     {[]record.Record{but(func(a *record.Audiogram) { at(8000, 5)(a); at(4000, 25)(a) })}, []string{"notch a1 left"}},
		"room noise": {[]record.Record{but(func(a *record.Audiogram) {
			a.Left, a.Right = earOf(25, 10, 10, 15, 20, 20), earOf(20, 5, 5, 10, 15, 20)
		})}, []string{"room_noise a1 both"}},
		"before the hire": {[]record.Record{but(func(a *record.Audiogram) { a.Date = day("2019-12-31") })}, []string{"before_hire a1"}},
		"same day":        {[]record.Record{but(func(a *record.Audiogram) { a.Date = day("2020-02-01") })}, []string{"same_day a1"}},
		"same day retest": {[]record.Record{but(func(a *record.Audiogram) { a.Date, a.Purpose = day("2020-02-01"), "retest" })}, []string{}},
	} {
		t.Run(name, func(t *testing.T) {
			got := observedOf(t, append(c.records, audiogram("a0", "2020-02-01", "baseline", usualLeft, usualRight))...)
			if name == "same day" { // the one that was read later
				require.Len(t, got, 1)
				got[0] = got[0][:len("same_day a")] + "1"
			}
			assert.Equal(t, c.want, got)
			for _, o := range got {
				seen[strings.Fields(o)[0]] = true
			}
		})
	}
	w := hired("2020-01-01", "2020-12-31")
	w.BirthDate = day("2021-01-31")
	for _, o := range judge(t, "2026-01-01", w, audiogram("a0", "2020-02-01", "", usualLeft, usualRight), audiogram("a1", "2021-02-01", "", laterLeft, laterRight)).file("worker", "w1").Observations {
		assert.Equal(t, map[string]string{"before_birth": "audiogram/a0", "after_leaving": "audiogram/a1"}[o.Kind], o.Ref)
		seen[o.Kind] = true
	}
	elsewhere := []string{"no_functional_check", "stated_shift_differs", "training_outside_employment", "protector_issued_outside_employment",
		"calibration_after_tests", "checks_all_same_result", "one_day_of_month", "results_identical_across_workers"}
	for _, k := range dossier.ObservationKinds() {
		assert.True(t, seen[k.Kind] || slices.Contains(elsewhere, k.Kind), "no test makes %s", k.Kind)
		assert.NotEmpty(t, k.Source)
	}
}

// TestObservationsGiveNoFigures: audiograms are medical records. The order of the records does not matter.
func TestObservationsGiveNoFigures(t *testing.T) {
	figure := regexp.MustCompile(`[0-9]|dB|Hz`)
	rng := rand.New(rand.NewPCG(1, 2))
	var records []record.Record
	for i := range 30 {
		a := audiogram("a"+string(rune('a'+i)), "", "periodic", audiometry.Ear{}, audiometry.Ear{})
		a.Date = day("2019-06-01").AddDays(rng.IntN(2000))
		for j := range a.Left {
			for _, e := range []*audiometry.Ear{&a.Left, &a.Right} {
				e[j] = audiometry.Threshold{Tenths: int16(10 * (rng.IntN(140) - 15)), State: audiometry.State(rng.IntN(4))}
			}
		}
		a.SetAt(record.Origin{Row: int32(i + 1)})
		records = append(records, a)
	}
	first := judge(t, "2026-01-01", noisy(records...)...).file("worker", "w1").Observations
	require.Greater(t, len(first), 100)
	for _, o := range first {
		require.NotRegexp(t, figure, o.Text)
	}
	rng.Shuffle(len(records), func(i, j int) { records[i], records[j] = records[j], records[i] })
	assert.Equal(t, first, judge(t, "2026-01-01", noisy(records...)...).file("worker", "w1").Observations)
}

// TestObservationsStayAtTheirSite: a test counts where the worker was employed on its day.
func TestObservationsStayAtTheirSite(t *testing.T) {
	second := hired("2022-01-01")
	second.Site = "s2"
	records := []record.Record{hired("2020-01-01", "2021-12-31"), second,
		audiogram("a0", "2020-02-01", "baseline", earOf(0), usualRight), audiogram("a1", "2022-02-01", "periodic", earOf(0), usualRight)}
	for site, ref := range map[string]string{"s1": "audiogram/a0", "s2": "audiogram/a1"} {
		for _, o := range (asked{asOf: "2026-01-01", site: site}).judge(t, records...).file("worker", "w1").Observations {
			assert.Equal(t, ref, o.Ref, o.Kind)
		}
	}
}
