package fhir

import "hearduty/internal/mapping"

// readContained reads the observations that are contained in a panel or report, as far as it names them.
func (p *part) readContained(s *source, n *node, key string) {
	var r reader
	known := map[string]bool{}
	s.eachContained(n, n, key, known, func(o *node) {
		if o == nil {
			p.failed(&mapping.Fault{Header: key, Why: "the panel or report names a contained observation that is not there", Remedy: "Have it exported again with its contained resources"})
			return
		}
		status := r.text(o, "status")
		state, fault := standingOf(status)
		p.failed(fault)
		switch state {
		case withdrawn:
			p.remark(&mapping.Remark{Why: "contained observations were passed over, since they were withdrawn", Remedy: "Nothing needs to be done"})
			return
		case premature:
			m := prematureRemark(status)
			p.remark(&m)
			return
		}
		p.inherit(s, n, o)
		c := r.concept(o, "code")
		if t, ok := toneOf(c); ok && s.table.Index(t.field()) >= 0 {
			p.readTone(s, o, t, c, status)
		}
		p.readComponents(s, o, status)
	})
	inside := r.objects(n, "contained")
	for i := range inside {
		if r.text(&inside[i], "resourceType") == "Observation" && !known[r.text(&inside[i], "id")] {
			p.remark(&mapping.Remark{Why: "contained observations that nothing refers to were passed over", Remedy: "Have them named by the panel or report"})
		}
	}
	p.failed(r.fault)
}

// inherit takes person and day from a contained observation where the panel or report has none, and refuses others
// than it has.
func (p *part) inherit(s *source, whole, o *node) {
	var r reader
	who, key := s.subject(whole, o, &r)
	when, fault := s.effective(o, &r)
	p.failed(r.fault)
	p.failed(fault)
	switch {
	case who == nil:
	case p.person == nil:
		p.person, p.key = who, key
	case p.key != key:
		p.failed(severalPeople())
	}
	switch {
	case when.day == "":
	case p.when.day == "":
		p.when = when
	case p.when.day != when.day:
		p.failed(severalDays())
	}
}

// eachContained calls do for every contained observation that a member of from names, directly or by way of a
// contained panel, once each, and with nil for one that is not there.
func (s *source) eachContained(whole, from *node, key string, known map[string]bool, do func(*node)) {
	var r reader
	for _, ref := range r.references(from, key) {
		if ref.to == "" || ref.to[0] != '#' || known[ref.to[1:]] {
			continue
		}
		known[ref.to[1:]] = true
		o := containedIn(whole, ref.to[1:])
		if o == nil || r.text(o, "resourceType") == "Observation" {
			do(o)
			s.eachContained(whole, o, "hasMember", known, do)
		}
	}
}

// containsTones says whether a contained observation that the resource names has a threshold.
func (s *source) containsTones(n *node, key string) bool {
	found := false
	s.eachContained(n, n, key, map[string]bool{}, func(o *node) {
		var r reader
		_, ok := toneOf(r.concept(o, "code"))
		found = found || ok || hasTones(o)
	})
	return found
}

// hasTones says whether a component has a threshold.
func hasTones(n *node) bool {
	var r reader
	list := r.objects(n, "component")
	for i := range list {
		if _, ok := toneOf(r.concept(&list[i], "code")); ok {
			return true
		}
	}
	return false
}
