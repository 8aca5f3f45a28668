package acoustics

import (
	"fmt"
	"math"
)

// UKRealWorldAllowance is what is added in the United Kingdom to the level under a protector, in dB, because
// protectors are worn less well at work than in the laboratory (HSE guidance L108, from memory).
const UKRealWorldAllowance = 4

// RealWorld takes an allowance in dB, such as UKRealWorldAllowance, off the attenuation. Where that would
// make it negative, 0 dB is used and Clamped is set. An allowance that is negative or not a number changes
// nothing.
func (p Protected) RealWorld(allowance float64) Protected {
	if !(allowance > 0) {
		return p
	}
	how := p.working.and("attenuation less the real-world allowance = %s - %s = %s dB", p.Attenuation, allowance, p.Attenuation-allowance)
	return under(p.Level+p.Attenuation, p.Attenuation-allowance, how)
}

// WornFor gives the exposure if the protector is worn for a share of the noise, from 0 to 1, and the level
// is the same when it is not worn: L + 10 lg(share * 10^(-attenuation/10) + 1 - share) (from memory). It
// returns false if the share is not from 0 to 1.
func (p Protected) WornFor(share float64) (Protected, bool) {
	if !(share >= 0 && share <= 1) {
		return Protected{}, false
	}
	attenuation := -10 * math.Log10(share*math.Pow(10, -p.Attenuation/10)+1-share)
	if share == 1 {
		attenuation = p.Attenuation
	}
	how := p.working.and("worn for %s of the noise: attenuation = -10 lg(%s · 10^(-%s/10) + %s) = %s dB",
		share, share, p.Attenuation, 1-share, attenuation)
	worn := under(p.Level+p.Attenuation, attenuation+0, how)
	worn.Clamped = p.Clamped
	return worn, true
}

// Impulse is a kind of impulsive noise, as far as its peak under a protector goes.
type Impulse string

// The kinds of impulsive noise (EN 458, informative, from memory).
const (
	LowFrequency    Impulse = "low frequency"
	MediumFrequency Impulse = "medium frequency"
	HighFrequency   Impulse = "high frequency"
)

// peakAllowance is taken off M and L for peaks, in dB (EN 458, informative, from memory).
const peakAllowance = 5

// UnderPeak gives the peak level in dB(C) under a protector with the rating r: less H for impulses of high
// frequency, M - 5 for medium and L - 5 for low (EN 458, informative, from memory). It fails if the peak has
// no level or is not C-weighted, or if the kind of impulse is unknown.
func UnderPeak(peak Peak, r HML, kind Impulse) (Protected, error) {
	if !finite(peak.Level) {
		return Protected{}, fmt.Errorf("the peak has no level")
	}
	if peak.Weighting != C {
		return Protected{}, fmt.Errorf("the peak under a protector needs a C-weighted peak, and this one is weighted %q", peak.Weighting)
	}
	switch kind {
	case HighFrequency:
		return under(peak.Level, r.High, working{}.and("attenuation of the peak = H = %s dB", r.High)), nil
	case MediumFrequency:
		return under(peak.Level, r.Medium-peakAllowance, working{}.and("attenuation of the peak = M - 5 = %s - 5 = %s dB", r.Medium, r.Medium-peakAllowance)), nil
	case LowFrequency:
		return under(peak.Level, r.Low-peakAllowance, working{}.and("attenuation of the peak = L - 5 = %s - 5 = %s dB", r.Low, r.Low-peakAllowance)), nil
	}
	return Protected{}, fmt.Errorf("%q is not a kind of impulse", kind)
}
