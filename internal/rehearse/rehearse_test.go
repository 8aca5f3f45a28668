package rehearse

import (
	"bytes"
	"context"
	"strings"
	"testing"
	"testing/fstest"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
)

const (
	rule  = "small/duty/posting/posting.rego"
	tests = "small/duty/posting/posting_test.rego"
	cases = "small/cases/posting.yaml"
	shown = "small/cases/_base.yaml"

	goodTests = `package duty.posting_test

import data.duty.posting
import rego.v2

test_posted if {
	some o in posting.obligations with input as {"enrolled_now": 0, "workers": 0}
	o.holds == true
}

test_not_posted if {
	some o in posting.obligations with input as {"enrolled_now": 2, "workers": 3}
	o.holds == false
}

test_always_owed if {
	found := posting.obligations with input as {"enrolled_now": 2, "workers": 3}
	count(found) == 1
	reasons := posting.not_owed with input as {"enrolled_now": 2, "workers": 3}
	count(reasons) == 0
}

test_nobody_works_here if {
	reasons := posting.not_owed with input as {"enrolled_now": 0, "workers": 0}
	reasons == {"nobody works here"}
}
`
	goodCases = `# Invented.
- case: Nobody is enrolled
  source: N 1, an invented note
  as_of: 2026-06-30
  like: worker
  expect:
    - {duty: posting, subject: s1, status: met, only: true}
`
	goodBase = "worker:\n  records:\n    worker:\n      - {worker_id: w1, site: s1, hired_on: 2020-01-01}\n"
)

// small is the small bundle with tests and cases that hold and reach every line.
func small() fstest.MapFS {
	fsys := bundletest.Change(bundletest.Small(), rule, `"never" if false`, `"nobody works here" if input.workers == 0`)
	bundletest.Change(fsys, rule, `obligations contains {"holds": input.enrolled_now == 0}`, `obligations contains {"holds": input.enrolled_now == 0} if input.workers >= 0`)
	for file, text := range map[string]string{tests: goodTests, cases: goodCases, shown: goodBase} {
		fsys[file] = &fstest.MapFile{Data: []byte(text)}
	}
	return fsys
}

func try(t *testing.T, fsys fstest.MapFS, o Options) *Result {
	t.Helper()
	b, problems := bundle.Load(fsys, "small")
	require.NoError(t, problems.Err())
	r, err := Run(t.Context(), b, o)
	require.NoError(t, err)
	return r
}

func TestGoodBundleRehearsesGreen(t *testing.T) {
	r := try(t, small(), Options{})
	require.Empty(t, r.Failures)
	assert.Equal(t, Count{Run: 4}, r.Tests)
	assert.Equal(t, Count{Run: 1}, r.Cases)
	assert.Equal(t, 2, r.Lines)
	assert.Equal(t, 2, r.Reached)
	assert.Equal(t, []DutyCases{{ID: "posting", Quiet: 1}}, r.Duties)
	var out bytes.Buffer
	require.NoError(t, r.Write(&out))
	assert.Equal(t, `small, revision 1
  tests of rules   4 of 4 hold
  law cases        1 of 1 hold
  lines of rules   2 of 2 reached by tests
  duties           1 of its own
  without a law case in which the duty fires: posting
  without a law case in which the duty stays quiet: none
  without a law case in which the duty meets its boundary: none
  without a law case in which the duty lacks a record: none
Nothing is wrong.
`, out.String())
}

