package bundle

import (
	"math"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
)

// The tests of this file hold eu-directive-2003-10 to the numbers of its sheet as printed, and give the helpers by
// which law_de_test.go does the same.

const euDirective = "eu-directive-2003-10"

func takeBundle(t *testing.T, id string) *Bundle {
	t.Helper()
	shelf, err := NewShelf()
	require.NoError(t, err)
	library, err := shelf.Take(id)
	require.NoError(t, err)
	return library[id]
}

// sheetNumber is a number, time or list of a sheet with its mark. A time is given by where it ends when it begins on
// 2024-03-15.
type sheetNumber struct {
	parameter string
	number    float64
	ends      string
	words     []any
	unit      string
	cite      string
	from      string
	seen      string
}

// holdToSheet compares every parameter of a bundle with its sheet; one that the sheet's table lacks fails, too.
func holdToSheet(t *testing.T, b *Bundle, sheet []sheetNumber) {
	t.Helper()
	start := calendar.MustParse("2024-03-15")
	listed := map[string]bool{}
	for _, want := range sheet {
		listed[want.parameter] = true
		p, ok := b.Parameters[want.parameter]
		if !assert.True(t, ok, "the bundle has no parameter %s", want.parameter) {
			continue
		}
		v, ok := p.At(start)
		require.True(t, ok, want.parameter)
		assert.Equal(t, []string{want.unit, want.cite, want.seen, want.from}, []string{p.Unit, v.Cite, v.Seen, v.From}, want.parameter)
		switch {
		case want.ends != "":
			interval, ok := v.Interval()
			require.True(t, ok, want.parameter)
			end, err := interval.After(start, b.Week)
			require.NoError(t, err)
			assert.Equal(t, want.ends, end.String(), want.parameter)
		case want.words != nil:
			assert.Equal(t, want.words, v.Plain(), want.parameter)
		default:
			number, ok := v.Number()
			require.True(t, ok, want.parameter)
			assert.Equal(t, want.number, number, want.parameter)
		}
		_, ok = p.At(calendar.MustParse(want.from).AddDays(-1))
		assert.False(t, ok, "%s has a value before its first day", want.parameter)
	}
	for name := range b.Parameters {
		assert.True(t, listed[name], "the parameter %s is not held against the sheet", name)
	}
}

// holdToParagraphs compares the bundle's own paragraphs with the list of its instruments.
func holdToParagraphs(t *testing.T, b *Bundle, prefix string) {
	t.Helper()
	content, err := os.ReadFile("testdata/" + b.ID + ".paragraphs.txt")
	require.NoError(t, err)
	listed := map[string]bool{}
	for line := range strings.Lines(string(content)) {
		if line = strings.TrimSpace(line); line != "" && !strings.HasPrefix(line, "# ") {
			listed[line] = true
			assert.Contains(t, b.Paragraphs, line, "the paragraph is not accounted for")
		}
	}
	require.NotEmpty(t, listed)
	for name := range b.Paragraphs {
		if strings.HasPrefix(name, prefix) { // those of a bundle that it extends are held to its own list
			assert.True(t, listed[name], "the paragraph %s is not in the list of the instruments", name)
		}
	}
}

const (
	euCite       = "Directive 2003/10/EC "
	euTransposed = "2006-02-15" // Article 17: last day of transposition
)

// euNumbers are the numbers of sheet section 2 and the lists of section 3.
var euNumbers = []sheetNumber{
	{parameter: "lower_action_level", number: 80, unit: "dBA", cite: euCite + "Art 3(1)(c)", from: euTransposed, seen: "text"},
	{parameter: "lower_action_peak", number: 135, unit: "dBC", cite: euCite + "Art 3(1)(c)", from: euTransposed, seen: "text"},
	{parameter: "upper_action_level", number: 85, unit: "dBA", cite: euCite + "Art 3(1)(b)", from: euTransposed, seen: "text"},
	{parameter: "upper_action_peak", number: 137, unit: "dBC", cite: euCite + "Art 3(1)(b)", from: euTransposed, seen: "text"},
	{parameter: "limit_level", number: 87, unit: "dBA", cite: euCite + "Art 3(1)(a), 3(2)", from: euTransposed, seen: "text"},
	{parameter: "limit_peak", number: 140, unit: "dBC", cite: euCite + "Art 3(1)(a), 3(2)", from: euTransposed, seen: "text"},
	{parameter: "weekly_limit", number: 87, unit: "dBA", cite: euCite + "Art 3(3)(a)", from: euTransposed, seen: "text"},
	{parameter: "assessment_heads", words: []any{"level_type_duration", "limit_and_action_values", "sensitive_groups", "ototoxics_and_vibration", "warning_signals", "emission_data",
		"quieter_alternatives", "exposure_beyond_hours", "health_surveillance_findings", "adequate_protectors"}, cite: euCite + "Art 4(6)(a)-(j)", from: euTransposed, seen: "secondary"},
	{parameter: "limit_action_heads", words: []any{"exposure_reduced", "reasons_found", "measures_amended"}, cite: euCite + "Art 7(2)(a)-(c)", from: euTransposed, seen: "secondary"},
	{parameter: "information_topics", words: []any{"noise_effects", "measures", "limit_values", "assessment_results", "protectors", "damage_reporting", "health_surveillance", "safe_practices"},
		cite: euCite + "Art 8(a)-(h)", from: euTransposed, seen: "secondary"},
	{parameter: "consultation_heads", words: []any{"assessment", "measures", "protectors"}, cite: euCite + "Art 9", from: euTransposed, seen: "secondary"},
}

