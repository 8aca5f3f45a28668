package intake

import (
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

func discard(record.Record) error { return nil }

func TestTranslate(t *testing.T) {
	day := calendar.MustParse
	p := newPeople([]program.Alias{
		{ID: "000123", Other: "AG-1"},
		{ID: "9-B", Other: "9", Days: calendar.Spell{From: day("2020-01-01"), To: day("2022-01-01")}},
		{ID: "9-C", Other: "9", Days: calendar.Spell{From: day("2022-01-01")}},
	})
	for _, c := range []struct {
		r    record.Record
		want string
	}{
		{&record.Training{WorkerID: "AG-1"}, "000123"},
		{&record.Training{WorkerID: "AG-2", Date: day("2020-01-01")}, "AG-2"},
		{&record.Training{WorkerID: "9", Date: day("2019-12-31")}, "9"},
		{&record.Training{WorkerID: "9", Date: day("2020-01-01")}, "9-B"},
		{&record.Training{WorkerID: "9", Date: day("2021-12-31")}, "9-B"},
		{&record.Training{WorkerID: "9", Date: day("2022-01-01")}, "9-C"},
		{&record.Training{WorkerID: "9"}, "9"},
		{&record.Worker{WorkerID: "9", HiredOn: day("2023-01-01")}, "9-C"},
		{&record.Assignment{WorkerID: "9", From: day("2021-01-01")}, "9-B"},
		{&record.Examination{WorkerID: "9", AttendedOn: day("2021-01-01")}, "9-B"},
		{&record.Examination{WorkerID: "9", OfferedOn: day("2021-01-01"), AttendedOn: day("2023-01-01")}, "9-B"},
		{&record.WearCheck{WorkerID: "9", Date: day("2021-01-01")}, "9-B"},
		{&record.Measurement{WorkerID: "AG-1", Date: day("2021-01-01")}, "000123"},
	} {
		p.translate(c.r)
		table, _ := record.TableOf(c.r.Kind())
		assert.Equal(t, c.want, table.Text(c.r, table.Index("worker_id")), "%s", c.r.Kind())
	}
	p.translate(&record.Group{Group: "9"}) // a kind without workers
	assert.Equal(t, 10, p.now)
}

// Every kind that names a worker is dated by a field that it has.
func TestEveryKindIsDated(t *testing.T) {
	for _, k := range record.Kinds() {
		table, _ := record.TableOf(k)
		p := newPeople(nil)
		p.begin(k)
		if table.Index("worker_id") >= 0 {
			require.GreaterOrEqual(t, p.day, 0, string(k))
		}
	}
}

// An id that lost its zeros is never joined, only pointed out; of several nothing is chosen.
func TestAlikeWorkers(t *testing.T) {
	for _, c := range []struct{ name, workers, id, why string }{
		{"one", "00123", "123", `no worker has the id "123", but the id "00123" differs in leading zeros only`},
		{"more zeros than there were", "123", "000123", `but the id "123" differs`},
		{"several", "00123,0123", "123", `no worker has the id "123", and which of 00123, 0123 is meant cannot be told`},
		{"none", "00124", "123", `no worker has the id "123"`},
		{"zero", "000", "0", `but the id "000" differs`},
		{"letters", "A-0123", "A-123", `no worker has the id "A-123"`},
	} {
		g := newRegister(testProgram(), []source{{kind: "worker"}}, &Ledger{})
		for _, id := range strings.Split(c.workers, ",") {
			g.workers[id] = &person{}
		}
		p := g.orphan(c.id)
		assert.Contains(t, p.Why, c.why, c.name)
		assert.NotEmpty(t, p.Remedy)
	}
}
