package cli

import (
	"runtime"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/report"
	"hearduty/internal/report/text"
)

func asOfFlag() cli.Flag {
	return &cli.StringFlag{Name: "as-of", Usage: "judge as of `DATE`, such as 2026-06-30", DefaultText: "as_of of the program file, else today"}
}

func siteFlag() cli.Flag {
	return &cli.StringSliceFlag{Name: "site", Usage: "judge only the site `ID`; can be repeated"}
}

func bundleFlag() cli.Flag {
	return &cli.StringFlag{Name: "bundle", Usage: "judge by the bundle `ID` instead of the sites' own"}
}

func outFlag() cli.Flag {
	return &cli.StringFlag{Name: "out", Usage: "write to `FILE` instead of standard output"}
}

func healthFlag() cli.Flag {
	return &cli.BoolFlag{Name: "health-detail", Usage: "show audiometric figures; they are medical records", DisableDefaultText: true}
}

func widthFlag() cli.Flag {
	return &cli.IntFlag{Name: "width", Usage: "write lines of `N` characters, 40 at least", DefaultText: "as the terminal, else 80"}
}

func parallelFlag() cli.Flag {
	return &cli.IntFlag{Name: "parallel", Usage: "judge `N` subjects at a time", DefaultText: "one a processor"}
}

// parallel reads the flag --parallel.
func parallel(c *cli.Context) (int, error) {
	n := c.Int("parallel")
	if n < 0 || n > 64*max(runtime.NumCPU(), 16) {
		return 0, usage("--parallel is out of range", "Write a small number such as 4, or leave it out")
	}
	return n, nil
}

const (
	leastWidth = 40
	mostWidth  = 120 // of a terminal; longer lines are hard to read
)

// style says how to write for people: the width that the flag or the terminal gives, colour only on a
// terminal that may have it.
func (r *run) style(c *cli.Context) (report.Options, error) {
	if c.IsSet("width") {
		n := c.Int("width")
		if n < leastWidth || n > 1000 {
			return report.Options{}, usage("--width is out of range", "Write a number from %d to 1000", leastWidth)
		}
		return report.Options{Width: n, Colour: r.colour(c)}, nil
	}
	o := report.Options{Colour: r.colour(c)}
	if columns, ok := r.terminal(); ok && c.String("out") == "" {
		o.Width = min(max(columns, leastWidth), mostWidth)
	}
	return o, nil
}

func (r *run) colour(c *cli.Context) bool {
	_, ok := r.terminal()
	return ok && c.String("out") == "" && r.Getenv != nil && r.Getenv("NO_COLOR") == "" && r.Getenv("TERM") != "dumb"
}

func (r *run) terminal() (int, bool) {
	if r.Terminal == nil {
		return 0, false
	}
	return r.Terminal(r.stdout)
}

func plain(o report.Options) text.Format { return text.Format{Width: o.Width, Colour: o.Colour} }

// examples puts example commands under a description.
func examples(description string, lines ...string) string {
	return description + "\n\nExamples:\n   " + strings.Join(lines, "\n   ")
}
