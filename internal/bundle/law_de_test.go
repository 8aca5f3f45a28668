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

// The tests of this file hold de-laermvibration to the numbers and examples of its sheet.

const (
	germanLaw    = "de-laermvibration"
	deNoise      = "LärmVibrationsArbSchV "
	deKs         = "DGUV Information 212-024 8.3"
	deNoiseFrom  = "2007-03-09" // BGBl I 2007 p. 261; the day is from memory
	deHealthFrom = "2008-12-24" // BGBl I 2008 p. 2768; the day is from a presentation by an authority
	deRules2017  = "2017-09-05" // GMBl 2017 no 34/35
)

// deNumbers are the numbers of sheet section 2 and the lists of section 3. What is in force on 15 March 2024 counts.
var deNumbers = []sheetNumber{
	{parameter: "lower_action_level", number: 80, unit: "dBA", cite: deNoise + "§ 6 no 2", from: deNoiseFrom, seen: "text"},
	{parameter: "lower_action_peak", number: 135, unit: "dBC", cite: deNoise + "§ 6 no 2", from: deNoiseFrom, seen: "text"},
	{parameter: "upper_action_level", number: 85, unit: "dBA", cite: deNoise + "§ 6 no 1", from: deNoiseFrom, seen: "text"},
	{parameter: "upper_action_peak", number: 137, unit: "dBC", cite: deNoise + "§ 6 no 1", from: deNoiseFrom, seen: "text"},
	{parameter: "limit_level", number: 85, unit: "dBA", cite: deNoise + "§ 8(2)", from: deNoiseFrom, seen: "text"},
	{parameter: "limit_peak", number: 137, unit: "dBC", cite: deNoise + "§ 8(2)", from: deNoiseFrom, seen: "text"},
	{parameter: "weekly_limit", number: 85, unit: "dBA", cite: deNoise + "§ 15(2) no 1", from: deNoiseFrom, seen: "text"},
	{parameter: "margin_class_1", number: 0, unit: "dB", cite: "TRLV Lärm 2 § 9, Table 3", from: deRules2017, seen: "text"},
	{parameter: "margin_class_2", number: 3, unit: "dB", cite: "TRLV Lärm 2 § 9, Table 3", from: deRules2017, seen: "text"},
	{parameter: "margin_class_3", number: 6, unit: "dB", cite: "TRLV Lärm 2 § 9, Table 3", from: deRules2017, seen: "text"},
	{parameter: "measurement_retention", ends: "2054-03-15", cite: deNoise + "§ 4(1) sentence 4", from: deNoiseFrom, seen: "text"}, // 30 years
	{parameter: "documented_heads", words: []any{"level_type_duration", "limit_and_action_values", "quieter_alternatives", "health_surveillance_findings", "exposure_beyond_hours", "adequate_protectors",
		"sensitive_groups", "emission_data", "ototoxics_and_vibration", "warning_signals", "concentration_work"}, cite: deNoise + "§ 3(2) no 1 (a)-(h), (3)", from: deNoiseFrom, seen: "text"},
	{parameter: "programme_heads", words: []any{"priority_list", "timetable", "effectiveness_check"}, cite: "TRLV Lärm 1 § 9(3)", from: deRules2017, seen: "text"},
	{parameter: "ear_action_heads", words: []any{"reasons_found", "measures_amended"}, cite: deNoise + "§ 8(4) sentence 2", from: deNoiseFrom, seen: "text"},
	{parameter: "exemption_review", ends: "2028-03-15", cite: deNoise + "§ 15(1)", from: deNoiseFrom, seen: "text"}, // 4 years
	{parameter: "ks_foam_plug", number: 9, unit: "dB", cite: deKs, from: deRules2017, seen: "text"},
	{parameter: "ks_formed_plug", number: 5, unit: "dB", cite: deKs, from: deRules2017, seen: "text"},
	{parameter: "ks_custom_plug", number: 3, unit: "dB", cite: deKs, from: deRules2017, seen: "text"},
	{parameter: "ks_muff", number: 5, unit: "dB", cite: deKs, from: deRules2017, seen: "text"},
	{parameter: "residual_top", number: 80, unit: "dBA", cite: "DGUV Information 212-024 Annex 2", from: deRules2017, seen: "text"},
	{parameter: "residual_floor", number: 70, unit: "dBA", cite: "DGUV Information 212-024 Annex 2", from: deRules2017, seen: "text"},
	{parameter: "custom_check_interval", ends: "2026-03-15", cite: "DGUV Information 212-024; DGUV Regel 112-194", from: deRules2017, seen: "text"}, // 2 years
	{parameter: "qualified_use_level", number: 110, unit: "dBA", cite: "TRLV Lärm 3, as stated by BGN", from: deNoiseFrom, seen: "secondary"},
	{parameter: "qualified_use_interval", ends: "2024-09-15", cite: "TRLV Lärm 3, as stated by BGN", from: deRules2017, seen: "secondary"}, // several times a year
	{parameter: "hearing_damage_level", number: 40, unit: "dB HL", cite: "DGUV FAQ on TRLV Lärm 3", from: deNoiseFrom, seen: "text"},
	{parameter: "instruction_topics", words: []any{"noise_effects", "measures", "limit_values", "assessment_results", "protectors", "health_surveillance", "safe_practices", "damage_reporting"},
		cite: deNoise + "§ 11(2) no 1-8", from: deNoiseFrom, seen: "text"},
	{parameter: "instruction_interval", ends: "2025-03-15", cite: "TRLV Lärm 1 § 7(3)", from: deRules2017, seen: "text"}, // yearly
	{parameter: "first_appointment", ends: "2024-06-15", cite: "AMR 2.1 no 3(1)", from: "2016-05-10", seen: "text"},      // within 3 months before
	{parameter: "second_appointment", ends: "2025-03-15", cite: "AMR 2.1 no 3(2)(c)", from: "2016-05-10", seen: "text"},  // 12 months after the start
	{parameter: "later_appointment", ends: "2027-03-15", cite: "AMR 2.1 no 3(3)", from: "2016-05-10", seen: "text"},      // 36 months
}

