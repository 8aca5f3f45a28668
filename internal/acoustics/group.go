package acoustics

import (
	"errors"
	"fmt"
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

const (
	leastLevels = 3              // below it no limit holds: at 2 the tolerance factor is above 26
	fewLevels   = 6              // below it the limits are wide (common practice, from memory)
	unitDB      = 10 / math.Ln10 // dB in one unit of the natural logarithm of energy
	// varianceGain is what a variance of 1 dB² adds to the energy mean in dB, printed as 0.115 (ISO 9612:2009
	// Annex C, secondary source).
	varianceGain = math.Ln10 / 20
)

// Group describes the levels of workers with similar exposure, taken as normally distributed.
type Group struct {
	N              int
	Mean           float64 // dB(A), arithmetic
	SD             float64 // dB, over n - 1
	EnergyMean     float64 // dB(A) of the levels themselves
	EnergyEstimate float64 // dB(A) of the distribution, mean + 0.115 sd²
	Few            bool    // fewer than 6 levels, so every limit is wide
	Identical      bool    // all levels are the same, which real ones seldom are: look for copied data
}

// Describe gives the statistics of three or more levels in dB(A). It fails if there are fewer, or if one is
// not a finite number.
func Describe(levels []float64) (Group, error) {
	if len(levels) < leastLevels {
		return Group{}, fmt.Errorf("the statistics of a group need at least %d levels; %d are given", leastLevels, len(levels))
	}
	energy, ok := EnergyMean(levels)
	if !ok {
		return Group{}, errors.New("a level of the group is not a number")
	}
	g := Group{
		N: len(levels), Mean: arithmeticMean(levels), SD: deviation(levels), EnergyMean: energy,
		Few: len(levels) < fewLevels, Identical: spread(levels) == 0,
	}
	g.EnergyEstimate = g.Mean + varianceGain*g.SD*g.SD
	return g, nil
}

// MeanLimit gives the level in dB(A) below which the arithmetic mean of the whole group lies with a
// confidence from 0 to 1, mean + t * sd / sqrt(n) (textbook, from memory). A confidence below one half gives
// the lower limit. It fails if the confidence is not between 0 and 1 or the group has fewer than 3 levels.
func (g Group) MeanLimit(confidence float64) (float64, error) {
	if err := g.check(confidence); err != nil {
		return 0, err
	}
	t := distuv.StudentsT{Sigma: 1, Nu: float64(g.N - 1)}.Quantile(confidence)
	return g.Mean + t*g.SD/math.Sqrt(float64(g.N)), nil
}

func (g Group) check(confidence float64) error {
	if g.N < leastLevels || !finite(g.Mean) || !finite(g.SD) || g.SD < 0 {
		return fmt.Errorf("the statistics of a group need at least %d levels; %d are given", leastLevels, g.N)
	}
	return checkShare("confidence", confidence)
}

func checkShare(what string, x float64) error {
	if !(x > 0 && x < 1) {
		return fmt.Errorf("a %s of %g is not between 0 and 1", what, x)
	}
	return nil
}
