package bundle

import (
	"math"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
)

// The tests of this file hold us-msha to the tables and numbers of 30 CFR Part 62 as printed. What stands here was taken
// from the sheet of the law and from testdata/vectors, never from the bundle.

const (
	mines   = "us-msha"
	part62  = "30 CFR 62."
	inForce = "2000-09-13" // 62.100 (text)
)

// mineNumbers are the numbers of sheet section 2 and the times and lists of section 3. All are marked text there.
var mineNumbers = []sheetNumber{
	// Exposure.
	{parameter: "action_level", number: 85, unit: "dBA", cite: part62 + "101", from: inForce, seen: "text"},
	{parameter: "action_dose", number: 50, unit: "%", cite: part62 + "101, 62.120", from: inForce, seen: "text"},
	{parameter: "permissible_level", number: 90, unit: "dBA", cite: part62 + "101", from: inForce, seen: "text"},
	{parameter: "permissible_dose", number: 100, unit: "%", cite: part62 + "101, 62.130(a)", from: inForce, seen: "text"},
	{parameter: "dual_protection_level", number: 105, unit: "dBA", cite: part62 + "101", from: inForce, seen: "text"},
	{parameter: "dual_protection_dose", number: 800, unit: "%", cite: part62 + "101, 62.140", from: inForce, seen: "text"},
	{parameter: "sound_level_ceiling", number: 115, unit: "dBA", cite: part62 + "130(c), Appendix, note to Table 62-1", from: inForce, seen: "text"},
	{parameter: "action_range_floor", number: 80, unit: "dBA", cite: part62 + "101, 62.110(b)(2)(ii)", from: inForce, seen: "text"},
	{parameter: "action_range_top", number: 130, unit: "dBA", cite: part62 + "101, 62.110(b)(2)(ii)", from: inForce, seen: "text"},
	{parameter: "limit_range_floor", number: 90, unit: "dBA", cite: part62 + "101, 62.110(b)(2)(ii)", from: inForce, seen: "text"},
	{parameter: "limit_range_top", number: 140, unit: "dBA", cite: part62 + "101, 62.110(b)(2)(ii)", from: inForce, seen: "text"},
	{parameter: "response", words: []any{"slow"}, cite: part62 + "110(b)(2)(v)", from: inForce, seen: "text"},
	{parameter: "notice_time", ends: "2024-03-30", cite: part62 + "110(d)", from: inForce, seen: "text"},   // 15 calendar days
	{parameter: "notice_spares", ends: "2025-03-15", cite: part62 + "110(d)", from: inForce, seen: "text"}, // 12 months
	// The program and protectors.
	{parameter: "program_elements", words: []any{"monitoring", "protectors", "audiometry", "training", "records"}, cite: part62 + "150(a)-(e)", from: inForce, seen: "text"},
	{parameter: "plug_types", number: 2, unit: "types", cite: part62 + "160(a)(2)", from: inForce, seen: "text"},
	{parameter: "muff_types", number: 2, unit: "types", cite: part62 + "160(a)(2)", from: inForce, seen: "text"},
	// Hearing tests.
	{parameter: "baseline_time", ends: "2024-09-15", cite: part62 + "170(a)(1), 62.160(c)(2)", from: inForce, seen: "text"}, // 6 months
	{parameter: "baseline_time_mobile", ends: "2025-03-15", cite: part62 + "170(a)(1)", from: inForce, seen: "text"},        // 12 months
	{parameter: "quiet_period", number: 14, unit: "h", cite: part62 + "170(a)(2)", from: inForce, seen: "text"},
	{parameter: "absence_for_new_baseline", number: 6, unit: "months", cite: part62 + "170(a)(3)", from: inForce, seen: "text"},
	{parameter: "annual_interval", ends: "2025-03-15", cite: part62 + "170(b)", from: inForce, seen: "text"},       // 12 months
	{parameter: "results_time", ends: "2024-04-14", cite: part62 + "172(a)(4)", from: inForce, seen: "text"},       // 30 calendar days
	{parameter: "retest_time", ends: "2024-04-14", cite: part62 + "172(b)(1)-(2)", from: inForce, seen: "text"},    // 30 calendar days
	{parameter: "shift_action_time", ends: "2024-04-14", cite: part62 + "174", from: inForce, seen: "text"},        // 30 calendar days
	{parameter: "result_letter_time", ends: "2024-03-29", cite: part62 + "175(a)", from: inForce, seen: "text"},    // 10 working days
	{parameter: "report_time", ends: "2024-03-29", cite: part62 + "175(b), 50.20(a)", from: inForce, seen: "text"}, // 10 working days
	{parameter: "standard_threshold_shift", number: 10, unit: "dB", cite: part62 + "101", from: inForce, seen: "text"},
	{parameter: "reportable_hearing_loss", number: 25, unit: "dB", cite: part62 + "101", from: inForce, seen: "text"},
	// Training and records.
	{parameter: "training_first", ends: "2024-04-14", cite: part62 + "180(a)", from: inForce, seen: "text"},    // 30 days
	{parameter: "training_interval", ends: "2025-03-15", cite: part62 + "180(a)", from: inForce, seen: "text"}, // 12 months
	{parameter: "training_topics", words: []any{"noise_effects", "protectors", "law_in_general", "noise_controls", "audiometry"}, cite: part62 + "180(a)(1)-(7)", from: inForce, seen: "text"},
	{parameter: "retention", ends: "2024-09-15", cite: part62 + "110(e), 62.171(c), 62.180(b)", from: inForce, seen: "text"}, // 6 months
	{parameter: "access_time", ends: "2024-03-30", cite: part62 + "190(a)", from: inForce, seen: "text"},                     // 15 calendar days
}

