package cli

import (
	"hearduty/internal/accept"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// acceptedWord stands in --fail-on for a finding that the employer has accepted. It is no status: such a finding
// keeps its own, and is counted apart.
const acceptedWord = "accepted"

// accepted reads the gaps that the employer has accepted, if the program names a file of them.
func (r *run) accepted(p *program.Program) (*accept.List, error) {
	if p.Accepted.Open == "" {
		return nil, nil
	}
	list, problems := accept.Load(p.Accepted.Open, p.Accepted.Shown)
	return list, problems.Err()
}

// accepted gives the number of findings that the employer has accepted.
func accepted(r *finding.Report) int {
	n := 0
	for _, of := range r.AcceptedTotals {
		n += of
	}
	return n
}
