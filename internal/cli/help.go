package cli

import (
	"strings"

	"github.com/urfave/cli/v2"
)

func (r *run) helpCommand() *cli.Command {
	return &cli.Command{
		Name:        "help",
		Usage:       "show the commands, or the flags of one command",
		ArgsUsage:   "[COMMAND]",
		Description: examples("The same is shown by --help.", "hearduty help check"),
		Action: func(c *cli.Context) error {
			args, err := arguments(c, 0, 1)
			if err != nil {
				return err
			}
			if len(args) == 0 {
				return cli.ShowAppHelp(c)
			}
			if c.App.Command(args[0]) == nil {
				return unknownCommand(c.App, args[0])
			}
			return cli.ShowCommandHelp(c, args[0])
		},
	}
}

// shellWord puts a word in quotes if a shell would read it as something else.
func shellWord(s string) string {
	if s != "" && !strings.ContainsFunc(s, func(c rune) bool {
		return !strings.ContainsRune("abcdefghijklmnopqrstuvwxyzABCDEFGHIJKLMNOPQRSTUVWXYZ0123456789-_./+:,@%", c)
	}) {
		return s
	}
	return "'" + strings.ReplaceAll(s, "'", `'\''`) + "'"
}
