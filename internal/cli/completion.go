package cli

import (
	"fmt"
	"slices"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/dossier"
	"hearduty/internal/finding"
	"hearduty/internal/program"
	"hearduty/internal/report"
	"hearduty/internal/report/change"
	"hearduty/internal/report/pull"
	"hearduty/internal/report/rulebook"
	"hearduty/internal/report/switchover"
	"hearduty/policies"
)

// completeCommand is what the completion scripts call, with the words typed so far. The last word is
// the one to be completed; it may be empty.
const completeCommand = "__complete"

var shells = []string{"bash", "zsh", "fish"}

func (r *run) completionCommand() *cli.Command {
	return &cli.Command{
		Name:      "completion",
		Usage:     "write a script that lets a shell complete commands and flags",
		ArgsUsage: strings.Join(shells, "|"),
		Description: examples("Load the script where your shell starts.",
			"source <(hearduty completion bash)", "source <(hearduty completion zsh)", "hearduty completion fish > ~/.config/fish/completions/hearduty.fish"),
		Action: func(c *cli.Context) error {
			args, err := arguments(c, 1, 1)
			if err != nil {
				return err
			}
			if err := oneOf("shell", args[0], shells); err != nil {
				return err
			}
			_, err = fmt.Fprint(r.stdout, scripts[args[0]])
			return err
		},
	}
}

// complete writes what the last word can become, one a line. It says nothing where a path is meant.
func (r *run) complete(app *cli.App, words []string) {
	last, before := "", []string(nil)
	if n := len(words); n > 0 {
		last, before = words[n-1], words[:n-1]
	}
	for _, candidate := range candidates(app, before, last) {
		if strings.HasPrefix(candidate, last) {
			fmt.Fprintln(r.stdout, candidate)
		}
	}
}

func candidates(app *cli.App, before []string, last string) []string {
	if len(before) == 0 {
		var names []string
		for _, c := range app.Commands {
			names = append(names, c.Name)
		}
		if strings.HasPrefix(last, "-") {
			return []string{"--help", "--version"}
		}
		return names
	}
	command := app.Command(before[0])
	if command == nil || slices.Contains(before, "--") {
		return nil
	}
	previous := before[len(before)-1]
	for _, f := range command.Flags {
		_, isBool := f.(*cli.BoolFlag)
		if name := f.Names()[0]; !isBool && len(before) > 1 && strings.TrimLeft(previous, "-") == name && strings.HasPrefix(previous, "-") {
			if command.Name == "compare" && name == "format" {
				return change.Names
			}
			if command.Name == "bundle" && name == "format" {
				return rulebook.Forms
			}
			if command.Name == "switch" && name == "format" {
				return switchover.Names
			}
			if command.Name == "sample" && name == "format" {
				return pull.Names()
			}
			return valuesOf(name, before[1:], last)
		}
	}
	if strings.HasPrefix(last, "-") {
		names := []string{"--help"}
		for _, f := range command.Flags {
			names = append(names, "--"+f.Names()[0])
		}
		return names
	}
	if len(before) > 1 {
		return nil
	}
	switch command.Name {
	case "bundle", "rehearse":
		return bundleIDs()
	case "template":
		return templateKinds
	case "completion":
		return shells
	case "help":
		return candidates(app, nil, "")
	}
	return nil
}

// valuesOf lists what a flag can be set to.
func valuesOf(flag string, words []string, last string) []string {
	switch flag {
	case "format":
		return report.Names()
	case "bundle", "from", "to":
		return bundleIDs()
	case "subject":
		return dossier.Kinds
	case "topic":
		return finding.Topics
	case "site":
		return siteIDs(words)
	case "fail-on":
		head := ""
		if i := strings.LastIndex(last, ","); i >= 0 {
			head = last[:i+1]
		}
		var out []string
		for _, s := range failWords() {
			if !slices.Contains(strings.Split(head, ","), s) {
				out = append(out, head+s)
			}
		}
		if head == "" {
			out = append(out, "none")
		}
		return out
	}
	return nil
}

func bundleIDs() []string {
	ids, _ := bundle.Folders(policies.FS)
	return ids
}

// siteIDs lists the sites of the program that a word names, else of the current folder.
func siteIDs(words []string) []string {
	paths := []string{"."}
	for _, word := range words {
		if !strings.HasPrefix(word, "-") {
			paths = append([]string{word}, paths...)
		}
	}
	for _, path := range paths {
		if p, _ := program.Load(path); p != nil {
			var ids []string
			for _, s := range p.Sites {
				ids = append(ids, s.ID)
			}
			return ids
		}
	}
	return nil
}
