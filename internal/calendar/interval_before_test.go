package calendar_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
)

func TestIntervalBefore(t *testing.T) {
	for _, c := range []struct {
		iv        calendar.Interval
		day, want string
	}{
		{calendar.Interval{Count: 3, Unit: calendar.Months}, "2026-05-01", "2026-02-01"},
		{calendar.Interval{Count: 3, Unit: calendar.Months}, "2026-05-31", "2026-02-28"},
		{calendar.Interval{Count: 1, Unit: calendar.Years}, "2024-02-29", "2023-02-28"},
		{calendar.Interval{Count: 120, Unit: calendar.Days}, "2026-05-01", "2026-01-01"},
	} {
		got, err := c.iv.Before(calendar.MustParse(c.day))
		require.NoError(t, err)
		assert.Equal(t, c.want, got.String())
	}
	for _, unit := range []calendar.Unit{calendar.WorkingDays, calendar.CalendarYears} {
		_, err := calendar.Interval{Count: 1, Unit: unit}.Before(calendar.MustParse("2026-05-01"))
		assert.Error(t, err)
	}
	unknown, err := calendar.Interval{Count: 1, Unit: calendar.Days}.Before(0)
	require.NoError(t, err)
	assert.False(t, unknown.Known())
}
