package judge_test

import (
	"bytes"
	"context"
	"encoding/csv"
	"encoding/json"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"testing"

	"github.com/open-policy-agent/opa/v1/ast"
	opabundle "github.com/open-policy-agent/opa/v1/bundle"
	"github.com/open-policy-agent/opa/v1/rego"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/intake"
	"hearduty/internal/judge"
	"hearduty/internal/program"
	"hearduty/internal/record"
	"hearduty/internal/report"
	"hearduty/policies"
)

const demoDir = "../../testdata/demo"

func demoOptions(t *testing.T) judge.Options {
	t.Helper()
	p, problems := program.Load(demoDir)
	require.NoError(t, problems.Err())
	library, err := bundle.Embedded()
	require.NoError(t, err)
	return judge.Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90}
}

// desk is one site of the demo program under one bundle, with its dossiers.
type desk struct {
	bundle *bundle.Bundle
	engine judge.Engine
	files  []*dossier.File
}

// demoDesks reads the demo program and makes every dossier of it.
func demoDesks(t *testing.T) []desk {
	t.Helper()
	ctx, o := context.Background(), demoOptions(t)
	store := dossier.NewStore()
	defer store.Close()
	ledger, err := intake.Read(ctx, o.Program, store.Add)
	require.NoError(t, err)
	require.Empty(t, ledger.Rejects)
	registers, err := store.Registers()
	require.NoError(t, err)
	var workers []*dossier.WorkerRecords
	for i := range store.Shards() {
		shard, err := store.Shard(i)
		require.NoError(t, err)
		workers = append(workers, shard...)
	}
	var desks []desk
	for _, site := range o.Program.Sites {
		for _, id := range site.Bundles {
			b := o.Library[id]
			if len(b.Extends) > 0 {
				continue // stock OPA knows nothing of bundles over others
			}
			engine, err := judge.NewEngine(ctx, b)
			require.NoError(t, err)
			place := dossier.Place{ID: site.ID, Country: site.Country, Region: site.Region}
			builder := dossier.NewGround(registers, b.Measures, b, o.AsOf).Builder(place, b.ChoicesOf(site.Choices))
			d, usage := desk{bundle: b, engine: engine}, dossier.NewUsage()
			for _, w := range workers {
				here := slices.ContainsFunc(w.Employments, func(e *record.Worker) bool { return e.Site == site.ID })
				if f := builder.Worker(w); here && f != nil {
					usage.Add(builder, w, f.Input.(*dossier.Worker))
					d.files = append(d.files, f)
				}
			}
			d.files = slices.Concat(d.files, builder.Groups(usage), builder.Areas(usage), builder.Instruments(usage),
				builder.Rooms(usage), builder.Testers(usage), []*dossier.File{builder.SiteDossier(usage)})
			desks = append(desks, d)
		}
	}
	return desks
}

// stockBundle reads a bundle as anybody can, with OPA's own reader.
func stockBundle(t *testing.T, id string) func(*rego.Rego) {
	t.Helper()
	sub, err := fs.Sub(policies.FS, id)
	require.NoError(t, err)
	loader, err := opabundle.NewFSLoader(sub)
	require.NoError(t, err)
	b, err := opabundle.NewCustomReader(loader).WithRegoVersion(ast.RegoV1).Read()
	require.NoError(t, err)
	return rego.ParsedBundle(id, &b)
}

// asJSON sends a value of OPA through JSON, as it would reach a server.
func asJSON(t *testing.T, v ast.Value) any {
	t.Helper()
	plain, err := ast.JSON(v)
	require.NoError(t, err)
	text, err := json.Marshal(plain)
	require.NoError(t, err)
	var out any
	decoder := json.NewDecoder(bytes.NewReader(text))
	decoder.UseNumber()
	require.NoError(t, decoder.Decode(&out))
	return out
}

