package intake

import (
	"errors"
	"io/fs"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// openRows gives the rows of a canonical file, in the format that its bytes or its name tell. The options name the
// sheet of a workbook, and the encoding of text that is neither UTF-8 nor UTF-16. The error is a *refusal or a
// *grid.Fault if a sentence can say what to do.
func openRows(f *grid.File, o grid.Options, t *record.Table) (rowReader, error) {
	switch f.Format {
	case grid.Workbook, grid.YAML:
		return newTableReader(f, o, t)
	case grid.JSON:
		return newArrayReader(f, o.Encoding, t)
	case grid.Lines:
		return newLinesReader(f, o.Encoding, t)
	}
	return newCSVReader(f, o.Encoding, t)
}

func cannotRead(err error) *refusal {
	var e *fs.PathError
	if errors.As(err, &e) {
		err = e.Err
	}
	return &refusal{problem: "the record file cannot be read: " + err.Error(), remedy: "Check the file and its permissions"}
}
