package html

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strconv"
	"strings"

	"hearduty/internal/finding"
)

// An audiogram is drawn as the trade does: hearing level in dB HL downwards, frequency to the right in octaves. The
// right ear is a circle on a full line, the left a cross on a broken one. A level at which nothing was heard has an
// arrow down and outwards, for the right ear to the left and for the left ear to the right, and no line leads to it.
//
// Sources: symbols and arrows, 21 NCAC 22I .0111 (read); lines and one octave as wide as 20 dB is high, common
// practice after ISO 8253-1 (from memory, not read).
const (
	octave      = 40.0
	perDB       = octave / 20
	chartLeft   = 34.0
	chartBefore = 42.0 // from the frame to 125 Hz, room for the names of the curves
	chartAfter  = 14.0 // from 8000 Hz to the frame
	chartTop    = 46.0
	chartWidth  = chartBefore + 6*octave + chartAfter
	chartHeight = (quietest + loudest) * perDB
	panelWidth  = chartLeft + chartWidth + 14
	quietest    = 10.0 // dB HL below zero at the upper edge
	loudest     = 120.0
)

// audiogram is what the template draws: a panel for each ear, the right one first, and a table.
type audiogram struct {
	Panels []panel
	Hz     []int
	Rows   []testRow
	Aged   bool // some shift is corrected for age
	Height float64
}

type panel struct {
	Ear, Title, Desc string
	Width, Height    float64
	Shapes           []shape
	Texts            []text
}

// testRow is one ear of one test in the table.
type testRow struct {
	Date, Purpose, Ear, Record string
	Cells                      []string
	Shift, Age                 string
	Significant                bool
}

// side is one ear of the tests.
type side struct {
	name     string
	outward  float64 // direction of the arrows
	levels   func(*finding.Test) []finding.Level
	shift    func(*finding.Test) *finding.Shift
	baseline func(*finding.Test) string
}

var sides = []side{
	{"right", -1, func(t *finding.Test) []finding.Level { return t.Right }, func(t *finding.Test) *finding.Shift { return t.RightShift }, func(t *finding.Test) string { return t.RightBaseline }},
	{"left", 1, func(t *finding.Test) []finding.Level { return t.Left }, func(t *finding.Test) *finding.Shift { return t.LeftShift }, func(t *finding.Test) string { return t.LeftBaseline }},
}

// audiogramOf draws the hearing tests of a worker; nothing without tests, which a portrait has only on request.
func audiogramOf(p *finding.Portrait) *audiogram {
	if len(p.Tests) == 0 {
		return nil
	}
	tests := make([]*finding.Test, len(p.Tests))
	for i := range p.Tests {
		tests[i] = &p.Tests[i]
	}
	slices.SortStableFunc(tests, func(a, b *finding.Test) int {
		return cmp.Or(cmp.Compare(a.Date, b.Date), cmp.Compare(a.Record, b.Record))
	})
	a := &audiogram{}
	for i := range sides {
		a.Panels = append(a.Panels, panelOf(p.Subject.ID, &sides[i], tests))
		a.Height = max(a.Height, a.Panels[i].Height)
	}
	a.table(tests)
	return a
}

// hzPlace gives the place of a frequency, within the chart.
func hzPlace(hz int) float64 {
	at := math.Log2(float64(max(hz, 1)) / 125)
	return chartLeft + chartBefore + octave*min(max(at, -.3), 6.3)
}

// dbPlace gives the place of a hearing level, within the chart.
func dbPlace(db float64) float64 {
	return chartTop + perDB*(min(max(db, -quietest), loudest)+quietest)
}

func panelOf(id string, s *side, tests []*finding.Test) panel {
	p := panel{Ear: s.name, Width: panelWidth, Title: fmt.Sprintf("Hearing of the %s ear of worker %s", s.name, id)}
	p.axes(s)
	curves := curvesOf(s, tests)
	for i := range curves {
		p.draw(s, &curves[i])
	}
	p.name(s, curves)
	p.Height = p.shifts(s, curves)
	p.Desc = describe(s, curves)
	return p
}

// describe says in words what the panel shows.
func describe(s *side, curves []curve) string {
	if len(curves) == 0 {
		return "No test of this ear."
	}
	var parts []string
	for _, c := range slices.Backward(curves) {
		words := []string{}
		for _, l := range s.levels(c.test) {
			words = append(words, strconv.Itoa(l.Hz)+" Hz "+levelSaid(&l))
		}
		parts = append(parts, c.label+", dB HL: "+strings.Join(words, ", "))
	}
	return strings.Join(parts, ". ") + "."
}

// levelSaid writes a hearing level as the table has it.
func levelSaid(l *finding.Level) string {
	switch l.State {
	case "no_response":
		return "no response to " + decibel(l.DB)
	case "not_tested":
		return "not tested"
	}
	return decibel(l.DB)
}

func decibel(v float64) string {
	return strings.Replace(strconv.FormatFloat(math.Round(v*10)/10+0, 'f', -1, 64), "-", "−", 1)
}

// shiftSaid says how large a shift is.
func shiftSaid(x *finding.Shift) string {
	if x == nil {
		return ""
	}
	s := decibel(x.DB) + "\u00a0dB"
	if x.DB > 0 {
		s = "+" + s
	}
	return s
}

// ageSaid names the age correction; nothing if there is none.
func ageSaid(x *finding.Shift) string {
	if x == nil || x.AgeDB == 0 {
		return ""
	}
	return "after age correction of " + decibel(x.AgeDB) + " dB"
}
