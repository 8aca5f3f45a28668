package audiometry_test

import (
	"math"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

// TestRoomSets: testroom.csv names its sources: 29 CFR 1910.95 App. D and 49 CFR 227 App. D (official texts), and
// ISO 8253-1:2010 Tables 2 to 4 (secondary source).
func TestRoomSets(t *testing.T) {
	must := func(set audiometry.BandSet, ok bool) audiometry.BandSet {
		require.True(t, ok)
		return set
	}
	sets := map[string]audiometry.BandSet{
		"osha_D1": audiometry.TableD1(), "fra_D1_supra": audiometry.TableD1(), "fra_D1_insert": audiometry.RailInsert(),
		"iso8253_1_air_from_125":  must(audiometry.ISO8253Air(125)),
		"iso8253_1_air_from_250":  must(audiometry.ISO8253Air(250)),
		"iso8253_1_air_from_500":  must(audiometry.ISO8253Air(500)),
		"iso8253_1_bone_from_125": must(audiometry.ISO8253Bone(125)),
		"iso8253_1_bone_from_250": must(audiometry.ISO8253Bone(250)),
	}
	earphones := strings.NewReplacer("supra-aural", "supra_aural", "open ear", "open_ear")
	want := map[string][]audiometry.Band{}
	for _, r := range vectors(t, "testroom.csv") {
		name, phones := r["set"], earphones.Replace(r["earphone"])
		if name == "iso8253_1_earphone_attenuation" {
			name += " " + phones
			sets[name] = must(audiometry.EarphoneAttenuation(phones))
		}
		require.Equal(t, sets[name].Width, r["band"], name)
		require.Equal(t, sets[name].Earphones, phones, name)
		if r["dB"] != "" {
			want[name] = append(want[name], audiometry.Band{Hz: r.number(t, "hz"), DB: r.number(t, "dB")})
		}
	}
	require.Len(t, want, 11)
	for name, bands := range want {
		assert.Equal(t, bands, sets[name].Bands, name)
		assert.NotEmpty(t, sets[name].Source, name)
	}
	_, ok := audiometry.ISO8253Air(1000)
	assert.False(t, ok)
	_, ok = audiometry.ISO8253Bone(500)
	assert.False(t, ok)
}

func TestRoomCompare(t *testing.T) {
	survey := func(dB ...float64) audiometry.BandSet {
		s := audiometry.BandSet{Width: audiometry.Octave}
		for i, hz := range []float64{500, 1000, 2000, 4000, 8000, 125} {
			if i < len(dB) {
				s.Bands = append(s.Bands, audiometry.Band{Hz: hz, DB: dB[i]})
			}
		}
		return s
	}
	limits := audiometry.TableD1()
	got, err := limits.Compare(survey(40, 40, 47, 57, 62, 99))
	require.NoError(t, err)
	assert.Equal(t, audiometry.RoomResult{Within: audiometry.Yes}, got, "at the limits")
	got, err = limits.Compare(survey(40.04, 40.1, 20, 58, 60))
	require.NoError(t, err)
	assert.Equal(t, audiometry.RoomResult{Within: audiometry.No, Over: []audiometry.BandOver{{1000, 40.1, 40}, {4000, 58, 57}}}, got)
	got, err = limits.Compare(survey(30, 30, math.NaN(), 30))
	require.NoError(t, err)
	assert.Equal(t, audiometry.RoomResult{Within: audiometry.Undecided, Missing: []float64{2000, 8000}}, got)
	got, err = limits.Compare(survey(41))
	require.NoError(t, err)
	assert.Equal(t, audiometry.No, got.Within, "one band over is enough")

	third, _ := audiometry.ISO8253Air(500)
	_, err = third.Compare(survey(10))
	assert.EqualError(t, err, "the survey is in octave bands and the limits are in third-octave bands")
	_, err = audiometry.BandSet{Width: audiometry.Octave}.Compare(survey(10))
	assert.EqualError(t, err, "the set of limits has no bands")
}

// TestRoomAdjustments is worked by hand from ISO 8253-1:2010 Tables 2 and 3, secondary source.
func TestRoomAdjustments(t *testing.T) {
	limits, _ := audiometry.ISO8253Air(125)
	at := func(set audiometry.BandSet, hz float64) float64 {
		for _, b := range set.Bands {
			if b.Hz == hz {
				return b.DB
			}
		}
		return math.NaN()
	}
	assert.Equal(t, 26.0, at(limits.Raised(8), 500))
	inserts, err := limits.ForEarphones("insert")
	require.NoError(t, err)
	assert.Equal(t, "insert", inserts.Earphones)
	assert.Equal(t, 18.0+38-7, at(inserts, 500))
	around, err := limits.ForEarphones("circumaural")
	require.NoError(t, err)
	assert.Equal(t, 42.0+17-1, at(around, 63))
	assert.Equal(t, 47.0, at(around, 50), "no value: the limit stays")
	assert.Equal(t, 18.0, at(limits, 500), "the given limits are left alone")
	_, err = limits.ForEarphones("loudspeaker")
	assert.ErrorContains(t, err, `"loudspeaker"`)
	_, err = audiometry.TableD1().ForEarphones("insert")
	assert.Error(t, err)
}

// TestAudiometerVectors: 29 CFR 1910.95 App. E, Tables E-1 and E-2 and paragraph (3) (official text).
func TestAudiometerVectors(t *testing.T) {
	rows := vectors(t, "audiometer_cal_us.csv")
	require.Len(t, rows, 12)
	tolerances := audiometry.AppendixE()
	for _, r := range rows {
		table := audiometry.ReferenceTable(strings.TrimPrefix(r["earphone"], "Table "))
		hz, reading := r.whole(t, "hz"), r.number(t, "slm_reading_at_70HL_dB")
		deviation, ok := audiometry.OutputDeviation(table, hz, 70, reading)
		require.True(t, ok)
		assert.InDelta(t, 0, deviation, 1e-9)
		deviation, ok = audiometry.OutputDeviation(table, hz, 0, r.number(t, "reference_threshold_dB")-3)
		require.True(t, ok)
		assert.InDelta(t, -3, deviation, 1e-9)
		advised, required := r.number(t, "advisory_deviation_dB"), r.number(t, "mandatory_exhaustive_deviation_dB")
		for x, want := range map[float64]audiometry.Grade{
			0: audiometry.WithinTolerance, advised - .1: audiometry.WithinTolerance, advised: audiometry.CalibrationAdvised,
			required - .1: audiometry.CalibrationAdvised, required: audiometry.CalibrationRequired, 40: audiometry.CalibrationRequired,
		} {
			for _, sign := range []float64{1, -1} {
				got, ok := audiometry.GradeDeviation(tolerances, hz, sign*x)
				assert.True(t, ok)
				assert.Equal(t, want, got, "%d Hz %g dB", hz, sign*x)
			}
		}
	}
	_, ok := audiometry.OutputDeviation(audiometry.TableE1, 8000, 70, 80)
	assert.False(t, ok)
	_, ok = audiometry.OutputDeviation("E-3", 1000, 70, 80)
	assert.False(t, ok)
	_, ok = audiometry.GradeDeviation(tolerances, 8000, 20)
	assert.False(t, ok)
	_, ok = audiometry.GradeDeviation(tolerances, 1000, math.NaN())
	assert.False(t, ok)
}

func TestAcousticCheck(t *testing.T) {
	check := func(deviations map[int]float64) audiometry.CheckResult {
		return audiometry.AcousticCheck(audiometry.AppendixE(), deviations)
	}
	assert.Equal(t, audiometry.CheckResult{}, check(map[int]float64{500: 1, 1000: 0, 2000: -2.9, 3000: 0, 4000: 3.9, 6000: 4.9, 8000: 30}))
	assert.Equal(t, audiometry.CheckResult{Grade: audiometry.CalibrationAdvised, At: []int{500, 6000}, Missing: []int{3000}},
		check(map[int]float64{500: -3, 1000: 0, 2000: 0, 4000: 3, 6000: 5}))
	assert.Equal(t, audiometry.CheckResult{Grade: audiometry.CalibrationRequired, At: []int{2000}, Missing: []int{1000, 4000, 6000}},
		check(map[int]float64{500: 4, 2000: 15, 3000: 3, 4000: math.NaN()}))
	assert.Equal(t, "within tolerance, exhaustive calibration advised, exhaustive calibration required",
		strings.Join([]string{audiometry.WithinTolerance.String(), audiometry.CalibrationAdvised.String(), audiometry.CalibrationRequired.String()}, ", "))
}
