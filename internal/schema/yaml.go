package schema

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
)

// Bounds of a YAML document. Aliases can make a small file very large.
const (
	maxDepth  = 64
	maxValues = 200_000
)

// YAML reads the one document of a YAML file and checks it against the schema of that name. The value is
// JSON-shaped: maps with text keys, lists, texts, json.Number, bool and nil. Dates stay texts. It is nil
// if the YAML itself cannot be read.
func YAML(name, file string, data []byte) (any, diag.List) {
	value, _, problems := YAMLPlaces(name, file, data)
	return value, problems
}

// Places tells where the values and keys of a YAML document stand, by JSON pointer.
type Places struct{ p *places }

// Value gives the place of a value.
func (p *Places) Value(pointer string) diag.Position { return p.p.value(pointer) }

// Key gives the place of a key, or of the value where it has none.
func (p *Places) Key(pointer string) diag.Position { return p.p.key(pointer) }

// YAMLPlaces is YAML and tells where everything stands. Without a name it checks against no schema.
func YAMLPlaces(name, file string, data []byte) (any, *Places, diag.List) {
	value, places, problems := readYAML(file, data)
	if problems.Failed() {
		return nil, nil, problems
	}
	if name == "" {
		return value, &Places{places}, problems
	}
	found := validate(name, value, places.value, places.key)
	for i := range found {
		if found[i].Position.File == "" {
			found[i].Position.File = file
		}
	}
	return value, &Places{places}, append(problems, found...)
}

// places tells where the values and keys of a document stand, by JSON pointer.
type places struct {
	file   string
	values map[string]diag.Position
	keys   map[string]diag.Position
}

func (p *places) value(pointer string) diag.Position { return p.values[pointer] }

func (p *places) key(pointer string) diag.Position {
	if at, ok := p.keys[pointer]; ok {
		return at
	}
	return p.values[pointer]
}

type yamlReader struct {
	places
	problems diag.List
	count    int
}

func readYAML(file string, data []byte) (any, *places, diag.List) {
	r := &yamlReader{places: places{file: file, values: map[string]diag.Position{}, keys: map[string]diag.Position{}}}
	root := r.document(data)
	if root == nil {
		return nil, &r.places, r.problems
	}
	value := r.read(root, "", 0)
	r.problems.Sort()
	return value, &r.places, r.problems
}

// document gives the top node of the only document, or nil with an error among the problems.
func (r *yamlReader) document(data []byte) *yaml.Node {
	at := diag.Position{File: r.file}
	if !utf8.Valid(data) || bytes.IndexByte(data, 0) >= 0 {
		r.problems.Errorf(at, "Save the file as UTF-8", "the file is not UTF-8 text")
		return nil
	}
	decoder := yaml.NewDecoder(bytes.NewReader(data))
	var first, second yaml.Node
	switch err := decoder.Decode(&first); {
	case errors.Is(err, io.EOF) || err == nil && len(first.Content) == 0:
		r.problems.Errorf(at, "Fill it in or remove it", "the file is empty")
		return nil
	case err != nil:
		r.syntax(err)
		return nil
	}
	switch err := decoder.Decode(&second); {
	case err == nil:
		r.problems.Errorf(r.at(&second), "Keep one document to a file", "the file holds a second YAML document")
		return nil
	case !errors.Is(err, io.EOF):
		r.syntax(err)
		return nil
	}
	return first.Content[0]
}

var yamlPrefix = regexp.MustCompile(`^yaml: (?:line (\d+): )?`)

func (r *yamlReader) syntax(err error) {
	at, message := diag.Position{File: r.file}, err.Error()
	if m := yamlPrefix.FindStringSubmatch(message); m != nil {
		at.Line, _ = strconv.Atoi(m[1])
		message = message[len(m[0]):]
	}
	r.problems.Errorf(at, "Check indentation, quotes and brackets here and in the line before", "the YAML cannot be read: %s", message)
}

func (r *yamlReader) at(n *yaml.Node) diag.Position {
	return diag.Position{File: r.file, Line: n.Line, Column: n.Column}
}

func (r *yamlReader) read(n *yaml.Node, pointer string, depth int) any {
	if _, ok := r.values[pointer]; !ok {
		r.values[pointer] = r.at(n)
	}
	if n.Kind == yaml.AliasNode {
		n = n.Alias
	}
	if r.count++; depth > maxDepth || r.count > maxValues {
		if r.count <= maxValues+1 {
			r.problems.Errorf(r.at(n), "Split the file, and do without aliases", "the file is too large or too deeply nested")
		}
		return nil
	}
	switch n.Kind {
	case yaml.SequenceNode:
		list := make([]any, len(n.Content))
		for i, item := range n.Content {
			list[i] = r.read(item, pointer+"/"+strconv.Itoa(i), depth+1)
		}
		return list
	case yaml.MappingNode:
		return r.mapping(n, pointer, depth)
	}
	return r.scalar(n)
}

func (r *yamlReader) mapping(n *yaml.Node, pointer string, depth int) any {
	m := make(map[string]any, len(n.Content)/2)
	for i := 0; i+1 < len(n.Content); i += 2 {
		key, value := n.Content[i], n.Content[i+1]
		inner := pointer + "/" + escape(key.Value)
		switch _, double := m[key.Value]; {
		case key.Kind != yaml.ScalarNode || key.ShortTag() == "!!merge":
			r.problems.Errorf(r.at(key), "Write a word and a colon", "a key must be a single word")
			continue
		case double:
			r.problems.Errorf(r.at(key), "Keep one of the two", "the key %q stands twice; the first is in line %d", key.Value, r.keys[inner].Line)
			continue
		}
		r.keys[inner] = r.at(key)
		m[key.Value] = r.read(value, inner, depth+1)
	}
	return m
}

var jsonNumber = regexp.MustCompile(`^-?(0|[1-9][0-9]*)(\.[0-9]+)?([eE][+-]?[0-9]+)?$`)

func (r *yamlReader) scalar(n *yaml.Node) any {
	switch tag := n.ShortTag(); tag {
	case "!!null":
		return nil
	case "!!bool":
		return strings.EqualFold(n.Value, "true")
	case "!!int", "!!float":
		if !jsonNumber.MatchString(n.Value) {
			r.problems.Errorf(r.at(n), "Write plain digits such as 85 or 12.5, or put a text in quotes", "%q is not a plain number", n.Value)
			return nil
		}
		return json.Number(n.Value)
	case "!!str", "!!timestamp":
	default:
		r.problems.Errorf(r.at(n), "Remove the tag", "the YAML tag %s is not known here", tag)
	}
	return n.Value
}

// escape writes a key as a token of a JSON pointer.
func escape(key string) string {
	return strings.NewReplacer("~", "~0", "/", "~1").Replace(key)
}
