package judge

import (
	"encoding/json"
	"fmt"
	"slices"
	"strings"

	"github.com/open-policy-agent/opa/v1/ast"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
)

// shape is the form of an obligation, by which it is settled.
type shape string

const (
	once      shape = "once"
	recurring shape = "recurring"
	limit     shape = "limit"
	condition shape = "condition"
	opinion   shape = "opinion"
	lifted    shape = "lifted"
)

// obligation is what a rule returns: a duty falling on one subject, because of something.
type obligation struct {
	shape   shape
	key     string
	because []string
	facts   *ast.Term
	health  *ast.Term
	note    string
	missing []string
	during  *calendar.Spell

	within, every, first, lasts string // names of interval parameters
	until, then                 string // interval parameters: how long every holds, and what holds afterwards
	after, noSooner, on         calendar.Date
	noLater, before, since      calendar.Date
	by                          *dossier.Link
	series                      []string // names of series that fulfil it
	backwards                   bool     // whether it must be done before a day
	touches                     string   // name of a series to be counted

	value     float64
	valued    bool   // whether the value is known
	compare   string // at_most, below, at_least or above
	parameter string

	holds    *bool
	ask, of  string
	reason   string // of a lifted obligation
	cite     string
	returned *ast.Term
}

// comparators are the fields of a limit that name its parameter.
var comparators = []string{"at_most", "below", "at_least", "above"}

// readObligation reads an obligation as a rule returned it. The error says what is wrong with its form.
func readObligation(t *ast.Term) (*obligation, error) {
	object, ok := t.Value.(ast.Object)
	if !ok {
		return nil, fmt.Errorf("an obligation is an object, not %s", t)
	}
	o := &obligation{returned: t}
	r := reader{object: object}
	o.key, o.note = r.text("key"), r.text("note")
	o.because, o.missing = r.texts("because"), r.texts("missing")
	o.facts, o.health = r.term("facts"), r.term("health")
	o.during = r.spell("during")
	switch {
	case r.has("every"):
		o.shape = recurring
		o.every, o.first, o.series, o.touches = r.text("every"), r.text("first"), r.texts("by"), r.text("touches")
		o.until, o.then, o.since = r.text("until"), r.text("then"), r.day("since")
		if (o.until == "") != (o.then == "") {
			r.fail("until and then go together: how long every holds, and what holds afterwards")
		}
		if o.during == nil {
			r.fail("a recurring obligation needs during, a stretch of days")
		}
	case r.has("value"):
		o.shape = limit
		o.value, o.valued = r.number("value")
		o.on = r.day("on")
		for _, c := range comparators {
			if r.has(c) {
				if o.compare != "" {
					r.fail("a limit has one of at_most, below, at_least and above, not two")
				}
				o.compare, o.parameter = c, r.text(c)
			}
		}
		if o.compare == "" {
			r.fail("a limit needs one of at_most, below, at_least and above")
		}
	case r.has("holds"):
		o.shape = condition
		o.holds, o.on, o.lasts = r.boolean("holds"), r.day("on"), r.text("for")
	case r.has("ask"):
		o.shape = opinion
		o.ask, o.of, o.by, o.on = r.text("ask"), r.text("of"), r.link("by"), r.day("on")
	case r.has("lifted"):
		o.shape = lifted
		o.reason, o.cite = r.text("lifted"), r.text("cite")
		o.on = r.day("on")
	case r.has("by"):
		o.shape = once
		if r.has("after") == r.has("before") {
			r.fail("an obligation that is done once needs after, the day on which its time begins, or before, the day by which it must be done")
		}
		o.within, o.after, o.noSooner = r.text("within"), r.day("after"), r.day("no_sooner_than")
		o.before, o.noLater, o.backwards = r.day("before"), r.day("no_later_than"), r.has("before")
		if value := r.term("by"); value != nil {
			if _, isLink := value.Value.(ast.Object); isLink {
				o.by = r.link("by")
			} else if _, isNull := value.Value.(ast.Null); !isNull {
				o.series = r.texts("by")
			}
		}
	default:
		r.fail("an obligation has by, every, value, holds, ask or lifted")
	}
	r.unknownFields(o.shape)
	return o, r.err
}

// fieldsOfAny are the fields that an obligation of any shape may have, fieldsOfShape those of its own.
var (
	fieldsOfAny   = []string{"key", "note", "because", "missing", "facts", "health", "during"}
	fieldsOfShape = map[shape][]string{
		once:      {"by", "after", "within", "no_sooner_than", "no_later_than", "before"},
		recurring: {"every", "by", "first", "touches", "until", "then", "since"},
		limit:     {"value", "on", "at_most", "below", "at_least", "above"},
		condition: {"holds", "on", "for"},
		opinion:   {"ask", "of", "by", "on"},
		lifted:    {"lifted", "cite", "on"},
	}
)

