package bundle

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
)

// The tests of this file hold ca-ab to the numbers, definitions and tables of its sheet.

const (
	alberta = "ca-ab"
	code    = "OHS Code, "
	since09 = "2009-07-01" // from memory
	since3  = "2023-03-31" // from a secondary source
	table2  = code + "Schedule 3, Table 2"
	table3  = code + "Schedule 3, Table 3"
)

// albertaNumbers are the numbers of sheet section 2, the times and lists of section 3, and definitions and tables of
// section 4. Two numbers that the sheet has from memory are confirmed by secondary sources seen since: the three years
// of s. 220(2)(b), and the 82 dBA of s. 222; the end of Table 1 at 115 dBA, too.
var albertaNumbers = []datedNumber{
	{sheetNumber{parameter: "exposure_limit", number: 85, unit: "dBA", cite: code + "s. 218", from: since09, seen: "text"}, ""},
	{sheetNumber{parameter: "table_ceiling", number: 115, unit: "dBA", cite: code + "Schedule 3, Table 1", from: since09, seen: "secondary"}, ""},
	{sheetNumber{parameter: "assessment_trigger", number: 85, unit: "dBA", cite: code + "s. 219(1)", from: since09, seen: "text"}, since3},
	{sheetNumber{parameter: "assessment_trigger", number: 82, unit: "dBA", cite: code + "s. 219(1)", from: since3, seen: "text"}, ""},
	{sheetNumber{parameter: "testing_trigger", number: 85, unit: "dBA", cite: code + "former s. 1 and s. 223(1)", from: since09, seen: "text"}, since3},
	{sheetNumber{parameter: "testing_trigger", number: 82, unit: "dBA", cite: code + "ss. 221 and 223(1)", from: since3, seen: "memory"}, ""},
	{sheetNumber{parameter: "protector_trigger", number: 85, unit: "dBA", cite: code + "s. 222", from: since09, seen: "secondary"}, since3},
	{sheetNumber{parameter: "protector_trigger", number: 82, unit: "dBA", cite: code + "s. 222", from: since3, seen: "secondary"}, ""},
	{sheetNumber{parameter: "design_limit", number: 85, unit: "dBA", cite: code + "s. 217", from: since09, seen: "text"}, ""},
	{sheetNumber{parameter: "dosimeter_threshold", number: 75, unit: "dBA", cite: code + "s. 219", from: since09, seen: "memory"}, since3},
	{sheetNumber{parameter: "dosimeter_threshold", number: 75, unit: "dBA", cite: code + "s. 219(2)(a)(ii)", from: since3, seen: "text"}, ""},
	{sheetNumber{parameter: "instrument_types", words: []any{"1", "2"}, cite: code + "s. 219", from: since09, seen: "text"}, ""},
	{sheetNumber{parameter: "record_contents", words: []any{"date", "workers", "equipment", "readings", "location"}, cite: code + "s. 220(1)", from: since09, seen: "text"}, since3},
	{sheetNumber{parameter: "record_contents", words: []any{"date", "workers", "equipment", "readings", "location", "tasks"}, cite: code + "s. 220(1)", from: since3, seen: "secondary"}, ""},
	{sheetNumber{parameter: "assessment_retention", ends: "2027-03-15", cite: code + "s. 220(2)(b)", from: since3, seen: "secondary"}, ""},
	{sheetNumber{parameter: "program_contents", words: []any{"education", "measurement", "controls", "protectors", "audiometry", "review"}, cite: code + "s. 221", from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "program_review_interval", ends: "2025-03-15", cite: code + "s. 221", from: since09, seen: "text"}, ""},
	{sheetNumber{parameter: "education_topics", words: []any{"noise_effects", "noise_controls", "protectors"}, cite: code + "s. 221", from: since09, seen: "secondary"}, ""},
	{sheetNumber{parameter: "class_level_1", number: 90, unit: "dBA", cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "class_level_2", number: 95, unit: "dBA", cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "class_level_3", number: 100, unit: "dBA", cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "class_level_4", number: 105, unit: "dBA", cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "class_level_5", number: 110, unit: "dBA", cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "classes_1", words: []any{"C", "B", "A", "1", "2", "3", "4"}, cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "classes_2", words: []any{"B", "A", "2", "3", "4"}, cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "classes_3", words: []any{"A", "3", "4"}, cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "classes_4", words: []any{"A", "4"}, cite: table2, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "fit_test_methods", words: []any{"qualitative", "quantitative"}, cite: code + "s. 222", from: since3, seen: "secondary"}, ""},
	{sheetNumber{parameter: "baseline_time", ends: "2024-09-15", cite: code + "s. 223(1)(a)", from: since09, seen: "text"}, ""},     // 6 months
	{sheetNumber{parameter: "second_test_time", ends: "2025-03-15", cite: code + "s. 223(1)(b)", from: since09, seen: "text"}, ""},  // 12 months
	{sheetNumber{parameter: "periodic_interval", ends: "2026-03-15", cite: code + "s. 223(1)(c)", from: since09, seen: "text"}, ""}, // every second year
	{sheetNumber{parameter: "abnormal_low", number: 25, unit: "dB HL", cite: code + "former s. 1, abnormal audiogram (a)", from: since09, seen: "text"}, since3},
	{sheetNumber{parameter: "abnormal_high", number: 60, unit: "dB HL", cite: code + "former s. 1, abnormal audiogram (b)", from: since09, seen: "secondary"}, since3},
	{sheetNumber{parameter: "one_sided", number: 30, unit: "dB", cite: code + "former s. 1, abnormal audiogram (c)", from: since09, seen: "secondary"}, since3},
	{sheetNumber{parameter: "abnormal_shift", number: 15, unit: "dB", cite: code + "former s. 1, abnormal shift", from: since09, seen: "secondary"}, since3},
	{sheetNumber{parameter: "confirmed_notice_time", ends: "2024-04-14", cite: code + "s. 223(4)", from: since09, seen: "memory"}, ""},  // 30 days
	{sheetNumber{parameter: "test_record_retention", ends: "2034-03-15", cite: code + "s. 223(2)(f)", from: since09, seen: "text"}, ""}, // 10 years
	{sheetNumber{parameter: "room_500", number: 22, unit: "dB", cite: table3, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "room_1000", number: 30, unit: "dB", cite: table3, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "room_2000", number: 35, unit: "dB", cite: table3, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "room_4000", number: 42, unit: "dB", cite: table3, from: since09, seen: "memory"}, ""},
	{sheetNumber{parameter: "room_8000", number: 45, unit: "dB", cite: table3, from: since09, seen: "memory"}, ""},
}

