// Package fhir reads HL7 FHIR R4 resources: audiograms as observations with LOINC codes, and the patients they
// are of.
package fhir

import (
	"errors"
	"io"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// Open reads a Bundle, a single resource, an array of resources or NDJSON. The rows that it gives are resources:
// Line is the place in the Bundle or list, or the line of NDJSON, from 1. Several observations of one patient
// and time become one audiogram, as gathered rows do. Patients are no data of their own. The error is a
// *grid.Fault if the file cannot be read.
func Open(r io.ReadSeeker, name string, m *mapping.Map, t *record.Table) (mapping.Source, error) {
	return nil, errors.New("not yet")
}
