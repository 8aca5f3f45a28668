package dossier_test

import (
	"encoding/csv"
	"encoding/json"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// TestShiftCasesThroughTheDossier takes the cases of sts_cases.csv, App. F's example among them, from records to
// shifts, with age correction and without; their sources stand in the file.
func TestShiftCasesThroughTheDossier(t *testing.T) {
	f, err := os.Open("../../testdata/vectors/sts_cases.csv")
	require.NoError(t, err)
	defer f.Close()
	lines, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	shown := osha().Measures
	shown.Hearing.Sums = true // figures stand with every test only where they are shown
	for _, line := range lines[1:] {
		r := map[string]string{}
		for i, column := range lines[0] {
			r[column] = line[i]
		}
		levels := func(column string) audiometry.Ear {
			var l []int
			require.NoError(t, json.Unmarshal([]byte(r[column]), &l))
			return earWith(l[0], l[1], l[2])
		}
		on := func(column string, days int) string {
			return calendar.MustParse(strconv.Itoa(1980+int(mustFloat(t, r[column]))) + "-01-01").AddDays(days).String()
		}
		w := hired("2003-01-01")
		w.Sex, w.BirthDate = r["sex"], day("1980-01-01")
		for _, corrected := range []bool{false, true} {
			d := asked{asOf: "2040-01-01", measures: shown, choices: map[string]any{"age_correction": corrected}}.judge(t,
				w, assigned("g1", "2003-01-01"), group("g1"), measured("m1", "g1", "2003-01-01", 75),
				audiogram("a0", on("age_baseline", 20), "baseline", levels("baseline_2k3k4k"), ear(10)),
				audiogram("a1", on("age_current", 40), "periodic", levels("current_2k3k4k"), ear(10))).worker()
			want := r["sts_unadjusted"]
			if corrected {
				want = r["sts_adjusted"]
			}
			assert.Equal(t, want == "True", len(d.Shifts) == 1, "%s, corrected %v", r["id"], corrected)
			if !corrected {
				assert.Equal(t, r["recordable_1904_10_on_unadjusted_sts"] == "True", len(d.Recordables) == 1, r["id"])
			}
			h := d.Audiograms[1].Hearing
			require.NotNil(t, h)
			assert.InDelta(t, mustFloat(t, r["shift_avg"]), h.Left.Value, 5.1e-5, r["id"])
			assert.InDelta(t, mustFloat(t, r["shift_adjusted"]), h.LeftCorrected.Value, 5.1e-5, r["id"])
			assert.InDelta(t, mustFloat(t, r["current_avg"]), h.LeftLevel.Value, 5.1e-5, r["id"])
			assert.NotEmpty(t, h.Working)
		}
	}
}

// TestWorkingOfAppendixF: the example of 29 CFR 1910.95 App. F, with our averages; medians of ISO 7029:2017 by the
// coefficients of the vectors, secondary source.
func TestWorkingOfAppendixF(t *testing.T) {
	m := osha().Measures
	m.Hearing.Sums = true
	m.Hearing.Others = []audiometry.Scheme{{Name: "early_warning", Rule: "any", Frequencies: []int{4000, 6000}, AtLeast: "recordable_level"}}
	w := hired("2003-01-01")
	w.Sex, w.BirthDate = "male", day("1980-01-01")
	right := func(levels ...int) audiometry.Ear { return earOf(append([]int{0}, levels...)...) }
	d := asked{asOf: "2013-01-01", measures: m, choices: map[string]any{"age_correction": true}}.judge(t,
		w, assigned("g1", "2003-01-01"), group("g1"), measured("m1", "g1", "2003-01-01", 75),
		audiogram("a0", "2007-06-01", "baseline", ear(0), right(0, 0, 0, 5, 5)),
		audiogram("a1", "2012-06-01", "periodic", ear(0), right(5, 10, 10, 25, 20))).worker()
	require.Len(t, d.Shifts, 1)
	assert.Equal(t, []string{
		"left ear against the baseline of 2007-06-01: 2000 Hz 0 − 0, 3000 Hz 0 − 0, 4000 Hz 0 − 0; average change 0.0 dB; at least 10 dB: no",
		"left ear with age correction from 27 to 32 years, which decides: 2000 Hz 0 − 0 − 1 for age, 3000 Hz 0 − 0 − 1 for age, 4000 Hz 0 − 0 − 3 for age; average change -1.7 dB; at least 10 dB: no",
		"right ear against the baseline of 2007-06-01: 2000 Hz 10 − 0, 3000 Hz 10 − 0, 4000 Hz 25 − 5; average change 13.3 dB; at least 10 dB: yes",
		"right ear with age correction from 27 to 32 years, which decides: 2000 Hz 10 − 0 − 1 for age, 3000 Hz 10 − 0 − 1 for age, 4000 Hz 25 − 5 − 3 for age; average change 11.7 dB; at least 10 dB: yes",
		"early_warning, left ear: 4000 Hz 0 − 0 − 3 for age, 6000 Hz 0 − 0 − 3 for age; largest change -3.0 dB; at least 25 dB: no",
		"early_warning, right ear: 4000 Hz 25 − 5 − 3 for age, 6000 Hz 20 − 5 − 3 for age; largest change 17.0 dB; at least 25 dB: no",
		"for information only: pure-tone average of the left ear, 500 Hz 0, 1000 Hz 0, 2000 Hz 0, 4000 Hz 0: 0 dB HL",
		"for information only: pure-tone average of the right ear, 500 Hz 0, 1000 Hz 5, 2000 Hz 10, 4000 Hz 25: 10 dB HL",
		"for information only, it judges no single person: between 27 and 32 years of age the median of people of this sex with healthy ears rises by 0.6 dB at 2000 Hz, 0.8 dB at 3000 Hz, 1.0 dB at 4000 Hz (ISO 7029:2017)",
	}, d.Shifts[0].Hearing.Working)
	assert.Equal(t, d.Shifts[0].Hearing, *d.Audiograms[1].Hearing)
	assert.Equal(t, dossier.Judged{Left: record.No, Right: record.No}, d.Audiograms[1].Schemes["early_warning"])
}