func TestAlbertaNumbersAreAsPrinted(t *testing.T) {
	holdToDatedSheet(t, takeBundle(t, alberta), albertaNumbers)
}

func TestParagraphsOfAlberta(t *testing.T) {
	holdToParagraphs(t, takeBundle(t, alberta), "")
}

// TestTable1OfAlberta holds Table 1 of Schedule 3 (from memory; 82, 85 and 115 dBA from a secondary source) to the energy
// rule of the bundle's channel: so long at so much is 85 dBA over 8 hours, within the rounding of the row. The row of 103
// dBA is rounded up from 7.6 minutes, which is 85.2 dBA.
func TestTable1OfAlberta(t *testing.T) {
	b := takeBundle(t, alberta)
	limit, ok := b.Number("exposure_limit", calendar.MustParse("2026-06-30"))
	require.True(t, ok)
	require.Equal(t, "level", b.Measures.Exposure.Channels["day"].Kind)
	for _, row := range []struct{ dba, minutes, off float64 }{
		{82, 960, 0.02}, {83, 761, 0.01}, {84, 604, 0.01}, {85, 480, 0}, {88, 240, 0.02}, {91, 120, 0.03}, {94, 60, 0.04},
		{97, 30, 0.05}, {100, 15, 0.06}, {103, 8, 0.23}, {106, 4, 0.22}, {109, 2, 0.21}, {112, 56.0 / 60, 0.11},
	} {
		lex, ok := acoustics.LEX8h(row.dba, row.minutes)
		require.True(t, ok)
		assert.InDelta(t, limit, lex, row.off+0.005, "%v dBA", row.dba)
	}
	ceiling := b.Measures.Exposure.Levels["ceiling"]
	assert.Equal(t, []string{"table_ceiling", "max_dba"}, []string{ceiling.AtLeast, b.Measures.Exposure.Channels[ceiling.Channel].Of}, "none from 115 dBA on")
}

// TestTable2OfAlberta holds the rows of classes and grades (from memory) to those of internal/acoustics.
func TestTable2OfAlberta(t *testing.T) {
	b := takeBundle(t, alberta)
	today := calendar.MustParse("2026-06-30")
	words := func(row string) string {
		v, ok := b.Parameters["classes_"+row].At(today)
		require.True(t, ok)
		out := map[string]string{}
		for _, w := range v.Plain().([]any) {
			kind := "grades"
			if c := w.(string)[0]; c >= 'A' {
				kind = "classes"
			}
			out[kind] += w.(string)
		}
		return out["classes"] + "/" + out["grades"]
	}
	for row, want := range map[string]string{"1": "CBA/1234", "2": "BA/234", "3": "A/34", "4": "A/4"} {
		assert.Equal(t, want, words(row), "row %s", row)
		top, ok := b.Number("class_level_"+row, today)
		require.True(t, ok)
		choice, ok := acoustics.CSAClassNeeded(top)
		require.True(t, ok)
		letters := ""
		for _, c := range choice.Classes + "/" + choice.Grades {
			if c == '/' || c >= 'A' && c <= 'C' || c >= '1' && c <= '4' {
				letters += string(c)
			}
		}
		assert.Equal(t, want, letters, "at %v dBA", top)
		assert.Empty(t, choice.MuffClasses)
	}
	top, _ := b.Number("class_level_5", today)
	at, _ := acoustics.CSAClassNeeded(top)
	above, _ := acoustics.CSAClassNeeded(top + 0.1)
	assert.NotEmpty(t, at.MuffClasses, "a plug and a muff up to %v dBA", top)
	assert.Equal(t, []bool{false, true}, []bool{at.LimitedTime, above.LimitedTime})
}

