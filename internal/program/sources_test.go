package program

import (
	"archive/zip"
	"os"
	"path/filepath"
	"testing"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
)

const head = "program: P\nsites: [{id: a, bundles: [b]}]\n"

// among loads the records of a program among files that are there, empty as they are.
func among(t *testing.T, records string, files ...string) (*Program, diag.List) {
	t.Helper()
	dir := t.TempDir()
	for _, name := range files {
		path := filepath.Join(dir, name)
		require.NoError(t, os.MkdirAll(filepath.Dir(path), 0o700))
		require.NoError(t, os.WriteFile(path, nil, 0o600))
	}
	require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(head+"records: "+records+"\n"), 0o600))
	t.Chdir(dir)
	return Load(FileName)
}

func shown(p *Program) []string {
	var out []string
	for _, s := range p.Sources {
		out = append(out, s.Shown+" "+string(s.Kind)+" "+s.Sheet+" "+s.Member+" "+s.Map.Shown)
	}
	return out
}

func TestSources(t *testing.T) {
	files := []string{"x/2024-b.csv", "x/2023-a.csv", "x/.2022.csv", "x/~$2025.csv", "x/[1]*.csv", "x/folder.csv/inner.csv", "x/audiograms.xlsx"}
	for _, c := range []struct {
		name, records string
		want          []string
	}{
		{"pattern, sorted", `[{file: "x/*-?.csv", kind: task}]`, nil}, // only the asterisk is special
		{"pattern", `[{file: "x/*.csv", kind: task}]`, []string{"x/2023-a.csv task   ", "x/2024-b.csv task   ", "x/[1]*.csv task   "}},
		{"brackets are themselves", `[{file: "x/[1]*.csv", kind: task}]`, []string{"x/[1]*.csv task   "}},
		{"pattern of folders", `[{file: "*/2*.csv", kind: task}]`, []string{"x/2023-a.csv task   ", "x/2024-b.csv task   "}},
		{"another sheet", `[{file: a.xlsx, sheet: T, kind: task}, {file: a.xlsx, sheet: U, kind: task}]`, []string{"a.xlsx task T  ", "a.xlsx task U  "}},
		{"another kind", `[{file: a.xlsx, kind: worker}, {file: a.xlsx, kind: assignment}]`, []string{"a.xlsx worker   ", "a.xlsx assignment   "}},
		{"kind from the map", `[{file: a.csv, map: m/a.yaml}, {file: a.csv, map: m/b.yaml}]`, []string{"a.csv    m/a.yaml", "a.csv    m/b.yaml"}},
		{"endings", `[tasks.tsv, groups.TXT, x/audiograms.xlsx, testers.xlsm, notices.yaml, changes.yml, controls.json, documents.ndjson]`, []string{
			"tasks.tsv task   ", "groups.TXT group   ", "x/audiograms.xlsx audiogram   ", "testers.xlsm tester   ", "notices.yaml notice   ", "changes.yml change   ", "controls.json control   ", "documents.ndjson document   "}},
		{"member", `[{file: a.zip, member: in/x.csv, kind: task}, {file: a.zip, member: in/y.csv, kind: task}]`, []string{"a.zip/in/x.csv task  in/x.csv ", "a.zip/in/y.csv task  in/y.csv "}},
	} {
		t.Run(c.name, func(t *testing.T) {
			p, diags := among(t, c.records, files...)
			if c.want == nil {
				require.Contains(t, diags.Error(), "no file fits the pattern")
				return
			}
			require.NoError(t, diags.Err())
			assert.Equal(t, c.want, shown(p))
		})
	}
}

func TestArchive(t *testing.T) {
	dir := t.TempDir()
	f, err := os.Create(filepath.Join(dir, "all.zip"))
	require.NoError(t, err)
	w := zip.NewWriter(f)
	for _, name := range []string{"out/workers.csv", "out/tests.xlsx", "out/audiograms.csv", "out/notes.pdf"} {
		_, err := w.Create(name)
		require.NoError(t, err)
	}
	require.NoError(t, w.Close())
	require.NoError(t, f.Close())
	require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(head+"records: [all.zip]\n"), 0o600))
	t.Chdir(dir)
	p, diags := Load(FileName)
	require.NoError(t, diags.Err())
	assert.Equal(t, []string{"all.zip/out/audiograms.csv audiogram  out/audiograms.csv ", "all.zip/out/workers.csv worker  out/workers.csv "}, shown(p))
	require.Len(t, diags, 1, "one warning for all that were passed over")
	assert.Contains(t, diags[0].String(), "program.yaml:3:11: these files in the ZIP archive all.zip were not read, since their names are not canonical: out/notes.pdf, out/tests.xlsx.")
}

