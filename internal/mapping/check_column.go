package mapping

import (
	"slices"
	"sort"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// column looks at where one field comes from. The field is nil if it is none of the record's.
func (c *checker) column(at string, col *Column, field *record.Field) {
	c.origin(at, col)
	c.words(at, col)
	if field == nil {
		return
	}
	c.suited(at, col, field)
	if col.Constant != "" {
		c.canonical(at+"/constant", col.Constant, field)
	}
	for _, word := range sortedKeys(col.Values) {
		c.canonical(at+"/values/"+token(word), col.Values[word], field)
	}
}

// origin wants exactly one of the places that a value can come from, and no keys that have no use there.
func (c *checker) origin(at string, col *Column) {
	var from []string
	for name, given := range map[string]bool{
		"column": len(col.Column) > 0, "position": col.Position > 0, "above": col.Above != "", "constant": col.Constant != "", "make": len(col.Make) > 0,
	} {
		if given {
			from = append(from, name)
		}
	}
	sort.Strings(from)
	const choice = "Write one of column, position, above, constant and make"
	switch {
	case len(from) == 0:
		c.say(at, choice, "the map does not say where the field comes from")
		return
	case len(from) > 1:
		c.say(at, choice, "the field comes from several places: %s", strings.Join(from, ", "))
		return
	}
	switch from[0] {
	case "column":
		c.place(at, col.Column, 0)
	case "above":
		if h := c.f.Head; h == nil || h.Above == "" {
			c.say(at+"/above", "Write above: key_value under head", "the field comes from a line above the header, but the map does not say that there are such lines")
		}
	case "constant", "make":
		for _, key := range col.keys() {
			c.sayKey(at+"/"+key, "Remove the key", "%s has no use beside %s", key, from[0])
		}
	}
}

// keys lists the keys that say how a cell is read.
func (col *Column) keys() []string {
	var out []string
	for _, k := range []struct {
		name  string
		given bool
	}{
		{"values", col.Values != nil}, {"others", col.Others != ""}, {"pad", col.Pad > 0}, {"strip", col.Strip != nil}, {"prefix", col.Prefix != ""},
		{"case", col.Case != ""}, {"unit", col.Unit != ""}, {"order", col.Order != ""}, {"split", col.Split != ""}, {"blank", col.Blank != nil},
	} {
		if k.given {
			out = append(out, k.name)
		}
	}
	return out
}

// words looks at the tables of words.
func (c *checker) words(at string, col *Column) {
	if col.Others != "" && col.Values == nil {
		c.sayKey(at+"/others", "List the values, or remove the key", "others has no use without values")
	}
	if _, p := convert.NewWords(col.Values); p != nil {
		c.say(at+"/values", p.Remedy, "%s", p.Why)
		return
	}
	blank := newWordSet(c.f.Blank, col.Blank)
	for _, word := range sortedKeys(col.Values) {
		if blank.has(word) {
			c.sayKey(at+"/values/"+token(word), "Keep it in one of the two", "the word %q stands under values and under blank", record.Shorten(word))
		}
	}
}

// suited wants keys that fit what the field holds.
func (c *checker) suited(at string, col *Column, field *record.Field) {
	refuse := func(key, remedy, format string, args ...any) { c.sayKey(at+"/"+key, remedy, format, args...) }
	if field.Type != record.Day && col.Order != "" {
		refuse("order", "Remove the key", "%s holds no date", field.Name)
	}
	if field.Type != record.Words && col.Split != "" {
		refuse("split", "Remove the key", "%s holds no list", field.Name)
	}
	if !isText(field) {
		for _, key := range []struct {
			name  string
			given bool
		}{{"pad", col.Pad > 0}, {"strip", col.Strip != nil}, {"prefix", col.Prefix != ""}, {"case", col.Case != ""}} {
			if key.given {
				refuse(key.name, "Remove the key", "%s is for ids, but %s holds none", key.name, field.Name)
			}
		}
	}
	if units := unitsOf(field); col.Unit != "" && !slices.Contains(units, col.Unit) {
		remedy := "Remove the key; the number must be in the unit of the field: " + field.Doc
		if units != nil {
			remedy = "Write one of " + strings.Join(units, ", ")
		}
		c.say(at+"/unit", remedy, "%s cannot be in the unit %s", field.Name, col.Unit)
	}
}

// canonical wants a word of the map to be one that the field can hold.
func (c *checker) canonical(at, word string, field *record.Field) {
	p := c.table.Set(c.table.New(), c.table.Index(field.Name), word)
	switch {
	case p == nil:
	case p.Severity == diag.Warning:
		c.list.Warnf(c.places.value(at), p.Remedy, "%s: %s", field.Name, p.Why)
	default:
		c.say(at, p.Remedy, "%s: %s", field.Name, p.Why)
	}
}

func sortedKeys[V any](m map[string]V) []string {
	keys := make([]string, 0, len(m))
	for key := range m {
		keys = append(keys, key)
	}
	sort.Strings(keys)
	return keys
}
