package html

import (
	"cmp"
	"fmt"
	"slices"

	"hearduty/internal/finding"
)

// results draws each result: a disc where the level is known, whiskers where it lies between two, an arrow where only
// a bound is known. What decides the exposure now is full, what is older is open.
func (v *noise) results(list []finding.Result) {
	sorted := slices.Clone(list)
	slices.SortStableFunc(sorted, func(a, b finding.Result) int { return boolInt(a.Current) - boolInt(b.Current) })
	type place struct{ x, y float64 }
	count := map[place]int{}
	var order []place
	for _, r := range sorted {
		if !r.Date.Known() {
			continue
		}
		at := place{v.days.x(r.Date), v.y(r.DB)}
		if count[at]++; count[at] == 1 {
			order = append(order, at)
			v.result(&r, at.x, at.y)
		}
	}
	for _, at := range order {
		if n := count[at]; n > 1 {
			t := text{X: at.x + 6, Y: at.y + 4, Class: "num", Text: "×" + fmt.Sprint(n)}
			if at.x > v.Width-30 {
				t.X, t.Class = at.x-6, "num end"
			}
			v.Texts = append(v.Texts, t)
		}
	}
}

func (v *noise) result(r *finding.Result, x, y float64) {
	class := "res old"
	if r.Current {
		class, v.Filled = "res cur", true
	} else {
		v.Hollow = true
	}
	const size = 3.4
	mark := path("M", x-size, y, "a", size, size, " 0 1 0 ", 2*size, 0.0, "a", size, size, " 0 1 0 ", -2*size, 0.0, "z")
	switch r.Known {
	case "between":
		v.Between = true
		low, high := v.y(r.Low), v.y(r.High)
		v.Shapes = append(v.Shapes, shape{Class: "whisker", D: path("M", x-3, high, "h", 6.0, "M", x, high, "V", low, "M", x-3, low, "h", 6.0)})
	case "at_least":
		v.Least = true
		tip := max(y-14, noiseTop)
		v.Shapes = append(v.Shapes, shape{Class: "whisker", D: path("M", x, y, "V", tip, "m", -3.0, 4.0, "l", 3.0, -4.0, 3.0, 4.0)})
		mark = path("M", x-size-1, y, "h", 2*size+2)
		class = "whisker"
	case "at_most":
		v.Most = true
		tip := min(y+14, v.bottom)
		v.Shapes = append(v.Shapes, shape{Class: "whisker", D: path("M", x, y, "V", tip, "m", -3.0, -4.0, "l", 3.0, 4.0, 3.0, -4.0)})
		mark = path("M", x-size-1, y, "h", 2*size+2)
		class = "whisker"
	}
	v.Shapes = append(v.Shapes, shape{Class: class, D: mark})
}

// earGap is the room of one protector in the strip, two lines of text.
const earGap = 30.0

// bandWords say how the level at the ear stands to its target; the shapes say it once more.
var bandWords = map[string]string{"too_little": "too little protection", "good": "good", "much": "much protection", "too_much": "too much protection"}

// bandShape gives a triangle upwards for too little, a disc for good, and triangles downwards for more than that.
func bandShape(band string, x, y float64) shape {
	switch band {
	case "too_little":
		return shape{Class: "band little", D: path("M", x, y-4.6, "l", 4.8, 8.2, "h", -9.6, "z")}
	case "much":
		return shape{Class: "band much", D: path("M", x, y+4.6, "l", -4.8, -8.2, "h", 9.6, "z")}
	case "too_much":
		return shape{Class: "band toomuch", D: path("M", x, y+4.6, "l", -4.8, -8.2, "h", 9.6, "z")}
	}
	return shape{Class: "band", D: path("M", x-4, y, "a", 4.0, 4.0, " 0 1 0 ", 8.0, 0.0, "a", 4.0, 4.0, " 0 1 0 ", -8.0, 0.0, "z")}
}

// strip draws the level at the ear under each protector, on the scale of the chart.
func (v *noise) strip(x *finding.Exposure) {
	ears := slices.Clone(x.Ears)
	slices.SortStableFunc(ears, func(a, b finding.Ear) int { return cmp.Compare(b.DB, a.DB) })
	grid := ""
	for db := v.low; db <= v.high; db += v.step() {
		grid += path("M", earAxis-4, v.y(db), "h", 8.0)
		v.EarTexts = append(v.EarTexts, text{X: earAxis - 9, Y: v.y(db) + 4, Class: "soft end", Text: decibel(db)})
	}
	v.EarShapes = append(v.EarShapes, shape{Class: "grid", D: grid + path("M", earAxis, noiseTop, "V", v.bottom)})
	for _, l := range x.Lines {
		v.EarShapes = append(v.EarShapes, shape{Class: "law " + gradeClass(l.Grade), D: path("M", earAxis-6, v.y(l.DB), "h", 12.0)})
	}
	v.EarTexts = append(v.EarTexts, text{X: 1, Y: 12, Text: "Level at the ear", Further: "dBA"})
	places := make([]float64, len(ears))
	for i, e := range ears {
		places[i] = v.y(e.DB)
	}
	places = spread(places, earGap, noiseTop+8, v.bottom-16)
	for i, e := range ears {
		at := v.y(e.DB)
		v.EarShapes = append(v.EarShapes, shape{Class: "leader", D: path("M", earAxis, at, "L", earAxis+24, places[i])}, bandShape(e.Band, earAxis, at))
		v.EarTexts = append(v.EarTexts,
			text{X: earAxis + 28, Y: places[i] + 4, Text: cut(fmt.Sprintf("%s: %s dBA", e.Protector, decibel(e.DB)), 32)},
			text{X: earAxis + 28, Y: places[i] + 17, Class: "soft", Text: cut(earSaid(&e), 34)})
	}
	v.EarDesc = fmt.Sprintf("%d protectors. The table below has each of them.", len(ears))
	if !slices.ContainsFunc(ears, func(e finding.Ear) bool { return e.Method != ears[0].Method }) {
		v.Method = ears[0].Method
	}
}

func earSaid(e *finding.Ear) string {
	s := fmt.Sprintf("%d workers", e.Workers)
	if e.Workers == 1 {
		s = "1 worker"
	}
	if w := bandWords[e.Band]; w != "" {
		s = w + ", " + s
	}
	return s
}

// rows fills the table.
func (v *noise) rows(x *finding.Exposure) {
	for _, r := range x.Results {
		row := resultRow{Day: dayOr(r.Date), Level: decibel(r.DB) + " dBA", Record: r.Record, Use: "older"}
		switch r.Known {
		case "between":
			row.Level += fmt.Sprintf(", between %s and %s dBA", decibel(r.Low), decibel(r.High))
		case "at_least":
			row.Level = "at least " + row.Level
		case "at_most":
			row.Level = "at most " + row.Level
		}
		if r.Current {
			row.Use = "decides the exposure now"
		}
		v.Results = append(v.Results, row)
	}
	v.Lines = x.Lines
	for _, e := range x.Ears {
		v.Ears = append(v.Ears, earRow{e.Protector, decibel(e.DB) + " dBA", bandWords[e.Band], e.Method, fmt.Sprint(e.Workers)})
	}
}
