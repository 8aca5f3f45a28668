package calendar

import (
	"encoding/json"
	"fmt"
	"strconv"
	"time"
)

// Unit is what an Interval is counted in.
type Unit string

// The units of the law.
const (
	Days          Unit = "days"
	WorkingDays   Unit = "working_days"
	Months        Unit = "months"
	Years         Unit = "years"
	CalendarYears Unit = "calendar_years"
)

// Interval is a length of time as a law states it, such as 21 days or 12 months.
type Interval struct {
	Count int
	Unit  Unit
}

// After gives the last day of the interval that starts on d. Days, months and years end on the day of
// the same number (month ends are kept); calendar years end on 31 December of the year that many years
// after d's own; working days are counted with w, from the day after d. An unknown day stays unknown. It
// fails for working days beyond the days that w knows.
func (iv Interval) After(d Date, w *WorkingWeek) (Date, error) {
	if !d.Known() {
		return d, nil
	}
	switch iv.Unit {
	case Days:
		return d.AddDays(iv.Count), nil
	case Months:
		return d.AddMonths(iv.Count), nil
	case Years:
		return d.AddMonths(12 * iv.Count), nil
	case CalendarYears:
		return civil(d.Year()+iv.Count, time.December, 31), nil
	case WorkingDays:
		if w == nil {
			return 0, fmt.Errorf("%s cannot be counted: no calendar of working days is given", iv)
		}
		return w.Add(d, iv.Count)
	}
	return 0, fmt.Errorf("an interval has no unit %q", iv.Unit)
}

// Before gives the first day of the interval that ends on d: the latest day from which the interval does not end
// before d. Working days are not counted backwards. An unknown day stays unknown.
func (iv Interval) Before(d Date) (Date, error) {
	if !d.Known() {
		return d, nil
	}
	switch iv.Unit {
	case Days:
		return d.AddDays(-iv.Count), nil
	case Months:
		return d.AddMonths(-iv.Count), nil
	case Years:
		return d.AddMonths(-12 * iv.Count), nil
	}
	return 0, fmt.Errorf("%s cannot be counted backwards", iv)
}

// String writes the interval in words, such as "21 days" or "1 month".
func (iv Interval) String() string {
	word := map[Unit]string{Days: "day", WorkingDays: "working day", Months: "month", Years: "year", CalendarYears: "calendar year"}[iv.Unit]
	if iv.Count != 1 {
		word += "s"
	}
	return strconv.Itoa(iv.Count) + " " + word
}

// MarshalJSON writes {"days": 21}.
func (iv Interval) MarshalJSON() ([]byte, error) {
	return json.Marshal(map[Unit]int{iv.Unit: iv.Count})
}

// UnmarshalJSON reads {"days": 21}: one unit and a whole number of it.
func (iv *Interval) UnmarshalJSON(b []byte) error {
	var m map[Unit]int
	if err := json.Unmarshal(b, &m); err != nil {
		return err
	}
	if len(m) != 1 {
		return fmt.Errorf("an interval has one unit, such as {\"days\": 21}")
	}
	for u, n := range m {
		switch u {
		case Days, WorkingDays, Months, Years, CalendarYears:
		default:
			return fmt.Errorf("an interval has no unit %q; it is counted in days, working_days, months, years or calendar_years", u)
		}
		if n < 0 {
			return fmt.Errorf("an interval cannot be negative")
		}
		*iv = Interval{Count: n, Unit: u}
	}
	return nil
}

// WorkingWeek tells working days from days of rest, as far as it is known.
type WorkingWeek struct {
	Weekend    [7]bool       // by time.Weekday
	Holidays   map[Date]bool // days of rest beside the weekend
	KnownUntil Date          // last day for which the holidays are listed
}

// Add gives the n-th working day after d. An unknown day stays unknown. It fails beyond KnownUntil.
func (w *WorkingWeek) Add(d Date, n int) (Date, error) {
	if !d.Known() {
		return d, nil
	}
	for n > 0 {
		d++
		if d > w.KnownUntil {
			return 0, fmt.Errorf("working days are not known after %s", w.KnownUntil)
		}
		if !w.Weekend[d.Weekday()] && !w.Holidays[d] {
			n--
		}
	}
	return d, nil
}
