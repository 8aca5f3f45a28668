package html

import (
	"fmt"
	"slices"

	"hearduty/internal/finding"
)

// rateTable is one measure: a line a site, a column a year.
type rateTable struct {
	Title, About string
	Years        []string
	Rows         []rateRow
}

type rateRow struct {
	Site, Bundle string
	Cells        []rateCell
}

// rateCell is a share with its denominator, or the word why there is none.
type rateCell struct{ Percent, Of string }

var rateTitles = map[string]string{
	"tested_in_time": "Hearing tests in time", "shifts": "Threshold shifts per 100 tested", "shifts_confirmed": "Shifts that the next test shows again",
	"protected_below_target": "Protected to the target", "trained_in_time": "Training in time",
}

// mostYears is the number of years shown, the latest first.
const mostYears = 6

func rateTables(rates []finding.Rate) []rateTable {
	var out []rateTable
	var names []string
	for _, r := range rates {
		if !slices.Contains(names, r.Name) {
			names = append(names, r.Name)
		}
	}
	for _, name := range names {
		out = append(out, rateTableOf(name, rates))
	}
	return out
}

func rateTableOf(name string, rates []finding.Rate) rateTable {
	t := rateTable{Title: rateTitles[name]}
	var years []int
	cells := map[string]map[int]finding.Rate{}
	var lines []rateRow
	for _, r := range rates {
		if r.Name != name {
			continue
		}
		t.About = r.About
		if !slices.Contains(years, r.Year) {
			years = append(years, r.Year)
		}
		key := r.Site + "\x00" + r.Bundle
		if cells[key] == nil {
			cells[key] = map[int]finding.Rate{}
			lines = append(lines, rateRow{Site: r.Site, Bundle: r.Bundle})
		}
		cells[key][r.Year] = r
	}
	slices.SortFunc(years, func(a, b int) int { return b - a })
	years = years[:min(len(years), mostYears)]
	for _, y := range years {
		word := fmt.Sprint(y)
		if y == 0 {
			word = "now"
		}
		t.Years = append(t.Years, word)
	}
	for _, line := range lines {
		of := cells[line.Site+"\x00"+line.Bundle]
		if line.Site == "" {
			line.Site = "all sites"
		}
		for _, y := range years {
			line.Cells = append(line.Cells, rateCellOf(of, y))
		}
		t.Rows = append(t.Rows, line)
	}
	return t
}

func rateCellOf(of map[int]finding.Rate, year int) rateCell {
	r, ok := of[year]
	switch {
	case !ok:
		return rateCell{Percent: "–"}
	case r.Suppressed || r.Part == nil || r.Of == nil || r.Percent == nil:
		return rateCell{Percent: "too few"}
	}
	return rateCell{fmt.Sprintf("%.1f\u00a0%%", *r.Percent), fmt.Sprintf("%d\u00a0of\u00a0%d", *r.Part, *r.Of)}
}
