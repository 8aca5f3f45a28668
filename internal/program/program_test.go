package program

import (
	"os"
	"path/filepath"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

const good = `program: Harrow & Slate
sites:
  - {id: 007, name: Kiln Hill, country: NO, region: OH, bundles: [us-osha, company], choices: {age_correction: false, limit: 12, since: 1983-04-07}}
  - id: gerbera
    bundles:
      - de-laerm
records:
  - records/audiograms.csv
  - {file: exports/people.csv, kind: worker}
as_of: 2026-06-30
accepted: accepted.yaml
`

// load writes the text to a program file and loads it.
func load(t *testing.T, text string) (*Program, diag.List) {
	t.Helper()
	dir := t.TempDir()
	require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(text), 0o600))
	t.Chdir(dir)
	return Load(FileName)
}

func TestLoad(t *testing.T) {
	p, diags := load(t, good)
	require.NoError(t, diags.Err())
	require.Empty(t, diags)
	require.Equal(t, "Harrow & Slate", p.Title)
	require.Len(t, p.Digest, 64)
	require.Equal(t, Path{Open: "accepted.yaml", Shown: "accepted.yaml"}, p.Accepted)
	require.Equal(t, "2026-06-30", p.AsOf.String())
	require.Equal(t, Site{
		ID: "007", Name: "Kiln Hill", Country: "NO", Region: "OH", Bundles: []string{"us-osha", "company"},
		Choices:   map[string]any{"age_correction": false, "limit": 12, "since": "1983-04-07"},
		At:        diag.Position{File: FileName, Line: 3, Column: 5},
		BundlesAt: []diag.Position{{File: FileName, Line: 3, Column: 67}, {File: FileName, Line: 3, Column: 76}},
		ChoicesAt: map[string]diag.Position{"age_correction": {File: FileName, Line: 3, Column: 96}, "limit": {File: FileName, Line: 3, Column: 119}, "since": {File: FileName, Line: 3, Column: 130}},
	}, p.Sites[0])
	require.Equal(t, []Source{
		{Path: "records/audiograms.csv", Shown: "records/audiograms.csv", Kind: "audiogram", At: diag.Position{File: FileName, Line: 8, Column: 5}},
		{Path: "exports/people.csv", Shown: "exports/people.csv", Kind: "worker", At: diag.Position{File: FileName, Line: 9, Column: 5}},
	}, p.Sources)
}

func TestLoadFolder(t *testing.T) {
	dir := t.TempDir()
	_, diags := Load(dir)
	require.True(t, diags.Failed())
	require.Contains(t, diags.Error(), "there is no such program file")
	require.NoError(t, os.WriteFile(filepath.Join(dir, FileName), []byte(good), 0o600))
	p, diags := Load(dir)
	require.NoError(t, diags.Err())
	require.Equal(t, dir, p.Dir)
	require.Equal(t, filepath.Join(dir, "records/audiograms.csv"), p.Sources[0].Path)
	_, diags = Load(filepath.Join(dir, "nothing"))
	require.True(t, diags.Failed())
}

func TestCheckBundles(t *testing.T) {
	p, _ := load(t, good)
	require.Empty(t, p.CheckBundles([]string{"us-osha", "company", "de-laerm"}))
	require.EqualError(t, p.CheckBundles([]string{"us-osha", "companies", "de-laerm"}),
		`program.yaml:3:76: site 007 names the bundle "company", which does not exist. Write companies if that is meant; the bundles are us-osha, companies, de-laerm.`)
	require.Len(t, p.CheckBundles(nil), 3)
}

