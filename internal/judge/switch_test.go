package judge_test

import (
	"context"
	"fmt"
	"os"
	"path/filepath"
	"strings"
	"testing"
	"testing/fstest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
)

const rollRule = `# METADATA
# title: Roll
# description: Whoever is exposed is on the roll.
# custom:
#   cite: N 7
#   subject: worker
#   topic: enrolment
#   severity: major
#   evidence: [measurement]
#   remedy: Measure.
package duty.roll

import rego.v2

obligations contains {"holds": null, "missing": ["an exposure that can be judged"]} if count(input.exposure_unknown.action) > 0

obligations contains {"holds": true} if count(input.exposure_unknown.action) == 0

not_owed contains "never" if false
`

const testedRule = `# METADATA
# title: Tested
# description: Whoever is on the roll is tested.
# custom:
#   cite: N 8
#   subject: worker
#   topic: audiometry
#   severity: major
#   evidence: [audiogram]
#   remedy: Test.
package duty.tested

import rego.v2

obligations contains {"after": spell.from, "by": null, "facts": {"birth": "1980-01-02"}} if some spell in input.enrolled

not_owed contains "not on the roll" if count(input.enrolled) == 0
`

// law makes an invented law that takes exposure on one channel.
func law(t *testing.T, id, channel string) *bundle.Bundle {
	t.Helper()
	fsys := fstest.MapFS{}
	for p, file := range bundletest.Small() {
		text := string(file.Data)
		if strings.HasPrefix(p, "small/") {
			p, text = id+strings.TrimPrefix(p, "small"), strings.Replace(text, "id: small", "id: "+id, 1)
		}
		fsys[p] = &fstest.MapFile{Data: []byte(text)}
	}
	fsys[id+"/duty/roll/roll.rego"] = &fstest.MapFile{Data: []byte(rollRule)}
	fsys[id+"/duty/tested/tested.rego"] = &fstest.MapFile{Data: []byte(testedRule)}
	fsys = bundletest.Change(fsys, id+"/paragraphs/data.yaml", "[posting]", "[posting, roll, tested]")
	fsys = bundletest.Change(fsys, id+"/measures/data.yaml", "criterion_db: 90, exchange_db: 5, threshold_db: 80", channel)
	b, problems := bundle.Load(fsys, id)
	require.NoError(t, problems.Err())
	return b
}

const (
	threeDB = "criterion_db: 85, exchange_db: 3, threshold_db: 70"
	fiveDB  = "criterion_db: 90, exchange_db: 5, threshold_db: 80"
)

// pressShop is a program with a group of five that was measured at 3 dB exchange only, one that was measured at both
// exchange rates, one that was not measured, and one worker with a measurement of the worker's own.
func pressShop() map[string]string {
	files := map[string]string{
		"program.yaml": "program: Press shop\nas_of: 2026-06-30\nsites: [{id: a, bundles: [three]}]\nrecords: [workers.csv, assignments.csv, groups.csv, measurements.csv]\n",
		"groups.csv":   "group,site\npress,a\nforge,a\nyard,a\n",
		"measurements.csv": "measurement_id,date,group,worker_id,kind,full_shift,criterion_db,exchange_db,threshold_db,dose_pct\n" +
			"M1,2020-02-01,press,,personal,yes,85,3,70,120\nM2,2020-02-01,forge,,personal,yes,85,3,70,130\nM2,2020-02-01,forge,,personal,yes,90,5,80,60\nM3,2020-02-01,,N1,personal,yes,85,3,70,20\n",
		"workers.csv":     "worker_id,site,hired_on,left_on\nP6,a,2020-01-01,2024-12-31\nF1,a,2020-01-01,\nY1,a,2020-01-01,\nN1,a,2020-01-01,\n",
		"assignments.csv": "worker_id,group,from\nP6,press,2020-01-01\nF1,forge,2020-01-01\nY1,yard,2020-01-01\n",
	}
	for i := 1; i <= 5; i++ {
		files["workers.csv"] += fmt.Sprintf("P%d,a,2020-01-01,\n", i)
		files["assignments.csv"] += fmt.Sprintf("P%d,press,2020-01-01\n", i)
	}
	return files
}

