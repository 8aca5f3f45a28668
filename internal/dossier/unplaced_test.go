package dossier

import (
	"testing"

	"github.com/stretchr/testify/assert"

	"hearduty/internal/record"
)

func TestRecordsOfNoGroupAreNamed(t *testing.T) {
	s := NewStore()
	for _, rec := range []record.Record{
		&record.Group{Group: "g1", Site: "s1", Area: "hall"},
		&record.Measurement{MeasurementID: "m1", Group: "g1"},
		&record.Measurement{MeasurementID: "m2", Area: "hall"},
		&record.Measurement{MeasurementID: "m3", Area: "yard"},
		&record.Measurement{MeasurementID: "m4", Area: "yard"},
		&record.Change{ChangeID: "c1", Group: "g9"},
		&record.Control{Group: "g8"},
	} {
		assert.NoError(t, s.Add(rec))
	}
	r, err := s.Registers()
	assert.NoError(t, err)
	assert.Equal(t, []string{
		"1 × change of the group g9, which has neither a record nor a worker: not judged. Add a group record with its site and area.",
		"2 × measurement of the area yard, which no group has: not judged. Add a group record with its site and area.",
	}, r.Unplaced(func(group string) bool { return group == "g8" }))
}
