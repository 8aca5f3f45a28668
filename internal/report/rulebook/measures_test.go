package rulebook_test

import (
	"slices"
	"strings"
	"testing"
	"testing/fstest"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle/bundletest"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/report/rulebook"
)

// measured gives the text of a book of the small bundle with measures of its own.
func measured(t *testing.T, change func(*dossier.Measures)) string {
	t.Helper()
	b := small(t)
	change(&b.Measures)
	return textOf(t, rulebook.Of(b, day("2026-06-30")), 1000)
}

func TestExposureInWords(t *testing.T) {
	for name, c := range map[string]struct {
		change func(*dossier.ExposureMeasures)
		want   []string
	}{
		"A level of the day": {func(e *dossier.ExposureMeasures) { e.Channels["action"] = dossier.Channel{Kind: "level", Cite: "N 7"} }, []string{
			"Reached: a noise exposure level of the day, L_EX,8h, of at least 50 %\n", "Expressed as: a level in dBA over a day of 8 hours by equal energy, L_EX,8h (3 dB more for twice the energy)\n", "Paragraph: N 7\n"}},
		"A level of the week": {func(e *dossier.ExposureMeasures) { e.Channels["action"] = dossier.Channel{Kind: "level", Weekly: true} }, []string{
			"Reached: a noise exposure level of the week, L_EX,w, of at least 50 %\n", "averaged over the week of five 8-hour days by the days worked, L_EX,w"}},
		"A level of the week where the site elects it": {func(e *dossier.ExposureMeasures) {
			e.Channels["action"], e.Channels["week"] = dossier.Channel{Kind: "level"}, dossier.Channel{Kind: "level", Weekly: true}
			e.Levels["action"] = dossier.Threshold{Channel: "action", Above: "dose", Instead: &dossier.Instead{Choice: "by_mail", Channel: "week"}}
		}, []string{"Reached: a noise exposure level of the day, L_EX,8h, of more than 50 % (where the site elects by_mail: a noise exposure level of the week, L_EX,w)\n", "the value on the channel action exceeds the parameter dose, N 2; where the site elects by_mail, the channel week stands in\n"}},
		"A highest value": {func(e *dossier.ExposureMeasures) {
			e.Channels["action"] = dossier.Channel{Kind: "highest", Of: "peak_dbc"}
		}, []string{
			"Reached: a peak sound pressure level, C-weighted, of at least 50 %\n", "Expressed as: the highest value on record: peak sound pressure level, C-weighted\n"}},
		"A figure without words": {func(e *dossier.ExposureMeasures) {
			e.Channels["action"] = dossier.Channel{Kind: "highest", Of: "new_figure"}
		}, []string{
			"Reached: a highest new figure, of at least 50 %\n"}},
		"Any of several": {func(e *dossier.ExposureMeasures) {
			e.Channels["peak"] = dossier.Channel{Kind: "highest", Of: "max_dba"}
			e.Levels["peak"] = dossier.Threshold{Channel: "peak", Above: "shift"}
			e.Levels["past"] = dossier.Threshold{Channel: "peak", Above: "not_yet"}
			e.Levels["either"] = dossier.Threshold{Any: []string{"action", "peak", "past"}}
		}, []string{"Reached: a noise dose of at least 50 %, an 8-hour average of at least 85 dBA; or a highest continuous sound level, A-weighted, slow, of more than 10 dB\n",
			"On what terms: one of the levels action, peak and past is enough; one whose parameter has no value on the day is left out", "more than not_yet (no value in force on 2026-06-30)\n"}},
		"Margins by class":    {func(e *dossier.ExposureMeasures) { e.Margins = map[string]string{"2": "shift"} }, []string{"Margins: accuracy class 2: a level is raised by 10 dB (shift) before it is compared\n", "Used by the margin of accuracy class 2, the threshold shift."}},
		"A notice that lasts": {func(e *dossier.ExposureMeasures) { e.NoticeLasts = "posting_time" }, []string{"Notices: a written notice of an exposure spares another one of an exposure at the same levels for 30 days (posting_time)\n", "Used by posting, the retest after a shift, the time for which a notice holds."}},
		"A table of times": {func(e *dossier.ExposureMeasures) {
			c := e.Channels["action"]
			c.Durations = []dossier.Limit{{DBA: 90, Minutes: 480}, {DBA: 92, Minutes: 360}}
			e.Channels["action"] = c
		}, []string{"Permitted in a day: 90 dBA for 480 minutes, 92 dBA for 360 minutes; a level between two rows takes the higher one"}},
		"By sampling": {func(e *dossier.ExposureMeasures) { e.Several, e.Strategy, e.Decision = "sampled", "full_day", "zones" }, []string{
			"Several results: where a group has several results since its latest change, their mean counts", "Strategy: samples are taken over full days (ISO 9612)\n", "Uncertain levels: a level whose uncertainty, L − U to L + U, reaches over the limit decides nothing"}},
		"By sampling, best estimate": {func(e *dossier.ExposureMeasures) { e.Several = "sampled" }, []string{"Uncertain levels: the best estimate of a level is compared with the limit\n"}},
	} {
		got := measured(t, func(m *dossier.Measures) { c.change(&m.Exposure) })
		for _, want := range c.want {
			assert.Contains(t, got, want, name)
		}
	}
	assert.NotContains(t, measured(t, func(*dossier.Measures) {}), "Uncertain levels")
}

