package fhir

import (
	"errors"
	"fmt"
	"io"

	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// item is one entry of a Bundle, item of an array, or line.
type item struct {
	line     int
	resource *node
	kind     string // resource type
	fullURL  string
	empty    string // why there is no resource
	fault    *mapping.Fault
}

// items reads the items of a file one after the other.
type items struct {
	s       *scanner
	form    form
	begun   bool // the outermost object or array was entered
	within  bool // in the entries of the Bundle
	first   bool // nothing of the object or array was read
	entries bool // the Bundle's entries were seen
	done    bool
	count   int
	further bool // the Bundle says that it is one page of several
}

// open reads the file again from its beginning.
func openItems(r io.ReadSeeker, f form) (*items, error) {
	if _, err := r.Seek(0, io.SeekStart); err != nil {
		return nil, err
	}
	s := newScanner(r)
	s.skipMark()
	s.oneLine = f == lines
	return &items{s: s, form: f}, nil
}

// skipMark passes over the mark that some programs put before UTF-8 text.
func (s *scanner) skipMark() {
	if mark, _ := s.r.Peek(3); string(mark) == "\ufeff" {
		_, _ = s.r.Discard(3)
	}
}

// next reads the next item; at the end it returns io.EOF. A *broken error means that the rest cannot be read.
func (it *items) next() (item, error) {
	switch it.form {
	case bundle:
		return it.entry()
	case array:
		return it.element()
	case lines:
		return it.lineItem()
	}
	if it.done {
		return item{}, it.end()
	}
	it.done = true
	return it.read(1, false)
}

// end says what follows the last item.
func (it *items) end() error {
	c, err := it.s.peek()
	if err == nil && c != 0 {
		err = it.s.broken("something follows the end of the JSON")
	}
	if err == nil {
		err = io.EOF
	}
	return err
}

// element reads the next element of an array.
func (it *items) element() (item, error) {
	if !it.begun {
		if err := it.s.expect('[', "a list"); err != nil {
			return item{}, err
		}
		it.begun, it.first = true, true
	}
	if it.done {
		return item{}, it.end()
	}
	more, err := it.s.more(']', it.first)
	if err != nil {
		return item{}, err
	}
	if !more {
		it.done = true
		return item{}, it.end()
	}
	it.first = false
	it.count++
	return it.read(it.count, false)
}

// lineItem reads the next line that is not blank. A line that is broken costs itself only.
func (it *items) lineItem() (item, error) {
	s := it.s
	c, err := s.peek()
	for ; err == nil && c == '\n'; c, err = s.peek() {
		_, _ = s.next()
	}
	if err == nil && c == 0 {
		return item{}, io.EOF
	}
	i := item{line: s.line}
	if err == nil {
		i, err = it.read(s.line, false)
	}
	if err == nil {
		if c, err = s.peek(); err == nil && c != '\n' && c != 0 {
			err = s.broken("something follows the resource on its line")
		}
	}
	var b *broken
	if errors.As(err, &b) {
		i, err = item{line: i.line, fault: &mapping.Fault{Why: b.problem, Remedy: "Write one complete resource a line, or have the file exported again"}}, nil
	}
	if err != nil {
		return item{}, err
	}
	return i, s.skipLine()
}

// read reads an entry, which holds a resource, or a resource.
func (it *items) read(line int, entry bool) (item, error) {
	s := it.s
	s.fresh()
	v, err := s.value(1)
	i := item{line: line}
	switch {
	case err != nil:
		return i, err
	case s.over:
		i.fault = &mapping.Fault{Why: fmt.Sprintf("the resource holds more than %d values or %d MB of text", maxValues, maxKept>>20), Remedy: "Take it out of the file if it is no audiogram; otherwise have it exported in smaller parts"}
		return i, nil
	case s.twice != "":
		i.fault = &mapping.Fault{Header: record.Shorten(s.twice), Why: fmt.Sprintf("the key %q stands twice in one object", record.Shorten(s.twice)), Remedy: "Keep one of the two"}
		return i, nil
	case v.kind != object:
		i.fault = &mapping.Fault{Why: "this is " + v.kind.String() + ", not a resource", Remedy: "Write a FHIR resource, which is an object with a resourceType"}
		return i, nil
	case entry:
		i.unpack(&v)
	default:
		i.resource = &v
	}
	if i.fault == nil && i.empty == "" {
		i.recognize()
	}
	return i, nil
}
