package text

import (
	"encoding/json"
	"fmt"
	"maps"
	"math"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/finding"
)

// parameter is a fact that is a parameter of the law with its value on the day.
type parameter struct {
	value any
	unit  string
	cite  string
	seen  string
}

// asParameter tells whether a fact is a parameter.
func asParameter(fact any) (parameter, bool) {
	m, ok := fact.(map[string]any)
	if !ok {
		return parameter{}, false
	}
	seen, hasSeen := m["seen"].(string)
	value, hasValue := m["value"]
	if !hasSeen || !hasValue {
		return parameter{}, false
	}
	unit, _ := m["unit"].(string)
	cite, _ := m["cite"].(string)
	return parameter{value, unit, cite, seen}, true
}

func (v parameter) String() string {
	return strings.TrimSpace(words(v.value) + " " + v.unit)
}

// words writes a value as people would: an interval in words, a list with commas.
func words(v any) string {
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
			parts[i] = words(x)
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
			parts = append(parts, words(v[key])+" "+strings.ReplaceAll(key, "_", " "))
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

// pairs writes named values in order of name.
func pairs(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		name, value := named(key, m[key])
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

// named gives the name of a fact in words, and its value with the unit that stands in the name.
func named(key string, value any) (name, text string) {
	text = words(value)
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

// choices writes what a site has elected, as it stands in the program file.
func choices(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		parts = append(parts, fmt.Sprintf("%s = %v", key, m[key]))
	}
	return strings.Join(parts, ", ")
}

// fromMemory lists the parameters that decide a listed finding and were not read in the law.
func fromMemory(p *page, r *finding.Report) {
	type used struct {
		parameter
		findings int
	}
	found := map[string]*used{}
	for i := range r.Findings {
		f := &r.Findings[i]
		for name, fact := range f.Facts {
			v, ok := asParameter(fact)
			if !ok || v.seen != "memory" {
				continue
			}
			key := f.Bundle + "\x00" + name + "\x00" + v.String() + "\x00" + v.cite
			if found[key] == nil {
				found[key] = &used{parameter: v}
			}
			found[key].findings++
		}
	}
	if len(found) == 0 {
		return
	}
	p.heading(yellow, "Not checked against the official text")
	p.para(0, 0, "These numbers were written from memory, and findings rest on them. Read the paragraph before you rely on one.")
	for _, key := range slices.Sorted(maps.Keys(found)) {
		u, name := found[key], strings.Split(key, "\x00")[1]
		p.item(0, "- ", fmt.Sprintf("%s = %s, %s (%s)", name, u.parameter, u.cite, count(u.findings, "listed finding", "listed findings")))
	}
}