// TestEachFaultIsToldWithItsPlace spoils one place of the good bundle at a time.
func TestEachFaultIsToldWithItsPlace(t *testing.T) {
	for name, c := range map[string]struct {
		file, old, new string
		want           string // among the failures
		number         int    // of failures
	}{
		"a test that fails": {tests, "o.holds == true", "o.holds == false", `small/duty/posting/posting_test.rego:8: the test duty.posting_test.test_posted fails.
  expected: the test is true
  actual:   o.holds == false
            |
            o.holds: true
            o: {"holds": true}`, 1},
		"a test that is undefined": {tests, "count(found) == 1", "count(found) == 2", "small/duty/posting/posting_test.rego:18: the test duty.posting_test.test_always_owed fails.", 1},
		"a test that is skipped":   {tests, "test_nobody", "todo_test_nobody", "small/duty/posting/posting_test.rego:23: the test duty.posting_test.todo_test_nobody_works_here is skipped. Remove todo_ from its name.", 2},
		"a test that cannot compile": {tests, "reasons == {", "reason == {",
			"small/duty/posting/posting_test.rego:24:2: the test cannot be compiled: assigned var reasons unused", 2},
		"a test of another package": {tests, "package duty.posting_test", "package duty.post_test", "small/duty/posting/posting_test.rego: the package duty.posting_test has 0 of the tests that a duty needs, which are 2 at least.", 1},
		"a line that no test reaches": {rule, "not_owed contains", "not_owed contains \"too many\" if {\n\tinput.workers == 0\n\tinput.enrolled_now > 0\n}\n\nnot_owed contains", `small/duty/posting/posting.rego:17:1: no test reaches this line. Add a test of the rule that comes to it.
  actual:   not_owed contains "too many" if {`, 1},
		"a rule that no duty uses": {rule, "not_owed contains", "spare if input.workers == 0\n\nnot_owed contains", "small/duty/posting/posting.rego:17:1: no duty uses the rule spare. Remove the rule, or let a duty use it.", 2},
		"a layout of its own":      {rule, "import rego.v2\n", "import  rego.v2\n", "small/duty/posting/posting.rego:13: the module is not in the layout of OPA's formatter. Write \"import rego.v2\" there, or let `opa fmt` lay out the file.", 1},
		"a number":                 {rule, "input.workers >= 0", "input.workers >= 0 - 3", "small/duty/posting/posting.rego:15:81: the rule holds the number 3. Make it a parameter with its date and citation.", 1},
		"data that nothing gives":  {rule, "input.workers >= 0", "not data.tables.x", "small/duty/posting/posting.rego:15:64: nothing gives data.tables. Correct the name, or add it to the bundle.", 1},
		"a case that fails": {cases, "status: met", "status: gap", `small/cases/posting.yaml:7: the case "Nobody is enrolled" does not hold.
  expected: posting of s1 gap
  actual:   posting of s1 met key "": Fulfilled.`, 1},
		"another subject":         {cases, "subject: s1", "subject: s2", "small/cases/posting.yaml:7: the case \"Nobody is enrolled\" does not hold.\n  expected: posting of s2 met\n  actual:   no finding", 1},
		"facts that are none":     {cases, "only: true", "facts: {a: 1}", "small/cases/posting.yaml:7: the case \"Nobody is enrolled\" does not hold.\n  expected: posting of s1 met facts {\"a\":1}\n  actual:   posting of s1 met", 1},
		"an unknown duty":         {cases, "duty: posting", "duty: postign", `small/cases/posting.yaml:7: there is no duty "postign". Did you mean "posting"?`, 1},
		"an unknown status":       {cases, "status: met", "status: mett", `small/cases/posting.yaml:7: there is no status "mett". Write one of [gap unproven opinion due late lifted met].`, 1},
		"nothing that is":         {cases, "  expect:\n    - {duty: posting, subject: s1, status: met, only: true}", "  nothing: [posting]", "small/cases/posting.yaml:6: the case \"Nobody is enrolled\" does not hold.\n  expected: no finding of posting\n  actual:   posting of s1 met", 1},
		"a case without source":   {cases, "  source: N 1, an invented note\n", "", `small/cases/posting.yaml:2: the case "Nobody is enrolled" names no source.`, 1},
		"a case without day":      {cases, "  as_of: 2026-06-30\n", "", "the case has no as_of", 1},
		"a day that is none":      {cases, "2026-06-30", "2026-06-31", "2026-06-31", 1},
		"a case of nothing":       {cases, "  expect:\n    - {duty: posting, subject: s1, status: met, only: true}\n", "", `small/cases/posting.yaml:2: the case "Nobody is enrolled" expects nothing.`, 1},
		"an unknown entry":        {cases, "like: worker", "like: walker", `_base.yaml has no entry "walker"`, 1},
		"an unknown key":          {cases, "  source:", "  sauce: x\n  source:", "small/cases/posting.yaml:3: the law cases cannot be read: the key sauce is not known here. Check the key, its value and the indentation.", 1},
		"a value of another kind": {cases, "only: true", "only: perhaps", "small/cases/posting.yaml:7: the law cases cannot be read: !!str `perhaps` cannot stand here.", 1},
		"a broken YAML":           {cases, "  expect:", " expect:", "the law cases cannot be read: ", 1},
		"an unknown field":        {shown, "hired_on", "hired_no", `line 4: a worker has no field "hired_no"; did you mean "hired_on"?`, 1},
		"an unknown record kind":  {shown, "    worker:\n", "    walker:\n", `there is no record kind "walker"`, 1},
		"a value that cannot be":  {shown, "2020-01-01", "2020-01-32", "the field hired_on of a worker cannot be \"2020-01-32\"", 1},
		"a manifest without root": {"small/.manifest", `"measures", `, "", "small/.manifest: OPA itself does not read the bundle. Name every folder with data or rules among the roots of the manifest.", 1},
	} {
		t.Run(name, func(t *testing.T) {
			t.Parallel()
			fsys := bundletest.Change(small(), c.file, c.old, c.new)
			r := try(t, fsys, Options{})
			require.Len(t, r.Failures, c.number, texts(r))
			assert.Contains(t, texts(r), c.want)
		})
	}
}

