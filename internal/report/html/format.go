// Package html writes the report as one HTML file that needs nothing else: it opens from disk, prints, and asks
// nothing of a network.
package html

import (
	"bytes"
	_ "embed"
	"fmt"
	"html/template"
	"io"
	"net/url"
	"slices"

	"hearduty/internal/finding"
)

// Format writes HTML.
type Format struct{}

// Name gives the name of the format.
func (Format) Name() string { return "html" }

// MostFindings is the number of findings up to which one page stays quick. A report with more is split by site.
const MostFindings = 20_000

var (
	//go:embed page.html
	pageText string
	//go:embed style.css
	styleText string
	//go:embed script.js
	scriptText string

	pages = template.Must(template.New("page").Funcs(functions).Parse(pageText))
)

var functions = template.FuncMap{
	"figure": figureOf, "mark": mark, "anchorOf": anchor, "dayOf": day, "short": short, "spaced": spaced, "choices": choices, "notData": notData,
	"count": count, "accepted": accepted, "place": place, "queryOf": url.QueryEscape,
}

// Write writes the report. Findings beyond MostFindings are left out, the least urgent first, and the page says so.
func (Format) Write(w io.Writer, r *finding.Report) error {
	v, err := view(r)
	if err != nil {
		return err
	}
	var b bytes.Buffer
	if err := pages.Execute(&b, v); err != nil {
		return fmt.Errorf("the page cannot be written: %w", err)
	}
	_, err = w.Write(b.Bytes())
	return err
}

// Part is one page of a report that was split.
type Part struct {
	Site   string // id of the site
	Report *finding.Report
}

// Split gives a report for each site if there are too many findings for one page, and nothing otherwise.
func (Format) Split(r *finding.Report) []Part {
	if len(r.Findings) <= MostFindings || len(r.Sites) < 2 {
		return nil
	}
	var out []Part
	for _, s := range r.Sites {
		out = append(out, Part{s.ID, OfSite(r, s.ID)})
	}
	return out
}

// OfSite gives the part of a report that is about one site.
func OfSite(r *finding.Report, site string) *finding.Report {
	part := *r
	part.Sites = keep(r.Sites, func(s *finding.Site) bool { return s.ID == site })
	part.Findings = keep(r.Findings, func(f *finding.Finding) bool { return f.Site == site })
	part.Portraits = keep(r.Portraits, func(p *finding.Portrait) bool { return p.Site == site })
	part.Observations = keep(r.Observations, func(o *finding.Observation) bool { return o.Site == site })
	part.ObservationCounts = keep(r.ObservationCounts, func(o *finding.ObservationCount) bool { return o.Site == site })
	part.Rates = keep(r.Rates, func(x *finding.Rate) bool { return x.Site == site })
	part.Counts = keep(r.Counts, func(c *finding.Count) bool { return c.Site == site })
	part.AcceptedTotals = map[finding.Status]int{}
	for i := range part.Findings {
		if part.Findings[i].Accepted != nil {
			part.AcceptedTotals[part.Findings[i].Status]++
		}
	}
	part.Totals = map[finding.Status]int{}
	for _, c := range part.Counts {
		part.Totals[c.Status] += c.Number
	}
	return &part
}

func keep[T any](list []T, wanted func(*T) bool) []T {
	out := []T{}
	for i := range list {
		if wanted(&list[i]) {
			out = append(out, list[i])
		}
	}
	return slices.Clip(out)
}
