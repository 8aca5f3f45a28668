package dossier

import (
	"cmp"
	"maps"
	"slices"
	"sync"

	"hearduty/internal/record"
)

// Usage gathers, worker by worker, what the dossiers of instruments, rooms, testers, groups and the site
// need to know of workers' records. Add may be called by several goroutines; the outcome does not depend
// on their order.
type Usage struct {
	mu          sync.Mutex
	Workers     int // employed on the as-of day
	EnrolledNow int
	Enrolled    int // ever
	levelsNow   map[string]bool
	audiometers map[string]*used
	rooms       map[string]*used
	testers     map[string]*used
	members     map[string]int // by group
	holders     map[string]int // by group
	loose       map[string][]*record.Measurement
	logs        map[int]*logYear
	missing     map[string]Dangling
	missingRec  map[string]record.Record
}

// used is the use of one instrument, room or tester.
type used struct {
	tests, workers int
	days           map[Date]*useDay
}

// useDay is one day of use. Of its tests the first by id is remembered: all of its record where the builder
// keeps records, else its id and origin.
type useDay struct {
	tests, workers int
	id             string
	at             record.Origin
	rec            *record.Audiogram
}

// take remembers a test of the day if its id comes first.
func (d *useDay) take(a *record.Audiogram, keep bool) {
	d.tests++
	if d.id != "" && a.AudiogramID >= d.id {
		return
	}
	d.id, d.at = a.AudiogramID, a.Origin
	if keep {
		d.rec = a
	}
}

type logYear struct {
	entries int
	latest  *record.FollowUp
}

// NewUsage makes an empty gathering.
func NewUsage() *Usage {
	return &Usage{
		audiometers: map[string]*used{}, rooms: map[string]*used{}, testers: map[string]*used{},
		members: map[string]int{}, holders: map[string]int{}, loose: map[string][]*record.Measurement{},
		levelsNow: map[string]bool{}, logs: map[int]*logYear{}, missing: map[string]Dangling{}, missingRec: map[string]record.Record{},
	}
}

// Add takes the records of one worker whose dossier was made at the builder's site.
func (u *Usage) Add(b *Builder, w *WorkerRecords, d *Worker) {
	w = w.until(b.AsOf)
	u.mu.Lock()
	defer u.mu.Unlock()
	employed := false
	for _, s := range d.Employed {
		employed = employed || s.Current
	}
	if employed {
		u.Workers++
	}
	if len(d.Enrolled) > 0 {
		u.Enrolled++
	}
	for _, s := range d.Enrolled {
		if s.Current {
			u.EnrolledNow++
		}
	}
	for level, spells := range d.Exposed {
		if !u.levelsNow[level] && slices.ContainsFunc(spells, func(s Spell) bool { return s.Current }) {
			u.levelsNow[level] = true
		}
	}
	u.addTests(b, w)
	u.addGroups(b, w, d, employed)
	u.addLog(b, w)
	u.addMissing(b, w)
}

// here says whether a day of a worker counts at the builder's site: the worker was employed there, or at
// no other site.
func (b *Builder) here(w *WorkerRecords, day Date) bool {
	elsewhere := false
	for _, e := range w.Employments {
		if employment(e).Contains(day) {
			if e.Site == b.Place.ID {
				return true
			}
			elsewhere = true
		}
	}
	return !elsewhere
}

func (u *Usage) addTests(b *Builder, w *WorkerRecords) {
	seen := map[*used]map[Date]bool{}
	for _, a := range w.Audiograms {
		if !b.here(w, a.Date) {
			continue
		}
		for _, place := range []struct {
			table map[string]*used
			id    string
		}{{u.audiometers, a.AudiometerID}, {u.rooms, a.RoomID}, {u.testers, a.TesterID}} {
			use := place.table[place.id]
			if use == nil {
				use = &used{days: map[Date]*useDay{}}
				place.table[place.id] = use
			}
			day := use.days[a.Date]
			if day == nil {
				day = &useDay{}
				use.days[a.Date] = day
			}
			use.tests++
			day.take(a, b.KeepRecords)
			if seen[use] == nil {
				seen[use] = map[Date]bool{}
				use.workers++
			}
			if !seen[use][a.Date] {
				seen[use][a.Date] = true
				day.workers++
			}
		}
	}
}

func (u *Usage) addGroups(b *Builder, w *WorkerRecords, d *Worker, employed bool) {
	groups := w.memberships()
	for _, g := range groups {
		if employed && g.Contains(b.AsOf) {
			u.members[g.group]++
			if d.Protection != nil {
				u.holders[g.group]++
			}
		}
	}
	for _, m := range w.Measurements {
		if !b.here(w, m.Date) {
			continue
		}
		group := ""
		for _, g := range groups {
			if reg := b.Registers.Groups[g.group]; g.Contains(m.Date) && (reg == nil || reg.Site == b.Place.ID) {
				group = g.group
			}
		}
		u.loose[group] = append(u.loose[group], m)
	}
}

func (u *Usage) addLog(b *Builder, w *WorkerRecords) {
	for _, f := range w.FollowUps {
		if f.Type != "log_entry" || !b.here(w, f.Date) {
			continue
		}
		year := u.logs[f.Date.Year()]
		if year == nil {
			year = &logYear{latest: f}
			u.logs[f.Date.Year()] = year
		}
		year.entries++
		if cmp.Or(cmp.Compare(f.Date, year.latest.Date), -compareOrigin(f, year.latest)) > 0 {
			year.latest = f
		}
	}
}

func (u *Usage) addMissing(b *Builder, w *WorkerRecords) {
	for _, n := range w.Notices {
		id := n.MeasurementID
		first, ok := b.Registers.firstMeasured[id]
		if id == "" || ok && first <= b.AsOf || !b.here(w, n.Date) ||
			slices.ContainsFunc(w.Measurements, func(m *record.Measurement) bool { return m.MeasurementID == id }) {
			continue
		}
		before, ok := u.missing[id]
		if !ok || cmp.Or(cmp.Compare(n.Date, before.Date), -compareOrigin(n, u.missingRec[id])) > 0 {
			u.missing[id] = Dangling{Link: Link{Date: n.Date}, ID: id}
			u.missingRec[id] = n
		}
	}
}

// sortedDays lists the days of use in order.
func (u *used) sortedDays() []Date {
	return slices.Sorted(maps.Keys(u.days))
}

// link points to the first test of a day.
func (u *used) link(refs Refs, day Date) Link {
	d := u.days[day]
	if _, ok := refs.Record("audiogram/" + d.id); ok {
		return Link{Date: day, Ref: "audiogram/" + d.id}
	}
	rec := d.rec
	if rec == nil {
		rec = &record.Audiogram{Meta: record.Meta{Origin: d.at}, AudiogramID: d.id, Date: day}
	}
	return Link{Date: day, Ref: refs.Of(rec)}
}

// Tally counts what happened on a day: hearing tests, and workers tested.
type Tally struct {
	Date           Date
	Tests, Workers int
}

func (u *used) tallies() []Tally {
	var out []Tally
	for _, day := range u.sortedDays() {
		out = append(out, Tally{day, u.days[day].tests, u.days[day].workers})
	}
	return out
}

// HasMembers says whether a worker of the site is in a group on the as-of day.
func (u *Usage) HasMembers(group string) bool { return u.members[group] > 0 }
