package bundle

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
)

// The tests of this file hold br-nr15-nr7 to the numbers and the table of its sheet as printed.

const (
	brazil     = "br-nr15-nr7"
	of1978     = "1978-06-08" // date of Portaria MTb 3.214; text
	ofNR9      = "1994-12-29" // from memory
	ofOldAnnex = "1998-04-22" // from memory
	ofAnnexII  = "2022-01-03" // from memory
	oldAnnex   = "NR-7 Quadro II Annex I (1998)"
	annexII    = "NR-7 Annex II item "
)

// brazilNumbers are the numbers of sheet sections 2 to 4 and the times of section 3, with the marks of the sheet.
var brazilNumbers = joined(
	[]datedNumber{
		{sheetNumber{parameter: "criterion_level", number: 85, unit: "dBA", cite: "NR-15 Annex 1, table", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "exchange_rate", number: 5, unit: "dB", cite: "NR-15 Annex 1, table", from: of1978, seen: "secondary"}, ""},
		{sheetNumber{parameter: "tolerance_dose", number: 100, unit: "%", cite: "NR-15 Annex 1 item 6", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "action_dose", number: 50, unit: "%", cite: "NR-9 9.6.1 c (old 9.3.6.2 b)", from: ofNR9, seen: "secondary"}, ""},
		{sheetNumber{parameter: "action_level", number: 80, unit: "dBA", cite: "NR-9 9.6.1 c (old 9.3.6.2 b)", from: ofNR9, seen: "secondary"}, ""},
		{sheetNumber{parameter: "continuous_ceiling", number: 115, unit: "dBA", cite: "NR-15 Annex 1 items 5 and 7", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "impulse_limit", number: 130, unit: "dB", cite: "NR-15 Annex 2 item 2", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "impact_limit_fast", number: 120, unit: "dBC", cite: "NR-15 Annex 2 item 3", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "impulse_grave_risk", number: 140, unit: "dB", cite: "NR-15 Annex 2 item 4", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "impact_grave_risk_fast", number: 130, unit: "dBC", cite: "NR-15 Annex 2 item 4", from: of1978, seen: "text"}, ""},
		{sheetNumber{parameter: "risk_review_interval", ends: "2026-03-15", cite: "NR-1 1.5.4.4.6", from: ofAnnexII, seen: "memory"}, ""},
		{sheetNumber{parameter: "risk_review_interval_certified", ends: "2027-03-15", cite: "NR-1 1.5.4.4.6", from: ofAnnexII, seen: "memory"}, ""},
		{sheetNumber{parameter: "action_measures", words: []any{"monitoring", "information", "medical_control"}, cite: "NR-9 9.6.1 c (old 9.3.6.2)", from: ofNR9, seen: "memory"}, ""},
		{sheetNumber{parameter: "exit_exam_age", number: 120, unit: "days", cite: annexII + "4.1.1", from: ofAnnexII, seen: "secondary"}, ""},
		{sheetNumber{parameter: "exam_contents", words: []any{"clinical_history", "otological_exam", "audiometry"}, cite: annexII + "2.1", from: ofAnnexII, seen: "text"}, ""},
		{sheetNumber{parameter: "exit_clinical_time", ends: "2024-03-25", cite: "NR-7 7.5.11", from: ofAnnexII, seen: "secondary"}, ""},
		{sheetNumber{parameter: "exit_clinical_age_low", number: 135, unit: "days", cite: "NR-7 7.5.11", from: ofAnnexII, seen: "secondary"}, ""},
		{sheetNumber{parameter: "exit_clinical_age_high", number: 90, unit: "days", cite: "NR-7 7.5.11", from: ofAnnexII, seen: "secondary"}, ""},
		{sheetNumber{parameter: "report_interval", ends: "2025-03-15", cite: "NR-7 7.6.2", from: ofAnnexII, seen: "secondary"}, ""},
		{sheetNumber{parameter: "record_retention", ends: "2044-03-15", cite: "NR-7 7.6.1", from: ofNR9, seen: "secondary"}, ""},
	},
	sinceOldAnnex(sheetNumber{parameter: "admission_time", ends: "2024-03-15", cite: annexII + "4.1 a", seen: "secondary"}),
	sinceOldAnnex(sheetNumber{parameter: "audiogram_interval", ends: "2025-03-15", cite: annexII + "4.1 b", seen: "secondary"}),
	sinceOldAnnex(sheetNumber{parameter: "quiet_period", number: 14, unit: "h", cite: annexII + "3.4", seen: "secondary"}),
	sinceOldAnnex(sheetNumber{parameter: "acoustic_interval", ends: "2025-03-15", cite: annexII + "3.2 I", seen: "text"}),
	sinceOldAnnex(sheetNumber{parameter: "electrical_interval", ends: "2029-03-15", cite: annexII + "3.2 II", seen: "text"}),
	sinceOldAnnex(sheetNumber{parameter: "acceptable_level", number: 25, unit: "dB HL", cite: annexII + "5", seen: "secondary"}),
	sinceOldAnnex(sheetNumber{parameter: "mean_change", number: 10, unit: "dB", cite: annexII + "5", seen: "secondary"}),
	sinceOldAnnex(sheetNumber{parameter: "single_change", number: 15, unit: "dB", cite: annexII + "5", seen: "secondary"}),
)

