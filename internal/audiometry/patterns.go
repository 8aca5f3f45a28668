package audiometry

// repeatDifference: the repeated threshold at 1000 Hz differs from the first by more than 5 dB.
func repeatDifference(t *Tested, side int) []int {
	first, again := t.side(side).At(1000), t.Repeat[side]
	if clearlyAbove(first, again, repeatSpread+1) || clearlyAbove(again, first, repeatSpread+1) {
		return []int{1000}
	}
	return nil
}

// asymmetry: at two neighbouring frequencies from 500 to 8000 Hz, this ear is worse by 15 dB or more.
// Neighbours are frequencies at which both ears have a level, with no other such frequency between them.
func asymmetry(t *Tested, side int) []int {
	var list []int
	before := 0
	for i, hz := range Frequencies {
		this, other := t.side(side)[i], t.side(1 - side)[i]
		if hz < 500 || !this.hasLevel() || !other.hasLevel() {
			continue
		}
		if !clearlyAbove(this, other, clearlyWorse) {
			before = 0
			continue
		}
		if before != 0 {
			list = appendPair(list, before, hz)
		}
		before = hz
	}
	return list
}

// crossHearing: this ear is worse than the other by 40 dB or more, 55 dB with insert earphones, and the record
// does not say that the other was masked.
func crossHearing(t *Tested, side int) []int {
	if t.Masked {
		return nil
	}
	reach := crossSupraAural
	if t.Insert {
		reach = crossInsert
	}
	return where(t.side(side), func(hz int, x Threshold) bool {
		return clearlyAbove(x, t.side(1-side).At(hz), reach)
	})
}

// notch: a frequency among 3000, 4000 and 6000 Hz is worse than both 2000 and 8000 Hz by 10 dB or more.
func notch(t *Tested, side int) []int {
	e := t.side(side)
	return where(e, func(hz int, x Threshold) bool {
		return hz >= 3000 && hz <= 6000 &&
			clearlyAbove(x, e.At(2000), notchDepth) && clearlyAbove(x, e.At(8000), notchDepth)
	})
}

// roomNoise: in both ears, 500 Hz is worse than both 1000 and 2000 Hz by 10 dB or more.
func roomNoise(t *Tested) (bool, []int) {
	for side := range 2 {
		e := t.side(side)
		if !clearlyAbove(e.At(500), e.At(1000), lowToneRise) || !clearlyAbove(e.At(500), e.At(2000), lowToneRise) {
			return false, nil
		}
	}
	return true, []int{500}
}
