package judge

import (
	"cmp"
	"fmt"
	"math"
	"slices"
	"strings"
	"sync"

	"hearduty/internal/calendar"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
)

func (a *painter) group(d *dossier.Group) {
	a.fact("Area", d.Area)
	a.number("Workers", d.Workers)
	a.number("With a protector at hand", d.Holders)
	b := a.bench.builder
	x := &finding.Exposure{Unit: b.LevelUnit(), Results: []finding.Result{}, Lines: []finding.Line{}, Ears: []finding.Ear{}}
	for _, m := range b.LevelsOf(d.ID) {
		x.Results = append(x.Results, resultOf(m, a.file.Refs.Of(m.Rec)))
	}
	for _, l := range b.LevelLines() {
		line := finding.Line{Name: levelName(l.Name), DB: tenths(l.DB), Grade: "action"}
		if l.Limit {
			line.Grade = "limit"
		}
		if v, ok := a.bench.bundle.Parameters[l.Parameter].At(a.check.AsOf); ok {
			line.Cite = v.Cite
		}
		x.Lines = append(x.Lines, line)
	}
	x.Ears = a.bench.ears.of(d.ID)
	a.p.Exposure = x
	for _, m := range d.Measurements {
		a.linked(m.Date, "measurement", phrase("noise measurement", m.Type), plainState, m.Ref)
	}
	for _, c := range d.Changes {
		a.linked(c.Date, "change", phrase("change", c.What), plainState, c.Ref)
	}
	for _, c := range d.Controls {
		a.linked(c.Date, "control", phrase(c.Type+" control", c.What), plainState, c.Ref)
	}
	a.documents(d.Documents)
}

// levelName writes the name of an exposure level in words.
func levelName(name string) string {
	if strings.Contains(name, "level") {
		return words(name)
	}
	return words(name) + " level"
}

func (a *painter) area(d *dossier.Area) {
	a.fact("Groups", strings.Join(d.Groups, ", "))
	a.number("Workers", d.Workers)
	for _, m := range d.Measurements {
		a.linked(m.Date, "measurement", phrase("noise measurement", m.Type), plainState, m.Ref)
	}
	for _, c := range d.Controls {
		a.linked(c.Date, "control", phrase(c.Type+" control", c.What), plainState, c.Ref)
	}
	a.documents(d.Documents)
}

func resultOf(m dossier.MeasuredLevel, ref string) finding.Result {
	r := finding.Result{Date: m.Day, DB: tenths(m.DB), Record: ref, Current: m.Current, Known: "between"}
	switch {
	case m.Low == m.High:
		r.Known = "exact"
	case math.IsInf(m.High, 1):
		r.Known = "at_least"
		return r
	case m.Low <= 0:
		r.Known = "at_most"
		return r
	}
	r.Low, r.High = tenths(m.Low), tenths(m.High)
	return r
}

func tenths(v float64) float64 { return math.Round(v*10) / 10 }

// linked adds an event of a record by its reference.
func (a *painter) linked(day calendar.Date, lane, label, state, ref string) {
	if rec, ok := a.file.Refs.Record(ref); ok {
		a.event(day, lane, label, state, rec)
	}
}

func (a *painter) documents(list []dossier.Document) {
	for _, d := range list {
		a.linked(d.Date, "document", phrase(d.Type, strings.Join(d.Covers, ", ")), plainState, d.Ref)
	}
}

func (a *painter) instrument(d *dossier.Instrument) {
	a.fact("Kind", phrase(d.Type, ""))
	a.fact("Standard", d.Standard)
	a.number("Hearing tests made with it", d.Tests)
	if d.InUse != nil {
		a.spell("in use", "in use", plainState, d.InUse.From, d.InUse.To)
	}
	for _, c := range a.bench.builder.Registers.CalibrationsOf(d.ID) {
		s := map[string]string{"pass": goodState, "fail": badState}[c.Result]
		if s == "" {
			s = plainState
		}
		a.event(c.Date, "calibration", phrase(c.Type, c.Result), s, c)
	}
	for _, u := range d.NoiseUse {
		a.linked(u.Date, "measurement", "noise measurement", plainState, u.Ref)
	}
	for _, y := range d.Years {
		if y.Unchecked > 0 {
			a.fact(y.Year, fmt.Sprintf("%d of %d days of use without a functional check", y.Unchecked, y.Days))
		}
	}
}

func (a *painter) room(d *dossier.Room) {
	a.number("Hearing tests made in it", d.Tests)
	for _, s := range d.Surveys {
		a.linked(s.Date, "survey", phrase("survey of background noise", s.Earphones), plainState, s.Ref)
	}
}

func (a *painter) tester(d *dossier.Tester) {
	a.fact("Qualification", phrase(d.Qualification, ""))
	a.fact("Certificate", d.Certificate)
	a.number("Hearing tests made", d.Tests)
	a.number("Of them outside the certificate's validity", d.Outside)
	if t := a.bench.builder.Registers.Testers[d.ID]; t != nil && t.ValidFrom.Known() {
		to := calendar.Date(0)
		if t.ValidTo.Known() {
			to = t.ValidTo.AddDays(1)
		}
		a.spell("certificate", "certificate valid", plainState, t.ValidFrom, to)
	}
}

func (a *painter) site(d *dossier.Site) {
	a.number("Workers", d.Workers)
	a.number("In the program now", d.EnrolledNow)
	a.number("Noise measurements", d.Measurements)
	a.documents(d.Documents)
}

// ears gathers, by group, what the protectors at hand leave of the noise.
type ears struct {
	mu   sync.Mutex
	list map[string]map[string]*finding.Ear // by group and protector
}

// add looks at the protector of a worker. Of several levels under one protector the highest is shown.
func (e *ears) add(d *dossier.Worker) {
	p := d.Protection
	if p == nil || !p.Under.Known || len(d.Exposures) == 0 {
		return
	}
	group := d.Exposures[len(d.Exposures)-1].Group
	if group == "" {
		return
	}
	e.mu.Lock()
	defer e.mu.Unlock()
	if e.list == nil {
		e.list = map[string]map[string]*finding.Ear{}
	}
	if e.list[group] == nil {
		e.list[group] = map[string]*finding.Ear{}
	}
	ear := e.list[group][p.Protector]
	if ear == nil {
		ear = &finding.Ear{Protector: p.Protector}
		e.list[group][p.Protector] = ear
	}
	ear.Workers++
	if under := tenths(p.Under.Value); under > ear.DB || ear.Method == "" {
		ear.DB, ear.Method, ear.Band = under, p.Method, bandWord(p.Band)
	}
}

func bandWord(band string) string {
	return map[string]string{"too little": "too_little", "enough, but little": "good", "good": "good", "enough, but much": "much", "too much": "too_much"}[band]
}

func (e *ears) of(group string) []finding.Ear {
	out := []finding.Ear{}
	for _, ear := range e.list[group] {
		out = append(out, *ear)
	}
	slices.SortFunc(out, func(a, b finding.Ear) int { return cmp.Compare(a.Protector, b.Protector) })
	return out
}
