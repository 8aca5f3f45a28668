package bundle

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
)

// The tests of this file hold gb-noise-2005, and ni-noise-2006 that extends it, to the numbers and worked examples of
// the sheet. What stands here was taken from the sheet and from testdata/vectors, never from the bundle.

const (
	britain = "gb-noise-2005"
	ofNoise = "Control of Noise at Work Regulations "
	ofHSE   = "HSE, Health surveillance for noise (guidance)"
	ofTests = "HSE L108 (2021), audiometric testing (guidance)"
	ofNoisy = "2006-04-06" // reg 1: in force 6 April 2006
	edition = "2021-01-01" // third edition of L108, of which only the year is known
)

// gbNumbers are the numbers and lists of sheet sections 2 to 4. Intervals end where they do from 2024-03-15 on.
var gbNumbers = []sheetNumber{
	{parameter: "lower_action_value", number: 80, unit: "dBA", cite: ofNoise + "reg 4(1)(a)", from: ofNoisy, seen: "text"},
	{parameter: "lower_peak_action_value", number: 135, unit: "dBC", cite: ofNoise + "reg 4(1)(b)", from: ofNoisy, seen: "text"},
	{parameter: "upper_action_value", number: 85, unit: "dBA", cite: ofNoise + "reg 4(2)(a)", from: ofNoisy, seen: "text"},
	{parameter: "upper_peak_action_value", number: 137, unit: "dBC", cite: ofNoise + "reg 4(2)(b)", from: ofNoisy, seen: "text"},
	{parameter: "limit_value", number: 87, unit: "dBA", cite: ofNoise + "reg 4(3)(a)", from: ofNoisy, seen: "text"},
	{parameter: "peak_limit_value", number: 140, unit: "dBC", cite: ofNoise + "reg 4(3)(b)", from: ofNoisy, seen: "text"},
	{parameter: "assessment_heads", words: []any{"level_type_duration", "sensitive_groups", "ototoxics_and_vibration", "warning_signals", "emission_data",
		"quieter_alternatives", "exposure_beyond_hours", "health_surveillance_findings", "adequate_protectors"}, cite: ofNoise + "reg 5(3)(a)-(i)", from: ofNoisy, seen: "text"},
	{parameter: "assessment_record", words: []any{"significant_findings", "planned_measures"}, cite: ofNoise + "reg 5(6)", from: ofNoisy, seen: "text"},
	{parameter: "control_heads", words: []any{"work_methods", "equipment_choice", "layout", "information_and_training", "technical_means", "maintenance", "limited_duration",
		"rest_schedules"}, cite: ofNoise + "reg 6(3)(a)-(h)", from: ofNoisy, seen: "text"},
	{parameter: "limit_exceeded_actions", words: []any{"exposure_reduced", "reasons_found", "measures_amended"}, cite: ofNoise + "reg 6(4)(b)", from: ofNoisy, seen: "text"},
	{parameter: "training_heads", words: []any{"noise_effects", "measures", "limit_values", "assessment_results", "protectors", "damage_reporting", "health_surveillance",
		"safe_practices", "collective_results"}, cite: ofNoise + "reg 10(2)(a)-(i)", from: ofNoisy, seen: "text"},
	{parameter: "exemption_conditions", words: []any{"consultation", "risk_minimised", "increased_surveillance"}, cite: ofNoise + "reg 11", from: ofNoisy, seen: "text"},
	// Guidance. The law sets no number for any of these.
	{parameter: "assessment_review_interval", ends: "2026-03-15", cite: "HSE L108, review of the risk assessment (guidance)", from: ofNoisy, seen: "memory"}, // about 2 years
	{parameter: "real_world_allowance", number: 4, unit: "dB", cite: "HSE L108, real-world protection (guidance)", from: ofNoisy, seen: "memory"},
	{parameter: "ear_level_ceiling", number: 85, unit: "dBA", cite: "HSE L108, selection of protectors (guidance)", from: ofNoisy, seen: "memory"},
	{parameter: "ear_level_floor", number: 70, unit: "dBA", cite: "HSE, Avoiding over-protection (guidance)", from: ofNoisy, seen: "text"},
	{parameter: "test_interval_first", ends: "2025-03-15", cite: ofHSE, from: ofNoisy, seen: "text"},       // yearly
	{parameter: "test_interval_first_years", ends: "2026-03-15", cite: ofHSE, from: ofNoisy, seen: "text"}, // for the first two years
	{parameter: "test_interval_later", ends: "2027-03-15", cite: ofHSE, from: ofNoisy, seen: "text"},       // every three years after
	{parameter: "quiet_period", number: 16, unit: "h", cite: "HSE L108, audiometric testing (guidance)", from: ofNoisy, seen: "memory"},
	{parameter: "test_frequencies", words: []any{"500", "1000", "2000", "3000", "4000", "6000", "8000"}, cite: ofTests, from: edition, seen: "memory"},
	{parameter: "repeat_change", number: 10, unit: "dB", cite: ofTests, from: edition, seen: "memory"},                                                     // more than 10 dB
	{parameter: "repeat_time", ends: "2024-06-15", cite: ofTests, from: edition, seen: "memory"},                                                           // of the order of 3 months
	{parameter: "audiometer_interval", ends: "2025-03-15", cite: "HSE L108, audiometers (guidance)", from: ofNoisy, seen: "memory"},                        // yearly
	{parameter: "health_record_retention", ends: "2064-03-15", cite: "HSE, Record keeping in health surveillance (guidance)", from: ofNoisy, seen: "text"}, // 40 years
}