func TestMineNumbersAreAsPrinted(t *testing.T) {
	holdToSheet(t, takeBundle(t, mines), mineNumbers)
}

func TestParagraphsOfPart62(t *testing.T) {
	holdToParagraphs(t, takeBundle(t, mines), "")
}

// TestTable621 computes the reference durations of Table 62-1 with the channel for the permissible exposure level, and
// from 80 to 89 dBA with that for the action level.
func TestTable621(t *testing.T) {
	b := takeBundle(t, mines)
	action, limit := scaleOf(b.Measures.Exposure.Channels["action"]), scaleOf(b.Measures.Exposure.Channels["limit"])
	assert.Equal(t, acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 80, Upper: 130}, action) // 62.101
	assert.Equal(t, acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 90, Upper: 140}, limit)
	rows := vectorRows(t, "us_msha_table_62_1.csv")
	for _, row := range rows {
		dba, printed := numberIn(t, row, "level_dba"), numberIn(t, row, "duration_h_table")
		rounding := 0.05 // printed to 0.1 h, from 106 dBA on to 0.01 h
		if dba > 105 {
			rounding = 0.005
		}
		for _, scale := range []acoustics.Scale{action, limit} {
			assert.InDelta(t, printed, scale.ReferenceMinutes(dba)/60, rounding+1e-9, "%g dBA", dba)
		}
		for name, scale := range map[string]acoustics.Scale{"action": action, "limit": limit} {
			dose, err := scale.Dose([]acoustics.Segment{{Level: dba, Minutes: scale.ReferenceMinutes(dba) / 4}})
			require.NoError(t, err)
			if dba < scale.Threshold {
				assert.Zero(t, dose, "%g dBA does not count for %s", dba, name)
			} else {
				assert.InDelta(t, 25, dose, 1e-9, "a quarter of the time at %g dBA, %s", dba, name)
			}
		}
	}
	assert.Len(t, rows, 32, "80, and 85 to 115 dBA")
}

