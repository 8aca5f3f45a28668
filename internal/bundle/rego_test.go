package bundle

import (
	"context"
	"io/fs"
	"path"
	"strings"
	"testing"
	"time"

	"github.com/open-policy-agent/opa/v1/ast"
	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/open-policy-agent/opa/v1/cover"
	"github.com/open-policy-agent/opa/v1/format"
	"github.com/open-policy-agent/opa/v1/storage"
	"github.com/open-policy-agent/opa/v1/storage/inmem"
	"github.com/open-policy-agent/opa/v1/tester"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/policies"
)

// regoFiles gives the modules of a bundle and the shared ones, by path.
func regoFiles(t *testing.T, dirs ...string) map[string]*ast.Module {
	t.Helper()
	all, err := readFiles(policies.FS, dirs...)
	require.NoError(t, err)
	modules := map[string]*ast.Module{}
	for p, content := range all {
		if path.Ext(p) == ".rego" {
			m, err := ast.ParseModuleWithOpts(p, string(content), ast.ParserOptions{ProcessAnnotation: true, RegoVersion: ast.RegoV1})
			require.NoError(t, err)
			modules[p] = m
		}
	}
	return modules
}

// TestRegoRules runs the tests that lie beside the rules, with OPA's own runner.
func TestRegoRules(t *testing.T) {
	ids, err := Folders(policies.FS)
	require.NoError(t, err)
	for _, id := range ids {
		t.Run(id, func(t *testing.T) {
			b, problems := Load(policies.FS, id)
			require.NoError(t, problems.Err())
			ctx := context.Background()
			store := inmem.NewFromObject(b.Data)
			coverage := cover.New()
			modules := regoFiles(t, id, commonDir)
			runner := tester.NewRunner().SetStore(store).SetModules(modules).SetTimeout(30 * time.Second).
				SetCompiler(ast.NewCompiler().WithStrict(true).WithCapabilities(Capabilities())).SetCoverageQueryTracer(coverage)
			var ran int
			err := storage.Txn(ctx, store, storage.WriteParams, func(txn storage.Transaction) error {
				results, err := runner.RunTests(ctx, txn)
				if err != nil {
					return err
				}
				for r := range results {
					ran++
					assert.NoError(t, r.Error, r.Name)
					assert.False(t, r.Fail, "%s.%s fails (%s)", r.Package, r.Name, r.Location)
					assert.False(t, r.Skip, r.Name)
				}
				return nil
			})
			require.NoError(t, err)
			own := 0
			for _, d := range b.Duties {
				if d.From == id { // those of a bundle that it extends are tested there
					own++
				}
			}
			require.Greater(t, ran, own, "every duty has several tests")
			for file, lines := range coverage.Report(modules).Files {
				if !isTest(file) {
					assert.Empty(t, lines.NotCovered, "%s has lines that no test reaches", file)
				}
			}
		})
	}
}

// TestRegoFormat holds every module to OPA's own layout.
func TestRegoFormat(t *testing.T) {
	err := fs.WalkDir(policies.FS, ".", func(p string, d fs.DirEntry, err error) error {
		if err != nil || path.Ext(p) != ".rego" {
			return err
		}
		content, err := fs.ReadFile(policies.FS, p)
		require.NoError(t, err)
		formatted, err := format.SourceWithOpts(p, content, format.Opts{RegoVersion: ast.RegoV1})
		require.NoError(t, err)
		assert.Equal(t, string(formatted), string(content), "%s is not in OPA's layout", p)
		return nil
	})
	require.NoError(t, err)
}

// TestNoNumberOfTheLawInRego holds rules to the parameters: a duty compares with 0 and 1 at most.
func TestNoNumberOfTheLawInRego(t *testing.T) {
	ids, err := Folders(policies.FS)
	require.NoError(t, err)
	for _, id := range ids {
		for p, m := range regoFiles(t, id) {
			if isTest(p) {
				continue
			}
			ast.WalkTerms(m, func(term *ast.Term) bool {
				if n, ok := term.Value.(ast.Number); ok && n != "0" && n != "1" {
					assert.Fail(t, "a number in a rule", "%s: %s", term.Location, n)
				}
				return false
			})
		}
	}
}

// TestEveryDutyHasTests asks for a test file beside every duty, in the package of the duty.
func TestEveryDutyHasTests(t *testing.T) {
	library, err := Embedded()
	require.NoError(t, err)
	for _, id := range library.IDs() {
		for _, d := range library[id].Duties {
			content, err := fs.ReadFile(policies.FS, d.From+"/"+strings.TrimSuffix(d.File, ".rego")+"_test.rego")
			if assert.NoError(t, err) {
				assert.Contains(t, string(content), "package duty."+d.Package+"_test")
			}
		}
	}
}

// TestStockLoaderTakesTheBundles loads every bundle with OPA's own bundle reader, as anybody can.
func TestStockLoaderTakesTheBundles(t *testing.T) {
	ids, err := Folders(policies.FS)
	require.NoError(t, err)
	for _, id := range append(ids, commonDir) {
		sub, err := fs.Sub(policies.FS, id)
		require.NoError(t, err)
		loader, err := opabundle.NewFSLoader(sub)
		require.NoError(t, err)
		_, err = opabundle.NewCustomReader(loader).WithRegoVersion(ast.RegoV1).Read()
		require.NoError(t, err, id)
	}
}
