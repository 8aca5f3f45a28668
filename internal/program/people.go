package program

import (
	"os"
	"path/filepath"

	"gopkg.in/yaml.v3"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
)

// FilePerson is an entry of the same_person file, which is a list of them. Its JSON Schema is generated from
// here.
type FilePerson struct {
	ID   string   `json:"id" doc:"worker id by which the person is known in this program"`
	Also []string `json:"also,omitempty" doc:"other ids under which records of the same person stand"`
	Was  string   `json:"was,omitempty" doc:"id that was this person's on the days from from to to, and somebody else's on other days"`
	From string   `json:"from,omitempty" doc:"first day, YYYY-MM-DD; if left out, every day up to to"`
	To   string   `json:"to,omitempty" doc:"last day, YYYY-MM-DD; if left out, every day since from"`
	Note string   `json:"note,omitempty" doc:"how that is known, for whoever reads the file"`
}

// Alias says that a worker id stands for a person with another one, on some days or on all.
type Alias struct {
	ID, Other string
	Days      calendar.Spell // the zero Spell is every day
	At        diag.Position
}

// people reads the same_person file.
func (d *decoder) people(n *yaml.Node, file Path, p *Program) {
	at := d.at(n)
	text, err := os.ReadFile(file.Open)
	switch info, statErr := os.Stat(file.Open); {
	case err != nil:
		d.diags.Errorf(at, "Correct the path, or write the file", "the same_person file %s cannot be read: %s", file.Shown, plain(err))
		return
	case statErr == nil && info.Size() > maxFile:
		d.diags.Errorf(at, "Keep only the people with several ids in it", "the same_person file %s is larger than it can be (4 MiB)", file.Shown)
		return
	}
	inner := decoder{file: filepath.ToSlash(file.Open), diags: d.diags}
	root := inner.parse(text, "the same_person file", "Give it a list of entries such as {id: \"000123\", also: [\"123\"]}")
	if root == nil {
		return
	}
	root = resolve(root)
	if root.Kind != yaml.SequenceNode {
		d.diags.Errorf(inner.at(root), "Write a list of entries such as {id: \"000123\", also: [\"123\"]}", "the same_person file is %s, not a list", kindName(root))
		return
	}
	for _, item := range root.Content {
		inner.person(item, p)
	}
	inner.aliases(p.Aliases)
}

// person reads one entry.
func (d *decoder) person(n *yaml.Node, p *Program) {
	values, ok := d.mapping(n, "a person", "id", "also", "was", "from", "to", "note")
	if !ok {
		return
	}
	id := d.needText(n, values, "id", "a person")
	what := "person " + id
	d.text(values["note"], "note of "+what)
	if values["also"] == nil && values["was"] == nil {
		d.diags.Errorf(d.at(n), "Add also with a list of other ids, or was with an id and its days", "%s has no other id", what)
	}
	if values["also"] != nil {
		for _, item := range d.needList(n, values, "also", what) {
			if other := d.text(item, "an id of "+what); other != "" {
				p.Aliases = append(p.Aliases, Alias{ID: id, Other: other, At: d.at(item)})
			}
		}
	}
	from, to := d.day(values["from"], "from of "+what), d.day(values["to"], "to of "+what)
	dated := values["from"] != nil || values["to"] != nil
	switch {
	case values["was"] == nil:
		if dated {
			d.diags.Errorf(d.at(n), "Add was with the id that was the person's on these days", "%s has days, but no id for them", what)
		}
		return
	case !dated:
		d.diags.Errorf(d.at(values["was"]), "Add from or to, or name the id under also if it was nobody else's", "%s has an id of former days, but no days", what)
		return
	case from.Known() && to.Known() && to < from:
		d.diags.Errorf(d.at(values["to"]), "Correct one of the two dates", "to of %s lies before from", what)
		return
	}
	days := calendar.Spell{From: from}
	if to.Known() {
		days.To = to.AddDays(1)
	}
	if other := d.text(values["was"], "was of "+what); other != "" && (from.Known() || to.Known()) {
		p.Aliases = append(p.Aliases, Alias{ID: id, Other: other, Days: days, At: d.at(values["was"])})
	}
}

// aliases refuses ids of which it cannot be told whose they are.
func (d *decoder) aliases(all []Alias) {
	every := map[string]Alias{}
	dated := map[string][]Alias{}
	for _, a := range all {
		if a.ID == a.Other {
			d.diags.Errorf(a.At, "Name only other ids", "the id %q is the person's own", a.ID)
			continue
		}
		first, double := every[a.Other]
		switch {
		case double:
		case a.Days == (calendar.Spell{}):
			if len(dated[a.Other]) > 0 {
				first, double = dated[a.Other][0], true
			}
			every[a.Other] = a
		default:
			for _, other := range dated[a.Other] {
				if !double && !a.Days.Intersect(other.Days).Empty() {
					first, double = other, true
				}
			}
			dated[a.Other] = append(dated[a.Other], a)
		}
		if double {
			d.diags.Errorf(a.At, "Decide whose it is; if it was several people's in turn, give each an entry with was and its days", "the id %q was already given to %q in line %d", a.Other, first.ID, first.At.Line)
		}
	}
	for _, a := range all {
		if next, ok := every[a.ID]; ok && a.ID != a.Other && next.ID != a.ID {
			d.diags.Errorf(a.At, "Name "+next.ID+" as the id here as well", "the id %q leads to %q, which itself leads to %q in line %d", a.Other, a.ID, next.ID, next.At.Line)
		}
	}
}
