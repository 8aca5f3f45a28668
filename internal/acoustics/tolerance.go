package acoustics

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// ToleranceFactor gives the factor k of the one-sided upper tolerance limit mean + k sd of n normally
// distributed values: with the given confidence the share coverage of all values lies below it. k is the
// quantile of the noncentral t distribution with n - 1 degrees of freedom and noncentrality z sqrt(n),
// divided by sqrt(n) (NIST/SEMATECH e-Handbook 7.2.6.3, from memory). It fails if n is below 3, where the
// factor is unstable, or if coverage or confidence is not between 0 and 1.
func ToleranceFactor(n int, coverage, confidence float64) (float64, error) {
	if n < leastLevels {
		return 0, fmt.Errorf("a tolerance limit needs at least %d levels; %d are given", leastLevels, n)
	}
	if err := errors.Join(checkShare("coverage", coverage), checkShare("confidence", confidence)); err != nil {
		return 0, err
	}
	root := math.Sqrt(float64(n))
	z := distuv.UnitNormal.Quantile(coverage)
	missing := func(k float64) float64 { return confidence - noncentralT(k*root, float64(n-1), z*root) }
	low, high, ok := bracket(missing, z, 1)
	if !ok {
		return 0, fmt.Errorf("there is no tolerance factor for %d levels, coverage %g and confidence %g", n, coverage, confidence)
	}
	return bisect(missing, low, high), nil
}

// ToleranceLimit gives the level in dB(A) that the share coverage of all levels of the group lies below, with
// the given confidence (see ToleranceFactor). If all levels are the same it is that level.
func (g Group) ToleranceLimit(coverage, confidence float64) (float64, error) {
	if err := g.check(confidence); err != nil {
		return 0, err
	}
	k, err := ToleranceFactor(g.N, coverage, confidence)
	if err != nil {
		return 0, err
	}
	return g.Mean + k*g.SD, nil
}

// Exceedance gives the share of all levels of the group, from 0 to 1, that lies above a level in dB(A),
// 1 - Phi((L - mean)/sd) (textbook). If all levels are the same it is 0 or 1; a level is not above itself.
// It fails if the group has fewer than 3 levels or the level is not a finite number.
func (g Group) Exceedance(level float64) (float64, error) {
	if err := g.check(0.5); err != nil {
		return 0, err
	}
	if !finite(level) {
		return 0, errors.New("the level to be exceeded is not a number")
	}
	if g.SD == 0 {
		return certain(g.Mean > level), nil
	}
	return distuv.UnitNormal.Survival((level - g.Mean) / g.SD), nil
}

// ExceedanceLimit gives the share of all levels of the group that, with the given confidence, is the most
// that lies above a level in dB(A): 1 - p for the coverage p at which ToleranceLimit is that level. It fails
// where Exceedance does, or if the confidence is not between 0 and 1.
func (g Group) ExceedanceLimit(level, confidence float64) (float64, error) {
	if err := g.check(confidence); err != nil {
		return 0, err
	}
	if !finite(level) {
		return 0, errors.New("the level to be exceeded is not a number")
	}
	if g.SD == 0 {
		return certain(g.Mean > level), nil
	}
	root := math.Sqrt(float64(g.N))
	k := (level - g.Mean) / g.SD
	// The chance that the noncentral t stays below k sqrt(n) falls as the noncentrality z sqrt(n) rises.
	chance := func(z float64) float64 {
		return noncentralT(k*root, float64(g.N-1), z*root) - confidence
	}
	low, high, ok := bracket(chance, k, 1)
	if !ok {
		return 0, fmt.Errorf("there is no limit of the share above %g dB", level)
	}
	return distuv.UnitNormal.Survival(bisect(chance, low, high)), nil
}

func certain(yes bool) float64 {
	if yes {
		return 1
	}
	return 0
}

// SamplesForTop gives the least number of workers to draw from a group of so many, so that with the given
// confidence at least one of them belongs to the share top of the group with the highest exposure, such as
// 0.1 (hypergeometric; the question is that of NIOSH 77-173, whose table is partly approximate). The top is
// rounded down to whole workers, but is at least one. It fails if the group is empty, or if top or
// confidence is not between 0 and 1.
func SamplesForTop(workers int, top, confidence float64) (int, error) {
	if workers < 1 {
		return 0, errors.New("a group without workers cannot be sampled")
	}
	if err := errors.Join(checkShare("top share", top), checkShare("confidence", confidence)); err != nil {
		return 0, err
	}
	highest := max(1, int(top*float64(workers)+1e-9))
	missed := 1.0       // chance that none of the highest is among those drawn
	for n := 1; ; n++ { // ends when all but the highest are drawn, if not before
		missed *= float64(workers-highest-n+1) / float64(workers-n+1)
		if missed <= 1-confidence+1e-12 {
			return n, nil
		}
	}
}
