package audiometry_test

import (
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
)

// TestSum: the limit of 25 dB is that of 29 CFR 1904.10(a). How no response and a missing frequency are
// treated is common practice, no source.
func TestSum(t *testing.T) {
	for name, c := range map[string]struct {
		entries []string
		want    audiometry.Sum
		reaches audiometry.Verdict
	}{
		"exactly 25":       {[]string{"20", "25", "30"}, audiometry.Sum{Tenths: 750, Count: 3}, audiometry.Yes},
		"a tenth short":    {[]string{"20", "25", "29.9"}, audiometry.Sum{Tenths: 749, Count: 3}, audiometry.No},
		"negative":         {[]string{"-5", "-10", "0"}, audiometry.Sum{Tenths: -150, Count: 3}, audiometry.No},
		"bound reaches":    {[]string{"0", "0", "NR>75"}, audiometry.Sum{Tenths: 750, Count: 3, AtLeast: true}, audiometry.Yes},
		"bound falls":      {[]string{"0", "0", "NR>70"}, audiometry.Sum{Tenths: 700, Count: 3, AtLeast: true}, audiometry.Undecided},
		"one not recorded": {[]string{"90", "", "90"}, audiometry.Sum{Tenths: 1800, Count: 2, Missing: []int{3000}}, audiometry.Undecided},
		"one not tested":   {[]string{"0", "0", "NT"}, audiometry.Sum{Count: 2, Missing: []int{4000}}, audiometry.Undecided},
		"nothing":          {[]string{"", "NT", ""}, audiometry.Sum{Missing: shiftFrequencies}, audiometry.Undecided},
	} {
		got := ear(t, shiftFrequencies, c.entries).Sum(shiftFrequencies)
		assert.Equal(t, c.want, got, name)
		assert.Equal(t, c.reaches, got.Reaches(25), name)
		average, ok := got.Average()
		assert.Equal(t, len(c.want.Missing) == 0, ok, name)
		if ok {
			assert.InDelta(t, float64(c.want.Tenths)/30, average, 1e-12, name)
		}
	}
}

func TestSumOfNoFrequencies(t *testing.T) {
	got := ear(t, shiftFrequencies, []int{30, 30, 30}).Sum(nil)
	assert.Equal(t, audiometry.Undecided, got.Reaches(25))
	_, ok := got.Average()
	assert.False(t, ok)
}

func TestFrequencyThatNoRecordHolds(t *testing.T) {
	got := ear(t, shiftFrequencies, []int{30, 30, 30}).Sum([]int{2000, 12000})
	assert.Equal(t, audiometry.Sum{Tenths: 300, Count: 1, Missing: []int{12000}}, got)
}

func TestVerdictWords(t *testing.T) {
	assert.Equal(t, "no yes undecided", audiometry.No.String()+" "+audiometry.Yes.String()+" "+audiometry.Undecided.String())
}

func TestNothingIsAllocated(t *testing.T) {
	before, now := ear(t, shiftFrequencies, []int{0, 0, 5}), ear(t, shiftFrequencies, []string{"10", "10", "NR>100"})
	aging := []int{1, 1, 3}
	var v audiometry.Verdict
	allocated := testing.AllocsPerRun(100, func() {
		v = now.Sum(shiftFrequencies).Reaches(25) + audiometry.Shift(before, now, shiftFrequencies, aging).Reaches(10)
	})
	assert.Zero(t, allocated)
	assert.Equal(t, audiometry.Yes+audiometry.Yes, v)
}

func BenchmarkSum(b *testing.B) {
	e := ear(b, shiftFrequencies, []int{20, 25, 30})
	b.ReportAllocs()
	for b.Loop() {
		if e.Sum(shiftFrequencies).Reaches(25) != audiometry.Yes {
			b.Fatal("25 dB not reached")
		}
	}
}

func BenchmarkShift(b *testing.B) {
	before, now := ear(b, shiftFrequencies, []int{10, 15, 15}), ear(b, shiftFrequencies, []int{20, 25, 30})
	aging := []int{1, 2, 2}
	b.ReportAllocs()
	for b.Loop() {
		if audiometry.Shift(before, now, shiftFrequencies, aging).Reaches(10) != audiometry.Yes {
			b.Fatal("10 dB not reached")
		}
	}
}

func BenchmarkParseThreshold(b *testing.B) {
	b.ReportAllocs()
	for b.Loop() {
		_, err := audiometry.ParseThreshold("NR>92.5")
		require.NoError(b, err)
	}
}
