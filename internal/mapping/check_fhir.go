package mapping

import (
	"fmt"

	"hearduty/internal/record"
)

// fhir looks at a map for FHIR resources, which have neither rows nor columns.
func (c *checker) fhir() {
	f := c.f
	for _, k := range []struct {
		name  string
		given bool
	}{
		{"encoding", f.Encoding != ""}, {"delimiter", f.Delimiter != ""}, {"sheet", f.Sheet != ""}, {"head", f.Head != nil}, {"rows", f.Rows != nil},
		{"numbers", f.Numbers != nil}, {"blank", f.Blank != nil}, {"fields", f.Fields != nil}, {"records", f.Records != nil},
		{"ear", f.Ear != nil}, {"frequency", f.Frequency != nil}, {"ignore", f.Ignore != nil},
	} {
		if k.given {
			c.sayKey("/"+k.name, "Remove it; what can be said of FHIR stands under fhir", "%s has no use for FHIR, which has neither rows nor columns", k.name)
		}
	}
	c.dates()
	if c.table != nil && c.table.Kind != "audiogram" {
		c.say("/kind", "Write kind: audiogram", "%s records are not read from FHIR", c.table.Kind)
		return
	}
	if f.Thresholds != nil && f.Thresholds.NoResponse != nil {
		c.sayKey("/thresholds/no_response", "Move it to fhir", "how FHIR writes no response stands under fhir")
	}
	if f.FHIR == nil {
		return
	}
	c.noResponse("/fhir/no_response", f.FHIR.NoResponse)
	for i, p := range f.FHIR.Purposes {
		for j, other := range f.FHIR.Purposes[:i] {
			if p.System == other.System && p.Code == other.Code && p.Purpose != other.Purpose {
				c.say(fmt.Sprintf("/fhir/purposes/%d", i), "Keep one of the two", "item %d of purposes gives the same code another meaning", j+1)
			}
		}
	}
	c.table, _ = record.TableOf("audiogram")
	for _, name := range sortedKeys(f.FHIR.Fields) {
		at := "/fhir/constants/" + token(name)
		i := c.table.Index(name)
		if i < 0 {
			c.sayKey(at, c.unknownField(name), "audiogram records have no field %q", record.Shorten(name))
			continue
		}
		c.canonical(at, f.FHIR.Fields[name], &c.table.Fields[i])
	}
}
