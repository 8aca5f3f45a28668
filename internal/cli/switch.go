package cli

import (
	"fmt"
	"io"
	"slices"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/program"
	"hearduty/internal/report/switchover"
)

func (r *run) switchCommand() *cli.Command {
	return &cli.Command{
		Name:      "switch",
		Usage:     "say what changes if another law judges the same records",
		ArgsUsage: "[PROGRAM]",
		Description: examples(
			"PROGRAM is a program file or the folder that holds program.yaml; the current folder, if it is left out.\n"+
				"The records are read once and judged by both laws. Without --from each site's own bundles are the old law.\n"+
				"Topic by topic it says which findings appear, change or vanish, and then which records the new law needs that the\n"+
				"program lacks. The exit code is 0 if the comparison was possible, else 2.",
			"hearduty switch --to company-example",
			"hearduty switch plants --from us-osha-general-industry --to company-example --site kiln-hill",
		),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "from", Usage: "the old law is the bundle `ID`", DefaultText: "each site's own bundles"},
			&cli.StringFlag{Name: "to", Usage: "the new law is the bundle `ID`"},
			asOfFlag(), siteFlag(),
			&cli.StringFlag{Name: "format", Value: switchover.Names[0], Usage: "write it as `NAME`: " + strings.Join(switchover.Names, ", ")},
			policiesFlag(), policiesKeyFlag(), outFlag(), pseudonymsFlag(), widthFlag(), parallelFlag(),
		},
		Action: r.switchover,
	}
}

func (r *run) switchover(c *cli.Context) error {
	args, err := arguments(c, 0, 1)
	if err != nil {
		return err
	}
	style, err := r.style(c)
	if err != nil {
		return err
	}
	if err := oneOf("format", c.String("format"), switchover.Names); err != nil {
		return err
	}
	if c.String("to") == "" {
		return usage("the new law is not named", "Name its bundle with --to; hearduty bundles lists them")
	}
	options, err := r.switchOptions(c, args)
	if err != nil {
		return err
	}
	result, err := judge.Switch(r.progress(c.Context, false), options, c.String("to"))
	if err != nil {
		return err
	}
	if err := r.output(c, func(w io.Writer) error { return switchover.Write(w, result, c.String("format"), plain(style)) }); err != nil {
		return err
	}
	if path := c.String("out"); path != "" {
		fmt.Fprintf(r.stderr, "Wrote %s: %s.\n", path, moved(result))
	}
	return nil
}

// switchOptions reads the program and the flags.
func (r *run) switchOptions(c *cli.Context, args []string) (judge.Options, error) {
	o := judge.Options{Bundle: c.String("from"), Version: Version}
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
	if o.Library, err = r.switchLibrary(c, o.Program); err != nil {
		return o, err
	}
	var ids []string
	for _, s := range o.Program.Sites {
		ids = append(ids, s.ID)
	}
	for _, id := range c.StringSlice("site") {
		if err := oneOf("site", id, ids); err != nil {
			return o, err
		}
	}
	o.Sites = slices.Clone(c.StringSlice("site"))
	o.AsOf, err = r.judged(c, o.Program)
	return o, err
}

// switchLibrary reads the bundles of both sides, and those of the sites, whose choices they explain.
func (r *run) switchLibrary(c *cli.Context, p *program.Program) (bundle.Library, error) {
	shelf, err := r.library(c)
	if err != nil {
		return nil, err
	}
	from, to := c.String("from"), c.String("to")
	ids := []string{to}
	if from != "" {
		ids = append(ids, from)
	} else if err := p.CheckBundles(shelf.IDs()).Err(); err != nil {
		return nil, err
	}
	for _, id := range ids {
		if err := oneOf("bundle", id, shelf.IDs()); err != nil {
			return nil, err
		}
	}
	if from == to {
		return nil, usage("--from and --to name the same bundle", "Name two bundles, or leave out --from for each site's own")
	}
	for _, s := range p.Sites {
		for _, id := range s.Bundles {
			if slices.Contains(shelf.IDs(), id) && !slices.Contains(ids, id) {
				ids = append(ids, id)
			}
		}
	}
	return shelf.Take(ids...)
}

// moved counts the subjects that stand otherwise on the new side.
func moved(s *finding.Switch) string {
	numbers := map[string]int{}
	for i := range s.Sites {
		for _, t := range s.Sites[i].Topics {
			for _, m := range t.Moves {
				numbers[m.Change] += m.Number
			}
		}
	}
	return fmt.Sprintf("counted by subject and topic, %d appear, %d change and %d vanish", numbers[finding.Appears], numbers[finding.Changes], numbers[finding.Vanishes])
}
