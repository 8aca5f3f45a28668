package html

import (
	"bytes"
	"context"
	"fmt"
	"io"
	"os"
	"slices"
	"testing"
	"time"

	"github.com/chromedp/cdproto/cdp"
	"github.com/chromedp/cdproto/performance"
	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
)

// many makes a report with n findings and their subjects out of those of the demo program.
func many(demo *finding.Report, n int) *finding.Report {
	r := *demo
	r.Findings, r.Portraits, r.Totals, r.Counts = nil, nil, map[finding.Status]int{}, nil
	for round := 0; len(r.Findings) < n; round++ {
		renamed := func(s finding.Subject) finding.Subject {
			return finding.Subject{Kind: s.Kind, ID: fmt.Sprintf("%s-%04d", s.ID, round)}
		}
		for _, f := range demo.Findings[:min(len(demo.Findings), n-len(r.Findings))] {
			f.Subject, f.Key = renamed(f.Subject), fmt.Sprintf("%s %d", f.Key, round)
			f.Message = fmt.Sprintf("%s Round %d.", f.Message, round)
			f.ID = finding.Fingerprint(f.Site, f.Bundle, f.Duty, f.Subject, f.Key)
			r.Findings = append(r.Findings, f)
			r.Totals[f.Status]++
			r.Counts = append(r.Counts, finding.Count{Site: f.Site, Bundle: f.Bundle, Topic: f.Topic, Status: f.Status, Number: 1})
		}
		for _, p := range demo.Portraits {
			p.Subject = renamed(p.Subject)
			r.Portraits = append(r.Portraits, p)
		}
	}
	slices.SortFunc(r.Findings, func(a, b finding.Finding) int { return finding.Compare(&a, &b) })
	return &r
}

// busy gives the processor time of the page's main thread so far.
func (p *tab) busy() time.Duration {
	p.t.Helper()
	got, err := chromedp.Call(p.ctx, performance.GetMetrics, cdp.Empty{})
	require.NoError(p.t, err)
	for _, m := range got.Metrics {
		if m.Name == "TaskDuration" {
			return time.Duration(m.Value * float64(time.Second))
		}
	}
	return 0
}

// The times are logged. What is asserted catches a page that hangs, on a slow machine too.
func TestBrowser20000Findings(t *testing.T) {
	r := many(demoOf(t, false), MostFindings)
	path := written(t, r)
	p := show(t, path, "", func(ctx context.Context, _ *chromedp.Target) (chromedp.Void, error) {
		_, err := chromedp.Call(ctx, performance.Enable, performance.EnableParams{TimeDomain: performance.EnableTimeDomainThreadTicks})
		return chromedp.Void{}, err
	})
	file, err := os.Stat(path)
	require.NoError(t, err)
	t.Logf("the page has %.1f MB", float64(file.Size())/1e6)
	p.until(`performance.getEntriesByName("first-contentful-paint").length`)
	t.Logf("first paint after %.0f ms, ready after %.0f ms, of it %d ms of processor time",
		of[float64](p, `performance.getEntriesByName("first-contentful-paint")[0].startTime`), of[float64](p, `performance.getEntriesByType("navigation")[0].domContentLoadedEventEnd`), p.busy().Milliseconds())
	choose := func(field, value string) string {
		return fmt.Sprintf(`const s = document.querySelector("[name=%s]"); s.value = %q; s.dispatchEvent(new Event("change"))`, field, value)
	}
	search := func(text string) string {
		return fmt.Sprintf(`history.replaceState(null, "", "#register?text=%s"); dispatchEvent(new Event("hashchange"))`, text)
	}
	for _, x := range []struct{ name, script string }{
		{"filter by status", choose("status", "gap")}, {"filter by status and site", choose("site", "kiln-hill")}, {"no filter", `document.querySelector("button[type=reset]").click()`},
		{"first search", search("K01+training")}, {"second search", search("audiometer")}, {"sort by subject", `document.querySelector("th[data-sort=subject] button").click()`},
		{"open a row", `document.querySelector("#rows .open").click()`},
	} {
		from := p.busy()
		ms := of[float64](p, `(() => { const from = performance.now(); `+x.script+`; document.body.offsetHeight; return performance.now() - from; })()`)
		t.Logf("%s: %.0f ms, processor time %d ms", x.name, ms, (p.busy() - from).Milliseconds())
		assert.Less(t, ms, 10_000.0, x.name)
	}
	agrees(t, r, of[seen](p, `(document.querySelector("button[type=reset]").click(), `+seeing+`)`), filter{})
}

// Of more findings than a page holds, the most urgent remain, and the page says what it left out.
func TestPageIsCut(t *testing.T) {
	r := many(demoOf(t, false), MostFindings+500)
	require.Greater(t, r.Totals[finding.Late], 500)
	v, err := view(r)
	require.NoError(t, err)
	assert.Equal(t, 500, v.Cut)
	kept := map[finding.Status]int{}
	for _, s := range v.Statuses {
		kept[s.Status] = s.Listed
	}
	lost := 0
	for _, s := range finding.Statuses {
		n := 0
		for _, f := range r.Findings {
			if f.Status == s && f.Accepted == nil {
				n++
			}
		}
		if s != finding.Late {
			assert.Equal(t, n, kept[s], s)
		} else {
			lost = n - kept[s]
		}
	}
	assert.InDelta(t, 500, lost, 2, "of the least urgent some are left out, accepted ones apart")
	var b bytes.Buffer
	require.NoError(t, Format{}.Write(&b, r))
	assert.Contains(t, b.String(), "This page holds the 20000 most urgent findings; 500 more would make it slow and are left out.")
	parts := Format{}.Split(r)
	require.Len(t, parts, len(r.Sites))
	total := 0
	for _, part := range parts {
		total += len(part.Report.Findings)
	}
	assert.Equal(t, len(r.Findings), total)
}

func BenchmarkPage20000(b *testing.B) {
	demo := judged()[false]
	if demo == nil {
		b.Fatal("the demo program cannot be judged")
	}
	r := many(demo, MostFindings)
	b.ReportAllocs()
	for b.Loop() {
		if err := (Format{}).Write(io.Discard, r); err != nil {
			b.Fatal(err)
		}
	}
}
