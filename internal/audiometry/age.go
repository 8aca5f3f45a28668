package audiometry

import (
	"fmt"

	"hearduty/internal/calendar"
)

// AgeOn gives the age in completed years on a day. Someone born on 29 February has the birthday on 1 March
// in common years. It returns false if a date is unknown or the day lies before the birth.
func AgeOn(birth, day calendar.Date) (years int, ok bool) {
	if !birth.Known() || !day.Known() || day < birth {
		return 0, false
	}
	birthYear, birthMonth, birthDay := birth.Civil()
	year, month, dayOfMonth := day.Civil()
	years = year - birthYear
	if month < birthMonth || month == birthMonth && dayOfMonth < birthDay {
		years--
	}
	return years, true
}

// AgeTable holds the thresholds that age alone explains, as the law tabulates them (for example 29 CFR
// 1910.95 App. F Tables F-1 and F-2).
type AgeTable struct {
	// FromAge is the age in years of the first value of every row.
	FromAge int `json:"from_age"`
	// Values holds dB by sex, by frequency in Hz, one for each year of age from FromAge on. Younger ages
	// use the first value and older ages the last.
	Values map[string]map[int][]int `json:"values"`
}

// Aging gives the dB that age explains between a baseline and a later test, one for each of freqs in Hz:
// value at ageNow less value at ageBaseline (29 CFR 1910.95 App. F). Ages are completed years on the day
// of the test. It fails if the table lacks the sex or a frequency, or if ageNow is below ageBaseline.
func (t *AgeTable) Aging(sex string, ageBaseline, ageNow int, freqs []int) ([]int, error) {
	if ageNow < ageBaseline {
		return nil, fmt.Errorf("the age at the test, %d, is below the age at the baseline, %d", ageNow, ageBaseline)
	}
	rows, ok := t.Values[sex]
	if !ok {
		return nil, fmt.Errorf("the age table has no values for the sex %q", sex)
	}
	aging := make([]int, len(freqs))
	for i, hz := range freqs {
		row := rows[hz]
		if len(row) == 0 {
			return nil, fmt.Errorf("the age table has no values for %d Hz", hz)
		}
		aging[i] = t.at(row, ageNow) - t.at(row, ageBaseline)
	}
	return aging, nil
}

func (t *AgeTable) at(row []int, age int) int {
	return row[min(max(age-t.FromAge, 0), len(row)-1)]
}
