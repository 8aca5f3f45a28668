package fhir

import (
	"fmt"

	"hearduty/internal/mapping"
)

// reader reads members of resources and keeps the first that has the wrong type. Absent members, and members of
// absent objects, are empty.
type reader struct{ fault *mapping.Fault }

func (r *reader) wrong(key string, n *node, want string) {
	if r.fault == nil {
		why := fmt.Sprintf("%s is %s, not %s", key, n.kind, want)
		if n.cut {
			why = fmt.Sprintf("%s is longer than %d bytes", key, maxText)
		}
		r.fault = &mapping.Fault{Header: key, Why: why, Remedy: "Have the resource exported again as FHIR R4, or correct it"}
	}
}

// text reads a member that is a text.
func (r *reader) text(n *node, key string) string {
	m := n.at(key)
	if m == nil {
		return ""
	}
	if m.kind != text || m.cut {
		r.wrong(key, m, "a text")
		return ""
	}
	return m.text
}

// object reads a member that is an object.
func (r *reader) object(n *node, key string) *node {
	m := n.at(key)
	if m == nil {
		return nil
	}
	if m.kind != object {
		r.wrong(key, m, "an object")
		return nil
	}
	return m
}

// objects reads a member that is a list of objects.
func (r *reader) objects(n *node, key string) []node {
	m := n.at(key)
	if m == nil {
		return nil
	}
	if m.kind != list {
		r.wrong(key, m, "a list")
		return nil
	}
	for i := range m.items {
		if m.items[i].kind != object {
			r.wrong(key, &m.items[i], "a list of objects")
			return nil
		}
	}
	return m.items
}

// coding is a code of a code system.
type coding struct{ system, code, display string }

// concept is a set of codes that mean the same, and its text.
type concept struct {
	codings []coding
	text    string
}

// words lists all that the concept is called by: codes, displays and the text.
func (c *concept) words() []string {
	var words []string
	for _, coding := range c.codings {
		words = append(words, coding.code, coding.display)
	}
	return append(words, c.text)
}

// names lists the displays and the text.
func (c *concept) names() []string {
	var names []string
	for _, coding := range c.codings {
		names = append(names, coding.display)
	}
	return append(names, c.text)
}

func (r *reader) concept(n *node, key string) concept { return r.conceptOf(r.object(n, key)) }

// concepts reads a member that is a list of concepts.
func (r *reader) concepts(n *node, key string) []concept {
	var out []concept
	list := r.objects(n, key)
	for i := range list {
		out = append(out, r.conceptOf(&list[i]))
	}
	return out
}

func (r *reader) conceptOf(n *node) concept {
	return concept{codings: r.codings(n, "coding"), text: r.text(n, "text")}
}

func (r *reader) codings(n *node, key string) []coding {
	var out []coding
	list := r.objects(n, key)
	for i := range list {
		m := &list[i]
		out = append(out, coding{r.text(m, "system"), r.text(m, "code"), r.text(m, "display")})
	}
	return out
}

// identifier is an identifier of a resource in a system.
type identifier struct{ system, value, use string }

func (r *reader) identifier(n *node) identifier {
	return identifier{r.text(n, "system"), r.text(n, "value"), r.text(n, "use")}
}

func (r *reader) identifiers(n *node) []identifier {
	var out []identifier
	list := r.objects(n, "identifier")
	for i := range list {
		out = append(out, r.identifier(&list[i]))
	}
	return out
}

// reference points to a resource.
type reference struct {
	to         string // literal: relative, absolute, urn, or #id of a contained resource
	kind       string // type of the resource, if stated
	identifier identifier
	display    string
}

func (r reference) none() bool { return r.to == "" && r.identifier.value == "" }

func (r *reader) reference(n *node) reference {
	return reference{r.text(n, "reference"), r.text(n, "type"), r.identifier(r.object(n, "identifier")), r.text(n, "display")}
}

func (r *reader) references(n *node, key string) []reference {
	var out []reference
	list := r.objects(n, key)
	for i := range list {
		out = append(out, r.reference(&list[i]))
	}
	return out
}
