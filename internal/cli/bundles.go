package cli

import (
	"io"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/report/text"
)

func (r *run) bundlesCommand() *cli.Command {
	return &cli.Command{
		Name:        "bundles",
		Usage:       "list the bundles",
		Description: examples("A bundle holds the duties of one jurisdiction as rules and dated numbers.", "hearduty bundles"),
		Flags:       []cli.Flag{outFlag(), widthFlag()},
		Action: func(c *cli.Context) error {
			if _, err := arguments(c, 0, 0); err != nil {
				return err
			}
			style, err := r.style(c)
			if err != nil {
				return err
			}
			library, err := bundle.Embedded()
			if err != nil {
				return err
			}
			return r.output(c, func(w io.Writer) error { return text.Library(w, library, plain(style)) })
		},
	}
}

func (r *run) bundleCommand() *cli.Command {
	return &cli.Command{
		Name:      "bundle",
		Usage:     "show a bundle as a rule book",
		ArgsUsage: "ID",
		Description: examples("The book has the duties in words, the numbers in force on a day, and how each paragraph is accounted for.",
			"hearduty bundle us-osha-general-industry", "hearduty bundle us-osha-general-industry --as-of 2002-12-31"),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "as-of", Usage: "show the numbers in force on `DATE`", DefaultText: "today"}, outFlag(), widthFlag(),
		},
		Action: r.bundle,
	}
}

func (r *run) bundle(c *cli.Context) error {
	args, err := arguments(c, 1, 1)
	if err != nil {
		return err
	}
	style, err := r.style(c)
	if err != nil {
		return err
	}
	library, err := bundle.Embedded()
	if err != nil {
		return err
	}
	if err := oneOf("bundle", args[0], library.IDs()); err != nil {
		return err
	}
	d, err := day(c)
	if err != nil {
		return err
	}
	if !d.Known() {
		d = r.Today()
	}
	return r.output(c, func(w io.Writer) error { return text.Book(w, library[args[0]], d, plain(style)) })
}