func joined(lists ...[]datedNumber) []datedNumber {
	var out []datedNumber
	for _, list := range lists {
		out = append(out, list...)
	}
	return out
}

// sinceOldAnnex gives a number that the annex of 1998 had, too, from memory.
func sinceOldAnnex(now sheetNumber) []datedNumber {
	old := now
	old.cite, old.seen, old.from, now.from = oldAnnex, "memory", ofOldAnnex, ofAnnexII
	return []datedNumber{{old, ""}, {now, ""}} // a value ends where the next one begins
}

// TestBrazilNumbersAreAsPrinted leaves out the time of the CAT, which is in working days.
func TestBrazilNumbersAreAsPrinted(t *testing.T) {
	b := takeBundle(t, brazil)
	p := b.Parameters["cat_time"]
	require.Len(t, p.Values, 1)
	v := &p.Values[0]
	assert.Equal(t, []string{"Law 8.213/1991 art. 22; NR-7 7.5.19.5", "memory", ofAnnexII}, []string{v.Cite, v.Seen, v.From})
	interval, ok := v.Interval()
	require.True(t, ok)
	assert.Equal(t, calendar.Interval{Count: 1, Unit: calendar.WorkingDays}, interval)
	delete(b.Parameters, "cat_time")
	holdToDatedSheet(t, b, brazilNumbers)
}

func TestParagraphsOfBrazil(t *testing.T) {
	holdToParagraphs(t, takeBundle(t, brazil), "")
}

// TestTableOfAnnex1 holds the channel of the limit to the table of NR-15 Annex 1, row by row, and that of the action
// level to the same table and, below 85 dB(A), to the 5 dB rule. The table is that rule, rounded.
func TestTableOfAnnex1(t *testing.T) {
	channels := takeBundle(t, brazil).Measures.Exposure.Channels
	printed := []dossier.Limit{}
	for _, row := range vectorRows(t, "br_nr15_annex1.csv") {
		printed = append(printed, dossier.Limit{DBA: numberIn(t, row, "level_dBA"), Minutes: numberIn(t, row, "minutes")})
	}
	require.Len(t, printed, 23)
	limit, action := channels["limit"], channels["action"]
	assert.Equal(t, acoustics.Scale{Criterion: 85, Exchange: 5, Threshold: 85}, scaleOf(limit))
	assert.Equal(t, acoustics.Scale{Criterion: 85, Exchange: 5, Threshold: 80}, scaleOf(action))
	assert.Equal(t, printed, limit.Durations)
	require.Len(t, action.Durations, 5+len(printed))
	assert.Equal(t, printed, action.Durations[5:])
	for i, row := range action.Durations[:5] {
		assert.Equal(t, float64(80+i), row.DBA)
		assert.InDelta(t, scaleOf(action).ReferenceMinutes(row.DBA), row.Minutes, 0.005, row.DBA)
	}
	for _, row := range printed {
		assert.InEpsilon(t, scaleOf(limit).ReferenceMinutes(row.DBA), row.Minutes, 0.13, row.DBA)
	}
	// Sheet section 6: 6.96 h at 86 dB(A), 6.06 h at 87 dB(A), 7.5 min at 115 dB(A) by the formula.
	for dba, minutes := range map[float64]float64{86: 6.96 * 60, 87: 6.06 * 60, 115: 7.5} {
		assert.InDelta(t, minutes, scaleOf(limit).ReferenceMinutes(dba), 0.3, dba)
	}
	// The levels that the table leaves out, which item 4 sends to the next row.
	absent := []float64{}
	for dba := 85.0; dba <= 115; dba++ {
		if !hasRow(printed, dba) {
			absent = append(absent, dba)
			assert.True(t, hasRow(printed, dba+1), dba)
		}
	}
	assert.Equal(t, []float64{97, 99, 101, 103, 107, 109, 111, 113}, absent)
}

func hasRow(table []dossier.Limit, dba float64) bool {
	for _, row := range table {
		if row.DBA == dba {
			return true
		}
	}
	return false
}

