package fhir

import "hearduty/internal/mapping"

// group is an audiogram that is being gathered.
type group struct {
	id         string // of the panel or report
	waits      int    // observations still to come
	awaitsHead bool   // the panel or report is still to come
	leader     int    // item of the panel or report; 0 if there is none
	lines      []int32
	person     *person
	key        string
	day        string
	device     string
	tester     string
	purpose    string
	readings   []reading
	remarks    []mapping.Remark
	notData    string // why all of it is no data
	fault      *mapping.Fault
	faultLine  int
}

// failed keeps the first fault.
func (g *group) failed(line int, f *mapping.Fault) {
	if g.fault == nil && f != nil {
		g.fault, g.faultLine = f, line
	}
}

// lead adds what the panel or report says.
func (g *group) lead(p *part) {
	g.leader = p.line
	g.add(p)
}

// add adds what a resource says and looks for contradictions.
func (g *group) add(p *part) {
	g.lines = append(g.lines, int32(p.line))
	g.readings = append(g.readings, p.readings...)
	for _, m := range p.remarks {
		g.remark(m)
	}
	g.failed(p.line, p.fault)
	if p.person != nil {
		g.failed(p.line, p.person.fault)
		if g.person != nil && g.key != p.key {
			g.failed(p.line, severalPeople())
		}
		g.person, g.key = p.person, p.key
	}
	if p.when.day != "" {
		if g.day != "" && g.day != p.when.day {
			g.failed(p.line, severalDays())
		}
		g.day = p.when.day
	}
	for _, purpose := range p.purposes {
		if g.purpose != "" && g.purpose != purpose {
			g.failed(p.line, &mapping.Fault{Field: "purpose", Why: "the codes tell of several purposes of the test", Remedy: "Correct the codes, or the purposes in the map"})
		}
		g.purpose = purpose
	}
	g.agree(&g.device, p.device, "audiometer_id", "the resources of one test name several audiometers, so audiometer_id was left empty")
	g.agree(&g.tester, p.tester, "tester_id", "the resources of one test name several testers, so tester_id was left empty")
}

func severalPeople() *mapping.Fault {
	return workerFault("the resources of one test are about several patients", "Correct the references to the patients, or the references of the panel or report")
}

func severalDays() *mapping.Fault {
	return &mapping.Fault{Field: "date", Why: "the resources of one test were observed on several days", Remedy: "Give each test a panel or report of its own, or correct the days"}
}

// conflicting stands for an id on which the resources do not agree.
const conflicting = "\x00"

func (g *group) agree(have *string, more, field, why string) {
	switch {
	case more == "" || *have == more || *have == conflicting:
	case *have == "":
		*have = more
	default:
		*have = conflicting
		g.remark(mapping.Remark{Field: field, Why: why, Remedy: "Nothing needs to be done unless a duty asks for it"})
	}
}

func (g *group) remark(m mapping.Remark) {
	for _, known := range g.remarks {
		if known == m {
			return
		}
	}
	g.remarks = append(g.remarks, m)
}

// headedGroup gives the group of a panel or report of the index.
func (s *source) headedGroup(no int32) *group {
	g := s.headed[no]
	if g == nil {
		h := &s.index.heads[no]
		g = &group{waits: h.waits, awaitsHead: true}
		g.failed(h.line, h.fault)
		switch {
		case h.missing == 0:
		case h.rank == report:
			g.remark(mapping.Remark{Why: "reports name results that are not in the file", Remedy: "Look up whether thresholds are among them, and have them exported too"})
		default:
			g.failed(h.line, &mapping.Fault{Header: "hasMember", Why: "the panel names observations that are not in the file", Remedy: "Have them exported too, so that the test is complete"})
		}
		s.headed[no] = g
	}
	return g
}

// looseGroup gives the group of an observation that no panel or report names: those of one patient, day, encounter
// and device are one test.
func (s *source) looseGroup(p *part) *group {
	key := p.key + "\x00" + p.when.day + "\x00" + p.when.read + "\x00" + p.encounter + "\x00" + p.device
	g := s.loose[key]
	if g == nil {
		g = &group{}
		s.loose[key] = g
	}
	return g
}
