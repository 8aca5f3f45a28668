package convert_test

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

func evidence(cells ...string) *convert.Evidence {
	e := &convert.Evidence{}
	for i, c := range cells {
		e.Add(text(c), i+2)
	}
	return e
}

// Case 5 of part B: the order is proven by a row that can be named, or refused.
func TestEvidence(t *testing.T) {
	for _, c := range []struct {
		cells []string
		order convert.Order
		line  int
		why   string
	}{
		{[]string{"04/03/2025", "05/06/2025", "25/03/2025", "26/03/2025"}, convert.DayMonthYear, 4, ""},
		{[]string{"04/03/2025", "03/25/2025"}, convert.MonthDayYear, 3, ""},
		{[]string{"04/03/2025", "12/12/2025"}, "", 0, "all dates of the column can be read as day, month, year and as month, day, year"},
		{[]string{"25/03/2025", "03/26/2025"}, "", 0, "the dates of the column stand in different orders: line 3 is no date as day, month, year, line 2 none as month, day, year"},
		{[]string{"25/03/04", "25/03/05"}, "", 0, "day, month, year and as year, month, day"},
		{[]string{"25/03/04", "25/03/31", "25/03/32"}, convert.DayMonthYear, 4, ""},
		{[]string{"25/03/04", "99/03/05"}, convert.YearMonthDay, 3, ""},
		{[]string{"04/05/25", "04/05/2025", "13/05/25"}, convert.DayMonthYear, 4, ""},
		{[]string{"29/02/24", "29/02/25"}, convert.YearMonthDay, 3, ""}, // there is no 29 February 2025
		{[]string{"04032025", "25032025"}, convert.DayMonthYear, 3, ""},
		{[]string{"13/05/2025 07:30", "n/a", "", "13/13/2025"}, convert.DayMonthYear, 2, ""}, // 13/13 is no date in any order
		{[]string{"2025-03-04", "4-Mar-25", "2025年3月4日", "R7.3.4", "20250304", "45720", "n/a"}, "", 0, "no date that tells the order"},
		{nil, "", 0, "no date that tells the order"},
	} {
		order, line, why, ok := evidence(c.cells...).Settled()
		assert.Equal(t, c.order != "", ok, c.cells)
		assert.Equal(t, c.order, order, c.cells)
		assert.Equal(t, c.line, line, c.cells)
		if c.why == "" {
			assert.Empty(t, why)
		}
		assert.Contains(t, why, c.why, c.cells)
	}
}

func TestEvidenceCounts(t *testing.T) {
	e := evidence("04/03/2025", "25/03/2025", "03/26/2025", "04/03/25", "2025-03-04")
	for order, want := range map[convert.Order]int{convert.DayMonthYear: 3, convert.MonthDayYear: 3, convert.YearMonthDay: 1} {
		possible, dates := e.Count(order)
		assert.Equal(t, want, possible, order)
		assert.Equal(t, 4, dates)
	}
	assert.True(t, e.Needed())
	assert.True(t, e.TwoDigits())
	e = evidence("2025-03-04", "4 mars 2025")
	assert.False(t, e.Needed())
	assert.False(t, e.TwoDigits())
	e.Add(grid.Cell{Text: "2025-03-04", Kind: grid.Day}, 9)
	assert.False(t, e.Needed())
}

// The order that is settled reads every date that has any order, and exchanging day and month exchanges it.
func TestEvidenceIsSymmetric(t *testing.T) {
	for day := 1; day <= 31; day++ {
		for month := 1; month <= 12; month++ {
			one := evidence(fmt.Sprintf("%02d/%02d/2024", day, month))
			other := evidence(fmt.Sprintf("%02d/%02d/2024", month, day))
			a, _ := one.Count(convert.DayMonthYear)
			b, _ := other.Count(convert.MonthDayYear)
			assert.Equal(t, a, b)
			o, _, _, ok := one.Settled()
			p, _, _, also := other.Settled()
			assert.Equal(t, ok, also)
			if ok {
				assert.Equal(t, convert.DayMonthYear, o)
				assert.Equal(t, convert.MonthDayYear, p)
			}
		}
	}
}
