package html

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

func TestGolden(t *testing.T) { reporttest.Golden(t, Format{}) }

func TestPrivate(t *testing.T) { reporttest.Private(t, Format{}) }

// The page knows its script and its style sheet by their digests, so no writing may change a letter of them.
func TestPolicyFitsThePage(t *testing.T) {
	page := string(reporttest.Written(t, Format{}, reporttest.Odd()))
	assert.Contains(t, page, "<style>"+style()+"</style>")
	assert.Contains(t, page, "<script>"+scriptText+"</script>")
	assert.NotContains(t, page, "unsafe-inline")
	assert.Equal(t, 2, strings.Count(page, "<script"))
	assert.NotContains(t, page, ` style="`)
	assert.NotContains(t, page, "ZgotmplZ", "a value that the template refused")
}

// A part of a report that was split counts what its own site has.
func TestOfSite(t *testing.T) {
	r := demoOf(t, false)
	listed, total, accepted := 0, map[finding.Status]int{}, map[finding.Status]int{}
	for _, s := range r.Sites {
		part := OfSite(r, s.ID)
		listed += len(part.Findings)
		for status, n := range part.Totals {
			total[status] += n
		}
		for status, n := range part.AcceptedTotals {
			accepted[status] += n
		}
		for _, f := range part.Findings {
			require.Equal(t, s.ID, f.Site)
		}
		var b bytes.Buffer
		require.NoError(t, Format{}.Write(&b, part))
		for _, other := range r.Sites {
			if other.ID != s.ID {
				assert.NotContains(t, b.String(), `data-filter="site=`+other.ID)
			}
		}
	}
	assert.Equal(t, len(r.Findings), listed)
	assert.Equal(t, r.Totals, total)
	assert.Equal(t, r.AcceptedTotals, accepted)
	assert.Nil(t, Format{}.Split(r), "a small report is split")
}

func TestWhatFallsDue(t *testing.T) {
	r := &finding.Report{AsOf: madeDay}
	for i, days := range []int{30, 31, 60, 90, 91, 0} {
		r.Findings = append(r.Findings, finding.Finding{ID: string(rune('a' + i)), Status: finding.Due, Due: madeDay + calendar.Date(days)})
	}
	r.Findings = append(r.Findings, finding.Finding{Status: finding.Due}, finding.Finding{Status: finding.Gap, Due: madeDay},
		finding.Finding{Status: finding.Due, Due: madeDay + 1, Accepted: &finding.Acceptance{}})
	v, err := view(r)
	require.NoError(t, err)
	var got [][3]int
	for _, h := range v.Soon {
		got = append(got, [3]int{h.Days, h.Number, len(h.Items)})
	}
	assert.Equal(t, [][3]int{{30, 2, 2}, {60, 4, 2}, {90, 5, 1}}, got)
	assert.Equal(t, "f", v.Soon[0].Items[0].ID, "the first to fall due comes first")
}
