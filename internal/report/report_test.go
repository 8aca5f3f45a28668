package report

import (
	"bytes"
	"encoding/json"
	"flag"
	"os"
	"path/filepath"
	"regexp"
	"strings"
	"testing"
	"unicode"

	"hearduty/internal/diag"
	"hearduty/internal/finding"
	"hearduty/internal/schema"
)

var update = flag.Bool("update", false, "write the golden files")

// golden compares a text with the golden file of that name.
func golden(t *testing.T, name string, got []byte) {
	t.Helper()
	path := filepath.Join("testdata", name)
	if *update {
		if err := os.WriteFile(path, got, 0o644); err != nil {
			t.Fatal(err)
		}
	}
	want, err := os.ReadFile(path)
	if err != nil {
		t.Fatal(err)
	}
	if !bytes.Equal(got, want) {
		t.Errorf("%s differs; look at it and run go test ./internal/report -update\n%s", path, got)
	}
}

var reports = map[string]func() *finding.Report{"sample": whole(sample), "empty": whole(empty), "long": whole(long)}

// whole gives a report empty lists where it has none, as the judge does, and the law to the sample's first finding.
func whole(of func() *finding.Report) func() *finding.Report {
	return func() *finding.Report {
		r := of()
		r.AcceptedTotals, r.Duties, r.Parameters, r.Rates = map[finding.Status]int{}, []finding.Duty{}, []finding.Parameter{}, []finding.Rate{}
		if len(r.Findings) == 0 {
			return r
		}
		f := &r.Findings[0]
		r.Duties = []finding.Duty{{Bundle: f.Bundle, ID: f.Duty, Title: "Title of " + f.Duty, Description: "What it asks.", Cite: f.Cite, Topic: f.Topic, Subject: f.Subject.Kind,
			Severity: "major", Evidence: []string{"audiogram"}, Remedy: f.Remedy}}
		r.Parameters = []finding.Parameter{{Bundle: f.Bundle, Name: "protector_variety", About: "suitable models offered", Value: "2 models", From: "1983-04-07", Cite: "29 CFR 1910.95(i)(3)", Seen: "memory", InForce: true}}
		part, of, percent := 45, 48, 93.8
		r.Rates = []finding.Rate{{Site: f.Site, Bundle: f.Bundle, Year: 2025, Name: "trained_in_time", Part: &part, Of: &of, Percent: &percent, About: "training in time"},
			{Site: f.Site, Bundle: f.Bundle, Year: 2025, Name: "shifts", Suppressed: true, About: "shifts"}}
		return r
	}
}

// dressed is the style and the script of a page, which are the same in all.
var dressed = regexp.MustCompile(`(?s)<(style|script)>.*?</(?:style|script)>`)

func TestGolden(t *testing.T) {
	for name, make := range reports {
		for _, f := range Formats(Options{}) {
			var b bytes.Buffer
			if err := f.Write(&b, make()); err != nil {
				t.Fatal(err)
			}
			if !Binary(f) { // its own tests hold the cells of a workbook
				golden(t, name+"."+f.Name(), dressed.ReplaceAll(b.Bytes(), []byte("<$1>…</$1>")))
			}
		}
	}
}

func TestJSONFitsItsSchema(t *testing.T) {
	f, _ := Named("json", Options{})
	for name, make := range reports {
		var b bytes.Buffer
		if err := f.Write(&b, make()); err != nil {
			t.Fatal(err)
		}
		var value any
		if err := json.Unmarshal(b.Bytes(), &value); err != nil {
			t.Fatal(err)
		}
		if problems := schema.Validate("report", value, func(p string) diag.Position { return diag.Position{File: p} }); problems != nil {
			t.Errorf("%s: %v", name, problems)
		}
		if bytes.Contains(b.Bytes(), []byte(": null")) && name == "empty" {
			t.Error("an empty list is null")
		}
	}
}

func TestTextIsSafeAndFits(t *testing.T) {
	for name, make := range reports {
		for _, width := range []int{40, 80, 200} {
			var b bytes.Buffer
			f, _ := Named("text", Options{Width: width})
			if err := f.Write(&b, make()); err != nil {
				t.Fatal(err)
			}
			for line := range strings.SplitSeq(b.String(), "\n") {
				if n := len([]rune(line)); n > width {
					t.Errorf("%s at %d columns: a line has %d characters: %s", name, width, n, line)
				}
				if strings.ContainsFunc(line, unicode.IsControl) {
					t.Errorf("%s: a line has a control character: %q", name, line)
				}
			}
		}
	}
}

func TestColourOnlyRepeats(t *testing.T) {
	var plain, coloured bytes.Buffer
	for _, c := range []struct {
		b      *bytes.Buffer
		colour bool
	}{{&plain, false}, {&coloured, true}} {
		f, _ := Named("text", Options{Colour: c.colour})
		if err := f.Write(c.b, sample()); err != nil {
			t.Fatal(err)
		}
	}
	stripped := coloured.String()
	for _, code := range []string{"\x1b[1m", "\x1b[1;31m", "\x1b[1;33m", "\x1b[0m"} {
		stripped = strings.ReplaceAll(stripped, code, "")
	}
	if stripped != plain.String() || coloured.String() == plain.String() {
		t.Error("the coloured report says something else")
	}
}
