package finding

import (
	"cmp"
	"maps"
	"slices"
)

// Judged is what a switch is worked out from: one report by the bundles of both sides, with every finding listed, and
// what a report does not hold.
type Judged struct {
	Report     *Report
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
	at       *Site
	bundles  [2][]string
	findings [2]map[string][]*Finding // by topic
	duties   map[[2]string]*Duty
	open     [2]map[string][]*Unmeasured // by worker
}

func newSwitcher(j *Judged, at *Site) *switcher {
	s := &switcher{Judged: j, at: at, bundles: [2][]string{j.From[at.ID], j.To[at.ID]}, duties: map[[2]string]*Duty{}}
	for i := range s.findings {
		s.findings[i], s.open[i] = map[string][]*Finding{}, map[string][]*Unmeasured{}
	}
	for i := range j.Report.Findings {
		f := &j.Report.Findings[i]
		for k := range s.bundles {
			if f.Site == at.ID && slices.Contains(s.bundles[k], f.Bundle) {
				s.findings[k][f.Topic] = append(s.findings[k][f.Topic], f)
			}
		}
	}
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

func (s *switcher) site() SwitchSite {
	out := SwitchSite{ID: s.at.ID, Name: s.at.Name, Workers: s.at.Workers, From: s.bundles[oldSide], To: s.bundles[newSide], Totals: s.numbers(""),
		Topics: []SwitchTopic{}, Exposure: s.exposure(), Acts: s.acts(), Needs: s.needs()}
	for _, topic := range Topics {
		if len(s.findings[oldSide][topic])+len(s.findings[newSide][topic]) > 0 {
			out.Topics = append(out.Topics, s.topic(topic))
		}
	}
	return out
}

// numbers counts the findings under a topic, or under all.
func (s *switcher) numbers(topic string) SwitchNumbers {
	count := func(k side) map[Status]int {
		out := map[Status]int{}
		for t, list := range s.findings[k] {
			for _, f := range list {
				if topic == "" || topic == t {
					out[f.Status]++
				}
			}
		}
		return out
	}
	return SwitchNumbers{From: count(oldSide), To: count(newSide)}
}

func (s *switcher) topic(topic string) SwitchTopic {
	out := SwitchTopic{Topic: topic, Numbers: s.numbers(topic), FromDuties: s.dutiesOf(oldSide, topic), ToDuties: s.dutiesOf(newSide, topic),
		FromHas: s.has(oldSide, topic), ToHas: s.has(newSide, topic), Values: s.values(topic)}
	out.Moves, out.Same = s.moves(topic)
	return out
}

// has counts the duties that the bundles of a side have under a topic.
func (s *switcher) has(k side, topic string) int {
	n := 0
	for i := range s.Report.Duties {
		if d := &s.Report.Duties[i]; d.Topic == topic && slices.Contains(s.bundles[k], d.Bundle) {
			n++
		}
	}
	return n
}

// dutiesOf lists the duties of a side with findings under a topic.
func (s *switcher) dutiesOf(k side, topic string) []SwitchDuty {
	byID := map[[2]string]*SwitchDuty{}
	for _, f := range s.findings[k][topic] {
		key := [2]string{f.Bundle, f.Duty}
		if byID[key] == nil {
			byID[key] = &SwitchDuty{Bundle: f.Bundle, Duty: f.Duty, Cite: f.Cite, Evidence: []string{}, Numbers: map[Status]int{}}
			if d := s.duties[key]; d != nil {
				byID[key].Title, byID[key].Cite, byID[key].Evidence = d.Title, d.Cite, append([]string{}, d.Evidence...)
			}
		}
		byID[key].Numbers[f.Status]++
	}
	out := []SwitchDuty{}
	for _, key := range slices.SortedFunc(maps.Keys(byID), comparePairs) {
		out = append(out, *byID[key])
	}
	return out
}

func comparePairs(a, b [2]string) int {
	return cmp.Or(cmp.Compare(a[0], b[0]), cmp.Compare(a[1], b[1]))
}

// values lists the parameters that decide findings under a topic, as they are in force on the as-of day.
func (s *switcher) values(topic string) []SwitchValue {
	byName := map[string]*SwitchValue{}
	for k := range s.findings {
		seen := map[[2]string]bool{}
		for _, f := range s.findings[k][topic] {
			for name, fact := range f.Facts {
				if _, ok := AsParameter(fact); ok {
					seen[[2]string{f.Bundle, name}] = true
				}
			}
		}
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
