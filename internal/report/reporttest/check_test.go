package reporttest

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/report/json"
)

// A search that finds nothing is worth something only if it finds what is there.
func TestLeaksAreFound(t *testing.T) {
	text := []byte("born 1985-10-06 or 19850101, hearing 0, 10, 10, 15, 10, 15 dB")
	assert.Contains(t, leaks(t, text), "1985-10-06")
	assert.Contains(t, leaks(t, text), "0, 10, 10, 15, 10, 15", "the right order of the demo's first test: 500, 1000, 2000, 3000, 4000, 6000 Hz")
	assert.Empty(t, leaks(t, []byte("worker K0101 has a gap since 2025-07-15")))
}

func TestAReportWithHearingIsFoundOut(t *testing.T) {
	assert.NotEmpty(t, leaks(t, Written(t, json.Format{}, Demo(t, true))))
	assert.Empty(t, leaks(t, Written(t, json.Format{}, Demo(t, false))))
}
