package bundle

import (
	"fmt"
	"maps"
	"path"
	"slices"
	"strings"

	"github.com/open-policy-agent/opa/v1/ast"
	"github.com/open-policy-agent/opa/v1/format"

	"hearduty/internal/diag"
)

// Strict checks what tests hold the embedded bundles to, and what every other bundle is held to when it is loaded: the
// layout of its modules, and that each duty can be reached.
func (b *Bundle) Strict() diag.List {
	problems := b.Layout()
	problems = append(problems, b.Reach()...)
	problems.Sort()
	return problems
}

// Layout holds the bundle's own modules, and the shared ones, to the layout that OPA's formatter gives.
func (b *Bundle) Layout() diag.List {
	var problems diag.List
	for _, file := range b.Modules {
		if !b.Own(file) && !b.Shared(file) {
			continue
		}
		text := string(b.Files[file])
		formatted, err := format.SourceWithOpts(file, b.Files[file], format.Opts{RegoVersion: ast.RegoV1})
		if err != nil {
			addRegoErrors(&problems, file, err)
			continue
		}
		if line, want, ok := firstDifference(text, string(formatted)); ok {
			problems.Errorf(diag.Position{File: file, Line: line}, fmt.Sprintf("Write %q there, or let `opa fmt` lay out the file", want),
				"the module is not in the layout of OPA's formatter")
		}
	}
	return problems
}

// firstDifference gives the first line in which two texts differ, and that line of the second.
func firstDifference(text, want string) (line int, wanted string, ok bool) {
	if text == want {
		return 0, "", false
	}
	a, b := strings.Split(text, "\n"), strings.Split(want, "\n")
	i := 0
	for i < len(a) && i < len(b) && a[i] == b[i] {
		i++
	}
	if i < len(b) {
		wanted = b[i]
	}
	return i + 1, wanted, true
}

// Numbers finds numbers other than 0 and 1 in the bundle's own rules: those of the law belong among the parameters.
func (b *Bundle) Numbers() diag.List {
	var problems diag.List
	for _, file := range b.ownModules() {
		m, err := ast.ParseModuleWithOpts(file, string(b.Files[file]), ast.ParserOptions{RegoVersion: ast.RegoV1})
		if isTest(file) || err != nil {
			continue
		}
		ast.WalkTerms(m, func(t *ast.Term) bool {
			if n, ok := t.Value.(ast.Number); ok && n != "0" && n != "1" {
				problems.Errorf(position(t.Location), "Make it a parameter with its date and citation", "the rule holds the number %s", n)
			}
			return false
		})
	}
	return problems
}

// Reach finds what no check would ever come to: folders that hold no duty, duties that cannot return an obligation, rules
// that no duty asks for, and names of data that there are not.
func (b *Bundle) Reach() diag.List {
	var problems diag.List
	b.checkFolders(&problems)
	reached := b.reachedRules()
	for _, file := range b.ownModules() {
		m := b.Compiler.Modules[file]
		if m == nil { // tests are no part of what is compiled
			continue
		}
		for _, r := range m.Rules {
			if !reached[r] {
				problems.Errorf(position(r.Location), "Remove the rule, or let a duty use it", "no duty uses the rule %s", r.Head.Ref())
			}
		}
		b.checkDataNames(m, &problems)
	}
	for _, d := range b.Duties {
		if d.From == b.ID && !b.canOblige(d) {
			problems.Errorf(diag.Position{File: path.Join(b.ID, d.File), Line: 1}, "Let a rule `obligations contains ...` hold under some condition",
				"the duty %s can never return an obligation", d.ID)
		}
	}
	return problems
}

// ownModules lists the paths of the bundle's own modules, tests among them.
func (b *Bundle) ownModules() []string {
	return slices.DeleteFunc(slices.Clone(b.Modules), func(file string) bool { return !b.Own(file) })
}

// checkFolders finds folders and modules under duty that hold no duty.
func (b *Bundle) checkFolders(problems *diag.List) {
	for _, file := range slices.Sorted(maps.Keys(b.Files)) {
		rel, own := strings.CutPrefix(file, path.Join(b.ID, "duty")+"/")
		if !own {
			continue
		}
		parts := strings.Split(rel, "/")
		name := parts[0]
		if _, ok := b.Files[path.Join(b.ID, "duty", name, name+".rego")]; !ok {
			problems.Errorf(diag.Position{File: file}, fmt.Sprintf("Name the rules duty/%s/%s.rego, or remove the folder", name, name), "the folder duty/%s holds no duty", name)
		} else if len(parts) != 2 {
			problems.Errorf(diag.Position{File: file}, "Put it into the folder of a duty", "the file lies too deep to belong to a duty")
		}
	}
}

// reachedRules gives the rules that some duty uses, straight or through others.
func (b *Bundle) reachedRules() map[*ast.Rule]bool {
	reached := map[*ast.Rule]bool{}
	var visit func(*ast.Rule)
	visit = func(r *ast.Rule) {
		if reached[r] {
			return
		}
		reached[r] = true
		for next := range b.Compiler.Graph.Dependencies(r) {
			if rule, ok := next.(*ast.Rule); ok {
				visit(rule)
			}
		}
	}
	for _, d := range b.Duties {
		for _, r := range b.rulesOf(d) {
			if name := r.Head.Ref()[0].String(); name == "obligations" || name == "not_owed" {
				visit(r)
			}
		}
	}
	return reached
}

func (b *Bundle) rulesOf(d *Duty) []*ast.Rule {
	if m := b.Compiler.Modules[path.Join(d.From, d.File)]; m != nil {
		return m.Rules
	}
	return nil
}

// canOblige says whether some rule of the set of obligations has no condition that is plainly false.
func (b *Bundle) canOblige(d *Duty) bool {
	return slices.ContainsFunc(b.rulesOf(d), func(r *ast.Rule) bool {
		return r.Head.Ref()[0].String() == "obligations" && r.Head.Key != nil && !slices.ContainsFunc(r.Body, plainlyFalse)
	})
}

func plainlyFalse(e *ast.Expr) bool {
	t, ok := e.Terms.(*ast.Term)
	if !ok {
		return false
	}
	value, ok := t.Value.(ast.Boolean)
	return ok && bool(value) == e.Negated
}

// checkDataNames finds data that a rule reads and that neither the bundle nor a rule gives: it would be undefined
// without a word.
func (b *Bundle) checkDataNames(m *ast.Module, problems *diag.List) {
	known := slices.Clone(dataFiles)
	for _, other := range b.Compiler.Modules {
		if p := other.Package.Path; len(p) > 1 {
			if name, ok := p[1].Value.(ast.String); ok && !slices.Contains(known, string(name)) {
				known = append(known, string(name))
			}
		}
	}
	ast.WalkRefs(m, func(ref ast.Ref) bool {
		if len(ref) < 2 || ref[0].Value.Compare(ast.Var("data")) != 0 {
			return false
		}
		if name, ok := ref[1].Value.(ast.String); ok && !slices.Contains(known, string(name)) {
			problems.Errorf(position(ref[0].Location), nearRemedy(string(name), known), "nothing gives data.%s", string(name))
		}
		return false
	})
}
