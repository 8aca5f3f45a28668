package judge

import (
	"cmp"
	"slices"
	"sync"

	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// observed gathers the observations of one worker at one site. Where several bundles judge the site, what
// more than one of them observes counts once.
type observed struct {
	file *dossier.File
	list []dossier.Observation
}

func (o *observed) add(f *dossier.File) {
	if o.file == nil {
		o.file, o.list = f, f.Observations
		return
	}
	for _, x := range f.Observations {
		if !slices.Contains(o.list, x) {
			o.list = append(o.list, x)
		}
	}
}

// seen counts the observations of all workers, and keeps them if they are to be listed.
type seen struct {
	mu     sync.Mutex
	counts map[finding.ObservationCount]int // by site and kind, with no number
	list   []finding.Observation
}

func (s *seen) keep(c *check, site string, o *observed) {
	if len(o.list) == 0 || c.wanted != "" {
		return
	}
	var list []finding.Observation
	if c.All {
		list = make([]finding.Observation, len(o.list))
		for i, x := range o.list {
			list[i] = finding.Observation{Site: site, Subject: finding.Subject{Kind: o.file.Kind, ID: o.file.ID},
				Kind: x.Kind, Record: x.Ref, Ear: x.Ear, Text: x.Text}
			if rec, ok := o.file.Refs.Record(x.Ref); ok {
				at := c.origin(x.Ref, rec)
				list[i].File, list[i].Sheet, list[i].Row = at.File, at.Sheet, at.Row
			}
		}
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	if s.counts == nil {
		s.counts = map[finding.ObservationCount]int{}
	}
	for _, x := range o.list {
		s.counts[finding.ObservationCount{Site: site, Kind: x.Kind}]++
	}
	s.list = append(s.list, list...)
}

// report hands the observations over in a fixed order: by site, worker, record, kind and ear.
func (s *seen) report(c *check, r *finding.Report) {
	place := map[string]int{}
	for i, k := range dossier.ObservationKinds() {
		place[k.Kind] = i
		for _, site := range c.sites {
			key := finding.ObservationCount{Site: site.ID, Kind: k.Kind}
			if key.Number = s.counts[key]; key.Number > 0 {
				r.ObservationCounts = append(r.ObservationCounts, key)
			}
		}
	}
	order := map[string]int{}
	for i, site := range c.sites {
		order[site.ID] = i
	}
	slices.SortStableFunc(r.ObservationCounts, func(a, b finding.ObservationCount) int { return cmp.Compare(order[a.Site], order[b.Site]) })
	slices.SortFunc(s.list, func(a, b finding.Observation) int {
		return cmp.Or(cmp.Compare(order[a.Site], order[b.Site]), cmp.Compare(a.Subject.ID, b.Subject.ID), cmp.Compare(a.Record, b.Record),
			cmp.Compare(place[a.Kind], place[b.Kind]), cmp.Compare(a.Ear, b.Ear))
	})
	r.Observations = append(r.Observations, s.list...)
	s.list = nil
}
