package dossier

import (
	"cmp"
	"slices"
	"sync"

	"hearduty/internal/audiometry"
	"hearduty/internal/record"
)

// fewestAlike is the number of workers with the very same thresholds that is worth a remark (ours).
const fewestAlike = 3

// Copies finds the thresholds that several workers of a site share: in tests made by one tester or, where no
// tester is recorded, on one day. Add, in any order and by several goroutines, keeps eight bytes a test. Where
// Shared finds any, Collect goes over the same workers once more and gathers the tests concerned.
type Copies struct {
	mu    sync.Mutex
	marks []uint64
	found map[copied][]Copy
}

// Copy is one test whose thresholds other workers share.
type Copy struct {
	Worker string
	Ref    string
	Rec    *record.Audiogram
}

// Alike are the tests of several workers with the same thresholds, oldest first.
type Alike struct {
	Tester string // who made them; empty where that is not recorded
	Tests  []Copy
}

// copied is what tests must share: the tester, or else the day, and all thresholds.
type copied struct {
	tester      string
	day         Date
	left, right audiometry.Ear
}

// Observation gives the observation, which points to the first test.
func (a *Alike) Observation() Observation { return observed(identicalAcross, a.Tests[0].Ref, "") }

// CopiesKind is the kind of observation that Copies makes.
var CopiesKind = ownKinds[identicalAcross].kind

// Add takes the tests of one worker at the builder's site. What a worker shares with itself does not count here.
func (c *Copies) Add(b *Builder, w *WorkerRecords) {
	var marks []uint64
	b.eachVaried(w, func(_ *record.Audiogram, k *copied) {
		if m := k.mark(); !slices.Contains(marks, m) {
			marks = append(marks, m)
		}
	})
	if len(marks) == 0 {
		return
	}
	c.mu.Lock()
	defer c.mu.Unlock()
	c.marks = append(c.marks, marks...)
}

// eachVaried goes over the valid tests of a worker at the site whose thresholds are so varied that nobody has
// the same by chance. A worker who was not employed at the site by the as-of day has none.
func (b *Builder) eachVaried(w *WorkerRecords, do func(*record.Audiogram, *copied)) {
	w = w.until(b.AsOf)
	if len(employedAt(b.Place.ID, w.Employments)) == 0 {
		return
	}
	for _, a := range w.Audiograms {
		if !b.here(w, a.Date) || !audiometry.Varied(&a.Left, &a.Right) || invalidated(w.FollowUps, a) {
			continue
		}
		k := copied{tester: a.TesterID, left: a.Left, right: a.Right}
		if k.tester == "" {
			k.day = a.Date
		}
		do(a, &k)
	}
}

// mark is the 64-bit FNV-1a hash of the parts. Two different ones among millions of tests hardly ever agree.
func (k *copied) mark() uint64 {
	const offset, prime = 14695981039346656037, 1099511628211
	h := uint64(offset)
	add := func(v byte) { h = (h ^ uint64(v)) * prime }
	for i := range len(k.tester) {
		add(k.tester[i])
	}
	for shift := 0; shift < 32; shift += 8 {
		add(byte(uint32(k.day) >> shift))
	}
	for _, ear := range []*audiometry.Ear{&k.left, &k.right} {
		for _, t := range ear {
			add(byte(t.State))
			add(byte(t.Tenths))
			add(byte(uint16(t.Tenths) >> 8))
		}
	}
	return h
}

// Shared gives the marks that enough workers share. Add must not be called any more.
func (c *Copies) Shared() map[uint64]bool {
	slices.Sort(c.marks)
	out := map[uint64]bool{}
	for i := fewestAlike - 1; i < len(c.marks); i++ {
		if c.marks[i] == c.marks[i-fewestAlike+1] {
			out[c.marks[i]] = true
		}
	}
	c.marks = nil
	return out
}

// Collect keeps the tests of one worker that have one of the shared marks.
func (c *Copies) Collect(b *Builder, w *WorkerRecords, shared map[uint64]bool) {
	b.eachVaried(w, func(a *record.Audiogram, k *copied) {
		if !shared[k.mark()] {
			return
		}
		c.mu.Lock()
		defer c.mu.Unlock()
		if c.found == nil {
			c.found = map[copied][]Copy{}
		}
		c.found[*k] = append(c.found[*k], Copy{w.ID, "audiogram/" + a.AudiogramID, a})
	})
}

// Alike gives what was collected, in the order of the first test.
func (c *Copies) Alike() []Alike {
	out := []Alike{}
	for k, tests := range c.found {
		slices.SortFunc(tests, compareCopies)
		out = append(out, Alike{k.tester, tests})
	}
	slices.SortFunc(out, func(a, b Alike) int { return compareCopies(a.Tests[0], b.Tests[0]) })
	return out
}

func compareCopies(a, b Copy) int {
	return cmp.Or(cmp.Compare(a.Rec.Date, b.Rec.Date), cmp.Compare(a.Rec.AudiogramID, b.Rec.AudiogramID), compareOrigin(a.Rec, b.Rec))
}

func invalidated(follow []*record.FollowUp, a *record.Audiogram) bool {
	return slices.ContainsFunc(follow, func(f *record.FollowUp) bool { return f.Type == "invalidated" && f.AudiogramID == a.AudiogramID })
}
