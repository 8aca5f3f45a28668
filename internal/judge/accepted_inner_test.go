package judge

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/accept"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// TestTheBeginningOfTwoIDsAcceptsNeither: ids that begin alike are too rare to wait for.
func TestTheBeginningOfTwoIDsAcceptsNeither(t *testing.T) {
	list, problems := accept.Parse([]byte("- {id: f-01234567, reason: The order is placed., approved_by: x, until: 2026-12-31}\n"), "a.yaml", "a.yaml")
	require.Empty(t, problems)
	site := program.Site{ID: "s1"}
	c := &check{Options: Options{AsOf: calendar.MustParse("2026-06-30"), Accepted: list, Sites: []string{"s1"}, Program: &program.Program{Sites: []program.Site{site, {ID: "s2"}}}}}
	b := &bench{site: &site, counts: map[countKey]int{}}
	for _, id := range []string{"f-0123456700000001", "f-0123456700000002"} {
		b.taken = append(b.taken, taken{finding.Finding{ID: id, Topic: "training", Status: finding.Gap}, []int{0}})
	}
	c.sites, c.benches = []*program.Site{&site}, map[string][]*bench{"s1": {b}}
	totals := map[finding.Status]int{}
	own := c.settleAccepted(totals)
	assert.Empty(t, totals)
	assert.Equal(t, map[countKey]int{{"training", finding.Gap}: 2}, b.counts)
	require.Len(t, b.findings, 2)
	assert.Nil(t, b.findings[0].Accepted)
	require.Len(t, own.bySite["s1"], 1)
	assert.Equal(t, "The entry in line 1 of a.yaml accepts nothing, since the ids of 2 findings begin with f-01234567.", own.bySite["s1"][0].Message)
}
