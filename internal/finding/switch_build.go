package finding

import (
	"cmp"
	"maps"
	"slices"
)

// Judged is what a switch is worked out from: one report by the bundles of both sides, of which no finding need be
// listed, and what a report does not hold.
type Judged struct {
	Report     *Report
	Tallies    map[[2]string]*Tally // how the subjects stand, by site and bundle
	From, To   map[string][]string  // the bundles of each side, by site
	Levels     []SwitchLevel        // of all bundles
	Unmeasured []Unmeasured         // workers whose exposure is not known, of both sides
	Groups     map[[2]string]string // group on the as-of day, by site and worker
	Records    map[string]int       // number of records read, by kind
	Notes      []string
}

// Unmeasured is a worker in a group on days on which the records do not tell the exposure on a channel of a bundle.
type Unmeasured struct {
	Site, Bundle, Worker, Group string
	Channel, Taken              string   // the channel by name and in words
	Levels                      []string // those of which it is not known whether they are reached
	Reasons                     []string
	Enrols, Now, EnrolsNow      bool // whether the level that enrols is among them; whether the as-of day is among the days; whether both at once
	Other                       bool // whether no bundle of the other side tells it either
}

// SwitchOf says what changes from the one side to the other.
func SwitchOf(j *Judged) *Switch {
	r := j.Report
	out := &Switch{Tool: r.Tool, Program: r.Program, AsOf: r.AsOf, Cautions: r.Cautions, Notes: append([]string{}, j.Notes...),
		Bundles: r.Bundles, Levels: append([]SwitchLevel{}, j.Levels...), Sites: []SwitchSite{}}
	for i := range r.Sites {
		out.Sites = append(out.Sites, newSwitcher(j, &r.Sites[i]).site())
	}
	return out
}

// side is a place in a pair: the old side or the new one.
type side int

const (
	oldSide side = iota
	newSide
)

// switcher works out what changes at one site.
type switcher struct {
	*Judged
	at      *Site
	bundles [2][]string
	duties  map[[2]string]*Duty
	open    [2]map[string][]*Unmeasured // by worker
}

func newSwitcher(j *Judged, at *Site) *switcher {
	s := &switcher{Judged: j, at: at, bundles: [2][]string{j.From[at.ID], j.To[at.ID]}, duties: map[[2]string]*Duty{}, open: [2]map[string][]*Unmeasured{{}, {}}}
	for i := range j.Report.Duties {
		d := &j.Report.Duties[i]
		s.duties[[2]string{d.Bundle, d.ID}] = d
	}
	for i := range j.Unmeasured {
		u := &j.Unmeasured[i]
		for k := range s.bundles {
			if u.Site == at.ID && slices.Contains(s.bundles[k], u.Bundle) {
				s.open[k][u.Worker] = append(s.open[k][u.Worker], u)
			}
		}
	}
	return s
}

// each calls do with the standings under each bundle of a side.
func (s *switcher) each(k side, do func(bundle string, of *Tally)) {
	for _, bundle := range s.bundles[k] {
		if of := s.Tallies[[2]string{s.at.ID, bundle}]; of != nil {
			do(bundle, of)
		}
	}
}

func (s *switcher) site() SwitchSite {
	out := SwitchSite{ID: s.at.ID, Name: s.at.Name, Workers: s.at.Workers, From: s.bundles[oldSide], To: s.bundles[newSide], Totals: s.numbers(""),
		Topics: []SwitchTopic{}, Exposure: s.exposure(), Acts: s.acts(), Needs: s.needs()}
	for _, topic := range Topics {
		if t := s.topic(topic); len(t.FromDuties)+len(t.ToDuties) > 0 {
			out.Topics = append(out.Topics, t)
		}
	}
	return out
}

// numbers counts the findings under a topic, or under all.
func (s *switcher) numbers(topic string) SwitchNumbers {
	count := func(k side) map[Status]int {
		out := map[Status]int{}
		s.each(k, func(_ string, of *Tally) {
			for _, d := range of.duties {
				for status, n := range d.numbers {
					if topic == "" || topic == d.topic {
						out[status] += n
					}
				}
			}
		})
		return out
	}
	return SwitchNumbers{From: count(oldSide), To: count(newSide)}
}

func (s *switcher) topic(topic string) SwitchTopic {
	out := SwitchTopic{Topic: topic, Numbers: s.numbers(topic), FromDuties: s.dutiesOf(oldSide, topic), ToDuties: s.dutiesOf(newSide, topic),
		FromHas: s.has(oldSide, topic, ""), ToHas: s.has(newSide, topic, ""), Values: s.values(topic)}
	out.Moves, out.Same = s.moves(topic)
	return out
}

// has counts the duties that the bundles of a side have under a topic, of one kind of subject or of all.
func (s *switcher) has(k side, topic, kind string) int {
	n := 0
	for i := range s.Report.Duties {
		if d := &s.Report.Duties[i]; d.Topic == topic && (kind == "" || d.Subject == kind) && slices.Contains(s.bundles[k], d.Bundle) {
			n++
		}
	}
	return n
}

// dutiesOf lists the duties of a side with findings under a topic.
func (s *switcher) dutiesOf(k side, topic string) []SwitchDuty {
	out := []SwitchDuty{}
	s.each(k, func(bundle string, of *Tally) {
		for _, t := range of.duties {
			if t.topic != topic {
				continue
			}
			duty := SwitchDuty{Bundle: bundle, Duty: t.id, Evidence: []string{}, Numbers: t.numbers}
			if d := s.duties[[2]string{bundle, t.id}]; d != nil {
				duty.Title, duty.Cite, duty.Evidence = d.Title, d.Cite, append(duty.Evidence, d.Evidence...)
			}
			out = append(out, duty)
		}
	})
	slices.SortFunc(out, func(a, b SwitchDuty) int {
		return comparePairs([2]string{a.Bundle, a.Duty}, [2]string{b.Bundle, b.Duty})
	})
	return out
}

func comparePairs(a, b [2]string) int {
	return cmp.Or(cmp.Compare(a[0], b[0]), cmp.Compare(a[1], b[1]))
}

// values lists the parameters that decide findings under a topic, as they are in force on the as-of day.
func (s *switcher) values(topic string) []SwitchValue {
	byName := map[string]*SwitchValue{}
	for k := range s.bundles {
		seen := map[[2]string]bool{}
		s.each(side(k), func(bundle string, of *Tally) {
			for name := range of.values[topic] {
				seen[[2]string{bundle, name}] = true
			}
		})
		for i := range s.Report.Parameters {
			p := &s.Report.Parameters[i]
			if !p.InForce || !seen[[2]string{p.Bundle, p.Name}] {
				continue
			}
			v := byName[p.Name]
			if v == nil {
				v = &SwitchValue{Name: p.Name, From: []Parameter{}, To: []Parameter{}}
				byName[p.Name] = v
			}
			if side(k) == oldSide {
				v.From = append(v.From, *p)
			} else {
				v.To = append(v.To, *p)
			}
		}
	}
	out := []SwitchValue{}
	for _, name := range slices.Sorted(maps.Keys(byName)) {
		out = append(out, *byName[name])
	}
	return out
}
