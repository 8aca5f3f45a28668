package rulebook

import (
	"fmt"
	"strconv"
	"strings"
	"unicode"
	"unicode/utf8"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// ahead stands for the field within of an obligation that is fulfilled before a day.
const ahead = "within, before"

// roles are the fields of an obligation that name a parameter, with the words before its value.
var roles = map[string]string{
	"within": "within", "every": "at least every", "first": "the first time within", "until": "that holds for the first", "then": "after that at least every",
	"for": "for", ahead: "before it, but not longer before than",
	"at_most": "at most", "below": "less than", "at_least": "at least", "above": "more than",
}

// amount writes a parameter's value in words with its unit.
func amount(p bundle.Parameter, v *bundle.Value) string {
	if interval, ok := v.Interval(); ok {
		return interval.String()
	}
	if words, ok := v.Value.([]any); ok {
		texts := make([]string, len(words))
		for i, w := range words {
			texts[i] = spaced(finding.Words(w))
		}
		return strings.Join(texts, "; ")
	}
	s := spaced(finding.Words(v.Plain()))
	if _, ok := v.Value.(float64); ok && p.Unit != "" {
		s += " " + p.Unit
	}
	return s
}

// bound writes a parameter's value behind the words of a role. Calendar years end with the year, so they are told
// apart from years.
func bound(role string, p bundle.Parameter, v *bundle.Value) string {
	interval, ok := v.Interval()
	if ok && interval.Unit == calendar.CalendarYears {
		switch n := interval.Count; role {
		case "every", "then":
			if n == 1 {
				return "at least once in each calendar year"
			}
			return fmt.Sprintf("at least once in every %d calendar years", n)
		case "within", "first":
			if n == 0 {
				return "by the end of the calendar year"
			}
			return fmt.Sprintf("by the end of %s after", ordinalYear(n))
		case "for":
			return fmt.Sprintf("until the end of %s after", ordinalYear(n))
		}
	}
	return strings.TrimSpace(roles[role] + " " + amount(p, v))
}

func ordinalYear(n int) string {
	switch n {
	case 1:
		return "the calendar year"
	case 2:
		return "the 2nd calendar year"
	case 3:
		return "the 3rd calendar year"
	}
	return "the " + strconv.Itoa(n) + "th calendar year"
}

// limit writes a parameter on the day behind the words of a role, such as "at least 50 %".
func (m *maker) limit(role, name string) string {
	p := m.Parameters[name]
	v, ok := p.At(m.day)
	if !ok {
		return fmt.Sprintf("%s %s (no value in force on %s)", roles[role], name, m.day)
	}
	return bound(role, p, v)
}

// seen says in words what was read for a value.
func seen(mark string) string {
	switch mark {
	case "text":
		return "read in the official text"
	case "secondary":
		return "read in a secondary source, not in the official text"
	case "memory":
		return "from memory, not checked against the official text"
	}
	return mark
}

// lower writes the first letter small, unless the word is an abbreviation or a name of several capitals.
func lower(s string) string {
	c, n := utf8.DecodeRuneInString(s)
	if next, _ := utf8.DecodeRuneInString(s[n:]); unicode.IsUpper(next) || !unicode.IsLetter(next) && next != ' ' {
		return s
	}
	return string(unicode.ToLower(c)) + s[n:]
}

func upper(s string) string {
	c, n := utf8.DecodeRuneInString(s)
	return string(unicode.ToUpper(c)) + s[n:]
}

// list joins words with commas and a last word such as "and" or "or".
func list(words []string, last string) string {
	if len(words) < 2 {
		return strings.Join(words, "")
	}
	return strings.Join(words[:len(words)-1], ", ") + " " + last + " " + words[len(words)-1]
}

func spaced(s string) string { return strings.ReplaceAll(s, "_", " ") }

// naturally orders names so that (2) comes before (10).
func naturally(a, b string) int { return strings.Compare(padDigits(a), padDigits(b)) }

func padDigits(s string) string {
	var out strings.Builder
	for i := 0; i < len(s); {
		j := i
		for j < len(s) && s[j] >= '0' && s[j] <= '9' {
			j++
		}
		if j == i {
			out.WriteByte(s[i])
			i++
			continue
		}
		out.WriteString(strings.Repeat("0", max(0, 6-(j-i))) + s[i:j])
		i = j
	}
	return out.String()
}
