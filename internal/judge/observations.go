package judge

import (
	"cmp"
	"context"
	"slices"
	"sync"

	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/record"
)

// observed gathers the observations of one subject at one site. Where several bundles judge the site, what
// more than one of them observes counts once, and what one of them finds right does not count.
type observed struct {
	file   *dossier.File
	list   []dossier.Observation
	agreed []dossier.Observation
}

func (o *observed) add(f *dossier.File) {
	o.agreed = append(o.agreed, f.Agreed...)
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

// seen counts the observations of all subjects, and keeps them if they are to be listed.
type seen struct {
	mu     sync.Mutex
	counts map[finding.ObservationCount]int // by site and kind, with no number
	list   []finding.Observation
}

// count adds to the number of one kind at a site. The caller holds the lock.
func (s *seen) count(site, kind string, n int) {
	if s.counts == nil {
		s.counts = map[finding.ObservationCount]int{}
	}
	s.counts[finding.ObservationCount{Site: site, Kind: kind}] += n
}

// observeWorker keeps what was observed of a worker at a site under all its bundles.
func (c *check) observeWorker(site string, o *observed, w *dossier.WorkerRecords) {
	if o.file == nil || c.wanted != "" {
		return
	}
	first := c.benches[site][0]
	first.copies.Add(first.builder, w)
	c.seen.keep(c, site, o)
}

// observeFile keeps what was observed of an instrument, a tester or a site. It does not depend on the bundle, so
// that the first one counts.
func (c *check) observeFile(b *bench, f *dossier.File) {
	if b == c.benches[b.site.ID][0] && c.wanted == "" {
		c.seen.keep(c, b.site.ID, &observed{file: f, list: f.Observations})
	}
}

func (s *seen) keep(c *check, site string, o *observed) {
	if len(o.agreed) > 0 {
		o.list = slices.DeleteFunc(o.list, func(x dossier.Observation) bool { return slices.Contains(o.agreed, x) })
	}
	if len(o.list) == 0 {
		return
	}
	var list []finding.Observation
	if c.All {
		list = make([]finding.Observation, len(o.list))
		for i, x := range o.list {
			rec, _ := o.file.Refs.Record(x.Ref)
			list[i] = c.observation(site, finding.Subject{Kind: o.file.Kind, ID: o.file.ID}, x, rec)
		}
	}
	s.mu.Lock()
	defer s.mu.Unlock()
	for _, x := range o.list {
		s.count(site, x.Kind, 1)
	}
	s.list = append(s.list, list...)
}

// observation writes an observation with where its record was read, if there is one.
func (c *check) observation(site string, subject finding.Subject, x dossier.Observation, rec record.Record) finding.Observation {
	out := finding.Observation{Site: site, Subject: subject, Kind: x.Kind, Record: x.Ref, Ear: x.Ear, Text: x.Text}
	if rec != nil {
		at := c.origin(x.Ref, rec)
		out.File, out.Sheet, out.Row = at.File, at.Sheet, at.Row
	}
	return out
}

// observeCopies counts the thresholds that several workers of a site share. If they are to be listed, the
// workers are gone through once more for their tests.
func (c *check) observeCopies(ctx context.Context) error {
	shared := map[string]map[uint64]bool{}
	for _, site := range c.sites {
		if len(c.benches[site.ID]) == 0 {
			continue
		}
		if marks := c.benches[site.ID][0].copies.Shared(); len(marks) > 0 {
			shared[site.ID] = marks
			c.seen.count(site.ID, dossier.CopiesKind, len(marks))
		}
	}
	if len(shared) == 0 || !c.All {
		return nil
	}
	err := c.parallel(ctx, c.store.Shards(), func(_ context.Context, i int) error {
		workers, err := c.store.Shard(i)
		for _, w := range workers {
			for _, site := range sitesOf(w) {
				if shared[site] != nil {
					b := c.benches[site][0]
					b.copies.Collect(b.builder, w, shared[site])
				}
			}
		}
		return err
	})
	for site := range shared {
		for _, group := range c.benches[site][0].copies.Alike() {
			c.seen.list = append(c.seen.list, c.alike(site, group))
		}
	}
	return err
}

// alike writes the observation of tests with the same thresholds.
func (c *check) alike(site string, group dossier.Alike) finding.Observation {
	subject := finding.Subject{Kind: dossier.KindTester, ID: group.Tester}
	if group.Tester == "" {
		subject = finding.Subject{Kind: dossier.KindSite, ID: site}
	}
	out := c.observation(site, subject, group.Observation(), group.Tests[0].Rec)
	for _, t := range group.Tests[1:] {
		out.More = append(out.More, c.origin(t.Ref, t.Rec))
	}
	return out
}

// report hands the observations over in a fixed order: by site, subject, record, kind and ear.
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
		return cmp.Or(cmp.Compare(order[a.Site], order[b.Site]),
			cmp.Compare(slices.Index(dossier.Kinds, a.Subject.Kind), slices.Index(dossier.Kinds, b.Subject.Kind)), cmp.Compare(a.Subject.ID, b.Subject.ID),
			cmp.Compare(a.Record, b.Record), cmp.Compare(place[a.Kind], place[b.Kind]), cmp.Compare(a.Ear, b.Ear))
	})
	r.Observations = append(r.Observations, s.list...)
	s.list = nil
}
