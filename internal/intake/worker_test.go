package intake

import (
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/calendar"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

func TestEmploymentMayEndAndBeginOnOneDay(t *testing.T) {
	spell := func(from, to string) calendar.Spell {
		s := calendar.Spell{From: calendar.MustParse(from)}
		if to != "" {
			s.To = calendar.MustParse(to).AddDays(1)
		}
		return s
	}
	for _, c := range []struct {
		name string
		a, b calendar.Spell
		want bool
	}{
		{"apart", spell("2020-01-01", "2020-12-31"), spell("2021-01-01", ""), false},
		{"the day of the move", spell("2020-01-01", "2021-01-01"), spell("2021-01-01", ""), false},
		{"two days", spell("2020-01-01", "2021-01-02"), spell("2021-01-01", ""), true},
		{"within", spell("2020-01-01", ""), spell("2021-01-01", "2021-01-01"), true},
		{"the same day only", spell("2021-01-01", "2021-01-01"), spell("2021-01-01", "2021-01-01"), true},
	} {
		assert.Equal(t, c.want, overlap(c.a, c.b), c.name)
		assert.Equal(t, c.want, overlap(c.b, c.a), c.name)
	}
}

// An id that the rows of workers give to two people is nobody's, except on days on which only the one whose row was
// accepted was employed. A row that repeats another is no second person.
func TestDisputedID(t *testing.T) {
	p := programOf(t,
		"workers.csv", "worker_id,site,birth_date,hired_on,left_on\n"+
			"1,kiln-hill,1960-01-02,1990-01-01,2015-12-31\n1,kiln-hill,1994-01-02,2021-06-01,\n"+
			"2,kiln-hill,1960-01-02,1990-01-01,\n2,kiln-hill,1994-01-02,2021-06-01,\n"+
			"3,kiln-hill,1960-01-02,1990-01-01,\n3,kiln-hill,1960-01-02,1990-01-01,\n",
		"trainings.csv", "worker_id,date\n1,2014-01-01\n1,2018-01-01\n1,2024-01-01\n2,2014-01-01\n2,2024-01-01\n3,2024-01-01\n")
	records, l, err := readAll(t, p)
	require.NoError(t, err)
	var kept []string
	for _, r := range records {
		if r, ok := r.(*record.Training); ok {
			kept = append(kept, r.WorkerID+" "+r.Date.String())
		}
	}
	require.Equal(t, []string{"1 2014-01-01", "2 2014-01-01", "3 2024-01-01"}, kept)
	require.Len(t, l.Rejects, 6)
	require.Equal(t, "the row repeats row 6", l.Rejects[2].Why)
	for _, r := range l.Rejects[3:] {
		require.Contains(t, r.Why, "contradict each other")
		require.Contains(t, r.Remedy, "same_person")
	}
}

// TestRepeatsAcrossFiles holds the rows of all files of a kind against each other.
func TestRepeatsAcrossFiles(t *testing.T) {
	dir := t.TempDir()
	p := &program.Program{Sites: []program.Site{{ID: "kiln-hill"}}}
	for name, text := range map[string]string{"a.csv": "worker_id,date\n007,2024-01-01\n", "b.csv": "worker_id,date\nW-2,2024-01-02\n007,2024-01-01\n"} {
		require.NoError(t, os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600))
	}
	require.NoError(t, os.WriteFile(filepath.Join(dir, "workers.csv"), []byte(workersCSV), 0o600))
	for _, s := range []program.Source{{Shown: "a.csv", Kind: "training"}, {Shown: "workers.csv", Kind: "worker"}, {Shown: "b.csv", Kind: "training"}} {
		s.Path = filepath.Join(dir, s.Shown)
		p.Sources = append(p.Sources, s)
	}
	_, l, err := readAll(t, p)
	require.NoError(t, err)
	require.Len(t, l.Rejects, 1)
	require.Equal(t, "b.csv", l.Rejects[0].File)
	require.Equal(t, "the row repeats a.csv, row 2", l.Rejects[0].Why)
}
