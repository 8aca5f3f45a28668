package cli

import (
	"fmt"

	"github.com/urfave/cli/v2"

	"hearduty/internal/demo"
)

const mostWorkers = 1_000_000

func (r *run) demoCommand() *cli.Command {
	return &cli.Command{
		Name:      "demo",
		Usage:     "write an invented program into a new folder",
		ArgsUsage: "DIR",
		Description: examples("Every name and number in it is invented.",
			"hearduty demo trial && hearduty check trial", "hearduty demo large --workers 20000"),
		Flags: []cli.Flag{
			&cli.IntFlag{Name: "workers", Usage: "write a program with `N` workers, for measuring speed", DefaultText: "the small program with findings of every status"},
		},
		Action: r.demo,
	}
}

func (r *run) demo(c *cli.Context) error {
	args, err := arguments(c, 1, 1)
	if err != nil {
		return err
	}
	write := demo.Write
	if c.IsSet("workers") {
		n := c.Int("workers")
		if n < 1 || n > mostWorkers {
			return usage("--workers is out of range", "Write a number from 1 to %d", mostWorkers)
		}
		write = func(dir string) error { return demo.WriteScale(dir, n) }
	}
	if err := write(args[0]); err != nil {
		return err
	}
	fmt.Fprintf(r.stderr, "Wrote a demo program. Judge it with: hearduty check %s\n", shellWord(args[0]))
	return nil
}
