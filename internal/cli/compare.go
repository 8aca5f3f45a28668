package cli

import (
	"errors"
	"fmt"
	"io"
	"io/fs"
	"os"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/finding"
	"hearduty/internal/report/change"
)

// comparingLimit is the memory that a comparison aims to stay below. It holds two reports at once.
const comparingLimit = 2 << 30

func (r *run) compareCommand() *cli.Command {
	return &cli.Command{
		Name:      "compare",
		Usage:     "say what changed between two reports, and why",
		ArgsUsage: "OLD NEW",
		Description: examples(
			"OLD and NEW are reports that hearduty check --format json has written; with --all, what became met is named, too.\n"+
				"The exit code is 0 if nothing opened or worsened, 1 if something did, 2 if the reports could not be compared.",
			"hearduty compare march.json june.json",
			"hearduty compare march.json june.json --format html --out changes.html",
		),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "format", Value: change.Names[0], Usage: "write the comparison as `NAME`: " + strings.Join(change.Names, ", ")},
			outFlag(), widthFlag(),
		},
		Action: r.compare,
	}
}

func (r *run) compare(c *cli.Context) error {
	args, err := arguments(c, 2, 2)
	if err != nil {
		return err
	}
	style, err := r.style(c)
	if err != nil {
		return err
	}
	if err := oneOf("format", c.String("format"), change.Names); err != nil {
		return err
	}
	if r.Memory != nil {
		r.Memory(comparingLimit)
	}
	var reports [2]*finding.Report
	for i, path := range args {
		if reports[i], err = readReport(path); err != nil {
			return err
		}
	}
	comparison, err := finding.CompareReports(reports[0], reports[1], finding.Tool{Name: "hearduty", Version: Version})
	if err != nil {
		return fmt.Errorf("%s and %s: %w; compare reports of the same program, or judge both with the same --site and --bundle", args[0], args[1], err)
	}
	if err := r.output(c, func(w io.Writer) error { return change.Write(w, comparison, c.String("format"), plain(style)) }); err != nil {
		return err
	}
	if path := c.String("out"); path != "" {
		fmt.Fprintf(r.stderr, "Wrote %s: %s.\n", path, changed(comparison))
	}
	if comparison.Worse() {
		r.code = exitFound
	}
	return nil
}

// readReport reads a report that was written as JSON.
func readReport(path string) (*finding.Report, error) {
	f, err := os.Open(path)
	if errors.Is(err, fs.ErrNotExist) {
		return nil, fmt.Errorf("%s: there is no such file; write a report with `hearduty check --format json --out FILE`", path)
	}
	var report *finding.Report
	if err == nil {
		defer f.Close()
		report, err = finding.Decode(f, Version)
	}
	var at *fs.PathError
	if errors.As(err, &at) {
		err = at.Err
	}
	if err != nil {
		return nil, fmt.Errorf("%s cannot be compared: %w", path, err)
	}
	return report, nil
}

func changed(c *finding.Comparison) string {
	var parts []string
	for _, kind := range finding.ChangeKinds {
		if n := c.Numbers[kind]; n > 0 {
			parts = append(parts, fmt.Sprintf("%d %s", n, kind.Words()))
		}
	}
	if len(parts) == 0 {
		return "nothing changed"
	}
	return strings.Join(parts, ", ")
}
