package cli

import (
	"bytes"
	"encoding/csv"
	"encoding/json"
	"os"
	"path/filepath"
	"regexp"
	"slices"
	"strconv"
	"strings"
	"testing"
)

// privateTexts gathers what of the demo program only those may see who ask for it: the dates of birth, and the figures
// and sums of a report with health detail.
func privateTexts(t *testing.T, dir string) (births, figures []string) {
	t.Helper()
	content, err := os.ReadFile(filepath.Join(dir, "records", "workers.csv"))
	if err != nil {
		t.Fatal(err)
	}
	rows, err := csv.NewReader(bytes.NewReader(content)).ReadAll()
	if err != nil {
		t.Fatal(err)
	}
	for i, column := range rows[0] {
		if column == "birth_date" {
			for _, row := range rows[1:] {
				births = append(births, row[i])
			}
		}
	}
	_, out, _ := call("check", dir, "--all", "--format", "json", "--health-detail")
	var report struct {
		Findings []struct{ Health map[string]any }
	}
	if err := json.Unmarshal([]byte(out), &report); err != nil {
		t.Fatal(err)
	}
	sums := 0
	for _, f := range report.Findings {
		for _, v := range f.Health {
			switch v := v.(type) {
			case float64:
				if v != float64(int(v)) { // whole numbers stand everywhere
					figures = append(figures, strconv.FormatFloat(v, 'f', -1, 64))
				}
			case []any:
				for _, sum := range v {
					text, ok := sum.(string)        // else a frequency
					if sums++; ok && sums%97 == 0 { // some of thousands; all of them have words that are looked for beside
						figures = append(figures, text)
					}
				}
			}
		}
	}
	slices.Sort(figures)
	figures = slices.Compact(figures)
	if len(births) < 100 || len(figures) < 20 {
		t.Fatalf("%d dates of birth and %d figures are too few to look for", len(births), len(figures))
	}
	return births, figures
}

// audiometric finds a hearing level or an average change in words, and the columns of thresholds.
var audiometric = regexp.MustCompile(`dB HL|average change|audiometric zero|against the baseline of|pure-tone|median|for age\b|(left|right)[._](\d{3,4}|db|level|corrected)|birth_date|"health"`)

var decibels = regexp.MustCompile(`\d dB|_db"`)

// TestOutputHoldsNoAudiometricFigures looks through everything that is written without --health-detail.
// withoutLaw takes the text of the law out of a report, which speaks of decibels and of age.
func withoutLaw(t *testing.T, out string) string {
	t.Helper()
	if !strings.HasPrefix(out, "{") {
		return out
	}
	var report map[string]json.RawMessage
	if err := json.Unmarshal([]byte(out), &report); err != nil {
		t.Fatal(err)
	}
	delete(report, "duties")
	delete(report, "parameters")
	rest, err := json.Marshal(report)
	if err != nil {
		t.Fatal(err)
	}
	return string(rest)
}

func TestOutputHoldsNoAudiometricFigures(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	births, figures := privateTexts(t, dir)
	outputs := map[string]string{}
	for _, args := range [][]string{{"check"}, {"check", "--all"}, {"check", "--format", "json"}, {"check", "--all", "--format", "json"}} {
		_, out, _ := call(append(args, dir, "--width", "1000")...)
		outputs[strings.Join(args, " ")] = withoutLaw(t, out)
	}
	duties := map[string]bool{}
	for _, f := range listed(t, dir) {
		if !duties[f.Duty] && f.Subject.Kind == "worker" {
			duties[f.Duty] = true
			_, out, _ := call("explain", f.ID, dir, "--width", "1000")
			what, rule, _ := strings.Cut(out, "\nThe rule, ") // the rule is the same for all
			if rule == "" {
				t.Fatalf("%s is not explained: %s", f.ID, out)
			}
			asks, found, _ := strings.Cut(what, "\nWhat was found\n") // what the duty asks is the text of the law
			outputs["explain "+f.Duty+" "+f.Status] = strings.Split(asks, "\n")[0] + found
		}
	}
	var report struct {
		Findings []struct {
			Duty, Topic, Message string
			Facts                json.RawMessage
		}
	}
	if err := json.Unmarshal([]byte(outputs["check --all --format json"]), &report); err != nil {
		t.Fatal(err)
	}
	for _, f := range report.Findings {
		if strings.Contains("audiometry follow-up reporting", f.Topic) && decibels.MatchString(f.Message+string(f.Facts)) {
			t.Errorf("%s shows decibels: %s %s", f.Duty, f.Message, f.Facts)
		}
	}
	for name, out := range outputs {
		if hit := audiometric.FindString(out); hit != "" {
			t.Errorf("%s shows %q", name, hit)
		}
		for _, text := range append(births, figures...) {
			if text != "" && strings.Contains(out, text) {
				t.Errorf("%s shows %q", name, text)
			}
		}
	}
}

