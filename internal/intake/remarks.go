package intake

import (
	"fmt"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// remarks collects warnings and counts the rows that share one.
type remarks struct {
	list  diag.List
	count map[remarkKey]*remark
}

type remarkKey struct{ file, field, read, why string }

type remark struct{ at, rows int }

func (m *remarks) add(at diag.Position, p *record.Problem) {
	key := remarkKey{at.File + "\x00" + at.Sheet, p.Field, p.Read, p.Why}
	if known := m.count[key]; known != nil {
		known.rows++
		return
	}
	if m.count == nil {
		m.count = map[remarkKey]*remark{}
	}
	m.count[key] = &remark{len(m.list), 1}
	problem := p.Why
	if p.Field != "" {
		problem = p.Field + ": " + p.Why
	}
	m.list.Warnf(at, p.Remedy, "%s", problem)
}

// done gives the warnings; one that several rows share says so.
func (m *remarks) done() diag.List {
	for _, r := range m.count {
		if r.rows > 1 {
			m.list[r.at].Problem += fmt.Sprintf(" (%d rows)", r.rows)
		}
	}
	return m.list
}
