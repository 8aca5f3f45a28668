package finding

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
)

// judged is a program of one site under two laws, old and new. A test adds findings.
func judged(list ...Finding) *Judged {
	r := &Report{Tool: Tool{"hearduty", "1"}, Program: "P", AsOf: calendar.MustParse("2026-06-30"), Cautions: []string{"a reading"},
		Sites: []Site{{ID: "a", Name: "A", Bundles: []string{"old", "new"}, Workers: 3}}, Bundles: []Bundle{{ID: "new"}, {ID: "old"}},
		Duties: []Duty{
			{Bundle: "new", ID: "fit-test", Title: "Fit test", Cite: "N 3", Topic: "protectors", Evidence: []string{"fit_test", "protector_issue"}},
			{Bundle: "new", ID: "test", Title: "Test", Cite: "N 1", Topic: "audiometry", Subject: "worker", Evidence: []string{"audiogram"}},
			{Bundle: "old", ID: "test", Title: "Test", Cite: "O 1", Topic: "audiometry", Evidence: []string{"audiogram"}},
			{Bundle: "old", ID: "posting", Title: "Posting", Cite: "O 2", Topic: "information", Evidence: []string{"document"}},
		},
		Parameters: []Parameter{
			{Bundle: "new", Name: "interval", Value: "6 months", Cite: "N 1", Seen: "text", InForce: true},
			{Bundle: "old", Name: "interval", Value: "24 months", Cite: "O 1", Seen: "text"},
			{Bundle: "old", Name: "interval", Value: "12 months", Cite: "O 1", Seen: "text", InForce: true},
			{Bundle: "old", Name: "unused", Value: "1", InForce: true},
		}, Findings: list}
	return &Judged{Report: r, From: map[string][]string{"a": {"old"}}, To: map[string][]string{"a": {"new"}}, Groups: map[[2]string]string{}, Records: map[string]int{}}
}

// stands makes a finding about a worker.
func stands(bundle, duty, topic, worker string, status Status, change ...func(*Finding)) Finding {
	f := Finding{ID: fmt.Sprint("f-", bundle, duty, worker, status), Site: "a", Bundle: bundle, Duty: duty, Topic: topic, Subject: Subject{"worker", worker}, Status: status}
	for _, c := range change {
		c(&f)
	}
	return f
}

func missing(words ...string) func(*Finding) { return func(f *Finding) { f.Missing = words } }

func about(kind, id string) func(*Finding) { return func(f *Finding) { f.Subject = Subject{kind, id} } }

// gathered takes the findings of the report into standings, as judging does one by one.
func gathered(j *Judged) *Judged {
	j.Tallies = map[[2]string]*Tally{}
	for _, f := range j.Report.Findings {
		key := [2]string{f.Site, f.Bundle}
		if j.Tallies[key] == nil {
			j.Tallies[key] = NewTally()
		}
		j.Tallies[key].Add([]Finding{f})
	}
	return j
}

func onlySite(t *testing.T, j *Judged) *SwitchSite {
	t.Helper()
	gathered(j)
	s := SwitchOf(j)
	require.Len(t, s.Sites, 1)
	return &s.Sites[0]
}

func onlyTopic(t *testing.T, j *Judged) *SwitchTopic {
	t.Helper()
	site := onlySite(t, j)
	require.Len(t, site.Topics, 1)
	return &site.Topics[0]
}

