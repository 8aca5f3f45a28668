package calendar

import "slices"

// Spell is a stretch of days from From up to, but without, To. An unknown To means that the stretch is
// still open. An unknown From is earlier than every day.
type Spell struct {
	From Date `json:"from"`
	To   Date `json:"to"`
}

const never = Date(1 << 30)

func (s Spell) end() Date {
	if s.To.Known() {
		return s.To
	}
	return never
}

func closed(from, to Date) Spell {
	if to >= never {
		to = 0
	}
	return Spell{from, to}
}

// Contains says whether d lies in the spell. An unknown day lies in no spell.
func (s Spell) Contains(d Date) bool { return d.Known() && s.From <= d && d < s.end() }

// Empty says whether no day lies in the spell.
func (s Spell) Empty() bool { return s.end() <= s.From }

// Intersect gives the days that lie in both spells; the result may be empty.
func (s Spell) Intersect(o Spell) Spell {
	return closed(max(s.From, o.From), min(s.end(), o.end()))
}

// Union gives the days that lie in any of the spells, as spells in order with gaps between them.
func Union(spells []Spell) []Spell {
	sorted := slices.DeleteFunc(slices.Clone(spells), Spell.Empty)
	slices.SortFunc(sorted, func(a, b Spell) int { return int(a.From) - int(b.From) })
	var out []Spell
	for _, s := range sorted {
		if n := len(out); n > 0 && s.From <= out[n-1].end() {
			out[n-1] = closed(out[n-1].From, max(out[n-1].end(), s.end()))
			continue
		}
		out = append(out, s)
	}
	return out
}

// Intersect gives the days that lie in a spell of a and in a spell of b.
func Intersect(a, b []Spell) []Spell {
	var out []Spell
	for _, x := range a {
		for _, y := range b {
			if z := x.Intersect(y); !z.Empty() {
				out = append(out, z)
			}
		}
	}
	return Union(out)
}

// Subtract gives the days that lie in a spell of a and in no spell of b.
func Subtract(a, b []Spell) []Spell {
	out := Union(a)
	for _, cut := range Union(b) {
		var next []Spell
		for _, s := range out {
			before, after := s.Intersect(Spell{0, cut.From}), s.Intersect(Spell{cut.end(), 0})
			if cut.From.Known() && !before.Empty() {
				next = append(next, before)
			}
			if cut.To.Known() && !after.Empty() {
				next = append(next, after)
			}
		}
		out = next
	}
	return out
}

// Find gives the spell that contains d.
func Find(spells []Spell, d Date) (Spell, bool) {
	for _, s := range spells {
		if s.Contains(d) {
			return s, true
		}
	}
	return Spell{}, false
}
