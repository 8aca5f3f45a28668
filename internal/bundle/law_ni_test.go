package bundle

import (
	"testing"

	"github.com/stretchr/testify/assert"
)

const northernIreland = "ni-noise-2006"

// TestNorthernIrelandHasTheSameNumbers: sheet section 8 says "same dates, numbers, formulas and duties, except" what the
// bundle replaces.
func TestNorthernIrelandHasTheSameNumbers(t *testing.T) {
	b := takeBundle(t, northernIreland)
	holdToSheet(t, b, gbNumbers)
	holdToParagraphs(t, b, "")
	assert.Equal(t, []string{britain}, b.About.Extends)
	assert.Empty(t, b.About.Drops)
	own := []string{}
	for _, d := range b.Duties {
		if d.From == northernIreland {
			own = append(own, d.ID)
		}
	}
	assert.ElementsMatch(t, []string{"protectors-available", "zone-signs", "protector-conformity", "exemption"}, own)
	assert.Len(t, b.Duties, len(takeBundle(t, britain).Duties))
}

// TestNoRequestInNorthernIreland: reg 7(1) lacks "on request", so what is on record must not rest on one.
func TestNoRequestInNorthernIreland(t *testing.T) {
	theirs, _ := takeBundle(t, northernIreland).Duty("protectors-available")
	ours, _ := takeBundle(t, britain).Duty("protectors-available")
	assert.NotContains(t, theirs.Text, `"protectors_on_request"`)
	assert.Contains(t, ours.Text, `"protectors_on_request"`)
	assert.Equal(t, ours.Cite, theirs.Cite)
}
