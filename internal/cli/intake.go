package cli

import (
	"context"
	"fmt"
	"io"

	"github.com/urfave/cli/v2"

	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/report/text"
)

func (r *run) intakeCommand() *cli.Command {
	return &cli.Command{
		Name:      "intake",
		Usage:     "only read the records, and write them as JSON, one a line",
		ArgsUsage: "[PROGRAM]",
		Description: examples(
			"Each line is one record with the place where it was read. The counts, and a sentence for each row that could\n"+
				"not become a record, go to standard error. The exit code is 1 if a row was rejected.",
			"hearduty intake > records.ndjson", "hearduty intake plants --out records.ndjson",
		),
		Flags:  []cli.Flag{outFlag()},
		Action: r.intake,
	}
}

func (r *run) intake(c *cli.Context) error {
	args, err := arguments(c, 0, 1)
	if err != nil {
		return err
	}
	p, err := r.load(args)
	if err != nil {
		return err
	}
	var ledger *intake.Ledger
	err = r.output(c, func(w io.Writer) error {
		var err error
		ledger, err = normalize(c.Context, p, w)
		return err
	})
	if ledger != nil {
		r.ledger(ledger)
	}
	if err != nil {
		if ledger != nil && ledger.Unreadable.Failed() {
			return &quietError{err}
		}
		return err
	}
	if _, _, rejected := ledger.Totals(); rejected > 0 {
		r.code = exitFound
	}
	return nil
}

func normalize(ctx context.Context, p *program.Program, w io.Writer) (*intake.Ledger, error) {
	inputs := make([]intake.Input, len(p.Sources))
	for i, s := range p.Sources {
		inputs[i] = intake.Input{File: s.Shown, Sheet: s.Sheet, Kind: s.Kind}
	}
	return intake.Read(ctx, p, intake.NewNDJSONWriter(w, inputs).Write)
}

// ledger tells on stderr what became of every row.
func (r *run) ledger(l *intake.Ledger) {
	r.diagnostics(l.Remarks)
	r.diagnostics(l.Unreadable)
	for _, reject := range l.Rejects {
		if reject.Row > 0 {
			fmt.Fprintf(r.stderr, "rejected: %s\n", text.Reject(reject))
		}
	}
	for _, in := range l.Inputs {
		name := in.File
		if in.Sheet != "" {
			name += " " + in.Sheet
		}
		r.account(name, in.Rows, in.Accepted, in.Rejected)
	}
	rows, accepted, rejected := l.Totals()
	r.account("in all", rows, accepted, rejected)
}

func (r *run) account(name string, rows, accepted, rejected int) {
	word := "rows"
	if rows == 1 {
		word = "row"
	}
	fmt.Fprintf(r.stderr, "%s: %d %s = %d accepted + %d rejected\n", name, rows, word, accepted, rejected)
}
