package demo

import (
	"slices"

	"hearduty/internal/record"
)

// fault is one thing that goes wrong at Kiln Hill. The program without faults meets every duty; each
// fault changes, adds or removes a few records.
type fault struct {
	duty  string // the duty that it trips
	then  string // the status that the finding then has
	about string // the subject: a worker, group, instrument, room, tester or site
	why   string // what went wrong
	plant func(*book)
}

// faults is the table of all faults, in the order in which they are planted.
var faults = slices.Concat(noiseFaults, hearingFaults, followUpFaults, qualityFaults, protectorFaults, paperFaults)

// set gives a plant that changes the records of a list that fit. At least one must fit.
func set[T any](list func(*book) []*T, fits func(*T) bool, change func(*T)) func(*book) {
	return func(b *book) {
		done := false
		for _, r := range list(b) {
			if fits(r) {
				change(r)
				done = true
			}
		}
		if !done {
			panic("demo: a fault finds no record to change")
		}
	}
}

// drop gives a plant that removes the records of a list that fit. At least one must fit.
func drop[T any](list func(*book) *[]*T, fits func(*T) bool) func(*book) {
	return func(b *book) {
		before := len(*list(b))
		*list(b) = slices.DeleteFunc(*list(b), fits)
		if len(*list(b)) == before {
			panic("demo: a fault finds no record to remove")
		}
	}
}

// both plants two changes as one fault.
func both(plants ...func(*book)) func(*book) {
	return func(b *book) {
		for _, p := range plants {
			p(b)
		}
	}
}

// add gives a plant that adds records.
func add(records ...record.Record) func(*book) {
	return func(b *book) {
		for _, r := range records {
			b.put(r)
		}
	}
}

// The lists that plants change and shorten.
func audiograms(b *book) []*record.Audiogram         { return b.audiograms }
func measurements(b *book) []*record.Measurement     { return b.measurements }
func followUps(b *book) []*record.FollowUp           { return b.followUps }
func allFollowUps(b *book) *[]*record.FollowUp       { return &b.followUps }
func allNotices(b *book) *[]*record.Notice           { return &b.notices }
func allIssues(b *book) *[]*record.ProtectorIssue    { return &b.issues }
func allCalibrations(b *book) *[]*record.Calibration { return &b.calibrations }

// tests gives a worker's hearing tests, oldest first.
func (b *book) tests(worker string) []*record.Audiogram {
	var out []*record.Audiogram
	for _, a := range b.audiograms {
		if a.WorkerID == worker {
			out = append(out, a)
		}
	}
	slices.SortFunc(out, func(x, y *record.Audiogram) int { return int(x.Date - y.Date) })
	return out
}

// onTest gives a plant that changes test n of a worker; a negative n counts from the latest, -1.
func onTest(worker string, n int, change func(*book, *record.Audiogram)) func(*book) {
	return func(b *book) {
		list := b.tests(worker)
		if n < 0 {
			change(b, list[len(list)+n])
			return
		}
		change(b, list[n])
	}
}

// withoutTests gives a plant that removes up to count tests of a worker from test n on, with the notices
// about them.
func withoutTests(worker string, n, count int) func(*book) {
	return func(b *book) {
		list := b.tests(worker)[n:]
		for _, gone := range list[:min(count, len(list))] {
			b.audiograms = slices.DeleteFunc(b.audiograms, func(a *record.Audiogram) bool { return a == gone })
			b.notices = slices.DeleteFunc(b.notices, func(r *record.Notice) bool { return r.AudiogramID == gone.AudiogramID })
			b.followUps = slices.DeleteFunc(b.followUps, func(r *record.FollowUp) bool { return r.AudiogramID == gone.AudiogramID })
		}
	}
}

// lastIssue gives a plant that changes the protector that a worker has now.
func lastIssue(worker string, change func(*record.ProtectorIssue)) func(*book) {
	return func(b *book) {
		var last *record.ProtectorIssue
		for _, i := range b.issues {
			if i.WorkerID == worker && (last == nil || i.Date > last.Date) {
				last = i
			}
		}
		change(last)
	}
}
