package schema

import (
	"reflect"
	"strings"
)

// structure gives the schema of a struct: its exported fields, with those of embedded structs.
func (g *generator) structure(t reflect.Type) object {
	var properties object
	required := []string{}
	g.fields(t, &properties, &required)
	out := object{{"type", "object"}, {"properties", properties}}
	if len(required) > 0 {
		out.set("required", required)
	}
	out.set("additionalProperties", false)
	return out
}

func (g *generator) fields(t reflect.Type, properties *object, required *[]string) {
	for i := range t.NumField() {
		f := t.Field(i)
		tag := f.Tag.Get("json")
		if f.Anonymous && tag == "" {
			g.fields(f.Type, properties, required)
			continue
		}
		name, options, _ := strings.Cut(tag, ",")
		if !f.IsExported() || name == "-" {
			continue
		}
		if name == "" {
			name = f.Name
		}
		optional := strings.Contains(options, "omitempty") || strings.Contains(options, "omitzero")
		properties.set(name, g.field(t, f, name))
		if !optional || g.Style == ForDossier {
			*required = append(*required, name)
		}
	}
}

// field gives the schema of one field: the description first, then what it can hold.
func (g *generator) field(t reflect.Type, f reflect.StructField, name string) object {
	value := g.value(f.Type, name)
	if own, ok := g.Fields[t.Name()+"."+name]; ok {
		value = fromPlain(own)
	}
	var out object
	if doc := f.Tag.Get("doc"); doc != "" {
		out.set("description", doc)
	}
	for _, m := range value {
		if m.key != "description" || out.get("description") == nil {
			out.set(m.key, m.value)
		}
	}
	if words := f.Tag.Get("enum"); words != "" {
		var list []any
		for _, word := range strings.Split(words, "|") {
			list = append(list, word)
		}
		if g.Style == ForDossier {
			list = append(list, nil)
		}
		out.drop("minLength")
		out.set("enum", list)
	}
	if format := f.Tag.Get("format"); format != "" {
		out.drop("minLength")
		out.set("format", format)
	}
	return out
}
