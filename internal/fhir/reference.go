package fhir

import (
	"crypto/sha256"
	"strings"
)

// address stands for the address of a resource: the beginning of its SHA-256, so that long addresses take no
// memory.
type address [16]byte

// ambiguous stands for an address that several resources have.
var ambiguous address

func addressOf(text string) address {
	sum := sha256.Sum256([]byte(text))
	return address(sum[:16])
}

// plainAddress takes away the version behind an address, as references may hold one.
func plainAddress(text string) string {
	plain, _, _ := strings.Cut(text, "/_history/")
	return plain
}

func absolute(text string) bool {
	return strings.HasPrefix(text, "http://") || strings.HasPrefix(text, "https://")
}

// relative gives the end of an absolute address, such as Patient/123. It is empty if the address is too short.
func relative(text string) string {
	slash := strings.LastIndexByte(text, '/')
	if slash < 0 {
		return ""
	}
	before := strings.LastIndexByte(text[:slash], '/')
	return text[before+1:]
}

// addresses gives the address of a resource and the other one that references may use. Without a second, both are
// the same; without any, it returns false.
func (i *item) addresses(id string) (first, second address, ok bool) {
	full := plainAddress(i.fullURL)
	local := ""
	if id != "" {
		local = i.kind + "/" + id
	}
	switch {
	case absolute(full) && local != "":
		return addressOf(full), addressOf(local), true
	case local != "" && full != "":
		return addressOf(local), addressOf(full), true
	case local != "":
		first = addressOf(local)
		return first, first, true
	case full != "":
		first = addressOf(full)
		return first, first, true
	}
	return first, second, false
}

// target is where a literal reference points to.
type target struct {
	whole address
	end   address // of the relative end of an absolute address
	far   bool    // the address is absolute
}

func targetOf(to string) target {
	to = plainAddress(to)
	t := target{whole: addressOf(to), far: absolute(to)}
	if t.far {
		t.end = addressOf(relative(to))
	}
	return t
}

// find gives the first address of the resource that a reference points to. It returns ambiguous if there are
// several, and false if there is none. The end of an absolute address counts only for resources that do not state
// their own absolute address, as in bulk exports.
func (x *index) find(t target) (address, bool) {
	if _, ok := x.seen[t.whole]; ok {
		return t.whole, true
	}
	if first, ok := x.second[t.whole]; ok {
		return first, true
	}
	if _, ok := x.seen[t.end]; ok && t.far {
		return t.end, true
	}
	return address{}, false
}
