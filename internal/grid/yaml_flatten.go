package grid

import (
	"encoding/json"
	"strings"

	"gopkg.in/yaml.v3"
)

// flatten adds the members of a mapping.
func (y *yamlList) flatten(o *object, n *yaml.Node, outer string, depth int) *Fault {
	if depth == maxDepth {
		return faultf("Write each record as one object with its fields as keys", "objects stand within objects %d times", maxDepth)
	}
	members, f := y.members(n, depth)
	for _, m := range members {
		key, value := outer+m.key, follow(m.value)
		switch {
		case f != nil:
		case value.Kind == yaml.MappingNode:
			f = y.flatten(o, value, key+".", depth+1)
		case value.Kind == yaml.SequenceNode:
			var c Cell
			if c, f = y.listCell(value); f == nil {
				f = o.add(key, c)
			}
		default:
			f = o.add(key, yamlCell(value))
		}
	}
	return f
}

type yamlMember struct {
	key   string
	value *yaml.Node
}

// members gives the members of a mapping. Those of merged mappings (<<) follow, unless the mapping or a merged
// one before has their key.
func (y *yamlList) members(n *yaml.Node, depth int) (out []yamlMember, f *Fault) {
	if y.nodes += len(n.Content) + 1; y.nodes > maxNodes || depth > maxDepth {
		return nil, bomb()
	}
	var merged []*yaml.Node
	for i := 0; i+1 < len(n.Content); i += 2 {
		key, value := follow(n.Content[i]), n.Content[i+1]
		switch {
		case key.Kind != yaml.ScalarNode:
			return nil, faultf("Write a single word as key", "a key of the object is no single value")
		case key.ShortTag() == "!!merge":
			if value = follow(value); value.Kind == yaml.SequenceNode {
				merged = append(merged, value.Content...)
			} else {
				merged = append(merged, value)
			}
		default:
			out = append(out, yamlMember{key.Value, value})
		}
	}
	if len(merged) == 0 {
		return out, nil
	}
	known := map[string]bool{}
	for _, m := range out {
		known[m.key] = true
	}
	for _, other := range merged {
		if other = follow(other); other.Kind != yaml.MappingNode {
			return nil, faultf("Write an alias of an object behind <<", "what is merged by << is no object")
		}
		more, f := y.members(other, depth+1)
		if f != nil {
			return nil, f
		}
		for _, m := range more {
			if !known[m.key] {
				known[m.key] = true
				out = append(out, m)
			}
		}
	}
	return out, nil
}

func (y *yamlList) listCell(n *yaml.Node) (Cell, *Fault) {
	if y.nodes += len(n.Content) + 1; y.nodes > maxNodes {
		return Cell{}, bomb()
	}
	items := make([]Cell, len(n.Content))
	for i, item := range n.Content {
		items[i] = nested
		if item = follow(item); item.Kind == yaml.ScalarNode {
			items[i] = yamlCell(item)
		}
	}
	return joined(items, true), nil
}

// yamlCell gives the cell of a single value.
func yamlCell(n *yaml.Node) Cell {
	switch n.ShortTag() {
	case "!!null":
		return Cell{}
	case "!!bool":
		return Cell{Text: strings.ToLower(n.Value), Kind: Bool}
	case "!!int", "!!float":
		if json.Valid([]byte(n.Value)) {
			return Cell{Text: n.Value, Kind: Number}
		}
	}
	return Cell{Text: n.Value}
}
