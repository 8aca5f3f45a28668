package schema

import "github.com/open-policy-agent/opa/v1/ast"

// AllowNull writes each x == null of a module as is_null(x), which means the same. OPA's type checker
// knows nothing of values that may be null: it takes such a value for what it is otherwise, and would
// refuse the comparison.
func AllowNull(m *ast.Module) {
	isNull := func() *ast.Term { return ast.NewTerm(ast.IsNull.Ref()) }
	ast.NewGenericVisitor(func(x any) bool {
		switch x := x.(type) {
		case *ast.Expr:
			if !x.IsCall() || len(x.Operands()) != 2 {
				break
			}
			if other := besideNull(x.Operator(), x.Operands()); other != nil {
				x.Terms = []*ast.Term{isNull().SetLocation(x.Location), other}
			}
		case *ast.Term:
			call, ok := x.Value.(ast.Call)
			if !ok || len(call) != 3 {
				break
			}
			if operator, ok := call[0].Value.(ast.Ref); ok {
				if other := besideNull(operator, call[1:]); other != nil {
					x.Value = ast.Call{isNull().SetLocation(x.Location), other}
				}
			}
		}
		return false
	}).Walk(m)
}

// besideNull gives the operand that is compared with null, or nil if it is no such comparison.
func besideNull(operator ast.Ref, operands []*ast.Term) *ast.Term {
	if !operator.Equal(ast.Equal.Ref()) {
		return nil
	}
	for i := range operands {
		if _, ok := operands[i].Value.(ast.Null); ok {
			return operands[1-i]
		}
	}
	return nil
}
