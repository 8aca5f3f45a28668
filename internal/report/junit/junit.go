// Package junit writes a report as JUnit-style XML, for pipelines that show and count tests.
//
// A suite is a site under a bundle, a case is a listed finding; one further suite has a case for each file
// that was read. What a pipeline shows follows what --fail-on means when it is left out (gap and unproven):
//
//	gap               failure
//	unproven          error: it could not be decided
//	opinion, due      skipped: nobody has decided yet, or there is still time
//	accepted          skipped, whatever the status
//	late, lifted, met passed; the output of the case tells what was found
//
// So a case that passed is never a duty that is not fulfilled. Findings that are counted and not listed stand
// as numbers in the properties of the suite. There are no times: the same input gives the same file. Cases have
// no properties and the root has no number of skipped cases, since strict readers refuse both.
package junit

import (
	"bufio"
	"encoding/xml"
	"io"
	"strconv"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// Format writes JUnit-style XML.
type Format struct{}

// Name gives the name of the form.
func (Format) Name() string { return "junit" }

// Write writes the report. The cases are written one by one, so that a large report needs little memory.
func (Format) Write(w io.Writer, r *finding.Report) error {
	suites := suitesOf(r)
	var all tally
	for _, s := range suites {
		all.add(s.tally)
	}
	out := bufio.NewWriter(w)
	out.WriteString(xml.Header)
	e := xml.NewEncoder(out)
	e.Indent("", "  ")
	root := start("testsuites", append([]xml.Attr{attr("name", phrase.Clean(r.Program))}, all.attrs()...))
	if err := e.EncodeToken(root); err != nil {
		return err
	}
	titles := phrase.TitlesOf(r)
	for _, s := range suites {
		if err := s.write(e, titles); err != nil {
			return err
		}
	}
	if err := e.EncodeToken(root.End()); err != nil {
		return err
	}
	if err := e.Flush(); err != nil {
		return err
	}
	out.WriteString("\n")
	return out.Flush()
}

// tally counts cases.
type tally struct{ tests, failures, errors, skipped int }

func (t *tally) add(o tally) {
	t.tests, t.failures, t.errors, t.skipped = t.tests+o.tests, t.failures+o.failures, t.errors+o.errors, t.skipped+o.skipped
}

// count counts one case by what became of it.
func (t *tally) count(v verdict) {
	t.tests++
	switch v {
	case failed:
		t.failures++
	case broken:
		t.errors++
	case skipped:
		t.skipped++
	}
}

// attrs gives the numbers that suites and the root of a file have.
func (t *tally) attrs() []xml.Attr {
	return []xml.Attr{
		attr("tests", strconv.Itoa(t.tests)), attr("failures", strconv.Itoa(t.failures)), attr("errors", strconv.Itoa(t.errors)),
	}
}

func attr(name, value string) xml.Attr { return xml.Attr{Name: xml.Name{Local: name}, Value: value} }

func start(name string, attrs []xml.Attr) xml.StartElement {
	return xml.StartElement{Name: xml.Name{Local: name}, Attr: attrs}
}
