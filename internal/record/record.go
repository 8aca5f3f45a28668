// Package record holds the canonical records of a hearing-conservation program: one Go type a kind, one
// table a type. The field tags are the single source of the column names, the JSON Schemas, the checks
// on input and the compact form in which records are kept while they are sorted by subject.
//
// Levels are in dB, times in minutes, frequencies in Hz, thresholds in dB HL. Ids are text. An empty
// field is absent, never zero.
package record

import (
	"strconv"
	"strings"

	"hearduty/internal/calendar"
)

// Kind names a record kind; it is also the singular of the canonical file name.
type Kind string

// Origin says where a record was read.
type Origin struct {
	Source int32 // index of the input in the ledger
	Row    int32 // line of the file, row of the sheet, or place in the JSON array, counted from 1
}

// Meta is embedded in every record.
type Meta struct {
	Origin Origin `field:"-"`
}

// At gives the record's origin.
func (m *Meta) At() Origin { return m.Origin }

// SetAt sets the record's origin.
func (m *Meta) SetAt(o Origin) { m.Origin = o }

// Record is one normalized fact with its origin.
type Record interface {
	Kind() Kind
	At() Origin
	SetAt(Origin)
}

// Number is a number that may be absent.
type Number struct {
	Value float64
	Known bool
}

// Num gives a known number.
func Num(v float64) Number { return Number{v, true} }

// String writes the number as short as it can be read back, and an absent one as an empty text.
func (n Number) String() string {
	if !n.Known {
		return ""
	}
	return strconv.FormatFloat(n.Value, 'f', -1, 64)
}

// Answer is yes, no, or not recorded.
type Answer uint8

// The answers. The zero Answer is not recorded.
const (
	Unanswered Answer = iota
	Yes
	No
)

// String writes yes, no or an empty text.
func (a Answer) String() string { return [...]string{"", "yes", "no"}[a] }

// List is a list of words; in a table cell they are separated by semicolons.
type List []string

// String joins the words with semicolons.
func (l List) String() string { return strings.Join(l, ";") }

// Has says whether the list contains the word.
func (l List) Has(word string) bool {
	for _, w := range l {
		if w == word {
			return true
		}
	}
	return false
}

// OctaveBands are the band centre frequencies of Octaves, in Hz.
var OctaveBands = [8]int{63, 125, 250, 500, 1000, 2000, 4000, 8000}

// Octaves holds one number an octave band, in the order of OctaveBands.
type Octaves [len(OctaveBands)]Number

// At gives the number of the band at a frequency in Hz.
func (o *Octaves) At(hz int) Number {
	for i, f := range OctaveBands {
		if f == hz {
			return o[i]
		}
	}
	return Number{}
}

// Known says whether any band has a number.
func (o *Octaves) Known() bool {
	for _, n := range o {
		if n.Known {
			return true
		}
	}
	return false
}

// Date is short for calendar.Date.
type Date = calendar.Date
