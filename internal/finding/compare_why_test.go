package finding

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// parameter is the fact of a parameter with its value.
func parameter(months float64) map[string]any {
	return map[string]any{"value": map[string]any{"months": months}, "unit": "", "cite": "(k)(2)", "seen": "text"}
}

func TestWhy(t *testing.T) {
	same := func(*Report, *Report) {}
	for name, c := range map[string]struct {
		old, new []Finding
		change   func(o, n *Report)
		kind     string
		says     string
	}{
		"a record arrived": {[]Finding{found("f-1", Unproven)}, []Finding{found("f-1", Gap, rests("training/K1@2026-05-01"))}, same,
			"record_arrived", "The record training/K1@2026-05-01 (t.csv:2) counts now and did not before."},
		"a record of a later day": {nil, []Finding{found("f-1", Gap, rests("training/K1@2026-05-01"))}, same,
			"record_arrived", "The record training/K1@2026-05-01 (t.csv:2) is of a day after the old report."},
		"a record is gone": {[]Finding{found("f-1", Met, rests("training/K1@2025-05-01"))}, []Finding{found("f-1", Gap)}, same,
			"record_gone", "The record training/K1@2025-05-01 (t.csv:2) counted before and does not now."},
		"the day passed": {[]Finding{found("f-1", Due, due("2026-05-01"))}, []Finding{found("f-1", Gap, due("2026-05-01"))}, same,
			"date_passed", "Its last day, 2026-05-01, passed between the reports."},
		"the day passed, not listed before": {nil, []Finding{found("f-1", Gap, due("2026-05-01"))}, same, "date_passed", "Its last day, 2026-05-01, passed"},
		"the day was moved": {[]Finding{found("f-1", Due, due("2026-08-01"))}, []Finding{found("f-1", Gap, due("2026-02-01"))}, same,
			"day_moved", "Its last day was 2026-08-01 and is 2026-02-01."},
		"a parameter changed": {[]Finding{found("f-1", Met, fact("interval", parameter(12)))}, []Finding{found("f-1", Gap, fact("interval", parameter(6)))}, same,
			"parameter_changed", "The parameter interval was 12 months and is 6 months ((k)(2))."},
		"the revision changed": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(_, n *Report) { n.Bundles[0].Revision = "2" },
			"bundle_changed", "The bundle b changed from revision 1 to 2."},
		"the files of the bundle changed": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(_, n *Report) { n.Bundles[0].SHA256 = "bb" },
			"bundle_changed", "The files of the bundle b changed, though the revision is still 1."},
		"a new duty": {nil, []Finding{found("f-1", Gap)}, func(o, _ *Report) { o.Duties[0].ID = "other" },
			"duty_new", "The bundle b did not have this duty when the old report was written."},
		"a duty is gone": {[]Finding{found("f-1", Gap)}, nil, func(_, n *Report) { n.Duties[0].ID = "other" },
			"duty_gone", "The bundle b no longer has this duty."},
		"a choice changed": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(_, n *Report) { n.Sites[0].Choices["annual"] = "calendar_year" },
			"choice_changed", "The choice annual of the site was twelve_months and is calendar_year."},
		"a new choice": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(_, n *Report) { n.Sites[0].Choices["van"] = true },
			"choice_changed", "The choice van of the site was not there and is true."},
		"accepted": {[]Finding{found("f-1", Gap)}, []Finding{found("f-1", Gap, accept("2026-12-31"))}, same,
			"acceptance", "The employer accepted it until 2026-12-31, approved by manager: It is ordered."},
		"accepted for longer": {[]Finding{found("f-1", Gap, accept("2026-07-31"))}, []Finding{found("f-1", Gap, accept("2026-12-31"))}, same,
			"acceptance", "It was accepted until 2026-07-31, and is until 2026-12-31."},
		"the acceptance ended": {[]Finding{found("f-1", Gap, accept("2026-05-31"))}, []Finding{found("f-1", Gap)}, same,
			"acceptance", "The acceptance ended on 2026-05-31."},
		"the acceptance was taken back": {[]Finding{found("f-1", Gap, accept("2026-12-31"))}, []Finding{found("f-1", Gap)}, same,
			"acceptance", "It was accepted until 2026-12-31, and no entry accepts it now."},
		"facts changed": {[]Finding{found("f-1", Met, fact("level_dba", 84.0))}, []Finding{found("f-1", Gap, fact("level_dba", 91.5), fact("shift", "yes"))}, same,
			"facts_changed", "The facts changed: level was 84 dBA and is 91.5 dBA; shift was not known and is yes."},
		"figures of hearing changed": {[]Finding{found("f-1", Met, func(f *Finding) { f.Health = map[string]any{"left_db": 9.5} })},
			[]Finding{found("f-1", Gap, func(f *Finding) { f.Health = map[string]any{"left_db": 11.5} })}, same, "facts_changed", "The audiometric figures changed."},
		"a file changed": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(_, n *Report) { n.Inputs[0].Records = 9 },
			"file_changed", "t.csv changed: it had 10 records, and has 9."},
		"a cell changed": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, same, "file_changed", "t.csv changed, and still has 10 records."},
		"a file is new":  {nil, []Finding{found("f-1", Gap)}, func(o, _ *Report) { o.Inputs = o.Inputs[1:] }, "file_changed", "t.csv was not read before."},
		"a file is gone": {[]Finding{found("f-1", Gap)}, nil, func(_, n *Report) { n.Inputs = n.Inputs[1:] }, "file_changed", "t.csv was read before, and is not now."},
		"only the day": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(o, n *Report) { n.Inputs = o.Inputs },
			"later_day", "Both reports were made from the same files; what they say of 2026-06-30 differs from what they say of 2026-03-31."},
		"nothing tells": {[]Finding{found("f-1", Met)}, []Finding{found("f-1", Gap)}, func(o, n *Report) { o.Inputs, n.Inputs = nil, nil },
			"not_told", "Nothing in the two reports tells why."},
	} {
		t.Run(name, func(t *testing.T) {
			o, n := made(march, listsAll, c.old...), made(june, listsAll, c.new...)
			c.change(o, n)
			got := compare(t, o, n)
			require.Len(t, got.Changes, 1)
			var kinds []string
			for _, w := range got.Changes[0].Why {
				kinds = append(kinds, w.Kind)
			}
			assert.Contains(t, kinds, c.kind)
			assert.Contains(t, texts(got), c.says)
			assert.NotContains(t, texts(got), "11.5")
		})
	}
}

