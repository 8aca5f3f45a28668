package demo

import (
	"flag"
	"io/fs"
	"maps"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

var update = flag.Bool("update", false, "write testdata/demo anew")

// testdata is the demo program as it is kept in the repository.
const testdata = "../../testdata/demo"

// read gives all files of a folder, by path.
func read(t *testing.T, dir string) map[string]string {
	t.Helper()
	files := map[string]string{}
	err := filepath.WalkDir(dir, func(path string, entry fs.DirEntry, err error) error {
		if err != nil || entry.IsDir() {
			return err
		}
		text, err := os.ReadFile(path)
		name, _ := filepath.Rel(dir, path)
		files[filepath.ToSlash(name)] = string(text)
		return err
	})
	require.NoError(t, err)
	return files
}

func TestTwoRunsWriteTheSameBytes(t *testing.T) {
	one, two := filepath.Join(t.TempDir(), "a", "b"), t.TempDir()
	require.NoError(t, Write(one))
	require.NoError(t, Write(two), "an empty folder is taken")
	sameFiles(t, read(t, one), read(t, two))
}

// sameFiles compares files and names the first line that differs.
func sameFiles(t *testing.T, want, got map[string]string) {
	t.Helper()
	require.ElementsMatch(t, slices.Collect(maps.Keys(want)), slices.Collect(maps.Keys(got)))
	for name := range want {
		if want[name] == got[name] {
			continue
		}
		a, b := strings.Split(want[name], "\n"), strings.Split(got[name], "\n")
		for i := range min(len(a), len(b)) {
			require.Equal(t, a[i], b[i], "%s:%d; write testdata anew with: go test ./internal/demo -update", name, i+1)
		}
		require.Len(t, b, len(a), name)
	}
}

func TestTestdataIsWhatWriteWrites(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, Write(dir))
	if *update {
		require.NoError(t, os.RemoveAll(testdata))
		require.NoError(t, os.CopyFS(testdata, os.DirFS(dir)))
	}
	sameFiles(t, read(t, dir), read(t, testdata))
}

func TestAFolderThatIsNotEmptyIsRefusedAndLeftAlone(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, os.WriteFile(filepath.Join(dir, "note.txt"), []byte("mine"), 0o644))
	require.EqualError(t, Write(dir), "the folder "+dir+" is not empty; name a new folder or an empty one")
	require.EqualError(t, WriteScale(dir, 5), "the folder "+dir+" is not empty; name a new folder or an empty one")
	require.Equal(t, map[string]string{"note.txt": "mine"}, read(t, dir))
	require.Error(t, Write(filepath.Join(dir, "note.txt")), "a file is no folder")
}

func TestNothingStaysBehindWhenWritingFails(t *testing.T) {
	dir := filepath.Join(t.TempDir(), "new")
	require.Error(t, publish(dir, func(temporary string) error {
		require.NoError(t, os.Mkdir(filepath.Join(temporary, "records"), 0o755))
		return fs.ErrInvalid
	}))
	require.NoDirExists(t, dir)
	require.Error(t, publish(dir, func(temporary string) error { return nil }), "no program.yaml was written")
	require.NoDirExists(t, dir)
}

func TestEveryRecordKindIsPresent(t *testing.T) {
	files := read(t, testdata)
	records := 0
	for name := range files {
		if strings.HasPrefix(name, "records/") {
			records++
		}
	}
	require.Equal(t, len(kinds()), records, "a file of records that is of no kind")
	require.Greater(t, strings.Count(files["abroad/examinations.csv"], "\n"), 1)
	for _, k := range kinds() {
		text := files["records/"+csvName(k)]
		require.Greater(t, len(regexp.MustCompile(`(?m)^.+$`).FindAllString(text, 3)), 1, "%s has no row", k)
		require.True(t, strings.Contains(files["program.yaml"], "  - records/"+csvName(k)+"\n"), k)
	}
}

func TestNobodyAndNoBrandIsNamed(t *testing.T) {
	b := planted()
	worker := regexp.MustCompile(`^([KL]\d{4}|\d{6})$`)
	for _, w := range b.workers {
		require.Regexp(t, worker, w.WorkerID)
	}
	for _, p := range b.protectors {
		require.Regexp(t, `^(plug|muff) [PM]-\d$`, p.Model)
	}
	person := regexp.MustCompile(`^([ST]-\d\d|P-\d\d|LAB-\d|safety office|)$`)
	for _, a := range b.audiograms {
		require.Regexp(t, person, a.TesterID)
		require.Regexp(t, person, a.Reviewer)
	}
	for _, f := range b.followUps {
		require.Regexp(t, person, f.By)
	}
	for _, r := range b.trainings {
		require.Regexp(t, person, r.By)
	}
	for _, i := range b.issues {
		require.Regexp(t, person, i.FittedBy)
	}
	for _, c := range b.calibrations {
		require.Regexp(t, person, c.By)
	}
}

func TestNoRecordIsLaterThanTheAsOfDay(t *testing.T) {
	late := regexp.MustCompile(`\b(2026-0[7-9]|2026-1[0-2]|20[3-9][0-9]|202[7-9])-`)
	for name, text := range read(t, testdata) {
		if name != "records/testers.csv" && name != "accepted.yaml" { // licences and accepted gaps run on
			require.Empty(t, late.FindAllString(text, 3), name)
		}
	}
}