type listedFinding struct {
	ID, Duty, Status string
	Subject          struct{ Kind, ID string }
}

func listed(t *testing.T, dir string) []listedFinding {
	t.Helper()
	_, out, _ := call("check", dir, "--format", "json")
	var report struct{ Findings []listedFinding }
	if err := json.Unmarshal([]byte(out), &report); err != nil {
		t.Fatal(err)
	}
	return report.Findings
}

// TestHealthDetailShowsThem shows that the figures are there for those who ask.
func TestHealthDetailShowsThem(t *testing.T) {
	t.Parallel()
	dir := writeDemo(t)
	wanted := map[string][]string{
		"shift-notice":          {"; at least 10 dB: yes"},
		"audiogram-compared":    {"; at least 10 dB: "},
		"hearing-loss-recorded": {"hearing level without age correction: 2000 Hz ", "; at least 25 dB: yes"},
		"baseline-revision":     {"; at least 10 dB: "},
	}
	for _, f := range listed(t, dir) {
		special, ok := wanted[f.Duty]
		if !ok || f.Status == "unproven" {
			continue
		}
		delete(wanted, f.Duty)
		_, without, _ := call("explain", f.ID, dir, "--width", "1000")
		if !strings.Contains(without, "--health-detail shows them") {
			t.Errorf("the explanation of %s does not say that figures are left out", f.Duty)
		}
		_, with, _ := call("explain", f.ID, dir, "--health-detail", "--width", "1000")
		for _, want := range append(special, "Audiometric figures (medical)", "left.2000", "average change", "left ear against the baseline of", "with age correction from",
			"for information only: pure-tone average of the left ear", "the median of people of this sex") {
			if !strings.Contains(with, want) {
				t.Errorf("the explanation of %s lacks %q:\n%s", f.Duty, want, with)
			}
		}
	}
	if len(wanted) > 0 {
		t.Fatalf("the demo program has no finding of %v", wanted)
	}
}

// TestRejectsHoldNoPrivateCells shows that a cell of a threshold or a date of birth that cannot be read is not repeated.
func TestRejectsHoldNoPrivateCells(t *testing.T) {
	t.Parallel()
	dir := t.TempDir()
	for name, text := range map[string]string{
		"program.yaml":   "program: Private\nas_of: 2026-06-30\nsites: [{id: a, bundles: [us-osha-general-industry]}]\nrecords: [workers.csv, audiograms.csv]\n",
		"workers.csv":    "worker_id,site,birth_date,hired_on\n001,a,1980-01-02,2020-01-01\n002,a,17.03.1981,2020-01-01\n",
		"audiograms.csv": "audiogram_id,worker_id,date,left.2000\nA1,001,2021-02-03,4S\nA2,001,2022-02-03,10\n",
	} {
		if err := os.WriteFile(filepath.Join(dir, name), []byte(text), 0o600); err != nil {
			t.Fatal(err)
		}
	}
	for _, format := range []string{"text", "json"} {
		_, out, _ := call("check", dir, "--format", format, "--width", "1000")
		if strings.Contains(out, "4S") || strings.Contains(out, "17.03.1981") {
			t.Errorf("the %s report repeats a private cell", format)
		}
		if !strings.Contains(out, "what stands there is not a threshold") || !strings.Contains(out, "what stands there is not a date") {
			t.Errorf("the %s report does not say what is wrong:\n%s", format, out)
		}
		_, out, _ = call("check", dir, "--format", format, "--width", "1000", "--health-detail")
		if !strings.Contains(out, "4S") || !strings.Contains(out, "17.03.1981") {
			t.Errorf("the %s report with health detail does not repeat the cells", format)
		}
	}
}