// canonical writes the members of a set in an order of their own, with numbers as float64.
func canonical(t *testing.T, members []any) []string {
	t.Helper()
	out := []string{}
	for _, m := range members {
		text, err := json.Marshal(m)
		require.NoError(t, err)
		var again any
		require.NoError(t, json.Unmarshal(text, &again))
		text, err = json.Marshal(again)
		require.NoError(t, err)
		out = append(out, string(text))
	}
	slices.Sort(out)
	return out
}

// TestStockOPAAgrees evaluates every duty for every dossier of the demo program with nothing but OPA: its bundle
// reader, its compiler without our schemas and bounds, and the dossier as JSON. Each must return what our engine does.
func TestStockOPAAgrees(t *testing.T) {
	ctx := context.Background()
	desks := demoDesks(t)
	common := stockBundle(t, "common")
	queries := map[string]rego.PreparedEvalQuery{}
	for _, b := range desks {
		for _, d := range b.bundle.Duties {
			if _, ok := queries[b.bundle.ID+"/"+d.ID]; ok {
				continue
			}
			q, err := rego.New(rego.Query(fmt.Sprintf("owed := data.duty.%s.obligations; not_owed := data.duty.%s.not_owed", d.Package, d.Package)),
				stockBundle(t, b.bundle.ID), common).PrepareForEval(ctx)
			require.NoError(t, err, d.ID)
			queries[b.bundle.ID+"/"+d.ID] = q
		}
	}
	subjects, owed := map[string]int{}, map[string]int{}
	for _, b := range desks {
		for _, f := range b.files {
			subjects[f.Kind]++
			input := judge.Input(f.Input)
			answers, err := b.engine.Evaluate(ctx, f.Kind, input)
			require.NoError(t, err)
			sent := asJSON(t, input)
			for _, a := range answers {
				results, err := queries[b.bundle.ID+"/"+a.Duty.ID].Eval(ctx, rego.EvalInput(sent))
				require.NoError(t, err)
				require.Len(t, results, 1, "%s for the %s %s", a.Duty.ID, f.Kind, f.ID)
				require.NoError(t, a.Err)
				for name, ours := range map[string][]*ast.Term{"owed": a.Obligations, "not_owed": a.NotOwed} {
					members, ok := results[0].Bindings[name].([]any)
					require.True(t, ok)
					var mine []any
					for _, term := range ours {
						mine = append(mine, asJSON(t, term.Value))
					}
					require.Equal(t, canonical(t, members), canonical(t, mine), "%s of %s for the %s %s", name, a.Duty.ID, f.Kind, f.ID)
				}
				owed[b.bundle.ID+"/"+a.Duty.ID] += len(a.Obligations)
			}
		}
	}
	for _, kind := range dossier.Kinds {
		assert.NotZero(t, subjects[kind], "no %s was compared", kind)
	}
	assert.GreaterOrEqual(t, subjects[dossier.KindWorker], 100)
	for _, b := range desks {
		for _, d := range b.bundle.Duties {
			if b.bundle.ID == demoLaw { // of the other laws the demo elects nothing; their own programs do
				assert.NotZero(t, owed[b.bundle.ID+"/"+d.ID], "%s returned no obligation that could be compared", d.ID)
			}
		}
	}
}

// TestSameReportAtAnySpeed judges the demo program alone and eight at a time, twice: the reports are the same bytes.
func TestSameReportAtAnySpeed(t *testing.T) {
	for _, all := range []bool{false, true} {
		first := map[string]string{}
		for _, parallel := range []int{1, 8, 8} {
			o := demoOptions(t)
			o.Parallel, o.All, o.HealthDetail, o.Portraits = parallel, all, all, true
			result, err := judge.Check(context.Background(), o)
			require.NoError(t, err)
			for _, format := range report.Formats(report.Options{Width: 80}) {
				var out bytes.Buffer
				require.NoError(t, format.Write(&out, result))
				if first[format.Name()] == "" {
					first[format.Name()] = out.String()
				}
				if first[format.Name()] != out.String() {
					t.Errorf("the %s report of %d at a time is another", format.Name(), parallel)
				}
			}
		}
		require.Len(t, first, len(report.Names()))
	}
}

