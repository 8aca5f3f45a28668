package bundle

import (
	"crypto/sha256"
	"encoding/hex"
	"encoding/json"
	"fmt"
	"io/fs"
	"maps"
	"path"
	"slices"
	"strings"

	"hearduty/internal/diag"
)

// commonDir is the folder of the rules that all bundles share.
const commonDir = "common"

// Folders lists the bundle folders of a file system: those with a .manifest, without the shared rules.
func Folders(fsys fs.FS) ([]string, error) {
	manifests, err := fs.Glob(fsys, "*/.manifest")
	if err != nil {
		return nil, err
	}
	var ids []string
	for _, m := range manifests {
		if dir := path.Dir(m); dir != commonDir {
			ids = append(ids, dir)
		}
	}
	return ids, nil
}

// files holds the contents of a bundle by path within the file system.
type files map[string][]byte

// besides are files in the folder of a bundle that are no part of what it says: its book, which is made from it, and its
// signature. They do not count for the digest.
var besides = []string{"BOOK.md", signaturesFile}

func readFiles(fsys fs.FS, dirs ...string) (files, error) {
	out := files{}
	for _, dir := range dirs {
		err := fs.WalkDir(fsys, dir, func(p string, entry fs.DirEntry, err error) error {
			if err != nil || entry.IsDir() || path.Dir(p) == dir && slices.Contains(besides, entry.Name()) {
				return err
			}
			out[p], err = fs.ReadFile(fsys, p)
			return err
		})
		if err != nil {
			return nil, fmt.Errorf("the bundle folder %s cannot be read: %w", dir, err)
		}
	}
	return out, nil
}

func (f files) paths() []string {
	out := make([]string, 0, len(f))
	for p := range f {
		out = append(out, p)
	}
	slices.Sort(out)
	return out
}

// digest gives the SHA-256 over all paths and contents, in order of path.
func (f files) digest() string {
	h := sha256.New()
	for _, p := range f.paths() {
		fmt.Fprintf(h, "%s\x00%d\x00", p, len(f[p]))
		h.Write(f[p])
	}
	return hex.EncodeToString(h.Sum(nil))
}

// Load reads the bundle in the folder dir, together with the shared rules beside it, and checks it. The
// diagnostics name file, line and column of whatever is wrong; with an error among them there is no bundle.
func Load(fsys fs.FS, dir string) (*Bundle, diag.List) {
	var problems diag.List
	l := layers(fsys, dir, nil, &problems)
	if problems.Failed() {
		return nil, problems
	}
	shared, err := readFiles(fsys, commonDir)
	if err != nil {
		problems.Errorf(diag.Position{File: commonDir}, "Put the shared rules beside the bundle", "%v", err)
		return nil, problems
	}
	maps.Copy(l.read, shared)
	b := &Bundle{
		ID: l.about.ID, Revision: l.revision, SHA256: l.read.digest(), Extends: l.chain, Data: l.data,
		Files: l.read, Modules: slices.Sorted(maps.Keys(l.sources(shared))),
	}
	b.take(l, &problems)
	if problems.Failed() {
		return nil, problems
	}
	b.checkData(dir, &problems)
	b.checkLooser(l, &problems)
	b.readRules(l, shared, &problems)
	if problems.Failed() {
		return nil, problems
	}
	b.checkParagraphs(dir, &problems)
	if problems.Failed() {
		return nil, problems
	}
	b.Warnings = problems
	return b, problems
}

func (l *layer) readManifest(problems *diag.List) {
	file := path.Join(l.dir, ".manifest")
	var manifest struct {
		Revision string   `json:"revision"`
		Roots    []string `json:"roots"`
	}
	if err := json.Unmarshal(l.read[file], &manifest); err != nil {
		problems.Errorf(diag.Position{File: file}, "Write a JSON object with revision and roots", "the manifest cannot be read: %v", err)
	}
	if l.revision = manifest.Revision; l.revision == "" {
		problems.Errorf(diag.Position{File: file}, "Add a revision, such as its date", "the manifest has no revision")
	}
}

// take reads the data of all layers into the bundle.
func (b *Bundle) take(l *layer, problems *diag.List) {
	for name, into := range map[string]any{
		"about": &b.About, "parameters": &b.Parameters, "choices": &b.Choices, "paragraphs": &b.Paragraphs, "measures": &b.Measures,
	} {
		if l.data[name] == nil {
			l.data[name] = map[string]any{}
		}
		if err := remarshal(l.data[name], into); err != nil {
			problems.Errorf(diag.Position{File: l.file(name)}, "", "%v", err)
		}
	}
	b.About = l.about // with what it inherits
}

func remarshal(value, into any) error {
	text, err := json.Marshal(value)
	if err != nil {
		return err
	}
	return json.Unmarshal(text, into)
}

// isTest says whether a module holds tests of rules.
func isTest(file string) bool { return strings.HasSuffix(file, "_test.rego") }
