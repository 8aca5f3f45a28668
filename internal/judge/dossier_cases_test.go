package judge

import (
	"context"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// These tests follow records through dossier, rule and clock. What a dossier holds is tested in its package.

func on(text string) calendar.Date {
	if text == "" {
		return 0
	}
	return calendar.MustParse(text)
}

// findingsOf judges records at the sites s1 and s2 and gives the findings of one duty, "site key status due done" each,
// with the findings themselves.
func findingsOf(t *testing.T, asOf, duty string, records ...record.Record) ([]string, []finding.Finding) {
	t.Helper()
	library, err := bundle.Embedded()
	require.NoError(t, err)
	id := "us-osha-general-industry"
	p := &program.Program{Title: "dossier cases", Sites: []program.Site{{ID: "s1", Country: "US", Bundles: []string{id}}, {ID: "s2", Country: "US", Bundles: []string{id}}}}
	report, err := Check(context.Background(), Options{
		Program: p, Library: library, AsOf: on(asOf), All: true,
		read: func(_ context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			for i, rec := range records {
				rec.SetAt(record.Origin{Row: int32(i + 1)})
				if err := emit(rec); err != nil {
					return nil, err
				}
			}
			return &intake.Ledger{Inputs: []intake.Input{{File: "case"}}}, nil
		},
	})
	require.NoError(t, err)
	var short []string
	var list []finding.Finding
	for _, f := range report.Findings {
		if f.Duty == duty {
			short = append(short, f.Site+" "+f.Key+" "+string(f.Status)+" "+f.Due.String()+" "+f.Done.String())
			list = append(list, f)
		}
	}
	return short, list
}

func employed(site, from, to string) *record.Worker {
	return &record.Worker{WorkerID: "w1", Site: site, HiredOn: on(from), LeftOn: on(to)}
}

func inGroup(group, from, to string) *record.Assignment {
	return &record.Assignment{WorkerID: "w1", Group: group, From: on(from), To: on(to)}
}

func doseOf(id, group, date string, exchange, dose float64) *record.Measurement {
	return &record.Measurement{MeasurementID: id, Group: group, Date: on(date), Type: "personal", FullShift: record.Yes,
		CriterionDB: record.Num(90), ExchangeDB: record.Num(exchange), ThresholdDB: record.Num(80), UpperDB: record.Num(130), DosePct: record.Num(dose)}
}

func testOn(id, date, purpose string) *record.Audiogram {
	a := &record.Audiogram{AudiogramID: id, WorkerID: "w1", Date: on(date), Purpose: purpose}
	for i := range a.Left {
		a.Left[i] = audiometry.Threshold{Tenths: 100, State: audiometry.Measured}
	}
	a.Right = a.Left
	return a
}

func groups() []record.Record {
	return []record.Record{
		&record.Group{Group: "g1", Site: "s1", SuspectedNoisy: record.Yes}, &record.Group{Group: "g2", Site: "s2", SuspectedNoisy: record.Yes}, &record.Group{Group: "quiet", Site: "s1", SuspectedNoisy: record.No},
		doseOf("m1", "g1", "2015-01-10", 5, 75), doseOf("m2", "g2", "2015-01-10", 5, 80), doseOf("m0", "quiet", "2015-01-10", 5, 10),
	}
}

func TestBaselineFromRecordsToFindings(t *testing.T) {
	for name, c := range map[string]struct {
		asOf    string
		records []record.Record
		want    []string
	}{
		"The time runs from the assignment to the loud group, not from the hire": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", ""), inGroup("quiet", "2018-01-01", "2020-05-31"), inGroup("g1", "2020-06-01", "")},
			[]string{"s1 2020-06-01 gap 2020-12-01 "}},
		"An obligation dies with its spell, and who is hired again has a new one": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-03-31"), employed("s1", "2020-01-01", ""), inGroup("g1", "2018-01-01", "")},
			[]string{"s1 2020-01-01 gap 2020-07-01 "}},
		"A test of the second employment is not a late one of the first": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-03-31"), employed("s1", "2020-01-01", ""), inGroup("g1", "2018-01-01", ""), testOn("a1", "2020-02-01", "baseline")},
			[]string{"s1 2020-01-01 met 2020-07-01 2020-02-01"}},
		"A test of the first employment serves the second": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-03-31"), employed("s1", "2020-01-01", ""), inGroup("g1", "2018-01-01", ""), testOn("a1", "2018-02-01", "baseline")},
			[]string{"s1 2018-01-01 met 2018-07-01 2018-02-01", "s1 2020-01-01 met 2020-07-01 2018-02-01"}},
		"Who leaves on the last day of the time owed the test": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-07-01"), inGroup("g1", "2018-01-01", "")},
			[]string{"s1 2018-01-01 gap 2018-07-01 "}},
		"Who leaves on the day before did not": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-06-30"), inGroup("g1", "2018-01-01", "")}, nil},
		"On an earlier day the test has not been made": {"2018-06-30",
			[]record.Record{employed("s1", "2018-01-01", ""), inGroup("g1", "2018-01-01", ""), testOn("a1", "2018-07-01", "baseline")},
			[]string{"s1 2018-01-01 due 2018-07-01 "}},
		"On the day of the test it has": {"2018-07-01",
			[]record.Record{employed("s1", "2018-01-01", ""), inGroup("g1", "2018-01-01", ""), testOn("a1", "2018-07-01", "baseline")},
			[]string{"s1 2018-01-01 met 2018-07-01 2018-07-01"}},
		"Each site judges its own stretch": {"2022-01-01",
			[]record.Record{employed("s1", "2018-01-01", "2018-12-31"), employed("s2", "2019-01-01", ""), inGroup("g1", "2018-01-01", "2018-12-31"), inGroup("g2", "2019-01-01", "")},
			[]string{"s1 2018-01-01 gap 2018-07-01 ", "s2 2019-01-01 gap 2019-07-01 "}},
	} {
		t.Run(name, func(t *testing.T) {
			got, _ := findingsOf(t, c.asOf, "baseline-audiogram", append(groups(), c.records...)...)
			assert.ElementsMatch(t, c.want, got)
		})
	}
}

