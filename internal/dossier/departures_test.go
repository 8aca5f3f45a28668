package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// leaver is employed up to and including 31 March 2025, and again later where asked for.
func leaver(again bool, more ...record.Record) []record.Record {
	out := append([]record.Record{&record.Worker{WorkerID: "w1", Site: "s1", HiredOn: day("2022-01-10"), LeftOn: day("2025-03-31")}}, more...)
	if again {
		out = append(out, &record.Worker{WorkerID: "w1", Site: "s1", HiredOn: day("2025-09-01")})
	}
	return out
}

func attended(id, kind, on string) *record.Examination {
	return &record.Examination{ExaminationID: id, WorkerID: "w1", Type: kind, AttendedOn: day(on)}
}

// TestDepartures: days are counted up to the last day of the employment, on which an examination has the age 0.
func TestDepartures(t *testing.T) {
	for name, c := range map[string]struct {
		records     []record.Record
		test, visit record.Number
		after       [2]string // days of the first test and appointment afterwards
	}{
		"nothing on record":                 {nil, record.Number{}, record.Number{}, [2]string{}},
		"on the last day":                   {[]record.Record{tested("a1", "2025-03-31", "exit", 10, 10), attended("e1", "health_appointment", "2025-03-31")}, record.Num(0), record.Num(0), [2]string{}},
		"the latest one counts":             {[]record.Record{tested("a1", "2024-01-10", "periodic", 10, 10), tested("a2", "2024-12-01", "periodic", 10, 10)}, record.Num(120), record.Number{}, [2]string{}},
		"the day after is afterwards":       {[]record.Record{tested("a1", "2025-04-01", "exit", 10, 10), tested("a2", "2025-05-01", "exit", 10, 10)}, record.Number{}, record.Number{}, [2]string{"2025-04-01", ""}},
		"a test with an outcome only":       {[]record.Record{attended("e1", "hearing_test", "2025-03-01"), attended("e2", "health_appointment", "2025-04-10")}, record.Num(30), record.Number{}, [2]string{"", "2025-04-10"}},
		"what lies after the as-of day":     {[]record.Record{attended("e1", "health_appointment", "2027-01-01")}, record.Number{}, record.Number{}, [2]string{}},
		"an offer that nobody has attended": {[]record.Record{&record.Examination{ExaminationID: "e1", WorkerID: "w1", Type: "health_appointment", OfferedOn: day("2025-03-01")}}, record.Number{}, record.Number{}, [2]string{}},
	} {
		t.Run(name, func(t *testing.T) {
			found := judge(t, "2026-06-30", leaver(false, c.records...)...).worker().Departures
			require.Len(t, found, 1)
			d := found[0]
			assert.Equal(t, []dossier.Date{day("2022-01-10"), day("2025-03-31")}, []dossier.Date{d.From, d.Last})
			assert.Equal(t, []record.Number{c.test, c.visit}, []record.Number{d.TestAge, d.AppointmentAge})
			for i, link := range []*dossier.Link{d.TestAfter, d.Appointment} {
				if c.after[i] == "" {
					assert.Nil(t, link)
				} else {
					require.NotNil(t, link)
					assert.Equal(t, c.after[i], link.Date.String())
				}
			}
		})
	}
	again := judge(t, "2026-06-30", leaver(true)...).worker()
	assert.Len(t, again.Departures, 1, "an employment that goes on has no end")
	beforehand := judge(t, "2025-01-31", leaver(false)...).worker()
	assert.Len(t, beforehand.Departures, 1, "an end that is known beforehand")
	assert.Empty(t, judge(t, "2026-06-30", noisy()...).worker().Departures)
}

// TestBaselinesInForce: each ear's baseline when a test was made, with a decision to put a later test in its place.
func TestBaselinesInForce(t *testing.T) {
	revision := follow("baseline_revision", "a2", "2021-04-01")
	revision.Ear = "left"
	w := judge(t, "2024-01-01", noisy(
		tested("a1", "2020-03-01", "baseline", 10, 10), tested("a2", "2021-03-01", "periodic", 30, 10), tested("a3", "2022-03-01", "periodic", 30, 10), revision,
	)...).worker()
	require.Len(t, w.Audiograms, 3)
	got := [][2]string{}
	for _, a := range w.Audiograms {
		got = append(got, [2]string{a.BaselineLeft, a.BaselineRight})
	}
	assert.Equal(t, [][2]string{{"", ""}, {"audiogram/a1", "audiogram/a1"}, {"audiogram/a2", "audiogram/a1"}}, got)
}

func TestCertificateOfTheProtector(t *testing.T) {
	p := judge(t, "2024-01-01", noisy(
		&record.Protector{ProtectorID: "p1", Certificate: "12345", CertifiedTo: day("2025-05-01")},
		&record.ProtectorIssue{WorkerID: "w1", ProtectorID: "p1", Date: day("2023-01-10")},
	)...).worker().Protection
	require.NotNil(t, p)
	assert.Equal(t, "12345", p.Certificate)
	assert.Equal(t, day("2025-05-01"), p.CertifiedTo, "the validity is told although it lies after the as-of day")
}
