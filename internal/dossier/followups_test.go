package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// shifted is w1 with a baseline of 10 dB and a shift of the left ear on 1 March 2021.
func shifted(more ...record.Record) []record.Record {
	return noisy(append(more, tested("a0", "2020-02-01", "baseline", 10, 10), tested("a1", "2021-03-01", "periodic", 20, 10))...)
}

func by(f *record.FollowUp, who, result, ear string) *record.FollowUp {
	f.By, f.Result, f.Ear = who, result, ear
	return f
}

func TestRevisionOfTheBaseline(t *testing.T) {
	revise := func(ear, date string) *record.FollowUp {
		return by(follow("baseline_revision", "a1", date), "audiologist", "", ear)
	}
	for name, c := range map[string]struct {
		records                    []record.Record
		shifts                     []string // of the later tests
		ears, unfounded, undecided []string
	}{
		"Only the ear with the shift moves":                {[]record.Record{revise("left", "2021-04-01"), tested("a2", "2022-03-01", "periodic", 20, 20)}, []string{"a2 right"}, []string{"left"}, nil, nil},
		"Both ears move, one without ground":               {[]record.Record{revise("both", "2021-04-01"), tested("a2", "2022-03-01", "periodic", 30, 20)}, []string{"a2 both"}, []string{"left", "right"}, []string{"right"}, nil},
		"No ear named means both":                          {[]record.Record{revise("", "2021-04-01"), tested("a2", "2022-03-01", "periodic", 30, 19)}, []string{"a2 left"}, []string{"left", "right"}, []string{"right"}, nil},
		"A decision on the day of a test counts for it":    {[]record.Record{revise("left", "2022-03-01"), tested("a2", "2022-03-01", "periodic", 20, 10)}, nil, []string{"left"}, nil, nil},
		"A decision after a test does not":                 {[]record.Record{revise("left", "2022-03-02"), tested("a2", "2022-03-01", "periodic", 20, 10)}, []string{"a2 left"}, []string{"left"}, nil, nil},
		"An improvement is ground enough":                  {[]record.Record{by(follow("baseline_revision", "a2", "2022-04-01"), "physician", "improved", "right"), tested("a2", "2022-03-01", "periodic", 20, 5)}, []string{"a2 left"}, []string{"right"}, nil, nil},
		"An audiogram that is not there allows no verdict": {[]record.Record{by(follow("baseline_revision", "a7", "2021-04-01"), "", "", "left")}, nil, []string{"left"}, nil, []string{"left"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", shifted(c.records...)...).worker()
			var shifts []string
			for _, s := range d.Shifts[1:] {
				shifts = append(shifts, s.ID+" "+s.Ears)
			}
			assert.Equal(t, c.shifts, shifts)
			require.Len(t, d.Revisions, 1)
			r := d.Revisions[0]
			assert.Equal(t, c.ears, r.Ears)
			assert.ElementsMatch(t, c.unfounded, r.Unfounded)
			assert.ElementsMatch(t, c.undecided, r.Undecided)
		})
	}
}

func TestPersistence(t *testing.T) {
	later := tested("a2", "2022-03-01", "periodic", 20, 10)
	for name, c := range map[string]struct {
		records []record.Record
		want    []string // day of the later test, day of the first, ears, day of the opinion
	}{
		"The next test shows the shift again":     {[]record.Record{later}, []string{"2022-03-01 2021-03-01 left "}},
		"Of several in a row the latest is kept":  {[]record.Record{later, tested("a3", "2023-03-01", "periodic", 20, 10)}, []string{"2023-03-01 2021-03-01 left "}},
		"An audiologist has judged":               {[]record.Record{later, by(follow("persistence_opinion", "a2", "2022-04-01"), "audiologist", "persistent", "left")}, []string{"2022-03-01 2021-03-01 left 2022-04-01"}},
		"An opinion on the other ear is another":  {[]record.Record{later, by(follow("persistence_opinion", "a2", "2022-04-01"), "audiologist", "persistent", "right")}, []string{"2022-03-01 2021-03-01 left "}},
		"A technician's opinion is none":          {[]record.Record{later, by(follow("persistence_opinion", "a2", "2022-04-01"), "technician", "persistent", "left")}, []string{"2022-03-01 2021-03-01 left "}},
		"A revised baseline ends it":              {[]record.Record{later, by(follow("baseline_revision", "a1", "2021-05-01"), "physician", "", "left")}, nil},
		"Each ear has its own first test":         {[]record.Record{tested("a2", "2022-03-01", "periodic", 10, 20), tested("a3", "2023-03-01", "periodic", 20, 20)}, []string{"2023-03-01 2022-03-01 right "}},
		"Shifts of two years are two in the next": {[]record.Record{tested("a2", "2022-03-01", "periodic", 20, 20), tested("a3", "2023-03-01", "periodic", 20, 20)}, []string{"2023-03-01 2021-03-01 left ", "2023-03-01 2022-03-01 right "}},
	} {
		t.Run(name, func(t *testing.T) {
			var got []string
			for _, p := range judge(t, "2024-01-01", shifted(c.records...)...).worker().Persistent {
				got = append(got, p.Date.String()+" "+p.Shift.Date.String()+" "+p.Ears+" "+dateOf(p.Opinion))
			}
			assert.Equal(t, c.want, got)
		})
	}
}

