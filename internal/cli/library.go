package cli

import (
	"fmt"
	"slices"

	"github.com/urfave/cli/v2"

	"hearduty/internal/bundle"
	"hearduty/internal/program"
)

// policiesFlag lets a command judge by bundles that are not embedded. A command that has it reads it by library.
func policiesFlag() cli.Flag {
	return &cli.StringSliceFlag{Name: "policies", Usage: "take bundles from the folder or .tar.gz at `PATH`, too; can be repeated"}
}

// policiesKeyFlag lets a command verify the signatures of bundles that are not embedded.
func policiesKeyFlag() cli.Flag {
	return &cli.StringFlag{Name: "policies-key", Usage: "verify the signatures of these bundles with the public key or secret in `FILE`"}
}

// sources opens what --policies names, and more paths besides.
func sources(c *cli.Context, more ...string) ([]*bundle.Source, error) {
	var key *bundle.Key
	paths := append(c.StringSlice("policies"), more...)
	if file := c.String("policies-key"); file != "" {
		if len(paths) == 0 {
			return nil, usage("--policies-key is given, but no bundle that it could verify", "Name the bundle with --policies, or leave out the key")
		}
		var err error
		if key, err = bundle.ReadKey(file); err != nil {
			return nil, err
		}
	}
	var out []*bundle.Source
	for _, path := range paths {
		source, err := bundle.OpenSource(path, key)
		if err != nil {
			return nil, err
		}
		out = append(out, source)
	}
	return out, nil
}

// library gives the bundles that a command can use: the embedded ones and those of --policies. None of them is read
// before it is taken, by id, from the shelf.
func (r *run) library(c *cli.Context) (*bundle.Shelf, error) {
	list, err := sources(c)
	if err != nil {
		return nil, err
	}
	shelf, err := bundle.NewShelf(list...)
	if err != nil {
		return nil, err
	}
	for _, id := range shelf.Replaced() {
		place, _ := shelf.Outside(id)
		fmt.Fprintf(r.stderr, "The bundle in %s takes the place of the embedded bundle %s.\n", place, id)
	}
	return shelf, nil
}

// taken reads the bundles that the chosen sites of a program name, those named besides, and no others.
func taken(shelf *bundle.Shelf, p *program.Program, sites []string, more ...string) (bundle.Library, error) {
	known := shelf.IDs()
	var ids []string
	add := func(list []string) {
		for _, id := range list {
			if slices.Contains(known, id) && !slices.Contains(ids, id) {
				ids = append(ids, id)
			}
		}
	}
	for _, s := range p.Sites {
		if len(sites) == 0 || slices.Contains(sites, s.ID) {
			add(s.Bundles)
		}
	}
	add(more)
	return shelf.Take(ids...)
}
