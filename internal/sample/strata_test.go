package sample

import (
	"fmt"
	"math"
	"math/big"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"pgregory.net/rapid"
)

func TestAllocate(t *testing.T) {
	for _, c := range []struct {
		sizes []int
		n     int
		want  []int
	}{
		{[]int{50, 30, 20}, 10, []int{5, 3, 2}},
		{[]int{50, 30, 21}, 10, []int{5, 3, 2}},
		{[]int{10, 10, 10}, 4, []int{2, 1, 1}},       // equal remainders: the first
		{[]int{97, 1, 2, 0}, 10, []int{10, 1, 1, 0}}, // small ones come on top
		{[]int{1, 1, 1}, 1, []int{1, 1, 1}},
		{[]int{3, 4}, 100, []int{3, 4}},
		{[]int{0, 0}, 5, []int{0, 0}},
		{nil, 5, []int{}},
	} {
		assert.Equal(t, c.want, Allocate(c.sizes, c.n), "%v %d", c.sizes, c.n)
	}
	rapid.Check(t, func(t *rapid.T) {
		sizes := rapid.SliceOfN(rapid.IntRange(0, 300), 1, 12).Draw(t, "sizes")
		n := rapid.IntRange(0, 500).Draw(t, "n")
		total, drawn, little := 0, 0, 0
		for _, size := range sizes {
			total += size
		}
		for i, got := range Allocate(sizes, n) {
			share := float64(min(n, total)*sizes[i]) / float64(max(total, 1))
			if got > sizes[i] || got == 0 && sizes[i] > 0 || math.Abs(float64(got)-share) >= 1 && !(got == 1 && share < 1) {
				t.Fatalf("%d of %d for a share of %v", got, sizes[i], share)
			}
			if drawn += got; got == 1 && share < 1 {
				little++
			}
		}
		if want := min(n, total); drawn < want || drawn > want+little {
			t.Fatalf("%d files in all, not %d", drawn, want)
		}
	})
}

// The drawn files are fixed: whoever draws them again, by the words that document Draw, gets the same.
func TestDrawIsFixed(t *testing.T) {
	ids := []string{}
	for i := range 40 {
		ids = append(ids, fmt.Sprintf("K%04d", i))
	}
	first := Draw(17, "kiln-hill/limit", ids, 6)
	assert.Equal(t, []string{"K0001"}, Draw(17, "kiln-hill/limit", ids[1:2], 6))
	assert.Equal(t, first, Draw(17, "kiln-hill/limit", ids, 6))
	slices.Reverse(ids)
	assert.Equal(t, first, Draw(17, "kiln-hill/limit", ids, 6), "the order of the ids matters")
	assert.NotEqual(t, first, Draw(18, "kiln-hill/limit", ids, 6))
	assert.NotEqual(t, first, Draw(17, "kiln-hill/action", ids, 6))
	assert.Equal(t, "K0039", ids[0], "the ids of the caller were moved")
	assert.Equal(t, golden, first)
	assert.Equal(t, uint64(328060624), Seed("digest", "2026-06-30"))
}

// Each file has the same chance.
func TestDrawIsEven(t *testing.T) {
	ids := []string{"a", "b", "c", "d", "e", "f", "g"}
	times := map[string]int{}
	const runs = 14000
	for seed := range uint64(runs) {
		for _, id := range Draw(seed, "s", ids, 3) {
			times[id]++
		}
	}
	for _, id := range ids { // 6000 times each; the standard deviation is 58.6
		assert.InDelta(t, runs*3/7, times[id], 5*58.6, id)
	}
}

// The chance to miss all faulty files is the largest of all ways in which they can lie.
func TestMissed(t *testing.T) {
	strata := []Stratum{{9, 3}, {5, 2}, {1, 1}, {4, 1}, {0, 0}}
	for faulty := range 14 {
		worst := new(big.Rat)
		for a := range 10 {
			for b := range 6 {
				for c := range 2 {
					d := faulty - a - b - c
					if d < 0 || d > 4 {
						continue
					}
					chance := big.NewRat(1, 1)
					for i, in := range []int{a, b, c, d} {
						chance.Mul(chance, Chance(strata[i].Size, in, strata[i].Drawn, 0))
					}
					if chance.Cmp(worst) > 0 {
						worst = chance
					}
				}
			}
		}
		assert.Zero(t, worst.Cmp(Missed(strata, faulty)), "%d", faulty)
	}
}

// A sample by strata reaches its goal however the faulty files lie.
func TestSpread(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		sizes := rapid.SliceOfN(rapid.IntRange(0, 60), 1, 8).Draw(t, "sizes")
		population := 0
		for _, size := range sizes {
			population += size
		}
		goal := Goal{Confidence: percent(95), Tolerable: percent(float64(rapid.IntRange(1, 30).Draw(t, "tolerable")))}
		n, err := goal.Size(population)
		if err != nil {
			t.Skip(err)
		}
		drawn := 0
		strata := goal.Spread(sizes, n)
		for _, s := range strata {
			drawn += s.Drawn
		}
		if drawn < n || Missed(strata, goal.TooMany(population)).Cmp(percent(5)) > 0 {
			t.Fatalf("%v for %d of %d", strata, n, population)
		}
		if drawn > n+2*len(sizes) {
			t.Fatalf("%d files instead of %d", drawn, n)
		}
	})
}

// golden was drawn by another program, in Python, that was written after the words that document Draw.
var golden = []string{"K0002", "K0010", "K0020", "K0028", "K0036", "K0037"}
