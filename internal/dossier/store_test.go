package dossier_test

import (
	"bytes"
	"encoding/json"
	"fmt"
	"os"
	"reflect"
	"slices"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/record"
)

// written writes all dossiers, with their series and uses.
func (j *judged) written() []string {
	var out []string
	for _, f := range j.files {
		b, err := json.Marshal(map[string]any{"input": f.Input, "series": f.Series, "uses": f.Uses})
		require.NoError(j.t, err)
		out = append(out, fmt.Sprintf("%s %s %s", f.Kind, f.ID, b))
	}
	slices.Sort(out)
	return out
}

// drawRecords draws records of three workers, two sites and three groups. Row numbers tell them apart.
func drawRecords(t *rapid.T, from, to string) []record.Record {
	date := rapid.Custom(func(t *rapid.T) calendar.Date {
		return calendar.Date(rapid.IntRange(int(day(from)), int(day(to))).Draw(t, "day"))
	})
	maybe := func(d calendar.Date) calendar.Date {
		if rapid.Bool().Draw(t, "open") {
			return 0
		}
		return d + calendar.Date(rapid.IntRange(0, 500).Draw(t, "days"))
	}
	pick := func(of ...string) string { return rapid.SampledFrom(of).Draw(t, "pick") }
	answer := func() record.Answer { return record.Answer(rapid.IntRange(0, 2).Draw(t, "answer")) }
	prefix := from[:4]
	var out []record.Record
	for i := range rapid.IntRange(1, 40).Draw(t, "records") {
		id, d, w := fmt.Sprintf("%s-%d", prefix, i), date.Draw(t, "date"), pick("w1", "w2", "w3")
		var rec record.Record
		switch pick("worker", "assignment", "measurement", "own", "area", "change", "control", "task", "notice", "audiogram", "audiogram", "follow", "issue", "fit", "wear", "training", "calibration", "document", "survey") {
		case "worker":
			rec = &record.Worker{WorkerID: w, Site: pick("s1", "s1", "s2"), HiredOn: d, LeftOn: maybe(d), Sex: pick("male", "female", ""), BirthDate: d - 9000, JobTitle: id}
		case "assignment":
			rec = &record.Assignment{WorkerID: w, Group: pick("g1", "g2", "g3"), From: d, To: maybe(d)}
		case "measurement":
			rec = threshold(measured(id, pick("g1", "g2"), d.String(), rapid.Float64Range(0, 200).Draw(t, "dose")), rapid.SampledFrom([]float64{-1, 70, 80, 90}).Draw(t, "threshold"))
			rec.(*record.Measurement).InstrumentID = pick("ds", "")
		case "own":
			m := own(id, d.String(), rapid.Float64Range(0, 200).Draw(t, "dose"))
			m.WorkerID = w
			rec = m
		case "area":
			m := measured(id, "", d.String(), 60)
			m.Type, m.Area, m.LAeqDBA = pick("area", "task"), "hall-g1", record.Num(88)
			rec = m
		case "change":
			rec = &record.Change{ChangeID: id, Date: d, Group: pick("g1", "g2"), RaisesExposure: pick("yes", "no", "unknown", "")}
		case "control":
			rec = &record.Control{Group: pick("g1", "g2"), Date: d, InstalledOn: maybe(d), Type: "engineering"}
		case "task":
			rec = &record.Task{Group: pick("g2", "g3"), Task: id, Date: d, Minutes: record.Num(240), Samples: record.List{pick("85", "95", "2000-1", "2000-2", "2000-3", "2020-1")}}
		case "notice":
			rec = &record.Notice{WorkerID: w, Date: d, About: pick("exposure", "shift", "quiet_period"), Written: answer(), MeasurementID: pick("", "", "2000-1", "2000-2", "2020-1"), AudiogramID: pick("", "2000-3", "2020-2")}
		case "audiogram":
			a := tested(id, d.String(), pick("baseline", "periodic", "retest", "exit"), rapid.IntRange(0, 50).Draw(t, "left"), rapid.IntRange(0, 50).Draw(t, "right"))
			a.WorkerID, a.AudiometerID, a.RoomID, a.TesterID, a.DeterminedOn, a.ReviewedOn = w, pick("au", ""), pick("r1", ""), pick("t1", ""), maybe(d), maybe(d)
			rec = a
		case "follow":
			rec = &record.FollowUp{WorkerID: w, Date: d, AudiogramID: pick("", "2000-1", "2000-2", "2000-3", "2000-4", "2020-1"), Ear: pick("left", "right", "both", ""), By: pick("t1", "physician", ""),
				Type:   pick("baseline_revision", "invalidated", "log_entry", "medical_opinion", "referral", "persistence_opinion", "fitting"),
				Result: pick("", "not_work_related", "work_related")}
		case "issue":
			rec = &record.ProtectorIssue{WorkerID: w, ProtectorID: pick("p1", "p2"), Date: d, ReturnedOn: maybe(d)}
		case "fit":
			rec = &record.FitTest{WorkerID: w, ProtectorID: pick("p1", "p2"), Date: d, Passed: answer()}
		case "wear":
			rec = &record.WearCheck{WorkerID: pick(w, ""), Area: "hall-g1", Date: d, Worn: answer(), Observed: record.Num(3), Wearing: record.Num(3)}
		case "training":
			rec = &record.Training{WorkerID: w, Date: d, Topics: record.List{pick("protectors", "noise_effects")}}
		case "calibration":
			rec = deviation(pick("functional", "acoustic", "exhaustive"), d.String(), pick("fail", "pass", ""), 12)
			rec.(*record.Calibration).InstrumentID = pick("au", "ds")
		case "document":
			rec = &record.Document{Type: pick("injury_log", "attenuation_evaluation"), Site: "s1", Date: d, Covers: record.List{"2005", "2006"}}
		case "survey":
			rec = &record.RoomSurvey{RoomID: "r1", Date: d}
		}
		rec.SetAt(record.Origin{Source: int32(len(prefix)), Row: int32(10000*int(prefix[2]) + i + 1)})
		out = append(out, rec)
	}
	return out
}

