package finding

import (
	"cmp"
	"maps"
	"slices"
)

// stand is how a subject stands under a topic on one side, and by which duties, each with its bundle.
type stand struct {
	word   string
	duties [][2]string
}

// stands gives how each subject stands under a topic on a side.
func (s *switcher) stands(k side, topic string) map[Subject]stand {
	out, i := map[Subject]stand{}, slices.Index(Topics, topic)
	s.each(k, func(bundle string, of *Tally) {
		named := make([][][2]string, len(of.sets))
		for n, set := range of.sets {
			for _, d := range set {
				named[n] = append(named[n], [2]string{bundle, of.duties[d].id})
			}
		}
		for subject, at := range of.stands {
			if at[i].set == 0 {
				continue
			}
			word, duties := string(Statuses[at[i].urgency]), named[at[i].set-1]
			now, ok := out[subject]
			switch {
			case !ok || urgencyOf(word) < urgencyOf(now.word):
				out[subject] = stand{word, duties}
			case word == now.word:
				out[subject] = stand{word, slices.Concat(now.duties, duties)}
			}
		}
	})
	return out
}

func urgencyOf(standing string) int { return slices.Index(Standings, standing) }

// absent gives how a subject stands on a side that has no finding about it. Where the side asks something of workers
// under the topic, it may be that nothing is owed only because the exposure is not known.
func (s *switcher) absent(k side, topic string, subject Subject) stand {
	if subject.Kind == "worker" && s.has(k, topic, "worker") > 0 && slices.ContainsFunc(s.open[k][subject.ID], func(u *Unmeasured) bool { return u.EnrolsNow }) {
		return stand{word: NotKnown}
	}
	return stand{word: NotOwed}
}

// moves gathers the subjects that stand otherwise on the new side, and counts the others.
func (s *switcher) moves(topic string) (list []SwitchMove, same int) {
	before, after := s.stands(oldSide, topic), s.stands(newSide, topic)
	type key struct{ kind, before, after string }
	made := map[key]*mover{}
	for subject := range union(before, after) {
		o, ok := before[subject]
		if !ok {
			o = s.absent(oldSide, topic, subject)
		}
		n, ok := after[subject]
		if !ok {
			n = s.absent(newSide, topic, subject)
		}
		if o.word == n.word {
			same++
			continue
		}
		k := key{subject.Kind, o.word, n.word}
		if made[k] == nil {
			made[k] = &mover{groups: map[string]int{}, duties: [2]map[[2]string]*SwitchDutyNumber{{}, {}}}
		}
		made[k].take(s, subject, o, n)
	}
	list = []SwitchMove{}
	for k, m := range made {
		list = append(list, m.move(k.kind, k.before, k.after))
	}
	slices.SortFunc(list, func(a, b SwitchMove) int {
		return cmp.Or(cmp.Compare(slices.Index(changeOrder, a.Change), slices.Index(changeOrder, b.Change)), cmp.Compare(urgencyOf(a.After), urgencyOf(b.After)),
			cmp.Compare(urgencyOf(a.Before), urgencyOf(b.Before)), cmp.Compare(a.Kind, b.Kind))
	})
	return list, same
}

var changeOrder = []string{Appears, Changes, Vanishes}

func union[V any](a, b map[Subject]V) map[Subject]bool {
	out := map[Subject]bool{}
	for k := range a {
		out[k] = true
	}
	for k := range b {
		out[k] = true
	}
	return out
}

// mover gathers one move.
type mover struct {
	number   int
	subjects []string
	groups   map[string]int
	duties   [2]map[[2]string]*SwitchDutyNumber
}

func (m *mover) take(s *switcher, subject Subject, o, n stand) {
	m.number++
	for k, st := range []stand{o, n} {
		for _, duty := range st.duties {
			d := m.duties[k][duty]
			if d == nil {
				d = &SwitchDutyNumber{Bundle: duty[0], Duty: duty[1]}
				if x := s.duties[duty]; x != nil {
					d.Cite = x.Cite
				}
				m.duties[k][duty] = d
			}
			d.Number++
		}
	}
	open := s.open[newSide][subject.ID]
	if subject.Kind != "worker" || len(open) == 0 || n.word != string(Unproven) && n.word != NotKnown {
		m.subjects = append(m.subjects, subject.ID)
		return
	}
	m.groups[foremost(open).Group]++
}

// foremost gives the group that matters most: the one of the as-of day, and of the level that enrols.
func foremost(open []*Unmeasured) *Unmeasured {
	weight := func(u *Unmeasured) int {
		w := 0
		if u.Now {
			w += 2
		}
		if u.Enrols {
			w++
		}
		return w
	}
	return slices.MinFunc(open, func(a, b *Unmeasured) int {
		return cmp.Or(weight(b)-weight(a), cmp.Compare(a.Group, b.Group))
	})
}

func (m *mover) move(kind, before, after string) SwitchMove {
	change := Changes
	switch {
	case before == NotOwed:
		change = Appears
	case after == NotOwed:
		change = Vanishes
	}
	slices.Sort(m.subjects)
	return SwitchMove{Change: change, Kind: kind, Before: before, After: after, Number: m.number, Subjects: append([]string{}, m.subjects...), Groups: groupsOf(m.groups),
		FromDuties: dutyNumbers(m.duties[oldSide]), ToDuties: dutyNumbers(m.duties[newSide])}
}

// groupsOf lists groups with their workers in order of id.
func groupsOf(numbers map[string]int) []SwitchGroup {
	out := []SwitchGroup{}
	for _, group := range slices.Sorted(maps.Keys(numbers)) {
		out = append(out, SwitchGroup{group, numbers[group]})
	}
	return out
}

func dutyNumbers(byID map[[2]string]*SwitchDutyNumber) []SwitchDutyNumber {
	out := []SwitchDutyNumber{}
	for _, key := range slices.SortedFunc(maps.Keys(byID), comparePairs) {
		out = append(out, *byID[key])
	}
	return out
}
