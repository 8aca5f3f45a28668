package intake

import (
	"bytes"
	"fmt"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// register remembers what was accepted, as far as later rows must agree with it.
type register struct {
	ledger       *Ledger
	sites        map[string]bool
	siteNames    []string
	workers      map[string]*person
	outWorkers   map[string]record.Origin // workers none of whose rows was accepted so far
	workerFiles  int                      // inputs of kind worker
	workersMay   bool                     // a file of workers was refused, so unknown workers may be in it
	ids          map[record.Kind]map[string]record.Origin
	measurements map[string]measured

	table         *record.Table // of the current input
	column        columns       // of the current input
	previous, now []byte        // compact form of the row accepted last and of the current row
}

// columns are the fields of a table that the register looks at; -1 where the table has none.
type columns struct{ id, worker, site int }

// measured is what the rows of one measurement must share.
type measured struct {
	date                record.Date
	group, worker, area string
	at                  record.Origin
}

func newRegister(p *program.Program, l *Ledger) *register {
	g := &register{
		ledger: l, sites: map[string]bool{}, workers: map[string]*person{}, outWorkers: map[string]record.Origin{},
		ids: map[record.Kind]map[string]record.Origin{}, measurements: map[string]measured{},
	}
	for _, s := range p.Sites {
		g.sites[s.ID] = true
		g.siteNames = append(g.siteNames, s.ID)
	}
	for _, s := range p.Sources {
		if s.Kind == "worker" {
			g.workerFiles++
		}
	}
	return g
}

// begin starts an input.
func (g *register) begin(t *record.Table) {
	g.table, g.column = t, columns{id: -1, worker: t.Index("worker_id"), site: t.Index("site")}
	for i := range t.Fields {
		if t.Fields[i].ID {
			g.column.id = i
		}
	}
	if g.column.id >= 0 && g.ids[t.Kind] == nil {
		g.ids[t.Kind] = map[string]record.Origin{}
	}
	g.previous = g.previous[:0]
}

// refused notes that a file of this kind could not be read to its end.
func (g *register) refused(k record.Kind) {
	if k == "worker" {
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
		g.outWorkers[w.WorkerID] = w.At()
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
		return g.admitWorker(w)
	}
	worker := ""
	if g.column.worker >= 0 {
		worker = g.table.Text(r, g.column.worker)
	}
	if worker != "" && g.workers[worker] == nil && !g.workersMay {
		return g.orphan(worker)
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

func (g *register) orphan(worker string) *record.Problem {
	shown := record.Shorten(worker)
	if at, ok := g.outWorkers[worker]; ok {
		return refuse("worker_id", worker, "Mend the worker's row first", "the row of worker %q (%s) was rejected, so this row belongs to nobody", shown, g.place(at))
	}
	if g.workerFiles == 0 {
		return refuse("worker_id", worker, "Add a file workers.csv to the records of the program file", "the program has no file of workers, so the row of worker %q belongs to nobody", shown)
	}
	return refuse("worker_id", worker, "Correct the id (leading zeros count), or add the worker to the file of workers", "no worker has the id %q", shown)
}

func (g *register) admitID(r record.Record, id string) *record.Problem {
	seen := g.ids[g.table.Kind]
	if at, double := seen[id]; double {
		name := g.table.Fields[g.column.id].Name
		return refuse(name, id, "Remove one of the two rows, or give it an id of its own", "the %s %q was already used in %s", name, record.Shorten(id), g.place(at))
	}
	seen[strings.Clone(id)] = r.At() // the id shares memory with its whole row
	return nil
}

// checkMeasurement lets the rows of several dose channels share an id if they agree on the rest.
func (g *register) checkMeasurement(m *record.Measurement) *record.Problem {
	this := measured{m.Date, m.Group, m.WorkerID, m.Area, m.At()}
	known, double := g.measurements[m.MeasurementID]
	if !double {
		g.measurements[m.MeasurementID] = this
		return nil
	}
	field := ""
	switch {
	case known.date != this.date:
		field = "date"
	case known.group != this.group:
		field = "group"
	case known.worker != this.worker:
		field = "worker_id"
	case known.area != this.area:
		field = "area"
	default:
		return nil
	}
	return refuse("measurement_id", m.MeasurementID, "Give each measurement an id of its own; only the dose channels of one measurement share an id",
		"the measurement_id %q was already used in %s with another %s", record.Shorten(m.MeasurementID), g.place(known.at), field)
}

// checkRepeated refuses a row that repeats the accepted row before it.
func (g *register) checkRepeated(r record.Record) *record.Problem {
	at := r.At()
	r.SetAt(record.Origin{})
	g.now = record.Append(g.now[:0], r)
	r.SetAt(at)
	if bytes.Equal(g.now, g.previous) {
		return refuse("", "", "Remove the row, or correct it if something else is meant", "the row repeats the one before it")
	}
	g.previous, g.now = g.now, g.previous
	return nil
}
