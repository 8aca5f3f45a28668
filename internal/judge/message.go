package judge

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
)

// clockMessage says how an obligation with a clock stands.
func (s *settler) clockMessage(o *obligation, out *outcome) string {
	if s.isBrief(out) {
		return ""
	}
	var text string
	switch {
	case out.status == finding.Met && out.due.Known():
		text = fmt.Sprintf("Done on %s, in time; the last day was %s", out.done, out.due)
	case out.status == finding.Met:
		text = fmt.Sprintf("Done on %s", out.done)
	case out.status == finding.Late:
		text = fmt.Sprintf("Done on %s, %s after the last day, %s", out.done, days(int(out.done-out.due)), out.due)
	case out.status == finding.Due:
		text = fmt.Sprintf("Not yet done; the last day is %s, in %s", out.due, days(int(out.due-s.asOf)))
	case out.due.Known():
		text = fmt.Sprintf("No record that it was done; the last day was %s, %s ago", out.due, days(int(s.asOf-out.due)))
	default:
		text = "No record that it was done"
	}
	return joinSentences(o.note, text, touchedWords(out))
}

// touchedWords says how many tests were made between a missed deadline and its fulfilment.
func touchedWords(out *outcome) string {
	when := "since the last day"
	if out.status == finding.Late {
		when = "in between"
	}
	switch n, _ := out.facts["tests_touched"].(int); n {
	case 0:
		return ""
	case 1:
		return "1 test was made " + when
	default:
		return fmt.Sprintf("%d tests were made %s", n, when)
	}
}

func days(n int) string {
	if n == 1 {
		return "1 day"
	}
	return strconv.Itoa(n) + " days"
}

// limitWords says a value beside its limit.
func (s *settler) limitWords(o *obligation, u used, bound float64) string {
	relation := map[string]string{"at_most": "at most", "below": "below", "at_least": "at least", "above": "above"}[o.compare]
	who := "the law"
	if u.value.Seen == "memory" || s.bundle.About.Kind != "law" || s.duty != nil && s.duty.Guidance() {
		who = "this bundle" // the number was not read in the text, or is none of the law
	}
	return fmt.Sprintf("%s; %s asks for %s %s", withUnit(o.value, u.unit), who, relation, withUnit(bound, u.unit))
}

// withUnit writes a number with its unit, one thing without the s of several.
func withUnit(n float64, unit string) string {
	if n == 1 && len(unit) > 2 {
		unit = strings.TrimSuffix(unit, "s")
	}
	return strings.TrimSpace(short(n) + " " + unit)
}

func short(v float64) string {
	return strconv.FormatFloat(v, 'f', -1, 64)
}

// lackWords begin the sentence that says what the records lack.
const lackWords = "The records lack: "

// cannotDecide says what the records lack.
func cannotDecide(missing []string) string {
	if len(missing) == 0 {
		return "The records do not decide it"
	}
	return lackWords + strings.Join(missing, "; ")
}

// missingOf gives what the records lack to decide an unproven outcome: the words of the rule, and behind them those of
// the settling step, which stand in the message alone.
func missingOf(x *outcome, o *obligation) []string {
	at := strings.LastIndex(x.message, lackWords)
	if x.status != finding.Unproven || at < 0 {
		return nil
	}
	var out []string
	if o != nil {
		out = slices.Clone(o.missing)
	}
	rest := strings.TrimPrefix(x.message[at+len(lackWords):], strings.Join(out, "; "))
	if rest = strings.TrimSuffix(strings.TrimPrefix(rest, "; "), "."); rest != "" {
		out = append(out, rest)
	}
	return out
}

// words writes the name of a parameter as words.
func words(name string) string { return strings.ReplaceAll(name, "_", " ") }

// sentence gives a text a capital letter and a full stop.
func sentence(text string) string {
	text = strings.TrimSpace(text)
	if text == "" {
		return ""
	}
	first := []rune(text)[0]
	text = strings.ToUpper(string(first)) + text[len(string(first)):]
	if strings.HasSuffix(text, ".") || strings.HasSuffix(text, "?") {
		return text
	}
	return text + "."
}

// joinSentences puts sentences together, leaving out empty ones.
func joinSentences(texts ...string) string {
	var out []string
	for _, t := range texts {
		if s := sentence(t); s != "" {
			out = append(out, s)
		}
	}
	return strings.Join(out, " ")
}

// usedParameter writes a parameter for an explanation.
func usedParameter(b *bundle.Bundle, u used) UsedParameter {
	value := fmt.Sprint(u.value.Plain())
	if interval, ok := u.value.Interval(); ok {
		value = interval.String()
	} else if n, ok := u.value.Number(); ok {
		value = short(n)
	}
	return UsedParameter{
		Name: u.name, About: b.Parameters[u.name].About, Unit: u.unit, Value: value,
		Cite: u.value.Cite, Seen: u.value.Seen, From: u.value.From,
	}
}
