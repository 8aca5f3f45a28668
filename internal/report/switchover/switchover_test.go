package switchover

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
	"hearduty/internal/report/reporttest"
	"hearduty/internal/report/text"
	"hearduty/internal/schema"
)

// updating says whether the golden files are to be written. The flag is that of reporttest.
func updating() bool { return flag.Lookup("update").Value.String() == "true" }

// sample is a switch with a change of every kind, a side without duties, and texts that are meant to do harm.
func sample() *finding.Switch {
	duty := func(bundle, duty string, n int) []finding.SwitchDutyNumber {
		return []finding.SwitchDutyNumber{{Bundle: bundle, Duty: duty, Cite: bundle + " 1(a)", Number: n}}
	}
	many := []string{}
	for i := range 20 {
		many = append(many, "W"+string(rune('a'+i)))
	}
	numbers := func(from, to finding.Status, n int) finding.SwitchNumbers {
		return finding.SwitchNumbers{From: map[finding.Status]int{from: n}, To: map[finding.Status]int{to: n}}
	}
	interval := func(value, seen string) []finding.Parameter {
		return []finding.Parameter{{Bundle: "b", Name: "training_interval", Value: value, Cite: "1(b)", Seen: seen, InForce: true}}
	}
	none, some := []finding.SwitchDutyNumber{}, []finding.SwitchGroup{{Group: "press", Workers: 4}, {Group: "", Workers: 1}}
	training := finding.SwitchTopic{Topic: "training", Numbers: numbers(finding.Met, finding.Gap, 26), FromHas: 1, ToHas: 1, Same: 1,
		FromDuties: []finding.SwitchDuty{{Bundle: "old", Duty: "training", Cite: "old 1(a)", Evidence: []string{"training"}, Numbers: map[finding.Status]int{finding.Met: 26}}},
		ToDuties:   []finding.SwitchDuty{{Bundle: "new", Duty: "training", Cite: "new 1(a)", Evidence: []string{"training"}, Numbers: map[finding.Status]int{finding.Gap: 26}}},
		Moves: []finding.SwitchMove{
			{Change: finding.Appears, Kind: "worker", Before: finding.NotOwed, After: "due", Number: 1, Subjects: []string{"\x1b[31mW1"}, Groups: []finding.SwitchGroup{}, FromDuties: none, ToDuties: duty("new", "training", 1)},
			{Change: finding.Changes, Kind: "worker", Before: "met", After: "gap", Number: 20, Subjects: many, Groups: []finding.SwitchGroup{}, FromDuties: duty("old", "training", 20), ToDuties: duty("new", "training", 18)},
			{Change: finding.Changes, Kind: "worker", Before: "gap", After: finding.NotKnown, Number: 5, Subjects: []string{}, Groups: some, FromDuties: duty("old", "training", 5), ToDuties: none},
			{Change: finding.Vanishes, Kind: "site", Before: "late", After: finding.NotOwed, Number: 1, Subjects: []string{"kiln-hill"}, Groups: []finding.SwitchGroup{}, FromDuties: duty("old", "training", 1), ToDuties: none},
		},
		Values: []finding.SwitchValue{{Name: "training_interval", From: interval("12 months", "text"), To: interval("6 months", "memory")}, {Name: "same", From: interval("1", "text"), To: interval("1", "text")},
			{Name: "only_old", From: interval("2 years", "text"), To: []finding.Parameter{}}, {Name: "only_new", From: []finding.Parameter{}, To: interval("3 h", "text")}}}
	fit := finding.SwitchTopic{Topic: "protectors", Numbers: finding.SwitchNumbers{From: map[finding.Status]int{}, To: map[finding.Status]int{finding.Gap: 1}}, ToHas: 1, FromDuties: []finding.SwitchDuty{},
		ToDuties: []finding.SwitchDuty{{Bundle: "new", Duty: "fit-test", Cite: "new 2", Evidence: []string{"fit_test"}, Numbers: map[finding.Status]int{finding.Gap: 1}}},
		Moves:    []finding.SwitchMove{{Change: finding.Appears, Kind: "worker", Before: finding.NotOwed, After: "gap", Number: 1, Subjects: []string{"W1"}, Groups: []finding.SwitchGroup{}, FromDuties: none, ToDuties: duty("new", "fit-test", 1)}},
		Values:   []finding.SwitchValue{}}
	still := finding.SwitchTopic{Topic: "records", Numbers: numbers(finding.Met, finding.Met, 3), FromDuties: training.FromDuties, ToDuties: training.ToDuties, FromHas: 1, ToHas: 1, Same: 3,
		Moves: []finding.SwitchMove{}, Values: []finding.SwitchValue{}}
	press := []finding.SwitchSubjects{{Kind: "group", Number: 1, IDs: []string{"press"}, Groups: []finding.SwitchGroup{}}, {Kind: "worker", Number: 5, IDs: []string{}, Groups: some}}
	wanted := []finding.SwitchMeasure{{Channel: "action", Taken: "a dose with criterion level 90 dBA, 5 dB exchange rate", Levels: []string{"action"}}}
	return &finding.Switch{
		Tool: finding.Tool{Name: "hearduty", Version: "1.0"}, Program: "Harrow & Slate <script>", AsOf: calendar.MustParse("2026-06-30"), Cautions: []string{"A bundle is a reading of the law; licensed professionals decide."},
		Notes:   []string{"Each law judges the past, too."},
		Bundles: []finding.Bundle{{ID: "new", Title: "The new law", Revision: "2", Kind: "law", CheckedOn: "2026-01-01", Cautions: []string{}}, {ID: "old", Title: "The old law", Revision: "1", Kind: "law", CheckedOn: "2026-01-01", Cautions: []string{}}},
		Levels: []finding.SwitchLevel{
			{Bundle: "new", Name: "action", Enrols: true, Parts: []finding.SwitchPart{{Parameter: "dose", Value: "at least 50 %", Taken: "a dose", Cite: "new 3", Seen: "memory"}, {Parameter: "peak", Taken: "the highest C-weighted peak"}}},
			{Bundle: "old", Name: "upper", Parts: []finding.SwitchPart{{Parameter: "level", Value: "more than 85 dBA", Taken: "a level", Cite: "old 3", Seen: "text"}}},
		},
		Sites: []finding.SwitchSite{
			{ID: "kiln-hill", Name: "Kiln Hill foundry", Workers: 30, From: []string{"old", "company"}, To: []string{"new"}, Totals: numbers(finding.Met, finding.Gap, 30), Topics: []finding.SwitchTopic{fit, training, still},
				Exposure: []finding.SwitchExposure{
					{Bundle: "new", Group: "", Workers: 1, Now: 1, Wanted: wanted, Reasons: []string{"the dose was taken with 3 dB"}},
					{Bundle: "new", Group: "press", Enrols: true, Workers: 6, Now: 4, Before: 1, Wanted: wanted, Reasons: []string{"the dose was taken with 3 dB"}},
					{Bundle: "new", Group: "yard", Enrols: true, Workers: 2, Now: 2, Before: 2, Wanted: wanted, Reasons: []string{"there is no full-shift measurement"}},
				},
				Acts: []finding.SwitchAct{
					{Bundle: "new", Duty: "fit-test", Title: "Fit test", Cite: "new 2", Evidence: []string{"fit_test", "protector_issue"}, Unread: []string{"fit_test"}, Subjects: press, Before: 2},
					{Bundle: "new", Duty: "posting", Title: "Posting", Cite: "new 4", Evidence: []string{"document"}, Unread: []string{}, Subjects: press, Before: 6},
				},
				Needs: []finding.SwitchNeed{
					{Bundle: "new", Lacks: "the peak level", Duties: []string{"peak", "survey"}, Subjects: press, Before: 1},
					{Bundle: "new", Lacks: "", Duties: []string{"odd"}, Subjects: press},
					{Bundle: "new", Lacks: "the tester", Duties: []string{"tester"}, Subjects: press, Before: 6},
				}},
			{ID: "larch-street", Workers: 1, From: []string{"old"}, To: []string{"new"}, Totals: finding.SwitchNumbers{From: map[finding.Status]int{}, To: map[finding.Status]int{}},
				Topics: []finding.SwitchTopic{}, Exposure: []finding.SwitchExposure{}, Acts: []finding.SwitchAct{}, Needs: []finding.SwitchNeed{}},
		},
	}
}

