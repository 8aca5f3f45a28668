package convert

import (
	"math"
	"strconv"
	"strings"
	"unicode"

	"hearduty/internal/grid"
)

const (
	secondsOfHour = 60 * 60
	secondsOfDay  = 24 * secondsOfHour
	longest       = 1e9 // seconds, about 32 years: more than any duration of a record
)

// Minutes reads a duration in the unit minutes, hours, clock (h:mm, h:mm:ss, 7h45) or day_fraction and gives
// minutes. What is not given in minutes is rounded to the second, and seconds are given with four decimals
// of a minute at most: 0.32291667 of a day is 465. Durations of a day and more are read.
//
// A cell that a workbook formats as time is read as one in every unit. It is a problem if the unit is
// minutes or hours and the time is a day or more: then somebody wrote minutes or hours into a cell for times.
func (n *Numbers) Minutes(c grid.Cell, unit string) (string, *Problem) {
	if c.Kind == grid.Clock {
		return clockCell(c, unit)
	}
	s, p := cell(c, "durations")
	if p != nil || s == "" {
		return "", p
	}
	if c.Kind == grid.Text && unit == "clock" {
		return clock(s)
	}
	if unit == "clock" {
		return "", problem("the workbook has a plain number here, but the unit is stated to be clock", "State the unit minutes, hours or day_fraction in the map, whichever the column has")
	}
	if c.Kind == grid.Text && strings.Contains(s, ":") {
		return "", problem("the cell is written as hours and minutes, but the unit is not stated to be clock", "State the unit clock for this column in the map")
	}
	text, p := n.Read(c, unitWords(unit)...)
	if p != nil {
		if _, ok := timeParts(s); ok {
			return "", problem("the duration is written in other units than the one that is stated", "State the unit clock for this column in the map, or the unit that its cells have")
		}
		return "", p
	}
	if strings.HasPrefix(text, "-") {
		return "", negative()
	}
	switch unit {
	case "hours":
		return scaled(text, secondsOfHour)
	case "day_fraction":
		return scaled(text, secondsOfDay)
	}
	return text, nil
}

func negative() *Problem {
	return problem("the duration is negative", "Check the start and the end from which it was worked out")
}

// unitWords are the units that may stand behind a duration (common practice, no source).
func unitWords(unit string) []string {
	switch unit {
	case "hours":
		return []string{"h", "hr", "hrs", "hour", "hours", "std", "std.", "stunden"}
	case "day_fraction":
		return nil
	}
	return []string{"min", "min.", "mins", "minute", "minutes", "minuten"}
}

// scaled gives a canonical number of units of so many seconds as minutes.
func scaled(text string, seconds float64) (string, *Problem) {
	v, err := strconv.ParseFloat(text, 64)
	if err != nil || v*seconds > longest {
		return "", problem("the duration is too long", "Check the number and the unit in the map")
	}
	return ofSeconds(int64(math.Round(v * seconds))), nil
}

func ofSeconds(s int64) string {
	if s%60 == 0 {
		return strconv.FormatInt(s/60, 10)
	}
	return decimal(math.Round(float64(s)/60*1e4) / 1e4)
}

func clockCell(c grid.Cell, unit string) (string, *Problem) {
	v, err := strconv.ParseFloat(c.Text, 64)
	switch {
	case c.Text == "":
		return "", nil
	case err != nil || math.IsNaN(v):
		return "", problem("the time of the workbook cannot be read", "Look up the duration, and correct the cell")
	case v < 0:
		return "", negative()
	case v >= 1 && (unit == "minutes" || unit == "hours"):
		return "", problem("the workbook has a time of a day or more here, but the unit is stated to be "+unit,
			"Format the column as number if it holds "+unit+", or state the unit clock in the map if the times are right")
	}
	return scaled(c.Text, secondsOfDay)
}

// clock reads h:mm, h:mm:ss and durations whose units are written, such as 7h45, 7 h 45 min and 45 min.
func clock(s string) (string, *Problem) {
	if strings.HasPrefix(s, "-") {
		return "", negative()
	}
	parts, ok := timeParts(s)
	if !ok {
		return "", problem("the cell is not a duration in hours and minutes", "Write it like 7:45 or 7h45, or state the unit minutes, hours or day_fraction in the map, whichever the column has")
	}
	seconds, places := 0.0, [3]float64{secondsOfHour, 60, 1}
	larger := false
	for i, part := range parts {
		if part < 0 {
			continue
		}
		if larger && part >= 60 {
			return "", problem("the duration has 60 minutes or seconds or more beside a larger unit", "Correct the cell from the original record")
		}
		larger = true
		seconds += part * places[i]
	}
	if seconds > longest {
		return "", problem("the duration is too long", "Check the cell")
	}
	return ofSeconds(int64(math.Round(seconds))), nil
}

// places are the words for hours, minutes and seconds in durations (common practice, no source), by Fold.
var places = map[string]int{
	"h": 0, "hr": 0, "hrs": 0, "hour": 0, "hours": 0, "std": 0, "stunde": 0, "stunden": 0, "heure": 0, "heures": 0, "hora": 0, "horas": 0, "ora": 0, "ore": 0, "u": 0, "uur": 0, "時間": 0,
	"m": 1, "min": 1, "mins": 1, "minute": 1, "minutes": 1, "minuten": 1, "minuto": 1, "minutos": 1, "minuti": 1, "分": 1,
	"s": 2, "sec": 2, "secs": 2, "second": 2, "seconds": 2, "sek": 2, "sekunden": 2, "secondes": 2, "segundos": 2, "secondi": 2, "秒": 2,
}

// timeParts splits a duration into hours, minutes and seconds; what is not written is -1. Only the last part may
// have decimals, and only seconds.
func timeParts(s string) (parts [3]float64, ok bool) {
	parts = [3]float64{-1, -1, -1}
	next, rest := 0, s
	for rest != "" {
		end := strings.IndexFunc(rest, func(r rune) bool { return (r < '0' || r > '9') && r != '.' && r != ',' })
		if end < 0 {
			end = len(rest)
		}
		number := rest[:end]
		rest = strings.TrimLeft(rest[end:], " ")
		place, remainder, known := placeOf(rest, next, number == s)
		if !known || place < next || place > 2 {
			return parts, false
		}
		v, err := strconv.ParseFloat(strings.Replace(number, ",", ".", 1), 64)
		if err != nil || !onlyDigits(number) && (place != 2 || !onlyDigits(strings.NewReplacer(".", "", ",", "").Replace(number))) {
			return parts, false
		}
		parts[place], next, rest = v, place+1, remainder
	}
	return parts, next > 0
}

// placeOf tells by what follows a number whether it counts hours, minutes or seconds, and gives what follows that.
// A number with nothing behind it takes the next place, unless it stands alone.
func placeOf(rest string, next int, alone bool) (place int, remainder string, ok bool) {
	if rest == "" {
		return next, "", !alone
	}
	if after, found := strings.CutPrefix(rest, ":"); found {
		return next, after, next < 2 && len(after) >= 2 && onlyDigits(after[:2])
	}
	end := strings.IndexFunc(rest, func(r rune) bool { return !unicode.IsLetter(r) })
	if end < 0 {
		end = len(rest)
	}
	place, ok = places[Fold(rest[:end])]
	return place, strings.TrimLeft(strings.TrimPrefix(rest[end:], "."), " "), ok
}
