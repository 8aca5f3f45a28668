package record

import (
	"strconv"
	"strings"
)

// setNumber reads a number with a decimal point, such as 85, -5 or 12.5. The minus may be the sign
// U+2212. Exponents, decimal commas and thousands separators are not numbers here.
func (f *Field) setNumber(p *Number, text string) *Problem {
	*p = Number{}
	if text == "" {
		return nil
	}
	v, ok := parseNumber(text)
	if !ok {
		return f.problem(text, numberHint(text), "%q is not a number", Shorten(text))
	}
	if f.HasMin && v < f.Min || f.HasMax && v > f.Max {
		return f.problem(text, "Check the number and its unit, and leave the cell empty if it is not known", "%s is outside %s", Shorten(text), f.bounds())
	}
	*p = Num(v)
	return nil
}

func (f *Field) bounds() string {
	low, high := Num(f.Min).String(), Num(f.Max).String()
	switch {
	case !f.HasMax:
		return low + " and above"
	case !f.HasMin:
		return high + " and below"
	}
	return low + " to " + high
}

func parseNumber(text string) (float64, bool) {
	if strings.HasPrefix(text, "\u2212") {
		text = "-" + text[len("\u2212"):]
	}
	digits := text
	if strings.HasPrefix(text, "-") || strings.HasPrefix(text, "+") {
		digits = text[1:]
	}
	whole, fraction, point := strings.Cut(digits, ".")
	if !allDigits(whole) || point && !allDigits(fraction) {
		return 0, false
	}
	v, err := strconv.ParseFloat(text, 64)
	return v, err == nil
}

func allDigits(s string) bool {
	for i := range len(s) {
		if s[i] < '0' || s[i] > '9' {
			return false
		}
	}
	return s != ""
}

// numberHint says what to write instead of a text that is no number.
func numberHint(text string) string {
	if strings.ContainsAny(text, "Oo") {
		if _, ok := parseNumber(strings.NewReplacer("O", "0", "o", "0").Replace(text)); ok {
			return "Write the digit 0 where the letter O stands"
		}
	}
	if strings.Contains(text, ",") {
		if _, ok := parseNumber(strings.ReplaceAll(text, ",", "")); ok {
			return "Write the decimals after a point, not a comma, and no thousands separator"
		}
	}
	if _, err := strconv.ParseFloat(text, 64); err == nil && strings.ContainsAny(text, "eE") {
		return "Write plain digits, without an exponent"
	}
	if allDigits(strings.NewReplacer(".", "", ",", "", "'", "", " ", "", "\u00a0", "").Replace(text)) {
		return "Write the number without thousands separators and the decimals after a point"
	}
	if _, ok := parseNumber(strings.TrimRight(text, "%dBACZabcmin \u00a0")); ok {
		return "Write the number without its unit"
	}
	return "Write a number such as 85.3, and leave the cell empty if it is not known"
}
