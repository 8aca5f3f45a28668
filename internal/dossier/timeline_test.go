package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// TestWorkerTimeline follows the exposure of w1, hired on 1 January 2018.
func TestWorkerTimeline(t *testing.T) {
	loud, quiet := measured("m1", "g1", "2017-01-10", 75), measured("m2", "g2", "2017-01-10", 20)
	for name, c := range map[string]struct {
		records  []record.Record
		levels   []string // on the action channel
		enrolled []string
		unknown  []string
	}{
		"First exposure is the assignment to a loud group, not the hire": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01", "2018-05-31"), assigned("g1", "2018-06-01")},
			[]string{"2018-01-01..2018-05-31 20", "2018-06-01.. 75"}, []string{"2018-06-01.."}, []string{},
		},
		"The last day of an assignment counts, and so does the last day of employment": {
			[]record.Record{hired("2018-01-01", "2019-12-31"), assigned("g1", "2018-06-01", "2018-06-30"), assigned("g2", "2018-07-01"), assigned("g1", "2019-12-31")},
			[]string{"2018-01-01..2018-05-31 unknown", "2018-06-01..2018-06-30 75", "2018-07-01..2019-12-30 20", "2019-12-31..2019-12-31 75"},
			[]string{"2018-06-01..2018-06-30", "2019-12-31..2019-12-31"}, []string{"2018-01-01..2018-05-31"},
		},
		"A gap between assignments is not known": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01", "2018-03-31"), assigned("g2", "2018-05-01")},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01..2018-04-30 unknown", "2018-05-01.. 20"},
			[]string{"2018-01-01..2018-03-31"}, []string{"2018-04-01..2018-04-30"},
		},
		"Of overlapping assignments the louder counts": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), assigned("g1", "2018-05-01", "2018-05-02")},
			[]string{"2018-01-01..2018-04-30 20", "2018-05-01..2018-05-02 75", "2018-05-03.. 20"}, []string{"2018-05-01..2018-05-02"}, []string{},
		},
		"An unknown group beside a quiet one is not known": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), assigned("g9", "2018-01-01")},
			[]string{"2018-01-01.. >=20"}, []string{}, []string{"2018-01-01.."},
		},
		"An unknown group beside a loud one enrols": {
			[]record.Record{hired("2018-01-01"), assigned("g9", "2018-01-01"), assigned("g1", "2018-01-01")},
			[]string{"2018-01-01.. >=75"}, []string{"2018-01-01.."}, []string{},
		},
		"Assignments that follow each other in one group are one stretch": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01", "2018-12-31"), assigned("g1", "2019-01-01", "2019-12-31"), assigned("g1", "2019-06-01")},
			[]string{"2018-01-01.. 75"}, []string{"2018-01-01.."}, []string{},
		},
		"Whoever is hired again has two stretches in the program": {
			[]record.Record{hired("2018-01-01", "2018-06-30"), hired("2019-03-01"), assigned("g1", "2018-01-01")},
			[]string{"2018-01-01..2018-06-30 75", "2019-03-01.. 75"}, []string{"2018-01-01..2018-06-30", "2019-03-01.."}, []string{},
		},
		"Two records of one employment are one stretch": {
			[]record.Record{hired("2018-01-01", "2018-06-30"), hired("2018-07-01"), assigned("g1", "2018-01-01")},
			[]string{"2018-01-01.. 75"}, []string{"2018-01-01.."}, []string{},
		},
		"The own result counts from its day on": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), own("o1", "2018-04-01", 80)},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01.. 80"}, []string{"2018-04-01.."}, []string{},
		},
		"A lower own result takes the worker out": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01"), own("o1", "2018-04-01", 10)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01.. 10"}, []string{"2018-01-01..2018-03-31"}, []string{},
		},
		"Of several own results the highest counts": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), own("o1", "2018-04-01", 80), own("o2", "2018-05-01", 30)},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01.. 80"}, []string{"2018-04-01.."}, []string{},
		},
		"The own result gives way to a later one of the group": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), own("o1", "2018-04-01", 80), measured("m3", "g2", "2018-08-01", 30)},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01..2018-07-31 80", "2018-08-01.. 30"}, []string{"2018-04-01..2018-07-31"}, []string{},
		},
		"But not to one that tells nothing": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), own("o1", "2018-04-01", 80),
				but(measured("m3", "g2", "2018-08-01", 30), func(m *record.Measurement) { m.FullShift = record.No })},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01.. 80"}, []string{"2018-04-01.."}, []string{},
		},
		"After a change the own result is out of date": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01"), own("o1", "2018-04-01", 10), changed("c1", "2018-08-01", "unknown")},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01..2018-07-31 10", "2018-08-01.. >=75"},
			[]string{"2018-01-01..2018-03-31", "2018-08-01.."}, []string{},
		},
		"The own result of another group does not follow the worker": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01", "2018-12-31"), assigned("g2", "2019-01-01"), own("o1", "2018-04-01", 90)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01..2018-12-31 90", "2019-01-01.. 20"}, []string{"2018-01-01..2018-12-31"}, []string{},
		},
		"It follows into the next assignment to the same group": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01", "2018-12-31"), assigned("g2", "2019-01-01"), own("o1", "2018-04-01", 90)},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01.. 90"}, []string{"2018-04-01.."}, []string{},
		},
		"In a group without result the first own one is taken backwards": {
			[]record.Record{hired("2018-01-01"), assigned("g9", "2018-01-01"), own("o1", "2018-04-01", 60)},
			[]string{"2018-01-01.. 60"}, []string{"2018-01-01.."}, []string{},
		},
		"But not across a change that may raise exposure": {
			[]record.Record{hired("2018-01-01"), group("g9"), assigned("g9", "2018-01-01"), &record.Change{ChangeID: "c1", Group: "g9", Date: day("2018-03-01")}, own("o1", "2018-04-01", 60)},
			[]string{"2018-01-01..2018-02-28 unknown", "2018-03-01.. 60"}, []string{"2018-03-01.."}, []string{"2018-01-01..2018-02-28"},
		},
		"Without any group the own results tell": {
			[]record.Record{hired("2018-01-01"), own("o1", "2018-04-01", 60), own("o2", "2018-06-01", 40)},
			[]string{"2018-01-01.. 60"}, []string{"2018-01-01.."}, []string{},
		},
		"A result from within a group says nothing of the time after it": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01", "2018-12-31"), own("o1", "2018-04-01", 90)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01..2018-12-31 90", "2019-01-01.. unknown"}, []string{"2018-01-01..2018-12-31"}, []string{"2019-01-01.."},
		},
		"Nor does one from an earlier employment": {
			[]record.Record{hired("2018-01-01", "2018-06-30"), hired("2019-03-01"), own("o1", "2018-04-01", 60)},
			[]string{"2018-01-01..2018-06-30 60", "2019-03-01.. unknown"}, []string{"2018-01-01..2018-06-30"}, []string{"2019-03-01.."},
		},
		"An own result that gives only a lower bound leaves the group's value in force": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01"), threshold(own("o1", "2018-04-01", 20), 90)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01.. >=75"}, []string{"2018-01-01.."}, []string{},
		},
		"And in a quiet group leaves it open": {
			[]record.Record{hired("2018-01-01"), assigned("g2", "2018-01-01"), threshold(own("o1", "2018-04-01", 30), 90)},
			[]string{"2018-01-01..2018-03-31 20", "2018-04-01.. >=30"}, []string{}, []string{"2018-04-01.."},
		},
		"An own upper bound below the group's value counts": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01"), threshold(own("o1", "2018-04-01", 40), 70)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01.. <=40"}, []string{"2018-01-01..2018-03-31"}, []string{},
		},
		"An own result above the group's does not prove the limit kept": {
			[]record.Record{hired("2018-01-01"), assigned("g1", "2018-01-01"), threshold(measured("m1", "g1", "2017-01-10", 30), 90), own("o1", "2018-04-01", 120)},
			[]string{"2018-01-01..2018-03-31 75", "2018-04-01.. 120"}, []string{"2018-01-01.."}, []string{},
		},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", append(c.records, group("g1"), group("g2"), loud, quiet)...).worker()
			assert.Equal(t, c.levels, levelsText(d.Exposures, "action"))
			assert.Equal(t, c.enrolled, enrolledText(d.Enrolled))
			assert.Equal(t, c.unknown, openText(d.ExposureUnknown["action"]))
		})
	}
}

