package grid

import (
	"encoding/json"
	"strings"
)

// onlyList finds the key of the only list of objects in the object that has begun.
func (e *Elements) onlyList() (string, error) {
	var lists, empty []string
	for e.dec.More() {
		e.bound.from = e.dec.InputOffset()
		key, err := e.dec.Token()
		if err != nil {
			err = e.broken(err)
		}
		kind := other
		if err == nil {
			kind, err = e.look()
		}
		name, _ := key.(string)
		switch {
		case kind == list:
			lists = append(lists, name)
		case kind == emptyList:
			empty = append(empty, name)
		}
		if err != nil && len(lists) == 1 {
			break // it is read up to that place
		}
		if err != nil {
			return "", err
		}
	}
	if len(lists) == 0 {
		lists = empty
	}
	switch {
	case len(lists) == 1:
		return lists[0], nil
	case len(lists) > 1:
		return "", faultf("Put the records of each list into a file of their own", "the object holds several lists: %s", shorten(strings.Join(lists, ", ")))
	}
	return "", faultf(asArray, "the object of the file holds no list of objects")
}

type valueKind int

const (
	other valueKind = iota
	list            // of objects
	emptyList
)

// look passes over a value and says what it is.
func (e *Elements) look() (kind valueKind, err error) {
	e.bound.from = e.dec.InputOffset()
	depth := 0
	for n := 0; ; n++ {
		token, err := e.dec.Token()
		if err != nil {
			return kind, e.broken(err)
		}
		e.bound.from = e.dec.InputOffset()
		switch token {
		case json.Delim('['), json.Delim('{'):
			depth++
			if n == 0 && token == json.Delim('[') {
				kind = emptyList
			}
		case json.Delim(']'), json.Delim('}'):
			depth--
		}
		if n == 1 && kind == emptyList && depth > 0 {
			kind = other
			if token == json.Delim('{') {
				kind = list
			}
		}
		if depth == 0 {
			return kind, nil
		}
	}
}

// seek begins again and stops in the list of this key.
func (e *Elements) seek(key string) error {
	if err := e.begin(); err != nil {
		return err
	}
	e.within = true
	if _, err := e.dec.Token(); err != nil {
		return e.broken(err)
	}
	for e.dec.More() {
		e.bound.from = e.dec.InputOffset()
		name, err := e.dec.Token()
		if err != nil {
			return e.broken(err)
		}
		if name == key {
			if token, err := e.dec.Token(); err != nil || token != json.Delim('[') {
				return faultf("Keep one of the two", "the key %q stands twice", shorten(key))
			}
			return nil
		}
		if err := e.skip(); err != nil {
			return err
		}
	}
	return faultf("Read the file again once nothing writes to it", "the file has changed while it was read")
}