func TestLapse(t *testing.T) {
	determined := tested("a1", "2021-03-01", "periodic", 20, 10)
	determined.DeterminedOn = day("2021-03-11")
	records := func(dose float64, m2 ...record.Record) []record.Record {
		return append([]record.Record{hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), threshold(measured("m1", "g1", "2019-11-15", 75), 80),
			threshold(measured("m1", "g1", "2019-11-15", dose), 90), tested("a0", "2020-02-01", "baseline", 10, 10), determined,
			tested("a2", "2022-03-01", "periodic", 10, 10)}, m2...)
	}
	for name, c := range map[string]struct {
		dose    float64
		below   record.Answer
		after   []string
		records []record.Record
	}{
		"At the limit it lapses":           {100, record.Yes, []string{"2021-03-11..2022-02-28"}, nil},
		"Above the limit it stands":        {100.1, record.No, []string{"2021-03-11.."}, nil},
		"Where that is unknown it stands":  {75, record.Unanswered, []string{"2021-03-11.."}, []record.Record{changed("c1", "2022-03-01", "unknown")}},
		"A new shift begins anew":          {75, record.Yes, []string{"2021-03-11..2022-02-28", "2023-03-01.."}, []record.Record{tested("a3", "2023-03-01", "periodic", 30, 10)}},
		"It ends with the time in program": {100.1, record.No, []string{"2021-03-11..2022-12-31"}, []record.Record{changed("c1", "2022-12-01", "no"), threshold(measured("m2", "g1", "2023-01-01", 10), 80)}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", records(c.dose, append(c.records, notice("persistent_shift_lifted", "2022-03-05", record.Yes))...)...).worker()
			require.Len(t, d.Lapsed, 1)
			l := d.Lapsed[0]
			assert.Equal(t, []string{"a2", "2021-03-01", "left", "2022-03-05"}, []string{l.ID, l.Shift.Date.String(), l.Ears, dateOf(l.Notice)})
			assert.Equal(t, c.below, l.BelowLimit)
			assert.Equal(t, c.after, shown(d.AfterShift))
		})
	}
}

