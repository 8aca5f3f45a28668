package mapping

import (
	"fmt"
	"strings"
	"time"

	"hearduty/internal/convert"
	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// checker finds what a schema cannot: what contradicts itself, and what does not fit the kind of record.
type checker struct {
	f      *File
	table  *record.Table // nil while the kind is not known
	places *places
	used   map[string]bool // folded names of the columns that the map uses
	list   diag.List
}

// check checks the map for records of a kind. Without a kind, what depends on it is left for later.
func (m *Map) check(kind record.Kind) diag.List {
	c := &checker{f: &m.File, places: m.places, used: map[string]bool{}}
	c.table, _ = record.TableOf(kind)
	if m.File.Format == "fhir" {
		c.fhir()
		return c.list
	}
	if m.File.FHIR != nil {
		c.sayKey("/fhir", "Write format: fhir, or remove the key", "the map says how FHIR resources are read, but its format is not fhir")
	}
	c.format()
	c.head()
	c.rows()
	c.numbers()
	c.dates()
	c.thresholds()
	c.ear()
	c.frequency()
	c.allFields()
	c.ignored()
	c.recognizable()
	return c.list
}

// say notes an error at the value of a JSON pointer.
func (c *checker) say(pointer, remedy, format string, args ...any) {
	c.list.Errorf(c.places.value(pointer), remedy, format, args...)
}

// sayKey notes an error at a key.
func (c *checker) sayKey(pointer, remedy, format string, args ...any) {
	c.list.Errorf(c.places.key(pointer), remedy, format, args...)
}

// format looks at what describes the file.
func (c *checker) format() {
	f := c.f
	text := f.Format == "" || f.Format == "delimited"
	if f.Delimiter != "" && !text {
		c.sayKey("/delimiter", "Remove the key, or correct the format", "only delimited text has a delimiter")
	}
	if f.Sheet != "" && f.Format != "" && f.Format != "workbook" {
		c.sayKey("/sheet", "Remove the key, or correct the format", "only a workbook has sheets")
	}
	if f.Encoding == "" {
		return
	}
	if f.Format == "workbook" {
		c.sayKey("/encoding", "Remove the key", "a workbook has no encoding that could be stated")
	}
	if err := grid.CheckEncoding(f.Encoding); err != nil {
		c.say("/encoding", err.Remedy, "%s", err.Problem)
	}
}

func (c *checker) numbers() {
	n := c.f.Numbers
	if n == nil || n.Thousands == "" {
		return
	}
	if decimal := n.Decimal; decimal == n.Thousands || decimal == "" && n.Thousands == "." {
		c.say("/numbers/thousands", "Write decimal: \",\" if the comma is the decimal sign, or correct thousands", "the decimal sign and the sign between thousands are the same")
	}
}

func (c *checker) dates() {
	d := c.f.Dates
	if d == nil || d.Zone == "" || d.Zone == "as_written" {
		return
	}
	if _, err := time.LoadLocation(d.Zone); err != nil || d.Zone == "Local" {
		c.say("/dates/zone", "Write a zone such as Europe/Berlin or America/Chicago, or as_written", "%q is no time zone that is known", record.Shorten(d.Zone))
	}
}

// ignored finds columns that are both used and ignored.
func (c *checker) ignored() {
	for i, name := range c.f.Ignore {
		if c.used[convert.Fold(name)] {
			c.say(fmt.Sprintf("/ignore/%d", i), "Take it out of ignore, or remove what uses it", "the column %q is both used and ignored", record.Shorten(name))
		}
	}
}

// unknownField says what to do about a name that no field has.
func (c *checker) unknownField(name string) string {
	names := c.table.Names()
	if c.f.Ear != nil {
		for _, n := range c.table.Names() {
			if inner, ok := strings.CutPrefix(n, "left."); ok {
				names = append(names, "ear."+inner)
			}
		}
	}
	if near := diag.Near(name, names); near != "" {
		return "Write " + near + " if that is meant; the fields are " + fieldNames(names)
	}
	return "The fields are " + fieldNames(names)
}

// fieldNames lists fields, with one name for those of several frequencies.
func fieldNames(names []string) string {
	var out []string
	for _, name := range names {
		outer, inner, nested := strings.Cut(name, ".")
		if nested && inner[0] >= '0' && inner[0] <= '9' {
			name = outer + ".<Hz>"
		}
		if len(out) == 0 || out[len(out)-1] != name {
			out = append(out, name)
		}
	}
	return strings.Join(out, ", ")
}

// recognizable wants to know where the header stands if no name can tell it from data.
func (c *checker) recognizable() {
	h := c.f.Head
	stated := h != nil && (h.None || h.Row > 0 || h.Transposed)
	if f := c.f.Format; stated || len(c.used) > 0 || c.list.Failed() || f == "json" || f == "lines" || f == "yaml" {
		return
	}
	c.say("/fields", "Write none: true under head if there is no header, or row with its number", "all columns are given by position, so that the header cannot be told from data")
}
