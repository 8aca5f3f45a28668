// Package pull writes the sheet of an audit sample, with the worker files to pull and boxes to tick, and what the
// sample has shown once it is ticked.
package pull

import (
	"errors"
	"fmt"
	"io"
	"math/big"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
	"hearduty/internal/judge"
	"hearduty/internal/report/phrase"
	"hearduty/internal/sample"
)

// Request says what to draw.
type Request struct {
	Program  string
	AsOf     calendar.Date
	Goal     sample.Goal
	Size     int    // number of files that the auditor wants; 0 for the smallest that reaches the goal
	Seed     uint64 // the same seed, records and day give the same files
	Enrolled bool   // only workers whom their exposure puts into the program
	Veiled   bool   // ids are codes
}

// Sheet is a sample that was drawn.
type Sheet struct {
	Request
	Sites      []finding.Site
	Population int // files that could be drawn
	Rejects    int // rejected rows of the records
	Strata     []Stratum
	Files      []File // by site, band and id
}

// Stratum is a site and a band of exposure.
type Stratum struct {
	sample.Stratum
	Site string
	Band judge.Band
}

// File is the file of a worker that is to be pulled.
type File struct {
	judge.Member
	Number int // in the sheet, from 1
}

// Draw draws files from the people of a program.
func Draw(p *judge.People, r Request) (*Sheet, error) {
	s := &Sheet{Request: r, Sites: p.Sites, Rejects: p.Rejects}
	members := map[string]judge.Member{}
	var ids [][]string
	for _, site := range p.Sites {
		for _, band := range judge.Bands {
			var of []string
			for _, m := range p.Members {
				if m.Site == site.ID && m.Band == band && (m.Enrolled || !r.Enrolled) {
					of = append(of, m.Worker)
					members[site.ID+"\x00"+m.Worker] = m
				}
			}
			if len(of) > 0 {
				ids = append(ids, of)
				s.Strata = append(s.Strata, Stratum{Site: site.ID, Band: band})
				s.Population += len(of)
			}
		}
	}
	if err := s.allot(ids); err != nil {
		return nil, err
	}
	for i, of := range s.Strata {
		for _, id := range sample.Draw(r.Seed, of.Site+"/"+string(of.Band), ids[i], of.Drawn) {
			s.Files = append(s.Files, File{Member: members[of.Site+"\x00"+id], Number: len(s.Files) + 1})
		}
	}
	return s, nil
}

// allot settles how many files are drawn from each stratum.
func (s *Sheet) allot(ids [][]string) error {
	sizes := make([]int, len(ids))
	for i := range ids {
		sizes[i] = len(ids[i])
	}
	if s.Population == 0 {
		return errors.New("there are no files to draw from: no worker of the sites chosen is employed on the day; look at --as-of, --site and --enrolled")
	}
	if s.Size > 0 {
		if s.Size > s.Population {
			return fmt.Errorf("there are only %d files to draw from, not %d; ask for fewer, or leave out --size", s.Population, s.Size)
		}
		for i, n := range sample.Allocate(sizes, s.Size) {
			s.Strata[i].Stratum = sample.Stratum{Size: sizes[i], Drawn: n}
		}
		return nil
	}
	n, err := s.Goal.Size(s.Population)
	if errors.Is(err, sample.ErrExpect) {
		return fmt.Errorf("of %d files %d faulty ones are tolerated, so a sample that may hold %d shows nothing; raise --tolerable or lower --expect", s.Population, s.Tolerated(), s.Goal.Expect)
	}
	if err != nil {
		return err
	}
	for i, of := range s.Goal.Spread(sizes, n) {
		s.Strata[i].Stratum = of
	}
	return nil
}

// Tolerated is the number of faulty files that is tolerated.
func (s *Sheet) Tolerated() int { return s.Goal.TooMany(s.Population) - 1 }

// Shows is the number of faulty files among all that there are at most, with the confidence, if the sample holds no
// more of them than expected.
func (s *Sheet) Shows() int {
	n := len(s.Files)
	return sample.AtMost(s.Population, n, min(s.Goal.Expect, n), s.Goal.Confidence)
}

// Missed is the chance to find no more faulty files than expected, though one more than tolerated is there.
func (s *Sheet) Missed() *big.Rat {
	too := s.Tolerated() + 1
	if s.Goal.Expect > 0 {
		return sample.Chance(s.Population, too, len(s.Files), s.Goal.Expect)
	}
	strata := make([]sample.Stratum, len(s.Strata))
	for i := range s.Strata {
		strata[i] = s.Strata[i].Stratum
	}
	return sample.Missed(strata, too)
}

// SiteName gives the name of a site, or its id where it has none.
func (s *Sheet) SiteName(id string) string {
	for _, site := range s.Sites {
		if site.ID == id && site.Name != "" {
			return phrase.Clean(site.Name)
		}
	}
	return phrase.Clean(id)
}

// Format is one form of the sheet.
type Format struct {
	Name  string
	Write func(w io.Writer, s *Sheet, width int) error
}

// Formats lists the forms, the default first.
var Formats = []Format{{"text", writeText}, {"html", writeHTML}, {"csv", writeCSV}}

// Names lists the names of the forms.
func Names() []string {
	var names []string
	for _, f := range Formats {
		names = append(names, f.Name)
	}
	return names
}
