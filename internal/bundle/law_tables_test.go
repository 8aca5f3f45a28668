package bundle

import (
	"encoding/csv"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/acoustics"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
)

// The tests of this file hold us-osha-general-industry to the tables and numbers of the law as printed. What
// stands here was taken from the sheet of the law and from testdata/vectors, never from the bundle.

const generalIndustry = "us-osha-general-industry"

func lawBundle(t *testing.T) *Bundle {
	t.Helper()
	library, err := Embedded()
	require.NoError(t, err)
	require.Contains(t, library, generalIndustry)
	return library[generalIndustry]
}

// vectorRows reads a file of testdata/vectors, each row by the names of its columns.
func vectorRows(t *testing.T, name string) []map[string]string {
	t.Helper()
	f, err := os.Open("../../testdata/vectors/" + name)
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	var rows []map[string]string
	for _, line := range lines[1:] {
		row := map[string]string{}
		for i, column := range lines[0] {
			row[column] = line[i]
		}
		rows = append(rows, row)
	}
	return rows
}

func numberIn(t *testing.T, row map[string]string, column string) float64 {
	t.Helper()
	x, err := strconv.ParseFloat(row[column], 64)
	require.NoError(t, err, column)
	return x
}

func scaleOf(c dossier.Channel) acoustics.Scale {
	return acoustics.Scale{Criterion: c.CriterionDB, Exchange: c.ExchangeDB, Threshold: c.ThresholdDB, Upper: c.UpperDB}
}

// lawNumber is a number or time of the law as printed. A time is given by where it ends when it begins on
// 2020-03-15, so that it does not matter whether the bundle writes 24 months or 2 years.
type lawNumber struct {
	parameter string
	number    float64
	ends      string
	words     []any
	unit      string
	cite      string
	from      string // first day in force
}

