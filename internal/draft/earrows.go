package draft

import (
	"fmt"
	"slices"
)

// findRowsOfEars looks for the columns that tell the ear and the frequency of a row.
func (a *analysis) findRowsOfEars() {
	eared, bare := a.tones()
	if eared >= 2 || len(a.parts) > 0 {
		return
	}
	ear := a.pick("ear", func(c *column) bool { return a.tellsEar(c) })
	if ear == nil {
		return
	}
	if bare >= minTones {
		a.ear = ear
		return
	}
	frequency := a.pick("frequency", func(c *column) bool { return c.p.most(c.p.tones) })
	level := a.pick("threshold", func(c *column) bool { return c != frequency })
	if frequency != nil && level != nil {
		a.ear, a.frequency, a.level = ear, frequency, level
	}
}

// pick gives the first column whose name stands for the pseudo-field and that fits.
func (a *analysis) pick(pseudo string, fits func(*column) bool) *column {
	for _, c := range a.columns {
		found, _ := known.fields(c.name)
		if c.name != "" && slices.Contains(found, target{"audiogram", pseudo}) && fits(c) {
			return c
		}
	}
	return nil
}

// tellsEar reads the words for left and right in a column.
func (a *analysis) tellsEar(c *column) bool {
	if c.p.many || c.p.filled == 0 {
		return false
	}
	letters, read := map[string]bool{}, [2][]string{}
	for _, v := range sorted(c.p.values) {
		word := compact(v.text)
		switch {
		case earLetters[word]:
			letters[word] = true
		case known.words["ear"][word] == "left":
			read[0] = append(read[0], v.text)
		case known.words["ear"][word] == "right":
			read[1] = append(read[1], v.text)
		default:
			return false
		}
	}
	if len(letters) > 0 {
		meaning := settleLetters(letters)
		if meaning == nil {
			return false
		}
		for _, v := range sorted(c.p.values) {
			switch meaning[compact(v.text)] {
			case "left":
				read[0] = append(read[0], v.text)
			case "right":
				read[1] = append(read[1], v.text)
			}
		}
	}
	a.earValues = read
	return len(read[0]) > 0 && len(read[1]) > 0
}

// rowsOfEars writes how rows of one ear, or of one ear at one frequency, are read.
func (a *analysis) rowsOfEars() []string {
	if a.ear == nil {
		return nil
	}
	lines := section("ear:", []string{
		a.ear.source() + " # certain: its cells tell the ear",
		"left: [" + quoteAll(a.earValues[0]) + "]",
		"right: [" + quoteAll(a.earValues[1]) + "]",
	})
	if a.frequency == nil {
		return lines
	}
	inner := []string{"frequency:"}
	if unit := unitOfFrequency(a.frequency.p); unit != "" {
		inner = append(inner, "  "+a.frequency.source(), "  unit: "+unit+" # certain: all are test frequencies in it")
	} else {
		n := a.ask("Are the frequencies in %s in Hz or kHz? There are both small and large ones", a.frequency.shown())
		inner = append(inner, "  "+a.frequency.source(), fmt.Sprintf("  # unit: hz # question %d: or khz", n))
	}
	a.explainLevel()
	inner = append(inner, "threshold:", "  "+a.level.source())
	inner = append(inner, indent(a.level.extras, "  ")...)
	if c := a.of("masked"); c != nil && c.part == "" {
		inner = append(inner, c.lines()...)
	}
	return append(lines, section("frequency:", inner)...)
}

// explainLevel does so for the column of thresholds in rows of one frequency.
func (a *analysis) explainLevel() {
	a.level.tone = &tone{}
	a.explainBlank(a.level)
}
