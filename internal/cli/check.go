package cli

import (
	"fmt"
	"io"
	"path/filepath"
	"slices"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/report"
)

func (r *run) checkCommand() *cli.Command {
	return &cli.Command{
		Name:      "check",
		Usage:     "judge the records of a program and list what is not fulfilled",
		ArgsUsage: "[PROGRAM]",
		Description: examples(
			"PROGRAM is a program file or the folder that holds program.yaml; the current folder, if it is left out.\n"+
				"The exit code is 0 if nothing is found of what --fail-on names, 1 if something is, 2 if the check was not possible\n"+
				"or, with --strict, if any row was rejected.",
			"hearduty check",
			"hearduty check plants/program.yaml --site kiln-hill --as-of 2026-06-30",
			"hearduty check --format json --out report.json --fail-on gap,unproven,reject",
		),
		Flags: []cli.Flag{
			asOfFlag(), siteFlag(), bundleFlag(), policiesFlag(), policiesKeyFlag(),
			&cli.StringFlag{Name: "format", Value: report.Names()[0], Usage: "write the report as `NAME`: " + strings.Join(report.Names(), ", ")},
			outFlag(), rejectsFlag(), strictFlag(),
			&cli.StringFlag{Name: "ahead", Value: "90d", Usage: "list what is due within `DAYS`"},
			&cli.BoolFlag{Name: "all", Usage: "list what is met, lifted or due later, and each observation", DisableDefaultText: true},
			&cli.StringFlag{Name: "fail-on", Value: "gap,unproven", Usage: "end with exit code 1 if there is any of these `STATUSES`, or a rejected row (reject), an accepted finding (accepted), or never (none)"},
			pseudonymsFlag(), healthFlag(), widthFlag(), parallelFlag(),
		},
		Action: r.check,
	}
}

func (r *run) check(c *cli.Context) error {
	args, err := arguments(c, 0, 1)
	if err != nil {
		return err
	}
	fails, err := failOn(c)
	if err != nil {
		return err
	}
	style, err := r.style(c)
	if err != nil {
		return err
	}
	if err := oneOf("format", c.String("format"), report.Names()); err != nil {
		return err
	}
	format, _ := report.Named(c.String("format"), style)
	if _, terminal := r.terminal(); terminal && c.String("out") == "" && report.Binary(format) {
		return usage("a workbook cannot be shown on a terminal", "Name a file with --out, such as --out report.xlsx")
	}
	days, err := ahead(c)
	if err != nil {
		return err
	}
	options, err := r.options(c, args)
	if err != nil {
		return err
	}
	options.AheadDays, options.All, options.Portraits = days, c.Bool("all"), report.Draws(format)
	result, err := judge.Check(r.progress(c.Context, false), options)
	if err != nil {
		return err
	}
	if err := r.rejects(c, result.Rejects); err != nil {
		return err
	}
	if err := r.write(c, format, result); err != nil {
		return err
	}
	if path := c.String("out"); path != "" {
		fmt.Fprintf(r.stderr, "Wrote %s: %s.\n", path, counts(result))
	}
	if found(result, fails.statuses) || fails.reject && len(result.Rejects) > 0 || fails.accepted && accepted(result) > 0 {
		r.code = exitFound
	}
	if c.Bool("strict") && len(result.Rejects) > 0 {
		r.code = exitFailed
	}
	return nil
}

// write writes the report, and beside it one file a site if the form holds no more.
func (r *run) write(c *cli.Context, format report.Format, result *finding.Report) error {
	path := c.String("out")
	parts := report.Split(format, result)
	if len(parts) == 0 || path == "" {
		return r.output(c, func(w io.Writer) error { return format.Write(w, result) })
	}
	for _, part := range parts {
		ending := filepath.Ext(path)
		name := strings.TrimSuffix(path, ending) + "-" + part.Site + ending
		if err := writeFile(name, func(w io.Writer) error { return format.Write(w, part.Report) }); err != nil {
			return fmt.Errorf("%s cannot be written: %w", name, err)
		}
		fmt.Fprintf(r.stderr, "Wrote %s: the findings of site %s, since one page holds no more than it can show quickly.\n", name, part.Site)
	}
	return r.output(c, func(w io.Writer) error { return format.Write(w, result) })
}

// options reads the program and the flags that check and explain share.
func (r *run) options(c *cli.Context, args []string) (judge.Options, error) {
	var o judge.Options
	var err error
	if o.Parallel, err = parallel(c); err != nil {
		return o, err
	}
	if _, err = day(c); err != nil {
		return o, err
	}
	if o.Veil, err = veil(c); err != nil {
		return o, err
	}
	if o.Program, err = r.load(c, args); err != nil {
		return o, err
	}
	shelf, err := r.library(c)
	if err != nil {
		return o, err
	}
	if o.Sites, err = choose(c, o.Program, shelf.IDs()); err != nil {
		return o, err
	}
	if o.Library, err = taken(shelf, o.Program, o.Sites, c.String("bundle")); err != nil {
		return o, err
	}
	if o.AsOf, err = r.judged(c, o.Program); err != nil {
		return o, err
	}
	if o.Accepted, err = r.accepted(o.Program); err != nil {
		return o, discreet(c, err)
	}
	o.Bundle, o.HealthDetail, o.Version = c.String("bundle"), c.Bool("health-detail"), Version
	return o, nil
}

// found says whether the report has a finding of one of the statuses. Of what is due, only what is
// listed counts, that is what is due within the days looked ahead.
func found(r *finding.Report, statuses []finding.Status) bool {
	for _, s := range statuses {
		if s != finding.Due && r.Totals[s] > 0 {
			return true
		}
	}
	return slices.Contains(statuses, finding.Due) && slices.ContainsFunc(r.Findings, func(f finding.Finding) bool { return f.Status == finding.Due })
}

func counts(r *finding.Report) string {
	var parts []string
	for _, s := range finding.Statuses {
		parts = append(parts, fmt.Sprintf("%d %s", r.Totals[s], s))
	}
	if n := accepted(r); n > 0 {
		parts = append(parts, fmt.Sprintf("%d accepted and counted apart", n))
	}
	switch n := len(r.Rejects); n {
	case 0:
	case 1:
		parts = append(parts, "1 rejected row")
	default:
		parts = append(parts, fmt.Sprintf("%d rejected rows", n))
	}
	return strings.Join(parts, ", ")
}
