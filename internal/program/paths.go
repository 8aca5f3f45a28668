package program

import (
	"io/fs"
	"os"
	"path"
	"path/filepath"
	"strings"

	"gopkg.in/yaml.v3"
)

// path reads the path of a file beside the program file. A missing node gives none.
func (d *decoder) path(n *yaml.Node, what string, p *Program) Path {
	name := d.text(n, what)
	if name == "" {
		return Path{}
	}
	clean, ok := d.inside(n, name)
	if !ok || !d.linked(n, p.Dir, clean) {
		return Path{}
	}
	return Path{Open: filepath.Join(p.Dir, filepath.FromSlash(clean)), Shown: clean}
}

// inside cleans a path and refuses one that leaves the program's folder.
func (d *decoder) inside(n *yaml.Node, name string) (string, bool) {
	clean := path.Clean(filepath.ToSlash(name))
	drive := len(clean) > 1 && clean[1] == ':'
	if path.IsAbs(clean) || filepath.IsAbs(name) || drive || strings.HasPrefix(clean, `\`) {
		d.diags.Errorf(d.at(n), "Write the path relative to the program file", "%q is an absolute path, so the program could not be moved or shared", name)
		return "", false
	}
	if clean == ".." || strings.HasPrefix(clean, "../") {
		d.diags.Errorf(d.at(n), "Copy the file into the folder of the program file, or move the program file up", "%q leads out of the program's folder", name)
		return "", false
	}
	if os.PathSeparator == '/' && strings.Contains(clean, `\`) {
		d.diags.Errorf(d.at(n), "Write "+strings.ReplaceAll(clean, `\`, "/"), "the path %q has backslashes", name)
		return "", false
	}
	return clean, true
}

// linked refuses a path that leaves the program's folder by a link. What does not exist leads nowhere.
func (d *decoder) linked(n *yaml.Node, dir, clean string) bool {
	target, err := filepath.EvalSymlinks(filepath.Join(dir, filepath.FromSlash(clean)))
	if err != nil {
		return true
	}
	target, _ = filepath.Abs(target)
	home, err := filepath.EvalSymlinks(dir)
	if err != nil {
		return true
	}
	home, _ = filepath.Abs(home)
	inner, err := filepath.Rel(home, target)
	if err == nil && filepath.IsLocal(inner) {
		return true
	}
	d.diags.Errorf(d.at(n), "Copy the file itself into the folder of the program file", "%q is a link that leads out of the program's folder", clean)
	return false
}

// expand gives the files that a path with asterisks stands for, sorted. An asterisk stands for any part of
// the name of a file or folder, but not for a name that begins with a point or with ~$, as the file does
// that a spreadsheet program keeps beside an open workbook. Only * is special.
func (d *decoder) expand(n *yaml.Node, dir, pattern string) []string {
	quoted := strings.NewReplacer(`\`, `\\`, "?", `\?`, "[", `\[`).Replace(pattern)
	found, err := fs.Glob(os.DirFS(dir), quoted)
	if err != nil {
		d.diags.Errorf(d.at(n), "Name the files one by one", "the pattern %q cannot be read", pattern)
		return nil
	}
	var out []string
	for _, name := range found {
		info, err := os.Stat(filepath.Join(dir, filepath.FromSlash(name)))
		if err == nil && !info.IsDir() && !passedOver(pattern, name) {
			out = append(out, name)
		}
	}
	if len(out) == 0 {
		d.diags.Errorf(d.at(n), "Correct the pattern, or put the files there", "no file fits the pattern %q", pattern)
	}
	return out
}

// passedOver says whether an asterisk at the beginning of a name stands for something hidden.
func passedOver(pattern, name string) bool {
	patterns := strings.Split(pattern, "/")
	for i, part := range strings.Split(name, "/") {
		if i < len(patterns) && strings.HasPrefix(patterns[i], "*") && (strings.HasPrefix(part, ".") || strings.HasPrefix(part, "~$")) {
			return true
		}
	}
	return false
}
