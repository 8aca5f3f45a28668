package rehearse

import (
	"bytes"
	"context"
	"errors"
	"fmt"
	"path"
	"regexp"
	"slices"
	"strings"
	"testing/fstest"
	"time"

	"github.com/open-policy-agent/opa/v1/ast"
	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/open-policy-agent/opa/v1/cover"
	"github.com/open-policy-agent/opa/v1/storage"
	"github.com/open-policy-agent/opa/v1/storage/inmem"
	"github.com/open-policy-agent/opa/v1/tester"
	"github.com/open-policy-agent/opa/v1/topdown"

	"hearduty/internal/bundle"
	"hearduty/internal/diag"
)

// testLimit is the time that one test of a rule may take, and allLimit that of all tests of a bundle together. Tests of
// this package shorten them.
var (
	testLimit = 30 * time.Second
	allLimit  = 5 * time.Minute
)

// traceLimit is how long a test that failed may have taken to be run once more with a trace, which takes much memory.
const traceLimit = time.Second

// leastTests is the number of tests that each duty needs: one in which it fires, and one in which it does not.
const leastTests = 2

func (r *Result) rules(ctx context.Context, o Options) error {
	r.add(o, r.Bundle.Strict())
	r.add(o, r.Bundle.Numbers())
	if o.Duty == "" {
		r.stock()
	}
	return r.ruleTests(ctx, o)
}

// stock lets OPA's own reader read the bundle, as anybody can.
func (r *Result) stock() {
	own := fstest.MapFS{}
	for file, text := range r.Bundle.Files {
		if rel, ok := strings.CutPrefix(file, r.Bundle.ID+"/"); ok {
			own[rel] = &fstest.MapFile{Data: text}
		}
	}
	loader, err := opabundle.NewFSLoader(own)
	if err == nil {
		_, err = opabundle.NewCustomReader(loader).WithRegoVersion(ast.RegoV1).Read()
	}
	if err != nil {
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: path.Join(r.Bundle.ID, ".manifest")}, What: "OPA itself does not read the bundle",
			Actual: err.Error(), Remedy: "Name every folder with data or rules among the roots of the manifest"})
	}
}

func isTest(file string) bool { return strings.HasSuffix(file, "_test.rego") }

// modules parses the rules that hold in the bundle, with the tests of its own rules and of the shared ones.
func (r *Result) modules() map[string]*ast.Module {
	out := map[string]*ast.Module{}
	for _, file := range r.Bundle.Modules {
		if isTest(file) && !r.Bundle.Own(file) && !r.Bundle.Shared(file) {
			continue
		}
		m, err := ast.ParseModuleWithOpts(file, string(r.Bundle.Files[file]), ast.ParserOptions{ProcessAnnotation: true, RegoVersion: ast.RegoV1, Capabilities: bundle.Capabilities()})
		if err != nil {
			r.regoErrors(file, err)
			continue
		}
		out[file] = m
	}
	return out
}

func (r *Result) regoErrors(file string, err error) {
	var list ast.Errors
	if !errors.As(err, &list) {
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: file}, What: err.Error()})
		return
	}
	for _, e := range list {
		at := diag.Position{File: file}
		if e.Location != nil {
			at = diag.Position{File: e.Location.File, Line: e.Location.Row, Column: e.Location.Col}
		}
		r.Failures = append(r.Failures, Failure{At: at, What: "the test cannot be compiled: " + e.Message})
	}
}

// ruleTests runs the tests beside the rules with OPA's own runner, and finds the lines that none of them reaches.
func (r *Result) ruleTests(ctx context.Context, o Options) error {
	before := len(r.Failures)
	modules := r.modules()
	if len(r.Failures) > before {
		return nil
	}
	store := inmem.NewFromObject(r.Bundle.Data)
	compiler := ast.NewCompiler().WithStrict(true).WithCapabilities(bundle.Capabilities()).WithEnablePrintStatements(true)
	coverage := cover.New()
	runner := tester.NewRunner().SetStore(store).SetModules(modules).SetTimeout(testLimit).SetCompiler(compiler).SetCoverageQueryTracer(coverage).SetCoverageRuns(nil)
	if o.Duty != "" {
		runner.Filter(`^data\.duty\.` + regexp.QuoteMeta(packageOf(o.Duty)) + `_test\.`)
	}
	limited, stop := context.WithTimeout(ctx, allLimit)
	defer stop()
	results, err := runAll(limited, store, runner)
	if limited.Err() != nil && ctx.Err() == nil {
		r.Failures = append(r.Failures, Failure{At: diag.Position{File: r.Bundle.ID}, What: fmt.Sprintf("the tests of rules take longer than %s together", allLimit),
			Remedy: "Find the test that does not end with --duty"})
		return nil
	}
	var broken ast.Errors
	if errors.As(err, &broken) {
		r.regoErrors(r.Bundle.ID, err)
		return nil
	}
	if err != nil {
		return err
	}
	number := map[string]int{} // of tests by package
	var failed []*tester.Result
	for _, t := range results {
		r.Tests.Run++
		number[t.Package]++
		if !t.Pass() {
			r.Tests.Failed++
			failed = append(failed, t)
		}
	}
	r.explainTests(ctx, store, compiler, failed)
	r.dutyTests(o, number)
	r.coverage(o, modules, coverage)
	return nil
}

func runAll(ctx context.Context, store storage.Store, runner *tester.Runner) (out []*tester.Result, err error) {
	err = storage.Txn(ctx, store, storage.WriteParams, func(txn storage.Transaction) error {
		results, err := runner.RunTests(ctx, txn)
		if err != nil {
			return err
		}
		for t := range results {
			out = append(out, t)
		}
		return ctx.Err()
	})
	return out, err
}

