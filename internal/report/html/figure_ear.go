package html

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/finding"
)

// axes draws the frame, the lines of the octaves and of every 10 dB, and their numbers.
func (p *panel) axes(s *side) {
	right, bottom := chartLeft+chartWidth, chartTop+chartHeight
	var octaves, halves, levels strings.Builder
	for _, hz := range []int{125, 250, 500, 1000, 2000, 4000, 8000} {
		x := hzPlace(hz)
		octaves.WriteString(path("M", x, chartTop, "V", bottom))
		p.Texts = append(p.Texts, text{X: x, Y: chartTop - 6, Class: "soft mid", Text: strconv.Itoa(hz)})
	}
	for _, hz := range []int{750, 1500, 3000, 6000} {
		x := hzPlace(hz)
		halves.WriteString(path("M", x, chartTop, "V", bottom))
		p.Texts = append(p.Texts, text{X: x, Y: bottom + 12, Class: "soft mid", Text: strconv.Itoa(hz)})
	}
	for db := -10; db <= 120; db += 10 {
		y := dbPlace(float64(db))
		if db > -10 && db < 120 && db != 0 {
			levels.WriteString(path("M", chartLeft, y, "H", right))
		}
		p.Texts = append(p.Texts, text{X: chartLeft - 5, Y: y + 4, Class: "soft end", Text: decibel(float64(db))})
	}
	p.Shapes = append(p.Shapes,
		shape{Class: "grid", D: octaves.String() + levels.String()}, shape{Class: "grid half", D: halves.String()},
		shape{Class: "zero", D: path("M", chartLeft, dbPlace(0), "H", right)},
		shape{Class: "frame", D: path("M", chartLeft, chartTop, "H", right, "V", bottom, "H", chartLeft, "z")})
	p.Texts = append(p.Texts,
		text{X: chartLeft, Y: 14, Class: "head", Text: strings.ToUpper(s.name[:1]) + s.name[1:] + " ear"},
		text{X: 1, Y: 28, Class: "soft", Text: "dB HL"}, text{X: right, Y: 28, Class: "soft end", Text: "Hz"})
}

// shifts marks the frequencies over which a shift is taken and says each shift. It gives the height of the panel.
func (p *panel) shifts(s *side, curves []curve) float64 {
	y := chartTop + chartHeight + 24
	bracketed := false
	several := 0
	for _, c := range curves {
		several += boolInt(s.shift(c.test) != nil && c.class != "base")
	}
	for _, c := range slices.Backward(curves) {
		x := s.shift(c.test)
		if x == nil || c.class == "base" {
			continue
		}
		if !bracketed && len(x.Hz) > 0 {
			p.bracket(x.Hz, y)
			bracketed = true
		}
		says := shiftSaid(x)
		if several > 1 {
			says = dayOr(c.test.Date) + ": " + says
		}
		class := "end"
		if x.Significant {
			class, says = "end strong", says+", threshold shift"
		}
		y += 16
		p.Texts = append(p.Texts, text{X: panelWidth - 14, Y: y, Class: class, Text: says})
		if age := ageSaid(x); age != "" {
			y += 14
			p.Texts = append(p.Texts, text{X: panelWidth - 14, Y: y, Class: "soft end", Text: age})
		}
	}
	return y + 8
}

// bracket is a line under the frequencies, with a stroke at each.
func (p *panel) bracket(hz []int, y float64) {
	low, high := hzPlace(slices.Min(hz)), hzPlace(slices.Max(hz))
	d := path("M", low, y-3, "v", 6.0, "M", low, y, "H", high)
	for _, f := range hz {
		if x := hzPlace(f); x > low {
			d += path("M", x, y-3, "v", 6.0)
		}
	}
	p.Shapes = append(p.Shapes, shape{Class: "bracket", D: d})
}

// table lists every test with every frequency at which any was made, the latest first.
func (a *audiogram) table(tests []*finding.Test) {
	for _, t := range tests {
		for _, l := range slices.Concat(t.Right, t.Left) {
			if !slices.Contains(a.Hz, l.Hz) {
				a.Hz = append(a.Hz, l.Hz)
			}
		}
	}
	slices.Sort(a.Hz)
	for _, t := range slices.Backward(tests) {
		for i := range sides {
			s := &sides[i]
			row := testRow{Date: dayOr(t.Date), Purpose: t.Purpose, Ear: s.name, Record: strings.TrimPrefix(t.Record, "audiogram/"), Shift: shiftSaid(s.shift(t))}
			if x := s.shift(t); x != nil {
				row.Significant = x.Significant
			}
			if x := s.shift(t); x != nil && x.AgeDB != 0 {
				row.Age, a.Aged = decibel(x.AgeDB)+"\u00a0dB", true
			}
			for _, hz := range a.Hz {
				cell := ""
				for _, l := range s.levels(t) {
					if l.Hz == hz {
						cell = levelSaid(&l)
					}
				}
				row.Cells = append(row.Cells, cell)
			}
			a.Rows = append(a.Rows, row)
		}
	}
}

// Days says from when to when tests are listed.
func (a *audiogram) Days() string {
	first, last := a.Rows[len(a.Rows)-1].Date, a.Rows[0].Date
	if first == last {
		return first
	}
	return fmt.Sprintf("%s to %s", first, last)
}
