package dossier_test

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// TestInformationOnlyWhereAttenuationMatters: at 95 dBA the worker is above the limit of Table G-16 and other
// methods are shown; at 88 dBA the law asks for no attenuation, and nothing is shown.
func TestInformationOnlyWhereAttenuationMatters(t *testing.T) {
	nrr := dossier.ProtectionMeasures{Rating: "nrr"}
	assert.NotEmpty(t, protectionUnder(t, osha().Measures, nrr, noisyTask("95"), model("p1", 20)).Information)
	assert.Empty(t, protectionUnder(t, osha().Measures, nrr, noisyTask("88"), model("p1", 20)).Information)
}

func noisyTask(level string) *record.Task {
	return &record.Task{Group: "g1", Task: "chipping", Date: day("2019-11-15"), Minutes: record.Num(480), Samples: record.List{level}}
}