// explainTests runs tests that failed once more, to see where and with which values.
func (r *Result) explainTests(ctx context.Context, store storage.Store, compiler *ast.Compiler, failed []*tester.Result) {
	if len(failed) == 0 {
		return
	}
	var names []string
	for _, t := range failed {
		if t.Error == nil && !t.Skip && t.Duration < traceLimit {
			names = append(names, regexp.QuoteMeta(t.Package+"."+t.Name))
		}
	}
	traces := map[string][]*topdown.Event{}
	runner := tester.NewRunner().SetStore(store).SetTimeout(testLimit).SetCompiler(compiler).EnableTracing(true).Filter("^(" + strings.Join(names, "|") + ")$")
	if len(names) > 0 {
		again, err := runAll(ctx, store, runner)
		for _, t := range again {
			if err == nil {
				traces[t.Package+"."+t.Name] = t.Trace
			}
		}
	}
	for _, t := range failed {
		name := strings.TrimPrefix(t.Package, "data.") + "." + t.Name
		f := Failure{At: diag.Position{File: r.Bundle.ID}, What: "the test " + name + " fails", Expected: "the test is true"}
		if t.Location != nil {
			f.At = diag.Position{File: t.Location.File, Line: t.Location.Row}
		}
		switch at, text := failedAt(traces[t.Package+"."+t.Name]); {
		case t.Error != nil:
			f.What, f.Expected, f.Actual = "the test "+name+" cannot be run", "", t.Error.Error()
		case t.Skip:
			f.What, f.Expected, f.Remedy = "the test "+name+" is skipped", "", "Remove todo_ from its name"
		case text != "":
			f.At, f.Actual = at, text
		default:
			f.Actual = "it is undefined or false"
		}
		if len(t.Output) > 0 {
			f.Actual += "\nprinted: " + strings.TrimSpace(string(t.Output))
		}
		r.Failures = append(r.Failures, f)
	}
}

// failedAt gives the last expression of a test that did not hold, with the values in it.
func failedAt(trace []*topdown.Event) (diag.Position, string) {
	for _, e := range slices.Backward(trace) {
		if e.Op != topdown.FailOp || e.Location == nil || !isTest(e.Location.File) {
			continue
		}
		if x, ok := e.Node.(*ast.Expr); ok {
			if _, every := x.Terms.(*ast.Every); every {
				continue
			}
		}
		var text bytes.Buffer
		if err := topdown.PrettyEvent(&text, e, topdown.PrettyEventOpts{PrettyVars: true}); err != nil {
			return diag.Position{}, ""
		}
		return diag.Position{File: e.Location.File, Line: e.Location.Row}, trimLines(text.String())
	}
	return diag.Position{}, ""
}

func trimLines(text string) string {
	var out []string
	for line := range strings.Lines(text) {
		if line = strings.TrimRight(strings.ReplaceAll(line, "\t", "  "), " \n"); line != "" {
			out = append(out, strings.TrimPrefix(line, "  "))
		}
	}
	return strings.Join(out, "\n")
}

// dutyTests asks for a test file beside every duty, in the package of the duty, with several tests.
func (r *Result) dutyTests(o Options, number map[string]int) {
	for _, d := range r.Bundle.Duties {
		file := path.Join(r.Bundle.ID, strings.TrimSuffix(d.File, ".rego")+"_test.rego")
		if d.From != r.Bundle.ID || !o.concerns(r.Bundle, file) {
			continue
		}
		pkg := "duty." + d.Package + "_test"
		switch n := number["data."+pkg]; {
		case r.Bundle.Files[file] == nil:
			r.Failures = append(r.Failures, Failure{At: diag.Position{File: path.Join(r.Bundle.ID, d.File)}, What: fmt.Sprintf("the duty %s has no tests", d.ID),
				Remedy: fmt.Sprintf("Write package %s in the file %s", pkg, file)})
		case n < leastTests:
			r.Failures = append(r.Failures, Failure{At: diag.Position{File: file}, What: fmt.Sprintf("the package %s has %d of the tests that a duty needs, which are %d at least", pkg, n, leastTests),
				Remedy: "Add tests in which the duty fires, stays quiet, meets a boundary and lacks a record"})
		}
	}
}

// coverage counts the lines of the bundle's rules and of the shared ones, and finds those that no test reaches.
func (r *Result) coverage(o Options, modules map[string]*ast.Module, coverage *cover.Cover) {
	report := coverage.Report(modules)
	for file, lines := range report.Files {
		tried := r.Bundle.Own(file) || r.Bundle.Shared(file) && o.Duty == ""
		if isTest(file) || !tried || !o.concerns(r.Bundle, file) {
			continue
		}
		r.Lines += lines.CoveredLines + lines.NotCoveredLines
		r.Reached += lines.CoveredLines
		row := 0
		for _, line := range lines.NotCovered {
			if line.Start.Row == row {
				continue // one word a line
			}
			row = line.Start.Row
			r.Failures = append(r.Failures, Failure{At: diag.Position{File: file, Line: line.Start.Row, Column: line.Start.Col}, What: "no test reaches this line",
				Actual: lineOf(r.Bundle.Files[file], line.Start.Row), Remedy: "Add a test of the rule that comes to it"})
		}
	}
}

func lineOf(text []byte, row int) string {
	lines := strings.Split(string(text), "\n")
	if row < 1 || row > len(lines) {
		return ""
	}
	return strings.TrimSpace(lines[row-1])
}
