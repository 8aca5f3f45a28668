package cli

import (
	"archive/zip"
	"bytes"
	"encoding/csv"
	"encoding/json"
	"io"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"unicode"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/accept"
	"hearduty/internal/bundle"
	"hearduty/internal/judge"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/report"
	"hearduty/internal/report/pull"
)

const testKey = "a key for tests, of which everybody knows\n"

// idColumns are the columns of records that hold ids of persons, or ids that may hold one.
var idColumns = []string{"worker_id", "audiogram_id", "measurement_id", "tester_id", "reviewer", "by", "fitted_by", "supervisor", "certificate"}

// idsOf gathers the ids of all record files of a folder. Words without a number, such as physician, are no ids.
func idsOf(t *testing.T, dir string) map[string]bool {
	t.Helper()
	files, err := filepath.Glob(filepath.Join(dir, "records", "*.csv"))
	require.NoError(t, err)
	ids := map[string]bool{}
	for _, name := range files {
		text, err := os.ReadFile(name)
		require.NoError(t, err)
		r := csv.NewReader(bytes.NewReader(text))
		r.FieldsPerRecord, r.LazyQuotes = -1, true
		rows, err := r.ReadAll()
		require.NoError(t, err)
		for _, row := range rows[1:] {
			for i, cell := range row {
				if i < len(rows[0]) && slices.Contains(idColumns, rows[0][i]) && strings.ContainsAny(cell, "0123456789") {
					ids[strings.TrimSpace(cell)] = true
				}
			}
		}
	}
	require.Greater(t, len(ids), 500)
	return ids
}

// leaks lists the ids that stand in a text, as words of their own.
func leaks(ids map[string]bool, text string) []string {
	var out []string
	parts := func(c rune) bool { return c != '-' && c != '_' && !unicode.IsLetter(c) && !unicode.IsDigit(c) }
	for word := range strings.FieldsFuncSeq(text, parts) {
		if word = strings.Trim(word, "-_"); ids[word] && !slices.Contains(out, word) {
			out = append(out, word)
		}
	}
	for id := range ids { // ids of several words
		if strings.ContainsAny(id, " ./") && strings.Contains(text, id) {
			out = append(out, id)
		}
	}
	return out
}

// written gives a file as a text; of an archive, that of all its members.
func written(t *testing.T, path string) string {
	t.Helper()
	content, err := os.ReadFile(path)
	require.NoError(t, err)
	if !bytes.HasPrefix(content, []byte("PK")) {
		return string(content)
	}
	archive, err := zip.NewReader(bytes.NewReader(content), int64(len(content)))
	require.NoError(t, err)
	var all strings.Builder
	for _, member := range archive.File {
		f, err := member.Open()
		require.NoError(t, err)
		_, err = io.Copy(&all, f)
		require.NoError(t, err)
	}
	return all.String()
}

// veiledDemo writes the demo program, with a key file beside it.
func veiledDemo(t *testing.T) (dir, key string) {
	t.Helper()
	dir = writeDemo(t)
	key = filepath.Join(t.TempDir(), "key")
	require.NoError(t, os.WriteFile(key, []byte(testKey), 0o600))
	return dir, key
}

