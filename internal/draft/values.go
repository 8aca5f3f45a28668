package draft

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/record"
)

// vocabularies are the word lists by kind and field; the fields of type YesNo have answer.
var vocabularies = map[target]string{
	{"worker", "sex"}: "sex", {"audiogram", "purpose"}: "purpose", {"audiogram", "earphones"}: "earphones",
	{"measurement", "kind"}: "measurement_kind", {"measurement", "method"}: "method", {"measurement", "peak_weighting"}: "peak_weighting",
	{"calibration", "kind"}: "calibration_kind", {"calibration", "result"}: "calibration_result", {"instrument", "kind"}: "instrument_kind",
	{"tester", "qualification"}: "qualification", {"protector", "type"}: "protector_type", {"training", "topics"}: "topics",
	{"control", "kind"}: "control_kind", {"control", "feasible"}: "feasible", {"follow_up", "ear"}: "ear", {"room_survey", "earphones"}: "earphones",
}

// vocabulary gives the word list of a field, or an empty text.
func (a *analysis) vocabulary(f *record.Field) string {
	if f.Type == record.YesNo {
		return "answer"
	}
	if v := vocabularies[target{a.kind, f.Name}]; v != "" {
		return v
	}
	if f.One != nil || f.Like != nil {
		return "-" // a closed set without a list of words
	}
	return ""
}

// meaningOf says what a cell means, and how sure that is. An empty text means that somebody must say.
func (a *analysis) meaningOf(vocabulary, text string, f *record.Field, p *profile) (string, certainty) {
	for _, w := range slices.Concat(f.One, f.Like) {
		if strings.EqualFold(w, text) {
			return w, certain
		}
	}
	switch vocabulary {
	case "sex":
		if m := sexLetter(text, p); m != "" {
			return m, likely
		}
	case "answer":
		return answerWord(text, p)
	case "measurement_kind", "topics":
		if m := known.words[vocabulary][compact(text)]; m != "" {
			return m, likely
		}
	}
	if m := known.words[vocabulary][compact(text)]; m != "" {
		return m, certain
	}
	return "", unsure
}

// sexLetter reads M and F as male and female if both occur and nothing else does. In other pairs the same letters
// have other meanings.
func sexLetter(text string, p *profile) string {
	if p.many || len(p.values) != 2 || p.values["m"] == nil || p.values["f"] == nil {
		return ""
	}
	return map[string]string{"m": "male", "f": "female"}[plain(text)]
}

// answers are the pairs of letters for yes and no.
var answers = [][2]string{{"y", "n"}, {"j", "n"}, {"o", "n"}, {"s", "n"}, {"t", "n"}}

// answerWord reads words for yes and no, and letters if both of a pair, and nothing else, occur.
func answerWord(text string, p *profile) (string, certainty) {
	if m := known.words["answer"][compact(text)]; m != "" {
		return m, certain
	}
	key := plain(text)
	for _, pair := range answers {
		if !p.many && len(p.values) == 2 && p.values[pair[0]] != nil && p.values[pair[1]] != nil {
			if key == pair[0] {
				return "yes", likely
			}
			if key == pair[1] {
				return "no", likely
			}
		}
	}
	return "", unsure
}

// explainValues writes what the cells of a small closed set mean, and asks where that is not known.
func (a *analysis) explainValues(c *column) {
	f := &a.table.Fields[a.table.Index(c.field)]
	vocabulary := a.vocabulary(f)
	if vocabulary == "" || c.p.filled == 0 {
		return
	}
	allowed := strings.Join(slices.Concat(f.One, f.Like), ", ")
	if f.Type == record.YesNo {
		allowed = "yes, no"
	}
	list := c.p.list()
	if list == nil {
		if f.One == nil && f.Like != nil {
			return // texts of any kind are kept
		}
		n := a.ask("What do the cells of %s mean? There are more different ones than a draft shows; give each under values of %s: %s", c.shown(), c.field, allowed)
		c.extras = append(c.extras, "# values: # question "+fmt.Sprint(n))
		return
	}
	var lines []string
	var open []*value
	needed, some := false, false
	for _, v := range list {
		meaning, sure := a.meaningOf(vocabulary, v.text, f, c.p)
		if meaning == "" {
			open = append(open, v)
			continue
		}
		needed = needed || !strings.EqualFold(meaning, v.text)
		some = true
		note := rowCount(v.rows)
		if sure == likely {
			note = "likely, " + note
			c.sure = min(c.sure, likely)
		}
		lines = append(lines, fmt.Sprintf("  %s: %s # %s", quote(v.text), quote(meaning), note))
	}
	if len(open) > 0 && f.One == nil && f.Type != record.YesNo {
		a.keepOthers(c, lines, open, allowed)
		return
	}
	if len(open) > 0 {
		lines = append(lines, a.openValues(c, open, allowed, some)...)
		needed = true
	}
	if needed {
		key := "values:"
		if !some {
			key = "# values:"
		}
		c.extras = append(append(c.extras, key), lines...)
	}
}

// keepOthers is for fields that take any text: what is not known is kept as it stands.
func (a *analysis) keepOthers(c *column, lines []string, open []*value, allowed string) {
	rows := 0
	for _, v := range open {
		rows += v.rows
	}
	c.notes = append(c.notes, fmt.Sprintf("texts in %s are none of the words that rules look for (%s) and are kept as they stand", rowCount(rows), allowed))
	if len(lines) > 0 {
		c.extras = append(append(append(c.extras, "values:"), lines...), "others: keep")
	}
}

// openValues writes the values that somebody must explain, as comments.
func (a *analysis) openValues(c *column, open []*value, allowed string, some bool) []string {
	n := a.ask("What do the cells of %s mean that values of %s leaves open? Each is one of: %s", c.shown(), c.field, allowed)
	lines := make([]string, 0, len(open))
	sign := "#   "
	if some {
		sign = "  # "
	}
	for _, v := range open {
		if !mayShow(v) {
			lines = append(lines, sign+fmt.Sprintf("(the cell of row %d): ASK # %s, question %d", v.first, rowCount(v.rows), n))
			continue
		}
		lines = append(lines, sign+fmt.Sprintf("%s: ASK # %s, question %d", quote(v.text), rowCount(v.rows), n))
	}
	return lines
}

// mayShow says whether a value of a closed set may be repeated: a code or word, or several words that stand in
// several rows, but no id, date or name.
func mayShow(v *value) bool {
	digits := 0
	for _, r := range v.text {
		if '0' <= r && r <= '9' {
			digits++
		}
	}
	n := len(strings.Fields(v.text))
	return len(v.text) <= maxValue && digits <= 3 && !strings.Contains(v.text, "@") && n <= 4 && (n == 1 || v.rows > 1)
}

func rowCount(n int) string { return several(n, "row") }

// several writes a number with its word.
func several(n int, word string) string {
	if n == 1 {
		return "1 " + word
	}
	return fmt.Sprintf("%d %ss", n, word)
}
