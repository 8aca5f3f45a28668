package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/record"
)

func model(id string, nrr float64) *record.Protector {
	return &record.Protector{ProtectorID: id, NRR: record.Number{Value: nrr, Known: nrr >= 0}}
}

func TestProtectorAtHand(t *testing.T) {
	for name, c := range map[string]struct {
		issues []record.Record
		want   string
		count  int
	}{
		"The latest of several":               {[]record.Record{issued("p1", "2021-01-01", ""), issued("p2", "2022-01-01", "")}, "p2", 2},
		"What was given back is not at hand":  {[]record.Record{issued("p1", "2021-01-01", ""), issued("p2", "2022-01-01", "2022-06-01")}, "p1", 1},
		"Not on the day on which it went":     {[]record.Record{issued("p1", "2021-01-01", "2024-01-01")}, "", 0},
		"But on the day before":               {[]record.Record{issued("p1", "2021-01-01", "2024-01-02")}, "p1", 1},
		"From the day of the issue on":        {[]record.Record{issued("p1", "2024-01-01", "")}, "p1", 1},
		"Not what is handed over later":       {[]record.Record{issued("p1", "2024-01-02", "")}, "", 0},
		"Of one day the one that stands last": {[]record.Record{issued("p1", "2021-01-01", ""), issued("p2", "2021-01-01", "")}, "p2", 2},
	} {
		t.Run(name, func(t *testing.T) {
			d := judge(t, "2024-01-01", noisy(c.issues...)...).worker()
			if c.want == "" {
				assert.Nil(t, d.Protection)
				return
			}
			require.NotNil(t, d.Protection)
			assert.Equal(t, c.want, d.Protection.Protector)
			assert.Equal(t, c.count, d.Protection.Count)
		})
	}
}

func TestLevelUnderTheProtector(t *testing.T) {
	c := func(m *record.Measurement) *record.Measurement {
		return but(m, func(m *record.Measurement) { m.TWADBC = record.Num(97) })
	}
	loud := measured("m1", "g1", "2019-11-15", 200) // 95.0 dBA
	for name, w := range map[string]struct {
		records  []record.Record
		exposure string
		under    string
		halved   string
		method   string
		missing  []string
	}{
		"A-weighted less the rating reduced by 7 dB":                {[]record.Record{loud, model("p1", 27)}, "95", "75", "85", "A-weighted average less the noise reduction rating reduced by 7 dB", nil},
		"C-weighted less the rating":                                {[]record.Record{c(loud), model("p1", 27)}, "97", "70", "83.5", "C-weighted average less the noise reduction rating", nil},
		"The C-weighted average may stand in any row":               {[]record.Record{loud, c(threshold(loud, 90)), model("p1", 27)}, "97", "70", "83.5", "C-weighted average less the noise reduction rating", nil},
		"And in any row of the worker's own":                        {[]record.Record{loud, own("o1", "2021-01-01", 200), c(threshold(own("o1", "2021-01-01", 200), 90)), model("p1", 27)}, "97", "70", "83.5", "C-weighted average less the noise reduction rating", nil},
		"An own one that names an area, too":                        {[]record.Record{loud, but(c(own("o1", "2021-01-01", 200)), func(m *record.Measurement) { m.Area = "hall-g1" }), model("p1", 27)}, "97", "70", "83.5", "C-weighted average less the noise reduction rating", nil},
		"A rating below 7 dB credits nothing":                       {[]record.Record{loud, model("p1", 5)}, "95", "95", "95", "A-weighted average less the noise reduction rating reduced by 7 dB", nil},
		"Where only bounds are known the upper counts":              {[]record.Record{threshold(loud, 70), model("p1", 27)}, "95", "75", "85", "A-weighted average less the noise reduction rating reduced by 7 dB", nil},
		"A lower bound gives no estimate":                           {[]record.Record{threshold(loud, 90), model("p1", 27)}, "", "", "", "", []string{"exposure without the protector"}},
		"A C-weighted average of one who is only known to be above": {[]record.Record{c(loud), changed("c1", "2022-01-01", "yes"), model("p1", 27)}, "", "", "", "", []string{"exposure without the protector"}},
		"A rating that is not recorded":                             {[]record.Record{loud, model("p1", -1)}, "95", "", "", "", []string{"noise reduction rating of the protector p1"}},
		"A model that is not recorded":                              {[]record.Record{loud}, "95", "", "", "", []string{"noise reduction rating of the protector p1"}},
		"Neither":                                                   {nil, "", "", "", "", []string{"noise reduction rating of the protector p1", "exposure without the protector"}},
	} {
		t.Run(name, func(t *testing.T) {
			p := judge(t, "2024-01-01", append(w.records, hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), issued("p1", "2020-02-01", ""))...).worker().Protection
			require.NotNil(t, p)
			assert.Equal(t, []string{w.exposure, w.under, w.halved, w.method}, []string{p.Exposure.String(), p.Under.String(), p.Halved.String(), p.Method})
			assert.ElementsMatch(t, w.missing, p.Missing)
			assert.Equal(t, w.under == "", p.Working == "")
			if name == "A rating below 7 dB credits nothing" {
				assert.Equal(t, "95 dBA; a rating of 5 dB less 7 dB credits nothing", p.Working)
			}
		})
	}
	p := judge(t, "2024-01-01", hired("2020-01-01", "2023-06-30"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 200), issued("p1", "2020-02-01", ""), model("p1", 27)).worker().Protection
	assert.Equal(t, []string{"exposure without the protector"}, p.Missing, "who has left is not exposed")
}

