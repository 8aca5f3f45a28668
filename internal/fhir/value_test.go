package fhir

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/mapping"
)

var wordsMap = mapping.File{
	FHIR:       &mapping.FHIR{NoResponse: &mapping.NoResponse{Words: []string{"NR", "no response", "999"}, Limit: 100, Limits: map[string]float64{"8000": 90}}},
	Thresholds: &mapping.Thresholds{NotTested: []string{"DNT", "888"}},
}

// left500 reads one value at 500 Hz of the left ear and gives what became of the threshold.
func left500(t *testing.T, f mapping.File, value, more string) string {
	t.Helper()
	got := readAll(t, bundleOf(worker7, toneText("o1", "89024-4", value, more), toneText("o2", "89025-1", level("20"), "")), "a.json", f)
	got[1] = strings.TrimPrefix(got[1], "2 3: audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 ")
	return strings.TrimPrefix(got[1], "2 3: ")
}

func TestLevels(t *testing.T) {
	t.Parallel()
	const db = `"unit": "dB"}`
	for value, want := range map[string]string{
		level("0"):                            "left.500=0 right.500=20",
		level("15.0"):                         "left.500=15 right.500=20",
		level("1e1"):                          "left.500=10 right.500=20",
		`"valueQuantity": {"value": 5, ` + db: "left.500=5 right.500=20",
		`"valueQuantity": {"value": 5, "unit": "dB HL"}`:                                                           "left.500=5 right.500=20",
		`"valueQuantity": {"value": 5, "unit": "dB(HL)", "code": "dB[HL]", "system": "http://unitsofmeasure.org"}`: "left.500=5 right.500=20",
		`"valueQuantity": {"value": 5, "unit": "decibels", "code": "258", "system": "urn:x"}`:                      "left.500=5 right.500=20",
		`"valueQuantity": {"value": 5, "code": "dB"}`:                                                              "left.500=5 right.500=20",
		`"valueQuantity": {"value": 5}`:                                                                            "fault left.500: the level has no unit",
		`"valueQuantity": {"value": 5, "code": "dB", "system": "urn:x"}`:                                           "fault left.500: the level has no unit",
		`"valueQuantity": {"value": 5, "unit": "dB SPL", "code": "dB"}`:                                            `fault left.500: the unit of the level is "dB SPL", not dB`,
		`"valueQuantity": {"value": 5, "unit": "dB", "code": "dB[SPL]", "system": "http://unitsofmeasure.org"}`:    `fault left.500: the unit of the level is "dB[SPL]", not dB`,
		`"valueQuantity": {"value": 5, "unit": "min"}`:                                                             `fault left.500: the unit of the level is "min", not dB`,
		`"valueQuantity": {"value": "5", ` + db:                                                                    "fault left.500: the value is a text, not a number",
		`"valueQuantity": {` + db:                                                                                  "fault left.500: the quantity has no value",
		`"valueQuantity": 5`:                                                                                       "fault left.500: valueQuantity is a number, not an object",
		level("300"):                                                                                               "fault left.500: the value is no level from -20 to 130 dB with one decimal at most",
		level("1e300"):                                                                                             "fault left.500: the value is no level from -20 to 130 dB with one decimal at most",
		level("5.25"):                                                                                              "fault left.500: the value is no level from -20 to 130 dB with one decimal at most",
		`"valueInteger": 5`:                                                                                        "fault left.500: the value is a valueInteger, which has no unit",
		level("5") + `, "valueInteger": 5`:                                                                         "fault left.500: both valueQuantity and valueInteger are stated",
		level("5") + `, "dataAbsentReason": {"text": "x"}`:                                                         "fault left.500: there are both a value and a reason why there is none",
		`"valueQuantity": {"value": 95, "comparator": ">", ` + db:                                                  "left.500=NR>95 right.500=20",
		`"valueQuantity": {"value": 95, "comparator": ">=", ` + db:                                                 "left.500=NR>95 right.500=20",
		`"valueQuantity": {"value": -10, "comparator": "<", ` + db:                                                 "fault left.500: the threshold is said to lie below the level, so it is not known",
		`"valueQuantity": {"value": -10, "comparator": "<=", ` + db:                                                "fault left.500: the threshold is said to lie below the level, so it is not known",
		`"valueQuantity": {"value": 95, "comparator": "ad", ` + db:                                                 "fault left.500: the comparator is none that FHIR R4 knows",
		`"valueQuantity": {"comparator": ">", ` + db:                                                               "fault left.500: the quantity has no value",
		level("999"):           "left.500=NR>100 right.500=20",
		level("888"):           "left.500=NT right.500=20",
		`"valueString": "nr"`:  "left.500=NR>100 right.500=20",
		`"valueString": "DNT"`: "left.500=NT right.500=20",
		`"valueString": "45"`:  "fault left.500: the value is a text that the map does not know",
		`"valueCodeableConcept": {"coding": [{"code": "x", "display": "No response"}]}`: "left.500=NR>100 right.500=20",
		level("100") + `, "interpretation": [{"text": "NR"}]`:                           "left.500=NR>100 right.500=20",
		level("95") + `, "interpretation": [{"coding": [{"code": "NR"}]}]`:              "left.500=NR>95 right.500=20",
		level("95") + `, "note": [{"text": "No response"}]`:                             "left.500=NR>95 right.500=20",
		level("95") + `, "note": [{"text": "at first NR, then heard"}]`:                 `fault left.500: a note holds the word "NR" among others, so it cannot be told what it says of the threshold`,
		level("95") + `, "note": [{"text": "room 999, tired"}]`:                         "left.500=95 right.500=20",
		level("95") + `, "interpretation": [{"text": "DNT"}]`:                           "fault left.500: the observation says not tested, but it has a level",
		level("95") + `, "interpretation": [{"text": "DNT"}], "note": [{"text": "NR"}]`: "fault left.500: the observation says both no response and not tested",
		`"interpretation": [{"text": "NR"}]`:                                            "left.500=NR>100 right.500=20",
		`"interpretation": {"text": "NR"}`:                                              "fault left.500: interpretation is an object, not a list",
		`"dataAbsentReason": {"coding": [{"code": "not-performed"}]}`:                   "left.500=NT right.500=20",
		`"dataAbsentReason": {"text": "DNT"}`:                                           "left.500=NT right.500=20",
		`"dataAbsentReason": {"text": "No response"}`:                                   "left.500=NR>100 right.500=20",
		`"dataAbsentReason": {"coding": [{"code": "unknown"}]}`:                         "right.500=20 | left.500: the value is absent for the reason unknown, so nothing was recorded",
		`"dataAbsentReason": {"coding": [{"code": "masked"}]}`:                          "right.500=20 | left.500: the value is absent for the reason masked, so nothing was recorded",
		`"dataAbsentReason": {"coding": [{"code": "not-asked"}]}`:                       "right.500=20 | left.500: the value is absent for the reason not-asked, so nothing was recorded",
		`"valueQuantity": null`:                                                         "right.500=20 | left.500: the observation has neither a value nor a reason why there is none, so nothing was recorded",
	} {
		assert.Equal(t, want, left500(t, wordsMap, value, ""), value)
	}
}