func TestOwnUpperBoundLeavesTheLimitOpen(t *testing.T) {
	d := judge(t, "2024-01-01", noisy(threshold(measured("m1", "g1", "2019-11-15", 30), 90), own("o1", "2021-01-01", 120))...).worker()
	assert.Equal(t, []string{"2020-01-01..2020-12-31 30", "2021-01-01.. 30 to 120"}, levelsText(d.Exposures, "limit"))
	assert.Equal(t, []string{"2021-01-01.."}, openText(d.ExposureUnknown["limit"]))
	assert.True(t, d.Exposures[1].Own)
}

func TestReasonsOfOwnMeasurements(t *testing.T) {
	three := but(own("o1", "2020-05-01", 60), func(m *record.Measurement) { m.ExchangeDB = record.Num(3) })
	d := judge(t, "2024-01-01", hired("2020-01-01"), assigned("g9", "2020-01-01"), three).worker()
	require.Len(t, d.ExposureUnknown["action"], 1)
	assert.Equal(t, "the dose was taken with criterion level 90 dBA and 3 dB exchange rate, not 90 dBA and 5 dB; it cannot be converted", d.ExposureUnknown["action"][0].Reason)
	for name, records := range map[string][]record.Record{
		"the group g9 has no record and no measurement":               {assigned("g9", "2020-01-01")},
		"there is no full-shift measurement":                          {assigned("g1", "2020-01-01"), group("g1")},
		"the worker is in no group and has no full-shift measurement": {},
		"not measured since the change c1 of 2020-03-01, which may have raised exposure": {assigned("g1", "2020-03-01"), group("g1"),
			measured("m1", "g1", "2019-01-01", 20), changed("c1", "2020-03-01", "yes")},
	} {
		d := judge(t, "2024-01-01", append(records, hired("2020-03-01"))...).worker()
		require.Len(t, d.ExposureUnknown["action"], 1)
		assert.Equal(t, name, d.ExposureUnknown["action"][0].Reason)
	}
}

