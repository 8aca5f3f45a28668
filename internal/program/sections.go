package program

import (
	"os"
	"path"
	"path/filepath"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
	"hearduty/internal/record"
)

func (d *decoder) program(root *yaml.Node, p *Program) {
	const what = "the program file"
	values, ok := d.mapping(root, what, "program", "sites", "records", "as_of", "accepted")
	if !ok {
		return
	}
	p.Title = d.needText(root, values, "program", what)
	for _, n := range d.needList(root, values, "sites", what) {
		d.site(n, p)
	}
	for _, n := range d.needList(root, values, "records", what) {
		d.source(n, p)
	}
	if n := values["as_of"]; n != nil {
		p.AsOf = d.day(n, "as_of")
	}
	if n := values["accepted"]; n != nil {
		if name := d.text(n, "accepted"); name != "" {
			if clean, ok := d.inside(n, name); ok {
				p.Accepted = filepath.Join(p.Dir, filepath.FromSlash(clean))
				d.diags.Warnf(d.at(n), "Read the gaps as they stand", "accepted gaps are not applied by this version")
			}
		}
	}
}

func (d *decoder) site(n *yaml.Node, p *Program) {
	values, ok := d.mapping(n, "a site", "id", "name", "country", "region", "bundles", "choices")
	if !ok {
		return
	}
	s := Site{At: d.at(n)}
	s.ID = d.needText(n, values, "id", "a site")
	what := "site " + s.ID
	if first, double := p.Site(s.ID); double && s.ID != "" {
		d.diags.Errorf(d.at(values["id"]), "Give each site an id of its own", "the site id %s was already used in line %d", s.ID, first.At.Line)
	}
	s.Name = d.text(values["name"], "name of "+what)
	s.Country = d.text(values["country"], "country of "+what)
	s.Region = d.text(values["region"], "region of "+what)
	for _, item := range d.needList(n, values, "bundles", what) {
		id := d.text(item, "a bundle of "+what)
		if id == "" {
			continue
		}
		if contains(s.Bundles, id) {
			d.diags.Errorf(d.at(item), "Name it once", "%s names the bundle %s twice", what, id)
			continue
		}
		s.Bundles = append(s.Bundles, id)
		s.BundlesAt = append(s.BundlesAt, d.at(item))
	}
	if choices := values["choices"]; choices != nil {
		d.choices(choices, what, &s)
	}
	p.Sites = append(p.Sites, s)
}

func (d *decoder) choices(n *yaml.Node, what string, s *Site) {
	n = resolve(n)
	if n.Kind != yaml.MappingNode {
		d.diags.Errorf(d.at(n), "Write each choice as a key with its value, such as age_correction: false", "choices of %s is %s, not a mapping", what, kindName(n))
		return
	}
	s.Choices, s.ChoicesAt = map[string]any{}, map[string]diag.Position{}
	for i := 0; i+1 < len(n.Content); i += 2 {
		key := n.Content[i]
		if _, double := s.Choices[key.Value]; double {
			d.diags.Errorf(d.at(key), "Keep one of the two", "%s makes the choice %q twice", what, key.Value)
			continue
		}
		s.Choices[key.Value] = d.value(n.Content[i+1], 0)
		s.ChoicesAt[key.Value] = d.at(key)
	}
}

// source reads an item of records: a path, or a mapping with file, kind, sheet and map.
func (d *decoder) source(n *yaml.Node, p *Program) {
	s := Source{At: d.at(n)}
	name, kind, kindNode := "", "", resolve(n)
	if kindNode.Kind == yaml.MappingNode {
		values, _ := d.mapping(n, "a record file", "file", "kind", "sheet", "map")
		name = d.needText(n, values, "file", "a record file")
		kind = d.text(values["kind"], "kind")
		s.Sheet = d.text(values["sheet"], "sheet")
		s.Map = d.text(values["map"], "map")
		if values["kind"] != nil {
			kindNode = values["kind"]
		}
	} else {
		name = d.text(n, "a record file")
	}
	if name == "" {
		return
	}
	clean, ok := d.inside(n, name)
	if !ok || !d.readable(n, clean, &s) {
		return
	}
	if s.Kind, ok = d.kind(kindNode, clean, kind); !ok {
		return
	}
	for _, other := range p.Sources {
		if other.Shown == clean {
			d.diags.Errorf(s.At, "Name each file once", "the record file %s was already named in line %d", clean, other.At.Line)
			return
		}
	}
	s.Shown, s.Path = clean, filepath.Join(p.Dir, filepath.FromSlash(clean))
	p.Sources = append(p.Sources, s)
}

// kind tells the record kind of a file from the key kind, or else from the file name.
func (d *decoder) kind(at *yaml.Node, file, stated string) (record.Kind, bool) {
	if stated != "" {
		if _, ok := record.TableOf(record.Kind(stated)); !ok {
			d.diags.Errorf(d.at(at), suggest(stated, kindNames(), "kinds"), "there is no record kind %q", stated)
			return "", false
		}
		return record.Kind(stated), true
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

// readable refuses what this version does not read.
func (d *decoder) readable(n *yaml.Node, file string, s *Source) bool {
	const remedy = "Export the table as a canonical CSV, JSON or NDJSON file and name that"
	extension := strings.ToLower(path.Ext(file))
	switch {
	case s.Map != "" || s.Sheet != "" || extension == ".xlsx" || extension == ".xls":
		d.diags.Errorf(d.at(n), remedy, "this version reads canonical CSV, JSON and NDJSON; it reads no workbooks and no maps yet")
	case extension != ".csv" && extension != ".json" && extension != ".ndjson":
		d.diags.Errorf(d.at(n), remedy, "%s ends neither in .csv nor in .json nor in .ndjson", file)
	default:
		return true
	}
	return false
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
