package html

import (
	"errors"
	"os"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/reporttest"
)

// rules reads the rules of accessibility, which are no part of the repository: HEARDUTY_AXE is the path of the
// file axe.min.js of the npm package axe-core 4.14.1.
func rules(t *testing.T) string {
	t.Helper()
	path := os.Getenv("HEARDUTY_AXE")
	if path == "" {
		need(t, errors.New("HEARDUTY_AXE names no axe.min.js; unpack it from npm pack axe-core@4.14.1"))
	}
	text, err := os.ReadFile(path)
	require.NoError(t, err)
	return string(text)
}

// judgeAccess asks the rules for what is wrong with the page as it stands.
const judgeAccess = `axe.run(document, { runOnly: ["wcag2a", "wcag2aa", "wcag21a", "wcag21aa", "wcag22aa", "best-practice"], resultTypes: ["violations"] }).then((r) =>
	r.violations.flatMap((v) => v.nodes.slice(0, 4).map((n) => v.id + ": " + n.target.join(" ") + ": " + n.html.slice(0, 160) + " " + n.any.map((x) => x.message).join("; "))))`

// unfold opens a row, and a subject of each kind with its tables. To save time it leaves few rows of each table: all
// are made in one way.
const unfold = `(() => { const kinds = new Set(), statuses = new Set();
	for (const tr of [...document.querySelectorAll("#rows > tr")]) { const s = tr.cells[0].className; if (statuses.has(s)) tr.remove(); statuses.add(s); }
	document.querySelector("#rows .open").click();
	for (const d of [...document.querySelectorAll("details.subject")]) { const kind = d.id.split("/")[2];
		if (kinds.has(kind)) { d.remove(); continue; }
		kinds.add(kind);
		d.open = true;
		for (const inner of d.querySelectorAll("details")) inner.open = true; }
	for (const body of document.querySelectorAll("tbody:not(#rows)")) for (const tr of [...body.rows].slice(6)) tr.remove();
	return kinds.size; })()`

func TestBrowserAccess(t *testing.T) {
	t.Parallel()
	script := rules(t)
	p := show(t, written(t, demoOf(t, true)), "")
	of[bool](p, script+"; true")
	assert.Equal(t, 6, of[int](p, unfold), "not every kind of subject is looked at")
	for _, width := range []int64{1400, 400} {
		for _, theme := range []string{"light", "dark"} {
			p.look(width, 1000, theme, "")
			bad, err := chromedp.Run(p.ctx, chromedp.Evaluate[[]string](judgeAccess, chromedp.EvalAwaitPromise))
			require.NoError(t, err)
			for _, b := range bad {
				t.Errorf("%s, %d wide: %s", theme, width, b)
			}
		}
	}
}

func TestBrowserAccessOfOddReports(t *testing.T) {
	t.Parallel()
	script := rules(t)
	odd := oddReports()
	for name, r := range map[string]*finding.Report{"odd": reporttest.WithHealth(), "empty": odd["empty"], "twelve sites": odd["twelve sites"]} {
		p := show(t, written(t, r), "")
		of[bool](p, script+"; true")
		of[int](p, `(document.querySelectorAll("details").forEach((d) => { d.open = true; }), document.querySelectorAll("#rows .open").forEach((b) => b.click()), 0)`)
		bad, err := chromedp.Run(p.ctx, chromedp.Evaluate[[]string](judgeAccess, chromedp.EvalAwaitPromise))
		require.NoError(t, err)
		assert.Empty(t, bad, name)
	}
}