func TestHearingInWords(t *testing.T) {
	s := audiometry.Scheme{Name: "early_warning", Rule: "any", Frequencies: []int{3000, 4000, 6000}, Above: "shift", Baseline: "previous", Confirm: true, Cite: "N 8"}
	for name, c := range map[string]struct {
		change func(*audiometry.Scheme)
		want   string
	}{
		"Any frequency":      {func(*audiometry.Scheme) {}, "Also judged: early warning\n    Shown when: the worsening of an ear against its baseline, at any one of 3000, 4000 or 6000 Hz, is more than 10 dB (shift)\n    Compared with: the test before\n    Confirmation: it counts only once a second test shows it in the same ear at the same frequency\n    Paragraph: N 8\n"},
		"Two neighbours":     {func(s *audiometry.Scheme) { s.Rule = "adjacent" }, "against its baseline, at two neighbours of 3000, 4000 and 6000 Hz, is more than 10 dB at both (shift)\n"},
		"A sum of levels":    {func(s *audiometry.Scheme) { s.Rule, s.Of, s.Baseline = "sum", "level", "" }, "Shown when: the hearing level of an ear, added up over 3000, 4000 and 6000 Hz, is more than 10 dB (shift)\n    Confirmation"},
		"Between the ears":   {func(s *audiometry.Scheme) { s.Rule, s.Of, s.Baseline = "mean", "ears", "" }, "Shown when: the difference between the ears in one test, averaged over 3000, 4000 and 6000 Hz, is more than 10 dB (shift)\n"},
		"A peak":             {func(s *audiometry.Scheme) { s.Rule, s.Of, s.Baseline, s.Over = "peak", "level", "", []int{1000, 2000} }, "Shown when: the hearing level of an ear, at any one of 3000, 4000 or 6000 Hz, is more than 10 dB and higher than at all of 1000 and 2000 Hz (shift)\n"},
		"A rule to come":     {func(s *audiometry.Scheme) { s.Rule = "median" }, "against its baseline, by the rule median over 3000, 4000 and 6000 Hz, is more than 10 dB (shift)\n"},
		"The first baseline": {func(s *audiometry.Scheme) { s.Baseline = "original" }, "Compared with: the first valid baseline, whatever was revised later\n"},
	} {
		scheme := s
		c.change(&scheme)
		assert.Contains(t, measured(t, func(m *dossier.Measures) { m.Hearing.Others = []audiometry.Scheme{scheme} }), c.want, name)
	}
	none := measured(t, func(m *dossier.Measures) {
		m.Hearing = dossier.HearingMeasures{Required: []int{500, 1000}, Afterwards: true}
	})
	assert.Contains(t, none, "The bundle knows no threshold shift by which a worker's tests are compared with a baseline.\nTested frequencies: 500 and 1000 Hz\nAfter a test: all that was done and told after each test is looked at\n")
	assert.NotContains(t, none, "The threshold shift\n")
}

