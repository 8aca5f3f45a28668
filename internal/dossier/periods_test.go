package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// periods is a law of which evaluations hold for five years and reports stay posted for three months, since 16 June 2023.
type periods struct{ dossier.Law }

func (p periods) Interval(name string, on calendar.Date) (calendar.Interval, bool) {
	if on < day("2023-06-16") {
		return calendar.Interval{}, false
	}
	switch name {
	case "five":
		return calendar.Interval{Count: 5, Unit: calendar.Years}, true
	case "two":
		return calendar.Interval{Count: 2, Unit: calendar.Years}, true
	case "three":
		return calendar.Interval{Count: 3, Unit: calendar.Months}, true
	}
	return calendar.Interval{}, false
}

func (p periods) Days(name string) []calendar.Date {
	if name == "five" {
		return []calendar.Date{day("2030-01-01"), day("2023-06-16")}
	}
	return p.Law.Days(name)
}

func evaluated(on string) *record.Document {
	return &record.Document{Type: "noise_evaluation", Site: "s1", Date: day(on)}
}

func judgePeriods(t *testing.T, records ...record.Record) *judged {
	m := osha().Measures
	m.Documents = dossier.DocumentMeasures{PostedFor: "three", Periodic: "noise_evaluation", Every: "five", Short: "two"}
	return asked{asOf: "2026-06-30", measures: m, law: periods{osha()}}.judge(t, append(records, &record.Group{Group: "g1", Site: "s1"})...)
}

func TestPeriodsOfEvaluations(t *testing.T) {
	list := judgePeriods(t, evaluated("2022-02-01"), evaluated("2024-02-01"), evaluated("2026-07-01")).group().Evaluations
	type period struct {
		date, ends string
		early      bool
	}
	var got []period
	for _, e := range list {
		got = append(got, period{e.Date.String(), e.Ends.String(), e.Early})
	}
	assert.Equal(t, []period{{"2022-02-01", "2024-02-01", true}, {"2024-02-01", "2029-02-01", false}}, got)

	early := judgePeriods(t, evaluated("2022-02-01")).group().Evaluations
	assert.Equal(t, "2028-06-16", early[0].Ends.String(), "an early one counts from the first day of the law")
}

func TestPeriodOfAChange(t *testing.T) {
	for on, want := range map[string]struct {
		ends  string
		short record.Answer
	}{
		"2024-01-31": {"", record.Unanswered}, // before the first evaluation
		"2024-02-01": {"2029-02-01", record.No},
	} {
		change := judgePeriods(t, evaluated("2024-02-01"), &record.Change{ChangeID: "c1", Group: "g1", Date: day(on)}).group().Changes[0]
		assert.Equal(t, day(want.ends), change.PeriodEnds, on)
		assert.Equal(t, want.short, change.PeriodShort, on)
	}
	// A period that ends two years after the change is not short, one that ends a day sooner is.
	for on, want := range map[string]record.Answer{"2026-06-16": record.No, "2026-06-17": record.Yes} {
		change := judgePeriods(t, evaluated("2023-06-16"), &record.Change{ChangeID: "c1", Group: "g1", Date: day(on)}).group().Changes[0]
		assert.Equal(t, want, change.PeriodShort, on)
	}
}

func TestHowLongAReportStaysPosted(t *testing.T) {
	report := func(posted string) *record.Document {
		return &record.Document{Type: "noise_measurement_report", Site: "s1", Date: day("2023-06-01"), PostedOn: day(posted)}
	}
	for posted, until := range map[string]string{"2023-08-04": "2023-11-03", "2023-06-15": "", "2026-07-01": "", "": ""} {
		got := judgePeriods(t, report(posted)).siteDossier().Documents[0].PostUntil
		assert.Equal(t, day(until), got, posted)
	}
}

func TestWithoutPeriodsNothingIsWorkedOut(t *testing.T) {
	g := judge(t, "2026-06-30", evaluated("2024-02-01"), &record.Group{Group: "g1", Site: "s1"}, &record.Change{ChangeID: "c1", Group: "g1", Date: day("2025-01-01")}).group()
	assert.Empty(t, g.Evaluations)
	assert.NotNil(t, g.Evaluations)
	assert.False(t, g.Changes[0].PeriodEnds.Known())
	assert.Equal(t, record.Unanswered, g.Changes[0].PeriodShort)
	assert.False(t, g.Documents[0].PostUntil.Known())
}
