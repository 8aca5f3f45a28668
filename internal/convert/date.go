package convert

import (
	"time"
	_ "time/tzdata" // zones of maps must be known on every machine

	"hearduty/internal/calendar"
	"hearduty/internal/grid"
)

// Order is the order of the parts of a date.
type Order string

// The orders. The zero Order is not known.
const (
	DayMonthYear Order = "day_month_year"
	MonthDayYear Order = "month_day_year"
	YearMonthDay Order = "year_month_day"
)

// Dates reads dates. What is zero is not known.
//
// A date is read if all that is stated leaves one reading, and refused otherwise: without an order, 25/03/2025 and
// 05/05/2025 are read and 04/03/2025 is not. The time of day is dropped.
type Dates struct {
	Order    Order
	Latest   int            // latest year that two digits can mean; 0 if they are refused
	Buddhist bool           // years count from 543 BC; dates of a workbook and Japanese eras do not
	Serial   int            // 1900 or 1904: plain numbers are days of a spreadsheet; 0 if they are refused
	Zone     *time.Location // zone in which the day is taken where a time has a zone; nil if that is refused
	Written  bool           // where a time has a zone, the day is taken as it is written
}

const lookUp = "Look up the right date, and correct the cell"

// Read gives the date as YYYY-MM-DD.
func (d *Dates) Read(c grid.Cell) (string, *Problem) {
	if !d.Buddhist && c.Kind <= grid.Day && isDay(c.Text) {
		return c.Text, nil
	}
	if p := noDayOfBook(c); p != nil {
		return "", p
	}
	if p := unusable(c); p != nil {
		return "", p
	}
	s := plain(c.Text)
	if s == "" {
		return "", nil
	}
	day, p := d.day(s, c.Kind)
	if p != nil {
		return "", p
	}
	var b [len("2006-01-02")]byte
	return string(day.AppendTo(b[:0])), nil
}

func (d *Dates) day(s string, kind grid.CellKind) (calendar.Date, *Problem) {
	switch kind {
	case grid.Bool:
		return 0, problem("the cell says true or false, where dates are wanted", "Check that the map names the right column")
	case grid.Clock:
		return 0, problem("the workbook has a time without a day here", "Look up the date, or name another column in the map")
	case grid.Day:
		plainly := Dates{Written: true}
		return plainly.text(s)
	}
	if whole, ok := wholeNumber(s); ok {
		return d.number(whole, s)
	}
	if kind == grid.Number {
		return 0, problem("the cell is a number that is no day of a spreadsheet", lookUp)
	}
	return d.text(s)
}

// isDay says whether s is YYYY-MM-DD with a day of the calendar.
func isDay(s string) bool {
	if len(s) != 10 || s[4] != '-' || s[7] != '-' || !onlyDigits(s[:4]) || !onlyDigits(s[5:7]) || !onlyDigits(s[8:]) {
		return false
	}
	return isCivil(number(s[:4]), number(s[5:7]), number(s[8:]))
}

// number gives the value of at most nine digits.
func number(digits string) int {
	n := 0
	for i := range len(digits) {
		n = n*10 + int(digits[i]-'0')
	}
	return n
}

// isCivil says whether there is such a day in the years 1 to 9999.
func isCivil(year, month, day int) bool {
	if year < 1 || year > 9999 || month < 1 || month > 12 || day < 1 {
		return false
	}
	return day <= 28 || day <= calendar.DaysIn(year, time.Month(month))
}

// text reads a date in words and signs, with what follows it.
func (d *Dates) text(s string) (calendar.Date, *Problem) {
	if day, rest, p, found := d.eastern(s); found {
		if p != nil {
			return 0, p
		}
		return d.dropTime(day, rest, false)
	}
	if n := leadingDigits(s); n >= 8 {
		if n != 8 && n != 12 && n != 14 {
			return 0, problem("the cell is not a date", lookUp)
		}
		day, p := d.compact(s[:8])
		if p != nil {
			return 0, p
		}
		return d.dropTime(day, s[8:], false)
	}
	w, p := scanDate(s)
	if p != nil {
		return 0, p
	}
	day, p := d.resolve(&w)
	if p != nil {
		return 0, p
	}
	if w.weekday != 0 && int(day.Weekday()) != w.weekday-1 {
		return 0, problem("the day of the week is not that of the date", lookUp)
	}
	return d.dropTime(day, w.rest, w.name >= 0)
}

func leadingDigits(s string) int {
	n := 0
	for n < len(s) && s[n] >= '0' && s[n] <= '9' {
		n++
	}
	return n
}
