package html

import (
	"fmt"
	"slices"
	"unicode/utf8"

	"hearduty/internal/finding"
)

// longestID is the number of characters of a protector's id for which there is room among the names.
const longestID = 7

// protectors gives each protector its own row; its starts are strokes on the bar. Ids too long for the names stand
// above the bars.
func (d *drawing) protectors(list []finding.Spell) {
	var ids []string
	for _, s := range list {
		if !slices.Contains(ids, s.Label) {
			ids = append(ids, s.Label)
		}
	}
	short := !slices.ContainsFunc(ids, func(id string) bool { return utf8.RuneCountInString(id) > longestID })
	for n := 0; n < min(len(ids), mostRows); n++ {
		name, shown := ids[n], ids[n:n+1]
		if n == mostRows-1 && len(ids) > mostRows {
			shown = ids[n:]
			name = fmt.Sprintf("%d more", len(shown))
		}
		var own []finding.Spell
		for _, s := range list {
			if slices.Contains(shown, s.Label) {
				s.Label = name
				own = append(own, s)
			}
		}
		d.protector(name, own, short, n == 0)
	}
}

func (d *drawing) protector(id string, list []finding.Spell, short, first bool) {
	var top float64
	switch {
	case short:
		top = d.lane("protector "+id, 0, 15)
	default:
		name := ""
		if first {
			name = "protectors"
		}
		top = d.lane(name, 0, 27) + 12
		id = cut(id, 30)
		d.Texts = append(d.Texts, text{X: min(d.scale.x(list[0].From), d.Width-wide(id)), Y: top + 1, Text: id})
	}
	joined := join(list)
	for i := range joined {
		d.bar(&joined[i], top+6, 3, "plain")
	}
	before := -9.0
	for _, s := range list {
		if x := d.scale.x(s.From); s.From >= d.scale.from && x-before >= 2 {
			d.add("end", path("M", x, top+3, "v", 9.0))
			before = x
		}
	}
}
