package convert

import (
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/grid"
)

// Days of the two systems in which spreadsheets count days. In the one of 1900, 1 is 1 January 1900 and 60 a 29
// February that there never was; in the one of 1904, 0 is 1 January 1904, 1462 days later (tried with a
// workbook for 1900; from memory for 1904).
var (
	before1900 = calendar.MustParse("1899-12-30") // from 61 on
	first1904  = calendar.MustParse("1904-01-01")
	latestDay  = calendar.MustParse("9999-12-31")
)

const nobodysDay = 60

// fewestDays is the smallest number that is taken for a day: below it lie ages and counts, and no day of a record.
const fewestDays = 1000

// wholeNumber gives the digits before the decimal sign of a text that is a plain number.
func wholeNumber(s string) (string, bool) {
	at := leadingDigits(s)
	if at == 0 {
		return "", false
	}
	if at == len(s) {
		return s, true
	}
	return s[:at], (s[at] == '.' || s[at] == ',') && onlyDigits(s[at+1:])
}

// number reads a date that is a plain number: the day of a spreadsheet, or eight digits.
func (d *Dates) number(whole, s string) (calendar.Date, *Problem) {
	switch {
	case len(s) == 8 || len(s) == 12 || len(s) == 14:
		if onlyDigits(s) {
			return d.text(s)
		}
	case len(s) == 4 && number(s) >= 1800 && number(s) < 2700:
		if d.Serial != 0 {
			return 0, problem("the number can be a year as well as a day of a spreadsheet", lookUp)
		}
		return 0, problem("the cell names a year but no day", lookUp)
	case len(s) == 6 && onlyDigits(s) && d.Serial == 0:
		return 0, problem("a date of six digits can be read in several ways", "Write the date as YYYY-MM-DD")
	}
	if strings.Trim(s, "0") == "" {
		return 0, zeros()
	}
	if s != whole && len(whole) < 4 { // 4.3 may be a day and a month
		return 0, notDate(s)
	}
	whole = strings.TrimLeft(whole, "0")
	if d.Serial == 0 {
		return 0, problem("the cell is a plain number, and the map does not say that numbers are days of a spreadsheet",
			"State serial 1900 or 1904 under dates in the map, whichever the workbook uses, or correct the cell")
	}
	switch {
	case len(whole) > 7:
		return 0, beyond()
	case d.Serial == 1900 && number(whole) == nobodysDay:
		return 0, problem("the number 60 stands for 29 February 1900, which spreadsheets count although there was no such day", lookUp)
	case number(whole) < fewestDays:
		return 0, problem("the number is too small for the day of a record, and may be an age or a count", "Look up the date, or name another column in the map")
	}
	return ofSerial(number(whole), d.Serial)
}

// ofSerial gives the day that a spreadsheet counts as n, fewestDays or more.
func ofSerial(n, system int) (calendar.Date, *Problem) {
	day := before1900
	if system == 1904 {
		day = first1904
	}
	day += calendar.Date(n)
	if day > latestDay {
		return 0, beyond()
	}
	return day, nil
}

// noDayOfBook says why a number that a workbook shows as date is none; it gives nil for all other cells.
func noDayOfBook(c grid.Cell) *Problem {
	if c.Kind != grid.Broken {
		return nil
	}
	switch {
	case c.Text == "1900-01-00":
		return zeros()
	case strings.HasPrefix(c.Text, "1900-01-00T"):
		return problem("the workbook has a time without a day here", "Look up the date, or name another column in the map")
	case strings.HasPrefix(c.Text, "1900-02-29"):
		return problem("the workbook shows 29 February 1900, and there was no such day", lookUp)
	}
	return nil
}

func beyond() *Problem {
	return problem("the number is beyond the last day that a spreadsheet counts", lookUp)
}

func zeros() *Problem {
	return problem("the date is made of zeros", "Name it under blank in the map, if it says that nothing is known")
}
