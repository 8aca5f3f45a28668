package convert

import (
	"strings"
	"unicode"
	"unicode/utf8"
)

// written is a date as it is written: three parts, of which one may be the name of a month.
type written struct {
	value    [3]int
	width    [3]int // number of digits; 0 for a name
	name     int    // which part is a name, or -1
	weekday  int    // day of the week that stands before the date, from Sunday, 1, on; 0 if there is none
	buddhist bool   // the cell says that the year is one of the Buddhist era
	rest     string // what follows the date
}

// scanDate splits a date into its parts.
func scanDate(s string) (written, *Problem) {
	w := written{name: -1}
	var gaps [3]string // before each part
	words := false
	parts, i, gap := 0, 0, 0
	for parts < 3 && i < len(s) {
		if n := leadingDigits(s[i:]); n > 0 {
			if n > 4 {
				return w, notDate(s)
			}
			gaps[parts] = strings.Trim(s[gap:i], " ")
			w.value[parts], w.width[parts] = number(s[i:i+n]), n
			parts++
			i += n
			gap = i
			continue
		}
		n := leadingWord(s[i:])
		if n == 0 {
			_, size := utf8.DecodeRuneInString(s[i:])
			i += size
			continue
		}
		word := Fold(s[i : i+n])
		month := months[word]
		switch {
		case month != 0 && w.name < 0:
			gaps[parts] = strings.Trim(s[gap:i], " ")
			w.name, w.value[parts] = parts, month
			parts++
		case weekdays[word] != 0 && parts == 0 && w.weekday == 0:
			w.weekday = weekdays[word]
		case month == 0 && w.filler(word, gap == i && parts > 0, i+n == len(s) || s[i+n] == ' '):
			words = words || word != "feira"
		default:
			return w, notDate(s)
		}
		i += n
		gap = i
	}
	w.rest = s[i:]
	switch {
	case parts == 2 && w.name >= 0 || parts == 2 && w.width[0]+w.width[1] >= 5:
		return w, problem("the date names no day, or no year", lookUp)
	case parts < 3 || w.name == 2 || strings.Trim(gaps[0], ",.'") != "":
		return w, notDate(s)
	case w.name < 0 && (words || gaps[1] != gaps[2] || len(gaps[1]) > 1 || strings.Trim(gaps[1], "-/.") != ""):
		return w, notDate(s)
	case strings.Trim(gaps[1], "-/.,' ") != "" || strings.Trim(gaps[2], "-/.,' ") != "":
		return w, notDate(s)
	}
	if gaps[2] == "." && strings.HasPrefix(w.rest, ".") && (len(w.rest) == 1 || w.rest[1] == ' ') {
		w.rest = w.rest[1:]
	}
	return w, nil
}

// filler says whether a word within a date says nothing, or only by which calendar the year counts. Endings of
// ordinals stand directly behind a number, other words by themselves.
func (w *written) filler(word string, behind, alone bool) bool {
	switch word {
	case "พ ศ", "พศ":
		w.buddhist = true
		return true
	case "ค ศ", "คศ", "feira":
		return true
	}
	return behind && endings[word] || alone && between[word]
}

// leadingWord measures the letters, with their marks, at the beginning of s. Thai abbreviations hold points.
func leadingWord(s string) int {
	thai := false
	for i, r := range s {
		switch {
		case unicode.IsLetter(r) || unicode.IsMark(r):
			thai = thai || unicode.Is(unicode.Thai, r)
		case r == '.' && thai:
		default:
			return i
		}
	}
	return len(s)
}

// notDate says of a text that it is no date, and why if that can be told.
func notDate(s string) *Problem {
	if strings.ContainsAny(s, "0") && strings.Trim(s, "0-/. :T") == "" {
		return zeros()
	}
	if letterO(s) && strings.Trim(s, "Oo0123456789-/. ") == "" {
		return problem("the date has the letter O where the digit 0 belongs", "Write the digit 0 where the letter O stands")
	}
	return problem("the cell is not a date", "Correct the cell, or name it under blank in the map if it says that nothing is known")
}
