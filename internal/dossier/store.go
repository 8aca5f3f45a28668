package dossier

import (
	"cmp"
	"hash/fnv"
	"io"
	"os"
	"slices"

	"hearduty/internal/record"
)

// shardCount is the number of parts into which workers are divided. Only a few parts are unpacked at a
// time, so that memory stays flat however many workers there are.
const shardCount = 256

// memoryBudget is the number of bytes of packed records that stay in memory.
const memoryBudget = 48 << 20

// Store sorts records by subject. Records of workers are kept packed, in shards; all others are registers
// that every worker may refer to.
type Store struct {
	registers *Registers
	shards    [shardCount]shard
	size      int
	budget    int // bytes of packed records beyond which they move to the temporary file
	spill     *os.File
	spilled   int64
}

// shard holds the packed records of some workers: parts that were moved to the file, then the rest.
type shard struct {
	parts []part
	rest  []byte
}

type part struct {
	at   int64
	size int
}

// NewStore makes an empty store. Close it when done.
func NewStore() *Store {
	return &Store{registers: newRegisters(), budget: memoryBudget}
}

// Add takes a record. It fails only if the temporary file cannot be written.
func (s *Store) Add(rec record.Record) error {
	id := workerOf(rec)
	if id == "" {
		s.registers.add(rec)
		return nil
	}
	h := fnv.New32a()
	io.WriteString(h, id)
	sh := &s.shards[h.Sum32()%shardCount]
	before := len(sh.rest)
	sh.rest = record.Append(sh.rest, rec)
	s.size += len(sh.rest) - before
	if s.size > s.budget {
		return s.flush()
	}
	return nil
}

// flush moves all packed records to one temporary file that only this process can read and that is gone
// when the process ends.
func (s *Store) flush() error {
	if s.spill == nil {
		f, err := os.CreateTemp("", "hearduty-*")
		if err != nil {
			return err
		}
		s.spill = f
		_ = os.Remove(f.Name()) // where the system allows it, the file has no name from here on
	}
	for i := range s.shards {
		sh := &s.shards[i]
		if len(sh.rest) == 0 {
			continue
		}
		if _, err := s.spill.WriteAt(sh.rest, s.spilled); err != nil {
			return err
		}
		sh.parts = append(sh.parts, part{s.spilled, len(sh.rest)})
		s.spilled += int64(len(sh.rest))
		sh.rest = nil
	}
	s.size = 0
	return nil
}

// Close removes the temporary file.
func (s *Store) Close() error {
	if s.spill == nil {
		return nil
	}
	name := s.spill.Name()
	err := s.spill.Close()
	_ = os.Remove(name)
	return err
}

// Registers gives the records that do not belong to one worker. Add must not be called any more. Where
// records have moved to the temporary file, the rest follows, to leave the memory to judging.
func (s *Store) Registers() (*Registers, error) {
	s.registers.index()
	if s.spill != nil {
		return s.registers, s.flush()
	}
	return s.registers, nil
}

// Shards gives the number of shards.
func (s *Store) Shards() int { return shardCount }

// Shard unpacks the records of one shard, a worker at a time in order of worker id. It may be called for
// different shards at the same time.
func (s *Store) Shard(i int) ([]*WorkerRecords, error) {
	byID := map[string]*WorkerRecords{}
	var decoder record.Decoder
	unpack := func(packed []byte) error {
		for len(packed) > 0 {
			rec, rest, err := decoder.Next(packed)
			if err != nil {
				return err
			}
			packed = rest
			id := workerOf(rec)
			w := byID[id]
			if w == nil {
				w = &WorkerRecords{ID: id}
				byID[id] = w
			}
			w.add(rec)
		}
		return nil
	}
	sh := &s.shards[i]
	for _, p := range sh.parts {
		buffer := make([]byte, p.size)
		if _, err := s.spill.ReadAt(buffer, p.at); err != nil {
			return nil, err
		}
		if err := unpack(buffer); err != nil {
			return nil, err
		}
	}
	if err := unpack(sh.rest); err != nil {
		return nil, err
	}
	workers := make([]*WorkerRecords, 0, len(byID))
	for _, w := range byID {
		w.sort()
		workers = append(workers, w)
	}
	slices.SortFunc(workers, func(a, b *WorkerRecords) int { return cmp.Compare(a.ID, b.ID) })
	return workers, nil
}

// WorkerRecords are the records of one worker, each kind oldest first.
type WorkerRecords struct {
	ID           string
	Employments  []*record.Worker
	Assignments  []*record.Assignment
	Measurements []*record.Measurement
	Notices      []*record.Notice
	Audiograms   []*record.Audiogram
	FollowUps    []*record.FollowUp
	Trainings    []*record.Training
	Issues       []*record.ProtectorIssue
	FitTests     []*record.FitTest
	WearChecks   []*record.WearCheck
	Examinations []*record.Examination
}

