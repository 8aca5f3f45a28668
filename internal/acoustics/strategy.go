package acoustics

import (
	"fmt"
	"math"
)

const (
	// microphoneUncertainty is u3 in dB, that of the place of the microphone (ISO 9612:2009 C.6, secondary
	// source).
	microphoneUncertainty = 1.0
	// coverage is the factor of the expanded uncertainty, one-sided 95 % (ISO 9612:2009 C.2, secondary
	// source).
	coverage = 1.65
	// timeSensitivity is 10 / ln 10 as ISO 9612:2009 C.3 prints it in c1b (secondary source).
	timeSensitivity = 4.34
)

// Instrument is a kind of measuring instrument.
type Instrument string

// The kinds of instrument that ISO 9612:2009 gives an uncertainty for.
const (
	ClassOneMeter Instrument = "class 1 sound level meter"
	ClassTwoMeter Instrument = "class 2 sound level meter"
	Exposimeter   Instrument = "personal sound exposure meter"
)

// Uncertainty gives u2 in dB, the standard uncertainty of the instrument: 0.7 for a meter of class 1, 1.5
// for one of class 2 and for a personal sound exposure meter (ISO 9612:2009 Table C.5, secondary source).
// It returns false for any other kind.
func (i Instrument) Uncertainty() (float64, bool) {
	switch i {
	case ClassOneMeter:
		return 0.7, true
	case ClassTwoMeter, Exposimeter:
		return 1.5, true
	}
	return 0, false
}

// Strategy is a way to sample the noise of a job.
type Strategy string

// The strategies of ISO 9612:2009 that sample the work as a whole; the third one samples tasks.
const (
	JobBased Strategy = "job-based" // clause 10: random samples over the group of workers
	FullDay  Strategy = "full-day"  // clause 11: whole days
)

// SampledResult is a daily exposure level found by the job-based or the full-day strategy.
type SampledResult struct {
	Strategy         Strategy
	Samples          int
	Level            float64 // dB(A), energy mean of the samples
	Spread           float64 // dB from the lowest sample to the highest
	U1               float64 // dB, standard deviation of the samples around their arithmetic mean
	C1U1             float64 // dB, what the sampling adds to the uncertainty
	Clamped          bool    // the samples lie outside Table C.4, see SamplingUncertainty
	EffectiveMinutes float64 // length of the working day
	LEX              float64 // dB(A), daily exposure level L_EX,8h, not rounded
	Instrument       Instrument
	U2, U3           float64 // dB, of the instrument and of the place of the microphone
	Standard         float64 // dB, combined standard uncertainty u
	Expanded         float64 // dB, U = 1.65 u, one-sided 95 %
}

// Sampled gives the daily exposure level and its uncertainty from the levels in dB(A) of samples or whole
// days and the effective length of the working day in minutes (ISO 9612:2009 clauses 10 and 11 and Annex
// C.4, seen in a secondary source): L + 10 lg(T/8 h) and u² = (c1u1)² + u2² + u3². Nothing is rounded on
// the way, so that a printed example that rounds may differ by 0.1 dB. The uncertainty does not hold for
// peaks.
//
// It fails if there are fewer than 3 levels, if one is not a finite number, if the working day is not above
// 0 and at most 24 hours, or if strategy or instrument are unknown.
func Sampled(strategy Strategy, levels []float64, effectiveMinutes float64, instrument Instrument) (SampledResult, error) {
	if strategy != JobBased && strategy != FullDay {
		return SampledResult{}, fmt.Errorf("%q is not a sampling strategy", strategy)
	}
	u2, ok := instrument.Uncertainty()
	if !ok {
		return SampledResult{}, fmt.Errorf("the uncertainty of an instrument of the kind %q is not known", instrument)
	}
	if len(levels) < 3 {
		return SampledResult{}, fmt.Errorf("an uncertainty needs at least 3 samples; %d are given", len(levels))
	}
	level, ok := EnergyMean(levels)
	if !ok {
		return SampledResult{}, fmt.Errorf("a sample has no level")
	}
	lex, ok := LEX8h(level, effectiveMinutes)
	if !ok {
		return SampledResult{}, fmt.Errorf("a working day of %g minutes is not above 0 and at most 24 hours", effectiveMinutes)
	}
	r := SampledResult{
		Strategy: strategy, Samples: len(levels), Level: level, Spread: spread(levels), U1: deviation(levels),
		EffectiveMinutes: effectiveMinutes, LEX: lex, Instrument: instrument, U2: u2, U3: microphoneUncertainty,
	}
	r.C1U1, r.Clamped, _ = SamplingUncertainty(r.Samples, r.U1)
	r.combine()
	return r, nil
}

// combine works out the uncertainty.
func (r *SampledResult) combine() {
	r.Standard = math.Sqrt(r.C1U1*r.C1U1 + r.U2*r.U2 + r.U3*r.U3)
	r.Expanded = coverage * r.Standard
}

// Working shows the formulas of the result with their numbers, one line a step.
func (r SampledResult) Working() []string {
	lines := []string{
		fmt.Sprintf("L = energy mean of %d samples = %.2f dB(A)", r.Samples, r.Level),
		fmt.Sprintf("L_EX,8h = %.2f + 10 lg(%s h / 8 h) = %.2f dB(A)", r.Level, number(r.EffectiveMinutes/60), r.LEX),
		fmt.Sprintf("u1 = standard deviation of the samples = %.4f dB", r.U1),
		fmt.Sprintf("c1u1 = %.4f dB for %d samples (Table C.4)", r.C1U1, r.Samples),
	}
	if r.Clamped {
		lines = append(lines, "the samples lie outside Table C.4, whose last row or column was used")
	}
	return append(lines,
		fmt.Sprintf("u² = %.4f² + %s² + %s² = %.4f, u = %.4f dB", r.C1U1, number(r.U2), number(r.U3), r.Standard*r.Standard, r.Standard),
		fmt.Sprintf("U = %s · %.4f = %.2f dB", number(coverage), r.Standard, r.Expanded))
}

// spread gives the distance in dB from the lowest level to the highest.
func spread(levels []float64) float64 {
	low, high := math.Inf(1), math.Inf(-1)
	for _, l := range levels {
		low, high = min(low, l), max(high, l)
	}
	return high - low
}

// deviation gives the standard deviation of two or more numbers around their arithmetic mean.
func deviation(x []float64) float64 {
	return math.Sqrt(squares(x) / float64(len(x)-1))
}

// squares gives the sum of the squared distances of numbers from their arithmetic mean.
func squares(x []float64) float64 {
	m := arithmeticMean(x)
	var sum float64
	for _, v := range x {
		sum += (v - m) * (v - m)
	}
	return sum
}

// arithmeticMean gives the mean of numbers near the first, and exactly the first if all are equal.
func arithmeticMean(x []float64) float64 {
	var sum float64
	for _, v := range x {
		sum += v - x[0]
	}
	return x[0] + sum/float64(len(x))
}
