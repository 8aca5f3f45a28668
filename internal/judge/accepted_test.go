package judge_test

import (
	"context"
	"encoding/json"
	"maps"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/accept"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
)

const approved = "reason: The order is placed.\n  approved_by: plant manager\n  until: 2026-12-31\n"

// trainingGap is a gap of the demo program.
const trainingGap = "f-0e2eec7dabda4d64"

func acceptedList(t *testing.T, text string) *accept.List {
	t.Helper()
	l, problems := accept.Parse([]byte(text), "accepted.yaml", "accepted.yaml")
	require.Empty(t, problems)
	return l
}

func checkWith(t *testing.T, text string, change func(*judge.Options)) *finding.Report {
	t.Helper()
	o := demoOptions(t)
	if text != "" {
		o.Accepted = acceptedList(t, text)
	}
	if change != nil {
		change(&o)
	}
	r, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	return r
}

func byID(r *finding.Report) map[string]finding.Finding {
	out := map[string]finding.Finding{}
	for _, f := range r.Findings {
		out[f.ID] = f
	}
	return out
}

// own gives the findings about the list of accepted gaps.
func own(r *finding.Report) (out []finding.Finding) {
	for _, f := range r.Findings {
		if f.Bundle == finding.OfProgram {
			out = append(out, f)
		}
	}
	return out
}

func TestAcceptedGapIsShownApart(t *testing.T) {
	before := checkWith(t, "", nil)
	r := checkWith(t, "- id: f-0e2eec7d\n  "+approved, nil)
	f := byID(r)[trainingGap]
	assert.Equal(t, finding.Gap, f.Status)
	assert.Equal(t, &finding.Acceptance{Reason: "The order is placed.", ApprovedBy: "plant manager", Until: calendar.MustParse("2026-12-31"), File: "accepted.yaml", Row: 1}, f.Accepted)
	assert.Equal(t, map[finding.Status]int{finding.Gap: 1}, r.AcceptedTotals)
	want := maps.Clone(before.Totals)
	want[finding.Gap]--
	assert.Equal(t, want, r.Totals, "one gap fewer, and none more that is met")
	assert.Len(t, r.Findings, len(before.Findings), "it stays listed")
	for _, report := range []*finding.Report{before, r} {
		sum := map[finding.Status]int{}
		for _, c := range report.Counts {
			sum[c.Status] += c.Number
		}
		assert.Equal(t, report.Totals, sum)
	}
	assert.Equal(t, before.Rates, r.Rates, "the rates count it as not done")
	assert.Empty(t, own(r))
	without := byID(r)
	for id, f := range byID(before) {
		other := without[id]
		other.Accepted = nil
		assert.Equal(t, f, other)
	}
}

func TestOnlyEntriesInForceAccept(t *testing.T) {
	for name, c := range map[string]struct {
		text, duty, says string
		accepted         bool
	}{
		"in force":               {"- id: " + trainingGap + "\n  " + approved, "", "", true},
		"last day":               {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: x, until: 2026-06-30}", "", "", true},
		"first day":              {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: x, until: 2026-07-01, since: 2026-06-30}", "", "", true},
		"day after":              {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: x, until: 2026-06-29}", "accepted-gap-expired", "The entry in line 1 of accepted.yaml ended on 2026-06-29, 1 day ago; 1 finding that it is about counts like any other.", false},
		"not yet":                {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: x, until: 2026-12-31, since: 2026-07-01}", "", "", false},
		"not approved":           {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: ' ', until: 2026-12-31}", "accepted-gap-unapproved", "names nobody who approved it, so it accepts nothing; 1 finding", false},
		"no approver":            {"- {id: f-0e2eec7d, reason: The order is placed., until: 2026-12-31}", "accepted-gap-unapproved", "names nobody", false},
		"fits nothing":           {"- id: f-00000000\n  " + approved, "accepted-gap-unused", "fits no finding", false},
		"fits what met":          {"- {match: {duty: written-notice-that-is-none}, reason: The order is placed., approved_by: x, until: 2026-12-31}", "accepted-gap-unused", "fits no finding", false},
		"expired, empty":         {"- {id: f-00000000, reason: The order is placed., approved_by: x, until: 2026-06-29}", "accepted-gap-expired", "no open finding needs it", false},
		"renewed":                {"- {id: f-0e2eec7d, reason: The order is placed., approved_by: x, until: 2026-06-29}\n- id: f-0e2eec7d\n  " + approved, "", "", true},
		"renewed in other words": {"- {match: {duty: annual-training, subject: K0128}, reason: The order is placed., approved_by: x, until: 2026-06-29}\n- id: f-0e2eec7d\n  " + approved, "", "", true},
	} {
		t.Run(name, func(t *testing.T) {
			r := checkWith(t, c.text, nil)
			assert.Equal(t, c.accepted, byID(r)[trainingGap].Accepted != nil)
			list := own(r)
			if c.duty == "" {
				require.Empty(t, list)
				return
			}
			require.Len(t, list, 1)
			f := list[0]
			assert.Equal(t, c.duty, f.Duty)
			assert.Contains(t, f.Message, c.says)
			assert.Equal(t, finding.Gap, f.Status)
			assert.Equal(t, "minor", f.Severity)
			assert.Equal(t, finding.Subject{Kind: "site", ID: "kiln-hill"}, f.Subject)
			assert.Equal(t, "accepted.yaml", f.Cite)
			assert.Equal(t, 1, f.Evidence[0].Row)
			assert.Contains(t, r.Counts, finding.Count{Site: "kiln-hill", Bundle: finding.OfProgram, Topic: "records", Status: finding.Gap, Number: 1})
			var named []string
			for _, d := range r.Duties {
				if d.Bundle == finding.OfProgram {
					named = append(named, d.ID)
				}
			}
			assert.Contains(t, named, c.duty)
		})
	}
}

