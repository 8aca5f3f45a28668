package switchover

import (
	"bytes"
	_ "embed"
	"fmt"
	"html/template"
	"io"
	"strings"

	"hearduty/internal/finding"
	"hearduty/internal/report/html"
	"hearduty/internal/report/text"
)

var (
	//go:embed page.html
	pageText string

	pages = template.Must(template.New("page").Funcs(template.FuncMap{
		"mark": html.Mark, "part": text.SwitchPart, "standing": text.StandingWords, "sides": sidesOf, "differing": differing, "differs": differs, "still": still,
		"words":    func(list []string) string { return strings.Join(list, ", ") },
		"spaced":   func(name string) string { return strings.ReplaceAll(name, "_", " ") },
		"onesided": func(t finding.SwitchTopic) []string { return text.OneSided(&t) },
		"needs":    func(s finding.SwitchSite) []string { return text.SwitchNeeds(&s) },
	}).Parse(pageText))
)

// page is what the template shows.
type page struct {
	S        *finding.Switch
	Style    template.CSS
	Statuses []finding.Status
}

// sides are two rows of a table, one a side.
type sides struct {
	Title string
	Rows  []row
}

type row struct {
	Side  string
	Cells []int
}

func sidesOf(title string, n finding.SwitchNumbers) sides {
	cells := func(numbers map[finding.Status]int) (out []int) {
		for _, s := range finding.Statuses {
			out = append(out, numbers[s])
		}
		return out
	}
	return sides{title, []row{{"A", cells(n.From)}, {"B", cells(n.To)}}}
}

// differing tells the parameters of a topic that are not the same on both sides.
func differing(t finding.SwitchTopic) []string { return text.SwitchValues(&t) }

func differs(t finding.SwitchTopic) bool { return len(differing(t)) > 0 }

// still lists the topics under which nobody and nothing stands otherwise, and no number differs.
func still(s finding.SwitchSite) (out []string) {
	for _, t := range s.Topics {
		if len(t.Moves) == 0 && !differs(t) {
			out = append(out, t.Topic)
		}
	}
	return out
}

func writeHTML(w io.Writer, s *finding.Switch) error {
	var b bytes.Buffer
	if err := pages.Execute(&b, page{s, html.Style(), finding.Statuses}); err != nil {
		return fmt.Errorf("the page cannot be written: %w", err)
	}
	_, err := w.Write(b.Bytes())
	return err
}
