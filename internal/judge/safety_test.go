package judge

import (
	"context"
	"errors"
	"testing"
	"testing/fstest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

const (
	smallRule       = "small/duty/posting/posting.rego"
	smallObligation = `{"holds": input.enrolled_now == 0}`
)

// judgeSmall judges a site without records by the small bundle, with one text of its rule replaced.
func judgeSmall(t *testing.T, fsys fstest.MapFS) *finding.Report {
	t.Helper()
	b, problems := bundle.Load(fsys, "small")
	require.NoError(t, problems.Err())
	report, err := Check(context.Background(), Options{
		Program: &program.Program{Title: "small", Sites: []program.Site{{ID: "s1", Bundles: []string{"small"}}}},
		Library: bundle.Library{"small": b}, Bundle: "small", AsOf: calendar.MustParse("2026-06-30"), All: true,
		read: func(context.Context, func(record.Record) error) (*intake.Ledger, error) { return &intake.Ledger{}, nil },
	})
	require.NoError(t, err)
	return report
}

func only(t *testing.T, r *finding.Report) finding.Finding {
	t.Helper()
	require.Len(t, r.Findings, 1)
	return r.Findings[0]
}

func TestRuleThatHoldsIsMet(t *testing.T) {
	assert.Equal(t, finding.Met, only(t, judgeSmall(t, bundletest.Small())).Status)
}

// TestSilenceIsUnproven goes through the ways in which a rule could fall silent.
func TestSilenceIsUnproven(t *testing.T) {
	for name, c := range map[string]struct{ rule, says string }{
		"the rule returns nothing":         {smallObligation + " if input.workers > 5", "neither an obligation nor a reason"},
		"a fact is undefined":              {`{"holds": input.choices[input.id] == 1}`, "neither an obligation nor a reason"},
		"the rule fails":                   {`{"holds": to_number(input.id) == 1}`, "The rule of this duty failed"},
		"a division by zero":               {`{"holds": 1 / input.workers == 1}`, "The rule of this duty failed"},
		"an obligation of no shape":        {`{"note": "x"}`, "cannot be read"},
		"a field that no shape has":        {`{"holds": true, "within": "posting_time"}`, "cannot be read"},
		"a wrong type":                     {`{"holds": "yes"}`, "cannot be read"},
		"a day that is none":               {`{"by": null, "after": "2026-02-30"}`, "cannot be read"},
		"not an obligation":                {`"x"`, "cannot be read"},
		"an unknown condition":             {`{"holds": null, "missing": ["the minutes"]}`, "The records lack: the minutes."},
		"a value that is not known":        {`{"value": null, "at_most": "dose"}`, "The records lack"},
		"a start that is not known":        {`{"by": null, "after": null, "within": "posting_time"}`, "The records lack"},
		"no limit in force on the day":     {`{"value": 1, "at_most": "dose", "on": "1999-12-31"}`, "a value of dose in force on 1999-12-31"},
		"no interval in force on the day":  {`{"by": null, "after": "1999-12-31", "within": "posting_time"}`, "a value of posting time in force on 1999-12-31"},
		"no interval for a recurring duty": {`{"every": "posting_time", "by": [], "during": {"from": "1999-12-31", "to": null}}`, "a value of posting time in force on 1999-12-31"},
		"a parameter without name":         {`{"value": 1, "at_most": concat("", ["do", "ze"])}`, "a value of doze in force"},
	} {
		t.Run(name, func(t *testing.T) {
			f := only(t, judgeSmall(t, bundletest.Change(bundletest.Small(), smallRule, smallObligation, c.rule)))
			assert.Equal(t, finding.Unproven, f.Status)
			assert.Contains(t, f.Message, c.says)
		})
	}
}

// TestOneFailingRuleLeavesTheOthers adds a second duty, whose answer must not be lost.
func TestOneFailingRuleLeavesTheOthers(t *testing.T) {
	fsys := bundletest.Small()
	text := string(fsys[smallRule].Data)
	fsys["small/duty/second/second.rego"] = &fstest.MapFile{Data: []byte(text)}
	bundletest.Change(fsys, "small/duty/second/second.rego", "package duty.posting", "package duty.second")
	bundletest.Change(fsys, "small/paragraphs/data.yaml", "[posting]", "[posting, second]")
	bundletest.Change(fsys, smallRule, smallObligation, `{"holds": to_number(input.id) == 1}`)
	r := judgeSmall(t, fsys)
	require.Len(t, r.Findings, 2)
	assert.Equal(t, map[finding.Status]int{finding.Unproven: 1, finding.Met: 1}, r.Totals)
}

func TestWhatIsNotOwedGivesNoFinding(t *testing.T) {
	fsys := bundletest.Change(bundletest.Small(), smallRule, smallObligation, smallObligation+" if input.workers > 5")
	bundletest.Change(fsys, smallRule, `"never" if false`, `"nobody works here" if input.workers == 0`)
	assert.Empty(t, judgeSmall(t, fsys).Findings)
}

// TestCancelledCheckStops shows that a check that is broken off gives an error, not half a report.
func TestCancelledCheckStops(t *testing.T) {
	ctx, stop := context.WithCancelCause(context.Background())
	stop(errors.New("broken off"))
	b, problems := bundle.Load(bundletest.Small(), "small")
	require.NoError(t, problems.Err())
	_, err := Check(ctx, Options{
		Program: &program.Program{Sites: []program.Site{{ID: "s1", Bundles: []string{"small"}}}},
		Library: bundle.Library{"small": b}, Bundle: "small", AsOf: calendar.MustParse("2026-06-30"),
		read: func(context.Context, func(record.Record) error) (*intake.Ledger, error) { return &intake.Ledger{}, nil },
	})
	require.ErrorContains(t, err, "broken off")
}

// TestEveryDutyAnswersForEverySubject evaluates every duty of every bundle for an empty dossier of its
// subject kind: it must return something.
func TestEveryDutyAnswersForEmptyDossiers(t *testing.T) {
	library, err := bundle.Embedded()
	require.NoError(t, err)
	for _, id := range library.IDs() {
		b := library[id]
		engine, err := NewEngine(context.Background(), b)
		require.NoError(t, err)
		for kind, input := range emptyDossiers(b) {
			answers, err := engine.Evaluate(context.Background(), kind, Input(input))
			require.NoError(t, err)
			for _, a := range answers {
				require.NoError(t, a.Err, a.Duty.ID)
				assert.NotZero(t, len(a.Obligations)+len(a.NotOwed), "%s returns nothing for an empty %s", a.Duty.ID, kind)
			}
		}
	}
}
