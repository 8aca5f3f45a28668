package rulebook

import (
	"regexp"
	"slices"
	"strings"

	"github.com/open-policy-agent/opa/v1/ast"

	"hearduty/internal/bundle"
)

// rule is what the text of a duty's rule says without being run.
type rule struct {
	parsed    *ast.Module
	err       error
	quiet     []string // reasons why nothing is owed
	lifted    []string // reasons that lift the duty
	questions []string // what is asked of a professional
	choices   []string // choices of the employer that it reads
	levels    []string // exposure levels that it reads
	enrolled  bool     // whether it reads the time in the program
	shifts    bool     // whether it reads shifts of hearing
	backwards bool     // whether it asks for something before a day
	forwards  bool     // whether it asks for something after a day
	recorded  bool     // whether it reads the tests that meet the numbers of the recording rule
}

func readRule(d *bundle.Duty) *rule {
	r := &rule{}
	r.parsed, r.err = ast.ParseModuleWithOpts(d.File, d.Text, ast.ParserOptions{RegoVersion: ast.RegoV1, Capabilities: bundle.Capabilities()})
	if r.err != nil {
		return r
	}
	for _, one := range r.parsed.Rules {
		if one.Head.Ref()[0].String() == "not_owed" && one.Head.Key != nil {
			for _, reason := range r.reasons(one.Head.Key) {
				add(&r.quiet, reason)
			}
		}
	}
	ast.WalkTerms(r.parsed, func(t *ast.Term) bool {
		switch value := t.Value.(type) {
		case ast.Object:
			r.object(value)
		case ast.Ref:
			r.ref(value)
		}
		return false
	})
	return r
}

func (r *rule) object(o ast.Object) {
	if o.Get(ast.StringTerm("before")) != nil {
		r.backwards = true
	}
	if o.Get(ast.StringTerm("after")) != nil {
		r.forwards = true
	}
	text := func(key string) []string { return r.reasons(o.Get(ast.StringTerm(key))) }
	for _, reason := range text("lifted") {
		add(&r.lifted, reason+source(strings.Join(text("cite"), ", ")))
	}
	for _, question := range text("ask") {
		if of := text("of"); len(of) > 0 {
			question += " (to be answered by: " + strings.Join(of, ", or ") + ")"
		}
		add(&r.questions, question)
	}
}

func (r *rule) ref(ref ast.Ref) {
	if len(ref) < 2 || ref[0].String() != "input" {
		return
	}
	first, _ := ref[1].Value.(ast.String)
	second := ast.String("")
	if len(ref) > 2 {
		second, _ = ref[2].Value.(ast.String)
	}
	switch first {
	case "enrolled", "enrolled_now", "enrolled_ever":
		r.enrolled = true
	case "shifts", "unconfirmed", "after_shift", "lapsed", "persistent":
		r.shifts = true
	case "recordables":
		r.recorded = true
	case "choices":
		add(&r.choices, string(second))
	case "exposed", "exposure_unknown":
		add(&r.levels, string(second))
	}
}

func add(to *[]string, s string) {
	if s != "" && !slices.Contains(*to, s) {
		*to = append(*to, s)
	}
}

// workedOut stands for a text that only the run of a rule gives.
const workedOut = "as its rule works out from the records"

// reasons gives what a term can say: its own text, those of rules of its name, or that it is worked out.
func (r *rule) reasons(t *ast.Term) []string {
	if t == nil {
		return nil
	}
	if s := said(t); s != "" {
		return []string{s}
	}
	if texts := r.texts(t); len(texts) > 0 {
		return texts
	}
	return []string{workedOut}
}

var verb = regexp.MustCompile(`%[-+# 0-9.]*[a-z]`)

// said gives a text that a rule writes; what it fills in while it runs is shown as dots.
func said(t *ast.Term) string {
	if t == nil {
		return ""
	}
	switch v := t.Value.(type) {
	case ast.String:
		return string(v)
	case ast.Call:
		if len(v) > 1 && v[0].String() == "sprintf" {
			return verb.ReplaceAllString(said(v[1]), "…")
		}
	}
	return ""
}

// use is a parameter that a rule names, and the field in which it does; without a field the rule reads it itself.
type use struct{ role, name string }

// uses lists the parameters that a rule names, in the order of the text.
func (r *rule) uses(known map[string]bundle.Parameter) []use {
	var out []use
	if r.err != nil {
		return nil
	}
	put := func(role, name string) {
		if _, ok := known[name]; ok && !slices.Contains(out, use{role, name}) {
			out = append(out, use{role, name})
		}
	}
	ast.WalkTerms(r.parsed, func(t *ast.Term) bool {
		switch value := t.Value.(type) {
		case ast.Object:
			value.Foreach(func(k, v *ast.Term) {
				key, _ := k.Value.(ast.String)
				role := string(key)
				if role == "within" && r.backwards && (!r.forwards || value.Get(ast.StringTerm("before")) != nil) {
					role = ahead
				}
				if roles[role] != "" {
					for _, name := range r.texts(v) {
						put(role, name)
					}
				}
			})
		case ast.Ref:
			if name, ok := strings.CutPrefix(value.String(), "data.parameters."); ok {
				name, _, _ = strings.Cut(name, ".")
				name, _, _ = strings.Cut(name, "[")
				put("", name)
			}
		}
		return false
	})
	ast.WalkTerms(r.parsed, func(t *ast.Term) bool { // names handed on in some other way
		if name, ok := t.Value.(ast.String); ok && !slices.ContainsFunc(out, func(u use) bool { return u.name == string(name) }) {
			put("", string(name))
		}
		return false
	})
	return out
}

// texts gives the texts that a term can be: itself, or what rules of its name say.
func (r *rule) texts(t *ast.Term) []string {
	name := ""
	switch v := t.Value.(type) {
	case ast.String:
		return []string{string(v)}
	case ast.Var:
		name = string(v)
	case ast.Call:
		name = v[0].String()
	default:
		return nil
	}
	var out []string
	for _, one := range r.parsed.Rules {
		for ; one != nil; one = one.Else {
			if one.Head.Ref()[0].String() == name && one.Head.Value != nil {
				add(&out, said(one.Head.Value))
			}
		}
	}
	return out
}
