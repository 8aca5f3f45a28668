package html

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// matrix is how each site stands under each topic.
type matrix struct {
	Topics []string
	Rows   []matrixRow
}

type matrixRow struct {
	Site  finding.Site
	Cells []matrixCell
}

// matrixCell has the numbers of the statuses that ask for something, the most urgent first, and of the rest.
type matrixCell struct {
	Topic  string
	Bundle string // in the tables of bundles side by side
	Worst  finding.Status
	Number int    // of the worst status
	More   int    // of the other statuses that ask for something
	Words  string // all statuses with their numbers
	Rest   string // the same without the worst
	Listed bool   // whether the register lists any of them
}

// asking are the statuses that ask for something to be done.
var asking = []finding.Status{finding.Gap, finding.Unproven, finding.Opinion, finding.Due}

func (v *page) matrixOf(findings []finding.Finding) {
	numbers, listed := map[[2]string]map[finding.Status]int{}, map[[2]string]bool{}
	topics := slices.Clone(finding.Topics)
	for _, c := range v.R.Counts {
		key := [2]string{c.Site, c.Topic}
		if numbers[key] == nil {
			numbers[key] = map[finding.Status]int{}
		}
		numbers[key][c.Status] += c.Number
		if !slices.Contains(topics, c.Topic) {
			topics = append(topics, c.Topic)
		}
	}
	for i := range findings {
		listed[[2]string{findings[i].Site, findings[i].Topic}] = true
	}
	for _, topic := range topics {
		if slices.ContainsFunc(v.R.Counts, func(c finding.Count) bool { return c.Topic == topic }) {
			v.Matrix.Topics = append(v.Matrix.Topics, topic)
		}
	}
	for _, s := range v.R.Sites {
		line := matrixRow{Site: s}
		for _, topic := range v.Matrix.Topics {
			key := [2]string{s.ID, topic}
			c := cellOf(topic, numbers[key])
			c.Listed = listed[key]
			line.Cells = append(line.Cells, c)
		}
		v.Matrix.Rows = append(v.Matrix.Rows, line)
	}
}

func cellOf(topic string, n map[finding.Status]int) matrixCell {
	c := matrixCell{Topic: topic}
	var words []string
	for _, s := range finding.Statuses {
		if n[s] == 0 {
			continue
		}
		words = append(words, fmt.Sprintf("%d %s", n[s], s))
		if c.Worst == "" {
			c.Worst, c.Number = s, n[s]
		} else if slices.Contains(asking, s) {
			c.More += n[s]
		}
	}
	c.Words, c.Rest = strings.Join(words, ", "), strings.Join(words[min(1, len(words)):], ", ")
	return c
}

// linedUp is how a site that several bundles judge stands under each topic by each of them.
type linedUp struct {
	Site finding.Site
	Rows []linedRow
}

type linedRow struct {
	Topic string
	Cells []matrixCell // one a bundle
}

// lineUp puts the bundles of each site that has several side by side.
func (v *page) lineUp(findings []finding.Finding) {
	numbers, listed := map[[3]string]map[finding.Status]int{}, map[[3]string]bool{}
	for _, c := range v.R.Counts {
		key := [3]string{c.Site, c.Bundle, c.Topic}
		if numbers[key] == nil {
			numbers[key] = map[finding.Status]int{}
		}
		numbers[key][c.Status] += c.Number
	}
	for i := range findings {
		listed[[3]string{findings[i].Site, findings[i].Bundle, findings[i].Topic}] = true
	}
	for _, s := range v.R.Sites {
		if len(s.Bundles) < 2 {
			continue
		}
		at := linedUp{Site: s}
		for _, topic := range v.Matrix.Topics {
			row, some := linedRow{Topic: topic}, false
			for _, bundle := range s.Bundles {
				key := [3]string{s.ID, bundle, topic}
				c := cellOf(topic, numbers[key])
				c.Bundle, c.Listed = bundle, listed[key]
				row.Cells, some = append(row.Cells, c), some || c.Worst != ""
			}
			if some {
				at.Rows = append(at.Rows, row)
			}
		}
		v.Lined = append(v.Lined, at)
	}
}

// sheetLine is a line of the sign-off sheet.
type sheetLine struct{ Site, Topic, Numbers string }

func (v *page) sheet() {
	for _, m := range v.Matrix.Rows {
		for _, c := range m.Cells {
			if c.Worst != "" {
				v.Sheet = append(v.Sheet, sheetLine{m.Site.ID, c.Topic, c.Words})
			}
		}
	}
}
