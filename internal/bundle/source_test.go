package bundle

import (
	"archive/tar"
	"bytes"
	"compress/gzip"
	"io/fs"
	"os"
	"path/filepath"
	"slices"
	"strings"
	"testing"
	"testing/fstest"
	"time"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle/bundletest"
	"hearduty/policies"
)

// written writes folders of a file system into a new folder and gives its path.
func written(t *testing.T, fsys fstest.MapFS, folders ...string) string {
	t.Helper()
	dir := t.TempDir()
	for name, f := range fsys {
		top, _, _ := strings.Cut(name, "/")
		if len(folders) > 0 && !slices.Contains(folders, top) {
			continue
		}
		file := filepath.Join(dir, filepath.FromSlash(name))
		require.NoError(t, os.MkdirAll(filepath.Dir(file), 0o755))
		require.NoError(t, os.WriteFile(file, f.Data, 0o644))
	}
	return dir
}

// entry is one entry of an archive.
type entry struct {
	header tar.Header
	text   string
}

func packed(t *testing.T, name string, entries ...entry) string {
	t.Helper()
	var out bytes.Buffer
	z := gzip.NewWriter(&out)
	w := tar.NewWriter(z)
	for _, e := range entries {
		e.header.Size = int64(len(e.text))
		if e.header.Typeflag == 0 {
			e.header.Typeflag = tar.TypeReg
		}
		e.header.Mode = 0o644
		require.NoError(t, w.WriteHeader(&e.header))
		_, err := w.Write([]byte(e.text))
		require.NoError(t, err)
	}
	require.NoError(t, w.Close())
	require.NoError(t, z.Close())
	file := filepath.Join(t.TempDir(), name)
	require.NoError(t, os.WriteFile(file, out.Bytes(), 0o644))
	return file
}

// entriesOf are the files of a file system as entries, with another beginning of the names in place of cut.
func entriesOf(fsys fstest.MapFS, cut, put string) []entry {
	var out []entry
	for name, f := range fsys {
		if rel, ok := strings.CutPrefix(name, cut); ok {
			out = append(out, entry{tar.Header{Name: put + rel}, string(f.Data)})
		}
	}
	return out
}

func shelfOf(t *testing.T, paths ...string) *Shelf {
	t.Helper()
	var sources []*Source
	for _, p := range paths {
		s, err := OpenSource(p, nil)
		require.NoError(t, err)
		sources = append(sources, s)
	}
	shelf, err := NewShelf(sources...)
	require.NoError(t, err)
	return shelf
}

func TestEveryFormOfASourceGivesTheSameBundle(t *testing.T) {
	fsys := extended("", "", "")
	want, problems := Load(fsys, "over")
	require.NoError(t, problems.Err())
	folder := written(t, fsys)
	for name, path := range map[string]string{
		"a folder of bundles":              folder,
		"the folder of one":                filepath.Join(folder, "over"),
		"an archive of folders":            packed(t, "all.tar.gz", entriesOf(fsys, "", "")...),
		"with a point before":              packed(t, "all.tgz", entriesOf(fsys, "", "./")...),
		"with a slash before, as OPA does": packed(t, "all.tar.gz", entriesOf(fsys, "", "/")...),
	} {
		t.Run(name, func(t *testing.T) {
			shelf := shelfOf(t, path)
			library, err := shelf.Take("over")
			require.NoError(t, err)
			b := library["over"]
			assert.Equal(t, want.SHA256, b.SHA256)
			assert.Equal(t, []string{"small"}, b.Extends)
			assert.Equal(t, SignatureNone, b.Signature)
			assert.NotNil(t, b.Compiler)
			h, problems := shelf.Head("over")
			require.NoError(t, problems.Err())
			assert.Equal(t, 1, h.Duties)
			assert.Equal(t, "Over", h.About.Title)
			assert.Equal(t, SignatureNone, h.Signature)
		})
	}
}

func TestArchiveOfOneBundleTakesItsPlaceByItsID(t *testing.T) {
	shelf := shelfOf(t, packed(t, "any name.tar.gz", entriesOf(bundletest.Small(), "small/", "./")...))
	assert.Contains(t, shelf.IDs(), "small")
	assert.Contains(t, shelf.IDs(), "us-osha-general-industry")
	library, err := shelf.Take("small")
	require.NoError(t, err)
	assert.Len(t, library, 1)
	assert.Contains(t, library["small"].Files, "common/common.rego", "the embedded shared rules stand in for those that it does not bring")
}

