package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// received is a hearing test of w1 whose result came in on a day.
func received(a *record.Audiogram, on string) *record.Audiogram {
	a.ReceivedOn = day(on)
	return a
}

// replaced names the tests for which a retest stands in.
func replaced(w *dossier.Worker) []string {
	out := []string{}
	for _, a := range w.Audiograms {
		if a.ReplacedBy != "" {
			out = append(out, a.ID+" by "+a.ReplacedBy)
		}
	}
	return out
}

// Where a law counts the time for a retest from the receipt of the result, a retest long after the test may be in time.
func TestRetestFromReceipt(t *testing.T) {
	m := osha().Measures // 30 days
	m.Hearing.Shift.RetestFrom = "received"
	judged := func(first *record.Audiogram, retests ...record.Record) []string {
		records := noisy(append(retests, tested("a1", "2020-03-01", "baseline", 10, 10), first)...)
		return replaced(asked{asOf: "2024-01-01", measures: m}.judge(t, records...).worker())
	}
	shift := func(on string) *record.Audiogram { return received(tested("a2", "2021-03-01", "periodic", 30, 10), on) }
	assert.Equal(t, []string{"a2 by audiogram/a3"}, judged(shift("2021-03-25"), tested("a3", "2021-04-24", "retest", 10, 10)), "the last day")
	assert.Empty(t, judged(shift("2021-03-25"), tested("a3", "2021-04-25", "retest", 10, 10)), "the day after")
	assert.Empty(t, judged(shift(""), tested("a3", "2021-03-10", "retest", 10, 10)), "it is not known when the time begins")
	assert.Empty(t, judged(shift("2024-02-01"), tested("a3", "2021-03-10", "retest", 10, 10)), "a receipt after the as-of day is not seen")

	two := []record.Record{tested("a3", "2021-04-01", "retest", 30, 10), tested("a4", "2021-04-10", "retest", 10, 10)}
	assert.Equal(t, []string{"a2 by audiogram/a4"}, judged(shift("2021-03-25"), two...), "of several the latest counts")
	m.Hearing.Shift.RetestOnce = true
	assert.Equal(t, []string{"a2 by audiogram/a3"}, judged(shift("2021-03-25"), two...), "where the law allows one, the first")
}

// A retest that stands in for a test is not offered again; a test that was found invalid was offered all the same.
func TestWhatCountsAsOffered(t *testing.T) {
	retest := examined("e1", "hearing_test", "2021-03-05", "")
	retest.Purpose = "retest"
	j := judge(t, "2024-01-01", noisy(
		tested("a1", "2020-03-01", "baseline", 10, 10), tested("a2", "2021-03-01", "periodic", 30, 10), retest, tested("a3", "2021-03-20", "retest", 10, 10),
		tested("a4", "2022-03-01", "periodic", 60, 60), follow("invalidated", "a4", "2022-03-05"),
	)...)
	series := j.file("worker", "w1").Series
	assert.Equal(t, []string{"2020-03-01 audiogram/a1", "2021-03-01 audiogram/a2", "2022-03-01 audiogram/a4"}, days(series["test.offered"]))
	assert.Equal(t, []string{"2020-03-01 audiogram/a1", "2021-03-01 audiogram/a2", "2021-03-20 audiogram/a3"}, days(series["test.done"]))
}

// A new baseline after an absence counts where otherwise only a revision for improvement does.
func TestNewBaselineCountsAsImproved(t *testing.T) {
	m := osha().Measures
	m.Hearing.Others = []audiometry.Scheme{{Name: "loss", Rule: audiometry.Mean, Frequencies: []int{2000, 3000, 4000}, AtLeast: "recordable_level", Baseline: "improved"}} // 25 dB
	shows := func(result string) record.Answer {
		revision := follow("baseline_revision", "a2", "2021-03-10")
		revision.Result = result
		w := asked{asOf: "2024-01-01", measures: m}.judge(t, noisy(tested("a1", "2020-03-01", "baseline", 10, 10), tested("a2", "2021-03-01", "periodic", 20, 20),
			tested("a3", "2022-03-01", "periodic", 40, 40), revision)...).worker()
		require.Len(t, w.Revisions, 1)
		assert.Equal(t, result, w.Revisions[0].Result)
		return w.Audiograms[2].Schemes["loss"].Left
	}
	assert.Equal(t, record.Yes, shows("persistent"), "30 dB against the first test")
	assert.Equal(t, record.No, shows("improved"), "20 dB against the second one")
	assert.Equal(t, record.No, shows("new_baseline"))
}

