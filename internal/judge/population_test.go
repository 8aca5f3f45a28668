package judge

import (
	"encoding/csv"
	"os"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/calendar"
	"hearduty/internal/program"
)

func peopleOf(t *testing.T, path string, change func(*Options)) *People {
	t.Helper()
	p, problems := program.Load(path)
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	o := Options{Program: p, Library: library, AsOf: p.AsOf}
	if change != nil {
		change(&o)
	}
	people, err := Population(t.Context(), o)
	require.NoError(t, err)
	return people
}

// american are the sites of the demo whose records stand in its folder records.
var american = []string{"kiln-hill", "larch-street"}

// The population is everybody whose row of workers.csv says that they are employed on the day.
func TestPopulationIsWhoIsEmployed(t *testing.T) {
	const dir = "../../testdata/demo/"
	f, err := os.Open(dir + "records/workers.csv")
	require.NoError(t, err)
	defer f.Close()
	rows, err := csv.NewReader(f).ReadAll()
	require.NoError(t, err)
	for _, day := range []string{"2026-06-30", "2021-03-01", "2019-01-01"} {
		asOf, want := calendar.MustParse(day), map[string]int{}
		for i, row := range rows[1:] {
			if row[4] <= day && (row[5] == "" || row[5] >= day) {
				want[row[1]+" "+row[0]] = i + 2
			}
		}
		people := peopleOf(t, dir+"program.yaml", func(o *Options) { o.AsOf, o.Sites = asOf, american })
		got := map[string]int{}
		for i, m := range people.Members {
			got[m.Site+" "+m.Worker] = m.Record.Row
			assert.Equal(t, "records/workers.csv", m.Record.File)
			if i > 0 && people.Members[i-1].Site == m.Site {
				assert.Less(t, people.Members[i-1].Worker, m.Worker, "the members are not in order")
			}
		}
		assert.Equal(t, want, got, day)
	}
}

// The bands are those that the findings rest on: whoever is at the action level or over the limit is enrolled.
func TestBands(t *testing.T) {
	people := peopleOf(t, "../../testdata/demo/program.yaml", func(o *Options) { o.Sites = american })
	times := map[Band]int{}
	for _, m := range people.Members {
		times[m.Band]++
		assert.Equal(t, m.Band == OverLimit || m.Band == AtAction, m.Enrolled, "%s %s", m.Worker, m.Band)
	}
	for _, band := range Bands {
		assert.Positive(t, times[band], band)
	}
	require.Len(t, people.Sites, 2)
	assert.Equal(t, len(people.Members), people.Sites[0].Workers+people.Sites[1].Workers)
	assert.Equal(t, []string{"us-osha-general-industry"}, people.Sites[0].Bundles)
	one := peopleOf(t, "../../testdata/demo/program.yaml", func(o *Options) { o.Sites = []string{"larch-street"} })
	require.Len(t, one.Sites, 1)
	assert.Len(t, one.Members, people.Sites[1].Workers)
}

// A worker at the level that enrols whose limit is not decided is at that level; one of whom nothing was measured is not
// known.
func TestBandOfUnknownExposure(t *testing.T) {
	dir := writeProgram(t, map[string]string{
		"program.yaml": "program: Bands\nas_of: 2026-06-30\nsites: [{id: a, bundles: [us-osha-general-industry]}]\n" +
			"records: [workers.csv, groups.csv, assignments.csv, measurements.csv]\n",
		"workers.csv":     "worker_id,site,hired_on\nw1,a,2020-01-01\nw2,a,2020-01-01\nw3,a,2020-01-01\nw4,a,2020-01-01\n",
		"groups.csv":      "group,site,suspected_noisy,shift_minutes\nloud,a,yes,480\nquiet,a,yes,480\nopen,a,yes,480\n",
		"assignments.csv": "worker_id,group,from\nw1,loud,2020-01-01\nw2,quiet,2020-01-01\nw3,open,2020-01-01\n",
		"measurements.csv": "measurement_id,date,group,kind,run_minutes,shift_minutes,full_shift,criterion_db,exchange_db,threshold_db,upper_db,dose_pct\n" +
			"n1,2020-01-02,loud,personal,480,480,yes,90,5,80,130,80\n" +
			"n2,2020-01-02,quiet,personal,480,480,yes,90,5,80,130,20\n" +
			"n2,2020-01-02,quiet,personal,480,480,yes,90,5,90,130,10\n",
	})
	got := map[string]Band{}
	for _, m := range peopleOf(t, dir, nil).Members {
		got[m.Worker] = m.Band
	}
	assert.Equal(t, map[string]Band{"w1": AtAction, "w2": BelowAction, "w3": UnknownBand, "w4": UnknownBand}, got)
}

func writeProgram(t *testing.T, files map[string]string) string {
	t.Helper()
	dir := t.TempDir()
	for name, text := range files {
		require.NoError(t, os.WriteFile(dir+"/"+name, []byte(text), 0o600))
	}
	return dir
}
