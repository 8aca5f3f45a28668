// Package draft proposes a map for an export that nobody has described yet. It says of each column what it takes it
// for, how sure that is and why, and asks where the file does not tell. It never guesses between the orders of a
// date or the meanings of a code, and repeats no cell that may be about a person.
package draft

import (
	"errors"
	"fmt"
	"io"

	"hearduty/internal/grid"
	"hearduty/internal/record"
)

// Options say what is known of the export beforehand.
type Options struct {
	Kind     record.Kind // empty to find it out
	Member   string      // of a ZIP archive
	Sheet    string
	Encoding string
}

// Write reads the file at path and writes a commented map, which mapping.Load reads. Names the file as shown. The
// error is a *grid.Fault if the file cannot be read.
func Write(w io.Writer, path, shown string, o Options) error {
	if _, ok := record.TableOf(o.Kind); o.Kind != "" && !ok {
		return &grid.Fault{Problem: fmt.Sprintf("there is no record kind %q", o.Kind), Remedy: "Name one of " + kindList() + ", or leave it out"}
	}
	f, err := grid.Open(path, o.Member)
	if err != nil {
		return err
	}
	defer f.Close()
	resources, err := findResources(f)
	if err != nil {
		return err
	}
	if resources != nil {
		_, err = io.WriteString(w, resources.write(shown))
		return err
	}
	a := &analysis{shown: shown, o: o, file: f, open: grid.Options{Encoding: o.Encoding, Sheet: o.Sheet, Lenient: true}}
	if err := a.read(); err != nil {
		return err
	}
	_, err = io.WriteString(w, a.write())
	return err
}

// read looks at the file and proposes a map.
func (a *analysis) read() error {
	var err error
	a.s, err = takeSample(a.file, a.open)
	if err != nil && a.o.Encoding == "" && a.file.Format != grid.Workbook {
		err = a.tryPages(err)
	}
	if err != nil {
		return err
	}
	if len(a.s.rows) == 0 {
		return &grid.Fault{Problem: "the file holds no rows that can be read", Remedy: "Export it again, with its header"}
	}
	a.h = findHead(a.s)
	a.takeData()
	a.layOut()
	a.addAbove()
	a.findTones()
	a.findRowsOfEars()
	a.findKind()
	a.assign()
	a.markDates()
	if err := a.readAll(); err != nil {
		return err
	}
	a.fillIn()
	a.explain()
	return nil
}

// pages are the code pages that are tried, in the order of which the first of equals is taken.
var pages = []string{"windows-1252", "windows-1250", "cp850", "shift_jis", "windows-1251"}

// tryPages reads text that is no UTF-8 in the usual code pages, and takes the one in which its header is known best.
func (a *analysis) tryPages(first error) error {
	var fault *grid.Fault
	if !errors.As(first, &fault) {
		return first
	}
	best := -1 << 30
	for _, page := range pages {
		o := a.open
		o.Encoding = page
		s, err := takeSample(a.file, o)
		if err != nil {
			continue
		}
		if score := pageScore(s); score > best {
			best, a.s, a.open, a.guessed = score, s, o, true
		}
	}
	if a.s == nil {
		return first
	}
	return nil
}

// pageScore counts names of columns that are known, and letters against signs among the characters beyond ASCII.
func pageScore(s *sample) int {
	score := -100 * min(s.about.Replaced, 1000)
	for i := range s.rows[:min(len(s.rows), headSearch)] {
		score = max(score, score+20*max(headScore(&s.rows[i]), 0))
	}
	for i := range s.rows[:min(len(s.rows), 500)] {
		for _, c := range s.rows[i].Cells {
			score += textScore(c.Text)
		}
	}
	return score
}
