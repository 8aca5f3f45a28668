package finding

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
)

var day = calendar.MustParse

const (
	listsSome = "all findings but those that are met or lifted, and those due in more than 90 days"
	listsAll  = "all findings and observations"
)

// made is a report of one site under one bundle with these findings; what it does not list is counted beside.
func made(asOf, listed string, findings ...Finding) *Report {
	r := &Report{
		Tool: Tool{Name: "hearduty", Version: "1"}, Program: "P", AsOf: day(asOf), Cautions: []string{"Professionals decide."}, Listed: listed,
		Sites:   []Site{{ID: "s", Bundles: []string{"b"}, Choices: map[string]any{"annual": "twelve_months"}}},
		Bundles: []Bundle{{ID: "b", Revision: "1", SHA256: "aa"}},
		Inputs:  []Input{{File: "t.csv", Kind: "training", SHA256: asOf, Records: 10}, {File: "w.csv", Kind: "worker", SHA256: "w", Records: 3}},
		Duties:  []Duty{{Bundle: "b", ID: "d", Topic: "training", Evidence: []string{"training"}}},
		Totals:  map[Status]int{}, AcceptedTotals: map[Status]int{}, Findings: findings,
	}
	for i := range findings {
		if f := &findings[i]; f.Accepted == nil {
			r.count(f.Status, 1)
		}
	}
	return r
}

// count adds findings to the numbers without listing them.
func (r *Report) count(s Status, n int) *Report {
	r.Totals[s] += n
	r.Counts = append(r.Counts, Count{Site: "s", Bundle: "b", Topic: "training", Status: s, Number: n})
	return r
}

func found(id string, s Status, changes ...func(*Finding)) Finding {
	f := Finding{ID: id, Site: "s", Bundle: "b", Duty: "d", Topic: "training", Subject: Subject{"worker", "K1"}, Status: s, Severity: "major",
		Message: "words", Facts: map[string]any{}}
	for _, change := range changes {
		change(&f)
	}
	return f
}

func due(text string) func(*Finding) { return func(f *Finding) { f.Due = day(text) } }

func rests(records ...string) func(*Finding) {
	return func(f *Finding) {
		for i, r := range records {
			f.Evidence = append(f.Evidence, Evidence{Record: r, File: "t.csv", Row: i + 2})
		}
	}
}

func fact(name string, v any) func(*Finding) { return func(f *Finding) { f.Facts[name] = v } }

func accept(until string) func(*Finding) {
	return func(f *Finding) {
		f.Accepted = &Acceptance{Reason: "It is ordered", ApprovedBy: "manager", Until: day(until)}
	}
}

func compare(t *testing.T, old, new *Report) *Comparison {
	t.Helper()
	c, err := CompareReports(old, new, Tool{Name: "hearduty", Version: "1"})
	require.NoError(t, err)
	return c
}

const (
	march = "2026-03-31"
	june  = "2026-06-30"
)

// TestKinds goes through the pairs of statuses, listed and not.
func TestKinds(t *testing.T) {
	one := func(s Status, changes ...func(*Finding)) []Finding { return []Finding{found("f-1", s, changes...)} }
	for name, c := range map[string]struct {
		old, new []Finding
		want     ChangeKind
		worse    bool
	}{
		"gap from met":              {one(Met), one(Gap), Opened, true},
		"gap from due":              {one(Due), one(Gap), Opened, true},
		"gap from nothing":          {nil, one(Gap), Opened, true},
		"opinion from late":         {one(Late), one(Opinion), Opened, true},
		"gap from unproven":         {one(Unproven), one(Gap), Worsened, true},
		"unproven from opinion":     {one(Opinion), one(Unproven), Worsened, true},
		"late from met":             {one(Met), one(Late), Worsened, true},
		"unproven from gap":         {one(Gap), one(Unproven), Eased, false},
		"met from late":             {one(Late), one(Met), Eased, false},
		"met from due":              {one(Due), one(Met), Eased, false},
		"late from due":             {one(Due), one(Late), NewlyLate, false},
		"late from nothing":         {nil, one(Late), NewlyLate, false},
		"due from met":              {one(Met), one(Due), NewlyDue, false},
		"due from nothing":          {nil, one(Due, due("2026-07-05")), NewlyDue, false},
		"late from gap":             {one(Gap), one(Late), Closed, false},
		"met from gap":              {one(Gap), one(Met), Closed, false},
		"due from gap":              {one(Gap), one(Due), Closed, false},
		"nothing from gap":          {one(Gap), nil, Closed, false},
		"gap from gap":              {one(Gap), one(Gap), StillOpen, false},
		"met from met":              {one(Met), one(Met), "", false},
		"due from due":              {one(Due), one(Due), "", false},
		"accepted from gap":         {one(Gap), one(Gap, accept("2026-12-31")), NewlyAccepted, false},
		"accepted from nothing":     {nil, one(Gap, accept("2026-12-31")), NewlyAccepted, false},
		"accepted as before":        {one(Gap, accept("2026-12-31")), one(Gap, accept("2026-12-31")), StillAccepted, false},
		"gap from accepted":         {one(Gap, accept("2026-05-31")), one(Gap), NoLongerAccepted, true},
		"late from accepted late":   {one(Late, accept("2026-05-31")), one(Late), NoLongerAccepted, false},
		"late from accepted gap":    {one(Gap, accept("2026-05-31")), one(Late), Closed, false},
		"met from accepted gap":     {one(Gap, accept("2026-05-31")), one(Met), Closed, false},
		"nothing from accepted gap": {one(Gap, accept("2026-12-31")), nil, Closed, false},
		"nothing from met":          {one(Met), nil, "", false},
		"nothing from late":         {one(Late), nil, Eased, false},
		"lifted from gap":           {one(Gap), one(Lifted), Closed, false},
		"gap from lifted":           {one(Lifted), one(Gap), Opened, true},
	} {
		for _, listed := range []string{listsSome, listsAll} {
			got := compare(t, made(march, listed, c.old...), made(june, listed, c.new...))
			assert.Equal(t, c.worse, got.Worse(), name)
			if c.want == "" {
				assert.Empty(t, got.Changes, name)
				continue
			}
			require.Len(t, got.Changes, 1, name)
			assert.Equal(t, c.want, got.Changes[0].Kind, name)
			assert.Equal(t, map[ChangeKind]int{c.want: 1}, got.Numbers, name)
			assert.NotEmpty(t, c.want.Meaning(), name)
			if c.want != StillOpen && c.want != StillAccepted {
				assert.NotEmpty(t, got.Changes[0].Why, name)
			}
		}
	}
}

