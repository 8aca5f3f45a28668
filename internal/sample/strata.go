package sample

import "math/big"

// Stratum is a part of the files from which a number of its own is drawn.
type Stratum struct {
	Size  int // files in it
	Drawn int // of them in the sample
}

// Missed gives the largest chance that the sample holds none of so many faulty files, however they lie among the
// strata. Where files are drawn by strata it differs a little from Chance, since numbers of files are whole.
//
// Another faulty file in a stratum with d of them lowers the chance by the factor 1 - drawn/(size-d), and each more
// by a smaller one. So the chance is largest if file after file is put where the factor is largest.
func Missed(strata []Stratum, faulty int) *big.Rat {
	in := make([]int, len(strata))
	for range faulty {
		best := -1
		for i, s := range strata {
			if s.Size-s.Drawn > in[i] && (best < 0 || s.Drawn*(strata[best].Size-in[best]) < strata[best].Drawn*(s.Size-in[i])) {
				best = i
			}
		}
		if best < 0 { // there are not so many files outside the sample
			return new(big.Rat)
		}
		in[best]++
	}
	chance := big.NewRat(1, 1)
	for i, s := range strata {
		if in[i] > 0 {
			chance.Mul(chance, Chance(s.Size, in[i], s.Drawn, 0))
		}
	}
	return chance
}

// Spread divides a sample of n files among strata. If the goal allows no faulty file in it, the sample grows until it
// reaches the goal also where the faulty files lie most unluckily; else it does so as a sample without strata would.
func (g *Goal) Spread(sizes []int, n int) []Stratum {
	population := 0
	for _, size := range sizes {
		population += size
	}
	for ; ; n++ {
		strata := make([]Stratum, len(sizes))
		drawn := 0
		for i, of := range Allocate(sizes, n) {
			strata[i] = Stratum{sizes[i], of}
			drawn += of
		}
		if g.Expect > 0 || drawn >= population || Missed(strata, g.TooMany(population)).Cmp(Risk(g.Confidence)) <= 0 {
			return strata
		}
	}
}