// spoil plants faults of every kind in the records of the demo, each with an id in it that must not come out.
func spoil(t *testing.T, dir string) {
	t.Helper()
	add := func(name, text string) {
		f, err := os.OpenFile(filepath.Join(dir, name), os.O_APPEND|os.O_WRONLY|os.O_CREATE, 0o600)
		require.NoError(t, err)
		_, err = f.WriteString(text)
		require.NoError(t, err)
		require.NoError(t, f.Close())
	}
	add("records/trainings.csv", strings.Join([]string{
		"K7007,2026-01-05,noise_effects,en,S-11,",                       // the worker's row is rejected
		"K7001,2026-01-05,noise_effects,en,S-77,",                       // no such worker
		"K0101,K7002,noise_effects,en,S-11,",                            // an id in the column of dates
		"K7003;K0102,2026-01-06,noise_effects,en,S-11,",                 // two ids in one cell
		"70013,2026-01-07,noise_effects,en,S-11,",                       // an id that lost its zeros
		"K0101,2020-07-06,noise_effects;protectors;audiometry,en,S-11,", // repeated
		"\"K70\x0104\",2026-01-05,noise_effects,en,S-11,",               // a control character
		"\"K7005,2026-01-05",                                            // a quote that does not end
		"K0103,2026-01-05,noise_efects,en,S-11,",                        // a warning
		"K0104,2026-01-05,noise_effects,en,S-11,,K7006",                 // a cell too many
	}, "\n")+"\n")
	add("records/workers.csv", strings.Join([]string{
		"00070013,kiln-hill,male,,2020-01-01,,fettler,yes",
		"K7007,no-such-site,male,,2020-01-01,,fettler,yes",
		"K7008,K0105,male,,2020-01-01,,fettler,yes", // an id in the column of sites
		"K0106,kiln-hill,male,1901-01-01,2024-01-01,,fettler,yes",
		"K7009,kiln-hill,K7009,,2020-01-01,,fettler,yes",
	}, "\n")+"\n")
	add("records/audiograms.csv", "A-00297,K0101,2026-01-05\nA-70001,K7007,2026-01-05,baseline\nA-70002,K0101,2026-01-05,A-70002\n")
	add("records/groups.csv", "K0101,kiln-hill,K0101,a group of one,no,no,480,5,,\n")
	add("records/changes.csv", "C-99,2026-01-01,K0101,,works alone,no,\n")
	add("records/testers.csv", "T-70,wizard T-71,OHC 70-1,,,,T-72\n")
	add("people.yaml", "- {id: K7010, also: [K7011, K0107-B]}\n- {id: K0108, was: K7012, from: 2020-01-01}\n")
	add("accepted.yaml", "- match: {subject: K0128, duty: annual-training}\n  reason: K0128 is on leave\n  approved_by: T-01\n  until: 2026-12-31\n"+
		"- {match: {subject: \"K01*\"}, reason: everybody of the old shift, until: 2026-12-31}\n")
	program, err := os.ReadFile(filepath.Join(dir, "program.yaml"))
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(filepath.Join(dir, "program.yaml"), append([]byte("same_person: people.yaml\n"), program...), 0o600))
}

// No id of a person comes out of any command, in any form, also where records are broken.
func TestPseudonymsHideEveryID(t *testing.T) {
	t.Parallel()
	dir, key := veiledDemo(t)
	spoil(t, dir)
	ids := idsOf(t, dir)
	for _, id := range []string{"K7005", "K7006", "K7010", "K7011", "K7012", "K0107-B", "T-71", "K7003", "K0102", "70013"} {
		ids[id] = true
	}
	run := func(what string, args ...string) string {
		code, stdout, stderr := call(append(args, "--pseudonyms", key)...)
		require.NotEqual(t, exitFailed, code, "%s: %s", what, stderr)
		text := stdout + stderr
		for i, arg := range args {
			if slices.Contains([]string{"--rejects", "--ledger"}, arg) {
				text += written(t, args[i+1])
			}
		}
		assert.Empty(t, leaks(ids, text), what)
		return text
	}
	rejects, ledger := filepath.Join(t.TempDir(), "rejects"), filepath.Join(t.TempDir(), "ledger")
	run("check", "check", dir, "--all", "--rejects", rejects)
	run("check of exports", "check", filepath.Join(dir, "exports.yaml"), "--all")
	for _, health := range []bool{false, true} {
		for format, text := range allForms(t, dir, key, health) {
			assert.Empty(t, leaks(ids, text), format)
		}
	}
	for _, format := range pull.Names() {
		run("sample as "+format, "sample", dir, "--format", format)
	}
	records := run("intake", "intake", dir, "--rejects", rejects, "--ledger", ledger)
	assert.Contains(t, records, `"worker_id":"W`)
	run("intake with figures", "intake", dir, "--health-detail")
	assert.Contains(t, records, "no worker has the id \"W")
	assert.Contains(t, records, "was rejected, so this row belongs to nobody")
	explained := map[string]bool{}
	for _, f := range veiledFindings(t, dir, key) {
		if !explained[f.Duty] && len(explained) < 4 {
			explained[f.Duty] = true
			assert.Contains(t, run("explain "+f.Duty, "explain", f.ID, dir), f.ID)
		}
	}
}

