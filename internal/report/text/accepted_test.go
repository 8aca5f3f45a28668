package text

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// TestAcceptedStandsApart: in a section of its own, beside the numbers, and not among the gaps.
func TestAcceptedStandsApart(t *testing.T) {
	gap := finding.Finding{ID: "f-0000000000000001", Site: "a", Bundle: "b", Duty: "annual-training", Subject: finding.Subject{Kind: "worker", ID: "1"}, Status: finding.Gap, Message: "not trained", Cite: "(k)"}
	accepted := gap
	accepted.ID, accepted.Subject.ID = "f-0000000000000002", "2"
	accepted.Accepted = &finding.Acceptance{Reason: "The course is booked", ApprovedBy: "plant manager", Until: calendar.MustParse("2026-12-31"), File: "accepted.yaml", Row: 3}
	r := &finding.Report{AsOf: calendar.MustParse("2026-06-30"), Sites: []finding.Site{{ID: "a", Bundles: []string{"b"}}}, Findings: []finding.Finding{gap, accepted},
		Totals: map[finding.Status]int{finding.Gap: 1}, AcceptedTotals: map[finding.Status]int{finding.Gap: 1},
		Counts: []finding.Count{{Site: "a", Bundle: "b", Topic: "training", Status: finding.Gap, Number: 1}, {Site: "a", Bundle: finding.OfProgram, Topic: "records", Status: finding.Gap, Number: 2}}}
	var b bytes.Buffer
	require.NoError(t, Format{Width: 200}.Write(&b, r))
	out := b.String()
	gaps, apart, found := strings.Cut(out, "Accepted by the employer (1): not met, and left as it is until a day\n")
	require.True(t, found)
	assert.Contains(t, gaps, "Gaps (1)")
	assert.NotContains(t, gaps, "worker 2")
	assert.Contains(t, gaps, "Accepted by the employer for a time, and not among these numbers: 1 gap.")
	assert.Contains(t, gaps, "The program's own papers, which no law asks for\n")
	assert.Contains(t, apart, "  - Gap, worker 2: Not trained. [f-0000000000000002]\n    Accepted until 2026-12-31, approved by plant manager (accepted.yaml:3): The course is booked.\n")
}