// workerOf gives the worker to whom a record belongs, or an empty text. A measurement that stands for a
// group belongs to the group, whoever wore the instrument.
func workerOf(rec record.Record) string {
	switch v := rec.(type) {
	case *record.Worker:
		return v.WorkerID
	case *record.Assignment:
		return v.WorkerID
	case *record.Measurement:
		if v.Group == "" {
			return v.WorkerID
		}
	case *record.Notice:
		return v.WorkerID
	case *record.Audiogram:
		return v.WorkerID
	case *record.FollowUp:
		return v.WorkerID
	case *record.Training:
		return v.WorkerID
	case *record.ProtectorIssue:
		return v.WorkerID
	case *record.FitTest:
		return v.WorkerID
	case *record.WearCheck:
		return v.WorkerID
	case *record.Examination:
		return v.WorkerID
	}
	return ""
}

func (w *WorkerRecords) add(rec record.Record) {
	switch v := rec.(type) {
	case *record.Worker:
		w.Employments = append(w.Employments, v)
	case *record.Assignment:
		w.Assignments = append(w.Assignments, v)
	case *record.Measurement:
		w.Measurements = append(w.Measurements, v)
	case *record.Notice:
		w.Notices = append(w.Notices, v)
	case *record.Audiogram:
		w.Audiograms = append(w.Audiograms, v)
	case *record.FollowUp:
		w.FollowUps = append(w.FollowUps, v)
	case *record.Training:
		w.Trainings = append(w.Trainings, v)
	case *record.ProtectorIssue:
		w.Issues = append(w.Issues, v)
	case *record.FitTest:
		w.FitTests = append(w.FitTests, v)
	case *record.WearCheck:
		w.WearChecks = append(w.WearChecks, v)
	case *record.Examination:
		w.Examinations = append(w.Examinations, v)
	}
}

// until gives the records up to and including a day.
func (w *WorkerRecords) until(last Date) *WorkerRecords {
	return &WorkerRecords{
		ID:           w.ID,
		Employments:  until(w.Employments, last, func(r *record.Worker) Date { return r.HiredOn }),
		Assignments:  until(w.Assignments, last, func(r *record.Assignment) Date { return r.From }),
		Measurements: until(w.Measurements, last, func(r *record.Measurement) Date { return r.Date }),
		Notices:      until(w.Notices, last, func(r *record.Notice) Date { return r.Date }),
		Audiograms:   until(w.Audiograms, last, func(r *record.Audiogram) Date { return r.Date }),
		FollowUps:    until(w.FollowUps, last, func(r *record.FollowUp) Date { return r.Date }),
		Trainings:    until(w.Trainings, last, func(r *record.Training) Date { return r.Date }),
		Issues:       until(w.Issues, last, func(r *record.ProtectorIssue) Date { return r.Date }),
		FitTests:     until(w.FitTests, last, func(r *record.FitTest) Date { return r.Date }),
		WearChecks:   until(w.WearChecks, last, func(r *record.WearCheck) Date { return r.Date }),
		Examinations: until(w.Examinations, last, firstDay),
	}
}

func (w *WorkerRecords) sort() {
	byDay(w.Employments, func(r *record.Worker) Date { return r.HiredOn })
	byDay(w.Assignments, func(r *record.Assignment) Date { return r.From })
	byDay(w.Measurements, func(r *record.Measurement) Date { return r.Date })
	byDay(w.Notices, func(r *record.Notice) Date { return r.Date })
	byDay(w.Audiograms, func(r *record.Audiogram) Date { return r.Date })
	byDay(w.FollowUps, func(r *record.FollowUp) Date { return r.Date })
	byDay(w.Trainings, func(r *record.Training) Date { return r.Date })
	byDay(w.Issues, func(r *record.ProtectorIssue) Date { return r.Date })
	byDay(w.FitTests, func(r *record.FitTest) Date { return r.Date })
	byDay(w.WearChecks, func(r *record.WearCheck) Date { return r.Date })
	byDay(w.Examinations, firstDay)
}

// firstDay gives the day on which an examination was offered, or if no offer is on record, held.
func firstDay(e *record.Examination) Date {
	if e.OfferedOn.Known() {
		return e.OfferedOn
	}
	return e.AttendedOn
}

// byDay sorts records by day, and those of one day as they were read.
func byDay[R record.Record](records []R, day func(R) Date) {
	slices.SortStableFunc(records, func(a, b R) int {
		return cmp.Or(cmp.Compare(day(a), day(b)), compareOrigin(a, b))
	})
}

func compareOrigin(a, b record.Record) int {
	x, y := a.At(), b.At()
	return cmp.Or(cmp.Compare(x.Source, y.Source), cmp.Compare(x.Row, y.Row))
}

// until gives the records up to and including a day. They must be in order of day.
func until[R record.Record](records []R, last Date, day func(R) Date) []R {
	n := len(records)
	for n > 0 && day(records[n-1]) > last {
		n--
	}
	return records[:n]
}
