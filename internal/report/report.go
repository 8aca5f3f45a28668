// Package report writes the result of a check in the form that a reader wants. Each form has a package
// of its own; all are written from the same neutral report and from nothing else.
package report

import (
	"io"

	"hearduty/internal/finding"
	"hearduty/internal/report/csv"
	"hearduty/internal/report/html"
	"hearduty/internal/report/ics"
	"hearduty/internal/report/json"
	"hearduty/internal/report/junit"
	"hearduty/internal/report/ndjson"
	"hearduty/internal/report/sarif"
	"hearduty/internal/report/text"
	"hearduty/internal/report/xlsx"
)

// Format is one form of a report.
type Format interface {
	// Name is what the user calls the form, such as text.
	Name() string
	// Write writes the report.
	Write(w io.Writer, r *finding.Report) error
}

// Options say how to write for people. They do not matter to forms for machines.
type Options struct {
	Width  int  // columns of a line; 0 for 80
	Colour bool // whether headings may have colour, which never says anything that the words do not
}

// Formats lists all forms, the default first.
func Formats(o Options) []Format {
	return []Format{text.Format{Width: o.Width, Colour: o.Colour}, json.Format{}, html.Format{}, xlsx.Format{},
		csv.Format{}, sarif.Format{}, junit.Format{}, ics.Format{}, ndjson.Format{}}
}

// Named gives a form by its name. It returns false if there is no such form.
func Named(name string, o Options) (Format, bool) {
	for _, f := range Formats(o) {
		if f.Name() == name {
			return f, true
		}
	}
	return nil, false
}

// Names lists the names of all forms, the default first.
func Names() []string {
	var names []string
	for _, f := range Formats(Options{}) {
		names = append(names, f.Name())
	}
	return names
}

// Draws says whether a form draws subjects, and so needs their portraits.
func Draws(f Format) bool {
	_, ok := f.(html.Format)
	return ok
}

// Part is one file of a report that is too large for one.
type Part = html.Part

// Split gives the parts of a report that is too large for one file of the form, one a site, and nothing otherwise.
func Split(f Format, r *finding.Report) []Part {
	if page, ok := f.(html.Format); ok {
		return page.Split(r)
	}
	return nil
}

// Binary says whether a form is no text, so that a terminal should not be given it.
func Binary(f Format) bool {
	_, ok := f.(xlsx.Format)
	return ok
}
