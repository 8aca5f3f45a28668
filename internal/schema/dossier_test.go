package schema

import (
	"strings"
	"testing"

	"github.com/open-policy-agent/opa/v1/ast"
)

func compile(t *testing.T, kind, rego string) error {
	t.Helper()
	input := DossierOf(kind, Names{Levels: []string{"action", "limit"}, Channels: []string{"action", "limit"}, Choices: []string{"annual"}})
	module, err := ast.ParseModuleWithOpts("duty.rego", "package duty.x\nimport rego.v1\n"+rego, ast.ParserOptions{ProcessAnnotation: true})
	if err != nil {
		t.Fatal(err)
	}
	AllowNull(module)
	set := ast.NewSchemaSet()
	set.Put(ast.SchemaRootRef, input)
	c := ast.NewCompiler().WithSchemas(set).WithStrict(true)
	if c.Compile(map[string]*ast.Module{"duty.rego": module}); c.Failed() {
		return c.Errors
	}
	return nil
}

func TestTypeCheckerTakesTheDossiers(t *testing.T) {
	for _, kind := range Subjects() {
		if err := compile(t, kind, "p if input.site.country == \"US\""); err != nil {
			t.Errorf("%s: %v", kind, err)
		}
	}
	for _, rego := range []string{
		"p if input.baseline == null",
		"p if null == input.as_of",
		"p := x if x := input.on_roll == null",
		"p if input.on_roll",
		"p contains s if { some s in input.enrolled; s.baseline == null; s.tested != null }",
		"p := [s | some s in input.enrolled; s.to == null]",
		"p if { b := input.baseline; b != null; b.marked }",
		"p contains s.from if some s in input.exposed.limit",
		"p if input.choices.annual == \"calendar_year\"",
		"p := input.exposures[_].channels.limit.twa_dba",
		"p if every s in input.enrolled { s.tested == null }",
		"p := {\"by\": s.notice, \"after\": s.determined_on} if some s in input.shifts",
	} {
		if err := compile(t, "worker", rego); err != nil {
			t.Errorf("%s\n%v", rego, err)
		}
	}
}

func TestTypeCheckerFindsMistakes(t *testing.T) {
	for rego, want := range map[string]string{
		"p if input.basline": `have: "basline"`,
		"p if { b := input.baseline; b != null; b.markedd }":                `have: "markedd"`,
		"p contains s.fromm if some s in input.exposed.limit":               `have: "fromm"`,
		"p if input.exposed.limt":                                           `have: "limt"`,
		"p if input.choices.annul":                                          `have: "annul"`,
		"p if input.on_roll == \"yes\"":                                     "match error",
		"p := input.enrolled[0].baseline.datte":                             `have: "datte"`,
		"p := input.exposures[_].channels.limit.twa":                        `have: "twa"`,
		"p contains s if { some s in input.enrolled; s.protecter == null }": `have: "protecter"`,
	} {
		err := compile(t, "worker", rego)
		if err == nil || !strings.Contains(err.Error(), want) {
			t.Errorf("%s\nwant an error with %s, got %v", rego, want, err)
		}
	}
}