func TestRecordables(t *testing.T) {
	at := func(id, date string, left, right int) *record.Audiogram {
		return tested(id, date, "periodic", left, right)
	}
	for name, c := range map[string]struct {
		records []record.Record
		want    []string // audiogram, ears, compared with
	}{
		"25 dB exactly, in the ear with the shift": {[]record.Record{at("a1", "2021-03-01", 25, 10)}, []string{"a1 left audiogram/a0"}},
		"24 dB is below":                                                 {[]record.Record{at("a1", "2021-03-01", 24, 10)}, nil},
		"25 dB in the other ear does not count":                          {[]record.Record{at("a1", "2021-03-01", 10, 25), at("a2", "2022-03-01", 20, 24)}, []string{"a1 right audiogram/a0"}},
		"After a case that ear is held against the case":                 {[]record.Record{at("a1", "2021-03-01", 25, 10), at("a2", "2022-03-01", 34, 10)}, []string{"a1 left audiogram/a0"}},
		"And 10 dB more are a new one":                                   {[]record.Record{at("a1", "2021-03-01", 25, 10), at("a2", "2022-03-01", 35, 10)}, []string{"a1 left audiogram/a0", "a2 left audiogram/a1"}},
		"The other ear is still held against the baseline":               {[]record.Record{at("a1", "2021-03-01", 25, 10), at("a2", "2022-03-01", 34, 30)}, []string{"a1 left audiogram/a0", "a2 right audiogram/a0"}},
		"A case found not work-related leaves the baseline in its place": {[]record.Record{at("a1", "2021-03-01", 25, 10), by(follow("medical_opinion", "a1", "2021-04-01"), "audiologist", "not_work_related", ""), at("a2", "2022-03-01", 34, 10)}, []string{"a1 left audiogram/a0", "a2 left audiogram/a0"}},
		"Whose licence nobody knows decides nothing":                     {[]record.Record{at("a1", "2021-03-01", 25, 10), by(follow("medical_opinion", "a1", "2021-04-01"), "Dr. Who", "not_work_related", ""), at("a2", "2022-03-01", 34, 10)}, []string{"a1 left audiogram/a0"}},
		"A retest without shift undoes it":                               {[]record.Record{at("a1", "2021-03-01", 25, 10), tested("r1", "2021-03-20", "retest", 12, 10)}, nil},
	} {
		t.Run(name, func(t *testing.T) {
			var got []string
			for _, r := range judge(t, "2024-01-01", noisy(append(c.records, tested("a0", "2020-02-01", "baseline", 10, 10))...)...).worker().Recordables {
				got = append(got, r.ID+" "+r.Ears+" "+r.Since)
			}
			assert.Equal(t, c.want, got)
		})
	}
}

func TestWhatFollowsARecordableCase(t *testing.T) {
	first := tested("a1", "2021-03-01", "periodic", 30, 10)
	first.DeterminedOn = day("2021-03-09")
	retest := tested("a2", "2021-03-20", "retest", 30, 10)
	common := []record.Record{tested("a0", "2020-02-01", "baseline", 10, 10), first, follow("log_entry", "a1", "2021-04-01"), follow("log_removal", "", "2021-05-01"),
		by(follow("medical_opinion", "", "2021-04-02"), "physician", "work_related", ""), follow("log_entry", "", "2022-03-01"), tested("a3", "2022-03-01", "periodic", 30, 10)}
	r := judge(t, "2024-01-01", noisy(common...)...).worker().Recordables[0]
	assert.Equal(t, []string{"2021-03-09", "2021-03-31", "", "2021-04-01", "2021-05-01", "2021-04-02", ""},
		[]string{r.KnownOn.String(), r.RetestUntil.String(), dateOf(r.Retest), dateOf(r.Entry), dateOf(r.Removal), dateOf(r.WorkRelated), dateOf(r.NotWorkRelated)})
	r = judge(t, "2024-01-01", noisy(append(common, retest)...)...).worker().Recordables[0]
	assert.Equal(t, []string{"a2", "2021-03-20", "", "2021-03-20", "2021-04-01"}, []string{r.ID, r.KnownOn.String(), r.RetestUntil.String(), dateOf(r.Retest), dateOf(r.Entry)},
		"an entry that names the first test is that of its retest")
}

func TestNoticesById(t *testing.T) {
	next := tested("a2", "2022-03-01", "periodic", 10, 10)
	named := func(id, date string) *record.Notice {
		n := notice("shift", date, record.Yes)
		n.AudiogramID = id
		return n
	}
	for name, c := range map[string]struct {
		notices []record.Record
		want    string
	}{
		"By the id of the test, whenever it was":         {[]record.Record{named("a1", "2022-06-01")}, "2022-06-01"},
		"One about another test does not count":          {[]record.Record{named("a2", "2021-03-10")}, ""},
		"Without id from the day of the test":            {[]record.Record{notice("shift", "2021-03-01", record.Yes)}, "2021-03-01"},
		"Not from the day before":                        {[]record.Record{notice("shift", "2021-02-28", record.Yes)}, ""},
		"To the day before the next test":                {[]record.Record{notice("shift", "2022-02-28", record.Yes)}, "2022-02-28"},
		"Not on the day of the next test":                {[]record.Record{notice("shift", "2022-03-01", record.Yes)}, ""},
		"The first of several":                           {[]record.Record{notice("shift", "2021-04-01", record.Yes), notice("shift", "2021-03-20", record.Yes)}, "2021-03-20"},
		"One about something else does not count":        {[]record.Record{notice("exposure", "2021-03-10", record.Yes)}, ""},
		"One that was not given in writing is no notice": {[]record.Record{notice("shift", "2021-03-10", record.No), notice("shift", "2021-03-11", record.Unanswered)}, ""},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", shifted(append(c.notices, next)...)...).worker()
			require.Len(t, d.Shifts, 1)
			assert.Equal(t, c.want, dateOf(d.Shifts[0].Notice))
			if name == "One that was not given in writing is no notice" {
				assert.Equal(t, []string{"2021-03-10", "2021-03-11"}, []string{dateOf(d.Shifts[0].OralNotice), dateOf(d.Shifts[0].UnclearNotice)})
			}
		})
	}
}

