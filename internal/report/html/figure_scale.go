package html

import (
	"math"
	"slices"
	"strconv"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

// spread moves places apart until neighbours have the gap between them, and keeps them between low and high. The
// answer has the order of the question. Where there is no room for the gap, the places share what there is.
func spread(places []float64, gap, low, high float64) []float64 {
	order := make([]int, len(places))
	for i := range order {
		order[i] = i
	}
	slices.SortStableFunc(order, func(a, b int) int {
		return boolInt(places[a] > places[b]) - boolInt(places[a] < places[b])
	})
	if n := len(places); n > 1 {
		gap = min(gap, (high-low)/float64(n-1))
	}
	out := slices.Clone(places)
	least := low
	for _, i := range order {
		out[i] = max(out[i], least)
		least = out[i] + gap
	}
	most := high
	for k := len(order) - 1; k >= 0; k-- {
		out[order[k]] = min(out[order[k]], most)
		most = out[order[k]] - gap
	}
	return out
}

// scale lays days along a line from left to right.
type scale struct {
	from, to    calendar.Date
	left, right float64
}

// x gives the place of a day, to a tenth; days outside the scale stand at its ends.
func (s scale) x(d calendar.Date) float64 {
	d = min(max(d, s.from), s.to)
	return math.Round(10*(s.left+(s.right-s.left)*float64(d-s.from)/float64(max(1, s.to-s.from)))) / 10
}

// years gives the first of January of each year on the scale, with its label where there is room for it.
func (s scale) years() (grid []float64, labels []text) {
	first, last := s.from.Year(), s.to.Year()
	room := (s.right - s.left) / float64(max(1, s.to-s.from)) * 365
	every := 1
	for _, n := range []int{2, 5, 10, 20, 50} {
		if room*float64(every) < 34 {
			every = n
		}
	}
	for y := first; y <= last && len(grid) < 200; y++ {
		d, ok := calendar.NewDate(y, 1, 1)
		if !ok || d < s.from {
			continue
		}
		x := s.x(d)
		grid = append(grid, x)
		if y%every == 0 && x+30 <= s.right+6 {
			labels = append(labels, text{X: x + 3, Text: strconv.Itoa(y)})
		}
	}
	return grid, labels
}

// stripScale finds the days to draw and the day on which everything begins.
func stripScale(p *finding.Portrait, deadlines []*finding.Finding, asOf calendar.Date) (s scale, begins calendar.Date, ok bool) {
	var first, last calendar.Date
	see := func(d calendar.Date) {
		if !d.Known() {
			return
		}
		if !first.Known() || d < first {
			first = d
		}
		last = max(last, d)
	}
	for _, x := range p.Spells {
		see(x.From)
		see(x.To)
	}
	for _, e := range p.Events {
		see(e.Date)
	}
	for _, f := range deadlines {
		see(f.Due)
	}
	if !first.Known() {
		return s, 0, false
	}
	see(asOf)
	now := asOf
	if !now.Known() {
		now = last
	}
	last = min(last, now.AddMonths(12*mostYearsAhead))
	from := max(first, now.AddMonths(-12*mostYearsDrawn))
	if last-from < 365 {
		from = max(1, last-365)
	}
	return scale{from, last, stripEdge, stripWidth - stripEdge}, first, true
}
