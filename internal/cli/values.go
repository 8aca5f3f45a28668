package cli

import (
	"fmt"
	"slices"
	"strconv"
	"strings"

	"github.com/urfave/cli/v2"

	"hearduty/internal/calendar"
	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/program"
)

// day reads the flag --as-of. An unknown day means that it is not set.
func day(c *cli.Context) (calendar.Date, error) {
	if !c.IsSet("as-of") {
		return 0, nil
	}
	d, err := calendar.Parse(c.String("as-of"))
	if err != nil {
		return 0, usage("--as-of: "+err.Error(), "Write a day such as 2026-06-30")
	}
	return d, nil
}

const maxAhead = 36500

// ahead reads the flag --ahead: a number of days, with or without a d behind it.
func ahead(c *cli.Context) (int, error) {
	text := c.String("ahead")
	n, err := strconv.Atoi(strings.TrimSuffix(text, "d"))
	if err != nil || n < 0 || n > maxAhead {
		return 0, usage(fmt.Sprintf("--ahead cannot be %q", text), "Write a number of days from 0d to %dd, such as 90d", maxAhead)
	}
	return n, nil
}

// rejectWord stands in --fail-on for a row that was rejected. It is no status: such a row gives no finding, but the gap
// that it would have shown stays hidden.
const rejectWord = "reject"

// failing is what --fail-on names.
type failing struct {
	statuses         []finding.Status
	reject, accepted bool
}

// failOn reads the flag --fail-on: statuses, reject and accepted, with commas between them, or none.
func failOn(c *cli.Context) (failing, error) {
	var out failing
	text := strings.TrimSpace(c.String("fail-on"))
	if text == "none" {
		return out, nil
	}
	names := failWords()
	for word := range strings.SplitSeq(text, ",") {
		word = strings.TrimSpace(word)
		if !slices.Contains(names, word) {
			remedy := "Write some of " + strings.Join(names, ", ") + " with commas between them, or none"
			if near := diag.Near(word, names); near != "" && word != "" {
				remedy = "Write " + near + " if that is meant"
			}
			return out, usage(fmt.Sprintf("--fail-on cannot be %q", word), "%s", remedy)
		}
		switch word {
		case rejectWord:
			out.reject = true
		case acceptedWord:
			out.accepted = true
		default:
			out.statuses = append(out.statuses, finding.Status(word))
		}
	}
	return out, nil
}

func failWords() []string {
	var names []string
	for _, s := range finding.Statuses {
		names = append(names, string(s))
	}
	return append(names, rejectWord, acceptedWord)
}

// oneOf refuses a word that is none of the known ones.
func oneOf(what, word string, known []string) error {
	if slices.Contains(known, word) {
		return nil
	}
	all := "The choice is " + strings.Join(known, ", ")
	if near := diag.Near(word, known); near != "" {
		return usage(fmt.Sprintf("there is no %s %q", what, word), "Write %s if that is meant", near)
	}
	return usage(fmt.Sprintf("there is no %s %q", what, word), "%s", all)
}

// load reads the program file that the arguments name, or that of the current folder, and tells what is
// wrong or odd about it.
func (r *run) load(c *cli.Context, args []string) (*program.Program, error) {
	path := "."
	if len(args) > 0 {
		path = args[0]
	}
	p, problems := program.Load(path)
	keepQuiet(c, problems, path)
	r.diagnostics(problems)
	if problems.Failed() {
		return nil, &quietError{problems}
	}
	return p, nil
}

// judged gives the day on which the program is judged: the flag, else the program file, else today.
func (r *run) judged(c *cli.Context, p *program.Program) (calendar.Date, error) {
	d, err := day(c)
	if err != nil || d.Known() {
		return d, err
	}
	if p != nil && p.AsOf.Known() {
		return p.AsOf, nil
	}
	d = r.Today()
	fmt.Fprintf(r.stderr, "Judged as of %s, today; another day is set with --as-of.\n", d)
	return d, nil
}

// choose checks the flags --site and --bundle, and that the sites name bundles that exist.
func choose(c *cli.Context, p *program.Program, known []string) ([]string, error) {
	var ids []string
	for _, s := range p.Sites {
		ids = append(ids, s.ID)
	}
	sites := c.StringSlice("site")
	for _, id := range sites {
		if err := oneOf("site", id, ids); err != nil {
			return nil, err
		}
	}
	if id := c.String("bundle"); id != "" {
		return sites, oneOf("bundle", id, known)
	}
	return sites, p.CheckBundles(known).Err()
}