func written(t *testing.T, s *finding.Switch, name string, style text.Format) string {
	t.Helper()
	var b bytes.Buffer
	require.NoError(t, Write(&b, s, name, style))
	return b.String()
}

// style is the look of the page, which is that of the reports.
var style = regexp.MustCompile(`(?s)<style>.*</style>`)

func TestGolden(t *testing.T) {
	for _, form := range Names {
		path := filepath.Join("testdata", "sample."+form)
		got := style.ReplaceAllString(written(t, sample(), form, text.Format{}), "<style></style>")
		if updating() {
			require.NoError(t, os.MkdirAll("testdata", 0o755))
			require.NoError(t, os.WriteFile(path, []byte(got), 0o644))
		}
		want, err := os.ReadFile(path)
		require.NoError(t, err)
		if got != string(want) {
			t.Errorf("%s differs; look at it and run go test ./internal/report/switchover -update\n%s", path, got)
		}
	}
	require.Error(t, Write(&bytes.Buffer{}, sample(), "pdf", text.Format{}))
}

func TestTextIsSafeAndFits(t *testing.T) {
	for _, width := range []int{40, 80, 200} {
		for line := range strings.SplitSeq(written(t, sample(), "text", text.Format{Width: width}), "\n") {
			assert.LessOrEqual(t, len([]rune(line)), width, line)
			assert.False(t, strings.ContainsFunc(line, unicode.IsControl), "%q", line)
		}
	}
	plain, coloured := written(t, sample(), "text", text.Format{}), written(t, sample(), "text", text.Format{Colour: true})
	assert.NotEqual(t, plain, coloured)
	assert.Equal(t, plain, regexp.MustCompile(`\x1b\[[0-9;]*m`).ReplaceAllString(coloured, ""), "colour only repeats what the words say")
}

