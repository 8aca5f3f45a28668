package xlsx

import (
	"cmp"
	"fmt"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// summaryWidths are the columns of the summary: site, bundle, topic, and one a status.
var summaryWidths = []float64{26, 28, 15, 11, 11, 11, 11, 11, 11, 11}

// meaning says in words what a status stands for.
var meaning = map[finding.Status]string{
	finding.Gap:      "not fulfilled, and the time is over or the condition fails",
	finding.Unproven: "the records needed to decide are missing or unusable",
	finding.Opinion:  "a professional must judge, and no judgement is on record",
	finding.Due:      "not yet fulfilled, and the time still runs",
	finding.Late:     "fulfilled, but after its time; it cannot be mended",
	finding.Lifted:   "an exception of the law removes the duty",
	finding.Met:      "fulfilled in time",
}

// summary writes the first sheet: what was judged, how it stands, and what the result rests on.
func (b *book) summary(tables []table) error {
	p := &page{styles: &b.styles, widths: summaryWidths}
	p.top(b.r)
	p.standing(b.r)
	p.matrix(b.r)
	p.sites(b.r)
	p.ledger(b.r)
	if len(b.r.Remarks) > 0 {
		p.heading("Remarks")
		for _, remark := range b.r.Remarks {
			p.across(p.plain, phrase.Sentence(remark))
		}
	}
	p.heading("Sheets of this workbook")
	for _, t := range tables {
		p.row(t.name, phrase.Sentence(t.about))
	}
	s, err := b.open("Summary", summaryWidths, len(p.rows))
	if err != nil {
		return err
	}
	if err := p.write(s); err != nil {
		return err
	}
	return s.out.Flush()
}

// top says what was judged, when, by what, and what every reader must know.
func (p *page) top(r *finding.Report) {
	p.across(p.title, r.Program)
	p.row("As of", r.AsOf)
	p.row("Made by", strings.TrimSpace(r.Tool.Name+" "+r.Tool.Version))
	p.row("Listed findings", phrase.Sentence(r.Listed))
	cautions := slices.Clone(r.Cautions)
	for _, b := range r.Bundles {
		for _, c := range b.Cautions {
			cautions = append(cautions, b.ID+": "+c)
		}
	}
	if len(cautions) == 0 {
		return
	}
	p.heading("Cautions")
	for _, c := range cautions {
		p.across(p.plain, phrase.Clean(c))
	}
}

// standing counts the findings by status, the accepted ones apart, and what falls due.
func (p *page) standing(r *finding.Report) {
	p.heading("How it stands")
	judged := 0
	for _, s := range finding.Statuses {
		judged += r.Totals[s] + r.AcceptedTotals[s]
	}
	if judged == 0 {
		p.across(p.plain, "Nothing was judged: no duty found anybody or anything to judge. That does not mean that all is well.")
		return
	}
	p.wideHead("Status", figures("Number"), figures("Accepted apart"), "Meaning")
	for _, s := range finding.Statuses {
		p.row(s, r.Totals[s], r.AcceptedTotals[s], phrase.Sentence(meaning[s]))
	}
	p.across(p.plain, "Accepted findings are those that the employer leaves as they are until a day. They are not met, and the numbers beside them do not hold them.")
	p.heading("What falls due")
	p.head("Within", figures("Number"), figures("Accepted apart"))
	for _, days := range horizons {
		numbers := map[bool]int{}
		for _, f := range dueOf(r) {
			if int(f.Due-r.AsOf) <= days {
				numbers[f.Accepted != nil]++
			}
		}
		p.row(fmt.Sprintf("%d days", days), numbers[false], numbers[true])
	}
	p.across(p.plain, "Counted among the listed findings, each number with those above it.")
}

// matrix counts by site, topic, bundle and status, so that the bundles of a site stand side by side under each topic.
func (p *page) matrix(r *finding.Report) {
	if len(r.Counts) == 0 {
		return
	}
	p.heading("By site and topic")
	names := []any{"Site", "Bundle", "Topic"}
	for _, s := range finding.Statuses {
		names = append(names, figures(s))
	}
	p.head(names...)
	numbers, keys := map[[3]string]map[finding.Status]int{}, [][3]string{}
	for _, c := range r.Counts {
		key := [3]string{c.Site, c.Bundle, c.Topic}
		if numbers[key] == nil {
			numbers[key] = map[finding.Status]int{}
			keys = append(keys, key)
		}
		numbers[key][c.Status] += c.Number
	}
	slices.SortStableFunc(keys, func(a, b [3]string) int {
		return cmp.Or(strings.Compare(a[0], b[0]), slices.Index(finding.Topics, a[2])-slices.Index(finding.Topics, b[2]), strings.Compare(a[1], b[1]))
	})
	for _, key := range keys {
		row := []any{key[0], key[1], key[2]}
		for _, s := range finding.Statuses {
			row = append(row, place(numbers[key][s]))
		}
		p.row(row...)
	}
	p.across(p.plain, "Accepted findings are not counted here.")
	if slices.ContainsFunc(keys, func(key [3]string) bool { return key[1] == finding.OfProgram }) {
		p.across(p.plain, "The bundle "+finding.OfProgram+" stands for the program's own papers, which no law asks for.")
	}
}

// sites lists the sites with what they are judged by, and the bundles.
func (p *page) sites(r *finding.Report) {
	if len(r.Sites) > 0 {
		p.heading("Sites")
		p.wideHead("Site", "Name", figures("Workers"), "Bundles and choices")
		for _, s := range r.Sites {
			words := strings.Join(s.Bundles, ", ")
			if len(s.Choices) > 0 {
				words += "; " + choices(s.Choices)
			}
			p.row(s.ID, s.Name, s.Workers, words)
		}
	}
	if len(r.Bundles) > 0 {
		p.heading("Bundles judged by")
		p.wideHead("Bundle", "Title", "Kind", "Revision", "Checked on", "SHA-256 of the bundle's files")
		for _, b := range r.Bundles {
			p.row(b.ID, b.Title, b.Kind, b.Revision, dayOf(b.CheckedOn), b.SHA256)
		}
	}
}

// choices writes what a site has elected, as it stands in the program file.
func choices(m map[string]any) string {
	var parts []string
	for _, key := range slices.Sorted(maps.Keys(m)) {
		parts = append(parts, fmt.Sprintf("%s = %v", key, m[key]))
	}
	return strings.Join(parts, ", ")
}

// ledger accounts for all rows that were read.
func (p *page) ledger(r *finding.Report) {
	var total finding.Input
	for _, in := range r.Inputs {
		total.Rows, total.Accepted, total.Rejected = total.Rows+in.Rows, total.Accepted+in.Accepted, total.Rejected+in.Rejected
		total.NotData, total.Records = total.NotData+in.NotData, total.Records+in.Records
	}
	p.heading("Files and rows")
	p.head(figures("Files and sheets"), figures("Rows read"), figures("Accepted"), figures("Rejected"), figures("Not data"), figures("Records"))
	p.row(len(r.Inputs), total.Rows, total.Accepted, total.Rejected, total.NotData, total.Records)
	if total.Rejected > 0 {
		p.across(p.plain, fmt.Sprintf("Rows that could not be used: %d. They may hide a gap; the sheet Rejects says why.", total.Rejected))
	}
}