// TestSwitchMoves: a subject stands as its most urgent finding, and moves are told by how subjects stood and stand.
func TestSwitchMoves(t *testing.T) {
	topic := onlyTopic(t, judged(
		stands("old", "test", "audiometry", "1", Met), stands("new", "test", "audiometry", "1", Gap), stands("new", "test", "audiometry", "1", Met),
		stands("old", "test", "audiometry", "2", Met), stands("new", "test", "audiometry", "2", Gap), stands("new", "retest", "audiometry", "2", Gap),
		stands("old", "test", "audiometry", "3", Late), stands("old", "test", "audiometry", "3", Met), stands("new", "test", "audiometry", "3", Late),
		stands("new", "test", "audiometry", "4", Due),
		stands("old", "test", "audiometry", "5", Unproven),
	))
	assert.Equal(t, SwitchNumbers{From: map[Status]int{Met: 3, Late: 1, Unproven: 1}, To: map[Status]int{Gap: 3, Met: 1, Late: 1, Due: 1}}, topic.Numbers)
	assert.Equal(t, 1, topic.Same)
	assert.Equal(t, []SwitchMove{
		{Change: Appears, Kind: "worker", Before: NotOwed, After: "due", Number: 1, Subjects: []string{"4"}, Groups: []SwitchGroup{},
			FromDuties: []SwitchDutyNumber{}, ToDuties: []SwitchDutyNumber{{"new", "test", "N 1", 1}}},
		{Change: Changes, Kind: "worker", Before: "met", After: "gap", Number: 2, Subjects: []string{"1", "2"}, Groups: []SwitchGroup{},
			FromDuties: []SwitchDutyNumber{{"old", "test", "O 1", 2}}, ToDuties: []SwitchDutyNumber{{"new", "retest", "", 1}, {"new", "test", "N 1", 2}}},
		{Change: Vanishes, Kind: "worker", Before: "unproven", After: NotOwed, Number: 1, Subjects: []string{"5"}, Groups: []SwitchGroup{},
			FromDuties: []SwitchDutyNumber{{"old", "test", "O 1", 1}}, ToDuties: []SwitchDutyNumber{}},
	}, topic.Moves)
}

// TestSwitchDuties: duties of each side are told with their findings, also where the other side has none under the topic.
func TestSwitchDuties(t *testing.T) {
	site := onlySite(t, judged(stands("new", "fit-test", "protectors", "1", Gap), stands("new", "fit-test", "protectors", "2", Met),
		stands("old", "posting", "information", "a", Gap, about("site", "a"))))
	require.Len(t, site.Topics, 2, "the order is that of the topics")
	fit, posting := site.Topics[0], site.Topics[1]
	assert.Equal(t, []SwitchDuty{{"new", "fit-test", "Fit test", "N 3", []string{"fit_test", "protector_issue"}, map[Status]int{Gap: 1, Met: 1}}}, fit.ToDuties)
	assert.Empty(t, fit.FromDuties)
	assert.Equal(t, [2]int{0, 1}, [2]int{fit.FromHas, fit.ToHas})
	assert.Equal(t, "information", posting.Topic)
	assert.Equal(t, [2]int{1, 0}, [2]int{posting.FromHas, posting.ToHas})
	assert.Equal(t, SwitchNumbers{From: map[Status]int{Gap: 1}, To: map[Status]int{Gap: 1, Met: 1}}, site.Totals)
}

// TestSwitchValues: only parameters that decide findings are told, as in force on the day.
func TestSwitchValues(t *testing.T) {
	decides := func(f *Finding) {
		f.Facts = map[string]any{"interval": map[string]any{"value": 9.0, "seen": "text", "cite": "of another day"}, "unused": 1.0}
	}
	topic := onlyTopic(t, judged(stands("old", "test", "audiometry", "1", Met, decides), stands("new", "test", "audiometry", "1", Met, decides)))
	require.Len(t, topic.Values, 1)
	v := topic.Values[0]
	assert.Equal(t, "interval", v.Name)
	assert.Equal(t, []Parameter{{Bundle: "old", Name: "interval", Value: "12 months", Cite: "O 1", Seen: "text", InForce: true}}, v.From)
	assert.Equal(t, "6 months", v.To[0].Value)
	assert.True(t, v.Differs())
	v.To[0].Value = "12 months"
	assert.False(t, v.Differs())
	v.From = nil
	assert.True(t, v.Differs())
}

