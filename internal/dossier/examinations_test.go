package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

func examined(id, kind, offered, attended string) *record.Examination {
	return &record.Examination{ExaminationID: id, WorkerID: "w1", Type: kind, OfferedOn: day(offered), AttendedOn: day(attended)}
}

func days(links []dossier.Link) []string {
	out := []string{}
	for _, l := range links {
		out = append(out, l.Date.String()+" "+l.Ref)
	}
	return out
}

// An offer that was declined is an offer and no test; a test on record is both.
func TestOffersAndAttendance(t *testing.T) {
	declined := examined("e2", "hearing_test", "2022-02-01", "")
	declined.Answer = "declined"
	later := examined("e4", "hearing_test", "2023-12-01", "2024-02-01")
	j := judge(t, "2024-01-01", noisy(
		tested("a1", "2020-03-01", "baseline", 10, 10), examined("e1", "hearing_test", "2021-01-10", "2021-02-01"), declined,
		examined("e3", "health_appointment", "", "2023-05-05"), later,
		follow("damage_examined", "", "2023-06-01"), follow("damage_opinion", "", "2021-03-01"), follow("referral", "a1", "2021-03-02"),
	)...)
	w, series := j.worker(), j.file("worker", "w1").Series
	assert.Equal(t, []string{"2020-03-01 audiogram/a1", "2021-01-10 examination/e1", "2022-02-01 examination/e2", "2023-12-01 examination/e4"}, days(series["test.offered"]))
	assert.Equal(t, []string{"2020-03-01 audiogram/a1", "2021-02-01 examination/e1"}, days(series["test.done"]), "a test after the as-of day is not seen")
	assert.Equal(t, []string{"2023-05-05 examination/e3"}, days(series["appointment.offered"]))
	assert.Equal(t, []string{"2023-05-05 examination/e3"}, days(series["appointment.attended"]))
	require.Len(t, w.Examinations, 4)
	assert.Equal(t, "declined", w.Examinations[1].Answer)
	assert.False(t, w.Examinations[3].AttendedOn.Known())
	require.Len(t, w.Examinations[0].Afterwards, 1, "what comes before the next examination, and names no audiogram")
	assert.Equal(t, "damage_opinion", w.Examinations[0].Afterwards[0].Type)
	require.Len(t, w.Examinations[2].Afterwards, 1)
	assert.Equal(t, "damage_examined", w.Examinations[2].Afterwards[0].Type)
	assert.Empty(t, w.Examinations[1].Afterwards)
}

func TestAfterwards(t *testing.T) {
	m := osha().Measures
	m.Hearing.Afterwards = true
	told := notice("result", "2021-03-10", record.Yes)
	told.AudiogramID = "a2"
	records := noisy(tested("a1", "2020-03-01", "baseline", 10, 10), tested("a2", "2021-03-01", "periodic", 30, 10),
		follow("authority_report", "a2", "2021-03-12"), follow("protector_choice", "", "2021-03-13"), told, notice("exposure", "2021-03-11", record.Yes))
	w := asked{asOf: "2024-01-01", measures: m}.judge(t, records...).worker()
	assert.Empty(t, w.Audiograms[0].FollowUps)
	require.Len(t, w.Audiograms[1].FollowUps, 2)
	assert.Equal(t, "authority_report", w.Audiograms[1].FollowUps[0].Type)
	assert.Equal(t, []dossier.Told{{Link: dossier.Link{Date: day("2021-03-10"), Ref: "notice/result/w1@2021-03-10"}, About: "result", Written: record.Yes}}, w.Audiograms[1].Notices)
	assert.Len(t, w.Told, 1, "a notice of exposure is about no test")
	assert.Empty(t, judge(t, "2024-01-01", records...).worker().Audiograms[1].FollowUps, "only where the measures ask for it")
}

// What follows a test of which the outcome alone is on record is not of the audiogram before it, unless it names that.
func TestAfterwardsOfAnOutcomeAlone(t *testing.T) {
	m := osha().Measures
	m.Hearing.Afterwards = true
	named := follow("referral", "a1", "2021-04-01")
	w := asked{asOf: "2024-01-01", measures: m}.judge(t, noisy(tested("a1", "2020-03-01", "baseline", 10, 10),
		examined("e1", "hearing_test", "", "2021-03-01"), examined("e2", "health_appointment", "", "2020-04-01"),
		follow("retraining", "", "2020-05-01"), follow("medical_opinion", "", "2021-03-01"), named, notice("result", "2021-03-02", record.Yes), notice("result", "2020-03-05", record.Yes))...).worker()
	require.Len(t, w.Audiograms[0].FollowUps, 2)
	assert.Equal(t, "retraining", w.Audiograms[0].FollowUps[0].Type)
	assert.Equal(t, "referral", w.Audiograms[0].FollowUps[1].Type)
	require.Len(t, w.Audiograms[0].Notices, 1)
	assert.Equal(t, day("2020-03-05"), w.Audiograms[0].Notices[0].Date)
}

