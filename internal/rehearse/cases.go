package rehearse

import (
	"context"
	"fmt"
	"path"
	"runtime"
	"slices"
	"strings"
	"sync"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
)

func (r *Result) cases(ctx context.Context, o Options) error {
	desk, err := judge.NewDesk(ctx, r.Bundle)
	if err != nil {
		return err
	}
	if err := r.empty(ctx, desk, o); err != nil {
		return err
	}
	for _, d := range r.Bundle.Duties {
		if d.From == r.Bundle.ID && (o.Duty == "" || o.Duty == d.ID) {
			r.Duties = append(r.Duties, DutyCases{ID: d.ID})
		}
	}
	shared := r.readBase()
	var list []lawCase
	files := r.caseFiles(o)
	for _, file := range files {
		list = append(list, r.readCases(file)...)
	}
	if len(files) == 0 {
		what := "the bundle has no law cases"
		if o.Cases != "" {
			what = fmt.Sprintf("no file of law cases fits %q", o.Cases)
		}
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: path.Join(r.Bundle.ID, "cases")}, What: what, Remedy: "Write cases/NAME.yaml with a sentence, its source, records and the findings expected"})
	}
	return r.judgeCases(ctx, desk, list, shared, o)
}

// caseFiles lists the files of law cases.
func (r *Result) caseFiles(o Options) []string {
	var out []string
	for file := range r.Bundle.Files {
		dir, name := path.Split(file)
		if dir != r.Bundle.ID+"/cases/" || path.Ext(name) != ".yaml" || name == baseFile {
			continue
		}
		fits, _ := path.Match(o.Cases, name)
		short, _ := path.Match(o.Cases, strings.TrimSuffix(name, ".yaml"))
		if o.Cases == "" || fits || short {
			out = append(out, file)
		}
	}
	slices.Sort(out)
	return out
}

// empty finds duties that fail, or say nothing, of a subject of which nothing is known.
func (r *Result) empty(ctx context.Context, desk *judge.Desk, o Options) error {
	answers, err := desk.Empty(ctx)
	if err != nil {
		return err
	}
	for _, a := range answers {
		if o.Duty != "" && o.Duty != a.Duty.ID {
			continue
		}
		f := Failure{At: diag.Position{File: path.Join(a.Duty.From, a.Duty.File), Line: 1}, Expected: "an obligation, or a reason why nothing is owed"}
		switch {
		case a.Err != nil:
			f.What, f.Actual = fmt.Sprintf("the duty %s fails for a %s of which nothing is known", a.Duty.ID, a.Duty.Subject), a.Err.Error()
		case len(a.Obligations)+len(a.NotOwed) == 0:
			f.What, f.Actual = fmt.Sprintf("the duty %s returns nothing for a %s of which nothing is known", a.Duty.ID, a.Duty.Subject), "both sets are empty"
			f.Remedy = "Add to not_owed the reason that is left"
		default:
			continue
		}
		r.Failures = append(r.Failures, f)
	}
	return nil
}

// judgeCases judges several cases at a time.
func (r *Result) judgeCases(ctx context.Context, desk *judge.Desk, list []lawCase, shared base, o Options) error {
	var mu sync.Mutex
	var wait sync.WaitGroup
	var broken error
	next := make(chan *lawCase)
	for range runtime.GOMAXPROCS(0) {
		wait.Go(func() {
			for c := range next {
				found, held, err := r.judgeCase(ctx, desk, c, shared, o)
				mu.Lock()
				r.Cases.Run++
				if len(found) > 0 {
					r.Cases.Failed++
				}
				r.Failures = append(r.Failures, found...)
				for _, h := range held {
					r.count(h)
				}
				if err != nil && broken == nil {
					broken = err
				}
				mu.Unlock()
			}
		})
	}
	for i := range list {
		if o.Duty == "" || list[i].speaksOf(o.Duty) {
			next <- &list[i]
		}
	}
	close(next)
	wait.Wait()
	return broken
}

func (c *lawCase) speaksOf(duty string) bool {
	return slices.Contains(c.Nothing, duty) || slices.ContainsFunc(c.Expect, func(e expected) bool { return e.Duty == duty })
}

// judgeCase gives what a case gets wrong, and the expectations of it that hold.
func (r *Result) judgeCase(ctx context.Context, desk *judge.Desk, c *lawCase, shared base, o Options) ([]Failure, []held, error) {
	fail := func(what, actual, remedy string) []Failure {
		return []Failure{{At: c.at, What: fmt.Sprintf("the case %q %s", c.Case, what), Actual: actual, Remedy: remedy}}
	}
	switch {
	case c.Case == "":
		return fail("has no sentence", "", "Say behind case: what the law asks of these records"), nil, nil
	case c.Source == "":
		return fail("names no source", "", "Name behind source: the paragraph, or where the example comes from"), nil, nil
	case len(c.Expect)+len(c.Nothing) == 0:
		return fail("expects nothing", "", "List findings under expect, or duties under nothing"), nil, nil
	}
	asOf, err := c.day()
	if err != nil {
		return fail("cannot be judged", err.Error(), "Write as_of: and a day such as 2026-06-30"), nil, nil
	}
	records, err := c.records(shared)
	if err != nil {
		return fail("cannot be read", err.Error(), "Correct the records"), nil, nil
	}
	report, err := desk.Judge(ctx, asOf, c.Choices, records)
	if err != nil {
		if ctx.Err() != nil {
			return nil, nil, err
		}
		return fail("cannot be judged", err.Error(), ""), nil, nil
	}
	failures, holding := r.compare(c, report, asOf, o)
	return failures, holding, nil
}

// compare holds the findings of a case against what it expects.
func (r *Result) compare(c *lawCase, report *finding.Report, asOf calendar.Date, o Options) (failures []Failure, holding []held) {
	for i, e := range c.Expect {
		if o.Duty != "" && e.Duty != o.Duty {
			continue
		}
		f, ok := r.expectation(c, &e, report)
		if !ok {
			f.At = c.expectAt[i]
			failures = append(failures, f)
			continue
		}
		holding = append(holding, heldBy(&e, report, asOf))
	}
	for i, duty := range c.Nothing {
		if o.Duty != "" && duty != o.Duty {
			continue
		}
		f := Failure{At: c.nothingAt[i], What: fmt.Sprintf("the case %q does not hold", c.Case), Expected: "no finding of " + duty}
		if _, known := r.Bundle.Duty(duty); !known {
			f.What, f.Remedy = fmt.Sprintf("there is no duty %q", duty), r.nearDuty(duty)
			failures = append(failures, f)
			continue
		}
		var others []string
		for _, x := range report.Findings {
			if x.Duty == duty {
				others = append(others, describe(&x, false))
			}
		}
		if len(others) > 0 {
			f.Actual = strings.Join(others, "\n")
			failures = append(failures, f)
			continue
		}
		holding = append(holding, held{duty: duty, quiet: true})
	}
	return failures, holding
}

func (r *Result) nearDuty(id string) string {
	var ids []string
	for _, d := range r.Bundle.Duties {
		ids = append(ids, d.ID)
	}
	if near := diag.Near(id, ids); near != "" {
		return fmt.Sprintf("Did you mean %q?", near)
	}
	return "Name a duty of the bundle"
}