func TestDirectiveNumbersAreAsPrinted(t *testing.T) {
	holdToSheet(t, takeBundle(t, euDirective), euNumbers)
}

func TestParagraphsOfTheDirective(t *testing.T) {
	holdToParagraphs(t, takeBundle(t, euDirective), "Art ")
}

// TestPascalsOfTheDirective ties the peaks in pascals of Article 3(1) to the decibels re 20 µPa printed beside them
// (worked out: 140.00, 136.90 and 134.96 dB).
func TestPascalsOfTheDirective(t *testing.T) {
	b := takeBundle(t, euDirective)
	for parameter, printed := range map[string]struct{ pascal, db float64 }{
		"limit_peak": {200, 140.00}, "upper_action_peak": {140, 136.90}, "lower_action_peak": {112, 134.96},
	} {
		db := 20 * math.Log10(printed.pascal/20e-6)
		assert.InDelta(t, printed.db, db, 0.005, parameter)
		whole, ok := b.Number(parameter, calendar.MustParse("2026-06-30"))
		require.True(t, ok)
		assert.Equal(t, whole, math.Round(db), parameter)
		assert.Contains(t, b.Parameters[parameter].About, " Pa")
	}
}

// levelsAt lists the parts of the bundle's levels that a value on a channel reaches, of those that are asked for.
func levelsAt(t *testing.T, b *Bundle, value float64, parts ...string) []string {
	t.Helper()
	out := []string{}
	for _, part := range parts {
		level := b.Measures.Exposure.Levels[part]
		limit, ok := b.Number(level.AtLeast+level.Above, calendar.MustParse("2026-06-30"))
		require.True(t, ok, part)
		if level.Above != "" && value > limit || level.AtLeast != "" && value >= limit {
			out = append(out, part)
		}
	}
	return out
}

// TestBoundaryVectorsOfTheDirective holds the levels to sheet section 5: which duty begins at a value, and which above.
func TestBoundaryVectorsOfTheDirective(t *testing.T) {
	b := takeBundle(t, euDirective)
	parts := []string{"lower_level_reached", "lower_level_exceeded", "upper_level_reached", "upper_level_exceeded", "limit_level_exceeded"}
	for value, reached := range map[float64]int{79.9: 0, 80.0: 1, 80.1: 2, 85.0: 3, 85.1: 4, 87.0: 4, 87.1: 5} {
		assert.Equal(t, parts[:reached], levelsAt(t, b, value, parts...), "%v dB(A)", value)
	}
	parts = []string{"lower_peak_reached", "lower_peak_exceeded", "upper_peak_reached", "upper_peak_exceeded", "limit_peak_exceeded"}
	for value, reached := range map[float64]int{134.9: 0, 135: 1, 135.1: 2, 137: 3, 137.1: 4, 140: 4, 140.1: 5} {
		assert.Equal(t, parts[:reached], levelsAt(t, b, value, parts...), "%v dB(C)", value)
	}
	for _, name := range []string{"lower_reached", "lower_exceeded", "upper_reached", "upper_exceeded"} {
		value, verb, _ := strings.Cut(name, "_")
		assert.Equal(t, []string{value + "_level_" + verb, value + "_peak_" + verb}, b.Measures.Exposure.Levels[name].Any)
	}
	assert.Equal(t, "lower_reached", b.Measures.Exposure.Enrols)
}

// TestLevelsOfDayAndWeekOfTheDirective works out Article 2(b) and (c): ISO 1999:1990, 3.6 and note 2.
func TestLevelsOfDayAndWeekOfTheDirective(t *testing.T) {
	day, ok := acoustics.LEX8h(85, 600)
	require.True(t, ok)
	assert.InDelta(t, 85+10*math.Log10(10.0/8), day, 1e-9)
	week, err := acoustics.WeeklyLEX([]float64{90, 90, 80, 80, 80}, 5)
	require.NoError(t, err)
	assert.InDelta(t, 10*math.Log10((2*1e9+3*1e8)/5), week, 1e-9)
	channels := takeBundle(t, euDirective).Measures.Exposure.Channels
	assert.True(t, channels["week"].Weekly)
	assert.False(t, channels["day"].Weekly)
	assert.Equal(t, "peak_dbc", channels["peak"].Of)
}
