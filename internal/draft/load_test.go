package draft

import (
	"io"
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/record"
)

// replies are what somebody puts in place of lines of a draft, by export: old line, new line.
var replies = map[string][]string{
	"wide.csv":             {"    # limit: ASK", "    limit: 100"},
	"two_heads.csv":        {"# dates:", "dates:", "  # order: day_month_year", "  order: day_month_year"},
	"frequency_rows.csv":   {"    # limit: ASK", "    limit: 100"},
	"baseline_current.csv": {"      # purpose: {constant: periodic}", "      purpose: {constant: periodic}"},
	"roster_es.csv": {
		"# dates:", "dates:", "  # order: day_month_year", "  order: day_month_year", "    # pad: 6", "    pad: 6",
		"    # values:", "    values:", "    #   H: ASK", "      H: male", "    #   M: ASK", "      M: female",
	},
	"trainings.tsv": {"# dates:", "dates:", "  # latest_two_digit_year: ASK", "  latest_two_digit_year: 2026"},
	"survey.csv":    {"  # date: ASK", "  date: {constant: 2025-03-04}", "    # limit: ASK", "    limit: 100"},
	"headless.csv": {
		"# kind: ASK", "kind: audiogram", "# ignore:", "fields: {audiogram_id: {make: [worker_id, date]}, worker_id: {position: 1}, date: {position: 4, order: month_day_year}, right.500: {position: 5}, left.500: {position: 6}}",
	},
	"fhir.json":      {`  # worker_id_system: "urn:example:staff"`, `  worker_id_system: "urn:example:staff"`},
	"two_heads.xlsx": {"    # limit: ASK", "    limit: 100"},
	"tests_ja.csv":   nil, // only looking at it is asked for
}

// faulty are the exports with rows that nothing can be made of.
var faulty = map[string]bool{"two_heads.xlsx": true}

// answer puts the answers into a draft. Each must find its line.
func answer(t *testing.T, draft string, pairs []string) string {
	t.Helper()
	lines := strings.Split(draft, "\n")
	for i := 0; i < len(pairs); i += 2 {
		found := false
		for j, l := range lines {
			if rest, ok := strings.CutPrefix(l, pairs[i]); ok && !found && (rest == "" || rest[0] == ' ') {
				lines[j], found = pairs[i+1]+rest, true
			}
		}
		require.True(t, found, "no line begins with %q:\n%s", pairs[i], draft)
	}
	return strings.Join(lines, "\n")
}

func load(t *testing.T, draft string) (*mapping.Map, diag.List) {
	t.Helper()
	path := filepath.Join(t.TempDir(), "map.yaml")
	require.NoError(t, os.WriteFile(path, []byte(draft), 0o600))
	return mapping.Load(path, "map.yaml")
}

// rowsOf reads an export by a draft. It gives the records as field=value, and the faults.
func rowsOf(t *testing.T, path, draft string) (records []map[string]string, faults []*mapping.Fault) {
	t.Helper()
	m, l := load(t, draft)
	require.Empty(t, l)
	f, err := grid.Open(path, "")
	require.NoError(t, err)
	defer f.Close()
	source, said, err := m.Bind(f, m.Kind)
	require.NoError(t, err)
	assert.Empty(t, said, "columns that the draft does not speak of")
	table, _ := record.TableOf(m.Kind)
	var out mapping.Out
	for {
		err := source.Next(&out)
		if err == io.EOF {
			return records, faults
		}
		require.NoError(t, err)
		if out.Fault != nil {
			faults = append(faults, out.Fault)
		}
		for _, r := range out.Records {
			values := map[string]string{}
			for _, v := range r.Values {
				values[table.Fields[v.Field].Name] = strings.Clone(v.Text)
			}
			records = append(records, values)
		}
	}
}

// TestDraftsLoad holds every draft to what reads it: at once where no question is open, and otherwise once they are
// answered; then every row of data becomes a record.
func TestDraftsLoad(t *testing.T) {
	for _, path := range exports(t) {
		name := filepath.Base(path)
		t.Run(name, func(t *testing.T) {
			draft := draftOf(t, path, Options{})
			pairs, asked := replies[name]
			assert.Equal(t, asked, !strings.Contains(draft, "No question is open."), "a question is open, or none is")
			draft = answer(t, draft, pairs)
			if strings.HasPrefix(name, "fhir") {
				_, l := load(t, draft)
				require.Empty(t, l)
				return
			}
			records, faults := rowsOf(t, path, draft)
			assert.NotEmpty(t, records)
			for _, f := range faults {
				assert.True(t, faulty[name], "%s: %s", f.Field, f.Why)
			}
		})
	}
}

// TestDraftsReadWhatIsThere compares the first record of some exports with what a person reads in them.
func TestDraftsReadWhatIsThere(t *testing.T) {
	for name, want := range map[string]map[string]string{
		"wide.csv":             {"worker_id": "000123", "date": "2025-03-04", "purpose": "baseline", "right.stated_shift": "yes", "audiogram_id": "000123-2025-03-04"},
		"baseline_current.csv": {"worker_id": "000123", "date": "2018-03-14", "purpose": "baseline"},
		"frequency_rows.csv":   {"worker_id": "000123", "date": "2025-05-10", "left.8000": "0"},
		"roster_es.csv":        {"worker_id": "000123", "sex": "male", "birth_date": "1975-02-01", "left_on": "", "site": "kiln-hill"},
		"dosimeter.csv":        {"worker_id": "000125", "date": "2025-04-11", "run_minutes": "465", "dose_pct": "62.5", "threshold_db": "80", "kind": "personal"},
		"survey.csv":           {"worker_id": "9100", "left.8000": "NT", "left.6000": "NR>100"},
		"tests_ja.csv":         {"worker_id": "000123", "date": "2025-03-04"},
		"two_heads.csv":        {"worker_id": "000123", "date": "2025-04-03"},
	} {
		path := filepath.Join("testdata", name)
		records, _ := rowsOf(t, path, answer(t, draftOf(t, path, Options{}), replies[name]))
		require.NotEmpty(t, records, name)
		for field, text := range want {
			assert.Equal(t, text, records[0][field], "%s: %s", name, field)
		}
	}
}

// TestOpenQuestionsRejectRows looks at drafts that load although a question is open: no row of theirs is read by guessing.
func TestOpenQuestionsRejectRows(t *testing.T) {
	for name, field := range map[string]string{"two_heads.csv": "date", "trainings.tsv": "date", "sex.csv": "sex"} {
		path := filepath.Join("testdata", name)
		if name == "sex.csv" {
			path = filepath.Join(t.TempDir(), name)
			require.NoError(t, os.WriteFile(path, []byte("Employee ID,Site,Sex,Hire date\nA1,kiln-hill,1,2010-01-01\nA2,kiln-hill,2,2010-01-01\n"), 0o600))
		}
		records, faults := rowsOf(t, path, draftOf(t, path, Options{}))
		for _, r := range records {
			assert.Equal(t, "2025-04-04", r["date"], "%s: only this is one day in either order", name)
		}
		require.NotEmpty(t, faults, name)
		for _, f := range faults {
			assert.Equal(t, field, f.Field, name)
			assert.NotEmpty(t, f.Remedy, name)
		}
	}
}

// TestOpenDraftsAreRefused looks at drafts whose open questions keep them from being read at all.
func TestOpenDraftsAreRefused(t *testing.T) {
	for _, name := range []string{"wide.csv", "frequency_rows.csv", "survey.csv", "headless.csv"} {
		_, l := load(t, draftOf(t, filepath.Join("testdata", name), Options{}))
		assert.True(t, l.Failed(), name)
	}
}