// thresholds makes an ear of the thresholds at 500, 1000, 2000, 3000, 4000 and 6000 Hz, dB HL.
func thresholds(db ...float64) *audiometry.Ear {
	var ear audiometry.Ear
	for i, hz := range []int{500, 1000, 2000, 3000, 4000, 6000} {
		for j, f := range audiometry.Frequencies {
			if f == hz {
				ear[j] = audiometry.Threshold{Tenths: int16(10 * db[i]), State: audiometry.Measured}
			}
		}
	}
	return &ear
}

// TestDefinitionsOfAlberta works out the derived examples of sheet section 5, with the bundle's schemes and numbers.
func TestDefinitionsOfAlberta(t *testing.T) {
	b := takeBundle(t, alberta)
	schemes := map[string]audiometry.Scheme{}
	for _, s := range b.Measures.Hearing.Others {
		schemes[s.Name] = s
	}
	require.Len(t, schemes, 4)
	amount := func(name string) float64 {
		n, ok := b.Number(schemes[name].Parameter(), calendar.MustParse("2023-03-30"))
		require.True(t, ok, name)
		return n
	}
	judge := func(name string, base, now *audiometry.Ear) audiometry.Verdict {
		return schemes[name].Judge(base, now, nil, amount(name)).Verdict
	}
	base := thresholds(10, 10, 10, 15, 20, 20)
	assert.Equal(t, audiometry.Yes, judge("abnormal_shift", base, thresholds(10, 25, 25, 15, 20, 20)), "15 dB at 1000 and 2000 Hz, consecutive")
	assert.Equal(t, audiometry.No, judge("abnormal_shift", base, thresholds(10, 25, 10, 30, 20, 20)), "15 dB at 1000 and 3000 Hz, 2000 Hz between")
	assert.Equal(t, audiometry.No, judge("abnormal_shift", base, thresholds(25, 25, 10, 15, 20, 20)), "15 dB at 500 and 1000 Hz, 500 Hz outside")
	assert.Equal(t, audiometry.No, judge("abnormal_shift", base, thresholds(10, 20, 20, 25, 30, 30)), "10 dB everywhere")
	assert.Equal(t, audiometry.Yes, judge("abnormal_low", nil, thresholds(10, 30, 10, 15, 20, 20)), "30 dB at 1000 Hz")
	assert.Equal(t, audiometry.No, judge("abnormal_low", nil, thresholds(25, 25, 25, 60, 60, 60)), "exactly 25 dB")
	assert.Equal(t, audiometry.No, judge("abnormal_high", nil, thresholds(25, 25, 25, 60, 60, 60)), "exactly 60 dB")
	assert.Equal(t, audiometry.Yes, judge("abnormal_high", nil, thresholds(10, 10, 10, 15, 20, 65)), "65 dB at 6000 Hz")
	poorer, better := thresholds(10, 10, 10, 55, 55, 55), thresholds(10, 10, 10, 20, 20, 20)
	sides, worse := schemes["one_sided"].JudgeEars(poorer, better, amount("one_sided"))
	assert.Equal(t, audiometry.Yes, sides.Verdict, "55 and 20 dB on the average: 35 dB")
	assert.Equal(t, audiometry.LeftEar, worse)
	sides, _ = schemes["one_sided"].JudgeEars(thresholds(10, 10, 10, 50, 50, 50), better, amount("one_sided"))
	assert.Equal(t, audiometry.No, sides.Verdict, "exactly 30 dB")
	for name, s := range schemes {
		_, ok := b.Number(s.Parameter(), calendar.MustParse("2023-03-31"))
		assert.False(t, ok, "the definition %s has ended", name)
	}
	assert.Nil(t, b.Measures.Hearing.AgeCorrection, "no age correction")
	assert.Equal(t, "original", schemes["abnormal_shift"].Baseline, "against the baseline test")
}

// TestGuideOfAlberta works out the pair of the explanation guide of 2009 (text): 85 dBA over 8 hours, 82 dBA over 16.
func TestGuideOfAlberta(t *testing.T) {
	for _, x := range [][2]float64{{85, 8}, {82, 16}} {
		lex, ok := acoustics.LEX8h(x[0], 60*x[1])
		require.True(t, ok)
		assert.InDelta(t, 85, lex, 0.011)
	}
}
