package dossier

import (
	"fmt"
	"maps"
	"slices"

	"hearduty/internal/record"
)

// Registers are the records that do not belong to one worker.
type Registers struct {
	Groups       map[string]*record.Group
	Measurements []*record.Measurement // of groups and areas; rows of one measurement follow each other
	Tasks        []*record.Task
	Changes      []*record.Change
	Protectors   map[string]*record.Protector
	Instruments  map[string]*record.Instrument
	Calibrations []*record.Calibration
	Rooms        []*record.RoomSurvey
	Testers      map[string]*record.Tester
	Documents    []*record.Document
	Controls     []*record.Control
	WearChecks   []*record.WearCheck // of areas

	byGroup       map[string][]*record.Measurement
	byArea        map[string][]*record.Measurement
	tasksOf       map[string][]*record.Task
	calibrations  map[string][]*record.Calibration
	functional    map[string][]Date // days of the functional checks of an audiometer, in order
	wearOf        map[string][]*record.WearCheck
	firstMeasured map[string]Date // by id
}

func newRegisters() *Registers {
	return &Registers{
		Groups: map[string]*record.Group{}, Protectors: map[string]*record.Protector{},
		Instruments: map[string]*record.Instrument{}, Testers: map[string]*record.Tester{}, firstMeasured: map[string]Date{},
	}
}

func (r *Registers) add(rec record.Record) {
	switch v := rec.(type) {
	case *record.Group:
		r.Groups[v.Group] = v
	case *record.Measurement:
		r.Measurements = append(r.Measurements, v)
	case *record.Task:
		r.Tasks = append(r.Tasks, v)
	case *record.Change:
		r.Changes = append(r.Changes, v)
	case *record.Protector:
		r.Protectors[v.ProtectorID] = v
	case *record.Instrument:
		r.Instruments[v.InstrumentID] = v
	case *record.Calibration:
		r.Calibrations = append(r.Calibrations, v)
	case *record.RoomSurvey:
		r.Rooms = append(r.Rooms, v)
	case *record.Tester:
		r.Testers[v.TesterID] = v
	case *record.Document:
		r.Documents = append(r.Documents, v)
	case *record.Control:
		r.Controls = append(r.Controls, v)
	case *record.WearCheck:
		r.WearChecks = append(r.WearChecks, v)
	}
}

func (r *Registers) index() {
	slices.SortStableFunc(r.Measurements, compareMeasurements)
	byDay(r.Tasks, func(t *record.Task) Date { return t.Date })
	byDay(r.Changes, func(c *record.Change) Date { return c.Date })
	byDay(r.Calibrations, func(c *record.Calibration) Date { return c.Date })
	byDay(r.Rooms, func(s *record.RoomSurvey) Date { return s.Date })
	byDay(r.Documents, func(d *record.Document) Date { return d.Date })
	byDay(r.Controls, func(c *record.Control) Date { return c.Date })
	byDay(r.WearChecks, func(c *record.WearCheck) Date { return c.Date })
	r.byGroup = map[string][]*record.Measurement{}
	r.byArea = map[string][]*record.Measurement{}
	for _, m := range r.Measurements {
		if _, ok := r.firstMeasured[m.MeasurementID]; !ok {
			r.firstMeasured[m.MeasurementID] = m.Date
		}
		if m.Group != "" {
			r.byGroup[m.Group] = append(r.byGroup[m.Group], m)
		} else {
			r.byArea[m.Area] = append(r.byArea[m.Area], m)
		}
	}
	r.tasksOf = groupBy(r.Tasks, func(t *record.Task) string { return t.Group })
	r.calibrations = groupBy(r.Calibrations, func(c *record.Calibration) string { return c.InstrumentID })
	r.functional = map[string][]Date{}
	for _, c := range r.Calibrations {
		if c.Type == "functional" {
			r.functional[c.InstrumentID] = append(r.functional[c.InstrumentID], c.Date)
		}
	}
	r.wearOf = groupBy(r.WearChecks, func(c *record.WearCheck) string { return c.Area })
}

// compareMeasurements orders by day, then by measurement, then as read, so that the dose channels of one
// measurement follow each other.
func compareMeasurements(a, b *record.Measurement) int {
	if a.Date != b.Date {
		return int(a.Date) - int(b.Date)
	}
	if a.MeasurementID != b.MeasurementID {
		if a.MeasurementID < b.MeasurementID {
			return -1
		}
		return 1
	}
	return compareOrigin(a, b)
}

// sameMeasurement gives the number of rows, in order, that belong to the first measurement.
func sameMeasurement(rows []*record.Measurement) int {
	n := 1
	for n < len(rows) && rows[n].MeasurementID == rows[0].MeasurementID {
		n++
	}
	return n
}

func groupBy[R any](records []R, key func(R) string) map[string][]R {
	out := map[string][]R{}
	for _, r := range records {
		out[key(r)] = append(out[key(r)], r)
	}
	return out
}

// measurementsOf gives the measurements that stand for a group: its own, and those of its area.
func (r *Registers) measurementsOf(group *record.Group, id string) []*record.Measurement {
	own := r.byGroup[id]
	if group == nil || group.Area == "" || len(r.byArea[group.Area]) == 0 {
		return own
	}
	both := slices.Concat(own, r.byArea[group.Area])
	slices.SortStableFunc(both, compareMeasurements)
	return both
}

// professionOf gives the profession of a person named by id or by the profession itself, or an empty text
// where it is not known.
func (r *Registers) professionOf(person string) string {
	if t := r.Testers[person]; t != nil {
		return t.Qualification
	}
	switch person {
	case "audiologist", "otolaryngologist", "physician", "licensed_professional", "technician":
		return person
	}
	return ""
}

// Unplaced says, a sentence each, which measurements, changes and controls appear in no dossier, since no
// group has their area, or neither a record nor a worker their group.
func (r *Registers) Unplaced(members func(group string) bool) []string {
	areas := map[string]bool{}
	for _, g := range r.Groups {
		areas[g.Area] = true
	}
	counts := map[string]int{}
	place := func(what, group, area string) {
		switch {
		case group != "" && r.Groups[group] == nil && !members(group):
			counts[what+" of the group "+group+", which has neither a record nor a worker"]++
		case group == "" && area != "" && !areas[area]:
			counts[what+" of the area "+area+", which no group has"]++
		}
	}
	for _, m := range r.Measurements {
		place("measurement", m.Group, m.Area)
	}
	for _, c := range r.Changes {
		place("change", c.Group, c.Area)
	}
	for _, c := range r.Controls {
		place("control", c.Group, c.Area)
	}
	var out []string
	for _, text := range slices.Sorted(maps.Keys(counts)) {
		out = append(out, fmt.Sprintf("%d × %s: not judged. Add a group record with its site and area.", counts[text], text))
	}
	return out
}
