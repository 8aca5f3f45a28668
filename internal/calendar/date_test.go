package calendar_test

import (
	"encoding/json"
	"fmt"
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
)

var (
	firstDay = calendar.MustParse("0001-01-01")
	lastDay  = calendar.MustParse("9999-12-31")
)

// leap is the Gregorian rule, written out anew for the test.
func leap(year int) bool { return year%4 == 0 && (year%100 != 0 || year%400 == 0) }

func monthLength(year int, month time.Month) int {
	if month == time.February && leap(year) {
		return 29
	}
	return [...]int{31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31}[month-1]
}

// TestEveryDay counts through all days of the years 1 to 9999. 1 January of the year 1 is a Monday.
func TestEveryDay(t *testing.T) {
	year, month, day := 1, time.January, 1
	weekday := time.Monday
	for d := calendar.Date(1); ; d++ {
		y, m, dd := d.Civil()
		if y != year || m != month || dd != day || d.Weekday() != weekday {
			t.Fatalf("day %d is %04d-%02d-%02d %s, not %04d-%02d-%02d %s", d, y, m, dd, d.Weekday(), year, month, day, weekday)
		}
		if back, ok := calendar.NewDate(year, month, day); !ok || back != d {
			t.Fatalf("%04d-%02d-%02d is day %d, not %d", year, month, day, back, d)
		}
		if d == lastDay {
			break
		}
		weekday = (weekday + 1) % 7
		if day++; day > monthLength(year, month) {
			day = 1
			if month++; month > time.December {
				month = time.January
				year++
			}
		}
	}
	assert.Equal(t, 9999, year)
	assert.Equal(t, 31, day)
}

func TestAgainstTime(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := drawDate(t, "day")
		want := time.Date(1, time.January, 1, 0, 0, 0, 0, time.UTC).AddDate(0, 0, int(d)-1)
		year, month, day := d.Civil()
		require.Equal(t, want, time.Date(year, month, day, 0, 0, 0, 0, time.UTC))
		require.Equal(t, want.Weekday(), d.Weekday())
		require.Equal(t, want.Year(), d.Year())
		require.Equal(t, want.Format(time.DateOnly), d.String())
		require.Equal(t, d, calendar.OfTime(want))
		back, err := calendar.Parse(d.String())
		require.NoError(t, err)
		require.Equal(t, d, back)
		var read calendar.Date
		b, err := json.Marshal(d)
		require.NoError(t, err)
		require.NoError(t, json.Unmarshal(b, &read))
		require.Equal(t, d, read)
	})
}

func drawDate(t *rapid.T, name string) calendar.Date {
	return calendar.Date(rapid.IntRange(int(firstDay), int(lastDay)).Draw(t, name))
}

// TestOfTime: the day is the one on the wall, not that of UTC.
func TestOfTime(t *testing.T) {
	east := time.FixedZone("east", 14*3600)
	west := time.FixedZone("west", -12*3600)
	assert.Equal(t, "2024-03-01", calendar.OfTime(time.Date(2024, 3, 1, 0, 0, 0, 0, east)).String())
	assert.Equal(t, "2024-02-29", calendar.OfTime(time.Date(2024, 2, 29, 23, 59, 59, 999, west)).String())
	assert.Equal(t, "1960-02-29", calendar.OfTime(time.Date(1960, 2, 29, 23, 59, 0, 0, time.UTC)).String())
}

func TestDaysIn(t *testing.T) {
	for year, days := range map[int]int{2023: 28, 2024: 29, 1900: 28, 2000: 29, 2100: 28, 4: 29, 1: 28} {
		assert.Equal(t, days, calendar.DaysIn(year, time.February), "%d", year)
	}
	assert.Equal(t, 31, calendar.DaysIn(2024, time.December))
}

func TestNewDateRefuses(t *testing.T) {
	for _, c := range []struct {
		year  int
		month time.Month
		day   int
	}{
		{2023, 2, 29}, {1900, 2, 29}, {2024, 2, 30}, {2024, 4, 31}, {2024, 0, 1}, {2024, 13, 1},
		{2024, 1, 0}, {2024, 1, 32}, {2024, 1, -1}, {0, 1, 1}, {10000, 1, 1}, {-5, 1, 1},
	} {
		d, ok := calendar.NewDate(c.year, c.month, c.day)
		assert.False(t, ok, "%v", c)
		assert.False(t, d.Known(), "%v", c)
	}
}

