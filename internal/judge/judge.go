// Package judge holds dossiers against bundles: it evaluates the rules of every duty for every subject,
// settles the obligations they return by date and clock, and gathers the findings.
package judge

import (
	"context"
	"errors"
	"fmt"
	"runtime"
	"slices"
	"sync"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/record"
)

// Options say what to check and how.
type Options struct {
	Program      *program.Program
	Library      bundle.Library
	AsOf         calendar.Date   // the day on which the program is judged
	Sites        []string        // only these sites; empty for all
	Bundle       string          // judge every chosen site by this bundle instead of its own
	AheadDays    int             // how many days ahead a due finding is listed
	All          bool            // list met and lifted findings and those due later, too
	HealthDetail bool            // show audiometric figures
	Portraits    bool            // draw each subject that has a listed finding
	Accepted     *accept.List    // the gaps that the employer has accepted; nil for none
	Veil         *pseudonym.Veil // puts codes in place of the ids of persons; nil for none
	Parallel     int             // number of subjects judged at a time; 0 for one a processor
	Version      string          // of the tool, for the report

	// keepRecords is set where whole records are to be shown.
	keepRecords bool
	// beside is a bundle by which every chosen site is judged beside the others; set for a switch.
	beside string
	// read, where set, takes the place of reading the program's files.
	read func(ctx context.Context, emit func(record.Record) error) (*intake.Ledger, error)
	// engines are prepared already, by id of the bundle.
	engines map[string]Engine
}

// ErrNoFinding says that no finding has the id asked for.
var ErrNoFinding = errors.New("no finding has this id")

// cautions stand in every report.
var cautions = []string{
	"A bundle is a reading of the law. Local codes govern, and licensed professionals decide.",
	"hearduty reports what the records prove. It does not call a site compliant, and it does not decide work-relatedness, persistence, feasibility or fitness.",
	"Findings about hearing are medical information. Show them only to those who may see them.",
}

// Check reads a program and judges it. The error is a diag.List where inputs cannot be used.
func Check(ctx context.Context, o Options) (*finding.Report, error) {
	c, err := newCheck(ctx, o)
	if err != nil {
		return nil, err
	}
	defer c.store.Close()
	if err := c.judgeAll(ctx); err != nil {
		return nil, err
	}
	return c.report(), nil
}

// check is one check under way.
type check struct {
	Options
	store *dossier.Store

	registers *dossier.Registers
	ledger    *intake.Ledger
	sites     []*program.Site
	benches   map[string][]*bench // by site
	used      []*bundle.Bundle    // in order of id
	wanted    string              // beginning of the id of the one finding to be explained
	foundMu   sync.Mutex
	found     []explained
	seen      seen
	gallery   gallery
	later     later
}

// bench is one site under one bundle.
type bench struct {
	site    *program.Site
	bundle  *bundle.Bundle
	builder *dossier.Builder
	engine  Engine
	usage   *dossier.Usage

	mu       sync.Mutex
	findings []finding.Finding
	taken    []taken
	counts   map[countKey]int
	tally    *finding.Tally // in place of findings, for a switch
	copies   dossier.Copies // kept at the first bench of a site
	ears     ears
	rates    rates
}

type countKey struct {
	topic  string
	status finding.Status
}

func newCheck(ctx context.Context, o Options) (*check, error) {
	c, err := readAll(ctx, o)
	if err != nil {
		return nil, err
	}
	if err := c.prepare(ctx); err != nil {
		c.store.Close()
		return nil, err
	}
	return c, nil
}

// readAll begins a check: it settles what is to be judged and reads the records. No rule is prepared yet.
func readAll(ctx context.Context, o Options) (*check, error) {
	c := &check{Options: o, benches: map[string][]*bench{}}
	if err := c.choose(); err != nil {
		return nil, err
	}
	c.store = dossier.NewStore()
	read := o.read
	if read == nil {
		read = func(ctx context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			return intake.ReadVeiled(ctx, o.Program, o.Veil, emit)
		}
	}
	ledger, err := read(ctx, func(r record.Record) error {
		c.later.look(r, c.AsOf)
		return c.store.Add(r)
	})
	if err == nil {
		c.ledger = ledger
		c.registers, err = c.store.Registers()
	}
	if err != nil {
		c.store.Close()
		return nil, err
	}
	return c, nil
}

// choose finds the sites and bundles to be used.
func (c *check) choose() error {
	var problems diag.List
	for _, id := range c.Sites {
		if _, ok := c.Program.Site(id); !ok {
			problems.Errorf(diag.Position{}, "Name a site of the program file", "the program has no site %q", id)
		}
	}
	if c.Bundle != "" {
		if _, ok := c.Library[c.Bundle]; !ok {
			remedy := "List the bundles with: hearduty bundles"
			if near := diag.Near(c.Bundle, c.Library.IDs()); near != "" {
				remedy = fmt.Sprintf("Did you mean %q?", near)
			}
			problems.Errorf(diag.Position{}, remedy, "there is no bundle %q", c.Bundle)
		}
	}
	var chosen program.Program
	for i := range c.Program.Sites {
		s := &c.Program.Sites[i]
		if len(c.Sites) == 0 || slices.Contains(c.Sites, s.ID) {
			c.sites = append(c.sites, s)
			chosen.Sites = append(chosen.Sites, *s)
		}
	}
	if c.Bundle == "" {
		problems = append(problems, chosen.CheckBundles(c.Library.IDs())...)
	}
	problems = append(problems, c.checkChoices()...)
	return problems.Err()
}