// Without a shift in the measures no test is compared, and nothing fails.
func TestLawWithoutAShift(t *testing.T) {
	m := osha().Measures
	m.Hearing = dossier.HearingMeasures{}
	w := asked{asOf: "2024-01-01", measures: m}.judge(t, noisy(tested("a1", "2020-03-01", "baseline", 10, 10), tested("a2", "2021-03-01", "periodic", 90, 90),
		tested("a3", "2021-03-05", "retest", 90, 90), follow("baseline_revision", "a2", "2021-04-01"))...).worker()
	assert.Empty(t, w.Shifts)
	assert.Empty(t, w.Recordables)
	assert.Empty(t, w.AfterShift)
	assert.Len(t, w.Audiograms, 3)
	assert.False(t, w.Audiograms[1].ToCompare)
	assert.Empty(t, w.Audiograms[1].CannotCompare)
}

func TestAreas(t *testing.T) {
	g2 := &record.Group{Group: "g2", Site: "s1", Area: "hall-g1"}
	elsewhere := &record.Group{Group: "g9", Site: "s9", Area: "hall-g1"}
	signs := &record.Document{Type: "zone_signs", Site: "s1", Area: "hall-g1", Date: day("2021-01-01"), ReviewedOn: day("2022-01-01"), PostedOn: day("2021-01-02")}
	store := &record.Document{Type: "zone_plan", Site: "s1", Area: "store", Date: day("2021-01-01")}
	site := &record.Document{Type: "written_program", Site: "s1", Date: day("2020-01-01")}
	look := &record.WearCheck{Area: "hall-g1", Date: day("2023-01-01"), Observed: record.Num(4), Wearing: record.Num(3)}
	j := judge(t, "2024-01-01", noisy(g2, elsewhere, signs, store, site, look, measured("m2", "g2", "2022-05-01", 10),
		&record.Control{Area: "hall-g1", Date: day("2022-01-01"), Type: "engineering", StartedOn: day("2022-02-01"), InstalledOn: day("2025-01-01")})...)
	a := j.file("area", "hall-g1").Input.(*dossier.Area)
	assert.Equal(t, []string{"g1", "g2"}, a.Groups, "a group of another site works elsewhere")
	assert.Equal(t, 1, a.Workers)
	require.Len(t, a.Exposed["action"], 1, "one group at the level makes it one")
	assert.True(t, a.Exposed["action"][0].Current)
	assert.Empty(t, openText(a.Unknown["limit"]), "75 % from 80 dBA on is at most 75 % from 90 dBA on")
	assert.Len(t, a.Documents, 2)
	assert.Equal(t, []string{"2021-01-01 document/zone_signs@2021-01-01", "2022-01-01 document/zone_signs@2021-01-01"}, days(j.file("area", "hall-g1").Series["document.zone_signs"]))
	assert.Equal(t, day("2021-01-02"), a.Documents[1].PostedOn)
	require.Len(t, a.Controls, 1)
	assert.Equal(t, day("2022-02-01"), a.Controls[0].Started)
	assert.False(t, a.Controls[0].Installed.Known(), "a day after the as-of day is not seen")
	require.Len(t, a.Wear, 1)
	assert.Equal(t, record.Num(3), a.Wear[0].Wearing)
	quiet := j.file("area", "store").Input.(*dossier.Area)
	assert.Empty(t, quiet.Groups)
	assert.Empty(t, quiet.Exposed["action"])
	assert.NotEmpty(t, quiet.Unknown["action"], "nobody has measured it")
	assert.True(t, dossier.HasSeries("site", "document.risk_assessment"))
	assert.False(t, dossier.HasSeries("site", "document.riskassessment"))
	assert.False(t, dossier.HasSeries("worker", "document.risk_assessment"))
}

// A document that names a group or an area but no site belongs to the site of that.
func TestDocumentsWithoutASite(t *testing.T) {
	on := day("2021-01-01")
	j := judge(t, "2024-01-01", noisy(&record.Group{Group: "g9", Site: "s9", Area: "far"},
		&record.Document{Type: "schedule", Group: "g1", Date: on}, &record.Document{Type: "zone_plan", Area: "hall-g1", Date: on},
		&record.Document{Type: "competence", Date: on}, &record.Document{Type: "logbook", Group: "g9", Date: on},
		&record.Document{Type: "calculator", Area: "far", Date: on}, &record.Document{Type: "transfer", Group: "nowhere", Date: on})...)
	kinds := []string{}
	for _, d := range j.siteDossier().Documents {
		kinds = append(kinds, d.Type)
	}
	assert.ElementsMatch(t, []string{"schedule", "zone_plan", "competence"}, kinds)
}