// TestWhatIsMetOrDueIsNeverAccepted accepts everything at a site.
func TestWhatIsMetOrDueIsNeverAccepted(t *testing.T) {
	r := checkWith(t, "- match: {site: kiln-hill}\n  "+approved+"- match: {site: larch-street}\n  "+approved, func(o *judge.Options) {
		o.All, o.Program.Sites = true, o.Program.Sites[:2]
		o.Program.Sites[1].Bundles = o.Program.Sites[1].Bundles[:1] // by the law alone it has no gap
	})
	for _, f := range r.Findings {
		if f.Bundle != finding.OfProgram {
			assert.Equal(t, accept.Covers(f.Status), f.Accepted != nil, f.ID)
		}
	}
	for _, s := range accept.Statuses {
		if s != finding.Gap {
			assert.Zero(t, r.Totals[s])
		}
		assert.Positive(t, r.AcceptedTotals[s])
	}
	assert.Equal(t, 1, r.Totals[finding.Gap], "the entry for the site without gaps fits nothing")
	require.Len(t, own(r), 1)
	assert.Equal(t, "larch-street", own(r)[0].Site)
}

// TestUnusedOnlyWhereAllIsJudged: of a part it cannot be told what fits nothing.
func TestUnusedOnlyWhereAllIsJudged(t *testing.T) {
	text := "- id: f-00000000\n  " + approved + "- {match: {site: larch-street}, reason: The order is placed., until: 2026-12-31}\n"
	for name, c := range map[string]struct {
		change func(*judge.Options)
		want   []string
	}{
		"all":           {nil, []string{"accepted-gap-unused", "accepted-gap-unapproved"}},
		"one site":      {func(o *judge.Options) { o.Sites = []string{"kiln-hill"} }, nil},
		"another site":  {func(o *judge.Options) { o.Sites = []string{"larch-street"} }, []string{"accepted-gap-unapproved"}},
		"by one bundle": {func(o *judge.Options) { o.Bundle = "us-osha-general-industry" }, []string{"accepted-gap-unapproved"}},
	} {
		var got []string
		for _, f := range own(checkWith(t, text, c.change)) {
			got = append(got, f.Duty)
		}
		assert.Equal(t, c.want, got, name)
	}
}

// TestTheIDsOfOwnFindingsFollowTheEntry and not its place in the file.
func TestTheIDsOfOwnFindingsFollowTheEntry(t *testing.T) {
	entry := "- {id: f-00000000, reason: The order is placed., approved_by: x, until: 2026-06-29}\n"
	first, later := own(checkWith(t, entry, nil)), own(checkWith(t, "# moved\n\n"+entry, func(o *judge.Options) { o.Sites = []string{"kiln-hill"} }))
	require.Len(t, first, 1)
	require.Len(t, later, 1)
	assert.Equal(t, first[0].ID, later[0].ID)
	assert.NotEqual(t, first[0].Evidence, later[0].Evidence)
}

func TestAcceptedGapsAreTheSameAtAnySpeed(t *testing.T) {
	text := "- match: {duty: annual-training}\n  " + approved + "- match: {site: kiln-hill, subject: 'K01*'}\n  " + approved
	var texts []string
	for _, n := range []int{1, 4} {
		text, err := json.Marshal(checkWith(t, text, func(o *judge.Options) { o.Parallel = n }))
		require.NoError(t, err)
		texts = append(texts, string(text))
	}
	assert.Equal(t, texts[0], texts[1])
}

func TestExplainSaysWhatIsAccepted(t *testing.T) {
	o := demoOptions(t)
	o.Accepted = acceptedList(t, "- id: f-0e2eec7d\n  "+approved+"- {id: f-00000000, reason: The order is placed., approved_by: x, until: 2026-06-29}\n")
	e, err := judge.Explain(context.Background(), o, "f-0e2eec7d")
	require.NoError(t, err)
	require.NotNil(t, e.Finding.Accepted)
	assert.Equal(t, "plant manager", e.Finding.Accepted.ApprovedBy)
	r, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	e, err = judge.Explain(context.Background(), o, own(r)[0].ID)
	require.NoError(t, err)
	assert.Equal(t, own(r)[0], e.Finding)
	assert.Equal(t, "Accepted gap that expired", e.Duty.Title)
}
