package audiometry_test

import (
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

// mineTable reads Tables 62-3 and 62-4 of 30 CFR part 62.
func mineTable(t *testing.T) *audiometry.AgeTable {
	t.Helper()
	table := audiometry.AgeTable{FromAge: 20, Values: map[string]map[int][]int{"male": {}, "female": {}}}
	for _, r := range vectors(t, "us_msha_age_correction.csv") {
		rows := table.Values[r["sex"]]
		for _, hz := range shiftFrequencies {
			require.Len(t, rows[hz], r.whole(t, "age")-table.FromAge)
			rows[hz] = append(rows[hz], r.whole(t, "hz"+strconv.Itoa(hz)))
		}
	}
	return &table
}

// TestMineAndFactoryTablesDifferInOneCell: for a woman of 51 at 3000 Hz, 30 CFR part 62 Table 62-4 has 11 dB and
// 29 CFR 1910.95 Table F-2 has 12 dB (official texts).
func TestMineAndFactoryTablesDifferInOneCell(t *testing.T) {
	mine, factory := mineTable(t), appendixF(t)
	var differ []string
	for _, sex := range []string{"male", "female"} {
		for _, hz := range shiftFrequencies {
			require.Len(t, mine.Values[sex][hz], 41)
			for i, dB := range mine.Values[sex][hz] {
				if dB != factory.Values[sex][hz][i] {
					differ = append(differ, sex+" "+strconv.Itoa(20+i)+" "+strconv.Itoa(hz))
				}
			}
		}
	}
	assert.Equal(t, []string{"female 51 3000"}, differ)
	for want, table := range map[int]*audiometry.AgeTable{1: mine, 2: factory} {
		got, err := table.Aging("female", 45, 51, []int{3000})
		require.NoError(t, err)
		assert.Equal(t, []int{want}, got)
	}
}

// TestMineTableNeverFalls: hearing does not improve with age in Tables 62-3 and 62-4.
func TestMineTableNeverFalls(t *testing.T) {
	table := mineTable(t)
	for _, sex := range []string{"male", "female"} {
		for age := 15; age < 70; age++ {
			aging, err := table.Aging(sex, age, age+1, shiftFrequencies)
			require.NoError(t, err)
			for _, dB := range aging {
				assert.GreaterOrEqual(t, dB, 0, "%s %d", sex, age)
			}
		}
	}
}