func TestProtectionInWords(t *testing.T) {
	got := measured(t, func(m *dossier.Measures) {
		m.Protection = dossier.ProtectionMeasures{Rating: "octave", Channel: "action", Derating: "csa", Percent: 84, RealWorld: "shift", Bands: "not_yet"}
	})
	assert.Contains(t, got, "By: the attenuation in octave bands, as the laboratory measured it\nWhat is lowered: the 8-hour level on the channel action\nCut for use at work: the rating is cut to 70 % for muffs and 50 % for plugs\nWearers: attenuation that 84 % of wearers reach is assumed\nUse outside the laboratory: 10 dB (shift) are added to the level at the ear\nToo little or too much: the level at the ear is graded against the action level of not_yet (no value in force on 2026-06-30)\n")
	got = measured(t, func(m *dossier.Measures) {
		m.Protection = dossier.ProtectionMeasures{Rating: "snr", Channel: "action", RealWorld: "shift", RealWorldByType: map[string]string{"helmet_muff": "dose"}}
	})
	assert.Contains(t, got, "By: the single number rating (SNR), taken off the C-weighted level\n")
	assert.Contains(t, got, "Use outside the laboratory:\n  - helmet muff: 50 % (dose) are added to the level at the ear\n  - any other type: 10 dB (shift) are added to the level at the ear\n")
	assert.Contains(t, got, "Used by the exposure level action, the rating of protectors of the type helmet muff.")
	assert.Contains(t, measured(t, func(m *dossier.Measures) { m.Protection = dossier.ProtectionMeasures{} }), "The bundle names no method: the level under a protector is not estimated.\n")
}

func TestDocumentsInWords(t *testing.T) {
	got := measured(t, func(m *dossier.Measures) {
		m.Documents = dossier.DocumentMeasures{PostedFor: "posting_time", Periodic: "noise_evaluation", Every: "posting_time", Short: "not_yet"}
	})
	assert.Contains(t, got, "Posting: a report stays posted for 30 days (posting_time)\nPeriods: a document of the kind noise_evaluation begins a period of 30 days (posting_time), at whose end the next one is due\nShort periods: a period that ends sooner than not_yet (no value in force on 2026-06-30) after a change is short\n")
	assert.NotContains(t, measured(t, func(*dossier.Measures) {}), "Posting:")
}

func TestWorkingDaysInWords(t *testing.T) {
	got := measured(t, func(m *dossier.Measures) {
		m.Training.TopicsOver = calendar.Interval{Count: 2, Unit: calendar.Years}
		m.WorkingDays = &dossier.WorkingDays{Rest: []string{"saturday", "sunday"}, Holidays: []dossier.Holiday{{Date: "2026-01-01", Name: "New Year"}, {Date: "2026-05-01"}}, KnownUntil: "2027-12-31", Cite: "N 9"}
	})
	assert.Contains(t, got, "Training: the topics of sessions add up over 2 years before the latest one\nDays of rest: saturday, sunday\nHolidays: 2026-01-01 New Year, 2026-05-01\nKnown until: 2027-12-31; a time in working days that reaches further is unproven\nParagraph: N 9\n")
	assert.Contains(t, measured(t, func(m *dossier.Measures) { m.WorkingDays = &dossier.WorkingDays{KnownUntil: "2026-12-31"} }), "Holidays: none are listed up to 2026-12-31\n")
}

