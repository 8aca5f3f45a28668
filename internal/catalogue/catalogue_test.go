package catalogue

import (
	"bytes"
	"slices"
	"testing"

	"github.com/santhosh-tekuri/jsonschema/v6"

	"hearduty/schemas"
)

func TestPublishedSchemasAreCurrent(t *testing.T) {
	var made []string
	for _, entry := range All() {
		made = append(made, entry.Name)
		published, err := schemas.Text(entry.Name)
		if err != nil || !bytes.Equal(published, entry.Text) {
			t.Errorf("schemas/%s.schema.json is stale: run go generate ./schemas", entry.Name)
		}
	}
	for _, name := range schemas.Names() {
		if !slices.Contains(made, name) {
			t.Errorf("schemas/%s.schema.json is made from nothing: remove it", name)
		}
	}
}

func TestSchemasAreValid(t *testing.T) {
	for _, entry := range All() {
		root, err := jsonschema.UnmarshalJSON(bytes.NewReader(entry.Text))
		if err != nil {
			t.Fatalf("%s: %v", entry.Name, err)
		}
		c := jsonschema.NewCompiler()
		if err := c.AddResource("mem:///"+entry.Name, root); err != nil {
			t.Fatalf("%s: %v", entry.Name, err)
		}
		if _, err := c.Compile("mem:///" + entry.Name); err != nil {
			t.Errorf("%s: %v", entry.Name, err)
		}
	}
}
