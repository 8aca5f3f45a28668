// Package draft proposes a map for an export that nobody has described yet.
package draft

import (
	"errors"
	"io"

	"hearduty/internal/record"
)

// Options say what is known of the export beforehand.
type Options struct {
	Kind     record.Kind // empty to find it out
	Member   string      // of a ZIP archive
	Sheet    string
	Encoding string
}

// Write reads the file at path and writes a commented map, which mapping.Load reads. Names the file as shown. The
// error is a *grid.Fault if the file cannot be read.
func Write(w io.Writer, path, shown string, o Options) error { return errors.New("not yet") }
