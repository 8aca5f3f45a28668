package draft

import (
	"fmt"
	"slices"
)

// findTones reads the names of columns as ear and frequency, as far as they all fit together.
func (a *analysis) findTones() {
	letters := map[string]bool{}
	for _, c := range a.columns {
		if t, ok := parseTone(c.name); ok {
			c.tone = &t
		}
	}
	a.dropLonely()
	for _, c := range a.columns {
		if c.tone != nil && earLetters[c.tone.ear] {
			letters[c.tone.ear] = true
		}
	}
	if len(letters) > 0 {
		a.settleEars(letters)
	}
	a.findParts()
	a.numberReadings()
}

// settleEars puts right and left in place of single letters, or gives these columns up.
func (a *analysis) settleEars(letters map[string]bool) {
	meaning := settleLetters(letters)
	for _, c := range a.columns {
		if c.tone == nil || !earLetters[c.tone.ear] {
			continue
		}
		if meaning != nil {
			c.tone.ear = meaning[c.tone.ear]
			continue
		}
		n := a.ask("Which ears do the letters in columns such as %s mean? Write right.%d or left.%d for each", c.shown(), c.tone.hz, c.tone.hz)
		c.notes = append(c.notes, fmt.Sprintf("question %d", n))
		c.tone = nil
	}
}

// minTones is the number of frequencies from which on bare numbers are taken for frequencies.
const minTones = 3

// dropLonely gives up what is taken for kHz, or has no ear, if too few columns are alike.
func (a *analysis) dropLonely() {
	kilo, bare := map[string]int{}, 0
	for _, c := range a.columns {
		if c.tone == nil {
			continue
		}
		if c.tone.kilo {
			kilo[c.tone.ear]++
		}
		if c.tone.ear == "" {
			bare++
		}
	}
	for _, c := range a.columns {
		t := c.tone
		if t != nil && (t.kilo && kilo[t.ear] < minTones || t.ear == "" && bare < minTones) {
			c.tone = nil
		}
	}
}

// findParts finds out whether a row holds several tests, such as baseline and current.
func (a *analysis) findParts() {
	n := map[string]int{}
	for _, c := range a.columns {
		if c.tone != nil {
			n[c.tone.part]++
		}
	}
	for _, part := range []string{"baseline", "previous", "current"} {
		if n[part] > 0 {
			a.parts = append(a.parts, part)
		}
	}
	if len(a.parts) == 1 && n[""] == 0 {
		a.parts = nil // one test, whatever its columns are called
	}
	if len(a.parts) == 0 {
		return
	}
	if n[""] > 0 && !slices.Contains(a.parts, "current") {
		a.parts = append(a.parts, "current")
		for _, c := range a.columns {
			if c.tone != nil && c.tone.part == "" {
				c.tone.part = "current"
			}
		}
	}
	for _, c := range a.columns {
		if c.tone != nil {
			c.part = c.tone.part
			continue
		}
		part, rest := splitPart(c.name)
		if slices.Contains(a.parts, part) {
			c.part, c.rest = part, rest
		}
	}
}

// numberReadings numbers two readings at 1000 Hz where one of the names does not.
func (a *analysis) numberReadings() {
	seen := map[string]int{}
	for _, c := range a.columns {
		t := c.tone
		if t == nil || t.bone {
			continue
		}
		key := fmt.Sprint(t.part, t.ear, t.hz)
		seen[key]++
		if t.reading == 0 && seen[key] == 2 && t.hz == 1000 {
			t.reading = 2
		}
	}
}

// toneField gives the field of a column of thresholds, or an empty text and why there is none.
func (t *tone) field(ear string) (field, why string) {
	switch {
	case t.bone:
		return "", "bone conduction, which no record holds"
	case !t.kept():
		return "", fmt.Sprintf("%d Hz, which no record holds", t.hz)
	case t.reading == 2 && t.hz == 1000:
		return ear + ".repeat_1000", ""
	case t.reading == 2:
		return "", "a second reading; records hold one at 1000 Hz only"
	}
	return fmt.Sprintf("%s.%d", ear, t.hz), ""
}

// tones counts the columns of thresholds with an ear, and those without.
func (a *analysis) tones() (eared, bare int) {
	for _, c := range a.columns {
		switch {
		case c.tone == nil || c.tone.bone:
		case c.tone.ear == "":
			bare++
		default:
			eared++
		}
	}
	return eared, bare
}
