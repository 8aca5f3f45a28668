package judge

import (
	"bytes"
	"context"
	"fmt"
	"io/fs"
	"path"
	"reflect"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"gopkg.in/yaml.v3"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/record"
	"hearduty/policies"
)

// lawCase is one case of a bundle's cases folder: records, and the findings that the law gives.
type lawCase struct {
	Case    string
	Source  string
	Like    yaml.Node
	AsOf    string `yaml:"as_of"`
	Choices map[string]any
	Records map[string][]map[string]yaml.Node
	Expect  []expected
	Nothing []string
}

type expected struct {
	Duty, Subject, Status, Due, Done string
	Key                              *string
	Only                             bool
	Facts, Health                    map[string]any // what the finding's facts and audiometric figures hold, among others
}

// holds says whether a value holds all that is wanted: of an object the fields named, of anything else the same. Numbers
// are compared as float64, so that 94 is 94.0.
func holds(got, want any) bool {
	switch want := want.(type) {
	case map[string]any:
		object, ok := got.(map[string]any)
		for name, w := range want {
			v, there := object[name]
			ok = ok && there && holds(v, w)
		}
		return ok
	case []any:
		v := reflect.ValueOf(got)
		if got == nil || v.Kind() != reflect.Slice || v.Len() != len(want) {
			return false
		}
		for i, w := range want {
			if !holds(v.Index(i).Interface(), w) {
				return false
			}
		}
		return true
	}
	a, isNumber := asNumber(got)
	b, wantsNumber := asNumber(want)
	return isNumber && wantsNumber && a == b || reflect.DeepEqual(got, want)
}

func asNumber(v any) (float64, bool) {
	switch v := v.(type) {
	case int:
		return float64(v), true
	case float64:
		return v, true
	}
	return 0, false
}

type caseRecords map[string][]map[string]yaml.Node

// TestLawCases judges every law case of every bundle from records to findings.
func TestLawCases(t *testing.T) {
	library, err := bundle.Embedded()
	require.NoError(t, err)
	for _, id := range library.IDs() {
		files, err := fs.Glob(policies.FS, id+"/cases/*.yaml")
		require.NoError(t, err)
		require.NotEmpty(t, files, "the bundle %s has no law cases", id)
		base := map[string]struct{ Records caseRecords }{}
		if content, err := fs.ReadFile(policies.FS, id+"/cases/_base.yaml"); err == nil {
			require.NoError(t, yaml.Unmarshal(content, &base))
		}
		for _, file := range files {
			if path.Base(file) == "_base.yaml" {
				continue
			}
			content, err := fs.ReadFile(policies.FS, file)
			require.NoError(t, err)
			var cases []lawCase
			decoder := yaml.NewDecoder(bytes.NewReader(content))
			decoder.KnownFields(true)
			require.NoError(t, decoder.Decode(&cases), file)
			for _, c := range cases {
				t.Run(id+"/"+strings.TrimSuffix(path.Base(file), ".yaml")+"/"+c.Case, func(t *testing.T) {
					runLawCase(t, library, id, c, base)
				})
			}
		}
	}
}

func runLawCase(t *testing.T, library bundle.Library, id string, c lawCase, base map[string]struct{ Records caseRecords }) {
	require.NotEmpty(t, c.Source, "a law case names its source")
	require.NotZero(t, len(c.Expect)+len(c.Nothing), "a law case expects something")
	records := caseRecords{}
	var like []string
	switch c.Like.Kind {
	case yaml.ScalarNode:
		like = []string{c.Like.Value}
	case yaml.SequenceNode:
		require.NoError(t, c.Like.Decode(&like))
	}
	for _, name := range like {
		entry, ok := base[name]
		require.True(t, ok, "_base.yaml has no entry %s", name)
		for kind, list := range entry.Records {
			records[kind] = append(records[kind], list...)
		}
	}
	for kind, list := range c.Records {
		records[kind] = append(records[kind], list...)
	}
	report := judgeRecords(t, library, id, c.AsOf, c.Choices, records)
	for _, e := range c.Expect {
		checkExpected(t, report, e)
	}
	for _, duty := range c.Nothing {
		_, known := dutyOf(report, duty)
		require.True(t, known, "there is no duty %s", duty)
		for _, f := range report.Findings {
			require.False(t, f.Duty == duty, "%s should give no finding, but gives %s", duty, describe(f))
		}
	}
}

