package cli

import (
	"strings"

	"github.com/urfave/cli/v2"
)

// permute puts the flags of a command before its arguments, since the library stops reading flags at
// the first argument. What stands after -- stays an argument; with --help nothing else counts.
func permute(app *cli.App, args []string) []string {
	if len(args) < 2 {
		return args
	}
	command := app.Command(args[1])
	if command == nil {
		return args
	}
	takesValue := map[string]bool{}
	for _, f := range command.Flags {
		if _, isBool := f.(*cli.BoolFlag); isBool {
			continue
		}
		for _, name := range f.Names() {
			takesValue[name] = true
		}
	}
	flags := append([]string{}, args[:2]...)
	var rest []string
	for i := 2; i < len(args); i++ {
		arg := args[i]
		if arg == "--" {
			rest = append(rest, args[i+1:]...)
			break
		}
		if arg == "-" || !strings.HasPrefix(arg, "-") {
			rest = append(rest, arg)
			continue
		}
		name := strings.TrimLeft(arg, "-")
		if name == "help" || name == "h" {
			return append(flags[:2:2], "--help")
		}
		flags = append(flags, arg)
		if !takesValue[name] {
			continue
		}
		if i+1 == len(args) {
			return flags // the library finds that the value is missing
		}
		i++
		flags = append(flags, args[i])
	}
	return append(append(flags, "--"), rest...)
}
