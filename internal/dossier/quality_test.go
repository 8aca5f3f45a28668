package dossier_test

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

func calibration(kind, date string) *record.Calibration {
	return &record.Calibration{InstrumentID: "au", Type: kind, Date: day(date)}
}

func deviation(kind, date, result string, db ...float64) *record.Calibration {
	c := calibration(kind, date)
	c.Result, c.Deviation = result, new(record.Deviation)
	for i, v := range db {
		c.Deviation[i] = record.Num(v)
	}
	return c
}

// testOf is a hearing test of a worker with audiometer au in room r1 by tester t1.
func testOf(id, worker, date string) *record.Audiogram {
	a := tested(id, date, "periodic", 10, 10)
	a.WorkerID, a.AudiometerID, a.RoomID, a.TesterID = worker, "au", "r1", "t1"
	return a
}

func worker(id string) *record.Worker {
	return &record.Worker{WorkerID: id, Site: "s1", HiredOn: day("2010-01-01")}
}

func TestYearsOfUse(t *testing.T) {
	j := judge(t, "2024-01-01", worker("w1"), worker("w2"), testOf("a3", "w2", "2021-05-03"), testOf("a2", "w1", "2021-05-03"), testOf("a2b", "w1", "2021-05-03"),
		testOf("a1", "w1", "2020-12-31"), testOf("a4", "w1", "2021-06-01"), testOf("a5", "w1", "2024-01-02"),
		calibration("functional", "2021-06-01"), calibration("acoustic", "2020-12-31"))
	d := j.instrument("au")
	assert.Equal(t, []int{5, 2}, []int{d.Tests, d.Workers})
	assert.Equal(t, []dossier.UseYear{
		{Year: "2020", Last: day("2020-12-31"), Days: 1, Unchecked: 1, FirstUnchecked: day("2020-12-31"), Tests: 1, Workers: 1, Ref: "audiogram/a1"},
		{Year: "2021", Last: day("2021-06-01"), Days: 2, Unchecked: 1, FirstUnchecked: day("2021-05-03"), Tests: 3, Workers: 2, Ref: "audiogram/a2"},
	}, d.Years, "an acoustic calibration is no functional check")
	assert.Equal(t, []dossier.Tally{{Date: day("2020-12-31"), Tests: 1, Workers: 1}, {Date: day("2021-05-03"), Tests: 3, Workers: 2}, {Date: day("2021-06-01"), Tests: 1, Workers: 1}},
		j.file("instrument", "au").Uses)
	assert.Equal(t, "audiometer", d.Type, "what tests hearing is an audiometer")
	assert.False(t, d.Known)
}

func TestDeviations(t *testing.T) {
	for name, c := range map[string]struct {
		records              []record.Record
		largest              string
		acoustic, exhaustive string
		beforeA, beforeE     string
	}{
		"A functional check precedes the tests of its day":         {[]record.Record{deviation("functional", "2021-05-03", "", 2, -11)}, "11", "", "", "2021-05-03", "2021-05-03"},
		"An acoustic one does not":                                 {[]record.Record{deviation("acoustic", "2021-05-03", "", 16)}, "16", "", "", "2021-06-01", "2021-06-01"},
		"A remedy of the same day comes before the tests":          {[]record.Record{deviation("functional", "2021-05-03", "", 11), calibration("acoustic", "2021-05-03")}, "11", "2021-05-03", "", "", "2021-05-03"},
		"An exhaustive calibration is an acoustic one, too":        {[]record.Record{deviation("functional", "2021-05-03", "", 11), calibration("exhaustive", "2021-05-10")}, "11", "2021-05-10", "2021-05-10", "2021-05-03", "2021-05-03"},
		"One from the day before is no remedy":                     {[]record.Record{deviation("functional", "2021-05-03", "", 11), calibration("acoustic", "2021-05-02")}, "11", "", "", "2021-05-03", "2021-05-03"},
		"A check that failed without a figure":                     {[]record.Record{&record.Calibration{InstrumentID: "au", Type: "functional", Date: day("2021-05-03"), Result: "fail"}}, "", "", "", "2021-05-03", "2021-05-03"},
		"A check that failed though the figures show no deviation": {[]record.Record{deviation("functional", "2021-05-03", "fail", 0, 0)}, "", "", "", "2021-05-03", "2021-05-03"},
		"After the last use nothing was used":                      {[]record.Record{deviation("acoustic", "2021-06-01", "", 16)}, "16", "", "", "", ""},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", append(c.records, worker("w1"), testOf("a1", "w1", "2021-05-03"), testOf("a2", "w1", "2021-06-01"))...).instrument("au")
			require.Len(t, d.Deviations, 1)
			x := d.Deviations[0]
			assert.Equal(t, []string{c.largest, c.acoustic, c.exhaustive, c.beforeA, c.beforeE},
				[]string{x.Largest.String(), dateOf(x.Acoustic), dateOf(x.Exhaustive), dateOf(x.UsedBeforeAcoustic), dateOf(x.UsedBeforeExhaustive)})
		})
	}
	for _, c := range []*record.Calibration{deviation("functional", "2021-05-03", "pass", 0, 0), calibration("functional", "2021-05-03"), deviation("laboratory", "2021-05-03", "", 9), deviation("functional", "2024-01-02", "fail")} {
		assert.Empty(t, judge(t, "2024-01-01", c, worker("w1"), testOf("a1", "w1", "2021-05-03")).instrument("au").Deviations)
	}
}

