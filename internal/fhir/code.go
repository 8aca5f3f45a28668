package fhir

import (
	"fmt"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// toneOf finds the tone whose threshold a concept names by LOINC.
func toneOf(c concept) (t tone, found bool) {
	for _, coding := range c.codings {
		if t, found = tones[coding.code]; found && loincNames[coding.system] {
			return t, true
		}
	}
	return tone{}, false
}

// isPanel says whether the concept is the panel of thresholds.
func isPanel(c concept) bool {
	for _, coding := range c.codings {
		if coding.code == panelCode && loincNames[coding.system] {
			return true
		}
	}
	return false
}

// checkCode looks for contradictions in the concept that names a tone.
func (t tone) checkCode(c concept) *mapping.Fault {
	code := ""
	for _, coding := range c.codings {
		other, ok := tones[coding.code]
		switch {
		case !ok || !loincNames[coding.system]:
		case other != t:
			return &mapping.Fault{Header: "code", Why: fmt.Sprintf("the observation has the codes of two thresholds, %s and %s", code, coding.code), Remedy: "Look up which of the two is right, and leave the other out"}
		case code == "":
			code = coding.code
		}
	}
	return t.checkNames(code, c.names())
}

// withoutSystem finds a code of a threshold that does not say that it is LOINC.
func withoutSystem(c concept) *mapping.Fault {
	for _, coding := range c.codings {
		_, isTone := tones[coding.code]
		if coding.system == "" && (isTone || coding.code == panelCode) {
			return &mapping.Fault{Header: "code", Why: fmt.Sprintf("the code %s stands without its code system", coding.code), Remedy: "Have the code exported with the system " + loincSystem}
		}
	}
	return nil
}

// unknownCode remarks on an observation that may hold hearing thresholds under a code that is not known here. It
// gives nil for all that has no sign of it.
func unknownCode(n *node, c concept) *mapping.Remark {
	var r reader
	quantity := r.object(n, "valueQuantity")
	hearing := quantity != nil && inDecibels(r.text(quantity, "code")) || quantity != nil && inDecibels(r.text(quantity, "unit"))
	for _, name := range c.names() {
		for _, word := range strings.Fields(convert.Fold(name)) {
			for _, beginning := range []string{"hearing", "audiom", "audiog", "tone", "bone", "speech"} {
				hearing = hearing || strings.HasPrefix(word, beginning)
			}
		}
	}
	if !hearing {
		return nil
	}
	for _, coding := range c.codings {
		if coding.code != "" {
			why := fmt.Sprintf("observations with the code %s were passed over: it is none of the air conduction thresholds of %s", record.Shorten(coding.code), panelCode)
			return &mapping.Remark{Why: why, Remedy: "If they are such thresholds, have them exported with the LOINC codes of the panel " + panelCode}
		}
	}
	return &mapping.Remark{Why: "observations without a code were passed over", Remedy: "Have them exported with the LOINC codes of the panel " + panelCode + " if they are hearing thresholds"}
}

// What a status says of a resource.
type standing uint8

const (
	counts    standing = iota
	withdrawn          // it was entered in error or cancelled
	premature          // it is not yet final
	unclear
)

// statuses are those of Observation and DiagnosticReport (https://hl7.org/fhir/R4/valueset-observation-status.html,
// https://hl7.org/fhir/R4/valueset-diagnostic-report-status.html).
var statuses = map[string]standing{
	"final": counts, "amended": counts, "corrected": counts, "appended": counts,
	"entered-in-error": withdrawn, "cancelled": withdrawn,
	"registered": premature, "preliminary": premature, "partial": premature,
}

// standingOf reads the status of a resource and gives the fault of one that does not tell.
func standingOf(status string) (standing, *mapping.Fault) {
	known, ok := statuses[status]
	switch {
	case ok:
		return known, nil
	case status == "":
		return unclear, &mapping.Fault{Header: "status", Why: "the resource has no status, so it is not known whether it counts", Remedy: "Have it exported with its status"}
	}
	return unclear, &mapping.Fault{Header: "status", Read: record.Shorten(status), Why: fmt.Sprintf("the status %q does not tell whether the result counts", record.Shorten(status)), Remedy: "Look up whether it counts, and state final or entered-in-error"}
}

// notData says why a resource that does not count is no data.
func notData(status string) string {
	if status == "entered-in-error" {
		return "entered in error"
	}
	return status + " result"
}

// prematureRemark is what to know of results that are not final.
func prematureRemark(status string) mapping.Remark {
	return mapping.Remark{Why: "results of status " + status + " were passed over", Remedy: "Export them again once they are final"}
}
