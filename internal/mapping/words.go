package mapping

import (
	"strings"

	"hearduty/internal/convert"
	"hearduty/internal/grid"
)

// unusable says why a cell of a workbook holds nothing, or gives nil.
func unusable(c grid.Cell) *convert.Problem {
	if c.Kind != grid.Broken && c.Kind != grid.Uncomputed {
		return nil
	}
	_, p := (&convert.ID{}).Read(c)
	return p
}

// freeText reads a text of any words.
func freeText(c grid.Cell) (string, *convert.Problem) {
	if p := unusable(c); p != nil || c.Kind != grid.Text {
		return c.Text, p
	}
	if text, p := (&convert.ID{}).Read(c); p == nil {
		return text, nil
	}
	return strings.TrimSpace(c.Text), nil // an id would have lost digits, but a text has not
}

// one reads a word that must be one of the field's.
func (r *reader) one(c grid.Cell) (string, *convert.Problem) {
	text, p := freeText(c)
	if p != nil {
		return "", p
	}
	folded := convert.Fold(text)
	for _, word := range r.field.One {
		if convert.Fold(word) == folded {
			return word, nil
		}
	}
	if c.Kind == grid.Bool && r.has("yes") {
		return r.answer(c)
	}
	return "", &convert.Problem{Why: "the cell is not one of the words of the field", Remedy: "Say under values of " + r.field.Name + " in the map which of these it means: " + strings.Join(r.field.One, ", ")}
}

func (r *reader) has(word string) bool {
	for _, w := range r.field.One {
		if w == word {
			return true
		}
	}
	return false
}

// answer reads yes or no.
func (r *reader) answer(c grid.Cell) (string, *convert.Problem) {
	if p := unusable(c); p != nil {
		return "", p
	}
	switch text := strings.ToLower(strings.TrimSpace(c.Text)); {
	case text == "yes" || c.Kind == grid.Bool && text == "true":
		return "yes", nil
	case text == "no" || c.Kind == grid.Bool && text == "false":
		return "no", nil
	}
	return "", &convert.Problem{Why: "the cell is neither yes nor no", Remedy: "Say under values of " + r.field.Name + " in the map what it means"}
}

// list reads words with something between them.
func (r *reader) list(between string) func(grid.Cell) (string, *convert.Problem) {
	if between == "" {
		between = ";"
	}
	return func(c grid.Cell) (string, *convert.Problem) {
		text, p := freeText(c)
		if p != nil {
			return "", p
		}
		var out []string
		for _, w := range strings.Split(text, between) {
			if w = strings.TrimSpace(w); w == "" || r.blank.has(w) {
				continue
			}
			if r.words != nil {
				meaning, found, p := r.find(grid.Cell{Text: w})
				if p != nil {
					return "", p
				}
				if found {
					w = meaning
				}
			}
			if between != ";" && strings.Contains(w, ";") && r.words == nil {
				return "", &convert.Problem{Why: "a word of the list has a semicolon, which stands between words of a list", Remedy: "State what stands between the words under split in the map"}
			}
			if w != "" {
				out = append(out, w)
			}
		}
		return strings.Join(out, ";"), nil
	}
}
