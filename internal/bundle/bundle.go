// Package bundle loads a bundle of duties: one jurisdiction's law as Rego rules and dated data. It refuses
// what could fail silently later: an unknown parameter, a misspelt field, a duty without a citation.
package bundle

import (
	"encoding/json"
	"sort"
	"strings"

	"github.com/open-policy-agent/opa/v1/ast"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/dossier"
)

// Bundle is one loaded bundle.
type Bundle struct {
	ID         string
	Revision   string   // of the manifest
	SHA256     string   // digest over the paths and contents of all its files, and of those of the bundles that it extends
	Signature  string   // what is known of its signature, one of Signatures; empty if it comes from no shelf
	Extends    []string // bundles that it extends, directly or through others, the nearest first
	About      About
	Parameters map[string]Parameter
	Choices    map[string]Choice
	Paragraphs map[string]Paragraph
	Measures   dossier.Measures
	Duties     []*Duty // by topic, then in order of citation

	Warnings diag.List             // what somebody should look at, such as a parameter looser than that of the bundle extended
	Week     *calendar.WorkingWeek // working days, if the law counts in them
	Compiler *ast.Compiler         // the checked rules
	Data     map[string]any        // all data of the bundle, JSON-shaped
	Files    map[string][]byte     // every file of the bundle, of those that it extends, and of the shared rules, by path
	Modules  []string              // paths of the modules that hold here, tests among them, in order

	places map[string]string // where its folders were read, by name, if they are not embedded
}

// Own says whether a path in Files is one of the bundle itself, not of a bundle that it extends or of the shared rules.
func (b *Bundle) Own(file string) bool { return strings.HasPrefix(file, b.ID+"/") }

// Shared says whether a path in Files is one of the rules that all bundles share.
func (b *Bundle) Shared(file string) bool { return strings.HasPrefix(file, commonDir+"/") }

// About says what the bundle is: about/data.yaml.
type About struct {
	ID          string       `json:"id" doc:"id of the bundle; the name of its folder"`
	Title       string       `json:"title" doc:"title for people"`
	Authority   string       `json:"authority" doc:"who makes and enforces it"`
	Country     string       `json:"country" doc:"country code"`
	Region      string       `json:"region,omitempty" doc:"state, province or region"`
	Extends     []string     `json:"extends,omitempty" doc:"bundles whose duties and parameters hold here, too, unless this one has its own of the name"`
	Drops       []string     `json:"drops,omitempty" doc:"duties, by id, and parameters, by name, of the extended bundles that do not hold here"`
	Kind        string       `json:"kind" enum:"law|guidance|practice|company" doc:"how it binds"`
	Instruments []Instrument `json:"instruments" doc:"the texts it reads"`
	InForce     string       `json:"in_force" format:"date" doc:"first day judged by it"`
	CheckedOn   string       `json:"checked_on" format:"date" doc:"day on which it was last held against the text"`
	SeenNote    string       `json:"seen_note,omitempty" doc:"which edition of the text was read"`
	Cautions    []string     `json:"cautions" doc:"what every reader must know"`
	Readings    []Reading    `json:"readings,omitempty" doc:"points that can be read in two ways, and how this bundle reads them"`
}

// Instrument is one text of law.
type Instrument struct {
	Name string `json:"name" doc:"name of the text"`
	Cite string `json:"cite" doc:"its citation"`
}

// Reading is a point of the text that can be read in two ways.
type Reading struct {
	Point   string `json:"point" doc:"the question"`
	Reading string `json:"reading" doc:"how the bundle reads it"`
	Source  string `json:"source,omitempty" doc:"what supports the reading"`
}

// Parameter is one number, interval or list of the law, by the days on which it is in force.
type Parameter struct {
	About    string  `json:"about" doc:"what it is"`
	Unit     string  `json:"unit,omitempty" doc:"unit of the value"`
	Stricter string  `json:"stricter,omitempty" enum:"lower|higher" doc:"which way a value asks for more, so that a bundle that extends this one can be told to be looser"`
	Values   []Value `json:"values" doc:"values, oldest first"`
}

// Value is a parameter's value from a day on.
type Value struct {
	From  string `json:"from" format:"date" doc:"first day in force"`
	To    string `json:"to,omitempty" format:"date" doc:"day after the last day in force"`
	Value any    `json:"value" doc:"a number, an interval such as {days: 21}, or a list of words"`
	Cite  string `json:"cite" doc:"paragraph"`
	Seen  string `json:"seen" enum:"text|secondary|memory" doc:"what was read: the official text, a secondary source, or nothing (from memory)"`

	from, to calendar.Date
	number   float64
	interval calendar.Interval
	kind     valueKind
	fact     map[string]any
}

