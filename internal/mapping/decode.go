package mapping

import (
	"encoding/json"
	"fmt"
	"math"
	"reflect"
	"strings"
)

// decode fills the form from a value that fits the schema.
func (f *File) decode(value any) error {
	fitted, err := json.Marshal(fit(value, reflect.TypeFor[File]()))
	if err != nil {
		return err
	}
	return json.Unmarshal(fitted, f)
}

// fit gives a value the form of a type: texts where numbers stand for words, and the long form where the short
// one is written.
func fit(v any, t reflect.Type) any {
	switch {
	case t.Kind() == reflect.Pointer:
		return fit(v, t.Elem())
	case t == reflect.TypeFor[Column]() && isScalar(v):
		return map[string]any{"column": []any{word(v)}}
	case t == reflect.TypeFor[Names]() && isScalar(v):
		return []any{word(v)}
	}
	switch t.Kind() {
	case reflect.String:
		return word(v)
	case reflect.Int:
		if n, ok := v.(json.Number); ok {
			return wholeNumber(n)
		}
	case reflect.Struct:
		return fitStruct(v, t)
	case reflect.Map:
		if m, ok := v.(map[string]any); ok {
			out := make(map[string]any, len(m))
			for key, inner := range m {
				out[key] = fit(inner, t.Elem())
			}
			return out
		}
	case reflect.Slice:
		if list, ok := v.([]any); ok {
			out := make([]any, len(list))
			for i, inner := range list {
				out[i] = fit(inner, t.Elem())
			}
			return out
		}
	}
	return v
}

func fitStruct(v any, t reflect.Type) any {
	m, ok := v.(map[string]any)
	if !ok {
		return v
	}
	out := make(map[string]any, len(m))
	for i := range t.NumField() {
		name, _, _ := strings.Cut(t.Field(i).Tag.Get("json"), ",")
		if inner, ok := m[name]; ok {
			out[name] = fit(inner, t.Field(i).Type)
		}
	}
	return out
}

func isScalar(v any) bool {
	switch v.(type) {
	case string, json.Number, bool:
		return true
	}
	return false
}

// word gives a single value as the text that stands in the map.
func word(v any) any {
	if isScalar(v) {
		return fmt.Sprint(v)
	}
	return v
}

// wholeNumber writes 1e3 as 1000.
func wholeNumber(n json.Number) any {
	if v, err := n.Float64(); err == nil && v == math.Trunc(v) && math.Abs(v) < 1<<53 {
		return int64(v)
	}
	return n
}
