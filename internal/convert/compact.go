package convert

import (
	"strings"

	"hearduty/internal/calendar"
)

// compact reads a date of eight digits. Where it could stand in several orders, only one of them has a year of the
// 20th or 21st century, since no month is 19 or 20.
func (d *Dates) compact(s string) (calendar.Date, *Problem) {
	forms := compactForms(s)
	year, _ := d.year(&forms[1], 0)
	if isPresent(year) || !isPresentForm(d, &forms[0]) {
		if day, ok := civil(year, &forms[1], readings[2]); ok {
			return day, nil
		}
	}
	if strings.Trim(s, "0") == "" {
		return 0, zeros()
	}
	return d.resolve(&forms[0])
}

// compactForms splits eight digits with the year last, and with the year first.
func compactForms(s string) [2]written {
	last := written{name: -1, value: [3]int{number(s[:2]), number(s[2:4]), number(s[4:])}, width: [3]int{2, 2, 4}}
	first := written{name: -1, value: [3]int{number(s[:4]), number(s[4:6]), number(s[6:])}, width: [3]int{4, 2, 2}}
	return [2]written{last, first}
}

func isPresent(year int) bool { return year >= 1900 && year < 2100 }

func isPresentForm(d *Dates, w *written) bool {
	year, p := d.year(w, 2)
	return p == nil && isPresent(year)
}