// allForms gives the report of a program in all forms; without a key if that is empty.
func allForms(t *testing.T, dir, key string, health bool) map[string]string {
	t.Helper()
	p, problems := program.Load(dir)
	require.False(t, problems.Failed(), problems)
	library, err := bundle.Embedded()
	require.NoError(t, err)
	o := judge.Options{Program: p, Library: library, AsOf: p.AsOf, AheadDays: 90, All: true, Portraits: true, HealthDetail: health}
	if key != "" {
		o.Veil, err = pseudonym.Load(key)
		require.NoError(t, err)
	}
	o.Accepted, problems = accept.Load(p.Accepted.Open, p.Accepted.Shown)
	require.False(t, problems.Failed(), problems)
	r, err := judge.Check(t.Context(), o)
	require.NoError(t, err)
	out := map[string]string{}
	for _, f := range report.Formats(report.Options{}) {
		path := filepath.Join(t.TempDir(), "out")
		require.NoError(t, writeFile(path, func(w io.Writer) error { return f.Write(w, r) }))
		out[f.Name()] = written(t, path)
	}
	return out
}

func veiledFindings(t *testing.T, dir, key string) []listedFinding {
	t.Helper()
	_, out, _ := call("check", dir, "--format", "json", "--pseudonyms", key)
	var r struct{ Findings []listedFinding }
	require.NoError(t, json.Unmarshal([]byte(out), &r))
	require.NotEmpty(t, r.Findings)
	return r.Findings
}

// The test of leaks finds what the same commands show without a key.
func TestLeaksAreFound(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	ids := idsOf(t, dir)
	for format, text := range allForms(t, dir, "", false) {
		assert.NotEmpty(t, leaks(ids, text), format)
	}
}

// As many rows are rejected, and as many findings found, with a key as without one.
func TestPseudonymsKeepTheCounts(t *testing.T) {
	t.Parallel()
	dir, key := veiledDemo(t)
	spoil(t, dir)
	counts := func(args ...string) (out struct {
		Totals, Accepted_totals map[string]int
		Rejects                 []struct {
			File string
			Row  int
		}
		Inputs []map[string]any
	}) {
		_, text, _ := call(append([]string{"check", dir, "--format", "json"}, args...)...)
		require.NoError(t, json.Unmarshal([]byte(text), &out))
		return out
	}
	plain, veiled := counts(), counts("--pseudonyms", key)
	require.Greater(t, len(plain.Rejects), 12)
	assert.Equal(t, plain, veiled)
}

// What the same_person file says wrongly is told without ids.
func TestPseudonymsHideWrongPeople(t *testing.T) {
	t.Parallel()
	dir, key := veiledDemo(t)
	spoil(t, dir)
	require.NoError(t, os.WriteFile(filepath.Join(dir, "people.yaml"), []byte("- {id: K0101, also: [K0101]}\n- {id: K0102}\n- {id: K0103, was: K0104, from: K0105}\n"), 0o600))
	for _, command := range []string{"check", "intake", "sample"} {
		code, stdout, stderr := call(command, dir, "--pseudonyms", key)
		assert.Equal(t, exitFailed, code)
		assert.Contains(t, stderr, "people.yaml:1:")
		assert.Contains(t, stderr, "Run the command without --pseudonyms to read why")
		assert.Empty(t, leaks(idsOf(t, dir), stdout+stderr))
	}
}

// A file without its header has ids where names of columns should be.
func TestPseudonymsHideIDsOfAHeader(t *testing.T) {
	t.Parallel()
	dir, key := veiledDemo(t)
	ids := idsOf(t, dir)
	path := filepath.Join(dir, "records", "trainings.csv")
	text, err := os.ReadFile(path)
	require.NoError(t, err)
	_, rest, _ := bytes.Cut(text, []byte("\n"))
	require.NoError(t, os.WriteFile(path, rest, 0o600))
	for _, command := range []string{"check", "intake"} {
		code, stdout, stderr := call(command, dir, "--pseudonyms", key)
		assert.Equal(t, exitFailed, code)
		assert.Contains(t, stderr, "trainings.csv")
		assert.Empty(t, leaks(ids, stdout+stderr))
	}
}
