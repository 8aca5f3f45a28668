// Package cli is the command line of hearduty: commands, flags and exit codes. It holds no logic of its
// own; whatever depends on the machine, such as the clock or the terminal, is passed in.
package cli

import (
	"context"
	"errors"
	"io"
	"os"
	"os/signal"
	"runtime/debug"
	"time"

	"github.com/urfave/cli/v2"
	"golang.org/x/term"

	"hearduty/internal/calendar"
)

// Version is the version of the program.
const Version = "0.1.0"

// The exit codes.
const (
	exitClean  = 0 // nothing of what --fail-on names
	exitFound  = 1 // something of it
	exitFailed = 2 // could not check: wrong usage, unreadable program, broken bundle
)

// Env is what a run needs to know of the machine.
type Env struct {
	Context  context.Context      // ends the run when it is done; nil for never
	Today    func() calendar.Date // read once, when no other day is given
	Now      func() time.Time     // for the progress of reading; nil for none
	Getenv   func(string) string
	Terminal func(io.Writer) (columns int, ok bool) // whether w is a terminal, and how wide
	Memory   func(limit int64)                      // aims to stay below so many bytes; nil for no aim
}

// OS is the Env of a real run. An interrupt ends it.
func OS() Env {
	limit := memoryTuner(os.Getenv)
	limit(memoryLimit)
	ctx, _ := signal.NotifyContext(context.Background(), os.Interrupt)
	return Env{
		Context: ctx,
		Today:   func() calendar.Date { return calendar.OfTime(time.Now()) },
		Now:     time.Now,
		Getenv:  os.Getenv,
		Memory:  limit,
		Terminal: func(w io.Writer) (int, bool) {
			f, ok := w.(*os.File)
			if !ok || !term.IsTerminal(int(f.Fd())) {
				return 0, false
			}
			columns, _, err := term.GetSize(int(f.Fd()))
			return columns, err == nil
		},
	}
}

// Main runs hearduty with the arguments, of which the first is the program's name, and gives the exit
// code. Data go to stdout, everything else to stderr.
func Main(args []string, stdin io.Reader, stdout, stderr io.Writer, env Env) int {
	if env.Context == nil {
		env.Context = context.Background()
	}
	r := &run{Env: env, stdin: stdin, stdout: stdout, stderr: stderr}
	app := r.app()
	if len(args) > 1 && args[1] == completeCommand {
		r.complete(app, args[2:])
		return exitClean
	}
	err := app.RunContext(env.Context, permute(app, args))
	return r.exitCode(err)
}

// Memory that a run aims to stay below, and how much garbage may gather before that, in percent of what is
// in use. Judging makes much garbage and keeps little; reading alone needs less.
const (
	memoryLimit    = 345 << 20
	readingLimit   = 230 << 20
	garbagePercent = 300
)

// memoryTuner sets how much garbage may gather, and gives a function that sets the limit, unless whoever runs the
// program has set them for Go in the environment.
func memoryTuner(getenv func(string) string) func(limit int64) {
	if getenv("GOGC") == "" {
		debug.SetGCPercent(garbagePercent)
	}
	if getenv("GOMEMLIMIT") != "" {
		return func(int64) {}
	}
	return func(limit int64) { debug.SetMemoryLimit(limit) }
}

// run is one run of the program.
type run struct {
	Env
	stdin          io.Reader
	stdout, stderr io.Writer
	code           int // of a run without error
}

func (r *run) app() *cli.App {
	app := &cli.App{
		Name:    "hearduty",
		Usage:   "judge the records of a hearing-conservation program against the law",
		Version: Version,
		Description: "Exit codes: 0 nothing found of what --fail-on names, 1 something found, 2 could not check.\n" +
			"A bundle is a reading of the law; local codes govern, and licensed professionals decide.",
		Commands: []*cli.Command{
			r.checkCommand(), r.intakeCommand(), r.bundlesCommand(), r.bundleCommand(), r.explainCommand(), r.compareCommand(), r.switchCommand(), r.demoCommand(),
			r.sampleCommand(), r.rehearseCommand(), r.templateCommand(), r.keyCommand(), r.completionCommand(), r.helpCommand(),
		},
		// A help command of our own keeps the library from adding its help flag.
		Flags:           []cli.Flag{cli.HelpFlag},
		Reader:          r.stdin,
		Writer:          r.stdout,
		ErrWriter:       r.stderr,
		HideHelpCommand: true,
		// The words of a value may hold commas.
		DisableSliceFlagSeparator: true,
		ExitErrHandler:            func(*cli.Context, error) {},
		OnUsageError:              flagMistake,
		Action: func(c *cli.Context) error {
			if !c.Args().Present() {
				return usage("no command is named", "Name one of %s", list(c.App.Commands))
			}
			return unknownCommand(c.App, c.Args().First())
		},
	}
	for _, command := range app.Commands {
		command.HideHelpCommand = true
		command.OnUsageError = flagMistake
	}
	return app
}

func (r *run) exitCode(err error) int {
	var quiet *quietError
	switch {
	case err == nil:
		return r.code
	case errors.As(err, &quiet):
		return exitFailed
	}
	r.report(err)
	return exitFailed
}
