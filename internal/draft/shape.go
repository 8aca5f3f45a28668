package draft

import (
	"regexp"
	"strconv"
	"strings"
	"unicode"

	"hearduty/internal/grid"
)

// dateShape is how a date is written.
type dateShape uint8

// The shapes of a date.
const (
	noDate     dateShape = iota
	dayCell              // a date by the workbook itself
	yearFirst            // 2025-03-04 and the like
	partsOpen            // 04/03/2025: day and month may be either way round
	withWords            // 4 Mar 2025
	eightDigit           // 20250304
	serialDay            // a number that may be a spreadsheet's day
)

var (
	yearFirstForm = regexp.MustCompile(`^(\d{4})([-/. ]\d{1,2}[-/. ]\d{1,2}|年\d{1,2}月\d{1,2}日)([T ].*)?$`)
	partsForm     = regexp.MustCompile(`^\d{1,2}([-/. ])\d{1,2}[-/. ](\d{4}|\d{2})([T ]+\d{1,2}:\d\d.*)?$`)
	wordsForm     = regexp.MustCompile(`^(\d{1,2}[-. ]*\p{L}{3,}\.?[-. ]*'?(\d{4}|\d{2})|\p{L}{3,}\.? \d{1,2},? \d{4}|\p{L}{2}\d{1,2}年\d{1,2}月\d{1,2}日)$`)
	zoneForm      = regexp.MustCompile(`\d\d:?\d\d.*(Z|[+-]\d\d:?\d\d)$`)
	clockForm     = regexp.MustCompile(`^\d{1,3}(:[0-5]\d(:[0-5]\d)?|[hH][0-5]\d)$`)
	numberForm    = regexp.MustCompile(`^[-−+]?(\d+|\d{1,3}([ '.,]\d{3})+)([.,]\d+)?$`)
	signsForm     = regexp.MustCompile(`^(?:[<>≥≤(\[]\s*)?[-−+]?\d+(?:[.,]\d+)?\s*(?:[+↓>)\]*a-zA-Z]{1,2})?$`)
)

// sentinels are dates that stand for none.
func sentinel(text string) bool {
	switch strings.NewReplacer("/", "-", ".", "-").Replace(strings.TrimSpace(text)) {
	case "31-12-9999", "12-31-9999", "9999-12-31", "0000-00-00", "00-00-0000", "01-01-1900", "1900-01-01", "1-1-1900", "99991231", "00000000":
		return true
	}
	return false
}

// shapeOf tells how a cell writes a date, whether its year has two digits, and its year if it stands first.
func shapeOf(c grid.Cell) (s dateShape, short bool, year int) {
	text := strings.TrimSpace(c.Text)
	switch c.Kind {
	case grid.Day:
		return dayCell, false, 0
	case grid.Number:
		if n, err := strconv.ParseFloat(text, 64); err == nil && n >= 10_000 && n < 60_000 {
			return serialDay, false, 0
		}
	case grid.Clock, grid.Bool, grid.Broken, grid.Uncomputed:
		return noDate, false, 0
	}
	if len(text) < 5 || len(text) > 40 {
		return noDate, false, 0
	}
	if m := yearFirstForm.FindStringSubmatch(text); m != nil {
		year, _ = strconv.Atoi(m[1])
		return yearFirst, false, year
	}
	if m := partsForm.FindStringSubmatch(text); m != nil {
		year, _ = strconv.Atoi(m[2])
		return partsOpen, len(m[2]) == 2, year
	}
	if m := wordsForm.FindStringSubmatch(text); m != nil {
		return withWords, len(m[2]) == 2, 0
	}
	return digitsShape(text)
}

// digitsShape reads digits without signs between them.
func digitsShape(text string) (dateShape, bool, int) {
	n, err := strconv.Atoi(text)
	switch {
	case err != nil || text[0] == '0':
	case len(text) == 8 && n/10000 >= 1900 && n/10000 <= 2600 && n/100%100 <= 12 && n%100 <= 31:
		return eightDigit, false, n / 10000
	case len(text) == 5 && n >= 10_000 && n < 60_000:
		return serialDay, false, 0
	}
	return noDate, false, 0
}

// number is what a cell says as a number.
type number struct {
	value   float64
	comma   bool // a comma stands in it that can only be the decimal sign
	point   bool // a point stands in it that can only be the decimal sign
	open    bool // a sign stands in it that may be decimal or between thousands
	percent bool
	groups  byte // sign between thousands, if it can only be that
}

// readNumber reads a cell as a number in any notation. It returns false if it is none.
func readNumber(c grid.Cell) (number, bool) {
	text := strings.TrimSpace(c.Text)
	var n number
	if c.Kind == grid.Number {
		v, err := strconv.ParseFloat(text, 64)
		n.value = v
		return n, err == nil
	}
	if c.Kind != grid.Text {
		return n, false
	}
	if cut, ok := strings.CutSuffix(text, "%"); ok {
		n.percent, text = true, strings.TrimSpace(cut)
	}
	text = strings.ReplaceAll(text, "\u00a0", " ")
	if len(text) > 24 || !numberForm.MatchString(text) {
		return n, false
	}
	point, comma := strings.Count(text, "."), strings.Count(text, ",")
	switch {
	case point > 0 && comma > 0:
		n.comma = strings.LastIndexByte(text, ',') > strings.LastIndexByte(text, '.')
		n.point = !n.comma
		n.groups = '.'
		if n.point {
			n.groups = ','
		}
	case point > 1:
		n.groups = '.'
	case comma > 1:
		n.groups = ','
	case point+comma == 1:
		_, after, _ := strings.Cut(strings.Replace(text, ",", ".", 1), ".")
		before := strings.IndexAny(text, ".,")
		n.open = len(after) == 3 && strings.TrimLeft(text[:before], "-−+") != "0"
		n.comma, n.point = comma == 1 && !n.open, point == 1 && !n.open
	}
	if n.groups == 0 {
		if at := strings.IndexAny(text, " '"); at >= 0 {
			n.groups = text[at]
		}
	}
	clean := strings.Map(func(r rune) rune {
		switch r {
		case ' ', '\'':
			return -1
		case '−':
			return '-'
		case '.':
			if n.groups == '.' || n.comma {
				return -1
			}
		case ',':
			if n.groups == ',' {
				return -1
			}
			return '.'
		}
		return r
	}, text)
	v, err := strconv.ParseFloat(clean, 64)
	n.value = v
	return n, err == nil
}

// onlyDigits says whether a text consists of ASCII digits.
func onlyDigits(text string) bool {
	for i := range len(text) {
		if text[i] < '0' || text[i] > '9' {
			return false
		}
	}
	return text != ""
}

// hasLetter says whether a text holds a letter.
func hasLetter(text string) bool { return strings.ContainsFunc(text, unicode.IsLetter) }