// TestSwitchExposureOnceAGroup: many workers of a group whose exposure the new law cannot take give one entry, and none of
// them is named.
func TestSwitchExposureOnceAGroup(t *testing.T) {
	j := judged()
	for i := range 20 {
		id, other := fmt.Sprintf("W%02d", i), i < 3
		j.Report.Findings = append(j.Report.Findings, stands("old", "roll", "enrolment", id, Met), stands("new", "roll", "enrolment", id, Unproven, missing("an exposure")),
			stands("old", "test", "audiometry", id, Gap))
		j.Unmeasured = append(j.Unmeasured, Unmeasured{Site: "a", Bundle: "new", Worker: id, Group: "press", Channel: "action", Taken: "a dose", Levels: []string{"limit", "action"},
			Reasons: []string{"3 dB"}, Enrols: true, Now: i > 0, EnrolsNow: i > 0, Other: other})
	}
	j.Report.Findings = append(j.Report.Findings, stands("old", "roll", "enrolment", "X", Met), stands("new", "roll", "enrolment", "X", Unproven, missing("an exposure")))
	j.Unmeasured = append(j.Unmeasured, Unmeasured{Site: "a", Bundle: "old", Worker: "X", Group: "other", Enrols: true, Now: true, EnrolsNow: true})
	site := onlySite(t, j)
	assert.Equal(t, []SwitchExposure{{Bundle: "new", Group: "press", Enrols: true, Workers: 20, Now: 19, Before: 3, Wanted: []SwitchMeasure{{"action", "a dose", []string{"action", "limit"}}}, Reasons: []string{"3 dB"}}},
		site.Exposure)
	assert.True(t, site.Exposure[0].New())
	assert.Equal(t, []SwitchNeed{{Bundle: "new", Lacks: "an exposure", Duties: []string{"roll"},
		Subjects: []SwitchSubjects{{Kind: "worker", Number: 1, IDs: []string{}, Groups: []SwitchGroup{{"", 1}}}}}}, site.Needs, "X alone is not told by group")

	roll, tests := site.Topics[0], site.Topics[1]
	require.Len(t, roll.Moves, 1)
	assert.Equal(t, 21, roll.Moves[0].Number)
	assert.Equal(t, []string{"X"}, roll.Moves[0].Subjects)
	assert.Equal(t, []SwitchGroup{{"press", 20}}, roll.Moves[0].Groups)

	require.Len(t, tests.Moves, 2)
	assert.Equal(t, [3]any{Changes, NotKnown, 19}, [3]any{tests.Moves[0].Change, tests.Moves[0].After, tests.Moves[0].Number}, "what is not known is no relief")
	assert.Equal(t, []SwitchGroup{{"press", 19}}, tests.Moves[0].Groups)
	assert.Empty(t, tests.Moves[0].Subjects)
	assert.Equal(t, [3]any{Vanishes, NotOwed, "W00"}, [3]any{tests.Moves[1].Change, tests.Moves[1].After, tests.Moves[1].Subjects[0]}, "the exposure of W00 is known today")

	j.Report.Duties[1].Subject = "site"
	tests = onlySite(t, j).Topics[1]
	require.Len(t, tests.Moves, 1)
	assert.Equal(t, [2]any{NotOwed, 20}, [2]any{tests.Moves[0].After, tests.Moves[0].Number}, "the new law asks nothing of workers here, whatever their exposure")
}

// TestSwitchNeeds: each thing that is lacking is told once, with how many lack it, and whether the old law does, too.
func TestSwitchNeeds(t *testing.T) {
	j := judged(
		stands("new", "test", "audiometry", "1", Unproven, missing("the room", "the tester")), stands("new", "retest", "audiometry", "1", Unproven, missing("the room")),
		stands("new", "test", "audiometry", "2", Unproven, missing("the room")), stands("old", "test", "audiometry", "2", Unproven, missing("the room")),
		stands("new", "survey", "monitoring", "press", Unproven, missing("the peak"), about("group", "press")),
		stands("new", "odd", "records", "3", Unproven),
	)
	j.Groups = map[[2]string]string{{"a", "1"}: "press", {"a", "2"}: "press"}
	assert.Equal(t, []SwitchNeed{
		{"new", "", []string{"odd"}, []SwitchSubjects{{"worker", 1, []string{}, []SwitchGroup{{"", 1}}}}, 0},
		{"new", "the peak", []string{"survey"}, []SwitchSubjects{{"group", 1, []string{"press"}, []SwitchGroup{}}}, 0},
		{"new", "the room", []string{"retest", "test"}, []SwitchSubjects{{"worker", 2, []string{}, []SwitchGroup{{"press", 2}}}}, 1},
		{"new", "the tester", []string{"test"}, []SwitchSubjects{{"worker", 1, []string{}, []SwitchGroup{{"press", 1}}}}, 0},
	}, onlySite(t, j).Needs)
}

