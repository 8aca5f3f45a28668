package draft

import (
	"fmt"
	"maps"
	"path"
	"slices"
	"strings"
)

// readTypes are the resource types that audiograms are read from.
var readTypes = []string{"Bundle", "Observation", "Patient"}

// write gives the text of the map.
func (r *resources) write(shown string) string {
	a := &analysis{}
	inner := r.fhirLines(a)
	var types []string
	for _, t := range slices.Sorted(maps.Keys(r.types)) {
		types = append(types, fmt.Sprintf("%s %d", t, r.types[t]))
	}
	if r.broken {
		a.ask("Is the file whole? It is no JSON to its end, so the draft rests on its beginning")
	}
	preface := []string{
		"Draft of a map. It is a proposal: nothing is read by it until somebody has corrected it, answered",
		"the questions and named it in the program file.",
		"",
		"File:      " + shown,
		"Looked at: resources of FHIR: " + strings.Join(types, ", "),
		"Taken for: audiogram, certain: the objects have a resourceType",
		"",
	}
	if len(a.questions) == 0 {
		preface = append(preface, "No question is open.")
	} else {
		preface = append(preface, "Open questions:")
	}
	for i, q := range a.questions {
		preface = append(preface, fmt.Sprintf("%3d. %s", i+1, q))
	}
	var b strings.Builder
	for _, line := range preface {
		b.WriteString(strings.TrimRight("# "+clean(line), " ") + "\n")
	}
	lines := append([]string{"map: " + quote("Draft for "+clean(path.Base(shown))), "kind: audiogram", "format: fhir # certain"}, section("fhir:", inner)...)
	return b.String() + strings.Join(lines, "\n") + "\n"
}

func (r *resources) fhirLines(a *analysis) []string {
	var lines []string
	systems := slices.Sorted(maps.Keys(r.systems))
	switch {
	case len(systems) == 1 && r.bare == 0:
		lines = append(lines, fmt.Sprintf("worker_id_system: %s # certain: the only system of patients' identifiers, %d of them", quote(systems[0]), r.systems[systems[0]]))
	case len(systems) == 0 && r.bare == 0 && r.patients+r.loose > 0:
		n := a.ask("Is the id of the Patient resource, as references hold it, the worker's id? The file has no identifiers of patients")
		lines = append(lines, fmt.Sprintf("# worker_id_from: patient_id # question %d", n))
	case len(systems) > 0:
		n := a.ask("Which system of patients' identifiers is the worker's id?")
		for _, s := range systems {
			lines = append(lines, fmt.Sprintf("# worker_id_system: %s # question %d: %s", quote(s), n, several(r.systems[s], "identifier")))
		}
	}
	for _, s := range slices.Sorted(maps.Keys(r.lengths)) {
		if l := r.lengths[s]; l.zeros && l.least < l.greatest {
			n := a.ask("Have ids of the system %q lost leading zeros? Some begin with zeros, and their lengths differ; pad fills them up", clean(s))
			lines = append(lines, fmt.Sprintf("# pad: %d # question %d", l.greatest, n))
		}
	}
	var ignored []string
	for _, t := range slices.Sorted(maps.Keys(r.types)) {
		if !slices.Contains(readTypes, t) {
			ignored = append(ignored, t)
		}
	}
	if len(ignored) > 0 {
		lines = append(lines, "ignore_resources: ["+quoteAll(ignored)+"] # likely: no hearing tests")
	}
	return append(lines, r.purposeLines(a)...)
}

// purposeLines lists codes that may tell the purpose of a test. What they mean, somebody must say.
func (r *resources) purposeLines(a *analysis) []string {
	if len(r.purposes) == 0 {
		return nil
	}
	n := a.ask("Do the codes listed under purposes tell the purpose of the test: baseline, periodic, retest, exit or other?")
	keys := slices.SortedFunc(maps.Keys(r.purposes), func(x, y [2]string) int { return strings.Compare(x[0]+"|"+x[1], y[0]+"|"+y[1]) })
	lines := []string{"# purposes: # question " + fmt.Sprint(n)}
	for _, k := range keys[:min(len(keys), shownValues)] {
		lines = append(lines, fmt.Sprintf("#   - {system: %s, code: %s, purpose: ASK} # %s", quote(k[0]), quote(k[1]), several(r.purposes[k], "resource")))
	}
	return lines
}
