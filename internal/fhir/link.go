package fhir

import "hearduty/internal/mapping"

// head is a panel or report that gathers observations.
type head struct {
	own     address
	known   bool // own is its address
	line    int
	rank    rank
	waits   int // observations that belong to it
	missing int // observations that it names and the file does not hold
	fault   *mapping.Fault
}

// rank says which of two heads an observation belongs to if both name it: the greater.
type rank uint8

const (
	report rank = iota + 1
	panel       // an observation with members
	tonePanel
)

// named is an observation that a head names.
type named struct {
	head int32
	to   target
}

func (x *index) addHead(i *item, own address, known bool, key string) {
	var r reader
	members := r.references(i.resource, key)
	if len(members) == 0 {
		return
	}
	h := head{own: own, known: known, line: i.line, rank: report}
	if i.kind == "Observation" {
		h.rank = panel
		if isPanel(r.concept(i.resource, "code")) {
			h.rank = tonePanel
		}
	}
	for _, m := range members {
		switch {
		case m.to == "":
			h.missing++
		case m.to[0] != '#':
			x.named = append(x.named, named{int32(len(x.heads)), targetOf(m.to)})
		}
	}
	x.headAt[i.line] = len(x.heads)
	x.heads = append(x.heads, h)
}

// counts says whether the resource of the item at line is the one that counts, and not an earlier version.
func (x *index) counts(own address, line int) bool {
	return x.seen[own].line == int32(line) && !x.contested(own)
}

// link gives every threshold that heads name to one head.
func (x *index) link() {
	for _, n := range x.named {
		h := &x.heads[n.head]
		if h.known && !x.counts(h.own, h.line) {
			continue
		}
		to, ok := x.find(n.to)
		switch {
		case !ok:
			h.missing++
			continue
		case to == ambiguous || x.contested(to):
			h.fail("it names an observation that stands in the file several times", "Keep the version that counts and leave the others out")
			continue
		case !x.seen[to].threshold:
			continue
		}
		other, taken := x.links[to]
		switch {
		case !taken:
			h.waits++
			x.links[to] = n.head
		case other == n.head || x.heads[other].rank > h.rank:
		case x.heads[other].rank < h.rank:
			x.heads[other].waits--
			h.waits++
			x.links[to] = n.head
		default:
			const why, remedy = "another panel or report names the same observation", "Let each observation belong to one test, or leave one of the two out"
			h.fail(why, remedy)
			x.heads[other].fail(why, remedy)
		}
	}
	x.named = nil
}

func (h *head) fail(why, remedy string) {
	if h.fault == nil {
		h.fault = &mapping.Fault{Why: why, Remedy: remedy}
	}
}
