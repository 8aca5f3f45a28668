package schema

import (
	"fmt"
	"net/url"
	"slices"
	"strconv"
	"strings"

	"github.com/santhosh-tekuri/jsonschema/v6"
	"github.com/santhosh-tekuri/jsonschema/v6/kind"
	"golang.org/x/text/language"
	"golang.org/x/text/message"

	"hearduty/internal/diag"
)

// wording turns the errors of the schema library into sentences for people.
type wording struct {
	*checker
	value     any
	at, atKey func(string) diag.Position
	out       diag.List
}

// explain goes down to the causes. Of alternatives only the description is told, not every failure.
func (w *wording) explain(e *jsonschema.ValidationError) {
	switch e.ErrorKind.(type) {
	case *kind.AnyOf, *kind.OneOf:
		w.alternatives(e)
		return
	}
	if len(e.Causes) > 0 {
		for _, cause := range e.Causes {
			w.explain(cause)
		}
		return
	}
	w.say(e)
}

func (w *wording) say(e *jsonschema.ValidationError) {
	where, name := pointerOf(e.InstanceLocation), w.name(e.InstanceLocation)
	switch k := e.ErrorKind.(type) {
	case *kind.Required:
		for _, key := range k.Missing {
			remedy := "Add it"
			if doc := w.propertyDoc(e, key); doc != "" {
				remedy += ": " + doc
			}
			w.out.Errorf(w.atKey(where), remedy, "%s has no %s", name, key)
		}
	case *kind.AdditionalProperties:
		known := w.known(e)
		for _, key := range k.Properties {
			w.out.Errorf(w.atKey(where+"/"+escape(key)), near(key, known, "keys"), "%s has no key %q", name, key)
		}
	case *kind.Type:
		w.out.Errorf(w.at(where), "Write "+wanted(k.Want), "%s is %s", name, got(k.Got))
	case *kind.Enum:
		w.out.Errorf(w.at(where), near(fmt.Sprint(k.Got), texts(k.Want), "words"), "%s cannot be %s", name, quoted(k.Got))
	case *kind.Const:
		w.out.Errorf(w.at(where), "Write "+quoted(k.Want), "%s cannot be %s", name, quoted(k.Got))
	case *kind.Format:
		w.out.Errorf(w.at(where), "Write the day as YYYY-MM-DD", "%s is not a day of the calendar: %s", name, quoted(k.Got))
	case *kind.MinLength:
		w.out.Errorf(w.at(where), "Fill it in", "%s is empty", name)
	case *kind.MinItems:
		w.out.Errorf(w.at(where), fmt.Sprintf("List %d at least", k.Want), "%s has too few items: %d", name, k.Got)
	case *kind.MinProperties, *kind.MaxProperties:
		w.out.Errorf(w.at(where), w.hint(e), "%s has the wrong number of keys", name)
	case *kind.Minimum:
		w.out.Errorf(w.at(where), "Write "+k.Want.RatString()+" or more", "%s is %s", name, k.Got.RatString())
	case *kind.Maximum:
		w.out.Errorf(w.at(where), "Write "+k.Want.RatString()+" or less", "%s is %s", name, k.Got.RatString())
	default:
		w.out.Errorf(w.at(where), w.hint(e), "%s is not as it should be: %s", name, e.ErrorKind.LocalizedString(message.NewPrinter(language.English)))
	}
}

// alternatives reports a value that fits none of several schemas: the mistake within the alternative that
// it was meant for, or else what would be allowed.
func (w *wording) alternatives(e *jsonschema.ValidationError) {
	depth := len(e.InstanceLocation)
	var deeper []*jsonschema.ValidationError
	for _, cause := range e.Causes {
		if meant(cause, depth) {
			deeper = append(deeper, cause)
		}
	}
	if len(deeper) == 1 {
		w.explain(deeper[0])
		return
	}
	remedy := w.hint(e)
	if remedy == "" {
		remedy = "See the schema"
	}
	w.out.Errorf(w.at(pointerOf(e.InstanceLocation)), remedy, "%s is not of a form that is allowed here", w.name(e.InstanceLocation))
}

// meant says whether a value had the right type for an alternative, so that its mistake lies within.
func meant(e *jsonschema.ValidationError, depth int) bool {
	if _, wrongType := e.ErrorKind.(*kind.Type); wrongType && len(e.InstanceLocation) == depth {
		return false
	}
	for _, cause := range e.Causes {
		if !meant(cause, depth) {
			return false
		}
	}
	return true
}

// name calls a place by its last key.
func (w *wording) name(tokens []string) string {
	if len(tokens) == 0 {
		return "the file"
	}
	last := tokens[len(tokens)-1]
	if _, isList := lookup(w.value, tokens[:len(tokens)-1]).([]any); isList {
		n, _ := strconv.Atoi(last)
		if len(tokens) == 1 {
			return fmt.Sprintf("item %d", n+1)
		}
		return fmt.Sprintf("item %d of %s", n+1, tokens[len(tokens)-2])
	}
	return last
}

// schemaAt gives the part of the schema that an error comes from.
func (w *wording) schemaAt(e *jsonschema.ValidationError) map[string]any {
	_, fragment, _ := strings.Cut(e.SchemaURL, "#")
	var tokens []string
	for _, token := range strings.Split(fragment, "/")[1:] {
		if plain, err := url.PathUnescape(token); err == nil {
			token = plain
		}
		tokens = append(tokens, strings.NewReplacer("~1", "/", "~0", "~").Replace(token))
	}
	m, _ := lookup(w.root, tokens).(map[string]any)
	return m
}

func (w *wording) hint(e *jsonschema.ValidationError) string {
	if doc, ok := w.schemaAt(e)["description"].(string); ok {
		return "Write " + doc
	}
	return ""
}

func (w *wording) known(e *jsonschema.ValidationError) []string {
	properties, _ := w.schemaAt(e)["properties"].(map[string]any)
	var names []string
	for name := range properties {
		names = append(names, name)
	}
	slices.Sort(names)
	return names
}

func (w *wording) propertyDoc(e *jsonschema.ValidationError, key string) string {
	doc, _ := lookup(w.schemaAt(e), []string{"properties", key, "description"}).(string)
	return doc
}

// near says which of the known words could be meant.
func near(word string, known []string, what string) string {
	list := "the " + what + " are " + strings.Join(known, ", ")
	if len(known) == 1 {
		list = "the only one is " + known[0]
	}
	if n := diag.Near(word, known); n != "" {
		return "Write " + n + " if that is meant; " + list
	}
	return strings.ToUpper(list[:1]) + list[1:]
}

func texts(list []any) []string {
	var out []string
	for _, v := range list {
		if v != nil {
			out = append(out, fmt.Sprint(v))
		}
	}
	return out
}

func quoted(v any) string {
	if s, ok := v.(string); ok {
		return strconv.Quote(s)
	}
	return fmt.Sprint(v)
}

var typeNames = map[string]string{
	"string": "a text", "number": "a number", "integer": "a whole number", "boolean": "true or false",
	"array": "a list", "object": "keys with values", "null": "nothing",
}

func got(name string) string {
	if name == "null" {
		return "empty"
	}
	return typeNames[name]
}

func wanted(names []string) string {
	var out []string
	for _, name := range names {
		out = append(out, typeNames[name])
	}
	return strings.Join(out, " or ")
}
