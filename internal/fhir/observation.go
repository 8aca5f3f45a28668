package fhir

import (
	"fmt"

	"hearduty/internal/mapping"
)

// observation deals with an Observation: a threshold, a panel of thresholds, or another one.
func (s *source) observation(i *item) {
	var r reader
	n := i.resource
	c := r.concept(n, "code")
	own, _, known := i.addresses(r.text(n, "id"))
	if r.fault != nil {
		s.reject(i.line, r.fault)
		return
	}
	if known && s.earlier(i, own) {
		return
	}
	t, isTone := toneOf(c)
	no, isHead := s.index.headAt[i.line]
	switch {
	case isTone:
		s.single(i, own, known, t, c)
	case isPanel(c) || hasTones(n) || isHead && (s.index.heads[no].waits > 0 || s.containsTones(n, "hasMember")):
		s.head(i, "hasMember")
	default:
		if fault := withoutSystem(c); fault != nil {
			s.reject(i.line, fault)
			return
		}
		var remarks []mapping.Remark
		if remark := unknownCode(n, c); remark != nil {
			remarks = append(remarks, *remark)
		}
		s.pass(i.line, "another observation", remarks...)
	}
}

// earlier deals with a resource that stands in the file several times. It returns false for the one that counts.
func (s *source) earlier(i *item, own address) bool {
	x := s.index
	rivals := x.again[own]
	switch {
	case rivals == nil || x.counts(own, i.line):
		return false
	case rivals.contested:
		s.reject(i.line, &mapping.Fault{Header: "id", Why: "the resource stands in the file several times with different content, and nothing tells which is the latest", Remedy: "Keep the version that counts, or have meta.lastUpdated exported"})
	case versionOf(i).content == rivals.best.content:
		s.pass(i.line, "repeated resource")
	default:
		s.pass(i.line, "earlier version")
	}
	return true
}

// report deals with a DiagnosticReport. It is of use only where it gathers thresholds.
func (s *source) report(i *item) {
	var r reader
	own, _, known := i.addresses(r.text(i.resource, "id"))
	if known && s.earlier(i, own) {
		return
	}
	no, ok := s.index.headAt[i.line]
	if !ok || s.index.heads[no].waits == 0 && !s.containsTones(i.resource, "result") {
		s.pass(i.line, i.kind)
		return
	}
	s.head(i, "result")
}

// single deals with an observation of one threshold.
func (s *source) single(i *item, own address, known bool, t tone, c concept) {
	no, linked := s.index.links[own]
	var g *group
	if linked = linked && known; linked {
		g = s.headedGroup(no)
		g.waits--
		defer s.settle(no, g)
	}
	var r reader
	status := r.text(i.resource, "status")
	state, fault := standingOf(status)
	switch {
	case state == withdrawn:
		s.pass(i.line, notData(status))
		return
	case state == premature:
		s.pass(i.line, notData(status), prematureRemark(status))
		return
	case s.table.Index(t.field()) < 0:
		s.pass(i.line, fmt.Sprintf("threshold at %d Hz", t.hz))
		return
	}
	p := s.part(i.resource, i.line)
	p.failed(fault)
	p.readTone(s, i.resource, t, c, status)
	if !linked {
		g = s.looseGroup(p)
	}
	g.add(p)
}

// head deals with a panel, or with a report that gathers thresholds. Key names the member with the references.
func (s *source) head(i *item, key string) {
	var r reader
	status := r.text(i.resource, "status")
	id := r.text(i.resource, "id")
	state, fault := standingOf(status)
	g := &group{awaitsHead: true}
	no, linked := s.index.headAt[i.line]
	if linked {
		g = s.headedGroup(int32(no))
	}
	g.awaitsHead = false
	defer s.settle(int32(no), g)
	isPanel := i.kind == "Observation"
	switch {
	case state == withdrawn:
		s.pass(i.line, notData(status))
		g.failed(i.line, &mapping.Fault{Header: "status", Why: "the panel or report that gathers the observations was withdrawn, but they were not", Remedy: "Look up whether the test counts, and give all of its resources the same status"})
		return
	case state == premature && isPanel:
		s.pass(i.line, notData(status), prematureRemark(status))
		g.notData = notData(status)
		return
	case isPanel && g.waits == 0 && len(g.lines) == 0 && i.resource.at("dataAbsentReason") != nil && !hasTones(i.resource) && !s.containsTones(i.resource, key):
		s.pass(i.line, "test without a result")
		return
	}
	p := s.part(i.resource, i.line)
	p.failed(fault)
	if state == premature {
		p.remarks = append(p.remarks, mapping.Remark{Why: "the report is not final yet, but its observations are", Remedy: "Nothing needs to be done unless the report changes them"})
	}
	if isPanel {
		p.readComponents(s, i.resource, status)
		p.checkPanelNotes(s, i.resource)
	}
	p.readContained(s, i.resource, key)
	g.id = id
	g.lead(p)
}