func TestBundleOverAnEmbeddedOne(t *testing.T) {
	fsys := fstest.MapFS{}
	for name, text := range map[string]string{
		".manifest":            `{"revision": "7", "roots": ["about", "parameters"]}`,
		"about/data.yaml":      "id: mine\ntitle: Mine\nauthority: nobody\ncountry: US\nkind: company\nextends: [us-osha-general-industry]\ninstruments: [{name: Rule, cite: R}]\nin_force: \"2000-01-01\"\nchecked_on: \"2026-01-01\"\ncautions: [made up]\n",
		"parameters/data.yaml": "action_dose: {about: sooner, unit: \"%\", stricter: lower, values: [{from: \"2010-01-01\", value: 25, cite: R 1, seen: text}]}\n",
	} {
		fsys["mine/"+name] = &fstest.MapFile{Data: []byte(text)}
	}
	shelf := shelfOf(t, filepath.Join(written(t, fsys), "mine"))
	library, err := shelf.Take("mine")
	require.NoError(t, err)
	assert.Equal(t, []string{"us-osha-general-industry"}, library["mine"].Extends)
	assert.Greater(t, len(library["mine"].Duties), 40)
	h, problems := shelf.Head("mine")
	require.NoError(t, problems.Err())
	assert.Equal(t, len(library["mine"].Duties), h.Duties)
}

func TestOutsideBundleReplacesAnEmbeddedOne(t *testing.T) {
	dir := t.TempDir()
	require.NoError(t, os.CopyFS(dir, policies.FS))
	require.NoError(t, os.RemoveAll(filepath.Join(dir, "us-osha-general-industry")))
	shelf := shelfOf(t, dir)
	assert.Contains(t, shelf.Replaced(), "company-example")
	assert.NotContains(t, shelf.Replaced(), "us-osha-general-industry")
	place, ok := shelf.Outside("company-example")
	assert.True(t, ok)
	assert.Equal(t, filepath.Join(dir, "company-example"), place)
	plain, err := Embedded("company-example")
	require.NoError(t, err)
	assert.Equal(t, SignatureEmbedded, plain["company-example"].Signature)
	library, err := shelf.Take("company-example", "us-osha-general-industry")
	require.NoError(t, err)
	assert.Equal(t, plain["company-example"].SHA256, library["company-example"].SHA256)
	assert.Equal(t, SignatureNone, library["company-example"].Signature)
	assert.Equal(t, SignatureEmbedded, library["us-osha-general-industry"].Signature)

	one, err := OpenSource(dir, nil)
	require.NoError(t, err)
	two, err := OpenSource(filepath.Join(dir, "company-example"), nil)
	require.NoError(t, err)
	_, err = NewShelf(one, two)
	require.ErrorContains(t, err, "the bundle company-example stands in "+filepath.Join(dir, "company-example")+", too. Name one of them.")
}

// TestShelfReadsOnlyWhatIsTaken: a broken bundle is no trouble to whoever does not use it.
func TestShelfReadsOnlyWhatIsTaken(t *testing.T) {
	fsys := bundletest.Change(bundletest.Small(), "small/duty/posting/posting.rego", "input.enrolled_now", "input.enroled_now")
	dir := written(t, fsys, "small")
	shelf := shelfOf(t, dir)
	library, err := shelf.Take("company-example")
	require.NoError(t, err)
	assert.Len(t, library, 1)
	h, problems := shelf.Head("small")
	require.NoError(t, problems.Err(), "what a bundle says of itself can be read all the same")
	assert.Equal(t, "Small", h.About.Title)
	_, err = shelf.Take("company-example", "small")
	require.ErrorContains(t, err, filepath.Join(dir, "small/duty/posting/posting.rego")+":15:32: undefined ref: input.enroled_now")
	_, err = shelf.Take("smal")
	require.ErrorContains(t, err, `there is no bundle "smal". Did you mean "small"?`)
	first, _ := shelf.Open("company-example")
	second, _ := shelf.Open("company-example")
	assert.Same(t, first, second, "a bundle is read once")
}

