package demo

import (
	"math/rand/v2"

	"hearduty/internal/audiometry"
)

// happening is what happens to a worker's hearing.
type happening uint8

const (
	nothing  happening = iota
	lasts              // the shift is there in every later test
	passes             // the next test no longer shows the shift
	accepted           // the shift is judged persistent and the test becomes the new baseline
	refuted            // a retest in time does not show the shift
)

// earsPlan says what happens, in which test (the baseline is test 0), and whether the hearing level is
// then bad enough for the injury log.
type earsPlan struct {
	happens    happening
	test       int
	recordable bool
	retest     bool // a retest in time confirms the shift
}

// earsPlans are the workers whose hearing shifts. The faults are planted on some of them.
var earsPlans = map[string]earsPlan{
	"K0102": {happens: lasts, test: 5, recordable: true}, "K0103": {happens: lasts, test: 5}, "K0104": {happens: lasts, test: 5},
	"K0105": {happens: lasts, test: 5, recordable: true}, "K0107": {happens: lasts, test: 5, recordable: true}, "K0108": {happens: lasts, test: 5, recordable: true},
	"K0109": {happens: accepted, test: 3}, "K0110": {happens: accepted, test: 5}, "K0111": {happens: lasts, test: 4}, "K0112": {happens: lasts, test: 5},
	"K0113": {happens: lasts, test: 5}, "K0114": {happens: lasts, test: 5}, "K0116": {happens: lasts, test: 5, recordable: true},
	"K0117": {happens: lasts, test: 5, recordable: true, retest: true}, "K0118": {happens: refuted, test: 4}, "K0119": {happens: lasts, test: 5},
	"K0126": {happens: passes, test: 4}, "K0127": {happens: passes, test: 4}, "K0128": {happens: accepted, test: 2, recordable: true},
	"L0003": {happens: accepted, test: 3, recordable: true, retest: true}, "L0006": {happens: passes, test: 4},
	"L0008": {happens: refuted, test: 2}, "L0012": {happens: passes, test: 3},
}

// tested are the frequencies of every test, in Hz.
var tested = [7]int{500, 1000, 2000, 3000, 4000, 6000, 8000}

// loss is the shift of the left ear at these frequencies, in dB: 13.3 dB on average over 2000 to 4000 Hz.
var loss = [len(tested)]int{0, 0, 10, 15, 15, 10, 5}

// hearing follows the thresholds of one worker from test to test, in steps of 5 dB.
type hearing struct {
	plan earsPlan
	base [2][len(tested)]int // left, right
	rng  *rand.Rand
}

func newHearing(p *person, at Date) *hearing {
	h := &hearing{plan: p.ears, rng: dice(p.id, "hearing")}
	older := max(0, (at.Year()-p.birth.Year()-30)/6) // one step for every six years over thirty
	for ear := range h.base {
		for i, hz := range tested {
			level := 5 * h.rng.IntN(3)
			if hz >= 3000 {
				level += 5 * min(older, 4) * i / len(tested)
			}
			h.base[ear][i] = level / 5 * 5
		}
	}
	if h.plan.happens != nothing {
		low := [len(tested)]int{5, 5, 0, 5, 5, 10, 10}
		if h.plan.recordable {
			low = [len(tested)]int{5, 10, 15, 20, 20, 25, 25}
		}
		h.base[0] = low
	}
	return h
}

// shifted says whether the left ear shows the shift in test n.
func (h *hearing) shifted(n int) bool {
	switch h.plan.happens {
	case lasts, accepted:
		return n >= h.plan.test
	case passes, refuted:
		return n == h.plan.test
	}
	return false
}

// test gives the thresholds of test n. Beside the planned shift they wander by 5 dB, age slowly, and never
// shift by 10 dB on average.
func (h *hearing) test(n int) (left, right audiometry.Ear) {
	var ears [2]audiometry.Ear
	for ear := range ears {
		center := h.base[ear]
		exact := ear == 0 && h.shifted(n) && h.plan.happens != accepted || n == 0 || ear == 0 && h.plan.happens == accepted && n == h.plan.test
		if ear == 0 && h.shifted(n) {
			for i := range center {
				center[i] += loss[i]
			}
		}
		level := center
		if !exact {
			for i := range level {
				level[i] += []int{-5, 0, 0, 0, 0, 5}[h.rng.IntN(6)]
				if n >= 4 && tested[i] >= 4000 && h.rng.IntN(2) == 0 {
					level[i] += 5
				}
			}
			level = calmed(level, center)
		}
		ears[ear] = toEar(level)
	}
	return ears[0], ears[1]
}

// retest gives the thresholds of a retest of the planned test: with the shift if it confirms it, else without.
func (h *hearing) retest() (left, right audiometry.Ear) {
	level := h.base[0]
	if h.plan.retest {
		for i := range level {
			level[i] += loss[i]
		}
	}
	return toEar(level), toEar(h.base[1])
}

// calmed keeps the change over 2000, 3000 and 4000 Hz between -5 and 5 dB on average.
func calmed(level, center [len(tested)]int) [len(tested)]int {
	for i := 2; i <= 4; i++ {
		sum := 0
		for j := 2; j <= 4; j++ {
			sum += level[j] - center[j]
		}
		if sum > 15 || sum < -15 {
			level[i] = center[i]
		}
	}
	return level
}

func toEar(level [len(tested)]int) audiometry.Ear {
	var ear audiometry.Ear
	for i, hz := range tested {
		ear[frequencyIndex(hz)] = audiometry.Threshold{Tenths: int16(10 * level[i]), State: audiometry.Measured}
	}
	return ear
}

func frequencyIndex(hz int) int {
	for i, f := range audiometry.Frequencies {
		if f == hz {
			return i
		}
	}
	panic("demo: no such test frequency")
}
