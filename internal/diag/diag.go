// Package diag holds what hearduty has to say about its inputs: one clear sentence with file, row and
// column, and what to do about it.
package diag

import (
	"fmt"
	"sort"
	"strings"
)

// Severity says whether the work can go on.
type Severity string

// The severities.
const (
	Error   Severity = "error"   // the input cannot be used
	Warning Severity = "warning" // the input is used, but somebody should look
)

// Position says where in an input something stands. Zero and empty parts are not known.
type Position struct {
	File   string // as the user would type it
	Sheet  string // of a workbook
	Line   int    // line of a text file or row of a sheet, from 1
	Column int    // column in characters, from 1
	Field  string // name of the column or key
}

// String writes the position as file:line:column, or file sheet!row.
func (p Position) String() string {
	s := p.File
	if p.Sheet != "" {
		s += " " + p.Sheet
		if p.Line > 0 {
			s += fmt.Sprintf("!%d", p.Line)
		}
		return s
	}
	if p.Line > 0 {
		s += fmt.Sprintf(":%d", p.Line)
		if p.Column > 0 {
			s += fmt.Sprintf(":%d", p.Column)
		}
	}
	return s
}

// Diagnostic is one thing to say about an input.
type Diagnostic struct {
	Severity Severity
	Position Position
	Problem  string // one sentence without its full stop
	Remedy   string // what to do, one sentence without its full stop
}

// String writes "position: problem. Remedy."
func (d Diagnostic) String() string {
	var b strings.Builder
	if at := d.Position.String(); at != "" {
		b.WriteString(at + ": ")
	}
	b.WriteString(d.Problem + ".")
	if d.Remedy != "" {
		b.WriteString(" " + d.Remedy + ".")
	}
	return b.String()
}

// List collects diagnostics. It is an error whose text has one line a diagnostic.
type List []Diagnostic

// Errorf adds an error.
func (l *List) Errorf(at Position, remedy, format string, args ...any) {
	*l = append(*l, Diagnostic{Error, at, fmt.Sprintf(format, args...), remedy})
}

// Warnf adds a warning.
func (l *List) Warnf(at Position, remedy, format string, args ...any) {
	*l = append(*l, Diagnostic{Warning, at, fmt.Sprintf(format, args...), remedy})
}

// Failed says whether the list holds an error.
func (l List) Failed() bool {
	for _, d := range l {
		if d.Severity == Error {
			return true
		}
	}
	return false
}

// Err gives the list as an error, or nil if it holds no error.
func (l List) Err() error {
	if l.Failed() {
		return l
	}
	return nil
}

// Error writes all diagnostics, one a line.
func (l List) Error() string {
	lines := make([]string, len(l))
	for i, d := range l {
		lines[i] = d.String()
	}
	return strings.Join(lines, "\n")
}

// Sort puts the diagnostics in order of file, sheet, line, column and text.
func (l List) Sort() {
	sort.SliceStable(l, func(i, j int) bool {
		a, b := l[i].Position, l[j].Position
		switch {
		case a.File != b.File:
			return a.File < b.File
		case a.Sheet != b.Sheet:
			return a.Sheet < b.Sheet
		case a.Line != b.Line:
			return a.Line < b.Line
		case a.Column != b.Column:
			return a.Column < b.Column
		}
		return l[i].Problem < l[j].Problem
	})
}

// Near gives the candidate that is spelled most like name, or an empty text if none is close.
func Near(name string, candidates []string) string {
	best, bestDistance := "", 1+len(name)/3
	for _, c := range candidates {
		if d := distance(strings.ToLower(name), strings.ToLower(c)); d <= bestDistance && (best == "" || d < bestDistance) {
			best, bestDistance = c, d
		}
	}
	return best
}

// distance is the number of characters to insert, delete or replace to turn a into b (Levenshtein).
func distance(a, b string) int {
	ra, rb := []rune(a), []rune(b)
	row := make([]int, len(rb)+1)
	for j := range row {
		row[j] = j
	}
	for i, x := range ra {
		diagonal := row[0]
		row[0] = i + 1
		for j, y := range rb {
			replace := diagonal
			if x != y {
				replace++
			}
			diagonal = row[j+1]
			row[j+1] = min(replace, row[j]+1, row[j+1]+1)
		}
	}
	return row[len(rb)]
}