func TestBritishNumbersAreAsPrinted(t *testing.T) {
	b := takeBundle(t, britain)
	holdToSheet(t, b, gbNumbers)
	for _, n := range gbNumbers { // law and guidance are told apart by the citation and by what the parameter says
		law := strings.HasPrefix(n.cite, ofNoise)
		assert.Equal(t, !law, strings.HasPrefix(b.Parameters[n.parameter].About, "Guidance, not law. "), n.parameter)
		assert.Equal(t, !law, strings.HasSuffix(n.cite, "(guidance)"), n.parameter)
	}
}

func TestParagraphsOfGreatBritain(t *testing.T) { holdToParagraphs(t, takeBundle(t, britain), "") }

// TestCategoriesOfL108AreOff: the sheet has them from memory only, so that neither a number nor a duty may rest on them.
func TestCategoriesOfL108AreOff(t *testing.T) {
	b := takeBundle(t, britain)
	assert.NotEmpty(t, b.Paragraphs["L108 categories"].Outside)
	require.Len(t, b.Measures.Hearing.Others, 2)
	for i, name := range []string{"worsened", "worsened_core"} {
		other := b.Measures.Hearing.Others[i]
		assert.Equal(t, []string{name, "change", "repeat_change"}, []string{other.Name, other.Of, other.Above})
	}
	assert.Nil(t, b.Measures.Hearing.AgeCorrection)
	assert.Empty(t, b.Measures.Hearing.Shift.Rule, "the law knows no threshold shift")
}

// TestBoundariesOfGreatBritain: an action value is reached at its figure, a limit value is exceeded only above it.
func TestBoundariesOfGreatBritain(t *testing.T) {
	b := takeBundle(t, britain)
	for value, reached := range map[float64]int{79.9: 0, 80: 1, 84.9: 1, 85: 2, 87: 2, 87.1: 3} {
		assert.Equal(t, []string{"lower_level", "upper_level", "limit_level"}[:reached], levelsAt(t, b, value, "lower_level", "upper_level", "limit_level"), "%v dB(A)", value)
	}
	for value, reached := range map[float64]int{134.9: 0, 135: 1, 136.9: 1, 137: 2, 140: 2, 140.1: 3} {
		assert.Equal(t, []string{"lower_peak", "upper_peak", "limit_peak"}[:reached], levelsAt(t, b, value, "lower_peak", "upper_peak", "limit_peak"), "%v dB(C)", value)
	}
	for _, name := range []string{"lower", "upper", "limit"} {
		assert.Equal(t, []string{name + "_level", name + "_peak"}, b.Measures.Exposure.Levels[name].Any)
		instead := b.Measures.Exposure.Levels[name+"_level"].Instead
		require.NotNil(t, instead)
		assert.Equal(t, []string{"weekly_average", "weekly"}, []string{instead.Choice, instead.Channel})
		assert.Nil(t, b.Measures.Exposure.Levels[name+"_peak"].Instead, "the weekly average never concerns peaks")
	}
	channels := b.Measures.Exposure.Channels
	assert.True(t, channels["weekly"].Weekly && !channels["daily"].Weekly)
	assert.Equal(t, "peak_dbc", channels["peak"].Of)
	assert.Equal(t, "lower", b.Measures.Exposure.Enrols)
}

