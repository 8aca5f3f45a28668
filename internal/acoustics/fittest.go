package acoustics

import (
	"math"

	"gonum.org/v1/gonum/stat/distuv"
)

// PAR is a personal attenuation rating: what a fit test found for one wearer and one protector. It says
// nothing of another model or size.
type PAR struct {
	Attenuation float64 // dB off an A-weighted level
	Percent     float64 // the share of wearings, in percent, that reach at least this attenuation
	Uncertainty float64 // dB, combined standard uncertainty; 0 or more
}

// CombinedUncertainty gives the root of the sum of squares of standard uncertainties in dB, for a fit test
// those of measurement, fitting and spectrum (as ANSI/ASA S12.71 is summarised in a secondary source). It
// returns false if there are none, or if one is negative or not a finite number.
func CombinedUncertainty(u ...float64) (float64, bool) {
	var sum float64
	for _, x := range u {
		if !finite(x) || x < 0 {
			return 0, false
		}
		sum += x * x
	}
	return math.Sqrt(sum), len(u) > 0
}

// At gives the rating at another share of wearings in percent, attenuation + (z(from) - z(to)) * uncertainty,
// where z is the quantile of the standard normal distribution (from memory; ANSI/ASA S12.71 is the
// framework). It returns false if a number of the rating is missing, the uncertainty is negative, or a share
// is not between 0 and 100.
func (r PAR) At(percent float64) (PAR, bool) {
	if !finite(r.Attenuation) || !finite(r.Uncertainty) || r.Uncertainty < 0 || !between0and100(r.Percent) || !between0and100(percent) {
		return PAR{}, false
	}
	normal := distuv.UnitNormal
	z := normal.Quantile(r.Percent/100) - normal.Quantile(percent/100)
	return PAR{Attenuation: r.Attenuation + z*r.Uncertainty, Percent: percent, Uncertainty: r.Uncertainty}, true
}

// UnderPAR gives the exposure in dB(A) under a protector that was fit tested, for an A-weighted level in dB
// and the share of wearings in percent to be covered, L_A - PAR. It returns false where PAR.At does, or if
// the level is not a finite number.
func UnderPAR(la float64, r PAR, percent float64) (Protected, bool) {
	at, ok := r.At(percent)
	if !ok || !finite(la) {
		return Protected{}, false
	}
	how := working{}.and("PAR found for %s %% of wearings = %s dB", r.Percent, r.Attenuation)
	if percent != r.Percent {
		how = how.and("PAR for %s %% of wearings, with an uncertainty of %s dB = %s dB", percent, r.Uncertainty, at.Attenuation)
	}
	return under(la, at.Attenuation, how), true
}

func between0and100(percent float64) bool {
	return percent > 0 && percent < 100
}
