package draft

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// assign proposes a field for each column.
func (a *analysis) assign() {
	for _, c := range a.columns {
		switch {
		case c == a.ear || c == a.frequency || c == a.level:
		case c.tone != nil:
			a.assignTone(c)
		case c.name == "" && a.empty(c):
		case c.name == "":
			c.why = "no name is known for it"
		default:
			a.assignNamed(c)
		}
	}
	a.settleClaims()
}

// empty says whether a column holds nothing, and then ignores it.
func (a *analysis) empty(c *column) bool {
	if c.p.filled == 0 && c.p.broken+c.p.uncomputed == 0 {
		c.ignore = "empty"
		return true
	}
	return false
}

func (a *analysis) assignTone(c *column) {
	ear := c.tone.ear
	switch {
	case a.kind == "calibration" && ear == "":
		c.field, c.sure, c.why = fmt.Sprintf("deviation.%d", c.tone.hz), likely, "its name is a frequency"
	case a.kind == "room_survey" && ear == "":
		c.field, c.sure, c.why = fmt.Sprintf("band.%d", c.tone.hz), likely, "its name is an octave band"
	case a.kind == "measurement" && ear == "":
		c.field, c.sure, c.why = fmt.Sprintf("octave.%d", c.tone.hz), likely, "its name is an octave band"
	case a.kind != "audiogram":
		c.why = "its name is that of a threshold, which this kind of record does not hold"
		return
	case a.frequency != nil, ear != "" && a.ear != nil:
		c.why = "its name is that of a threshold, but other columns tell the ear of a row"
		return
	case ear == "" && a.ear == nil:
		n := a.ask("Which ear have the thresholds in columns such as %s? Write right.%d or left.%d for each", c.shown(), c.tone.hz, c.tone.hz)
		c.why = fmt.Sprintf("question %d: which ear", n)
		return
	default:
		if ear == "" {
			ear = "ear"
		}
		c.field, c.ignore = c.tone.field(ear)
		c.sure, c.why = certain, "its name tells ear and frequency"
		if ear == "ear" {
			c.why = "its name is a frequency"
		}
		if c.tone.kilo {
			c.sure, c.why = likely, "its name tells ear and frequency, if that is in kHz"
		}
	}
	if c.field != "" && !strings.HasPrefix(c.field, "ear.") && a.table.Index(c.field) < 0 {
		c.field, c.ignore = "", fmt.Sprintf("%d Hz, which no record holds", c.tone.hz)
	}
}

func (a *analysis) assignNamed(c *column) {
	found, exact := known.fields(c.rest)
	if field := a.fieldOf(found); field != "" {
		c.field, c.sure = field, certain
		c.why = "a known name of it"
		if !exact {
			c.why = "a known name of it with a unit"
		}
		a.checkNames(c)
		a.checkType(c)
		return
	}
	if field := a.statedShift(c); field != "" {
		c.field, c.sure, c.why = field, likely, "what the export itself calls a shift; never used for a verdict"
		if len(a.parts) > 0 {
			c.part = a.parts[len(a.parts)-1]
		}
		return
	}
	if why := known.why(c.rest); why != "" {
		c.ignore = string(why)
		return
	}
	if kind := otherKind(found); kind != "" {
		c.ignore = fmt.Sprintf("of records of kind %s; a map of its own can read it", kind)
		return
	}
	if a.empty(c) {
		return
	}
	if aboutPerson(c) {
		c.ignore = string(personal)
		return
	}
	a.assignNear(c)
}

// fieldOf picks the field of this kind of record: one that only this kind has before one of any kind.
func (a *analysis) fieldOf(found []target) string {
	if a.table == nil {
		return ""
	}
	for _, want := range []record.Kind{a.kind, ""} {
		for _, t := range found {
			if t.kind == want && a.table.Index(t.field) >= 0 {
				return t.field
			}
		}
	}
	return ""
}

// otherKind gives a kind of which the name is known, if it is of one only.
func otherKind(found []target) record.Kind {
	for _, t := range found {
		if t.kind != "" && !slices.Contains([]string{"ear", "frequency", "threshold"}, t.field) {
			return t.kind
		}
	}
	return ""
}

// assignNear proposes a field whose names are spelled like the column, as a comment.
func (a *analysis) assignNear(c *column) {
	c.why = "nothing is known of it"
	key := compact(withoutUnit(c.rest))
	if len([]rune(key)) < 6 {
		return
	}
	near := diag.Near(key, alike(key))
	if near == "" || distant(key, near) {
		return
	}
	if field := a.fieldOf(known.names[near]); field != "" && a.of(field) == nil {
		c.field, c.sure, c.off = field, unsure, true
		c.why = fmt.Sprintf("its name is spelled like %q", near)
		n := a.ask("Is %s the field %s? Its name is only spelled like one that is known", c.shown(), field)
		c.notes = append(c.notes, fmt.Sprintf("question %d", n))
		a.checkNames(c)
	}
}

// distant says whether two names share too few letters in their places to be one with a slip.
func distant(a, b string) bool {
	x, y := []rune(a), []rune(b)
	front, back := 0, 0
	for front < min(len(x), len(y)) && x[front] == y[front] {
		front++
	}
	for back < min(len(x), len(y))-front && x[len(x)-1-back] == y[len(y)-1-back] {
		back++
	}
	return max(len(x), len(y))-front-back > 2
}

// alike gives the known names that begin like a name and are about as long.
func alike(key string) []string {
	var out []string
	for _, name := range known.near {
		if name[0] == key[0] && len(name) <= len(key)+2 && len(key) <= len(name)+2 {
			out = append(out, name)
		}
	}
	return out
}

// statedShift finds columns in which the export says yes or no to a shift of one ear.
func (a *analysis) statedShift(c *column) string {
	if a.kind != "audiogram" || known.why(c.rest) != derived || c.p.filled == 0 || c.p.many {
		return ""
	}
	ear, shift := "", false
	for _, w := range tokens(c.rest) {
		switch {
		case w.text == "sts" || w.text == "shift":
			shift = true
		case w.text == "r" || w.text == "right":
			ear = "right"
		case w.text == "l" || w.text == "left":
			ear = "left"
		}
	}
	field := ear + ".stated_shift"
	if !shift || ear == "" || a.table.Index(field) < 0 {
		return ""
	}
	for key := range c.p.values {
		if meaning, _ := answerWord(key, c.p); meaning == "" {
			return ""
		}
	}
	return field
}
