package convert

import (
	"slices"
	"strconv"
	"strings"
	"unicode/utf8"

	"hearduty/internal/grid"
)

// Thresholds reads hearing threshold levels. A number is a level in dB HL, unless it is listed as a word. What is
// neither a number nor listed is a problem, except NR>100 as ParseThreshold reads it.
type Thresholds struct {
	Numbers   *Numbers                     // nil for a decimal point
	NoWords   []string                     // say no response
	NoMarks   []string                     // stand before or behind the highest level presented
	Limit     func(hz int) (float64, bool) // highest level presented where the cell does not say it; may be nil
	NotTested []string
	Masked    []string // signs behind a masked threshold, or pairs around it such as []
}

// levelUnits may stand behind a level.
var levelUnits = []string{"dB HL", "dBHL", "dB(HL)", "dB"}

// Read gives the threshold as audiometry.ParseThreshold reads it, and whether the cell says that it was masked.
func (t *Thresholds) Read(c grid.Cell, hz int) (text string, masked bool, p *Problem) {
	s, p := cell(c, "hearing threshold levels")
	if p != nil || s == "" {
		return "", false, p
	}
	if text, found, p := t.word(s, hz); found {
		return text, false, p
	}
	if plainLevel(s) && (s[0] != '-' || !slices.Contains(t.NoMarks, "-")) {
		return s, false, nil
	}
	if inner, ok := t.unmasked(s); ok {
		if inner == "" {
			return "", false, maskedAlone()
		}
		s, masked = inner, true
		if text, found, p := t.word(s, hz); found {
			return text, masked && p == nil, p
		}
	}
	if level, found, p := t.marked(s); found {
		if p != nil {
			return "", false, p
		}
		text, p = t.level(grid.Cell{Text: level}, "NR>")
		return text, masked && p == nil, p
	}
	if text, p = t.level(grid.Cell{Text: s, Kind: c.Kind}, ""); masked && text == "" && p == nil {
		p = maskedAlone() // what is left, such as ="", says nothing
	}
	return text, masked && p == nil, p
}

func maskedAlone() *Problem {
	return problem("the cell has a sign of masking but no level", "Look up the level, and correct the cell")
}

// word tells whether the cell is one of the words listed, and what that gives.
func (t *Thresholds) word(s string, hz int) (text string, found bool, p *Problem) {
	no, not := listed(s, t.NoWords), listed(s, t.NotTested)
	switch {
	case no && not:
		return "", true, problem("the map lists the cell both as no response and as not tested", "List it in one of the two")
	case not:
		return "NT", true, nil
	case !no:
		return "", false, nil
	}
	limit, ok := 0.0, false
	if t.Limit != nil {
		limit, ok = t.Limit(hz)
	}
	if !ok {
		return "", true, problem("the cell says no response, but the highest level presented at "+strconv.Itoa(hz)+" Hz is not known",
			"State it under no_response.limit or no_response.limits in the map")
	}
	text, p = canonical("NR>" + decimal(limit))
	return text, true, p
}

// listed says whether the cell is one of the words. Case and the length of blanks do not matter, but signs do.
// Numbers are compared by value, since 666 and 666.0 are the same code.
func listed(s string, words []string) bool {
	level := plainLevel(s)
	for _, w := range words {
		if w == s || !(level && w != "" && w[0] >= 'A' && w[0] <= 'z') && strings.EqualFold(plain(w), s) {
			return true
		}
	}
	if strings.ContainsAny(s, " .") {
		for _, w := range words {
			if sameNumber(s, w) || wordKey(w) == wordKey(s) {
				return true
			}
		}
	}
	return false
}

func sameNumber(s, word string) bool {
	word = plain(word)
	if !short(s) || !short(word) {
		return false
	}
	a, err := strconv.ParseFloat(s, 64)
	b, other := strconv.ParseFloat(word, 64)
	return err == nil && other == nil && a == b
}

// unmasked takes the signs of masking off.
func (t *Thresholds) unmasked(s string) (string, bool) {
	for _, sign := range t.Masked {
		sign = plain(sign)
		if open, size := utf8.DecodeRuneInString(sign); isPair(sign) {
			if inner, ok := strings.CutPrefix(s, string(open)); ok {
				if inner, ok = strings.CutSuffix(inner, sign[size:]); ok {
					return strings.TrimSpace(inner), true
				}
			}
			continue
		}
		if rest, ok := cutSuffixFold(s, sign); ok {
			return rest, true
		}
	}
	return s, false
}

// isPair says whether a sign of masking is two different signs that stand around a level.
func isPair(sign string) bool {
	r := []rune(sign)
	return len(r) == 2 && r[0] != r[1] && !isWord(r[0]) && !isWord(r[1])
}

// marked takes a mark of no response off, and gives the level beside it.
func (t *Thresholds) marked(s string) (level string, found bool, p *Problem) {
	for _, mark := range t.NoMarks {
		mark = plain(mark)
		if mark == "" {
			continue
		}
		if len(s) >= len(mark) && strings.EqualFold(s[:len(mark)], mark) {
			level, found = strings.TrimSpace(s[len(mark):]), true
		}
		if !found {
			level, found = cutSuffixFold(s, mark)
		}
		if !found {
			continue
		}
		switch {
		case level == "":
			return "", true, problem("the cell has a mark of no response, but no level beside it", "List the mark under no_response.words in the map as well, and state the limit there")
		case (mark == "+" || mark == "-") && strings.HasPrefix(s, mark):
			return "", true, problem("the sign before the level can be that of a number as well as a mark of no response", "Write no response like NR>100")
		case startsLikeNumber(level):
			return level, true, nil
		}
		found = false
	}
	return "", false, nil
}

func startsLikeNumber(s string) bool {
	s = strings.TrimPrefix(s, "-")
	return s != "" && (s[0] >= '0' && s[0] <= '9' || s[0] == '.' || s[0] == ',')
}
