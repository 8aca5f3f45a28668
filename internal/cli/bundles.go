package cli

import (
	"io"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/report/rulebook"
	"hearduty/internal/report/text"
)

func (r *run) bundlesCommand() *cli.Command {
	return &cli.Command{
		Name:        "bundles",
		Usage:       "list the bundles",
		Description: examples("A bundle holds the duties of one jurisdiction as rules and dated numbers.", "hearduty bundles"),
		Flags:       []cli.Flag{policiesFlag(), policiesKeyFlag(), outFlag(), widthFlag()},
		Action: func(c *cli.Context) error {
			if _, err := arguments(c, 0, 0); err != nil {
				return err
			}
			style, err := r.style(c)
			if err != nil {
				return err
			}
			shelf, err := r.library(c)
			if err != nil {
				return err
			}
			heads, err := shelf.Heads()
			if err != nil {
				return err
			}
			return r.output(c, func(w io.Writer) error { return text.Library(w, heads, plain(style)) })
		},
	}
}

func (r *run) bundleCommand() *cli.Command {
	return &cli.Command{
		Name:      "bundle",
		Usage:     "show a bundle as a rule book",
		ArgsUsage: "ID",
		Description: examples("The book says in plain words what is asked, of whom, when and by which paragraph, with the numbers in force on a day, how each paragraph is accounted for, and what rests on memory.",
			"hearduty bundle us-osha-general-industry", "hearduty bundle us-osha-general-industry --as-of 2002-12-31",
			"hearduty bundle company-example --format markdown --out rules.md"),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "as-of", Usage: "show the numbers in force on `DATE`", DefaultText: "today"},
			&cli.StringFlag{Name: "format", Value: rulebook.Forms[0], Usage: "write the book as `NAME`: " + strings.Join(rulebook.Forms, ", ")},
			policiesFlag(), policiesKeyFlag(), outFlag(), widthFlag(),
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
	if err := oneOf("format", c.String("format"), rulebook.Forms); err != nil {
		return err
	}
	shelf, err := r.library(c)
	if err != nil {
		return err
	}
	if err := oneOf("bundle", args[0], shelf.IDs()); err != nil {
		return err
	}
	library, err := shelf.Take(args[0])
	if err != nil {
		return err
	}
	d, err := day(c)
	if err != nil {
		return err
	}
	if !d.Known() {
		d = r.Today()
	}
	book := rulebook.Of(library[args[0]], d)
	if c.String("format") == "markdown" {
		return r.output(c, book.Markdown)
	}
	return r.output(c, func(w io.Writer) error { return text.Book(w, book, plain(style)) })
}
