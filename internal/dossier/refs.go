package dossier

import (
	"strconv"

	"hearduty/internal/record"
)

// Refs gives every record of a dossier a reference, under which rules and findings cite it, and finds the
// record again.
type Refs struct {
	byRef    map[string]record.Record
	byRecord map[record.Record]string
}

// NewRefs makes an empty table of references.
func NewRefs() Refs {
	return Refs{byRef: map[string]record.Record{}, byRecord: map[record.Record]string{}}
}

// Of gives the record's reference: its kind and its id, or kind, subject and day for kinds without id.
// Where two records would have the same reference, the later one gets a number.
func (r Refs) Of(rec record.Record) string {
	if ref, ok := r.byRecord[rec]; ok {
		return ref
	}
	base := string(rec.Kind()) + "/" + name(rec)
	ref := base
	for n := 2; r.byRef[ref] != nil; n++ {
		ref = base + "#" + strconv.Itoa(n)
	}
	r.byRef[ref] = rec
	r.byRecord[rec] = ref
	return ref
}

// Record gives the record that has the reference.
func (r Refs) Record(ref string) (record.Record, bool) {
	rec, ok := r.byRef[ref]
	return rec, ok
}

func name(rec record.Record) string {
	switch v := rec.(type) {
	case *record.Worker:
		return v.WorkerID
	case *record.Assignment:
		return v.WorkerID + "@" + v.From.String()
	case *record.Group:
		return v.Group
	case *record.Measurement:
		return v.MeasurementID
	case *record.Task:
		return v.Group + "/" + v.Task
	case *record.Change:
		return v.ChangeID
	case *record.Notice:
		return v.About + "/" + v.WorkerID + "@" + v.Date.String()
	case *record.Audiogram:
		return v.AudiogramID
	case *record.FollowUp:
		return v.Type + "/" + v.WorkerID + "@" + v.Date.String()
	case *record.Training:
		return v.WorkerID + "@" + v.Date.String()
	case *record.Protector:
		return v.ProtectorID
	case *record.ProtectorIssue:
		return v.ProtectorID + "/" + v.WorkerID + "@" + v.Date.String()
	case *record.FitTest:
		return v.ProtectorID + "/" + v.WorkerID + "@" + v.Date.String()
	case *record.WearCheck:
		if v.WorkerID == "" {
			return v.Area + "@" + v.Date.String()
		}
		return v.WorkerID + "@" + v.Date.String()
	case *record.Instrument:
		return v.InstrumentID
	case *record.Calibration:
		return v.InstrumentID + "/" + v.Type + "@" + v.Date.String()
	case *record.RoomSurvey:
		return v.RoomID + "@" + v.Date.String()
	case *record.Tester:
		return v.TesterID
	case *record.Document:
		return v.Type + "@" + v.Date.String()
	case *record.Examination:
		return v.ExaminationID
	case *record.Control:
		return v.Type + "/" + v.Group + v.Area + "@" + v.Date.String()
	}
	return "?"
}
