package dossier_test

import (
	"fmt"
	"slices"
	"strconv"
	"strings"
	"sync"

	"github.com/stretchr/testify/require"

	"hearduty/internal/audiometry"
	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// day reads a date; an empty text is no date.
func day(text string) calendar.Date {
	if text == "" {
		return 0
	}
	return calendar.MustParse(text)
}

// osha is the bundle by which these tests judge.
var osha = sync.OnceValue(func() *bundle.Bundle {
	library, err := bundle.Embedded()
	if err != nil {
		panic(err)
	}
	return library["us-osha-general-industry"]
})

// judged are the dossiers of one site.
type judged struct {
	t     require.TestingT
	files []*dossier.File
}

// asked says how records are judged.
type asked struct {
	asOf     string
	site     string           // s1 where empty
	choices  map[string]any   // over the defaults
	measures dossier.Measures // the bundle's where empty
	law      dossier.Law      // the bundle where nil
}

// judge makes all dossiers of site s1 from records.
func judge(t require.TestingT, asOf string, records ...record.Record) *judged {
	return asked{asOf: asOf}.judge(t, records...)
}

func (a asked) judge(t require.TestingT, records ...record.Record) *judged {
	store := dossier.NewStore()
	for i, rec := range records {
		if rec.At() == (record.Origin{}) {
			rec.SetAt(record.Origin{Row: int32(i + 1)})
		}
		require.NoError(t, store.Add(rec))
	}
	defer store.Close()
	return a.ofStore(t, store)
}

func (a asked) ofStore(t require.TestingT, store *dossier.Store) *judged {
	if a.site == "" {
		a.site = "s1"
	}
	if a.measures.Exposure.Channels == nil {
		a.measures = osha().Measures
	}
	if a.law == nil {
		a.law = osha()
	}
	registers, err := store.Registers()
	require.NoError(t, err)
	b := dossier.NewGround(registers, a.measures, a.law, day(a.asOf)).Builder(dossier.Place{ID: a.site}, osha().ChoicesOf(a.choices))
	out := &judged{t: t}
	usage := dossier.NewUsage()
	for i := range store.Shards() {
		workers, err := store.Shard(i)
		require.NoError(t, err)
		for _, w := range workers {
			if file := b.Worker(w); file != nil {
				usage.Add(b, w, file.Input.(*dossier.Worker))
				out.files = append(out.files, file)
			}
		}
	}
	for _, more := range [][]*dossier.File{b.Groups(usage), b.Areas(usage), b.Instruments(usage), b.Rooms(usage), b.Testers(usage), {b.SiteDossier(usage)}} {
		out.files = append(out.files, more...)
	}
	return out
}

func (j *judged) file(kind, id string) *dossier.File {
	for _, f := range j.files {
		if f.Kind == kind && f.ID == id {
			return f
		}
	}
	require.Fail(j.t, "no dossier", "%s %s", kind, id)
	return nil
}

func (j *judged) has(kind, id string) bool {
	for _, f := range j.files {
		if f.Kind == kind && f.ID == id {
			return true
		}
	}
	return false
}

func (j *judged) worker() *dossier.Worker { return j.file("worker", "w1").Input.(*dossier.Worker) }
func (j *judged) group() *dossier.Group   { return j.file("group", "g1").Input.(*dossier.Group) }
func (j *judged) instrument(id string) *dossier.Instrument {
	return j.file("instrument", id).Input.(*dossier.Instrument)
}
func (j *judged) siteDossier() *dossier.Site {
	for _, f := range j.files {
		if s, ok := f.Input.(*dossier.Site); ok {
			return s
		}
	}
	return nil
}

// hired employs w1 at s1.
func hired(from string, left ...string) *record.Worker {
	return &record.Worker{WorkerID: "w1", Site: "s1", HiredOn: day(from), LeftOn: day(strings.Join(left, ""))}
}

// assigned puts w1 into a group.
func assigned(group, from string, to ...string) *record.Assignment {
	return &record.Assignment{WorkerID: "w1", Group: group, From: day(from), To: day(strings.Join(to, ""))}
}

func group(id string) *record.Group { return &record.Group{Group: id, Site: "s1", Area: "hall-" + id} }

// measured is a full-shift measurement of a group on the action channel.
func measured(id, group, date string, dose float64) *record.Measurement {
	return &record.Measurement{
		MeasurementID: id, Group: group, Date: day(date), Type: "personal", FullShift: record.Yes,
		CriterionDB: record.Num(90), ExchangeDB: record.Num(5), ThresholdDB: record.Num(80), UpperDB: record.Num(130), DosePct: record.Num(dose),
	}
}

// own is a full-shift measurement that w1 wore, for no group.
func own(id, date string, dose float64) *record.Measurement {
	m := measured(id, "", date, dose)
	m.WorkerID = "w1"
	return m
}

// but changes a copy of a measurement.
func but(m *record.Measurement, change func(*record.Measurement)) *record.Measurement {
	c := *m
	change(&c)
	return &c
}

// threshold takes a dose with another integration threshold; -1 leaves it out.
func threshold(m *record.Measurement, db float64) *record.Measurement {
	return but(m, func(m *record.Measurement) { m.ThresholdDB = record.Number{Value: db, Known: db >= 0} })
}

func changed(id, date, raises string) *record.Change {
	return &record.Change{ChangeID: id, Group: "g1", Date: day(date), RaisesExposure: raises}
}

// ear has one level at all frequencies.
func ear(db int) audiometry.Ear { return earWith(db, db, db) }

// earWith has levels at 2000, 3000 and 4000 Hz, and the first of them elsewhere.
func earWith(at2k, at3k, at4k int) audiometry.Ear {
	var e audiometry.Ear
	for i, hz := range audiometry.Frequencies {
		db := map[int]int{3000: at3k, 4000: at4k}[hz]
		if hz != 3000 && hz != 4000 {
			db = at2k
		}
		e[i] = audiometry.Threshold{Tenths: int16(10 * db), State: audiometry.Measured}
	}
	return e
}

// earBut changes one threshold of an ear.
func earBut(e audiometry.Ear, hz int, t audiometry.Threshold) audiometry.Ear {
	for i, f := range audiometry.Frequencies {
		if f == hz {
			e[i] = t
		}
	}
	return e
}

// tested is a hearing test of w1 with one level in each ear.
func tested(id, date, purpose string, left, right int) *record.Audiogram {
	return &record.Audiogram{AudiogramID: id, WorkerID: "w1", Date: day(date), Purpose: purpose, Left: ear(left), Right: ear(right)}
}

func follow(kind, audiogram, date string) *record.FollowUp {
	return &record.FollowUp{WorkerID: "w1", AudiogramID: audiogram, Type: kind, Date: day(date)}
}

func notice(about, date string, written record.Answer) *record.Notice {
	return &record.Notice{WorkerID: "w1", About: about, Date: day(date), Written: written}
}

func issued(protector, date, returned string) *record.ProtectorIssue {
	return &record.ProtectorIssue{WorkerID: "w1", ProtectorID: protector, Date: day(date), ReturnedOn: day(returned)}
}

// noisy is w1 from 2020 on in group g1, whose dose of 75 % was measured in 2019.
func noisy(more ...record.Record) []record.Record {
	return append([]record.Record{hired("2020-01-01"), assigned("g1", "2020-01-01"), group("g1"), measured("m1", "g1", "2019-11-15", 75)}, more...)
}

// shown writes spells as first day and last day with dots between.
func shown(spells []dossier.Spell) []string {
	out := []string{}
	for _, s := range spells {
		out = append(out, stretchText(s.From, s.To))
	}
	return out
}

func stretchText(from, to calendar.Date) string {
	if !to.Known() {
		return from.String() + ".."
	}
	return from.String() + ".." + (to - 1).String()
}

// open leaves out the time before the law.
func open(list []dossier.Open) []dossier.Open {
	return slices.DeleteFunc(slices.Clone(list), func(o dossier.Open) bool { return strings.HasPrefix(o.Reason, "the bundle has no value") })
}

func openText(list []dossier.Open) []string {
	out := []string{}
	for _, o := range open(list) {
		out = append(out, stretchText(o.From, o.To))
	}
	return out
}

func enrolledText(list []dossier.Enrolled) []string {
	out := []string{}
	for _, e := range list {
		out = append(out, stretchText(e.From, e.To))
	}
	return out
}

// levelsText writes exposure stretches with what is known on a channel.
func levelsText(list []dossier.Exposure, channel string) []string {
	out := []string{}
	for _, e := range list {
		l := e.Channels[channel]
		text := "unknown"
		switch {
		case l.DosePct.Known:
			text = l.DosePct.String()
		case l.AtLeast.Known && l.AtMost.Known:
			text = l.AtLeast.String() + " to " + l.AtMost.String()
		case l.AtLeast.Known:
			text = ">=" + l.AtLeast.String()
		case l.AtMost.Known:
			text = "<=" + l.AtMost.String()
		}
		out = append(out, fmt.Sprintf("%s %s", stretchText(e.From, e.To), text))
	}
	return out
}

func dateOf(l *dossier.Link) string {
	if l == nil {
		return ""
	}
	return l.Date.String()
}

func mustFloat(t require.TestingT, text string) float64 {
	v, err := strconv.ParseFloat(text, 64)
	require.NoError(t, err)
	return v
}
