package fhir

import (
	"strings"

	"hearduty/internal/mapping"
)

// addThing keeps the id of a device, or of somebody who performs tests.
func (x *index) addThing(at address, ok bool, i *item) {
	if id := thingID(i.resource); ok && id != "" {
		if known, twice := x.things[at]; twice && known != id {
			id = ""
		}
		x.things[at] = id
	}
}

// thingID gives the only identifier of a resource, or a device's serial number.
func thingID(n *node) string {
	var r reader
	id := ""
	for _, other := range r.identifiers(n) {
		if id != "" && other.value != id {
			return ""
		}
		id = other.value
	}
	if id == "" {
		id = r.text(n, "serialNumber")
	}
	return strings.TrimSpace(id)
}

// thing gives the id of what a reference points to: the reference's own identifier, or that of the resource.
func (s *source) thing(resource *node, ref reference) string {
	if ref.identifier.value != "" {
		return strings.TrimSpace(ref.identifier.value)
	}
	if id, contained := strings.CutPrefix(ref.to, "#"); contained {
		return thingID(containedIn(resource, id))
	}
	at, ok := s.index.find(targetOf(ref.to))
	if !ok || at == ambiguous {
		return ""
	}
	return s.index.things[at]
}

// device gives the id of the audiometer: the identifier of the device, or the text that the reference shows.
func (s *source) device(resource *node, r *reader) (string, *mapping.Remark) {
	ref := r.reference(r.object(resource, "device"))
	if id := s.thing(resource, ref); id != "" {
		return id, nil
	}
	if ref.display != "" {
		return strings.TrimSpace(ref.display), nil
	}
	if ref.to == "" {
		return "", nil
	}
	return "", &mapping.Remark{Field: "audiometer_id", Why: "the reference to the device leads to no single identifier, so the audiometer is not known", Remedy: "Put the device into the file with its identifier"}
}

// tester gives the id of whoever made the test. Names are never taken.
func (s *source) tester(resource *node, r *reader) (string, *mapping.Remark) {
	id, named := "", false
	for _, ref := range r.references(resource, "performer") {
		kind := ref.kind
		if end := relative(ref.to); kind == "" {
			kind, _, _ = strings.Cut(end, "/")
		}
		if kind == "Organization" || kind == "CareTeam" || kind == "Patient" || kind == "RelatedPerson" {
			continue
		}
		named = true
		switch found := s.thing(resource, ref); {
		case found == "":
		case id != "" && id != found:
			return "", &mapping.Remark{Field: "tester_id", Why: "several people made the test, so tester_id was left empty", Remedy: "Nothing needs to be done unless a duty asks for the tester"}
		default:
			id = found
		}
	}
	if named && id == "" {
		return "", &mapping.Remark{Field: "tester_id", Why: "the reference to the performer leads to no single identifier, so the tester is not known", Remedy: "Put the practitioner into the file with an identifier"}
	}
	return id, nil
}

// purposesOf lists the purposes that codes of the resource tell, each once.
func (s *source) purposesOf(n *node) []string {
	if len(s.options.Purposes) == 0 {
		return nil
	}
	var r reader
	codings := r.concept(n, "code").codings
	for _, key := range []string{"category", "type", "reasonCode"} {
		if m := n.at(key); m != nil && m.kind == list {
			for _, c := range r.concepts(n, key) {
				codings = append(codings, c.codings...)
			}
		}
	}
	codings = append(codings, r.codings(r.object(n, "meta"), "tag")...)
	var out []string
	for _, c := range codings {
		for _, p := range s.options.Purposes {
			if c.code == p.Code && c.code != "" && (p.System == "" || p.System == c.system) && !contains(out, p.Purpose) {
				out = append(out, p.Purpose)
			}
		}
	}
	return out
}

// purposes adds what the encounter of the resource tells.
func (s *source) purposes(n *node) []string {
	out := s.purposesOf(n)
	var r reader
	if to := r.text(r.object(n, "encounter"), "reference"); to != "" {
		if at, ok := s.index.find(targetOf(to)); ok && at != ambiguous {
			if p := s.index.purpose[at]; p != "" && !contains(out, p) {
				out = append(out, p)
			}
		}
	}
	return out
}