func checkExpected(t *testing.T, report *finding.Report, e expected) {
	t.Helper()
	_, known := dutyOf(report, e.Duty)
	require.True(t, known, "there is no duty %s", e.Duty)
	var others []string
	found := false
	for _, f := range report.Findings {
		if f.Duty != e.Duty || e.Subject != "" && f.Subject.ID != e.Subject {
			continue
		}
		if holds(f.Facts, e.Facts) && holds(f.Health, e.Health) && (e.Key == nil || f.Key == *e.Key) && string(f.Status) == e.Status && (e.Due == "" || f.Due.String() == e.Due) && (e.Done == "" || f.Done.String() == e.Done) {
			found = true
			continue
		}
		others = append(others, describe(f))
		if e.Facts != nil || e.Health != nil {
			others = append(others, fmt.Sprintf("    facts %v\n    health %v", f.Facts, f.Health))
		}
	}
	key := ""
	if e.Key != nil {
		key = " key " + *e.Key
	}
	require.True(t, found, "expected %s %s%s %s due %s; there is:\n%s", e.Duty, e.Subject, key, e.Status, e.Due, strings.Join(others, "\n"))
	if e.Only {
		require.Empty(t, others, "expected only %s %s%s %s", e.Duty, e.Subject, key, e.Status)
	}
}

func dutyOf(report *finding.Report, id string) (*bundle.Duty, bool) {
	library, _ := bundle.Embedded()
	return library[report.Bundles[0].ID].Duty(id)
}

func describe(f finding.Finding) string {
	return fmt.Sprintf("  %s %s/%s key %q %s due %s done %s: %s", f.Duty, f.Subject.Kind, f.Subject.ID, f.Key, f.Status, f.Due, f.Done, f.Message)
}

// judgeRecords judges records at the one site s1.
func judgeRecords(t *testing.T, library bundle.Library, id, asOf string, choices map[string]any, records caseRecords) *finding.Report {
	t.Helper()
	p := &program.Program{Title: "law case", Sites: []program.Site{{ID: "s1", Name: "Site one", Country: "US", Bundles: []string{id}, Choices: choices}}}
	report, err := Check(context.Background(), Options{
		Program: p, Library: library, AsOf: calendar.MustParse(asOf), All: true, Bundle: id, HealthDetail: true,
		read: func(_ context.Context, emit func(record.Record) error) (*intake.Ledger, error) {
			ledger := &intake.Ledger{Inputs: []intake.Input{{File: "case"}}}
			row := int32(0)
			for _, kind := range record.Kinds() {
				for _, fields := range records[string(kind)] {
					row++
					rec := readCaseRecord(t, kind, fields)
					rec.SetAt(record.Origin{Row: row})
					if err := emit(rec); err != nil {
						return nil, err
					}
				}
			}
			for kind := range records {
				_, ok := record.TableOf(record.Kind(kind))
				require.True(t, ok, "there is no record kind %s", kind)
			}
			return ledger, nil
		},
	})
	require.NoError(t, err)
	return report
}

func readCaseRecord(t *testing.T, kind record.Kind, fields map[string]yaml.Node) record.Record {
	t.Helper()
	table, _ := record.TableOf(kind)
	rec := table.New()
	for name, node := range fields {
		i := table.Index(name)
		require.GreaterOrEqual(t, i, 0, "a %s has no field %s", kind, name)
		text := node.Value
		if node.Kind == yaml.SequenceNode {
			var words []string
			require.NoError(t, node.Decode(&words))
			text = strings.Join(words, ";")
		}
		if problem := table.Set(rec, i, text); problem != nil {
			require.Fail(t, problem.Why, "%s %s = %q", kind, name, text)
		}
	}
	return rec
}
