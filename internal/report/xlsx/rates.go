package xlsx

import (
	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

var rateTitles = map[string]string{
	"tested_in_time": "Hearing tests in time", "shifts": "Threshold shifts per 100 tested", "shifts_confirmed": "Shifts that the next test shows again",
	"protected_below_target": "Protected to the target", "trained_in_time": "Training in time",
}

// rates lists the measures for a manager, each with its denominator.
func rates(r *finding.Report) table {
	return table{name: "Rates", about: "shares with their denominators, by site and year.",
		columns: []column{{"Site", 16}, {"Bundle", 26}, {"Year or day", 11}, {"Measure", 36}, {"Part", 10}, {"Of", 10}, {"Percent", 10}, {"Remark", 20}, {"What is counted", 70}},
		rows:    len(r.Rates), none: "There is nothing to count.",
		row: func(i int) []any {
			x := r.Rates[i]
			site, title, year := x.Site, rateTitles[x.Name], any(x.Year)
			if site == "" {
				site = "all sites"
			}
			if title == "" {
				title = phrase.Sentence(spaced(x.Name))
			}
			if x.Year == 0 {
				year = r.AsOf
			}
			part, of, percent, remark := number(x.Part), number(x.Of), any(nil), ""
			switch {
			case x.Suppressed:
				part, of, remark = nil, nil, "too few to show"
			case x.Percent != nil:
				percent = *x.Percent
			}
			return []any{site, x.Bundle, year, title, part, of, percent, remark, phrase.Sentence(x.About)}
		}}
}

func number(n *int) any {
	if n == nil {
		return nil
	}
	return *n
}
