package html

import (
	"fmt"
	"maps"
	"net/url"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/finding"
)

// opened is what a reader sees of one finding once its row is open.
type opened struct {
	Message  string
	Pairs    [][2]string
	Evidence []string
}

const openAll = `(() => { while (!document.getElementById("more").hidden) document.getElementById("more").click();
	return [...document.querySelectorAll("#rows .open")].map((b) => { b.click(); const tr = b.closest("tr"), more = tr.nextSibling; return { Message: tr.querySelector(".msg").textContent,
	Pairs: [...more.querySelectorAll("dt")].map((dt) => [dt.textContent, dt.nextElementSibling.textContent]), Evidence: [...more.querySelectorAll("li")].map((li) => li.textContent) }; }); })()`

// openedOf gives what a reader must see of a finding.
func openedOf(r *finding.Report, f *finding.Finding) opened {
	o := opened{Message: f.Message, Evidence: []string{}}
	add := func(name, value string) {
		if value != "" {
			o.Pairs = append(o.Pairs, [2]string{name, value})
		}
	}
	for _, d := range r.Duties {
		if d.Bundle == f.Bundle && d.ID == f.Duty {
			add("What the law asks", d.Description)
		}
	}
	add("Paragraph", f.Cite)
	add("What to do", f.Remedy)
	add("Due", day(f.Due))
	add("Done", day(f.Done))
	add("Severity", f.Severity)
	add("Bundle", f.Bundle)
	if a := f.Accepted; a != nil {
		add("Employer", strings.TrimSuffix("accepted until "+day(a.Until), " until "))
		add("Because", a.Reason)
		add("Approved by", a.ApprovedBy)
	}
	add("Finding", f.ID)
	var law [][2]string
	for _, facts := range []map[string]any{f.Facts, f.Health} {
		for _, key := range slices.Sorted(maps.Keys(facts)) {
			if p, ok := finding.AsParameter(facts[key]); ok {
				value := p.String() + ", " + p.Cite
				if p.Seen != "text" {
					value += ", not read in the official text (" + p.Seen + ")"
				}
				law = append(law, [2]string{strings.ReplaceAll(key, "_", " "), value})
				continue
			}
			add(finding.Named(key, facts[key]))
		}
	}
	o.Pairs = append(o.Pairs, law...)
	for _, e := range f.Evidence {
		s := e.Record
		if e.File != "" {
			s += ", " + e.File
		}
		if e.Sheet != "" {
			s += ", sheet " + e.Sheet
		}
		if e.Row > 0 {
			s += fmt.Sprintf(", row %d", e.Row)
		}
		o.Evidence = append(o.Evidence, s)
	}
	return o
}

func TestBrowserDetailsEqualTheFinding(t *testing.T) {
	t.Parallel()
	r := demoOf(t, true)
	p := show(t, written(t, r), "")
	got := of[[]opened](p, openAll)
	require.Len(t, got, len(r.Findings))
	health, evidence := 0, 0
	for i := range r.Findings {
		f := &r.Findings[i]
		require.Equal(t, openedOf(r, f), got[i], f.ID)
		health, evidence = health+len(f.Health), evidence+len(f.Evidence)
	}
	assert.NotZero(t, health)
	assert.NotZero(t, evidence)
	assert.Equal(t, len(r.Findings), of[int](p, `document.querySelectorAll("#rows .open[aria-expanded=true]").length`))
	assert.Zero(t, of[int](p, `(document.querySelectorAll("#rows .open").forEach((b) => b.click()), document.querySelectorAll("#rows .more").length)`), "a row does not close")
}

func TestBrowserLinksToSubjects(t *testing.T) {
	r := demoOf(t, false)
	path := written(t, r)
	f := &r.Findings[slices.IndexFunc(r.Findings, func(f finding.Finding) bool { return f.Subject.Kind == "worker" })]
	p := show(t, path, url.PathEscape("of/"+f.Site+"/worker/"+f.Subject.ID))
	open := fmt.Sprintf(`document.getElementById("of/%s/worker/%s")`, f.Site, f.Subject.ID)
	assert.True(t, of[bool](p, open+".open"))
	p.until(fmt.Sprintf(`(() => { const r = %s.getBoundingClientRect(); return r.top >= 0 && r.top < innerHeight / 2; })()`, open))
	p.until(`document.activeElement === ` + open + `.querySelector("summary")`)
	assert.Equal(t, 1, of[int](p, `document.querySelectorAll("details.subject[open]").length`))

	dead := of[[]string](p, `[...document.querySelectorAll("a[href^='#of']")].map((a) => decodeURIComponent(a.hash.slice(1))).filter((id) => document.getElementById(id)?.tagName !== "DETAILS")`)
	assert.Empty(t, dead, "links that lead nowhere")
	assert.NotZero(t, of[int](p, `document.querySelectorAll("#due a[href^='#of']").length`))

	// From a row to its subject, and once more after the reader has closed it.
	of[int](p, `(document.querySelector("#rows .open").click(), 0)`)
	const link = `[...document.querySelectorAll("#rows .more a")].at(-1)`
	target := `document.getElementById(decodeURIComponent(` + link + `.hash.slice(1)))`
	for range 2 {
		of[int](p, `(`+link+`.click(), 0)`)
		p.until(target + ".open")
		of[bool](p, target+".open = false")
	}

	// The part of the page that is shown already is left as it is, with its open rows.
	of[int](p, `(location.hash = "#register", document.querySelectorAll("#rows .open")[1].click(), 0)`)
	of[int](p, `(window.changed = 0, addEventListener("hashchange", () => { window.changed = 1; }, { once: true }), location.hash = "#register?", 0)`)
	p.until("window.changed")
	assert.NotZero(t, of[int](p, `document.querySelectorAll("#rows .more").length`))

	// From a subject to its finding.
	of[int](p, open+`.querySelector("a.id").click(), 0`)
	p.until(`location.hash.startsWith("#register?text=f-")`)
	assert.Len(t, of[seen](p, seeing).Rows, 1)
}
