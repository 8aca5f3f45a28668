package sarif

import (
	"net/url"
	"path"
	"strconv"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
)

// result makes a result of a finding.
func (c *conversion) result(f *finding.Finding) result {
	id := ruleID(f.Bundle, f.Duty)
	kind, level := kindAndLevel(f)
	r := result{
		RuleID: id, RuleIndex: c.ruleIndex[id], Kind: kind, Level: level, Message: said(f),
		PartialFingerprints: map[string]string{"findingId/v1": f.ID}, Properties: properties(f),
	}
	about := logicalLocation{f.Subject.ID, f.Site + "/" + f.Subject.Kind + "/" + f.Subject.ID, f.Subject.Kind}
	first := location{}
	for i, e := range f.Evidence {
		at := c.at(e.File, e.Sheet, e.Row)
		at.Message = &message{braces(phrase.Clean(e.Record))}
		if i == 0 {
			first = at
			continue
		}
		n := i
		at.ID = &n
		r.RelatedLocations = append(r.RelatedLocations, at)
	}
	first.LogicalLocations = append(first.LogicalLocations, about)
	r.Locations = []location{first}
	if c.suppresses {
		r.Suppressions = c.suppressions(f)
	}
	return r
}

// said tells whom a finding is about, what was found, and what to do where something is to be done.
func said(f *finding.Finding) message {
	text := phrase.Sentence(phrase.Subject(f.Subject) + ": " + phrase.Clean(f.Message))
	switch f.Status {
	case finding.Gap, finding.Unproven, finding.Opinion, finding.Due:
		if f.Remedy != "" {
			text += " What to do: " + phrase.Sentence(f.Remedy)
		}
	}
	return message{braces(text)}
}

// properties holds what SARIF has no place for. Hearing levels are among it only if the report has them.
func properties(f *finding.Finding) map[string]any {
	p := map[string]any{
		"site": f.Site, "topic": f.Topic, "key": f.Key, "status": f.Status, "severity": f.Severity,
		"due": f.Due, "done": f.Done, "daysOver": f.DaysOver, "cite": f.Cite,
	}
	if len(f.Facts) > 0 {
		p["facts"] = f.Facts
	}
	if len(f.Health) > 0 {
		p["health"] = f.Health
	}
	return p
}

// suppressions gives the acceptance of a finding, and an empty list for none: where one result of a run has
// the list, all must have it.
func (c *conversion) suppressions(f *finding.Finding) *[]suppression {
	a := f.Accepted
	if a == nil {
		return &[]suppression{}
	}
	at := c.at(a.File, "", a.Row)
	return &[]suppression{{
		Kind: "external", Status: "accepted", Justification: phrase.Clean(a.Reason), Location: &at,
		Properties: map[string]any{"approvedBy": a.ApprovedBy, "until": a.Until},
	}}
}

// base names the folder that the addresses of files are relative to.
const base = "PROGRAM"

// at gives the place of a record: a line where the file is a text, and a logical location where it is a
// workbook or a list.
func (c *conversion) at(file, sheet string, row int) location {
	if file == "" {
		return location{}
	}
	where := physicalLocation{ArtifactLocation: fileLocation(file)}
	if i, ok := c.fileIndex[file]; ok {
		where.ArtifactLocation.Index = &i
	}
	l := location{PhysicalLocation: &where}
	switch {
	case sheet != "" && row > 0:
		name := sheet + "!" + strconv.Itoa(row)
		l.LogicalLocations = []logicalLocation{{name, name, "row"}}
	case sheet != "":
		l.LogicalLocations = []logicalLocation{{sheet, sheet, "sheet"}}
	case row > 0 && isList(file):
		l.LogicalLocations = []logicalLocation{{strconv.Itoa(row - 1), "/" + strconv.Itoa(row-1), "object"}}
	case row > 0:
		where.Region = &region{row}
	}
	return l
}

// isList says whether the records of a file are counted by their place in a list, not by lines.
func isList(file string) bool {
	return strings.EqualFold(path.Ext(file), ".json")
}

// fileLocation gives the address of a file, percent-encoded; relative to the program's folder, unless the
// path itself is not.
func fileLocation(file string) artifactLocation {
	file = strings.ReplaceAll(file, `\`, "/")
	drive := len(file) > 2 && file[1] == ':' && file[2] == '/'
	switch {
	case drive:
		return artifactLocation{URI: (&url.URL{Scheme: "file", Path: "/" + file}).String()}
	case strings.HasPrefix(file, "/"):
		return artifactLocation{URI: (&url.URL{Scheme: "file", Path: file}).String()}
	}
	return artifactLocation{URI: (&url.URL{Path: file}).String(), URIBaseID: base}
}
