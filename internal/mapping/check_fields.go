package mapping

import (
	"fmt"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// allFields looks at the fields of every record of a row.
func (c *checker) allFields() {
	c.fields("/fields", c.f.Fields)
	for i := range c.f.Records {
		at := fmt.Sprintf("/records/%d", i)
		c.fields(at+"/fields", c.f.Records[i].Fields)
		c.conditions(at+"/only", c.f.Records[i].Only)
	}
	if c.f.Records != nil && c.f.Ear != nil {
		c.sayKey("/records", "Keep one of the two", "several records of one row cannot be combined with rows of one ear")
	}
	if len(c.f.Fields) == 0 && len(c.f.Records) == 0 {
		c.list.Errorf(diag.Position{File: c.file()}, "List under fields where each field of the record comes from", "the map names no fields")
		return
	}
	if len(c.f.Records) == 0 {
		c.whole("/fields", c.f.Fields)
	}
	for i := range c.f.Records {
		c.whole(fmt.Sprintf("/records/%d/fields", i), merged(c.f.Fields, c.f.Records[i].Fields))
	}
}

func (c *checker) file() string {
	if c.places == nil {
		return ""
	}
	return c.places.file
}

// merged gives the common fields with those of one record, which come first.
func merged(common, own map[string]Column) map[string]Column {
	out := make(map[string]Column, len(common)+len(own))
	for name, col := range common {
		out[name] = col
	}
	for name, col := range own {
		out[name] = col
	}
	return out
}

// fields looks at each field by itself.
func (c *checker) fields(pointer string, fields map[string]Column) {
	for _, name := range sortedKeys(fields) {
		col, at := fields[name], pointer+"/"+token(name)
		if c.table == nil {
			c.column(at, &col, nil)
			continue
		}
		indexes := fieldsNamed(c.table, name)
		switch {
		case strings.HasPrefix(name, "ear.") && c.f.Ear == nil:
			c.sayKey(at, "Say under ear which column tells the ear, or name the fields left.500, right.500 and so on", "the field %s needs to know the ear of a row", record.Shorten(name))
			continue
		case indexes == nil:
			c.sayKey(at, c.unknownField(name), "%s records have no field %q", c.table.Kind, record.Shorten(name))
			continue
		}
		field := &c.table.Fields[indexes[0]]
		c.column(at, &col, field)
		c.tone(at, name, field)
	}
}

// tone looks at whether a threshold may be named here.
func (c *checker) tone(at, name string, field *record.Field) {
	switch {
	case c.f.Frequency != nil && field.Type == record.Hearing:
		c.sayKey(at, "Remove it here", "the thresholds come from the columns under frequency")
	case c.f.Frequency != nil && c.f.Frequency.Masked != nil && name == "masked":
		c.sayKey(at, "Keep one of the two", "masked comes both from fields and from frequency")
	case c.f.Ear == nil || strings.HasPrefix(name, "ear."):
	default:
		for _, side := range []string{"left.", "right."} {
			if inner, ok := strings.CutPrefix(name, side); ok {
				if _, both := c.f.Fields["ear."+inner]; both {
					c.sayKey(at, "Keep one of the two", "%s comes from ear.%s as well", name, inner)
				}
			}
		}
	}
}

// whole looks at the fields of one record together.
func (c *checker) whole(pointer string, fields map[string]Column) {
	for _, name := range sortedKeys(fields) {
		for i, other := range fields[name].Make {
			at := fmt.Sprintf("%s/%s/make/%d", pointer, token(name), i)
			if _, known := fields[other]; !known || strings.HasPrefix(other, "ear.") {
				remedy := "Name fields that the map has"
				if near := diag.Near(other, sortedKeys(fields)); near != "" {
					remedy = "Write " + near + " if that is meant"
				}
				c.say(at, remedy, "%s is made of %q, which the map does not have", name, record.Shorten(other))
			}
		}
		if madeOfItself(fields, name) {
			c.say(pointer+"/"+token(name)+"/make", "Name other fields", "%s is made of itself", name)
		}
	}
	if c.table == nil {
		return
	}
	for i := range c.table.Fields {
		f := &c.table.Fields[i]
		if _, known := fields[f.Name]; f.Required && !known {
			c.say(pointer, "Name its column, write it as constant, or make it of other fields", "every %s needs %s, but the map does not say where it comes from", c.table.Kind, f.Name)
		}
	}
}

// madeOfItself follows what a field is made of.
func madeOfItself(fields map[string]Column, name string) bool {
	seen := map[string]bool{}
	next := fields[name].Make
	for len(next) > 0 {
		other := next[0]
		next = next[1:]
		if other == name {
			return true
		}
		if !seen[other] {
			seen[other] = true
			next = append(next[:len(next):len(next)], fields[other].Make...)
		}
	}
	return false
}

// fieldsNamed gives the index of the field of that name, the two of an ear field, or nothing.
func fieldsNamed(t *record.Table, name string) []int {
	if inner, ok := strings.CutPrefix(name, "ear."); ok {
		left, right := t.Index("left."+inner), t.Index("right."+inner)
		if left < 0 || right < 0 {
			return nil
		}
		return []int{left, right}
	}
	if i := t.Index(name); i >= 0 {
		return []int{i}
	}
	return nil
}