// The end of a stretch may lie ahead, as of a contract that ends next year.
var (
	someDay      = regexp.MustCompile(`\d{4}-\d{2}-\d{2}`)
	endOfStretch = regexp.MustCompile(`"to":"[^"]*"`)
)

// TestThePastKnowsNothingOfTheFuture judges the demo program as of a day three and a half years before its own: no
// evidence, no fulfilment and no day in a finding's facts may lie later.
func TestThePastKnowsNothingOfTheFuture(t *testing.T) {
	asOf := calendar.MustParse("2023-01-01")
	o := demoOptions(t)
	o.AsOf, o.All, o.HealthDetail = asOf, true, true
	result, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	require.NotEmpty(t, result.Findings)
	dates := recordDates(t)
	statuses := map[finding.Status]int{}
	for _, f := range result.Findings {
		statuses[f.Status]++
		if f.Done.Known() {
			assert.LessOrEqual(t, f.Done, asOf, "%s %s: %s", f.Duty, f.Subject.ID, f.Message)
		}
		if f.Status != finding.Due && f.Status != finding.Met && f.Status != finding.Late && f.Due.Known() {
			assert.Less(t, f.Due, asOf, "%s %s", f.Duty, f.Subject.ID)
		}
		for _, e := range f.Evidence {
			day, ok := dates[fmt.Sprintf("%s:%d", e.File, e.Row)]
			require.True(t, ok, "%s %s rests on %s, which has no place", f.Duty, f.Subject.ID, e.Record)
			assert.LessOrEqual(t, day, asOf, "%s %s rests on %s of %s", f.Duty, f.Subject.ID, e.Record, day)
		}
		facts, err := json.Marshal(map[string]any{"facts": f.Facts, "health": f.Health})
		require.NoError(t, err)
		for _, text := range someDay.FindAllString(f.Message+endOfStretch.ReplaceAllString(string(facts), ""), -1) {
			// What is due may count from the end of a contract, which is known beforehand.
			if day := calendar.MustParse(text); day != f.Due && f.Status != finding.Due {
				assert.LessOrEqual(t, day, asOf, "%s %s: %s %s", f.Duty, f.Subject.ID, f.Message, facts)
			}
		}
	}
	assert.NotZero(t, statuses[finding.Met])
	assert.NotZero(t, statuses[finding.Gap])
	assert.NotZero(t, statuses[finding.Due])
}

// recordDates reads the day of every row of the demo program straight from its files. A row without a day, such as one
// of a register, has day 0.
func recordDates(t *testing.T) map[string]calendar.Date {
	t.Helper()
	files, err := filepath.Glob(demoDir + "/records/*.csv")
	require.NoError(t, err)
	abroad, err := filepath.Glob(demoDir + "/abroad/*.csv")
	require.NoError(t, err)
	files = append(files, abroad...)
	require.NotEmpty(t, files)
	out := map[string]calendar.Date{}
	for _, name := range files {
		content, err := os.ReadFile(name)
		require.NoError(t, err)
		lines, err := csv.NewReader(bytes.NewReader(content)).ReadAll()
		require.NoError(t, err)
		column := slices.IndexFunc(lines[0], func(s string) bool {
			return slices.Contains([]string{"date", "from", "hired_on", "offered_on", "attended_on"}, s)
		})
		for i, line := range lines[1:] {
			day := calendar.Date(0)
			if column >= 0 && line[column] != "" {
				day = calendar.MustParse(line[column])
			}
			out[fmt.Sprintf("%s/%s:%d", filepath.Base(filepath.Dir(name)), filepath.Base(name), i+2)] = day
		}
	}
	return out
}
