package schema

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"
	"sync"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"hearduty/internal/diag"
	"hearduty/schemas"
)

// checker is a compiled schema with its text as data, from which the messages take their words.
type checker struct {
	schema *jsonschema.Schema
	root   any
}

var (
	checkersMutex sync.Mutex
	checkers      = map[string]*checker{}
)

// load compiles a published schema once. An unknown name is a mistake of the caller.
func load(name string) (*checker, error) {
	checkersMutex.Lock()
	defer checkersMutex.Unlock()
	if c, ok := checkers[name]; ok {
		return c, nil
	}
	content, err := schemas.Text(name)
	if err != nil {
		return nil, err
	}
	c, err := compileChecker(name, content)
	if err != nil {
		return nil, err
	}
	checkers[name] = c
	return c, nil
}

func compileChecker(name string, content []byte) (*checker, error) {
	root, err := jsonschema.UnmarshalJSON(bytes.NewReader(content))
	if err != nil {
		return nil, fmt.Errorf("the schema %s cannot be read: %w", name, err)
	}
	compiler := jsonschema.NewCompiler()
	compiler.AssertFormat()
	url := "mem:///" + name
	if err := compiler.AddResource(url, root); err != nil {
		return nil, fmt.Errorf("the schema %s cannot be used: %w", name, err)
	}
	s, err := compiler.Compile(url)
	if err != nil {
		return nil, fmt.Errorf("the schema %s cannot be used: %w", name, err)
	}
	return &checker{s, root}, nil
}

// Validate checks a JSON-shaped value against the published schema of that name. The diagnostics are in
// order of their place, which at gives for a JSON pointer; a missing key is reported at its object, an
// unknown key at its own pointer.
func Validate(name string, value any, at func(pointer string) diag.Position) diag.List {
	return validate(name, value, at, at)
}

func validate(name string, value any, at, atKey func(string) diag.Position) diag.List {
	var out diag.List
	c, err := load(name)
	if err != nil {
		out.Errorf(diag.Position{}, "Name one of "+strings.Join(schemas.Names(), ", "), "%v", err)
		return out
	}
	return c.check(value, at, atKey)
}

func (c *checker) check(value any, at, atKey func(string) diag.Position) diag.List {
	var out diag.List
	err := c.schema.Validate(value)
	failure, ok := err.(*jsonschema.ValidationError)
	if !ok {
		if err != nil {
			out.Errorf(at(""), "", "the value cannot be checked: %v", err)
		}
		return out
	}
	w := &wording{checker: c, value: value, at: at, atKey: atKey}
	w.explain(failure)
	out = w.out
	out.Sort()
	return dedupe(out)
}

func dedupe(l diag.List) diag.List {
	var out diag.List
	for i, d := range l {
		if i == 0 || d != l[i-1] {
			out = append(out, d)
		}
	}
	return out
}

// lookup follows a JSON pointer through maps and lists.
func lookup(root any, tokens []string) any {
	for _, token := range tokens {
		switch v := root.(type) {
		case map[string]any:
			root = v[token]
		case []any:
			var i int
			if err := json.Unmarshal([]byte(token), &i); err != nil || i < 0 || i >= len(v) {
				return nil
			}
			root = v[i]
		default:
			return nil
		}
	}
	return root
}

func pointerOf(tokens []string) string {
	var b strings.Builder
	for _, token := range tokens {
		b.WriteString("/" + escape(token))
	}
	return b.String()
}
