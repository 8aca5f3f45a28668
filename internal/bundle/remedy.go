package bundle

import (
	"slices"
	"strings"

	"hearduty/internal/diag"
)

// remedies say what to do about what OPA's parser and compiler complain of, by words of the complaint.
var remedies = []struct{ words, remedy string }{
	{"undefined function", "Write the rule with facts of the dossier and parameters; a rule cannot call what reads a clock, a network, a file, the environment or chance"},
	{"undefined ref", "Write one of the facts that the dossier has"},
	{"match error", "Compare values of one type"},
	{"invalid argument", "Give the function values of the types that it takes"},
	{"unused", "Use it, or remove it"},
	{"is unsafe", "Give the variable a value in the same rule"},
	{"recursive", "Let no rule come back to itself"},
	{"conflicting", "Give each rule a name and a type of its own"},
	{"multiple default", "Keep one of them"},
	{"must not shadow", "Give it another name"},
}

// mostWords is how long a complaint may be, in characters: OPA repeats the line at fault, however long it is.
const mostWords = 600

// withRemedies adds what to do where a complaint does not say it, and shortens those that are very long.
func withRemedies(problems diag.List) diag.List {
	out := slices.Clone(problems)
	for i := range out {
		if text := []rune(out[i].Problem); len(text) > mostWords {
			out[i].Problem = string(text[:mostWords]) + " ..."
		}
		if out[i].Remedy != "" || out[i].Severity != diag.Error {
			continue
		}
		out[i].Remedy = "Correct the rule there"
		for _, r := range remedies {
			if strings.Contains(out[i].Problem, r.words) {
				out[i].Remedy = r.remedy
				break
			}
		}
	}
	return out
}
