package judge

import (
	"reflect"
	"strings"
	"sync"

	"github.com/open-policy-agent/opa/v1/ast"

	"hearduty/internal/calendar"
	"hearduty/internal/record"
)

// Input writes a dossier as the input of rules. A fact that is not known becomes null: an empty text, an
// unknown day or number, an unanswered question, a nil pointer. Lists are never null.
func Input(dossier any) ast.Value {
	v := reflect.ValueOf(dossier)
	return encoderOf(v.Type())(v).Value
}

type encoder func(reflect.Value) *ast.Term

var (
	null     = ast.InternedNullTerm
	encoders sync.Map // reflect.Type → encoder
)

// encoderOf gives the encoder of a type; it is made once.
func encoderOf(t reflect.Type) encoder {
	if e, ok := encoders.Load(t); ok {
		return e.(encoder)
	}
	e := newEncoder(t)
	encoders.Store(t, e)
	return e
}

func newEncoder(t reflect.Type) encoder {
	switch t {
	case reflect.TypeFor[calendar.Date]():
		return func(v reflect.Value) *ast.Term {
			if d := calendar.Date(v.Int()); d.Known() {
				return ast.StringTerm(d.String())
			}
			return null
		}
	case reflect.TypeFor[record.Number]():
		return func(v reflect.Value) *ast.Term {
			if !v.Field(1).Bool() {
				return null
			}
			return number(v.Field(0).Float())
		}
	case reflect.TypeFor[record.Answer]():
		return func(v reflect.Value) *ast.Term {
			switch record.Answer(v.Uint()) {
			case record.Yes:
				return ast.InternedTerm(true)
			case record.No:
				return ast.InternedTerm(false)
			}
			return null
		}
	}
	switch t.Kind() {
	case reflect.String:
		return func(v reflect.Value) *ast.Term {
			if v.Len() == 0 {
				return null
			}
			return ast.StringTerm(v.String())
		}
	case reflect.Bool:
		return func(v reflect.Value) *ast.Term { return ast.InternedTerm(v.Bool()) }
	case reflect.Int:
		return func(v reflect.Value) *ast.Term { return ast.InternedTerm(int(v.Int())) }
	case reflect.Pointer:
		return func(v reflect.Value) *ast.Term {
			if v.IsNil() {
				return null
			}
			return encoderOf(t.Elem())(v.Elem())
		}
	case reflect.Interface:
		return func(v reflect.Value) *ast.Term {
			if v.IsNil() {
				return null
			}
			return encoderOf(v.Elem().Type())(v.Elem())
		}
	case reflect.Slice:
		return func(v reflect.Value) *ast.Term {
			if v.Len() == 0 {
				return ast.InternedEmptyArray
			}
			element := encoderOf(t.Elem())
			terms := make([]*ast.Term, v.Len())
			for i := range terms {
				terms[i] = element(v.Index(i))
			}
			return ast.ArrayTerm(terms...)
		}
	case reflect.Map:
		return mapEncoder(t)
	case reflect.Struct:
		return structEncoder(t)
	case reflect.Float64:
		return func(v reflect.Value) *ast.Term { return number(v.Float()) }
	}
	panic("a dossier cannot hold " + t.String())
}

// number writes a number; whole ones take less time as such.
func number(v float64) *ast.Term {
	if n := int(v); float64(n) == v && n > -1000 && n < 1000 {
		return ast.InternedTerm(n)
	}
	return ast.FloatNumberTerm(v)
}

func mapEncoder(t reflect.Type) encoder {
	return func(v reflect.Value) *ast.Term {
		if v.Len() == 0 {
			return ast.InternedEmptyObject
		}
		element := encoderOf(t.Elem())
		pairs := make([][2]*ast.Term, 0, v.Len())
		for it := v.MapRange(); it.Next(); {
			pairs = append(pairs, [2]*ast.Term{ast.StringTerm(it.Key().String()), element(it.Value())})
		}
		return ast.ObjectTerm(pairs...)
	}
}

type fieldEncoder struct {
	index []int
	key   *ast.Term
	value encoder
}

func structEncoder(t reflect.Type) encoder {
	var fields []fieldEncoder
	for _, f := range reflect.VisibleFields(t) {
		name, _, _ := strings.Cut(f.Tag.Get("json"), ",")
		if f.Anonymous || name == "" || name == "-" {
			continue
		}
		fields = append(fields, fieldEncoder{f.Index, ast.StringTerm(name), nil})
		e := f.Type
		fields[len(fields)-1].value = func(v reflect.Value) *ast.Term { return encoderOf(e)(v) }
	}
	return func(v reflect.Value) *ast.Term {
		pairs := make([][2]*ast.Term, len(fields))
		for i, f := range fields {
			pairs[i] = [2]*ast.Term{f.key, f.value(v.FieldByIndex(f.index))}
		}
		return ast.ObjectTerm(pairs...)
	}
}
