package html

import (
	"cmp"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// gradeWords say a grade where its height alone would say it.
var gradeWords = map[string]string{"action": "at the action level", "limit": "over the limit", "unknown": "not known"}

// said gives the label of a spell with the words of its grade.
func said(s *finding.Spell) string {
	if w := gradeWords[s.Grade]; w != "" && !strings.Contains(s.Label, w) {
		return s.Label + ", " + w
	}
	return s.Label
}

// mostRows is the number of rows that a lane of spells may have.
const mostRows = 8

func (d *drawing) spellLanes(p *finding.Portrait) {
	for _, lane := range laneOrder(p.Spells, func(s *finding.Spell) string { return s.Lane }) {
		var list []finding.Spell
		for _, s := range p.Spells {
			if s.Lane == lane {
				list = append(list, s)
			}
		}
		slices.SortStableFunc(list, func(a, b finding.Spell) int { return cmp.Compare(a.From, b.From) })
		switch lane {
		case "protector":
			d.protectors(list)
		case "exposure", "group":
			for i, row := range rowsOf(join(list)) {
				d.labelled(laneName(lane), row, i == 0)
			}
		default:
			for i, row := range rowsOf(join(list)) {
				name := laneName(lane)
				if i > 0 {
					name = ""
				}
				top := d.lane(name, 0, 15)
				for k := range row {
					d.bar(&row[k], top+6, 3, "plain")
				}
			}
		}
	}
}

// join makes one spell of those that say the same and touch or overlap.
func join(list []finding.Spell) []finding.Spell {
	var out []finding.Spell
	for _, s := range list {
		if n := len(out) - 1; n >= 0 && out[n].Label == s.Label && out[n].Grade == s.Grade && (!out[n].To.Known() || s.From <= out[n].To) {
			if out[n].To.Known() && (!s.To.Known() || s.To > out[n].To) {
				out[n].To = s.To
			}
			continue
		}
		out = append(out, s)
	}
	return out
}

// rowsOf puts spells into rows in which none overlaps another. Those for which there is no row share the last.
func rowsOf(list []finding.Spell) [][]finding.Spell {
	var rows [][]finding.Spell
next:
	for _, s := range list {
		for i, row := range rows {
			if last := row[len(row)-1]; last.To.Known() && last.To <= s.From || i == mostRows-1 {
				rows[i] = append(row, s)
				continue next
			}
		}
		rows = append(rows, []finding.Spell{s})
	}
	return rows
}

// bar draws a spell. One that has ended has a stroke at its end; one that goes on reaches the as-of day.
func (d *drawing) bar(s *finding.Spell, y, height float64, class string) {
	to := s.To
	if !to.Known() {
		to = max(d.asOf, s.From)
	}
	if !to.Known() || to < d.scale.from {
		return
	}
	x := d.scale.x(s.From)
	w := max(1, d.scale.x(to)-x)
	d.add("b "+class, path("M", x, y, "h", w, "v", height, "h", -w, "z"))
	if s.To.Known() && s.To <= d.scale.to {
		d.add("end", path("M", x+w, y-3, "v", height+6))
	}
}

// gradeHeights show how much a stretch matters by how high it stands on the floor of its lane.
var gradeHeights = map[string]float64{"plain": 3, "action": 6, "limit": 10, "unknown": 6}

// labelled draws a row of spells with their labels above them, as much of each as there is room for.
func (d *drawing) labelled(name string, row []finding.Spell, named bool) {
	if !named {
		name = ""
	}
	top := d.lane(name, 0, 31)
	floor := top + 28
	before := "" // the group of the spell before
	for i := range row {
		s := &row[i]
		h, class := gradeHeights[s.Grade], s.Grade
		if h == 0 {
			h, class = gradeHeights["plain"], "plain"
		}
		if s.To.Known() && s.To < d.scale.from {
			continue
		}
		d.bar(s, floor-h, h, class)
		x, room := d.scale.x(s.From), d.Width
		if i+1 < len(row) {
			room = d.scale.x(row[i+1].From)
		}
		if t := fitting(s, before, room-x-6); t != "" {
			d.Texts = append(d.Texts, text{X: x, Y: top + 12, Text: t})
		}
		before, _, _ = strings.Cut(s.Label, ": ")
	}
}

// fitting gives the fullest way to say a spell that fits. A group that was named before need not be named again.
func fitting(s *finding.Spell, before string, room float64) string {
	group, rest, ok := strings.Cut(s.Label, ": ")
	tries := []string{said(s)}
	if word := gradeWords[s.Grade]; ok {
		level, _, _ := strings.Cut(rest, ", ")
		tries = append(tries, group+": "+level+", "+word)
		if group == before {
			tries = append(tries, level+", "+word, level)
		}
		tries = append(tries, group+", "+word, group+": "+level, group)
	}
	tries = append(tries, s.Label, cut(s.Label, 9))
	for _, t := range tries {
		if t = strings.TrimSuffix(t, ", "); t != "" && wide(t) <= room {
			return t
		}
	}
	return ""
}
