// Package accept reads the file in which the employer accepts gaps for a time, and says which findings an
// entry is about. An accepted gap stays a gap: it is shown apart and never counted as met.
package accept

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"io/fs"
	"os"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
	"hearduty/internal/schema"
)

// FileEntry is an entry of the file of accepted gaps, which is a list of them. Its JSON Schema is generated
// from here.
type FileEntry struct {
	ID         string     `json:"id,omitempty" doc:"the id of a finding, or as much of its beginning as no other has, 8 hexadecimal digits at least; give either id or match"`
	Match      *FileMatch `json:"match,omitempty" doc:"the findings that are meant, where one id is not enough"`
	Reason     string     `json:"reason" doc:"why the gap is accepted, in a sentence; without names of persons"`
	ApprovedBy string     `json:"approved_by,omitempty" doc:"who approved it, by role or id, never by name; without it nothing is accepted"`
	Since      string     `json:"since,omitempty" doc:"first day on which it counts, YYYY-MM-DD; every day up to until, if it is left out"`
	Until      string     `json:"until" doc:"the last day on which it counts, YYYY-MM-DD"`
}

// FileMatch says which findings are meant: those that fit all of its keys. One of site, duty and subject must be
// among them.
type FileMatch struct {
	Site        string `json:"site,omitempty" doc:"the id of a site"`
	Bundle      string `json:"bundle,omitempty" doc:"the id of a bundle"`
	Duty        string `json:"duty,omitempty" doc:"the id of a duty, such as annual-training"`
	Topic       string `json:"topic,omitempty" doc:"the heading of the duty"`
	SubjectKind string `json:"subject_kind,omitempty" doc:"the kind of subject"`
	Subject     string `json:"subject,omitempty" doc:"the id of a subject; an asterisk stands for any characters"`
	Status      string `json:"status,omitempty" doc:"the status; if left out, each that can be accepted"`
}

// maxFile is the size in bytes that the file can have.
const maxFile = 4 << 20

// Load reads the file at path. Reports name it as shown. The list is nil if the diagnostics hold an error.
func Load(path, shown string) (*List, diag.List) {
	text, problems := readFile(path)
	if problems.Failed() {
		return nil, problems
	}
	return Parse(text, path, shown)
}

func readFile(path string) ([]byte, diag.List) {
	var l diag.List
	at := diag.Position{File: path}
	file, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		l.Errorf(at, "Correct the path in the program file, or write the file", "there is no such file of accepted gaps")
		return nil, l
	}
	var text []byte
	if err == nil {
		defer file.Close()
		text, err = io.ReadAll(io.LimitReader(file, maxFile+1))
	}
	var e *fs.PathError
	if errors.As(err, &e) {
		err = e.Err
	}
	switch {
	case err != nil:
		l.Errorf(at, "Check the path and its permissions", "the accepted gaps cannot be read: %v", err)
	case len(text) > maxFile:
		l.Errorf(at, "Accept findings together with match", "the file is larger than a list of accepted gaps can be (4 MiB)")
	}
	return text, l
}

// Parse reads the text of the file. Diagnostics name it file, and reports name it shown.
func Parse(text []byte, file, shown string) (*List, diag.List) {
	text = bytes.TrimPrefix(text, []byte("\ufeff"))
	value, nodes, problems := readYAML(text, file)
	if problems.Failed() {
		return nil, problems
	}
	var entries []FileEntry
	if err := convert(value, &entries); err != nil {
		problems.Errorf(diag.Position{File: file}, "Check it against the schema accepted.schema.json", "the accepted gaps cannot be read: %v", err)
		return nil, problems
	}
	l := &List{File: shown}
	for i := range entries {
		at := diag.Position{File: file, Line: nodes[i].Line, Column: nodes[i].Column}
		l.Entries = append(l.Entries, entries[i].check(at, &problems))
	}
	l.repeated(file, nodes, &problems)
	problems.Sort()
	if problems.Failed() {
		return nil, problems
	}
	l.sort()
	return l, problems
}

// readYAML reads the text, checks it against the schema, and gives the nodes of the entries for their places.
func readYAML(text []byte, file string) (value any, nodes []*yaml.Node, l diag.List) {
	defer func() {
		if recover() != nil { // the parser gives up on some texts
			l = diag.List{}
			l.Errorf(diag.Position{File: file}, "Check indentation, quotes and brackets", "the YAML cannot be read")
		}
	}()
	if value, l = schema.YAML("accepted", file, text); l.Failed() {
		return nil, nil, l
	}
	var document yaml.Node
	if err := yaml.Unmarshal(text, &document); err != nil {
		l.Errorf(diag.Position{File: file}, "Check indentation, quotes and brackets", "the YAML cannot be read: %v", err)
		return nil, nil, l
	}
	root := document.Content[0]
	if root.Kind == yaml.AliasNode {
		root = root.Alias
	}
	return value, root.Content, l
}

func convert(value any, into *[]FileEntry) error {
	text, err := json.Marshal(value)
	if err != nil {
		return err
	}
	return json.Unmarshal(text, into)
}
