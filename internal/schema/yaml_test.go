package schema

import (
	"encoding/json"
	"os"
	"path/filepath"
	"strings"
	"testing"
)

// TestYAMLProblems holds what each mistake in a bundle's data file is told as.
func TestYAMLProblems(t *testing.T) {
	good := "a_level:\n  about: A level\n  unit: dBA\n  values:\n    - {from: 1983-04-07, value: 85, cite: \"(c)(1)\", seen: text}\n"
	for _, c := range []struct{ name, yaml, want string }{
		{"good", good, ""},
		{"no cite", strings.Replace(good, `cite: "(c)(1)", `, "", 1), "p.yaml:5:7: item 1 of values has no cite. Add it: paragraph."},
		{"misspelt key", strings.Replace(good, "unit:", "unite:", 1), `p.yaml:3:3: a_level has no key "unite". Write unit if that is meant; the keys are about, stricter, unit, values.`},
		{"bad word", strings.Replace(good, "seen: text", "seen: tekst", 1), `p.yaml:5:59: seen cannot be "tekst". Write text if that is meant; the words are text, secondary, memory.`},
		{"bad day", strings.Replace(good, "1983-04-07", "1983-02-29", 1), `p.yaml:5:14: from is not a day of the calendar: "1983-02-29". Write the day as YYYY-MM-DD.`},
		{"empty text", strings.Replace(good, "A level", `""`, 1), "p.yaml:2:10: about is empty. Fill it in."},
		{"null", strings.Replace(good, "A level", "~", 1), "p.yaml:2:10: about is empty. Write a text."},
		{"bad unit of interval", strings.Replace(good, "value: 85", "value: {day: 21}", 1), `p.yaml:5:34: value has no key "day". Write days if that is meant; the keys are calendar_years, days, months, working_days, years.`},
		{"two units", strings.Replace(good, "value: 85", "value: {days: 1, months: 2}", 1), "p.yaml:5:33: value has the wrong number of keys. Write an interval: one unit and a whole number of it, such as {days: 21}."},
		{"text for number", strings.Replace(good, "value: 85", "value: eighty-five", 1), "p.yaml:5:33: value is not of a form that is allowed here. Write a number, an interval such as {days: 21}, or a list of words."},
		{"no values", "a_level: {about: x, values: []}\n", "p.yaml:1:29: values has too few items: 0. List 1 at least."},
		{"double key", good + "a_level: {about: x, values: []}\n", `p.yaml:6:1: the key "a_level" stands twice; the first is in line 1. Keep one of the two.`},
		{"octal", strings.Replace(good, "value: 85", "value: 085", 1), `p.yaml:5:33: "085" is not a plain number. Write plain digits such as 85 or 12.5, or put a text in quotes.`},
		{"infinite", strings.Replace(good, "value: 85", "value: .inf", 1), `p.yaml:5:33: ".inf" is not a plain number. Write plain digits such as 85 or 12.5, or put a text in quotes.`},
		{"merge", "a: &x {about: y, values: []}\nb: {<<: *x}\n", "p.yaml:2:5: a key must be a single word. Write a word and a colon."},
		{"empty", "# nothing\n", "p.yaml: the file is empty. Fill it in or remove it."},
		{"two documents", good + "---\n" + good, "p.yaml:6:1: the file holds a second YAML document. Keep one document to a file."},
		{"not UTF-8", "a: \xff\n", "p.yaml: the file is not UTF-8 text. Save the file as UTF-8."},
		{"a list", "- 1\n", "p.yaml:1:1: the file is a list. Write keys with values."},
		{"a tag", strings.Replace(good, "A level", "!secret x", 1), "p.yaml:2:10: the YAML tag !secret is not known here. Remove the tag."},
		{"broken", "a: [1\n", "p.yaml:1: the YAML cannot be read: did not find expected ',' or ']'. Check indentation, quotes and brackets here and in the line before."},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, problems := YAML("parameters", "p.yaml", []byte(c.yaml))
			if got := problems.Error(); got != c.want {
				t.Errorf("got  %s\nwant %s", got, c.want)
			}
		})
	}
}

func TestYAMLValues(t *testing.T) {
	value, problems := YAML("choices", "c.yaml", []byte("annual:\n  about: 2020-01-02\n  values: [true, no, \"12\"]\n  default: no\n"))
	if problems != nil {
		t.Fatal(problems)
	}
	text, _ := json.Marshal(value)
	if want := `{"annual":{"about":"2020-01-02","default":"no","values":[true,"no","12"]}}`; string(text) != want {
		t.Errorf("got %s, want %s", text, want)
	}
}

// TestBundleFiles checks the data files of all bundles.
func TestBundleFiles(t *testing.T) {
	paths, _ := filepath.Glob("../../policies/*/*/data.yaml")
	for _, path := range paths {
		content, err := os.ReadFile(path)
		if err != nil {
			t.Fatal(err)
		}
		name := filepath.Base(filepath.Dir(path))
		about, err := os.ReadFile(filepath.Join(filepath.Dir(filepath.Dir(path)), "about", "data.yaml"))
		if err != nil {
			t.Fatal(err)
		}
		if name == "measures" && strings.Contains(string(about), "\nextends:") {
			continue // it says only what differs; the loader checks what comes of it
		}
		if _, problems := YAML(name, path, content); problems != nil {
			t.Error(problems)
		}
	}
}
