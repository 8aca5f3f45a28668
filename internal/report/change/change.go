// Package change writes the comparison of two reports: as text, as JSON, and as one HTML file that needs nothing else.
package change

import (
	"bytes"
	_ "embed"
	"encoding/json"
	"fmt"
	"html/template"
	"io"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/html"
	"hearduty/internal/report/text"
)

// Names lists the forms, the default first.
var Names = []string{"text", "json", "html"}

// Write writes a comparison in the form of that name. The style matters only to text.
func Write(w io.Writer, c *finding.Comparison, name string, style text.Format) error {
	switch name {
	case "text":
		return text.Comparison(w, c, style)
	case "json":
		return writeJSON(w, c)
	case "html":
		return writeHTML(w, c)
	}
	return fmt.Errorf("there is no form %q of a comparison", name)
}

func writeJSON(w io.Writer, c *finding.Comparison) error {
	e := json.NewEncoder(w)
	e.SetEscapeHTML(false)
	e.SetIndent("", "  ")
	return e.Encode(c)
}

var (
	//go:embed page.html
	pageText string

	pages = template.Must(template.New("page").Funcs(template.FuncMap{"mark": html.Mark, "turn": text.Turn, "total": total}).Parse(pageText))
)

func total(numbers map[finding.Status]int) (n int) {
	for _, of := range numbers {
		n += of
	}
	return n
}

// page is what the template shows.
type page struct {
	C        *finding.Comparison
	Style    template.CSS
	Kinds    []kind
	Statuses []finding.Status
}

// kind is the changes of one kind, and whether only their numbers matter at first.
type kind struct {
	Name, Title, Meaning string
	Quiet                bool
	Changes              []finding.Change
}

func writeHTML(w io.Writer, c *finding.Comparison) error {
	v := page{C: c, Style: html.Style(), Statuses: finding.Statuses}
	for _, k := range finding.ChangeKinds {
		one := kind{Name: string(k), Title: strings.ToUpper(k.Words()[:1]) + k.Words()[1:], Meaning: k.Meaning(), Quiet: k == finding.StillOpen || k == finding.StillAccepted}
		for _, x := range c.Changes {
			if x.Kind == k {
				one.Changes = append(one.Changes, x)
			}
		}
		v.Kinds = append(v.Kinds, one)
	}
	var b bytes.Buffer
	if err := pages.Execute(&b, v); err != nil {
		return fmt.Errorf("the page cannot be written: %w", err)
	}
	_, err := w.Write(b.Bytes())
	return err
}
