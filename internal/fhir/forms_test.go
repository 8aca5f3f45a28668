package fhir

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

func joined(s string) string { return strings.Join(strings.Fields(s), " ") }

func TestLinesOfBulkExports(t *testing.T) {
	t.Parallel()
	panel := joined(panelText("A1", `, "component": [`+component("89024-4", level("10"))+`]`))
	text := "\ufeff" + panel + "\r\n\n{\"resourceType\": \"Observation\",\n[1]\nnull\n" + worker7 + " {}\n" + worker7 + "\n\x00\n{\"resourceType\": \"Obser"
	assert.Equal(t, []string{
		"1: audiogram_id=A1 worker_id=0007 date=2025-03-04 left.500=10",
		"3: fault : the line ends within the JSON",
		"4: fault : this is a list, not a resource",
		"5: fault : this is null, not a resource",
		"6: fault : something follows the resource on its line",
		"7: Patient",
		"8: fault : the file holds a NUL byte, so it is no text or was cut off",
		"9: fault : the JSON ends too early",
	}, readAll(t, text, "observations.ndjson", mapping.File{}))
}

func TestFirstLineBrokenInLines(t *testing.T) {
	t.Parallel()
	got := readAll(t, "{\"a\": \n"+worker7, "x.ndjson", mapping.File{})
	assert.Equal(t, []string{"1: fault : the line ends within the JSON", "2: Patient"}, got)
}

func TestSingleResource(t *testing.T) {
	t.Parallel()
	panel := strings.Replace(panelText("A1", `, "component": [`+component("89024-4", level("10"))+`],
		"contained": [`+strings.Replace(worker7, `"p7"`, `"me"`, 1)+`]`), "Patient/p7", "#me", 1)
	assert.Equal(t, []string{"1: audiogram_id=A1 worker_id=0007 date=2025-03-04 left.500=10"}, readAll(t, panel, "a.json", mapping.File{}))
}

func TestEntriesOfBundles(t *testing.T) {
	t.Parallel()
	text := `{"entry": [
		{"fullUrl": "urn:uuid:1"},
		{"request": {"method": "DELETE", "url": "Observation/1"}},
		{"resource": {"resourceType": "Composition"}},
		{"resource": {"resourceType": "Bundle", "entry": []}},
		{"resource": {"resourceType": "Sneeze"}},
		{"resource": {"resourceType": "Yawn"}},
		{"resource": {"id": "x"}},
		{"resource": {"resourceType": 5}},
		{"resource": {"resourceType": "Observation", "code": "x"}},
		{"resource": [1]},
		{"resource": {"resourceType": "Observation", "id": "1", "id": "2"}},
		17
	], "link": [{"relation": "self", "url": "x"}, {"relation": "next", "url": "y"}], "type": "searchset", "resourceType": "Bundle"}`
	got := readAll(t, text, "a.json", mapping.File{FHIR: &mapping.FHIR{Ignore: []string{"Yawn"}}})
	assert.Equal(t, []string{
		"1: entry without a resource | : the Bundle is one page of a search, and further pages follow it",
		"2: deletion of a resource",
		"3: Composition",
		"4: fault : a Bundle stands within the file",
		`5: fault : "Sneeze" is no resource type of FHIR R4`,
		"6: Yawn",
		"7: fault : the object has no resourceType, so it is no FHIR resource",
		"8: fault : resourceType is a number, not a text",
		"9: fault : code is a text, not an object",
		"10: fault : resource is a list, not an object",
		`11: fault : the key "id" stands twice in one object`,
		"12: fault : this is a number, not a resource",
	}, got)
	assert.Empty(t, readAll(t, `{"resourceType": "Bundle", "entry": null}`, "a.json", mapping.File{}))
	assert.Empty(t, readAll(t, `{"resourceType": "Bundle", "entry": []}`, "a.json", mapping.File{}))
	assert.Empty(t, readAll(t, `[]`, "a.json", mapping.File{}))
}

func TestFilesThatAreRefused(t *testing.T) {
	t.Parallel()
	audiogram, _ := record.TableOf("audiogram")
	for text, want := range map[string]string{
		"":                                       "the file is empty",
		" \n ":                                   "the file is empty",
		"<x/>":                                   "the file is XML",
		"a,b\n":                                  "the file does not begin with a JSON object or array",
		"\xff\xfe{\x00}\x00":                     "the file is UTF-16 text, but FHIR JSON is UTF-8",
		"{\x00}\x00":                             "the file is UTF-16 text, but FHIR JSON is UTF-8",
		`{"resourceType": "Bundle", "entry": [{`: "the JSON ends too early",
		`{"resourceType": "Bundle", "entry": {}}`:           "the JSON is broken: '{' stands where the list of entries belongs",
		`{"resourceType": "Bundle"} x`:                      "something follows the end of the JSON",
		`{"resourceType": "Bundle", "entry":[],"entry":[]}`: "the Bundle has the key entry twice",
		"[{}, ]":                             "the JSON has a comma before ]",
		"{\n}\n{\n}":                         "another value follows the first resource, which stands on several lines",
		`{"a": ` + strings.Repeat("[", 1000): "the JSON is nested more than 100 levels deep",
	} {
		_, err := Open(strings.NewReader(text), "a.json", &mapping.Map{}, audiogram)
		var fault *grid.Fault
		require.ErrorAs(t, err, &fault, text)
		assert.Equal(t, want, fault.Problem, text)
		assert.NotEmpty(t, fault.Remedy, text)
	}
}

func TestMapsThatAreRefused(t *testing.T) {
	t.Parallel()
	for name, c := range map[string]struct {
		file mapping.File
		kind record.Kind
		want string
	}{
		"worker":   {kind: "worker", want: "workers cannot be read from FHIR, since patients have neither site nor day of hire"},
		"training": {kind: "training", want: "training records cannot be read from FHIR"},
		"zone":     {file: mapping.File{Dates: &mapping.Dates{Zone: "Harrow/Slate"}}, want: "the map names the time zone Harrow/Slate, which is not known"},
		"constant": {file: mapping.File{FHIR: &mapping.FHIR{Fields: map[string]string{"room": "1"}}}, want: `audiogram records have no field "room", which is among the constants of the map`},
		"date":     {file: mapping.File{FHIR: &mapping.FHIR{Fields: map[string]string{"date": "2025-01-01"}}}, want: "date is among the constants of the map, but it comes from the resources"},
		"ignore":   {file: mapping.File{FHIR: &mapping.FHIR{Ignore: []string{"Observation"}}}, want: "the map ignores the resource type Observation, which audiograms are made of"},
		"words": {file: mapping.File{FHIR: &mapping.FHIR{NoResponse: &mapping.NoResponse{Words: []string{"x"}}}, Thresholds: &mapping.Thresholds{NotTested: []string{"x"}}},
			want: `the map says of "x" both that it means no response and that it means not tested`},
	} {
		if c.kind == "" {
			c.kind = "audiogram"
		}
		table, _ := record.TableOf(c.kind)
		_, err := Open(strings.NewReader("[]"), "a.json", &mapping.Map{File: c.file}, table)
		var fault *grid.Fault
		require.ErrorAs(t, err, &fault, name)
		assert.Equal(t, c.want, fault.Problem, name)
		assert.NotEmpty(t, fault.Remedy, name)
	}
}
