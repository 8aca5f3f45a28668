package rehearse

import (
	"bytes"
	"fmt"
	"path"
	"regexp"
	"strconv"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// lawCase is one case of a bundle's cases folder: records, and the findings that the law gives.
type lawCase struct {
	Case    string
	Source  string
	Like    yaml.Node
	AsOf    string `yaml:"as_of"`
	Choices map[string]any
	Records caseRecords
	Expect  []expected
	Nothing []string

	at        diag.Position   // of the case
	expectAt  []diag.Position // of each expectation
	nothingAt []diag.Position
}

// expected is a finding that a case wants.
type expected struct {
	Duty, Subject, Status, Due, Done string
	Key                              *string
	Only                             bool           // no other finding of the duty and subject
	Facts, Health                    map[string]any // what the finding's facts and audiometric figures hold, among others
}

// caseRecords are the records of a case by kind, as fields with their texts.
type caseRecords map[string][]map[string]yaml.Node

// baseFile is the file of a cases folder that holds what cases share.
const baseFile = "_base.yaml"

type base map[string]struct{ Records caseRecords }

// readBase reads what the cases share. A bundle may have none.
func (r *Result) readBase() base {
	out := base{}
	file := path.Join(r.Bundle.ID, "cases", baseFile)
	if text, ok := r.Bundle.Files[file]; ok {
		if err := strictly(text, &out); err != nil {
			r.yamlFailure(file, err)
		}
	}
	return out
}

// readCases reads the cases of a file with their places.
func (r *Result) readCases(file string) []lawCase {
	var cases []lawCase
	text := r.Bundle.Files[file]
	if err := strictly(text, &cases); err != nil {
		r.yamlFailure(file, err)
		return nil
	}
	var root yaml.Node
	if err := yaml.Unmarshal(text, &root); err != nil || len(root.Content) == 0 || len(root.Content[0].Content) != len(cases) {
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: file}, What: "the file holds no list of cases", Remedy: "Write each case as an item that begins with - case:"})
		return nil
	}
	place := func(n *yaml.Node) diag.Position { return diag.Position{File: file, Line: n.Line} }
	for i, n := range root.Content[0].Content {
		c := &cases[i]
		c.at = place(n)
		for j := 0; j+1 < len(n.Content); j += 2 {
			for _, item := range n.Content[j+1].Content {
				switch n.Content[j].Value {
				case "expect":
					c.expectAt = append(c.expectAt, place(item))
				case "nothing":
					c.nothingAt = append(c.nothingAt, place(item))
				}
			}
		}
	}
	return cases
}

// strictly reads YAML and refuses keys that there are not.
func strictly(text []byte, into any) error {
	decoder := yaml.NewDecoder(bytes.NewReader(text))
	decoder.KnownFields(true)
	return decoder.Decode(into)
}

// yamlLine is what the YAML reader says of one line; unknownKey and otherKind are how it names what it reads into.
var (
	yamlLine   = regexp.MustCompile(`line (\d+): (.*)`)
	unknownKey = regexp.MustCompile(`^field (.*) not found in type .*$`)
	otherKind  = regexp.MustCompile(`^cannot unmarshal (.*) into .*$`)
)

// yamlFailure tells what is wrong with a YAML file, line by line.
func (r *Result) yamlFailure(file string, err error) {
	lines := yamlLine.FindAllStringSubmatch(err.Error(), -1)
	if len(lines) == 0 {
		lines = [][]string{{"", "0", strings.TrimPrefix(err.Error(), "yaml: ")}}
	}
	for _, m := range lines {
		row, _ := strconv.Atoi(m[1])
		what := otherKind.ReplaceAllString(unknownKey.ReplaceAllString(m[2], "the key $1 is not known here"), "$1 cannot stand here")
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: file, Line: row}, What: "the law cases cannot be read: " + what, Remedy: "Check the key, its value and the indentation"})
	}
}

// records puts the records of a case behind those that it takes in by like, and reads them.
func (c *lawCase) records(shared base) ([]record.Record, error) {
	all := caseRecords{}
	add := func(more caseRecords) {
		for kind, list := range more {
			all[kind] = append(all[kind], list...)
		}
	}
	var like []string
	switch c.Like.Kind {
	case yaml.ScalarNode:
		like = []string{c.Like.Value}
	case yaml.SequenceNode:
		if err := c.Like.Decode(&like); err != nil {
			return nil, err
		}
	}
	for _, name := range like {
		entry, ok := shared[name]
		if !ok {
			return nil, fmt.Errorf("%s has no entry %q", baseFile, name)
		}
		add(entry.Records)
	}
	add(c.Records)
	var out []record.Record
	known := map[string]bool{}
	for _, kind := range record.Kinds() {
		known[string(kind)] = true
		for _, fields := range all[string(kind)] {
			rec, err := readRecord(kind, fields)
			if err != nil {
				return nil, err
			}
			out = append(out, rec)
		}
	}
	for kind := range all {
		if !known[kind] {
			return nil, fmt.Errorf("there is no record kind %q", kind)
		}
	}
	return out, nil
}

func readRecord(kind record.Kind, fields map[string]yaml.Node) (record.Record, error) {
	table, _ := record.TableOf(kind)
	rec := table.New()
	for name, node := range fields {
		i := table.Index(name)
		if i < 0 {
			remedy := ""
			if near := diag.Near(name, table.Names()); near != "" {
				remedy = fmt.Sprintf("; did you mean %q?", near)
			}
			return nil, fmt.Errorf("line %d: a %s has no field %q%s", node.Line, kind, name, remedy)
		}
		text := node.Value
		if node.Kind == yaml.SequenceNode {
			var words []string
			if err := node.Decode(&words); err != nil {
				return nil, err
			}
			text = strings.Join(words, ";")
		}
		if problem := table.Set(rec, i, text); problem != nil {
			return nil, fmt.Errorf("line %d: the field %s of a %s cannot be %q: %s", node.Line, name, kind, text, problem.Why)
		}
	}
	return rec, nil
}

// day gives the day on which the case is judged.
func (c *lawCase) day() (calendar.Date, error) {
	if c.AsOf == "" {
		return 0, fmt.Errorf("the case has no as_of")
	}
	return calendar.Parse(c.AsOf)
}
