package html

import (
	"fmt"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

// oddReports are reports that one would not think of.
func oddReports() map[string]*finding.Report {
	odd := reporttest.Odd()
	twelve := reporttest.Odd()
	twelve.Sites, twelve.Counts = nil, nil
	for i := range 12 {
		site := fmt.Sprintf("site-%d & <co>", i)
		twelve.Sites = append(twelve.Sites, finding.Site{ID: site, Name: strings.Repeat("A long name ", 1+i%4), Bundles: odd.Sites[0].Bundles, Workers: i})
		for j, topic := range finding.Topics {
			twelve.Counts = append(twelve.Counts, finding.Count{Site: site, Bundle: "b", Topic: topic, Status: finding.Statuses[(i+j)%7], Number: 1 + i*j*j*j})
		}
		if i < len(twelve.Findings) {
			twelve.Findings[i].Site = site
		}
	}
	one := reporttest.Odd()
	one.Sites, one.Findings, one.Rejects, one.Observations, one.ObservationCounts = one.Sites[:1], one.Findings[:1], one.Rejects[:1], nil, nil
	hostile := reporttest.Odd()
	hostile.Program = `</title><script>window.ran = 1</script>`
	for i, text := range []string{`<img src=x onerror="window.ran=1">`, `</script><script>window.ran=1</script>`, `" onfocus="window.ran=1" autofocus="`, `javascript:window.ran=1`, `'; window.ran=1; '`, `{{.}} ${window.ran=1} <!--`, `a/b~c d%41é#?&`} {
		f := &hostile.Findings[i]
		f.Subject.ID, f.Message, f.Cite, f.Remedy, f.Site, f.Topic, f.Key = text, text, text, text, text, text, text
		f.Facts = map[string]any{text: text}
		f.Evidence = []finding.Evidence{{Record: text, File: text, Sheet: text, Row: 1}}
		hostile.Sites = append(hostile.Sites, finding.Site{ID: text, Name: text, Choices: map[string]any{text: text}})
		hostile.Counts = append(hostile.Counts, finding.Count{Site: text, Topic: text, Status: finding.Gap, Number: 1})
		hostile.Remarks = append(hostile.Remarks, text)
	}
	long := reporttest.Odd()
	for i := range long.Findings {
		f, text := &long.Findings[i], strings.Repeat("long", 60)
		f.Subject.ID, f.Message, f.Site, f.Cite = text+fmt.Sprint(i), text+" "+text, text, text
	}
	long.Sites[0].ID, long.Sites[0].Name, long.Program, long.Inputs[0].File, long.Rejects[0].File = long.Findings[0].Site, "", strings.Repeat("program", 40), strings.Repeat("folder/", 40)+"x.csv", strings.Repeat("x", 200)
	return map[string]*finding.Report{"odd": odd, "empty": reporttest.Empty(), "twelve sites": twelve, "one": one, "hostile": hostile, "long": long}
}

func TestBrowserOddReports(t *testing.T) {
	t.Parallel()
	for name, r := range oddReports() {
		t.Run(name, func(t *testing.T) {
			p := show(t, written(t, r), "")
			assert.False(t, of[bool](p, `"ran" in window`))
			assert.Contains(t, of[string](p, "document.title"), r.Program)
			got := of[[]opened](p, openAll)
			require.Len(t, got, len(r.Findings))
			for i := range r.Findings {
				assert.Equal(t, openedOf(r, &r.Findings[i]), got[i])
			}
			dead := of[[]string](p, `[...document.querySelectorAll("a[href^='#']")].map((a) => a.getAttribute("href").slice(1)).filter((h) => !h.startsWith("register") && !document.getElementById(decodeURIComponent(h)))`)
			assert.Empty(t, dead, "links that lead nowhere")
			assert.Equal(t, len(r.Findings), of[int](p, `[...document.querySelectorAll("#rows .more a:not(.id)")].filter((a) => document.getElementById(decodeURIComponent(a.hash.slice(1)))).length`))
			want, chosen := []int{}, [][2]string{}
			for i := range r.Findings {
				f := &r.Findings[i]
				want, chosen = append(want, len(filtered(r, filter{"site": f.Site, "topic": f.Topic}))), append(chosen, [2]string{f.Site, f.Topic})
			}
			assert.Equal(t, want, of[[]int](p, jsText(chosen)+`.map((pair) => { ["site", "topic"].forEach((name, i) => { const s = document.querySelector("select[name=" + name + "]"); s.value = pair[i]; s.dispatchEvent(new Event("change")); });
				const n = document.querySelectorAll("#rows > tr").length; document.querySelector("button[type=reset]").click(); return n; })`))
			for _, width := range []int64{360, 900, 1400} {
				p.do(chromedp.EmulateViewport(width, 900))
				of[int](p, `(document.querySelectorAll("details").forEach((d) => { d.open = true; }), 0)`)
				wide := of[[]string](p, `document.documentElement.scrollWidth <= innerWidth ? [] : ["page"].concat([...document.querySelectorAll("body *")].filter((e) => !e.parentElement.closest(".scroll, .strip, svg, .body") && e.getBoundingClientRect().right > innerWidth).map((e) => e.tagName + "." + e.className))`)
				assert.Empty(t, wide, "the page is wider than %d", width)
			}
		})
	}
}

// The cell of a site leads to that site's findings, whatever its name.
func TestBrowserCellsOfOddSites(t *testing.T) {
	t.Parallel()
	r := oddReports()["hostile"]
	p := show(t, written(t, r), "")
	type end struct{ Shown, Site, Topic string }
	for _, e := range of[[]end](p, `[...document.querySelectorAll(".matrix:not(.lined) a")].map((a) => { a.click(); const q = new URLSearchParams(location.hash.split("?")[1]);
		return { Shown: document.getElementById("shown").textContent, Site: q.get("site"), Topic: q.get("topic") }; })`) {
		n := len(filtered(r, filter{"site": e.Site, "topic": e.Topic}))
		assert.NotZero(t, n, e)
		assert.Equal(t, fmt.Sprintf("%d of %d", n, len(r.Findings)), strings.Join(strings.Fields(e.Shown)[:3], " "))
	}
	assert.Len(t, of[[]string](p, `[...document.querySelectorAll(".matrix a")].map((a) => decodeURIComponent(a.hash) === "#register?" + decodeURIComponent(a.dataset.filter.replaceAll("+", "%20")) ? "" : a.hash).filter(Boolean)`), 0, "the link's address and what it does differ")
}

func TestBrowserSaysWhatIsMissing(t *testing.T) {
	t.Parallel()
	r := reporttest.Empty()
	p := show(t, written(t, r), "")
	text := of[string](p, "document.body.innerText")
	for _, want := range []string{"Nothing was judged.", "0 findings listed.", "No findings are listed.", "No files were read.", "0 within 90 days"} {
		assert.Contains(t, text, want)
	}
	assert.NotContains(t, text, "\n.", "a sentence without words")
	odd := show(t, written(t, reporttest.Odd()), "")
	text = of[string](odd, "document.body.innerText")
	for _, want := range []string{"3 rows could not be used", "worker W-9 has no group", "Several workers have the same", "41 × notch", "larch-street, 1 worker.", "the file does not exist", "a.xlsx, sheet Tests, row 9"} {
		assert.Contains(t, text, want)
	}
}
