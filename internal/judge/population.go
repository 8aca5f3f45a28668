package judge

import (
	"cmp"
	"context"
	"slices"
	"sync"

	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// Band is a band of noise exposure, as the levels of a bundle divide it.
type Band string

// The bands, in the order in which they are shown.
const (
	OverLimit   Band = "limit"   // over the limit level of the law
	AtAction    Band = "action"  // at the level that enrols, or above, and not over the limit
	BelowAction Band = "below"   // below the level that enrols
	UnknownBand Band = "unknown" // the records do not tell
)

// Bands lists all bands in the order in which they are shown.
var Bands = []Band{OverLimit, AtAction, BelowAction, UnknownBand}

// Member is a worker who is employed at a site on the as-of day.
type Member struct {
	Site     string
	Worker   string // id
	Band     Band
	Enrolled bool             // whether the exposure puts the worker into the program
	Record   finding.Evidence // where the latest stretch of employment at the site was read
}

// People are the workers whose files an audit can pull.
type People struct {
	Members []Member       // by site in the order of the program file, then by id
	Sites   []finding.Site // with the bundle by whose levels each was divided
	Rejects int            // rejected rows, of which any can hide a worker
}

// Population reads a program and gives the workers who are employed on the as-of day, with the band of their
// exposure by the levels of the first bundle of their site. No rule is evaluated. The error is a diag.List where
// inputs cannot be used.
func Population(ctx context.Context, o Options) (*People, error) {
	c, err := readAll(ctx, o)
	if err != nil {
		return nil, err
	}
	defer c.store.Close()
	out := &People{}
	builders := map[string]*dossier.Builder{}
	grounds := map[string]*dossier.Ground{}
	for _, s := range c.sites {
		id := c.bundlesOf(s)[0]
		b := c.Library[id]
		if grounds[id] == nil {
			grounds[id] = dossier.NewGround(c.registers, b.Measures, b, c.AsOf)
		}
		builders[s.ID] = grounds[id].Builder(dossier.Place{ID: s.ID, Country: s.Country, Region: s.Region}, b.ChoicesOf(s.Choices))
	}
	var mu sync.Mutex
	err = c.parallel(ctx, c.store.Shards(), func(_ context.Context, i int) error {
		workers, err := c.store.Shard(i)
		if err != nil {
			return err
		}
		for _, w := range workers {
			for _, site := range sitesOf(w) {
				if m, ok := c.member(builders[site], w); ok {
					mu.Lock()
					out.Members = append(out.Members, m)
					mu.Unlock()
				}
			}
		}
		return nil
	})
	if err != nil {
		return nil, err
	}
	c.sortMembers(out)
	out.Rejects = c.ledger.Total().Rejected
	return out, nil
}

// member gives a worker who is employed at the builder's site on the as-of day.
func (c *check) member(b *dossier.Builder, w *dossier.WorkerRecords) (Member, bool) {
	if b == nil { // the site is not chosen
		return Member{}, false
	}
	file := b.Worker(w)
	if file == nil {
		return Member{}, false
	}
	d := file.Input.(*dossier.Worker)
	if !now(d.Employed) {
		return Member{}, false
	}
	m := Member{Site: b.Place.ID, Worker: w.ID, Band: bandOf(d, b.Measures.Exposure.Enrols)}
	for _, e := range d.Enrolled {
		m.Enrolled = m.Enrolled || e.Current
	}
	for _, e := range w.Employments {
		if e.Site == b.Place.ID && e.HiredOn <= c.AsOf {
			m.Record = c.origin(file.Refs.Of(e), e)
		}
	}
	return m, true
}

func now(spells []dossier.Spell) bool {
	return slices.ContainsFunc(spells, func(s dossier.Spell) bool { return s.Current })
}

// bandOf gives the band on the as-of day. What may be over the limit but is surely at the level that enrols is in the
// band of that level.
func bandOf(d *dossier.Worker, enrols string) Band {
	switch {
	case now(d.Exposed["limit"]):
		return OverLimit
	case now(d.Exposed[enrols]):
		return AtAction
	case slices.ContainsFunc(d.ExposureUnknown[enrols], func(o dossier.Open) bool {
		return o.From <= d.AsOf && (!o.To.Known() || d.AsOf < o.To)
	}):
		return UnknownBand
	}
	return BelowAction
}

// sortMembers puts the members in order and counts them by site.
func (c *check) sortMembers(p *People) {
	place := func(site string) int {
		return slices.IndexFunc(c.sites, func(s *program.Site) bool { return s.ID == site })
	}
	slices.SortFunc(p.Members, func(a, b Member) int {
		return cmp.Or(cmp.Compare(place(a.Site), place(b.Site)), cmp.Compare(a.Worker, b.Worker))
	})
	for _, s := range c.sites {
		n := 0
		for _, m := range p.Members {
			if m.Site == s.ID {
				n++
			}
		}
		p.Sites = append(p.Sites, finding.Site{ID: s.ID, Name: s.Name, Bundles: c.bundlesOf(s)[:1], Workers: n})
	}
}
