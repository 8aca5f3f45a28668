package cli

import (
	"errors"
	"fmt"
	"io"

	"github.com/urfave/cli/v2"

	"hearduty/internal/judge"
	"hearduty/internal/report/text"
)

func (r *run) explainCommand() *cli.Command {
	return &cli.Command{
		Name:      "explain",
		Usage:     "show how one finding came about: records, numbers, rule, citation",
		ArgsUsage: "FINDING [PROGRAM]",
		Description: examples(
			"FINDING is the id of a finding, or as much of its beginning as no other finding has.\n"+
				"Give the same --as-of, --site, --bundle and --pseudonyms as in the check that listed it.",
			"hearduty explain f-91425f4c",
			"hearduty explain f-91425f4c plants --as-of 2026-06-30",
		),
		Flags:  []cli.Flag{asOfFlag(), siteFlag(), bundleFlag(), policiesFlag(), policiesKeyFlag(), outFlag(), pseudonymsFlag(), healthFlag(), widthFlag(), parallelFlag()},
		Action: r.explain,
	}
}

func (r *run) explain(c *cli.Context) error {
	args, err := arguments(c, 1, 2)
	if err != nil {
		return err
	}
	style, err := r.style(c)
	if err != nil {
		return err
	}
	options, err := r.options(c, args[1:])
	if err != nil {
		return err
	}
	options.All = true
	e, err := judge.Explain(c.Context, options, args[0])
	if errors.Is(err, judge.ErrNoFinding) {
		return usage(fmt.Sprintf("no finding has the id %q as of %s", args[0], options.AsOf), "Take an id from `hearduty check --all`, with the same --as-of, --site and --bundle")
	}
	if err != nil {
		return err
	}
	return r.output(c, func(w io.Writer) error { return text.Explain(w, e, plain(style)) })
}
