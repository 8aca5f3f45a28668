package fhir

import (
	"hash/maphash"
	"strconv"
	"time"
)

// rivals are resources of one address. The one that counts is the latest by what meta says.
type rivals struct {
	best      version
	contested bool // nothing tells which is the latest
}

// version is what tells one version of a resource from another.
type version struct {
	line    int
	updated time.Time
	number  int // of meta.versionId; 0 if that is no number
	content uint64
}

var contentSeed = maphash.MakeSeed()

func versionOf(i *item) version {
	var r reader
	meta := r.object(i.resource, "meta")
	v := version{line: i.line}
	v.updated, _ = time.Parse(time.RFC3339, r.text(meta, "lastUpdated"))
	v.number, _ = strconv.Atoi(r.text(meta, "versionId"))
	var h maphash.Hash
	h.SetSeed(contentSeed)
	i.resource.sum(&h)
	v.content = h.Sum64()
	return v
}

func (n *node) sum(h *maphash.Hash) {
	_ = h.WriteByte(byte(n.kind))
	_, _ = h.WriteString(n.text)
	for i := range n.items {
		_ = h.WriteByte('(')
		if n.kind == object {
			_, _ = h.WriteString(n.keys[i])
			_ = h.WriteByte('=')
		}
		n.items[i].sum(h)
	}
	_ = h.WriteByte(')')
}

// after compares two versions: 1 if v is the later, -1 if it is the earlier, 0 if they are equal. It returns false if
// that cannot be told.
func (v version) after(o version) (int, bool) {
	switch {
	case v.content == o.content:
		return 0, true
	case !v.updated.IsZero() && !o.updated.IsZero() && !v.updated.Equal(o.updated):
		return v.updated.Compare(o.updated), true
	case v.number > 0 && o.number > 0 && v.number != o.number:
		return min(1, max(-1, v.number-o.number)), true
	}
	return 0, false
}

// compareVersions reads the file again and finds which of the resources that stand in it several times counts.
func (s *source) compareVersions() error {
	x := s.index
	return s.each(func(i *item) error {
		var r reader
		own, _, ok := i.addresses(r.text(i.resource, "id"))
		rivals := x.again[own]
		if !ok || rivals == nil {
			return nil
		}
		v := versionOf(i)
		if rivals.best.line == 0 {
			rivals.best = v
			return nil
		}
		order, told := v.after(rivals.best)
		switch {
		case !told:
			rivals.contested = true
		case order > 0:
			rivals.best = v
			x.seen[own] = place{int32(v.line), x.seen[own].threshold}
		}
		return nil
	})
}

func (x *index) contested(own address) bool {
	r := x.again[own]
	return r != nil && r.contested
}
