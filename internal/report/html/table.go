package html

import (
	"encoding/json"
	"html/template"
	"maps"
	"slices"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// row is a line of the register as the page shows it before its script runs.
type row struct {
	F     *finding.Finding
	Title string
	Due   string
	Over  string
}

// table writes findings compactly for the page's script: words that repeat stand once, in a list.
type table struct {
	r      *finding.Report
	titles phrase.Titles
	duties map[[2]string]*finding.Duty
	words  []string
	known  map[string]int
}

func newTable(r *finding.Report, titles phrase.Titles) *table {
	t := &table{r: r, titles: titles, duties: map[[2]string]*finding.Duty{}, known: map[string]int{}}
	for i := range r.Duties {
		t.duties[[2]string{r.Duties[i].Bundle, r.Duties[i].ID}] = &r.Duties[i]
	}
	return t
}

func (t *table) word(s string) int {
	n, ok := t.known[s]
	if !ok {
		n = len(t.words)
		t.words, t.known[s] = append(t.words, s), n
	}
	return n
}

func (t *table) duty(f *finding.Finding) *finding.Duty {
	if d := t.duties[[2]string{f.Bundle, f.Duty}]; d != nil {
		return d
	}
	return &finding.Duty{Bundle: f.Bundle, ID: f.Duty, Topic: f.Topic}
}

func (t *table) first(findings []finding.Finding, n int) []row {
	var out []row
	for i := range findings[:min(n, len(findings))] {
		f := &findings[i]
		out = append(out, row{f, t.titles.Of(f), day(f.Due), over(f)})
	}
	return out
}

// over says how many days a gap or a late fulfilment lies after its day.
func over(f *finding.Finding) string {
	if f.DaysOver <= 0 {
		return ""
	}
	return count(f.DaysOver, "day") + " over"
}

// line is a finding as the script reads it. Numbers are places in the list of words.
type line struct {
	ID       string   `json:"i"`
	Site     int      `json:"s"`
	Bundle   int      `json:"b"`
	Duty     int      `json:"d"`
	Kind     int      `json:"k"`
	Subject  string   `json:"u"`
	Status   int      `json:"t"`
	Due      string   `json:"e,omitempty"`
	Done     string   `json:"o,omitempty"`
	Over     int      `json:"v,omitempty"`
	Message  int      `json:"m"`
	Cite     int      `json:"c"`
	Remedy   int      `json:"r"`
	Facts    []int    `json:"f,omitempty"` // name, value, name, value
	Law      []int    `json:"l,omitempty"` // name, value, paragraph, how seen
	Health   []int    `json:"h,omitempty"` // name, value
	Evidence []int    `json:"w,omitempty"` // record, file, row
	Accepted []string `json:"a,omitempty"` // in short, reason, by
}

// dutyLine is a duty as the script reads it.
type dutyLine struct {
	Bundle   int    `json:"b"`
	ID       string `json:"i"`
	Title    string `json:"n"`
	About    string `json:"a"`
	Topic    string `json:"t"`
	Severity string `json:"s"`
}

type data struct {
	Says     string           `json:"says"`              // how many findings are listed, and which
	Several  bool             `json:"several,omitempty"` // whether each finding says under which bundle it stands
	Statuses []finding.Status `json:"statuses"`
	Words    []string         `json:"words"`
	Duties   []dutyLine       `json:"duties"`
	Lines    []line           `json:"lines"`
}

// data gives the register as JSON. The encoder writes <, > and & in a form that cannot end the script.
func (t *table) data(findings []finding.Finding, says string, several bool) (template.JS, error) {
	d := data{Says: says, Several: several, Statuses: finding.Statuses, Duties: []dutyLine{}, Lines: make([]line, 0, len(findings))}
	at := map[[4]string]int{}
	dutyAt := func(f *finding.Finding) int {
		key := [4]string{f.Bundle, f.Duty, f.Topic, f.Severity}
		n, ok := at[key]
		if !ok {
			n = len(d.Duties)
			at[key] = n
			x := t.duty(f)
			d.Duties = append(d.Duties, dutyLine{t.word(f.Bundle), f.Duty, t.titles.Of(f), x.Description, f.Topic, f.Severity})
		}
		return n
	}
	for i := range findings {
		f := &findings[i]
		l := line{ID: f.ID, Site: t.word(f.Site), Bundle: t.word(f.Bundle), Duty: dutyAt(f), Kind: t.word(f.Subject.Kind), Subject: f.Subject.ID,
			Status: f.Status.Urgency(), Due: day(f.Due), Done: day(f.Done), Over: f.DaysOver, Message: t.word(f.Message), Cite: t.word(f.Cite), Remedy: t.word(f.Remedy)}
		t.facts(f, &l)
		if a := f.Accepted; a != nil {
			l.Accepted = []string{accepted(a), a.Reason, a.ApprovedBy}
		}
		for _, e := range f.Evidence {
			l.Evidence = append(l.Evidence, t.word(e.Record), t.word(place(e.File, e.Sheet, 0)), e.Row)
		}
		d.Lines = append(d.Lines, l)
	}
	d.Words = t.words
	text, err := json.Marshal(d)
	return template.JS(text), err
}

func (t *table) facts(f *finding.Finding, l *line) {
	for _, key := range slices.Sorted(maps.Keys(f.Facts)) {
		if p, ok := finding.AsParameter(f.Facts[key]); ok {
			l.Law = append(l.Law, t.word(strings.ReplaceAll(key, "_", " ")), t.word(p.String()), t.word(p.Cite), t.word(p.Seen))
			continue
		}
		name, value := finding.Named(key, f.Facts[key])
		l.Facts = append(l.Facts, t.word(name), t.word(value))
	}
	for _, key := range slices.Sorted(maps.Keys(f.Health)) {
		name, value := finding.Named(key, f.Health[key])
		l.Health = append(l.Health, t.word(name), t.word(value))
	}
}
