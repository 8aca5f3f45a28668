package fhir

import (
	"fmt"
	"io"
	"sort"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// readAll reads a file as the map says and gives what became of each resource, one line each: the lines of the file,
// then the record, the reason or the fault, then the remarks.
func readAll(t *testing.T, text, name string, f mapping.File) []string {
	t.Helper()
	table, _ := record.TableOf("audiogram")
	source, err := Open(strings.NewReader(text), name, &mapping.Map{File: f}, table)
	require.NoError(t, err)
	var out []string
	for {
		var o mapping.Out
		err := source.Next(&o)
		if err == io.EOF {
			return out
		}
		require.NoError(t, err)
		out = append(out, shown(table, &o))
	}
}

func shown(table *record.Table, o *mapping.Out) string {
	lines := append([]int{o.Line}, o.Lines...)
	s := strings.Trim(fmt.Sprint(lines), "[]") + ": "
	switch {
	case o.Fault != nil:
		s += "fault " + o.Fault.Field + ": " + o.Fault.Why
	case o.NotData != "":
		s += o.NotData
	default:
		for _, e := range o.Records {
			s += values(table, e)
		}
	}
	for _, m := range o.Remarks {
		s += " | " + m.Field + ": " + m.Why
	}
	return s
}

func values(table *record.Table, e mapping.Entry) string {
	sorted := append([]mapping.Value{}, e.Values...)
	sort.Slice(sorted, func(a, b int) bool { return sorted[a].Field < sorted[b].Field })
	var parts []string
	for _, v := range sorted {
		parts = append(parts, table.Fields[v.Field].Name+"="+v.Text)
	}
	return strings.Join(parts, " ")
}

// bundleOf writes a Bundle of resources; one that begins with an address and a blank has that as fullUrl.
func bundleOf(resources ...string) string {
	entries := make([]string, len(resources))
	for i, r := range resources {
		url, rest, _ := strings.Cut(r, " ")
		if strings.HasPrefix(r, "{") {
			entries[i] = `{"resource": ` + r + `}`
		} else {
			entries[i] = fmt.Sprintf(`{"fullUrl": %q, "resource": %s}`, url, rest)
		}
	}
	return `{"resourceType": "Bundle", "type": "collection", "entry": [` + strings.Join(entries, ",\n") + `]}`
}

const worker7 = `{"resourceType": "Patient", "id": "p7", "identifier": [{"system": "urn:harrow-slate:payroll", "value": "0007"}], "name": [{"family": "Quill"}], "birthDate": "1980-01-02"}`

// toneText writes an observation of one threshold. More is put behind the other members.
func toneText(id, code, value, more string) string {
	return fmt.Sprintf(`{"resourceType": "Observation", "id": %q, "status": "final", "code": {"coding": [{"system": "http://loinc.org", "code": %q}]},
		"subject": {"reference": "Patient/p7"}, "effectiveDateTime": "2025-03-04", %s%s}`, id, code, value, more)
}

// level writes a value in dB.
func level(value string) string {
	return fmt.Sprintf(`"valueQuantity": {"value": %s, "unit": "dB", "system": "http://unitsofmeasure.org", "code": "dB"}`, value)
}

// component writes a component of a panel.
func component(code, value string) string {
	return fmt.Sprintf(`{"code": {"coding": [{"system": "http://loinc.org", "code": %q}]}, %s}`, code, value)
}

// panelText writes a panel. More is put behind the other members.
func panelText(id, more string) string {
	return fmt.Sprintf(`{"resourceType": "Observation", "id": %q, "status": "final", "code": {"coding": [{"system": "http://loinc.org", "code": "89015-2"}]},
		"subject": {"reference": "Patient/p7"}, "effectiveDateTime": "2025-03-04"%s}`, id, more)
}