func TestParseErrors(t *testing.T) {
	const form, day = "is not a date of the form YYYY-MM-DD", "is not a day of the calendar"
	for text, want := range map[string]string{
		"": form, "2024": form, "2024-1-05": form, "24-01-05": form, "2024/01/05": form, "05-01-2024": form,
		"2024-01-05 ": form, " 2024-01-05": form, "2024-01-05T00:00:00Z": form, "2024-01-0x": form,
		"+024-01-05": form, "-024-01-05": form, "2024-01-+5": form, "2024-01--5": form, "20240105": form,
		"２０２4-1": form, "2024-01\u20105": form,
		"2023-02-29": day, "1900-02-29": day, "2024-00-10": day, "2024-13-10": day, "2024-01-00": day,
		"2024-01-32": day, "2024-06-31": day, "0000-01-01": day,
	} {
		d, err := calendar.Parse(text)
		assert.EqualError(t, err, fmt.Sprintf("%q %s", text, want))
		assert.False(t, d.Known(), "%q", text)
		assert.Panics(t, func() { calendar.MustParse(text) }, "%q", text)
	}
}

func TestUnknownDay(t *testing.T) {
	var d calendar.Date
	assert.False(t, d.Known())
	assert.Empty(t, d.String())
	b, err := json.Marshal(d)
	require.NoError(t, err)
	assert.Equal(t, "null", string(b))
	d = firstDay
	require.NoError(t, json.Unmarshal([]byte("null"), &d))
	assert.False(t, d.Known())
	for _, text := range []string{`""`, `"2024-02-30"`, `20240105`, `true`, `"`, `{}`} {
		assert.Error(t, json.Unmarshal([]byte(text), &d), text)
	}
}

func TestAddMonths(t *testing.T) {
	for _, c := range []struct {
		from   string
		months int
		want   string
	}{
		{"2023-01-31", 1, "2023-02-28"},
		{"2024-01-31", 1, "2024-02-29"},
		{"2024-01-31", 2, "2024-03-31"},
		{"2024-02-29", 12, "2025-02-28"},
		{"2024-02-29", 48, "2028-02-29"},
		{"2024-02-29", -12, "2023-02-28"},
		{"2096-02-29", 48, "2100-02-28"},
		{"2023-02-28", 12, "2024-02-28"},
		{"2024-03-31", -1, "2024-02-29"},
		{"2024-03-31", 6, "2024-09-30"},
		{"2023-12-31", 2, "2024-02-29"},
		{"2024-12-15", 1, "2025-01-15"},
		{"2025-01-15", -1, "2024-12-15"},
		{"2025-01-15", -13, "2023-12-15"},
		{"2025-11-30", 1, "2025-12-30"},
		{"2025-05-05", 0, "2025-05-05"},
	} {
		assert.Equal(t, c.want, calendar.MustParse(c.from).AddMonths(c.months).String(), "%s + %d", c.from, c.months)
	}
}

func TestAddMonthsKeepsTheDayOrTheMonthEnd(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		d := calendar.Date(rapid.IntRange(int(calendar.MustParse("1900-01-01")), int(calendar.MustParse("2100-12-31"))).Draw(t, "day"))
		n := rapid.IntRange(-600, 600).Draw(t, "months")
		year, month, day := d.Civil()
		for range max(n, -n) { // one month at a time
			switch {
			case n > 0 && month == time.December:
				year, month = year+1, time.January
			case n > 0:
				month++
			case month == time.January:
				year, month = year-1, time.December
			default:
				month--
			}
		}
		gotYear, gotMonth, gotDay := d.AddMonths(n).Civil()
		require.Equal(t, []int{year, int(month), min(day, monthLength(year, month))}, []int{gotYear, int(gotMonth), gotDay})
		require.LessOrEqual(t, d.AddMonths(n), d.AddDays(1).AddMonths(n), "later days give no earlier ends")
	})
}

// TestUnknownDayStaysUnknown: no deadline follows from a day that nobody knows.
func TestUnknownDayStaysUnknown(t *testing.T) {
	var d calendar.Date
	assert.False(t, d.AddDays(30).Known())
	assert.False(t, d.AddMonths(12).Known())
	assert.False(t, calendar.Spell{}.Contains(d))
	for _, unit := range []calendar.Unit{calendar.Days, calendar.Months, calendar.Years, calendar.CalendarYears, calendar.WorkingDays} {
		end, err := calendar.Interval{Count: 1, Unit: unit}.After(d, &calendar.WorkingWeek{KnownUntil: lastDay})
		require.NoError(t, err)
		assert.False(t, end.Known(), unit)
	}
}
