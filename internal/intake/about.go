package intake

import (
	"fmt"
	"strconv"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
)

// about tells what somebody should know of a file that was read.
func (in *intake) about(input *Input, a grid.About) {
	at := diag.Position{File: input.File, Sheet: input.Sheet}
	if a.HiddenSheet {
		in.remarks.list.Warnf(at, "Check that it is the sheet that is meant", "the sheet %s of the workbook is hidden; it was read", a.Sheet)
	}
	if len(a.HiddenCols) > 0 {
		columns := make([]string, len(a.HiddenCols))
		for i, c := range a.HiddenCols {
			columns[i] = strconv.Itoa(c)
		}
		in.remarks.list.Warnf(at, "Check that they are meant to be read", "the workbook hides %s %s; what stands there was read", plural(len(columns), "the column", "the columns"), strings.Join(columns, ", "))
	}
	if a.UTF8 > 0 {
		at.Line = a.UTF8
		in.remarks.list.Warnf(at, "Export the file again in one encoding, or check the letters beyond a to z", "the line holds UTF-8 text, but the file was read in %s, so letters may be wrong", a.Encoding)
	}
	if a.Replaced > 0 {
		at.Line = a.FirstReplace
		in.remarks.list.Warnf(at, "Check whether the file is in that encoding, and state another if it is not",
			"%s not known in %s; this is the first line with one", fmt.Sprintf("%d %s", a.Replaced, plural(a.Replaced, "byte is", "bytes are")), a.Encoding)
	}
}

func plural(n int, one, many string) string {
	if n == 1 {
		return one
	}
	return many
}
