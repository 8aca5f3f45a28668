package convert

import (
	"strings"
	"unicode"
)

// outside are words with which instruments say that a level lies outside their range (common practice, no
// source), by Fold.
var outside = map[string]bool{
	"ol": true, "ovl": true, "ovld": true, "ovr": true, "over": true, "overload": true, "overrange": true, "over range": true,
	"ur": true, "und": true, "under": true, "underrange": true, "under range": true, "lo": true, "hi": true, "low": true, "high": true,
	"or": true, "oor": true, "out of range": true,
}

// why says what is wrong with a text that is no number in the form that n states.
func (n *Numbers) why(s string) *Problem {
	const look = "Correct the cell from the original record, or name it under blank in the map if nothing is known"
	switch {
	case strings.Trim(s, "-.·*/_ ") == "":
		return problem("the cell holds signs only, which are no number", "Name it under blank in the map if it says that nothing is known")
	case outside[Fold(s)]:
		return problem("the cell says that the level lay outside the range of the instrument, and a limit of the instrument is no level",
			"Name the word under blank in the map, or look up what was measured otherwise")
	case strings.ContainsAny(s[:1], "<>=~") || strings.HasPrefix(s, "≤") || strings.HasPrefix(s, "≥") || strings.HasPrefix(s, "±") || strings.HasPrefix(s, "≈"):
		return problem("the cell says that the value lies above, below or near a limit, and a limit is no value",
			"Look up the value, or name the cell under blank in the map")
	case letterO(s) && n.reads(strings.NewReplacer("O", "0", "o", "0").Replace(s)):
		return problem("the number has the letter O where the digit 0 belongs", "Write the digit 0 where the letter O stands")
	case strings.HasSuffix(s, "%"):
		return problem("the number has a percent sign", "State the unit percent for this column in the map, if the field is a share")
	case strings.HasSuffix(s, "-") && n.reads("-"+strings.TrimSpace(s[:len(s)-1])):
		return problem("the minus stands behind the number", "Write it before the number")
	case strings.HasPrefix(s, "(") && strings.HasSuffix(s, ")"):
		return problem("the number stands in brackets, which can mean a negative one", "Write it without brackets, and with a minus if it is negative")
	case numeric(s):
		return n.whySigns(s)
	case exponent(s):
		return problem("the number is in scientific notation, so digits of it may be lost", "Export the column again as plain numbers")
	}
	if at := strings.LastIndexAny(s, "0123456789"); at >= 0 && n.reads(strings.TrimSpace(s[:at+1])) {
		if rest := strings.TrimSpace(s[at+1:]); len(rest) >= 2 && strings.EqualFold(rest[:2], "dB") {
			return problem("a unit or weighting that is not that of the field stands behind the number", "Look up how it was measured, and map the column to the field of that weighting, or correct the cell")
		}
		return problem("a unit or a remark stands behind the number", "Take it away, or name another column in the map")
	}
	return problem("the cell is not a number", look)
}

// whySigns says what is wrong with points, commas, blanks and apostrophes among digits.
func (n *Numbers) whySigns(s string) *Problem {
	mark, other := "point", "comma"
	if n.Decimal == ',' {
		mark, other = other, mark
	}
	signs := map[string]string{"point": ".", "comma": ","}
	const state = "State decimal and thousands under numbers in the map as the file has them"
	digits := strings.TrimLeft(s, "+-")
	switch {
	case strings.ContainsAny(s, " '"):
		return problem("the number has blanks or apostrophes between its digits that the map does not state, or not between groups of three", state)
	case strings.HasSuffix(s, ".") || strings.HasSuffix(s, ","):
		return problem("the number ends with its decimal sign, so decimals may be lost", "Correct the cell from the original record")
	case n.Thousands == 0 && threes(digits, signs[other]):
		return problem("the number has a "+other+" before three digits, which can stand between thousands or before decimals", state)
	case strings.Contains(s, signs[other]):
		return problem("the number has a "+other+", but its decimal sign is stated to be a "+mark, state)
	}
	return problem("the digits and signs are not one number", "Correct the cell from the original record")
}

// reads says whether the text is a number in the form that n states.
func (n *Numbers) reads(s string) bool {
	if s == "" || numeric(s) == false {
		return false
	}
	digits := strings.TrimLeft(s, "+-")
	mark := "."
	if n.Decimal == ',' {
		mark = ","
	}
	whole, fraction, point := strings.Cut(digits, mark)
	_, ok := n.ungrouped(whole)
	return ok && (whole != "" || point) && (!point || onlyDigits(fraction))
}

// threes says whether a sign stands before three digits at the end and after one to three at the beginning.
func threes(digits, sign string) bool {
	whole, rest, ok := strings.Cut(digits, sign)
	return ok && onlyDigits(whole) && len(whole) <= 3 && len(rest) == 3 && onlyDigits(rest)
}

// numeric says whether a text has digits, and nothing but the signs of numbers beside them.
func numeric(s string) bool {
	return strings.ContainsAny(s, "0123456789") && strings.Trim(s, "+-0123456789.,' ") == "" &&
		strings.IndexFunc(s, unicode.IsLetter) < 0
}

func letterO(s string) bool { return strings.ContainsAny(s, "Oo") }

// exponent finds texts such as 1.5E-3.
func exponent(s string) bool {
	mantissa, power, ok := strings.Cut(strings.ToUpper(s), "E")
	return ok && numeric(mantissa) && onlyDigits(strings.TrimLeft(power, "+-"))
}
