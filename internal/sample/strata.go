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
// reaches the goal also where the faulty files lie most unluckily: file after file is added where the share drawn is
// smallest. Else it reaches the goal as a sample without strata would.
func (g *Goal) Spread(sizes []int, n int) []Stratum {
	population := 0
	strata := make([]Stratum, len(sizes))
	for i, of := range Allocate(sizes, n) {
		strata[i] = Stratum{sizes[i], of}
		population += sizes[i]
	}
	if g.Expect > 0 {
		return strata
	}
	for too, risk := g.TooMany(population), Risk(g.Confidence); Missed(strata, too).Cmp(risk) > 0; {
		strata[thinnest(strata)].Drawn++
	}
	return strata
}

// thinnest gives the first of the strata with the smallest share drawn. One at least must have files left.
func thinnest(strata []Stratum) int {
	least := -1
	for i, s := range strata {
		if s.Drawn < s.Size && (least < 0 || s.Drawn*strata[least].Size < strata[least].Drawn*s.Size) {
			least = i
		}
	}
	return least
}
