package fhir

import (
	"fmt"
	"strconv"
	"strings"

	"hearduty/internal/audiometry"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// threshold reads the level of an observation or of a component of one.
func (s *source) threshold(n *node, t tone) (audiometry.Threshold, *mapping.Remark, *mapping.Fault) {
	v := valueReader{s: s, t: t, n: n}
	level := v.read()
	switch {
	case v.r.fault != nil:
		v.fault = v.r.fault
	case v.fault == nil:
		return level, v.remark, nil
	}
	if v.fault.Field == "" {
		v.fault.Field = t.field()
	}
	return audiometry.Threshold{}, nil, v.fault
}

// valueReader reads the value of one threshold. Its first fault stays.
type valueReader struct {
	s      *source
	t      tone
	n      *node
	r      reader
	remark *mapping.Remark
	fault  *mapping.Fault
}

func (v *valueReader) failed(header, read, remedy, why string, args ...any) audiometry.Threshold {
	if v.fault == nil {
		v.fault = &mapping.Fault{Header: header, Read: record.Shorten(read), Why: fmt.Sprintf(why, args...), Remedy: remedy}
	}
	return audiometry.Threshold{}
}

func (v *valueReader) read() audiometry.Threshold {
	key := ""
	for _, k := range v.n.keys {
		if strings.HasPrefix(k, "value") && v.n.at(k) != nil {
			if key != "" {
				return v.failed(k, "", "Keep the one that is right", "both %s and %s are stated", key, record.Shorten(k))
			}
			key = k
		}
	}
	absent := v.n.at("dataAbsentReason")
	said := v.said()
	switch {
	case v.fault != nil:
		return audiometry.Threshold{}
	case key != "" && absent != nil:
		return v.failed("dataAbsentReason", "", "Look up which of the two is right", "there are both a value and a reason why there is none")
	case key == "valueQuantity":
		return v.quantity(v.r.object(v.n, key), said)
	case key == "valueString" || key == "valueCodeableConcept":
		return v.words(key, said)
	case key != "":
		return v.failed(key, "", "Have it exported as valueQuantity in dB", "the value is a %s, which has no unit", record.Shorten(key))
	case said == sayNoResponse:
		return v.noResponse()
	case absent != nil:
		return v.absent(v.r.concept(v.n, "dataAbsentReason"), said)
	case said == sayNotTested:
		return audiometry.Threshold{State: audiometry.NotTested}
	}
	v.remark = &mapping.Remark{Field: v.t.field(), Why: "the observation has neither a value nor a reason why there is none, so nothing was recorded", Remedy: "Look up whether there was a result"}
	return audiometry.Threshold{}
}

// quantity reads a level with its unit.
func (v *valueReader) quantity(q *node, said string) audiometry.Threshold {
	if q == nil {
		return audiometry.Threshold{}
	}
	const remedy = "Have the level exported as a number of dB"
	value := q.at("value")
	comparator := v.r.text(q, "comparator")
	switch {
	case value == nil && said == sayNoResponse && comparator == "":
		return v.noResponse()
	case value == nil:
		return v.failed("valueQuantity.value", "", remedy, "the quantity has no value")
	case value.kind != number:
		return v.failed("valueQuantity.value", "", remedy, "the value is %s, not a number", value.kind)
	}
	stands := v.s.meaning(value.text) // a number such as 999 that stands for a word
	if said == "" {
		said = stands
	}
	if !v.unit(q) {
		return audiometry.Threshold{}
	}
	switch comparator {
	case "":
	case ">", ">=":
		said = sayNoResponse
	case "<", "<=":
		return v.failed("valueQuantity.comparator", comparator, "Look up the level in the original record", "the threshold is said to lie below the level, so it is not known")
	default:
		return v.failed("valueQuantity.comparator", comparator, "Write > for no response up to the level, or nothing", "the comparator is none that FHIR R4 knows")
	}
	switch {
	case said == sayNotTested && stands == "":
		return v.failed("valueQuantity", "", "Look up which of the two is right", "the observation says not tested, but it has a level")
	case said == sayNotTested:
		return audiometry.Threshold{State: audiometry.NotTested}
	}
	level, err := audiometry.ParseThreshold(plainNumber(value.text))
	switch {
	case said == sayNoResponse && (err != nil || stands != ""):
		return v.noResponse()
	case err != nil:
		return v.failed("valueQuantity.value", value.text, "Correct the level from the original record", "the value is no level from -20 to 130 dB with one decimal at most")
	case said == sayNoResponse:
		level.State = audiometry.NoResponse
	}
	return level
}

// plainNumber writes a number without exponent, which JSON allows.
func plainNumber(text string) string {
	if !strings.ContainsAny(text, "eE") {
		return text
	}
	f, err := strconv.ParseFloat(text, 64)
	if err != nil || f > 1e6 || f < -1e6 {
		return "1000"
	}
	return strconv.FormatFloat(f, 'f', -1, 64)
}

// words reads a value that is a word.
func (v *valueReader) words(key, said string) audiometry.Threshold {
	var words []string
	if key == "valueString" {
		words = append(words, v.r.text(v.n, key))
	} else {
		c := v.r.concept(v.n, key)
		words = append(words, c.words()...)
	}
	read := ""
	for _, w := range words {
		m := v.s.meaning(w)
		switch {
		case m == "":
			if w != "" && read == "" {
				read = w
			}
		case said == "":
			said = m
		case said != m:
			return v.failed(key, w, "Look up which of the two is right", "the observation says both no response and not tested")
		}
	}
	switch said {
	case sayNoResponse:
		return v.noResponse()
	case sayNotTested:
		return audiometry.Threshold{State: audiometry.NotTested}
	}
	return v.failed(key, read, "Have the level exported as valueQuantity in dB, or list the text in the map under fhir: {no_response: {words: …}} or thresholds: {not_tested: …}", "the value is a text that the map does not know")
}
