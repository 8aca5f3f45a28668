package intake

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

func TestObserveTests(t *testing.T) {
	day := calendar.MustParse("2025-03-04")
	test := func(level string, purpose string) *record.Audiogram {
		a := &record.Audiogram{WorkerID: "1", Date: day, Purpose: purpose}
		table, _ := record.TableOf("audiogram")
		table.Set(a, table.Index("left.500"), level)
		return a
	}
	another := test("20", "")
	another.WorkerID = "2"
	later := test("20", "")
	later.Date++
	for _, c := range []struct {
		name string
		a, b *record.Audiogram
		want []string
	}{
		{"differ", test("10", "periodic"), test("20", "periodic"), []string{SameDayTests}},
		{"retest", test("10", "periodic"), test("20", "retest"), nil},
		{"retest first", test("10", "retest"), test("20", ""), nil},
		{"the same", test("10", "periodic"), test("10", "retest"), []string{SameTestTwice}},
		{"nothing measured", test("", ""), test("", ""), nil},
		{"one without levels", test("", ""), test("10", ""), []string{SameDayTests}},
		{"another worker", test("10", ""), another, nil},
		{"another day", test("10", ""), later, nil},
	} {
		l := &Ledger{Inputs: []Input{{File: "a.csv"}}}
		o := newObserver(l)
		c.a.SetAt(record.Origin{Row: 2})
		c.b.SetAt(record.Origin{Row: 7})
		o.look(c.a)
		o.look(c.b)
		var kinds []string
		for _, seen := range l.Observations {
			kinds = append(kinds, seen.Kind)
			assert.Equal(t, 7, seen.Row)
			assert.Equal(t, []Place{{File: "a.csv", Row: 2}}, seen.Others)
		}
		assert.Equal(t, c.want, kinds, c.name)
	}
}

func TestObserveMeasurements(t *testing.T) {
	n := record.Num
	for _, c := range []struct {
		name string
		m    record.Measurement
		want []string
	}{
		{"nothing known", record.Measurement{}, nil},
		{"drift of half a decibel", record.Measurement{CheckBeforeDB: n(114), CheckAfterDB: n(114.5)}, nil},
		{"drift of more", record.Measurement{CheckBeforeDB: n(114), CheckAfterDB: n(113.4)}, []string{CheckDrift}},
		{"run as long as the shift", record.Measurement{RunMinutes: n(481), ShiftMinutes: n(480)}, nil},
		{"run beyond the shift", record.Measurement{RunMinutes: n(490), ShiftMinutes: n(480)}, []string{RunBeyondShift}},
		// Values of 29 CFR 1910.95 App. A: 16.61 lg(62.5/100) + 90 = 86.61.
		{"average of its dose", record.Measurement{CriterionDB: n(90), ExchangeDB: n(5), DosePct: n(62.5), TWADBA: n(86.6)}, nil},
		{"within 0.2 dB", record.Measurement{CriterionDB: n(90), ExchangeDB: n(5), DosePct: n(62.5), TWADBA: n(86.8)}, nil},
		{"beyond 0.2 dB", record.Measurement{CriterionDB: n(90), ExchangeDB: n(5), DosePct: n(62.5), TWADBA: n(86.9)}, []string{TWANotOfDose}},
		{"average of 11.4 h", record.Measurement{CriterionDB: n(90), ExchangeDB: n(5), DosePct: n(212.4), TWADBA: n(92.88), RunMinutes: n(684)}, []string{AverageForTWA}},
		{"no exchange rate", record.Measurement{CriterionDB: n(90), DosePct: n(62.5), TWADBA: n(92)}, nil},
		{"Leq for 8 h", record.Measurement{ExchangeDB: n(3), LAeqDBA: n(84.1), TWADBA: n(84.1), RunMinutes: n(684), FullShift: record.Yes}, []string{AverageForTWA}},
		{"Leq over part of the shift", record.Measurement{ExchangeDB: n(3), LAeqDBA: n(84.1), TWADBA: n(84.1), RunMinutes: n(684)}, nil},
		{"Leq over 8 h", record.Measurement{ExchangeDB: n(3), LAeqDBA: n(84.1), TWADBA: n(84.1), RunMinutes: n(480), FullShift: record.Yes}, nil},
	} {
		l := &Ledger{Inputs: []Input{{}}}
		newObserver(l).look(&c.m)
		var kinds []string
		for _, seen := range l.Observations {
			kinds = append(kinds, seen.Kind)
		}
		assert.Equal(t, c.want, kinds, c.name)
	}
}

func TestObserveDoses(t *testing.T) {
	n := record.Num
	l := &Ledger{Inputs: []Input{{}}}
	o := newObserver(l)
	row := func(id string, at int32, threshold, dose float64) {
		m := &record.Measurement{MeasurementID: id, CriterionDB: n(90), ExchangeDB: n(5), ThresholdDB: n(threshold), DosePct: n(dose)}
		m.SetAt(record.Origin{Row: at})
		o.look(m)
	}
	row("A", 2, 80, 62.5)
	row("A", 3, 90, 70)
	row("B", 4, 90, 40)
	row("B", 5, 80, 62.5)
	row("C", 6, 90, 90)
	assert.Len(t, l.Observations, 1)
	assert.Equal(t, []Place{{Row: 2}}, l.Observations[0].Others)
	assert.Equal(t, []string{"1 pair of doses that cannot both be right"}, l.ObservationCounts())
}

func TestObserveBaselines(t *testing.T) {
	l := &Ledger{Inputs: []Input{{File: "a.csv"}}}
	o := newObserver(l)
	for i, a := range []record.Audiogram{
		{WorkerID: "1", Date: 730000, Purpose: "baseline"}, {WorkerID: "2", Date: 730000, Purpose: "baseline"},
		{WorkerID: "1", Date: 730100, Purpose: "periodic"}, {WorkerID: "1", Date: 730200, Purpose: "baseline"},
	} {
		a.SetAt(record.Origin{Row: int32(i + 2)})
		o.look(&a)
	}
	require.Len(t, l.Observations, 1)
	require.Equal(t, BaselineTwice, l.Observations[0].Kind)
	require.Equal(t, 5, l.Observations[0].Row)
	require.Equal(t, []Place{{File: "a.csv", Row: 2}}, l.Observations[0].Others)
	require.Equal(t, []string{"1 second test marked as baseline"}, l.ObservationCounts())
}