func TestFollowUpsOfAShift(t *testing.T) {
	issue := issued("p1", "2021-03-15", "")
	issue.FittedBy = "t1"
	d := judge(t, "2024-01-01", shifted(
		issue, issued("p0", "2020-01-01", "2021-03-01"), follow("refitting", "", "2021-03-20"), follow("retraining", "a1", "2021-03-25"),
		&record.Training{WorkerID: "w1", Date: day("2021-03-12"), Topics: record.List{"protectors"}},
		by(follow("referral_decision", "a1", "2021-03-18"), "t1", "no_referral_needed", ""), &record.Tester{TesterID: "t1", Qualification: "audiologist"},
		by(follow("medical_opinion", "a1", "2021-03-19"), "t1", "not_work_related", ""), by(follow("medical_opinion", "a1", "2021-03-21"), "physician", "not_work_related", ""),
	)...).worker()
	s := d.Shifts[0]
	assert.False(t, s.HadProtector, "the protector was given back on the day of the test")
	assert.Equal(t, []string{"2021-03-15", "2021-03-12", "2021-03-18", "2021-03-21", "2021-03-19"},
		[]string{dateOf(s.Fitting), dateOf(s.Retraining), dateOf(s.Decision), dateOf(s.NotWorkRelated), dateOf(s.OtherOpinion)})
	assert.Equal(t, "audiologist", s.DecisionBy)
	assert.Equal(t, record.No, s.ReferralNeeded)
	d = judge(t, "2024-01-01", shifted(by(follow("referral", "", "2021-03-18"), "physician", "", ""))...).worker()
	assert.Equal(t, record.Yes, d.Shifts[0].ReferralNeeded, "whoever refers has decided to")
	assert.Equal(t, "2021-03-18", dateOf(d.Shifts[0].Referral))
}

func TestReferencesToAudiogramsThatAreMissing(t *testing.T) {
	n := notice("shift", "2021-04-01", record.Yes)
	n.AudiogramID = "a8"
	d := judge(t, "2024-01-01", shifted(follow("referral", "a9", "2021-03-18"), follow("fitting", "a9", "2021-03-19"), n)...).worker()
	assert.Equal(t, []dossier.Dangling{
		{Link: dossier.Link{Date: day("2021-03-18"), Ref: "follow_up/referral/w1@2021-03-18"}, ID: "a9"},
		{Link: dossier.Link{Date: day("2021-04-01"), Ref: "notice/shift/w1@2021-04-01"}, ID: "a8"},
	}, d.Dangling)
	marked := judge(t, "2024-01-01", shifted(tested("a5", "2022-03-01", "baseline", 10, 10), tested("a6", "2023-03-01", "baseline", 10, 10), follow("baseline_revision", "a6", "2023-03-02"))...).worker()
	assert.Equal(t, []dossier.Link{{Date: day("2022-03-01"), Ref: "audiogram/a5"}}, marked.MarkedLater)
}

func TestQuietNotices(t *testing.T) {
	named := notice("quiet_period", "2020-02-10", record.Yes)
	named.AudiogramID = "a1"
	b := judge(t, "2024-01-01", shifted(notice("quiet_period", "2020-01-30", record.No), notice("quiet_period", "2020-02-01", record.No), named, notice("quiet_period", "2020-02-02", record.No))...).worker().Baseline
	assert.Equal(t, []string{"2020-02-01", "2020-02-02"}, []string{dateOf(b.QuietNotice), dateOf(b.LateQuietNotice)}, "one on the day of the test is in time, one about another test counts for nothing")
}
