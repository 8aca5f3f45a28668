package text

import (
	"fmt"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// sideBySide writes the number of findings of a site that several bundles judge: topic by topic one row a bundle, so
// that the same topic can be read under each.
func sideBySide(p *page, r *finding.Report, site finding.Site) {
	numbers := map[string]map[string]map[finding.Status]int{} // by bundle and topic
	var judging, topics []string
	for _, bundle := range site.Bundles {
		of, some := tally(r, site.ID, bundle)
		if len(some) == 0 {
			continue
		}
		p.para(2, 5, letter(len(judging))+": by "+bundle)
		judging, numbers[bundle] = append(judging, bundle), of
		for _, topic := range some {
			if !slices.Contains(topics, topic) {
				topics = append(topics, topic)
			}
		}
	}
	for _, bundle := range site.Bundles {
		if numbers[bundle] == nil {
			p.para(2, 2, bundle+nothingOwed)
		}
	}
	slices.SortFunc(topics, compareTopics)
	if len(topics) > 0 && p.width >= tableWidth {
		statusHeads(p)
	}
	for _, topic := range topics {
		for i, bundle := range judging {
			title := topic
			if i > 0 && p.width >= tableWidth {
				title = ""
			}
			statusRow(p, title, letter(i), numbers[bundle][topic])
		}
	}
}

// letter tells a bundle of a site apart in the table.
func letter(i int) string {
	const letters = "ABCDEFGHIJKLMNOPQRSTUVWXYZ"
	if i < len(letters) {
		return letters[i : i+1]
	}
	return fmt.Sprint(i + 1)
}

// statusHeads writes the heads of a table of counts with a mark before the numbers.
func statusHeads(p *page) {
	line := padRight("", markColumn)
	for _, status := range columns {
		line += padLeft(string(status), columnWidth(status))
	}
	p.raw(line)
}

// markColumn is the width of a topic and the mark behind it.
const markColumn = 16

// statusRow writes one row of such a table, or on a narrow page a line of words.
func statusRow(p *page, title, mark string, numbers map[finding.Status]int) {
	if p.width < tableWidth {
		words := inWords(numbers)
		if words == "" {
			words = "nothing"
		}
		p.para(2, 4, title+", "+mark+": "+words)
		return
	}
	line := padRight("  "+padRight(fit(title, markColumn-4), markColumn-3)+mark, markColumn)
	for _, status := range columns {
		n := "-"
		if k := numbers[status]; k > 0 {
			n = fmt.Sprint(k)
		}
		line += padLeft(n, columnWidth(status))
	}
	p.raw(strings.TrimRight(line, " "))
}
