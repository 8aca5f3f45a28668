package audiometry

import (
	"fmt"
	"math"
)

// Edition is an edition of ISO 7029, by its year.
type Edition int

// The editions of ISO 7029.
const (
	ISO7029Of2000 Edition = 2000
	ISO7029Of2017 Edition = 2017
)

// ageCurve is the median of one sex at one frequency: a times (age - 18) to the power of b, in dB.
type ageCurve struct{ a, b float64 }

// curves2017 holds men and women by frequency in Hz (ISO 7029:2017 Table 1, secondary source).
var curves2017 = map[int][2]ageCurve{
	125:  {{2.50e-6, 3.841}, {6.16e-4, 2.451}},
	250:  {{1.39e-4, 2.832}, {3.98e-4, 2.568}},
	500:  {{4.59e-4, 2.537}, {2.61e-4, 2.708}},
	750:  {{5.70e-4, 2.512}, {2.25e-4, 2.775}},
	1000: {{7.02e-4, 2.494}, {2.21e-4, 2.805}},
	1500: {{1.09e-3, 2.446}, {2.53e-4, 2.813}},
	2000: {{1.56e-3, 2.404}, {3.12e-4, 2.792}},
	3000: {{2.54e-3, 2.350}, {4.88e-4, 2.728}},
	4000: {{3.40e-3, 2.325}, {7.37e-4, 2.660}},
	6000: {{4.53e-3, 2.315}, {1.47e-3, 2.539}},
	8000: {{5.06e-3, 2.328}, {2.53e-3, 2.439}},
}

// curves2000 holds men and women by frequency in Hz (ISO 7029:2000 and database A of ISO 1999:1990, both from
// memory). Its frequencies are those that are remembered, not all of the standard.
var curves2000 = map[int][2]ageCurve{
	500:  {{.0035, 2}, {.0035, 2}},
	1000: {{.0040, 2}, {.0040, 2}},
	2000: {{.0070, 2}, {.0060, 2}},
	3000: {{.0115, 2}, {.0075, 2}},
	4000: {{.0160, 2}, {.0090, 2}},
	6000: {{.0180, 2}, {.0120, 2}},
}

const (
	youngestAge = 18 // years; the age that the medians are counted from
	oldestAge   = 70 // years
	oldestLow   = 80 // years, at frequencies up to lowHz in the edition of 2017
	lowHz       = 2000
)

// AgeMedian gives the median hearing threshold in dB, over that of people of 18, of ear-healthy people of a
// sex ("female" or "male") and an age of 18 to 70 years, and of up to 80 years for frequencies up to 2000 Hz
// in the edition of 2017. The editions differ by several dB. It fails for other ages, sexes, frequencies and
// editions. It is for information only: it describes a population and never explains or judges the hearing
// of one person, and it is no age correction of any law. The fractiles of the standard are not held here.
func AgeMedian(edition Edition, sex string, age, hz int) (float64, error) {
	curves, oldest := curves2017, oldestAge
	switch edition {
	case ISO7029Of2017:
		if hz <= lowHz {
			oldest = oldestLow
		}
	case ISO7029Of2000:
		curves = curves2000
	default:
		return 0, fmt.Errorf("there is no table for an edition %d of ISO 7029; use 2000 or 2017", int(edition))
	}
	pair, ok := curves[hz]
	if !ok {
		return 0, fmt.Errorf("the table of ISO 7029:%d has no values for %d Hz", int(edition), hz)
	}
	if age < youngestAge || age > oldest {
		return 0, fmt.Errorf("ISO 7029 covers %d to %d years at %d Hz, not %d", youngestAge, oldest, hz, age)
	}
	curve := pair[0]
	switch sex {
	case "male":
	case "female":
		curve = pair[1]
	default:
		return 0, fmt.Errorf("ISO 7029 has no values for the sex %q", sex)
	}
	return curve.a * math.Pow(float64(age-youngestAge), curve.b), nil
}
