package fhir

import (
	"errors"
	"fmt"
	"io"

	"hearduty/internal/grid"
)

// maxItems is the number of resources that one file may hold. About 130 bytes are kept of each.
const maxItems = 2_000_000

// index is what a first reading found out about the resources of a file: who they are and which belong together.
type index struct {
	seen    map[address]place   // the resources that others point to, by their address
	second  map[address]address // their other addresses
	again   map[address]*rivals // resources that stand in the file several times
	people  map[address]*person // patients
	logical map[identifier]*person
	things  map[address]string // id of devices and practitioners
	purpose map[address]string // of encounters
	heads   []head             // resources that gather observations
	headAt  map[int]int        // their index by item
	links   map[address]int32  // observation to the index of its head
	named   []named
}

// place is where the resource stands that counts.
type place struct {
	line      int32
	threshold bool // an observation with the code of a hearing threshold
}

// survey reads the whole file for the index.
func (s *source) survey() error {
	x := &index{
		seen: map[address]place{}, second: map[address]address{}, again: map[address]*rivals{}, people: map[address]*person{},
		logical: map[identifier]*person{}, things: map[address]string{}, purpose: map[address]string{}, headAt: map[int]int{}, links: map[address]int32{},
	}
	s.index = x
	count := 0
	err := s.each(func(i *item) error {
		if count++; count > maxItems {
			return &grid.Fault{Problem: fmt.Sprintf("the file holds more than %d resources", maxItems), Remedy: "Export it in parts, each with whole patients and their observations"}
		}
		s.note(i)
		if len(x.named) > maxItems {
			return &grid.Fault{Problem: fmt.Sprintf("the panels and reports of the file name more than %d observations", maxItems), Remedy: "Export it in parts, each with whole patients and their observations"}
		}
		return nil
	})
	if err == nil && len(x.again) > 0 {
		err = s.compareVersions()
	}
	x.link()
	return err
}

// each calls do for every item that holds a resource.
func (s *source) each(do func(*item) error) error {
	items, err := openItems(s.file, s.form)
	for err == nil {
		var i item
		if i, err = items.next(); err == nil && i.fault == nil && i.empty == "" {
			err = do(&i)
		}
	}
	if items != nil && items.further {
		s.further = true
	}
	if err == io.EOF {
		return nil
	}
	return fileFault(err)
}

// fileFault turns broken JSON into the fault of the whole file.
func fileFault(err error) error {
	var b *broken
	if errors.As(err, &b) {
		return &grid.Fault{Line: b.line, Problem: b.problem, Remedy: "Have the file exported again, or mend the JSON there; nothing of the file was read, since what is behind that place may change what is before it"}
	}
	return err
}

// note takes from a resource what others need of it.
func (s *source) note(i *item) {
	x := s.index
	var r reader
	id := r.text(i.resource, "id")
	first, second, ok := i.addresses(id)
	threshold := false
	switch i.kind {
	case "Patient":
		p := s.readPerson(i.resource)
		if ok {
			x.addPerson(first, p)
		}
		x.addLogical(i.resource, p)
	case "Device", "Practitioner", "PractitionerRole":
		x.addThing(first, ok, i)
	case "Encounter":
		if found := s.purposesOf(i.resource); ok && len(found) == 1 {
			x.purpose[first] = found[0]
		}
	case "Observation":
		_, threshold = toneOf(r.concept(i.resource, "code"))
		if !threshold {
			x.addHead(i, first, ok, "hasMember")
		}
	case "DiagnosticReport":
		x.addHead(i, first, ok, "result")
	case "QuestionnaireResponse", "MolecularSequence": // may be members of an observation
	default:
		return
	}
	if !ok {
		return
	}
	if known, twice := x.seen[first]; !twice {
		x.seen[first] = place{int32(i.line), threshold}
	} else if i.kind == "Observation" || i.kind == "DiagnosticReport" {
		x.again[first] = &rivals{}
		x.seen[first] = place{known.line, known.threshold || threshold}
	}
	if second == first {
		return
	}
	if known, twice := x.second[second]; twice && known != first {
		first = ambiguous
	}
	x.second[second] = first
}
