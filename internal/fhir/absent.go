package fhir

import (
	"fmt"
	"strconv"

	"hearduty/internal/audiometry"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// said looks for the words of the map in the interpretation and the notes. A note that holds one among others is a
// fault: it cannot be told what it says.
func (v *valueReader) said() string {
	said := ""
	hear := func(word string) {
		if m := v.s.meaning(word); m != "" && said == "" {
			said = m
		} else if m != "" && m != said {
			v.failed("interpretation", "", "Look up which of the two is right", "the observation says both no response and not tested")
		}
	}
	for _, c := range v.r.concepts(v.n, "interpretation") {
		for _, w := range c.words() {
			hear(w)
		}
	}
	for _, note := range v.r.notes(v.n) {
		hear(note)
		if word := v.s.within(note); word != "" && v.s.meaning(note) == "" {
			v.failed("note", "", "List the whole note among the words of the map if it means the same, or take it out", "a note holds the word %q among others, so it cannot be told what it says of the threshold", word)
		}
	}
	return said
}

// noResponse gives no response up to the limit that the map states.
func (v *valueReader) noResponse() audiometry.Threshold {
	limit := 0.0
	if o := v.s.options.NoResponse; o != nil {
		limit = o.Limit
		if own, ok := o.Limits[strconv.Itoa(v.t.hz)]; ok {
			limit = own
		}
	}
	if limit == 0 {
		return v.failed("", "", fmt.Sprintf("State the highest level that the audiometer presents at %d Hz in the map: fhir: {no_response: {limit: …}}", v.t.hz), "there was no response, but the highest level presented is not known")
	}
	level, err := audiometry.ParseThreshold("NR>" + strconv.FormatFloat(limit, 'f', -1, 64))
	if err != nil {
		return v.failed("", "", "Correct no_response in the map", "the highest level presented that the map states for %d Hz is none", v.t.hz)
	}
	return level
}

// absent reads the reason why there is no value. Only not-performed says that the frequency was not tested. Masked
// is no masking of an ear: it says that the value is withheld.
func (v *valueReader) absent(c concept, said string) audiometry.Threshold {
	reason := ""
	for _, coding := range c.codings {
		if reason == "" {
			reason = coding.code
		}
		if coding.code == "not-performed" {
			said = sayNotTested
		}
	}
	for _, w := range c.words() {
		if m := v.s.meaning(w); m != "" {
			said = m
		}
	}
	switch said {
	case sayNoResponse:
		return v.noResponse()
	case sayNotTested:
		return audiometry.Threshold{State: audiometry.NotTested}
	}
	if reason == "" {
		reason = "a text"
	}
	v.remark = &mapping.Remark{Field: v.t.field(), Why: fmt.Sprintf("the value is absent for the reason %s, so nothing was recorded", record.Shorten(reason)), Remedy: "Look up whether the frequency was tested, or whether there was no response"}
	return audiometry.Threshold{}
}