func TestTimeInUse(t *testing.T) {
	in := func(from, to string) *record.Instrument {
		return &record.Instrument{InstrumentID: "au", Site: "s1", Type: "audiometer", InServiceFrom: day(from), InServiceTo: day(to)}
	}
	for name, c := range map[string]struct {
		reg  *record.Instrument
		used bool
		want string
	}{
		"From the first day in service to the last, that one included": {in("2020-01-01", "2022-12-31"), true, "2020-01-01..2022-12-31"},
		"Open where nothing is said":                                   {in("2020-01-01", ""), true, "2020-01-01.."},
		"From the first test where that is not recorded":               {in("", ""), true, "2021-05-03.."},
		"Or where it comes before the first day":                       {in("2021-06-01", ""), true, "2021-05-03.."},
		"To the last test where it is used after the end":              {in("", "2021-01-01"), true, "2021-05-03..2021-05-10"},
		"In service without use":                                       {in("2020-01-01", ""), false, "2020-01-01.."},
		"Neither in service nor used":                                  {in("", ""), false, ""},
		"Not in service yet":                                           {in("2024-01-02", ""), false, ""},
	} {
		t.Run(name, func(t *testing.T) {
			records := []record.Record{c.reg, worker("w1")}
			if c.used {
				records = append(records, testOf("a1", "w1", "2021-05-03"), testOf("a2", "w1", "2021-05-10"))
			}
			s := judge(t, "2024-01-01", records...).instrument("au").InUse
			if c.want == "" {
				assert.Nil(t, s)
				return
			}
			require.NotNil(t, s)
			assert.Equal(t, c.want, stretchText(s.From, s.To))
		})
	}
}

func TestNoiseInstruments(t *testing.T) {
	with := func(m *record.Measurement, before, after float64) *record.Measurement {
		return but(m, func(m *record.Measurement) {
			m.InstrumentID = "ds"
			m.CheckBeforeDB, m.CheckAfterDB = record.Number{Value: before, Known: before > 0}, record.Number{Value: after, Known: after > 0}
		})
	}
	area := but(with(measured("m3", "", "2021-03-01", 20), 0, 0), func(m *record.Measurement) { m.Area, m.Type = "hall-g1", "area" })
	cal := &record.Calibration{InstrumentID: "ds", Type: "laboratory", Date: day("2021-02-01"), Result: "fail"}
	g2 := group("g2")
	g2.Area = "hall-g1"
	j := judge(t, "2024-01-01", worker("w1"), group("g1"), g2, cal, with(measured("m1", "g1", "2021-01-01", 60), 114, 0), with(threshold(measured("m1", "g1", "2021-01-01", 50), 90), 0, 114.1),
		with(own("m2", "2021-02-01", 60), 0, 0), area)
	use := j.instrument("ds").NoiseUse
	require.Len(t, use, 3, "rows of one measurement are one use, and so is an area of two groups")
	assert.Equal(t, []record.Number{record.Num(114), record.Num(114.1)}, []record.Number{use[0].CheckBefore, use[0].CheckAfter}, "the checks may stand in different rows")
	assert.Equal(t, []string{"", "2021-02-01", "2021-02-01"}, []string{dateOf(use[0].Calibrated), dateOf(use[1].Calibrated), dateOf(use[2].Calibrated)}, "a calibration on the day counts")
	assert.Equal(t, []bool{false, true, true}, []bool{use[0].Failed, use[1].Failed, use[2].Failed})
	assert.Equal(t, 3, j.siteDossier().Measurements)
}

