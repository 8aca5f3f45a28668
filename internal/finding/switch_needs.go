package finding

import (
	"cmp"
	"maps"
	"slices"
)

// exposure tells once a group what of its exposure the new law cannot take from the records.
func (s *switcher) exposure() []SwitchExposure {
	type key struct{ bundle, group, channel string }
	type seen struct{ all, now, unknownBefore map[string]bool }
	made, people := map[key]*SwitchExposure{}, map[key]seen{}
	for _, list := range s.open[newSide] {
		for _, u := range list {
			k := key{u.Bundle, u.Group, u.Channel}
			e := made[k]
			if e == nil {
				e = &SwitchExposure{Bundle: u.Bundle, Group: u.Group, Channel: u.Channel, Taken: u.Taken}
				made[k], people[k] = e, seen{map[string]bool{}, map[string]bool{}, map[string]bool{}}
			}
			e.Levels, e.Reasons, e.Enrols = append(e.Levels, u.Levels...), append(e.Reasons, u.Reasons...), e.Enrols || u.Enrols
			people[k].all[u.Worker] = true
			if u.Now {
				people[k].now[u.Worker] = true
			}
			if u.Other {
				people[k].unknownBefore[u.Worker] = true
			}
		}
	}
	out := []SwitchExposure{}
	for k, e := range made {
		e.Workers, e.Now, e.Before = len(people[k].all), len(people[k].now), len(people[k].unknownBefore)
		e.Levels, e.Reasons = distinct(e.Levels), distinct(e.Reasons)
		out = append(out, *e)
	}
	slices.SortFunc(out, func(a, b SwitchExposure) int {
		return cmp.Or(cmp.Compare(a.Group, b.Group), cmp.Compare(a.Bundle, b.Bundle), cmp.Compare(a.Channel, b.Channel))
	})
	return out
}

// distinct sorts words and leaves out repeats.
func distinct(list []string) []string {
	slices.Sort(list)
	return append([]string{}, slices.Compact(list)...)
}

// added says whether a finding is one of the new side alone.
func (s *switcher) added(f *Finding) bool { return !slices.Contains(s.bundles[oldSide], f.Bundle) }

// undone gives the subjects for whom no record of a side says that a duty was done, by bundle and duty.
func (s *switcher) undone(k side) map[[2]string]map[Subject]bool {
	out := map[[2]string]map[Subject]bool{}
	for _, list := range s.findings[k] {
		for _, f := range list {
			if !f.Undone {
				continue
			}
			key := [2]string{f.Bundle, f.Duty}
			if out[key] == nil {
				out[key] = map[Subject]bool{}
			}
			out[key][f.Subject] = true
		}
	}
	return out
}

// acts lists the duties of the new side that no record shows to be done, those that are news first.
func (s *switcher) acts() []SwitchAct {
	before := map[string]map[Subject]bool{} // by duty, whatever the bundle
	for key, who := range s.undone(oldSide) {
		if before[key[1]] == nil {
			before[key[1]] = map[Subject]bool{}
		}
		maps.Copy(before[key[1]], who)
	}
	out := []SwitchAct{}
	for key, who := range s.undone(newSide) {
		a := SwitchAct{Bundle: key[0], Duty: key[1], Evidence: []string{}, Subjects: s.subjects(who)}
		if d := s.duties[key]; d != nil {
			a.Title, a.Cite, a.Evidence = d.Title, d.Cite, append(a.Evidence, d.Evidence...)
		}
		for subject := range who {
			if before[key[1]][subject] {
				a.Before++
			}
		}
		out = append(out, a)
	}
	slices.SortFunc(out, func(a, b SwitchAct) int {
		return cmp.Or(cmp.Compare(numberOf(b.Subjects)-b.Before, numberOf(a.Subjects)-a.Before), cmp.Compare(a.Duty, b.Duty), cmp.Compare(a.Bundle, b.Bundle))
	})
	return out
}

// Number counts the subjects of all kinds.
func (a *SwitchAct) Number() int { return numberOf(a.Subjects) }

// kinds lists the kinds of record of which none was read, and which prove duties that are open on the new side.
func (s *switcher) kinds() []SwitchKind {
	type key struct {
		kind string
		duty [2]string
	}
	subjects := map[key]map[Subject]bool{}
	for _, list := range s.findings[newSide] {
		for _, f := range list {
			duty := [2]string{f.Bundle, f.Duty}
			d := s.duties[duty]
			if d == nil || f.Status != Gap && f.Status != Unproven || !s.added(f) {
				continue
			}
			for _, kind := range d.Evidence {
				if s.Records[kind] > 0 {
					continue
				}
				k := key{kind, duty}
				if subjects[k] == nil {
					subjects[k] = map[Subject]bool{}
				}
				subjects[k][f.Subject] = true
			}
		}
	}
	byKind := map[string]map[[2]string]*SwitchDutyNumber{}
	for k, who := range subjects {
		if byKind[k.kind] == nil {
			byKind[k.kind] = map[[2]string]*SwitchDutyNumber{}
		}
		byKind[k.kind][k.duty] = &SwitchDutyNumber{Bundle: k.duty[0], Duty: k.duty[1], Cite: s.duties[k.duty].Cite, Number: len(who)}
	}
	out := []SwitchKind{}
	for _, kind := range slices.Sorted(maps.Keys(byKind)) {
		out = append(out, SwitchKind{kind, dutyNumbers(byKind[kind])})
	}
	return out
}

// lacking is a thing that the findings of a bundle lack, with what they are about.
type lacking struct {
	duties   map[string]bool
	subjects map[Subject]bool
}

// lacks gathers what the unproven findings of a side lack, by bundle and words. What is lacking of a worker's exposure
// is told by group, and not here.
func (s *switcher) lacks(k side) map[[2]string]*lacking {
	out := map[[2]string]*lacking{}
	for _, list := range s.findings[k] {
		for _, f := range list {
			if f.Status != Unproven || s.byGroup(k, f) {
				continue
			}
			words := f.Missing
			if len(words) == 0 {
				words = []string{""}
			}
			for _, word := range words {
				key := [2]string{f.Bundle, word}
				if out[key] == nil {
					out[key] = &lacking{map[string]bool{}, map[Subject]bool{}}
				}
				out[key].duties[f.Duty], out[key].subjects[f.Subject] = true, true
			}
		}
	}
	return out
}

// byGroup says whether a finding is unproven only because the exposure of a worker is not known: who belongs in the
// program is decided by nothing else.
func (s *switcher) byGroup(k side, f *Finding) bool {
	return f.Topic == "enrolment" && f.Subject.Kind == "worker" &&
		slices.ContainsFunc(s.open[k][f.Subject.ID], func(u *Unmeasured) bool { return u.Bundle == f.Bundle && u.Enrols })
}

// needs tells once a thing what else the records lack.
func (s *switcher) needs() []SwitchNeed {
	before := map[string]map[Subject]bool{} // by words, whatever the bundle
	for key, l := range s.lacks(oldSide) {
		if before[key[1]] == nil {
			before[key[1]] = map[Subject]bool{}
		}
		maps.Copy(before[key[1]], l.subjects)
	}
	out := []SwitchNeed{}
	for key, l := range s.lacks(newSide) {
		n := SwitchNeed{Bundle: key[0], Lacks: key[1], Duties: slices.Sorted(maps.Keys(l.duties)), Subjects: s.subjects(l.subjects)}
		for subject := range l.subjects {
			if before[key[1]][subject] {
				n.Before++
			}
		}
		out = append(out, n)
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
