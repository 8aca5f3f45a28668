package audiometry

import (
	"fmt"
	"slices"
)

// The rules by which a scheme reads several frequencies.
const (
	Mean     = "mean"     // the average over all frequencies
	Any      = "any"      // each frequency for itself; one is enough
	Adjacent = "adjacent" // two neighbours in the scheme's list of frequencies, both of them
	Total    = "sum"      // the sum over all frequencies
	Peak     = "peak"     // one of the frequencies, with a level above those at all of the frequencies of Over
)

// What a scheme looks at.
const (
	OfChange = "change" // change of an ear against its baseline
	OfLevel  = "level"  // hearing level of an ear, without a baseline
	OfEars   = "ears"   // difference between the ears of one test
)

// Scheme is a threshold shift or hearing level as a law or guideline defines it: which frequencies, how
// they are taken together, and against which baseline. The amount in dB is a dated parameter of the law and
// is given to Judge. Two examples: an average change at 2000, 3000 and 4000 Hz (29 CFR 1910.95(g)(10)(i)),
// and a change at any frequency, seen twice (NIOSH, 98-126).
type Scheme struct {
	Name        string `json:"name,omitempty" doc:"name of the scheme"`
	Of          string `json:"of,omitempty" enum:"change|level|ears" doc:"what is looked at: the change of an ear against its baseline, the hearing level of an ear, or the difference between the ears; change if left out"`
	Rule        string `json:"rule" enum:"mean|any|adjacent|sum|peak" doc:"how the frequencies are taken together: their average, any single one, two neighbours of the list, their sum, or any single one with a higher level than at all of the frequencies of over"`
	Frequencies []int  `json:"frequencies" doc:"frequencies in rising order, Hz"`
	Over        []int  `json:"over,omitempty" doc:"frequencies in rising order, Hz, at all of which the level is lower, for the rule peak"`
	AtLeast     string `json:"at_least,omitempty" doc:"parameter that the figure reaches, dB"`
	Above       string `json:"above,omitempty" doc:"parameter that the figure exceeds, dB"`
	Baseline    string `json:"baseline,omitempty" enum:"standing|original|improved|previous" doc:"test to compare with: the baseline in force, the first one, the first one or a revision of it for improvement, or the test before; the baseline in force if left out"`
	Confirm     bool   `json:"confirm,omitempty" doc:"whether a second test must show it in the same ear at the same frequency"`
	Cite        string `json:"cite,omitempty" doc:"paragraph"`
}

// Check refuses a scheme that cannot be judged. The error is one plain sentence.
func (s Scheme) Check() error {
	switch {
	case !slices.Contains([]string{Mean, Any, Adjacent, Total, Peak}, s.Rule):
		return fmt.Errorf("the scheme has the rule %q; write mean, any, adjacent, sum or peak", s.Rule)
	case !slices.Contains([]string{"", OfChange, OfLevel, OfEars}, s.Of):
		return fmt.Errorf("the scheme is of %q; write change, level or ears", s.Of)
	case !slices.Contains([]string{"", "standing", "original", "improved", "previous"}, s.Baseline):
		return fmt.Errorf("the scheme has the baseline %q; write standing, original, improved or previous", s.Baseline)
	case s.Baseline != "" && s.Of != "" && s.Of != OfChange:
		return fmt.Errorf("the scheme names a baseline, but only a change has one")
	case s.AtLeast != "" && s.Above != "":
		return fmt.Errorf("the scheme has both at_least and above; keep one of them")
	case s.Rule == Peak && (s.Of != OfLevel || len(s.Over) == 0):
		return fmt.Errorf("the rule peak is of a level and names in over the frequencies at which the level is lower")
	case s.Rule != Peak && len(s.Over) > 0:
		return fmt.Errorf("the scheme names frequencies in over, which only the rule peak has")
	case len(s.Frequencies) == 0:
		return fmt.Errorf("the scheme has no frequencies")
	case s.Rule == Adjacent && len(s.Frequencies) < 2:
		return fmt.Errorf("the scheme looks for two neighbours but has one frequency only")
	}
	if err := checkFrequencies(s.Frequencies); err != nil {
		return err
	}
	return checkFrequencies(s.Over)
}

func checkFrequencies(list []int) error {
	for i, hz := range list {
		if !slices.Contains(Frequencies[:], hz) {
			return fmt.Errorf("the scheme has %d Hz, which no record holds", hz)
		}
		if i > 0 && hz <= list[i-1] {
			return fmt.Errorf("the frequencies of the scheme are not in rising order at %d Hz", hz)
		}
	}
	return nil
}

// Parameter names the parameter that holds the amount, or is empty if the scheme names none.
func (s Scheme) Parameter() string {
	if s.Above != "" {
		return s.Above
	}
	return s.AtLeast
}
