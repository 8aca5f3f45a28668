package bundle_test

import (
	"strings"
	"testing"

	"github.com/open-policy-agent/opa/v1/ast"
	"github.com/open-policy-agent/opa/v1/types"
	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"

	"hearduty/internal/bundle"
	"hearduty/internal/schema"
	"hearduty/policies"
)

// sharedFields are the fields that each shared rule reads of the entries of the list it takes first. What a shared rule
// takes has no type for OPA, so that a wrong list would be an empty answer; TestSharedRulesTakeTheRightLists checks it.
var sharedFields = map[string][]string{
	"any_current":   {"current"},
	"current_since": {"current", "from"},
	"reasons":       {"from", "to", "reason"},
	"covered":       {"covers"},
	"refs":          {"ref"},
}

// otherShared are the shared rules that take no list of records.
var otherShared = []string{"at", "covers", "over", "in_words", "missing"}

func TestSharedFieldsAreThoseOfTheSharedRules(t *testing.T) {
	text, err := policies.FS.ReadFile("common/common.rego")
	require.NoError(t, err)
	m, err := ast.ParseModuleWithOpts("common.rego", string(text), ast.ParserOptions{RegoVersion: ast.RegoV1})
	require.NoError(t, err)
	for _, r := range m.Rules {
		name := r.Head.Ref().String()
		if sharedFields[name] == nil {
			assert.Contains(t, otherShared, name, "a shared rule that takes a list of records belongs into sharedFields")
			continue
		}
		ast.WalkRefs(r, func(ref ast.Ref) bool {
			for _, part := range ref[1:] {
				if field, ok := part.Value.(ast.String); ok && ref[0].Value.Compare(ast.Var("internal")) != 0 {
					assert.Contains(t, sharedFields[name], string(field), "%s reads a field that is not in sharedFields", name)
				}
			}
			return false
		})
	}
}

// TestSharedRulesTakeTheRightLists looks at each call of a shared rule with a list of the dossier, or one that a rule of
// the duty makes, and wants its entries to have the fields that the shared rule reads.
func TestSharedRulesTakeTheRightLists(t *testing.T) {
	ids, err := bundle.Folders(policies.FS)
	require.NoError(t, err)
	checked := 0
	for _, id := range ids {
		b, problems := bundle.Load(policies.FS, id)
		require.NoError(t, problems.Err())
		for _, d := range b.Duties {
			m, err := ast.ParseModuleWithOpts(d.File, d.Text, ast.ParserOptions{RegoVersion: ast.RegoV1})
			require.NoError(t, err)
			ast.WalkTerms(m, func(term *ast.Term) bool {
				if call, ok := term.Value.(ast.Call); ok {
					checked += checkShared(t, b, d, m, call)
				}
				return false
			})
			ast.WalkExprs(m, func(e *ast.Expr) bool {
				if terms, ok := e.Terms.([]*ast.Term); ok {
					checked += checkShared(t, b, d, m, terms)
				}
				return false
			})
		}
	}
	assert.Greater(t, checked, 100, "so many calls are looked at")
}

// checkShared looks at one call and counts it, if it is one of a shared rule with a list whose type is known.
func checkShared(t *testing.T, b *bundle.Bundle, d *bundle.Duty, m *ast.Module, call []*ast.Term) int {
	name, ok := strings.CutPrefix(call[0].String(), "common.")
	fields := sharedFields[name]
	if !ok || fields == nil {
		return 0
	}
	switch list := call[1].Value.(type) {
	case ast.Ref:
		if list[0].Value.Compare(ast.Var("input")) != 0 {
			return 0
		}
		entry := entryOf(schema.Dossier(d.Subject), list[1:])
		for _, field := range fields {
			assert.Contains(t, entry, field, "%s: %s has no entries with the field %s", call[0].Location, list, field)
		}
		return 1
	case ast.Var:
		made := b.Compiler.TypeEnv.GetByRef(m.Package.Path.Append(ast.StringTerm(string(list))))
		if made == nil { // a variable
			return 0
		}
		for _, field := range fields {
			assert.NotNil(t, types.Select(types.Values(made), field), "%s: %s has no entries with the field %s", call[0].Location, list, field)
		}
		return 1
	}
	return 0
}

// entryOf gives the fields of the entries of a list in a schema.
func entryOf(whole map[string]any, path []*ast.Term) map[string]any {
	at := whole
	step := func(next any) {
		at, _ = next.(map[string]any)
		if ref, ok := at["$ref"].(string); ok {
			definitions, _ := whole["$defs"].(map[string]any)
			at, _ = definitions[strings.TrimPrefix(ref, "#/$defs/")].(map[string]any)
		}
	}
	for _, part := range path {
		name, _ := part.Value.(ast.String)
		if fields, ok := at["properties"].(map[string]any); ok && fields[string(name)] != nil {
			step(fields[string(name)])
		} else {
			step(at["additionalProperties"])
		}
	}
	step(at["items"])
	fields, _ := at["properties"].(map[string]any)
	return fields
}
