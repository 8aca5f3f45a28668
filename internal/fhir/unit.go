package fhir

import (
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/record"
)

// ucum is the system of units (https://hl7.org/fhir/R4/datatypes.html#Quantity).
const ucum = "http://unitsofmeasure.org"

// decibels are the spellings of dB HL, by convert.Fold. The codes say that the level is a hearing threshold level;
// UCUM knows dB and has no unit of dB HL (examples of the HL7 guides beside tones; spellings are common practice, no
// source). dB[SPL] is another scale.
var decibels = map[string]bool{"db": true, "db hl": true, "dbhl": true, "decibel": true, "decibels": true, "decibel hl": true, "decibels hl": true}

func inDecibels(unit string) bool { return decibels[strings.TrimSpace(convert.Fold(unit))] }

// unit says whether a quantity is in dB.
func (v *valueReader) unit(q *node) bool {
	system, code, unit := v.r.text(q, "system"), v.r.text(q, "code"), v.r.text(q, "unit")
	if system != "" && system != ucum && system != ucum+"/" {
		code = "" // of a system that is not known here; the text of the unit must tell
	}
	const remedy = "Have the level exported in dB (UCUM code dB)"
	switch {
	case code == "" && unit == "":
		v.failed("valueQuantity.unit", "", remedy, "the level has no unit")
	case code != "" && !inDecibels(code):
		v.failed("valueQuantity.code", "", remedy, "the unit of the level is %q, not dB", record.Shorten(code))
	case unit != "" && !inDecibels(unit):
		v.failed("valueQuantity.unit", "", remedy, "the unit of the level is %q, not dB", record.Shorten(unit))
	default:
		return v.r.fault == nil
	}
	return false
}