// TestSwitchActs: what no record shows to be done is told once a duty, with the kinds of record of which there is none.
func TestSwitchActs(t *testing.T) {
	undone := func(f *Finding) { f.Undone = true }
	j := judged(stands("new", "fit-test", "protectors", "1", Gap, undone), stands("new", "fit-test", "protectors", "1", Gap, undone), stands("new", "fit-test", "protectors", "2", Met),
		stands("new", "test", "audiometry", "1", Gap, undone), stands("new", "test", "audiometry", "2", Gap, undone), stands("old", "test", "audiometry", "1", Gap, undone),
		stands("old", "posting", "information", "a", Gap, about("site", "a"), undone), stands("new", "roll", "enrolment", "1", Gap))
	j.Records = map[string]int{"protector_issue": 4, "audiogram": 1}
	j.Groups[[2]string{"a", "2"}] = "press"
	worker := func(groups ...SwitchGroup) []SwitchSubjects {
		return []SwitchSubjects{{"worker", len(groups), []string{}, groups}}
	}
	assert.Equal(t, []SwitchAct{
		{"new", "fit-test", "Fit test", "N 3", []string{"fit_test", "protector_issue"}, []string{"fit_test"}, worker(SwitchGroup{"", 1}), 0},
		{"new", "test", "Test", "N 1", []string{"audiogram"}, []string{}, worker(SwitchGroup{"", 1}, SwitchGroup{"press", 1}), 1},
	}, onlySite(t, j).Acts)
}

// TestSwitchSharedBundle: a bundle of both sides is no news.
func TestSwitchSharedBundle(t *testing.T) {
	j := judged(stands("new", "fit-test", "protectors", "1", Gap), stands("old", "test", "audiometry", "1", Met))
	j.From["a"] = []string{"old", "new"}
	site := onlySite(t, j)
	assert.Equal(t, map[Status]int{Gap: 1, Met: 1}, site.Totals.From)
	assert.Equal(t, map[Status]int{Gap: 1}, site.Totals.To)
	assert.Equal(t, 1, site.Topics[1].Same)
	assert.Equal(t, Vanishes, site.Topics[0].Moves[0].Change)
}

func TestTallyHasRoomForEveryTopic(t *testing.T) { assert.Len(t, Topics, topicNumber) }

// TestSwitchIsTheSame: the same input gives the same switch, whatever the order of maps.
func TestSwitchIsTheSame(t *testing.T) {
	j := judged()
	for i := range 50 {
		id := fmt.Sprint(i % 17)
		j.Report.Findings = append(j.Report.Findings, stands("old", fmt.Sprint("d", i%3), Topics[i%12], id, Statuses[i%7]), stands("new", fmt.Sprint("d", i%4), Topics[i%12], id, Statuses[i%5], missing(fmt.Sprint("m", i%6))))
		j.Unmeasured = append(j.Unmeasured, Unmeasured{Site: "a", Bundle: "new", Worker: id, Group: fmt.Sprint("g", i%3), Channel: "c", Levels: []string{"l"}, Reasons: []string{fmt.Sprint(i % 5)}, Enrols: i%2 == 0})
	}
	want := SwitchOf(j)
	for range 20 {
		assert.Equal(t, want, SwitchOf(j))
	}
}
