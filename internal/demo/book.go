package demo

import (
	"slices"

	"hearduty/internal/record"
)

// book holds all records of the demo program, so that faults can be planted before it is written.
type book struct {
	workers      []*record.Worker
	assignments  []*record.Assignment
	groups       []*record.Group
	measurements []*record.Measurement
	tasks        []*record.Task
	changes      []*record.Change
	notices      []*record.Notice
	audiograms   []*record.Audiogram
	followUps    []*record.FollowUp
	trainings    []*record.Training
	protectors   []*record.Protector
	issues       []*record.ProtectorIssue
	fitTests     []*record.FitTest
	wearChecks   []*record.WearCheck
	instruments  []*record.Instrument
	calibrations []*record.Calibration
	roomSurveys  []*record.RoomSurvey
	testers      []*record.Tester
	documents    []*record.Document
	controls     []*record.Control
}

// put adds a record.
func (b *book) put(r record.Record) {
	switch r := r.(type) {
	case *record.Worker:
		b.workers = append(b.workers, r)
	case *record.Assignment:
		b.assignments = append(b.assignments, r)
	case *record.Group:
		b.groups = append(b.groups, r)
	case *record.Measurement:
		b.measurements = append(b.measurements, r)
	case *record.Task:
		b.tasks = append(b.tasks, r)
	case *record.Change:
		b.changes = append(b.changes, r)
	case *record.Notice:
		b.notices = append(b.notices, r)
	case *record.Audiogram:
		b.audiograms = append(b.audiograms, r)
	case *record.FollowUp:
		b.followUps = append(b.followUps, r)
	case *record.Training:
		b.trainings = append(b.trainings, r)
	case *record.Protector:
		b.protectors = append(b.protectors, r)
	case *record.ProtectorIssue:
		b.issues = append(b.issues, r)
	case *record.FitTest:
		b.fitTests = append(b.fitTests, r)
	case *record.WearCheck:
		b.wearChecks = append(b.wearChecks, r)
	case *record.Instrument:
		b.instruments = append(b.instruments, r)
	case *record.Calibration:
		b.calibrations = append(b.calibrations, r)
	case *record.RoomSurvey:
		b.roomSurveys = append(b.roomSurveys, r)
	case *record.Tester:
		b.testers = append(b.testers, r)
	case *record.Document:
		b.documents = append(b.documents, r)
	case *record.Control:
		b.controls = append(b.controls, r)
	}
}

// write writes the program file and the records, those of a day in the order of their days, and then the same as exports.
func (b *book) write(dir string) error {
	if err := writeProgram(dir, demoProgram, abroadFiles()); err != nil {
		return err
	}
	if err := writeAccepted(dir); err != nil {
		return err
	}
	t, err := createTables(dir)
	if err != nil {
		return err
	}
	rows(t, b.workers, nil)
	rows(t, b.assignments, nil)
	rows(t, b.groups, nil)
	rows(t, b.measurements, func(r *record.Measurement) Date { return r.Date })
	rows(t, b.tasks, nil)
	rows(t, b.changes, func(r *record.Change) Date { return r.Date })
	rows(t, b.notices, func(r *record.Notice) Date { return r.Date })
	rows(t, b.audiograms, func(r *record.Audiogram) Date { return r.Date })
	rows(t, b.followUps, func(r *record.FollowUp) Date { return r.Date })
	rows(t, b.trainings, func(r *record.Training) Date { return r.Date })
	rows(t, b.protectors, nil)
	rows(t, b.issues, func(r *record.ProtectorIssue) Date { return r.Date })
	rows(t, b.fitTests, func(r *record.FitTest) Date { return r.Date })
	rows(t, b.wearChecks, func(r *record.WearCheck) Date { return r.Date })
	rows(t, b.instruments, nil)
	rows(t, b.calibrations, func(r *record.Calibration) Date { return r.Date })
	rows(t, b.roomSurveys, func(r *record.RoomSurvey) Date { return r.Date })
	rows(t, b.testers, nil)
	rows(t, b.documents, func(r *record.Document) Date { return r.Date })
	rows(t, b.controls, func(r *record.Control) Date { return r.Date })
	if err := t.close(); err != nil {
		return err
	}
	if err := writeAbroad(dir); err != nil {
		return err
	}
	return b.writeExports(dir)
}

// rows writes the records of one kind, sorted by date unless on is nil.
func rows[T any, R interface {
	*T
	record.Record
}](t *tables, list []R, on func(R) Date) {
	if on != nil {
		slices.SortStableFunc(list, func(a, b R) int { return int(on(a)) - int(on(b)) })
	}
	for _, r := range list {
		t.put(r)
	}
}