// fixed are the records without a day of their own.
func fixed() []record.Record {
	out := []record.Record{group("g1"), group("g2"), model("p1", 25), &record.Instrument{InstrumentID: "au", Type: "audiometer", Site: "s1"},
		&record.Tester{TesterID: "t1", Qualification: "physician"},
		&record.Worker{WorkerID: "w1", Site: "s1", HiredOn: day("2000-01-01")}, &record.Worker{WorkerID: "w2", Site: "s2", HiredOn: day("2000-01-01"), LeftOn: day("2003-12-31")},
		&record.Assignment{WorkerID: "w1", Group: "g1", From: day("2000-01-01")}}
	for i, rec := range out {
		rec.SetAt(record.Origin{Row: int32(i + 1)})
	}
	return out
}

func TestRecordsOfLaterDaysChangeNothing(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		early, late := drawRecords(t, "2000-01-01", "2010-06-30"), drawRecords(t, "2010-07-01", "2020-12-31")
		for i, rec := range late { // other ids, but such as early records may refer to
			if a, ok := rec.(*record.Audiogram); ok {
				a.AudiogramID = fmt.Sprintf("2020-%d", i)
			}
			if m, ok := rec.(*record.Measurement); ok {
				m.MeasurementID = fmt.Sprintf("2020-%d", i)
			}
		}
		for _, site := range []string{"s1", "s2"} {
			a := asked{asOf: "2010-06-30", site: site}
			before := a.judge(t, slices.Concat(fixed(), early)...).written()
			after := a.judge(t, slices.Concat(fixed(), early, late)...).written()
			require.Equal(t, before, after)
		}
	})
}

func TestDaysAfterTheAsOfDayAreForgotten(t *testing.T) {
	a1 := tested("a1", "2021-03-01", "periodic", 30, 10)
	a1.DeterminedOn, a1.ReviewedOn = day("2021-03-20"), day("2021-03-20")
	records := noisy(tested("a0", "2020-02-01", "baseline", 10, 10), a1, issued("p1", "2020-05-01", "2021-03-20"))
	d := judge(t, "2021-03-19", records...).worker()
	assert.Empty(t, []string{d.Audiograms[1].ComparedOn.String() + d.Audiograms[1].ReviewedOn.String() + d.Shifts[0].DeterminedOn.String() + d.Recordables[0].KnownOn.String()}[0])
	assert.Equal(t, []string{"2021-03-01.."}, shown(d.AfterShift))
	assert.NotNil(t, d.Protection)
	d = judge(t, "2021-03-20", records...).worker()
	assert.Equal(t, "2021-03-20", d.Audiograms[1].ComparedOn.String())
	assert.Equal(t, []string{"2021-03-20.."}, shown(d.AfterShift))
	assert.Nil(t, d.Protection)
}

func TestTheOrderOfTheInputDoesNotMatter(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		records := slices.Concat(fixed(), drawRecords(t, "2000-01-01", "2010-06-30"))
		shuffled := rapid.Permutation(records).Draw(t, "order")
		require.Equal(t, judge(t, "2010-06-30", records...).written(), judge(t, "2010-06-30", shuffled...).written())
	})
}

