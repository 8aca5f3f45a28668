package program

import (
	"errors"
	"path"
	"path/filepath"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// namedMembers gives the archives and members that items name one by one.
func namedMembers(items []*yaml.Node) map[[2]string]bool {
	named := map[[2]string]bool{}
	for _, n := range items {
		var file, member string
		n = resolve(n)
		for i := 0; i+1 < len(n.Content); i += 2 {
			switch n.Content[i].Value {
			case "file":
				file = resolve(n.Content[i+1]).Value
			case "member":
				member = resolve(n.Content[i+1]).Value
			}
		}
		if member != "" {
			named[[2]string{path.Clean(filepath.ToSlash(strings.TrimSpace(file))), path.Clean(strings.TrimSpace(member))}] = true
		}
	}
	return named
}

// archive adds each member of an archive that has a canonical name, and tells which others there are. Those that are
// named one by one are left to that.
func (d *decoder) archive(it item, file string, p *Program) {
	at := d.at(it.node)
	if it.source.Map.Open != "" || it.kind != "" || it.source.Sheet != "" {
		d.diags.Errorf(at, "Write {file: "+file+", member: …} with the name of the file in it", "%s is a ZIP archive, and it is not said which file in it is meant", file)
		return
	}
	names, err := grid.Members(it.source.Path)
	if err != nil {
		var fault *grid.Fault
		remedy := "Check the file and its permissions"
		if errors.As(err, &fault) {
			remedy = fault.Remedy
		}
		d.diags.Errorf(at, remedy, "the ZIP archive %s cannot be read: %s", file, plain(err))
		return
	}
	var others []string
	found := false
	for _, name := range names {
		if d.members[[2]string{file, name}] {
			continue
		}
		if _, ok := record.KindOfFile(name); !ok {
			others = append(others, name)
			continue
		}
		found = true
		it.source.Member = name
		d.add(it, file+"/"+name, p)
	}
	const remedy = "Name those that hold records with file, member, kind and map"
	switch {
	case !found && (len(others) > 0 || len(names) == 0):
		d.diags.Errorf(at, remedy, "no file in the ZIP archive %s has a canonical name such as audiograms.csv%s", file, listed(others))
	case len(others) > 0:
		d.diags.Warnf(at, remedy, "these files in the ZIP archive %s were not read, since their names are not canonical%s", file, listed(others))
	}
}

func listed(names []string) string {
	const most = 20
	switch n := len(names); {
	case n == 0:
		return ""
	case n > most:
		return ": " + strings.Join(names[:most], ", ") + ", …"
	}
	return ": " + strings.Join(names, ", ")
}
