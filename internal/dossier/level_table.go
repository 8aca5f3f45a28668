package dossier

import (
	"slices"
	"strings"

	"hearduty/internal/acoustics"
	"hearduty/internal/record"
)

// permitted gives the permitted time at a level by a printed table: that of its row, or of the next higher one. A
// level below the table does not count; above it there is no time, which over says.
func permitted(table []Limit, dba float64) (row Limit, counts, over bool) {
	if len(table) == 0 {
		return Limit{}, false, false
	}
	rows := slices.Clone(table)
	slices.SortFunc(rows, func(a, b Limit) int {
		if a.DBA < b.DBA {
			return -1
		}
		return 1
	})
	if dba < rows[0].DBA-tolerance {
		return Limit{}, false, false
	}
	for _, r := range rows {
		if dba <= r.DBA+tolerance {
			return r, true, false
		}
	}
	return rows[len(rows)-1], true, true
}

// takeTableDose sums the dose of a day's tasks by a printed table, with its numbers. A level above the table makes
// the dose known only as at least the sum.
func (r *reading) takeTableDose(table []Limit, day dayOfTasks) {
	var pct float64
	var parts, shares []string
	beyond := false
	for _, seg := range day.segments {
		minutes := number(acoustics.RoundTenth(seg.Minutes))
		part := minutes + " min at " + number(seg.Level) + " dBA"
		row, counts, over := permitted(table, seg.Level)
		if !counts {
			parts = append(parts, part+" (below the table, does not count)")
			continue
		}
		said := "T = " + number(row.Minutes) + " min of " + number(row.DBA) + " dBA"
		if over {
			beyond = true
			said = "above the table; at least as much as at " + number(row.DBA) + " dBA"
		}
		parts = append(parts, part+" ("+said+")")
		shares = append(shares, minutes+"/"+number(row.Minutes))
		pct += 100 * seg.Minutes / row.Minutes
	}
	sum := "0"
	if len(shares) > 0 {
		sum = strings.Join(shares, " + ")
	}
	r.bounds = bounds{pct, pct}
	is := " = "
	if beyond {
		r.high, is = unknown.high, " = at least "
	}
	r.working = []string{
		"tasks: " + strings.Join(parts, ", "),
		"D = 100 · Σ C/T = 100 · (" + sum + ")" + is + number(acoustics.RoundTenth(pct)) + " %",
	}
}

// margin adds the allowance of the accuracy class to a level, for a law that counts in such classes: what is
// compared is the upper limit. Without a class on record the level lies between itself and itself with the
// largest allowance.
func (c *channels) margin(r *reading, rows []*record.Measurement) {
	if len(c.measures.Margins) == 0 || !r.estimate.Known {
		return
	}
	class := ""
	for _, m := range rows {
		if m.AccuracyClass != "" {
			class = m.AccuracyClass
		}
	}
	most := 0.0
	for name, parameter := range c.measures.Margins {
		db, ok := c.law.Number(parameter, rows[0].Date)
		if !ok {
			r.notes, r.bounds = append(r.notes, "the law has no allowance for the accuracy class on that day"), unknown
			return
		}
		if name == class {
			r.low, r.high = r.low+db, r.high+db
			r.working = append(r.working, "accuracy class "+class+": the upper limit counts, "+hundredth(r.estimate.Value)+" + "+number(db)+" = "+hundredth(r.high)+" dBA")
			return
		}
		most = max(most, db)
	}
	r.high += most
	r.working = append(r.working, "the accuracy class is not recorded: the upper limit lies between "+hundredth(r.low)+" and "+hundredth(r.high)+" dBA")
}