func TestMistakes(t *testing.T) {
	head := "program: P\nsites: [{id: a, bundles: [b]}]\n"
	for _, c := range []struct{ name, text, want string }{
		{"empty", "", "program.yaml: the program file is empty"},
		{"comment only", "# nothing\n", "the program file is empty"},
		{"list", "- a\n", "1:1: the program file is a list, not a mapping"},
		{"unknown key", head + "record: [tasks.csv]\n", `3:1: the program file has no key "record". Write records if that is meant`},
		{"no records", head, "1:1: the program file has no records"},
		{"no program", "sites: [{id: a, bundles: [b]}]\nrecords: [tasks.csv]\n", "1:1: the program file has no program"},
		{"no sites", "program: P\nrecords: [tasks.csv]\n", "the program file has no sites"},
		{"empty sites", "program: P\nsites: []\nrecords: [tasks.csv]\n", "2:8: sites of the program file is an empty list"},
		{"null records", head + "records:\n", "3:9: records of the program file is empty, not a list"},
		{"empty title", "program: ''\nsites: [{id: a, bundles: [b]}]\nrecords: [tasks.csv]\n", "1:10: program of the program file is empty"},
		{"title list", "program: [a]\nsites: [{id: a, bundles: [b]}]\nrecords: [tasks.csv]\n", "1:10: program of the program file is a list, not a single value"},
		{"duplicate key", head + "program: Q\nrecords: [tasks.csv]\n", `3:1: the program file has the key "program" twice`},
		{"duplicate site", "program: P\nsites:\n  - {id: a, bundles: [b]}\n  - {id: a, bundles: [b]}\nrecords: [tasks.csv]\n", "4:10: the site id a was already used in line 3"},
		{"site without id", "program: P\nsites:\n  - {bundles: [b]}\nrecords: [tasks.csv]\n", "3:5: a site has no id"},
		{"site without bundles", "program: P\nsites:\n  - {id: a}\nrecords: [tasks.csv]\n", "3:5: site a has no bundles"},
		{"site of text", "program: P\nsites: [a]\nrecords: [tasks.csv]\n", "2:9: a site is a single value, not a mapping"},
		{"bundle twice", "program: P\nsites:\n  - {id: a, bundles: [b, b]}\nrecords: [tasks.csv]\n", "3:26: site a names the bundle b twice"},
		{"choices list", "program: P\nsites:\n  - {id: a, bundles: [b], choices: [c]}\nrecords: [tasks.csv]\n", "3:36: choices of site a is a list"},
		{"choice twice", "program: P\nsites:\n  - {id: a, bundles: [b], choices: {c: 1, c: 2}}\nrecords: [tasks.csv]\n", `3:43: site a makes the choice "c" twice`},
		{"kind unknown", head + "records: [{file: x.csv, kind: audiogramm}]\n", `3:31: there is no record kind "audiogramm". Write audiogram if that is meant`},
		{"kind untold", head + "records: [audiogram.csv]\n", "3:11: the name of audiogram.csv does not tell which kind of records it holds. Rename the file to audiograms.csv"},
		{"kind untold, far", head + "records: [stuff.csv]\n", "Write {file: stuff.csv, kind: …}"},
		{"file twice", head + "records: [tasks.csv, ./tasks.csv]\n", "3:22: the record file tasks.csv was already named in line 3"},
		{"absolute", head + "records: [/etc/tasks.csv]\n", "is an absolute path"},
		{"drive", head + "records: ['C:\\tasks.csv']\n", "is an absolute path"},
		{"outside", head + "records: [a/../../tasks.csv]\n", "leads out of the program's folder"},
		{"backslashes", head + "records: ['records\\tasks.csv']\n", "Write records/tasks.csv"},
		{"old workbook", head + "records: [{file: a.xls, sheet: T, kind: task}]\n", "3:11: a.xls is a workbook of the old form .xls, which is not read. Open it in a spreadsheet program"},
		{"map outside", head + "records: [{file: tasks.csv, map: ../m.yaml}]\n", `3:34: "../m.yaml" leads out of the program's folder`},
		{"ending", head + "records: [tasks.pdf]\n", "3:11: tasks.pdf ends in none of .csv, .tsv, .txt"},
		{"pattern of nothing", head + "records: ['2*-tasks.csv']\n", `3:11: no file fits the pattern "2*-tasks.csv"`},
		{"pattern outside", head + "records: ['../*.csv']\n", "leads out of the program's folder"},
		{"member of no archive", head + "records: [{file: tasks.csv, member: tasks.csv}]\n", "3:11: tasks.csv is no ZIP archive, so it has no member"},
		{"no archive", head + "records: [a.zip]\n", "3:11: the ZIP archive a.zip cannot be read"},
		{"archive with kind", head + "records: [{file: a.zip, kind: task}]\n", "it is not said which file in it is meant"},
		{"old workbook in archive", head + "records: [{file: a.zip, member: x/a.xls, kind: task}]\n", "x/a.xls is a workbook of the old form"},
		{"file, sheet and kind twice", head + "records: [{file: a.xlsx, sheet: T, kind: task}, {file: a.xlsx, sheet: T, kind: task}]\n", "the record file a.xlsx was already named in line 3"},
		{"same_person outside", head + "records: [tasks.csv]\nsame_person: ../a.yaml\n", "4:14"},
		{"same_person missing", head + "records: [tasks.csv]\nsame_person: a.yaml\n", "4:14: the same_person file a.yaml cannot be read: no such file"},
		{"record list", head + "records: [[a]]\n", "3:11: a record file is a list"},
		{"no file", head + "records: [{kind: task}]\n", "3:11: a record file has no file"},
		{"accepted outside", head + "records: [tasks.csv]\naccepted: ../a.yaml\n", "4:11"},
		{"as of no day", head + "records: [tasks.csv]\nas_of: 30/06/2026\n", `4:8: as_of: "30/06/2026" is not a date of the form YYYY-MM-DD`},
		{"tab", "program: P\nsites:\n\t- {id: a, bundles: [b]}\n", "3:1: the line is indented with a tab. Indent with spaces only"},
		{"tab deeper", "program: P\nsites:\n  - id: a\n \tbundles: [b]\n", "4:2: the line is indented with a tab"},
		{"two documents", head + "records: [tasks.csv]\n---\nprogram: Q\n", "the file holds a second YAML document"},
		{"broken", head + "records: [tasks.csv\n", "the YAML cannot be read"},
		{"not UTF-8", "program: \xff\n", "is not UTF-8 text"},
		{"merge key", "program: P\nsites:\n  - &x {id: a, bundles: [b]}\n  - {<<: *x, id: c}\nrecords: [tasks.csv]\n", `a site has no key "<<"`},
		{"bomb", bomb(), "too large or too deeply nested"},
	} {
		t.Run(c.name, func(t *testing.T) {
			p, diags := load(t, c.text)
			require.Nil(t, p)
			require.Contains(t, diags.Error(), c.want)
			for _, d := range diags {
				require.NotEmpty(t, d.Remedy, d.Problem)
			}
		})
	}
}

