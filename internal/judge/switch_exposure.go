package judge

import (
	"context"
	"slices"
	"sync"

	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// exposures goes through the workers once more for what the records tell of their exposure on each side.
func (c *check) exposures(ctx context.Context, j *finding.Judged) error {
	var mu sync.Mutex
	err := c.parallel(ctx, c.store.Shards(), func(_ context.Context, i int) error {
		workers, err := c.store.Shard(i)
		if err != nil {
			return err
		}
		for _, w := range workers {
			for _, site := range sitesOf(w) {
				group, open := c.unmeasured(site, w, j)
				mu.Lock()
				j.Unmeasured = append(j.Unmeasured, open...)
				if group != "" {
					j.Groups[[2]string{site, w.ID}] = group
				}
				mu.Unlock()
			}
		}
		return nil
	})
	slices.SortFunc(j.Unmeasured, compareUnmeasured)
	return err
}

func compareUnmeasured(a, b finding.Unmeasured) int {
	return slices.Compare([]string{a.Site, a.Worker, a.Bundle, a.Channel, a.Group}, []string{b.Site, b.Worker, b.Bundle, b.Channel, b.Group})
}

// unmeasured gives the worker's group on the as-of day, and where the records do not tell the exposure by the bundles of
// the site.
func (c *check) unmeasured(site string, w *dossier.WorkerRecords, j *finding.Judged) (group string, out []finding.Unmeasured) {
	dossiers := map[string]*dossier.Worker{}
	benches := c.benches[site]
	for _, b := range benches {
		if file := b.builder.Worker(w); file != nil {
			d := file.Input.(*dossier.Worker)
			dossiers[b.bundle.ID] = d
			group = groupOn(d)
		}
	}
	for _, b := range benches {
		if d := dossiers[b.bundle.ID]; d != nil {
			out = append(out, openOf(b, d, site, func(level string, o dossier.Open) bool { return c.toldByOthers(b, dossiers, j, site, level, o) })...)
		}
	}
	return group, out
}

func groupOn(d *dossier.Worker) string {
	for _, e := range d.Exposures {
		if contains(e.From, e.To, d.AsOf) {
			return e.Group
		}
	}
	return ""
}

func contains(from, to, day dossier.Date) bool { return from <= day && (!to.Known() || day < to) }

// openOf lists by group and channel where the exposure of a worker is not known by a bundle.
func openOf(b *bench, d *dossier.Worker, site string, told func(level string, o dossier.Open) bool) []finding.Unmeasured {
	var out []finding.Unmeasured
	m := &b.bundle.Measures.Exposure
	for _, level := range wholeLevels(m) {
		channels, taken := b.channelsOf(level)
		for _, o := range d.ExposureUnknown[level] {
			for _, e := range d.Exposures {
				if !overlap(e, o) {
					continue
				}
				i := slices.IndexFunc(out, func(u finding.Unmeasured) bool { return u.Group == e.Group && u.Channel == channels })
				if i < 0 {
					i = len(out)
					out = append(out, finding.Unmeasured{Site: site, Bundle: b.bundle.ID, Worker: d.ID, Group: e.Group, Channel: channels, Taken: taken, Other: true})
				}
				u := &out[i]
				u.Levels, u.Reasons = append(u.Levels, level), append(u.Reasons, o.Reason)
				u.Enrols = u.Enrols || level == m.Enrols
				now := contains(e.From, e.To, d.AsOf) && contains(o.From, o.To, d.AsOf)
				u.Now, u.EnrolsNow = u.Now || now, u.EnrolsNow || now && level == m.Enrols
				u.Other = u.Other && !told(level, common(e, o))
			}
		}
	}
	return out
}

// overlap says whether an exposure and a stretch that is not known have days in common.
func overlap(e dossier.Exposure, o dossier.Open) bool {
	return (!e.To.Known() || o.From < e.To) && (!o.To.Known() || e.From < o.To)
}

// common gives the days that an exposure and a stretch that is not known have in common.
func common(e dossier.Exposure, o dossier.Open) dossier.Open {
	out := dossier.Open{From: max(e.From, o.From), To: e.To}
	if !out.To.Known() || o.To.Known() && o.To < out.To {
		out.To = o.To
	}
	return out
}

// toldByOthers says whether a bundle of the other side knows on any of the days whether its own level is reached: the
// one of the same name, or else the one that enrols.
func (c *check) toldByOthers(b *bench, dossiers map[string]*dossier.Worker, j *finding.Judged, site, level string, o dossier.Open) bool {
	others := j.To[site]
	if slices.Contains(others, b.bundle.ID) {
		others = j.From[site]
	}
	for _, id := range others {
		d := dossiers[id]
		if d == nil {
			continue
		}
		name := level
		if _, ok := d.ExposureUnknown[name]; !ok || level == b.bundle.Measures.Exposure.Enrols {
			name = c.Library[id].Measures.Exposure.Enrols
		}
		if !covered(d.ExposureUnknown[name], o) {
			return true
		}
	}
	return false
}

// covered says whether stretches, oldest first, cover all days of another.
func covered(list []dossier.Open, o dossier.Open) bool {
	from := o.From
	for _, s := range list {
		if s.From <= from && (!s.To.Known() || s.To > from) {
			if !s.To.Known() {
				return true
			}
			from = s.To
		}
	}
	return o.To.Known() && from >= o.To
}
