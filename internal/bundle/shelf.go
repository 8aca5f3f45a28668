package bundle

import (
	"fmt"
	"maps"
	"path"
	"slices"
	"strings"
	"sync"
	"time"

	"hearduty/internal/diag"
	"hearduty/policies"
)

// Shelf is where bundles stand: the embedded ones, and those of other sources. A bundle is read when it is asked for,
// and read once.
type Shelf struct{ slots map[string]*slot }

// slot is the place of one bundle.
type slot struct {
	id     string
	fsys   overlay
	source *Source // nil for an embedded bundle
	read   func() (*Bundle, diag.List)
}

// NewShelf puts the embedded bundles and those of other sources on a shelf. A bundle of a source takes the place of the
// embedded one of its id.
func NewShelf(sources ...*Source) (*Shelf, error) {
	embedded, err := embeddedShelf()
	if err != nil || len(sources) == 0 {
		return embedded, err
	}
	var problems diag.List
	s := &Shelf{slots: maps.Clone(embedded.slots)}
	for i, source := range sources {
		fsys := overEmbedded(slices.Delete(slices.Clone(sources), i, i+1), source)
		for _, id := range source.IDs {
			if other := s.slots[id]; other != nil && other.source != nil {
				problems.Errorf(diag.Position{File: source.place(id)}, "Name one of them", "the bundle %s stands in %s, too", id, other.source.place(id))
				continue
			}
			s.slots[id] = newSlot(id, fsys, source)
		}
	}
	return s, problems.Err()
}

var embeddedShelf = sync.OnceValues(func() (*Shelf, error) {
	ids, err := Folders(policies.FS)
	if err != nil {
		return nil, err
	}
	s := &Shelf{slots: map[string]*slot{}}
	for _, id := range ids {
		s.slots[id] = newSlot(id, overEmbedded(nil, nil), nil)
	}
	return s, nil
})

func newSlot(id string, fsys overlay, source *Source) *slot {
	s := &slot{id: id, fsys: fsys, source: source}
	s.read = sync.OnceValues(func() (*Bundle, diag.List) {
		var b *Bundle
		var problems diag.List
		load := func() { b, problems = Load(fsys, id) }
		if source == nil {
			load()
		} else if !inTime(load) {
			return nil, tooSlow(source.place(id))
		}
		problems = fsys.locate(withRemedies(problems))
		if b != nil {
			b.Warnings, b.places, b.Signature = problems, fsys.places, SignatureEmbedded
			if source != nil {
				b.Signature = source.signed[id]
			}
		}
		return b, problems
	})
	return s
}

// loadLimit is the time that the loading of a bundle that is not embedded may take: rules can be written so that their
// compiler hardly comes to an end. Tests shorten it.
var loadLimit = time.Minute

// inTime does something and says whether it was done in time. What is not done is left behind: the program ends soon,
// since the bundle is refused.
func inTime(do func()) bool {
	done := make(chan struct{})
	go func() {
		defer close(done)
		do()
	}()
	timer := time.NewTimer(loadLimit)
	defer timer.Stop()
	select {
	case <-done:
		return true
	case <-timer.C:
		return false
	}
}

func tooSlow(place string) diag.List {
	var problems diag.List
	problems.Errorf(diag.Position{File: place}, "Do not use a bundle that you do not trust; if it is your own, split its largest rules", "the bundle takes longer than %s to load", loadLimit)
	return problems
}

// IDs lists the bundles on the shelf in order.
func (s *Shelf) IDs() []string { return slices.Sorted(maps.Keys(s.slots)) }

// Outside says whether a bundle comes from a source, and from where.
func (s *Shelf) Outside(id string) (place string, ok bool) {
	if slot := s.slots[id]; slot != nil && slot.source != nil {
		return slot.source.place(id), true
	}
	return "", false
}

// Replaced lists the embedded bundles whose place one of a source has taken.
func (s *Shelf) Replaced() []string {
	embedded, err := embeddedShelf()
	if err != nil {
		return nil
	}
	return slices.DeleteFunc(embedded.IDs(), func(id string) bool { return s.slots[id].source == nil })
}

// Take reads the bundles named, and no others. What is not embedded is held to the layout and to reach, too.
func (s *Shelf) Take(ids ...string) (Library, error) {
	library := Library{}
	var problems diag.List
	for _, id := range ids {
		b, found := s.Open(id)
		if b != nil && s.slots[id].source != nil {
			var strict diag.List
			if !inTime(func() { strict = b.Strict() }) {
				return nil, tooSlow(s.slots[id].source.place(id))
			}
			found = append(slices.Clone(found), s.slots[id].fsys.locate(strict)...)
		}
		problems = append(problems, found...)
		library[id] = b
	}
	if err := problems.Err(); err != nil {
		return nil, problems
	}
	return library, nil
}

// Open reads one bundle, and holds it to no more than what a check needs. There is none if the problems hold an error.
func (s *Shelf) Open(id string) (*Bundle, diag.List) {
	slot := s.slots[id]
	if slot == nil {
		var problems diag.List
		problems.Errorf(diag.Position{}, nearRemedy(id, s.IDs()), "there is no bundle %q", id)
		return nil, problems
	}
	return slot.read()
}

// Head is what a bundle says of itself, read without its rules.
type Head struct {
	ID       string
	Revision string
	Extends  []string // bundles that it extends, the nearest first
	About    About
	Duties   int    // number of duties, with those of the bundles that it extends
	Place    string // where it was read from; empty if it is embedded

	Signature string // one of Signatures
}

// Head reads what a bundle says of itself. No rule is compiled.
func (s *Shelf) Head(id string) (*Head, diag.List) {
	var problems diag.List
	slot := s.slots[id]
	if slot == nil {
		_, problems = s.Open(id)
		return nil, problems
	}
	l := layers(slot.fsys, id, nil, &problems)
	problems = slot.fsys.locate(problems)
	if problems.Failed() || l == nil {
		return nil, problems
	}
	h := &Head{ID: id, Revision: l.revision, Extends: l.chain, About: l.about}
	h.Signature = SignatureEmbedded
	if slot.source != nil {
		h.Place, h.Signature = slot.source.place(id), slot.source.signed[id]
	}
	for what := range l.origin {
		if strings.HasPrefix(what, "duty/") {
			h.Duties++
		}
	}
	return h, problems
}

// Heads reads what all bundles on the shelf say of themselves, in order of id.
func (s *Shelf) Heads() ([]*Head, error) {
	var out []*Head
	for _, id := range s.IDs() {
		h, problems := s.Head(id)
		if problems.Failed() {
			return nil, problems
		}
		out = append(out, h)
	}
	return out, nil
}

// Where gives the path of a file of the bundle as its author would type it.
func (b *Bundle) Where(file string) string { return located(b.places, file) }

func located(places map[string]string, file string) string {
	top, rest, inside := strings.Cut(file, "/")
	place, ok := places[top]
	switch {
	case !ok:
		return file
	case !inside:
		return place
	}
	return path.Join(place, rest)
}

// Embedded reads bundles that are built into the program: those named, or all. Each is read once.
func Embedded(ids ...string) (Library, error) {
	s, err := embeddedShelf()
	if err != nil {
		return nil, fmt.Errorf("the embedded bundles cannot be read: %w", err)
	}
	if len(ids) == 0 {
		ids = s.IDs()
	}
	return s.Take(ids...)
}