func TestExposureFromRecordsToFindings(t *testing.T) {
	worker := []record.Record{employed("s1", "2020-01-01", ""), inGroup("g1", "2020-01-01", "")}
	noisy := &record.Group{Group: "g1", Site: "s1", SuspectedNoisy: record.Yes}
	for name, c := range map[string]struct {
		records []record.Record
		status  finding.Status
		says    string
	}{
		"A dose taken at 3 dB exchange is not converted": {[]record.Record{noisy, doseOf("m1", "g1", "2019-01-10", 3, 75)}, finding.Unproven, "criterion level 90 dBA and 3 dB exchange rate, not 90 dBA and 5 dB"},
		"Tasks are computed":                             {[]record.Record{noisy, &record.Task{Group: "g1", Task: "fettling", Date: on("2019-01-10"), Minutes: record.Num(480), Samples: record.List{"86"}}}, finding.Met, ""},
		"A value from before a change that may raise exposure is not current": {[]record.Record{noisy, doseOf("m1", "g1", "2019-01-10", 5, 20),
			&record.Change{ChangeID: "c1", Group: "g1", Date: on("2021-01-01")}}, finding.Unproven, "not measured since the change c1 of 2021-01-01, which may have raised exposure"},
		"Nor is it when a control was put in place on the same day": {[]record.Record{noisy, doseOf("m1", "g1", "2019-01-10", 5, 20), &record.Change{ChangeID: "c1", Group: "g1", Date: on("2021-01-01")},
			&record.Control{Group: "g1", Date: on("2020-12-01"), InstalledOn: on("2021-01-01"), Type: "engineering"}}, finding.Unproven, "not measured since the change c1 of 2021-01-01, which may have raised exposure"},
		"A first measurement is not taken backwards across such a change": {[]record.Record{noisy, doseOf("m1", "g1", "2021-02-01", 5, 20), &record.Change{ChangeID: "c1", Group: "g1", Date: on("2021-01-01")}}, finding.Unproven,
			"the first measurement is of 2021-02-01, and the change c1 of 2021-01-01, which may have raised exposure, lies between"},
		"Otherwise it is": {[]record.Record{noisy, doseOf("m1", "g1", "2021-02-01", 5, 20)}, finding.Met, ""},
	} {
		t.Run(name, func(t *testing.T) {
			_, list := findingsOf(t, "2022-01-01", "enrolment", append(c.records, worker...)...)
			require.Len(t, list, 1)
			assert.Equal(t, c.status, list[0].Status)
			assert.Contains(t, list[0].Message, c.says)
		})
	}
	_, list := findingsOf(t, "2022-01-01", "exposure-notice", append(worker, noisy, doseOf("m1", "g1", "2019-01-10", 5, 75), doseOf("m2", "g1", "2019-02-10", 5, 90), doseOf("m3", "g1", "2019-03-10", 5, 60))...)
	require.Len(t, list, 1, "the highest of several results puts the worker into the program")
	assert.Equal(t, "m2", list[0].Key)
	assert.EqualValues(t, 90, list[0].Facts["dose_pct"])
	assert.Equal(t, []finding.Evidence{{Record: "measurement/m2", File: "case", Row: 5}}, list[0].Evidence)
}

func TestRecordsOfLaterDaysGiveNoFindings(t *testing.T) {
	early := append(groups(), employed("s1", "2018-01-01", ""), inGroup("g1", "2018-01-01", ""), testOn("a1", "2018-02-01", "baseline"))
	late := []record.Record{employed("s2", "2020-01-01", ""), inGroup("quiet", "2019-07-01", ""), testOn("a2", "2019-07-01", "periodic"), doseOf("m9", "g1", "2019-07-01", 5, 10),
		&record.Change{ChangeID: "c1", Group: "g1", Date: on("2019-07-01")}, &record.FollowUp{WorkerID: "w1", AudiogramID: "a1", Type: "invalidated", Date: on("2019-07-01")}}
	for _, duty := range []string{"enrolment", "baseline-audiogram", "annual-audiogram", "monitoring-started", "monitoring-repeated", "noise-records-kept"} {
		_, before := findingsOf(t, "2019-06-30", duty, early...)
		_, after := findingsOf(t, "2019-06-30", duty, append(early, late...)...)
		assert.Equal(t, duty == "monitoring-repeated", len(before) == 0, duty)
		assert.Equal(t, before, after, duty)
	}
}
