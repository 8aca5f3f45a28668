package acoustics

import (
	"fmt"
	"math"
)

// twaTolerance is how far in dB a reported average may lie from that of its dose. Doses and averages are
// printed to a tenth, and instruments use 16.61 or 16.6096 (own choice).
const twaTolerance = 0.2

// Reading is a dose that an instrument shows on one of its scales.
type Reading struct {
	Scale   Scale
	DosePct float64 // percent
}

// DoubtReadings compares two doses of one instrument and one run, and gives a sentence if they cannot both
// be right: a lower threshold lets more noise count, so it never has the smaller dose. It gives the empty
// text if nothing is wrong, or if the scales differ in more than the ends of their range and say nothing of
// each other.
func DoubtReadings(a, b Reading) string {
	if a.Scale.Criterion != b.Scale.Criterion || a.Scale.Exchange != b.Scale.Exchange {
		return ""
	}
	if a.Scale.Threshold > b.Scale.Threshold {
		a, b = b, a
	}
	if a.Scale.Threshold == b.Scale.Threshold || !(b.DosePct > a.DosePct) {
		return ""
	}
	return fmt.Sprintf("the dose of %g %% counted from %g dB is above the %g %% counted from %g dB, which cannot be",
		b.DosePct, b.Scale.Threshold, a.DosePct, a.Scale.Threshold)
}

// DoubtTWA compares a time-weighted average in dB with the dose in percent it is reported with, and gives a
// sentence if they lie more than 0.2 dB apart; it says so if the average is that of the time the instrument
// ran, in minutes (0 = not known), and not of 8 hours. It gives the empty text if nothing is wrong or there
// is nothing to compare.
func (s Scale) DoubtTWA(dosePct, twa, ranMinutes float64) string {
	if !finite(twa) || !finite(dosePct) || dosePct < 0 || !(s.Exchange > 0) {
		return ""
	}
	if dosePct == 0 {
		return fmt.Sprintf("a dose of 0 %% has no time-weighted average, but %g dB is reported", twa)
	}
	own, _ := s.TWA(dosePct)
	if near(own, twa) {
		return ""
	}
	if average, ok := s.AverageLevel(dosePct, ranMinutes); ok && near(average, twa) {
		return fmt.Sprintf("%g dB is the average of the %g minutes the instrument ran; a dose of %g %% has a time-weighted average of %.1f dB over 8 hours",
			twa, ranMinutes, dosePct, own)
	}
	return fmt.Sprintf("a dose of %g %% has a time-weighted average of %.1f dB, but %g dB is reported", dosePct, own, twa)
}

func near(a, b float64) bool {
	return math.Abs(a-b) <= twaTolerance+levelSlack
}
