package judge_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/rehearse"
	"hearduty/policies"
)

// TestLawCases judges every law case of every embedded bundle from records to findings, as `hearduty rehearse` does.
func TestLawCases(t *testing.T) {
	ids, err := bundle.Folders(policies.FS)
	require.NoError(t, err)
	require.NotEmpty(t, ids)
	for _, id := range ids {
		t.Run(id, func(t *testing.T) {
			t.Parallel()
			b, problems := bundle.Load(policies.FS, id)
			require.NoError(t, problems.Err())
			r, err := rehearse.Cases(t.Context(), b, rehearse.Options{})
			require.NoError(t, err)
			for _, f := range r.Failures {
				t.Error(f.String())
			}
			assert.Positive(t, r.Cases.Run)
			assert.Zero(t, r.Cases.Failed)
		})
	}
}