// TestOutsideBundlesAreHeldToMore: layout and reach, which tests hold the embedded bundles to.
func TestOutsideBundlesAreHeldToMore(t *testing.T) {
	const rule = "small/duty/posting/posting.rego"
	for name, c := range map[string]struct{ file, old, new, want string }{
		"layout":         {rule, "import rego.v2", "import  rego.v2", "small/duty/posting/posting.rego:13: the module is not in the layout of OPA's formatter."},
		"an unused rule": {rule, "not_owed contains", "spare := 1\n\nnot_owed contains", "small/duty/posting/posting.rego:17:1: no duty uses the rule spare."},
		"never an obligation": {rule, "input.enrolled_now == 0}", "input.enrolled_now == 0} if false",
			"small/duty/posting/posting.rego:1: the duty posting can never return an obligation."},
		"data of nobody": {rule, "\"never\" if false", "\"never\" if data.parametres.dose", "small/duty/posting/posting.rego:17:30: nothing gives data.parametres. Did you mean \"parameters\"?"},
	} {
		t.Run(name, func(t *testing.T) {
			fsys := bundletest.Change(bundletest.Small(), c.file, c.old, c.new)
			dir := written(t, fsys, "small")
			shelf := shelfOf(t, dir)
			_, err := shelf.Take("small")
			require.ErrorContains(t, err, filepath.Join(dir, c.want[:5])+c.want[5:])
			b, problems := shelf.Open("small")
			require.NoError(t, problems.Err(), "whoever rehearses it can open it")
			require.NotNil(t, b)
		})
	}
}

func TestSourcesAreRefused(t *testing.T) {
	good := entriesOf(bundletest.Small(), "small/", "")
	with := func(e entry) []entry { return append(slices.Clone(good), e) }
	link := func(kind byte) entry {
		return entry{tar.Header{Name: "duty/x", Typeflag: kind, Linkname: "/etc/passwd"}, ""}
	}
	linked := written(t, bundletest.Small())
	require.NoError(t, os.Symlink("/etc/passwd", filepath.Join(linked, "small", "cases.yaml")))
	elsewhere := written(t, bundletest.Small())
	require.NoError(t, os.Symlink(elsewhere, filepath.Join(linked, "small", "deep")))
	many := make([]entry, maxFiles+1)
	for i := range many {
		many[i].header.Name = filepath.Join("f", strings.Repeat("a", 1+i%100), strings.Repeat("b", 1+i/100))
	}
	plain := filepath.Join(t.TempDir(), "plain.txt")
	require.NoError(t, os.WriteFile(plain, []byte("x"), 0o644))
	noZip := filepath.Join(t.TempDir(), "plain.tar.gz")
	require.NoError(t, os.WriteFile(noZip, []byte("x"), 0o644))
	cut := packed(t, "cut.tar.gz", good...)
	text, err := os.ReadFile(cut)
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(cut, text[:len(text)/2], 0o644))
	for name, c := range map[string]struct{ path, want string }{
		"nothing":              {"no/such/folder", "no/such/folder: there is no such folder or file. Name a folder or a .tar.gz that holds a bundle."},
		"a plain file":         {plain, "it is neither a folder nor an archive"},
		"no archive":           {noZip, "it is no archive packed by gzip"},
		"a cut archive":        {cut, "Copy or pack it again."},
		"an empty folder":      {t.TempDir(), "it holds no bundle. Name the folder of a bundle, which holds a .manifest, or the folder above it."},
		"the shared rules":     {packed(t, "c.tar.gz", entry{tar.Header{Name: ".manifest"}, "{}"}, entry{tar.Header{Name: "about/data.yaml"}, "id: common\n"}), "it holds the rules that bundles share, and is no bundle"},
		"a way out":            {packed(t, "a.tar.gz", with(entry{tar.Header{Name: "../x"}, "x"})...), `the name "../x" leads out of the archive`},
		"a way out further in": {packed(t, "a.tar.gz", with(entry{tar.Header{Name: "duty/../../x"}, "x"})...), `the name "duty/../../x" leads out of the archive`},
		"a drive":              {packed(t, "a.tar.gz", with(entry{tar.Header{Name: `C:\x`}, "x"})...), `leads out of the archive`},
		"a link":               {packed(t, "a.tar.gz", with(link(tar.TypeSymlink))...), "a.tar.gz/duty/x: it is a link or a device"},
		"a hard link":          {packed(t, "a.tar.gz", with(link(tar.TypeLink))...), "it is a link or a device"},
		"a pipe":               {packed(t, "a.tar.gz", with(link(tar.TypeFifo))...), "it is a link or a device"},
		"a file twice":         {packed(t, "a.tar.gz", with(entry{tar.Header{Name: "./.manifest"}, "{}"})...), "the file stands twice in the archive"},
		"a huge file":          {packed(t, "a.tar.gz", with(entry{tar.Header{Name: "big"}, strings.Repeat("0", maxFileBytes+1)})...), "a.tar.gz/big: the file is larger than 4 MB"},
		"a bomb":               {packed(t, "a.tar.gz", bomb()...), "its files are larger than 64 MB together"},
		"very many files":      {packed(t, "a.tar.gz", many...), "it holds more than 5000 files"},
		"an archive of opa build": {packed(t, "a.tar.gz", entry{tar.Header{Name: "/.manifest"}, "{}"}, entry{tar.Header{Name: "/data.json"}, "{}"}),
			"as `opa build` writes it"},
		"an archive without id":   {packed(t, "a.tar.gz", entry{tar.Header{Name: ".manifest"}, "{}"}), "the bundle does not say its id"},
		"an id that leads out":    {packed(t, "a.tar.gz", entry{tar.Header{Name: ".manifest"}, "{}"}, entry{tar.Header{Name: "about/data.yaml"}, "id: ../x\n"}), "the bundle does not say its id"},
		"a link to a bundle":      {linkedTo(t), "small: it is a link to a bundle, and links could lead anywhere"},
		"a link in a folder":      {filepath.Join(linked, "small"), "cases.yaml: it is a link or a device, and a bundle holds plain files only. Put a copy in its place."},
		"a huge file in a folder": {filepath.Join(huge(t), "small"), "big.yaml: the file is larger than 4 MB"},
	} {
		t.Run(name, func(t *testing.T) {
			s, err := OpenSource(c.path, nil)
			require.ErrorContains(t, err, c.want)
			assert.Nil(t, s)
		})
	}
}

