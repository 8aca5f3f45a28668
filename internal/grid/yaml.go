package grid

import (
	"bytes"
	"io"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"
)

// Bounds of a YAML file, which is held in memory as a whole.
const (
	maxYAML   = 8 << 20    // bytes
	maxNodes  = 10_000     // values of one object, those of aliases counted each time
	maxValues = 10_000_000 // values of all objects
)

const asList = "Write the records as a list: one object a hyphen, with the fields as keys"

// yamlList gives the objects of a YAML list. Values stay as they are written: 00123, dates and no are texts.
type yamlList struct {
	text   *Decoded
	items  []*yaml.Node
	values int // of all objects so far
	nodes  int // of the current object
}

func newYAML(f *File, encoding string) (objectSource, error) {
	text, err := f.Text(encoding)
	if err != nil {
		return nil, err
	}
	b, err := io.ReadAll(io.LimitReader(text, maxYAML+1))
	switch {
	case err != nil:
		return nil, cannotRead(err)
	case len(b) > maxYAML:
		return nil, faultf("Write the records as CSV or NDJSON", "the YAML file is longer than %d MiB", maxYAML>>20)
	}
	root, err := parseYAML(b)
	if err != nil {
		return nil, err
	}
	y := &yamlList{text: text}
	y.items, err = listOf(root)
	return y, err
}

// parseYAML reads the only document.
func parseYAML(b []byte) (root *yaml.Node, err error) {
	defer func() {
		if recover() != nil { // the parser gives up on some texts
			root, err = nil, faultf("Check the file, or write the records as CSV", "the YAML cannot be read")
		}
	}()
	dec := yaml.NewDecoder(bytes.NewReader(b))
	var document, second yaml.Node
	switch err := dec.Decode(&document); {
	case err == io.EOF:
		return nil, faultf(asList, "the file is empty")
	case err != nil:
		return nil, brokenYAML(err)
	}
	if err := dec.Decode(&second); err == nil {
		f := faultf("Keep one list to a file", "the file holds several YAML documents")
		f.Line = second.Line
		return nil, f
	} else if err != io.EOF {
		return nil, brokenYAML(err)
	}
	return document.Content[0], nil
}

// brokenYAML moves the line from the parser's text to the fault.
func brokenYAML(err error) *Fault {
	text := strings.TrimPrefix(err.Error(), "yaml: ")
	f := faultf("Check the indentation there, and put texts with signs in quotes", "the YAML is broken")
	if rest, ok := strings.CutPrefix(text, "line "); ok {
		number, what, _ := strings.Cut(rest, ": ")
		f.Line, _ = strconv.Atoi(number)
		text = what
	}
	if text != "" {
		f.Problem += ": " + text
	}
	return f
}

// listOf gives the items of a list, or of the only list of objects in an object.
func listOf(root *yaml.Node) ([]*yaml.Node, error) {
	root = follow(root)
	switch {
	case root.Kind == yaml.SequenceNode:
		return root.Content, nil
	case root.Kind == yaml.ScalarNode && root.ShortTag() == "!!null":
		return nil, faultf(asList, "the file is empty")
	case root.Kind != yaml.MappingNode:
		return nil, faultf(asList, "the file does not hold a YAML list")
	}
	var found, names []string
	var items []*yaml.Node
	for i := 0; i+1 < len(root.Content); i += 2 {
		key, value := root.Content[i], follow(root.Content[i+1])
		if value.Kind != yaml.SequenceNode {
			continue
		}
		if len(value.Content) > 0 && follow(value.Content[0]).Kind == yaml.MappingNode {
			found, items = append(found, key.Value), value.Content
		} else if len(value.Content) == 0 {
			names = append(names, key.Value)
		}
	}
	switch {
	case len(found) > 1:
		return nil, faultf("Put the records of each list into a file of their own", "the object holds several lists: %s", shorten(strings.Join(found, ", ")))
	case len(found) == 0 && len(names) != 1:
		return nil, faultf(asList, "the object of the file holds no list of objects")
	}
	return items, nil
}

// follow gives what an alias stands for.
func follow(n *yaml.Node) *yaml.Node {
	if n.Kind == yaml.AliasNode {
		return n.Alias
	}
	return n
}

func (y *yamlList) next(o *object) error {
	if len(y.items) == 0 {
		return io.EOF
	}
	if y.values > maxValues {
		f := bomb()
		f.Line = y.items[0].Line
		return f
	}
	item := y.items[0]
	y.items = y.items[1:]
	o.reset(item.Line)
	y.nodes = 0
	n := follow(item)
	switch {
	case n.Kind == yaml.MappingNode:
		o.fail(y.flatten(o, n, "", 0))
	case n.Kind != yaml.ScalarNode || n.ShortTag() != "!!null":
		o.fail(faultf("Write an object with the fields as keys", "the item of the list is no object"))
	}
	y.values += y.nodes
	return nil
}

func bomb() *Fault {
	return faultf("Write the values out in place of the aliases", "the aliases of the YAML stand for too many values")
}

func (y *yamlList) about() About {
	a := y.text.About()
	a.Format = YAML
	return a
}
