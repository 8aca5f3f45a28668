package audiometry

import "slices"

// The figures of the plausibility checks, in tenths of dB unless marked. They decide nothing: see observe.go
// for the source of each check.
const (
	lowestUsual      = -100 // range of thresholds
	highestUsual     = 1200
	highestUsual8000 = 1100
	step             = 50
	fewestToCompare  = 4 // frequencies that make a sameness worth a remark
	fewestLevels     = 4 // different levels that make thresholds varied
	farBetter        = 200
	fewestBetter     = 2 // frequencies
	repeatSpread     = 50
	clearlyWorse     = 150
	crossSupraAural  = 400
	crossInsert      = 550 // from memory, as the rule
	notchDepth       = 100
	lowToneRise      = 100
)

// where lists the frequencies of an ear whose threshold fits.
func where(e *Ear, fits func(hz int, t Threshold) bool) []int {
	var list []int
	for i, hz := range Frequencies {
		if fits(hz, e[i]) {
			list = append(list, hz)
		}
	}
	return list
}

// missingRequired: a frequency that the law requires has no level.
func missingRequired(t *Tested, side int) []int {
	var list []int
	for _, hz := range t.Required {
		if !t.side(side).At(hz).hasLevel() {
			list = append(list, hz)
		}
	}
	return list
}

// outOfRange: a threshold is below -10 or above 120 dB HL, above 110 at 8000 Hz.
func outOfRange(t *Tested, side int) []int {
	return where(t.side(side), func(hz int, x Threshold) bool {
		return x.hasLevel() && (x.Tenths < lowestUsual || int(x.Tenths) > highestAt(hz))
	})
}

func highestAt(hz int) int {
	if hz == 8000 {
		return highestUsual8000
	}
	return highestUsual
}

// offSteps: a measured threshold is no multiple of 5 dB. Audiometers with finer steps are left out.
func offSteps(t *Tested, side int) []int {
	if t.FineSteps {
		return nil
	}
	return where(t.side(side), func(_ int, x Threshold) bool { return x.State == Measured && x.Tenths%step != 0 })
}

// atLimit: no response, or a threshold at the highest level that audiometers reach.
func atLimit(t *Tested, side int) []int {
	return where(t.side(side), func(hz int, x Threshold) bool {
		return x.State == NoResponse || x.State == Measured && int(x.Tenths) == highestAt(hz)
	})
}

// allZero: four or more thresholds, all 0 dB HL.
func allZero(t *Tested, side int) []int {
	list, level := same(t.side(side))
	if level != 0 {
		return nil
	}
	return list
}

// flat: four or more thresholds, all the same but not 0 dB HL.
func flat(t *Tested, side int) []int {
	list, level := same(t.side(side))
	if level == 0 {
		return nil
	}
	return list
}

// same lists the measured frequencies of an ear if there are enough and all have one level.
func same(e *Ear) (list []int, level int16) {
	list = where(e, func(_ int, x Threshold) bool { return x.hasLevel() })
	if len(list) < fewestToCompare {
		return nil, 0
	}
	first := e.At(list[0])
	for _, hz := range list {
		if x := e.At(hz); x.State != Measured || x.Tenths != first.Tenths {
			return nil, 0
		}
	}
	return list, first.Tenths
}

// identicalEars: left and right agree at every frequency, four or more of them. A flat test is left to flat.
func identicalEars(t *Tested) (bool, []int) {
	if list, _ := same(t.Left); list != nil {
		return false, nil
	}
	return *t.Left == *t.Right && levels(t.Left) >= fewestToCompare, nil
}

// identicalEarlier: both ears agree with an earlier test at every frequency, four or more of them in an ear.
func identicalEarlier(t *Tested) (bool, []int) {
	if levels(t.Left) < fewestToCompare || levels(t.Right) < fewestToCompare {
		return false, nil
	}
	for _, e := range t.Earlier {
		if *e.Left == *t.Left && *e.Right == *t.Right {
			return true, nil
		}
	}
	return false, nil
}

// Varied says whether the thresholds of a test are so varied that two people hardly have the same by chance:
// four or more in each ear, and four or more different levels in all. Near-normal hearing, which many share, is
// not (ours).
func Varied(left, right *Ear) bool {
	if levels(left) < fewestToCompare || levels(right) < fewestToCompare {
		return false
	}
	var seen [fewestLevels]int16
	n := 0
	for _, e := range [2]*Ear{left, right} {
		for _, x := range e {
			if !x.hasLevel() || slices.Contains(seen[:n], x.Tenths) {
				continue
			}
			seen[n] = x.Tenths
			if n++; n == fewestLevels {
				return true
			}
		}
	}
	return false
}

func levels(e *Ear) (n int) {
	for _, x := range e {
		if x.hasLevel() {
			n++
		}
	}
	return n
}

// improbableImprovement: more than 20 dB better than in the test before, at two or more frequencies.
func improbableImprovement(t *Tested, side int) []int {
	if len(t.Earlier) == 0 {
		return nil
	}
	before := t.Earlier[len(t.Earlier)-1].side(side)
	list := where(t.side(side), func(hz int, now Threshold) bool {
		return clearlyAbove(before.At(hz), now, farBetter+1)
	})
	if len(list) < fewestBetter {
		return nil
	}
	return list
}

// clearlyAbove says whether one threshold is certainly above another by tenths of dB or more. No response is
// a lower bound of the one above and says nothing of the other.
func clearlyAbove(higher, lower Threshold, tenths int) bool {
	return higher.hasLevel() && lower.State == Measured && int(higher.Tenths)-int(lower.Tenths) >= tenths
}
