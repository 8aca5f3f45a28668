package acoustics

import (
	"errors"
	"fmt"
)

// Z is the weighting of a peak that was measured unweighted.
const Z Weighting = "Z"

// Peak is a peak level with the weighting it was measured with.
type Peak struct {
	Level     float64   // dB
	Weighting Weighting // C in Europe and Australia, Z (unweighted) in 29 CFR 1910.95(b)
}

// HighestPeak gives the highest of the peaks of a day. Peaks do not add up by energy. Peaks of different
// weightings cannot be compared, so then there is no highest.
//
// It fails if there are no peaks, if a level is not a finite number, if a weighting is not recorded, or if
// the weightings differ.
func HighestPeak(peaks []Peak) (Peak, error) {
	if len(peaks) == 0 {
		return Peak{}, errors.New("there are no peaks, so there is no highest")
	}
	highest := peaks[0]
	for i, p := range peaks {
		if !finite(p.Level) {
			return Peak{}, fmt.Errorf("peak %d has no level", i+1)
		}
		if p.Weighting == "" {
			return Peak{}, fmt.Errorf("peak %d has no weighting on record", i+1)
		}
		if p.Weighting != highest.Weighting {
			return Peak{}, fmt.Errorf("the peaks are weighted %s and %s, which cannot be compared", highest.Weighting, p.Weighting)
		}
		highest.Level = max(highest.Level, p.Level)
	}
	return highest, nil
}
