package pseudonym

import (
	"fmt"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

const key = "0123456789abcdef0123456789ABCDEF"

func veil(t *testing.T, key string) *Veil {
	t.Helper()
	v, err := New([]byte(key))
	require.NoError(t, err)
	return v
}

// The codes were worked out by another program, with Python's hmac and hashlib.
func TestCode(t *testing.T) {
	v := veil(t, key)
	for _, c := range []struct {
		kind     Kind
		id, want string
	}{
		{Worker, "K0128", "W01JRNEH800"},
		{Worker, "000123", "W72J258Q09Y"},
		{Worker, "Zoë", "WV98ETR53HT"},
		{Person, "T-01", "P2C07FB2ADH"},
		{Audiogram, "A-00159", "AQQ84K6BEPE"},
		{Measurement, "N-0001", "MK6KWPRCZBZ"},
		{Certificate, "OHC 20-118", "CHZRHZ1AGXQ"},
		{Worker, "", ""},
	} {
		assert.Equal(t, c.want, v.Code(c.kind, c.id))
		assert.Equal(t, c.want, v.Code(c.kind, c.id), "the second time")
		assert.Equal(t, c.id, v.Real(c.want))
	}
	other := veil(t, strings.ToUpper(key))
	assert.NotEqual(t, v.Code(Worker, "K0128"), other.Code(Worker, "K0128"))
	assert.NotEqual(t, v.Code(Worker, "K0128")[1:], v.Code(Person, "K0128")[1:], "the kind is left out")
	require.NoError(t, v.Err())
}

// Letters that people take for digits do not stand in codes, and each sign comes as often as the others.
func TestCodesAreReadable(t *testing.T) {
	v, times := veil(t, key), map[rune]int{}
	for i := range 5000 {
		code := v.Code(Audiogram, fmt.Sprint(i))
		require.Len(t, code, length)
		assert.Equal(t, "A", code[:1])
		for _, c := range code[1:] {
			times[c]++
		}
	}
	require.NoError(t, v.Err())
	assert.Len(t, times, 32)
	for c, n := range times { // 1562.5 times each; the standard deviation is 38.9
		assert.NotContains(t, "ILOU", string(c))
		assert.InDelta(t, 1562.5, n, 6*38.9, "%c", c)
	}
}

// Two ids with one code would make one of two people; it is an error, and no report is written.
func TestDoubledCode(t *testing.T) {
	v := veil(t, key)
	v.ids[v.code(Worker, "K0001")] = "K0002"
	require.NoError(t, v.Err())
	v.Record(&record.Training{WorkerID: "K0001"})
	require.Error(t, v.Err())
	assert.Contains(t, v.Err().Error(), "use another key file")
	assert.NotContains(t, v.Err().Error(), "K000")
}

func TestRecord(t *testing.T) {
	v := veil(t, key)
	worker, tester := v.Code(Worker, "K0128"), v.Code(Person, "T-01")
	for _, c := range []struct{ is, want record.Record }{
		{&record.Worker{WorkerID: "K0128", Site: "K0128", JobTitle: "K0128"}, &record.Worker{WorkerID: worker, Site: "K0128", JobTitle: "K0128"}},
		{&record.Audiogram{AudiogramID: "A-1", WorkerID: "K0128", TesterID: "T-01", Reviewer: "physician", RoomID: "R-1"},
			&record.Audiogram{AudiogramID: v.Code(Audiogram, "A-1"), WorkerID: worker, TesterID: tester, Reviewer: "physician", RoomID: "R-1"}},
		{&record.Notice{WorkerID: "K0128", AudiogramID: "A-1", MeasurementID: "N-1"},
			&record.Notice{WorkerID: worker, AudiogramID: v.Code(Audiogram, "A-1"), MeasurementID: v.Code(Measurement, "N-1")}},
		{&record.FollowUp{WorkerID: "K0128", AudiogramID: "A-1", By: "T-01"}, &record.FollowUp{WorkerID: worker, AudiogramID: v.Code(Audiogram, "A-1"), By: tester}},
		{&record.Tester{TesterID: "T-01", Certificate: "X 1", Supervisor: "P-01"},
			&record.Tester{TesterID: tester, Certificate: v.Code(Certificate, "X 1"), Supervisor: v.Code(Person, "P-01")}},
		{&record.ProtectorIssue{WorkerID: "K0128", FittedBy: "T-01", ProtectorID: "P-1"}, &record.ProtectorIssue{WorkerID: worker, FittedBy: tester, ProtectorID: "P-1"}},
		{&record.Measurement{MeasurementID: "N-1"}, &record.Measurement{MeasurementID: v.Code(Measurement, "N-1")}},
		{&record.Task{Samples: record.List{"88.1", "N-1", "000123", "85", "1e3"}},
			&record.Task{Samples: record.List{"88.1", v.Code(Measurement, "N-1"), v.Code(Measurement, "000123"), "85", v.Code(Measurement, "1e3")}}},
		{&record.Measurement{MeasurementID: "85"}, &record.Measurement{MeasurementID: "85"}}, // it may be meant by a task's sample
		// A group of one that has the worker's id as its name.
		{&record.Assignment{WorkerID: "K0128", Group: "K0128"}, &record.Assignment{WorkerID: worker, Group: worker}},
		{&record.Group{Group: "K0128", Area: "A-1"}, &record.Group{Group: worker, Area: "A-1"}},
		{&record.Change{ChangeID: "K0128", Area: "K0128"}, &record.Change{ChangeID: "K0128", Area: worker}},
		{&record.WearCheck{Area: "hall", Date: calendar.MustParse("2020-01-02")}, &record.WearCheck{Area: "hall", Date: calendar.MustParse("2020-01-02")}},
	} {
		v.Record(c.is)
		assert.Equal(t, c.want, c.is)
	}
}

// Every text field of a record is either covered or known to be no id of a person. Whoever adds one decides here.
func TestEveryFieldIsDecided(t *testing.T) {
	plain := strings.Fields(`site job_title group area description instrument_id what change_id task audiometer_id room_id language
		protector_id model class serial standard covers topics`)
	for _, k := range record.Kinds() {
		table, _ := record.TableOf(k)
		for _, f := range table.Fields {
			if f.Type != record.Text && f.Type != record.Words || f.One != nil || f.Like != nil || f.Name == samples || Covers(f.Name) {
				continue
			}
			assert.True(t, slices.Contains(plain, f.Name), "may the field %s of a %s hold an id of a person?", f.Name, k)
		}
	}
	for name := range fields {
		assert.True(t, slices.ContainsFunc(record.Kinds(), func(k record.Kind) bool {
			table, _ := record.TableOf(k)
			return table.Index(name) >= 0
		}), "no record has the field %s", name)
	}
}

func TestTexts(t *testing.T) {
	v := veil(t, key)
	worker := v.Code(Worker, "K0128")
	v.Code(Worker, "12")
	v.Code(Person, "safety")
	v.Code(Audiogram, "A-1")
	assert.Equal(t, worker+" is on leave for 12 weeks (see "+worker+", A-1, K01281); safety", v.Text("K0128 is on leave for 12 weeks (see K0128, A-1, K01281); safety"))
	assert.Equal(t, "K0128/A-1@2020-01-02 and W0000000000", v.Real(worker+"/"+v.Code(Audiogram, "A-1")+"@2020-01-02 and W0000000000"))
	var none *Veil
	assert.Equal(t, "K0128", none.Text("K0128"))
	assert.Equal(t, "K0128", none.Real("K0128"))
}

func TestKeys(t *testing.T) {
	dir := t.TempDir()
	for _, c := range []struct{ content, why string }{
		{"short", "has 5 bytes and needs 32 at least"},
		{"", "has 0 bytes"},
		{strings.Repeat("0", 64), "repeats so few different bytes (1)"},
		{strings.Repeat("0123456789abcdef", 5000), "larger than a key can be"},
	} {
		path := filepath.Join(dir, "key")
		require.NoError(t, os.WriteFile(path, []byte(c.content), 0o600))
		_, err := Load(path)
		require.Error(t, err)
		assert.Contains(t, err.Error(), c.why)
		assert.Contains(t, err.Error(), "hearduty key FILE")
	}
	_, err := Load(filepath.Join(dir, "none"))
	require.ErrorIs(t, err, os.ErrNotExist)
	path := filepath.Join(dir, "good")
	require.NoError(t, os.WriteFile(path, []byte(key), 0o600))
	v, err := Load(path)
	require.NoError(t, err)
	assert.Equal(t, veil(t, key).Code(Worker, "a"), v.Code(Worker, "a"))
	require.NoError(t, os.WriteFile(path, []byte(key+"\n"), 0o600))
	v, err = Load(path)
	require.NoError(t, err)
	assert.NotEqual(t, veil(t, key).Code(Worker, "a"), v.Code(Worker, "a"), "a byte of the key does not count")
}

func BenchmarkRecord(b *testing.B) {
	v, _ := New([]byte(key))
	ids := make([]string, 1000)
	for i := range ids {
		ids[i] = fmt.Sprintf("A-%06d", i)
	}
	b.ReportAllocs()
	for i := 0; b.Loop(); i++ {
		v.Record(&record.Audiogram{AudiogramID: ids[i%len(ids)], WorkerID: ids[i%100], TesterID: "T-01"})
	}
}
