package text

import (
	"bytes"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
)

// severalBundles is a report of one site under three bundles, of which one owes nothing.
func severalBundles() *finding.Report {
	r := &finding.Report{Sites: []finding.Site{{ID: "a", Bundles: []string{"law", "silent", "company"}, Workers: 2}}}
	add := func(bundle, topic string, status finding.Status, n int) {
		r.Counts = append(r.Counts, finding.Count{Site: "a", Bundle: bundle, Topic: topic, Status: status, Number: n})
	}
	add("law", "training", finding.Met, 3)
	add("company", "training", finding.Gap, 2)
	add("company", "training", finding.Met, 1)
	add("company", "monitoring", finding.Unproven, 4)
	add(finding.OfProgram, "records", finding.Gap, 1)
	return r
}

func tableOf(t *testing.T, width int) string {
	t.Helper()
	var b bytes.Buffer
	p := newPage(&b, width, false)
	r := severalBundles()
	table(p, r, r.Sites[0])
	require.NoError(t, p.flush())
	return b.String()
}

// TestSeveralBundlesSideBySide: each topic has one row a bundle, in the order of the program file; a bundle that owes
// nothing is named, and the program's own papers stand apart.
func TestSeveralBundlesSideBySide(t *testing.T) {
	assert.Equal(t, strings.TrimPrefix(`
Site a, 2 workers
  A: by law
  B: by company
  silent: no duty is owed, or none could be judged.
                     gap  unproven  opinion     due    late  lifted     met
  monitoring   A       -         -        -       -       -       -       -
               B       -         4        -       -       -       -       -
  training     A       -         -        -       -       -       -       3
               B       2         -        -       -       -       -       1
  The program's own papers, which no law asks for
                     gap  unproven  opinion     due    late  lifted     met
  records              1         -        -       -       -       -       -
`, "\n"), strings.TrimPrefix(tableOf(t, 80), "\n"))
	assert.Equal(t, strings.TrimPrefix(`
Site a, 2 workers
  A: by law
  B: by company
  silent: no duty is owed, or none could
  be judged.
  monitoring, A: nothing
  monitoring, B: 4 unproven
  training, A: 3 met
  training, B: 2 gap, 1 met
  The program's own papers, which no law
  asks for
  records: 1 gap
`, "\n"), strings.TrimPrefix(tableOf(t, 40), "\n"))
}

func TestLettersGoOn(t *testing.T) {
	assert.Equal(t, []string{"A", "Z", "27"}, []string{letter(0), letter(25), letter(26)})
}
