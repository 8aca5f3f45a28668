package xlsx

import (
	"cmp"
	"fmt"
	"slices"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// horizons are the days for which what falls due is counted.
var horizons = []int{30, 60, 90}

// due lists what falls due, by day.
func due(r *finding.Report) table {
	list, titles := dueOf(r), phrase.TitlesOf(r)
	return table{name: "Due", about: "the listed findings whose time still runs, by day.",
		columns: []column{{"Due", 11}, {"Days left", 9}, {"Within", 12}, {"Status", 10}, {"Accepted", 9}, {"Site", 14}, {"Subject kind", 10}, {"Subject", 15}, {"Duty", 26},
			{"Finding", 40}, {"Paragraph", 20}, {"What to do", 36}, {"Id", 22}},
		rows: len(list), none: "Nothing that is listed falls due.",
		row: func(i int) []any {
			f := list[i]
			left := int(f.Due - r.AsOf)
			return []any{f.Due, left, within(left), f.Status, yesNo(f.Accepted != nil), f.Site, f.Subject.Kind, f.Subject.ID, titles.Of(f),
				phrase.Sentence(f.Message), f.Cite, phrase.Sentence(f.Remedy), f.ID}
		}}
}

// dueOf gives the findings that are due on a known day, by day.
func dueOf(r *finding.Report) []*finding.Finding {
	var list []*finding.Finding
	for i := range r.Findings {
		if f := &r.Findings[i]; f.Status == finding.Due && f.Due.Known() {
			list = append(list, f)
		}
	}
	slices.SortStableFunc(list, func(a, b *finding.Finding) int { return cmp.Compare(a.Due, b.Due) })
	return list
}

// within names the horizon that a number of days lies in.
func within(days int) string {
	for _, h := range horizons {
		if days <= h {
			return fmt.Sprintf("%d days", h)
		}
	}
	return "later"
}
