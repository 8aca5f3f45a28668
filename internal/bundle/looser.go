package bundle

import (
	"fmt"
	"maps"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
)

// checkLooser warns of parameters by which the bundle asks for less than those that it extends, and of those of which
// that cannot be told. They are compared on each day on which one of them begins.
func (b *Bundle) checkLooser(l *layer, problems *diag.List) {
	for _, name := range slices.Sorted(maps.Keys(l.replaced)) {
		var old Parameter
		if remarshal(l.replaced[name], &old) != nil {
			continue
		}
		for i := range old.Values {
			if old.Values[i].prepare(old.Unit) != nil {
				return
			}
			if i > 0 && !old.Values[i-1].to.Known() {
				old.Values[i-1].to = old.Values[i].from
			}
		}
		at := l.at("parameters", "/"+name)
		const remedy = "Give the stricter value, or make sure that the law allows the looser one"
		switch word := looser(old, b.Parameters[name]); word {
		case "":
		case unknownWay:
			problems.Warnf(at, "Write stricter: lower or higher beside the parameter in the bundle that has it first", "whether %s asks for less here than in the bundle that is extended cannot be told", name)
		default:
			problems.Warnf(at, remedy, "%s asks for less than the bundle that is extended: %s", name, word)
		}
	}
}

const unknownWay = "?"

// looser says in words where the new values ask for less, nothing where they do nowhere, or that it cannot be told.
func looser(old, new Parameter) string {
	if old.Stricter == "" {
		return unknownWay
	}
	for _, side := range [][]Value{old.Values, new.Values} {
		for i := range side {
			day := side[i].from
			a, okA := old.At(day)
			b, okB := new.At(day)
			if !okA || !okB {
				continue
			}
			x, y, ok := onOneScale(a, b)
			if !ok {
				return unknownWay
			}
			if old.Stricter == "lower" && y > x || old.Stricter == "higher" && y < x {
				return fmt.Sprintf("from %s %s in place of %s", day, inWords(b), inWords(a))
			}
		}
	}
	return ""
}

// onOneScale gives two values as numbers, if they are numbers or intervals of which one is always the longer.
func onOneScale(a, b *Value) (x, y float64, ok bool) {
	switch {
	case a.kind == numberValue && b.kind == numberValue:
		return a.number, b.number, true
	case a.kind != intervalValue || b.kind != intervalValue:
		return 0, 0, false
	case a.interval.Unit == b.interval.Unit:
		return float64(a.interval.Count), float64(b.interval.Count), true
	}
	leastA, mostA, okA := daysOf(a.interval)
	leastB, mostB, okB := daysOf(b.interval)
	if !okA || !okB || leastA <= mostB && leastB <= mostA {
		return 0, 0, false
	}
	return leastA, leastB, true
}

// daysOf gives the fewest and the most days that an interval can have: a month has 28 to 31, and several months come
// close to their mean of 30.4.
func daysOf(i calendar.Interval) (least, most float64, ok bool) {
	n := float64(i.Count)
	switch i.Unit {
	case calendar.Days:
		return n, n, true
	case calendar.Months:
		return 30.4*n - 3, 30.5*n + 3, true
	case calendar.Years:
		return 365 * n, 366 * n, true
	}
	return 0, 0, false
}

func inWords(v *Value) string { return fmt.Sprint(v.Plain()) }