// bomb is a site whose choices grow tenfold with each of eight aliases.
func bomb() string {
	var b strings.Builder
	b.WriteString("program: P\nrecords: [tasks.csv]\nsites:\n  - id: z\n    bundles: [b]\n    choices:\n      a0: &a0 [x, x, x, x, x, x, x, x, x, x]\n")
	for i := range 7 {
		from, to := string(rune('0'+i)), string(rune('1'+i))
		b.WriteString("      a" + to + ": &a" + to + " [" + strings.Repeat("*a"+from+", ", 10) + "]\n")
	}
	return b.String()
}

func TestAliases(t *testing.T) {
	p, diags := load(t, "program: P\nsites:\n  - {id: a, bundles: &b [x, y]}\n  - {id: c, bundles: *b}\nrecords: [workers.csv]\n")
	require.Empty(t, diags)
	require.Equal(t, []string{"x", "y"}, p.Sites[1].Bundles)
	require.Equal(t, record.Kind("worker"), p.Sources[0].Kind)
}

func FuzzLoad(f *testing.F) {
	f.Add(good)
	f.Add("program: P\nsites:\n  - &a {id: a, bundles: [b], choices: {c: *a}}\nrecords: [tasks.csv]\n")
	f.Fuzz(func(t *testing.T, text string) {
		var diags diag.List
		if p := read(FileName, []byte(text), &diags); p == nil {
			require.True(t, diags.Failed())
		}
	})
}
