package text

import (
	"strings"
	"unicode"

	"golang.org/x/text/width"
)

// cells gives the number of columns that a text takes on a terminal: two for wide characters, none for
// marks that stand on another character.
func cells(s string) int {
	n := 0
	for _, c := range s {
		n += cell(c)
	}
	return n
}

func cell(c rune) int {
	switch {
	case c < 0x80:
		return 1
	case unicode.In(c, unicode.Mn, unicode.Me, unicode.Cf):
		return 0
	}
	switch width.LookupRune(c).Kind() {
	case width.EastAsianWide, width.EastAsianFullwidth:
		return 2
	}
	return 1
}

// clean replaces control characters, which could steer a terminal.
func clean(s string) string {
	return strings.Map(func(c rune) rune {
		if unicode.IsControl(c) || unicode.In(c, unicode.Bidi_Control) {
			return '\uFFFD'
		}
		return c
	}, s)
}

// wrap breaks a text into lines of at most so many columns, at blanks; only words that are longer than
// a line are broken within.
func wrap(s string, columns int) []string {
	columns = max(columns, 10)
	var lines []string
	line, used := "", 0
	put := func(word string, n int) {
		switch {
		case line == "":
			line, used = word, n
		case used+1+n <= columns:
			line, used = line+" "+word, used+1+n
		default:
			lines = append(lines, line)
			line, used = word, n
		}
	}
	for _, word := range strings.Fields(s) {
		word = clean(word)
		for n := cells(word); ; n = cells(word) {
			if n <= columns {
				put(word, n)
				break
			}
			if free := columns - used - 1; line != "" && free >= columns/3 {
				head := cut(word, free)
				put(head, cells(head))
				word = word[len(head):]
				continue
			}
			head := cut(word, columns)
			put(head, cells(head))
			word = word[len(head):]
		}
	}
	if line != "" {
		lines = append(lines, line)
	}
	return lines
}

// cut gives as much of the beginning of a word as fits into so many columns, one character at least.
func cut(word string, columns int) string {
	used := 0
	for i, c := range word {
		if used += cell(c); used > columns && i > 0 {
			return word[:i]
		}
	}
	return word
}

// padRight fills a text with blanks up to so many columns.
func padRight(s string, columns int) string {
	return s + strings.Repeat(" ", max(0, columns-cells(s)))
}

// padLeft puts blanks before a text up to so many columns.
func padLeft(s string, columns int) string {
	return strings.Repeat(" ", max(0, columns-cells(s))) + s
}

// fit cuts a text that is too long for so many columns and shows that it was cut.
func fit(s string, columns int) string {
	if cells(s) <= columns {
		return s
	}
	return cut(s, columns-1) + "…"
}