// bomb is small when packed.
func bomb() []entry {
	out := make([]entry, maxBytes/maxFileBytes+1)
	for i := range out {
		out[i] = entry{tar.Header{Name: "x/" + strings.Repeat("y", i+1)}, strings.Repeat("0", maxFileBytes)}
	}
	return out
}

// linkedTo is a folder in which a bundle lies only as a link.
func linkedTo(t *testing.T) string {
	dir := t.TempDir()
	require.NoError(t, os.Symlink(filepath.Join(written(t, bundletest.Small()), "small"), filepath.Join(dir, "small")))
	return dir
}

func huge(t *testing.T) string {
	dir := written(t, bundletest.Small())
	require.NoError(t, os.WriteFile(filepath.Join(dir, "small", "big.yaml"), make([]byte, maxFileBytes+1), 0o644))
	return dir
}

// TestFolderNeverReadsBesideWhatItExtends: what lies beside a bundle is read only where the bundle names it.
func TestFolderNeverReadsBesideWhatItExtends(t *testing.T) {
	dir := written(t, extended("", "", ""))
	require.NoError(t, os.MkdirAll(filepath.Join(dir, "other"), 0o755))
	require.NoError(t, os.WriteFile(filepath.Join(dir, "other", ".manifest"), make([]byte, maxFileBytes+1), 0o644))
	s, err := OpenSource(filepath.Join(dir, "over"), nil)
	require.NoError(t, err)
	assert.Equal(t, []string{"over"}, s.IDs)
	assert.True(t, s.has("small"))
	assert.True(t, s.has("common"))
	about := filepath.Join(dir, "over", "about", "data.yaml")
	text, err := os.ReadFile(about)
	require.NoError(t, err)
	require.NoError(t, os.WriteFile(about, bytes.Replace(text, []byte("[small]"), []byte("[../over]"), 1), 0o644))
	s, err = OpenSource(filepath.Join(dir, "over"), nil)
	require.NoError(t, err)
	shelf, err := NewShelf(s)
	require.NoError(t, err)
	_, problems := shelf.Open("over")
	require.ErrorContains(t, problems.Err(), `the bundle extends "../over", which does not exist`)
}