// TestWhatIsOnlyUnlisted: what one report may only leave out is neither opened nor closed.
func TestWhatIsOnlyUnlisted(t *testing.T) {
	gap := found("f-1", Gap)
	for name, c := range map[string]struct {
		old, new *Report
		want     ChangeKind
		says     string
	}{
		"met may be left out":         {made(march, listsSome, gap), made(june, listsSome).count(Met, 5), Closed, "In the new report it is met or no longer owed; that report does not list which."},
		"due later may be left out":   {made(march, listsSome, gap), made(june, listsSome).count(Due, 1), Closed, "In the new report it is due later or no longer owed"},
		"nothing is left out":         {made(march, listsSome, gap), made(june, listsAll), Closed, "The new report has no such finding"},
		"gaps are left out":           {made(march, listsSome, gap), made(june, listsSome).count(Gap, 1), Unclear, "In the new report it is gap or no longer owed"},
		"unproven ones are left out":  {made(march, listsSome, gap), made(june, "something else").count(Unproven, 1), Unclear, "unproven"},
		"gaps were left out":          {made(march, listsSome).count(Gap, 1), made(june, listsSome, gap), Unclear, "In the old report it is gap or not owed"},
		"met was left out":            {made(march, listsSome).count(Met, 1), made(june, listsSome, gap), Opened, ""},
		"another topic is left out":   {made(march, listsSome, gap), elsewhere(made(june, listsSome)), Closed, ""},
		"the topic moved":             {made(march, listsSome, gap), moved(made(june, listsSome)), Unclear, ""},
		"due, and gaps are left out":  {made(march, listsSome, found("f-1", Due)), made(june, listsSome).count(Gap, 1), Unclear, ""},
		"late ones may be left out":   {made(march, listsSome).count(Late, 1), made(june, listsSome, found("f-1", Late)), "", ""},
		"late ones are left out":      {made(march, listsSome, found("f-1", Late)), made(june, listsSome).count(Late, 1), "", ""},
		"due within both":             {made(march, listsSome, found("f-1", Due, due("2026-04-30"))), made(june, listsSome).count(Due, 1), Eased, ""},
		"due, the new looks less far": {made(march, listsAll, found("f-1", Due, due("2026-12-30"))), made(june, listsSome).count(Due, 1), "", "1 due finding is not compared"},
		"due, the new looks farther":  {made(march, listsSome).count(Due, 1), made(june, listsAll, found("f-1", Due, due("2026-12-30"))), "", "1 due finding is not compared"},
		"due, nothing was left out":   {made(march, listsSome), made(june, listsAll, found("f-1", Due, due("2026-12-30"))), NewlyDue, ""},
		"due, came near":              {made(march, listsSome).count(Due, 1), made(june, listsSome, found("f-1", Due, due("2026-08-30"))), NewlyDue, "Its last day, 2026-08-30, is now within 90 days."},
	} {
		got := compare(t, c.old, c.new)
		if c.want == "" {
			assert.Empty(t, got.Changes, name)
			if c.says != "" {
				assert.Contains(t, texts(got), c.says, name)
			}
			continue
		}
		require.Len(t, got.Changes, 1, name)
		assert.Equal(t, c.want, got.Changes[0].Kind, name)
		assert.Contains(t, texts(got), c.says, name)
	}
}

func elsewhere(r *Report) *Report {
	r.Counts = append(r.Counts, Count{Site: "s", Bundle: "b", Topic: "notice", Status: Gap, Number: 3})
	return r
}

// moved puts the duty under another topic, where gaps are left out.
func moved(r *Report) *Report {
	r.Duties[0].Topic = "notice"
	return elsewhere(r)
}

// texts gives all notes and reasons.
func texts(c *Comparison) string {
	out := ""
	for _, n := range c.Notes {
		out += n + "\n"
	}
	for _, x := range c.Changes {
		for _, w := range x.Why {
			out += w.Text + "\n"
		}
	}
	return out
}
