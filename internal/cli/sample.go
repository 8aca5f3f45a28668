package cli

import (
	"fmt"
	"io"
	"math/big"
	"strconv"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/judge"
	"hearduty/internal/report/pull"
	"hearduty/internal/sample"
)

func (r *run) sampleCommand() *cli.Command {
	return &cli.Command{
		Name:      "sample",
		Usage:     "draw worker files to pull by hand, and say what they have shown",
		ArgsUsage: "[PROGRAM]",
		Description: examples(
			"Draws, by site and band of noise exposure, as few files of employed workers as can show that no more of all files\n"+
				"are faulty than tolerated, and writes a sheet to tick. Once it is ticked, --found or --faulty says how many files\n"+
				"are faulty at most. The sizes and bounds are those of the hypergeometric distribution, worked out exactly.\n"+
				"PROGRAM is a program file or the folder that holds program.yaml; the current folder, if it is left out.",
			"hearduty sample",
			"hearduty sample plants --site kiln-hill --enrolled --confidence 90 --tolerable 10 --format html --out sheet.html",
			"hearduty sample plants --seed 4711 --format csv --out sheet.csv",
			"hearduty sample --found sheet.csv",
			"hearduty sample --faulty 2 --of 38 --population 104",
		),
		Flags: append(append([]cli.Flag{asOfFlag(), siteFlag(), bundleFlag(), policiesFlag(), policiesKeyFlag()}, drawFlags()...), append(foundFlags(),
			&cli.StringFlag{Name: "format", Value: pull.Names()[0], Usage: "write the sheet as `NAME`: " + strings.Join(pull.Names(), ", ")},
			outFlag(), widthFlag(), parallelFlag(), pseudonymsFlag())...),
		Action: r.sample,
	}
}

// drawFlags say what to draw.
func drawFlags() []cli.Flag {
	return []cli.Flag{
		&cli.BoolFlag{Name: "enrolled", Usage: "only workers whom their exposure puts into the program", DisableDefaultText: true},
		&cli.StringFlag{Name: "confidence", Value: "95", Usage: "confidence of what is shown, in `PERCENT`"},
		&cli.StringFlag{Name: "tolerable", Value: "5", Usage: "share of faulty files that is tolerated, in `PERCENT`"},
		&cli.IntFlag{Name: "expect", Usage: "let the sample hold `N` faulty files and still show it; it becomes larger", DefaultText: "0"},
		&cli.IntFlag{Name: "size", Usage: "draw `N` files, whatever they can show", DefaultText: "the smallest number that shows it"},
		&cli.StringFlag{Name: "seed", Usage: "draw with the seed `N`", DefaultText: "made of the program file and the day"},
	}
}

// foundFlags say what was found in a sample.
func foundFlags() []cli.Flag {
	return []cli.Flag{
		&cli.StringFlag{Name: "found", Usage: "say what the ticked sheet `FILE` has shown (CSV or workbook)"},
		&cli.IntFlag{Name: "faulty", Usage: "say what a sample with `N` faulty files has shown", DefaultText: "none"},
		&cli.IntFlag{Name: "of", Usage: "the number `N` of files in that sample", DefaultText: "none"},
		&cli.IntFlag{Name: "population", Usage: "the number `N` of files from which it was drawn", DefaultText: "none"},
	}
}

// whileFound are the flags that go with --found or --faulty.
var whileFound = []string{"found", "faulty", "of", "population", "confidence", "tolerable", "out", "width"}

func (r *run) sample(c *cli.Context) error {
	style, err := r.style(c)
	if err != nil {
		return err
	}
	goal, err := goalOf(c)
	if err != nil {
		return err
	}
	if result, err := shownBy(c, goal); result != nil || err != nil {
		if err != nil {
			return err
		}
		return r.output(c, func(w io.Writer) error { return result.Write(w, style.Width) })
	}
	sheet, err := r.drawn(c, goal)
	if err != nil {
		return err
	}
	for _, f := range pull.Formats {
		if f.Name == c.String("format") {
			err = r.output(c, func(w io.Writer) error { return f.Write(w, sheet, style.Width) })
		}
	}
	if path := c.String("out"); path != "" && err == nil {
		fmt.Fprintf(r.stderr, "Wrote %s: %d of %d files, seed %d.\n", path, len(sheet.Files), sheet.Population, sheet.Seed)
	}
	return err
}