// TestWhatIsNoPartOfABundleChangesNoDigest: its book, its signature, and what a version control keeps.
func TestWhatIsNoPartOfABundleChangesNoDigest(t *testing.T) {
	want, problems := Load(bundletest.Small(), "small")
	require.NoError(t, problems.Err())
	fsys := bundletest.Small()
	for _, file := range []string{"BOOK.md", ".signatures.json", ".git/config"} {
		fsys["small/"+file] = &fstest.MapFile{Data: []byte("{}")}
	}
	library, err := shelfOf(t, filepath.Join(written(t, fsys), "small")).Take("small")
	require.NoError(t, err)
	assert.Equal(t, want.SHA256, library["small"].SHA256)
	assert.NotContains(t, library["small"].Files, "small/BOOK.md")
	fsys["small/cases/BOOK.md"] = fsys["small/BOOK.md"]
	library, err = shelfOf(t, filepath.Join(written(t, fsys), "small")).Take("small")
	require.NoError(t, err)
	assert.NotEqual(t, want.SHA256, library["small"].SHA256, "any other file counts")
}

// TestEveryComplaintHasARemedy: an author who is told of an error is told what to do, too.
func TestEveryComplaintHasARemedy(t *testing.T) {
	const rule = "small/duty/posting/posting.rego"
	const condition = "input.enrolled_now == 0"
	for new, want := range map[string]string{
		"http.send({}).status_code == 1":  "a rule cannot call what reads a clock, a network, a file, the environment or chance.",
		"time.now_ns() == 0":              "a rule cannot call what reads a clock",
		"opa.runtime().env.HOME == \"x\"": "a rule cannot call what reads a clock",
		"input.enroled_now == 0":          "Write one of the facts that the dossier has.",
		"true} if {input.site == \"x\"":   "Compare values of one type.",
		"x == 0":                          "Give the variable a value in the same rule.",
		"count(1) == 1":                   "Give the function values of the types that it takes.",
		"input.enrolled_now = = 0":        "Correct the rule there.",
	} {
		dir := written(t, bundletest.Change(bundletest.Small(), rule, condition, new), "small")
		_, err := shelfOf(t, dir).Take("small")
		require.ErrorContains(t, err, want, new)
		assert.Contains(t, err.Error(), filepath.Join(dir, rule)+":15:", new)
	}
}

// TestLoadingIsCutOff: a bundle whose rules take the compiler forever is refused.
func TestLoadingIsCutOff(t *testing.T) {
	whole := loadLimit
	t.Cleanup(func() { loadLimit = whole })
	dir := written(t, bundletest.Small(), "small")
	loadLimit = time.Nanosecond
	_, err := shelfOf(t, dir).Take("small")
	require.EqualError(t, err, filepath.Join(dir, "small")+": the bundle takes longer than 1ns to load. Do not use a bundle that you do not trust; if it is your own, split its largest rules.")
	loadLimit = whole
	shelf := shelfOf(t, dir)
	_, problems := shelf.Open("small")
	require.NoError(t, problems.Err())
	loadLimit = time.Nanosecond
	_, err = shelf.Take("small")
	require.ErrorContains(t, err, "takes longer than 1ns to load", "layout and reach, too")
}

// FuzzArchive: no archive makes the program stop or gives a bundle without an id, and names stay within it.
func FuzzArchive(f *testing.F) {
	var good bytes.Buffer
	w := tar.NewWriter(&good)
	for _, name := range []string{".manifest", "about/data.yaml", "../x", "/y"} {
		text := []byte("id: small\n")
		if err := w.WriteHeader(&tar.Header{Name: name, Size: int64(len(text)), Typeflag: tar.TypeReg}); err != nil {
			f.Fatal(err)
		}
		if _, err := w.Write(text); err != nil {
			f.Fatal(err)
		}
	}
	f.Add(good.Bytes())
	f.Add(good.Bytes()[:1024])
	f.Add([]byte{})
	f.Fuzz(func(t *testing.T, data []byte) {
		s := &Source{Path: "x.tar.gz", files: fstest.MapFS{}, places: map[string]string{}}
		if s.readTar(tar.NewReader(bytes.NewReader(data))) != nil || s.unpacked() != nil {
			return
		}
		for name := range s.files {
			if !fs.ValidPath(name) {
				t.Errorf("the name %q", name)
			}
		}
		for _, id := range s.IDs {
			if !s.has(id) || s.places[id] == "" {
				t.Errorf("the bundle %q has no manifest or no place", id)
			}
		}
	})
}
