package html

import (
	"fmt"
	"math"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// noise is the chart of a group's levels over time, and beside it, on the same scale, what protectors leave of them.
type noise struct {
	Title, Desc       string
	EarTitle, EarDesc string
	Width, EarWidth   float64
	Height            float64
	Ground            []shape // under the results
	Under             []text  // the names of the law's levels, under the results too
	Shapes            []shape
	Texts             []text
	EarShapes         []shape
	EarTexts          []text
	Unit, Method      string
	Filled, Hollow    bool // whether there are such results
	Between           bool
	Least, Most       bool
	Results           []resultRow
	Lines             []finding.Line
	Ears              []earRow

	low, high, bottom float64
	days              scale
}

type resultRow struct{ Day, Level, Record, Use string }
type earRow struct{ Protector, Level, Band, Method, Workers string }

const (
	noiseLeft   = 34.0
	noiseWidth  = 400.0
	noiseTop    = 26.0
	noiseHeight = 190.0
	earWidth    = 270.0
	earAxis     = 40.0
)

// exposureOf draws the noise of a group; nothing if there is neither a result nor a protector.
func exposureOf(p *finding.Portrait, asOf calendar.Date) *noise {
	x := p.Exposure
	if x == nil || len(x.Results)+len(x.Ears) == 0 {
		return nil
	}
	v := &noise{Title: fmt.Sprintf("Noise of %s %s over time", p.Subject.Kind, p.Subject.ID), EarTitle: "Level at the ear under each protector",
		Width: noiseWidth, EarWidth: earWidth, Unit: x.Unit}
	v.bottom = noiseTop + max(noiseHeight, earGap*float64(len(x.Ears))+10)
	v.Height = v.bottom + 22
	v.levels(x)
	if len(x.Results) > 0 {
		v.chart(x, asOf)
	} else {
		v.Width = 0
	}
	if len(x.Ears) > 0 {
		v.strip(x)
	} else {
		v.EarWidth = 0
	}
	v.rows(x)
	return v
}

// levels finds the range of levels: all there are, out to the next 5 dB, within what ears can meet.
func (v *noise) levels(x *finding.Exposure) {
	low, high := math.Inf(1), math.Inf(-1)
	see := func(db float64) {
		if db > 30 && db < 160 {
			low, high = min(low, db), max(high, db)
		}
	}
	for _, r := range x.Results {
		see(r.DB)
		if r.Known == "between" {
			see(r.Low)
			see(r.High)
		}
	}
	for _, l := range x.Lines {
		see(l.DB)
	}
	for _, e := range x.Ears {
		see(e.DB)
	}
	if low > high {
		low, high = 80, 90
	}
	v.low, v.high = 5*math.Floor((low-1)/5), 5*math.Ceil((high+1)/5)
}

// y gives the place of a level, to a tenth; levels outside the range stand at its edge.
func (v *noise) y(db float64) float64 {
	db = min(max(db, v.low), v.high)
	return math.Round(10*(v.bottom-(v.bottom-noiseTop)*(db-v.low)/(v.high-v.low))) / 10
}

// step is the distance of the lines of the scale.
func (v *noise) step() float64 {
	if v.high-v.low > 40 {
		return 10
	}
	return 5
}

// chart draws the results over time.
func (v *noise) chart(x *finding.Exposure, asOf calendar.Date) {
	v.days = resultDays(x.Results, asOf)
	grid := ""
	for db := v.step() * math.Ceil(v.low/v.step()); db <= v.high; db += v.step() {
		grid += path("M", noiseLeft, v.y(db), "H", v.Width)
		v.Texts = append(v.Texts, text{X: noiseLeft - 5, Y: v.y(db) + 4, Class: "soft end", Text: decibel(db)})
	}
	years, labels := v.days.years()
	for _, at := range years {
		grid += path("M", at, v.bottom-4, "v", 4.0)
	}
	for _, l := range labels {
		l.X, l.Y, l.Class = l.X-3, v.bottom+14, "soft"
		v.Texts = append(v.Texts, l)
	}
	v.Ground = append(v.Ground, shape{Class: "grid", D: grid})
	v.Texts = append(v.Texts, text{X: 1, Y: 12, Class: "soft", Text: v.Unit})
	v.lawLines(x)
	v.results(x.Results)
	if d := v.days; asOf.Known() && asOf >= d.from && asOf <= d.to {
		at := d.x(asOf)
		v.Shapes = append(v.Shapes, shape{Class: "asof", D: path("M", at, 14.0, "V", v.bottom)})
		word := text{X: at, Y: 11, Class: "end", Text: "as of " + asOf.String()}
		if at < v.Width/2 {
			word.Class = ""
		}
		v.Texts = append(v.Texts, word)
	}
	v.Desc = fmt.Sprintf("%d results, %s. The table below has each of them.", len(x.Results), v.Unit)
}

func resultDays(list []finding.Result, asOf calendar.Date) scale {
	s := scale{left: noiseLeft + 8, right: noiseWidth - 8}
	for _, r := range list {
		if r.Date.Known() && (!s.from.Known() || r.Date < s.from) {
			s.from = r.Date
		}
		s.to = max(s.to, r.Date)
	}
	s.to = max(s.to, asOf)
	if s.to-s.from < 365 || !s.from.Known() {
		s.from = max(1, s.to-365)
	}
	return s
}
