package sample

import (
	"errors"
	"fmt"
	"math/big"
)

// Goal says what a sample is to show.
type Goal struct {
	Confidence *big.Rat // such as 19/20
	Tolerable  *big.Rat // share of faulty files that is tolerated, such as 1/20
	Expect     int      // number of faulty files that the sample may hold all the same
}

// TooMany gives the smallest number of faulty files that is more than what is tolerated: one more than the
// tolerable share of the population, rounded down.
func (g *Goal) TooMany(population int) int {
	share := new(big.Rat).Mul(g.Tolerable, new(big.Rat).SetInt64(int64(population)))
	tolerated := new(big.Int).Div(share.Num(), share.Denom())
	return int(tolerated.Int64()) + 1
}

// ErrNothing says that there is nothing to draw from.
var ErrNothing = errors.New("there are no files to draw from")

// ErrExpect says that the sample may hold as many faulty files as are too many altogether.
var ErrExpect = errors.New("as many faulty files would be allowed in the sample as are too many in all files")

// Size gives the smallest number of files that reaches the goal: if faulty files were too many, even by one, the
// chance that the sample holds no more of them than it may is at most what the confidence leaves.
func (g *Goal) Size(population int) (int, error) {
	if population <= 0 {
		return 0, ErrNothing
	}
	faulty := g.TooMany(population)
	if faulty > population {
		return 0, fmt.Errorf("a tolerable share of 100 percent asks for no sample: %w", ErrNothing)
	}
	if g.Expect >= faulty {
		return 0, ErrExpect
	}
	return SizeFor(population, faulty, g.Expect, g.Confidence), nil
}

// SizeFor gives the smallest number of files for which the chance to find at most expect of the faulty ones is at
// most what the confidence leaves. There must be more faulty ones than that.
func SizeFor(population, faulty, expect int, confidence *big.Rat) int {
	risk := Risk(confidence)
	return first(1, population, func(n int) bool { return Chance(population, faulty, n, expect).Cmp(risk) <= 0 })
}

// AtMost gives what a sample has shown: the largest number of faulty files among all with which it had still been
// likely, by more than what the confidence leaves, to find as few as were found. With that confidence there are at
// most so many.
func AtMost(population, n, found int, confidence *big.Rat) int {
	risk := Risk(confidence)
	most := population - n + found // all files that were not drawn
	return first(found, most, func(faulty int) bool { return Chance(population, faulty, n, found).Cmp(risk) <= 0 }) - 1
}
