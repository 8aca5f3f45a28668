package dossier

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/record"
)

func TestPeaksOfTwoWeightingsAreDoubted(t *testing.T) {
	row := func(db float64, weighting string) *record.Measurement {
		return &record.Measurement{MeasurementID: "m1", PeakDB: record.Num(db), PeakWeighting: weighting}
	}
	assert.Empty(t, doubts([]*record.Measurement{row(130, "C"), row(132, "C")}))
	assert.Empty(t, doubts([]*record.Measurement{row(130, "C"), row(132, "")}))
	assert.Len(t, doubts([]*record.Measurement{row(130, "C"), row(132, "Z")}), 1)
}
