package finding

import (
	"fmt"
	"maps"
	"reflect"
	"slices"
	"strings"
)

// parameters names the values of the law that decide the finding and are no longer the same.
func (w *reasons) parameters() {
	if w.old == nil || w.new == nil {
		return
	}
	for _, name := range slices.Sorted(maps.Keys(w.new.Facts)) {
		now, isNow := AsParameter(w.new.Facts[name])
		before, wasBefore := AsParameter(w.old.Facts[name])
		if isNow && wasBefore && now.String() != before.String() {
			w.say("parameter_changed", "The parameter %s was %s and is %s (%s).", name, before, now, now.Cite)
		}
	}
}

// law says whether the bundle changed, and whether it has the duty in both reports.
func (w *reasons) law() {
	f := w.about()
	key := [2]string{f.Bundle, f.Duty}
	o, n := w.comparer.old, w.comparer.new
	if f.Bundle == OfProgram {
		return
	}
	if w.old == nil && len(o.duties) > 0 && o.duties[key] == nil {
		w.say("duty_new", "The bundle %s did not have this duty when the old report was written.", f.Bundle)
	}
	if w.new == nil && len(n.duties) > 0 && n.duties[key] == nil {
		w.say("duty_gone", "The bundle %s no longer has this duty.", f.Bundle)
	}
	for _, nb := range n.report.Bundles {
		for _, ob := range o.report.Bundles {
			if nb.ID == f.Bundle && ob.ID == f.Bundle && bundleChanged(&ob, &nb) != "" {
				w.say("bundle_changed", "%s", bundleChanged(&ob, &nb))
			}
		}
	}
}

// choices names the choices of the site that are no longer the same.
func (w *reasons) choices() {
	f := w.about()
	o, n := w.comparer.old.choices(f.Site), w.comparer.new.choices(f.Site)
	names := slices.Sorted(maps.Keys(n))
	for name := range o {
		if _, both := n[name]; !both {
			names = append(names, name)
		}
	}
	slices.Sort(names)
	for _, name := range names {
		if f.Bundle != OfProgram && !reflect.DeepEqual(o[name], n[name]) {
			w.say("choice_changed", "The choice %s of the site was %v and is %v.", name, chosen(o, name), chosen(n, name))
		}
	}
}

func chosen(m map[string]any, name string) any {
	if v, ok := m[name]; ok {
		return v
	}
	return "not there"
}

func (s *compared) choices(site string) map[string]any {
	for i := range s.report.Sites {
		if s.report.Sites[i].ID == site {
			return s.report.Sites[i].Choices
		}
	}
	return nil
}

// facts names the facts that are no longer the same. Audiometric figures are named as such and not repeated.
func (w *reasons) facts() {
	if w.old == nil || w.new == nil {
		return
	}
	names := slices.Collect(maps.Keys(w.old.Facts))
	for name := range w.new.Facts {
		if _, both := w.old.Facts[name]; !both {
			names = append(names, name)
		}
	}
	slices.Sort(names)
	var parts []string
	for _, name := range names {
		if o, n := w.old.Facts[name], w.new.Facts[name]; !reflect.DeepEqual(o, n) {
			words, before := Named(name, plainFact(o))
			_, now := Named(name, plainFact(n))
			parts = append(parts, fmt.Sprintf("%s was %s and is %s", words, before, now))
		}
	}
	if len(parts) > 0 {
		w.say("facts_changed", "The facts changed: %s.", strings.Join(parts, "; "))
	}
	if !reflect.DeepEqual(w.old.Health, w.new.Health) {
		w.say("facts_changed", "The audiometric figures changed.")
	}
}

// plainFact gives the value of a fact, also of one that is a parameter.
func plainFact(v any) any {
	if p, ok := AsParameter(v); ok {
		return p.String()
	}
	return v
}
