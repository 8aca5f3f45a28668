package cli

import (
	"context"
	"fmt"
	"io"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
	"hearduty/internal/report/text"
)

func (r *run) intakeCommand() *cli.Command {
	return &cli.Command{
		Name:      "intake",
		Usage:     "only read the records, and write them as JSON, one a line",
		ArgsUsage: "[PROGRAM]",
		Description: examples(
			"Each line is one record with the place where it was read. The counts, and a sentence for each row that could\n"+
				"not become a record, go to standard error. The exit code is 1 if a row was rejected, 2 with --strict.\n"+
				"With --draft-map an export that no map describes yet is read, and a map for it proposed.",
			"hearduty intake > records.ndjson",
			"hearduty intake plants --out records.ndjson --rejects rejects.csv",
			"hearduty intake --draft-map exports/tests.xlsx --sheet Tests --out maps/tests.yaml",
		),
		Flags: append([]cli.Flag{
			outFlag(), rejectsFlag(), strictFlag(), pseudonymsFlag(), healthFlag(),
			&cli.StringFlag{Name: "ledger", Usage: "write what became of every row to `FILE` as JSON"},
		}, draftFlags()...),
		Action: r.intake,
	}
}

func rejectsFlag() cli.Flag {
	return &cli.StringFlag{Name: "rejects", Usage: "write the rejected rows to `FILE` as CSV for a spreadsheet"}
}

func strictFlag() cli.Flag {
	return &cli.BoolFlag{Name: "strict", Usage: "end with exit code 2 if any row was rejected", DisableDefaultText: true}
}

func (r *run) intake(c *cli.Context) error {
	if c.IsSet("draft-map") {
		return r.draft(c)
	}
	if err := draftOnly(c); err != nil {
		return err
	}
	args, err := arguments(c, 0, 1)
	if err != nil {
		return err
	}
	veil, err := veil(c)
	if err != nil {
		return err
	}
	p, err := r.load(c, args)
	if err != nil {
		return err
	}
	if r.Memory != nil {
		r.Memory(readingLimit)
	}
	var ledger *intake.Ledger
	err = r.output(c, func(w io.Writer) error {
		var err error
		ledger, err = normalize(r.progress(c.Context, c.String("out") == ""), p, veil, w)
		return err
	})
	if ledger == nil {
		return err
	}
	shown := ledger.Rejects
	if !c.Bool("health-detail") {
		shown = ledger.Shown()
	}
	r.ledger(ledger, shown)
	if failed := r.books(c, p, ledger); failed != nil && err == nil {
		err = failed
	}
	if err != nil {
		if ledger.Unreadable.Failed() {
			return &quietError{err}
		}
		return err
	}
	if ledger.Total().Rejected > 0 {
		r.code = exitFound
		if c.Bool("strict") {
			r.code = exitFailed
		}
	}
	return nil
}

func normalize(ctx context.Context, p *program.Program, veil *pseudonym.Veil, w io.Writer) (*intake.Ledger, error) {
	return intake.ReadVeiled(ctx, p, veil, intake.NewNDJSONWriter(w, intake.Inputs(p)).Write)
}

// books writes the files that --rejects and --ledger name.
func (r *run) books(c *cli.Context, p *program.Program, l *intake.Ledger) error {
	if err := r.rejects(c, l.Shown()); err != nil {
		return err
	}
	return r.file(c.String("ledger"), func(w io.Writer) error { return l.WriteBook(w, p.Title) })
}

// rejects writes the file that --rejects names.
func (r *run) rejects(c *cli.Context, list []intake.Reject) error {
	return r.file(c.String("rejects"), func(w io.Writer) error { return intake.WriteRejects(w, list) })
}

// file writes to the file of a flag, if it names one.
func (r *run) file(path string, write func(io.Writer) error) error {
	if path == "" {
		return nil
	}
	if err := writeFile(path, write); err != nil {
		return fmt.Errorf("%s cannot be written: %w", path, err)
	}
	return nil
}

// ledger tells on stderr what became of every row. What stands in a cell of a threshold or birth date is told on
// request only, since standard error often ends in a log.
func (r *run) ledger(l *intake.Ledger, rejects []intake.Reject) {
	r.diagnostics(l.Remarks)
	r.diagnostics(l.Unreadable)
	for _, reject := range rejects {
		if reject.Row > 0 {
			fmt.Fprintf(r.stderr, "rejected: %s\n", text.Reject(reject))
		}
	}
	for _, o := range l.Observations {
		fmt.Fprintf(r.stderr, "observed: %s.\n", intake.ObservationSentence(o))
	}
	if counts := l.ObservationCounts(); counts != nil {
		fmt.Fprintf(r.stderr, "observed in all: %s.\n", strings.Join(counts, ", "))
	}
	for i := range l.Inputs {
		r.account(l.Inputs[i].Name(), &l.Inputs[i])
	}
	total := l.Total()
	r.account("in all", &total)
}

// account tells of an input that its rows are all accounted for.
func (r *run) account(name string, in *intake.Input) {
	fmt.Fprintf(r.stderr, "%s: %s = %d accepted + %d rejected + %d not data", name, counted(in.Rows, "row"), in.Accepted, in.Rejected, in.NotData)
	if in.NotData > 0 {
		fmt.Fprintf(r.stderr, " (%s)", intake.Declared(in.Declared))
	}
	if in.Records != in.Accepted {
		fmt.Fprintf(r.stderr, "; they became %s", counted(in.Records, "record"))
	}
	fmt.Fprintln(r.stderr)
}

func counted(n int, word string) string {
	if n == 1 {
		return "1 " + word
	}
	return fmt.Sprintf("%d %ss", n, word)
}
