package bundle_test

import (
	"io/fs"
	"testing"

	"github.com/open-policy-agent/opa/v1/ast"
	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/rehearse"
	"hearduty/policies"
)

// TestRegoRules rehearses the rules of every embedded bundle, as `hearduty rehearse` does: the tests that lie beside
// them, the lines that these reach, the layout, numbers, and whether every duty is reached.
func TestRegoRules(t *testing.T) {
	ids, err := bundle.Folders(policies.FS)
	require.NoError(t, err)
	require.NotEmpty(t, ids)
	for _, id := range ids {
		t.Run(id, func(t *testing.T) {
			t.Parallel()
			b, problems := bundle.Load(policies.FS, id)
			require.NoError(t, problems.Err())
			r, err := rehearse.Rules(t.Context(), b, rehearse.Options{})
			require.NoError(t, err)
			for _, f := range r.Failures {
				t.Error(f.String())
			}
			own := 0
			for _, d := range b.Duties {
				if d.From == id { // those of a bundle that it extends are tested there
					own++
				}
			}
			require.Greater(t, r.Tests.Run, own, "every duty has several tests")
			assert.Zero(t, r.Tests.Failed)
			assert.Equal(t, r.Lines, r.Reached)
			assert.Positive(t, r.Lines)
		})
	}
}

// TestStockLoaderTakesTheSharedRules loads the shared rules with OPA's own reader; the bundles are read by it above.
func TestStockLoaderTakesTheSharedRules(t *testing.T) {
	shared, err := fs.Sub(policies.FS, "common")
	require.NoError(t, err)
	loader, err := opabundle.NewFSLoader(shared)
	require.NoError(t, err)
	read, err := opabundle.NewCustomReader(loader).WithRegoVersion(ast.RegoV1).Read()
	require.NoError(t, err)
	assert.NotEmpty(t, read.Modules)
}
