package program

import (
	"path"
	"path/filepath"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

// item is one item of records while it is read.
type item struct {
	node     *yaml.Node
	kindNode *yaml.Node
	member   string
	kind     string
	source   Source // what all sources of the item share
}

// sources reads an item of records, a path or a mapping, and adds the sources that it stands for.
func (d *decoder) sources(n *yaml.Node, p *Program) {
	it := item{node: n, kindNode: resolve(n), source: Source{At: d.at(n)}}
	name := ""
	if it.kindNode.Kind == yaml.MappingNode {
		values, _ := d.mapping(n, "a record file", "file", "member", "kind", "sheet", "encoding", "map")
		name = d.needText(n, values, "file", "a record file")
		it.member = d.text(values["member"], "member")
		it.kind = d.text(values["kind"], "kind")
		it.source.Sheet = d.text(values["sheet"], "sheet")
		it.source.Encoding = d.text(values["encoding"], "encoding")
		if m := values["map"]; m != nil {
			if it.source.Map = d.path(m, "map", p); it.source.Map.Open == "" {
				return
			}
		}
		if values["kind"] != nil {
			it.kindNode = values["kind"]
		}
	} else {
		name = d.text(n, "a record file")
	}
	if name == "" {
		return
	}
	clean, ok := d.inside(n, name)
	if !ok {
		return
	}
	files := []string{clean}
	if strings.Contains(clean, "*") {
		files = d.expand(n, p.Dir, clean)
	}
	for _, file := range files {
		if d.linked(n, p.Dir, file) {
			d.named(it, file, p)
		}
	}
}

// named adds the source of one file, or those of the members of an archive.
func (d *decoder) named(it item, file string, p *Program) {
	it.source.Path = filepath.Join(p.Dir, filepath.FromSlash(file))
	archive := strings.EqualFold(path.Ext(file), ".zip")
	switch {
	case archive && it.member == "":
		d.archive(it, file, p)
	case archive:
		member := path.Clean(it.member)
		if d.readable(it.node, member) {
			it.source.Member = member
			d.add(it, file+"/"+member, p)
		}
	case it.member != "":
		d.diags.Errorf(d.at(it.node), "Remove the key member", "%s is no ZIP archive, so it has no member", file)
	case d.readable(it.node, file):
		d.add(it, file, p)
	}
}

// add adds the source of that name, unless it was named already.
func (d *decoder) add(it item, shown string, p *Program) {
	s := it.source
	s.Shown = shown
	var ok bool
	if s.Kind, ok = d.kind(it.kindNode, shown, it.kind, s.Map.Open != ""); !ok {
		return
	}
	for _, other := range p.Sources {
		if other.Shown == s.Shown && other.Sheet == s.Sheet && other.Kind == s.Kind && (s.Kind != "" || other.Map == s.Map) {
			d.diags.Errorf(s.At, "Name each file once, unless the sheet or the kind is another one", "the record file %s was already named in line %d", shown, other.At.Line)
			return
		}
	}
	p.Sources = append(p.Sources, s)
}

// kind tells the record kind of a file from the key kind, or else from the file name. A map may tell it
// later.
func (d *decoder) kind(at *yaml.Node, file, stated string, mapped bool) (record.Kind, bool) {
	if stated != "" {
		if _, ok := record.TableOf(record.Kind(stated)); !ok {
			d.diags.Errorf(d.at(at), suggest(stated, kindNames(), "kinds"), "there is no record kind %q", stated)
			return "", false
		}
		return record.Kind(stated), true
	}
	if mapped {
		return "", true
	}
	kind, ok := record.KindOfFile(file)
	if !ok {
		remedy := "Write {file: " + file + ", kind: …}, or give the file a canonical name such as audiograms.csv; the kinds are " + strings.Join(kindNames(), ", ")
		if near := nearFile(file); near != "" {
			remedy = "Rename the file to " + near + " if that is meant, or write {file: " + file + ", kind: …}"
		}
		d.diags.Errorf(d.at(at), remedy, "the name of %s does not tell which kind of records it holds", file)
	}
	return kind, ok
}

func kindNames() []string {
	var names []string
	for _, k := range record.Kinds() {
		names = append(names, string(k))
	}
	return names
}

func nearFile(file string) string {
	extension := path.Ext(file)
	var names []string
	for _, k := range record.Kinds() {
		table, _ := record.TableOf(k)
		names = append(names, table.FileName()+extension)
	}
	return diag.Near(path.Base(file), names)
}

// readable refuses a file whose ending tells that it is not read.
func (d *decoder) readable(n *yaml.Node, file string) bool {
	switch extension := strings.ToLower(path.Ext(file)); {
	case extension == ".xls":
		d.diags.Errorf(d.at(n), "Open it in a spreadsheet program, save it as .xlsx or as CSV UTF-8, and name that file", "%s is a workbook of the old form .xls, which is not read", file)
	case !slices.Contains(record.Endings, extension):
		d.diags.Errorf(d.at(n), "Export the table as one of these and name that file", "%s ends in none of %s", file, strings.Join(append(slices.Clone(record.Endings), ".zip"), ", "))
	default:
		return true
	}
	return false
}
