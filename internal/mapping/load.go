package mapping

import (
	"bytes"
	"errors"
	"io"
	"io/fs"
	"os"

	"hearduty/internal/diag"
	"hearduty/internal/record"
	"hearduty/internal/schema"
)

// maxFile is the size in bytes that a map can have.
const maxFile = 1 << 20

// Load reads the map at path and checks it. Positions name it as shown. The map is nil if the list holds
// an error.
func Load(path, shown string) (*Map, diag.List) {
	text, l := readFile(path, shown)
	if l.Failed() {
		return nil, l
	}
	return parse(text, shown)
}

func readFile(path, shown string) ([]byte, diag.List) {
	var l diag.List
	at := diag.Position{File: shown}
	file, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		l.Errorf(at, "Correct the path, or put the map there", "there is no such map")
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
		l.Errorf(at, "Check the path and its permissions", "the map cannot be read: %v", err)
	case len(text) > maxFile:
		l.Errorf(at, "Name the map file; exports belong in files of their own", "the file is larger than a map can be (1 MiB)")
	}
	return text, l
}

// parse reads the text of a map and checks it.
func parse(text []byte, shown string) (*Map, diag.List) {
	text = bytes.TrimPrefix(text, []byte("\ufeff"))
	value, l := readYAML(text, shown)
	if l.Failed() {
		return nil, l
	}
	m := &Map{Shown: shown, places: findPlaces(text, shown)}
	if err := m.File.decode(value); err != nil {
		l.Errorf(diag.Position{File: shown}, "Check the map against its schema", "the map cannot be read: %v", err)
		return nil, l
	}
	m.Kind = record.Kind(m.File.Kind)
	l = append(l, m.check(m.Kind)...)
	l.Sort()
	if l.Failed() {
		return nil, l
	}
	return m, l
}

// readYAML reads the text and checks it against the schema.
func readYAML(text []byte, shown string) (value any, l diag.List) {
	defer func() {
		if recover() != nil { // the parser gives up on some texts
			l = diag.List{}
			l.Errorf(diag.Position{File: shown}, "Check indentation, quotes and brackets", "the YAML cannot be read")
		}
	}()
	return schema.YAML("map", shown, text)
}