// TestDailyExamplesOfTheSheet works out sheet section 5: LEP,d by Schedule 1, and exposure points by HSE's rule.
func TestDailyExamplesOfTheSheet(t *testing.T) {
	for _, example := range []struct {
		day    []acoustics.Segment
		lepd   float64
		points float64
	}{
		{[]acoustics.Segment{{Level: 85, Minutes: 480}}, 85.00, 100.0},
		{[]acoustics.Segment{{Level: 88, Minutes: 240}}, 84.99, 99.8}, // below 85, though the rule of thumb calls it equal
		{[]acoustics.Segment{{Level: 91, Minutes: 120}}, 84.98, 99.5},
		{[]acoustics.Segment{{Level: 82, Minutes: 720}}, 83.76, 75.2},
		{[]acoustics.Segment{{Level: 80, Minutes: 480}}, 80.00, 31.6},
		{[]acoustics.Segment{{Level: 90, Minutes: 240}, {Level: 75, Minutes: 240}}, 87.12, 163.1},
		{[]acoustics.Segment{{Level: 80, Minutes: 300}, {Level: 86, Minutes: 140}, {Level: 95, Minutes: 40}}, 86.46, 139.8},
		{[]acoustics.Segment{{Level: 100, Minutes: 15}, {Level: 78, Minutes: 465}}, 85.72, 118.2},
		{[]acoustics.Segment{{Level: 105, Minutes: 5}, {Level: 70, Minutes: 475}}, 85.31, 107.3},
	} {
		laeq, ok := acoustics.LevelOfSegments(example.day)
		require.True(t, ok)
		minutes, points := 0.0, 0.0
		for _, s := range example.day {
			minutes += s.Minutes
			p, ok := acoustics.UKPoints(s.Level, s.Minutes)
			require.True(t, ok)
			points += p
		}
		lepd, ok := acoustics.LEX8h(laeq, minutes)
		require.True(t, ok)
		assert.InDelta(t, example.lepd, lepd, 0.005, "%v", example.day)
		assert.InDelta(t, example.points, points, 0.05, "%v", example.day)
	}
}

// TestWeeklyExamplesOfTheSheet works out sheet section 5: LEP,w divides by five, whatever the number of days.
func TestWeeklyExamplesOfTheSheet(t *testing.T) {
	for _, example := range []struct {
		days []float64
		lepw float64
	}{
		{[]float64{85, 85, 85, 85, 85}, 85.00},
		{[]float64{85, 85, 85, 85, 85, 85}, 85.79},
		{[]float64{84, 84, 84, 84, 84, 84}, 84.79},
		{[]float64{90, 90}, 86.02},
		{[]float64{92}, 85.01},
		{[]float64{89, 89, 80, 80, 80}, 85.77},
		{[]float64{87, 87, 87, 87}, 86.03},
		{[]float64{90, 78, 78, 78, 78}, 83.99},
	} {
		lepw, err := acoustics.WeeklyLEX(example.days, len(example.days))
		require.NoError(t, err)
		assert.InDelta(t, example.lepw, lepw, 0.005, "%v", example.days)
	}
}

