package bundle

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
)

// The tests of this file hold ca-qc to the numbers and tables of its sheet as printed, and give the helper by which
// law_ca_ab_test.go does the same.

const quebec = "ca-qc"

// datedNumber is a number of a sheet that holds from a day up to, but without, another; or still, without to.
type datedNumber struct {
	sheetNumber
	to string
}

// holdToDatedSheet compares every value of every parameter with the sheet: number, unit, citation, mark, and the days
// on which it begins and ends. A value that the sheet's table lacks fails, too.
func holdToDatedSheet(t *testing.T, b *Bundle, sheet []datedNumber) {
	t.Helper()
	start := calendar.MustParse("2024-03-15")
	listed := map[string]int{}
	for _, want := range sheet {
		p, ok := b.Parameters[want.parameter]
		if !assert.True(t, ok, "the bundle has no parameter %s", want.parameter) {
			continue
		}
		i := listed[want.parameter]
		listed[want.parameter]++
		if !assert.Less(t, i, len(p.Values), want.parameter) {
			continue
		}
		v := &p.Values[i]
		assert.Equal(t, []string{want.unit, want.cite, want.seen, want.from, want.to}, []string{p.Unit, v.Cite, v.Seen, v.From, v.To}, want.parameter)
		switch {
		case want.ends != "":
			interval, ok := v.Interval()
			require.True(t, ok, want.parameter)
			end, err := interval.After(start, nil)
			require.NoError(t, err)
			assert.Equal(t, want.ends, end.String(), want.parameter)
		case want.words != nil:
			assert.Equal(t, want.words, v.Plain(), want.parameter)
		default:
			number, ok := v.Number()
			require.True(t, ok, want.parameter)
			assert.Equal(t, want.number, number, want.parameter)
		}
	}
	for name, p := range b.Parameters {
		assert.Len(t, p.Values, listed[name], "the values of the parameter %s are not those of the sheet", name)
	}
}

const (
	r13      = "r. 13, s. "
	former   = "former r. 13, s. "
	since23  = "2023-06-16" // O.C. 781-2021
	since01  = "2001-08-02" // O.C. 885-2001, from memory
	ended23  = "2023-06-16"
	transit2 = "O.C. 781-2021, transitional provision"
)

// quebecNumbers are the numbers of sheet section 2 and the times and lists of section 3.
var quebecNumbers = []datedNumber{
	{sheetNumber{parameter: "sections_in_force", words: []any{"ss. 131 to 141.5"}, cite: "O.C. 781-2021", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "daily_limit", number: 85, unit: "dBA", cite: r13 + "131(1)", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "peak_limit", number: 140, unit: "dBC", cite: r13 + "131(2)", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "former_daily_dose", number: 100, unit: "%", cite: former + "131", from: since01, seen: "text"}, ended23},
	{sheetNumber{parameter: "former_continuous_ceiling", number: 115, unit: "dBA", cite: former + "131", from: since01, seen: "text"}, ended23},
	{sheetNumber{parameter: "former_impact_ceiling", number: 140, unit: "dB", cite: former + "134", from: since01, seen: "text"}, ended23},
	{sheetNumber{parameter: "first_identification_time", ends: "2025-03-15", cite: transit2, from: since23, seen: "secondary"}, ""},
	{sheetNumber{parameter: "evaluation_interval", ends: "2029-03-15", cite: r13 + "133", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "means_start_time", ends: "2025-03-15", cite: r13 + "133", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "change_identification_time", ends: "2024-04-14", cite: r13 + "134", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "change_answer_time", ends: "2025-03-15", cite: r13 + "134", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "change_finish_time", ends: "2026-03-15", cite: r13 + "134", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "protector_cases", words: []any{"case_a", "case_b", "case_c"}, cite: r13 + "136", from: since23, seen: "secondary"}, ""},
	{sheetNumber{parameter: "protector_standards", words: []any{"csa_z94_2", "en_458"}, cite: r13 + "138", from: since23, seen: "memory"}, ""},
	{sheetNumber{parameter: "training_topics", words: []any{"protectors", "noise_effects"}, cite: "r. 13, ss. 139 and 140", from: since23, seen: "secondary"}, ""},
	{sheetNumber{parameter: "posting_delay", ends: "2024-03-30", cite: r13 + "141.4", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "posting_time", ends: "2024-06-15", cite: r13 + "141.4", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "register_contents", words: []any{"situations", "means", "measurement_reports"}, cite: r13 + "141.5", from: since23, seen: "text"}, ""},
	{sheetNumber{parameter: "register_retention", ends: "2034-03-15", cite: r13 + "141.5", from: since23, seen: "text"}, ""},
}

func TestQuebecNumbersAreAsPrinted(t *testing.T) {
	holdToDatedSheet(t, takeBundle(t, quebec), quebecNumbers)
}

func TestParagraphsOfQuebec(t *testing.T) {
	holdToParagraphs(t, takeBundle(t, quebec), "")
}

// formerHours is the table of the former s. 131, dBA and hours a day as printed (text, legisquebec.gouv.qc.ca, version
// of 2020).
var formerHours = [][2]float64{
	{85, 16}, {86, 13.9}, {87, 12.1}, {88, 10.6}, {89, 9.2}, {90, 8}, {91, 7}, {92, 6}, {93, 5.3}, {94, 4.6}, {95, 4},
	{96, 3.5}, {97, 3}, {98, 2.6}, {99, 2.3}, {100, 2}, {101, 1.75}, {102, 1.50}, {103, 1.3}, {104, 1.2}, {105, 1},
	{106, 0.9}, {107, 0.8}, {108, 0.7}, {109, 0.6}, {110, 0.5}, {111, 0.45}, {112, 0.4}, {113, 0.35}, {114, 0.30}, {115, 0.25},
}

