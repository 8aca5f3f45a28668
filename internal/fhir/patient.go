package fhir

import (
	"fmt"
	"sort"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// person is a patient: the worker's id, or why it is not known.
type person struct {
	worker string
	fault  *mapping.Fault
}

func workerFault(why, remedy string) *mapping.Fault {
	return &mapping.Fault{Field: "worker_id", Why: why, Remedy: remedy}
}

// readPerson finds the worker's id among the identifiers of a Patient.
func (s *source) readPerson(patient *node) *person {
	var r reader
	if s.options.WorkerFrom == "patient_id" {
		id := r.text(patient, "id")
		return s.worker(id, r.fault)
	}
	all := r.identifiers(patient)
	if r.fault != nil {
		r.fault.Field = "worker_id"
		return &person{fault: r.fault}
	}
	return s.chooseID(all)
}

// chooseID takes the identifier of the map's system, or the only one.
func (s *source) chooseID(all []identifier) *person {
	wanted := s.options.WorkerSystem
	values := map[string]bool{} // whether the identifier is in use
	for _, id := range all {
		if id.value != "" && (wanted == "" || id.system == wanted) {
			key := id.value
			if wanted == "" {
				key = id.system + "\x00" + id.value
			}
			values[key] = values[key] || id.use != "old"
		}
	}
	if len(values) > 1 {
		for v, inUse := range values {
			if !inUse {
				delete(values, v)
			}
		}
	}
	switch {
	case len(values) == 1:
		for v := range values {
			return s.worker(v[strings.LastIndexByte(v, 0)+1:], nil)
		}
	case len(values) == 0 && len(all) == 0:
		return &person{fault: workerFault("the patient has no identifier", "Have the file exported with the worker's id as an identifier of the patient")}
	case len(values) == 0:
		return &person{fault: workerFault(fmt.Sprintf("the patient has no identifier of the system that the map names, but of %s", systems(all)), "Correct worker_id_system in the map, or have the file exported with the worker's id")}
	case wanted != "":
		return &person{fault: workerFault("the patient has several identifiers of the system that the map names", "Keep the one that is the worker's id, or mark the others as old")}
	}
	return &person{fault: workerFault(fmt.Sprintf("the patient has several identifiers, of %s", systems(all)), "Say in the map which of them is the worker's id: fhir: {worker_id_system: …}")}
}

// systems lists the systems of identifiers, never their values.
func systems(all []identifier) string {
	set := map[string]bool{}
	for _, id := range all {
		name := "no system"
		if id.system != "" {
			name = "system " + record.Shorten(id.system)
		}
		set[name] = true
	}
	names := make([]string, 0, len(set))
	for name := range set {
		names = append(names, name)
	}
	sort.Strings(names)
	const shown = 5
	if len(names) > shown {
		names = append(names[:shown], "others")
	}
	return strings.Join(names, ", ")
}

// worker makes an id as the map wants it.
func (s *source) worker(id string, fault *mapping.Fault) *person {
	if fault != nil {
		fault.Field = "worker_id"
		return &person{fault: fault}
	}
	reader := convert.ID{Pad: s.options.Pad}
	text, p := reader.Read(grid.Cell{Text: id})
	switch {
	case p != nil:
		return &person{fault: &mapping.Fault{Field: "worker_id", Read: id, Why: p.Why, Remedy: p.Remedy}}
	case text == "":
		return &person{fault: workerFault("the patient has no id", "Have the file exported with the worker's id")}
	}
	return &person{worker: text}
}

// addPerson keeps a patient. The same patient may stand in the file several times, with the same id.
func (x *index) addPerson(at address, p *person) {
	known := x.people[at]
	if known != nil && known.worker != p.worker {
		p = &person{fault: workerFault("the patient stands in the file several times, with different ids", "Keep the entry that is right")}
	}
	x.people[at] = p
}

// addLogical keeps a patient by each of the identifiers, for references that name one.
func (x *index) addLogical(patient *node, p *person) {
	var r reader
	for _, id := range r.identifiers(patient) {
		id.use = ""
		if known := x.logical[id]; known != nil && known.worker != p.worker {
			p = &person{fault: workerFault("several patients have the identifier that the observation names", "Correct the identifiers of the patients")}
		}
		x.logical[id] = p
	}
}

// subject finds the person that a resource is about; it may be contained in whole. The key tells one person from
// another also where the id is not known.
func (s *source) subject(whole, resource *node, r *reader) (p *person, key string) {
	ref := r.reference(r.object(resource, "subject"))
	if r.fault != nil || ref.none() {
		return nil, ""
	}
	if p = s.patient(whole, ref); p.fault != nil {
		return p, "\x00" + ref.to + "\x00" + ref.identifier.system + "\x00" + ref.identifier.value
	}
	return p, p.worker
}

func (s *source) patient(resource *node, ref reference) *person {
	kind := ref.kind
	if end := relative(plainAddress(ref.to)); kind == "" && strings.Contains(end, "/") {
		kind, _, _ = strings.Cut(end, "/")
	}
	if resourceTypes[kind] && kind != "Patient" {
		return &person{fault: workerFault("the subject is of type "+kind+", not Patient", "Correct the reference, or leave the observation out")}
	}
	if id, contained := strings.CutPrefix(ref.to, "#"); contained {
		if patient := containedIn(resource, id); patient != nil {
			return s.readPerson(patient)
		}
		return &person{fault: workerFault("the patient is said to be contained in the resource, but is not there", "Have the file exported again with its contained resources")}
	}
	if ref.to != "" {
		at, ok := s.index.find(targetOf(ref.to))
		switch {
		case ok && at == ambiguous:
			return &person{fault: workerFault("the reference fits several patients of the file", "Write the full address of the patient in the reference")}
		case ok && s.index.people[at] != nil:
			return s.index.people[at]
		case ok:
			return &person{fault: workerFault("the subject is no Patient", "Correct the reference, or leave the observation out")}
		}
		if s.options.WorkerFrom == "patient_id" && kind == "Patient" {
			_, id, _ := strings.Cut(relative(plainAddress(ref.to)), "/")
			return s.worker(id, nil)
		}
	}
	return s.byIdentifier(ref)
}

// byIdentifier takes the identifier of a reference that names its patient by one.
func (s *source) byIdentifier(ref reference) *person {
	id := ref.identifier
	id.use = ""
	if known := s.index.logical[id]; id.value != "" && known != nil {
		return known
	}
	if id.value != "" && s.options.WorkerFrom != "patient_id" {
		return s.chooseID([]identifier{id})
	}
	return &person{fault: workerFault("the patient that the reference points to is not in the file", "Put the patients into the same file (lines of a bulk export can be joined), or, if the reference holds the worker's id, say so in the map: fhir: {worker_id_from: patient_id}")}
}

// containedIn finds a contained resource.
func containedIn(resource *node, id string) *node {
	var r reader
	inside := r.objects(resource, "contained")
	for i := range inside {
		if own := inside[i].at("id"); own != nil && own.kind == text && own.text == id {
			return &inside[i]
		}
	}
	return nil
}