func TestMovedBetweenSites(t *testing.T) {
	records := func() []record.Record {
		first, second := hired("2020-01-01", "2020-12-31"), hired("2021-01-01")
		first.JobTitle, second.Site, second.JobTitle = "fettler", "s2", "grinder"
		g2 := group("g2")
		g2.Site = "s2"
		a1, a2 := tested("a1", "2020-02-01", "baseline", 10, 10), tested("a2", "2021-02-01", "periodic", 30, 10)
		a1.AudiometerID, a2.AudiometerID = "au", "au"
		return []record.Record{
			first, second, assigned("g1", "2020-01-01", "2020-12-31"), assigned("g2", "2021-01-01"), group("g1"), g2,
			measured("m1", "g1", "2019-01-01", 75), measured("m2", "g2", "2019-01-01", 120), a1, a2,
			follow("baseline_revision", "a2", "2021-03-01"), follow("referral", "a99", "2021-03-02"), follow("log_entry", "a2", "2021-03-03"),
			own("o1", "2020-06-01", 80), own("o2", "2021-06-01", 130),
		}
	}
	for _, c := range []struct {
		site, enrolled, test, job, measured string
		shifts, revisions, missing, logs    int
	}{
		{"s1", "2020-01-01..2020-12-31", "2020-02-01", "fettler", "o1", 0, 0, 0, 0},
		{"s2", "2021-01-01..", "2021-02-01", "grinder", "o2", 1, 1, 1, 1},
	} {
		j := asked{asOf: "2024-01-01", site: c.site}.judge(t, records()...)
		d := j.worker()
		assert.Equal(t, []string{c.enrolled}, enrolledText(d.Enrolled))
		assert.Equal(t, c.job, d.JobTitle)
		assert.Len(t, d.Shifts, c.shifts)
		assert.Len(t, d.Revisions, c.revisions, "a decision is judged at the site of that day")
		assert.Len(t, d.Dangling, c.missing)
		assert.Len(t, j.siteDossier().LogYears, c.logs)
		use := j.instrument("au")
		assert.Equal(t, 1, use.Tests, "a test counts at the site of employment on its day")
		assert.Equal(t, c.test, use.Years[0].Last.String())
		assert.Equal(t, 2, j.siteDossier().Measurements)
		assert.Equal(t, "measurement/"+c.measured, j.siteDossier().LatestMeasurement.Ref)
		assert.Equal(t, map[string]int{"s1": 0, "s2": 1}[c.site], j.siteDossier().Workers)
	}
}

func TestCountsOfAGroup(t *testing.T) {
	j := judge(t, "2024-01-01", noisy(assigned("g1", "2021-01-01"), assigned("g2", "2021-01-01", "2023-12-31"), group("g2"), issued("p1", "2020-05-01", ""))...)
	g1, g2 := j.group(), j.file("group", "g2").Input.(*dossier.Group)
	assert.Equal(t, []int{1, 1}, []int{g1.Workers, g1.Holders}, "two assignments to one group are one worker")
	assert.Zero(t, g2.Workers, "the assignment ended on the day before")
	assert.Equal(t, []int{1, 1, 1}, []int{j.siteDossier().Workers, j.siteDossier().EnrolledNow, j.siteDossier().EnrolledEver})
	left := judge(t, "2024-01-01", hired("2020-01-01", "2023-12-31"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 75))
	assert.Equal(t, []int{0, 0, 1}, []int{left.siteDossier().Workers, left.siteDossier().EnrolledNow, left.siteDossier().EnrolledEver})
	assert.Zero(t, left.group().Workers)
	assert.False(t, judge(t, "2019-12-31", noisy()...).has("worker", "w1"), "not hired yet")
	assert.True(t, judge(t, "2020-01-01", noisy()...).has("worker", "w1"))
}

func TestResultsAndTheirNotices(t *testing.T) {
	d := judge(t, "2024-01-01", noisy(
		measured("m2", "g1", "2021-05-01", 90),
		&record.Notice{WorkerID: "w1", About: "exposure", MeasurementID: "m2", Date: day("2021-05-20")},
		notice("exposure", "2019-12-31", record.Yes), notice("exposure", "2020-01-05", record.Yes),
	)...).worker()
	require.Len(t, d.Results, 2)
	assert.Equal(t, []string{"m1", "2020-01-01", "2020-01-05"}, []string{d.Results[0].ID, d.Results[0].Since.String(), dateOf(d.Results[0].Notice)})
	assert.Equal(t, []string{"m2", "2021-05-01", "2021-05-20"}, []string{d.Results[1].ID, d.Results[1].Since.String(), dateOf(d.Results[1].Notice)})
	assert.Equal(t, record.Num(90), d.Results[1].Dose)
}
