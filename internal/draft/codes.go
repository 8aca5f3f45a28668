package draft

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/grid"
)

// codes are the entries among thresholds that are no plain levels.
type codes struct {
	levels     int
	noResponse map[string]*value
	notTested  map[string]*value
	numbers    map[string]*value // numbers that can be no level and whose meaning is not known
	marks      map[string]*value // signs beside the highest level presented
	masked     map[string]*value // signs around a masked threshold
	open       map[string]*value // signs that may mean masked or something else
	strange    []int             // rows with anything else
	strangers  int
}

// The range of a hearing threshold level, dB HL, as audiometry.ParseThreshold has it.
const (
	lowestLevel  = -20
	highestLevel = 130
)

// readCodes looks at all thresholds of the sample.
func (a *analysis) readCodes() *codes {
	k := &codes{
		noResponse: map[string]*value{}, notTested: map[string]*value{}, numbers: map[string]*value{},
		marks: map[string]*value{}, masked: map[string]*value{}, open: map[string]*value{},
	}
	if a.kind != "audiogram" {
		return k
	}
	for _, r := range a.data {
		for _, c := range a.columns {
			if c == a.level || c.tone != nil && (c.field != "") {
				k.add(cell(r, c.index-1), r.Line)
			}
		}
	}
	return k
}

func (k *codes) add(c grid.Cell, line int) {
	text := strings.TrimSpace(c.Text)
	key := plain(text)
	n, isNumber := readNumber(c)
	switch {
	case text == "":
	case isNumber && n.value >= lowestLevel && n.value <= highestLevel:
		k.levels++
	case known.codes["no_response"][key], isNumber && n.value == 666:
		count(k.noResponse, key, text, line)
	case known.codes["not_tested"][key], isNumber && n.value == 888, known.codes["blank"][key] && !hasLetter(key):
		count(k.notTested, key, text, line)
	case isNumber && looksLikeCode(n.value):
		count(k.numbers, key, text, line)
	case isNumber: // a slipped digit or an id, which is not repeated
		k.strangers++
		k.strange = keep(k.strange, line)
	case known.codes["blank"][key]: // the column's blank lists it
	default:
		k.sign(text, line)
	}
}

// looksLikeCode says whether a number that can be no level is one that commonly stands for something else (common
// practice, no source).
func looksLikeCode(v float64) bool {
	switch v {
	case -99, -999, -9999, 222, 333, 444, 555, 777, 997, 998, 999, 9999:
		return true
	}
	return false
}

// sign reads a level with signs around it.
func (k *codes) sign(text string, line int) {
	digits := strings.IndexAny(text, "0123456789")
	if digits >= 0 && signsForm.MatchString(text) {
		begin, end := strings.TrimSpace(strings.TrimRight(text[:digits], "-−+ ")), strings.TrimSpace(text[lastDigit(text)+1:])
		switch {
		case (begin == ">" || begin == "≥") && end == "":
			count(k.marks, begin, begin, line)
			return
		case begin == "" && (end == "+" || end == "↓" || end == ">"):
			count(k.marks, end, end, line)
			return
		case begin == "[" && end == "]":
			count(k.masked, "[]", "[]", line)
			return
		case begin == "" && strings.EqualFold(end, "m"):
			count(k.masked, "m", "m", line)
			return
		case begin == "(" && end == ")":
			count(k.open, "()", "()", line)
			return
		case begin == "" && end == "*":
			count(k.open, "*", "*", line)
			return
		case begin == "" && strings.EqualFold(end, "db"):
			k.levels++
			return
		}
	}
	if audiometricEntry(text) {
		k.levels++
		return
	}
	k.strangers++
	k.strange = keep(k.strange, line)
}

func lastDigit(text string) int { return strings.LastIndexAny(text, "0123456789") }

// audiometricEntry says whether the entry is NR>100 and needs no code.
func audiometricEntry(text string) bool {
	rest, ok := strings.CutPrefix(strings.ToUpper(text), "NR>")
	return ok && onlyDigits(rest)
}

// explainCodes writes the section thresholds.
func (a *analysis) explainCodes(k *codes) []string {
	var lines, inner []string
	if len(k.noResponse) > 0 {
		inner = append(inner, fmt.Sprintf("  words: [%s] # likely: %s", quoted(k.noResponse), counted(k.noResponse)))
	}
	var numbers int
	if len(k.numbers) > 0 {
		numbers = a.ask("What do %s mean among the thresholds (%s)? They can be no levels: no response, or not tested", shownCodes(k.numbers), counted(k.numbers))
		inner = append(inner, fmt.Sprintf("  # words: [%s] # question %d: either here or under not_tested", quoted(k.numbers), numbers))
	}
	if len(k.marks) > 0 {
		inner = append(inner, fmt.Sprintf("  marks: [%s] # likely: beside the highest level presented; %s", quoted(k.marks), counted(k.marks)))
	}
	if len(k.noResponse) > 0 || len(k.numbers) > 0 {
		n := a.ask("What is the highest level presented by the audiometer, dB HL, where a cell only says no response? Give limit, or limits by frequency")
		inner = append(inner, fmt.Sprintf("  # limit: ASK # question %d: dB HL", n))
	}
	if len(inner) > 0 {
		lines = append(lines, sectionOf("no_response:", inner)...)
	}
	if len(k.notTested) > 0 {
		lines = append(lines, fmt.Sprintf("not_tested: [%s] # likely: %s", quoted(k.notTested), counted(k.notTested)))
	}
	if len(k.numbers) > 0 {
		lines = append(lines, fmt.Sprintf("# not_tested: [%s] # question %d", quoted(merged(k.notTested, k.numbers)), numbers))
	}
	if len(k.masked) > 0 {
		lines = append(lines, fmt.Sprintf("masked: [%s] # likely: %s", quoted(k.masked), counted(k.masked)))
	}
	if len(k.open) > 0 {
		n := a.ask("Do the signs %s around thresholds mean that the other ear was masked (%s)?", shownCodes(k.open), counted(k.open))
		lines = append(lines, fmt.Sprintf("# masked: [%s] # question %d", quoted(merged(k.masked, k.open)), n))
	}
	if k.strangers > 0 {
		a.ask("What do cells among the thresholds mean that are neither levels nor codes that are known? There are %d (%s); they will be rejected as they stand", k.strangers, rowList(k.strange))
	}
	return lines
}

func merged(x, y map[string]*value) map[string]*value {
	out := map[string]*value{}
	for _, m := range []map[string]*value{x, y} {
		for k, v := range m {
			out[k] = v
		}
	}
	return out
}

// quoted lists codes for YAML.
func quoted(m map[string]*value) string {
	var out []string
	for _, v := range sorted(m) {
		out = append(out, quote(v.text))
	}
	slices.Sort(out)
	return strings.Join(out, ", ")
}

func shownCodes(m map[string]*value) string {
	var out []string
	for _, v := range sorted(m) {
		out = append(out, clean(v.text))
	}
	slices.Sort(out)
	return strings.Join(out, ", ")
}

// counted says how many cells hold each code.
func counted(m map[string]*value) string {
	var out []string
	for _, v := range sorted(m) {
		out = append(out, clean(v.text)+" in "+several(v.rows, "cell"))
	}
	return strings.Join(out, ", ")
}