func TestNoResponseNeedsALimit(t *testing.T) {
	t.Parallel()
	for limit, want := range map[float64]string{
		0:    "fault left.500: there was no response, but the highest level presented is not known",
		105:  "left.500=NR>105 right.500=20",
		1000: "fault left.500: the highest level presented that the map states for 500 Hz is none",
	} {
		f := mapping.File{FHIR: &mapping.FHIR{NoResponse: &mapping.NoResponse{Words: []string{"NR"}, Limit: limit}}}
		assert.Equal(t, want, left500(t, f, `"valueString": "NR"`, ""))
	}
	got := readAll(t, bundleOf(worker7, toneText("o1", "89028-5", `"valueString": "NR"`, "")), "a.json", wordsMap)
	assert.Equal(t, "2: audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 left.8000=NR>90", got[1])
}

func TestCodesAndTheirTexts(t *testing.T) {
	t.Parallel()
	loinc := func(rest string) string { return `"code": {` + rest + `}` }
	const code = `"code": {"coding": [{"system": "http://loinc.org", "code": "89024-4"}]}`
	for with, want := range map[string]string{
		loinc(`"coding": [{"system": "http://loinc.org", "code": "89024-4", "display": "Hearing threshold Ear - right --500 Hz"}]`): `fault left.500: the code 89024-4 is that of the left ear at 500 Hz, but the text beside it reads "Hearing threshold Ear - right --500 Hz"`,
		loinc(`"coding": [{"system": "http://loinc.org", "code": "89024-4"}], "text": "L 1000"`):                                    `fault left.500: the code 89024-4 is that of the left ear at 500 Hz, but the text beside it reads "L 1000"`,
		loinc(`"coding": [{"system": "http://loinc.org", "code": "89024-4", "display": "Peak sound level"}]`):                       `fault left.500: the code 89024-4 is that of the left ear at 500 Hz, but the text beside it reads "Peak sound level"`,
		loinc(`"coding": [{"system": "http://loinc.org", "code": "89024-4"}, {"system": "urn:x", "code": "L05"}]`):                  "left.500=10 right.500=20",
		loinc(`"coding": [{"system": "urn:oid:2.16.840.1.113883.6.1", "code": "89024-4"}]`):                                         "left.500=10 right.500=20",
		loinc(`"coding": [{"system": "http://loinc.org", "code": "89024-4"}, {"system": "http://loinc.org", "code": "89016-0"}]`):   "fault : the observation has the codes of two thresholds, 89024-4 and 89016-0",
		code + `, "bodySite": {"text": "Right ear"}`:                                                                                `fault left.500: the code is that of the left ear, but the body site reads "Right ear"`,
		code + `, "bodySite": {"text": "Left ear"}`:                                                                                 "left.500=10 right.500=20",
		code + `, "modifierExtension": [{"url": "x"}]`:                                                                              "fault : the resource has an extension that changes its meaning",
	} {
		text := strings.Replace(toneText("o1", "89024-4", level("10"), ""), code, with, 1)
		got := readAll(t, bundleOf(worker7, text, toneText("o2", "89025-1", level("20"), "")), "a.json", mapping.File{})
		got[1] = strings.TrimPrefix(strings.TrimPrefix(got[1], "2 3: "), "audiogram_id=0007-2025-03-04 worker_id=0007 date=2025-03-04 ")
		assert.Equal(t, want, got[1], with)
	}
}