type valueKind uint8

const (
	numberValue valueKind = iota + 1
	intervalValue
	wordsValue
)

// At gives the value in force on the day.
func (p Parameter) At(day calendar.Date) (*Value, bool) {
	for i := range p.Values {
		v := &p.Values[i]
		if v.from <= day && (!v.to.Known() || day < v.to) {
			return v, true
		}
	}
	return nil, false
}

// Number gives the value as a number.
func (v *Value) Number() (float64, bool) { return v.number, v.kind == numberValue }

// Interval gives the value as an interval.
func (v *Value) Interval() (calendar.Interval, bool) { return v.interval, v.kind == intervalValue }

// Number gives a parameter's number in force on the day.
func (b *Bundle) Number(name string, day calendar.Date) (float64, bool) {
	if v, ok := b.Parameters[name].At(day); ok {
		return v.Number()
	}
	return 0, false
}

// Interval gives a parameter's interval in force on the day.
func (b *Bundle) Interval(name string, day calendar.Date) (calendar.Interval, bool) {
	if v, ok := b.Parameters[name].At(day); ok {
		return v.Interval()
	}
	return calendar.Interval{}, false
}

// Days gives the days on which a parameter's value changes.
func (b *Bundle) Days(name string) []calendar.Date {
	var days []calendar.Date
	for i := range b.Parameters[name].Values {
		v := &b.Parameters[name].Values[i]
		days = append(days, v.from)
		if v.to.Known() {
			days = append(days, v.to)
		}
	}
	return days
}

// Choice is something that the law leaves to the employer.
type Choice struct {
	About   string `json:"about" doc:"what may be chosen"`
	Values  []any  `json:"values" doc:"what it can be: words, true or false"`
	Default any    `json:"default" doc:"what holds where the program file says nothing"`
	Cite    string `json:"cite,omitempty" doc:"paragraph that allows it"`
}

// Paragraph accounts for one paragraph of the instrument.
type Paragraph struct {
	Says     string   `json:"says" doc:"what it asks, in a few words"`
	Checked  []string `json:"checked,omitempty" doc:"duties that check it"`
	Attested string   `json:"attested,omitempty" doc:"document by which it is attested"`
	Outside  string   `json:"outside,omitempty" doc:"why no duty checks it"`
}

// Duty is one thing that the bundle demands: one folder, one citation.
type Duty struct {
	ID          string   // kebab-case
	Package     string   // snake_case, the last part of the Rego package
	Title       string   // short name
	Description string   // what the paragraph asks
	Cite        string   // the paragraph
	Subject     string   // subject kind
	Topic       string   // heading
	Severity    string   // major or minor
	Evidence    []string // record kinds that prove it
	Remedy      string   // what to do
	File        string   // path of the module in the bundle
	From        string   // id of the bundle that it comes from: this one, or one that it extends
	Text        string   // the module as written
}

// Guidance says whether the duty stands in guidance beside the law: its title says so.
func (d *Duty) Guidance() bool { return strings.HasSuffix(d.Title, "(guidance)") }

// Duty gives a duty by its id.
func (b *Bundle) Duty(id string) (*Duty, bool) {
	for _, d := range b.Duties {
		if d.ID == id {
			return d, true
		}
	}
	return nil, false
}

// ChoicesOf gives the choices in force at a site: what the program file says, else the defaults.
func (b *Bundle) ChoicesOf(site map[string]any) map[string]any {
	out := make(map[string]any, len(b.Choices))
	for name, c := range b.Choices {
		out[name] = c.Default
		if v, ok := site[name]; ok {
			out[name] = v
		}
	}
	return out
}

// Library is a set of bundles by id.
type Library map[string]*Bundle

// IDs lists the bundles of the library in order.
func (l Library) IDs() []string {
	ids := make([]string, 0, len(l))
	for id := range l {
		ids = append(ids, id)
	}
	sort.Strings(ids)
	return ids
}

// Fact gives the value with its citation and mark, as findings show it. All findings share one map, which
// nobody may change.
func (v *Value) Fact() map[string]any { return v.fact }

// Plain gives a value as it stands in JSON, for facts.
func (v *Value) Plain() any {
	if v.kind == intervalValue {
		b, _ := json.Marshal(v.interval)
		var m map[string]any
		_ = json.Unmarshal(b, &m)
		return m
	}
	return v.Value
}
