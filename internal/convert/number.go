package convert

import (
	"math"
	"strconv"
	"strings"

	"hearduty/internal/grid"
)

// Numbers reads numbers.
type Numbers struct {
	Decimal   byte // '.' or ','; 0 for a point
	Thousands rune // 0 for none; a blank stands for all kinds of blanks, ' for all apostrophes
}

// Read gives the number with a decimal point. A percent sign or a unit behind it is a problem, unless it is
// one of the units named, which are taken away.
//
// Numbers of a workbook or of JSON have a decimal point whatever the map says, and may have an exponent. They
// are rounded to the 15 digits that a spreadsheet shows.
func (n *Numbers) Read(c grid.Cell, units ...string) (string, *Problem) {
	s, p := cell(c, "numbers")
	if p != nil || s == "" {
		return "", p
	}
	if c.Kind == grid.Number {
		return stored(s)
	}
	return n.text(s, units...)
}

// stored reads a number as a workbook or JSON holds it.
func stored(s string) (string, *Problem) {
	if short(s) {
		return s, nil
	}
	v, err := strconv.ParseFloat(s, 64)
	if err != nil || math.IsNaN(v) || math.Abs(v) >= 1e15 || strings.ContainsAny(s, "xX_pPnN") {
		return "", problem("the number is too large or none", "Look up the number, and correct the cell")
	}
	v, err = strconv.ParseFloat(strconv.FormatFloat(v, 'g', 15, 64), 64)
	if err != nil {
		return "", problem("the number is too large or none", "Look up the number, and correct the cell")
	}
	return decimal(v), nil
}

// decimal writes a number without exponent. What is below a trillionth is written as zero.
func decimal(v float64) string {
	if v == 0 || math.Abs(v) < 1e-12 {
		return "0"
	}
	return strconv.FormatFloat(v, 'f', -1, 64)
}

// short says whether s is a number in canonical form with few digits: -5, 85 or 85.3.
func short(s string) bool {
	i, point := 0, 0
	if len(s) > 12 {
		return false
	}
	if s != "" && s[0] == '-' {
		i = 1
	}
	first := i
	for ; i < len(s); i++ {
		switch {
		case '0' <= s[i] && s[i] <= '9':
		case s[i] == '.' && point == 0 && i > first:
			point = i
		default:
			return false
		}
	}
	return len(s) > first && point != len(s)-1
}

// text reads a number as people write it.
func (n *Numbers) text(s string, units ...string) (string, *Problem) {
	if n.Decimal != ',' && short(s) {
		return s, nil
	}
	s = withoutUnit(s, units)
	sign, digits := "", s
	switch {
	case strings.HasPrefix(s, "-"):
		sign, digits = "-", s[1:]
	case strings.HasPrefix(s, "+"):
		digits = s[1:]
	}
	mark := "."
	if n.Decimal == ',' {
		mark = ","
	}
	whole, fraction, point := strings.Cut(digits, mark)
	whole, grouped := n.ungrouped(whole)
	if !grouped || point && !onlyDigits(fraction) || !point && whole == "" {
		return "", n.why(s)
	}
	if whole == "" {
		whole = "0"
	}
	if point {
		whole += "." + fraction
	}
	return sign + whole, nil
}

// ungrouped takes the signs between thousands away. They must stand between groups of three digits.
func (n *Numbers) ungrouped(whole string) (string, bool) {
	if whole == "" || onlyDigits(whole) {
		return whole, true
	}
	if n.Thousands == 0 {
		return "", false
	}
	groups := strings.Split(whole, string(n.Thousands))
	for i, g := range groups {
		if !onlyDigits(g) || i > 0 && len(g) != 3 || i == 0 && (len(g) > 3 || g[0] == '0') {
			return "", false
		}
	}
	return strings.Join(groups, ""), true
}

// withoutUnit takes the longest of the units away that stands behind a number. Case and blanks in units do
// not matter.
func withoutUnit(s string, units []string) string {
	best := s
	for _, unit := range units {
		if rest, ok := cutSuffixFold(s, unit); ok && len(rest) < len(best) && endsLikeNumber(rest) {
			best = rest
		}
	}
	return best
}

// cutSuffixFold takes the suffix off with the blanks before it, whatever its case.
func cutSuffixFold(s, suffix string) (string, bool) {
	if suffix == "" || len(s) < len(suffix) || !strings.EqualFold(s[len(s)-len(suffix):], suffix) {
		return s, false
	}
	return strings.TrimRight(s[:len(s)-len(suffix)], " "), true
}

func endsLikeNumber(s string) bool {
	return s != "" && (s[len(s)-1] >= '0' && s[len(s)-1] <= '9' || s[len(s)-1] == '.' || s[len(s)-1] == ',')
}
