// Package convert turns the cells of exports into the canonical texts that records are read from: dates,
// numbers, durations, thresholds, ids and words. It guesses nothing: what can be read in two ways is refused.
//
// A blank cell gives an empty text. Problems never repeat what the cell holds, so they can be printed where
// the cell itself must not be.
package convert

import "hearduty/internal/grid"

// Problem says why a cell cannot be converted.
type Problem struct{ Why, Remedy string } // each one sentence without its full stop

// Error gives the problem as a sentence.
func (p *Problem) Error() string { return p.Why }

func problem(why, remedy string) *Problem { return &Problem{Why: why, Remedy: remedy} }

// unusable says why a cell holds nothing to convert: errors of a workbook, and formulas that were never
// worked out. It gives nil for all others.
func unusable(c grid.Cell) *Problem {
	switch c.Kind {
	case grid.Broken:
		return problem("the cell shows an error of the workbook", "Correct the formula in the workbook, or name the error under blank in the map if nothing is known")
	case grid.Uncomputed:
		return problem("the cell is a formula whose value the workbook does not hold", "Open the workbook in a spreadsheet program, let it calculate, save it, and read it again")
	}
	return nil
}

// cell gives the text of a cell without blanks around it. It refuses kinds of cells that are neither text
// nor a number; what says in the plural what is wanted.
func cell(c grid.Cell, what string) (string, *Problem) {
	if p := unusable(c); p != nil {
		return "", p
	}
	s := plain(c.Text)
	if s == "" {
		return "", nil
	}
	switch c.Kind {
	case grid.Day:
		return "", problem("the workbook has a date here, where "+what+" are wanted", "Look up what was meant, and format the cell as text or number")
	case grid.Clock:
		return "", problem("the workbook has a time here, where "+what+" are wanted", "Look up what was meant, and format the cell as text or number")
	case grid.Bool:
		return "", problem("the cell says true or false, where "+what+" are wanted", "Check that the map names the right column")
	}
	return s, nil
}