// TestPageAsksNothingOfANetwork and holds no script, whatever stands in the switch.
func TestPageAsksNothingOfANetwork(t *testing.T) {
	page := written(t, sample(), "html", text.Format{})
	assert.NotRegexp(t, `https?://|//[a-z]|url\(|@import|<script|<iframe|<img`, page)
	assert.Contains(t, page, "Harrow &amp; Slate &lt;script&gt;")
	ids := map[string]bool{}
	for _, m := range regexp.MustCompile(`id="([^"]+)"`).FindAllStringSubmatch(page, -1) {
		assert.False(t, ids[m[1]], "%s stands twice", m[1])
		ids[m[1]] = true
	}
	for _, m := range regexp.MustCompile(`(?:href="#|aria-labelledby=")([^"]+)"`).FindAllStringSubmatch(page, -1) {
		assert.True(t, ids[m[1]], m[1])
	}
}

// demo switches the demo program to the company standard.
func demo(t *testing.T) *finding.Switch {
	t.Helper()
	p, problems := program.Load("../../../testdata/demo")
	require.NoError(t, problems.Err())
	library, err := bundle.Embedded()
	require.NoError(t, err)
	s, err := judge.Switch(t.Context(), judge.Options{Program: p, Library: library, AsOf: p.AsOf, HealthDetail: true}, "company-example")
	require.NoError(t, err)
	return s
}

// TestJSONFitsItsSchema, of the sample and of the demo program.
func TestJSONFitsItsSchema(t *testing.T) {
	for _, s := range []*finding.Switch{sample(), demo(t)} {
		var value any
		require.NoError(t, json.Unmarshal([]byte(written(t, s, "json", text.Format{})), &value))
		require.Empty(t, schema.Validate("switch", value, func(p string) diag.Position { return diag.Position{File: p} }))
	}
}

// TestPrivateAndTheSame: a switch of the demo program gives away neither a birth date nor a threshold, even if figures of
// hearing are asked for, and is the same each time.
func TestPrivateAndTheSame(t *testing.T) {
	first, second := demo(t), demo(t)
	secrets := reporttest.Secrets(t)
	require.Greater(t, len(secrets), 300)
	for _, form := range Names {
		page := written(t, first, form, text.Format{Width: 1000})
		assert.Equal(t, page, written(t, second, form, text.Format{Width: 1000}))
		require.Greater(t, len(page), 5000)
		for _, secret := range secrets {
			if strings.Contains(page, secret) {
				t.Errorf("the form %s gives away %q", form, secret)
			}
		}
	}
}
