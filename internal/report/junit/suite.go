package junit

import (
	"encoding/xml"
	"fmt"
	"strconv"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
	"hearduty/internal/report/text"
)

// suite is a site under a bundle, or the files.
type suite struct {
	name       string
	properties []property
	findings   []*finding.Finding
	files      []testcase
	tally      tally
}

type properties struct {
	XMLName xml.Name   `xml:"properties"`
	List    []property `xml:"property"`
}

type property struct {
	Name  string `xml:"name,attr"`
	Value string `xml:"value,attr"`
}

// suitesOf makes the suites of a report, without their findings' cases.
func suitesOf(r *finding.Report) []*suite {
	suites := []*suite{filesOf(r)}
	index := map[[2]string]*suite{}
	add := func(site, bundle string) *suite {
		key := [2]string{site, bundle}
		if index[key] == nil {
			index[key] = &suite{name: phrase.Clean(site + " / " + bundle), properties: about(r, site, bundle)}
			suites = append(suites, index[key])
		}
		return index[key]
	}
	for _, site := range r.Sites {
		for _, bundle := range site.Bundles {
			add(site.ID, bundle)
		}
	}
	for i := range r.Findings {
		f := &r.Findings[i]
		s := add(f.Site, f.Bundle)
		s.findings = append(s.findings, f)
		s.tally.count(verdictOf(f))
	}
	return suites
}

// about gives the properties of a suite: by what and as of when it was judged, and how many findings there
// are of every topic and status, also of those not listed.
func about(r *finding.Report, site, bundle string) []property {
	p := common(r)
	for _, b := range r.Bundles {
		if b.ID == bundle {
			p = append(p, property{"bundle revision", b.Revision}, property{"bundle sha256", b.SHA256})
			for _, c := range b.Cautions {
				p = append(p, property{"caution of the bundle", phrase.Clean(c)})
			}
		}
	}
	p = append(p, property{"listed", phrase.Clean(r.Listed)})
	for _, c := range r.Counts {
		if c.Site == site && c.Bundle == bundle {
			p = append(p, property{phrase.Clean(fmt.Sprintf("%s %s", c.Topic, c.Status)), strconv.Itoa(c.Number)})
		}
	}
	return p
}

func common(r *finding.Report) []property {
	p := []property{{"tool", phrase.Clean(r.Tool.Name + " " + r.Tool.Version)}, {"as of", r.AsOf.String()}}
	for _, c := range r.Cautions {
		p = append(p, property{"caution", phrase.Clean(c)})
	}
	return p
}

// filesOf makes a case of each file that was read, so that no report is without a case. A rejected row is
// told and does not fail, as without --fail-on reject.
func filesOf(r *finding.Report) *suite {
	s := &suite{name: "files", properties: common(r)}
	rejects := map[[2]string][]string{}
	for _, x := range r.Rejects {
		key := [2]string{x.File, x.Sheet}
		rejects[key] = append(rejects[key], text.Reject(x))
	}
	for i := range r.Inputs {
		in := &r.Inputs[i]
		lines := []string{fmt.Sprintf("%d rows = %d accepted + %d rejected + %d not data", in.Rows, in.Accepted, in.Rejected, in.NotData)}
		lines = append(lines, rejects[[2]string{in.File, in.Sheet}]...)
		s.files = append(s.files, testcase{
			Class: "files." + phrase.Clean(string(in.Kind)), Name: phrase.Clean(in.Name()), Output: output(strings.Join(lines, "\n")),
		})
		s.tally.count(passed)
	}
	return s
}

// write writes a suite, a case at a time.
func (s *suite) write(e *xml.Encoder, titles phrase.Titles) error {
	numbers := append(s.tally.attrs(), attr("skipped", strconv.Itoa(s.tally.skipped)))
	root := start("testsuite", append([]xml.Attr{attr("name", s.name)}, numbers...))
	if err := e.EncodeToken(root); err != nil {
		return err
	}
	if err := e.Encode(properties{List: s.properties}); err != nil {
		return err
	}
	for i := range s.files {
		if err := e.Encode(s.files[i]); err != nil {
			return err
		}
	}
	for _, f := range s.findings {
		if err := e.Encode(caseOf(f, titles)); err != nil {
			return err
		}
	}
	return e.EncodeToken(root.End())
}
