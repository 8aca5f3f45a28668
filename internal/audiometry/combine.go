package audiometry

import (
	"errors"
	"slices"
)

// both is Yes if two verdicts are, and No if one of them is.
func both(a, b Verdict) Verdict {
	switch {
	case a == No || b == No:
		return No
	case a == Yes && b == Yes:
		return Yes
	}
	return Undecided
}

// either is Yes if one of two verdicts is, and No if both are.
func either(a, b Verdict) Verdict {
	switch {
	case a == Yes || b == Yes:
		return Yes
	case a == No && b == No:
		return No
	}
	return Undecided
}

// Confirmed says whether a retest shows again what the first test showed: the same ear, for which the
// caller answers, and at least one same frequency ("15 dB twice", NIOSH 98-126, section 1.6.4, secondary
// source). A mean or a sum is confirmed if the retest shows it too. It is Undecided if the records leave
// open whether there is such a frequency.
func Confirmed(first, retest Outcome) Verdict {
	if share(first.Shown, retest.Shown) {
		return Yes
	}
	if share(first.Open, retest.Open) || share(first.Open, retest.Shown) || share(first.Shown, retest.Open) {
		return Undecided
	}
	return No
}

func share(a, b []int) bool {
	return slices.ContainsFunc(a, func(hz int) bool { return slices.Contains(b, hz) })
}

// AnyOf takes several schemes of one ear together, of which one is enough: Yes if one of the outcomes is,
// and No if all are. The lists are united. Low and High are infinite, since different schemes have no
// common figure. No outcome at all is Undecided.
func AnyOf(outcomes ...Outcome) Outcome {
	all := undecided(nil)
	for i, o := range outcomes {
		if i == 0 {
			all.Verdict = o.Verdict
		}
		all.Verdict = either(all.Verdict, o.Verdict)
		all.Shown, all.Open, all.Missing = unite(all.Shown, o.Shown), unite(all.Open, o.Open), unite(all.Missing, o.Missing)
	}
	return all
}

func unite(a, b []int) []int {
	if len(b) == 0 {
		return a
	}
	list := append(slices.Clone(a), b...)
	slices.Sort(list)
	return slices.Compact(list)
}

// Schemes are schemes of which one is enough, such as an average rise or a rise at a single frequency.
type Schemes []Scheme

// Check refuses a list that is empty, that has a scheme Check refuses, or that has a scheme of ears.
func (list Schemes) Check() error {
	if len(list) == 0 {
		return errors.New("the list of schemes is empty")
	}
	for _, s := range list {
		if err := s.Check(); err != nil {
			return err
		}
		if s.Of == OfEars {
			return errors.New("a scheme of the ears compares two ears and cannot stand in a list for one ear")
		}
	}
	return nil
}

// Judge judges one ear by all schemes of the list and takes the outcomes together as AnyOf does. The slices
// aging (nil for no correction; see Scheme.Judge) and amountsDB hold one entry a scheme; another length is a
// mistake of the caller that panics. The baseline is the same for all schemes.
func (list Schemes) Judge(baseline, current *Ear, aging [][]int, amountsDB []float64) Outcome {
	if len(amountsDB) != len(list) || aging != nil && len(aging) != len(list) {
		panic("audiometry: schemes, aging and amounts differ in length")
	}
	outcomes := make([]Outcome, len(list))
	for i, s := range list {
		var a []int
		if aging != nil {
			a = aging[i]
		}
		outcomes[i] = s.Judge(baseline, current, a, amountsDB[i])
	}
	return AnyOf(outcomes...)
}

// JudgeEars holds the difference between the ears of one test against a scheme of ears, such as averages
// that differ by more than an amount. It names the ear that is worse by the amount: LeftEar, RightEar, or
// BothEars where single frequencies go either way; empty unless the verdict is Yes. Low and High enclose
// the difference without its sign.
func (s Scheme) JudgeEars(left, right *Ear, amountDB float64) (o Outcome, worse string) {
	toRight, toLeft := s.judge(left, right, nil, amountDB), s.judge(right, left, nil, amountDB)
	o = Outcome{
		Verdict: either(toRight.Verdict, toLeft.Verdict),
		Low:     max(toRight.Low, toLeft.Low, 0), High: max(toRight.High, toLeft.High),
		Shown: unite(toRight.Shown, toLeft.Shown), Open: unite(toRight.Open, toLeft.Open), Missing: toRight.Missing,
	}
	switch {
	case toRight.Verdict == Yes && toLeft.Verdict == Yes:
		worse = BothEars
	case toRight.Verdict == Yes:
		worse = RightEar
	case toLeft.Verdict == Yes:
		worse = LeftEar
	}
	return o, worse
}
