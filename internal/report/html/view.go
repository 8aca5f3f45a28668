package html

import (
	"cmp"
	"fmt"
	"html/template"
	"slices"
	"strings"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// mostSubjects is the number of subjects that are drawn; of more, those with the most urgent findings.
const mostSubjects = 1500

// page is what the template shows.
type page struct {
	R        *finding.Report
	Style    template.CSS
	Script   template.JS
	Data     template.JS
	Health   bool
	Statuses []statusCount
	Matrix   matrix
	Soon     []horizon
	Cut      int // findings left out
	First    []row
	Listed   int
	Subjects []subject
	Undrawn  int
	Memory   []finding.Parameter
	Rejected int
	Accepted int
	Ledger   ledger
	Years    []rateTable
	Sheet    []sheetLine
}

// statusCount is the number of findings of one status.
type statusCount struct {
	Status finding.Status
	Number int
	Words  string
}

// matrix is how each site stands under each topic.
type matrix struct {
	Topics []string
	Rows   []matrixRow
}

type matrixRow struct {
	Site  finding.Site
	Cells []matrixCell
}

// matrixCell has the numbers of the statuses that ask for something, the most urgent first, and of the rest.
type matrixCell struct {
	Topic  string
	Worst  finding.Status
	Number int // of the worst status
	More   int // of the other statuses that ask for something
	Words  string
}

// horizon is what falls due within some days.
type horizon struct {
	Days   int
	Number int
	Items  []*finding.Finding
}

// subject is a subject with its findings and what can be drawn of it.
type subject struct {
	Anchor   string
	Site     string
	Kind, ID string
	Findings []*finding.Finding
	Worst    finding.Status
	Portrait *finding.Portrait
	Due      []*finding.Finding
}

type ledger struct{ Rows, Accepted, Rejected int }

// sheetLine is a line of the sign-off sheet.
type sheetLine struct {
	Site, Topic string
	Numbers     []string
}

func view(r *finding.Report) (*page, error) {
	v := &page{R: r, Style: template.CSS(styleText + figureStyle), Script: template.JS(scriptText)}
	findings := r.Findings
	if len(findings) > MostFindings {
		findings = mostUrgent(findings)
		v.Cut = len(r.Findings) - len(findings)
	}
	v.Listed = len(findings)
	v.statuses()
	v.matrixOf()
	v.soon(findings)
	v.subjects(findings)
	v.memory()
	for _, in := range r.Inputs {
		v.Ledger.Rows, v.Ledger.Accepted, v.Ledger.Rejected = v.Ledger.Rows+in.Rows, v.Ledger.Accepted+in.Accepted, v.Ledger.Rejected+in.Rejected
	}
	v.Rejected = len(r.Rejects)
	for _, n := range r.AcceptedTotals {
		v.Accepted += n
	}
	v.Health = slices.ContainsFunc(r.Portraits, func(p finding.Portrait) bool { return len(p.Tests) > 0 })
	v.Years = rateTables(r.Rates)
	v.sheet()
	t := newTable(r)
	v.First = t.first(findings, 50)
	var err error
	v.Data, err = t.data(findings)
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

func (v *page) statuses() {
	for _, s := range finding.Statuses {
		v.Statuses = append(v.Statuses, statusCount{s, v.R.Totals[s], StatusWords[s]})
	}
}

// asking are the statuses that ask for something to be done.
var asking = []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Due}

func (v *page) matrixOf() {
	numbers := map[[2]string]map[finding.Status]int{}
	for _, c := range v.R.Counts {
		key := [2]string{c.Site, c.Topic}
		if numbers[key] == nil {
			numbers[key] = map[finding.Status]int{}
		}
		numbers[key][c.Status] += c.Number
	}
	for _, topic := range finding.Topics {
		if slices.ContainsFunc(v.R.Counts, func(c finding.Count) bool { return c.Topic == topic }) {
			v.Matrix.Topics = append(v.Matrix.Topics, topic)
		}
	}
	for _, s := range v.R.Sites {
		line := matrixRow{Site: s}
		for _, topic := range v.Matrix.Topics {
			line.Cells = append(line.Cells, cellOf(topic, numbers[[2]string{s.ID, topic}]))
		}
		v.Matrix.Rows = append(v.Matrix.Rows, line)
	}
}

func cellOf(topic string, n map[finding.Status]int) matrixCell {
	c := matrixCell{Topic: topic}
	var words []string
	for _, s := range finding.Statuses {
		if n[s] == 0 {
			continue
		}
		words = append(words, fmt.Sprintf("%d %s", n[s], s))
		if c.Worst == "" {
			c.Worst, c.Number = s, n[s]
		} else if slices.Contains(asking, s) {
			c.More += n[s]
		}
	}
	c.Words = strings.Join(words, ", ")
	return c
}

// horizons are the days for which what falls due is counted.
var horizons = []int{30, 60, 90}

func (v *page) soon(findings []finding.Finding) {
	var due []*finding.Finding
	for i := range findings {
		if f := &findings[i]; f.Status == finding.Due && f.Due.Known() {
			due = append(due, f)
		}
	}
	slices.SortStableFunc(due, func(a, b *finding.Finding) int { return cmp.Compare(a.Due, b.Due) })
	from := 0
	for _, days := range horizons {
		to := from
		for to < len(due) && int(due[to].Due-v.R.AsOf) <= days {
			to++
		}
		v.Soon = append(v.Soon, horizon{days, to, due[from:to]})
		from = to
	}
}

func (v *page) subjects(findings []finding.Finding) {
	portraits := map[[3]string]*finding.Portrait{}
	for i := range v.R.Portraits {
		p := &v.R.Portraits[i]
		portraits[[3]string{p.Site, p.Subject.Kind, p.Subject.ID}] = p
	}
	at := map[[3]string]int{}
	for i := range findings {
		f := &findings[i]
		key := [3]string{f.Site, f.Subject.Kind, f.Subject.ID}
		n, ok := at[key]
		if !ok {
			n = len(v.Subjects)
			at[key] = n
			v.Subjects = append(v.Subjects, subject{Anchor: anchor(f), Site: f.Site, Kind: f.Subject.Kind, ID: f.Subject.ID, Portrait: portraits[key]})
		}
		s := &v.Subjects[n]
		s.Findings = append(s.Findings, f)
		if s.Worst == "" || f.Status.Urgency() < s.Worst.Urgency() {
			s.Worst = f.Status
		}
		if f.Due.Known() && (f.Status == finding.Due || f.Status == finding.Gap) {
			s.Due = append(s.Due, f)
		}
	}
	if len(v.Subjects) > mostSubjects {
		slices.SortStableFunc(v.Subjects, func(a, b subject) int { return a.Worst.Urgency() - b.Worst.Urgency() })
		v.Undrawn = len(v.Subjects) - mostSubjects
		v.Subjects = v.Subjects[:mostSubjects]
	}
	slices.SortStableFunc(v.Subjects, func(a, b subject) int {
		return cmp.Or(cmp.Compare(a.Site, b.Site), cmp.Compare(kindOrder(a.Kind), kindOrder(b.Kind)), cmp.Compare(a.ID, b.ID))
	})
}

// kinds are the kinds of subjects, those of the place first.
var kinds = []string{"site", "group", "instrument", "room", "tester", "worker"}

func kindOrder(kind string) int { return slices.Index(kinds, kind) }

// anchor is the name of a subject's part of the page.
func anchor(f *finding.Finding) string {
	return "of-" + f.Site + "-" + f.Subject.Kind + "-" + f.Subject.ID
}

// memory lists the values that were not read in the law and decide a listed finding or are in force.
func (v *page) memory() {
	for _, p := range v.R.Parameters {
		if p.InForce && p.Seen != "text" {
			v.Memory = append(v.Memory, p)
		}
	}
}

func (v *page) sheet() {
	for _, m := range v.Matrix.Rows {
		for _, c := range m.Cells {
			if c.Worst != "" {
				v.Sheet = append(v.Sheet, sheetLine{m.Site.ID, c.Topic, []string{c.Words}})
			}
		}
	}
}

func day(d calendar.Date) string {
	if !d.Known() {
		return ""
	}
	return d.String()
}
