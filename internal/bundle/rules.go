package bundle

import (
	"fmt"
	"maps"
	"path"
	"slices"
	"strings"

	"github.com/open-policy-agent/opa/v1/ast"

	"hearduty/internal/diag"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/schema"
)

// readRules parses the modules of the bundle and the shared ones, reads the duties from their
// annotations, and compiles the rules against the schemas of the dossiers.
func (b *Bundle) readRules(l *layer, shared files, problems *diag.List) {
	dir, modules, all := l.dir, map[string]*ast.Module{}, l.sources(shared)
	for _, file := range slices.Sorted(maps.Keys(all)) {
		if isTest(file) {
			continue
		}
		module, err := ast.ParseModuleWithOpts(file, string(all[file].text), ast.ParserOptions{
			ProcessAnnotation: true, RegoVersion: ast.RegoV1, Capabilities: Capabilities(),
		})
		if err != nil {
			addRegoErrors(problems, file, err)
			continue
		}
		if !importsV2(module) {
			problems.Errorf(diag.Position{File: file, Line: 1}, `Write "import rego.v2" below the package`,
				"the module does not import rego.v2, so that a value that is not known could pass in silence")
		}
		modules[file] = module
		if from := all[file].dir; strings.HasPrefix(file, path.Join(from, "duty")+"/") {
			b.readDuty(module, file, string(all[file].text), from, problems)
		}
	}
	b.checkConfirmation(dir, problems)
	if len(b.Duties) == 0 {
		problems.Errorf(diag.Position{File: dir}, "Add a folder under duty", "the bundle has no duties")
	}
	slices.SortFunc(b.Duties, compareDuties)
	for i := 1; i < len(b.Duties); i++ {
		if b.Duties[i].ID == b.Duties[i-1].ID {
			problems.Errorf(diag.Position{File: b.Duties[i].File}, "Rename one of them", "two modules hold the duty %s", b.Duties[i].ID)
		}
	}
	if problems.Failed() {
		return
	}
	names := schema.Names{
		Levels:   slices.Sorted(maps.Keys(b.Measures.Exposure.Levels)),
		Channels: slices.Sorted(maps.Keys(b.Measures.Exposure.Channels)),
		Choices:  slices.Sorted(maps.Keys(b.Choices)),
		Schemes:  b.schemeNames(),
	}
	schemas := ast.NewSchemaSet()
	for _, kind := range dossier.Kinds {
		schemas.Put(ast.MustParseRef("schema."+kind), schema.DossierOf(kind, names))
	}
	for _, m := range modules {
		schema.AllowNull(m)
	}
	b.Compiler = ast.NewCompiler().WithStrict(true).WithCapabilities(Capabilities()).
		WithSchemas(schemas).WithUseTypeCheckAnnotations(true).WithEnablePrintStatements(false)
	b.Compiler.Compile(modules)
	if b.Compiler.Failed() {
		addRegoErrors(problems, dir, b.Compiler.Errors)
	}
}

// checkConfirmation asks a bundle whose shifts need a second test to look at those still without one, which
// are no shifts yet and would pass in silence.
func (b *Bundle) checkConfirmation(dir string, problems *diag.List) {
	reads := func(d *Duty) bool { return strings.Contains(d.Text, "input.unconfirmed") }
	if b.Measures.Hearing.Shift.Confirm && !slices.ContainsFunc(b.Duties, reads) {
		problems.Errorf(diag.Position{File: path.Join(dir, "measures", "data.yaml")}, "Let a duty read input.unconfirmed, and ask for the second test",
			"a shift of this bundle needs a second test, but no duty looks at shifts that wait for one")
	}
}

func importsV2(m *ast.Module) bool {
	return slices.ContainsFunc(m.Imports, func(i *ast.Import) bool { return i.Path.String() == "rego.v2" })
}