// TestTimesInWords looks at each field of an obligation that names a time.
func TestTimesInWords(t *testing.T) {
	for fields, want := range map[string]string{
		`"after": input.as_of, "within": "posting_time", "by": null`:                                                        "within 30 days: time to post",
		`"before": input.as_of, "within": "posting_time", "by": null`:                                                       "before it, but not longer before than 30 days: time to post",
		`"during": {"from": input.as_of, "to": null}, "by": [], "every": "posting_time"`:                                    "at least every 30 days: time to post",
		`"during": {"from": input.as_of, "to": null}, "by": [], "every": "yearly"`:                                          "at least once in each calendar year: the year",
		`"during": {"from": input.as_of, "to": null}, "by": [], "every": "yearly", "first": "posting_time"`:                 "the first time within 30 days: time to post",
		`"during": {"from": input.as_of, "to": null}, "by": [], "every": "yearly", "until": "five", "then": "posting_time"`: "that holds for the first 5 years: five years|after that at least every 30 days: time to post",
		`"holds": true, "for": "posting_time"`:                                                                              "for 30 days: time to post",
		`"holds": true, "for": "yearly"`:                                                                                    "until the end of the calendar year after: the year",
		`"value": 1, "at_most": "dose"`:                                                                                     "at most 50 %: dose at which the note is posted",
		`"value": 1, "below": "dose"`:                                                                                       "less than 50 %: dose at which the note is posted",
		`"value": 1, "at_least": "dose"`:                                                                                    "at least 50 %: dose at which the note is posted",
		`"value": 1, "above": "dose"`:                                                                                       "more than 50 %: dose at which the note is posted",
		`"value": 1, "above": which`:                                                                                        "more than 50 %: dose at which the note is posted|more than 10 dB: shift of hearing",
		`"value": 1, "above": chosen(1)`:                                                                                    "more than 50 %: dose at which the note is posted",
		`"value": data.parameters.dose.about, "above": "shift"`:                                                             "more than 10 dB: shift of hearing|50 %: dose at which the note is posted",
		`"holds": true`: "no time and no limit of its own; see what is asked",
	} {
		b := small(t, func(files fstest.MapFS) {
			bundletest.Change(files, "small/parameters/data.yaml", "words:", "yearly: {about: The year, values: [{from: \"2000-01-01\", value: {calendar_years: 1}, cite: N 6, seen: text}]}\nfive: {about: Five years, values: [{from: \"2000-01-01\", value: {years: 5}, cite: N 6, seen: text}]}\nwords:")
			bundletest.Change(files, "small/duty/posting/posting.rego", "\"after\": input.as_of,\n\t\"within\": \"posting_time\",\n\t\"by\": null,\n", fields+",\n")
			helpers := "words := []"
			if strings.Contains(fields, "which") {
				helpers += "\n\nwhich := \"dose\" if input.enrolled_now > 1\n\nelse := \"shift\""
			}
			if strings.Contains(fields, "chosen") {
				helpers += "\n\nchosen(_) := \"dose\""
			}
			bundletest.Change(files, "small/duty/posting/posting.rego", "words := [w | some period in data.parameters.words.values; some w in period.value]", helpers)
		})
		got := whenOf(t, rulebook.Of(b, day("2026-06-30")))
		parts := strings.Split(want, "|")
		if !strings.Contains(fields, "every") {
			assert.Len(t, got, len(parts), "%s: %v", fields, got)
		}
		for _, part := range parts {
			assert.True(t, slices.ContainsFunc(got, func(s string) bool { return strings.HasPrefix(s, part) }), "%s: %v", fields, got)
		}
	}
}

// TestTimesOfJoinedObjects looks at a rule that joins an obligation of two objects.
func TestTimesOfJoinedObjects(t *testing.T) {
	for field, want := range map[string]string{"after": "within 30 days: time to post", "before": "before it, but not longer before than 30 days: time to post"} {
		b := small(t, func(files fstest.MapFS) {
			bundletest.Change(files, "small/duty/posting/posting.rego", "{\n\t\"after\": input.as_of,\n\t\"within\": \"posting_time\",\n\t\"by\": null,\n}", "object.union({\""+field+"\": input.as_of, \"by\": null}, {\"within\": \"posting_time\"})")
		})
		assert.Contains(t, whenOf(t, rulebook.Of(b, day("2026-06-30")))[0], want)
	}
}

