package html

import (
	"fmt"
	"os"
	"path/filepath"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/require"
)

// TestBrowserShots writes pictures of the page for people to look at, into the folder that HEARDUTY_SHOTS names.
func TestBrowserShots(t *testing.T) {
	dir := os.Getenv("HEARDUTY_SHOTS")
	if dir == "" {
		t.Skip("HEARDUTY_SHOTS names no folder for the pictures")
	}
	p := show(t, written(t, demoOf(t, true)), "")
	parts := []struct{ name, script string }{
		{"top", `scrollTo(0, 0)`},
		{"register", `document.querySelectorAll("#rows .open")[1].click(); document.getElementById("register").scrollIntoView()`},
		{"rates", `document.querySelectorAll("#rows .open")[1].click(); document.getElementById("rates").scrollIntoView()`},
		{"records", `document.getElementById("records").scrollIntoView()`},
		{"law", `document.getElementById("law").scrollIntoView()`},
		{"signoff", `document.getElementById("signoff").scrollIntoView()`},
	}
	for _, kind := range kinds {
		parts = append(parts, struct{ name, script string }{kind, `for (const d of document.querySelectorAll("details.subject[open]")) d.open = false; const d = document.querySelector("details.subject[id*='/` + kind + `/']"); d.open = true; d.scrollIntoView()`})
	}
	shoot := func(name string) {
		picture, err := chromedp.Run(p.ctx, chromedp.CaptureScreenshot())
		require.NoError(t, err)
		require.NoError(t, os.WriteFile(filepath.Join(dir, name+".png"), picture, 0o644))
	}
	for _, width := range []int64{400, 900, 1400} {
		for _, theme := range []string{"light", "dark"} {
			p.look(width, 1400, theme, "")
			for _, part := range parts {
				of[int](p, `(() => { `+part.script+`; return 0; })()`)
				shoot(fmt.Sprintf("%d-%s-%s", width, theme, part.name))
			}
		}
	}
	p.look(720, 1400, "dark", "print")
	for _, part := range parts {
		of[int](p, `(() => { `+part.script+`; return 0; })()`)
		shoot("print-" + part.name)
	}
}