func TestRoomsAndTesters(t *testing.T) {
	survey := func(date string, db float64) *record.RoomSurvey {
		s := &record.RoomSurvey{RoomID: "r1", Date: day(date)}
		s.Band[3] = record.Num(db)
		return s
	}
	tester := &record.Tester{TesterID: "t1", Qualification: "technician", ValidFrom: day("2020-01-01"), ValidTo: day("2021-12-31"), Supervisor: "t2"}
	nameless := testOf("a9", "w1", "2021-07-01")
	nameless.RoomID, nameless.TesterID, nameless.AudiometerID = "", "", ""
	j := judge(t, "2024-01-01", worker("w1"), tester, &record.Tester{TesterID: "t2", Qualification: "audiologist"}, survey("2021-01-01", 38), survey("2020-01-01", 42), survey("2024-01-02", 50), nameless,
		testOf("a1", "w1", "2019-12-31"), testOf("a2", "w1", "2020-01-01"), testOf("a3", "w1", "2021-12-31"), testOf("a4", "w1", "2022-01-01"), testOf("a5", "w1", "2024-01-02"))
	d := j.file("tester", "t1").Input.(*dossier.Tester)
	assert.Equal(t, []int{4, 2}, []int{d.Tests, d.Outside}, "first and last day of validity count")
	assert.Equal(t, []string{"2019-12-31", "2022-01-01", "2019-12-31"}, []string{dateOf(d.First), dateOf(d.Last), dateOf(d.FirstOutside)})
	assert.Equal(t, []string{"technician", "audiologist"}, []string{d.Qualification, d.SupervisorIs})
	room := j.file("room", "r1").Input.(*dossier.Room)
	assert.Equal(t, "2021-01-01", room.Latest.Date.String())
	assert.Equal(t, record.Num(38), room.Latest.Band["500"])
	assert.False(t, room.Latest.Band["1000"].Known)
	assert.Len(t, room.Surveys, 2)
	for _, kind := range []string{"room", "tester", "instrument"} {
		assert.Equal(t, []dossier.Tally{{Date: day("2021-07-01"), Tests: 1, Workers: 1}}, j.file(kind, "(not recorded)").Uses)
	}
}

func TestMissingMeasurements(t *testing.T) {
	told := func(worker, id, date string) *record.Notice {
		return &record.Notice{WorkerID: worker, About: "exposure", MeasurementID: id, Date: day(date)}
	}
	j := judge(t, "2024-01-01", worker("w1"), worker("w2"), group("g1"), measured("m1", "g1", "2020-01-01", 60), own("o1", "2020-01-01", 60),
		told("w1", "m1", "2020-02-01"), told("w2", "o1", "2020-02-01"), told("w1", "m9", "2020-02-01"), told("w2", "m9", "2021-02-01"), told("w1", "m8", "2024-01-02"))
	assert.Equal(t, []dossier.Dangling{{Link: dossier.Link{Date: day("2021-02-01"), Ref: "notice/exposure/w2@2021-02-01"}, ID: "m9"}}, j.siteDossier().MissingMeasurements,
		"one that another worker wore is on record, and of several references the latest is cited")
}