// bundlesOf gives the bundles by which a site is judged.
func (c *check) bundlesOf(s *program.Site) []string {
	ids := s.Bundles
	if c.Bundle != "" {
		ids = []string{c.Bundle}
	}
	if c.beside != "" && !slices.Contains(ids, c.beside) {
		ids = append(slices.Clone(ids), c.beside)
	}
	return ids
}

// prepare makes the engine of every bundle and the builder of every site under each.
func (c *check) prepare(ctx context.Context) error {
	engines := map[string]Engine{}
	grounds := map[string]*dossier.Ground{}
	for _, s := range c.sites {
		for _, id := range c.bundlesOf(s) {
			b := c.Library[id]
			if engines[id] == nil {
				engine := c.engines[id]
				if engine == nil {
					var err error
					if engine, err = NewEngine(ctx, b); err != nil {
						return fmt.Errorf("the bundle %s cannot be prepared: %w", id, err)
					}
				}
				measures := b.Measures
				measures.Hearing.Sums = c.HealthDetail
				engines[id], grounds[id] = engine, dossier.NewGround(c.registers, measures, b, c.AsOf)
				grounds[id].KeepRecords = c.keepRecords
				c.used = append(c.used, b)
			}
			place := dossier.Place{ID: s.ID, Country: s.Country, Region: s.Region}
			c.benches[s.ID] = append(c.benches[s.ID], &bench{
				site: s, bundle: b, builder: grounds[id].Builder(place, b.ChoicesOf(s.Choices)), engine: engines[id],
				usage: dossier.NewUsage(), counts: map[countKey]int{}, tally: finding.NewTally(),
			})
		}
	}
	slices.SortFunc(c.used, func(a, b *bundle.Bundle) int { return compareText(a.ID, b.ID) })
	return nil
}

func compareText(a, b string) int {
	switch {
	case a < b:
		return -1
	case a > b:
		return 1
	}
	return 0
}

// judgeAll judges the workers, shard by shard, and then what depends on all of them.
func (c *check) judgeAll(ctx context.Context) error {
	err := c.parallel(ctx, c.store.Shards(), func(ctx context.Context, i int) error {
		workers, err := c.store.Shard(i)
		if err != nil {
			return err
		}
		for _, w := range workers {
			if err := c.judgeWorker(ctx, w); err != nil {
				return err
			}
		}
		return nil
	})
	if err == nil {
		err = c.observeCopies(ctx)
	}
	if err != nil {
		return err
	}
	var all []*bench
	for _, s := range c.sites {
		all = append(all, c.benches[s.ID]...)
	}
	return c.parallel(ctx, len(all), func(ctx context.Context, i int) error {
		b := all[i]
		files := slices.Concat(b.builder.Groups(b.usage), b.builder.Areas(b.usage), b.builder.Instruments(b.usage), b.builder.Rooms(b.usage), b.builder.Testers(b.usage))
		files = append(files, b.builder.SiteDossier(b.usage))
		for _, f := range files {
			c.observeFile(b, f)
			listed, err := c.judgeFile(ctx, b, f)
			if err != nil {
				return err
			}
			if c.wants(f, listed) {
				c.gallery.hang(c.portraitOf(b, f), slices.Index(c.benches[b.site.ID], b))
			}
		}
		return nil
	})
}

// judgeWorker judges one worker at every site of employment, under every bundle of the site.
func (c *check) judgeWorker(ctx context.Context, w *dossier.WorkerRecords) error {
	for _, site := range sitesOf(w) {
		var observed observed
		for _, b := range c.benches[site] {
			file := b.builder.Worker(w)
			if file == nil {
				continue
			}
			for _, e := range slices.Backward(w.Employments) {
				if e.Site == site {
					file.Refs.Of(e) // the latest has the worker's id alone
				}
			}
			b.usage.Add(b.builder, w, file.Input.(*dossier.Worker))
			observed.add(file)
			listed, err := c.judgeFile(ctx, b, file)
			if err != nil {
				return err
			}
			b.rates.hearing(file.Input.(*dossier.Worker))
			if c.Portraits {
				b.ears.add(file.Input.(*dossier.Worker))
			}
			if c.wants(file, listed) {
				c.gallery.hang(c.portraitOfWorker(b, file, w), slices.Index(c.benches[b.site.ID], b))
			}
		}
		c.observeWorker(site, &observed, w)
	}
	return nil
}

// sitesOf gives the sites of employment.
func sitesOf(w *dossier.WorkerRecords) []string {
	var sites []string
	for _, e := range w.Employments {
		if !slices.Contains(sites, e.Site) {
			sites = append(sites, e.Site)
		}
	}
	return sites
}

// parallel calls do for 0 to n-1, several at a time, and stops at the first error.
func (c *check) parallel(ctx context.Context, n int, do func(context.Context, int) error) error {
	ctx, stop := context.WithCancelCause(ctx)
	defer stop(nil)
	workers := c.Parallel
	if workers <= 0 {
		workers = runtime.GOMAXPROCS(0)
	}
	var wait sync.WaitGroup
	next := make(chan int)
	for range min(workers, n) {
		wait.Go(func() {
			for i := range next {
				if err := do(ctx, i); err != nil {
					stop(err)
				}
			}
		})
	}
	for i := 0; i < n && ctx.Err() == nil; i++ {
		select {
		case next <- i:
		case <-ctx.Done():
		}
	}
	close(next)
	wait.Wait()
	return context.Cause(ctx)
}