func switched(t *testing.T, files map[string]string, from, to string, laws ...*bundle.Bundle) *finding.Switch {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		require.NoError(t, os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600))
	}
	p, problems := program.Load(dir)
	require.NoError(t, problems.Err())
	library := bundle.Library{}
	for _, b := range laws {
		library[b.ID] = b
	}
	s, err := judge.Switch(context.Background(), judge.Options{Program: p, Library: library, AsOf: calendar.MustParse("2026-06-30"), Bundle: from}, to)
	require.NoError(t, err)
	require.Len(t, s.Sites, 1)
	return s
}

// TestSwitchNeedsAnotherExchangeRate: a group that was measured with a dose of 3 dB exchange only is told once where the
// new law takes a dose of 5 dB, with the number of its workers, and no worker of it is named.
func TestSwitchNeedsAnotherExchangeRate(t *testing.T) {
	s := switched(t, pressShop(), "", "five", law(t, "three", threeDB), law(t, "five", fiveDB))
	site := s.Sites[0]
	wanted := []finding.SwitchMeasure{{Channel: "action", Taken: "a dose with criterion level 90 dBA, 5 dB exchange rate, from 80 dBA on", Levels: []string{"action"}}}
	const reason = "the dose was taken with criterion level 85 dBA and 3 dB exchange rate, not 90 dBA and 5 dB; it cannot be converted"
	assert.Equal(t, []finding.SwitchExposure{
		{Bundle: "five", Group: "", Enrols: true, Workers: 1, Now: 1, Wanted: wanted, Reasons: []string{reason}},
		{Bundle: "five", Group: "press", Enrols: true, Workers: 6, Now: 5, Wanted: wanted, Reasons: []string{reason}},
		{Bundle: "five", Group: "yard", Enrols: true, Workers: 1, Now: 1, Before: 1, Wanted: wanted, Reasons: []string{"there is no full-shift measurement"}},
	}, site.Exposure)
	assert.Empty(t, site.Needs, "what is lacking of exposure is told by group")

	require.Len(t, site.Topics, 3)
	roll, tested := site.Topics[0], site.Topics[1]
	assert.Equal(t, []finding.SwitchMove{{Change: finding.Changes, Kind: "worker", Before: "met", After: "unproven", Number: 7, Subjects: []string{},
		Groups:     []finding.SwitchGroup{{Group: "", Workers: 1}, {Group: "press", Workers: 6}},
		FromDuties: []finding.SwitchDutyNumber{{Bundle: "three", Duty: "roll", Cite: "N 7", Number: 7}}, ToDuties: []finding.SwitchDutyNumber{{Bundle: "five", Duty: "roll", Cite: "N 7", Number: 7}}}}, roll.Moves)
	assert.Equal(t, 2, roll.Same, "F1, whose dose was taken both ways, and Y1, whom nobody measured")
	require.Len(t, tested.Moves, 2)
	assert.Equal(t, [3]any{"gap", finding.NotKnown, 5}, [3]any{tested.Moves[0].Before, tested.Moves[0].After, tested.Moves[0].Number}, "no relief for want of a measurement")
	assert.Equal(t, []finding.SwitchGroup{{Group: "press", Workers: 5}}, tested.Moves[0].Groups)
	assert.Equal(t, []string{"P6"}, tested.Moves[1].Subjects, "who left needs no measurement")

	back := switched(t, pressShop(), "five", "three", law(t, "three", threeDB), law(t, "five", fiveDB)).Sites[0]
	require.Len(t, back.Exposure, 1)
	assert.Equal(t, "yard", back.Exposure[0].Group)
	assert.False(t, back.Exposure[0].New())
	assert.Equal(t, 0, back.Exposure[0].Workers-back.Exposure[0].Before)
}