// lawNumbers are the parameters of sheet section 2 and the times of section 3, with their citations. First
// days: 36 FR 10466 (29 May 1971) and the final amendment of 48 FR 9738 (in force 7 April 1983), both from
// memory; 67 FR 44047 (in force 1 January 2003); 66 FR 6122 (in force 1 January 2002, from memory).
var lawNumbers = []lawNumber{
	// Exposure.
	{parameter: "permissible_level", number: 90, unit: "dBA", cite: "29 CFR 1910.95(a), Table G-16", from: "1971-05-29"},
	{parameter: "permissible_dose", number: 100, unit: "%", cite: "29 CFR 1910.95(b), Table G-16 note 1", from: "1971-05-29"},
	{parameter: "continuous_ceiling", number: 115, unit: "dBA", cite: "29 CFR 1910.95(b), Table G-16", from: "1971-05-29"},
	{parameter: "impulse_ceiling", number: 140, unit: "dB", cite: "29 CFR 1910.95(b), Table G-16 note 1", from: "1971-05-29"},
	{parameter: "action_level", number: 85, unit: "dBA", cite: "29 CFR 1910.95(c)(1)-(2)", from: "1983-04-07"},
	{parameter: "action_dose", number: 50, unit: "%", cite: "29 CFR 1910.95(c)(1)-(2)", from: "1983-04-07"},
	{parameter: "integration_floor", number: 80, unit: "dBA", cite: "29 CFR 1910.95(d)(2)(i)", from: "1983-04-07"},
	{parameter: "integration_top", number: 130, unit: "dBA", cite: "29 CFR 1910.95(d)(2)(i)", from: "1983-04-07"},
	// Hearing tests.
	{parameter: "baseline_time", ends: "2020-09-15", cite: "29 CFR 1910.95(g)(5)(i)", from: "1983-04-07"},                 // 6 months
	{parameter: "baseline_time_mobile", ends: "2021-03-15", cite: "29 CFR 1910.95(g)(5)(ii)", from: "1983-04-07"},         // 1 year
	{parameter: "quiet_period", number: 14, unit: "h", cite: "29 CFR 1910.95(g)(5)(iii)", from: "1983-04-07"},             // at least 14 hours
	{parameter: "audiogram_interval", ends: "2021-03-15", cite: "29 CFR 1910.95(g)(6)", from: "1983-04-07"},               // at least annually
	{parameter: "audiogram_interval_calendar", ends: "2021-12-31", cite: "29 CFR 1910.95(g)(6)", from: "1983-04-07"},      // the same, once in each calendar year
	{parameter: "retest_time", ends: "2020-04-14", cite: "29 CFR 1910.95(g)(7)(ii)", from: "1983-04-07"},                  // 30 days
	{parameter: "shift_notice_time", ends: "2020-04-05", cite: "29 CFR 1910.95(g)(8)(i)", from: "1983-04-07"},             // 21 days
	{parameter: "standard_threshold_shift", number: 10, unit: "dB", cite: "29 CFR 1910.95(g)(10)(i)", from: "1983-04-07"}, // 10 dB or more
	// Audiometers and rooms.
	{parameter: "functional_deviation", number: 10, unit: "dB", cite: "29 CFR 1910.95(h)(5)(i)", from: "1983-04-07"},
	{parameter: "acoustic_deviation", number: 15, unit: "dB", cite: "29 CFR 1910.95(h)(5)(ii)", from: "1983-04-07"},
	{parameter: "acoustic_interval", ends: "2021-03-15", cite: "29 CFR 1910.95(h)(5)(ii)", from: "1983-04-07"},    // at least annually
	{parameter: "exhaustive_interval", ends: "2022-03-15", cite: "29 CFR 1910.95(h)(5)(iii)", from: "1983-04-07"}, // at least every two years
	{parameter: "room_500", number: 40, unit: "dB", cite: tableD1, from: "1983-04-07"},
	{parameter: "room_1000", number: 40, unit: "dB", cite: tableD1, from: "1983-04-07"},
	{parameter: "room_2000", number: 47, unit: "dB", cite: tableD1, from: "1983-04-07"},
	{parameter: "room_4000", number: 57, unit: "dB", cite: tableD1, from: "1983-04-07"},
	{parameter: "room_8000", number: 62, unit: "dB", cite: tableD1, from: "1983-04-07"},
	// Protectors and training. The text sets no number for the variety of (i)(3); two is from memory.
	{parameter: "attenuation_target", number: 90, unit: "dBA", cite: "29 CFR 1910.95(j)(2)", from: "1983-04-07"},
	{parameter: "attenuation_target_after_shift", number: 85, unit: "dBA", cite: "29 CFR 1910.95(j)(3)", from: "1983-04-07"},
	{parameter: "protector_variety", number: 2, unit: "models", cite: "29 CFR 1910.95(i)(3)", from: "1983-04-07"},
	{parameter: "training_interval", ends: "2021-03-15", cite: "29 CFR 1910.95(k)(2)", from: "1983-04-07"},
	{parameter: "training_interval_calendar", ends: "2021-12-31", cite: "29 CFR 1910.95(k)(2)", from: "1983-04-07"},
	{parameter: "training_topics", words: []any{"noise_effects", "protectors", "audiometry"}, cite: "29 CFR 1910.95(k)(3)(i)-(iii)", from: "1983-04-07"},
	// Records and the injury log.
	{parameter: "noise_record_retention", ends: "2022-03-15", cite: "29 CFR 1910.95(m)(3)(i)", from: "1983-04-07"},     // 2 years
	{parameter: "recordable_level", number: 25, unit: "dB HL", cite: "29 CFR 1904.10(a)", from: "2003-01-01"},          // 25 dB or more
	{parameter: "log_entry_time", ends: "2020-03-22", cite: "29 CFR 1904.29(b)(3), 1904.10(b)(4)", from: "2003-01-01"}, // 7 calendar days
	{parameter: "log_retention", ends: "2025-12-31", cite: "29 CFR 1904.33(a)", from: "2002-01-01"},                    // 5 years after the end of the calendar year
}

const tableD1 = "29 CFR 1910.95 Appendix D, Table D-1"

// notReadInTheText are the parameters of which the sheet says "memory".
var notReadInTheText = map[string]bool{"continuous_ceiling": true, "protector_variety": true}

// TestParametersAreAsPrinted compares every parameter with the law: value, unit, citation, mark, first day,
// and that there is no value before it. A parameter that the table lacks fails, too.
func TestParametersAreAsPrinted(t *testing.T) {
	b := lawBundle(t)
	start := calendar.MustParse("2020-03-15")
	listed := map[string]bool{}
	for _, want := range lawNumbers {
		listed[want.parameter] = true
		p, ok := b.Parameters[want.parameter]
		if !assert.True(t, ok, "the bundle has no parameter %s", want.parameter) {
			continue
		}
		assert.Equal(t, want.unit, p.Unit, want.parameter)
		v, ok := p.At(start)
		require.True(t, ok, want.parameter)
		assert.Equal(t, want.cite, v.Cite, want.parameter)
		assert.Equal(t, notReadInTheText[want.parameter], v.Seen == "memory", "%s is marked %s", want.parameter, v.Seen)
		switch {
		case want.ends != "":
			interval, ok := v.Interval()
			require.True(t, ok, want.parameter)
			end, err := interval.After(start, nil)
			require.NoError(t, err)
			assert.Equal(t, want.ends, end.String(), "%s is %s", want.parameter, interval)
		case want.words != nil:
			assert.Equal(t, want.words, v.Plain(), want.parameter)
		default:
			number, ok := v.Number()
			require.True(t, ok, want.parameter)
			assert.Equal(t, want.number, number, want.parameter)
		}
		first := calendar.MustParse(want.from)
		_, ok = p.At(first)
		assert.True(t, ok, "%s has no value on its first day, %s", want.parameter, first)
		_, ok = p.At(first.AddDays(-1))
		assert.False(t, ok, "%s has a value before its first day, %s", want.parameter, first)
		_, number := b.Number(want.parameter, first.AddDays(-1))
		_, interval := b.Interval(want.parameter, first.AddDays(-1))
		assert.False(t, number || interval, "%s has a value before its first day, %s", want.parameter, first)
	}
	for name := range b.Parameters {
		assert.True(t, listed[name], "the parameter %s is not held against the law", name)
	}
}

