package cli

import (
	"context"
	"errors"
	"fmt"
	"regexp"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/diag"
)

// usageError is a mistake on the command line.
type usageError struct{ problem, remedy string }

func (e *usageError) Error() string { return e.problem }

func usage(problem, remedy string, args ...any) error {
	return &usageError{problem, fmt.Sprintf(remedy, args...)}
}

// quietError is an error that has been told already.
type quietError struct{ error }

// report tells an error on stderr: what is wrong, and what to do next.
func (r *run) report(err error) {
	var mistake *usageError
	var problems diag.List
	switch {
	case errors.As(err, &mistake):
		fmt.Fprintf(r.stderr, "hearduty: %s. %s.\n", mistake.problem, mistake.remedy)
		fmt.Fprintln(r.stderr, "Run `hearduty help` for the commands, and `hearduty help COMMAND` for the flags of one.")
	case errors.As(err, &problems):
		r.diagnostics(problems)
	case errors.Is(err, context.Canceled):
		fmt.Fprintln(r.stderr, "hearduty: interrupted; nothing was written.")
	default:
		fmt.Fprintf(r.stderr, "hearduty: %s\n", sentence(err.Error()))
	}
}

func (r *run) diagnostics(l diag.List) {
	for _, d := range l {
		if d.Severity == diag.Warning {
			fmt.Fprintf(r.stderr, "warning: %s\n", d)
			continue
		}
		fmt.Fprintln(r.stderr, d)
	}
}

func sentence(s string) string {
	if strings.HasSuffix(s, ".") || strings.HasSuffix(s, "?") {
		return s
	}
	return s + "."
}

var (
	notDefined = regexp.MustCompile(`^flag provided but not defined: -(.*)$`)
	needsValue = regexp.MustCompile(`^flag needs an argument: -(.*)$`)
	badValue   = regexp.MustCompile(`^invalid value "(.*)" for flag -([^:]*)`)
)

// flagMistake turns what the library says about flags into own words.
func flagMistake(c *cli.Context, err error, _ bool) error {
	flags, command := c.Command.Flags, "hearduty "+c.Command.Name
	if c.Command.Name == c.App.Name || c.Command.Name == "" {
		command = "hearduty"
	}
	text := err.Error()
	if m := notDefined.FindStringSubmatch(text); m != nil {
		name := strings.TrimLeft(m[1], "-")
		names := flagNames(flags)
		if near := diag.Near(name, names); near != "" {
			return usage(fmt.Sprintf("%s has no flag --%s", command, name), "Write --%s if that is meant", near)
		}
		if len(names) == 0 {
			return usage(fmt.Sprintf("%s has no flag --%s", command, name), "Leave it out")
		}
		return usage(fmt.Sprintf("%s has no flag --%s", command, name), "The flags are --%s", strings.Join(names, ", --"))
	}
	if m := needsValue.FindStringSubmatch(text); m != nil {
		return usage(fmt.Sprintf("the flag --%s has no value", strings.TrimLeft(m[1], "-")), "Write the value behind it")
	}
	if m := badValue.FindStringSubmatch(text); m != nil {
		return usage(fmt.Sprintf("the flag --%s cannot be %q", m[2], m[1]), "Look up its values with `%s --help`", command)
	}
	return usage(text, "Look up the flags with `%s --help`", command)
}

func flagNames(flags []cli.Flag) []string {
	var names []string
	for _, f := range flags {
		for _, name := range f.Names() {
			if len(name) > 1 && name != "help" {
				names = append(names, name)
			}
		}
	}
	return names
}

func list(commands []*cli.Command) string {
	var names []string
	for _, c := range commands {
		names = append(names, c.Name)
	}
	return strings.Join(names, ", ")
}

func unknownCommand(app *cli.App, name string) error {
	var names []string
	for _, c := range app.Commands {
		names = append(names, c.Name)
	}
	problem := fmt.Sprintf("there is no command %q", name)
	if near := diag.Near(name, names); near != "" {
		return usage(problem, "Write %s if that is meant; the commands are %s", near, list(app.Commands))
	}
	return usage(problem, "The commands are %s", list(app.Commands))
}

// arguments gives the arguments of a command, least and most in number, as names says for the remedy.
func arguments(c *cli.Context, least, most int) ([]string, error) {
	args := c.Args().Slice()
	form := "`hearduty " + c.Command.Name + " " + c.Command.ArgsUsage + "`"
	switch {
	case len(args) < least:
		return nil, usage(c.Command.Name+" lacks an argument", "Write %s", form)
	case len(args) > most:
		remedy := "Write " + form
		if most > 0 {
			remedy += "; put a path that holds blanks in quotes"
		}
		return nil, usage(fmt.Sprintf("%s takes %s, and %q is one too many", c.Command.Name, number(most), args[most]), "%s", remedy)
	}
	return args, nil
}

func number(n int) string {
	switch n {
	case 0:
		return "no arguments"
	case 1:
		return "one argument"
	}
	return fmt.Sprintf("%d arguments", n)
}
