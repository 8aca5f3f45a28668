package audiometry_test

import (
	"encoding/json"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
	"hearduty/internal/calendar"
)

func TestAgeOn(t *testing.T) {
	for _, c := range []struct {
		birth, day string
		years      int
	}{
		{"1980-06-15", "1980-06-15", 0},
		{"1980-06-15", "2020-06-14", 39},
		{"1980-06-15", "2020-06-15", 40},
		{"1980-06-15", "2020-05-31", 39},
		{"1980-06-15", "2020-07-01", 40},
		{"1980-02-29", "2021-02-28", 40}, // the birthday of 2021 is 1 March
		{"1980-02-29", "2021-03-01", 41},
		{"1980-02-29", "2024-02-28", 43},
		{"1980-02-29", "2024-02-29", 44},
		{"1979-12-31", "2020-01-01", 40},
	} {
		got, ok := audiometry.AgeOn(calendar.MustParse(c.birth), calendar.MustParse(c.day))
		assert.True(t, ok)
		assert.Equal(t, c.years, got, "%s on %s", c.birth, c.day)
	}
	day := calendar.MustParse("2020-01-01")
	for _, pair := range [][2]calendar.Date{{0, day}, {day, 0}, {0, 0}, {day.AddDays(1), day}} {
		_, ok := audiometry.AgeOn(pair[0], pair[1])
		assert.False(t, ok, "%v", pair)
	}
}

func TestAgeGrowsByOneOnTheBirthday(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		birth := calendar.Date(rapid.IntRange(int(calendar.MustParse("1920-01-01")), int(calendar.MustParse("2010-12-31"))).Draw(t, "birth"))
		day := birth.AddDays(rapid.IntRange(1, 30000).Draw(t, "days"))
		today, ok := audiometry.AgeOn(birth, day)
		require.True(t, ok)
		yesterday, ok := audiometry.AgeOn(birth, day.AddDays(-1))
		require.True(t, ok)
		_, birthMonth, birthDay := birth.Civil()
		year, month, dayOfMonth := day.Civil()
		birthday := month == birthMonth && dayOfMonth == birthDay
		if birthMonth == 2 && birthDay == 29 && calendar.DaysIn(year, 2) == 28 {
			birthday = month == 3 && dayOfMonth == 1
		}
		require.Equal(t, birthday, today == yesterday+1)
		require.True(t, birthday || today == yesterday)
	})
}

// TestAgeTableEnds: Tables F-1 and F-2 of 29 CFR 1910.95 App. F begin with "20 or younger" and end with
// "60 or older".
func TestAgeTableEnds(t *testing.T) {
	table := appendixF(t)
	freqs := []int{1000, 2000, 3000, 4000, 6000}
	for sex, want := range map[string][]int{"male": {6, 10, 19, 28, 30}, "female": {7, 8, 13, 14, 16}} {
		inner, err := table.Aging(sex, 20, 60, freqs)
		require.NoError(t, err)
		assert.Equal(t, want, inner, sex)
		outer, err := table.Aging(sex, 16, 75, freqs)
		require.NoError(t, err)
		assert.Equal(t, inner, outer, sex)
		for _, ages := range [][2]int{{15, 20}, {60, 99}, {40, 40}} {
			none, err := table.Aging(sex, ages[0], ages[1], freqs)
			require.NoError(t, err)
			assert.Equal(t, make([]int, 5), none, "%s %v", sex, ages)
		}
	}
}

// TestAgeTableNeverFalls: hearing does not improve with age in Tables F-1 and F-2.
func TestAgeTableNeverFalls(t *testing.T) {
	table := appendixF(t)
	for _, sex := range []string{"male", "female"} {
		for age := 15; age < 70; age++ {
			aging, err := table.Aging(sex, age, age+1, []int{1000, 2000, 3000, 4000, 6000})
			require.NoError(t, err)
			for _, dB := range aging {
				assert.GreaterOrEqual(t, dB, 0, "%s %d", sex, age)
			}
		}
	}
}

func TestAgingErrors(t *testing.T) {
	table := appendixF(t)
	for _, c := range []struct {
		sex       string
		then, now int
		freqs     []int
		want      string
	}{
		{"", 30, 40, shiftFrequencies, `the age table has no values for the sex ""`},
		{"unknown", 30, 40, shiftFrequencies, `the age table has no values for the sex "unknown"`},
		{"male", 30, 40, []int{2000, 500}, "the age table has no values for 500 Hz"},
		{"male", 40, 39, shiftFrequencies, "the age at the test, 39, is below the age at the baseline, 40"},
	} {
		got, err := table.Aging(c.sex, c.then, c.now, c.freqs)
		assert.EqualError(t, err, c.want)
		assert.Nil(t, got)
	}
}

func TestAgeTableReadsJSON(t *testing.T) {
	var table audiometry.AgeTable
	require.NoError(t, json.Unmarshal([]byte(`{"from_age": 20, "values": {"male": {"4000": [5, 5, 6]}}}`), &table))
	got, err := table.Aging("male", 20, 30, []int{4000})
	require.NoError(t, err)
	assert.Equal(t, []int{1}, got)
}