// TestReasonsInWords looks at reasons that a rule writes in other ways than as a plain text.
func TestReasonsInWords(t *testing.T) {
	b := small(t, func(files fstest.MapFS) {
		rule := "small/duty/posting/posting.rego"
		bundletest.Change(files, rule, "not_owed contains \"nobody is in the program\" if input.enrolled_now == 0", "not_owed contains why if input.enrolled_now == 0\n\nwhy := \"it rains\" if input.enrolled_now == 0\n\nelse := \"it snows\"\n\nnot_owed contains reason if some reason in [\"it hails\"]")
		bundletest.Change(files, rule, "\"lifted\": \"the post office posts it\"", "\"lifted\": concat(\" \", [\"by\", input.id])")
		bundletest.Change(files, rule, "\"ask\": \"Is the note true?\"", "\"ask\": sprintf(\"Is the note of %s true?\", [input.id])")
	})
	printed := textOf(t, rulebook.Of(b, day("2026-06-30")), 1000)
	assert.Contains(t, printed, "Not asked where:\n      - it rains\n      - it snows\n      - as its rule works out from the records\n      - there are … in it\n")
	assert.Contains(t, printed, "Lifted where: as its rule works out from the records (N 5)\n")
	assert.Contains(t, printed, "Left to a professional: Is the note of … true? (to be answered by: works council)\n")
}

// whenOf gives the times and limits that the book of the small bundle tells of its duty.
func whenOf(t *testing.T, book *rulebook.Book) []string {
	t.Helper()
	for _, s := range book.Sections {
		for _, part := range s.Parts {
			for _, e := range part.Entries {
				if i := slices.IndexFunc(e.Rows, func(r rulebook.Row) bool { return r.Label == "When and how much" }); i >= 0 {
					return e.Rows[i].Texts
				}
			}
		}
	}
	require.Fail(t, "the book has no duty")
	return nil
}

// TestFieldsToCome: a field that the book has no words for is told with its documentation; one that is empty is not.
func TestFieldsToCome(t *testing.T) {
	type inner struct {
		DB   float64 `json:"db"`
		From string  `json:"from"`
	}
	b, on := small(t), day("2026-06-30")
	got := rulebook.Rest(b, on, struct {
		audiometry.Scheme
		Waiting string         `json:"waiting_time,omitempty" doc:"parameter: time to wait"`
		Share   float64        `json:"share" doc:"share of what counts, percent"`
		Many    map[string]int `json:"many"`
		One     *inner         `json:"one" doc:"a part"`
		Words   []string       `json:"words" doc:"words"`
		Yes     bool           `json:"yes" doc:"whether"`
		Empty   string         `json:"empty" doc:"nothing"`
		Hidden  int            `json:"-"`
	}{
		Waiting: "posting_time", Share: 12.5, Many: map[string]int{"a": 1}, One: &inner{3, "x"}, Words: []string{"b", "c"}, Yes: true, Hidden: 1,
	})
	assert.Equal(t, []rulebook.Row{
		{Label: "Waiting time", Texts: []string{"30 days (posting_time) (parameter: time to wait)"}},
		{Label: "Share", Texts: []string{"12.5 (share of what counts, percent)"}},
		{Label: "Many", Texts: []string{"1 a"}},
		{Label: "One", Texts: []string{"3 db, x from (a part)"}},
		{Label: "Words", Texts: []string{"b, c (words)"}},
		{Label: "Yes", Texts: []string{"yes (whether)"}},
	}, got)
}

// TestToldFieldsExist holds the names of the fields that the book has words for to the types.
func TestToldFieldsExist(t *testing.T) {
	for kind, names := range rulebook.Told() {
		var fields []string
		for i := range kind.NumField() {
			name, _, _ := strings.Cut(kind.Field(i).Tag.Get("json"), ",")
			fields = append(fields, name)
		}
		for _, name := range strings.Fields(names) {
			assert.Contains(t, fields, name, kind)
		}
	}
}

func TestRetestInWords(t *testing.T) {
	got := measured(t, func(m *dossier.Measures) { m.Hearing.Shift.RetestFrom, m.Hearing.Shift.RetestOnce = "received", true })
	assert.Contains(t, got, "Retest: the first one only, within 30 days of the day on which the employer received its result, may stand in for the test (posting_time)\n")
	assert.Contains(t, measured(t, func(*dossier.Measures) {}), "Retest: one within 30 days of the test may stand in for the test (posting_time)\n")
}
