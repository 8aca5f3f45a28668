package grid

import (
	"math"
	"time"
)

const (
	secondsADay = 86400
	first1904   = -24107  // 1 January 1904 in days from 1 January 1970
	zero1900    = -25569  // 30 December 1899, from which the days behind February 1900 count
	pastLast    = 2932897 // 1 January 10000
)

// appendDay writes the day of a number, with the time of day to the second unless it is midnight. Numbers
// that are no day are Broken, with the text that a spreadsheet shows where it shows one: day 0 and day 60
// of the 1900 system, which takes 1900 for a leap year, have no day; below 60 each number is a day further
// on because of that. Checked against the conversion of another library in the tests.
func appendDay(out []byte, n float64, from1904 bool) ([]byte, CellKind) {
	if n < 0 || n >= pastLast-zero1900 {
		return appendNumber(out, n), Broken
	}
	seconds := int64(math.Round(n * secondsADay))
	day, seconds := seconds/secondsADay, seconds%secondsADay
	kind := Day
	switch {
	case from1904:
		day += first1904
	case day == 0:
		out, kind = append(out, "1900-01-00"...), Broken
	case day == 60:
		out, kind = append(out, "1900-02-29"...), Broken
	case day < 60:
		day += zero1900 + 1
	default:
		day += zero1900
	}
	if day >= pastLast {
		return appendNumber(out, n), Broken
	}
	t := time.Unix(day*secondsADay+seconds, 0).UTC()
	if kind == Day {
		out = t.AppendFormat(out, time.DateOnly)
	}
	if seconds > 0 {
		out = t.AppendFormat(out, "T15:04:05")
	}
	return out, kind
}

// isoDay reads a cell that has its day or time as ISO 8601. What has a zone, or a time only, stays text.
func isoDay(text string) (CellKind, string) {
	for _, layout := range []string{time.DateOnly, "2006-01-02T15:04:05", "2006-01-02T15:04"} {
		if t, err := time.Parse(layout, text); err == nil {
			if t = t.Round(time.Second); t.Hour()+t.Minute()+t.Second() == 0 {
				return Day, t.Format(time.DateOnly)
			}
			return Day, t.Format("2006-01-02T15:04:05")
		}
	}
	return Text, text
}
