package html

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
	"hearduty/internal/report/reporttest"
)

// twoLaws judges the demo program; one of its sites stands under the law and the company standard.
func twoLaws(t *testing.T) *finding.Report {
	t.Helper()
	p, problems := program.Load("../../../testdata/demo")
	require.NoError(t, problems.Err())
	p.Sites[0].Bundles = append(p.Sites[0].Bundles, "company-example")
	p.Sites[1].Bundles = p.Sites[1].Bundles[:1]
	library, err := bundle.Embedded()
	require.NoError(t, err)
	r, err := judge.Check(t.Context(), judge.Options{Program: p, Library: library, Sites: american, AsOf: p.AsOf, AheadDays: 90, Portraits: true, Version: "1.0.0"})
	require.NoError(t, err)
	return r
}

// TestBrowserBundlesSideBySide: a site that several bundles judge has a table of topics by bundle, whose cells have the
// numbers of the report and lead to the findings.
func TestBrowserBundlesSideBySide(t *testing.T) {
	t.Parallel()
	r := twoLaws(t)
	p := show(t, written(t, r), "")
	type cell struct{ Topic, Bundle, Title, Address, Shown string }
	got := of[[]cell](p, `[...document.querySelectorAll(".lined tbody tr")].flatMap((tr) => [...tr.cells].slice(1).map((td, i) => { const a = td.querySelector("a"); if (a) a.click();
		return { Topic: tr.cells[0].textContent, Bundle: tr.closest("table").querySelectorAll("thead th")[i + 1].textContent, Title: td.firstElementChild.title,
			Address: a ? decodeURIComponent(location.hash) : "", Shown: a ? document.getElementById("shown").textContent.split(" ").slice(0, 3).join(" ") : "" }; }))`)
	site := r.Sites[0]
	var want []cell
	for _, topic := range finding.Topics {
		for _, bundle := range site.Bundles {
			c := cell{Topic: topic, Bundle: bundle}
			var words []string
			for _, x := range r.Counts {
				if x.Site == site.ID && x.Bundle == bundle && x.Topic == topic {
					words = append(words, fmt.Sprintf("%d %s", x.Number, x.Status))
				}
			}
			c.Title = strings.Join(words, ", ")
			if n := len(filtered(r, filter{"site": site.ID, "bundle": bundle, "topic": topic})); n > 0 {
				c.Address, c.Shown = "#register?site="+site.ID+"&bundle="+bundle+"&topic="+topic, fmt.Sprintf("%d of %d", n, len(r.Findings))
			}
			want = append(want, c)
		}
	}
	assert.Equal(t, want, got)
	assert.Equal(t, []string{"Bundles side by side at " + site.ID + ", " + site.Name}, of[[]string](p, `[...document.querySelectorAll("#stand h3")].map((h) => h.textContent)`), "the site with one bundle needs none")
}

const paragraphCells = `[...document.querySelectorAll("#rows > tr")].map((tr) => tr.cells[4].textContent)`

// TestBrowserFindingsSayTheirBundle where there are several, with and without the script, and also by subject; where there
// is one, nothing repeats it.
func TestBrowserFindingsSayTheirBundle(t *testing.T) {
	t.Parallel()
	r := twoLaws(t)
	p := show(t, written(t, r), "")
	var want []string
	for _, f := range r.Findings[:shownAtOnce] {
		want = append(want, f.Cite+f.Bundle)
	}
	assert.Equal(t, want, of[[]string](p, paragraphCells))
	page := string(reporttest.Written(t, Format{}, r))
	static := strings.Split(page, `<tbody id="rows">`)[1]
	static = static[:strings.Index(static, "</tbody>")]
	assert.Equal(t, shownAtOnce, strings.Count(static, "<small>us-osha-general-industry</small></td></tr>")+strings.Count(static, "<small>company-example</small></td></tr>"))
	subjects := of[[]string](p, `[...document.querySelectorAll("details.subject table.stack tbody tr")].map((tr) => tr.cells[3].querySelector("small").textContent)`)
	assert.Len(t, subjects, len(r.Findings))
	assert.Contains(t, subjects, "company-example")

	one := demoOf(t, false)
	cells := of[[]string](show(t, written(t, one), ""), paragraphCells)
	assert.Equal(t, one.Findings[0].Cite, cells[0])
}
