// Package schema turns Go types into JSON Schemas (2020-12) and checks data against them. The types that
// hearduty works with are the single source: a schema is generated from the struct tags and can never
// say anything else. The published schemas stand in the folder schemas.
package schema

import (
	"bytes"
	"encoding/json"
	"slices"
)

// member is one key of an object with its value.
type member struct {
	key   string
	value any
}

// object is a JSON object that keeps the order of its keys, so that a schema reads like the Go type.
type object []member

func (o *object) set(key string, value any) {
	for i := range *o {
		if (*o)[i].key == key {
			(*o)[i].value = value
			return
		}
	}
	*o = append(*o, member{key, value})
}

func (o object) get(key string) any {
	for _, m := range o {
		if m.key == key {
			return m.value
		}
	}
	return nil
}

func (o *object) drop(key string) {
	*o = slices.DeleteFunc(*o, func(m member) bool { return m.key == key })
}

// MarshalJSON writes the keys in their order.
func (o object) MarshalJSON() ([]byte, error) {
	var b bytes.Buffer
	b.WriteByte('{')
	for i, m := range o {
		if i > 0 {
			b.WriteByte(',')
		}
		key, err := marshal(m.key)
		if err != nil {
			return nil, err
		}
		value, err := marshal(m.value)
		if err != nil {
			return nil, err
		}
		b.Write(key)
		b.WriteByte(':')
		b.Write(value)
	}
	b.WriteByte('}')
	return b.Bytes(), nil
}

// marshal leaves <, > and & as they are.
func marshal(v any) ([]byte, error) {
	var b bytes.Buffer
	e := json.NewEncoder(&b)
	e.SetEscapeHTML(false)
	err := e.Encode(v)
	return bytes.TrimSuffix(b.Bytes(), []byte("\n")), err
}

// text writes a schema as an indented JSON text. Values of a schema are plain, so that it cannot fail.
func text(o object) []byte {
	compact, err := marshal(o)
	if err != nil {
		panic("schema: " + err.Error())
	}
	var b bytes.Buffer
	if err := json.Indent(&b, compact, "", "  "); err != nil {
		panic("schema: " + err.Error())
	}
	b.WriteByte('\n')
	return b.Bytes()
}

// plain gives a schema as the maps and lists that JSON Schema libraries take.
func plain(o object) map[string]any {
	var m map[string]any
	if err := json.Unmarshal(text(o), &m); err != nil {
		panic("schema: " + err.Error())
	}
	return m
}
