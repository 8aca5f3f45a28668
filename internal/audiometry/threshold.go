// Package audiometry works on hearing threshold levels: averages, threshold shifts and age correction.
// All levels are dB HL. Sums are kept as whole tenths of a decibel so that a shift of exactly 10 dB is
// found to be exactly 10 dB.
package audiometry

// Frequencies are the test frequencies that a record can hold, in Hz.
var Frequencies = [10]int{250, 500, 750, 1000, 1500, 2000, 3000, 4000, 6000, 8000}

// State says what a threshold entry means.
type State uint8

// The states of a threshold entry.
const (
	NotRecorded State = iota // the record says nothing
	Measured                 // a threshold was found
	NoResponse               // no response up to the level given; the threshold lies above it
	NotTested                // the record says that the frequency was not tested
)

// Threshold is one ear's hearing threshold level at one frequency.
type Threshold struct {
	Tenths int16 // dB HL times ten: the threshold, or with NoResponse the highest level presented
	State  State
}

// DB gives the level in dB HL. It is meaningful for Measured and NoResponse only.
func (t Threshold) DB() float64 { return float64(t.Tenths) / 10 }

// Ear holds one ear's thresholds in the order of Frequencies.
type Ear [len(Frequencies)]Threshold

// At gives the threshold at a frequency in Hz; a frequency that no record holds is NotRecorded.
func (e *Ear) At(hz int) Threshold {
	for i, f := range Frequencies {
		if f == hz {
			return e[i]
		}
	}
	return Threshold{}
}
