package html

import (
	"math"
	"strconv"
	"strings"
	"unicode/utf8"
)

// number writes a coordinate with two decimals at most.
func number(v float64) string {
	v = math.Round(v*100) / 100
	if v == 0 {
		return "0"
	}
	return strings.Replace(strconv.FormatFloat(v, 'f', -1, 64), "0.", ".", boolInt(math.Abs(v) < 1))
}

func boolInt(b bool) int {
	if b {
		return 1
	}
	return 0
}

// path writes path data: commands are strings, coordinates numbers.
func path(parts ...any) string {
	var b strings.Builder
	after := false // a number stands last
	for _, p := range parts {
		v, isNumber := p.(float64)
		if !isNumber {
			b.WriteString(p.(string))
			after = false
			continue
		}
		s := number(v)
		if after && s[0] != '-' {
			b.WriteByte(' ')
		}
		b.WriteString(s)
		after = true
	}
	return b.String()
}

// wide estimates how wide a text of 11 units is. It goes by a wide one, since the reader's font is not known.
func wide(s string) float64 { return 5.9 * float64(utf8.RuneCountInString(s)) }

// cut shortens a text to a number of characters.
func cut(s string, most int) string {
	if utf8.RuneCountInString(s) <= most {
		return s
	}
	return strings.TrimRight(string([]rune(s)[:most-1]), " ,:") + "…"
}
