package audiometry

import (
	"fmt"
	"math"
)

// The widths of frequency bands.
const (
	Octave      = "octave"
	ThirdOctave = "third-octave"
)

// Band is a sound pressure level, or another figure in dB, at a frequency or in the band around it.
type Band struct {
	Hz float64 `json:"hz" doc:"centre frequency, Hz"`
	DB float64 `json:"db" doc:"level, dB"`
}

// BandSet holds bands of one width: a survey of the background noise in a test room, or the highest levels
// that are allowed in it.
type BandSet struct {
	Name      string `json:"name,omitempty" doc:"name of the set"`
	Width     string `json:"width" enum:"octave|third-octave" doc:"width of the bands"`
	Earphones string `json:"earphones,omitempty" enum:"supra_aural|circumaural|insert|open_ear" doc:"earphones that it holds for"`
	Bands     []Band `json:"bands" doc:"levels by band"`
	Source    string `json:"source,omitempty" doc:"where the figures come from"`
}

// BandOver is a band whose level lies over its limit.
type BandOver struct{ Hz, DB, LimitDB float64 }

// RoomResult is what a survey of a test room shows.
type RoomResult struct {
	Within  Verdict    // whether no band is over its limit; Undecided if none is, but bands are missing
	Over    []BandOver // bands over their limit, in the order of the limits
	Missing []float64  // bands, by centre frequency in Hz, that have a limit but no level
}

// Compare holds a survey against the limits of a set. A level at the limit is within it; levels are compared
// to the nearest 0.1 dB. Bands of the survey without a limit do not matter. It fails if the bands differ in
// width, since a level in octaves says nothing of its thirds, or if the set has no limits.
func (limits BandSet) Compare(survey BandSet) (RoomResult, error) {
	if limits.Width != survey.Width {
		return RoomResult{Within: Undecided}, fmt.Errorf("the survey is in %s bands and the limits are in %s bands", survey.Width, limits.Width)
	}
	if len(limits.Bands) == 0 {
		return RoomResult{Within: Undecided}, fmt.Errorf("the set of limits has no bands")
	}
	r := RoomResult{Within: Yes}
	for _, limit := range limits.Bands {
		level, ok := survey.at(limit.Hz)
		switch {
		case !ok || math.IsNaN(level):
			r.Missing = append(r.Missing, limit.Hz)
		case math.Round(level*10) > math.Round(limit.DB*10):
			r.Over = append(r.Over, BandOver{limit.Hz, level, limit.DB})
		}
	}
	switch {
	case len(r.Over) > 0:
		r.Within = No
	case len(r.Missing) > 0:
		r.Within = Undecided
	}
	return r, nil
}

// at gives the level of a band by its centre frequency in Hz.
func (b BandSet) at(hz float64) (float64, bool) {
	for _, band := range b.Bands {
		if band.Hz == hz {
			return band.DB, true
		}
	}
	return 0, false
}

// Raised gives the limits with dB added to each, such as the 8 dB for a masking of 5 dB in place of 2 dB, or
// the lowest hearing level that is to be tested (ISO 8253-1:2010, secondary source).
func (limits BandSet) Raised(dB float64) BandSet {
	bands := make([]Band, len(limits.Bands))
	for i, b := range limits.Bands {
		bands[i] = Band{b.Hz, b.DB + dB}
	}
	limits.Bands = bands
	return limits
}
