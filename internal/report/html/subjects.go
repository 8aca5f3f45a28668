package html

import (
	"cmp"
	"slices"
	"strings"

	"hearduty/internal/finding"
)

// mostSubjects is the number of subjects that are drawn; of more, those with the most urgent findings.
const mostSubjects = 800

// subject is a subject with its findings and what can be drawn of it.
type subject struct {
	Anchor   string
	Site     string
	Kind, ID string
	Findings []*finding.Finding
	Worst    finding.Status
	Portrait *finding.Portrait
	Due      []*finding.Finding
}

func (v *page) subjects(findings []finding.Finding) {
	portraits := map[[3]string]*finding.Portrait{}
	for i := range v.R.Portraits {
		p := &v.R.Portraits[i]
		portraits[[3]string{p.Site, p.Subject.Kind, p.Subject.ID}] = p
	}
	at := map[[3]string]int{}
	for i := range findings {
		f := &findings[i]
		key := [3]string{f.Site, f.Subject.Kind, f.Subject.ID}
		n, ok := at[key]
		if !ok {
			n = len(v.Subjects)
			at[key] = n
			v.Subjects = append(v.Subjects, subject{Anchor: anchor(f), Site: f.Site, Kind: f.Subject.Kind, ID: f.Subject.ID, Portrait: portraits[key]})
		}
		v.Subjects[n].add(f)
	}
	if len(v.Subjects) > mostSubjects {
		slices.SortStableFunc(v.Subjects, func(a, b subject) int { return a.Worst.Urgency() - b.Worst.Urgency() })
		v.Undrawn = len(v.Subjects) - mostSubjects
		v.Subjects = v.Subjects[:mostSubjects]
	}
	slices.SortStableFunc(v.Subjects, func(a, b subject) int {
		return cmp.Or(cmp.Compare(a.Site, b.Site), cmp.Compare(kindOrder(a.Kind), kindOrder(b.Kind)), cmp.Compare(a.ID, b.ID))
	})
	v.drawn = map[string]bool{}
	for _, s := range v.Subjects {
		v.drawn[s.Anchor] = true
	}
}

func (s *subject) add(f *finding.Finding) {
	s.Findings = append(s.Findings, f)
	if s.Worst == "" || f.Status.Urgency() < s.Worst.Urgency() {
		s.Worst = f.Status
	}
	if f.Due.Known() && (f.Status == finding.Due || f.Status == finding.Gap) {
		s.Due = append(s.Due, f)
	}
}

// kinds are the kinds of subjects, those of the place first.
var kinds = []string{"site", "area", "group", "instrument", "room", "tester", "worker"}

func kindOrder(kind string) int { return slices.Index(kinds, kind) }

// Drawn says whether a finding's subject has a part of the page.
func (v *page) Drawn(f *finding.Finding) bool { return v.drawn[anchor(f)] }

// apart keeps an id from running into the next part of an anchor.
var apart = strings.NewReplacer("~", "~0", "/", "~1")

// anchor is the name of a subject's part of the page.
func anchor(f *finding.Finding) string {
	return "of/" + apart.Replace(f.Site) + "/" + f.Subject.Kind + "/" + apart.Replace(f.Subject.ID)
}
