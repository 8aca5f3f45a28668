// Package fhir reads HL7 FHIR R4 resources: audiograms as observations with LOINC codes, and the patients they
// are of.
//
// The file is read twice: once for an index of who the resources are and which belong together, since they may
// stand in any order, and once for the audiograms. A panel with its components is given at once; thresholds that
// stand alone are kept, packed, until the last of them was read.
package fhir

import (
	"fmt"
	"io"
	"sort"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// Open reads a Bundle, a single resource, an array of resources or NDJSON. The rows that it gives are resources:
// Line is the place in the Bundle or list, or the line of NDJSON, from 1. Several observations of one patient
// and time become one audiogram, as gathered rows do; of a faulty one, Line is the resource at fault. Patients are no
// data of their own. The error is a *grid.Fault if the file cannot be read.
func Open(r io.ReadSeeker, name string, m *mapping.Map, t *record.Table) (mapping.Source, error) {
	s := &source{file: r, table: t, loose: map[string]*group{}, headed: map[int32]*group{}, ids: map[string]int{}}
	if err := s.prepare(&m.File); err != nil {
		return nil, err
	}
	var err error
	if s.form, err = recognizeForm(r, name); err != nil {
		return nil, fileFault(err)
	}
	if err = s.survey(); err != nil {
		return nil, err
	}
	if s.items, err = openItems(r, s.form); err != nil {
		return nil, err
	}
	return s, nil
}

// source gives the audiograms of a file.
type source struct {
	file    io.ReadSeeker
	form    form
	table   *record.Table
	options mapping.FHIR
	ignored map[string]bool
	words   *convert.Words
	phrases []phrase // words of the map that may stand within notes
	dates   convert.Dates
	fixed   []mapping.Value // constants

	index   *index
	items   *items
	further bool // the file is one page of several
	loose   map[string]*group
	headed  map[int32]*group // by their heads
	ids     map[string]int   // ids made of worker and date
	queue   []mapping.Out
	ended   bool
	told    bool // that the file is one page of several
}

// prepare makes what the map says ready for use.
func (s *source) prepare(f *mapping.File) error {
	switch s.table.Kind {
	case "audiogram":
	case "worker":
		return &grid.Fault{Problem: "workers cannot be read from FHIR, since patients have neither site nor day of hire", Remedy: "Take the workers from a roster, and only the audiograms from FHIR"}
	default:
		return &grid.Fault{Problem: fmt.Sprintf("%s records cannot be read from FHIR", s.table.Kind), Remedy: "Only audiograms are read from FHIR; correct the kind in the program file or the map"}
	}
	if f.FHIR != nil {
		s.options = *f.FHIR
	}
	s.ignored = map[string]bool{}
	for _, kind := range s.options.Ignore {
		if kind == "Observation" {
			return &grid.Fault{Problem: "the map ignores the resource type Observation, which audiograms are made of", Remedy: "Take it out of ignore_resources"}
		}
		s.ignored[kind] = true
	}
	dates, fault := readDates(f.Dates)
	if fault != nil {
		return fault
	}
	s.dates = dates
	if s.words, s.phrases, fault = readWords(f, &s.options); fault != nil {
		return fault
	}
	return s.constants()
}

// constants reads the fields that have the same value in every audiogram. They come before what resources say.
func (s *source) constants() error {
	for name, text := range s.options.Fields {
		field := s.table.Index(name)
		switch {
		case field < 0:
			return &grid.Fault{Problem: fmt.Sprintf("audiogram records have no field %q, which is among the constants of the map", record.Shorten(name)), Remedy: "Correct the name of the field"}
		case s.table.Fields[field].Required || s.table.Fields[field].Type == record.Hearing:
			return &grid.Fault{Problem: name + " is among the constants of the map, but it comes from the resources", Remedy: "Take it out of the constants"}
		}
		s.fixed = append(s.fixed, mapping.Value{Field: field, Text: text})
	}
	sort.Slice(s.fixed, func(a, b int) bool { return s.fixed[a].Field < s.fixed[b].Field })
	return nil
}

// Next gives what became of the next resource, or of several that are one audiogram.
func (s *source) Next(o *mapping.Out) error {
	for len(s.queue) == 0 {
		if s.ended {
			return io.EOF
		}
		i, err := s.items.next()
		switch {
		case err == io.EOF:
			s.flush()
		case err != nil:
			return fileFault(err)
		default:
			s.take(&i)
		}
	}
	*o = s.queue[0]
	s.queue = s.queue[1:]
	if s.further && !s.told {
		s.told = true
		o.Remarks = append(o.Remarks, mapping.Remark{Why: "the Bundle is one page of a search, and further pages follow it", Remedy: "Export all pages, so that no test is missing"})
	}
	return nil
}

// take deals with one item.
func (s *source) take(i *item) {
	switch {
	case i.fault != nil:
		s.reject(i.line, i.fault)
	case i.empty != "":
		s.pass(i.line, i.empty)
	case s.ignored[i.kind]:
		s.pass(i.line, i.kind)
	case i.kind == "Bundle":
		s.reject(i.line, &mapping.Fault{Header: "resourceType", Why: "a Bundle stands within the file", Remedy: "Give each Bundle a file of its own"})
	case i.kind == "Observation":
		s.observation(i)
	case i.kind == "DiagnosticReport":
		s.report(i)
	case resourceTypes[i.kind]:
		s.pass(i.line, i.kind)
	default:
		s.reject(i.line, &mapping.Fault{Header: "resourceType", Read: record.Shorten(i.kind), Why: fmt.Sprintf("%q is no resource type of FHIR R4", record.Shorten(i.kind)), Remedy: "Correct it, or list it in the map under fhir: {ignore_resources: …} if it is not wanted"})
	}
}

func (s *source) reject(line int, f *mapping.Fault) {
	s.queue = append(s.queue, mapping.Out{Line: line, Fault: f})
}

func (s *source) pass(line int, why string, remarks ...mapping.Remark) {
	s.queue = append(s.queue, mapping.Out{Line: line, NotData: why, Remarks: remarks})
}
