package finding

import (
	"maps"
	"slices"
)

// Tally gathers how the subjects of a site stand under one bundle, without keeping its findings: by topic the most
// urgent status of each and the duties that say so, and what is lacking.
type Tally struct {
	duties  []*dutyTally   // in the order in which they were met
	dutyAt  map[string]int // by id
	sets    [][]uint16     // sets of duties, each once
	setAt   map[string]uint32
	stands  map[Subject]*[topicNumber]spot
	values  map[string]map[string]bool // parameters that decide, by topic
	lacking map[lack]*lacking
	undone  map[string]map[Subject]bool // subjects by duty that no record shows to be done
}

// topicNumber is the number of topics.
const topicNumber = 12

// dutyTally counts the findings of a duty.
type dutyTally struct {
	id, topic string
	numbers   map[Status]int
}

// spot is how a subject stands under a topic. Without a finding it has no set of duties.
type spot struct {
	urgency uint8
	set     uint32 // place in sets, from 1
}

// lack is a thing that findings lack. Whether it is asked who belongs in the program is told apart, since that is
// decided by exposure alone.
type lack struct {
	words     string
	enrolment bool
}

// lacking is what the findings that lack a thing are about.
type lacking struct {
	duties   map[string]bool
	subjects map[Subject]bool
}

// NewTally makes an empty gathering.
func NewTally() *Tally {
	return &Tally{dutyAt: map[string]int{}, setAt: map[string]uint32{}, stands: map[Subject]*[topicNumber]spot{}, values: map[string]map[string]bool{},
		lacking: map[lack]*lacking{}, undone: map[string]map[Subject]bool{}}
}

// Add takes findings of the site and bundle. The outcome does not depend on their order.
func (s *Tally) Add(list []Finding) {
	for i := range list {
		f := &list[i]
		duty := s.duty(f)
		s.duties[duty].numbers[f.Status]++
		s.stand(f, duty)
		for name, fact := range f.Facts {
			if _, ok := AsParameter(fact); ok {
				put(s.values, f.Topic, name)
			}
		}
		if f.Undone {
			put(s.undone, f.Duty, f.Subject)
		}
		if f.Status == Unproven {
			s.lack(f)
		}
	}
}

// put adds a member to one of several sets.
func put[K, V comparable](sets map[K]map[V]bool, key K, member V) {
	if sets[key] == nil {
		sets[key] = map[V]bool{}
	}
	sets[key][member] = true
}

// duty gives the place of a finding's duty.
func (s *Tally) duty(f *Finding) int {
	i, ok := s.dutyAt[f.Duty]
	if !ok {
		i = len(s.duties)
		s.dutyAt[f.Duty] = i
		s.duties = append(s.duties, &dutyTally{f.Duty, f.Topic, map[Status]int{}})
	}
	return i
}

// stand takes a finding into how its subject stands under the topic.
func (s *Tally) stand(f *Finding, duty int) {
	topic := slices.Index(Topics, f.Topic)
	if topic < 0 {
		return
	}
	at := s.stands[f.Subject]
	if at == nil {
		at = &[topicNumber]spot{}
		s.stands[f.Subject] = at
	}
	now, urgency := &at[topic], uint8(f.Status.Urgency())
	switch {
	case now.set == 0 || urgency < now.urgency:
		*now = spot{urgency, s.set([]uint16{uint16(duty)})}
	case urgency == now.urgency && !slices.Contains(s.sets[now.set-1], uint16(duty)):
		now.set = s.set(append(slices.Clone(s.sets[now.set-1]), uint16(duty)))
	}
}

// set gives the place, from 1, of a set of duties.
func (s *Tally) set(duties []uint16) uint32 {
	slices.Sort(duties)
	key := make([]byte, 0, 2*len(duties))
	for _, d := range duties {
		key = append(key, byte(d>>8), byte(d))
	}
	at, ok := s.setAt[string(key)]
	if !ok {
		s.sets = append(s.sets, duties)
		at = uint32(len(s.sets))
		s.setAt[string(key)] = at
	}
	return at
}

// lack notes what an unproven finding lacks.
func (s *Tally) lack(f *Finding) {
	words := f.Missing
	if len(words) == 0 {
		words = []string{""}
	}
	for _, word := range words {
		key := lack{word, f.Topic == "enrolment"}
		if s.lacking[key] == nil {
			s.lacking[key] = &lacking{map[string]bool{}, map[Subject]bool{}}
		}
		s.lacking[key].duties[f.Duty], s.lacking[key].subjects[f.Subject] = true, true
	}
}

// take adds what another lack of the same is about, of the subjects that are wanted.
func (l *lacking) take(other *lacking, wanted func(Subject) bool) {
	for subject := range other.subjects {
		if wanted(subject) {
			l.subjects[subject] = true
			maps.Copy(l.duties, other.duties)
		}
	}
}
