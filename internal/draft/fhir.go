package draft

import (
	"bytes"
	"encoding/json"
	"errors"
	"io"
	"strings"

	"hearduty/internal/grid"
)

// resources is what was found out about a file of FHIR resources.
type resources struct {
	types    map[string]int
	systems  map[string]int // systems of patients' identifiers
	bare     int            // identifiers without a system
	patients int
	loose    int // observations that name their patient by a reference only
	purposes map[[2]string]int
	lengths  map[string]*lengths
	broken   bool
}

// Bounds of what is kept.
const (
	fhirPeek  = 64 << 10
	fhirKinds = 50
	loinc     = "http://loinc.org"
)

// findResources looks whether the file holds FHIR resources, and what they are. It returns nil if it does not.
func findResources(f *grid.File) (*resources, error) {
	if f.Format != grid.JSON && f.Format != grid.Lines {
		return nil, nil
	}
	raw, err := f.Raw()
	if err != nil {
		return nil, err
	}
	head, err := io.ReadAll(io.LimitReader(raw, fhirPeek))
	if err != nil || !bytes.Contains(head, []byte(`"resourceType"`)) {
		return nil, err
	}
	if raw, err = f.Raw(); err != nil {
		return nil, err
	}
	r := &resources{types: map[string]int{}, systems: map[string]int{}, purposes: map[[2]string]int{}, lengths: map[string]*lengths{}}
	d := json.NewDecoder(withoutMark(raw))
	for {
		if err := r.walk(d, 0); err != nil {
			r.broken = !errors.Is(err, io.EOF)
			break
		}
	}
	if len(r.types) == 0 {
		return nil, nil
	}
	return r, nil
}

// withoutMark passes over a byte order mark of UTF-8.
func withoutMark(raw io.Reader) io.Reader {
	head := make([]byte, 3)
	n, _ := io.ReadFull(raw, head)
	return io.MultiReader(bytes.NewReader(bytes.TrimPrefix(head[:n], []byte("\xef\xbb\xbf"))), raw)
}

var errDeep = errors.New("too deep")

// walk reads one value: lists and Bundles entry by entry, resources as a whole.
func (r *resources) walk(d *json.Decoder, depth int) error {
	if depth > 8 {
		return errDeep
	}
	t, err := d.Token()
	if err != nil {
		return err
	}
	switch t {
	case json.Delim('['):
		for d.More() {
			if err := r.walk(d, depth+1); err != nil {
				return err
			}
		}
		_, err = d.Token()
		return err
	case json.Delim('{'):
		return r.object(d, depth)
	}
	return nil
}

// object reads the members of an object. Only those that may hold further resources are walked through.
func (r *resources) object(d *json.Decoder, depth int) error {
	kept := map[string]json.RawMessage{}
	for d.More() {
		t, err := d.Token()
		if err != nil {
			return err
		}
		key, _ := t.(string)
		if key == "entry" || key == "resource" {
			if err := r.walk(d, depth+1); err != nil {
				return err
			}
			continue
		}
		var value json.RawMessage
		if err := d.Decode(&value); err != nil {
			return err
		}
		if key == "resourceType" || key == "identifier" || key == "code" || key == "category" || key == "subject" {
			kept[key] = value
		}
	}
	r.take(kept)
	_, err := d.Token()
	return err
}

// lengths are those of ids of digits only.
type lengths struct {
	least, greatest int
	zeros           bool // some begin with a zero
}

func (l *lengths) add(id string) {
	if l.greatest == 0 || len(id) < l.least {
		l.least = len(id)
	}
	l.greatest = max(l.greatest, len(id))
	l.zeros = l.zeros || id[0] == '0'
}

type coding struct {
	System string `json:"system"`
	Code   string `json:"code"`
}

// take counts a resource.
func (r *resources) take(members map[string]json.RawMessage) {
	var kind string
	if json.Unmarshal(members["resourceType"], &kind) != nil || kind == "" {
		return
	}
	if len(r.types) < fhirKinds && !strings.ContainsFunc(kind, func(c rune) bool { return c > 'z' || c < 'A' }) {
		r.types[kind]++
	}
	switch kind {
	case "Patient":
		r.patient(members["identifier"])
	case "Observation":
		var subject struct {
			Reference  string          `json:"reference"`
			Identifier json.RawMessage `json:"identifier"`
		}
		_ = json.Unmarshal(members["subject"], &subject)
		r.loose += bit(subject.Reference != "" && subject.Identifier == nil)
		var code struct {
			Coding []coding `json:"coding"`
		}
		var categories []struct {
			Coding []coding `json:"coding"`
		}
		_ = json.Unmarshal(members["code"], &code)
		_ = json.Unmarshal(members["category"], &categories)
		all := code.Coding
		for _, c := range categories {
			all = append(all, c.Coding...)
		}
		for _, c := range all {
			if c.System != loinc && !strings.HasPrefix(c.System, "http://terminology.hl7.org/") && len(r.purposes) < fhirKinds {
				r.purposes[[2]string{c.System, c.Code}]++
			}
		}
	}
}

func (r *resources) patient(raw json.RawMessage) {
	var ids []struct {
		System string `json:"system"`
		Value  string `json:"value"`
	}
	_ = json.Unmarshal(raw, &ids)
	r.patients++
	for _, id := range ids {
		switch {
		case id.System == "":
			r.bare++
		case r.systems[id.System] > 0 || len(r.systems) < fhirKinds:
			r.systems[id.System]++
		}
		if onlyDigits(id.Value) && r.systems[id.System]+bit(id.System == "") > 0 {
			if r.lengths[id.System] == nil {
				r.lengths[id.System] = &lengths{}
			}
			r.lengths[id.System].add(id.Value)
		}
	}
}
