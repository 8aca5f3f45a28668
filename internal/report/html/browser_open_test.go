package html

import (
	"context"
	"fmt"
	"strings"
	"sync"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
)

// american are the sites of the demo under the law of the United States.
var american = []string{"kiln-hill", "larch-street"}

// judged judges the American sites of the demo program by the federal law alone, once for all tests.
var judged = sync.OnceValue(func() map[bool]*finding.Report {
	out := map[bool]*finding.Report{}
	for _, health := range []bool{false, true} {
		p, problems := program.Load("../../../testdata/demo")
		library, err := bundle.Embedded()
		if problems.Failed() || err != nil {
			return nil
		}
		p.Sites[1].Bundles = p.Sites[1].Bundles[:1]
		accepted, refused := accept.Load(p.Accepted.Open, p.Accepted.Shown)
		if refused.Failed() {
			return nil
		}
		out[health], _ = judge.Check(context.Background(), judge.Options{Program: p, Library: library, Sites: american, AsOf: p.AsOf, AheadDays: 90, Accepted: accepted, Portraits: true, HealthDetail: health, Version: "1.0.0"})
	}
	return out
})

func demoOf(t *testing.T, health bool) *finding.Report {
	t.Helper()
	r := judged()[health]
	require.NotNil(t, r, "the demo program cannot be judged")
	return r
}

func TestBrowserOpensTheReportFromDisk(t *testing.T) {
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	assert.Equal(t, "Harrow & Slate hearing conservation, as of 2026-06-30", of[string](p, "document.title"))
	csp := of[string](p, `document.querySelector("meta[http-equiv=Content-Security-Policy]").content`)
	assert.Contains(t, csp, "default-src 'none'")
	assert.NotContains(t, csp, "unsafe")
	assert.NotEqual(t, "static", of[string](p, `getComputedStyle(document.querySelector(".index")).position`), "the style sheet is not applied")
	assert.NotContains(t, of[string](p, "document.documentElement.outerHTML"), "dB HL")
}

// What slips into the page by a fault must not run, and must not load.
func TestBrowserRunsNothingElse(t *testing.T) {
	t.Parallel()
	p := show(t, written(t, demoOf(t, false)), "")
	of[int](p, `(document.body.insertAdjacentHTML("beforeend", "<img src='data:,' onerror='window.ran = 1'>"),
		document.body.append(Object.assign(document.createElement("script"), { textContent: "window.ran = 1" })), 0)`)
	p.until(`[...document.images].every((i) => i.complete)`)
	assert.False(t, of[bool](p, `"ran" in window`))
	p.lock.Lock()
	defer p.lock.Unlock()
	assert.NotEmpty(t, p.said, "the browser said nothing of what it refused")
	p.said = nil
}

func TestBrowserFirstScreen(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	for _, s := range finding.Statuses {
		assert.Equal(t, fmt.Sprint(r.Totals[s]), of[string](p, `document.querySelector(".count.s-`+string(s)+` .number").textContent`), s)
	}
	type cell struct{ Site, Topic, Shown, Title string }
	got := of[[]cell](p, `[...document.querySelectorAll(".matrix tbody tr")].flatMap((tr) => [...tr.querySelectorAll("td")].map((td, i) => ({
		Site: tr.querySelector("th").firstChild.textContent, Topic: document.querySelectorAll(".matrix thead th")[i + 1].textContent,
		Shown: td.innerText.trim().replace(/\s+/g, " "), Title: td.firstElementChild.title })))`)
	var want []cell
	for _, s := range r.Sites {
		for _, topic := range finding.Topics {
			want = append(want, wantedCell(r, s, topic))
		}
	}
	assert.Equal(t, fmt.Sprint(want), strings.ReplaceAll(fmt.Sprint(got), "\u00a0", " "))
	for i, days := range []int{30, 60, 90} {
		n := 0
		for _, f := range r.Findings {
			if f.Status == finding.Due && f.Accepted == nil && int(f.Due-r.AsOf) <= days {
				n++
			}
		}
		require.NotZero(t, n)
		assert.Equal(t, fmt.Sprintf("%d within %d days", n, days), of[string](p, fmt.Sprintf(`document.querySelectorAll(".horizon h3")[%d].innerText`, i)))
	}
	assert.Contains(t, of[string](p, `document.querySelector("#stand").innerText`), "the employer has accepted 2 findings for a time. Accepted is not met.")
}

// wantedCell is what the cell of a site and a topic must say, counted from the report.
func wantedCell(r *finding.Report, s finding.Site, topic string) (c struct{ Site, Topic, Shown, Title string }) {
	n, more := map[finding.Status]int{}, 0
	for _, x := range r.Counts {
		if x.Site == s.ID && x.Topic == topic {
			n[x.Status] += x.Number
		}
	}
	c.Site, c.Topic, c.Shown = s.Name, topic, "no findings"
	var words []string
	for _, status := range finding.Statuses {
		if n[status] == 0 {
			continue
		}
		if len(words) == 0 {
			c.Shown = fmt.Sprintf("%d %s", n[status], status)
		} else if status.Urgency() <= finding.Due.Urgency() {
			more += n[status]
		}
		words = append(words, fmt.Sprintf("%d %s", n[status], status))
	}
	if more > 0 {
		c.Shown += fmt.Sprintf(" %d more open", more)
	}
	c.Title = strings.Join(words, ", ")
	return c
}

// The numbers of the first screen lead to as many findings.
func TestBrowserTilesLeadToTheRegister(t *testing.T) {
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	type end struct {
		Address string
		Listed  int
	}
	ends := of[map[string]end](p, `Object.fromEntries([...document.querySelectorAll(".count a")].map((a) => { a.click(); return [a.querySelector(".word").textContent.trim(),
		{ Address: location.hash, Listed: parseInt(document.getElementById("shown").textContent) }]; }))`)
	for _, s := range []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Late} {
		assert.Equal(t, end{"#register?status=" + string(s) + "&accepted=no", r.Totals[s]}, ends[string(s)])
	}
	assert.NotContains(t, ends, "met", "no finding that is met is listed, so none can be shown")
	assert.Equal(t, "shown", of[string](p, "document.activeElement.id"))
}

func TestBrowserShowsHearingOnRequestOnly(t *testing.T) {
	t.Parallel()
	const audiograms = `document.querySelectorAll(".ear").length`
	plain, health := show(t, written(t, demoOf(t, false)), ""), show(t, written(t, demoOf(t, true)), "")
	assert.Zero(t, of[int](plain, audiograms))
	assert.NotZero(t, of[int](health, audiograms))
	assert.Contains(t, of[string](plain, `document.querySelector("#subjects").innerText`), "are left out")
	assert.NotContains(t, of[string](health, `document.querySelector("#subjects").innerText`), "are left out")
}
