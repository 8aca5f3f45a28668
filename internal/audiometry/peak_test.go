package audiometry_test

import (
	"math"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/audiometry"
)

// painpse is the pattern of NR-7 Annex II item 5.2 (secondary source): a threshold above 25 dB HL at 3000, 4000 or
// 6000 Hz, and higher than at the other tested frequencies.
var painpse = audiometry.Scheme{
	Of: "level", Rule: "peak", Frequencies: []int{3000, 4000, 6000}, Over: []int{500, 1000, 2000, 8000}, Above: "acceptable_level",
}

func TestPeakRule(t *testing.T) {
	freqs := []int{500, 1000, 2000, 3000, 4000, 6000, 8000}
	for name, c := range map[string]struct {
		now     []string
		verdict audiometry.Verdict
		shown   []int
		open    []int
	}{
		"notch at 4000":                        {[]string{"10", "10", "15", "25", "40", "30", "20"}, audiometry.Yes, []int{4000, 6000}, nil},
		"exactly 25 is acceptable":             {[]string{"10", "10", "15", "25", "25", "20", "20"}, audiometry.No, nil, nil},
		"a tenth above":                        {[]string{"10", "10", "15", "25", "25.1", "20", "20"}, audiometry.Yes, []int{4000}, nil},
		"others impaired, too, but less":       {[]string{"30", "30", "35", "35", "50", "45", "40"}, audiometry.Yes, []int{4000, 6000}, nil},
		"as high at 8000":                      {[]string{"10", "10", "15", "30", "40", "35", "40"}, audiometry.No, nil, nil},
		"higher at 500":                        {[]string{"45", "40", "30", "30", "40", "35", "20"}, audiometry.No, nil, nil},
		"no response at 6000":                  {[]string{"10", "10", "15", "25", "40", "NR>90", "90"}, audiometry.Yes, []int{6000}, nil},
		"no response at 8000 lies above":       {[]string{"10", "10", "15", "25", "40", "30", "NR>40"}, audiometry.No, nil, nil},
		"no response at 8000 may lie below":    {[]string{"10", "10", "15", "25", "40", "30", "NR>35"}, audiometry.Undecided, nil, []int{4000}},
		"no response at both":                  {[]string{"10", "10", "15", "25", "NR>90", "30", "NR>80"}, audiometry.Undecided, nil, []int{4000}},
		"8000 not tested":                      {[]string{"10", "10", "15", "25", "40", "30", "NT"}, audiometry.Undecided, nil, []int{4000, 6000}},
		"8000 not recorded, another higher":    {[]string{"10", "50", "15", "25", "40", "30", ""}, audiometry.No, nil, nil},
		"4000 not tested":                      {[]string{"10", "10", "15", "25", "NT", "20", "20"}, audiometry.Undecided, nil, []int{4000}},
		"4000 not tested, 6000 shows it":       {[]string{"10", "10", "15", "25", "NT", "35", "20"}, audiometry.Yes, []int{6000}, []int{4000}},
		"nothing above the level, one missing": {[]string{"10", "10", "15", "25", "20", "20", "NT"}, audiometry.No, nil, nil},
	} {
		got := painpse.Judge(nil, ear(t, freqs, c.now), nil, 25)
		assert.Equal(t, c.verdict, got.Verdict, name)
		assert.Equal(t, c.shown, got.Shown, name)
		assert.Equal(t, c.open, got.Open, name)
	}
	got := painpse.Judge(nil, ear(t, freqs, []string{"10", "10", "15", "25", "40", "NT", "NT"}), []int{9, 9, 9}, 25)
	assert.Equal(t, audiometry.Outcome{Verdict: audiometry.Undecided, Low: 40, High: math.Inf(1), Open: []int{4000, 6000}, Missing: []int{8000, 6000}}, got)
}

func TestPeakCheck(t *testing.T) {
	assert.NoError(t, painpse.Check())
	for want, change := range map[string]func(*audiometry.Scheme){
		"the rule peak is of a level and names in over the frequencies at which the level is lower": func(s *audiometry.Scheme) { s.Over = nil },
		"the scheme names frequencies in over, which only the rule peak has":                        func(s *audiometry.Scheme) { s.Rule = "any" },
		"the scheme has 12000 Hz, which no record holds":                                            func(s *audiometry.Scheme) { s.Over = []int{500, 12000} },
		"the frequencies of the scheme are not in rising order at 500 Hz":                           func(s *audiometry.Scheme) { s.Over = []int{1000, 500} },
	} {
		s := painpse
		change(&s)
		assert.EqualError(t, s.Check(), want)
	}
	change := painpse
	change.Of = ""
	assert.Error(t, change.Check())
	assert.Equal(t, audiometry.Undecided, change.Judge(nil, new(audiometry.Ear), nil, 25).Verdict)
}
