package intake

import (
	"context"
	"errors"
	"fmt"
	"io"
	"strings"

	"hearduty/internal/diag"
	"hearduty/internal/fhir"
	"hearduty/internal/grid"
	"hearduty/internal/mapping"
	"hearduty/internal/program"
	"hearduty/internal/record"
)

// source is a table of the program with what its map says.
type source struct {
	program.Source
	kind   record.Kind
	mapped *mapping.Map
	skip   bool // it was refused before anything of it was read
}

// prepare reads the maps, each once, and settles the kind of every table. What is wrong goes to the ledger.
func (in *intake) prepare(p *program.Program) []source {
	maps := map[program.Path]*mapping.Map{}
	out := make([]source, len(p.Sources))
	for i := range p.Sources {
		s := &out[i]
		s.Source, s.kind = p.Sources[i], p.Sources[i].Kind
		if s.Map == (program.Path{}) {
			continue
		}
		m, known := maps[s.Map]
		if !known {
			m = in.loadMap(s.Map)
			maps[s.Map] = m
		}
		s.mapped = m
		if m == nil {
			in.refuseSource(i, s, nil, "Mend the map first", "its map %s cannot be used", s.Map.Shown)
			continue
		}
		in.settleKind(i, s)
	}
	return out
}

func (in *intake) loadMap(file program.Path) *mapping.Map {
	m, problems := mapping.Load(file.Open, file.Shown)
	for _, d := range problems {
		if d.Severity == diag.Error {
			in.ledger.Unreadable = append(in.ledger.Unreadable, d)
		} else {
			in.ledger.Remarks = append(in.ledger.Remarks, d)
		}
	}
	if problems.Failed() {
		return nil
	}
	return m
}

// settleKind takes the kind of an export from the program file, else from its map, else from the name of the
// file.
func (in *intake) settleKind(index int, s *source) {
	if s.kind == "" {
		s.kind = s.mapped.Kind
	}
	if s.kind == "" {
		s.kind, _ = record.KindOfFile(s.Shown)
	}
	in.ledger.Inputs[index].Kind = s.kind
	if s.kind != "" {
		return
	}
	var kinds []string
	for _, k := range record.Kinds() {
		kinds = append(kinds, string(k))
	}
	remedy := "Write the key kind into the map or beside the file in the program file; the kinds are " + strings.Join(kinds, ", ")
	in.refuseSource(index, s, &s.At, remedy, "neither the program file nor the map %s says which kind of records %s holds", s.Map.Shown, s.Shown)
}

// refuseSource refuses a table before anything of it is read. Without a place the cause was told already.
func (in *intake) refuseSource(index int, s *source, at *diag.Position, remedy, format string, args ...any) {
	s.skip = true
	input := &in.ledger.Inputs[index]
	why := fmt.Sprintf(format, args...)
	in.ledger.Rejects = append(in.ledger.Rejects, Reject{File: input.File, Sheet: input.Sheet, Why: why, Remedy: remedy, Source: index})
	if at != nil {
		in.ledger.Unreadable.Errorf(*at, remedy, "%s", why)
	}
}

// open opens the file of a table and notes its digest.
func open(sink *sink, s *source) (*grid.File, error) {
	f, err := grid.Open(s.Path, s.Member)
	if err != nil {
		return nil, err
	}
	sink.input.SHA256 = f.SHA256
	if s.Sheet != "" && f.Format != grid.Workbook {
		f.Close()
		return nil, &grid.Fault{Problem: "the file is no workbook, so it has no sheets", Remedy: "Remove the key sheet from the program file, or name the workbook"}
	}
	return f, nil
}

// export reads a table by its map.
func (in *intake) export(ctx context.Context, sink *sink, s *source) error {
	f, err := open(sink, s)
	if err != nil {
		in.refuse(sink, faulty(err))
		return nil
	}
	defer f.Close()
	rows, err := in.bind(f, sink, s)
	if err != nil {
		in.refuse(sink, faulty(err))
		return nil
	}
	m := mappedSink{sink: *sink, header: func(int) string { return "" }}
	if r := s.mapped.File.Rows; r != nil {
		m.skips = r.Repeated == "skip"
	}
	if h, ok := rows.(interface{ Header(column int) string }); ok {
		m.header = h.Header
	}
	if c, ok := rows.(interface{ Column(field int) int }); ok {
		m.column = c.Column
	}
	if a, ok := rows.(interface{ About() grid.About }); ok {
		defer func() { in.about(sink.input, a.About()) }()
	}
	var out mapping.Out
	return in.rows(ctx, sink, func() error {
		if err := rows.Next(&out); err != nil {
			return endOr(err)
		}
		return taken(m.take(&out))
	})
}

// bind gives the rows of an export, and notes what the map says of the file as a whole. What the program file says of
// sheet and encoding comes before what the map says.
func (in *intake) bind(f *grid.File, sink *sink, s *source) (mapping.Source, error) {
	m := *s.mapped
	if s.Sheet != "" {
		m.File.Sheet = s.Sheet
	}
	if s.Encoding != "" {
		m.File.Encoding = s.Encoding
	}
	if m.File.Format == "fhir" {
		raw, err := f.Raw()
		if err != nil {
			return nil, err
		}
		return fhir.Open(raw, s.Shown, &m, sink.table)
	}
	rows, warnings, err := m.Bind(f, s.kind)
	for _, d := range warnings {
		if d.Position.File == "" || d.Position.File == f.Name {
			d.Position.File, d.Position.Sheet = sink.input.File, sink.input.Sheet
		}
		in.ledger.Remarks = append(in.ledger.Remarks, d)
	}
	return rows, err
}

// endOr leaves the end of the rows as it is, and makes a refusal of any other error.
func endOr(err error) error {
	if err == io.EOF {
		return err
	}
	return faulty(err)
}

// faulty makes a refusal of what a file reader says.
func faulty(err error) *refusal {
	var f *grid.Fault
	if errors.As(err, &f) {
		return &refusal{line: f.Line, column: f.Column, problem: f.Problem, remedy: f.Remedy}
	}
	return cannotRead(err)
}
