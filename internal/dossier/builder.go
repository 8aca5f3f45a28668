package dossier

import (
	"maps"
	"slices"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Builder makes the dossiers of one site under one bundle. It may be used by several goroutines once made.
type Builder struct {
	*Ground
	Place   Place
	Choices map[string]any
}

// Ground is what the dossiers of all sites under one bundle have in common: the registers, and the exposure
// of every group over time.
type Ground struct {
	Registers *Registers
	Measures  Measures
	Law       Law
	AsOf      Date
	// KeepRecords says whether the dossiers of instruments, rooms and testers hold the whole records of tests,
	// to be shown in an explanation. Without it they hold id, day and origin only, which saves memory.
	KeepRecords bool

	channels  channels
	levels    []string // names of the exposure levels, in order
	histories map[string]*history
}

// NewGround works out the exposure of every group.
func NewGround(r *Registers, m Measures, law Law, asOf Date) *Ground {
	g := &Ground{
		Registers: r, Measures: m, Law: law, AsOf: asOf, channels: newChannels(m.Exposure, r, law, asOf),
		levels: slices.Sorted(maps.Keys(m.Exposure.Levels)), histories: map[string]*history{},
	}
	ids := map[string]bool{}
	for id := range r.Groups {
		ids[id] = true
	}
	for id := range r.byGroup {
		ids[id] = true
	}
	for id := range r.tasksOf {
		ids[id] = true
	}
	for _, c := range r.Changes {
		if c.Group != "" {
			ids[c.Group] = true
		}
	}
	for id := range ids {
		group, area := r.Groups[id], ""
		if group != nil {
			area = group.Area
		}
		results, events := g.channels.resultsOf(group, id), r.eventsOf(id, area, asOf)
		if group != nil || len(results)+len(events) > 0 {
			g.histories[id] = g.channels.historyOf(results, events, workplaceOf(id, group))
		}
	}
	return g
}

// Builder makes the builder of a site.
func (g *Ground) Builder(place Place, choices map[string]any) *Builder {
	return &Builder{Ground: g, Place: place, Choices: choices}
}

func (b *Builder) common(id string) Common {
	return Common{ID: id, Site: b.Place, AsOf: b.AsOf, Choices: b.Choices}
}

// spell marks a spell as current if the as-of day lies in it.
func (b *Builder) spell(s calendar.Spell) Spell {
	return Spell{From: s.From, To: s.To, Current: s.Contains(b.AsOf)}
}

func (b *Builder) spells(list []calendar.Spell) []Spell {
	out := make([]Spell, len(list))
	for i, s := range list {
		out[i] = b.spell(s)
	}
	return out
}

// verdict is yes, no, or not known.
type verdict = record.Answer

// tolerance absorbs the rounding of binary arithmetic in doses and levels that were worked out, percent or dBA.
const tolerance = 1e-9

// levelSpells divides stretches by exposure level: where the level is reached, and where that is not known.
func (b *Builder) levelSpells(pieces []stretch) (map[string][]Spell, map[string][]Open, map[string][]calendar.Spell) {
	exposed, unknown, plain := map[string][]Spell{}, map[string][]Open{}, map[string][]calendar.Spell{}
	for _, level := range b.levels {
		var yes []calendar.Spell
		open := []Open{}
		days, first := b.lawDays(level), Date(0)
		if len(days) > 0 && slices.Min(days) <= b.AsOf {
			first = slices.Min(days)
		}
		for _, p := range splitAt(pieces, days) {
			if p.From > b.AsOf || p.From < first { // the law knew no such level yet
				continue
			}
			found := b.reaches(level, p.on, max(p.From, 1))
			switch found.verdict {
			case record.Yes:
				yes = append(yes, p.Spell)
			case record.Unanswered:
				open = appendOpen(open, Open{From: p.From, To: p.To, Reason: found.reason})
			}
		}
		plain[level] = calendar.Union(yes)
		exposed[level] = b.spells(plain[level])
		unknown[level] = open
	}
	return exposed, unknown, plain
}

// appendOpen adds an open stretch, joined to the one before where they touch and have the same reason.
func appendOpen(list []Open, o Open) []Open {
	if n := len(list); n > 0 && list[n-1].To == o.From && list[n-1].Reason == o.Reason {
		list[n-1].To = o.To
		return list
	}
	return append(list, o)
}

// splitAt cuts stretches at days on which the law changes.
func splitAt(pieces []stretch, days []Date) []stretch {
	var out []stretch
	for _, p := range pieces {
		for _, day := range days {
			if p.Contains(day) && day > p.From {
				first := p
				first.To = day
				out = append(out, first)
				p.From = day
			}
		}
		out = append(out, p)
	}
	return out
}

// exposures writes stretches as the dossier shows them.
func (b *Builder) exposures(pieces []stretch, refs Refs) []Exposure {
	out := []Exposure{}
	for _, p := range pieces {
		if p.From > b.AsOf {
			continue
		}
		k := p.on[b.channels.enrols]
		e := Exposure{From: p.From, To: p.To, Group: p.group, Own: k.own, Channels: make(map[string]Level, len(b.channels.names)), Note: k.note}
		if k.reason != "" {
			e.Note = k.reason
		}
		for i, name := range b.channels.names {
			e.Channels[name] = b.channels.level(i, &p.on[i])
		}
		if k.src != nil {
			e.Ref, e.MeasuredOn = refs.Of(k.src.rec), k.src.day
			for _, rec := range k.src.more {
				e.Others = append(e.Others, refs.Of(rec))
			}
		}
		out = append(out, e)
	}
	return out
}

// workings tell stretch by stretch how the exposure on the enrolling channel came about: the days, what decides,
// and the sums.
func (b *Builder) workings(list []Exposure) []string {
	out := []string{}
	name := b.channels.names[b.channels.enrols]
	for _, e := range list {
		days := "from " + e.From.String() + " on"
		if e.To.Known() && e.To <= b.AsOf {
			days = "from " + e.From.String() + " until " + e.To.String()
		}
		for _, text := range []string{e.Ref, e.Note} {
			if text != "" {
				days += "; " + text
			}
		}
		out = append(append(out, days), e.Channels[name].Working...)
	}
	return out
}

// link points to a record on a day; a nil record gives no link.
func link(refs Refs, rec record.Record, day Date) *Link {
	return &Link{Date: day, Ref: refs.Of(rec)}
}
