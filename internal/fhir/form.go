package fhir

import (
	"errors"
	"io"
	"strings"

	"hearduty/internal/grid"
)

// form says how the resources stand in the file.
type form uint8

const (
	bundle form = iota // one Bundle
	array              // a JSON array of resources
	lines              // one resource a line
	single             // one resource
)

// recognizeForm finds out how the resources stand in the file.
func recognizeForm(r io.ReadSeeker, name string) (form, error) {
	if _, err := r.Seek(0, io.SeekStart); err != nil {
		return 0, err
	}
	s := newScanner(r)
	start, _ := s.r.Peek(4)
	s.skipMark()
	c, err := s.peek()
	const remedy = "Export the resources as FHIR R4 JSON: a Bundle, an array of resources, or one resource a line"
	switch {
	case err != nil:
		return 0, err
	case c == 0:
		return 0, &grid.Fault{Problem: "the file is empty", Remedy: remedy}
	case c == '<':
		return 0, &grid.Fault{Problem: "the file is XML", Remedy: remedy}
	case strings.HasPrefix(string(start), "\xff\xfe") || strings.HasPrefix(string(start), "\xfe\xff") || strings.Contains(string(start), "\x00"):
		return 0, &grid.Fault{Problem: "the file is UTF-16 text, but FHIR JSON is UTF-8", Remedy: "Save the file as UTF-8"}
	case c == '[':
		return array, nil
	case c != '{':
		return 0, &grid.Fault{Line: s.line, Problem: "the file does not begin with a JSON object or array", Remedy: remedy}
	}
	begins := s.line
	isBundle, err := s.isBundle()
	byName := strings.HasSuffix(name, ".ndjson") || strings.HasSuffix(name, ".jsonl")
	var b *broken
	switch {
	case isBundle:
		return bundle, nil
	case errors.As(err, &b) && byName:
		return lines, nil
	case err != nil:
		return 0, err
	}
	ends := s.line
	if c, err = s.peek(); err != nil || c == 0 {
		return single, err
	}
	if ends == begins || byName {
		return lines, nil
	}
	return 0, &grid.Fault{Line: s.line, Problem: "another value follows the first resource, which stands on several lines", Remedy: remedy}
}

// isBundle reads the first object of the file until it is known to be a Bundle, or else to its end.
func (s *scanner) isBundle() (bool, error) {
	if err := s.expect('{', "an object"); err != nil {
		return false, err
	}
	for first := true; ; first = false {
		if more, err := s.more('}', first); err != nil || !more {
			return false, err
		}
		key, err := s.key()
		if err != nil {
			return false, err
		}
		s.fresh()
		value, err := s.value(1)
		if err != nil {
			return false, err
		}
		if key == "resourceType" && value.text == "Bundle" {
			return true, nil
		}
	}
}
