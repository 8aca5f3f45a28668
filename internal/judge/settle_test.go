package judge

import (
	"testing"

	"github.com/open-policy-agent/opa/v1/ast"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

// settleText settles an obligation written as Rego, as of a day, for a dossier with some series.
func settleText(t *testing.T, asOf, text string, series map[string][]string) []outcome {
	t.Helper()
	fsys := bundletest.Small()
	bundletest.Change(fsys, "small/parameters/data.yaml", "posting_time:",
		`year: {about: a year, values: [{from: "1990-01-01", value: {months: 12}, cite: N, seen: text}]}
half_year: {about: half a year, values: [{from: "1990-01-01", value: {months: 6}, cite: N, seen: text}]}
calendar_year: {about: a calendar year, values: [{from: "1990-01-01", value: {calendar_years: 1}, cite: N, seen: text}]}
changing: {about: changing, unit: dB, values: [{from: "2000-01-01", to: "2010-01-01", value: 90, cite: N, seen: text}, {from: "2010-01-01", value: 85, cite: N, seen: memory}]}
posting_time:`)
	bundletest.Change(fsys, "small/parameters/data.yaml", "posting_time:",
		`working: {about: five working days, values: [{from: "1990-01-01", value: {working_days: 5}, cite: N, seen: text}]}
posting_time:`)
	bundletest.Change(fsys, "small/measures/data.yaml", "training:",
		`working_days: {rest: [saturday, sunday], holidays: [{date: "2026-01-01", name: New Year}], known_until: "2026-12-31", cite: N}
training:`)
	b, problems := bundle.Load(fsys, "small")
	require.NoError(t, problems.Err())
	file := &dossier.File{Kind: "worker", ID: "w1", Series: map[string][]dossier.Link{}, Refs: dossier.NewRefs()}
	for name, days := range series {
		for _, d := range days {
			file.Series[name] = append(file.Series[name], dossier.Link{Date: calendar.MustParse(d), Ref: name + "@" + d})
			file.Uses = append(file.Uses, dossier.Tally{Date: calendar.MustParse(d), Tests: 2, Workers: 1})
		}
	}
	o, err := readObligation(ast.MustParseTerm(text))
	require.NoError(t, err)
	s := &settler{bundle: b, file: file, asOf: calendar.MustParse(asOf)}
	return s.settle(o)
}

// statuses writes outcomes as "key status due done".
func statuses(outcomes []outcome) []string {
	out := []string{}
	for _, o := range outcomes {
		out = append(out, o.key+" "+string(o.status)+" "+o.due.String()+" "+o.done.String())
	}
	return out
}

func TestOnceOnTheBoundaryDays(t *testing.T) {
	by := func(day string) string {
		return `{"within": "posting_time", "after": "2026-01-10", "by": {"date": "` + day + `", "ref": "r"}}`
	}
	const open = `{"within": "posting_time", "after": "2026-01-10", "by": null}`
	for _, c := range []struct{ asOf, text, want string }{
		{"2026-06-30", by("2026-02-09"), "2026-01-10 met 2026-02-09 2026-02-09"},
		{"2026-06-30", by("2026-02-10"), "2026-01-10 late 2026-02-09 2026-02-10"},
		{"2026-06-30", by("2025-01-01"), "2026-01-10 met 2026-02-09 2025-01-01"},
		{"2026-02-09", open, "2026-01-10 due 2026-02-09 "},
		{"2026-02-10", open, "2026-01-10 gap 2026-02-09 "},
		{"2026-02-10", `{"after": "2026-01-10", "by": null, "key": "k"}`, "k gap  "},
		{"2026-02-10", `{"after": "2026-01-10", "by": {"date": "2026-02-01", "ref": "r"}}`, "2026-01-10 met  2026-02-01"},
		{"2026-02-12", `{"within": "posting_time", "after": "2026-01-10", "by": null, "no_sooner_than": "2026-02-12"}`, "2026-01-10 due 2026-02-12 "},
		{"2026-02-13", `{"within": "posting_time", "after": "2026-01-10", "by": null, "no_sooner_than": "2026-02-12"}`, "2026-01-10 gap 2026-02-12 "},
		{"2025-03-01", `{"within": "half_year", "after": "2024-08-31", "by": null}`, "2024-08-31 gap 2025-02-28 "},
		{"2024-02-29", `{"within": "half_year", "after": "2023-08-31", "by": null}`, "2023-08-31 due 2024-02-29 "},
		{"2025-02-28", `{"within": "year", "after": "2024-02-29", "by": null}`, "2024-02-29 due 2025-02-28 "},
	} {
		assert.Equal(t, []string{c.want}, statuses(settleText(t, c.asOf, c.text, nil)), c.text)
	}
}

func TestOnceEndsWithItsSpell(t *testing.T) {
	text := func(to string) string {
		return `{"within": "posting_time", "after": "2026-01-10", "by": null, "during": {"from": "2026-01-10", "to": "` + to + `"}}`
	}
	assert.Empty(t, settleText(t, "2026-06-30", text("2026-02-09"), nil), "the last day, 9 February, is no day of the spell any more")
	assert.Equal(t, []string{"2026-01-10 gap 2026-02-09 "}, statuses(settleText(t, "2026-06-30", text("2026-02-10"), nil)))
	after := `{"within": "posting_time", "after": "2026-01-10", "by": "protector.issue", "during": {"from": "2026-01-10", "to": "2026-02-01"}}`
	assert.Empty(t, settleText(t, "2026-06-30", after, map[string][]string{"protector.issue": {"2026-05-01"}}), "what comes after the spell is not late for it")
}

func TestOnceByTheFirstOfSeveralSeries(t *testing.T) {
	text := `{"within": "posting_time", "after": "2026-01-10", "by": ["audiogram.baseline", "protector.issue"]}`
	got := settleText(t, "2026-06-30", text, map[string][]string{"audiogram.baseline": {"2026-03-01"}, "protector.issue": {"2026-02-01", "2026-02-20"}})
	assert.Equal(t, []string{"2026-01-10 met 2026-02-09 2026-02-01"}, statuses(got))
	assert.Equal(t, []string{"protector.issue@2026-02-01"}, got[0].refs)
}

func TestRecurringPeriodByPeriod(t *testing.T) {
	text := func(to string) string {
		return `{"every": "year", "by": "audiogram.valid", "touches": "test.use", "during": {"from": "2020-01-31", "to": ` + to + `}}`
	}
	tests := map[string][]string{"audiogram.valid": {"2020-01-31", "2021-01-31", "2022-02-01", "2023-01-15"}}
	assert.Equal(t, []string{
		"2020-01-31 met 2021-01-31 2021-01-31",
		"2021-01-31 late 2022-01-31 2022-02-01",
		"2022-02-01 met 2023-02-01 2023-01-15",
		"2023-01-15 due 2024-01-15 ",
	}, statuses(settleText(t, "2024-01-15", text("null"), tests)))
	last := settleText(t, "2024-01-16", text("null"), tests)[3]
	assert.Equal(t, "2023-01-15 gap 2024-01-15 ", statuses([]outcome{last})[0])
	assert.Len(t, settleText(t, "2024-06-30", text(`"2024-01-15"`), tests), 3, "the last period ends with the spell")
	assert.Len(t, settleText(t, "2024-06-30", text(`"2024-01-16"`), tests), 4)
	assert.Equal(t, []string{"2020-01-31 gap 2021-01-31 "}, statuses(settleText(t, "2024-01-15", text("null"), nil)))
}

func TestRecurringByCalendarYear(t *testing.T) {
	text := `{"every": "calendar_year", "by": "audiogram.valid", "during": {"from": "2020-03-05", "to": null}}`
	got := settleText(t, "2022-12-31", text, map[string][]string{"audiogram.valid": {"2021-12-31"}})
	assert.Equal(t, []string{"2020-03-05 met 2021-12-31 2021-12-31", "2021-12-31 due 2022-12-31 "}, statuses(got))
	assert.Equal(t, finding.Gap, settleText(t, "2023-01-01", text, map[string][]string{"audiogram.valid": {"2021-12-31"}})[1].status)
}

func TestRecurringCountsWhatAMissedPeriodTouches(t *testing.T) {
	text := `{"every": "year", "by": "calibration.acoustic", "touches": "test.use", "during": {"from": "2020-01-01", "to": null}}`
	got := settleText(t, "2022-06-30", text, map[string][]string{
		"calibration.acoustic": {"2021-03-01"}, "test.use": {"2020-12-31", "2021-01-01", "2021-01-02", "2021-02-28", "2021-04-01"},
	})
	require.Equal(t, finding.Late, got[0].status)
	assert.Equal(t, map[string]any{"counted_from": "2020-01-01", "tests_touched": 4, "days_touched": 2}, got[0].facts, "two days, 2 January and 28 February, with two tests each")
}

func TestLimits(t *testing.T) {
	for _, c := range []struct {
		text string
		want finding.Status
	}{
		{`{"value": 50, "at_most": "dose"}`, finding.Met},
		{`{"value": 50.000001, "at_most": "dose"}`, finding.Gap},
		{`{"value": 50, "below": "dose"}`, finding.Gap},
		{`{"value": 49.9, "below": "dose"}`, finding.Met},
		{`{"value": 50, "at_least": "dose"}`, finding.Met},
		{`{"value": 49.999, "at_least": "dose"}`, finding.Gap},
		{`{"value": 50, "above": "dose"}`, finding.Gap},
		{`{"value": 50.1, "above": "dose"}`, finding.Met},
		{`{"value": 87, "at_most": "changing", "on": "2009-12-31"}`, finding.Met},
		{`{"value": 87, "at_most": "changing", "on": "2010-01-01"}`, finding.Gap},
		{`{"value": null, "at_most": "dose"}`, finding.Unproven},
	} {
		got := settleText(t, "2026-06-30", c.text, nil)
		require.Len(t, got, 1)
		assert.Equal(t, c.want, got[0].status, c.text)
	}
}

// TestParameterInFactsCarriesItsMark shows that a value from memory is visible where it decides.
func TestParameterInFactsCarriesItsMark(t *testing.T) {
	got := settleText(t, "2026-06-30", `{"value": 87, "at_most": "changing"}`, nil)[0]
	facts := map[string]any{}
	got.parameterFacts(facts)
	assert.Equal(t, map[string]any{"value": float64(85), "unit": "dB", "cite": "N", "seen": "memory", "from": "2010-01-01"}, facts["changing"])
}

func TestConditionThatLastsForATime(t *testing.T) {
	text := `{"holds": false, "on": "2024-06-30", "for": "year"}`
	assert.Equal(t, finding.Gap, settleText(t, "2025-06-30", text, nil)[0].status)
	assert.Empty(t, settleText(t, "2025-07-01", text, nil))
}

func TestOpinionAndLifted(t *testing.T) {
	open := settleText(t, "2026-06-30", `{"ask": "is it work-related?", "of": "physician", "by": null, "key": "a"}`, nil)[0]
	assert.Equal(t, finding.Opinion, open.status)
	assert.Contains(t, open.message, "is it work-related?")
	assert.Equal(t, finding.Met, settleText(t, "2026-06-30", `{"ask": "is it?", "of": "physician", "by": {"date": "2026-01-01", "ref": "r"}}`, nil)[0].status)
	l := settleText(t, "2026-06-30", `{"lifted": "a physician found it not work-related", "cite": "N 9", "key": "b"}`, nil)[0]
	assert.Equal(t, finding.Lifted, l.status)
	assert.Equal(t, "N 9", l.cite)
}

// TestWorkingDays counts five working days over a holiday and a weekend: 31 December 2025 is a Wednesday,
// so that 2, 5, 6, 7 and 8 January count.
func TestWorkingDays(t *testing.T) {
	open := func(after string) string { return `{"within": "working", "after": "` + after + `", "by": null}` }
	assert.Equal(t, []string{"2025-12-31 due 2026-01-08 "}, statuses(settleText(t, "2026-01-08", open("2025-12-31"), nil)))
	assert.Equal(t, []string{"2025-12-31 gap 2026-01-08 "}, statuses(settleText(t, "2026-01-09", open("2025-12-31"), nil)))
	unknown := settleText(t, "2027-06-30", open("2026-12-28"), nil)
	assert.Equal(t, finding.Unproven, unknown[0].status)
	assert.Contains(t, unknown[0].message, "working days are not known after 2026-12-31")
}

func TestDoneBeforeADay(t *testing.T) {
	const open = `{"before": "2026-05-01", "within": "half_year", "by": "audiogram.valid"}`
	for _, c := range []struct {
		asOf, text, done, want string
	}{
		{"2026-06-30", open, "2025-11-01", "2026-05-01 met 2026-04-30 2025-11-01"},
		{"2026-06-30", open, "2026-04-30", "2026-05-01 met 2026-04-30 2026-04-30"},
		{"2026-06-30", open, "2026-05-01", "2026-05-01 late 2026-04-30 2026-05-01"},
		{"2026-06-30", open, "2025-10-31", "2026-05-01 gap 2026-04-30 "},
		{"2026-04-30", open, "2025-10-31", "2026-05-01 due 2026-04-30 "},
		{"2026-05-01", `{"before": "2026-05-01", "by": null}`, "", "2026-05-01 gap 2026-04-30 "},
		{"2026-06-30", `{"before": "2026-05-01", "by": {"date": "2001-01-01", "ref": "r"}}`, "", "2026-05-01 met 2026-04-30 2001-01-01"},
		{"2026-06-30", `{"before": null, "by": null, "key": "k"}`, "", "k unproven  "},
		{"2026-06-30", `{"before": "2026-05-01", "within": "working", "by": null}`, "", "2026-05-01 unproven  "},
	} {
		series := map[string][]string{}
		if c.done != "" {
			series["audiogram.valid"] = []string{c.done}
		}
		assert.Equal(t, []string{c.want}, statuses(settleText(t, c.asOf, c.text, series)), "%s %s", c.text, c.done)
	}
	early := settleText(t, "2026-06-30", open, map[string][]string{"audiogram.valid": {"2025-10-30", "2025-10-31"}})[0]
	assert.Equal(t, map[string]any{"not_before": "2025-11-01", "done_too_early": "2025-10-31"}, early.facts)
	assert.Equal(t, []string{"audiogram.valid@2025-10-31"}, early.refs)
	ended := `{"before": "2026-05-01", "by": null, "during": {"from": "2026-01-01", "to": "2026-04-30"}}`
	assert.Empty(t, settleText(t, "2026-06-30", ended, nil), "the last day, 30 April, is no day of the spell any more")
}

func TestNoLaterThanADay(t *testing.T) {
	text := func(day string) string {
		return `{"within": "posting_time", "after": "2026-01-10", "by": null, "no_later_than": ` + day + `}`
	}
	assert.Equal(t, []string{"2026-01-10 due 2026-02-01 "}, statuses(settleText(t, "2026-02-01", text(`"2026-02-01"`), nil)))
	assert.Equal(t, []string{"2026-01-10 gap 2026-02-01 "}, statuses(settleText(t, "2026-02-02", text(`"2026-02-01"`), nil)))
	assert.Equal(t, []string{"2026-01-10 gap 2026-02-09 "}, statuses(settleText(t, "2026-02-10", text(`"2026-03-01"`), nil)), "a later day gives no more time")
	assert.Equal(t, []string{"2026-01-10 due 2026-02-09 "}, statuses(settleText(t, "2026-02-09", text(`null`), nil)))
}

func TestRecurringWithALaterInterval(t *testing.T) {
	text := `{"every": "half_year", "until": "year", "then": "year", "by": "audiogram.valid", "during": {"from": "2020-01-01", "to": null}}`
	tests := map[string][]string{"audiogram.valid": {"2020-07-01", "2020-12-31", "2021-06-30", "2022-06-30"}}
	assert.Equal(t, []string{
		"2020-01-01 met 2020-07-01 2020-07-01",
		"2020-07-01 met 2021-01-01 2020-12-31",
		"2020-12-31 met 2021-06-30 2021-06-30", // the clock starts a day before the change
		"2021-06-30 met 2022-06-30 2022-06-30",
		"2022-06-30 due 2023-06-30 ",
	}, statuses(settleText(t, "2022-07-01", text, tests)))
	since := `{"every": "half_year", "until": "year", "then": "year", "since": "2019-01-01", "by": "audiogram.valid", "during": {"from": "2020-01-01", "to": null}}`
	assert.Equal(t, "2020-01-01 due 2021-01-01 ", statuses(settleText(t, "2020-02-01", since, nil))[0])
	first := `{"first": "half_year", "every": "year", "until": "year", "then": "year", "since": "2010-01-01", "by": "audiogram.valid", "during": {"from": "2020-01-01", "to": null}}`
	assert.Equal(t, "2020-01-01 due 2020-07-01 ", statuses(settleText(t, "2020-02-01", first, nil))[0], "the first interval stays the first")
	for _, wrong := range []string{
		`{"every": "year", "until": "year", "by": "audiogram.valid", "during": {"from": "2020-01-01", "to": null}}`,
		`{"after": "2020-01-01", "before": "2021-01-01", "by": null}`,
		`{"within": "year", "by": null}`,
	} {
		_, err := readObligation(ast.MustParseTerm(wrong))
		assert.Error(t, err, wrong)
	}
}
