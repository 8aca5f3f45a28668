package schema

import (
	"slices"
	"strings"

	"hearduty/internal/record"
)

// Record gives the schema of one record of a kind in its JSON form: dotted names nested, only fields that
// are present, with "record" and "origin" as `hearduty intake` adds them. An unknown kind is a mistake of
// the caller and panics.
func Record(kind record.Kind) []byte {
	table, ok := record.TableOf(kind)
	if !ok {
		panic("schema: there is no record kind " + string(kind))
	}
	properties := object{{"record", object{{"description", "the record kind"}, {"const", string(kind)}}}}
	required := []string{}
	for i := range table.Fields {
		f := &table.Fields[i]
		value := fieldValue(f)
		if f.Required {
			required = append(required, f.Name)
		}
		outer, inner, nested := strings.Cut(f.Name, ".")
		if !nested {
			properties.set(f.Name, value)
			continue
		}
		group, ok := properties.get(outer).(object)
		if !ok {
			group = object{{"type", "object"}, {"properties", object{}}, {"additionalProperties", false}}
		}
		inside := group.get("properties").(object)
		inside.set(inner, value)
		group.set("properties", inside)
		properties.set(outer, group)
	}
	properties.set("origin", origin())
	return text(object{
		{"$schema", draft}, {"title", "Record: " + strings.ReplaceAll(string(kind), "_", " ")},
		{"description", "One record of " + table.FileName() + ". A field that is not known is left out. Ids are texts, dates YYYY-MM-DD."},
		{"type", "object"}, {"properties", properties}, {"required", required}, {"additionalProperties", false},
	})
}

func origin() object {
	return object{
		{"description", "where the record was read"}, {"type", "object"},
		{"properties", object{
			{"file", object{{"description", "input file"}, {"type", "string"}}},
			{"sheet", object{{"description", "sheet of a workbook"}, {"type", "string"}}},
			{"row", object{{"description", "line of the file, row of the sheet, or place in the list"}, {"type", "integer"}, {"minimum", 0}}},
		}},
		{"required", []string{"file", "row"}}, {"additionalProperties", false},
	}
}

func fieldValue(f *record.Field) object {
	out := object{{"description", f.Doc}}
	switch f.Type {
	case record.Day:
		out.set("type", "string")
		out.set("format", "date")
	case record.Decimal:
		out.set("type", "number")
		bounds(&out, f)
	case record.YesNo:
		out.set("enum", []string{"yes", "no"})
	case record.Words:
		out.set("type", "array")
		out.set("items", words(f))
	case record.Hearing:
		number := object{{"type", "number"}}
		bounds(&number, f)
		out.set("anyOf", []object{number, {{"type", "string"}, {"pattern", `^(NT|NR>-?[0-9]+(\.[0-9]+)?)$`}}})
	default:
		for _, m := range words(f) {
			out.set(m.key, m.value)
		}
	}
	return out
}

// words gives the schema of a text: one of some words, any text with some usual words, or any text.
func words(f *record.Field) object {
	switch {
	case f.One != nil:
		return object{{"enum", f.One}}
	case f.Like != nil:
		return object{{"type", "string"}, {"minLength", 1}, {"examples", slices.Clone(f.Like)}}
	}
	return object{{"type", "string"}, {"minLength", 1}}
}

func bounds(o *object, f *record.Field) {
	if f.HasMin {
		o.set("minimum", f.Min)
	}
	if f.HasMax {
		o.set("maximum", f.Max)
	}
}