func texts(r *Result) string {
	var out []string
	for _, f := range r.Failures {
		out = append(out, f.String())
	}
	return strings.Join(out, "\n")
}

func TestMissingPartsAreTold(t *testing.T) {
	for file, want := range map[string]string{
		tests: "small/duty/posting/posting.rego: the duty posting has no tests. Write package duty.posting_test in the file small/duty/posting/posting_test.rego.",
		cases: "small/cases: the bundle has no law cases.",
	} {
		fsys := small()
		delete(fsys, file)
		assert.Contains(t, texts(try(t, fsys, Options{})), want)
	}
	fsys := small()
	fsys["small/duty/later/later_test.rego"] = &fstest.MapFile{Data: []byte("package duty.later_test\n\nimport rego.v2\n\ntest_it if true\n")}
	assert.Contains(t, texts(try(t, fsys, Options{})), "small/duty/later/later_test.rego: the folder duty/later holds no duty.")
}

// TestSilentDutyIsFound: a duty must say something of a subject of which nothing is known.
func TestSilentDutyIsFound(t *testing.T) {
	fsys := bundletest.Change(small(), rule, "input.workers >= 0", "input.workers > 0")
	bundletest.Change(fsys, rule, "if input.workers == 0", "if input.enrolled_now > 7 - 6")
	r := try(t, fsys, Options{})
	assert.Contains(t, texts(r), "small/duty/posting/posting.rego:1: the duty posting returns nothing for a site of which nothing is known. Add to not_owed the reason that is left.")
	fsys = bundletest.Change(small(), rule, "input.workers >= 0", "1 / input.workers > 0")
	assert.Contains(t, texts(try(t, fsys, Options{})), "the duty posting fails for a site of which nothing is known")
}

func TestDutyThatCanNeverOblige(t *testing.T) {
	fsys := bundletest.Change(small(), rule, "if input.workers >= 0", "if {\n\tinput.workers >= 0\n\tfalse\n}")
	assert.Contains(t, texts(try(t, fsys, Options{})), "small/duty/posting/posting.rego:1: the duty posting can never return an obligation.")
}

