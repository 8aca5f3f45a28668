package html

import (
	"cmp"
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// The shapes of events, 8 units wide.
func dot(x, y float64) string   { return path("M", x, y, "h", .01) }
func check(x, y float64) string { return path("M", x-3.2, y+.4, "l", 2.2, 2.6, 4.2, -5.6) }
func alert(x, y float64) string { return path("M", x, y-4.4, "l", 4.6, 8.0, "h", -9.2, "z") }

var eventShapes = map[string]func(x, y float64) string{"plain": dot, "good": check, "bad": alert}

// dense is the number of events from which a lane shows strokes instead of marks.
const dense = 40

// calibrations are the kinds of calibration in the order of their lanes.
var calibrations = []string{"functional", "acoustic", "exhaustive", "laboratory", "field"}

// eventLane tells in which lane an event is drawn: calibrations each by their kind.
func eventLane(e *finding.Event) string {
	if e.Lane != "calibration" {
		return e.Lane
	}
	kind, _, _ := strings.Cut(e.Label, ": ")
	return kind
}

func (d *drawing) eventLanes(p *finding.Portrait) {
	lanes := laneOrder(p.Events, eventLane)
	slices.SortStableFunc(lanes, func(a, b string) int {
		return cmp.Compare(slices.Index(calibrations, a), slices.Index(calibrations, b))
	})
	if p.Subject.Kind == "worker" {
		for _, needed := range []string{"training", "test"} {
			if !slices.Contains(lanes, needed) {
				lanes = slices.Insert(lanes, 0, needed)
			}
		}
	}
	handed := slices.ContainsFunc(p.Spells, func(s finding.Spell) bool { return s.Lane == "protector" })
	for _, lane := range lanes {
		if lane == "protector" && handed {
			continue // the starts of the protectors' bars
		}
		var list []finding.Event
		n := 0
		for _, e := range p.Events {
			if eventLane(&e) != lane {
				continue
			}
			n++
			switch {
			case e.Date.Known() && e.Date >= d.scale.from:
				list = append(list, e)
			case e.Date.Known():
				d.early++
			}
		}
		slices.SortStableFunc(list, func(a, b finding.Event) int { return cmp.Compare(a.Date, b.Date) })
		switch {
		case tellsItself(p.Subject.Kind, lane) && len(list) <= 12:
			d.worded(lane, list)
		default:
			d.events(lane, list, n)
		}
	}
}

// tellsItself says whether the events of a lane each say something else, so that they are drawn with their words.
func tellsItself(kind, lane string) bool {
	return kind != "worker" && slices.Contains([]string{"change", "control", "document", "survey"}, lane)
}

// events draws the events of a lane; those that would hide each other are one mark with their number.
func (d *drawing) events(lane string, list []finding.Event, count int) {
	top := d.lane(laneName(lane), count, 17)
	y := top + 8.5
	if count == 0 {
		d.Texts = append(d.Texts, text{X: stripEdge, Y: y + 4, Class: "soft", Text: "none on record"})
		return
	}
	if len(list) > dense {
		d.strokes(list, y)
		return
	}
	var alone []shape
	for i := 0; i < len(list); {
		x := d.scale.x(list[i].Date)
		j := i + 1
		for j < len(list) && d.scale.x(list[j].Date) < x+9+9*float64(boolInt(j-i > 1)) {
			j++
		}
		group := list[i:j]
		state := worstState(group)
		d.seen[state] = true
		mark := eventShapes[state](x, y)
		if len(group) > 1 {
			n := text{X: x + 5, Y: y + 4, Class: "num", Text: fmt.Sprint(len(group))}
			if x > d.Width-14 {
				n.X, n.Class = x-5, "num end"
			}
			d.Texts = append(d.Texts, n)
		}
		if state == "bad" {
			alone = append(alone, shape{"e bad", mark, titleOf(group)})
		} else {
			d.add("e "+state, mark)
		}
		i = j
	}
	d.Shapes = append(d.Shapes, alone...)
}

func worstState(list []finding.Event) string {
	has := map[string]bool{}
	for _, e := range list {
		has[e.State] = true
	}
	switch {
	case has["bad"]:
		return "bad"
	case has["good"] && len(has) == 1:
		return "good"
	}
	return "plain"
}

// titleOf says what was not in order.
func titleOf(group []finding.Event) string {
	var parts []string
	for _, e := range group {
		if e.State == "bad" {
			parts = append(parts, e.Date.String()+" "+e.Label)
		}
	}
	return strings.Join(parts, "; ")
}

// strokes draws many events as a row of strokes, with a mark for each that is not in order.
func (d *drawing) strokes(list []finding.Event, y float64) {
	before := map[string]float64{}
	var bad []shape
	for _, e := range list {
		x := d.scale.x(e.Date)
		state := worstState([]finding.Event{e})
		if last, ok := before[state]; ok && x-last < 1.5 && state != "bad" {
			continue
		}
		before[state] = x
		switch state {
		case "bad":
			d.seen["bad"] = true
			bad = append(bad, shape{"e bad", alert(x, y), titleOf([]finding.Event{e})})
		case "good":
			d.seen["tick"] = true
			d.add("e tick", path("M", x, y-4, "v", 8.0))
		default:
			d.seen["short"] = true
			d.add("e short", path("M", x, y, "v", 4.0))
		}
	}
	d.Shapes = append(d.Shapes, bad...)
}
