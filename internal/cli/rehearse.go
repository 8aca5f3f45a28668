package cli

import (
	"fmt"
	"os"
	"path/filepath"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/rehearse"
)

func (r *run) rehearseCommand() *cli.Command {
	return &cli.Command{
		Name:      "rehearse",
		Usage:     "try out a bundle: the tests of its rules and its law cases",
		ArgsUsage: "BUNDLE",
		Description: examples(
			"BUNDLE is the id of a bundle, or the folder or .tar.gz of one. Beside a folder, the shared rules and the bundles that\n"+
				"it extends are looked for, and otherwise taken from those embedded. The exit code is 0 if all holds, 1 if something\n"+
				"is wrong, 2 if the bundle cannot be loaded.",
			"hearduty rehearse policies/company-example",
			"hearduty rehearse policies/company-example --duty fit-tested",
			"hearduty rehearse us-osha-general-industry --cases 'audio*'",
		),
		Flags: []cli.Flag{
			&cli.StringFlag{Name: "duty", Usage: "try only the duty `NAME`, such as fit-tested"},
			&cli.StringFlag{Name: "cases", Usage: "judge only the law cases of files whose names fit `PATTERN`"},
			policiesFlag(), policiesKeyFlag(), outFlag(),
		},
		Action: r.rehearse,
	}
}

func (r *run) rehearse(c *cli.Context) error {
	args, err := arguments(c, 1, 1)
	if err != nil {
		return err
	}
	o := rehearse.Options{Duty: strings.ReplaceAll(c.String("duty"), "_", "-"), Cases: c.String("cases")}
	if _, err := filepath.Match(o.Cases, "x"); err != nil {
		return usage("--cases is no pattern", "Write such as 'audio*', with * for any characters")
	}
	b, err := r.bundleToRehearse(c, args[0])
	if err != nil {
		return err
	}
	if o.Duty != "" {
		var own []string
		for _, d := range b.Duties {
			if d.From == b.ID {
				own = append(own, d.ID)
			}
		}
		if err := oneOf("duty", o.Duty, own); err != nil {
			return err
		}
	}
	result, err := rehearse.Run(c.Context, b, o)
	if err != nil {
		return err
	}
	if result.Failed() {
		r.code = exitFound
	}
	return r.output(c, result.Write)
}

// bundleToRehearse loads the bundle that an argument names, and no other but those that it extends.
func (r *run) bundleToRehearse(c *cli.Context, name string) (*bundle.Bundle, error) {
	id := name
	var more []string
	if isPath(name) {
		more = append(more, name)
	}
	list, err := sources(c, more...)
	if err != nil {
		return nil, err
	}
	if len(more) > 0 {
		ids := list[len(list)-1].IDs
		if len(ids) > 1 {
			return nil, usage(fmt.Sprintf("%s holds %d bundles, and one is rehearsed at a time", name, len(ids)), "Name one of them: %s", strings.Join(ids, ", "))
		}
		id = ids[0]
	}
	shelf, err := bundle.NewShelf(list...)
	if err != nil {
		return nil, err
	}
	if err := oneOf("bundle", id, shelf.IDs()); err != nil {
		return nil, err
	}
	b, problems := shelf.Open(id)
	r.diagnostics(problems)
	if problems.Failed() {
		return nil, &quietError{problems}
	}
	return b, nil
}

// isPath says whether an argument names a folder or an archive, not the id of a bundle.
func isPath(name string) bool {
	if strings.ContainsRune(name, '/') || strings.ContainsRune(name, filepath.Separator) || name == "." || name == ".." || bundle.IsArchive(name) {
		return true
	}
	_, err := os.Stat(filepath.Join(name, ".manifest"))
	return err == nil
}
