package program

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"strconv"
	"strings"
	"unicode/utf8"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
)

// maxFile is the size in bytes that a program file can have.
const maxFile = 4 << 20

// Load reads the program file at path, or the file program.yaml if path is a folder. The program is nil
// if the list holds an error.
func Load(path string) (*Program, diag.List) {
	var diags diag.List
	file, text, ok := readFile(path, &diags)
	if !ok {
		return nil, diags
	}
	p := read(file, text, &diags)
	diags.Sort()
	if diags.Failed() {
		return nil, diags
	}
	return p, diags
}

// read makes a program of the text of its file.
func read(file string, text []byte, diags *diag.List) *Program {
	d := decoder{file: filepath.ToSlash(file), diags: diags}
	root := d.parse(text, "the program file", "Give it the keys program, sites and records")
	if root == nil {
		return nil
	}
	p := &Program{File: d.file, Dir: filepath.Dir(file)}
	sum := sha256.Sum256(text)
	p.Digest = hex.EncodeToString(sum[:])
	d.program(root, p)
	return p
}

func readFile(path string, diags *diag.List) (file string, text []byte, ok bool) {
	file = path
	info, err := os.Stat(path)
	if err == nil && info.IsDir() {
		file = filepath.Join(path, FileName)
		info, err = os.Stat(file)
	}
	at := diag.Position{File: filepath.ToSlash(file)}
	switch {
	case errors.Is(err, fs.ErrNotExist):
		diags.Errorf(at, "Name the program file, or the folder that holds "+FileName+"; `hearduty demo DIR` writes an example", "there is no such program file")
		return file, nil, false
	case err != nil:
		diags.Errorf(at, "Check the path and its permissions", "the program file cannot be read: %s", plain(err))
		return file, nil, false
	case !info.Mode().IsRegular():
		diags.Errorf(at, "Name the program file", "this is no regular file")
		return file, nil, false
	case info.Size() > maxFile:
		diags.Errorf(at, "Name the program file; the records belong in files of their own", "the file is larger than a program file can be (4 MiB)")
		return file, nil, false
	}
	text, err = os.ReadFile(file)
	if err != nil {
		diags.Errorf(at, "Check the path and its permissions", "the program file cannot be read: %s", plain(err))
		return file, nil, false
	}
	return file, text, true
}

// plain gives the cause of a file error without the path, which the position names already.
func plain(err error) string {
	var e *fs.PathError
	if errors.As(err, &e) {
		return e.Err.Error()
	}
	return err.Error()
}

// parse gives the top node of the only document in text, or nil with an error in the list. The file is called
// what in messages, and content says what belongs into it.
func (d *decoder) parse(text []byte, what, content string) *yaml.Node {
	if !utf8.Valid(text) || bytes.IndexByte(text, 0) >= 0 {
		d.diags.Errorf(diag.Position{File: d.file}, "Save the file as UTF-8", "%s is not UTF-8 text", what)
		return nil
	}
	reader := yaml.NewDecoder(bytes.NewReader(text))
	var document, second yaml.Node
	err := reader.Decode(&document)
	switch {
	case errors.Is(err, io.EOF) || err == nil && len(document.Content) == 0:
		d.diags.Errorf(diag.Position{File: d.file}, content, "%s is empty", what)
		return nil
	case err != nil:
		d.syntax(err, text)
		return nil
	}
	if err := reader.Decode(&second); err == nil {
		d.diags.Errorf(d.at(&second), "Keep one document to a file", "the file holds a second YAML document")
		return nil
	} else if !errors.Is(err, io.EOF) {
		d.syntax(err, text)
		return nil
	}
	return document.Content[0]
}

var yamlLine = regexp.MustCompile(`^yaml: (?:line (\d+): )?`)

// syntax says where the YAML is broken. The library counts some lines from 0; a tab is looked for near by.
func (d *decoder) syntax(err error, text []byte) {
	message := err.Error()
	at := diag.Position{File: d.file}
	if m := yamlLine.FindStringSubmatch(message); m != nil {
		at.Line, _ = strconv.Atoi(m[1])
		message = message[len(m[0]):]
	}
	lines := strings.Split(string(text), "\n")
	for _, n := range []int{at.Line, at.Line + 1} {
		if n < 1 || n > len(lines) {
			continue
		}
		indent := lines[n-1][:len(lines[n-1])-len(strings.TrimLeft(lines[n-1], " \t"))]
		if tab := strings.IndexByte(indent, '\t'); tab >= 0 {
			at.Line, at.Column = n, tab+1
			d.diags.Errorf(at, "Indent with spaces only", "the line is indented with a tab")
			return
		}
	}
	d.diags.Errorf(at, "Check indentation, quotes and brackets here and in the line before", "the YAML cannot be read: %s", message)
}

func suggest(name string, known []string, what string) string {
	list := fmt.Sprintf("The %s are %s", what, strings.Join(known, ", "))
	if len(known) == 0 {
		list = "There are no " + what
	}
	if near := diag.Near(name, known); near != "" {
		return fmt.Sprintf("Write %s if that is meant; the %s are %s", near, what, strings.Join(known, ", "))
	}
	return list
}

func contains(list []string, word string) bool {
	for _, w := range list {
		if w == word {
			return true
		}
	}
	return false
}
