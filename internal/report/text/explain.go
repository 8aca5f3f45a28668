package text

import (
	"fmt"
	"io"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/judge"
)

// Explain writes how a finding came about: what the duty asks, what was found, the numbers, the records
// and the rule, so that somebody can redo it by hand.
func Explain(w io.Writer, e *judge.Explanation, o Format) error {
	p := newPage(w, o.Width, o.Colour)
	f := &e.Finding
	p.para(0, 2, fmt.Sprintf("%s: %s, %s", f.ID, f.Duty, f.Status))
	p.para(0, 2, fmt.Sprintf("%s %s at site %s of %s, as of %s", f.Subject.Kind, f.Subject.ID, f.Site, e.ProgramName, e.AsOf))

	p.heading(bold, "What the duty asks")
	if d := e.Duty; d != nil {
		p.para(2, 2, sentence(d.Title+", "+d.Cite))
		p.para(2, 2, sentence(d.Description))
	}
	if f.Remedy != "" {
		p.para(2, 2, "What to do: "+sentence(f.Remedy))
	}
	if b := e.Bundle; b != nil {
		p.para(2, 2, fmt.Sprintf("Bundle %s, revision %s: %s.", b.ID, b.Revision, b.About.Title)+signature(b.Signature))
	}

	p.heading(bold, "What was found")
	if f.Message != "" {
		p.para(2, 2, sentence(upper(f.Message)))
	}
	p.para(2, 2, fmt.Sprintf("Status %s: %s.", f.Status, meaning[f.Status]))
	if d := dates(f, e.AsOf); d != "" {
		p.para(2, 2, sentence(upper(d)))
	}
	if f.Accepted != nil {
		p.para(2, 2, sentence("Accepted "+acceptance(f.Accepted))+" The status stays "+string(f.Status)+", and it is not counted as met.")
	}
	parameters(p, e)
	numbers(p, f)
	if e.Withheld {
		p.heading(bold, "Audiometric figures")
		p.para(2, 2, "They are medical and left out here; --health-detail shows them, with the sums.")
	}
	records(p, e)
	rule(p, e)
	return p.flush()
}

func parameters(p *page, e *judge.Explanation) {
	if len(e.Parameters) == 0 {
		return
	}
	p.heading(bold, "Parameters of the law")
	for _, u := range e.Parameters {
		line := fmt.Sprintf("%s = %s", u.Name, strings.TrimSpace(u.Value+" "+u.Unit))
		if u.From != "" {
			line += ", in force from " + u.From
		}
		p.para(2, 4, line)
		p.para(4, 4, sentence(u.About))
		p.para(4, 4, u.Cite+": "+seenWords(u.Seen)+".")
	}
}

// seenWords says in words what was read for a value.
func seenWords(seen string) string {
	switch seen {
	case "text":
		return "read in the official text"
	case "secondary":
		return "read in a secondary source, not in the official text"
	case "memory":
		return "not checked against the official text"
	}
	return seen
}

// numbers writes the facts that are no parameters; sums stand on lines of their own.
func numbers(p *page, f *finding.Finding) {
	facts := map[string]any{}
	for name, fact := range f.Facts {
		if _, ok := finding.AsParameter(fact); !ok {
			facts[name] = fact
		}
	}
	if len(facts) > 0 {
		p.heading(bold, "Numbers")
		factLines(p, facts)
	}
	if len(f.Health) > 0 {
		p.heading(bold, "Audiometric figures (medical)")
		factLines(p, f.Health)
	}
}

func factLines(p *page, facts map[string]any) {
	for _, key := range slices.Sorted(maps.Keys(facts)) {
		if key == "working" {
			sums, ok := facts[key].([]any)
			if !ok {
				sums = []any{facts[key]}
			}
			for _, sum := range sums {
				p.para(2, 6, finding.Words(sum))
			}
			continue
		}
		name, value := finding.Named(key, facts[key])
		if list, ok := facts[key].([]any); ok && key == "for_information" && len(list) > 0 {
			p.para(2, 4, name+", which decides nothing:")
			for _, line := range list {
				p.para(4, 6, finding.Words(line))
			}
			continue
		}
		p.para(2, 4, name+": "+value)
	}
}

func records(p *page, e *judge.Explanation) {
	p.heading(bold, "Records")
	if len(e.Records) == 0 {
		p.para(2, 2, "No record is part of it.")
	}
	for _, r := range e.Records {
		p.para(2, 4, r.Evidence.Record+", "+place(r.Evidence))
		first := 0
		for _, field := range r.Fields {
			first = max(first, cells(field[0]))
		}
		for _, field := range r.Fields {
			lines := wrap(field[1], p.width-first-6)
			for i, line := range lines {
				name := ""
				if i == 0 {
					name = field[0]
				}
				p.raw("    " + padRight(name, first) + "  " + line)
			}
		}
	}
}

func rule(p *page, e *judge.Explanation) {
	if e.Obligation != "" {
		p.heading(bold, "What the rule returned")
		verbatim(p, e.Obligation)
	}
	if e.Duty != nil && e.Duty.Text != "" {
		p.heading(bold, "The rule, "+e.Duty.File)
		verbatim(p, withoutMetadata(e.Duty.Text))
	}
}

// verbatim writes lines as they are, without control characters.
func verbatim(p *page, s string) {
	for _, line := range strings.Split(strings.TrimSpace(s), "\n") {
		p.raw("  " + clean(strings.ReplaceAll(line, "\t", "    ")))
	}
}

// withoutMetadata leaves out the comments above the package, which the explanation tells in words.
func withoutMetadata(module string) string {
	lines := strings.Split(module, "\n")
	for i, line := range lines {
		if strings.HasPrefix(line, "package ") {
			return strings.Join(lines[i:], "\n")
		}
	}
	return module
}
