package audiometry

import (
	"fmt"
	"strconv"
	"strings"
)

// The range of a threshold entry, in tenths of dB HL (common practice, no source: audiometers reach from
// -10 to 120 dB HL; the range here leaves 10 dB on each side).
const (
	minTenths = -200
	maxTenths = 1300
)

// ParseThreshold reads a threshold entry. Blanks around it and the case of letters do not matter.
//
//	25, -5, 12.5   a threshold in dB HL, -20 to 130, with at most one decimal after a decimal point;
//	               the minus may be the sign U+2212
//	NR>100         no response up to 100 dB HL
//	NT             not tested
//	(empty)        not recorded
//
// The error is one plain sentence that says what to write instead.
func ParseThreshold(s string) (Threshold, error) {
	text := strings.ToUpper(strings.TrimSpace(s))
	switch {
	case text == "":
		return Threshold{}, nil
	case text == "NT":
		return Threshold{State: NotTested}, nil
	case strings.HasPrefix(text, "NR"):
		level, ok := strings.CutPrefix(text, "NR>")
		if !ok || level == "" {
			return Threshold{}, fmt.Errorf("%q does not name the highest level presented; write it like NR>100", s)
		}
		tenths, err := parseTenths(s, level)
		if err != nil {
			return Threshold{}, err
		}
		return Threshold{Tenths: tenths, State: NoResponse}, nil
	}
	tenths, err := parseTenths(s, text)
	if err != nil {
		return Threshold{}, err
	}
	return Threshold{Tenths: tenths, State: Measured}, nil
}

// parseTenths reads the number part of the entry s as tenths.
func parseTenths(s, number string) (int16, error) {
	tenths, ok := scanTenths(number)
	if !ok {
		return 0, fmt.Errorf("%q is not a threshold; %s", s, hint(number))
	}
	if tenths < minTenths || tenths > maxTenths {
		return 0, fmt.Errorf("%q is outside -20 to 130 dB HL; check it for a slipped digit, and write NR>100 for no response up to 100 dB", s)
	}
	return int16(tenths), nil
}

// scanTenths reads digits, with a sign and one decimal if present. Numbers too long to be a level give a
// value out of range.
func scanTenths(number string) (int, bool) {
	if number != "" && len(number) <= 3 && allDigits(number) { // as most are
		n := 0
		for i := range len(number) {
			n = 10*n + int(number[i]-'0')
		}
		return 10 * n, true
	}
	number, minus := strings.CutPrefix(strings.Replace(number, "\u2212", "-", 1), "-")
	whole, fraction, point := strings.Cut(number, ".")
	fraction = strings.TrimRight(fraction, "0")
	if !allDigits(whole) || whole == "" || point && strings.HasSuffix(number, ".") || len(fraction) > 1 || !allDigits(fraction) {
		return 0, false
	}
	tenths, err := strconv.Atoi(whole + (fraction + "0")[:1])
	if err != nil {
		tenths = maxTenths + 1
	}
	if minus {
		tenths = -tenths
	}
	return tenths, true
}

func allDigits(s string) bool {
	for i := range len(s) {
		if s[i] < '0' || s[i] > '9' {
			return false
		}
	}
	return true
}

// hint says what to write instead of a text that is no number.
func hint(number string) string {
	if _, ok := scanTenths(strings.ReplaceAll(number, "O", "0")); ok {
		return "it has the letter O where the digit 0 belongs"
	}
	if _, ok := scanTenths(strings.Replace(number, ",", ".", 1)); ok {
		return "write the decimals after a point, not a comma"
	}
	if _, fraction, ok := strings.Cut(number, "."); ok && len(fraction) > 1 && allDigits(fraction) {
		return "write a number with one decimal at most"
	}
	if _, ok := scanTenths(strings.TrimRight(strings.TrimLeft(number, ">"), "+")); ok {
		return "write no response up to 100 dB as NR>100"
	}
	return "write a number such as 25, NR>100 for no response, NT for not tested, or nothing"
}

// String writes the entry in the form that ParseThreshold reads.
func (t Threshold) String() string {
	switch t.State {
	case Measured:
		return string(t.appendLevel(nil))
	case NoResponse:
		return string(t.appendLevel([]byte("NR>")))
	case NotTested:
		return "NT"
	}
	return ""
}

func (t Threshold) appendLevel(b []byte) []byte {
	tenths := int(t.Tenths)
	if tenths < 0 {
		b, tenths = append(b, '-'), -tenths
	}
	b = strconv.AppendInt(b, int64(tenths/10), 10)
	if tenths%10 != 0 {
		b = append(b, '.', byte('0'+tenths%10))
	}
	return b
}
