package bundle

import (
	"fmt"
	"io/fs"
	"maps"
	"path"
	"slices"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/schema"
)

// A bundle may extend others: what it does not say itself it takes from them. Each bundle of the chain is a layer.

// dataFiles are the data of a bundle, one file a folder.
var dataFiles = []string{"about", "parameters", "choices", "paragraphs", "measures"}

// layer is what a bundle and those that it extends say together.
type layer struct {
	dir      string
	about    About
	revision string
	data     map[string]any            // by name of the data file, JSON-shaped
	places   map[string]*schema.Places // of the bundle's own files
	modules  map[string]module         // by path within the bundle
	origin   map[string]string         // bundle that a parameter or duty comes from: "parameter/name", "duty/name"
	replaced map[string]any            // parameters of the extended bundles that this one replaces, by name
	read     files                     // all files of all layers
	chain    []string                  // ids of the bundles extended, the nearest first
}

// module is a Rego module with the folder of the bundle that it comes from.
type module struct {
	dir, file string
	text      []byte
}

// layers reads a bundle and those that it extends. The trail names the bundles on the way to this one.
func layers(fsys fs.FS, dir string, trail []string, problems *diag.List) *layer {
	own, err := readFiles(fsys, dir)
	if err != nil {
		problems.Errorf(diag.Position{File: dir}, "Name a folder that holds a bundle", "%v", err)
		return nil
	}
	l := &layer{dir: dir, data: map[string]any{}, places: map[string]*schema.Places{}, modules: map[string]module{}, origin: map[string]string{}, read: own}
	l.readManifest(problems)
	l.readAbout(problems)
	if problems.Failed() {
		return nil
	}
	bases := l.bases(fsys, trail, problems)
	l.readOthers(len(bases) > 0, problems)
	if problems.Failed() {
		return nil
	}
	l.ownModules()
	return l.over(bases, problems)
}

func (l *layer) file(name string) string { return path.Join(l.dir, name, "data.yaml") }

// at gives the place of a value in one of the bundle's own data files.
func (l *layer) at(name, pointer string) diag.Position {
	if p := l.places[name]; p != nil {
		return p.Key(pointer)
	}
	return diag.Position{File: l.file(name)}
}

func (l *layer) readAbout(problems *diag.List) {
	content, ok := l.read[l.file("about")]
	if !ok {
		problems.Errorf(diag.Position{File: l.file("about")}, "Add the file", "the bundle has no about")
		return
	}
	value, places, found := schema.YAMLPlaces("about", l.file("about"), content)
	*problems = append(*problems, found...)
	if found.Failed() {
		return
	}
	l.data["about"], l.places["about"] = value, places
	if err := remarshal(value, &l.about); err != nil {
		problems.Errorf(diag.Position{File: l.file("about")}, "", "%v", err)
	}
	if base := path.Base(l.dir); l.about.ID != base {
		problems.Errorf(l.at("about", "/id"), "Give the folder and the bundle the same name", "the bundle calls itself %q but lies in the folder %q", l.about.ID, base)
	}
	for i, d := range l.about.Drops {
		if len(l.about.Extends) == 0 {
			problems.Errorf(l.at("about", fmt.Sprintf("/drops/%d", i)), "Remove it, or name under extends the bundle that has it", "the bundle drops %q but extends nothing", d)
		}
	}
}

// bases reads the bundles that this one extends.
func (l *layer) bases(fsys fs.FS, trail []string, problems *diag.List) []*layer {
	var out []*layer
	trail = append(slices.Clone(trail), l.about.ID)
	for i, id := range l.about.Extends {
		at := l.at("about", fmt.Sprintf("/extends/%d", i))
		switch {
		case slices.Contains(trail, id):
			problems.Errorf(at, "Let one of them extend nothing of the others", "the bundles extend each other in a circle: %s, %s", strings.Join(trail, ", "), id)
			continue
		case slices.Contains(l.about.Extends[:i], id):
			problems.Errorf(at, "Name it once", "the bundle extends %s twice", id)
			continue
		}
		dir := path.Join(path.Dir(l.dir), id)
		if _, err := fs.Stat(fsys, path.Join(dir, ".manifest")); err != nil {
			known, _ := Folders(fsys)
			problems.Errorf(at, nearRemedy(id, known), "the bundle extends %q, which does not exist", id)
			continue
		}
		if base := layers(fsys, dir, trail, problems); base != nil {
			out = append(out, base)
		}
	}
	return out
}

