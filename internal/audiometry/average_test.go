package audiometry_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/audiometry"
)

// TestPureToneAverages is worked by hand; which frequencies the averages have is from memory.
func TestPureToneAverages(t *testing.T) {
	e := ear(t, []int{500, 1000, 2000, 3000, 4000, 6000}, []int{10, 20, 30, 40, 60, 80})
	for name, c := range map[string]struct {
		freqs []int
		want  float64
	}{
		"PTA3": {audiometry.PTA3[:], 20}, "PTA4": {audiometry.PTA4[:], 30},
		"low": {audiometry.Low[:], 20}, "high": {audiometry.High[:], 60}, "any set": {[]int{500, 6000}, 45},
	} {
		got, ok := e.Sum(c.freqs).Average()
		assert.True(t, ok, name)
		assert.InDelta(t, c.want, got, 1e-12, name)
	}
}

func TestWorseEar(t *testing.T) {
	for name, c := range map[string]struct {
		left, right   []string
		worse, better string
	}{
		"right":                     {[]string{"10", "10", "10"}, []string{"10", "10", "15"}, "right", "left"},
		"left":                      {[]string{"40", "10", "10"}, []string{"20", "10", "10"}, "left", "right"},
		"equal sums":                {[]string{"10", "20", "30"}, []string{"30", "20", "10"}, "both", "both"},
		"no response decides":       {[]string{"90", "90", "90"}, []string{"90", "90", "NR>90"}, "right", "left"},
		"no response does not":      {[]string{"95", "90", "90"}, []string{"90", "90", "NR>90"}, "", ""},
		"no response on the left":   {[]string{"NR>90", "90", "90"}, []string{"80", "90", "90"}, "left", "right"},
		"no response on both sides": {[]string{"NR>90", "90", "90"}, []string{"0", "0", "NR>90"}, "", ""},
		"missing":                   {[]string{"", "90", "90"}, []string{"0", "0", "0"}, "", ""},
	} {
		left, right := ear(t, shiftFrequencies, c.left), ear(t, shiftFrequencies, c.right)
		worse, ok := audiometry.WorseEar(left, right, shiftFrequencies)
		assert.Equal(t, c.worse, worse, name)
		assert.Equal(t, c.worse != "", ok, name)
		better, _ := audiometry.BetterEar(left, right, shiftFrequencies)
		assert.Equal(t, c.better, better, name)
	}
}

func TestTotalReaches(t *testing.T) {
	sum := ear(t, shiftFrequencies, []string{"20", "30", "NR>100"}).Sum(shiftFrequencies)
	assert.Equal(t, audiometry.Yes, sum.TotalReaches(150))
	assert.Equal(t, audiometry.Undecided, sum.TotalReaches(150.1))
	assert.Equal(t, audiometry.No, ear(t, shiftFrequencies, []int{20, 30, 40}).Sum(shiftFrequencies).TotalReaches(91))
	assert.Equal(t, audiometry.Undecided, audiometry.Sum{}.TotalReaches(0))
	missing := ear(t, shiftFrequencies, []string{"90", "90", ""}).Sum(shiftFrequencies)
	assert.Equal(t, audiometry.Undecided, missing.TotalReaches(10))
}