func TestLogYears(t *testing.T) {
	entry := func(worker, date string) *record.FollowUp {
		return &record.FollowUp{WorkerID: worker, Type: "log_entry", Date: day(date)}
	}
	log := func(date string, years ...string) *record.Document {
		return &record.Document{Type: "injury_log", Site: "s1", Date: day(date), Covers: years}
	}
	d := judge(t, "2024-01-01", worker("w1"), worker("w2"), entry("w1", "2020-12-31"), entry("w2", "2021-01-01"), entry("w1", "2021-12-31"), entry("w1", "2024-01-02"),
		log("2022-01-15", "2021"), log("2024-01-02", "2020")).siteDossier()
	require.Len(t, d.LogYears, 2)
	assert.Equal(t, []string{"2020", "2020-12-31", ""}, []string{d.LogYears[0].Year, d.LogYears[0].Latest.Date.String(), dateOf(d.LogYears[0].Kept)})
	assert.Equal(t, []string{"2021", "2021-12-31", "2022-01-15"}, []string{d.LogYears[1].Year, d.LogYears[1].Latest.Date.String(), dateOf(d.LogYears[1].Kept)})
	assert.Equal(t, []int{1, 2}, []int{d.LogYears[0].Entries, d.LogYears[1].Entries})
}

func TestGroupFacts(t *testing.T) {
	evaluation := func(date, group, area, site string) *record.Document {
		return &record.Document{Type: "attenuation_evaluation", Date: day(date), Group: group, Area: area, Site: site}
	}
	max := but(measured("m1", "g1", "2020-01-10", 60), func(m *record.Measurement) {
		m.MaxDBA, m.PeakDB, m.PeakWeighting = record.Num(104), record.Num(130), "C"
	})
	row := but(threshold(max, 90), func(m *record.Measurement) {
		m.MaxDBA, m.PeakDB, m.PeakWeighting, m.ObserversInvited = record.Num(106), record.Num(128), "Z", record.Yes
	})
	j := judge(t, "2024-01-01", worker("w1"), group("g1"), max, row, measured("m2", "g1", "2021-05-01", 40), changed("c1", "2021-05-01", "no"), changed("c2", "2024-01-02", "yes"),
		evaluation("2021-04-30", "g1", "", ""), evaluation("2021-06-01", "g2", "", ""), evaluation("2021-07-01", "", "hall-g1", ""), evaluation("2021-08-01", "", "", "s1"),
		own("o1", "2021-06-01", 20), &record.Control{Group: "g1", Date: day("2021-01-01"), InstalledOn: day("2024-01-02"), Type: "engineering"})
	d := j.group()
	require.Len(t, d.Measurements, 2)
	m := d.Measurements[0]
	assert.Equal(t, []record.Number{record.Num(106), record.Num(130), record.Num(80), record.Num(130)}, []record.Number{m.MaxDBA, m.PeakDB, m.Threshold, m.Upper})
	assert.Equal(t, "C", m.PeakWeighting)
	assert.Equal(t, record.Yes, m.ObserversInvited)
	assert.Equal(t, []bool{false, true}, []bool{m.Current, d.Measurements[1].Current}, "measured again on the day of the change")
	assert.Equal(t, []bool{true, false}, []bool{m.Repeated, d.Measurements[1].Repeated})
	assert.Equal(t, []record.Answer{record.Yes, record.No}, []record.Answer{m.Reaches, d.Measurements[1].Reaches})
	require.Len(t, d.Changes, 1)
	assert.Equal(t, []string{"2021-05-01", "2021-07-01"}, []string{dateOf(d.Changes[0].Measured), dateOf(d.Changes[0].Evaluated)})
	assert.False(t, d.Controls[0].Installed.Known(), "put in place after the as-of day")
	assert.Len(t, d.Documents, 3)
	assert.Equal(t, "2020-01-10", dateOf(d.FirstSurvey))
	assert.True(t, j.has("group", "(not recorded)"), "what a worker without group wore stands for no group")
	loose := j.file("group", "(not recorded)").Input.(*dossier.Group)
	assert.Equal(t, "2021-06-01", dateOf(loose.FirstSurvey))
	assert.True(t, slices.IsSortedFunc(d.Exposures, func(a, b dossier.Exposure) int { return int(a.From - b.From) }))
}