// TestTable622 converts the doses of Table 62-2, which are rounded to whole percent: half a percent is what the level may
// be off. At 99, 101 to 104 and 106 dBA they are rounded loosely (350 % for 348.2 %); there it may be 0.05 dB.
func TestTable622(t *testing.T) {
	limit := scaleOf(takeBundle(t, mines).Measures.Exposure.Channels["limit"])
	rows := vectorRows(t, "us_msha_table_62_2.csv")
	loose := map[float64]bool{99: true, 101: true, 102: true, 103: true, 104: true, 106: true}
	for _, row := range rows {
		dose, printed := numberIn(t, row, "dose_percent"), numberIn(t, row, "twa8_dba")
		off := 16.62 * math.Log10(1+0.5/dose)
		if loose[printed] {
			off = 0.05
		}
		twa, ok := limit.TWA(dose)
		require.True(t, ok)
		assert.InDelta(t, printed, twa, off, row["dose_percent"])
	}
	assert.Len(t, rows, 36)
	for _, pair := range [][2]float64{{50, 85}, {100, 90}, {800, 105}} { // the three levels of 62.101
		twa, ok := limit.TWAReported(pair[0])
		require.True(t, ok)
		assert.Equal(t, pair[1], twa)
	}
}

// TestLevelsOfPart62 holds the comparators to 62.120, 62.130(a) and 62.140: reached, exceeded, exceeded.
func TestLevelsOfPart62(t *testing.T) {
	x := takeBundle(t, mines).Measures.Exposure
	assert.Equal(t, "action", x.Enrols)
	assert.Equal(t, []string{"action", "action_dose", ""}, []string{x.Levels["action"].Channel, x.Levels["action"].AtLeast, x.Levels["action"].Above})
	assert.Equal(t, []string{"limit", "", "permissible_dose"}, []string{x.Levels["limit"].Channel, x.Levels["limit"].AtLeast, x.Levels["limit"].Above})
	assert.Equal(t, []string{"limit", "", "dual_protection_dose"}, []string{x.Levels["dual"].Channel, x.Levels["dual"].AtLeast, x.Levels["dual"].Above})
	assert.Len(t, x.Levels, 3)
}

// TestExamplesOfTheMineSheet takes the worked examples of sheet section 5, which are derived there: Part 62 has none.
func TestExamplesOfTheMineSheet(t *testing.T) {
	b := takeBundle(t, mines)
	action := scaleOf(b.Measures.Exposure.Channels["action"])
	dose, err := action.Dose([]acoustics.Segment{{Level: 86, Minutes: 720}})
	require.NoError(t, err)
	assert.InDelta(t, 86.2, dose, 0.05)
	twa, ok := action.TWAReported(dose)
	require.True(t, ok)
	assert.Equal(t, 88.9, twa)
	dose, err = action.Dose([]acoustics.Segment{{Level: 91, Minutes: 480}})
	require.NoError(t, err)
	assert.InDelta(t, 115, dose, 0.5)
	// Results received on 2 January 2025: ten working days later it is 16 January.
	letter, err := calendar.Interval{Count: 10, Unit: calendar.WorkingDays}.After(calendar.MustParse("2025-01-02"), b.Week)
	require.NoError(t, err)
	assert.Equal(t, "2025-01-16", letter.String())
}

// TestTables623And624 compares every cell of the age values with the Appendix.
func TestTables623And624(t *testing.T) {
	age := takeBundle(t, mines).Measures.Hearing.AgeCorrection
	require.NotNil(t, age)
	cells, frequencies := 0, []int{2000, 3000, 4000}
	for _, row := range vectorRows(t, "us_msha_age_correction.csv") {
		at := int(numberIn(t, row, "age")) - age.FromAge
		for _, hz := range frequencies {
			values := age.Values[row["sex"]][hz]
			require.True(t, at >= 0 && at < len(values), "%s, %s, %d Hz", row["sex"], row["age"], hz)
			assert.Equal(t, int(numberIn(t, row, "hz"+strconv.Itoa(hz))), values[at], "%s, %s, %d Hz", row["sex"], row["age"], hz)
			cells++
		}
	}
	assert.Equal(t, 246, cells, "Tables 62-3 and 62-4 have 41 ages, 3 frequencies and 2 sexes")
	for sex, values := range age.Values {
		assert.Len(t, values, len(frequencies), sex)
	}
	// The one cell that OSHA prints otherwise, and the example of the sheet: a woman of 45 at the baseline, 51 now.
	assert.Equal(t, 11, age.Values["female"][3000][51-20])
	osha := takeBundle(t, generalIndustry).Measures.Hearing.AgeCorrection
	differences := 0
	for sex, values := range age.Values {
		for hz := range values {
			for i := range values[hz] {
				if values[hz][i] != osha.Values[sex][hz][i] {
					differences++
				}
			}
		}
	}
	assert.Equal(t, 1, differences)
	allowance, err := age.Aging("female", 45, 51, frequencies)
	require.NoError(t, err)
	assert.Equal(t, []int{2, 1, 2}, allowance)
}

