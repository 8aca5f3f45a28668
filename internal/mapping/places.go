package mapping

import (
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
)

// places tells where the keys and values of a map stand, by JSON pointer.
type places struct {
	file   string
	keys   map[string]diag.Position
	values map[string]diag.Position
}

// findPlaces goes through a text that was read as YAML before.
func findPlaces(text []byte, file string) *places {
	p := &places{file, map[string]diag.Position{}, map[string]diag.Position{}}
	var document yaml.Node
	if err := yaml.Unmarshal(text, &document); err == nil && len(document.Content) > 0 {
		p.walk(document.Content[0], "")
	}
	return p
}

func (p *places) walk(n *yaml.Node, pointer string) {
	p.values[pointer] = p.of(n)
	if n.Kind == yaml.AliasNode {
		n = n.Alias
	}
	switch n.Kind {
	case yaml.SequenceNode:
		for i, item := range n.Content {
			p.walk(item, pointer+"/"+strconv.Itoa(i))
		}
	case yaml.MappingNode:
		for i := 0; i+1 < len(n.Content); i += 2 {
			inner := pointer + "/" + token(n.Content[i].Value)
			p.keys[inner] = p.of(n.Content[i])
			p.walk(n.Content[i+1], inner)
		}
	}
}

func (p *places) of(n *yaml.Node) diag.Position {
	return diag.Position{File: p.file, Line: n.Line, Column: n.Column}
}

// token writes a key as a token of a JSON pointer.
func token(key string) string {
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(key)
}

// value gives the place of a value, or of what holds it where it is written in short form or not at all.
func (p *places) value(pointer string) diag.Position {
	if p == nil {
		return diag.Position{}
	}
	for {
		if at, ok := p.values[pointer]; ok {
			return at
		}
		cut := strings.LastIndexByte(pointer, '/')
		if cut < 0 {
			return diag.Position{File: p.file}
		}
		pointer = pointer[:cut]
	}
}

// key gives the place of a key.
func (p *places) key(pointer string) diag.Position {
	if p != nil {
		if at, ok := p.keys[pointer]; ok {
			return at
		}
	}
	return p.value(pointer)
}
