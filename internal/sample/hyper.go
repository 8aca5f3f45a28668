// Package sample works out how many files an audit must pull to say something of all of them, draws them, and
// says afterwards what was shown. It is arithmetic and chance only: it knows nothing of records.
//
// Of N files D are faulty. Of n files drawn at random, without putting any back, the number X of faulty ones has
// the hypergeometric distribution. All chances are exact fractions, so that a size never depends on rounding.
package sample

import "math/big"

// Chance gives the probability that n files drawn at random from population files, of which faulty are faulty,
// hold at most found faulty ones.
func Chance(population, faulty, n, found int) *big.Rat {
	least := max(0, n-(population-faulty)) // so many faulty files are drawn at least
	most := min(found, n, faulty)
	if most < least {
		return new(big.Rat)
	}
	if n > faulty { // n and faulty may change places, and the smaller one makes smaller numbers
		n, faulty = faulty, n
	}
	ways := new(big.Int)
	for x := least; x <= most; x++ {
		ways.Add(ways, new(big.Int).Mul(choose(faulty, x), choose(population-faulty, n-x)))
	}
	return new(big.Rat).SetFrac(ways, choose(population, n))
}

// choose gives the number of ways to take k of n.
func choose(n, k int) *big.Int { return new(big.Int).Binomial(int64(n), int64(k)) }

// Risk gives what a confidence leaves: 1/20 for 19/20.
func Risk(confidence *big.Rat) *big.Rat { return new(big.Rat).Sub(big.NewRat(1, 1), confidence) }

// first gives the smallest number from low to high for which holds is true, or high+1. From there on it must stay
// true. It looks at small numbers first, since large ones take long.
func first(low, high int, holds func(int) bool) int {
	end := low
	for step := 1; end <= high && !holds(end); step *= 2 {
		low, end = end+1, end+step
	}
	end = min(end, high+1)
	for low < end {
		if middle := low + (end-low)/2; holds(middle) {
			end = middle
		} else {
			low = middle + 1
		}
	}
	return low
}
