package judge

import (
	"cmp"
	"slices"
	"strconv"
	"sync"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/record"
)

// gallery gathers the portraits of subjects with listed findings. Where several bundles judge a site, the
// first of them, as the site names them, that has a finding of the subject gives its portrait.
type gallery struct {
	mu   sync.Mutex
	hung map[portraitKey]placed
}

// placed is a portrait with the place of its bundle among those of the site.
type placed struct {
	finding.Portrait
	place int
}

type portraitKey struct {
	site    string
	subject finding.Subject
}

// wants says whether a portrait is to be drawn of a dossier that has so many listed findings.
func (c *check) wants(f *dossier.File, listed int) bool {
	return c.Portraits && listed > 0 && c.wanted == "" && f != nil
}

// hang takes a portrait, drawn by the bundle that has a place among those of the site. The first in place stays,
// whichever comes first.
func (g *gallery) hang(p finding.Portrait, place int) {
	g.mu.Lock()
	defer g.mu.Unlock()
	key := portraitKey{p.Site, p.Subject}
	if other, ok := g.hung[key]; ok && other.place <= place {
		return
	}
	if g.hung == nil {
		g.hung = map[portraitKey]placed{}
	}
	g.hung[key] = placed{p, place}
}

// sorted gives the portraits by site, kind and id.
func (g *gallery) sorted() []finding.Portrait {
	var list []finding.Portrait
	for _, p := range g.hung {
		list = append(list, p.Portrait)
	}
	slices.SortFunc(list, func(a, b finding.Portrait) int {
		return cmp.Or(cmp.Compare(a.Site, b.Site), cmp.Compare(slices.Index(dossier.Kinds, a.Subject.Kind), slices.Index(dossier.Kinds, b.Subject.Kind)),
			cmp.Compare(a.Subject.ID, b.Subject.ID))
	})
	return list
}

// painter draws one portrait.
type painter struct {
	check *check
	bench *bench
	file  *dossier.File
	p     finding.Portrait
}

func (c *check) paint(b *bench, f *dossier.File) *painter {
	return &painter{check: c, bench: b, file: f, p: finding.Portrait{
		Site: b.site.ID, Subject: finding.Subject{Kind: f.Kind, ID: f.ID}, Facts: []finding.Fact{}, Spells: []finding.Spell{}, Events: []finding.Event{},
	}}
}

// done puts events and stretches in order.
func (a *painter) done() finding.Portrait {
	slices.SortStableFunc(a.p.Events, func(x, y finding.Event) int {
		return cmp.Or(cmp.Compare(x.Date, y.Date), cmp.Compare(x.Record, y.Record))
	})
	slices.SortStableFunc(a.p.Spells, func(x, y finding.Spell) int { return cmp.Or(cmp.Compare(x.Lane, y.Lane), cmp.Compare(x.From, y.From)) })
	return a.p
}

func (a *painter) fact(name, value string) {
	if value != "" {
		a.p.Facts = append(a.p.Facts, finding.Fact{Name: name, Value: value})
	}
}

func (a *painter) number(name string, n int) { a.fact(name, strconv.Itoa(n)) }

func (a *painter) spell(lane, label, grade string, from, to calendar.Date) {
	a.p.Spells = append(a.p.Spells, finding.Spell{Lane: lane, From: from, To: to, Label: label, Grade: grade})
}

// event adds what a record says. Records of days after the as-of day are not seen.
func (a *painter) event(day calendar.Date, lane, label, state string, rec record.Record) {
	if !day.Known() || day > a.check.AsOf {
		return
	}
	ref := a.file.Refs.Of(rec)
	at := a.check.origin(ref, rec)
	a.p.Events = append(a.p.Events, finding.Event{Date: day, Lane: lane, Label: label, State: state, Record: ref, File: at.File, Sheet: at.Sheet, Row: at.Row})
}

// portraitOf draws a subject that is no worker.
func (c *check) portraitOf(b *bench, f *dossier.File) finding.Portrait {
	a := c.paint(b, f)
	switch d := f.Input.(type) {
	case *dossier.Group:
		a.group(d)
	case *dossier.Instrument:
		a.instrument(d)
	case *dossier.Room:
		a.room(d)
	case *dossier.Area:
		a.area(d)
	case *dossier.Tester:
		a.tester(d)
	case *dossier.Site:
		a.site(d)
	}
	return a.done()
}

const (
	plainState = "plain"
	goodState  = "good"
	badState   = "bad"
)

// state gives the state of an answer to the question whether something is in order.
func state(a record.Answer) string {
	return map[record.Answer]string{record.Yes: goodState, record.No: badState}[a] + map[bool]string{true: plainState}[a == record.Unanswered]
}
