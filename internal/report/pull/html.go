package pull

import (
	"bytes"
	_ "embed"
	"fmt"
	"html/template"
	"io"

	"hearduty/internal/judge"
	"hearduty/internal/report/phrase"
)

var (
	//go:embed sheet.html
	sheetText string
	//go:embed sheet.css
	sheetStyle string

	sheets = template.Must(template.New("sheet").Funcs(template.FuncMap{
		"band":  func(b judge.Band) string { return bandWords[b] },
		"clean": phrase.Clean,
		"place": func(f File) string { return phrase.Place(f.Record.File, f.Record.Sheet, f.Record.Row) },
	}).Parse(sheetText))
)

// page is what the template reads.
type page struct {
	*Sheet
	Style                     template.CSS
	Topics                    []topic
	Count, From, Promise, Say string
	Cautions                  []string
}

// writeHTML writes the sheet as a page that needs nothing else, to be printed and ticked.
func writeHTML(w io.Writer, s *Sheet, _ int) error {
	var b bytes.Buffer
	err := sheets.Execute(&b, page{
		Sheet: s, Style: template.CSS(sheetStyle), Topics: topics, Count: files(len(s.Files)), From: s.population(),
		Promise: s.promise(), Say: s.seed(), Cautions: s.cautions(),
	})
	if err != nil {
		return fmt.Errorf("the page cannot be written: %w", err)
	}
	_, err = w.Write(b.Bytes())
	return err
}
