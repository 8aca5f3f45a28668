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

// library gives the bundles that a command can use: the embedded ones and those of --policies. None of them is read
// before it is taken, by id, from the shelf.
func (r *run) library(c *cli.Context) (*bundle.Shelf, error) {
	var sources []*bundle.Source
	for _, path := range c.StringSlice("policies") {
		source, err := bundle.OpenSource(path)
		if err != nil {
			return nil, err
		}
		sources = append(sources, source)
	}
	return r.shelf(sources)
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

// shelf puts sources on a shelf, and tells which embedded bundles they replace.
func (r *run) shelf(sources []*bundle.Source) (*bundle.Shelf, error) {
	shelf, err := bundle.NewShelf(sources...)
	if err != nil {
		return nil, err
	}
	for _, id := range shelf.Replaced() {
		place, _ := shelf.Outside(id)
		fmt.Fprintf(r.stderr, "The bundle in %s takes the place of the embedded bundle %s.\n", place, id)
	}
	return shelf, nil
}