// TestSwitchJudgesAsTwoChecks: the numbers of each side are those of a check by that side's bundle.
func TestSwitchJudgesAsTwoChecks(t *testing.T) {
	o := demoOptions(t)
	s, err := judge.Switch(context.Background(), o, "company-example")
	require.NoError(t, err)
	assert.Contains(t, strings.Join(s.Notes, "\n"), "Accepted gaps are counted here by their status")
	sums := func(pick func(n finding.SwitchNumbers) map[finding.Status]int) map[finding.Status]int {
		out := map[finding.Status]int{}
		for _, site := range s.Sites {
			for _, topic := range site.Topics {
				for status, n := range pick(topic.Numbers) {
					out[status] += n
				}
			}
		}
		return out
	}
	moved := 0
	for _, site := range s.Sites {
		for _, topic := range site.Topics {
			for _, m := range topic.Moves {
				moved += m.Number
				inGroups := 0
				for _, g := range m.Groups {
					inGroups += g.Workers
				}
				assert.Equal(t, m.Number, len(m.Subjects)+inGroups)
			}
		}
	}
	assert.Greater(t, moved, 100)
	before, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	assert.Equal(t, before.Totals, sums(func(n finding.SwitchNumbers) map[finding.Status]int { return n.From }))
	o.Bundle = "company-example"
	after, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	assert.Equal(t, after.Totals, sums(func(n finding.SwitchNumbers) map[finding.Status]int { return n.To }))
	assert.Equal(t, before.Bundles, s.Bundles, "the new law is one of those of the demo already")
	assert.Contains(t, s.Bundles, after.Bundles[0])
}

func TestSwitchToNothing(t *testing.T) {
	_, err := judge.Switch(context.Background(), demoOptions(t), "nowhere")
	assert.ErrorContains(t, err, `there is no bundle "nowhere"`)
}

// TestMissingIsMachineReadable: what an unproven finding lacks stands in it as a list, and in its message in words.
func TestMissingIsMachineReadable(t *testing.T) {
	o := demoOptions(t)
	r, err := judge.Check(context.Background(), o)
	require.NoError(t, err)
	n := 0
	for _, f := range r.Findings {
		if f.Status != finding.Unproven {
			assert.Empty(t, f.Missing)
			continue
		}
		n++
		require.NotEmpty(t, f.Missing, f.Message)
		assert.True(t, strings.HasSuffix(strings.TrimSuffix(f.Message, "."), "The records lack: "+strings.Join(f.Missing, "; ")), f.Message)
	}
	assert.Greater(t, n, 20)
}

// TestSwitchNeedsAnotherWeighting: a peak that was taken without weighting is told once a group where the new law takes the
// C-weighted one.
func TestSwitchNeedsAnotherWeighting(t *testing.T) {
	files := pressShop()
	files["measurements.csv"] = "measurement_id,date,group,kind,full_shift,peak_db,peak_weighting\nM1,2020-02-01,press,personal,yes,138,Z\nM2,2020-02-01,forge,personal,yes,137,C\nM3,2020-02-01,forge,personal,yes,139,Z\n"
	files["program.yaml"] = strings.Replace(files["program.yaml"], "three", "plain", 1)
	site := switched(t, files, "", "weighted", law(t, "plain", "kind: highest, of: peak_dbz"), law(t, "weighted", "kind: highest, of: peak_dbc")).Sites[0]
	require.Len(t, site.Exposure, 3)
	neither, press := site.Exposure[0], site.Exposure[1]
	assert.Equal(t, "", neither.Group)
	assert.False(t, neither.New())
	assert.Equal(t, finding.SwitchExposure{Bundle: "weighted", Group: "press", Enrols: true, Workers: 6, Now: 5,
		Wanted: []finding.SwitchMeasure{{Channel: "action", Taken: "the highest C-weighted peak", Levels: []string{"action"}}}, Reasons: []string{"the peak level was taken with weighting Z, not C"}}, press)
}
