// Package calendar holds the dates, intervals and stretches of days that the law counts in.
//
// A Date is a day of the Gregorian calendar without clock or time zone. Adding months or years never
// overflows into the next month: 31 January plus one month is 28 or 29 February.
package calendar

import (
	"fmt"
	"time"
)

// Date is a calendar day, counted from 1 January of the year 1 (day 1). The zero Date means that the
// day is not known. Dates compare with ==, < and >.
type Date int32

const secondsPerDay = 24 * 60 * 60

// unixDayOne is the Date of 1 January 1970.
const unixDayOne = 719163

// NewDate gives the Date of a year, month and day. It returns false if there is no such day in the
// calendar, or the year is outside 1 to 9999.
func NewDate(year int, month time.Month, day int) (Date, bool) {
	if year < 1 || year > 9999 || month < time.January || month > time.December || day < 1 || day > DaysIn(year, month) {
		return 0, false
	}
	return civil(year, month, day), true
}

func civil(year int, month time.Month, day int) Date {
	return Date(time.Date(year, month, day, 0, 0, 0, 0, time.UTC).Unix()/secondsPerDay + unixDayOne)
}

// DaysIn gives the number of days of a month, 28 to 31.
func DaysIn(year int, month time.Month) int {
	return time.Date(year, month+1, 0, 0, 0, 0, 0, time.UTC).Day()
}

// OfTime gives the day that t shows in its own time zone.
func OfTime(t time.Time) Date {
	y, m, d := t.Date()
	return civil(y, m, d)
}

// Parse reads an ISO 8601 calendar date, YYYY-MM-DD. The error says what is wrong with it.
func Parse(s string) (Date, error) {
	if len(s) != 10 || s[4] != '-' || s[7] != '-' {
		return 0, fmt.Errorf("%q is not a date of the form YYYY-MM-DD", s)
	}
	year, ok1 := digits(s[0:4])
	month, ok2 := digits(s[5:7])
	day, ok3 := digits(s[8:10])
	if !ok1 || !ok2 || !ok3 {
		return 0, fmt.Errorf("%q is not a date of the form YYYY-MM-DD", s)
	}
	d, ok := NewDate(year, time.Month(month), day)
	if !ok {
		return 0, fmt.Errorf("%q is not a day of the calendar", s)
	}
	return d, nil
}

// MustParse is Parse for dates written in code. It panics if s is no date.
func MustParse(s string) Date {
	d, err := Parse(s)
	if err != nil {
		panic(err)
	}
	return d
}

func digits(s string) (int, bool) {
	n := 0
	for i := 0; i < len(s); i++ {
		if s[i] < '0' || s[i] > '9' {
			return 0, false
		}
		n = n*10 + int(s[i]-'0')
	}
	return n, true
}

// Known says whether the day is known.
func (d Date) Known() bool { return d != 0 }

// Civil gives year, month and day.
func (d Date) Civil() (year int, month time.Month, day int) {
	return time.Unix((int64(d)-unixDayOne)*secondsPerDay, 0).UTC().Date()
}

// Year gives the calendar year.
func (d Date) Year() int {
	y, _, _ := d.Civil()
	return y
}

// Weekday gives the day of the week.
func (d Date) Weekday() time.Weekday {
	return time.Weekday(int64(d) % 7)
}

// AddDays gives the day n days later, or earlier if n is negative. An unknown day stays unknown.
func (d Date) AddDays(n int) Date {
	if !d.Known() {
		return d
	}
	return d + Date(n)
}

// AddMonths gives the same day of the month n months later. Where that month is shorter, it gives the
// month's last day. An unknown day stays unknown.
func (d Date) AddMonths(n int) Date {
	if !d.Known() {
		return d
	}
	y, m, day := d.Civil()
	total := y*12 + int(m) - 1 + n
	year, month := total/12, time.Month(total%12+1)
	return civil(year, month, min(day, DaysIn(year, month)))
}

// String writes the day as YYYY-MM-DD, and an unknown day as an empty text.
func (d Date) String() string {
	if !d.Known() {
		return ""
	}
	return string(d.AppendTo(nil))
}

// AppendTo appends YYYY-MM-DD to b.
func (d Date) AppendTo(b []byte) []byte {
	y, m, day := d.Civil()
	return append(b, byte('0'+y/1000%10), byte('0'+y/100%10), byte('0'+y/10%10), byte('0'+y%10), '-',
		byte('0'+int(m)/10), byte('0'+int(m)%10), '-', byte('0'+day/10), byte('0'+day%10))
}

// MarshalJSON writes the day as text, and an unknown day as null.
func (d Date) MarshalJSON() ([]byte, error) {
	if !d.Known() {
		return []byte("null"), nil
	}
	b := append(make([]byte, 0, 12), '"')
	return append(d.AppendTo(b), '"'), nil
}

// UnmarshalJSON reads what MarshalJSON writes.
func (d *Date) UnmarshalJSON(b []byte) error {
	if string(b) == "null" {
		*d = 0
		return nil
	}
	if len(b) < 2 || b[0] != '"' || b[len(b)-1] != '"' {
		return fmt.Errorf("%s is not a date in quotes", b)
	}
	parsed, err := Parse(string(b[1 : len(b)-1]))
	*d = parsed
	return err
}
