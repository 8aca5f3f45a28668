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
	Worst  finding.Status
	Number int // of the worst status
	More   int // of the other statuses that ask for something
	Words  string
	Listed bool // whether the register lists any of them
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
	c.Words = strings.Join(words, ", ")
	return c
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
