package calendar_test

import (
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
)

// origin is the day before all ends that the property tests draw.
var origin = calendar.MustParse("2024-02-15")

// days are the days that the property tests look at: the first and the last day of the calendar for spells
// that are open, and the short stretch in which all spells begin and end.
var days = func() []calendar.Date {
	all := []calendar.Date{firstDay}
	for n := range 30 {
		all = append(all, origin.AddDays(n))
	}
	return append(all, lastDay)
}()

// drawSpells gives spells in any order that may touch, overlap, be empty, or be open on one or both sides.
func drawSpells(t *rapid.T, name string) []calendar.Spell {
	end := rapid.Custom(func(t *rapid.T) calendar.Date {
		if rapid.IntRange(0, 4).Draw(t, "open") == 0 {
			return 0
		}
		return origin.AddDays(rapid.IntRange(1, 25).Draw(t, "end"))
	})
	return rapid.SliceOfN(rapid.Custom(func(t *rapid.T) calendar.Spell {
		return calendar.Spell{From: end.Draw(t, "from"), To: end.Draw(t, "to")}
	}), 0, 6).Draw(t, name)
}

// inAny is the definition of a spell, written out anew: from From up to, but without, To; 0 is open.
func inAny(spells []calendar.Spell, d calendar.Date) bool {
	for _, s := range spells {
		if (s.From == 0 || s.From <= d) && (s.To == 0 || d < s.To) {
			return true
		}
	}
	return false
}

func requireNormal(t *rapid.T, spells []calendar.Spell) {
	for i, s := range spells {
		require.False(t, s.Empty(), "%v", spells)
		if i > 0 {
			require.True(t, spells[i-1].To.Known() && spells[i-1].To < s.From, "in order with gaps: %v", spells)
		}
	}
}

func TestSetsOfDays(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		a, b := drawSpells(t, "a"), drawSpells(t, "b")
		keptA, keptB := slices.Clone(a), slices.Clone(b)
		union, both, rest := calendar.Union(append(slices.Clone(a), b...)), calendar.Intersect(a, b), calendar.Subtract(a, b)
		require.Equal(t, keptA, a, "the spells given are not changed")
		require.Equal(t, keptB, b, "the spells given are not changed")
		for _, spells := range [][]calendar.Spell{union, both, rest} {
			requireNormal(t, spells)
		}
		for _, d := range days {
			inA, inB := inAny(a, d), inAny(b, d)
			require.Equal(t, inA || inB, inAny(union, d), "union on %s: %v", d, union)
			require.Equal(t, inA && inB, inAny(both, d), "intersection on %s: %v", d, both)
			require.Equal(t, inA && !inB, inAny(rest, d), "difference on %s: %v", d, rest)
			found, ok := calendar.Find(a, d)
			require.Equal(t, inA, ok)
			require.Equal(t, ok, ok && found.Contains(d))
		}
	})
}

func TestTwoSpells(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		pair := drawSpells(t, "pair")
		if len(pair) < 2 {
			return
		}
		a, b := pair[0], pair[1]
		both, none := a.Intersect(b), true
		for _, d := range days {
			require.Equal(t, inAny(pair[:1], d), a.Contains(d))
			require.Equal(t, a.Contains(d) && b.Contains(d), both.Contains(d), "%s", d)
			none = none && !a.Contains(d)
		}
		require.Equal(t, none, a.Empty(), "%v", a)
	})
}

func TestSpellEnds(t *testing.T) {
	day := calendar.MustParse
	s := calendar.Spell{From: day("2024-02-01"), To: day("2024-03-01")}
	assert.False(t, s.Contains(day("2024-01-31")))
	assert.True(t, s.Contains(day("2024-02-01")))
	assert.True(t, s.Contains(day("2024-02-29")))
	assert.False(t, s.Contains(day("2024-03-01")), "the last day is not in the spell")

	open := calendar.Spell{From: day("2024-02-01")}
	assert.True(t, open.Contains(day("9999-12-31")))
	assert.False(t, open.Empty())
	assert.Equal(t, open, open.Intersect(calendar.Spell{}), "an open spell stays open")
	assert.True(t, calendar.Spell{From: day("2024-02-01"), To: day("2024-02-01")}.Empty())
	assert.True(t, calendar.Spell{From: day("2024-02-02"), To: day("2024-02-01")}.Empty())

	next := calendar.Spell{From: s.To, To: day("2024-04-01")}
	assert.Equal(t, []calendar.Spell{{From: s.From, To: next.To}}, calendar.Union([]calendar.Spell{next, s}), "spells that touch become one")
	assert.Equal(t, []calendar.Spell{{To: s.From}, {From: s.To}}, calendar.Subtract([]calendar.Spell{{}}, []calendar.Spell{s}))
	assert.Empty(t, calendar.Subtract([]calendar.Spell{s}, []calendar.Spell{{}}))
	assert.Equal(t, []calendar.Spell{s}, calendar.Subtract([]calendar.Spell{s}, nil))
	_, ok := calendar.Find(nil, day("2024-02-01"))
	assert.False(t, ok)
}