// TestTableD1 holds the octave bands of the room parameters to Appendix D: no band more, none less.
func TestTableD1(t *testing.T) {
	b := lawBundle(t)
	printed := map[string]float64{"500": 40, "1000": 40, "2000": 47, "4000": 57, "8000": 62} // Table D-1, dB
	for hz, limit := range printed {
		got, ok := b.Number("room_"+hz, calendar.MustParse("2026-06-30"))
		assert.True(t, ok)
		assert.Equal(t, limit, got, "%s Hz", hz)
	}
	rooms := 0
	for name := range b.Parameters {
		if len(name) > 5 && name[:5] == "room_" {
			rooms++
		}
	}
	assert.Len(t, printed, rooms)
}

// TestTablesF1AndF2 compares every cell of the age correction with Appendix F.
func TestTablesF1AndF2(t *testing.T) {
	age := lawBundle(t).Measures.Hearing.AgeCorrection
	require.NotNil(t, age)
	cells, frequencies := 0, []int{1000, 2000, 3000, 4000, 6000}
	for _, row := range vectorRows(t, "age_correction_us.csv") {
		years := int(numberIn(t, row, "age"))
		for _, hz := range frequencies {
			values := age.Values[row["sex"]][hz]
			at := years - age.FromAge
			require.True(t, at >= 0 && at < len(values), "%s, age %d, %d Hz", row["sex"], years, hz)
			assert.Equal(t, int(numberIn(t, row, "f"+strconv.Itoa(hz))), values[at], "%s, age %d, %d Hz", row["sex"], years, hz)
			cells++
		}
	}
	assert.Equal(t, 410, cells, "Tables F-1 and F-2 have 41 ages, 5 frequencies and 2 sexes")
	assert.Len(t, age.Values, 2)
	for sex, rows := range age.Values {
		assert.Len(t, rows, len(frequencies), sex)
		for hz, values := range rows {
			assert.Len(t, values, 41, "%s, %d Hz: 20 or younger to 60 or older", sex, hz)
			young, err := age.Aging(sex, 16, 20, []int{hz})
			require.NoError(t, err)
			old, err := age.Aging(sex, 60, 75, []int{hz})
			require.NoError(t, err)
			assert.Equal(t, []int{0, 0}, []int{young[0], old[0]}, "no more below 20 and above 60")
		}
	}
	// The one cell that the law for mines prints otherwise: women, 51 years, 3000 Hz, here 12 and there 11.
	assert.Equal(t, 12, age.Values["female"][3000][51-20])
	assert.Equal(t, "29 CFR 1910.95 Appendix F, Tables F-1 and F-2", age.Cite)
}

// TestTableG16 computes the dose of each row of Table G-16 with the bundle's channel for the limit. The hours are
// printed in round parts of an hour: the formula gives 6.06, 3.03 and 1.52 h for 92, 97 and 102 dBA.
func TestTableG16(t *testing.T) {
	b := lawBundle(t)
	level := b.Measures.Exposure.Levels["limit"]
	limit := scaleOf(b.Measures.Exposure.Channels[level.Channel])
	allowed, ok := b.Number(level.Above, calendar.MustParse("2026-06-30"))
	require.True(t, ok, "the limit is exceeded above a dose, never at it")
	require.Equal(t, 100.0, allowed)
	const rounding = 4 // minutes
	for _, row := range [][2]float64{{8, 90}, {6, 92}, {4, 95}, {3, 97}, {2, 100}, {1.5, 102}, {1, 105}, {0.5, 110}, {0.25, 115}} {
		hours, dba := row[0], row[1]
		dose, err := limit.Dose([]acoustics.Segment{{Level: dba, Minutes: 60 * hours}})
		require.NoError(t, err)
		assert.LessOrEqual(t, dose, allowed, "%g h at %g dBA are allowed", hours, dba)
		assert.InDelta(t, 60*hours, limit.ReferenceMinutes(dba), rounding, "%g dBA", dba)
		longer, err := limit.Dose([]acoustics.Segment{{Level: dba, Minutes: 60*hours + rounding}})
		require.NoError(t, err)
		assert.Greater(t, longer, allowed, "%g h and %d minutes at %g dBA are too long", hours, rounding, dba)
	}
	// Note 1: C1/T1 + C2/T2 above 1 exceeds the limit. Half of two rows together is just the limit.
	mixed, err := limit.Dose([]acoustics.Segment{{Level: 90, Minutes: 240}, {Level: 95, Minutes: 120}})
	require.NoError(t, err)
	assert.Equal(t, 100.0, mixed)
	// The table begins at 90 dBA: what lies below does not count for the limit.
	below, err := limit.Dose([]acoustics.Segment{{Level: 89.9, Minutes: 720}})
	require.NoError(t, err)
	assert.Zero(t, below)
}

