package html

import (
	"cmp"
	"slices"

	"hearduty/internal/finding"
)

// horizon is what falls due within some days.
type horizon struct {
	Days   int
	After  int // days of the horizon before
	Number int
	Items  []*finding.Finding // those that the horizon before does not hold
}

// horizons are the days for which what falls due is counted.
var horizons = []int{30, 60, 90}

// mostDue is the number of findings shown of one horizon.
const mostDue = 8

// Shown gives the first findings of a horizon.
func (h horizon) Shown() []*finding.Finding { return h.Items[:min(len(h.Items), mostDue)] }

// Hidden is the number of findings that are not shown.
func (h horizon) Hidden() int { return len(h.Items) - len(h.Shown()) }

// soon gathers what falls due. What the employer has accepted is not among it, as in the totals.
func (v *page) soon() {
	var due []*finding.Finding
	for i := range v.R.Findings {
		if f := &v.R.Findings[i]; f.Status == finding.Due && f.Due.Known() && f.Accepted == nil {
			due = append(due, f)
		}
	}
	slices.SortStableFunc(due, func(a, b *finding.Finding) int { return cmp.Compare(a.Due, b.Due) })
	from, after := 0, 0
	for _, days := range horizons {
		to := from
		for to < len(due) && int(due[to].Due-v.R.AsOf) <= days {
			to++
		}
		v.Soon = append(v.Soon, horizon{days, after, to, due[from:to]})
		from, after = to, days
	}
}
