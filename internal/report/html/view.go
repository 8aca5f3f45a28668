package html

import (
	"fmt"
	"html/template"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// page is what the template shows.
type page struct {
	R        *finding.Report
	Policy   string // what the browser may load and run
	Style    template.CSS
	Script   template.JS
	Data     template.JS
	Health   bool
	Statuses []statusCount
	Matrix   matrix
	Lined    []linedUp
	Soon     []horizon
	Cut      int // findings left out
	First    []row
	Listed   int
	Subjects []subject
	Undrawn  int
	Memory   []finding.Parameter
	Rejected int
	Accepted int
	Rows     int // rows of all files
	Years    []rateTable
	Sheet    []sheetLine

	titles phrase.Titles
	drawn  map[string]bool // anchors of the subjects that are drawn
}

// statusCount is the number of findings of one status, and how many of them are listed.
type statusCount struct {
	Status         finding.Status
	Number, Listed int
	Words          string
}

func view(r *finding.Report) (*page, error) {
	v := &page{R: r, Policy: policy(), Style: template.CSS(style()), Script: template.JS(scriptText), titles: phrase.TitlesOf(r)}
	findings := r.Findings
	if len(findings) > MostFindings {
		findings = mostUrgent(findings)
		v.Cut = len(r.Findings) - len(findings)
	}
	v.Listed = len(findings)
	v.statuses(findings)
	v.matrixOf(findings)
	v.lineUp(findings)
	v.subjects(findings)
	v.soon()
	v.memory()
	for _, in := range r.Inputs {
		v.Rows += in.Rows
	}
	v.Rejected = len(r.Rejects)
	for _, n := range r.AcceptedTotals {
		v.Accepted += n
	}
	v.Health = slices.ContainsFunc(r.Portraits, func(p finding.Portrait) bool { return len(p.Tests) > 0 })
	v.Years = rateTables(r.Rates)
	v.sheet()
	t := newTable(r, v.titles)
	v.First = t.first(findings, 50)
	var err error
	v.Data, err = t.data(findings, v.Says(), v.Several())
	return v, err
}

// mostUrgent gives the most urgent findings that fit on a page, in their order.
func mostUrgent(list []finding.Finding) []finding.Finding {
	left := MostFindings
	keepOf := map[finding.Status]int{}
	for _, s := range finding.Statuses {
		n := 0
		for i := range list {
			if list[i].Status == s {
				n++
			}
		}
		keepOf[s] = min(n, left)
		left -= keepOf[s]
	}
	out := make([]finding.Finding, 0, MostFindings)
	for i := range list {
		if s := list[i].Status; keepOf[s] > 0 {
			keepOf[s]--
			out = append(out, list[i])
		}
	}
	return out
}

// statuses counts by status. The accepted findings are listed and not counted.
func (v *page) statuses(findings []finding.Finding) {
	listed := map[finding.Status]int{}
	for i := range findings {
		if findings[i].Accepted == nil {
			listed[findings[i].Status]++
		}
	}
	for _, s := range finding.Statuses {
		v.Statuses = append(v.Statuses, statusCount{s, v.R.Totals[s], listed[s], StatusWords[s]})
	}
}

// Title gives the title of a finding's duty.
func (v *page) Title(f *finding.Finding) string { return v.titles.Of(f) }

// Several says whether findings stand under several bundles, so that each must say under which.
func (v *page) Several() bool { return len(v.R.Bundles) > 1 }

// Says says how many findings the page lists, and which.
func (v *page) Says() string {
	s := count(v.Listed, "finding") + " listed"
	if v.R.Listed != "" {
		s += ": " + v.R.Listed
	}
	return s + "."
}

// memory lists the values in force that were not read in the official text.
func (v *page) memory() {
	for _, p := range v.R.Parameters {
		if p.InForce && p.Seen != "text" {
			v.Memory = append(v.Memory, p)
		}
	}
}

func day(d calendar.Date) string {
	if !d.Known() {
		return ""
	}
	return d.String()
}

// count writes a number of things.
func count(n int, thing string) string {
	if n == 1 {
		return "1 " + thing
	}
	return fmt.Sprintf("%d %ss", n, thing)
}
