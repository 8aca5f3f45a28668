package schema

import (
	"fmt"
	"reflect"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Style says what the data looks like that a schema describes.
type Style uint8

// The styles.
const (
	// ForReport is what hearduty writes: every key is there, lists and maps are never null.
	ForReport Style = iota
	// ForFile is what people write: keys may be left out if the type says so, texts are not empty.
	ForFile
	// ForDossier is the input of the rules: every key is there, and what is not known is null.
	ForDossier
)

// Options say how a Go type becomes a schema.
type Options struct {
	Title       string
	Description string
	Style       Style
	// Keys gives the keys of maps whose keys are known, by the JSON name of the map.
	Keys map[string][]string
	// Fields replaces the schema of a field, by Go type and JSON name, such as "Value.value". The
	// description is kept.
	Fields map[string]map[string]any
	// Types replaces the schema of a named Go type, by its name, such as "Status".
	Types map[string]map[string]any
}

const draft = "https://json-schema.org/draft/2020-12/schema"

// Of gives the JSON Schema of the type of v as text. Type names of the structs become the names of its
// definitions, and the tags json, doc, enum and format say the rest.
func Of(v any, o Options) []byte { return text(of(v, o)) }

func of(v any, o Options) object {
	g := &generator{Options: o, defs: map[string]object{}}
	root := g.value(reflect.TypeOf(v), "")
	if name, ok := root.get("$ref").(string); ok {
		name = strings.TrimPrefix(name, "#/$defs/")
		root = g.defs[name]
		delete(g.defs, name)
	}
	out := object{{"$schema", draft}}
	if o.Title != "" {
		out.set("title", o.Title)
	}
	if o.Description != "" {
		out.set("description", o.Description)
	}
	for _, m := range root {
		out.set(m.key, m.value)
	}
	if len(g.defs) > 0 {
		var defs object
		names := make([]string, 0, len(g.defs))
		for name := range g.defs {
			names = append(names, name)
		}
		slices.Sort(names)
		for _, name := range names {
			defs.set(name, g.defs[name])
		}
		out.set("$defs", defs)
	}
	return out
}

type generator struct {
	Options
	defs map[string]object
}

// value gives the schema of a type. The name is the JSON name of the field that holds it.
func (g *generator) value(t reflect.Type, name string) object {
	if special, ok := g.special(t); ok {
		return special
	}
	switch t.Kind() {
	case reflect.Pointer:
		return g.pointer(t.Elem(), name)
	case reflect.Struct:
		return g.ref(t, false)
	case reflect.Map:
		return g.mapping(t, name)
	case reflect.Slice, reflect.Array:
		return object{{"type", "array"}, {"items", g.value(t.Elem(), name)}}
	case reflect.String:
		return g.textual()
	case reflect.Bool:
		return object{{"type", "boolean"}}
	case reflect.Float64, reflect.Float32:
		return object{{"type", "number"}}
	case reflect.Interface:
		return object{}
	}
	if t.Kind() >= reflect.Int && t.Kind() <= reflect.Uint64 {
		return object{{"type", "integer"}}
	}
	panic(fmt.Sprintf("schema: the type %s has no JSON Schema", t))
}

func (g *generator) textual() object {
	switch g.Style {
	case ForDossier:
		return object{{"type", []string{"string", "null"}}}
	case ForFile:
		return object{{"type", "string"}, {"minLength", 1}}
	}
	return object{{"type", "string"}}
}

// special gives the schema of the types that have a JSON form of their own.
func (g *generator) special(t reflect.Type) (object, bool) {
	if own, ok := g.Types[t.Name()]; ok {
		return fromPlain(own), true
	}
	switch reflect.Zero(t).Interface().(type) {
	case calendar.Date:
		if g.Style == ForFile {
			return object{{"type", "string"}, {"format", "date"}}, true
		}
		return object{{"type", []string{"string", "null"}}, {"format", "date"}}, true
	case record.Number:
		return object{{"type", []string{"number", "null"}}}, true
	case record.Answer:
		return object{{"type", []string{"boolean", "null"}}}, true
	case calendar.Interval:
		return interval(), true
	}
	return nil, false
}

// interval is the schema of an interval: one unit and a whole number of it.
func interval() object {
	var units object
	for _, u := range []calendar.Unit{calendar.Days, calendar.WorkingDays, calendar.Months, calendar.Years, calendar.CalendarYears} {
		units.set(string(u), object{{"type", "integer"}, {"minimum", 0}})
	}
	return object{{"type", "object"}, {"description", "an interval: one unit and a whole number of it, such as {days: 21}"},
		{"properties", units}, {"additionalProperties", false}, {"minProperties", 1}, {"maxProperties", 1}}
}

func (g *generator) pointer(t reflect.Type, name string) object {
	if g.Style == ForDossier && t.Kind() == reflect.Struct {
		if _, special := g.special(t); !special {
			return g.ref(t, true)
		}
	}
	return g.value(t, name)
}

// ref puts a struct type among the definitions and gives a reference to it. A reference cannot be null
// beside what it refers to, hence a definition of its own for what may be null.
func (g *generator) ref(t reflect.Type, null bool) object {
	name := t.Name()
	if null {
		name += "OrNull"
	}
	if _, ok := g.defs[name]; !ok {
		g.defs[name] = nil // while it is being made
		def := g.structure(t)
		if null {
			def.set("type", []string{"object", "null"})
		}
		g.defs[name] = def
	}
	return object{{"$ref", "#/$defs/" + name}}
}

func (g *generator) mapping(t reflect.Type, name string) object {
	if keys, ok := g.Keys[name]; ok {
		var properties object
		for _, key := range keys {
			properties.set(key, g.value(t.Elem(), ""))
		}
		return object{{"type", "object"}, {"properties", properties}, {"required", keys}, {"additionalProperties", false}}
	}
	if element := g.value(t.Elem(), ""); len(element) > 0 {
		return object{{"type", "object"}, {"additionalProperties", element}}
	}
	return object{{"type", "object"}}
}

func fromPlain(m map[string]any) object {
	keys := make([]string, 0, len(m))
	for key := range m {
		keys = append(keys, key)
	}
	slices.Sort(keys)
	var o object
	for _, key := range keys {
		o.set(key, m[key])
	}
	return o
}

// Interval gives the schema of an interval, for use in Options.
func Interval() map[string]any { return plain(interval()) }
