package template

import (
	"bytes"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"strings"

	"hearduty/internal/schema"
)

// subjects are, by kind, the id of a subject and the records by which there is one.
var subjects = map[string][2]string{
	"worker":     {"w1", "worker:\n- {worker_id: w1, site: s1, hired_on: 2020-01-01}"},
	"group":      {"g1", "group:\n- {group: g1, site: s1}"},
	"area":       {"hall", "group:\n- {group: g1, site: s1, area: hall}"},
	"site":       {"s1", ""},
	"instrument": {"i1", "instrument:\n- {instrument_id: i1, site: s1, kind: audiometer}"},
	"room":       {"r1", "worker:\n- {worker_id: w1, site: s1, hired_on: 2020-01-01}\naudiogram:\n- {audiogram_id: a1, worker_id: w1, date: 2024-01-10, room_id: r1, left.2000: 10, right.2000: 10}"},
	"tester":     {"t1", "worker:\n- {worker_id: w1, site: s1, hired_on: 2020-01-01}\naudiogram:\n- {audiogram_id: a1, worker_id: w1, date: 2024-01-10, tester_id: t1, left.2000: 10, right.2000: 10}"},
}

// Written says what was written of a new duty.
type Written struct {
	ID        string // of the duty
	Folder    string // of its rule and tests
	Cases     string // file of its law cases
	Paragraph string // what is to be added to Paragraphs by hand; empty if it was added
	Table     string // file of the paragraphs
}

// Duty writes a new duty about subjects of a kind, under a topic, into the folder of a bundle: the rule, tests, a law
// case, and an entry behind those in the table of paragraphs.
func Duty(dir, name, subject, topic string) (*Written, error) {
	if _, err := os.Stat(filepath.Join(dir, ".manifest")); err != nil {
		return nil, fmt.Errorf("the folder %s is no bundle, for it holds no .manifest; name the folder of one", dir)
	}
	if !dutyName.MatchString(name) {
		return nil, fmt.Errorf("a duty cannot be called %q; write small letters, digits and hyphens, such as fit-tested", name)
	}
	about, ok := subjects[subject]
	if !ok {
		return nil, fmt.Errorf("there is no kind of subject %q", subject)
	}
	snake, kebab := strings.ReplaceAll(name, "-", "_"), strings.ReplaceAll(name, "_", "-")
	values := map[string]string{"ID": kebab, "Name": snake, "Subject": subject, "Topic": topic, "SubjectID": about[0], "Records": recordsOf(about[1])}
	out := map[string]string{}
	for rel, file := range map[string]string{
		"duty/" + snake + "/" + snake + ".rego": "rule.rego", "duty/" + snake + "/" + snake + "_test.rego": "test.rego", "cases/" + snake + ".yaml": "cases.yaml",
	} {
		text, err := fill("files/duty/"+file+".tmpl", values)
		if err != nil {
			return nil, err
		}
		out[rel] = text
	}
	entry, err := fill("files/duty/paragraph.yaml.tmpl", values)
	if err != nil {
		return nil, err
	}
	w := &Written{ID: kebab, Folder: filepath.Join(dir, "duty", snake), Cases: filepath.Join(dir, "cases", snake+".yaml"), Table: filepath.Join(dir, "paragraphs", "data.yaml")}
	if _, err := os.Lstat(w.Folder); err == nil {
		return nil, fmt.Errorf("%s is there already, and nothing is overwritten; take another name", w.Folder)
	}
	if err := write(dir, out); err != nil {
		return nil, err
	}
	added, err := appendEntry(w.Table, entry)
	if !added {
		w.Paragraph = strings.TrimPrefix(entry, "\n")
	}
	return w, err
}

// recordsOf indents records as a case holds them.
func recordsOf(text string) string {
	if text == "" {
		return ""
	}
	lines := strings.Split(text, "\n")
	for i, line := range lines {
		lines[i] = "    " + line
		if strings.HasPrefix(line, "- ") {
			lines[i] = "      " + line
		}
	}
	return "  records:\n" + strings.Join(lines, "\n") + "\n"
}

// appendEntry puts an entry behind those of a table of paragraphs, or begins the table. It leaves alone a table that
// would not be one any more, or that names the paragraph already.
func appendEntry(file, entry string) (added bool, err error) {
	old, err := os.ReadFile(file)
	if errors.Is(err, fs.ErrNotExist) {
		return true, write(filepath.Dir(file), map[string]string{filepath.Base(file): strings.TrimPrefix(entry, "\n")})
	}
	if err != nil {
		return false, err
	}
	if !bytes.HasSuffix(old, []byte("\n")) {
		entry = "\n" + entry
	}
	if _, problems := schema.YAML("paragraphs", file, append(bytes.Clone(old), entry...)); problems.Failed() {
		return false, nil
	}
	f, err := os.OpenFile(file, os.O_WRONLY|os.O_APPEND, 0)
	if err != nil {
		return false, err
	}
	if _, err := f.WriteString(entry); err != nil {
		f.Close()
		return false, err
	}
	return true, f.Close()
}
