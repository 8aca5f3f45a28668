package audiometry_test

import (
	"regexp"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/audiometry"
)

var testedFrequencies = []int{500, 1000, 2000, 3000, 4000, 6000, 8000}

// ordinary is a test that gives no cause for a remark.
func ordinary(t require.TestingT) *audiometry.Tested {
	return &audiometry.Tested{Ears: audiometry.Ears{
		Left:  ear(t, testedFrequencies, []int{10, 5, 10, 15, 15, 20, 15}),
		Right: ear(t, testedFrequencies, []int{5, 5, 10, 10, 15, 20, 20}),
	}}
}

// shown writes kind, ear and frequencies of what Observe finds.
func shown(t *audiometry.Tested) map[string][]int {
	found := map[string][]int{}
	for _, o := range audiometry.Observe(t) {
		found[o.Kind+" "+o.Ear] = o.Frequencies
	}
	return found
}

func TestOrdinaryTestGivesNoRemark(t *testing.T) {
	assert.Empty(t, audiometry.Observe(ordinary(t)))
}

// TestObserve: what each check looks for and its source stand in observe.go and beside each check.
func TestObserve(t *testing.T) {
	at := func(entries ...string) *audiometry.Ear { return ear(t, testedFrequencies, entries) }
	usual := ordinary(t)
	for name, c := range map[string]struct {
		change func(*audiometry.Tested)
		want   map[string][]int
	}{
		"missing frequency": {func(x *audiometry.Tested) {
			x.Required, x.Left = []int{500, 1000, 6000}, at("10", "NT", "10", "15", "15", "", "15")
		}, map[string][]int{"missing_frequency left": {1000, 6000}}},
		"out of range": {func(x *audiometry.Tested) {
			x.Right, x.Masked, x.Left = at("-15", "125", "120", "110", "115", "110", "115"), true, at("-5", "120", "115", "105", "110", "110", "110")
		}, map[string][]int{"out_of_range right": {500, 1000, 8000}, "at_limit right": {2000}, "at_limit left": {1000, 8000}}},
		"off steps": {func(x *audiometry.Tested) { x.Left = at("10", "7", "10", "12.5", "15", "20", "15") },
			map[string][]int{"off_steps left": {1000, 3000}}},
		"off steps of a fine audiometer": {func(x *audiometry.Tested) {
			x.Left, x.FineSteps = at("10", "7", "10", "12.5", "15", "20", "15"), true
		}, map[string][]int{}},
		"no response": {func(x *audiometry.Tested) {
			x.Left, x.Right = at("60", "65", "70", "80", "NR>100", "95", "95"), at("55", "65", "70", "80", "95", "95", "90")
		}, map[string][]int{"at_limit left": {4000}}},
		"all zero": {func(x *audiometry.Tested) { x.Left = at("0", "0", "0", "0", "", "", "") },
			map[string][]int{"all_zero left": nil}},
		"three zeros": {func(x *audiometry.Tested) { x.Left = at("0", "0", "0", "", "", "", "") }, map[string][]int{}},
		"flat in both ears": {func(x *audiometry.Tested) {
			x.Left, x.Right = at("15", "15", "15", "15", "15", "15", "15"), at("15", "15", "15", "15", "15", "15", "15")
		}, map[string][]int{"flat left": nil, "flat right": nil}},
		"identical ears": {func(x *audiometry.Tested) { x.Left = x.Right }, map[string][]int{"identical_ears both": nil}},
		"identical to an earlier test": {func(x *audiometry.Tested) {
			x.Earlier = []audiometry.Ears{usual.Ears, {Left: usual.Right, Right: usual.Right}}
		}, map[string][]int{"identical_earlier both": nil}},
		"one ear identical to an earlier test": {func(x *audiometry.Tested) {
			x.Earlier = []audiometry.Ears{{Left: usual.Left, Right: usual.Left}}
		}, map[string][]int{}},
		"improbable improvement": {func(x *audiometry.Tested) {
			x.Earlier = []audiometry.Ears{{Left: at("10", "5", "30", "40", "NR>40", "20", "15"), Right: at("5", "5", "10", "10", "40", "40", "20")}}
		}, map[string][]int{"improbable_improvement left": {3000, 4000}}},
		"improvement before the last test": {func(x *audiometry.Tested) {
			x.Earlier = []audiometry.Ears{{Left: at("10", "5", "60", "60", "60", "20", "15"), Right: usual.Right}, {Left: usual.Right, Right: usual.Right}}
		}, map[string][]int{}},
		"repeat": {func(x *audiometry.Tested) {
			x.Repeat = [2]audiometry.Threshold{{Tenths: 150, State: audiometry.Measured}, {Tenths: 100, State: audiometry.Measured}}
		}, map[string][]int{"repeat_difference left": {1000}}},
		"asymmetry": {func(x *audiometry.Tested) { x.Left = at("10", "20", "30", "30", "15", "35", "15") },
			map[string][]int{"asymmetry left": {1000, 2000, 3000}}},
		"asymmetry across a gap": {func(x *audiometry.Tested) { x.Left = at("10", "5", "25", "NT", "30", "20", "15") },
			map[string][]int{"asymmetry left": {2000, 4000}}},
		"cross hearing": {func(x *audiometry.Tested) { x.Right = at("5", "5", "10", "10", "15", "NR>60", "20") },
			map[string][]int{"cross_hearing right": {6000}, "at_limit right": {6000}, "notch right": {6000}}},
		"masked": {func(x *audiometry.Tested) { x.Masked, x.Right = true, at("5", "5", "10", "10", "15", "20", "60") }, map[string][]int{}},
		"insert": {func(x *audiometry.Tested) { x.Insert, x.Right = true, at("5", "5", "10", "10", "15", "20", "65") }, map[string][]int{}},
		"notch": {func(x *audiometry.Tested) { x.Left = at("10", "5", "10", "20", "25", "15", "15") },
			map[string][]int{"notch left": {4000}}},
		"no notch without 8000 Hz": {func(x *audiometry.Tested) { x.Left = at("10", "5", "10", "20", "25", "15", "") }, map[string][]int{}},
		"room noise": {func(x *audiometry.Tested) {
			x.Left, x.Right = at("20", "5", "10", "10", "15", "20", "15"), at("25", "10", "5", "10", "15", "20", "15")
		}, map[string][]int{"room_noise both": {500}}},
		"low tones raised in one ear": {func(x *audiometry.Tested) { x.Left = at("20", "5", "10", "10", "15", "20", "15") }, map[string][]int{}},
	} {
		x := ordinary(t)
		c.change(x)
		assert.Equal(t, c.want, shown(x), name)
	}
}

