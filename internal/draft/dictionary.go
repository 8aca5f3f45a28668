package draft

import (
	_ "embed" // for the two data files
	"maps"
	"slices"
	"strings"

	"gopkg.in/yaml.v3"

	"hearduty/internal/convert"
	"hearduty/internal/record"
)

//go:embed dictionary.yaml
var dictionaryText []byte

//go:embed words.yaml
var wordsText []byte

// target is a field that a column name stands for. Its kind is empty if it stands for the field in every kind.
type target struct {
	kind  record.Kind
	field string
}

// unwanted says why a column is known and not wanted.
type unwanted string

// The reasons.
const (
	personal unwanted = "personal, not needed"
	derived  unwanted = "worked out from the thresholds here, never taken over"
	unneeded unwanted = "known, and no record has a place for it"
)

// dictionary holds what names of columns and words in cells commonly mean.
type dictionary struct {
	names     map[string][]target // by compact name
	unwanted  map[string]unwanted
	near      []string                     // compact names that are long enough to be compared by spelling
	words     map[string]map[string]string // meaning by vocabulary and compact word
	codes     map[string]map[string]bool   // no_response, not_tested and blank, by plain word
	footer    []string                     // beginnings in small letters, the longest first
	wordOrder map[string][]string          // meanings of a vocabulary, sorted
}

var known = readDictionary(dictionaryText, wordsText)

// compact gives a name in the form in which names are compared: folded, and without blanks.
func compact(s string) string { return strings.ReplaceAll(convert.Fold(s), " ", "") }

// plain gives an entry in the form in which codes are compared: they may consist of signs only.
func plain(s string) string { return strings.ToLower(strings.TrimSpace(s)) }

// readDictionary reads the two data files. A fault in them is a mistake in this package and panics.
func readDictionary(names, words []byte) *dictionary {
	d := &dictionary{
		names: map[string][]target{}, unwanted: map[string]unwanted{}, words: map[string]map[string]string{},
		codes: map[string]map[string]bool{}, wordOrder: map[string][]string{},
	}
	var byKind map[string]yaml.Node
	if err := yaml.Unmarshal(names, &byKind); err != nil {
		panic("draft: dictionary.yaml: " + err.Error())
	}
	d.fieldNames()
	for _, k := range append(record.Kinds(), "any") {
		d.kindNames(k, byKind[string(k)])
	}
	for _, reason := range []struct {
		section string
		why     unwanted
	}{{"personal", personal}, {"derived", derived}, {"unneeded", unneeded}} {
		var languages map[string][]string
		node := byKind[reason.section]
		mustDecode(&node, &languages)
		for _, list := range languages {
			for _, name := range list {
				if _, double := d.unwanted[compact(name)]; !double {
					d.unwanted[compact(name)] = reason.why
				}
			}
		}
	}
	for name := range d.names {
		if len([]rune(name)) >= 6 {
			d.near = append(d.near, name)
		}
	}
	slices.Sort(d.near)
	d.readWords(words)
	return d
}

// fieldNames adds the names of the fields themselves.
func (d *dictionary) fieldNames() {
	for _, k := range record.Kinds() {
		table, _ := record.TableOf(k)
		for _, name := range table.Names() {
			d.add(name, target{k, name})
		}
	}
}

func (d *dictionary) kindNames(k record.Kind, node yaml.Node) {
	if node.Kind == 0 {
		return
	}
	var fields map[string]map[string][]string
	mustDecode(&node, &fields)
	if k == "any" {
		k = ""
	}
	for _, field := range slices.Sorted(maps.Keys(fields)) {
		for _, language := range slices.Sorted(maps.Keys(fields[field])) {
			for _, name := range fields[field][language] {
				d.add(name, target{k, field})
			}
		}
	}
}

func (d *dictionary) add(name string, t target) {
	key := compact(name)
	if key != "" && !slices.Contains(d.names[key], t) {
		d.names[key] = append(d.names[key], t)
	}
}

func (d *dictionary) readWords(words []byte) {
	var byVocabulary map[string]yaml.Node
	if err := yaml.Unmarshal(words, &byVocabulary); err != nil {
		panic("draft: words.yaml: " + err.Error())
	}
	for vocabulary, node := range byVocabulary {
		if node.Kind == yaml.SequenceNode {
			var list []string
			mustDecode(&node, &list)
			d.codes[vocabulary] = map[string]bool{}
			for _, w := range list {
				d.codes[vocabulary][plain(w)] = true
			}
			continue
		}
		var meanings map[string][]string
		mustDecode(&node, &meanings)
		d.wordOrder[vocabulary] = slices.Sorted(maps.Keys(meanings))
		d.words[vocabulary] = map[string]string{}
		for _, meaning := range d.wordOrder[vocabulary] {
			for _, w := range meanings[meaning] {
				d.words[vocabulary][compact(w)] = meaning
			}
		}
	}
	d.footer = slices.Collect(maps.Keys(d.codes["footer"]))
	slices.SortFunc(d.footer, func(a, b string) int {
		if len(a) != len(b) {
			return len(b) - len(a)
		}
		return strings.Compare(a, b)
	})
}

func mustDecode(node *yaml.Node, into any) {
	if node.Kind == 0 {
		return
	}
	if err := node.Decode(into); err != nil {
		panic("draft: " + err.Error())
	}
}

// fields gives the fields that a column name stands for. With exact false, a unit behind the name was left out.
func (d *dictionary) fields(name string) (found []target, exact bool) {
	key := compact(name)
	if found = d.names[key]; found != nil {
		return found, true
	}
	if short := compact(withoutUnit(name)); short != key {
		return d.names[short], false
	}
	return nil, false
}

// why says why a column is known and not wanted, or gives an empty text.
func (d *dictionary) why(name string) unwanted {
	if w, ok := d.unwanted[compact(name)]; ok {
		return w
	}
	return d.unwanted[compact(withoutUnit(name))]
}

// knows says whether a column of this name is known in any way.
func (d *dictionary) knows(name string) bool {
	found, _ := d.fields(name)
	return found != nil || d.why(name) != ""
}
