package html

import (
	"cmp"
	"fmt"
	"html/template"
	"slices"

	"hearduty/internal/finding"
)

// dueMark is a deadline with the sign of its status.
type dueMark struct {
	X, Y   float64
	Status finding.Status
	Mark   template.HTML
}

// mostFlags is the number of rows of deadlines that are drawn.
const mostFlags = 10

// deadlines draws when findings are or were due, each with its status and duty in words.
func (d *drawing) deadlines(list []*finding.Finding) {
	var known []*finding.Finding
	for _, f := range list {
		if f.Due.Known() {
			known = append(known, f)
		}
	}
	if len(known) == 0 {
		return
	}
	slices.SortStableFunc(known, func(a, b *finding.Finding) int {
		return cmp.Or(cmp.Compare(a.Due, b.Due), cmp.Compare(a.Duty, b.Duty), cmp.Compare(a.Key, b.Key))
	})
	items := make([]item, 0, len(known))
	for _, f := range known {
		items = append(items, d.item(f.Due, deadlineWords(f)))
	}
	rows := min(pack(items), mostFlags)
	top := d.lane("deadlines", len(known), 16*float64(rows)+4)
	for i, f := range known {
		it := items[i]
		if it.row >= mostFlags {
			d.more++
			continue
		}
		y := top + 10 + 16*float64(it.row)
		d.Flags = append(d.Flags, dueMark{it.x - 4.5, y - 4.5, f.Status, template.HTML(marks[f.Status])})
		d.Texts = append(d.Texts, it.text(y+4))
	}
}

// deadlineWords says what is due, when, and how it stands.
func deadlineWords(f *finding.Finding) string {
	s := fmt.Sprintf("%s, %s %s", f.Duty, f.Status, f.Due)
	if f.Accepted != nil {
		s += ", accepted"
	}
	return s
}
