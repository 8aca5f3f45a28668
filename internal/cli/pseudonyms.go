package cli

import (
	"crypto/rand"
	"encoding/hex"
	"errors"
	"fmt"
	"io/fs"
	"os"
	"path/filepath"

	"github.com/urfave/cli/v2"

	"hearduty/internal/diag"
	"hearduty/internal/intake"
	"hearduty/internal/program"
	"hearduty/internal/pseudonym"
)

func pseudonymsFlag() cli.Flag {
	return &cli.StringFlag{Name: "pseudonyms", Usage: "put codes made with the key in `FILE` in place of the ids of persons"}
}

// veil reads the key that --pseudonyms names. It is nil if the flag is not set.
func veil(c *cli.Context) (*pseudonym.Veil, error) {
	if !c.IsSet("pseudonyms") {
		return nil, nil
	}
	return pseudonym.Load(c.String("pseudonyms"))
}

// keepQuiet takes out of the diagnostics of the program at a path what can be an id of a person: all that is said of
// another file than the program file, which is that of people.
func keepQuiet(c *cli.Context, l diag.List, path string) {
	if !c.IsSet("pseudonyms") {
		return
	}
	for i := range l {
		if file := l[i].Position.File; file != filepath.ToSlash(path) && file != filepath.ToSlash(filepath.Join(path, program.FileName)) {
			l[i].Problem, l[i].Remedy, l[i].Position.Field = "the entry cannot be used", "Run the command without --pseudonyms to read why", ""
		}
	}
}

// discreet takes whatever is in quotes out of diagnostics that are an error, if ids are to be pseudonyms.
func discreet(c *cli.Context, err error) error {
	var l diag.List
	if c.IsSet("pseudonyms") && errors.As(err, &l) {
		intake.WithholdQuoted(l)
	}
	return err
}

func (r *run) keyCommand() *cli.Command {
	return &cli.Command{
		Name:      "key",
		Usage:     "write a new key for --pseudonyms to a file",
		ArgsUsage: "FILE",
		Description: examples(
			"The key is 64 hexadecimal digits, made by chance. With it an id has the same code in every run, and whoever has it can\n"+
				"find out which id a code stands for. Keep it apart from the reports, and where it cannot get lost.",
			"hearduty key pseudonyms.key",
			"hearduty check plants --pseudonyms pseudonyms.key --format html --out report.html",
		),
		Action: r.key,
	}
}

func (r *run) key(c *cli.Context) error {
	args, err := arguments(c, 1, 1)
	if err != nil {
		return err
	}
	f, err := os.OpenFile(args[0], os.O_WRONLY|os.O_CREATE|os.O_EXCL, 0o600)
	if errors.Is(err, fs.ErrExist) {
		return fmt.Errorf("%s exists already, and a key that is overwritten is lost; name a new file", args[0])
	}
	if err != nil {
		return fmt.Errorf("the key cannot be written: %w", err)
	}
	key := make([]byte, 32)
	rand.Read(key)
	_, err = fmt.Fprintln(f, hex.EncodeToString(key))
	if err = errors.Join(err, f.Close()); err != nil {
		_ = os.Remove(f.Name()) // half a key is none
		return fmt.Errorf("the key cannot be written: %w", err)
	}
	fmt.Fprintf(r.stderr, "Wrote %s, which only you can read.\n", args[0])
	return nil
}
