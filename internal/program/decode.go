package program

import (
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
)

// decoder turns YAML nodes into values and notes each mistake with its place. Scalars are read as the
// text that stands in the file, so that the id 007 stays 007 and no stays no.
type decoder struct {
	file   string
	diags  *diag.List
	values int // values read within choices so far

	members map[[2]string]bool // files in archives that the records name one by one
}

func (d *decoder) at(n *yaml.Node) diag.Position {
	return diag.Position{File: d.file, Line: n.Line, Column: n.Column}
}

// resolve follows an alias to its anchor.
func resolve(n *yaml.Node) *yaml.Node {
	if n.Kind == yaml.AliasNode {
		return n.Alias
	}
	return n
}

func kindName(n *yaml.Node) string {
	switch n.Kind {
	case yaml.MappingNode:
		return "a mapping"
	case yaml.SequenceNode:
		return "a list"
	}
	if n.Tag == "!!null" {
		return "empty"
	}
	return "a single value"
}

// mapping gives the values of a mapping by key. Unknown and repeated keys are mistakes.
func (d *decoder) mapping(n *yaml.Node, what string, keys ...string) (map[string]*yaml.Node, bool) {
	n = resolve(n)
	if n.Kind != yaml.MappingNode {
		d.diags.Errorf(d.at(n), "Write it as keys with values: "+strings.Join(keys, ", "), "%s is %s, not a mapping", what, kindName(n))
		return nil, false
	}
	values := map[string]*yaml.Node{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		key, value := n.Content[i], n.Content[i+1]
		switch {
		case key.Kind != yaml.ScalarNode || !contains(keys, key.Value):
			d.diags.Errorf(d.at(key), suggest(key.Value, keys, "keys"), "%s has no key %q", what, key.Value)
		case values[key.Value] != nil:
			d.diags.Errorf(d.at(key), "Keep one of the two", "%s has the key %q twice", what, key.Value)
		default:
			values[key.Value] = value
		}
	}
	return values, true
}

// text gives the text of a single value that is not empty. A missing node gives an empty text.
func (d *decoder) text(n *yaml.Node, what string) string {
	if n == nil {
		return ""
	}
	n = resolve(n)
	if n.Kind != yaml.ScalarNode {
		d.diags.Errorf(d.at(n), "Write a single value", "%s is %s, not a single value", what, kindName(n))
		return ""
	}
	if n.Tag == "!!null" || strings.TrimSpace(n.Value) == "" {
		d.diags.Errorf(d.at(n), "Fill it in or remove the key", "%s is empty", what)
		return ""
	}
	return strings.TrimSpace(n.Value)
}

// needText is text for a key that must be there.
func (d *decoder) needText(parent *yaml.Node, values map[string]*yaml.Node, key, what string) string {
	if values[key] == nil {
		d.diags.Errorf(d.at(resolve(parent)), "Add the key "+key, "%s has no %s", what, key)
		return ""
	}
	return d.text(values[key], key+" of "+what)
}

// day gives the date of a single value.
func (d *decoder) day(n *yaml.Node, what string) calendar.Date {
	text := d.text(n, what)
	if text == "" {
		return 0
	}
	day, err := calendar.Parse(text)
	if err != nil {
		d.diags.Errorf(d.at(n), "Write a day of the calendar as YYYY-MM-DD", "%s: %v", what, err)
	}
	return day
}

// needList gives the items of a list that must be there and must not be empty.
func (d *decoder) needList(parent *yaml.Node, values map[string]*yaml.Node, key, what string) []*yaml.Node {
	if values[key] == nil {
		d.diags.Errorf(d.at(resolve(parent)), "Add the key "+key+" with a list", "%s has no %s", what, key)
		return nil
	}
	n := resolve(values[key])
	if n.Kind != yaml.SequenceNode {
		d.diags.Errorf(d.at(n), "Write a list: one item a line after a hyphen, or in square brackets", "%s of %s is %s, not a list", key, what, kindName(n))
		return nil
	}
	if len(n.Content) == 0 {
		d.diags.Errorf(d.at(n), "Name one at least", "%s of %s is an empty list", key, what)
	}
	return n.Content
}

// Bounds of the lists and mappings within choices. Aliases can make a small file very large.
const (
	maxDepth  = 8
	maxValues = 10000
)

// value gives any YAML value. Dates stay texts; only true, false and numbers are not.
func (d *decoder) value(n *yaml.Node, depth int) any {
	n = resolve(n)
	if d.values++; depth > maxDepth || d.values > maxValues {
		if d.values <= maxValues+1 {
			d.diags.Errorf(d.at(n), "Write single values", "the choices are too large or too deeply nested")
		}
		return nil
	}
	switch n.Kind {
	case yaml.SequenceNode:
		list := make([]any, len(n.Content))
		for i, item := range n.Content {
			list[i] = d.value(item, depth+1)
		}
		return list
	case yaml.MappingNode:
		m := map[string]any{}
		for i := 0; i+1 < len(n.Content); i += 2 {
			key := n.Content[i]
			if _, double := m[key.Value]; double {
				d.diags.Errorf(d.at(key), "Keep one of the two", "the key %q stands twice", key.Value)
			}
			m[key.Value] = d.value(n.Content[i+1], depth+1)
		}
		return m
	}
	switch n.Tag {
	case "!!null":
		return nil
	case "!!bool", "!!int", "!!float":
		var v any
		if n.Decode(&v) == nil {
			return v
		}
	}
	return n.Value
}
