package bundle

import (
	"slices"

	"github.com/open-policy-agent/opa/v1/ast"
)

// allowedBuiltins are the built-in functions that a rule may call. Nothing here reads a clock, the
// network, a file, the environment or chance, so that the same records give the same findings.
var allowedBuiltins = []string{
	"abs", "all", "and", "any", "array.concat", "array.reverse", "array.slice", "assign", "ceil", "concat", "contains", "count",
	"div", "endswith", "eq", "equal", "floor", "format_int", "gt", "gte", "indexof", "internal.member_2", "internal.member_3",
	"internal.print", "internal.test_case", "intersection", "is_array", "is_boolean", "is_null", "is_number", "is_object",
	"is_set", "is_string", "lower", "lt", "lte", "max", "min", "minus", "mul", "neq", "numbers.range", "object.filter",
	"object.get", "object.keys", "object.remove", "object.subset", "object.union", "object.union_n", "or", "plus", "print",
	"product", "rem", "replace", "rego.metadata.chain", "rego.metadata.rule", "round", "sort", "split", "sprintf",
	"startswith", "strings.any_prefix_match", "strings.any_suffix_match", "substring", "sum", "to_number", "trim",
	"trim_left", "trim_prefix", "trim_right", "trim_space", "trim_suffix", "type_name", "union", "upper", "walk",
}

// Capabilities gives what rules may use: the allowed built-in functions, and no host on the network.
func Capabilities() *ast.Capabilities {
	caps := ast.CapabilitiesForThisVersion()
	caps.Builtins = slices.DeleteFunc(slices.Clone(caps.Builtins), func(b *ast.Builtin) bool {
		return !slices.Contains(allowedBuiltins, b.Name)
	})
	caps.AllowNet = []string{}
	return caps
}
