package audiometry

import "math"

// Tolerance is what an audiometer's output may deviate at a frequency before the law asks for an exhaustive
// calibration.
type Tolerance struct {
	Hz         int     `json:"hz" doc:"frequency, Hz"`
	AdvisedDB  float64 `json:"advised_db" doc:"deviation from which an exhaustive calibration is advised, dB"`
	RequiredDB float64 `json:"required_db" doc:"deviation from which an exhaustive calibration is required, dB"`
}

// AppendixE gives the tolerances of the acoustic check of 29 CFR 1910.95 App. E (3).
func AppendixE() []Tolerance {
	return []Tolerance{{500, 3, 15}, {1000, 3, 15}, {2000, 3, 15}, {3000, 3, 15}, {4000, 4, 15}, {6000, 5, 15}}
}

// Grade says what a deviation of an audiometer calls for.
type Grade uint8

// The grades, in order of urgency.
const (
	WithinTolerance     Grade = iota
	CalibrationAdvised        // an exhaustive calibration is advised
	CalibrationRequired       // an exhaustive calibration is required
)

// String writes the grade in words.
func (g Grade) String() string {
	switch g {
	case CalibrationAdvised:
		return "exhaustive calibration advised"
	case CalibrationRequired:
		return "exhaustive calibration required"
	}
	return "within tolerance"
}

// GradeDeviation grades a deviation in dB at a frequency in Hz, whatever its sign. A deviation at the
// tolerance is no longer within it: the law speaks of deviations of 15 dB or greater. It is compared to the
// nearest 0.1 dB. It returns false if there is no tolerance for the frequency or the deviation is no number.
func GradeDeviation(tolerances []Tolerance, hz int, deviationDB float64) (Grade, bool) {
	for _, t := range tolerances {
		if t.Hz != hz || math.IsNaN(deviationDB) {
			continue
		}
		size := math.Round(math.Abs(deviationDB) * 10)
		switch {
		case size >= math.Round(t.RequiredDB*10):
			return CalibrationRequired, true
		case size >= math.Round(t.AdvisedDB*10):
			return CalibrationAdvised, true
		}
		return WithinTolerance, true
	}
	return WithinTolerance, false
}

// CheckResult is the outcome of an acoustic check at several frequencies.
type CheckResult struct {
	Grade   Grade // the most urgent grade of all frequencies checked
	At      []int // frequencies in Hz that have it, unless all are within tolerance
	Missing []int // frequencies in Hz that have a tolerance but were not checked
}

// AcousticCheck grades the deviations of one earphone in dB, by frequency in Hz. Frequencies without a
// tolerance do not matter.
func AcousticCheck(tolerances []Tolerance, deviationsDB map[int]float64) CheckResult {
	var r CheckResult
	for _, t := range tolerances {
		deviation, checked := deviationsDB[t.Hz]
		grade, ok := GradeDeviation(tolerances, t.Hz, deviation)
		switch {
		case !checked || !ok:
			r.Missing = append(r.Missing, t.Hz)
		case grade > r.Grade:
			r.Grade, r.At = grade, []int{t.Hz}
		case grade == r.Grade && grade > WithinTolerance:
			r.At = append(r.At, t.Hz)
		}
	}
	return r
}

// ReferenceTable names a table of reference threshold levels for an earphone.
type ReferenceTable string

// The tables of 29 CFR 1910.95 App. E, one for each of two earphones.
const (
	TableE1 ReferenceTable = "E-1"
	TableE2 ReferenceTable = "E-2"
)

// references holds sound pressure levels in dB at 0 dB HL, by table and frequency in Hz.
var references = map[ReferenceTable]map[int]float64{
	TableE1: {500: 11.5, 1000: 7, 2000: 9, 3000: 10, 4000: 9.5, 6000: 15.5},
	TableE2: {500: 13.5, 1000: 7.5, 2000: 11, 3000: 9.5, 4000: 10.5, 6000: 13.5},
}

// OutputDeviation gives by how many dB the level read on a sound level meter deviates from what the dial, in
// dB HL, should give at a frequency in Hz (29 CFR 1910.95 App. E; the acoustic check is made at 70 dB HL). It
// returns false if the table has no value for the frequency.
func OutputDeviation(table ReferenceTable, hz int, dialDB, readingDB float64) (float64, bool) {
	reference, ok := references[table][hz]
	if !ok {
		return 0, false
	}
	return readingDB - (dialDB + reference), true
}
