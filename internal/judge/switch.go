package judge

import (
	"context"
	"fmt"
	"maps"
	"slices"

	"hearduty/internal/bundle"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// Switch says what changes where the bundle to judges every chosen site in place of its own bundles, or of
// Options.Bundle. The records are read once and judged by the bundles of both sides. The error is a diag.List where
// inputs cannot be used.
func Switch(ctx context.Context, o Options, to string) (*finding.Switch, error) {
	if o.Library[to] == nil {
		return nil, diag.List{diag.Diagnostic{Severity: diag.Error, Problem: fmt.Sprintf("there is no bundle %q", to), Remedy: "List the bundles with: hearduty bundles"}}
	}
	kinds := map[string]int{}
	o.read = counting(o, kinds)
	o.beside, o.All, o.HealthDetail, o.Portraits, o.Accepted = to, false, false, false, nil
	c, err := newCheck(ctx, o)
	if err != nil {
		return nil, err
	}
	defer c.store.Close()
	if err := c.judgeAll(ctx); err != nil {
		return nil, err
	}
	j := &finding.Judged{From: map[string][]string{}, To: map[string][]string{}, Tallies: map[[2]string]*finding.Tally{}, Groups: map[[2]string]string{}, Records: kinds}
	for _, s := range c.sites {
		j.From[s.ID], j.To[s.ID] = s.Bundles, []string{to}
		if o.Bundle != "" {
			j.From[s.ID] = []string{o.Bundle}
		}
		for _, b := range c.benches[s.ID] {
			j.Tallies[[2]string{s.ID, b.bundle.ID}] = b.tally
		}
	}
	if err := c.exposures(ctx, j); err != nil {
		return nil, err
	}
	j.Report = c.report()
	j.Levels, j.Notes = c.levels(), c.switchNotes(to)
	return finding.SwitchOf(j), nil
}

// counting reads as the options say and counts the records of each kind.
func counting(o Options, kinds map[string]int) func(context.Context, func(record.Record) error) (*intake.Ledger, error) {
	read := o.read
	if read == nil {
		read = func(ctx context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			return intake.ReadVeiled(ctx, o.Program, o.Veil, emit)
		}
	}
	return func(ctx context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
		return read(ctx, func(r record.Record) error {
			kinds[string(r.Kind())]++
			return emit(r)
		})
	}
}

// switchNotes says what limits the comparison.
func (c *check) switchNotes(to string) []string {
	notes := []string{"A subject stands under a topic as its most urgent finding there. Duties of two laws are not held against each other one by one.",
		"Each law judges the past, too, as far as its numbers reach back; the new one as if it had always held here."}
	if n := c.ledger.Total().Rejected; n > 0 {
		notes = append(notes, fmt.Sprintf("Rows of the records that could not be used: %d. They may hide a gap on either side.", n))
	}
	if c.Program.Accepted != (program.Path{}) {
		notes = append(notes, "Accepted gaps are counted here by their status: an acceptance holds for the bundle that it names, and not for another.")
	}
	for _, s := range c.sites {
		notes = append(notes, c.choiceNotes(s, c.Library[to])...)
	}
	return notes
}

// choiceNotes says which choices of the new bundle a site has not made, and which of its own the new one does not know.
func (c *check) choiceNotes(s *program.Site, b *bundle.Bundle) []string {
	var notes []string
	for _, name := range slices.Sorted(maps.Keys(b.Choices)) {
		if _, made := s.Choices[name]; !made {
			notes = append(notes, fmt.Sprintf("The site %s has not made the choice %s of %s; its default holds: %v.", s.ID, name, b.ID, b.Choices[name].Default))
		}
	}
	for _, name := range slices.Sorted(maps.Keys(s.Choices)) {
		if _, known := b.Choices[name]; !known {
			notes = append(notes, fmt.Sprintf("The choice %s of the site %s is none of %s.", name, s.ID, b.ID))
		}
	}
	return notes
}
