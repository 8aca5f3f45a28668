package acoustics

import (
	"fmt"
	"math"
)

// EnergyMeanLimit gives the level in dB(A) below which the energy mean of the whole group lies with a
// confidence from 0 to 1: Land's exact limit of the mean of a lognormal quantity, here the energy (Land,
// Annals of Mathematical Statistics 42, 1971, from memory; its factors and ISO 9612:2009 Table C.4 come out
// of it). A confidence below one half gives the lower limit. If all levels are the same it is that level.
// It fails if the confidence is not between 0 and 1, if the group has fewer than 3 levels, or if they lie so
// far apart that there is no limit within some 10^7 dB.
func (g Group) EnergyMeanLimit(confidence float64) (float64, error) {
	if err := g.check(confidence); err != nil {
		return 0, err
	}
	if g.SD == 0 {
		return g.Mean, nil
	}
	// In natural units the energy mean is m = mu + sigma²/2. Whatever sigma is, y - m has its natural
	// parameter of the mean at -1/2, so given the sum of its squares the mean has a known distribution.
	// The limit is the m at which the observed mean is just at the quantile 1 - confidence. The chance falls
	// from 1 to 0 as m rises.
	sd := g.SD / unitDB
	tail := func(m float64) float64 { return landTail(g.N, -m, sd) - (1 - confidence) }
	low, high, ok := bracket(tail, sd*sd/2, sd)
	if !ok {
		return 0, fmt.Errorf("the levels lie too far apart for a limit of the energy mean")
	}
	return g.Mean + unitDB*bisect(tail, low, high), nil
}

// landTail gives the chance that the mean of n values lies at or below the observed mean, given their sum of
// squares, where both are taken from the supposed m. The density of the mean x in units of its largest
// possible size r is exp(-n r x / 2) (1 - x²)^((n-3)/2) on [-1, 1]; with x = sin(angle) it is smooth.
func landTail(n int, mean, sd float64) float64 {
	count := float64(n)
	r := math.Sqrt(mean*mean + sd*sd*(count-1)/count)
	tilt := count * r / 2
	power := count - 2
	log := func(angle float64) float64 {
		return power*math.Log(math.Cos(angle)) - tilt*math.Sin(angle)
	}
	// The mode solves tilt (1 - s²) + power s = 0; this form of the root does not cancel.
	s := -2 * tilt / (power + math.Hypot(power, 2*tilt))
	mode := math.Asin(s)
	cos2 := 1 - s*s
	width := 1 / math.Sqrt(power/cos2-tilt*s)
	top := log(mode)
	density := func(angle float64) float64 { return math.Exp(log(angle) - top) }

	from, to := max(-math.Pi/2, mode-reach*width), min(math.Pi/2, mode+reach*width)
	at := math.Atan2(mean, sd*math.Sqrt((count-1)/count))
	switch {
	case at <= from:
		return 0
	case at >= to:
		return 1
	}
	below, above := integrate(density, from, at, width), integrate(density, at, to, width)
	return below / (below + above)
}
