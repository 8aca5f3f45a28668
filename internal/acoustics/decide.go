package acoustics

import "fmt"

// DecisionRule says how the uncertainty of a result counts when it is compared with a limit. Laws seldom
// say.
type DecisionRule string

// The decision rules.
const (
	BestEstimate DecisionRule = "best estimate" // the result itself, without its uncertainty
	UpperLimit   DecisionRule = "upper limit"   // the upper end of the uncertainty
	ThreeZones   DecisionRule = "three zones"   // both ends; undetermined if the limit lies between them
)

// Zone says on which side of a limit a result lies.
type Zone string

// The zones.
const (
	Below        Zone = "below"
	Above        Zone = "above"
	Undetermined Zone = "undetermined"
)

// Limit is a level that a result is compared with.
type Limit struct {
	Level   float64 // dB
	Reached bool    // the level itself counts as above, as in "equals or exceeds"
}

// Decide compares a result and the ends of its uncertainty, all in dB, with a limit. It fails if the rule is
// unknown, if a number that the rule looks at is missing, or if the ends do not lie around the result.
func Decide(rule DecisionRule, lower, estimate, upper float64, limit Limit) (Zone, error) {
	switch {
	case rule != BestEstimate && rule != UpperLimit && rule != ThreeZones:
		return "", fmt.Errorf("%q is not a decision rule", rule)
	case !finite(limit.Level) || !finite(estimate):
		return "", fmt.Errorf("a result and a limit are needed to decide")
	case rule == BestEstimate:
		return limit.zone(estimate), nil
	case !(upper >= estimate) || !finite(upper) || rule == ThreeZones && (!(lower <= estimate) || !finite(lower)):
		return "", fmt.Errorf("the uncertainty of the result is needed to decide by the rule %q", rule)
	case rule == UpperLimit:
		return limit.zone(upper), nil
	}
	if zone := limit.zone(lower); zone == limit.zone(upper) {
		return zone, nil
	}
	return Undetermined, nil
}

// zone takes a level within 1e-9 dB of the limit as equal to it.
func (l Limit) zone(level float64) Zone {
	if level > l.Level+levelSlack || l.Reached && level >= l.Level-levelSlack {
		return Above
	}
	return Below
}

// Decide compares the daily exposure level with a limit; the ends of its uncertainty are L_EX,8h - U and
// L_EX,8h + U.
func (r SampledResult) Decide(rule DecisionRule, limit Limit) (Zone, error) {
	return Decide(rule, r.LEX-r.Expanded, r.LEX, r.LEX+r.Expanded, limit)
}

// Decide compares the daily exposure level with a limit; the ends of its uncertainty are L_EX,8h - U and
// L_EX,8h + U.
func (r TaskResult) Decide(rule DecisionRule, limit Limit) (Zone, error) {
	return Decide(rule, r.LEX-r.Expanded, r.LEX, r.LEX+r.Expanded, limit)
}

// Average is the quantity of a group that is compared with a limit.
type Average string

// The averages of a group.
const (
	MeanOfLevels Average = "mean of the levels" // arithmetic mean, limits by MeanLimit
	MeanOfEnergy Average = "mean of the energy" // mean + 0.115 sd², limits by EnergyMeanLimit
)

// Decide compares an average of the group with a limit; the ends of its uncertainty are its one-sided limits
// with the given confidence, from above one half to below 1. It fails where MeanLimit, EnergyMeanLimit and
// the function Decide do.
func (g Group) Decide(of Average, rule DecisionRule, limit Limit, confidence float64) (Zone, error) {
	if confidence <= 0.5 {
		return "", fmt.Errorf("a confidence of %g is not above one half", confidence)
	}
	bound, estimate := g.MeanLimit, g.Mean
	switch of {
	case MeanOfLevels:
	case MeanOfEnergy:
		bound, estimate = g.EnergyMeanLimit, g.EnergyEstimate
	default:
		return "", fmt.Errorf("%q is not an average of a group", of)
	}
	upper, err := bound(confidence)
	if err != nil {
		return "", err
	}
	lower, err := bound(1 - confidence)
	if err != nil {
		return "", err
	}
	return Decide(rule, min(lower, estimate), estimate, max(upper, estimate), limit)
}

// MoreSamples gives the least number of further samples that would settle a result which Decide leaves
// undetermined by three zones, if level and standard deviation stay as they are. It tries up to most samples
// altogether, and gives 0 if the result is settled. It returns false if none would do: Table C.4 ends at 30 samples, and what instrument and
// place add never falls.
func (r SampledResult) MoreSamples(limit Limit, most int) (int, bool) {
	for n := r.Samples; n <= most; n++ {
		again := r
		again.C1U1, _, _ = SamplingUncertainty(n, r.U1)
		again.combine()
		if zone, err := again.Decide(ThreeZones, limit); err == nil && zone != Undetermined {
			return n - r.Samples, true
		}
	}
	return 0, false
}

// MoreSamples gives the least number of further samples that would settle an average of the group which
// Decide leaves undetermined by three zones, if mean and standard deviation stay as they are. It tries up to
// most samples altogether, gives 0 if the average is settled, and returns false if none would do. It fails where Decide does.
func (g Group) MoreSamples(of Average, limit Limit, confidence float64, most int) (int, bool, error) {
	for n := g.N; n <= most; n++ {
		again := g
		again.N = n
		zone, err := again.Decide(of, ThreeZones, limit, confidence)
		if err != nil {
			return 0, false, err
		}
		if zone != Undetermined {
			return n - g.N, true, nil
		}
	}
	return 0, false, nil
}
