package xlsx

import (
	"strings"

	"github.com/xuri/excelize/v2"
)

const (
	lineHeight = 13 // of a line of text, in points
	onPaper    = 24 // lines that a row has at most for the columns that are printed
	onScreen   = 6  // and for those that are not, beside printed ones
	inAll      = 14 // and in tables that are printed whole
)

// heightOf gives the height of a row that shows its text. Not every program fits rows to their text when it
// opens a file, so the lines are guessed. A very long text is shown in part; its cell holds all of it.
func heightOf(cells []any, widths []float64, printed int) float64 {
	lines := 1
	for i, c := range cells {
		text, ok := c.(excelize.Cell).Value.(string)
		if !ok {
			continue
		}
		most := inAll
		switch {
		case printed > 0 && i < printed:
			most = onPaper
		case printed > 0:
			most = onScreen
		}
		lines = max(lines, min(linesOf(text, widths[i]), most))
	}
	return float64(lines*lineHeight) + 2
}

// linesOf guesses how many lines a text takes in a column that is so many digits wide.
func linesOf(text string, width float64) int {
	width = max(width-1, 1)
	n := 0
	for line := range strings.SplitSeq(text, "\n") {
		n++
		at := 0.0
		for word := range strings.SplitAfterSeq(line, " ") {
			w := widthOf(word)
			if at > 0 && at+w-blankWidth > width {
				n, at = n+1, 0
			}
			for w > width+blankWidth {
				n, w = n+1, w-width
			}
			at += w
		}
	}
	return n
}

const blankWidth = 0.5

// widthOf guesses how wide a text is, in digits of a sans serif letter.
func widthOf(text string) float64 {
	w := 0.0
	for _, c := range text {
		switch {
		case c >= 0x1100:
			w += 2
		case strings.ContainsRune(" iljtfr.,:;'|()[]/-", c):
			w += blankWidth
		case c == 'm' || c == 'w' || c >= 'A' && c <= 'Z':
			w += 1.35
		default:
			w += 0.95
		}
	}
	return w
}
