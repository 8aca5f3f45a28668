package judge

import (
	"context"
	"fmt"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// Desk judges one small set of records after the other by one bundle, whose rules it prepares once.
type Desk struct {
	bundle *bundle.Bundle
	engine Engine
}

// DeskSite is the only site of the program that a desk judges.
const DeskSite = "s1"

// NewDesk prepares the rules of a bundle.
func NewDesk(ctx context.Context, b *bundle.Bundle) (*Desk, error) {
	engine, err := NewEngine(ctx, b)
	if err != nil {
		return nil, fmt.Errorf("the bundle %s cannot be prepared: %w", b.ID, err)
	}
	return &Desk{b, engine}, nil
}

// Judge judges records as if they were read from one file, and lists every finding. It may be called several times at
// once.
func (d *Desk) Judge(ctx context.Context, asOf calendar.Date, choices map[string]any, records []record.Record) (*finding.Report, error) {
	about := &d.bundle.About
	site := program.Site{ID: DeskSite, Name: "Site one", Country: about.Country, Region: about.Region, Bundles: []string{d.bundle.ID}, Choices: choices}
	return Check(ctx, Options{
		Program: &program.Program{Title: "law case", Sites: []program.Site{site}},
		Library: bundle.Library{d.bundle.ID: d.bundle}, AsOf: asOf, All: true, HealthDetail: true, Parallel: 1,
		engines: map[string]Engine{d.bundle.ID: d.engine},
		read: func(_ context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			for i, r := range records {
				r.SetAt(record.Origin{Row: int32(i + 1)})
				if err := emit(r); err != nil {
					return nil, err
				}
			}
			return &intake.Ledger{Inputs: []intake.Input{{File: "case"}}}, nil
		},
	})
}

// Empty evaluates every duty for a dossier of its subject kind in which nothing is known.
func (d *Desk) Empty(ctx context.Context) ([]Answer, error) {
	var out []Answer
	dossiers := emptyDossiers(d.bundle)
	for _, duty := range d.bundle.Duties {
		if dossiers[duty.Subject] == nil {
			return nil, fmt.Errorf("no empty dossier of a %s is known, of which the duty %s speaks", duty.Subject, duty.ID)
		}
	}
	for kind, input := range dossiers {
		answers, err := d.engine.Evaluate(ctx, kind, Input(input))
		if err != nil {
			return nil, err
		}
		out = append(out, answers...)
	}
	return out, nil
}
