package draft

import (
	"fmt"
	"slices"
)

// settleClaims lets one column have a field that several are proposed for.
func (a *analysis) settleClaims() {
	holder := map[string]*column{}
	for _, c := range a.columns {
		if c.field == "" || c.off {
			continue
		}
		key := c.part + " " + c.field
		other := holder[key]
		if other == nil {
			holder[key] = c
			continue
		}
		winner, loser := other, c
		if a.better(c, other) {
			winner, loser = c, other
		}
		holder[key] = winner
		loser.off, loser.sure = true, unsure
		if loser.p.filled == 0 {
			loser.field, loser.off, loser.ignore = "", false, "empty"
			continue
		}
		n := a.ask("Which column is the field %s: %s or %s? The first is proposed", loser.field, winner.shown(), loser.shown())
		loser.notes = append(loser.notes, fmt.Sprintf("question %d", n))
		winner.sure = min(winner.sure, likely)
		winner.notes = append(winner.notes, fmt.Sprintf("question %d", n))
	}
}

// better says whether c has the better claim: its name is of this kind only, or it is filled and the other is not.
func (a *analysis) better(c, other *column) bool {
	if (c.p.filled == 0) != (other.p.filled == 0) {
		return other.p.filled == 0
	}
	return a.special(c) && !a.special(other)
}

func (a *analysis) special(c *column) bool {
	found, _ := known.fields(c.rest)
	return slices.Contains(found, target{a.kind, c.field})
}
