package convert

import (
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"hearduty/internal/audiometry"
	"hearduty/internal/grid"
)

// level reads a number in dB HL.
func (t *Thresholds) level(c grid.Cell, before string) (string, *Problem) {
	if rest, ok := cutPrefixFold(c.Text, "NR"); ok && before == "" {
		if level, ok := strings.CutPrefix(strings.TrimSpace(rest), ">"); ok && startsLikeNumber(strings.TrimSpace(level)) {
			c.Text, before = strings.TrimSpace(level), "NR>"
		}
	}
	numbers := t.Numbers
	if numbers == nil {
		numbers = &Numbers{}
	}
	text, p := numbers.Read(c, levelUnits...)
	if p != nil {
		return "", t.why(c.Text, p)
	}
	return canonical(before + text)
}

func cutPrefixFold(s, prefix string) (string, bool) {
	if len(s) < len(prefix) || !strings.EqualFold(s[:len(prefix)], prefix) {
		return s, false
	}
	return s[len(prefix):], true
}

// plainLevel says whether s is a whole level from -20 to 130 dB HL in canonical form. It may miss some that are.
func plainLevel(s string) bool {
	switch len(s) {
	case 1:
		return s[0] >= '0' && s[0] <= '9'
	case 2:
		return (s[0] >= '1' && s[0] <= '9' || s[0] == '-' && s[1] != '0') && s[1] >= '0' && s[1] <= '9'
	}
	return false
}

// canonical checks a level, with NR> before it or not, and writes it as records do.
func canonical(text string) (string, *Problem) {
	threshold, err := audiometry.ParseThreshold(text)
	if err == nil {
		return threshold.String(), nil
	}
	number := strings.TrimPrefix(text, "NR>")
	if v, err := strconv.ParseFloat(number, 64); err == nil && v >= -20 && v <= 130 {
		return "", problem("the level has more than one decimal", "Look up the level; audiometers give whole decibels")
	}
	return "", problem("the level is outside -20 to 130 dB HL", "Check it for a slipped digit; if it is a code, list it in the map under no_response.words, not_tested or blank")
}

// why says of a text that is no level what it may be instead.
func (t *Thresholds) why(s string, p *Problem) *Problem {
	first, _ := utf8.DecodeRuneInString(s)
	digits := strings.ContainsAny(s, "0123456789")
	switch {
	case letterO(s) && strings.Trim(s, "Oo0123456789.,- ") == "":
		return problem("the level has the letter O where the digit 0 belongs", "Write the digit 0 where the letter O stands")
	case !digits:
		return problem("the cell is neither a level nor a word that the map knows",
			"List it under no_response.words, not_tested or blank in the map, whichever it means")
	case strings.ContainsRune(">≥<≤+", first) || strings.ContainsAny(s[len(s)-1:], "+>") || strings.HasSuffix(s, "↓"):
		return problem("the level has a sign that the map does not know", "List the sign under no_response.marks in the map, if it says no response, or correct the cell")
	case !numeric(s) && strings.IndexFunc(s, unicode.IsLetter) != 0 && !strings.ContainsAny(s, "%eE"):
		return problem("the level has letters or signs around it that the map does not know",
			"List them under masked or no_response.marks in the map, whichever they mean, or correct the cell")
	case !numeric(s):
		return problem("the cell is neither a level nor a word that the map knows",
			"List it under no_response.words, not_tested or blank in the map, whichever it means")
	}
	return p
}
