package convert_test

import (
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

func text(s string) grid.Cell { return grid.Cell{Text: s} }

var (
	dayFirst   = convert.Dates{Order: convert.DayMonthYear, Latest: 2026}
	monthFirst = convert.Dates{Order: convert.MonthDayYear, Latest: 2026}
	yearFirst  = convert.Dates{Order: convert.YearMonthDay, Latest: 2026}
	unstated   = convert.Dates{}
)

// The forms are cases 5 to 8 of the shared notes on practitioners' exports, part B; the others are common
// practice, no source.
func TestDatesRead(t *testing.T) {
	thai := convert.Dates{Order: convert.DayMonthYear, Buddhist: true, Latest: 2569}
	serial := convert.Dates{Serial: 1900}
	mac := convert.Dates{Serial: 1904}
	number := func(s string) grid.Cell { return grid.Cell{Text: s, Kind: grid.Number} }
	day := func(s string) grid.Cell { return grid.Cell{Text: s, Kind: grid.Day} }
	const march = "2025-03-04"
	for _, c := range []struct {
		dates convert.Dates
		cell  grid.Cell
		want  string
	}{
		{unstated, text(""), ""},
		{unstated, text(" \u00a0"), ""},
		{unstated, text("2025-03-04"), march},
		{dayFirst, text("2025-03-04"), march}, // the year first says nothing about the order
		{unstated, text("2025/3/4"), march},
		{unstated, text("2025.03.04"), march},
		{unstated, text("2025. 3. 4."), march},
		{unstated, text("2025年3月4日"), march},
		{unstated, text("２０２５年　３月　４日"), march},
		{unstated, text("2025년 3월 4일"), march},
		{unstated, text("令和7年3月4日"), march},
		{unstated, text("令和７年３月４日"), march},
		{unstated, text("㋿7年3月4日"), march},
		{unstated, text("R7.3.4"), march},
		{unstated, text("R07/03/04"), march},
		{unstated, text("令和元年5月1日"), "2019-05-01"},
		{unstated, text("平成31年4月30日"), "2019-04-30"},
		{unstated, text("平成1年1月8日"), "1989-01-08"},
		{unstated, text("昭和64年1月7日"), "1989-01-07"},
		{unstated, text("S61.1.2"), "1986-01-02"},
		{unstated, text("昭和元年12月25日"), "1926-12-25"},
		{unstated, text("大正15年12月24日"), "1926-12-24"},
		{unstated, text("明治45年7月29日"), "1912-07-29"},
		{dayFirst, text("04/03/2025"), march},
		{monthFirst, text("03/04/2025"), march},
		{dayFirst, text("4.3.25"), march},
		{dayFirst, text("4. 3. 2025"), march},
		{dayFirst, text("04 03 2025"), march},
		{dayFirst, text("04‑03‑2025"), march}, // no-break hyphens
		{yearFirst, text("25/03/04"), march},
		{dayFirst, text("25/03/04"), "2004-03-25"},
		{unstated, text("25/03/2025"), "2025-03-25"}, // one reading only
		{unstated, text("03/25/2025"), "2025-03-25"},
		{unstated, text("05/05/2025"), "2025-05-05"}, // all readings are the same day
		{dayFirst, text("01/02/61"), "1961-02-01"},
		{dayFirst, text("01/02/26"), "2026-02-01"},
		{dayFirst, text("01/02/27"), "1927-02-01"},
		{dayFirst, text("29/02/2024"), "2024-02-29"},
		{unstated, text("20250304"), march},
		{unstated, number("20250304"), march},
		{dayFirst, text("04032025"), march},
		{monthFirst, text("03042025"), march},
		{unstated, text("20250304073000"), march},
		{unstated, text("20250304T0730"), march},
		{dayFirst, text("4-Mar-25"), march},
		{convert.Dates{Latest: 2026}, text("4-Mar-25"), march}, // a name says which part is the month
		{unstated, text("04-MAR-2025"), march},
		{unstated, text("04MAR2025"), march},
		{unstated, text("04MAR2025:07:30:00"), march},
		{unstated, text("2025-Mar-04"), march},
		{unstated, text("March 4, 2025"), march},
		{unstated, text("Mar 4th, 2025"), march},
		{unstated, text("Tuesday, March 4, 2025"), march},
		{unstated, text("04 mars 2025"), march},
		{unstated, text("mardi 4 mars 2025"), march},
		{unstated, text("1er août 2025"), "2025-08-01"},
		{unstated, text("4. März 2025"), march},
		{unstated, text("4. MÄRZ 2025"), march},
		{unstated, text("4. Ma\u0308rz 2025"), march}, // the accent as its own character
		{unstated, text("4 de marzo de 2025"), march},
		{unstated, text("1º de março de 2025"), "2025-03-01"},
		{unstated, text("terça-feira, 4 de março de 2025"), march},
		{unstated, text("4 marzo 2025"), march},
		{unstated, text("4 mrt 2025"), march},
		{unstated, text("4 marca 2025"), march},
		{unstated, text("4 października 2025"), "2025-10-04"},
		{unstated, text("4. marts 2025"), march},
		{unstated, text("lørdag den 4. oktober 2025"), "2025-10-04"},
		{unstated, text("4 มีนาคม พ.ศ. 2568"), march},
		{thai, text("4 มี.ค. 2568"), march},
		{thai, text("4/3/2568"), march},
		{thai, text("04/03/68"), march},
		{convert.Dates{Order: convert.DayMonthYear, Buddhist: true, Latest: 2026}, text("04/03/68"), march},
		{thai, text("2567-02-29"), "2024-02-29"},
		{thai, day("2025-03-04"), march}, // a workbook counts days, whatever it shows
		{serial, text("45720"), march},   // tried with a workbook, shared notes
		{serial, number("45720"), march},
		{serial, number("45720.3125"), march},
		{serial, text("1000"), "1902-09-26"},
		{serial, text("2958465"), "9999-12-31"},
		{serial, text("2025-03-04"), march}, // mixed text and serials
		{serial, text("04 mars 2025"), march},
		{mac, number("44258"), march}, // 45720 - 1462
		{mac, number("1000"), "1906-09-27"},
		{unstated, day("2025-03-04"), march},
		{unstated, day("2025-03-04T07:30:00"), march},
		{unstated, text("2025-03-04 00:00:00"), march},
		{unstated, text("2025-03-04T07:30"), march},
		{unstated, text("2025-03-04 07:30:00.123456"), march},
		{unstated, text("2025-03-04-07.30.00.000000"), march},
		{dayFirst, text("04.03.2025 7.30"), march},
		{dayFirst, text("04/03/2025, 7h30"), march},
		{monthFirst, text("3/4/2025 12:00:00 AM"), march},
		{monthFirst, text("3/4/2025 7:30 p.m."), march},
		{unstated, text("Mar  4 2025 12:00AM"), march},
		{unstated, text("2025年3月4日 午後7時30分"), march},
		{dayFirst, text("31/12/9999"), "9999-12-31"},
		{unstated, text("99991231"), "9999-12-31"},
		{dayFirst, text("01/01/1900"), "1900-01-01"},
		{unstated, text("0001-01-01"), "0001-01-01"},
		{unstated, text(`="2025-03-04"`), march},
	} {
		got, p := c.dates.Read(c.cell)
		require.Nil(t, p, "%q: %v", c.cell.Text, p)
		assert.Equal(t, c.want, got, c.cell.Text)
	}
}

func TestDatesRefused(t *testing.T) {
	old := convert.Dates{Serial: 1900}
	for _, c := range []struct {
		dates       convert.Dates
		cell        grid.Cell
		why, remedy string
	}{
		{unstated, text("04/03/2025"), "several orders", "State order"},
		{convert.Dates{Latest: 2026}, text("25/03/04"), "several orders", "State order"},
		{unstated, text("04032025"), "several orders", "State order"},
		{convert.Dates{Order: convert.YearMonthDay, Latest: 2026}, text("04-Mar-25"), "several orders", ""},
		{convert.Dates{Order: "sideways"}, text("04/03/2025"), "order of the date is not known", ""},
		{dayFirst, text("13/25/2025"), "a month that does not exist", "Look up"},
		{monthFirst, text("25/03/2025"), "none in the order month, day, year, which is stated, but is one in the order day, month, year", "or the order in the map"},
		{yearFirst, text("25/03/2025"), "but is one in the order day, month, year", ""},
		{yearFirst, text("04/03/61"), "but is one in the order day, month, year", ""},
		{dayFirst, text("30/02/2025"), "a day that its month does not have", ""},
		{unstated, text("30/02/2025"), "a day that its month does not have", ""},
		{unstated, text("2025-02-29"), "a day that its month does not have", ""},
		{unstated, text("2025-13-01"), "a month that does not exist", ""},
		{unstated, text("20251301"), "a month that does not exist", ""},
		{unstated, text("31. April 2025"), "a day that its month does not have", ""},
		{unstated, text("0000-00-00"), "made of zeros", "blank"},
		{unstated, text("00/00/0000 00:00:00"), "made of zeros", "blank"},
		{unstated, text("00000000"), "made of zeros", "blank"},
		{dayFirst, text("00/00/00"), "made of zeros", ""},
		{old, text("0"), "made of zeros", ""},
		{convert.Dates{Order: convert.DayMonthYear}, text("4.3.25"), "two digits", "latest_two_digit_year"},
		{unstated, text("4-Mar-25"), "two digits", ""},
		{dayFirst, text("4.3.5"), "one digit", ""},
		{dayFirst, text("4.3.025"), "more digits", ""},
		{unstated, text("2025"), "a year but no day", ""},
		{unstated, text("2025-03"), "no day", ""},
		{unstated, text("Mar-25"), "no day", ""},
		{unstated, text("März 2025"), "no day", ""},
		{unstated, text("45720"), "does not say that numbers are days", "serial 1900 or 1904"},
		{unstated, grid.Cell{Text: "45720", Kind: grid.Number}, "does not say that numbers are days", ""},
		{dayFirst, text("040325"), "six digits", ""},
		{old, text("60"), "29 February 1900", ""},
		{old, text("45"), "may be an age or a count", "another column"},
		{convert.Dates{Serial: 1904}, text("60"), "may be an age or a count", ""},
		{convert.Dates{Serial: 1904}, text("0"), "made of zeros", ""},
		{old, grid.Cell{Text: "1900-01-00", Kind: grid.Broken}, "made of zeros", "blank"},
		{old, grid.Cell{Text: "1900-01-00T12:00:00", Kind: grid.Broken}, "a time without a day", ""},
		{old, grid.Cell{Text: "1900-02-29", Kind: grid.Broken}, "29 February 1900", ""},
		{old, text("4.3"), "not a date", ""},
		{unstated, text("04.03"), "not a date", ""},
		{old, text("1961"), "a year as well as a day", ""},
		{old, text("2958466"), "beyond the last day", ""},
		{old, text("-5"), "not a date", ""},
		{old, grid.Cell{Text: "-5", Kind: grid.Number}, "no day of a spreadsheet", ""},
		{unstated, text("平成31年5月1日"), "within the era", ""},
		{unstated, text("令和1年4月30日"), "within the era", ""},
		{unstated, text("明治5年1月1日"), "within the era", ""},
		{unstated, text("7年3月4日"), "neither four digits nor an era", ""},
		{unstated, text("2025年3月"), "not a date", ""},
		{unstated, text("2025年3月4"), "not a date", ""},
		{unstated, text("令和7年13月1日"), "a month that does not exist", ""},
		{unstated, text("R7.2.30"), "a day that its month does not have", ""},
		{unstated, text("R2025.3.4"), "more than two digits", ""},
		{unstated, text("令和0年1月1日"), "not 0", ""},
		{old, text("12345678901"), "beyond the last day", ""},
		{dayFirst, text("0/0"), "made of zeros", ""},
		{dayFirst, text("123456789"), "not", ""},
		{dayFirst, text("123456789 x"), "not a date", ""},
		{dayFirst, text("4 März April 2025"), "not a date", ""},
		{dayFirst, text("2025-03-04 +1:75"), "no time of day", ""},
		{dayFirst, text("04/03-2025"), "not a date", ""},
		{dayFirst, text("n/a"), "not a date", "blank"},
		{dayFirst, text("O4/03/2025"), "letter O", "digit 0"},
		{unstated, text("Monday, March 4, 2025"), "day of the week", ""},
		{dayFirst, text("04/03/2025 morning"), "no time of day", ""},
		{unstated, text("2025-03-04 25:00"), "does not exist", ""},
		{unstated, text("2025-03-04 24:00"), "next day", ""},
		{unstated, text("2025-03-04 13:00 PM"), "no time of day", ""},
		{unstated, text("2025-03-04T00:00:00Z"), "time zone", "zone"},
		{unstated, text("2025-03-04T00:00:00 CET"), "no time of day", ""},
		{unstated, grid.Cell{Text: "0.5", Kind: grid.Clock}, "without a day", ""},
		{unstated, grid.Cell{Text: "true", Kind: grid.Bool}, "true or false", ""},
		{unstated, grid.Cell{Text: "#N/A", Kind: grid.Broken}, "error of the workbook", "blank"},
		{unstated, grid.Cell{Kind: grid.Uncomputed}, "a formula whose value", "calculate"},
	} {
		got, p := c.dates.Read(c.cell)
		require.NotNil(t, p, "%q gives %s", c.cell.Text, got)
		assert.Empty(t, got)
		assert.Contains(t, p.Why, c.why, c.cell.Text)
		assert.Contains(t, p.Remedy, c.remedy, c.cell.Text)
		assert.NotEmpty(t, p.Remedy)
	}
}

// Case 8 of part B: a zone that shifts the day.
func TestDatesZone(t *testing.T) {
	berlin, err := time.LoadLocation("Europe/Berlin")
	require.NoError(t, err)
	sydney, err := time.LoadLocation("Australia/Sydney")
	require.NoError(t, err)
	for _, c := range []struct{ cell, written, berlin, sydney string }{
		{"2025-03-04T23:30:00Z", "2025-03-04", "2025-03-05", "2025-03-05"},
		{"2025-03-04T22:59:59Z", "2025-03-04", "2025-03-04", "2025-03-05"},
		{"2025-03-04T00:00:00+02:00", "2025-03-04", "2025-03-03", "2025-03-04"},
		{"2025-07-04 22:00:00 UTC", "2025-07-04", "2025-07-05", "2025-07-05"}, // summer time
		{"20250304233000+0000", "2025-03-04", "2025-03-05", "2025-03-05"},
		{"March 4, 2025 12:00 AM GMT+2", "2025-03-04", "2025-03-03", "2025-03-04"},
		{"2025-03-04T23:30:00+01:00[Europe/Berlin]", "2025-03-04", "2025-03-04", "2025-03-05"},
		{"2025-03-04T23:30:00", "2025-03-04", "2025-03-04", "2025-03-04"}, // no zone
	} {
		for _, d := range []struct {
			convert.Dates
			want string
		}{{convert.Dates{Written: true}, c.written}, {convert.Dates{Zone: berlin}, c.berlin}, {convert.Dates{Zone: sydney}, c.sydney}} {
			got, p := d.Read(text(c.cell))
			require.Nil(t, p, "%s: %v", c.cell, p)
			assert.Equal(t, d.want, got, c.cell)
		}
	}
	_, p := (&convert.Dates{Zone: berlin}).Read(text("2025-03-04-05:00"))
	require.NotNil(t, p)
	assert.Contains(t, p.Why, "no time")
	got, p := (&convert.Dates{Written: true}).Read(text("2025-03-04-05:00"))
	assert.Nil(t, p)
	assert.Equal(t, "2025-03-04", got)
	_, p = (&convert.Dates{Zone: berlin}).Read(text("9999-12-31T23:30:00Z"))
	require.NotNil(t, p)
	assert.Contains(t, p.Why, "beyond the calendar")
}

// What a problem says can be printed where birth dates must not be.
func TestDateProblemsRepeatNothing(t *testing.T) {
	for _, s := range []string{"13/25/1987", "30/02/1987", "04/03/1987", "1987-02-30", "3O/01/1987", "1987-03-04 99:00", "1987", "19870230"} {
		_, p := (&convert.Dates{}).Read(text(s))
		require.NotNil(t, p, s)
		assert.NotContains(t, p.Why+p.Remedy, "1987")
		assert.NotContains(t, p.Why+p.Remedy, s[:2]+"/")
	}
}

func TestDatesAllocateNothingOnISO(t *testing.T) {
	d := dayFirst
	c := text("2025-03-04")
	assert.Zero(t, testing.AllocsPerRun(100, func() { _, _ = d.Read(c) }))
}