// readOthers reads the data files beside about. A bundle that extends another may leave any of them out, and its
// measures need only say what differs.
func (l *layer) readOthers(extends bool, problems *diag.List) {
	for _, name := range dataFiles[1:] {
		content, ok := l.read[l.file(name)]
		switch {
		case !ok && extends:
			continue
		case !ok:
			problems.Errorf(diag.Position{File: l.file(name)}, "Add the file", "the bundle has no %s", name)
			continue
		}
		against := name
		if extends && name == "measures" {
			against = "" // held against its schema once it is whole
		}
		value, places, found := schema.YAMLPlaces(against, l.file(name), content)
		*problems = append(*problems, found...)
		if !found.Failed() {
			l.data[name], l.places[name] = value, places
		}
	}
	problems.Sort()
}

func (l *layer) ownModules() {
	for _, p := range l.read.paths() {
		if path.Ext(p) == ".rego" {
			rel := strings.TrimPrefix(p, l.dir+"/")
			l.modules[rel] = module{l.dir, p, l.read[p]}
			if name, ok := dutyFolder(rel); ok {
				l.origin["duty/"+name] = l.about.ID
			}
		}
	}
	for name := range entries(l.data["parameters"]) {
		l.origin["parameter/"+name] = l.about.ID
	}
}

// dutyFolder gives the name of the duty to whose folder a path within a bundle belongs.
func dutyFolder(rel string) (string, bool) {
	parts := strings.Split(rel, "/")
	if len(parts) != 3 || parts[0] != "duty" {
		return "", false
	}
	return parts[1], true
}

func entries(v any) map[string]any {
	m, _ := v.(map[string]any)
	return m
}

// over lays the bundle over those that it extends.
func (l *layer) over(bases []*layer, problems *diag.List) *layer {
	if len(bases) == 0 {
		return l
	}
	under := l.beside(bases, problems)
	l.drop(under, problems)
	l.replaced = map[string]any{}
	for name := range entries(l.data["parameters"]) {
		if old, ok := entries(under.data["parameters"])[name]; ok {
			l.replaced[name] = old
		}
	}
	for _, name := range dataFiles[1:] {
		l.data[name] = merged(under.data[name], l.data[name], name == "measures")
	}
	for rel, m := range under.modules {
		if name, ok := dutyFolder(rel); ok && l.origin["duty/"+name] == l.about.ID {
			continue // the duty is replaced with its tests
		}
		if _, ok := l.modules[rel]; !ok {
			l.modules[rel] = m
		}
	}
	for what, id := range under.origin {
		if l.origin[what] == "" {
			l.origin[what] = id
		}
	}
	for p, text := range under.read {
		l.read[p] = text
	}
	l.chain = under.chain
	l.about.inherit(&under.about)
	l.checkMeasures(problems)
	return l
}

// inherit adds what readers of an extended bundle must know, which holds here, too: its texts, cautions and readings.
func (a *About) inherit(from *About) {
	a.Instruments = together(a.Instruments, from.Instruments)
	a.Cautions = together(a.Cautions, from.Cautions)
	a.Readings = together(a.Readings, from.Readings)
}

func together[T comparable](list, more []T) []T {
	list = slices.Clone(list)
	for _, x := range more {
		if !slices.Contains(list, x) {
			list = append(list, x)
		}
	}
	return list
}

// beside puts several bundles next to each other. Where two of them have a parameter or duty of one name that is not
// the same one, the bundle that extends them must say which it means by having its own.
func (l *layer) beside(bases []*layer, problems *diag.List) *layer {
	out := &layer{data: map[string]any{}, modules: map[string]module{}, origin: map[string]string{}, read: files{}}
	for i, b := range bases {
		at := l.at("about", fmt.Sprintf("/extends/%d", i))
		for _, what := range slices.Sorted(maps.Keys(b.origin)) {
			other := out.origin[what]
			if other != "" && other != b.origin[what] && l.origin[what] == "" && !slices.Contains(l.about.Drops, droppable(what)) {
				kind, name, _ := strings.Cut(what, "/")
				problems.Errorf(at, "Give the bundle its own, or drop it", "the %s %s stands in %s and in %s, and they cannot both hold", kind, name, other, b.origin[what])
			}
			if other == "" {
				out.origin[what] = b.origin[what]
			}
		}
		for _, name := range dataFiles[1:] {
			out.data[name] = merged(b.data[name], out.data[name], name == "measures")
		}
		for rel, m := range b.modules {
			if _, ok := out.modules[rel]; !ok {
				out.modules[rel] = m
			}
		}
		maps.Copy(out.read, b.read)
		out.about.inherit(&b.about)
		for _, id := range append([]string{b.about.ID}, b.chain...) {
			if !slices.Contains(out.chain, id) {
				out.chain = append(out.chain, id)
			}
		}
	}
	return out
}

