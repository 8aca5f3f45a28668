package intake

import (
	"fmt"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// register remembers what was accepted, as far as later rows must agree with it.
type register struct {
	repeat       *record.Problem // what was said last of a row that repeats another
	ledger       *Ledger
	sites        map[string]bool
	siteNames    []string
	workers      map[string]*person
	outWorkers   map[string]record.Origin // workers none of whose rows was accepted so far
	workerFiles  int                      // inputs of kind worker
	workersMay   bool                     // a file of workers was refused, so unknown workers may be in it
	ids          map[record.Kind]*marks[digest, record.Origin]
	measurements map[digest]measured
	likes        map[string][]string // workers by their ids without leading zeros, once it is needed

	table  *record.Table                                 // of the current input
	column columns                                       // of the current input
	rows   *marks[digest, record.Origin]                 // accepted rows of the current input, or of all inputs of its kind if there are several, by what they hold, where records have no id
	kept   map[record.Kind]*marks[digest, record.Origin] // of the kinds with several inputs
	buffer []byte
}

// columns are the fields of a table that the register looks at; -1 where the table has none.
type columns struct{ id, worker, site, day int }

// measured is what the rows of one measurement must share.
type measured struct {
	date                record.Date
	group, worker, area string
	at                  record.Origin
}

func newRegister(p *program.Program, sources []source, l *Ledger) *register {
	g := &register{
		ledger: l, sites: map[string]bool{}, workers: map[string]*person{}, outWorkers: map[string]record.Origin{},
		ids: map[record.Kind]*marks[digest, record.Origin]{}, measurements: map[digest]measured{}, kept: map[record.Kind]*marks[digest, record.Origin]{},
	}
	for _, s := range p.Sites {
		g.sites[s.ID] = true
		g.siteNames = append(g.siteNames, s.ID)
	}
	inputs := map[record.Kind]int{}
	for i := range sources {
		inputs[sources[i].kind]++
	}
	g.workerFiles = inputs["worker"]
	for kind, n := range inputs {
		if n > 1 {
			g.kept[kind] = &marks[digest, record.Origin]{}
		}
	}
	return g
}

// begin starts an input.
func (g *register) begin(t *record.Table) {
	g.table, g.column = t, columns{id: -1, worker: t.Index("worker_id"), site: t.Index("site"), day: dayField(t)}
	for i := range t.Fields {
		if t.Fields[i].ID {
			g.column.id = i
		}
	}
	if g.column.id >= 0 && g.ids[t.Kind] == nil {
		g.ids[t.Kind] = &marks[digest, record.Origin]{}
	}
	if g.rows = g.kept[t.Kind]; g.rows == nil {
		g.rows = &marks[digest, record.Origin]{}
	}
}

// refused notes that a file of this kind, empty if it is not known, could not be read to its end.
func (g *register) refused(k record.Kind) {
	if k == "worker" || k == "" {
		g.workersMay = true
	}
}

// rejected notes a row that was not accepted.
func (g *register) rejected(r record.Record) {
	w, ok := r.(*record.Worker)
	if !ok || w.WorkerID == "" {
		return
	}
	if _, known := g.outWorkers[w.WorkerID]; !known {
		g.outWorkers[strings.Clone(w.WorkerID)] = w.At() // the id shares memory with its whole row
	}
}

// admit looks whether a record agrees with those accepted before, and remembers it if it does.
func (g *register) admit(r record.Record) *record.Problem {
	if g.column.site >= 0 {
		if p := g.checkSite(g.table.Text(r, g.column.site)); p != nil {
			return p
		}
	}
	if w, ok := r.(*record.Worker); ok {
		p := g.admitWorker(w)
		switch earlier, double := g.rows.get(g.content(w)); {
		case p == nil:
			g.rows.mark(g.content(w), w.At())
		case double:
			p = g.repeated(earlier, w.At())
		}
		return p
	}
	worker := ""
	if g.column.worker >= 0 {
		worker = g.table.Text(r, g.column.worker)
	}
	if worker != "" {
		switch known := g.workers[worker]; {
		case known == nil && !g.workersMay:
			return g.orphan(worker)
		case known != nil && known.doubts != nil:
			if p := g.doubted(known, worker, r); p != nil {
				return p
			}
		}
	}
	if m, ok := r.(*record.Measurement); ok {
		if p := g.checkMeasurement(m); p != nil {
			return p
		}
		return g.checkRepeated(r)
	}
	if g.column.id >= 0 {
		return g.admitID(r, g.table.Text(r, g.column.id))
	}
	if worker != "" {
		return g.checkRepeated(r)
	}
	return nil
}

func refuse(field, read, remedy, format string, args ...any) *record.Problem {
	return &record.Problem{Severity: diag.Error, Field: field, Read: record.Shorten(read), Why: fmt.Sprintf(format, args...), Remedy: remedy}
}

// place names where an accepted row stands.
func (g *register) place(at record.Origin) string {
	in := &g.ledger.Inputs[at.Source]
	name := in.File
	if in.Sheet != "" {
		name += " " + in.Sheet
	}
	return fmt.Sprintf("%s, row %d", name, at.Row)
}

func (g *register) checkSite(site string) *record.Problem {
	if site == "" || g.sites[site] {
		return nil
	}
	remedy := "Correct the site, or add it to the program file"
	if near := diag.Near(site, g.siteNames); near != "" {
		remedy = "Write " + near + " if that is meant, or add the site to the program file"
	}
	return refuse("site", site, remedy, "the program file names no site %q", record.Shorten(site))
}

func (g *register) admitID(r record.Record, id string) *record.Problem {
	g.buffer = append(g.buffer[:0], id...)
	if at, double := g.ids[g.table.Kind].mark(digestOf(g.buffer), r.At()); double {
		name := g.table.Fields[g.column.id].Name
		return refuse(name, id, "Remove one of the two rows, or give it an id of its own", "the %s %q was already used in %s", name, record.Shorten(id), g.place(at))
	}
	return nil
}

// checkMeasurement lets the rows of several dose channels share an id if they agree on the rest.
func (g *register) checkMeasurement(m *record.Measurement) *record.Problem {
	g.buffer = append(g.buffer[:0], m.MeasurementID...)
	key := digestOf(g.buffer)
	known, double := g.measurements[key]
	if !double {
		g.measurements[key] = measured{m.Date, strings.Clone(m.Group), strings.Clone(m.WorkerID), strings.Clone(m.Area), m.At()}
		return nil
	}
	field := ""
	switch {
	case known.date != m.Date:
		field = "date"
	case known.group != m.Group:
		field = "group"
	case known.worker != m.WorkerID:
		field = "worker_id"
	case known.area != m.Area:
		field = "area"
	default:
		return nil
	}
	return refuse("measurement_id", m.MeasurementID, "Give each measurement an id of its own; only the dose channels of one measurement share an id",
		"the measurement_id %q was already used in %s with another %s", record.Shorten(m.MeasurementID), g.place(known.at), field)
}

// checkRepeated refuses a row that repeats an accepted row of its kind.
func (g *register) checkRepeated(r record.Record) *record.Problem {
	at := r.At()
	earlier, double := g.rows.mark(g.content(r), at)
	if !double {
		return nil
	}
	return g.repeated(earlier, at)
}

// content gives a digest of what a record holds, wherever it stands.
func (g *register) content(r record.Record) digest {
	at := r.At()
	r.SetAt(record.Origin{})
	g.buffer = record.Append(g.buffer[:0], r)
	r.SetAt(at)
	return digestOf(g.buffer)
}

// repeated says of the row at a place that it repeats an earlier one, and remembers that it said so.
func (g *register) repeated(earlier, at record.Origin) *record.Problem {
	g.repeat = g.repeats(earlier, at)
	return g.repeat
}

func (g *register) repeats(earlier, at record.Origin) *record.Problem {
	const remedy = "Remove the row, or correct it if something else is meant"
	switch {
	case earlier == at:
		return refuse("", "", remedy, "the row gives the same record twice")
	case earlier.Source == at.Source:
		return refuse("", "", remedy, "the row repeats row %d", earlier.Row)
	}
	return refuse("", "", remedy, "the row repeats %s", g.place(earlier))
}
