package fhir

import (
	"fmt"
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// TestTonesAreWholeAndDistinct holds the table to what the panel has: each of eleven frequencies once an ear, and all
// frequencies that a record can hold.
func TestTonesAreWholeAndDistinct(t *testing.T) {
	t.Parallel()
	table, _ := record.TableOf("audiogram")
	seen := map[tone]string{}
	for code, tone := range tones {
		assert.Empty(t, seen[tone], "%s and %s are the same tone", code, seen[tone])
		seen[tone] = code
		assert.True(t, checkDigit(code), "%s has a wrong check digit", code)
		assert.Equal(t, tone.hz != 5000, table.Index(tone.field()) >= 0, tone.field())
	}
	assert.Len(t, tones, 22)
	for _, hz := range audiometry.Frequencies {
		assert.NotEmpty(t, seen[tone{left, hz}], hz)
		assert.NotEmpty(t, seen[tone{right, hz}], hz)
	}
	assert.True(t, checkDigit(panelCode))
}

// checkDigit checks the last digit of a LOINC code, which is that of Luhn's method, modulo 10 (the users' guide of
// LOINC, from memory).
func checkDigit(code string) bool {
	var body string
	var check int
	if n, _ := fmt.Sscanf(code, "%5s-%d", &body, &check); n != 2 {
		return false
	}
	sum := 0
	for i := range len(body) {
		d := int(body[len(body)-1-i] - '0')
		if i%2 == 0 {
			if d *= 2; d > 9 {
				d -= 9
			}
		}
		sum += d
	}
	return (10-sum%10)%10 == check
}

func TestResourceTypesAreThoseOfR4(t *testing.T) {
	t.Parallel()
	assert.Len(t, resourceTypes, 146, "148 codes less the abstract types Resource and DomainResource, from memory")
	for _, kind := range []string{"Observation", "Patient", "Parameters", "Bundle"} {
		assert.True(t, resourceTypes[kind], kind)
	}
}

func TestDisplayAgainstCode(t *testing.T) {
	t.Parallel()
	left500 := tone{left, 500}
	for display, disagrees := range map[string]bool{
		"":                                       false,
		"Hearing threshold Ear - left --500 Hz":  false,
		"Hearing threshold Ear - right --500 Hz": true,
		"Hearing threshold Ear - left --5000 Hz": true,
		"Hearing threshold Ear - left --0.5 kHz": false,
		"L500":                                   false,
		"R500":                                   true,
		"L 0,5k":                                 false,
		"L 1k":                                   true,
		"links 500":                              false,
		"rechtes Ohr, 500 Hz":                    true,
		"oreille droite 500 Hz":                  true,
		"左耳 500 Hz":                              false,
		"右耳 500 Hz":                              true,
		"Hearing threshold":                      false, // silent on ear and frequency
		"left ear, right ear masked, 500 Hz":     false, // names both
		"Audiogram 2025":                         false,
		"Peak sound level":                       true, // seen in public projects: noise under the code of a threshold
		"Environmental noise duration":           true,
		"125 Hz left":                            true,
	} {
		assert.Equal(t, disagrees, left500.disagrees(display), display)
	}
}
