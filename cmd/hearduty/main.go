// Command hearduty judges the records of a hearing-conservation program against the law.
package main

import (
	"os"

	"hearduty/internal/cli"
)

func main() { os.Exit(cli.Main(os.Args, os.Stdin, os.Stdout, os.Stderr, cli.OS())) }
