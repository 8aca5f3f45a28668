package html

import (
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/chromedp/chromedp/kb"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// focus is where the keyboard is, and whether one can see it.
type focus struct {
	Name    string
	Outline bool
	InView  bool
}

const focused = `(() => { const e = document.activeElement, s = getComputedStyle(e), r = e.getBoundingClientRect();
	const name = e.name || e.dataset.sort || e.closest("th")?.dataset.sort || e.id || e.className || e.textContent.trim() || e.tagName;
	return { Name: e.type === "reset" ? "reset" : name, Outline: e.matches(":focus-visible") && s.outlineStyle !== "none" && parseFloat(s.outlineWidth) >= 2,
		InView: r.width > 0 && r.bottom > 0 && r.right > 0 && r.left < innerWidth && r.top < innerHeight }; })()`

// press presses a key and tells where the keyboard is then.
func (p *tab) press(key string, how ...chromedp.KeyOption) focus {
	p.t.Helper()
	p.do(chromedp.KeyEvent(key, how...))
	f := of[focus](p, focused)
	assert.True(p.t, f.Outline, "one cannot see that the keyboard is at %s", f.Name)
	assert.True(p.t, f.InView, "%s has the keyboard and is not in view", f.Name)
	return f
}

func TestBrowserKeyboardOnly(t *testing.T) {
	for _, width := range []int64{1200, 400} {
		p := show(t, written(t, demoOf(t, false)), "", chromedp.EmulateViewport(width, 800))
		require.Equal(t, "skip", p.press(kb.Tab).Name)
		for range 8 { // the parts of the report
			p.press(kb.Tab)
		}
		assert.Equal(t, "Sign-off sheet", of[string](p, "document.activeElement.textContent"))
		for range 8 {
			p.press(kb.Tab, chromedp.KeyModifiers(kb.ModifierShift))
		}
		require.Equal(t, "skip", of[focus](p, focused).Name)
		p.do(chromedp.KeyEvent(kb.Enter))
		p.until(`location.hash === "#register"`)
		var names []string
		for range 16 {
			names = append(names, p.press(kb.Tab).Name)
		}
		require.Equal(t, []string{"site", "bundle", "topic", "duty", "status", "severity", "accepted", "text", "reset", "scroll", "status", "due", "subject", "duty", "cite", "open"}, names)

		const state = `document.activeElement.getAttribute("aria-expanded") + " " + document.querySelectorAll("#rows .more").length`
		for _, step := range []struct{ key, want string }{{kb.Enter, "true 1"}, {kb.Enter, "false 0"}, {" ", "true 1"}} {
			p.do(chromedp.KeyEvent(step.key))
			assert.Equal(t, step.want, of[string](p, state))
		}
		assert.Equal(t, "id", p.press(kb.Tab).Name, "after the row comes what it opened")

		for range 2 { // back to the head of the due days, by way of the row and two heads
			p.press(kb.Tab, chromedp.KeyModifiers(kb.ModifierShift))
		}
		require.Equal(t, "cite", of[focus](p, focused).Name)
		p.do(chromedp.KeyEvent(" "))
		assert.Equal(t, "ascending", of[string](p, `document.querySelector("th[data-sort=cite]").getAttribute("aria-sort")`))
		require.Equal(t, "cite", of[focus](p, focused).Name, "sorting moves the keyboard")

		of[int](p, `(document.querySelector(".subject summary").focus(), 0)`)
		p.do(chromedp.KeyEvent(kb.Enter))
		assert.True(t, of[bool](p, `document.querySelector(".subject").open`))
	}
}

// A choice in a list is made with the keyboard.
func TestBrowserKeyboardFilters(t *testing.T) {
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	of[int](p, `(document.querySelector("[name=status]").focus(), 0)`)
	p.do(chromedp.KeyEvent("g"))
	p.until(`location.hash === "#register?status=gap"`)
	agrees(t, r, of[seen](p, seeing), filter{"status": "gap"})
}