// TestHearingOfPart62 holds frequencies, baselines and professions to 62.101, 62.170 to 62.175.
func TestHearingOfPart62(t *testing.T) {
	h := takeBundle(t, mines).Measures.Hearing
	assert.Equal(t, []int{500, 1000, 2000, 3000, 4000, 6000}, h.Required)
	assert.Equal(t, audiometry.Scheme{Rule: "mean", Frequencies: []int{2000, 3000, 4000}, AtLeast: "standard_threshold_shift", Baseline: "standing"}, h.Shift.Scheme)
	assert.Equal(t, []any{"retest_time", "received", true}, []any{h.Shift.Retest, h.Shift.RetestFrom, h.Shift.RetestOnce})
	require.Len(t, h.Others, 1)
	assert.Equal(t, audiometry.Scheme{Name: "reportable", Rule: "mean", Frequencies: []int{2000, 3000, 4000}, AtLeast: "reportable_hearing_loss", Baseline: "improved", Cite: "30 CFR 62.101"}, h.Others[0])
	assert.ElementsMatch(t, []string{"physician", "otolaryngologist", "audiologist"}, h.Physicians)
	assert.ElementsMatch(t, h.Physicians, h.Professionals)
	assert.ElementsMatch(t, h.Physicians, h.Licensed)
}

// TestFederalHolidays holds the listed holidays to published lists of the Office of Personnel Management for three
// years (from memory): days moved from a Saturday or Sunday, and Juneteenth from 2021 on.
func TestFederalHolidays(t *testing.T) {
	b := takeBundle(t, mines)
	listed := map[string]bool{}
	perYear := map[string]int{}
	for _, h := range b.Measures.WorkingDays.Holidays {
		assert.False(t, listed[h.Date], "%s is listed twice", h.Date)
		listed[h.Date] = true
		perYear[h.Date[:4]]++
		day := calendar.MustParse(h.Date).Weekday().String()
		assert.NotContains(t, []string{"Saturday", "Sunday"}, day, h.Date)
	}
	for _, day := range []string{
		"2019-01-01", "2019-01-21", "2019-02-18", "2019-05-27", "2019-07-04", "2019-09-02", "2019-10-14", "2019-11-11", "2019-11-28", "2019-12-25",
		"2021-01-01", "2021-01-18", "2021-02-15", "2021-05-31", "2021-06-18", "2021-07-05", "2021-09-06", "2021-10-11", "2021-11-11", "2021-11-25", "2021-12-24", "2021-12-31",
		"2026-01-01", "2026-01-19", "2026-02-16", "2026-05-25", "2026-06-19", "2026-07-03", "2026-09-07", "2026-10-12", "2026-11-11", "2026-11-26", "2026-12-25",
	} {
		assert.True(t, listed[day], "%s is a federal holiday", day)
	}
	assert.Equal(t, []int{10, 12, 11}, []int{perYear["2019"], perYear["2021"], perYear["2026"]}, "New Year's Day of 2022 fell on 31 December 2021")
	assert.False(t, listed["2020-06-19"])
	assert.Equal(t, "2030-12-31", b.Measures.WorkingDays.KnownUntil)
}
