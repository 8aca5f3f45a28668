// Package acoustics works on sound levels, noise dose and the attenuation of hearing protectors.
//
// Levels are in dB, times in minutes and doses in percent. Where a quantity does not exist, such as the
// level of silence or the time-weighted average of no dose, a function returns false and never 0 dB.
package acoustics

import (
	"errors"
	"fmt"
	"math"
)

const (
	criterionMinutes = 480  // the eight hours that every criterion level is set for
	dayMinutes       = 1440 // 24 hours
	timeSlack        = 1e-6 // minutes by which a sum of times may pass 24 h through binary rounding alone
	levelSlack       = 1e-9 // dB by which a difference of two levels may miss a bound through binary rounding alone
)

// Scale says how a noise dose is counted. All fields are in dB.
type Scale struct {
	Criterion float64 // the level that gives a dose of 100 % in 480 minutes
	Exchange  float64 // the rise in level that halves the time allowed; above 0
	Threshold float64 // levels below it do not count; levels at it do; 0 = none
	Upper     float64 // the least upper end of an instrument's range; levels above it still count; 0 = none
}

// Segment is a part of the day spent at one A-weighted level.
type Segment struct {
	Level   float64 // dB(A)
	Minutes float64 // 0 or more
}

// ReferenceMinutes gives the time in minutes in which a steady level gives a dose of 100 %:
// T = 480 / 2^((L - criterion) / exchange), 29 CFR 1910.95 App. A, Table G-16a footnote. An exchange of
// 3 dB is used in this halving form too. The threshold is not looked at. The result is above 0 for every
// finite level, and NaN or infinite if the exchange is 0.
func (s Scale) ReferenceMinutes(level float64) float64 {
	return criterionMinutes / math.Exp2((level-s.Criterion)/s.Exchange)
}

// Dose gives the dose of a day in percent, 100 times the sum of C/T over its segments (29 CFR 1910.95
// App. A I(1)). Levels at the threshold count and levels below it do not; levels above the upper end
// count. A day of segments that do not count has the dose 0.
//
// The sum is taken over C * 2^((L - criterion) / exchange) and divided by 480 at the end. This is the
// same quantity, and whole minutes at whole multiples of the exchange rate give a dose without rounding:
// a day at 85 dB on the scale 90/5 has exactly 50 % however it is cut.
//
// It fails if there are no segments, if a level or a time is not a finite number, if a time is negative,
// if the times add up to more than 24 hours, or if the scale has no exchange rate.
func (s Scale) Dose(day []Segment) (float64, error) {
	if !(s.Exchange > 0) || !finite(s.Exchange) || !finite(s.Criterion) {
		return 0, errors.New("the scale needs a criterion level and an exchange rate above 0 dB")
	}
	if len(day) == 0 {
		return 0, errors.New("there are no segments, so there is no dose")
	}
	var total, weighted float64
	for i, seg := range day {
		if !finite(seg.Level) {
			return 0, fmt.Errorf("segment %d has no level", i+1)
		}
		if !finite(seg.Minutes) {
			return 0, fmt.Errorf("segment %d has no length of time", i+1)
		}
		if seg.Minutes < 0 {
			return 0, fmt.Errorf("segment %d lasts %g minutes; a time cannot be negative", i+1, seg.Minutes)
		}
		total += seg.Minutes
		if s.counts(seg.Level) {
			weighted += seg.Minutes * math.Exp2((seg.Level-s.Criterion)/s.Exchange)
		}
	}
	if total > dayMinutes+timeSlack {
		return 0, fmt.Errorf("the segments last %g minutes together; a day has 1440", total)
	}
	return weighted * 100 / criterionMinutes, nil
}

func (s Scale) counts(level float64) bool {
	return s.Threshold == 0 || level >= s.Threshold
}

// Measures says whether a dose taken with the settings of other may be read as a dose on s. Criterion,
// exchange rate and threshold must be the same, and the upper end of other must not lie below that of s.
// On both sides an upper end of 0 means that there is none. A dose taken on another scale is never
// converted: the levels behind it are lost.
func (s Scale) Measures(other Scale) bool {
	if s.Criterion != other.Criterion || s.Exchange != other.Exchange || s.Threshold != other.Threshold {
		return false
	}
	if other.Upper == 0 {
		return true
	}
	return s.Upper != 0 && other.Upper >= s.Upper
}

func finite(x float64) bool {
	return !math.IsNaN(x) && !math.IsInf(x, 0)
}