// TestLevelsOfBrazil: above the action level and the limit, never at them; sheet section 2.
func TestLevelsOfBrazil(t *testing.T) {
	m := takeBundle(t, brazil).Measures
	assert.Equal(t, map[string]dossier.Threshold{
		"action": {Channel: "action", Above: "action_dose"}, "limit": {Channel: "limit", Above: "tolerance_dose"},
		"ceiling": {Channel: "continuous", Above: "continuous_ceiling"},
		"impulse": {Channel: "impulse", Above: "impulse_limit"}, "impact_fast": {Channel: "fast", Above: "impact_limit_fast"},
		"grave_impulse": {Channel: "impulse", Above: "impulse_grave_risk"}, "grave_fast": {Channel: "fast", Above: "impact_grave_risk_fast"},
	}, m.Exposure.Levels)
	assert.Equal(t, "action", m.Exposure.Enrols)
	for name, figure := range map[string]string{"continuous": dossier.MaxDBA, "impulse": dossier.ImpulseDBZ, "fast": dossier.MaxDBCFast} {
		assert.Equal(t, []string{dossier.HighestChannel, figure}, []string{m.Exposure.Channels[name].Kind, m.Exposure.Channels[name].Of}, name)
	}
	assert.Nil(t, m.Hearing.AgeCorrection, "no age correction anywhere in the annex (from memory)")
	// Half the dose is 8 hours at 80 dB(A) (derived), and by 3 dB from 85 dB(A), as NHO-01 has it, 82 dB(A) (from memory).
	half, err := scaleOf(m.Exposure.Channels["action"]).Dose([]acoustics.Segment{{Level: 80, Minutes: 480}})
	require.NoError(t, err)
	assert.Equal(t, 50.0, half)
	other, err := acoustics.Scale{Criterion: 85, Exchange: 3, Threshold: 80}.Dose([]acoustics.Segment{{Level: 88, Minutes: 480}})
	require.NoError(t, err)
	assert.Equal(t, 200.0, other, "sheet section 5: 8 h at 88 dB(A) by NHO-01, and 160 % by the table here")
}

// TestExamplesOfBrazil: sheet section 5 (derived), each ear at 3, 4 and 6 kHz against 10/10/10; both are triggering.
func TestExamplesOfBrazil(t *testing.T) {
	b := takeBundle(t, brazil)
	ear := func(levels ...int) *audiometry.Ear {
		e := &audiometry.Ear{}
		for i, hz := range []int{3000, 4000, 6000} {
			for place, f := range audiometry.Frequencies {
				if f == hz {
					e[place] = audiometry.Threshold{Tenths: int16(10 * levels[i]), State: audiometry.Measured}
				}
			}
		}
		return e
	}
	schemes := map[string]audiometry.Scheme{}
	for _, s := range b.Measures.Hearing.Others {
		schemes[s.Name] = s
	}
	for _, c := range []struct {
		now           *audiometry.Ear
		mean, single  audiometry.Verdict
		meanDB, mostD float64
	}{
		{ear(20, 20, 20), audiometry.Yes, audiometry.No, 10, 10},
		{ear(10, 25, 10), audiometry.No, audiometry.Yes, 5, 15},
	} {
		for name, want := range map[string]struct {
			verdict audiometry.Verdict
			figure  float64
		}{"high_mean": {c.mean, c.meanDB}, "high_single": {c.single, c.mostD}} {
			s := schemes[name]
			amount, ok := b.Number(s.Parameter(), calendar.MustParse("2026-06-30"))
			require.True(t, ok)
			got := s.Judge(ear(10, 10, 10), c.now, nil, amount)
			figure, known := got.Figure()
			assert.True(t, known)
			assert.Equal(t, want.verdict, got.Verdict, name)
			assert.Equal(t, want.figure, figure, name)
		}
	}
}

// TestHolidaysOfBrazil holds the national holidays to their laws (from memory): Law 662/1949 as amended by Law
// 10.607/2002, Law 6.802/1980 and, from 2024 on, Law 14.759/2023.
func TestHolidaysOfBrazil(t *testing.T) {
	days := takeBundle(t, brazil).Measures.WorkingDays
	listed := map[string]int{}
	for _, h := range days.Holidays {
		listed[h.Date]++
	}
	want := map[string]int{}
	for _, year := range strings.Fields("2022 2023 2024 2025 2026 2027 2028 2029 2030") {
		for _, day := range strings.Fields("01-01 04-21 05-01 09-07 10-12 11-02 11-15 12-25") {
			want[year+"-"+day] = 1
		}
		if year >= "2024" {
			want[year+"-11-20"] = 1
		}
	}
	assert.Equal(t, want, listed)
	assert.Equal(t, "2030-12-31", days.KnownUntil)
	week, err := days.Week()
	require.NoError(t, err)
	next, err := calendar.Interval{Count: 1, Unit: calendar.WorkingDays}.After(calendar.MustParse("2025-12-31"), week)
	require.NoError(t, err)
	assert.Equal(t, "2026-01-02", next.String(), "New Year's Day is passed over")
}
