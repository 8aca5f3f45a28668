package fhir

// kind is the kind of a JSON value.
type kind uint8

const (
	null kind = iota
	boolean
	number
	text
	list
	object
)

func (k kind) String() string {
	return [...]string{"null", "true or false", "a number", "a text", "a list", "an object"}[k]
}

// node is a JSON value.
type node struct {
	kind  kind
	text  string   // the text; a number or boolean as written
	cut   bool     // only the beginning of the text was kept
	keys  []string // of an object
	items []node   // of an object or list
}

// at gives the member of an object, or nil if there is none or it is null.
func (n *node) at(key string) *node {
	if n == nil || n.kind != object {
		return nil
	}
	for i, k := range n.keys {
		if k == key {
			if n.items[i].kind == null {
				return nil
			}
			return &n.items[i]
		}
	}
	return nil
}
