package dossier_test

import (
	"strconv"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// lawWith is the law of these tests with amounts of its own, dB.
type lawWith struct {
	dossier.Law
	amounts map[string]float64
}

func (l lawWith) Number(name string, day calendar.Date) (float64, bool) {
	if v, ok := l.amounts[name]; ok {
		return v, true
	}
	return l.Law.Number(name, day)
}

var sixFrequencies = []int{500, 1000, 2000, 3000, 4000, 6000}

// earOf has levels at 500, 1000, 2000, 3000, 4000 and 6000 Hz; the last of them holds for those left out.
func earOf(levels ...int) audiometry.Ear {
	var e audiometry.Ear
	for i, hz := range sixFrequencies {
		e = earBut(e, hz, audiometry.Threshold{Tenths: int16(10 * levels[min(i, len(levels)-1)]), State: audiometry.Measured})
	}
	return e
}

func audiogram(id, date, purpose string, left, right audiometry.Ear) *record.Audiogram {
	return &record.Audiogram{AudiogramID: id, WorkerID: "w1", Date: day(date), Purpose: purpose, Left: left, Right: right}
}

// judgeBy judges records of w1 as of 2026 by a scheme whose parameter is x, with an amount in dB.
func judgeBy(t require.TestingT, s audiometry.Scheme, amount float64, records ...record.Record) *dossier.Worker {
	m := osha().Measures
	m.Hearing.Shift.Scheme, m.Hearing.Sums = s, true
	return asked{asOf: "2026-01-01", measures: m, law: lawWith{osha(), map[string]float64{"x": amount}}}.judge(t, noisy(records...)...).worker()
}

// shiftsText writes id, ears, frequencies of either ear and the test confirmed of each shift.
func shiftsText(d *dossier.Worker) []string {
	var out []string
	for _, s := range d.Shifts {
		text := s.ID + " " + s.Ears
		for _, list := range [][]int{s.Hearing.LeftAt, s.Hearing.RightAt} {
			for _, hz := range list {
				text += " " + strconv.Itoa(hz)
			}
		}
		if s.Confirms != nil {
			text += " confirms " + s.Confirms.Ref
		}
		out = append(out, text)
	}
	return out
}

func unconfirmedText(d *dossier.Worker) []string {
	var out []string
	for _, u := range d.Unconfirmed {
		out = append(out, strings.TrimSpace(u.ID+" "+u.Ears+" until "+u.RetestUntil.String()+" "+dateOf(u.Again)))
	}
	return out
}

// TestAnyFrequencyTwice: 15 dB or more at any frequency, seen again in the same ear at the same frequency (NIOSH
// 98-126, section 1.6.4, secondary source).
func TestAnyFrequencyTwice(t *testing.T) {
	twice := audiometry.Scheme{Rule: "any", Frequencies: sixFrequencies, AtLeast: "x", Confirm: true}
	base, same := earOf(10), earOf(10)
	at3k, at4k := earOf(10, 10, 10, 25, 10), earOf(10, 10, 10, 10, 25, 10)
	lacks4k := earBut(earOf(10), 4000, audiometry.Threshold{State: audiometry.NotTested})
	first := audiogram("a1", "2021-03-01", "periodic", at4k, same)
	for name, c := range map[string]struct {
		then        []record.Record
		shifts      []string
		unconfirmed []string
	}{
		"Nothing since":                            {nil, nil, []string{"a1 left until 2021-03-31"}},
		"A retest shows it again":                  {[]record.Record{audiogram("a2", "2021-03-20", "retest", at4k, same)}, []string{"a2 left 4000 confirms audiogram/a1"}, nil},
		"A retest does not":                        {[]record.Record{audiogram("a2", "2021-03-20", "retest", same, same)}, nil, nil},
		"A retest shows it in the other ear":       {[]record.Record{audiogram("a2", "2021-03-20", "retest", same, at4k)}, nil, []string{"a2 right until 2021-03-31"}},
		"A retest shows it at another frequency":   {[]record.Record{audiogram("a2", "2021-03-20", "retest", at3k, same)}, nil, []string{"a2 left until 2021-03-31"}},
		"The next test shows it again":             {[]record.Record{audiogram("a2", "2022-03-01", "periodic", at4k, same)}, []string{"a2 left 4000 confirms audiogram/a1"}, nil},
		"The next test does not":                   {[]record.Record{audiogram("a2", "2022-03-01", "periodic", same, same)}, nil, nil},
		"The next test lacks the frequency":        {[]record.Record{audiogram("a2", "2022-03-01", "periodic", lacks4k, same)}, nil, []string{"a1 left until 2021-03-31 2022-03-01"}},
		"The next test by its retest":              {[]record.Record{audiogram("a2", "2022-03-01", "periodic", at4k, same), audiogram("a3", "2022-03-20", "retest", same, same)}, nil, nil},
		"A retest out of time is a next test":      {[]record.Record{audiogram("a2", "2021-04-01", "retest", at4k, same)}, []string{"a2 left 4000 confirms audiogram/a1"}, nil},
		"A test that no law asks to be compared":   {[]record.Record{audiogram("a2", "2021-09-01", "exit", at4k, at3k)}, []string{"a2 left 4000 3000 confirms audiogram/a1"}, nil},
		"An invalidated test confirms nothing":     {[]record.Record{audiogram("a2", "2022-03-01", "periodic", at4k, same), follow("invalidated", "a2", "2022-03-02")}, nil, []string{"a1 left until 2021-03-31"}},
		"Every later test that shows it is listed": {[]record.Record{audiogram("a2", "2022-03-01", "periodic", at4k, same), audiogram("a3", "2023-03-01", "periodic", at4k, same)}, []string{"a2 left 4000 confirms audiogram/a1", "a3 left 4000 confirms audiogram/a2"}, nil},
	} {
		t.Run(name, func(t *testing.T) {
			d := judgeBy(t, twice, 15, append(c.then, first, audiogram("a0", "2020-02-01", "baseline", base, base))...)
			assert.Equal(t, c.shifts, shiftsText(d))
			assert.Equal(t, c.unconfirmed, unconfirmedText(d))
		})
	}
	d := judgeBy(t, twice, 15, first, audiogram("a0", "2020-02-01", "baseline", base, base))
	assert.Equal(t, "a threshold shift that no second test has confirmed", d.Audiograms[1].Problem)
	assert.Empty(t, d.AfterShift, "it is no shift yet")
}

// TestOtherRules goes through two neighbours, the sum, and more than an amount.
func TestOtherRules(t *testing.T) {
	adjacent := audiometry.Scheme{Rule: "adjacent", Frequencies: []int{1000, 2000, 3000, 4000, 6000}, AtLeast: "x"}
	sum := audiometry.Scheme{Rule: "sum", Frequencies: []int{3000, 4000, 6000}, AtLeast: "x"}
	above := audiometry.Scheme{Rule: "mean", Frequencies: []int{3000, 4000, 6000}, Above: "x"}
	nr := func(db int) audiometry.Threshold {
		return audiometry.Threshold{Tenths: int16(10 * db), State: audiometry.NoResponse}
	}
	for name, c := range map[string]struct {
		scheme  audiometry.Scheme
		amount  float64
		left    audiometry.Ear
		shifts  []string
		lacking []string
	}{
		"two neighbours":                    {adjacent, 15, earOf(10, 10, 10, 25, 25, 10), []string{"a1 left 3000 4000"}, nil},
		"two that are none":                 {adjacent, 15, earOf(10, 25, 10, 25, 10, 25), nil, nil},
		"500 Hz is not in the list":         {adjacent, 15, earOf(25, 25, 10, 10, 10, 10), nil, nil},
		"a neighbour not tested":            {adjacent, 15, earBut(earOf(10, 10, 10, 25, 25, 10), 4000, audiometry.Threshold{State: audiometry.NotTested}), nil, []string{"left 4000 Hz"}},
		"a sum of 30":                       {sum, 30, earOf(10, 10, 10, 10, 25, 25), []string{"a1 left 3000 4000 6000"}, nil},
		"a sum of 29":                       {sum, 30, earOf(10, 10, 10, 10, 25, 24), nil, nil},
		"exactly the mean that is exceeded": {above, 10, earOf(10, 10, 10, 20), nil, nil},
		"more than that":                    {above, 10, earOf(10, 10, 10, 20, 20, 21), []string{"a1 left 3000 4000 6000"}, nil},
		"no response is above the level":    {above, 10, earBut(earOf(10, 10, 10, 20), 6000, nr(20)), []string{"a1 left 3000 4000 6000"}, nil},
		"no response below it":              {sum, 30, earBut(earOf(10, 10, 10, 10), 6000, nr(35)), nil, []string{"left ear: no response in the baseline or not far enough"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judgeBy(t, c.scheme, c.amount, audiogram("a0", "2020-02-01", "baseline", earOf(10), earOf(10)), audiogram("a1", "2021-03-01", "periodic", c.left, earOf(10)))
			assert.Equal(t, c.shifts, shiftsText(d))
			assert.ElementsMatch(t, c.lacking, d.Audiograms[1].CannotCompare)
			if name == "no response is above the level" {
				assert.True(t, d.Shifts[0].AtLeast)
				assert.Contains(t, strings.Join(d.Shifts[0].Hearing.Working, "\n"), "6000 Hz NR>20 − 10; average change at least 10.0 dB; above 10 dB: yes")
			}
		})
	}
}

func TestBaselineKinds(t *testing.T) {
	revise := func(id, date, result string) *record.FollowUp {
		return by(follow("baseline_revision", id, date), "audiologist", result, "left")
	}
	steps := []record.Record{tested("a0", "2020-02-01", "baseline", 20, 20), tested("a1", "2021-02-01", "periodic", 30, 20),
		tested("a2", "2022-02-01", "periodic", 40, 20), tested("a3", "2023-02-01", "periodic", 40, 20)}
	better := []record.Record{tested("a0", "2020-02-01", "baseline", 20, 20), tested("a1", "2021-02-01", "periodic", 10, 20), tested("a2", "2022-02-01", "periodic", 20, 20)}
	for name, c := range map[string]struct {
		kind    string
		records []record.Record
		want    []string // ids
	}{
		"standing, moved for a shift":        {"", append(steps, revise("a1", "2021-03-01", "persistent")), []string{"a1", "a2", "a3"}},
		"standing, moved twice":              {"standing", append(steps, revise("a1", "2021-03-01", ""), revise("a2", "2022-03-01", "")), []string{"a1", "a2"}},
		"original, whatever moved":           {"original", append(better, revise("a1", "2021-03-01", "improved")), nil},
		"improved, moved for an improvement": {"improved", append(better, revise("a1", "2021-03-01", "improved")), []string{"a2"}},
		"improved, moved for another reason": {"improved", append(better, revise("a1", "2021-03-01", "persistent")), nil},
		"previous":                           {"previous", steps, []string{"a1", "a2"}},
		"previous after an invalid test":     {"previous", append(steps, follow("invalidated", "a1", "2021-03-01")), []string{"a2"}},
		"previous by the retest":             {"previous", append(steps, tested("r1", "2021-02-20", "retest", 25, 20)), []string{"a2"}},
	} {
		t.Run(name, func(t *testing.T) {
			d := judgeBy(t, audiometry.Scheme{Rule: "mean", Frequencies: []int{2000, 3000, 4000}, AtLeast: "x", Baseline: c.kind}, 10, c.records...)
			var ids []string
			for _, s := range d.Shifts {
				ids = append(ids, s.ID)
			}
			assert.Equal(t, c.want, ids)
		})
	}
	twice := audiometry.Scheme{Rule: "mean", Frequencies: []int{2000, 3000, 4000}, AtLeast: "x", Baseline: "previous", Confirm: true}
	d := judgeBy(t, twice, 20, steps[0], tested("a1", "2021-02-01", "periodic", 40, 20), steps[2], steps[3])
	assert.Equal(t, []string{"a2 left 2000 3000 4000 confirms audiogram/a1"}, shiftsText(d), "the second test is held against the baseline of the first")
	assert.Equal(t, record.Num(20), d.Shifts[0].Hearing.Left)
}

func TestOtherSchemes(t *testing.T) {
	m := osha().Measures
	m.Hearing.Others = []audiometry.Scheme{
		{Name: "warning", Rule: "any", Frequencies: []int{3000, 4000, 6000}, AtLeast: "fifteen"},
		{Name: "twice", Rule: "any", Frequencies: []int{3000, 4000, 6000}, AtLeast: "fifteen", Confirm: true},
		{Name: "level", Of: "level", Rule: "any", Frequencies: []int{500, 1000, 2000}, Above: "twenty"},
		{Name: "one_sided", Of: "ears", Rule: "mean", Frequencies: []int{3000, 4000, 6000}, Above: "fifteen"},
		{Name: "without_figure", Rule: "any", Frequencies: []int{3000}, AtLeast: "never"},
	}
	law := lawWith{osha(), map[string]float64{"fifteen": 15, "twenty": 20}}
	at4k, high := earOf(10, 10, 10, 10, 30, 10), earOf(10, 10, 10, 30)
	answers := func(records ...record.Record) map[string]string {
		d := asked{asOf: "2026-01-01", measures: m, law: law}.judge(t, noisy(append(records, audiogram("a0", "2020-02-01", "baseline", earOf(10), earOf(25, 10, 10)))...)...).worker()
		out := map[string]string{}
		for _, a := range d.Audiograms {
			require.Len(t, a.Schemes, 5, "every name is there, whatever is known")
			for name, j := range a.Schemes {
				out[a.ID+" "+name] = strings.TrimSpace(j.Left.String() + " " + j.Right.String())
			}
		}
		return out
	}
	got := answers(audiogram("a1", "2021-03-01", "periodic", at4k, earOf(10)))
	assert.Equal(t, map[string]string{
		"a0 warning": "", "a0 twice": "", "a0 level": "no yes", "a0 one_sided": "no no", "a0 without_figure": "",
		"a1 warning": "yes no", "a1 twice": "no", "a1 level": "no no", "a1 one_sided": "no no", "a1 without_figure": "",
	}, got, "what no second test has shown is not known yet")
	got = answers(audiogram("a1", "2021-03-01", "periodic", at4k, earOf(10)), audiogram("r1", "2021-03-09", "retest", at4k, earOf(10)), audiogram("a2", "2022-03-01", "periodic", high, earOf(10)))
	assert.Equal(t, []string{"yes no", "yes no", "yes no", "yes no"}, []string{got["a1 twice"], got["r1 twice"], got["a2 twice"], got["a2 one_sided"]})
	got = answers(audiogram("a1", "2021-03-01", "periodic", at4k, earOf(10)), audiogram("r1", "2021-03-09", "retest", earOf(10), earOf(10)))
	assert.Equal(t, []string{"no no", "yes no"}, []string{got["a1 twice"], got["a1 warning"]}, "a retest refutes it")
}

// TestAConstantChangesNoShift: a scheme of change knows no hearing level.
func TestAConstantChangesNoShift(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		s := audiometry.Scheme{
			Rule: rapid.SampledFrom([]string{"mean", "any", "adjacent", "sum"}).Draw(t, "rule"), Frequencies: sixFrequencies, AtLeast: "x",
			Baseline: rapid.SampledFrom([]string{"", "original", "improved", "previous"}).Draw(t, "baseline"), Confirm: rapid.Bool().Draw(t, "confirm"),
		}
		draw := func(name string) audiometry.Ear {
			return earOf(rapid.SliceOfN(rapid.Map(rapid.IntRange(0, 10), func(n int) int { return 5 * n }), 6, 6).Draw(t, name)...)
		}
		records := []*record.Audiogram{
			audiogram("a0", "2020-02-01", "baseline", draw("l0"), draw("r0")), audiogram("a1", "2021-02-01", "periodic", draw("l1"), draw("r1")),
			audiogram("a2", "2021-02-11", "retest", draw("l2"), draw("r2")), audiogram("a3", "2022-02-01", "periodic", draw("l3"), draw("r3")),
		}
		if rapid.Bool().Draw(t, "no response") {
			records[1].Left[6].State = audiometry.NoResponse
		}
		constant := int16(10 * rapid.IntRange(-15, 40).Draw(t, "constant"))
		judged := func(add int16) *dossier.Worker {
			var list []record.Record
			for _, a := range records {
				c := *a
				for i := range c.Left {
					c.Left[i].Tenths, c.Right[i].Tenths = c.Left[i].Tenths+add, c.Right[i].Tenths+add
				}
				list = append(list, &c)
			}
			return judgeBy(t, s, 15, list...)
		}
		one, two := judged(0), judged(constant)
		require.Equal(t, shiftsText(one), shiftsText(two))
		require.Equal(t, unconfirmedText(one), unconfirmedText(two))
	})
}