func TestAbsences(t *testing.T) {
	months := func(left, back string) []string {
		again := hired(back)
		out := []string{}
		for _, a := range judge(t, "2024-12-31", hired("2015-01-01", left), again).worker().Absences {
			out = append(out, stretchText(a.From, a.To)+" "+a.Months.String())
		}
		return out
	}
	assert.Equal(t, []string{"2024-02-01..2024-07-31 6"}, months("2024-01-31", "2024-08-01"))
	assert.Equal(t, []string{"2023-08-31..2024-02-28 6"}, months("2023-08-30", "2024-02-29"), "the month ends on its last day")
	assert.Empty(t, months("2024-01-31", "2024-02-01"), "employed on")
	more := judge(t, "2024-12-31", hired("2015-01-01", "2024-01-31"), hired("2024-08-02")).worker().Absences
	require.Len(t, more, 1)
	assert.InDelta(t, 6+1.0/31, more[0].Months.Value, 1e-9)
	assert.Empty(t, judge(t, "2024-12-31", hired("2015-01-01")).worker().Absences)
}

// A written notice spares another one of a result at the same levels for a time, here twelve months.
func TestToldBefore(t *testing.T) {
	m := osha().Measures
	m.Exposure.NoticeLasts = "audiogram_interval"
	judged := func(dose float64, second string, written record.Answer) []dossier.Result {
		told := notice("exposure", "2020-02-10", written)
		told.MeasurementID = "m1"
		limit := threshold(measured("m2", "g1", second, dose), 90)
		return asked{asOf: "2024-01-01", measures: m}.judge(t, hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2020-02-01", 80),
			threshold(measured("m1", "g1", "2020-02-01", 70), 90), measured("m2", "g1", second, dose), limit, told).worker().Results
	}
	same := judged(85, "2021-02-10", record.Yes)
	require.Len(t, same, 2)
	assert.Equal(t, []string{"action"}, same[0].Levels)
	assert.Equal(t, record.Yes, same[0].Written)
	assert.Nil(t, same[0].Before)
	assert.Equal(t, "2020-02-10", dateOf(same[1].Before), "the last day of twelve months")
	assert.Nil(t, judged(85, "2021-02-11", record.Yes)[1].Before, "the day after")
	assert.Nil(t, judged(85, "2021-02-10", record.No)[1].Before, "not in writing")
	higher := judged(150, "2021-02-10", record.Yes)
	assert.Equal(t, []string{"action", "limit"}, higher[1].Levels)
	assert.Nil(t, higher[1].Before, "another level")
	plain := asked{asOf: "2024-01-01"}.judge(t, noisy()...).worker().Results
	assert.Equal(t, []string{}, plain[0].Levels, "only where the measures ask for it")
}

// A dose that begins and ends lower than the range asked for bounds it from neither side.
func TestDoseOverALowerRange(t *testing.T) {
	m := osha().Measures
	limit := m.Exposure.Channels["limit"]
	limit.UpperDB = 140
	m.Exposure.Channels = map[string]dossier.Channel{"action": m.Exposure.Channels["action"], "limit": limit}
	judged := func(upper float64) []string {
		dose := but(measured("m1", "g1", "2020-02-01", 150), func(m *record.Measurement) { m.UpperDB = record.Num(upper) })
		w := asked{asOf: "2024-01-01", measures: m}.judge(t, hired("2020-02-01"), assigned("g1", "2020-02-01"), group("g1"), dose).worker()
		return levelsText(w.Exposures, "limit")
	}
	assert.Equal(t, []string{"2020-02-01.. <=150"}, judged(140))
	assert.Equal(t, []string{"2020-02-01.. unknown"}, judged(130))
}

// Each dose of a measurement shows its range, and a session whether it was certified.
func TestRangesOfDosesAndCertificates(t *testing.T) {
	slow := but(measured("m1", "g1", "2020-02-01", 80), func(m *record.Measurement) { m.Method = "slow" })
	session := &record.Training{WorkerID: "w1", Date: day("2020-03-01"), Certified: record.Yes}
	j := judge(t, "2024-01-01", hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), slow, threshold(measured("m1", "g1", "2020-02-01", 70), 90), session)
	require.Len(t, j.group().Measurements, 1)
	got := j.group().Measurements[0]
	assert.Equal(t, []dossier.DoseRange{{Threshold: record.Num(80), Upper: record.Num(130)}, {Threshold: record.Num(90), Upper: record.Num(130)}}, got.Doses)
	assert.Equal(t, "slow", got.Method)
	assert.Equal(t, record.Yes, j.worker().Training.Certified)
}