// droppable is the name under which drops takes a thing away: a duty by its id, a parameter by its name.
func droppable(what string) string {
	kind, name, _ := strings.Cut(what, "/")
	if kind == "duty" {
		return strings.ReplaceAll(name, "_", "-")
	}
	return name
}

// drop takes away what the bundle drops of those that it extends, and says of paragraphs left without a duty why.
func (l *layer) drop(under *layer, problems *diag.List) {
	known := map[string]string{}
	for what := range under.origin {
		known[droppable(what)] = what
	}
	gone := map[string]bool{}
	for i, name := range l.about.Drops {
		what, ok := known[name]
		switch at := l.at("about", fmt.Sprintf("/drops/%d", i)); {
		case !ok:
			problems.Errorf(at, nearRemedy(name, slices.Collect(maps.Keys(known))), "the bundle drops %q, which it does not inherit", name)
			continue
		case l.origin[what] != "":
			problems.Errorf(at, "Remove it from drops: what stands in the bundle itself replaces what it inherits", "the bundle drops %q and has one of its own", name)
			continue
		}
		delete(under.origin, what)
		kind, plain, _ := strings.Cut(what, "/")
		if kind == "parameter" {
			params := maps.Clone(entries(under.data["parameters"]))
			delete(params, plain)
			under.data["parameters"] = params
			continue
		}
		gone[name] = true
		for rel := range under.modules {
			if duty, ok := dutyFolder(rel); ok && duty == plain {
				delete(under.modules, rel)
			}
		}
	}
	if len(gone) > 0 {
		under.data["paragraphs"] = l.withoutDuties(entries(under.data["paragraphs"]), gone)
	}
}

func (l *layer) withoutDuties(paragraphs map[string]any, gone map[string]bool) map[string]any {
	out := map[string]any{}
	for name, value := range paragraphs {
		p := entries(value)
		checked, _ := p["checked"].([]any)
		left := slices.DeleteFunc(slices.Clone(checked), func(id any) bool { return gone[fmt.Sprint(id)] })
		if len(left) == len(checked) {
			out[name] = value
			continue
		}
		p = maps.Clone(p)
		if p["checked"] = left; len(left) == 0 {
			delete(p, "checked")
			if p["attested"] == nil && p["outside"] == nil {
				p["outside"] = "dropped by " + l.about.ID
			}
		}
		out[name] = p
	}
	return out
}

// sources gives the modules of all layers and the shared ones, by their paths in the file system.
func (l *layer) sources(shared files) map[string]module {
	out := map[string]module{}
	for _, m := range l.modules {
		out[m.file] = m
	}
	for p, text := range shared {
		if path.Ext(p) == ".rego" {
			out[p] = module{commonDir, p, text}
		}
	}
	return out
}

// merged lays one JSON object over another, by name; deep lays objects within it over each other, too.
func merged(under, over any, deep bool) any {
	a, b := entries(under), entries(over)
	if b == nil {
		return under
	}
	if a == nil {
		return over
	}
	out := maps.Clone(a)
	for key, value := range b {
		if deep && entries(value) != nil && entries(out[key]) != nil {
			value = merged(out[key], value, true)
		}
		out[key] = value
	}
	return out
}

// checkMeasures holds measures put together from several layers against their schema.
func (l *layer) checkMeasures(problems *diag.List) {
	if problems.Failed() {
		return
	}
	at := diag.Position{File: l.file("measures")}
	*problems = append(*problems, schema.Validate("measures", l.data["measures"], func(pointer string) diag.Position {
		if p := l.places["measures"]; p != nil {
			if found := p.Value(pointer); found.Line > 0 {
				return found
			}
		}
		return at
	})...)
}
