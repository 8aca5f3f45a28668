package acoustics

import (
	"fmt"
	"math"
	"strconv"
)

// working keeps the steps of a result as numbers, so that text is made only when somebody reads it. It
// holds at most eight steps; a further one takes the place of the last.
type working struct {
	steps [8]step
	count int
}

// step is a text with a %s for each of its numbers.
type step struct {
	format string
	n      [6]float64
	count  int
}

// and gives the working with one more step.
func (w working) and(format string, numbers ...float64) working {
	s := step{format: format, count: len(numbers)}
	copy(s.n[:], numbers)
	w.count = min(w.count+1, len(w.steps))
	w.steps[w.count-1] = s
	return w
}

func (w working) lines() []string {
	lines := make([]string, w.count)
	for i, s := range w.steps[:w.count] {
		texts := make([]any, s.count)
		for j := range texts {
			texts[j] = number(s.n[j])
		}
		lines[i] = fmt.Sprintf(s.format, texts...)
	}
	return lines
}

// number prints a number with up to four decimals and no trailing zeros.
func number(x float64) string {
	return strconv.FormatFloat(math.Round(x*1e4)/1e4+0, 'f', -1, 64)
}