func TestPackedRecordsMoveToAFile(t *testing.T) {
	t.Setenv("TMPDIR", t.TempDir())
	rapid.Check(t, func(t *rapid.T) {
		records := slices.Concat(fixed(), drawRecords(t, "2000-01-01", "2010-06-30"))
		store := dossier.NewStore()
		store.SetBudget(rapid.IntRange(0, 20).Draw(t, "budget"))
		for _, rec := range records {
			require.NoError(t, store.Add(rec))
		}
		spilled := asked{asOf: "2010-06-30"}.ofStore(t, store)
		require.Positive(t, store.Spilled())
		require.Equal(t, judge(t, "2010-06-30", records...).written(), spilled.written())
		require.NoError(t, store.Close())
		left, err := os.ReadDir(os.TempDir())
		require.NoError(t, err)
		require.Empty(t, left, "the file is gone")
	})
}

func TestAFileThatCannotBeWritten(t *testing.T) {
	t.Setenv("TMPDIR", t.TempDir()+"/none")
	store := dossier.NewStore()
	store.SetBudget(0)
	require.ErrorIs(t, store.Add(hired("2020-01-01")), os.ErrNotExist)
	require.NoError(t, store.Close())
}

func TestShardsHoldEveryWorkerOnce(t *testing.T) {
	store := dossier.NewStore()
	defer store.Close()
	const n = 2000
	for i := range 3 * n {
		require.NoError(t, store.Add(&record.Training{WorkerID: fmt.Sprint("w", i%n), Date: day("2020-01-01") + calendar.Date(i)}))
	}
	seen := map[string]int{}
	filled := 0
	for i := range store.Shards() {
		workers, err := store.Shard(i)
		require.NoError(t, err)
		if len(workers) > 0 {
			filled++
		}
		require.True(t, slices.IsSortedFunc(workers, func(a, b *dossier.WorkerRecords) int { return bytes.Compare([]byte(a.ID), []byte(b.ID)) }))
		for _, w := range workers {
			seen[w.ID] += len(w.Trainings)
			require.True(t, slices.IsSortedFunc(w.Trainings, func(a, b *record.Training) int { return int(a.Date - b.Date) }))
		}
	}
	require.Len(t, seen, n)
	for _, count := range seen {
		require.Equal(t, 3, count)
	}
	assert.Greater(t, filled, store.Shards()/2)
}

func TestDuplicateReferencesGetNumbers(t *testing.T) {
	refs := dossier.NewRefs()
	one, two, three := hired("2020-01-01"), hired("2021-01-01"), hired("2022-01-01")
	assert.Equal(t, []string{"worker/w1", "worker/w1#2", "worker/w1", "worker/w1#3", "worker/w1#2"},
		[]string{refs.Of(one), refs.Of(two), refs.Of(one), refs.Of(three), refs.Of(two)})
	rec, ok := refs.Record("worker/w1#2")
	assert.True(t, ok)
	assert.Same(t, two, rec)
	_, ok = refs.Record("worker/w2")
	assert.False(t, ok)
	for _, kind := range record.Kinds() {
		table, _ := record.TableOf(kind)
		assert.NotContains(t, refs.Of(table.New()), "?", "every kind has a name")
	}
}

func TestEveryReferenceOfADossierIsOfARecord(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		for _, f := range judge(t, "2010-06-30", slices.Concat(fixed(), drawRecords(t, "2000-01-01", "2010-06-30"))...).files {
			check := func(ref string) {
				_, ok := f.Refs.Record(ref)
				require.True(t, ok, "%s %s cites %q", f.Kind, f.ID, ref)
			}
			walkLinks(reflect.ValueOf(f.Input), check)
			for _, links := range f.Series {
				for _, l := range links {
					check(l.Ref)
					require.LessOrEqual(t, l.Date, day("2010-06-30"), "a series has nothing after the as-of day")
				}
			}
		}
	})
}

// walkLinks calls a function with every reference of the links in a value.
func walkLinks(v reflect.Value, found func(string)) {
	if !v.IsValid() {
		return
	}
	if l, ok := v.Interface().(dossier.Link); ok {
		found(l.Ref)
		return
	}
	switch v.Kind() {
	case reflect.Pointer, reflect.Interface:
		if !v.IsNil() {
			walkLinks(v.Elem(), found)
		}
	case reflect.Slice:
		for i := range v.Len() {
			walkLinks(v.Index(i), found)
		}
	case reflect.Map:
		for _, key := range v.MapKeys() {
			walkLinks(v.MapIndex(key), found)
		}
	case reflect.Struct:
		for i := range v.NumField() {
			walkLinks(v.Field(i), found)
		}
	}
}
