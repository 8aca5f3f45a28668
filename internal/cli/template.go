package cli

import (
	"fmt"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/template"
)

// templateKinds are what can be written from templates.
var templateKinds = []string{"bundle", "duty"}

func (r *run) templateCommand() *cli.Command {
	return &cli.Command{
		Name:      "template",
		Usage:     "write a new bundle, or a new duty in a bundle, from templates",
		ArgsUsage: "bundle DIR | duty DIR NAME",
		Description: examples(
			"What is written can be rehearsed as it is; look for "+template.Mark+" in it. No file is overwritten. The name of the folder\n"+
				"of a bundle is its id.",
			"hearduty template bundle rules/quiet-company",
			"hearduty template duty rules/quiet-company fit-tested --subject worker --topic protectors",
			"hearduty rehearse rules/quiet-company",
		),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "subject", Value: dossier.KindWorker, Usage: "the duty is about a `KIND`: " + strings.Join(dossier.Kinds, ", ")},
			&cli.StringFlag{Name: "topic", Value: "records", Usage: "the duty stands under `TOPIC`: " + strings.Join(finding.Topics, ", ")},
		},
		Action: r.template,
	}
}

func (r *run) template(c *cli.Context) error {
	args, err := arguments(c, 2, 3)
	if err != nil {
		return err
	}
	if err := oneOf("template", args[0], templateKinds); err != nil {
		return err
	}
	if args[0] == "bundle" {
		return r.templateBundle(c, args[1:])
	}
	if len(args) < 3 {
		return usage("the duty has no name", "Write hearduty template duty DIR NAME, with a name such as fit-tested")
	}
	if err := oneOf("subject", c.String("subject"), dossier.Kinds); err != nil {
		return err
	}
	if err := oneOf("topic", c.String("topic"), finding.Topics); err != nil {
		return err
	}
	w, err := template.Duty(args[1], args[2], c.String("subject"), c.String("topic"))
	if err != nil {
		return err
	}
	fmt.Fprintf(r.stderr, "Wrote the duty %s into %s, and a law case into %s.\n", w.ID, w.Folder, w.Cases)
	if w.Paragraph != "" {
		fmt.Fprintf(r.stderr, "Add this to %s by hand:\n\n%s\n", w.Table, w.Paragraph)
	}
	fmt.Fprintf(r.stderr, "Fill in what says %s, and try it with: hearduty rehearse %s --duty %s\n", template.Mark, shellWord(args[1]), w.ID)
	return nil
}

func (r *run) templateBundle(c *cli.Context, args []string) error {
	if len(args) > 1 {
		return usage(fmt.Sprintf("template bundle takes one folder, and %q is one too many", args[1]), "Put a path that holds blanks in quotes")
	}
	for _, name := range []string{"subject", "topic"} {
		if c.IsSet(name) {
			return usage("a bundle has no "+name, "Leave out --%s, or write: hearduty template duty DIR NAME", name)
		}
	}
	shelf, err := bundle.NewShelf()
	if err != nil {
		return err
	}
	id, err := template.Bundle(args[0], r.Today().String(), shelf.IDs())
	if err != nil {
		return err
	}
	fmt.Fprintf(r.stderr, "Wrote the bundle %s with an example duty into %s.\nFill in what says %s, and try it with: hearduty rehearse %s\n", id, args[0], template.Mark, shellWord(args[0]))
	return nil
}
