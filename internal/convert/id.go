package convert

import (
	"strings"

	"hearduty/internal/grid"
)

// ID reads an id. Blanks and no-break spaces around it, and full-width characters, are made plain. Then its
// letters are made upper or lower case, one of the beginnings in Strip is taken away, ids of digits only are
// filled up with zeros to the length Pad, and Prefix is put before it. Numbers of a workbook in scientific notation
// or with a fraction, such as 1.23E+05, are problems.
type ID struct {
	Pad    int
	Strip  []string
	Prefix string
	Case   string // upper, lower or empty
}

// exactDigits is how many digits a spreadsheet keeps of a number (common practice, no source: binary
// numbers of 64 bits hold any number of 15 digits).
const exactDigits = 15

// Read gives the id.
func (i *ID) Read(c grid.Cell) (string, *Problem) {
	if p := unusable(c); p != nil {
		return "", p
	}
	s := tidy(c.Text)
	if s == "" {
		return "", nil
	}
	if p := lostID(s, c.Kind); p != nil {
		return "", p
	}
	s = i.cased(s)
	if rest, ok := i.stripped(s); ok {
		if s = strings.TrimSpace(rest); s == "" {
			return "", problem("the id is nothing but a beginning that the map takes away", "Look up the id, and correct the cell or the map")
		}
	}
	if len(s) < i.Pad && onlyDigits(s) {
		s = strings.Repeat("0", i.Pad-len(s)) + s
	}
	return i.Prefix + s, nil
}

func (i *ID) cased(s string) string {
	switch i.Case {
	case "upper":
		return strings.ToUpper(s)
	case "lower":
		return strings.ToLower(s)
	}
	return s
}

// stripped takes the longest beginning away that the id has.
func (i *ID) stripped(s string) (rest string, ok bool) {
	rest = s
	for _, beginning := range i.Strip {
		r, found := strings.CutPrefix(s, i.cased(tidy(beginning)))
		if found && len(r) < len(rest) {
			rest, ok = r, true
		}
	}
	return rest, ok
}

// lostID says why a cell cannot be the id that was once written there.
func lostID(s string, kind grid.CellKind) *Problem {
	const remedy = "Take the id from where the export came from, with its column formatted as text"
	switch kind {
	case grid.Day, grid.Clock:
		return problem("a spreadsheet turned the id into a date or time", remedy)
	case grid.Bool:
		return problem("the cell says true or false, which is no id", "Check that the map names the right column")
	case grid.Number:
		digits := strings.TrimPrefix(s, "-")
		switch {
		case !onlyDigits(digits):
			return problem("the id is a number in scientific notation or with a fraction, so digits of it may be lost", remedy)
		case len(digits) > exactDigits:
			return problem("the id is a number of more than 15 digits, of which a spreadsheet does not keep all", remedy)
		}
	}
	if scientific(s) {
		return problem("a spreadsheet turned the id into a number in scientific notation, so digits of it may be lost", remedy)
	}
	return nil
}

// scientific finds texts such as 1.23E+05, which spreadsheets write. 12E5 may be an id.
func scientific(s string) bool {
	mantissa, exponent, ok := strings.Cut(strings.ToUpper(s), "E+")
	return ok && onlyDigits(exponent) && onlyDigits(strings.NewReplacer(".", "", ",", "").Replace(mantissa))
}
