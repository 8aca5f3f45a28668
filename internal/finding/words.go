package finding

import (
	"encoding/json"
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"
)

// ParameterFact is a fact that is a parameter of the law with its value on the day.
type ParameterFact struct {
	Value            any
	Unit, Cite, Seen string
}

// AsParameter tells whether a fact is a parameter.
func AsParameter(fact any) (ParameterFact, bool) {
	m, ok := fact.(map[string]any)
	if !ok {
		return ParameterFact{}, false
	}
	seen, hasSeen := m["seen"].(string)
	value, hasValue := m["value"]
	if !hasSeen || !hasValue {
		return ParameterFact{}, false
	}
	unit, _ := m["unit"].(string)
	cite, _ := m["cite"].(string)
	return ParameterFact{value, unit, cite, seen}, true
}

// String writes the value with its unit.
func (v ParameterFact) String() string {
	return strings.TrimSpace(Words(v.Value) + " " + v.Unit)
}

// Words writes a value as people would: an interval in words, a list with commas.
func Words(v any) string {
	switch v := v.(type) {
	case nil:
		return "not known"
	case string:
		return v
	case bool:
		return map[bool]string{true: "yes", false: "no"}[v]
	case []any:
		if len(v) == 0 {
			return "none"
		}
		parts := make([]string, len(v))
		for i, x := range v {
			parts[i] = Words(x)
		}
		return strings.Join(parts, ", ")
	case []string:
		if len(v) == 0 {
			return "none"
		}
		return strings.Join(v, ", ")
	case map[string]any:
		var parts []string
		for _, key := range slices.Sorted(maps.Keys(v)) {
			parts = append(parts, Words(v[key])+" "+strings.ReplaceAll(key, "_", " "))
		}
		return strings.Join(parts, ", ")
	case float64, json.Number, int:
		return number(v)
	}
	text, err := json.Marshal(v)
	if err != nil {
		return fmt.Sprint(v)
	}
	return string(text)
}

func number(v any) string {
	if f, ok := v.(float64); ok {
		return strconv.FormatFloat(math.Round(f*1e4)/1e4, 'f', -1, 64)
	}
	return fmt.Sprint(v)
}

// Pairs writes named values in order of name.
func Pairs(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		name, value := Named(key, m[key])
		parts = append(parts, name+" "+value)
	}
	return strings.Join(parts, "; ")
}

// plainNames are the names of facts that every bundle has, in words that say more.
var plainNames = map[string]string{
	"tests_touched": "tests made after the last day", "days_touched": "days with such tests",
	"not_due_before": "not due before", "counted_from": "time counted from",
}

// unitOf gives the unit that the end of a fact's name tells.
var unitOf = []struct{ ending, unit string }{
	{"_dba", "dBA"}, {"_dbc", "dBC"}, {"_db", "dB"}, {"_pct", "%"}, {"_hz", "Hz"}, {"_hours", "h"}, {"_minutes", "min"},
}

// Named gives the name of a fact in words, and its value with the unit that stands in the name.
func Named(key string, value any) (name, text string) {
	text = Words(value)
	if name, ok := plainNames[key]; ok {
		return name, text
	}
	for _, u := range unitOf {
		base, ok := strings.CutSuffix(key, u.ending)
		if !ok || base == "" {
			continue
		}
		if _, isText := value.(string); value != nil && !isText && text != "none" {
			text += " " + u.unit
		}
		return strings.ReplaceAll(base, "_", " "), text
	}
	return strings.ReplaceAll(key, "_", " "), text
}
