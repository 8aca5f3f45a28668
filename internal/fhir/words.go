package fhir

import (
	"fmt"
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
)

// The meanings of words in the map.
const (
	sayNoResponse = "NR"
	sayNotTested  = "NT"
)

// phrase is a word of the map, as it is written there and as it is compared.
type phrase struct{ word, folded string }

// readWords makes the table of words that stand in place of a level, and lists those that may stand within notes.
func readWords(f *mapping.File, o *mapping.FHIR) (*convert.Words, []phrase, *grid.Fault) {
	table := map[string]string{}
	var phrases []phrase
	add := func(words []string, meaning string) *grid.Fault {
		for _, w := range words {
			if known := table[w]; known != "" && known != meaning {
				return &grid.Fault{Problem: fmt.Sprintf("the map says of %q both that it means no response and that it means not tested", w), Remedy: "Keep it in one of the two lists"}
			}
			table[w] = meaning
			if folded := convert.Fold(w); strings.Trim(folded, "0123456789 .-") != "" {
				phrases = append(phrases, phrase{w, folded})
			}
		}
		return nil
	}
	if o.NoResponse != nil {
		if fault := add(o.NoResponse.Words, sayNoResponse); fault != nil {
			return nil, nil, fault
		}
	}
	if f.Thresholds != nil {
		if fault := add(f.Thresholds.NotTested, sayNotTested); fault != nil {
			return nil, nil, fault
		}
	}
	words, p := convert.NewWords(table)
	if p != nil {
		return nil, nil, &grid.Fault{Problem: p.Why, Remedy: p.Remedy}
	}
	return words, phrases, nil
}

// meaning gives what a text means by the map, or nothing.
func (s *source) meaning(text string) string {
	if text == "" {
		return ""
	}
	m, _ := s.words.Find(grid.Cell{Text: text})
	return m
}

// within gives a word of the map that a longer text holds, or nothing.
func (s *source) within(text string) string {
	folded := " " + convert.Fold(text) + " "
	for _, p := range s.phrases {
		if strings.Contains(folded, " "+p.folded+" ") {
			return p.word
		}
	}
	return ""
}

// notes lists the texts of the notes.
func (r *reader) notes(n *node) []string {
	var out []string
	list := r.objects(n, "note")
	for i := range list {
		out = append(out, r.text(&list[i], "text"))
	}
	return out
}