func TestFit(t *testing.T) {
	fit := func(protector, date string, passed record.Answer, par float64) *record.FitTest {
		return &record.FitTest{WorkerID: "w1", ProtectorID: protector, Date: day(date), Passed: passed, PARDB: record.Num(par)}
	}
	fitted := issued("p1", "2021-01-01", "")
	fitted.FittedBy = "t1"
	for name, c := range map[string]struct {
		records             []record.Record
		fitted, failed, par string
	}{
		"Fitted with the issue":                         {[]record.Record{fitted}, "2021-01-01", "", ""},
		"A fit test that was passed is a fitting":       {[]record.Record{fit("p1", "2021-02-01", record.Yes, 20)}, "2021-02-01", "", "20"},
		"One that was not is none":                      {[]record.Record{fit("p1", "2021-02-01", record.No, 9)}, "", "2021-02-01", "9"},
		"The latest counts":                             {[]record.Record{fit("p1", "2021-02-01", record.No, 9), fit("p1", "2021-03-01", record.Yes, 21)}, "2021-03-01", "", "21"},
		"Also when it is failed":                        {[]record.Record{fit("p1", "2021-02-01", record.Yes, 20), fit("p1", "2021-03-01", record.No, 8)}, "2021-02-01", "2021-03-01", "8"},
		"One of another model says nothing":             {[]record.Record{fit("p2", "2021-02-01", record.No, 9)}, "", "", ""},
		"Nor does one from before the issue":            {[]record.Record{fit("p1", "2020-12-31", record.No, 9)}, "", "", ""},
		"An outcome that is not recorded is no fitting": {[]record.Record{fit("p1", "2021-02-01", record.Unanswered, 15)}, "", "", "15"},
		"A follow-up is a fitting":                      {[]record.Record{follow("fitting", "", "2021-01-01"), follow("refitting", "", "2022-01-01")}, "2021-01-01", "", ""},
		"One from before the issue is not":              {[]record.Record{follow("fitting", "", "2020-12-31")}, "", "", ""},
		"A test after the as-of day is not seen":        {[]record.Record{fit("p1", "2024-01-02", record.No, 9)}, "", "", ""},
	} {
		t.Run(name, func(t *testing.T) {
			records := noisy(c.records...)
			if c.records[0] != record.Record(fitted) {
				records = append(records, issued("p1", "2021-01-01", ""))
			}
			p := judge(t, "2024-01-01", records...).worker().Protection
			assert.Equal(t, []string{c.fitted, c.failed, c.par}, []string{dateOf(p.Fitted), dateOf(p.FitFailed), p.PAR.String()})
		})
	}
}

