package convert

import (
	"strings"
	"time"

	"hearduty/internal/calendar"
)

// reading says at which place of a date its parts stand.
type reading struct {
	order            Order
	year, month, day int
}

// readings are the orders in which a date of numbers can be read.
var readings = [3]reading{{DayMonthYear, 2, 1, 0}, {MonthDayYear, 2, 0, 1}, {YearMonthDay, 0, 1, 2}}

// resolve gives the day that a date names.
func (d *Dates) resolve(w *written) (calendar.Date, *Problem) {
	if w.width[0] == 3 || w.width[1] == 3 || w.width[2] == 3 || w.width[1] == 4 {
		return 0, problem("the parts of the date have more digits than day and month, or fewer than a year", lookUp)
	}
	switch {
	case w.name == 0:
		return d.sole(w, reading{"", 2, 0, 1})
	case w.width[0] == 4:
		return d.sole(w, readings[2])
	case w.name == 1 && d.Order == YearMonthDay && w.width[2] <= 2:
		return d.among(w, []reading{readings[0], readings[2]})
	case w.name == 1:
		return d.sole(w, readings[0])
	case d.Order == "":
		return d.among(w, readings[:])
	}
	for _, r := range readings {
		if r.order == d.Order {
			return d.stated(w, r)
		}
	}
	return 0, problem("the order of the date is not known", "State order under dates in the map")
}

// sole reads a date that can stand in one order only.
func (d *Dates) sole(w *written, r reading) (calendar.Date, *Problem) {
	year, p := d.year(w, r.year)
	if p != nil {
		return 0, p
	}
	if day, ok := civil(year, w, r); ok {
		return day, nil
	}
	return 0, noDay(w, r)
}

// among reads a date that can stand in several orders. They must not name different days.
func (d *Dates) among(w *written, orders []reading) (calendar.Date, *Problem) {
	var found calendar.Date
	var short *Problem
	for _, r := range orders {
		if !w.possible(r) {
			continue
		}
		year, p := d.year(w, r.year)
		if p != nil {
			short = p
			continue
		}
		day, ok := civil(year, w, r)
		if ok && found.Known() && found != day {
			return 0, problem("the date can be read in several orders, and none is stated",
				"State order under dates in the map, or write proven there if other dates of the file settle it")
		}
		if ok {
			found = day
		}
	}
	switch {
	case short != nil:
		return 0, short
	case found.Known():
		return found, nil
	}
	return 0, noDay(w, orders[0])
}

// stated reads a date in the order that is stated.
func (d *Dates) stated(w *written, r reading) (calendar.Date, *Problem) {
	if w.width[r.month] <= 2 && w.width[r.day] <= 2 && w.width[r.year] != 1 {
		year, p := d.year(w, r.year)
		if p != nil {
			return 0, p
		}
		if day, ok := civil(year, w, r); ok {
			return day, nil
		}
	}
	for _, other := range readings {
		if other.order != r.order && w.possible(other) {
			return 0, problem("the date is none in the order "+words(r.order)+", which is stated, but is one in the order "+words(other.order),
				"Correct the cell, or the order in the map")
		}
	}
	return 0, noDay(w, r)
}

func words(o Order) string { return strings.ReplaceAll(string(o), "_", ", ") }

// possible says whether a date can stand in an order, in any century that a year of two digits can be of.
func (w *written) possible(r reading) bool {
	if w.width[r.month] > 2 || w.width[r.day] > 2 {
		return false
	}
	switch year := w.value[r.year]; w.width[r.year] {
	case 4:
		_, ok := civil(year, w, r)
		_, buddhist := civil(year-buddhistYears, w, r)
		return ok || buddhist
	case 2:
		_, last := civil(1900+year, w, r)
		_, this := civil(2000+year, w, r)
		return last || this
	}
	return false
}

// civil gives the day of a year whose month and day stand as r says.
func civil(year int, w *written, r reading) (calendar.Date, bool) {
	if !isCivil(year, w.value[r.month], w.value[r.day]) {
		return 0, false
	}
	return calendar.NewDate(year, time.Month(w.value[r.month]), w.value[r.day])
}

// buddhistYears is how far the years of the Buddhist era in Thailand are ahead (from memory: 2568 is 2025).
const buddhistYears = 543

// year gives the year of the Gregorian calendar that the part at the place says.
func (d *Dates) year(w *written, place int) (int, *Problem) {
	year, ahead := w.value[place], 0
	if d.Buddhist || w.buddhist {
		ahead = buddhistYears
	}
	switch {
	case w.width[place] == 4:
		return year - ahead, nil
	case w.width[place] != 2:
		return 0, problem("the year of the date has one digit", lookUp)
	case d.Latest == 0:
		return 0, problem("the year of the date has two digits, and the map does not say of which century", "State latest_two_digit_year under dates in the map")
	}
	latest := d.Latest
	if ahead > 0 && latest < 2400 {
		latest += ahead
	}
	year += latest - latest%100
	if year > latest {
		year -= 100
	}
	return year - ahead, nil
}

func noDay(w *written, r reading) *Problem {
	switch {
	case w.value == [3]int{} && w.name < 0:
		return zeros()
	case w.width[r.year] == 1:
		return problem("the year of the date has one digit", lookUp)
	case w.width[r.year] == 4 && (w.width[r.month] > 2 || w.width[r.day] > 2):
		return notDate("")
	case w.value[r.month] < 1 || w.value[r.month] > 12:
		return problem("the date names a month that does not exist", lookUp)
	}
	return problem("the date names a day that its month does not have", lookUp)
}