// deEarlierRules are the parameters that have a value from before the rule that was read, with its mark and first day.
var deEarlierRules = map[string][2]string{
	"margin_class_1": {"secondary", deNoiseFrom}, "margin_class_2": {"secondary", deNoiseFrom}, "margin_class_3": {"secondary", deNoiseFrom},
	"first_appointment": {"memory", deHealthFrom}, "second_appointment": {"memory", deHealthFrom}, "later_appointment": {"memory", deHealthFrom},
}

func TestGermanNumbersAreAsPrinted(t *testing.T) {
	b := takeBundle(t, germanLaw)
	for name, earlier := range deEarlierRules {
		p := b.Parameters[name]
		require.Len(t, p.Values, 2, name)
		assert.Equal(t, earlier, [2]string{p.Values[0].Seen, p.Values[0].From}, name)
		assert.Equal(t, p.Values[0].Plain(), p.Values[1].Plain(), "%s was the same before", name)
		p.Values = p.Values[1:]
		b.Parameters[name] = p
	}
	holdToSheet(t, b, deNumbers)
}

func TestParagraphsOfTheGermanTexts(t *testing.T) {
	b := takeBundle(t, germanLaw)
	holdToParagraphs(t, b, "LärmVibrationsArbSchV")
	holdToParagraphs(t, b, "ArbMedVV")
	for _, guidance := range []string{"AMR", "TRLV", "DGUV"} {
		holdToParagraphs(t, b, guidance)
	}
}

// TestNothingOfTheDirectiveBindsInGermany: no finding may cite the Directive, and guidance is told from law.
func TestNothingOfTheDirectiveBindsInGermany(t *testing.T) {
	b := takeBundle(t, germanLaw)
	require.NotEmpty(t, b.Duties)
	for _, d := range b.Duties {
		assert.Equal(t, germanLaw, d.From, d.ID)
		assert.NotContains(t, d.Cite, "Directive", d.ID)
		law := strings.HasPrefix(d.Cite, "LärmVibrationsArbSchV") || strings.HasPrefix(d.Cite, "ArbMedVV")
		assert.Equal(t, !law, strings.HasSuffix(d.Title, "(guidance)"), d.ID)
		if !law {
			assert.Equal(t, "minor", d.Severity, d.ID)
		}
	}
	for name, p := range b.Parameters {
		for i := range p.Values {
			assert.NotContains(t, p.Values[i].Cite, "Directive", name)
		}
	}
}

