package sarif

import (
	"fmt"
	"regexp"

	"hearduty/internal/finding"
	"hearduty/internal/report/phrase"
	"hearduty/internal/report/text"
)

// conversion makes SARIF objects of the parts of a report.
type conversion struct {
	report     *finding.Report
	rules      []rule
	ruleIndex  map[string]int
	artifacts  []artifact
	fileIndex  map[string]int
	suppresses bool // whether any finding is accepted
}

func newConversion(r *finding.Report) *conversion {
	c := &conversion{report: r, rules: []rule{}, ruleIndex: map[string]int{}, artifacts: []artifact{}, fileIndex: map[string]int{}}
	for _, d := range r.Duties {
		c.addRule(ruleOf(d))
	}
	for i := range r.Findings {
		f := &r.Findings[i]
		c.addRule(ruleOf(finding.Duty{Bundle: f.Bundle, ID: f.Duty, Cite: f.Cite, Topic: f.Topic, Severity: f.Severity}))
		c.suppresses = c.suppresses || f.Accepted != nil
	}
	for _, in := range r.Inputs {
		c.addFile(in.File, in.SHA256)
	}
	return c
}

func (c *conversion) addRule(r rule) {
	if _, ok := c.ruleIndex[r.ID]; !ok {
		c.ruleIndex[r.ID] = len(c.rules)
		c.rules = append(c.rules, r)
	}
}

func (c *conversion) addFile(file, sha256 string) {
	if _, ok := c.fileIndex[file]; ok || file == "" {
		return
	}
	a := artifact{Location: fileLocation(file), Roles: []string{"analysisTarget"}}
	if sha256 != "" {
		a.Hashes = map[string]string{"sha-256": sha256}
	}
	c.fileIndex[file] = len(c.artifacts)
	c.artifacts = append(c.artifacts, a)
}

var semantic = regexp.MustCompile(`^\d+\.\d+\.\d+([-+][0-9A-Za-z.+-]+)?$`)

// run gives the run without its results.
func (c *conversion) run() run {
	r := c.report
	d := driver{Name: r.Tool.Name, Version: r.Tool.Version, Rules: c.rules, Notifications: notices, FullDescription: cautions(r)}
	if semantic.MatchString(r.Tool.Version) {
		d.SemanticVersion = r.Tool.Version
	}
	return run{
		Tool: tool{d}, ColumnKind: "unicodeCodePoints", Artifacts: c.artifacts, Results: []result{},
		AutomationDetails: automation{
			ID:          r.Tool.Name + "/" + r.AsOf.String(),
			Description: message{braces(phrase.Sentence(fmt.Sprintf("%s, judged as of %s", r.Program, r.AsOf)))},
		},
		Invocations: []invocation{{ExecutionSuccessful: true, ToolExecutionNotifications: c.notifications()}},
		OriginalURIBaseIDs: map[string]artifactLocation{
			base: {Description: &message{"The folder of the program file."}},
		},
		Properties: map[string]any{
			"asOf": r.AsOf, "cautions": list(r.Cautions), "bundles": list(r.Bundles), "listed": r.Listed,
			"totals": totals(r.Totals), "acceptedTotals": totals(r.AcceptedTotals),
		},
	}
}

func cautions(r *finding.Report) message {
	said := "Judges records of a hearing-conservation program by duties of the law."
	for _, caution := range r.Cautions {
		said += " " + phrase.Sentence(caution)
	}
	return message{braces(said)}
}

func list[T any](l []T) []T {
	if l == nil {
		return []T{}
	}
	return l
}

func totals(m map[finding.Status]int) map[finding.Status]int {
	if m == nil {
		return map[finding.Status]int{}
	}
	return m
}

// notices describe what a notification can be about.
var notices = []descriptor{
	{"rejected-row", message{"A row could not become a record, so it proves nothing and can hide a gap."}},
	{"refused-file", message{"A file could not be used as a whole, or from some place on."}},
	{"remark", message{"Somebody should look at it."}},
	{"caution", message{"What every reader must know."}},
}

// notifications tells of rows and files that were not used, of remarks, and the cautions.
func (c *conversion) notifications() []notification {
	out := []notification{}
	add := func(kind int, level, said string, at ...location) {
		out = append(out, notification{reference{notices[kind].ID, kind}, level, message{braces(said)}, at})
	}
	for i := range c.report.Rejects {
		r := &c.report.Rejects[i]
		at := c.at(r.File, r.Sheet, r.Row)
		if r.Row > 0 {
			add(0, "warning", text.Reject(*r), at)
		} else {
			add(1, "error", text.Reject(*r), at)
		}
	}
	for _, remark := range c.report.Remarks {
		add(2, "note", phrase.Sentence(remark))
	}
	for _, caution := range c.report.Cautions {
		add(3, "note", phrase.Sentence(caution))
	}
	return out
}
