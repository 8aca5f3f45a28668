package html

import (
	"cmp"
	"fmt"
	"slices"

	"hearduty/internal/finding"
)

// box is the room that something takes in a drawing.
type box struct{ left, top, right, bottom float64 }

func (b box) meets(o box) bool {
	return b.left < o.right && o.left < b.right && b.top < o.bottom && o.top < b.bottom
}

// lawLines draws the levels of the law, each with its name and paragraph where these hide the least.
func (v *noise) lawLines(x *finding.Exposure) {
	lines := slices.Clone(x.Lines)
	slices.SortStableFunc(lines, func(a, b finding.Line) int { return cmp.Compare(b.DB, a.DB) })
	var taken []box
	for _, r := range x.Results {
		taken = append(taken, v.boxOf(&r))
	}
	for _, l := range lines {
		taken = append(taken, box{noiseLeft, v.y(l.DB) - .5, v.Width, v.y(l.DB) + .5})
	}
	for _, l := range lines {
		class := "law " + gradeClass(l.Grade)
		v.Ground = append(v.Ground, shape{Class: class, D: path("M", noiseLeft, v.y(l.DB), "H", v.Width)})
		says := fmt.Sprintf("%s %s dBA", l.Name, decibel(l.DB))
		if l.Cite != "" {
			says += ", " + l.Cite
		}
		t, b := v.placed(cut(says, 56), v.y(l.DB), taken)
		t.Class = class + t.Class
		v.Under = append(v.Under, t)
		taken = append(taken, b)
	}
}

// placed puts a name above or below its line, at its left or right end.
func (v *noise) placed(says string, y float64, taken []box) (best text, where box) {
	least := -1
	for _, right := range []bool{false, true} {
		for _, below := range []bool{false, true} {
			t := text{X: noiseLeft + 4, Y: y - 4, Text: says}
			b := box{noiseLeft + 4, y - 13, noiseLeft + 4 + wide(says), y - 1.5}
			if right {
				t.X, t.Class = v.Width-16, " end"
				b.left, b.right = v.Width-16-wide(says), v.Width-16
			}
			if below {
				t.Y, b.top, b.bottom = y+12, y+1.5, y+14
			}
			cost := 0
			if b.top < noiseTop-6 || b.bottom > v.bottom {
				cost = 100
			}
			for _, o := range taken {
				cost += boolInt(b.meets(o))
			}
			if least < 0 || cost < least {
				least, best, where = cost, t, b
			}
		}
	}
	return best, where
}

// boxOf gives the room of a result with its whiskers or arrow.
func (v *noise) boxOf(r *finding.Result) box {
	x, y := v.days.x(r.Date), v.y(r.DB)
	b := box{x - 6, y - 5, x + 6, y + 5}
	switch r.Known {
	case "between":
		b.top, b.bottom = min(b.top, v.y(r.High)-1), max(b.bottom, v.y(r.Low)+1)
	case "at_least":
		b.top = y - 15
	case "at_most":
		b.bottom = y + 15
	}
	return b
}

// gradeClass gives the class of a grade, and no other word.
func gradeClass(grade string) string {
	if grade == "limit" {
		return "limit"
	}
	return "action"
}