func TestObservationKindsHaveASource(t *testing.T) {
	seen := map[string]bool{}
	for _, k := range audiometry.ObservationKinds() {
		assert.NotEmpty(t, k.Source, k.Kind)
		assert.False(t, seen[k.Kind], k.Kind)
		seen[k.Kind] = true
	}
	assert.Len(t, seen, 14)
}

// TestObservationsGiveNoFigures: audiograms are medical records.
func TestObservationsGiveNoFigures(t *testing.T) {
	figure := regexp.MustCompile(`[0-9]|dB`)
	sentence := regexp.MustCompile(`^[A-Z].*\.$`)
	rapid.Check(t, func(t *rapid.T) {
		x := &audiometry.Tested{
			Ears:     audiometry.Ears{Left: drawMixedEar(t, "left"), Right: drawMixedEar(t, "right")},
			Required: []int{500, 1000, 12000},
			Earlier:  []audiometry.Ears{{Left: drawMixedEar(t, "left before"), Right: drawMixedEar(t, "right before")}},
		}
		order := map[string]int{}
		for i, k := range audiometry.ObservationKinds() {
			order[k.Kind] = i
		}
		last := -1
		for _, o := range audiometry.Observe(x) {
			require.NotRegexp(t, figure, o.Text)
			require.Regexp(t, sentence, o.Text)
			require.Contains(t, []string{"left", "right", "both"}, o.Ear)
			require.GreaterOrEqual(t, order[o.Kind], last)
			last = order[o.Kind]
		}
	})
}

// TestSwappedEarsGiveSwappedObservations: no check favours an ear.
func TestSwappedEarsGiveSwappedObservations(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		l, r := drawMixedEar(t, "left"), drawMixedEar(t, "right")
		one := shown(&audiometry.Tested{Ears: audiometry.Ears{Left: l, Right: r}})
		two := shown(&audiometry.Tested{Ears: audiometry.Ears{Left: r, Right: l}})
		require.Len(t, two, len(one))
		for _, k := range audiometry.ObservationKinds() {
			require.Equal(t, one[k.Kind+" left"], two[k.Kind+" right"])
			require.Equal(t, one[k.Kind+" right"], two[k.Kind+" left"])
		}
	})
}

// TestVaried: near-normal hearing, which many share, is not varied.
func TestVaried(t *testing.T) {
	at := func(entries ...string) *audiometry.Ear { return ear(t, testedFrequencies, entries) }
	for _, c := range []struct {
		left, right *audiometry.Ear
		want        bool
	}{
		{at("0", "5", "10", "15", "", "", ""), at("0", "0", "0", "0", "", "", ""), true},
		{at("0", "5", "10", "10", "", "", ""), at("0", "0", "0", "15", "", "", ""), true},
		{at("0", "5", "10", "10", "5", "0", "5"), at("0", "5", "0", "10", "5", "0", "5"), false},
		{at("0", "5", "10", "NT", "5", "", ""), at("0", "5", "0", "10", "5", "", ""), false},
		{at("0", "5", "10", "NR>100", "5", "", ""), at("0", "5", "0", "10", "5", "", ""), true},
		{at("0", "5", "10", "15", "20", "", ""), at("0", "5", "20", "NT", "", "", ""), false},
		{new(audiometry.Ear), new(audiometry.Ear), false},
	} {
		assert.Equal(t, c.want, audiometry.Varied(c.left, c.right))
		assert.Equal(t, c.want, audiometry.Varied(c.right, c.left))
	}
}
