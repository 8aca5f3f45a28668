package finding

import (
	"cmp"
	"maps"
	"slices"
)

// exposed gathers what of the exposure of a group the new law cannot take from the records.
type exposed struct {
	SwitchExposure
	levels             map[[2]string][]string // by channel and how it is taken
	all, now, newcomer map[string]bool        // workers; those of the as-of day; those whose exposure the old law can tell
}

// exposure tells once a group what of its exposure the new law cannot take from the records.
func (s *switcher) exposure() []SwitchExposure {
	made := map[[2]string]*exposed{}
	for _, list := range s.open[newSide] {
		for _, u := range list {
			key := [2]string{u.Group, u.Bundle}
			if made[key] == nil {
				made[key] = &exposed{SwitchExposure{Bundle: u.Bundle, Group: u.Group}, map[[2]string][]string{}, map[string]bool{}, map[string]bool{}, map[string]bool{}}
			}
			made[key].take(u)
		}
	}
	out := []SwitchExposure{}
	for _, key := range slices.SortedFunc(maps.Keys(made), comparePairs) {
		out = append(out, made[key].told())
	}
	return out
}

func (e *exposed) take(u *Unmeasured) {
	channel := [2]string{u.Channel, u.Taken}
	e.levels[channel] = append(e.levels[channel], u.Levels...)
	e.Reasons, e.Enrols = append(e.Reasons, u.Reasons...), e.Enrols || u.Enrols
	e.all[u.Worker] = true
	if u.Now {
		e.now[u.Worker] = true
	}
	if !u.Other {
		e.newcomer[u.Worker] = true
	}
}

func (e *exposed) told() SwitchExposure {
	e.Workers, e.Now, e.Before, e.Reasons = len(e.all), len(e.now), len(e.all)-len(e.newcomer), distinct(e.Reasons)
	for _, channel := range slices.SortedFunc(maps.Keys(e.levels), comparePairs) {
		e.Wanted = append(e.Wanted, SwitchMeasure{channel[0], channel[1], distinct(e.levels[channel])})
	}
	return e.SwitchExposure
}

// distinct sorts words and leaves out repeats.
func distinct(list []string) []string {
	slices.Sort(list)
	return append([]string{}, slices.Compact(list)...)
}

// acts lists the duties of the new side that no record shows to be done, those that are news first.
func (s *switcher) acts() []SwitchAct {
	before := map[string]map[Subject]bool{} // by duty, whatever the bundle
	s.each(oldSide, func(_ string, of *Tally) {
		for duty, who := range of.undone {
			for subject := range who {
				put(before, duty, subject)
			}
		}
	})
	out := []SwitchAct{}
	s.each(newSide, func(bundle string, of *Tally) {
		for duty, who := range of.undone {
			out = append(out, s.act(bundle, duty, who, before[duty]))
		}
	})
	slices.SortFunc(out, func(a, b SwitchAct) int {
		return cmp.Or(cmp.Compare(numberOf(b.Subjects)-b.Before, numberOf(a.Subjects)-a.Before), cmp.Compare(a.Duty, b.Duty), cmp.Compare(a.Bundle, b.Bundle))
	})
	return out
}

func (s *switcher) act(bundle, duty string, who, before map[Subject]bool) SwitchAct {
	a := SwitchAct{Bundle: bundle, Duty: duty, Evidence: []string{}, Unread: []string{}, Subjects: s.subjects(who), Before: shared(who, before)}
	if d := s.duties[[2]string{bundle, duty}]; d != nil {
		a.Title, a.Cite, a.Evidence = d.Title, d.Cite, append(a.Evidence, d.Evidence...)
	}
	for _, kind := range a.Evidence {
		if s.Records[kind] == 0 {
			a.Unread = append(a.Unread, kind)
		}
	}
	return a
}

// shared counts the subjects that are in both sets.
func shared(a, b map[Subject]bool) (n int) {
	for subject := range a {
		if b[subject] {
			n++
		}
	}
	return n
}

// Number counts the subjects of all kinds.
func (a *SwitchAct) Number() int { return numberOf(a.Subjects) }

// lacks gathers what the unproven findings of a side lack, by bundle and words. What is lacking of a worker's exposure
// is told by group, and not here: who belongs in the program is decided by nothing else.
func (s *switcher) lacks(k side) map[[2]string]*lacking {
	out := map[[2]string]*lacking{}
	s.each(k, func(bundle string, of *Tally) {
		for what, l := range of.lacking {
			key := [2]string{bundle, what.words}
			if out[key] == nil {
				out[key] = &lacking{map[string]bool{}, map[Subject]bool{}}
			}
			out[key].take(l, func(subject Subject) bool { return !what.enrolment || !s.unmeasured(k, bundle, subject) })
			if len(out[key].subjects) == 0 {
				delete(out, key)
			}
		}
	})
	return out
}

// unmeasured says whether the exposure of a worker is not known on the level of a bundle that enrols.
func (s *switcher) unmeasured(k side, bundle string, subject Subject) bool {
	return subject.Kind == "worker" && slices.ContainsFunc(s.open[k][subject.ID], func(u *Unmeasured) bool { return u.Bundle == bundle && u.Enrols })
}

// needs tells once a thing what else the records lack.
func (s *switcher) needs() []SwitchNeed {
	before := map[string]map[Subject]bool{} // by words, whatever the bundle
	for key, l := range s.lacks(oldSide) {
		for subject := range l.subjects {
			put(before, key[1], subject)
		}
	}
	out := []SwitchNeed{}
	for key, l := range s.lacks(newSide) {
		out = append(out, SwitchNeed{Bundle: key[0], Lacks: key[1], Duties: slices.Sorted(maps.Keys(l.duties)), Subjects: s.subjects(l.subjects), Before: shared(l.subjects, before[key[1]])})
	}
	slices.SortFunc(out, func(a, b SwitchNeed) int {
		return cmp.Or(cmp.Compare(b.Number()-b.Before, a.Number()-a.Before), cmp.Compare(a.Lacks, b.Lacks), cmp.Compare(a.Bundle, b.Bundle))
	})
	return out
}

// Number counts the subjects of all kinds.
func (n *SwitchNeed) Number() int { return numberOf(n.Subjects) }

func numberOf(list []SwitchSubjects) int {
	sum := 0
	for _, s := range list {
		sum += s.Number
	}
	return sum
}

// subjects divides subjects by kind, and workers by the group that they are in.
func (s *switcher) subjects(who map[Subject]bool) []SwitchSubjects {
	byKind, groups := map[string]*SwitchSubjects{}, map[string]int{}
	for subject := range who {
		k := byKind[subject.Kind]
		if k == nil {
			k = &SwitchSubjects{Kind: subject.Kind, IDs: []string{}}
			byKind[subject.Kind] = k
		}
		k.Number++
		if subject.Kind == "worker" {
			groups[s.Groups[[2]string{s.at.ID, subject.ID}]]++
		} else {
			k.IDs = append(k.IDs, subject.ID)
		}
	}
	out := []SwitchSubjects{}
	for _, kind := range slices.Sorted(maps.Keys(byKind)) {
		k := byKind[kind]
		slices.Sort(k.IDs)
		k.Groups = []SwitchGroup{}
		if kind == "worker" {
			k.Groups = groupsOf(groups)
		}
		out = append(out, *k)
	}
	return out
}
