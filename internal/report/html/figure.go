package html

import (
	"bytes"
	"embed"
	"html/template"

	"hearduty/internal/calendar"
	"hearduty/internal/finding"
)

var (
	//go:embed figure*.html
	figureFiles embed.FS
	//go:embed figure.css
	figureStyle string

	figures = template.Must(template.New("figure").Funcs(template.FuncMap{"n": number}).ParseFS(figureFiles, "figure*.html"))
)

// figureOf draws what there is to draw of a subject: figures in SVG, each with a table that says the same.
func figureOf(p *finding.Portrait, deadlines []*finding.Finding, asOf calendar.Date) template.HTML {
	if p == nil {
		return ""
	}
	var b bytes.Buffer
	put := func(name string, view any) {
		if err := figures.ExecuteTemplate(&b, name, view); err != nil {
			b.WriteString(`<p class="alarm">A figure could not be drawn. The findings below do not depend on it.</p>`)
		}
	}
	if x := exposureOf(p, asOf); x != nil {
		put("exposure", x)
	}
	if s := stripOf(p, deadlines, asOf); s != nil {
		put("strip", s)
	}
	if a := audiogramOf(p); a != nil {
		put("audiogram", a)
	}
	return template.HTML(b.String())
}

// shape is a path with a class that says how to draw it, and a title where it has something to say of its own.
type shape struct{ Class, D, Title string }

// text is a word of a figure. Its class says on which side of its place it stands.
type text struct {
	X, Y    float64
	Class   string
	Text    string
	Further string // after it, fainter
}

// shapes are drawn in their order. Those of one class that have no title are one path.
type shapes struct{ Shapes []shape }

func (s *shapes) add(class, d string) {
	for i := range s.Shapes {
		if s.Shapes[i].Class == class && s.Shapes[i].Title == "" {
			s.Shapes[i].D += d
			return
		}
	}
	s.Shapes = append(s.Shapes, shape{Class: class, D: d})
}