// A member that is named by itself is read as that says, and once.
func TestNamedMember(t *testing.T) {
	dir := t.TempDir()
	f, err := os.Create(filepath.Join(dir, "all.zip"))
	require.NoError(t, err)
	w := zip.NewWriter(f)
	for _, name := range []string{"workers.csv", "audiograms.csv", "tests.txt"} {
		_, err := w.Create(name)
		require.NoError(t, err)
	}
	require.NoError(t, w.Close())
	require.NoError(t, f.Close())
	records := "records: [all.zip, {file: ./all.zip, member: tests.txt, map: m.yaml}, {file: all.zip, member: audiograms.csv, map: m.yaml}]\n"
	require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(head+records), 0o600))
	t.Chdir(dir)
	p, diags := Load(FileName)
	require.Empty(t, diags)
	assert.Equal(t, []string{"all.zip/workers.csv worker  workers.csv ", "all.zip/tests.txt   tests.txt m.yaml", "all.zip/audiograms.csv   audiograms.csv m.yaml"}, shown(p))
}

func TestLinksThatLeave(t *testing.T) {
	outside := t.TempDir()
	require.NoError(t, os.WriteFile(filepath.Join(outside, "tasks.csv"), nil, 0o600))
	dir := t.TempDir()
	require.NoError(t, os.WriteFile(filepath.Join(dir, "own.csv"), nil, 0o600))
	require.NoError(t, os.Symlink(outside, filepath.Join(dir, "away")))
	require.NoError(t, os.Symlink("own.csv", filepath.Join(dir, "tasks.csv")))
	t.Chdir(dir)
	for records, want := range map[string]string{
		"[tasks.csv]":                            "",
		"[away/tasks.csv]":                       `program.yaml:3:11: "away/tasks.csv" is a link that leads out of the program's folder`,
		"['*/tasks.csv']":                        `"away/tasks.csv" is a link`,
		"[{file: tasks.csv, map: away/m}]":       "", // what does not exist is told when it is read
		"[{file: own.csv, map: away/tasks.csv}]": `3:32: "away/tasks.csv" is a link`,
	} {
		require.NoError(t, os.WriteFile(FileName, []byte(head+"records: "+records+"\n"), 0o600))
		_, diags := Load(FileName)
		if want == "" {
			assert.Empty(t, diags, records)
			continue
		}
		assert.Contains(t, diags.Error(), want)
	}
}

func TestSamePerson(t *testing.T) {
	for _, c := range []struct{ name, text, want string }{
		{"empty", "", "people.yaml: the same_person file is empty"},
		{"no list", "a: b\n", "people.yaml:1:1: the same_person file is a mapping, not a list"},
		{"unknown key", `- {id: "1", als: ["2"]}`, `people.yaml:1:13: a person has no key "als". Write also if that is meant`},
		{"no id", `- {also: ["2"]}`, "people.yaml:1:3: a person has no id"},
		{"nothing else", `- {id: "1"}`, "people.yaml:1:3: person 1 has no other id"},
		{"own id", `- {id: "1", also: ["1"]}`, `people.yaml:1:20: the id "1" is the person's own`},
		{"claimed twice", "- {id: a, also: [x]}\n- {id: b, also: [x]}", `people.yaml:2:18: the id "x" was already given to "a" in line 1`},
		{"claimed and dated", "- {id: a, was: x, from: 2020-01-01}\n- {id: b, also: [x]}", `people.yaml:2:18: the id "x" was already given to "a" in line 1`},
		{"dated and claimed", "- {id: b, also: [x]}\n- {id: a, was: x, from: 2020-01-01}", `people.yaml:2:16: the id "x" was already given to "b" in line 1`},
		{"overlap", "- {id: a, was: x, to: 2020-01-01}\n- {id: b, was: x, from: 2020-01-01}", `people.yaml:2:16: the id "x" was already given to "a" in line 1`},
		{"chain", "- {id: a, also: [b]}\n- {id: b, also: [c]}", `people.yaml:2:18: the id "c" leads to "b", which itself leads to "a" in line 1. Name a as the id here as well`},
		{"circle", "- {id: a, also: [b]}\n- {id: b, also: [a]}", `the id "b" leads to "a", which itself leads to "b" in line 2`},
		{"days without an id", `- {id: a, also: [b], from: 2020-01-01}`, "person a has days, but no id for them"},
		{"an id without days", `- {id: a, was: b}`, "1:16: person a has an id of former days, but no days"},
		{"days the wrong way", `- {id: a, was: b, from: 2020-01-02, to: 2020-01-01}`, "1:41: to of person a lies before from"},
		{"no day", `- {id: a, was: b, from: 02/01/2020}`, `1:25: from of person a: "02/01/2020" is not a date`},
	} {
		t.Run(c.name, func(t *testing.T) {
			dir := t.TempDir()
			require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(head+"same_person: people.yaml\nrecords: [tasks.csv]\n"), 0o600))
			require.NoError(t, os.WriteFile(filepath.Join(dir, "people.yaml"), []byte(c.text), 0o600))
			t.Chdir(dir)
			p, diags := Load(FileName)
			require.Nil(t, p)
			require.Contains(t, diags.Error(), c.want)
			for _, d := range diags {
				require.NotEmpty(t, d.Remedy, d.Problem)
			}
		})
	}
}