// TestFormerTableOfHours holds the channel for the time before 16 June 2023 to the table, row by row, and the table to
// 90 dBA with 5 dB within the rounding of its rows (92 dBA would be 6.06 h).
func TestFormerTableOfHours(t *testing.T) {
	ch := takeBundle(t, quebec).Measures.Exposure.Channels["former_day"]
	require.Len(t, ch.Durations, len(formerHours))
	for i, row := range formerHours {
		assert.Equal(t, row[0], ch.Durations[i].DBA)
		assert.InDelta(t, 60*row[1], ch.Durations[i].Minutes, 1e-9, "%v dBA", row[0])
		assert.InDelta(t, row[1], scaleOf(ch).ReferenceMinutes(row[0])/60, 0.07, "%v dBA", row[0])
	}
	assert.Equal(t, []float64{90, 5, 85}, []float64{ch.CriterionDB, ch.ExchangeDB, ch.ThresholdDB})
}

// TestTableOfSection137 holds the printed times (text; the numbers run together in the stored copy and are split by the
// energy rule) to the daily level: so long at so much is 85 dBA over 8 hours, within the rounding of the row.
func TestTableOfSection137(t *testing.T) {
	b := takeBundle(t, quebec)
	limit, ok := b.Number("daily_limit", calendar.MustParse("2026-06-30"))
	require.True(t, ok)
	rule := acoustics.TimeLimit{Criterion: limit, Exchange: 3}
	rows := []struct{ dba, minutes, rounding float64 }{
		{82, 960, 0}, {83, 720, 42}, {85, 480, 0}, {88, 240, 0}, {91, 120, 0}, {94, 60, 0}, {97, 30, 0}, {100, 15, 0},
		{103, 7, 0.51}, {106, 4, 0.26}, {109, 2, 0.13}, {112, 1, 0.07}, {115, 28.0 / 60, 0.01}, {118, 14.0 / 60, 0.01},
		{121, 7.0 / 60, 0.01}, {124, 3.0 / 60, 0.01}, {127, 1.0 / 60, 0.02},
	}
	for _, row := range rows {
		minutes, ok := rule.Minutes(row.dba)
		require.True(t, ok)
		assert.InDelta(t, row.minutes, minutes, row.rounding+1e-9, "%v dBA", row.dba)
		if row.rounding == 0 {
			lex, ok := acoustics.LEX8h(row.dba, row.minutes)
			require.True(t, ok)
			assert.InDelta(t, limit, lex, 0.06, "%v dBA for %v minutes", row.dba, row.minutes) // 3 dB is 10 lg 2 = 3.01
		}
	}
	seconds, ok := rule.Minutes(130)
	require.True(t, ok)
	assert.Less(t, 60*seconds, 1.0, "less than a second at 130 dBA")
}

// TestFormerTableOfImpacts holds the end of the former s. 134 (text) to the bundle: 100 impacts at 140 dB linear, a tenth
// for each 10 dB more, none above.
func TestFormerTableOfImpacts(t *testing.T) {
	b := takeBundle(t, quebec)
	ceiling, ok := b.Number("former_impact_ceiling", calendar.MustParse("2023-06-15"))
	require.True(t, ok)
	rule := acoustics.ImpactLimit{Peak: 140, Count: 100, Exchange: 10 * math.Log10(2), None: ceiling}
	printed := []float64{10000, 7943, 6310, 5012, 3981, 3162, 2512, 1995, 1585, 1259, 1000, 794, 631, 501, 398, 316, 251, 200, 158, 126, 100}
	for i, count := range printed {
		impacts, ok := rule.Impacts(120 + float64(i))
		require.True(t, ok)
		assert.Equal(t, count, math.Round(impacts), "%d dB", 120+i)
	}
	none, ok := rule.Impacts(140.1)
	require.True(t, ok)
	assert.Zero(t, none)
}

// TestExamplesOfQuebec works out sheet section 5: 4 hours at 88 dBA (the regulator's, secondary source), the others
// derived.
func TestExamplesOfQuebec(t *testing.T) {
	for _, x := range []struct{ level, hours, lex float64 }{{88, 4, 84.99}, {84, 10, 84.97}, {85, 12, 86.76}} {
		lex, ok := acoustics.LEX8h(x.level, 60*x.hours)
		require.True(t, ok)
		assert.InDelta(t, x.lex, lex, 0.005)
	}
}

// TestScaleChangesOnTheDay holds the parts of the limit to their days: the former ones have no value on 16 June 2023, the
// present ones none the day before.
func TestScaleChangesOnTheDay(t *testing.T) {
	b := takeBundle(t, quebec)
	levels := b.Measures.Exposure.Levels
	before, on := map[string]bool{}, map[string]bool{}
	for _, part := range levels["limit"].Any {
		_, before[part] = b.Number(levels[part].Above, calendar.MustParse("2023-06-15"))
		_, on[part] = b.Number(levels[part].Above, calendar.MustParse("2023-06-16"))
	}
	assert.Equal(t, map[string]bool{"daily": false, "peak": false, "former_daily": true, "former_continuous": true, "former_impact": true}, before)
	assert.Equal(t, map[string]bool{"daily": true, "peak": true, "former_daily": false, "former_continuous": false, "former_impact": false}, on)
	assert.Equal(t, "level", b.Measures.Exposure.Channels["day"].Kind)
	assert.Equal(t, "peak_dbc", b.Measures.Exposure.Channels["peak"].Of)
	assert.Empty(t, b.Measures.Hearing.Shift.Rule, "the law knows no shift and no hearing test")
}
