package calendar_test

import (
	"encoding/json"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
)

func TestAfter(t *testing.T) {
	for _, c := range []struct {
		from  string
		count int
		unit  calendar.Unit
		want  string
	}{
		{"2024-02-08", 21, calendar.Days, "2024-02-29"},
		{"2023-02-08", 21, calendar.Days, "2023-03-01"},
		{"2024-12-31", 1, calendar.Days, "2025-01-01"},
		{"2024-08-31", 6, calendar.Months, "2025-02-28"},
		{"2024-02-29", 1, calendar.Years, "2025-02-28"},
		{"2024-02-29", 4, calendar.Years, "2028-02-29"},
		{"2024-01-01", 0, calendar.CalendarYears, "2024-12-31"},
		{"2024-01-01", 1, calendar.CalendarYears, "2025-12-31"},
		{"2024-12-31", 1, calendar.CalendarYears, "2025-12-31"},
		{"2024-02-29", 5, calendar.CalendarYears, "2029-12-31"},
		{"2024-07-04", 0, calendar.Days, "2024-07-04"},
	} {
		got, err := calendar.Interval{Count: c.count, Unit: c.unit}.After(calendar.MustParse(c.from), nil)
		require.NoError(t, err)
		assert.Equal(t, c.want, got.String(), "%s + %d %s", c.from, c.count, c.unit)
	}
	_, err := calendar.Interval{Count: 3, Unit: "weeks"}.After(firstDay, nil)
	assert.Error(t, err)
	_, err = calendar.Interval{Count: 3, Unit: calendar.WorkingDays}.After(firstDay, nil)
	assert.EqualError(t, err, "3 working days cannot be counted: no calendar of working days is given")
}

// TestWorkingDays counts around the end of 2024; 25 December 2024 was a Wednesday.
func TestWorkingDays(t *testing.T) {
	w := &calendar.WorkingWeek{
		Weekend: [7]bool{time.Saturday: true, time.Sunday: true},
		Holidays: map[calendar.Date]bool{
			calendar.MustParse("2024-12-25"): true,
			calendar.MustParse("2024-12-28"): true, // a Saturday: no second day of rest
			calendar.MustParse("2025-01-01"): true,
		},
		KnownUntil: calendar.MustParse("2025-01-03"),
	}
	for _, c := range []struct {
		from  string
		count int
		want  string
	}{
		{"2024-12-20", 1, "2024-12-23"}, // a Friday: the weekend is skipped
		{"2024-12-21", 1, "2024-12-23"}, // a Saturday
		{"2024-12-24", 1, "2024-12-26"}, // the holiday is skipped
		{"2024-12-25", 1, "2024-12-26"}, // from the holiday itself
		{"2024-12-24", 3, "2024-12-30"},
		{"2024-12-30", 2, "2025-01-02"},
		{"2024-12-30", 3, "2025-01-03"}, // the last day that is known
		{"2024-12-28", 0, "2024-12-28"},
	} {
		got, err := calendar.Interval{Count: c.count, Unit: calendar.WorkingDays}.After(calendar.MustParse(c.from), w)
		require.NoError(t, err)
		assert.Equal(t, c.want, got.String(), "%s + %d", c.from, c.count)
	}
	for from, count := range map[string]int{"2024-12-30": 4, "2025-01-03": 1, "2025-06-01": 1} {
		_, err := w.Add(calendar.MustParse(from), count)
		assert.EqualError(t, err, "working days are not known after 2025-01-03", "%s + %d", from, count)
	}
	always := &calendar.WorkingWeek{Weekend: [7]bool{true, true, true, true, true, true, true}, KnownUntil: calendar.MustParse("2025-12-31")}
	_, err := always.Add(calendar.MustParse("2025-01-01"), 1)
	assert.Error(t, err, "a week without working days ends at the last day known")
}

func TestWorkingDaysAreCountedOnce(t *testing.T) {
	start := calendar.MustParse("2024-01-01")
	rapid.Check(t, func(t *rapid.T) {
		w := &calendar.WorkingWeek{Holidays: map[calendar.Date]bool{}, KnownUntil: start.AddDays(200)}
		for i := range w.Weekend {
			w.Weekend[i] = rapid.Bool().Draw(t, "rest")
		}
		for _, n := range rapid.SliceOf(rapid.IntRange(0, 200)).Draw(t, "holidays") {
			w.Holidays[start.AddDays(n)] = true
		}
		from := start.AddDays(rapid.IntRange(0, 150).Draw(t, "from"))
		count := rapid.IntRange(1, 60).Draw(t, "count")
		end, err := w.Add(from, count)
		worked := 0
		for d := from.AddDays(1); d <= w.KnownUntil && (err != nil || d <= end); d = d.AddDays(1) {
			if !w.Weekend[d.Weekday()] && !w.Holidays[d] {
				worked++
			}
		}
		if err != nil {
			require.Less(t, worked, count)
			return
		}
		require.Equal(t, count, worked)
		require.False(t, w.Weekend[end.Weekday()] || w.Holidays[end])
	})
}

func TestIntervalWords(t *testing.T) {
	for want, iv := range map[string]calendar.Interval{
		"21 days":          {Count: 21, Unit: calendar.Days},
		"1 day":            {Count: 1, Unit: calendar.Days},
		"0 days":           {Count: 0, Unit: calendar.Days},
		"1 month":          {Count: 1, Unit: calendar.Months},
		"2 years":          {Count: 2, Unit: calendar.Years},
		"1 working day":    {Count: 1, Unit: calendar.WorkingDays},
		"3 calendar years": {Count: 3, Unit: calendar.CalendarYears},
	} {
		assert.Equal(t, want, iv.String())
	}
}

func TestIntervalJSON(t *testing.T) {
	for _, unit := range []calendar.Unit{calendar.Days, calendar.WorkingDays, calendar.Months, calendar.Years, calendar.CalendarYears} {
		want := calendar.Interval{Count: 21, Unit: unit}
		b, err := json.Marshal(want)
		require.NoError(t, err)
		assert.JSONEq(t, `{"`+string(unit)+`": 21}`, string(b))
		var got calendar.Interval
		require.NoError(t, json.Unmarshal(b, &got))
		assert.Equal(t, want, got)
	}
	for _, text := range []string{`{}`, `null`, `21`, `"21 days"`, `{"days": -1}`, `{"weeks": 1}`, `{"Days": 1}`, `{"days": 1.5}`, `{"days": "1"}`, `{"days": 1, "months": 1}`} {
		var iv calendar.Interval
		assert.Error(t, json.Unmarshal([]byte(text), &iv), text)
	}
}
