// Package template writes the files of a new bundle, or of a new duty in a bundle, as a beginning for its author. What
// is to be filled in says CHANGE ME. It never overwrites a file.
package template

import (
	"bytes"
	"embed"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"regexp"
	"strings"
	"text/template"
)

//go:embed all:files
var files embed.FS

// Mark stands wherever something is to be filled in.
const Mark = "CHANGE ME"

// Bundle writes a new bundle into a folder, whose name becomes its id. The folder must not be there, or be empty. Today
// is the day on which it is written, as YYYY-MM-DD.
func Bundle(dir, today string, taken []string) (id string, err error) {
	whole, err := filepath.Abs(dir)
	if err != nil {
		return "", err
	}
	id = filepath.Base(whole)
	switch {
	case !bundleID.MatchString(id):
		return "", fmt.Errorf("the name of the folder becomes the id of the bundle, and %q cannot be one; write small letters, digits and hyphens", id)
	case contains(taken, id) || id == "common":
		return "", fmt.Errorf("there is a bundle %s already; give the folder another name", id)
	}
	if entries, err := os.ReadDir(dir); err == nil && len(entries) > 0 {
		return "", fmt.Errorf("the folder %s is not empty; name a new one", dir)
	}
	out := map[string]string{}
	err = fs.WalkDir(files, "files/bundle", func(p string, entry fs.DirEntry, err error) error {
		if err != nil || entry.IsDir() {
			return err
		}
		rel := strings.TrimSuffix(strings.TrimPrefix(p, "files/bundle/"), ".tmpl")
		if rel == "manifest" {
			rel = ".manifest"
		}
		out[rel], err = fill(p, map[string]string{"ID": id, "Today": today})
		return err
	})
	if err != nil {
		return "", err
	}
	return id, write(dir, out)
}

var (
	bundleID = regexp.MustCompile(`^[a-z0-9]+(-[a-z0-9]+)*$`)
	dutyName = regexp.MustCompile(`^[a-z][a-z0-9]*([-_][a-z0-9]+)*$`)
)

func contains(list []string, s string) bool {
	for _, x := range list {
		if x == s {
			return true
		}
	}
	return false
}

// fill puts values into the places of a template.
func fill(file string, values map[string]string) (string, error) {
	text, err := files.ReadFile(file)
	if err != nil {
		return "", err
	}
	t, err := template.New(path.Base(file)).Delims("<<", ">>").Option("missingkey=error").Parse(string(text))
	if err != nil {
		return "", err
	}
	var out bytes.Buffer
	if err := t.Execute(&out, values); err != nil {
		return "", err
	}
	return out.String(), nil
}

// write writes new files below a folder. If one of them is there already, it writes none.
func write(dir string, files map[string]string) error {
	for rel := range files {
		file := filepath.Join(dir, filepath.FromSlash(rel))
		if _, err := os.Lstat(file); !errors.Is(err, fs.ErrNotExist) {
			return fmt.Errorf("%s is there already, and nothing is overwritten; take another name", file)
		}
	}
	for rel, text := range files {
		file := filepath.Join(dir, filepath.FromSlash(rel))
		if err := os.MkdirAll(filepath.Dir(file), 0o755); err != nil {
			return err
		}
		f, err := os.OpenFile(file, os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o644)
		if err != nil {
			return err
		}
		if _, err := f.WriteString(text); err != nil {
			f.Close()
			return err
		}
		if err := f.Close(); err != nil {
			return err
		}
	}
	return nil
}
