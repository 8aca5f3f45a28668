package fhir

// This material contains content from LOINC (http://loinc.org). LOINC is copyright © Regenstrief Institute, Inc.
// and the Logical Observation Identifiers Names and Codes (LOINC) Committee, and is available at no cost under the
// license at http://loinc.org/license. LOINC® is a registered United States trademark of Regenstrief Institute, Inc.

// loincSystem is the code system of LOINC in FHIR (https://hl7.org/fhir/R4/loinc.html).
const loincSystem = "http://loinc.org"

// loincNames are further names under which LOINC is met as a code system: with a slip in the address, and the
// object identifier that HL7 registered (https://hl7.org/fhir/R4/loinc.html).
var loincNames = map[string]bool{
	loincSystem: true, "https://loinc.org": true, "http://loinc.org/": true, "https://loinc.org/": true,
	"urn:oid:2.16.840.1.113883.6.1": true,
}

// panelCode is the panel of pure tone air conduction thresholds.
const panelCode = "89015-2"

// ear is left or right.
type ear uint8

const (
	left ear = iota
	right
)

func (e ear) String() string { return [...]string{"left", "right"}[e] }

func (e ear) other() ear { return 1 - e }

// tone is what a threshold was measured of: one ear at one frequency.
type tone struct {
	ear ear
	hz  int
}

// tones are the codes of the panel's components: pure tone air conduction threshold of an ear at a frequency. Names
// as the HL7 guides print them read "Hearing threshold Ear - left --500 Hz".
//
// Source: the HL7 guides https://hl7.org/fhir/us/pacio-pfe/ValueSet-pfe-sensory-functions-pain-clinical-test-vs.html
// (codes) and https://build.fhir.org/ig/AuDigitalHealth/au-fhir-core/Observation-hearing-threshold-1.json (500 to
// 2000 Hz); the names of the other codes by the published sources of the first guide, which are secondary. A code for
// 125 Hz was not found.
var tones = map[string]tone{
	"91375-6": {left, 250}, "91374-9": {right, 250},
	"89024-4": {left, 500}, "89025-1": {right, 500},
	"91379-8": {left, 750}, "91378-0": {right, 750},
	"89016-0": {left, 1000}, "89017-8": {right, 1000},
	"91373-1": {left, 1500}, "91372-3": {right, 1500},
	"89018-6": {left, 2000}, "89019-4": {right, 2000},
	"89020-2": {left, 3000}, "89021-0": {right, 3000},
	"89022-8": {left, 4000}, "89023-6": {right, 4000},
	"91377-2": {left, 5000}, "91376-4": {right, 5000},
	"89026-9": {left, 6000}, "89027-7": {right, 6000},
	"89028-5": {left, 8000}, "89029-3": {right, 8000},
}
