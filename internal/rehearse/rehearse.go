// Package rehearse tries out one bundle as its author needs it: the tests beside its rules with the lines that they
// reach, its law cases from records to findings, its layout, and whether every duty is reached.
package rehearse

import (
	"cmp"
	"context"
	"errors"
	"fmt"
	"path"
	"slices"
	"strings"

	"hearduty/internal/bundle"
	"hearduty/internal/diag"
)

// Options narrow what is tried.
type Options struct {
	Duty  string // only this duty, by its id; empty for all
	Cases string // only the case files whose names fit this pattern; empty for all
}

// Failure is one thing that is wrong.
type Failure struct {
	At       diag.Position
	What     string // one sentence without its full stop
	Expected string // what should be, if it can be told
	Actual   string // what is instead, in one or more lines
	Remedy   string // what to do, one sentence without its full stop
}

// String writes the failure as one line, with what was expected and what came instead below it.
func (f Failure) String() string {
	text := diag.Diagnostic{Position: f.At, Problem: f.What, Remedy: f.Remedy}.String()
	for _, part := range [][2]string{{"expected", f.Expected}, {"actual", f.Actual}} {
		if part[1] != "" {
			text += fmt.Sprintf("\n  %-9s %s", part[0]+":", strings.ReplaceAll(part[1], "\n", "\n            "))
		}
	}
	return text
}

// Count is how many were tried, and how many of them failed.
type Count struct{ Run, Failed int }

// DutyCases counts the expectations of law cases about one duty that hold.
type DutyCases struct {
	ID       string
	Fires    int // the duty gives a gap, late, unproven or opinion finding
	Quiet    int // it gives one that is met, due or lifted, or none
	Boundary int // the day is the last one or the one after, or the value is the limit itself
	Lacks    int // a record is missing, so that nothing can be proven
}

// Result is what a rehearsal found.
type Result struct {
	Bundle   *bundle.Bundle
	Failures []Failure
	Tests    Count // tests of rules
	Cases    Count // law cases
	Lines    int   // lines of rules that can be reached
	Reached  int   // of them, those that tests of rules reach
	Duties   []DutyCases
	Narrowed bool // only a part was tried, so that what is missing cannot be told
}

// Failed says whether anything is wrong.
func (r *Result) Failed() bool { return len(r.Failures) > 0 }

// Run tries everything: layout, numbers, reach, tests of rules and law cases. The error is for the end of the work, such
// as a cancelled context; what is wrong with the bundle is among the failures.
func Run(ctx context.Context, b *bundle.Bundle, o Options) (*Result, error) {
	r := newResult(b, o)
	return r.finish(errors.Join(r.rules(ctx, o), r.cases(ctx, o)))
}

// Rules tries the rules of a bundle without any records: layout, numbers, reach, and the tests beside the rules. Rules
// of a bundle that it extends are tried there, not here.
func Rules(ctx context.Context, b *bundle.Bundle, o Options) (*Result, error) {
	r := newResult(b, o)
	return r.finish(r.rules(ctx, o))
}

// Cases judges the law cases of a bundle, from records to findings, and asks every duty what it says of a subject of
// which nothing is known.
func Cases(ctx context.Context, b *bundle.Bundle, o Options) (*Result, error) {
	r := newResult(b, o)
	return r.finish(r.cases(ctx, o))
}

func newResult(b *bundle.Bundle, o Options) *Result {
	return &Result{Bundle: b, Narrowed: o.Duty != "" || o.Cases != ""}
}

// add takes diagnostics in as failures. Those of other duties are left out where one was asked for.
func (r *Result) add(o Options, problems diag.List) {
	for _, d := range problems {
		if o.concerns(r.Bundle, d.Position.File) {
			r.Failures = append(r.Failures, Failure{At: d.Position, What: d.Problem, Remedy: d.Remedy})
		}
	}
}

// concerns says whether a file belongs to what is to be tried.
func (o Options) concerns(b *bundle.Bundle, file string) bool {
	return o.Duty == "" || strings.HasPrefix(file, path.Join(b.ID, "duty", packageOf(o.Duty))+"/")
}

// packageOf gives the last part of the Rego package of a duty.
func packageOf(duty string) string { return strings.ReplaceAll(duty, "-", "_") }

// finish puts the failures in order of their places, with the paths as the author would type them.
func (r *Result) finish(err error) (*Result, error) {
	if err != nil {
		return nil, err
	}
	for i := range r.Failures {
		r.Failures[i].At.File = r.Bundle.Where(r.Failures[i].At.File)
	}
	slices.SortStableFunc(r.Failures, func(a, b Failure) int {
		if c := strings.Compare(a.At.File, b.At.File); c != 0 {
			return c
		}
		return cmp.Or(a.At.Line-b.At.Line, a.At.Column-b.At.Column, strings.Compare(a.What+a.Expected, b.What+b.Expected))
	})
	return r, nil
}