func TestOtherObservations(t *testing.T) {
	t.Parallel()
	other := func(coding, value string) string {
		return `{"resourceType": "Observation", "status": "final", "code": {"coding": [` + coding + `]}, ` + value + `}`
	}
	got := readAll(t, bundleOf(
		other(`{"system": "http://loinc.org", "code": "8867-4", "display": "Heart rate"}`, `"valueQuantity": {"value": 60, "unit": "/min"}`),
		other(`{"system": "urn:x", "code": "L05K"}`, level("10")),
		other(`{"system": "http://loinc.org", "code": "21104-5", "display": "Hearing threshold"}`, `"valueString": "x"`),
		other(`{"code": "89024-4"}`, level("10")),
		other(`{"code": "89015-2"}`, level("10")),
		toneText("o5", "91377-2", level("10"), ""),
		`{"resourceType": "Observation", "status": "final", "valueString": "x"}`,
	), "a.json", mapping.File{})
	assert.Equal(t, []string{
		"1: another observation",
		"2: another observation | : observations with the code L05K were passed over: it is none of the air conduction thresholds of 89015-2",
		"3: another observation | : observations with the code 21104-5 were passed over: it is none of the air conduction thresholds of 89015-2",
		"4: fault : the code 89024-4 stands without its code system",
		"5: fault : the code 89015-2 stands without its code system",
		"6: threshold at 5000 Hz",
		"7: another observation",
	}, got)
}