func TestFirstProtectorOfAStretch(t *testing.T) {
	// In the program from 1 January to 30 June 2020 and again from 1 January 2022 on.
	in := []record.Record{hired("2020-01-01", "2020-06-30"), hired("2022-01-01"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 75)}
	for name, c := range map[string]struct {
		issue  *record.ProtectorIssue
		want   []string
		series []string
	}{
		"One at hand when the stretch begins":      {issued("p1", "2021-06-01", ""), []string{"", "2021-06-01"}, []string{"2021-06-01", "2022-01-01"}},
		"One given back on the first day is not":   {issued("p1", "2021-06-01", "2022-01-01"), []string{"", ""}, []string{"2021-06-01"}},
		"One given back on the second day is":      {issued("p1", "2021-06-01", "2022-01-02"), []string{"", "2021-06-01"}, []string{"2021-06-01", "2022-01-01"}},
		"One from the last day of the first":       {issued("p1", "2020-06-30", "2021-01-01"), []string{"2020-06-30", ""}, []string{"2020-06-30"}},
		"One from the day after it":                {issued("p1", "2020-07-01", "2021-01-01"), []string{"", ""}, []string{"2020-07-01"}},
		"One from the first day of the second one": {issued("p1", "2022-01-01", ""), []string{"", "2022-01-01"}, []string{"2022-01-01"}},
	} {
		t.Run(name, func(t *testing.T) {
			j := judge(t, "2024-01-01", append(in, c.issue)...)
			d := j.worker()
			require.Len(t, d.Enrolled, 2)
			assert.Equal(t, c.want, []string{dateOf(d.Enrolled[0].Issue), dateOf(d.Enrolled[1].Issue)})
			var series []string
			for _, l := range j.file("worker", "w1").Series["protector.issue"] {
				series = append(series, l.Date.String())
			}
			assert.Equal(t, c.series, series)
		})
	}
}

func TestWear(t *testing.T) {
	mine := func(date string, worn record.Answer) *record.WearCheck {
		return &record.WearCheck{WorkerID: "w1", Date: day(date), Worn: worn}
	}
	area := func(date string, observed, wearing float64) *record.WearCheck {
		return &record.WearCheck{Area: "hall-g1", Date: day(date), Observed: record.Num(observed), Wearing: record.Num(wearing)}
	}
	for name, c := range map[string]struct {
		records []record.Record
		want    string
		worn    record.Answer
		own     bool
	}{
		"The latest look at the worker":                      {[]record.Record{mine("2021-01-01", record.Yes), mine("2022-01-01", record.No)}, "2022-01-01", record.No, true},
		"All in the area wore them":                          {[]record.Record{mine("2021-01-01", record.No), area("2022-01-01", 12, 12)}, "2022-01-01", record.Yes, false},
		"Some did not, which says nothing of this one":       {[]record.Record{mine("2021-01-01", record.Yes), area("2022-01-01", 12, 11)}, "2021-01-01", record.Yes, true},
		"An older look at the area does not count":           {[]record.Record{mine("2022-01-01", record.No), area("2021-01-01", 12, 12)}, "2022-01-01", record.No, true},
		"Of one day the look at the worker counts":           {[]record.Record{mine("2022-01-01", record.No), area("2022-01-01", 12, 12)}, "2022-01-01", record.No, true},
		"Nobody looked at is not all":                        {[]record.Record{area("2022-01-01", 0, 0)}, "", record.Unanswered, false},
		"Later ones are not seen":                            {[]record.Record{area("2024-01-02", 12, 12), mine("2024-01-02", record.No)}, "", record.Unanswered, false},
		"From before the worker came it says nothing":        {[]record.Record{area("2019-12-31", 12, 12)}, "", record.Unanswered, false},
		"Who is in two groups is seen in the area of either": {[]record.Record{assigned("g0", "2020-01-01"), group("g0"), area("2022-01-01", 12, 12)}, "2022-01-01", record.Yes, false},
	} {
		t.Run(name, func(t *testing.T) {
			w := judge(t, "2024-01-01", noisy(c.records...)...).worker().Wear
			if c.want == "" {
				assert.Nil(t, w)
				return
			}
			require.NotNil(t, w)
			assert.Equal(t, c.want, w.Date.String())
			assert.Equal(t, c.worn, w.Worn)
			assert.Equal(t, c.own, w.Own)
		})
	}
}

func TestTraining(t *testing.T) {
	session := func(date string, topics ...string) *record.Training {
		return &record.Training{WorkerID: "w1", Date: day(date), Topics: topics}
	}
	d := judge(t, "2024-01-01", noisy(session("2021-02-28", "protectors"), session("2021-03-01", "noise_effects"), session("2022-03-01", "audiometry", "noise_effects"), session("2024-01-02", "protectors"))...).worker()
	assert.Equal(t, "2022-03-01", d.Training.Date.String())
	assert.Equal(t, []string{"noise_effects", "audiometry"}, d.Training.Topics, "of twelve months, the first day included")
	assert.False(t, d.Training.Silent)
	assert.Equal(t, "2021-02-28", dateOf(d.ProtectorTraining))
	d = judge(t, "2024-01-01", noisy(session("2022-03-01"))...).worker()
	assert.True(t, d.Training.Silent)
	assert.Nil(t, d.ProtectorTraining)
}