func TestRecordNamesItsPlace(t *testing.T) {
	sheet := func(f *Finding) { f.Evidence = []Evidence{{Record: "training/1", File: "t.xlsx", Sheet: "A", Row: 7}} }
	c := compare(t, made(march, listsAll, found("f-1", Unproven)), made(june, listsAll, found("f-1", Gap, sheet)))
	assert.Equal(t, Cause{Kind: "record_arrived", Text: "The record training/1 (t.xlsx A!7) counts now and did not before.", Record: "training/1", File: "t.xlsx", Sheet: "A", Row: 7},
		c.Changes[0].Why[0])
}

func TestNotes(t *testing.T) {
	for name, c := range map[string]struct {
		change func(o, n *Report)
		says   string
	}{
		"titles":   {func(_, n *Report) { n.Program = "Q" }, `different titles: "P" and "Q"`},
		"versions": {func(_, n *Report) { n.Tool.Version = "2" }, "Different versions of hearduty wrote the reports: 1 and 2."},
		"order":    {func(o, n *Report) { o.AsOf, n.AsOf = n.AsOf, o.AsOf }, "are they the wrong way round?"},
		"lists":    {func(_, n *Report) { n.Listed = listsAll }, "The reports list differently. Old: " + listsSome + ". New: " + listsAll + "."},
		"bundle":   {func(_, n *Report) { n.Bundles[0].Revision = "2" }, "The bundle b changed from revision 1 to 2."},
		"files":    {func(o, n *Report) { n.Inputs = o.Inputs }, "Both reports were made from the same files."},
		"rejects":  {func(_, n *Report) { n.Rejects = make([]Reject, 2) }, "2 rows of the new records could not be used, before 0"},
		"unclear":  {func(_, n *Report) { n.Findings = nil }, "of 1 finding it cannot be told whether anything changed"},
	} {
		o, n := made(march, listsSome, found("f-1", Gap)), made(june, listsSome, found("f-1", Gap))
		assert.NotContains(t, texts(compare(t, o, n)), c.says, name)
		c.change(o, n)
		assert.Contains(t, texts(compare(t, o, n)), c.says, name)
	}
}

// TestSitesApart: what only one report judged is told apart, and is neither opened nor closed.
func TestSitesApart(t *testing.T) {
	o, n := made(march, listsSome, found("f-1", Gap)), made(june, listsSome, found("f-1", Gap))
	other := found("f-2", Gap)
	other.Site = "z"
	n.Sites = append(n.Sites, Site{ID: "z", Bundles: []string{"b"}})
	n.Findings = append(n.Findings, other)
	n.Counts = append(n.Counts, Count{Site: "z", Bundle: "b", Topic: "training", Status: Gap, Number: 1})
	c := compare(t, o, n)
	assert.Equal(t, map[ChangeKind]int{StillOpen: 1}, c.Numbers)
	assert.Equal(t, []Apart{{"z", "b", "new", 1}}, c.Apart)
	assert.Equal(t, "Only the new report judged site z by b; its 1 open finding there is not compared.", c.Notes[0])
	assert.False(t, c.Worse())

	c = compare(t, n, o)
	assert.Equal(t, []Apart{{"z", "b", "old", 1}}, c.Apart)
	assert.Zero(t, c.Numbers[Closed])

	n.Sites[0].Bundles, n.Sites = []string{"other"}, n.Sites[:1]
	_, err := CompareReports(o, n, Tool{})
	assert.ErrorIs(t, err, ErrNothingInCommon)
}

// TestOrder: the worst stands first, and the same reports give the same comparison.
func TestOrder(t *testing.T) {
	o := made(march, listsAll, found("f-1", Gap), found("f-2", Met), found("f-3", Unproven))
	n := made(june, listsAll, found("f-1", Met), found("f-2", Gap), found("f-3", Gap))
	var kinds []ChangeKind
	for _, x := range compare(t, o, n).Changes {
		kinds = append(kinds, x.Kind)
	}
	assert.Equal(t, []ChangeKind{Opened, Worsened, Closed}, kinds)
	assert.Equal(t, compare(t, o, n), compare(t, o, n))
}
