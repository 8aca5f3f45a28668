package fhir

import (
	"fmt"

	"hearduty/internal/audiometry"
	"hearduty/internal/mapping"
)

// part is what one resource says of an audiogram.
type part struct {
	line      int
	person    *person // nil if no subject is named
	key       string  // tells one person from another
	when      moment
	encounter string
	device    string
	tester    string
	purposes  []string
	readings  []reading
	remarks   []mapping.Remark
	fault     *mapping.Fault
}

// reading is one threshold.
type reading struct {
	tone    tone
	level   audiometry.Threshold
	clock   int64
	line    int32
	revised bool // amended or corrected
}

// failed keeps the first fault.
func (p *part) failed(f *mapping.Fault) {
	if p.fault == nil {
		p.fault = f
	}
}

func (p *part) remark(m *mapping.Remark) {
	if m != nil {
		p.remarks = append(p.remarks, *m)
	}
}

// part reads what every kind of resource says: whom, when and by what and whom the test was made.
func (s *source) part(n *node, line int) *part {
	p := &part{line: line}
	var r reader
	if n.at("modifierExtension") != nil {
		p.failed(&mapping.Fault{Header: "modifierExtension", Why: "the resource has an extension that changes its meaning", Remedy: "Look up what it says, and have the resource exported without it if it still counts"})
	}
	p.person, p.key = s.subject(n, n, &r)
	var fault *mapping.Fault
	p.when, fault = s.effective(n, &r)
	p.failed(fault)
	var m *mapping.Remark
	p.device, m = s.device(n, &r)
	p.remark(m)
	p.tester, m = s.tester(n, &r)
	p.remark(m)
	p.purposes = s.purposes(n)
	p.encounter = r.text(r.object(n, "encounter"), "reference")
	p.failed(r.fault)
	return p
}

// readTone reads the threshold of an observation or a component.
func (p *part) readTone(s *source, n *node, t tone, c concept, status string) {
	if fault := t.checkCode(c); fault != nil {
		p.failed(fault)
		return
	}
	if fault := t.checkSite(n); fault != nil {
		p.failed(fault)
		return
	}
	level, remark, fault := s.threshold(n, t)
	if fault != nil {
		p.failed(fault)
		return
	}
	p.remark(remark)
	p.readings = append(p.readings, reading{tone: t, level: level, clock: p.when.clock, line: int32(p.line), revised: status == "amended" || status == "corrected"})
}

// readComponents reads the thresholds among the components of a panel.
func (p *part) readComponents(s *source, n *node, status string) {
	var r reader
	list := r.objects(n, "component")
	for i := range list {
		component := &list[i]
		c := r.concept(component, "code")
		t, ok := toneOf(c)
		switch {
		case r.fault != nil:
		case component.at("modifierExtension") != nil:
			p.failed(&mapping.Fault{Header: "component", Why: "a component has an extension that changes its meaning", Remedy: "Look up what it says, and have the resource exported without it if it still counts"})
		case !ok:
			p.failed(withoutSystem(c))
			p.remark(unknownCode(component, c))
		case s.table.Index(t.field()) < 0:
			p.remark(&mapping.Remark{Why: fmt.Sprintf("thresholds at %d Hz were passed over, since no record holds them", t.hz), Remedy: "Nothing needs to be done"})
		default:
			p.readTone(s, component, t, c, status)
		}
	}
	p.failed(r.fault)
}

// checkPanelNotes refuses notes of a panel that speak of no response, since they do not say at which frequency.
func (p *part) checkPanelNotes(s *source, n *node) {
	var r reader
	for _, note := range r.notes(n) {
		if word := s.within(note); word != "" {
			p.failed(&mapping.Fault{Header: "note", Why: fmt.Sprintf("a note of the panel holds the word %q, but does not belong to one threshold", word), Remedy: "State it at the component, as comparator > or as interpretation, and take the note out"})
		}
	}
	p.failed(r.fault)
}
