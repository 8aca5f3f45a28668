// Package schemas holds the published JSON Schemas (2020-12) of everything that hearduty reads and
// writes. They are generated from the Go types.
package schemas

import (
	"embed"
	"fmt"
	"io/fs"
	"strings"
)

//go:generate go run hearduty/internal/catalogue/generate

//go:embed *.schema.json
var files embed.FS

const ending = ".schema.json"

// Names lists the schemas in order.
func Names() []string {
	entries, _ := fs.Glob(files, "*"+ending)
	for i := range entries {
		entries[i] = strings.TrimSuffix(entries[i], ending)
	}
	return entries
}

// Text gives a schema by its name, such as audiogram or report.
func Text(name string) ([]byte, error) {
	content, err := files.ReadFile(name + ending)
	if err != nil {
		return nil, fmt.Errorf("there is no schema %q", name)
	}
	return content, nil
}
