package program

import (
	"gopkg.in/yaml.v3"

	"hearduty/internal/diag"
)

func (d *decoder) program(root *yaml.Node, p *Program) {
	const what = "the program file"
	values, ok := d.mapping(root, what, "program", "sites", "records", "same_person", "as_of", "accepted")
	if !ok {
		return
	}
	p.Title = d.needText(root, values, "program", what)
	for _, n := range d.needList(root, values, "sites", what) {
		d.site(n, p)
	}
	items := d.needList(root, values, "records", what)
	d.members = namedMembers(items)
	for _, n := range items {
		d.sources(n, p)
	}
	if file := d.path(values["same_person"], "same_person", p); file.Open != "" {
		d.people(values["same_person"], file, p)
	}
	if n := values["as_of"]; n != nil {
		p.AsOf = d.day(n, "as_of")
	}
	p.Accepted = d.path(values["accepted"], "accepted", p)
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