// reader takes fields out of an obligation. The first mistake is kept.
type reader struct {
	object ast.Object
	err    error
}

func (r *reader) fail(format string, args ...any) {
	if r.err == nil {
		r.err = fmt.Errorf(format, args...)
	}
}

func (r *reader) term(field string) *ast.Term {
	return r.object.Get(ast.InternedTerm(field))
}

func (r *reader) has(field string) bool { return r.object.Get(ast.InternedTerm(field)) != nil }

// value gives a field that is there and not null.
func (r *reader) value(field string) *ast.Term {
	t := r.term(field)
	if t == nil {
		return nil
	}
	if _, ok := t.Value.(ast.Null); ok {
		return nil
	}
	return t
}

func (r *reader) text(field string) string {
	t := r.value(field)
	if t == nil {
		return ""
	}
	s, ok := t.Value.(ast.String)
	if !ok {
		r.fail("%s is a text, not %s", field, t)
	}
	return string(s)
}

// texts reads a text, or a list or set of texts; nulls in it are passed over.
func (r *reader) texts(field string) []string {
	t := r.value(field)
	if t == nil {
		return nil
	}
	var out []string
	take := func(t *ast.Term) {
		switch v := t.Value.(type) {
		case ast.String:
			out = append(out, string(v))
		case ast.Null:
		default:
			r.fail("%s holds texts, not %s", field, t)
		}
	}
	switch v := t.Value.(type) {
	case *ast.Array:
		v.Foreach(take)
	case ast.Set:
		v.Foreach(take)
	default:
		take(t)
	}
	return out
}

func (r *reader) day(field string) calendar.Date {
	s := r.text(field)
	if s == "" {
		return 0
	}
	d, err := calendar.Parse(s)
	if err != nil {
		r.fail("%s: %v", field, err)
	}
	return d
}

func (r *reader) number(field string) (float64, bool) {
	t := r.value(field)
	if t == nil {
		return 0, false
	}
	n, ok := t.Value.(ast.Number)
	if !ok {
		r.fail("%s is a number, not %s", field, t)
		return 0, false
	}
	f, ok := n.Float64()
	return f, ok
}

func (r *reader) boolean(field string) *bool {
	t := r.value(field)
	if t == nil {
		return nil
	}
	b, ok := t.Value.(ast.Boolean)
	if !ok {
		r.fail("%s is true, false or null, not %s", field, t)
		return nil
	}
	answer := bool(b)
	return &answer
}

// inside reads the fields of an object in a field.
func (r *reader) inside(field string) *reader {
	t := r.value(field)
	if t == nil {
		return nil
	}
	object, ok := t.Value.(ast.Object)
	if !ok {
		r.fail("%s is an object, not %s", field, t)
		return nil
	}
	return &reader{object: object}
}

func (r *reader) spell(field string) *calendar.Spell {
	in := r.inside(field)
	if in == nil {
		return nil
	}
	s := calendar.Spell{From: in.day("from"), To: in.day("to")}
	if in.err != nil {
		r.fail("%s: %v", field, in.err)
	}
	return &s
}

func (r *reader) link(field string) *dossier.Link {
	in := r.inside(field)
	if in == nil {
		return nil
	}
	l := dossier.Link{Date: in.day("date"), Ref: in.text("ref")}
	if in.err != nil {
		r.fail("%s: %v", field, in.err)
	}
	return &l
}

// unknownFields refuses a field that no shape has, so that a slip of the pen is not passed over.
func (r *reader) unknownFields(s shape) {
	r.object.Foreach(func(k, _ *ast.Term) {
		name, ok := k.Value.(ast.String)
		if !ok || !slices.Contains(fieldsOfAny, string(name)) && !slices.Contains(fieldsOfShape[s], string(name)) {
			r.fail("an obligation of this shape has no field %s", k)
		}
	})
}

// plain turns a term into a JSON-shaped value. Numbers are written as short as they can be read back.
func plain(t *ast.Term) map[string]any {
	if t == nil {
		return nil
	}
	v, err := ast.JSON(t.Value)
	if err != nil {
		return map[string]any{"unreadable": strings.TrimSpace(t.String())}
	}
	m, _ := tidy(v).(map[string]any)
	return m
}

func tidy(v any) any {
	switch v := v.(type) {
	case map[string]any:
		for k := range v {
			v[k] = tidy(v[k])
		}
	case []any:
		for i := range v {
			v[i] = tidy(v[i])
		}
	case json.Number:
		if f, err := v.Float64(); err == nil {
			return f
		}
	}
	return v
}
