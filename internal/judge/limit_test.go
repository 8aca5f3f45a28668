package judge

import (
	"testing"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
)

// TestEndlessRuleIsCutOffAndGivenUp: a rule that does not end costs the time of a few subjects, not of all, and its duty
// is unproven for each of them. The other duty is not spoiled. It runs alone, since it shortens the limit of all.
func TestEndlessRuleIsCutOffAndGivenUp(t *testing.T) {
	whole := evaluationLimit
	evaluationLimit = 100 * time.Millisecond
	t.Cleanup(func() { evaluationLimit = whole })
	fsys := bundletest.Small()
	text := *fsys[smallRule]
	fsys["small/duty/second/second.rego"] = &text
	bundletest.Change(fsys, "small/duty/second/second.rego", "package duty.posting", "package duty.second")
	bundletest.Change(fsys, "small/paragraphs/data.yaml", "[posting]", "[posting, second]")
	bundletest.Change(fsys, smallRule, smallObligation, `{"holds": count([x | some x in many; some y in many; some z in many; x + y == z]) == 0}`+"\n\nmany := numbers.range(1, 100000)")
	b, problems := bundle.Load(fsys, "small")
	require.NoError(t, problems.Err())
	engine, err := NewEngine(t.Context(), b)
	require.NoError(t, err)
	input := Input(emptyDossiers(b)["site"])
	began := time.Now()
	for range 50 {
		answers, err := engine.Evaluate(t.Context(), "site", input)
		require.NoError(t, err)
		require.Len(t, answers, 2)
		for _, a := range answers {
			if a.Duty.ID == "posting" {
				require.EqualError(t, a.Err, "the rules took longer than 100ms")
				continue
			}
			require.NoError(t, a.Err)
			assert.Len(t, a.Obligations, 1)
		}
	}
	assert.Less(t, time.Since(began), 5*time.Second, "50 subjects at twice the limit would take 10 s")
}