// compareDuties orders duties by topic, then as the citations read, with (2) before (10).
func compareDuties(a, b *Duty) int {
	if c := slices.Index(finding.Topics, a.Topic) - slices.Index(finding.Topics, b.Topic); c != 0 {
		return c
	}
	if c := strings.Compare(padNumbers(a.Cite), padNumbers(b.Cite)); c != 0 {
		return c
	}
	return strings.Compare(a.ID, b.ID)
}

// padNumbers writes every number of s with six digits, so that texts compare by the value of numbers.
func padNumbers(s string) string {
	var out strings.Builder
	for i := 0; i < len(s); {
		j := i
		for j < len(s) && s[j] >= '0' && s[j] <= '9' {
			j++
		}
		if j > i {
			fmt.Fprintf(&out, "%06s", s[i:j])
			i = j
			continue
		}
		out.WriteByte(s[i])
		i++
	}
	return out.String()
}

// addRegoErrors turns the errors of the Rego parser and compiler into diagnostics.
func addRegoErrors(problems *diag.List, file string, err error) {
	list, ok := err.(ast.Errors)
	if !ok {
		problems.Errorf(diag.Position{File: file}, "", "%v", err)
		return
	}
	for _, e := range list {
		at := diag.Position{File: file}
		if e.Location != nil {
			at = diag.Position{File: e.Location.File, Line: e.Location.Row, Column: e.Location.Col}
		}
		text := e.Message
		if e.Details != nil {
			text += " (" + strings.Join(e.Details.Lines(), " ") + ")"
		}
		problems.Errorf(at, "", "%s", text)
	}
}

// readDuty reads the duty that a module holds and ties its input to the schema of its subject.
func (b *Bundle) readDuty(m *ast.Module, file, text, dir string, problems *diag.List) {
	at := diag.Position{File: file, Line: m.Package.Location.Row, Column: m.Package.Location.Col}
	name := path.Base(path.Dir(file))
	if want := "data.duty." + name; m.Package.Path.String() != want || path.Base(file) != name+".rego" {
		problems.Errorf(at, fmt.Sprintf("Write package duty.%s in the file %s.rego", name, name),
			"the package is %s, but the folder is %s", strings.TrimPrefix(m.Package.Path.String(), "data."), name)
		return
	}
	i := slices.IndexFunc(m.Annotations, func(a *ast.Annotations) bool { return a.Scope == "package" })
	if i < 0 {
		problems.Errorf(at, "Write a METADATA block above the package", "the duty %s has no metadata", name)
		return
	}
	notes := m.Annotations[i]
	d := &Duty{
		ID: strings.ReplaceAll(name, "_", "-"), Package: name, Title: notes.Title, Description: strings.TrimSpace(notes.Description),
		File: strings.TrimPrefix(file, dir+"/"), From: path.Base(dir), Text: text,
	}
	custom := func(key string) string {
		s, _ := notes.Custom[key].(string)
		if s == "" {
			problems.Errorf(at, fmt.Sprintf("Write custom.%s in the metadata", key), "the duty %s has no %s", d.ID, key)
		}
		return s
	}
	d.Cite, d.Subject, d.Topic, d.Severity, d.Remedy = custom("cite"), custom("subject"), custom("topic"), custom("severity"), custom("remedy")
	evidence, _ := notes.Custom["evidence"].([]any)
	for _, e := range evidence {
		d.Evidence = append(d.Evidence, fmt.Sprint(e))
	}
	checkWord(problems, at, d.ID, "subject", d.Subject, dossier.Kinds)
	checkWord(problems, at, d.ID, "topic", d.Topic, finding.Topics)
	checkWord(problems, at, d.ID, "severity", d.Severity, []string{"major", "minor"})
	if d.Title == "" || d.Description == "" {
		problems.Errorf(at, "Write both in the metadata", "the duty %s has no title or no description", d.ID)
	}
	if len(d.Evidence) == 0 {
		problems.Errorf(at, "List the record kinds that prove it in custom.evidence", "the duty %s names no evidence", d.ID)
	}
	notes.Schemas = append(notes.Schemas, &ast.SchemaAnnotation{Path: ast.MustParseRef("input"), Schema: ast.MustParseRef("schema." + d.Subject)})
	b.checkRules(m, d, problems)
	b.Duties = append(b.Duties, d)
}

