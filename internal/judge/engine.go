package judge

import (
	"context"
	"errors"
	"fmt"
	"slices"
	"strings"
	"sync"
	"time"

	"github.com/open-policy-agent/opa/v1/ast"
	"github.com/open-policy-agent/opa/v1/rego"
	"github.com/open-policy-agent/opa/v1/storage"
	"github.com/open-policy-agent/opa/v1/storage/inmem"
	"github.com/open-policy-agent/opa/v1/topdown"

	"hearduty/internal/bundle"
)

// Engine evaluates the rules of a bundle. The stock evaluator of OPA is the first and the reference; a
// faster executor may stand beside it.
type Engine interface {
	// Evaluate gives what every duty of a subject kind returns for a dossier, in the order of the bundle's
	// duties. A rule that fails spoils only its own answer. The error is for the end of the work: a
	// cancelled context.
	Evaluate(ctx context.Context, kind string, input ast.Value) ([]Answer, error)
}

// Answer is what one duty returns for one dossier.
type Answer struct {
	Duty        *bundle.Duty
	Obligations []*ast.Term // objects
	NotOwed     []*ast.Term // reasons in words
	Err         error       // the rule failed
}

// evaluationLimit is the time that the rules of one subject may take. A rule that does not end is cut off; tests shorten
// it.
var evaluationLimit = 20 * time.Second

// mostCutOff is how often a duty may be cut off. After that it is not tried again, so that the whole takes a bounded
// time, too: every further subject has the error at once.
const mostCutOff = 3

// stock is OPA's own evaluator: one prepared query a subject kind and, once a rule fails, one a duty.
type stock struct {
	bundle *bundle.Bundle
	store  storage.Store
	kinds  map[string]*kindQuery

	mu     sync.Mutex
	single map[string]rego.PreparedEvalQuery // by id of the duty
	cutOff map[string]int                    // how often a duty was cut off, by its id
}

// errTooLong says that rules were cut off.
var errTooLong = errors.New("the rules took longer than they may")

type kindQuery struct {
	duties []*bundle.Duty
	query  rego.PreparedEvalQuery
}

// NewEngine prepares the rules of a bundle for OPA's stock evaluator.
func NewEngine(ctx context.Context, b *bundle.Bundle) (Engine, error) {
	store := inmem.NewFromObjectWithOpts(b.Data, inmem.OptReturnASTValuesOnRead(true))
	s := &stock{bundle: b, store: store, kinds: map[string]*kindQuery{}, single: map[string]rego.PreparedEvalQuery{}, cutOff: map[string]int{}}
	for _, d := range b.Duties {
		q := s.kinds[d.Subject]
		if q == nil {
			q = &kindQuery{}
			s.kinds[d.Subject] = q
		}
		q.duties = append(q.duties, d)
	}
	for _, q := range s.kinds {
		var err error
		if q.query, err = prepare(ctx, b, store, q.duties); err != nil {
			return nil, err
		}
	}
	return s, nil
}

// prepare makes one query for the two sets of each duty, in order.
func prepare(ctx context.Context, b *bundle.Bundle, store storage.Store, duties []*bundle.Duty) (rego.PreparedEvalQuery, error) {
	var parts []string
	for _, d := range duties {
		parts = append(parts, fmt.Sprintf("[data.duty.%s.obligations, data.duty.%s.not_owed]", d.Package, d.Package))
	}
	return rego.New(
		rego.Query("answers := ["+strings.Join(parts, ", ")+"]"),
		rego.Compiler(b.Compiler), rego.Store(store), rego.StrictBuiltinErrors(true), rego.Capabilities(bundle.Capabilities()),
		rego.GenerateJSON(func(t *ast.Term, _ *rego.EvalContext) (any, error) { return t.Value, nil }),
	).PrepareForEval(ctx)
}

// Evaluate implements Engine.
func (s *stock) Evaluate(ctx context.Context, kind string, input ast.Value) ([]Answer, error) {
	q := s.kinds[kind]
	if q == nil {
		return nil, nil
	}
	if !s.anyGivenUp(q.duties) {
		answers, err := run(ctx, q.query, q.duties, input)
		if err == nil {
			return answers, nil
		}
		if ctx.Err() != nil {
			return nil, ctx.Err()
		}
	}
	var answers []Answer
	for _, d := range q.duties {
		one, err := s.alone(ctx, d, input)
		if ctx.Err() != nil {
			return nil, ctx.Err()
		}
		if err != nil {
			one = []Answer{{Duty: d, Err: err}}
		}
		answers = append(answers, one...)
	}
	return answers, nil
}

// alone evaluates one duty, unless it was cut off too often.
func (s *stock) alone(ctx context.Context, d *bundle.Duty, input ast.Value) ([]Answer, error) {
	if s.anyGivenUp([]*bundle.Duty{d}) {
		return nil, tooLong()
	}
	query, err := s.singleQuery(ctx, d)
	if err != nil {
		return nil, err
	}
	answers, err := run(ctx, query, []*bundle.Duty{d}, input)
	if errors.Is(err, errTooLong) {
		s.mu.Lock()
		defer s.mu.Unlock()
		s.cutOff[d.ID]++
		return nil, tooLong()
	}
	return answers, err
}

// anyGivenUp says whether one of the duties is not tried any more.
func (s *stock) anyGivenUp(duties []*bundle.Duty) bool {
	s.mu.Lock()
	defer s.mu.Unlock()
	return len(s.cutOff) > 0 && slices.ContainsFunc(duties, func(d *bundle.Duty) bool { return s.cutOff[d.ID] >= mostCutOff })
}

func tooLong() error { return fmt.Errorf("the rules took longer than %s", evaluationLimit) }

// singleQuery prepares the query of one duty the first time that it is needed.
func (s *stock) singleQuery(ctx context.Context, d *bundle.Duty) (rego.PreparedEvalQuery, error) {
	s.mu.Lock()
	defer s.mu.Unlock()
	if q, ok := s.single[d.ID]; ok {
		return q, nil
	}
	q, err := prepare(ctx, s.bundle, s.store, []*bundle.Duty{d})
	if err == nil {
		s.single[d.ID] = q
	}
	return q, err
}

func run(ctx context.Context, query rego.PreparedEvalQuery, duties []*bundle.Duty, input ast.Value) ([]Answer, error) {
	cancel := topdown.NewCancel()
	timer := time.AfterFunc(evaluationLimit, cancel.Cancel)
	defer timer.Stop()
	results, err := query.Eval(ctx, rego.EvalParsedInput(input), rego.EvalExternalCancel(cancel))
	if err != nil {
		if topdown.IsCancel(err) {
			err = errTooLong
		}
		return nil, err
	}
	if len(results) != 1 {
		return nil, fmt.Errorf("the rules gave no answer")
	}
	list, ok := results[0].Bindings["answers"].(*ast.Array)
	if !ok || list.Len() != len(duties) {
		return nil, fmt.Errorf("the rules gave an answer of another form")
	}
	answers := make([]Answer, len(duties))
	for i, d := range duties {
		pair := list.Elem(i).Value.(*ast.Array)
		answers[i] = Answer{Duty: d, Obligations: members(pair.Elem(0)), NotOwed: members(pair.Elem(1))}
	}
	return answers, nil
}

// members lists the members of a set in OPA's order.
func members(t *ast.Term) []*ast.Term {
	set, ok := t.Value.(ast.Set)
	if !ok {
		return nil
	}
	return set.Slice()
}
