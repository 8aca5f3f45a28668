package fhir

import "hearduty/internal/mapping"

// entry reads the next entry of the Bundle.
func (it *items) entry() (item, error) {
	s := it.s
	if !it.begun {
		if err := s.expect('{', "an object"); err != nil {
			return item{}, err
		}
		it.begun, it.first = true, true
	}
	for !it.done {
		if it.within {
			more, err := s.more(']', it.first)
			if err != nil {
				return item{}, err
			}
			it.first = false
			if more {
				it.count++
				return it.read(it.count, true)
			}
			it.within = false
		}
		if err := it.member(); err != nil {
			return item{}, err
		}
	}
	return item{}, it.end()
}

// member reads the next member of the Bundle. It stops at the first of the entries.
func (it *items) member() error {
	s := it.s
	more, err := s.more('}', it.first)
	if err != nil || !more {
		it.done = true
		return err
	}
	it.first = false
	key, err := s.key()
	if err != nil {
		return err
	}
	c, err := s.peek()
	if err != nil {
		return err
	}
	if key == "entry" && c != 'n' {
		if it.entries {
			return s.broken("the Bundle has the key entry twice")
		}
		if err := s.expect('[', "the list of entries"); err != nil {
			return err
		}
		it.entries, it.within, it.first = true, true, true
		return nil
	}
	s.fresh()
	value, err := s.value(1)
	if key == "link" {
		for i := range value.items {
			if relation := value.items[i].at("relation"); relation != nil && relation.text == "next" {
				it.further = true
			}
		}
	}
	return err
}

// unpack takes the resource out of an entry of a Bundle.
func (i *item) unpack(entry *node) {
	var r reader
	i.fullURL = r.text(entry, "fullUrl")
	i.resource = r.object(entry, "resource")
	method := r.text(r.object(entry, "request"), "method")
	switch {
	case r.fault != nil:
		i.fault = r.fault
	case method == "DELETE":
		i.empty = "deletion of a resource"
	case i.resource == nil:
		i.empty = "entry without a resource"
	}
}

// recognize finds the type of the resource.
func (i *item) recognize() {
	var r reader
	i.kind = r.text(i.resource, "resourceType")
	switch {
	case r.fault != nil:
		i.fault = r.fault
	case i.kind == "":
		i.fault = &mapping.Fault{Header: "resourceType", Why: "the object has no resourceType, so it is no FHIR resource", Remedy: "Have the file exported again as FHIR R4 JSON"}
	}
}