// drawn draws the files.
func (r *run) drawn(c *cli.Context, goal sample.Goal) (*pull.Sheet, error) {
	args, err := arguments(c, 0, 1)
	if err != nil {
		return nil, err
	}
	if err := oneOf("format", c.String("format"), pull.Names()); err != nil {
		return nil, err
	}
	if c.IsSet("size") && c.Int("size") < 1 {
		return nil, usage("--size cannot be less than 1", "Write the number of files to draw, or leave it out")
	}
	options, err := r.options(c, args)
	if err != nil {
		return nil, err
	}
	request := pull.Request{Program: options.Program.Title, AsOf: options.AsOf, Goal: goal, Size: c.Int("size"),
		Seed: sample.Seed(options.Program.Digest, options.AsOf.String()), Enrolled: c.Bool("enrolled"), Veiled: options.Veil != nil}
	if c.IsSet("seed") {
		if request.Seed, err = strconv.ParseUint(c.String("seed"), 10, 64); err != nil {
			return nil, usage(fmt.Sprintf("--seed cannot be %q", c.String("seed")), "Write a whole number, such as 4711")
		}
	}
	people, err := judge.Population(r.progress(c.Context, false), options)
	if err != nil {
		return nil, err
	}
	return pull.Draw(people, request)
}

// shownBy gives what --found or --faulty tell of a sample, and nothing if neither is set.
func shownBy(c *cli.Context, goal sample.Goal) (*pull.Result, error) {
	if !c.IsSet("found") && !c.IsSet("faulty") && !c.IsSet("of") && !c.IsSet("population") {
		return nil, nil
	}
	if err := onlyFlags(c, whileFound); err != nil {
		return nil, err
	}
	if !c.IsSet("found") {
		if !c.IsSet("faulty") || !c.IsSet("of") || !c.IsSet("population") {
			return nil, usage("what a sample has shown needs three numbers", "Write `hearduty sample --faulty N --of N --population N`, or --found FILE")
		}
		result := &pull.Result{Faulty: c.Int("faulty"), Drawn: c.Int("of"), Population: c.Int("population"), Goal: goal}
		return result, result.Check()
	}
	if c.IsSet("faulty") || c.IsSet("of") || c.IsSet("population") {
		return nil, usage("--found cannot stand beside --faulty, --of or --population", "Leave out either: the sheet holds the numbers")
	}
	result, err := pull.Read(c.String("found"))
	if err != nil {
		return nil, err
	}
	if c.IsSet("confidence") {
		result.Goal.Confidence = goal.Confidence
	}
	if c.IsSet("tolerable") {
		result.Goal.Tolerable = goal.Tolerable
	}
	return result, nil
}

// onlyFlags refuses flags and arguments that do not go with --found or --faulty.
func onlyFlags(c *cli.Context, names []string) error {
	if c.Args().Present() {
		return usage("what a sample has shown needs no program", "Leave out %s", c.Args().First())
	}
	for _, f := range c.Command.Flags {
		if name := f.Names()[0]; c.IsSet(name) && oneOf("", name, names) != nil {
			return usage(fmt.Sprintf("--%s does not go with --found or --faulty", name), "Leave it out: the draw is over")
		}
	}
	return nil
}

// goalOf reads what the sample is to show.
func goalOf(c *cli.Context) (sample.Goal, error) {
	var g sample.Goal
	var ok bool
	if g.Confidence, ok = pull.Percent(c.String("confidence")); !ok || g.Confidence.Cmp(leastConfidence) < 0 {
		return g, usage(fmt.Sprintf("--confidence cannot be %q", c.String("confidence")), "Write a number of percent from 50 to below 100, such as 95")
	}
	if g.Tolerable, ok = pull.Percent(c.String("tolerable")); !ok {
		return g, usage(fmt.Sprintf("--tolerable cannot be %q", c.String("tolerable")), "Write a number of percent from 0 to below 100, such as 5")
	}
	if g.Expect = c.Int("expect"); g.Expect < 0 {
		return g, usage("--expect cannot be less than 0", "Write the number of faulty files that the sample may hold, or leave it out")
	}
	return g, nil
}

// leastConfidence is the lowest confidence that says anything.
var leastConfidence = big.NewRat(1, 2)
