package html

import (
	"fmt"
	"net/url"
	"slices"
	"strings"
	"testing"

	"github.com/chromedp/chromedp"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// shownAtOnce is the number of rows that the register shows before the reader asks for more.
const shownAtOnce = 50

// filter is what the register shows: fields by name, and words of which each must occur.
type filter map[string]string

// fieldOf gives what a finding has in a field of the filter.
func fieldOf(f *finding.Finding, field string) string {
	switch field {
	case "site":
		return f.Site
	case "bundle":
		return f.Bundle
	case "topic":
		return f.Topic
	case "duty":
		return f.Duty
	case "status":
		return string(f.Status)
	case "severity":
		return f.Severity
	case "accepted":
		return map[bool]string{true: "yes", false: "no"}[f.Accepted != nil]
	}
	return ""
}

// filtered gives the findings that a filter keeps.
func filtered(r *finding.Report, by filter) []*finding.Finding {
	out, titles := []*finding.Finding{}, phrase.TitlesOf(r)
	for i := range r.Findings {
		f := &r.Findings[i]
		hay := []string{f.ID, f.Subject.Kind + " " + f.Subject.ID, f.Site, titles.Of(f), f.Duty, f.Message, f.Cite}
		for _, e := range f.Evidence {
			hay = append(hay, e.Record, e.File)
		}
		text, keep := strings.ToLower(strings.Join(hay, "\n")), true
		for field, value := range by {
			if field == "text" {
				for _, word := range strings.Fields(strings.ToLower(value)) {
					keep = keep && strings.Contains(text, word)
				}
			} else if field != "sort" {
				keep = keep && fieldOf(f, field) == value
			}
		}
		if keep {
			out = append(out, f)
		}
	}
	return out
}

// seen is what a reader sees of the register.
type seen struct {
	Shown, More string
	Rows        [][]string
}

const seeing = `({ Shown: document.getElementById("shown").textContent, More: document.getElementById("more").hidden ? "" : document.getElementById("more").textContent,
	Rows: [...document.querySelectorAll("#rows > tr:not(.more)")].map((tr) => [...tr.cells].map((td) => td.innerText.trim().replace(/\s+/g, " "))) })`

// registerOf gives the register's first rows as a reader must see them.
func registerOf(r *finding.Report, list []*finding.Finding) [][]string {
	rows, titles := [][]string{}, phrase.TitlesOf(r)
	for _, f := range list[:min(len(list), shownAtOnce)] {
		state, due := string(f.Status), day(f.Due)
		if f.Accepted != nil {
			state += " accepted until " + f.Accepted.Until.String()
		}
		if f.DaysOver == 1 {
			due += " 1 day over"
		} else if f.DaysOver > 1 {
			due += fmt.Sprintf(" %d days over", f.DaysOver)
		}
		row := []string{state, due, f.Subject.Kind + " " + f.Subject.ID + " " + f.Site, titles.Of(f) + " " + f.Message, f.Cite}
		for i := range row {
			row[i] = strings.Join(strings.Fields(row[i]), " ")
		}
		rows = append(rows, row)
	}
	return rows
}

// agrees compares what the register shows with what a filter keeps.
func agrees(t *testing.T, r *finding.Report, got seen, by filter) {
	t.Helper()
	want := filtered(r, by)
	require.Equal(t, registerOf(r, want), got.Rows, "%v", by)
	if len(by) == 0 {
		assert.Equal(t, fmt.Sprintf("%d findings listed: %s.", len(want), r.Listed), got.Shown)
	} else {
		assert.True(t, strings.HasPrefix(got.Shown, fmt.Sprintf("%d of %d listed findings: ", len(want), len(r.Findings))), "%v: %s", by, got.Shown)
	}
	more := ""
	if left := len(want) - shownAtOnce; left > 0 {
		more = fmt.Sprintf("Show %d more of %d", min(left, shownAtOnce), len(want))
	}
	assert.Equal(t, more, got.More, "%v", by)
}

func TestBrowserFiltersByEachField(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	agrees(t, r, of[seen](p, seeing), filter{})
	for _, field := range []string{"site", "bundle", "topic", "duty", "status", "severity", "accepted"} {
		type answer struct {
			Value, Address, Word string
			Seen                 seen
		}
		got := of[[]answer](p, `(() => { const s = document.querySelector("select[name=`+field+`]"); const out = [...s.options].map((o) => {
			s.value = o.value; s.dispatchEvent(new Event("change")); return { Value: o.value, Address: location.hash, Word: o.text, Seen: `+seeing+` }; });
			s.value = ""; s.dispatchEvent(new Event("change")); return out; })()`)
		values := map[string]int{}
		for i := range r.Findings {
			values[fieldOf(&r.Findings[i], field)]++
		}
		require.Len(t, got, len(values)+1, "options of %s", field)
		for _, a := range got {
			if a.Value == "" {
				agrees(t, r, a.Seen, filter{})
				assert.Equal(t, "#register", strings.TrimSuffix(a.Address, "?"))
				continue
			}
			agrees(t, r, a.Seen, filter{field: a.Value})
			assert.Equal(t, "#register?"+url.Values{field: {a.Value}}.Encode(), a.Address)
			assert.Contains(t, a.Word, fmt.Sprintf("(%d)", values[a.Value]))
		}
	}
}

func TestBrowserFiltersByText(t *testing.T) {
	r := demoOf(t, false)
	p := show(t, written(t, r), "")
	texts := []string{"K0101", "worker k01", "  AUDIOGRAM   calibration ", "1910.95(g)(6)", "records/trainings.csv", "audiogram/", r.Findings[7].ID, "nothing has this", "%", "<b>", "kiln-hill 2026-09"}
	for _, text := range texts {
		p.do(chromedp.SetValue(chromedp.CSS("input[name=text]"), text))
		of[bool](p, `document.querySelector("input[name=text]").dispatchEvent(new Event("input"))`)
		p.until(`new URLSearchParams(location.hash.split("?")[1]).get("text") === ` + fmt.Sprintf("%q", strings.TrimSpace(text)))
		agrees(t, r, of[seen](p, seeing), filter{"text": text})
	}
	of[int](p, `(document.querySelector("input[name=text]").select(), document.querySelector("input[name=text]").focus(), 0)`)
	p.do(chromedp.KeyEvent("no record that"))
	p.until(`location.hash === "#register?text=no+record+that"`)
	agrees(t, r, of[seen](p, seeing), filter{"text": "no record that"})
	assert.NotEmpty(t, filtered(r, filter{"text": "no record that"}))
}

// An address shows the same in a page opened anew.
func TestBrowserAddressHoldsTheView(t *testing.T) {
	r := demoOf(t, false)
	path := written(t, r)
	p := show(t, path, "")
	choose := func(field, value string) {
		of[bool](p, fmt.Sprintf(`(() => { const s = document.querySelector("[name=%s]"); s.value = %q; return s.dispatchEvent(new Event("change")); })()`, field, value))
	}
	choose("site", "kiln-hill")
	choose("status", "due")
	choose("topic", "audiometry")
	of[int](p, `(document.querySelector("th[data-sort=subject] button").click(), document.querySelector("th[data-sort=subject] button").click(), 0)`)
	address, first := p.address(), of[seen](p, seeing)
	assert.Equal(t, "#register?site=kiln-hill&topic=audiometry&status=due&sort=-subject", address)
	again := show(t, path, address[1:])
	assert.Equal(t, first, of[seen](again, seeing))
	assert.Equal(t, "due", of[string](again, `document.querySelector("select[name=status]").value`))
	assert.Equal(t, "descending", of[string](again, `document.querySelector("th[data-sort=subject]").getAttribute("aria-sort")`))
	assert.True(t, of[bool](again, `(() => { const r = document.getElementById("register").getBoundingClientRect(); return r.top >= 0 && r.top < innerHeight; })()`), "the register is not in view")

	for _, by := range []filter{{"site": "kiln-hill", "status": "due", "topic": "audiometry"}, {"site": "kiln-hill", "status": "due"}, {"site": "kiln-hill"}, {}} {
		for p.address() == address {
			of[int](p, `(history.back(), 0)`)
			p.until(fmt.Sprintf(`location.hash !== %q`, address))
		}
		address = p.address()
		if strings.Contains(address, "sort=") { // sorted the other way
			of[int](p, `(history.back(), 0)`)
			p.until(`!location.hash.includes("sort=")`)
			address = p.address()
		}
		p.until(fmt.Sprintf(`parseInt(document.getElementById("shown").textContent) === %d`, len(filtered(r, by))))
		agrees(t, r, of[seen](p, seeing), by)
	}

	choose("status", "gap")
	p.do(chromedp.Click(chromedp.CSS("button[type=reset]")))
	agrees(t, r, of[seen](p, seeing), filter{})
	assert.Equal(t, "#register", p.address())
}

func TestBrowserUnknownAddressesDoNoHarm(t *testing.T) {
	t.Parallel()
	r := demoOf(t, false)
	path := written(t, r)
	p := show(t, path, "%F0")
	agrees(t, r, of[seen](p, seeing), filter{})
	for fragment, by := range map[string]filter{
		"register?site=%F0": {"site": "\uFFFD"}, "register?status=nonsense": {"status": "nonsense"}, "register?duty=%3Cb%3E&topic=%22": {"duty": "<b>", "topic": `"`},
		"register?sort=__proto__": {}, "register?sort=--due": {}, "register?sort=constructor&colour=red&__proto__=1": {}, "register?accepted=perhaps": {"accepted": "perhaps"},
		"register?": {}, "?": {}, "register?status=&text=%20": {}, "register?status=%20gap": {"status": "gap"},
	} {
		of[int](p, fmt.Sprintf("(window.changed = 0, addEventListener('hashchange', () => { window.changed = 1; }, { once: true }), location.hash = %q, 0)", "#"+fragment))
		p.until("window.changed")
		got := of[seen](p, seeing)
		agrees(t, r, got, by)
		for field, value := range by {
			assert.Equal(t, len(filtered(r, filter{field: value})) == 0, strings.Contains(got.Shown, "No listed finding has the "+field+" “"+value+"”."), got.Shown)
		}
	}
	for _, fragment := range []string{"of/none/worker/x", "of/%F0", "rates"} {
		of[int](p, fmt.Sprintf("(location.hash = %q, 0)", "#"+fragment))
	}
	fresh := show(t, path, "register?status=nonsense")
	agrees(t, r, of[seen](fresh, seeing), filter{"status": "nonsense"})
}

func TestBrowserShowsMore(t *testing.T) {
	r := demoOf(t, false)
	require.Greater(t, len(r.Findings), shownAtOnce)
	p := show(t, written(t, r), "")
	p.do(chromedp.Click(chromedp.CSS("#more")))
	assert.Len(t, of[seen](p, seeing).Rows, min(len(r.Findings), 2*shownAtOnce))
	assert.Equal(t, shownAtOnce, of[int](p, `[...document.querySelectorAll("#rows .open")].indexOf(document.activeElement)`), "the keyboard goes on where the new rows begin")
	assert.True(t, slices.ContainsFunc(r.Findings, func(f finding.Finding) bool { return f.Accepted != nil }), "no finding is accepted")
}
