package acoustics

import (
	"fmt"
	"math"
)

const (
	nominalWeek = 5 // days of 8 hours in the week of S.I. 299/2007 reg. 120 (Ireland)
	weekDays    = 7
)

// WeeklyLEX gives the weekly exposure level in dB from the daily exposure levels in dB of all days worked
// in one week, 10 lg(1/5 * sum of 10^(L/10)) (S.I. 299/2007 reg. 120; French Labour Code R4431-1 no. 3,
// seen in a translation). It always divides by five, whether one day was worked or seven. It may stand in
// for the daily level only where the law says so.
//
// It fails if daysWorked is not 1 to 7, if a day worked has no level or there are more levels than days,
// and if a level is not a finite number: a day without a level is not a day without noise.
func WeeklyLEX(daily []float64, daysWorked int) (float64, error) {
	if daysWorked < 1 || daysWorked > weekDays {
		return 0, fmt.Errorf("%d days worked in a week are not 1 to 7", daysWorked)
	}
	if len(daily) != daysWorked {
		return 0, fmt.Errorf("there are %d daily levels for %d days worked, so there is no weekly level", len(daily), daysWorked)
	}
	mean, ok := EnergyMean(daily)
	if !ok {
		return 0, fmt.Errorf("a daily level is not a number, so there is no weekly level")
	}
	return mean + 10*math.Log10(float64(daysWorked)/nominalWeek), nil
}