// TestTableG16a computes the reference durations of Table G-16a, and the averages of Table A-1, with the bundle's
// channel for the action level. Two cells are known misprints: 83 dB on a later page, and the dose 115.
func TestTableG16aAndTableA1(t *testing.T) {
	b := lawBundle(t)
	action := scaleOf(b.Measures.Exposure.Channels[b.Measures.Exposure.Levels["action"].Channel])
	durations, averages := 0, 0
	for _, row := range vectorRows(t, "g16a.csv") {
		printed := numberIn(t, row, "T_hours_printed")
		rounding := printed*0.01 + 0.05
		if printed < 1 {
			rounding = 0.006
		}
		assert.InDelta(t, printed, action.ReferenceMinutes(numberIn(t, row, "level_dBA"))/60, rounding, row["level_dBA"])
		durations++
	}
	for _, row := range vectorRows(t, "twa.csv") {
		if row["set"] != "osha_A1" || row["dose_pct"] == "115.0" {
			continue
		}
		twa, ok := action.TWAReported(numberIn(t, row, "dose_pct"))
		require.True(t, ok)
		assert.InDelta(t, numberIn(t, row, "twa_dBA_printed"), twa, 1e-6, row["dose_pct"])
		averages++
	}
	assert.Equal(t, 51, durations)
	assert.Equal(t, 150, averages)
}

// TestActionLevelIsHalfTheDose ties the two forms of the action level: 85 dBA over 8 h is 50 %, (c)(1).
func TestActionLevelIsHalfTheDose(t *testing.T) {
	b := lawBundle(t)
	today := calendar.MustParse("2026-06-30")
	level := b.Measures.Exposure.Levels["action"]
	action := scaleOf(b.Measures.Exposure.Channels[level.Channel])
	dba, _ := b.Number("action_level", today)
	pct, ok := b.Number(level.AtLeast, today)
	require.True(t, ok, "the action level is reached at a dose, not only above it")
	dose, err := action.Dose([]acoustics.Segment{{Level: dba, Minutes: 480}})
	require.NoError(t, err)
	assert.Equal(t, pct, dose)
	twa, ok := action.TWAReported(pct)
	require.True(t, ok)
	assert.Equal(t, dba, twa)
	// (d)(2)(i): all sound from 80 to 130 dB is integrated.
	assert.Equal(t, acoustics.Scale{Criterion: 90, Exchange: 5, Threshold: 80, Upper: 130}, action)
	for name, end := range map[string]float64{"integration_floor": action.Threshold, "integration_top": action.Upper} {
		n, _ := b.Number(name, today)
		assert.Equal(t, n, end, name)
	}
	assert.Equal(t, "action", b.Measures.Exposure.Enrols)
}

// TestTestFrequencies holds the frequencies to (h)(1) and (g)(10)(i).
func TestTestFrequencies(t *testing.T) {
	h := lawBundle(t).Measures.Hearing
	assert.Equal(t, []int{500, 1000, 2000, 3000, 4000, 6000}, h.Required)
	assert.Equal(t, []int{2000, 3000, 4000}, h.Shift.Frequencies)
	assert.Equal(t, []string{"standard_threshold_shift", "retest_time"}, []string{h.Shift.AtLeast, h.Shift.Retest})
	assert.Equal(t, "recordable_level", h.Recordable.AtLeast)
	// (g)(7)(iii) and (g)(9); (g)(8)(ii) names a physician alone, 1904.10(b)(6) also other licensed professionals.
	assert.ElementsMatch(t, []string{"audiologist", "otolaryngologist", "physician"}, h.Professionals)
	assert.NotContains(t, h.Physicians, "audiologist")
	assert.Contains(t, h.Licensed, "audiologist")
}
