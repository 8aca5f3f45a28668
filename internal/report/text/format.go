// Package text writes reports, explanations and rule books for people: plain words in lines of a certain
// width, in the order in which somebody would work through them.
package text

import (
	"cmp"
	"fmt"
	"io"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// Format writes a report as text.
type Format struct {
	Width  int  // columns of a line; 0 for 80
	Colour bool // whether headings may have colour
}

// Name gives the name of the form.
func (Format) Name() string { return "text" }

// Write writes the report: the counts first, then what is to be done by urgency, then what the result
// rests on.
func (f Format) Write(w io.Writer, r *finding.Report) error {
	p := newPage(w, f.Width, f.Colour)
	head(p, r)
	for _, site := range r.Sites {
		table(p, r, site)
	}
	totals(p, r)
	names := shortIDs(r.Findings)
	for _, s := range sections {
		section(p, r, s, names)
	}
	accepted(p, r, names)
	fromMemory(p, r)
	observations(p, r)
	if len(r.Remarks) > 0 {
		p.heading(bold, "Remarks")
		for _, remark := range r.Remarks {
			p.item(0, "- ", sentence(upper(remark)))
		}
	}
	ledger(p, r)
	cautions(p, r)
	return p.flush()
}

func head(p *page, r *finding.Report) {
	p.para(0, 0, r.Program)
	p.raw("As of " + r.AsOf.String())
	for _, b := range r.Bundles {
		p.para(0, 2, fmt.Sprintf("Judged by %s: %s. Revision %s, %s, last held against the text on %s.", b.ID, b.Title, b.Revision, b.Kind, b.CheckedOn)+signature(b.Signature))
	}
	p.raw(strings.TrimSpace(r.Tool.Name + " " + r.Tool.Version))
}

// signature is a sentence about a bundle that is not built into the program.
func signature(state string) string {
	if words := finding.SignatureWords(state); words != "" {
		return " " + sentence(upper(words))
	}
	return ""
}

// columns of the table of counts, as far as they are open or can be seen later.
var columns = []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Due, finding.Late, finding.Lifted, finding.Met}

// table writes the number of findings by topic and status of one site, one block a bundle.
func table(p *page, r *finding.Report, site finding.Site) {
	title := "Site " + site.ID
	if site.Name != "" {
		title += ", " + site.Name
	}
	p.heading(bold, title+", "+count(site.Workers, "worker", "workers"))
	if len(site.Choices) > 0 {
		p.para(2, 4, "Choices: "+choices(site.Choices))
	}
	bundles := site.Bundles
	if len(bundles) > 1 {
		sideBySide(p, r, site)
		bundles = nil
	}
	if _, own := tally(r, site.ID, finding.OfProgram); len(own) > 0 {
		bundles = append(slices.Clone(bundles), finding.OfProgram)
	}
	for _, bundle := range bundles {
		numbers, topics := tally(r, site.ID, bundle)
		if len(topics) == 0 {
			p.para(2, 2, bundle+nothingOwed)
			continue
		}
		if bundle == finding.OfProgram {
			p.para(2, 2, "The program's own papers, which no law asks for")
		} else if len(bundles) > 1 || len(r.Bundles) > 1 {
			p.para(2, 2, "By "+bundle)
		}
		if p.width < tableWidth {
			for _, topic := range topics {
				p.para(2, 4, topic+": "+inWords(numbers[topic]))
			}
			continue
		}
		const first = 16
		line := padRight("", first)
		for _, status := range columns {
			line += padLeft(string(status), columnWidth(status))
		}
		p.raw(line)
		for _, topic := range topics {
			line := "  " + padRight(fit(topic, first-3), first-2)
			for _, status := range columns {
				n := "-"
				if k := numbers[topic][status]; k > 0 {
					n = fmt.Sprint(k)
				}
				line += padLeft(n, columnWidth(status))
			}
			p.raw(line)
		}
	}
}

// tableWidth is the width of the table of counts. On a narrower page the counts are written in words.
const tableWidth = 76

func inWords(numbers map[finding.Status]int) string {
	var parts []string
	for _, status := range columns {
		if n := numbers[status]; n > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n, status))
		}
	}
	return strings.Join(parts, ", ")
}

func columnWidth(s finding.Status) int { return max(8, len(s)+2) }

// tally gives the counts of a site and bundle by topic and status, and the topics in their order.
func tally(r *finding.Report, site, bundle string) (map[string]map[finding.Status]int, []string) {
	numbers := map[string]map[finding.Status]int{}
	var topics []string
	for _, c := range r.Counts {
		if c.Site != site || c.Bundle != bundle || c.Number == 0 {
			continue
		}
		if numbers[c.Topic] == nil {
			numbers[c.Topic] = map[finding.Status]int{}
			topics = append(topics, c.Topic)
		}
		numbers[c.Topic][c.Status] += c.Number
	}
	slices.SortFunc(topics, compareTopics)
	return numbers, topics
}

// compareTopics puts topics in the order of a program's year.
func compareTopics(a, b string) int {
	return cmp.Or(slices.Index(finding.Topics, a)-slices.Index(finding.Topics, b), strings.Compare(a, b))
}

const nothingOwed = ": no duty is owed, or none could be judged."

// meaning says in words what a status stands for; the order is that of finding.Statuses.
var meaning = map[finding.Status]string{
	finding.Gap:      "not fulfilled, and the time is over or the condition fails",
	finding.Unproven: "the records needed to decide are missing or unusable",
	finding.Opinion:  "a professional must judge, and no judgement is on record",
	finding.Due:      "not yet fulfilled, and the time still runs",
	finding.Late:     "fulfilled, but after its time; it cannot be mended, and an inspector will see it",
	finding.Lifted:   "an exception of the law removes the duty",
	finding.Met:      "fulfilled in time",
}

func totals(p *page, r *finding.Report) {
	p.blank()
	judged := 0
	for _, s := range finding.Statuses {
		judged += r.Totals[s] + r.AcceptedTotals[s]
	}
	if judged == 0 {
		p.para(0, 0, "Nothing was judged: no duty found anybody or anything to judge. That does not mean that all is well.")
		unusable(p, r)
		return
	}
	var parts []string
	for _, s := range finding.Statuses {
		parts = append(parts, fmt.Sprintf("%d %s", r.Totals[s], s))
	}
	p.para(0, 2, "In all: "+strings.Join(parts, ", ")+".")
	acceptedTotals(p, r)
	unusable(p, r)
	if r.Listed != "" {
		p.para(0, 2, sentence(upper(r.Listed)))
	}
}

// unusable says how many rows could not be used: a duty that they would have shown to be broken is not seen.
func unusable(p *page, r *finding.Report) {
	rejected := 0
	for _, in := range r.Inputs {
		rejected += in.Rejected
	}
	if rejected > 0 {
		p.para(0, 2, count(rejected, "row", "rows")+" of the records could not be used and may hide a gap: see Rejected rows, below.")
	}
}

func cautions(p *page, r *finding.Report) {
	list := slices.Clone(r.Cautions)
	for _, b := range r.Bundles {
		for _, c := range b.Cautions {
			list = append(list, b.ID+": "+c)
		}
	}
	if len(list) == 0 {
		return
	}
	p.heading(bold, "Cautions")
	for _, c := range list {
		p.item(0, "- ", sentence(c))
	}
}

func count(n int, one, many string) string {
	if n == 1 {
		return "1 " + one
	}
	return fmt.Sprintf("%d %s", n, many)
}
