package acoustics

import "math"

// The coefficients that the law and the recommended exposure limit print for the two common exchange
// rates. They differ a little from exchange / lg 2, which is 16.6096 and 9.9658.
const (
	coefficientFive  = 16.61 // 29 CFR 1910.95 App. A I(2) and II
	coefficientThree = 10.0  // NIOSH criteria document, draft of 1996, footnote: 10 lg(D/100) + 85
)

func (s Scale) coefficient() float64 {
	switch s.Exchange {
	case 5:
		return coefficientFive
	case 3:
		return coefficientThree
	}
	return s.Exchange / math.Log10(2)
}

// TWA gives the eight-hour time-weighted average level in dB of a dose in percent, coefficient *
// lg(D/100) + criterion (29 CFR 1910.95 App. A II), not rounded. The coefficient is 16.61 for an exchange
// of 5 dB, 10 for 3 dB, and exchange / lg 2 for any other. It always refers to 8 hours, whatever the
// length of the shift. It returns false if the dose is not a finite number above 0 or the scale has no
// exchange rate.
//
// A dose of exactly 50 % on the scale 90/5 gives 84.99989 dB. Compare doses with a limit, or compare
// TWAReported; never this value.
func (s Scale) TWA(dosePct float64) (float64, bool) {
	if !(dosePct > 0) || !finite(dosePct) || !(s.Exchange > 0) {
		return 0, false
	}
	return s.coefficient()*math.Log10(dosePct/100) + s.Criterion, true
}

// TWAReported gives the time-weighted average rounded to 0.1 dB, as 29 CFR 1910.95 Table A-1 prints it.
// It returns false where TWA does.
func (s Scale) TWAReported(dosePct float64) (float64, bool) {
	twa, ok := s.TWA(dosePct)
	return RoundTenth(twa), ok
}

// DoseOfTWA gives the dose in percent that belongs to a time-weighted average level in dB. It is the
// inverse of TWA, with the same coefficient, and so gives 50.0004 % for 85 dB on the scale 90/5.
func (s Scale) DoseOfTWA(twa float64) float64 {
	return 100 * math.Pow(10, (twa-s.Criterion)/s.coefficient())
}

// RoundTenth rounds a level to 0.1 dB, and halves up towards louder, as 29 CFR 1910.95 Table A-1 does.
// Most halves, such as 85.05, have no exact binary form and may lie a hair below the half, so a value
// within 1e-10 dB under a half is taken as the half.
func RoundTenth(x float64) float64 {
	return math.Floor(x*10+0.5+1e-9) / 10
}

// Project gives the dose in percent of a shift of shiftMinutes, part of which was sampled for ranMinutes
// with the dose dosePct: dose * shift / run (linear projection; common practice, no source). It holds
// only if the sample stands for the whole shift, which is for the caller to know. The result is a dose
// on the scale of the sample. It returns false if the dose is negative or not a finite number, or a time
// is not above 0 and at most 24 hours.
func (s Scale) Project(dosePct, ranMinutes, shiftMinutes float64) (float64, bool) {
	if !(dosePct >= 0) || !finite(dosePct) || !withinDay(ranMinutes) || !withinDay(shiftMinutes) {
		return 0, false
	}
	return dosePct * shiftMinutes / ranMinutes, true
}

func withinDay(minutes float64) bool {
	return minutes > 0 && minutes <= dayMinutes+timeSlack
}
