package cli

import (
	"errors"
	"io"
	"path/filepath"

	"github.com/urfave/cli/v2"

	"hearduty/internal/diag"
	"hearduty/internal/draft"
	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// draftDetails are the flags that say what is known of the export.
var draftDetails = []string{"kind", "sheet", "member", "encoding"}

func draftFlags() []cli.Flag {
	return []cli.Flag{
		&cli.StringFlag{Name: "draft-map", Usage: "read nothing but the export `FILE`, and propose a map for it"},
		&cli.StringFlag{Name: "kind", Usage: "with --draft-map: the rows are records of this `KIND`"},
		&cli.StringFlag{Name: "sheet", Usage: "with --draft-map: read the sheet `NAME` of the workbook"},
		&cli.StringFlag{Name: "member", Usage: "with --draft-map: read the file `NAME` within the ZIP archive"},
		&cli.StringFlag{Name: "encoding", Usage: "with --draft-map: read the text in this `CODE PAGE`, such as windows-1252"},
	}
}

// draftOnly refuses the flags that say something of an export where none is named.
func draftOnly(c *cli.Context) error {
	for _, name := range draftDetails {
		if c.IsSet(name) {
			return usage("--"+name+" is given without --draft-map", "Write it beside the file in the program file, or add --draft-map FILE")
		}
	}
	return nil
}

// draft writes a proposal for the map of an export.
func (r *run) draft(c *cli.Context) error {
	if _, err := arguments(c, 0, 0); err != nil {
		return err
	}
	for _, name := range []string{"rejects", "ledger", "strict"} {
		if c.IsSet(name) {
			return usage("--"+name+" is given with --draft-map, which reads no records", "Leave one of the two out")
		}
	}
	o := draft.Options{Kind: record.Kind(c.String("kind")), Member: c.String("member"), Sheet: c.String("sheet"), Encoding: c.String("encoding")}
	if o.Kind != "" {
		var kinds []string
		for _, k := range record.Kinds() {
			kinds = append(kinds, string(k))
		}
		if err := oneOf("record kind", string(o.Kind), kinds); err != nil {
			return err
		}
	}
	path := c.String("draft-map")
	shown := filepath.ToSlash(path)
	err := r.output(c, func(w io.Writer) error { return draft.Write(w, path, shown, o) })
	var fault *grid.Fault
	if errors.As(err, &fault) {
		at := diag.Position{File: shown, Sheet: o.Sheet, Line: fault.Line, Column: fault.Column}
		return diag.List{{Severity: diag.Error, Position: at, Problem: fault.Problem, Remedy: fault.Remedy}}
	}
	return err
}