func TestNarrowed(t *testing.T) {
	fsys := bundletest.Change(small(), tests, "o.holds == true", "o.holds == false")
	bundletest.Change(fsys, cases, "status: met", "status: gap")
	text := string(fsys[rule].Data)
	fsys["small/duty/second/second.rego"] = &fstest.MapFile{Data: []byte(strings.ReplaceAll(text, "duty.posting", "duty.second"))}
	fsys["small/duty/second/second_test.rego"] = &fstest.MapFile{Data: []byte(strings.ReplaceAll(goodTests, "posting", "second"))}
	fsys["small/cases/second.yaml"] = &fstest.MapFile{Data: []byte(strings.ReplaceAll(goodCases, "posting", "second"))}
	bundletest.Change(fsys, "small/paragraphs/data.yaml", "[posting]", "[posting, second]")
	r := try(t, fsys, Options{Duty: "second"})
	assert.Empty(t, r.Failures, texts(r))
	assert.Equal(t, Count{Run: 4}, r.Tests)
	assert.Equal(t, Count{Run: 1}, r.Cases)
	assert.Equal(t, 2, r.Lines)
	assert.True(t, r.Narrowed)
	r = try(t, fsys, Options{Cases: "sec*"})
	assert.Equal(t, Count{Run: 1}, r.Cases)
	assert.Len(t, r.Failures, 1, "the test of the other duty is still run")
	r = try(t, fsys, Options{Cases: "third"})
	assert.Contains(t, texts(r), `no file of law cases fits "third"`)
	r = try(t, fsys, Options{})
	assert.Equal(t, Count{8, 1}, r.Tests)
	assert.Equal(t, Count{2, 1}, r.Cases)
}

// TestCasesTellWhatTheyShow: a boundary is the last day, the day after, or the limit itself.
func TestCasesTellWhatTheyShow(t *testing.T) {
	fsys := bundletest.Change(small(), rule, `{"holds": input.enrolled_now == 0}`, `{"after": "2026-01-01", "within": "posting_time", "by": null}`)
	bundletest.Change(fsys, tests, "o.holds == true", "o.by == null")
	bundletest.Change(fsys, tests, "o.holds == false", "o.by == null")
	for day, want := range map[string]DutyCases{
		"2026-01-30": {Quiet: 1}, "2026-01-31": {Quiet: 1, Boundary: 1}, "2026-02-01": {Fires: 1, Boundary: 1}, "2026-02-02": {Fires: 1},
	} {
		status := "due"
		if want.Fires > 0 {
			status = "gap"
		}
		text := strings.NewReplacer("2026-06-30", day, "status: met", "status: "+status).Replace(goodCases)
		fsys[cases] = &fstest.MapFile{Data: []byte(text)}
		want.ID = "posting"
		r := try(t, fsys, Options{})
		require.Empty(t, r.Failures, texts(r))
		assert.Equal(t, []DutyCases{want}, r.Duties, day)
	}
}

func TestCancelledRehearsalGivesAnError(t *testing.T) {
	b, problems := bundle.Load(small(), "small")
	require.NoError(t, problems.Err())
	ctx, stop := context.WithCancel(t.Context())
	stop()
	_, err := Run(ctx, b, Options{})
	require.ErrorIs(t, err, context.Canceled)
}

// TestEndlessTestsAreCutOff: each test after its own time, and all together after theirs.
func TestEndlessTestsAreCutOff(t *testing.T) {
	one, all := testLimit, allLimit
	t.Cleanup(func() { testLimit, allLimit = one, all })
	fsys := bundletest.Change(small(), tests, "test_nobody_works_here", "test_endless if {\n\tmany := numbers.range(1, 1000000)\n\tcount([x | some x in many; some y in many; x + y == 0]) == 1\n}\n\ntest_nobody_works_here")
	testLimit = 200 * time.Millisecond
	r := try(t, fsys, Options{})
	require.Len(t, r.Failures, 1, texts(r))
	assert.Contains(t, texts(r), "small/duty/posting/posting_test.rego:23: the test duty.posting_test.test_endless cannot be run.")
	testLimit, allLimit = one, 300*time.Millisecond
	r = try(t, fsys, Options{})
	require.Len(t, r.Failures, 1, texts(r))
	assert.Contains(t, texts(r), "small: the tests of rules take longer than 300ms together. Find the test that does not end with --duty.")
}