// TestGermanActionValues holds the verbs of §§ 6 to 8 and of the annex of ArbMedVV to their values.
func TestGermanActionValues(t *testing.T) {
	b := takeBundle(t, germanLaw)
	parts := []string{"lower_level_reached", "lower_level_exceeded", "upper_level_reached", "upper_level_exceeded", "ear_level_exceeded"}
	for value, reached := range map[float64]int{79.9: 0, 80.0: 1, 80.1: 2, 85.0: 3, 85.1: 5, 87: 5} {
		assert.Equal(t, parts[:reached], levelsAt(t, b, value, parts...), "%v dB(A)", value)
	}
	parts = []string{"lower_peak_reached", "lower_peak_exceeded", "upper_peak_reached", "upper_peak_exceeded", "limit_peak_exceeded"}
	for value, reached := range map[float64]int{134.9: 0, 135: 1, 135.1: 2, 137: 3, 137.1: 5} {
		assert.Equal(t, parts[:reached], levelsAt(t, b, value, parts...), "%v dB(C)", value)
	}
	limit := b.Measures.Exposure.Levels["limit"]
	assert.Equal(t, []string{"ear_level_exceeded", "limit_peak_exceeded"}, limit.Any)
	assert.Nil(t, b.Measures.Exposure.Levels["ear_level_exceeded"].Instead, "the week is for action values, not for the ear")
	assert.Equal(t, "weekly_average", b.Measures.Exposure.Levels["upper_level_exceeded"].Instead.Choice)
}

// TestAccuracyClassesOfTheSheet works out the first examples of sheet section 5 with the bundle's margins.
func TestAccuracyClassesOfTheSheet(t *testing.T) {
	b := takeBundle(t, germanLaw)
	day := calendar.MustParse("2026-06-30")
	for _, c := range []struct {
		measured     float64
		class        string
		low, high    float64
		upper, lower bool // whether the action value counts as exceeded
	}{
		{83.0, "2", 80.0, 86.0, true, true}, {83.0, "1", 83.0, 83.0, false, true}, {81.9, "2", 78.9, 84.9, false, true},
	} {
		margin, ok := b.Number(b.Measures.Exposure.Margins[c.class], day)
		require.True(t, ok)
		assert.InDelta(t, c.low, c.measured-margin, 1e-9)
		assert.InDelta(t, c.high, c.measured+margin, 1e-9)
		assert.Equal(t, c.upper, len(levelsAt(t, b, c.measured+margin, "upper_level_exceeded")) == 1)
		assert.Equal(t, c.lower, len(levelsAt(t, b, c.measured+margin, "lower_level_exceeded")) == 1)
	}
}

// TestDeductionsOfTheSheet works out the attenuations of sheet section 5: M less Ks, of 98 dB(A) broadband. Where C- and
// A-weighted levels differ by 2 dB, the attenuation by H, M and L is M itself.
func TestDeductionsOfTheSheet(t *testing.T) {
	b := takeBundle(t, germanLaw)
	assert.Equal(t, "hml", b.Measures.Protection.Rating)
	day := calendar.MustParse("2026-06-30")
	for kind, m := range map[string]float64{"formable": 26, "earmuff": 22, "helmet_muff": 22, "premolded": 22, "custom": 20} {
		ks, ok := b.Number(b.Measures.Protection.RealWorldByType[kind], day)
		require.True(t, ok, kind)
		under, err := acoustics.UnderHML(98, 100, acoustics.HML{High: m + 4, Medium: m, Low: m - 6})
		require.NoError(t, err)
		assert.InDelta(t, 81, under.RealWorld(ks).Level, 1e-9, kind)
	}
	top, _ := b.Number("residual_top", day)
	limit, _ := b.Number("limit_level", day)
	assert.True(t, top < 81 && 81 <= limit, "allowed, but not recommended")
}

// TestTimesOfTheSheet works out the last example of sheet section 5: start on 1 May 2026.
func TestTimesOfTheSheet(t *testing.T) {
	b := takeBundle(t, germanLaw)
	start := calendar.MustParse("2026-05-01")
	first, ok := b.Interval("first_appointment", start)
	require.True(t, ok)
	earliest, err := first.Before(start)
	require.NoError(t, err)
	assert.Equal(t, "2026-02-01", earliest.String())
	second, ok := b.Interval("second_appointment", start)
	require.True(t, ok)
	latest, err := second.After(start, nil)
	require.NoError(t, err)
	assert.Equal(t, "2027-05-01", latest.String())
	later, ok := b.Interval("later_appointment", latest)
	require.True(t, ok)
	next, err := later.After(latest, nil)
	require.NoError(t, err)
	assert.Equal(t, "2030-05-01", next.String())
}

// TestGermanWeek works out L_EX,40h, § 2(3): the energy of the week's days over five days of 8 hours.
func TestGermanWeek(t *testing.T) {
	week, err := acoustics.WeeklyLEX([]float64{85.9, 85.9, 85.9, 85.9}, 4)
	require.NoError(t, err)
	assert.InDelta(t, 85.9+10*math.Log10(4.0/5), week, 1e-9)
	limit, ok := takeBundle(t, germanLaw).Number("weekly_limit", calendar.MustParse("2026-06-30"))
	require.True(t, ok)
	assert.LessOrEqual(t, week, limit)
}
