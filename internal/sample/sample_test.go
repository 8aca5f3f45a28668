package sample

import (
	"encoding/csv"
	"math/big"
	"os"
	"strconv"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// table reads the numbers of a CSV file of testdata, by column.
func table(t *testing.T, name string) []map[string]float64 {
	t.Helper()
	f, err := os.Open("testdata/" + name)
	require.NoError(t, err)
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	var out []map[string]float64
	for _, row := range rows[1:] {
		m := map[string]float64{}
		for i, column := range rows[0] {
			m[column], err = strconv.ParseFloat(row[i], 64)
			require.NoError(t, err)
		}
		out = append(out, m)
	}
	require.Greater(t, len(out), 50)
	return out
}

func percent(n float64) *big.Rat { return big.NewRat(int64(n), 100) }

// The chances are those of R (testdata/hypergeometric.R).
func TestChance(t *testing.T) {
	for _, c := range table(t, "hypergeometric.csv") {
		got, _ := Chance(int(c["population"]), int(c["faulty"]), int(c["n"]), int(c["found"])).Float64()
		assert.InDelta(t, c["chance"], got, 1e-10, "%v", c)
		if c["chance"] > 1e-200 {
			assert.InEpsilon(t, c["chance"], got, 1e-8, "%v", c)
		}
	}
}

// The chance of a small case is that of counting all draws.
func TestChanceByCounting(t *testing.T) {
	for population := 1; population <= 9; population++ {
		for faulty := range population + 1 {
			for n := range population + 1 {
				all, few := 0, make([]int, n+1)
				for set := range 1 << population {
					size, bad := 0, 0
					for i := range population {
						if set>>i&1 == 1 {
							size++
							if i < faulty {
								bad++
							}
						}
					}
					if size == n {
						all++
						few[bad]++
					}
				}
				sum := 0
				for found := range n + 1 {
					sum += few[found]
					require.Zero(t, Chance(population, faulty, n, found).Cmp(big.NewRat(int64(sum), int64(all))), "%d %d %d %d", population, faulty, n, found)
				}
			}
		}
	}
}

// The sizes are those of R (testdata/hypergeometric.R).
func TestSize(t *testing.T) {
	for _, c := range table(t, "sizes.csv") {
		goal := Goal{Confidence: percent(c["confidence"]), Tolerable: percent(c["tolerable"]), Expect: int(c["expect"])}
		n, err := goal.Size(int(c["population"]))
		require.NoError(t, err, "%v", c)
		assert.Equal(t, int(c["too_many"]), goal.TooMany(int(c["population"])), "%v", c)
		assert.Equal(t, int(c["n"]), n, "%v", c)
	}
}

// The sizes are those of a published table: International Standards for Phytosanitary Measures 31 (FAO, 2008),
// Appendix 2, Table 1, sample sizes by the hypergeometric distribution. The table takes the share of the lot, rounded
// down, as the number to be detected. [M] The values were written down from memory; R gives the same for each of them.
func TestPublishedSizes(t *testing.T) {
	for _, c := range table(t, "lots.csv") {
		population := int(c["population"])
		detected := population * int(c["percent"]) / 100
		assert.Equal(t, int(c["n"]), SizeFor(population, detected, 0, percent(c["confidence"])), "%v", c)
	}
}

// The bounds are those of R (testdata/hypergeometric.R).
func TestAtMost(t *testing.T) {
	for _, c := range table(t, "bounds.csv") {
		assert.Equal(t, int(c["at_most"]), AtMost(int(c["population"]), int(c["n"]), int(c["found"]), percent(c["confidence"])), "%v", c)
	}
}

// A chance that is exactly what the confidence leaves is enough: of 20 files with one faulty, 19 miss it in 1 of 20.
func TestBoundaryIsExact(t *testing.T) {
	assert.Equal(t, 19, SizeFor(20, 1, 0, percent(95)))
	assert.Equal(t, 0, AtMost(20, 19, 0, percent(95)))
	assert.Equal(t, 1, AtMost(20, 18, 0, percent(95)))
}

func TestNoSize(t *testing.T) {
	for _, c := range []struct {
		population int
		goal       Goal
		err        error
	}{
		{0, Goal{percent(95), percent(5), 0}, ErrNothing},
		{50, Goal{percent(95), percent(100), 0}, ErrNothing},
		{50, Goal{percent(95), percent(4), 3}, ErrExpect},
	} {
		_, err := c.goal.Size(c.population)
		assert.ErrorIs(t, err, c.err)
	}
	n, err := (&Goal{percent(95), percent(4), 2}).Size(50)
	require.NoError(t, err)
	assert.Less(t, n, 51)
}

// A sample of the size asked for that holds no more faulty files than expected shows what was to be shown, and one of
// a file less does not.
func TestSizeAndBoundAgree(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		population := rapid.IntRange(1, 400).Draw(t, "population")
		goal := Goal{percent(float64(rapid.IntRange(50, 99).Draw(t, "confidence"))), percent(float64(rapid.IntRange(0, 99).Draw(t, "tolerable"))), 0}
		too := goal.TooMany(population)
		goal.Expect = rapid.IntRange(0, min(5, too-1)).Draw(t, "expect")
		n, err := goal.Size(population)
		if err != nil {
			t.Fatal(err)
		}
		if got := AtMost(population, n, min(n, goal.Expect), goal.Confidence); got >= too {
			t.Fatalf("%d of %d show at most %d, not fewer than %d", n, population, got, too)
		}
		if n > goal.Expect+1 && AtMost(population, n-1, goal.Expect, goal.Confidence) < too {
			t.Fatalf("%d files would have been enough", n-1)
		}
	})
}

// Whatever the true number is, the bound lies below it in no more draws than the confidence leaves.
func TestAtMostHolds(t *testing.T) {
	for _, population := range []int{5, 12, 20} {
		for n := 1; n <= population; n++ {
			for faulty := range population + 1 {
				wrong := new(big.Rat)
				before := new(big.Rat)
				for found := 0; found <= min(n, faulty); found++ {
					upTo := Chance(population, faulty, n, found)
					if found >= n-(population-faulty) && AtMost(population, n, found, percent(90)) < faulty {
						wrong.Add(wrong, new(big.Rat).Sub(upTo, before))
					}
					before = upTo
				}
				assert.LessOrEqual(t, wrong.Cmp(percent(10)), 0, "%d %d %d", population, n, faulty)
			}
		}
	}
}

func TestFirst(t *testing.T) {
	for low := range 4 {
		for high := low - 1; high < 40; high++ {
			for from := low; from <= high+1; from++ {
				assert.Equal(t, from, first(low, high, func(n int) bool {
					assert.LessOrEqual(t, n, high)
					return n >= from
				}))
			}
		}
	}
}

func BenchmarkSize(b *testing.B) {
	goal := Goal{Confidence: percent(95), Tolerable: big.NewRat(1, 200), Expect: 2}
	for b.Loop() {
		if _, err := goal.Size(100_000); err != nil {
			b.Fatal(err)
		}
	}
}
