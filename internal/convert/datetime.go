package convert

import (
	"strings"
	"time"

	"hearduty/internal/calendar"
)

// clockTime is the time of day behind a date.
type clockTime struct {
	hour, minute, second int
	timed                bool // a time is there
	zoned                bool // a zone is there
	offset               int  // of the zone from UTC, seconds
}

// dropTime drops the time of day behind a date. Where the time has a zone, the day may be another one.
func (d *Dates) dropTime(day calendar.Date, rest string, named bool) (calendar.Date, *Problem) {
	rest = strings.Trim(rest, " ,")
	if rest == "" {
		return day, nil
	}
	t, ok := scanClock(rest, named)
	switch {
	case !ok:
		return 0, problem("what stands behind the date is no time of day that can be read", "Write the date as YYYY-MM-DD, without a time")
	case t.hour == 24 && t.minute == 0 && t.second == 0:
		return 0, problem("the time 24:00 is the beginning of the next day, so the day is not certain", lookUp)
	case t.hour > 23 || t.minute > 59 || t.second > 60:
		return 0, problem("the time of day behind the date does not exist", lookUp)
	case !t.zoned || d.Written:
		return day, nil
	case d.Zone == nil:
		return 0, problem("the time behind the date has a time zone, so the day depends on where one is",
			"State zone under dates in the map: the zone of the site, or as_written to take the day as it is written")
	case !t.timed:
		return 0, problem("the date has a time zone but no time, so it cannot be taken to another zone", "State zone as_written under dates in the map")
	}
	year, month, dayOfMonth := day.Civil()
	at := time.Date(year, month, dayOfMonth, t.hour, t.minute, t.second-t.offset, 0, time.UTC).In(d.Zone)
	if at.Year() < 1 || at.Year() > 9999 {
		return 0, problem("the date lies beyond the calendar in the zone that is stated", lookUp)
	}
	return calendar.OfTime(at), nil
}

// scanClock reads a time of day with its zone, or a zone alone.
func scanClock(s string, named bool) (t clockTime, ok bool) {
	if t.zone(s) {
		return t, true
	}
	half := 0 // 1 for a.m., 2 for p.m.
	for i, words := range [2][2]string{{"午前", "오전"}, {"午後", "오후"}} {
		for _, w := range words {
			if rest, found := strings.CutPrefix(s, w); found {
				half, s = i+1, strings.TrimLeft(rest, " ")
			}
		}
	}
	if half == 0 {
		s = afterDate(s, named)
	}
	if strings.ContainsAny(s, "時분시") {
		s = strings.TrimRight(strings.NewReplacer("時", ":", "分", ":", "秒", "", "시", ":", "분", ":", "초", "", " ", "").Replace(s), ":")
	}
	n := leadingDigits(s)
	switch {
	case n == 4 || n == 6:
		t.hour, t.minute, t.second = number(s[:2]), number(s[2:4]), number(s[4:n])
		s = s[n:]
	case n == 1 || n == 2:
		t.hour = number(s[:n])
		s = t.minutes(s[n:])
	default:
		return t, false
	}
	if t.timed = n > 2 || t.timed; t.timed {
		s = withoutFraction(s)
	}
	s = strings.TrimLeft(s, " ")
	if h, rest := halfDay(s); h != 0 && half == 0 {
		half, s = h, rest
	}
	if half != 0 {
		if t.hour < 1 && half == 2 || t.hour > 12 {
			return t, false
		}
		t.hour, t.timed = t.hour%12+12*(half-1), true
	}
	return t, t.timed && (s == "" || t.zone(s))
}

// afterDate takes off what may stand between date and time.
func afterDate(s string, named bool) string {
	switch {
	case s[0] == 'T' || s[0] == 't', s[0] == ':' && named, s[0] == '-' && strings.Count(s, ".") >= 2:
		return strings.TrimLeft(s[1:], " ")
	}
	return s
}

// minutes reads minutes and seconds behind an hour, and gives what follows.
func (t *clockTime) minutes(s string) string {
	if len(s) < 3 || !strings.ContainsRune(":.hH", rune(s[0])) || leadingDigits(s[1:]) != 2 {
		return s
	}
	sign := s[0]
	t.timed, t.minute, s = true, number(s[1:3]), s[3:]
	if len(s) >= 3 && (s[0] == ':' || s[0] == sign) && leadingDigits(s[1:]) == 2 {
		t.second, s = number(s[1:3]), s[3:]
	}
	return s
}

// withoutFraction takes fractions of a second off.
func withoutFraction(s string) string {
	if len(s) > 1 && strings.ContainsRune(".,:", rune(s[0])) {
		if n := leadingDigits(s[1:]); n > 0 && n <= 12 {
			return s[1+n:]
		}
	}
	return s
}

// halfDay reads AM, p.m. and the like, and gives 1 or 2 and what follows.
func halfDay(s string) (half int, rest string) {
	if s == "" {
		return 0, s
	}
	switch s[0] {
	case 'a', 'A':
		half = 1
	case 'p', 'P':
		half = 2
	default:
		return 0, s
	}
	rest = strings.TrimLeft(s[1:], ". ")
	if rest == "" || rest[0] != 'm' && rest[0] != 'M' {
		return 0, s
	}
	return half, strings.TrimLeft(rest[1:], ". ")
}

// zone reads a zone such as Z, UTC, +02:00 or GMT+2, with its name in brackets behind it. It returns false
// for zones that are only named, since such names are used for several zones.
func (t *clockTime) zone(s string) bool {
	rest, utc := s, false
	for _, name := range []string{"UTC", "GMT", "Z"} {
		if r, ok := cutPrefixFold(s, name); ok && !utc {
			rest, utc = r, true
		}
	}
	if rest == "" {
		t.zoned = utc
		return utc
	}
	if rest[0] != '+' && rest[0] != '-' {
		return false
	}
	n := leadingDigits(rest[1:])
	digits, after := rest[1:1+n], rest[1+n:]
	switch {
	case n == 1 || n == 2:
		digits = "0"[:2-n] + digits
		if len(after) >= 3 && after[0] == ':' && leadingDigits(after[1:]) == 2 {
			digits, after = digits+after[1:3], after[3:]
		} else {
			digits += "00"
		}
	case n != 4:
		return false
	}
	hours, minutes := number(digits[:2]), number(digits[2:])
	if hours > 15 || minutes > 59 || !isZoneName(strings.TrimLeft(after, " ")) {
		return false
	}
	t.zoned, t.offset = true, hours*3600+minutes*60
	if rest[0] == '-' {
		t.offset = -t.offset
	}
	return true
}

// isZoneName says whether what follows an offset is nothing, or its name, which adds nothing.
func isZoneName(s string) bool {
	if s == "" || s[0] == '[' && s[len(s)-1] == ']' || s[0] == '(' && s[len(s)-1] == ')' {
		return true
	}
	return leadingWord(s) == len(s)
}
