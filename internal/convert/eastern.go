package convert

import (
	"strings"
	"unicode/utf8"

	"hearduty/internal/calendar"
)

// eastern reads dates with the words for year, month and day behind the numbers, and dates of Japanese
// eras, and gives what follows. It returns false if the text is neither.
func (d *Dates) eastern(s string) (day calendar.Date, rest string, p *Problem, found bool) {
	first, _ := utf8.DecodeRuneInString(s)
	e, after := eraOf(s, first)
	if e == nil && !strings.ContainsAny(s, "年년") {
		return 0, "", nil, false
	}
	w := written{name: -1}
	rest = after
	for i, marks := range [3]string{"年년", "月월", "日일"} {
		n := leadingDigits(rest)
		if i == 0 && e != nil && strings.HasPrefix(rest, "元") {
			w.value[0], w.width[0], rest = 1, 1, rest[len("元"):]
		} else if n == 0 || n > 4 || i > 0 && n > 2 {
			return 0, "", notDate(s), true
		} else {
			w.value[i], w.width[i], rest = number(rest[:n]), n, rest[n:]
		}
		rest = strings.TrimLeft(rest, " ")
		mark, size := utf8.DecodeRuneInString(rest)
		switch {
		case size > 0 && strings.ContainsRune(marks, mark):
			rest = strings.TrimLeft(rest[size:], " ")
		case e == nil || i < 2 && !strings.ContainsRune("./-", mark):
			return 0, "", notDate(s), true
		case i < 2:
			rest = strings.TrimLeft(rest[size:], " ")
		}
	}
	if e == nil {
		if w.width[0] == 3 || w.width[0] == 1 {
			return 0, "", problem("the year of the date has neither four digits nor an era", lookUp), true
		}
		day, p = d.sole(&w, readings[2])
		return day, rest, p, true
	}
	day, p = e.day(&w)
	return day, rest, p, true
}

// eraOf finds the era at the beginning of a text, and gives what follows it. Letters for eras stand directly
// before the year.
func eraOf(s string, first rune) (*era, string) {
	if first >= 'A' && first <= 'z' && (len(s) < 2 || s[1] < '0' || s[1] > '9') {
		return nil, s
	}
	for i := range eras {
		for _, name := range eras[i].names {
			if rest, ok := cutPrefixFold(s, name); ok {
				return &eras[i], strings.TrimLeft(rest, " ")
			}
		}
	}
	return nil, s
}

// day gives the day of a year of the era. It must lie within the era.
func (e *era) day(w *written) (calendar.Date, *Problem) {
	if w.width[0] > 2 {
		return 0, problem("the year has an era but more than two digits", lookUp)
	}
	if w.value[0] < 1 {
		return 0, problem("the first year of an era is 1, not 0", lookUp)
	}
	w.value[0], w.width[0] = e.year+w.value[0]-1, 4
	day, ok := civil(w.value[0], w, readings[2])
	if !ok {
		return 0, noDay(w, readings[2])
	}
	if day < e.first || day >= e.next {
		return 0, problem("the day does not lie within the era that the date names", lookUp)
	}
	return day, nil
}