// TestReadyReckonerIsEquivalent holds the formulas to HSE's printed weekly ready-reckoner (Crown copyright 2020, read in
// a mirror): the printed points of a day and of a week stand for the printed level within 0.5 dB.
func TestReadyReckonerIsEquivalent(t *testing.T) {
	const equivalent = 0.5 // dB
	daily, weekly := vectorRows(t, "uk_points_daily.csv"), vectorRows(t, "uk_points_weekly.csv")
	require.Len(t, daily, 18)
	require.Len(t, weekly, 18)
	for _, row := range daily {
		level, ok := acoustics.LEXOfUKPoints(numberIn(t, row, "points_printed"))
		require.True(t, ok)
		assert.InDelta(t, numberIn(t, row, "lepd_dBA"), level, equivalent, "%s points", row["points_printed"])
	}
	for _, row := range weekly {
		level, ok := acoustics.WeeklyLEXOfUKPoints(numberIn(t, row, "points"))
		require.True(t, ok)
		assert.InDelta(t, numberIn(t, row, "lepw_dBA_printed"), level, equivalent, "%s points", row["points"])
	}
	// The two examples that the sheet prints: a day of 90 dB scores 315 points, 2000 points in a week are 91 dB.
	assert.Equal(t, []string{"90", "315"}, []string{daily[5]["lepd_dBA"], daily[5]["points_printed"]})
	assert.Equal(t, []string{"2000", "91"}, []string{weekly[4]["points"], weekly[4]["lepw_dBA_printed"]})
}

// TestProtectorExamplesOfTheSheet works out sheet section 5: SNR 25 and H 28, M 22, L 15, with the bundle's allowance of
// 4 dB; formulas of ISO 4869-2 from memory in the sheet, computed there.
func TestProtectorExamplesOfTheSheet(t *testing.T) {
	b := takeBundle(t, britain)
	assert.Equal(t, "snr", b.Measures.Protection.Rating)
	allowance, ok := b.Number(b.Measures.Protection.RealWorld, calendar.MustParse("2026-06-30"))
	require.True(t, ok)
	snr := acoustics.UnderSNR(97, 25)
	assert.InDelta(t, 72, snr.Level, 1e-9)
	assert.InDelta(t, 76, snr.RealWorld(allowance).Level, 1e-9)
	for _, example := range []struct{ la, lc, pnr, ear, real float64 }{
		{95, 95, 25.0, 70.0, 74.0}, {95, 97, 22.0, 73.0, 77.0}, {95, 101, 18.5, 76.5, 80.5}, {103, 104, 23.5, 79.5, 83.5},
	} {
		p, err := acoustics.UnderHML(example.la, example.lc, acoustics.HML{High: 28, Medium: 22, Low: 15})
		require.NoError(t, err)
		assert.InDelta(t, example.pnr, p.Attenuation, 1e-9, "%v", example)
		assert.InDelta(t, example.ear, p.Level, 1e-9, "%v", example)
		assert.InDelta(t, example.real, p.RealWorld(allowance).Level, 1e-9, "%v", example)
	}
	// Octave bands from 125 to 8000 Hz: at the ear 85.66 dB(A), with the allowance 89.66, so not enough.
	noise := octaveBandsOf(84, 86, 88, 97, 99, 97, 96)
	la, ok := noise.Weighted(acoustics.A)
	require.True(t, ok)
	assert.InDelta(t, 104.02, la, 0.005)
	assumed, ok := acoustics.AssumedProtection(octaveBandsOf(7.4, 10.0, 14.4, 19.6, 22.8, 29.6, 38.8), octaveBandsOf(3.3, 3.6, 3.6, 4.6, 4.0, 6.2, 7.4), 1)
	require.True(t, ok)
	ear, err := acoustics.UnderOctave(noise, assumed)
	require.NoError(t, err)
	assert.InDelta(t, 85.66, ear.Level, 0.005)
	ceiling, _ := b.Number("ear_level_ceiling", calendar.MustParse("2026-06-30"))
	assert.Greater(t, ear.Level+allowance, ceiling)
	assert.InDelta(t, 89.66, ear.RealWorld(allowance).Level, 0.005)
}

// octaveBandsOf gives octave bands from 125 to 8000 Hz; that of 63 Hz holds nothing.
func octaveBandsOf(from125 ...float64) acoustics.Bands {
	out := acoustics.Bands{math.NaN()}
	copy(out[1:], from125)
	return out
}
