// Package switchover writes what changes where other bundles judge the same records: as text, as JSON, and
// as one HTML file that needs nothing else.
package switchover

import (
	"encoding/json"
	"fmt"
	"io"

	"hearduty/internal/finding"
	"hearduty/internal/report/text"
)

// Names lists the forms, the default first.
var Names = []string{"text", "json", "html"}

// Write writes a switch in the form of that name. The style matters only to text.
func Write(w io.Writer, s *finding.Switch, name string, style text.Format) error {
	switch name {
	case "text":
		return text.Switch(w, s, style)
	case "json":
		e := json.NewEncoder(w)
		e.SetEscapeHTML(false)
		e.SetIndent("", "  ")
		return e.Encode(s)
	case "html":
		return writeHTML(w, s)
	}
	return fmt.Errorf("there is no form %q of a switch", name)
}
