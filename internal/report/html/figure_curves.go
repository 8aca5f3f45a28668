package html

import (
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// curve is a test as it is drawn of one ear.
type curve struct {
	test  *finding.Test
	class string
	label string
	size  float64 // of its symbols
}

// curvesOf chooses what is drawn of an ear, the faintest first: the latest test, the latest that shows a significant
// shift, and what both were compared with.
func curvesOf(s *side, tests []*finding.Test) []curve {
	var latest, shifted *finding.Test
	byRecord := map[string]*finding.Test{}
	for _, t := range tests {
		byRecord[t.Record] = t
		if len(s.levels(t)) == 0 {
			continue
		}
		latest = t
		if x := s.shift(t); x != nil && x.Significant {
			shifted = t
		}
	}
	var out []curve
	add := func(t *finding.Test, class, label string, size float64) {
		if t != nil && !slices.ContainsFunc(out, func(c curve) bool { return c.test == t }) {
			out = append(out, curve{t, class, label + dayOr(t.Date), size})
		}
	}
	if latest == nil {
		return nil
	}
	add(latest, "now", "", 4.6)
	if shifted != nil && shifted.Record == s.baseline(latest) {
		add(shifted, "then", "baseline ", 3.8) // it has become the baseline
	} else {
		add(shifted, "then", "", 3.8)
	}
	for _, t := range []*finding.Test{latest, shifted} {
		if t != nil {
			add(byRecord[s.baseline(t)], "base", "baseline ", 2.6)
		}
	}
	slices.Reverse(out)
	return out
}

// draw draws a test of an ear: its line, and a symbol for each level.
func (p *panel) draw(s *side, c *curve) {
	var line, symbols, arrows strings.Builder
	joined := false
	levels := slices.Clone(s.levels(c.test))
	slices.SortStableFunc(levels, func(a, b finding.Level) int { return a.Hz - b.Hz })
	for _, l := range levels {
		if l.State == "not_tested" {
			joined = false
			continue
		}
		x, y := hzPlace(l.Hz), dbPlace(l.DB)
		symbols.WriteString(symbol(s, x, y, c.size))
		if l.State == "no_response" {
			joined = false
			o := s.outward
			arrows.WriteString(path("M", x+o*c.size*.8, y+c.size*.8, "l", o*7, 7.0, "m", 0.0, -5.0, "v", 5.0, "h", -o*5))
			continue
		}
		line.WriteString(path(map[bool]string{false: "M", true: "L"}[joined], x, y))
		joined = true
	}
	class := s.name + " " + c.class
	if line.Len() > 0 {
		p.Shapes = append(p.Shapes, shape{Class: "curve " + class, D: line.String()})
	}
	if symbols.Len() > 0 {
		p.Shapes = append(p.Shapes, shape{Class: "sym " + class, D: symbols.String() + arrows.String()})
	}
}

// symbol is a circle for the right ear and a cross for the left.
func symbol(s *side, x, y, size float64) string {
	if s.name == "left" {
		r := size * .9
		return path("M", x-r, y-r, "l", 2*r, 2*r, "m", 0.0, -2*r, "l", -2*r, 2*r)
	}
	return path("M", x-size, y, "a", size, size, " 0 1 0 ", 2*size, 0.0, "a", size, size, " 0 1 0 ", -2*size, 0.0, "z")
}

// name writes the day of each curve: left of its first symbol where no curve begins further left, or else beside a
// sample in the lower left corner, or in the upper one where the curves are low.
func (p *panel) name(s *side, curves []curve) {
	var places []float64
	var named []curve
	direct, deep := true, false // whether no curve begins further left, and whether one is low there
	for _, c := range curves {
		for _, l := range s.levels(c.test) {
			deep = deep || l.Hz <= 500 && l.DB > 70 && l.State != "not_tested"
		}
		first, ok := firstLevel(s.levels(c.test))
		if !ok {
			continue
		}
		named = append(named, c)
		places = append(places, dbPlace(first.DB))
		direct = direct && first.Hz >= 500
	}
	if !direct {
		for i := range places {
			places[i] = chartTop + chartHeight - 10 - 14*float64(len(places)-1-i)
			if deep {
				places[i] = chartTop + 10 + 14*float64(i)
			}
		}
	}
	places = spread(places, 12, chartTop+8, chartTop+chartHeight-8)
	for i, c := range named {
		t := text{X: hzPlace(500) - 8, Y: places[i] + 4, Class: "name end", Text: c.label}
		if c.class == "base" {
			t.Class = "name soft end"
		}
		if !direct {
			x, y := chartLeft+8, places[i]
			t.X, t.Class = x+32, strings.TrimSuffix(t.Class, " end")
			class := s.name + " " + c.class
			p.Shapes = append(p.Shapes, shape{Class: "curve " + class, D: path("M", x, y, "h", 26.0)}, shape{Class: "sym " + class, D: symbol(s, x+13, y, c.size)})
		}
		p.Texts = append(p.Texts, t)
	}
}

func firstLevel(levels []finding.Level) (first finding.Level, ok bool) {
	for _, l := range levels {
		if l.State != "not_tested" && (!ok || l.Hz < first.Hz) {
			first, ok = l, true
		}
	}
	return first, ok
}