func checkWord(problems *diag.List, at diag.Position, duty, key, word string, allowed []string) {
	if word != "" && !slices.Contains(allowed, word) {
		problems.Errorf(at, "Write one of "+strings.Join(allowed, ", "), "the duty %s has the %s %q", duty, key, word)
	}
}

// intervalKeys and numberKeys are the fields of an obligation that name a parameter.
var (
	intervalKeys = []string{"within", "every", "first", "for", "until", "then"}
	numberKeys   = []string{"at_most", "below", "at_least", "above"}
	seriesKeys   = []string{"by", "touches"}
)

// checkRules checks that a duty's module has both sets, and that names written in it exist: parameters,
// series of records, exposure levels and channels.
func (b *Bundle) checkRules(m *ast.Module, d *Duty, problems *diag.List) {
	heads := map[string]bool{}
	for _, r := range m.Rules {
		heads[r.Head.Ref()[0].String()] = true
	}
	for _, set := range []string{"obligations", "not_owed"} {
		if !heads[set] {
			problems.Errorf(diag.Position{File: m.Package.Location.File, Line: m.Package.Location.Row}, "Add the set, if only for the case that it is empty",
				"the duty %s has no set %s", d.ID, set)
		}
	}
	ast.WalkTerms(m, func(t *ast.Term) bool {
		switch value := t.Value.(type) {
		case ast.Object:
			value.Foreach(func(k, v *ast.Term) { b.checkField(k, v, d, problems) })
		case ast.Ref:
			b.checkRef(value, t.Location, problems)
		}
		return false
	})
}

func (b *Bundle) checkField(k, v *ast.Term, d *Duty, problems *diag.List) {
	key, ok := k.Value.(ast.String)
	if !ok {
		return
	}
	switch field := string(key); {
	case slices.Contains(intervalKeys, field), slices.Contains(numberKeys, field):
		if name, ok := v.Value.(ast.String); ok {
			p, known := b.Parameters[string(name)]
			if !known {
				problems.Errorf(position(v.Location), nearRemedy(string(name), slices.Collect(maps.Keys(b.Parameters))), "the bundle has no parameter %q", string(name))
			} else if wantInterval := slices.Contains(intervalKeys, field); wantInterval != (p.Values[0].kind == intervalValue) {
				problems.Errorf(position(v.Location), "Name another parameter", "the parameter %q does not fit %s", string(name), field)
			}
		}
	case slices.Contains(seriesKeys, field):
		terms := []*ast.Term{v}
		if list, ok := v.Value.(*ast.Array); ok {
			terms = nil
			list.Foreach(func(t *ast.Term) { terms = append(terms, t) })
		}
		for _, t := range terms {
			if name, ok := t.Value.(ast.String); ok && !dossier.HasSeries(d.Subject, string(name)) {
				problems.Errorf(position(t.Location), nearRemedy(string(name), slices.Clone(dossier.SeriesOf[d.Subject])),
					"a %s has no series of records %q", d.Subject, string(name))
			}
		}
	}
}

// checkRef checks the name of a parameter that a rule reads itself.
func (b *Bundle) checkRef(ref ast.Ref, at *ast.Location, problems *diag.List) {
	if len(ref) < 3 || ref[0].Value.Compare(ast.Var("data")) != 0 || ref[1].Value.Compare(ast.String("parameters")) != 0 {
		return
	}
	name, ok := ref[2].Value.(ast.String)
	if _, known := b.Parameters[string(name)]; ok && !known {
		problems.Errorf(position(at), nearRemedy(string(name), slices.Collect(maps.Keys(b.Parameters))), "the bundle has no parameter %q", string(name))
	}
}

func position(at *ast.Location) diag.Position {
	if at == nil {
		return diag.Position{}
	}
	return diag.Position{File: at.File, Line: at.Row, Column: at.Col}
}
