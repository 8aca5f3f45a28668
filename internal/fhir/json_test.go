package fhir

import (
	"bytes"
	"encoding/json"
	"fmt"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/assert"
	"github.com/stretchr/testify/require"
)

// plain gives a value as encoding/json does, with numbers as written.
func (n *node) plain() any {
	switch n.kind {
	case boolean:
		return n.text == "true"
	case number:
		return json.Number(n.text)
	case text:
		return n.text
	case list:
		out := []any{}
		for i := range n.items {
			out = append(out, n.items[i].plain())
		}
		return out
	case object:
		out := map[string]any{}
		for i, k := range n.keys {
			out[k] = n.items[i].plain()
		}
		return out
	}
	return nil
}

// alike reads text with the scanner and with encoding/json, and wants the same of both.
func alike(t *testing.T, text []byte) {
	t.Helper()
	if !utf8.Valid(text) {
		return // encoding/json puts U+FFFD in place of what is not UTF-8; here it is refused
	}
	s := newScanner(bytes.NewReader(text))
	s.fresh()
	got, err := s.value(1)
	if err == nil {
		var c byte
		if c, err = s.peek(); err == nil && c != 0 {
			err = s.broken("something follows")
		}
	}
	if err != nil && strings.Contains(err.Error(), "levels deep") || s.over {
		return
	}
	require.Equal(t, json.Valid(text), err == nil, "%q: %v", text, err)
	if err != nil {
		return
	}
	dec := json.NewDecoder(bytes.NewReader(text))
	dec.UseNumber()
	var want any
	require.NoError(t, dec.Decode(&want))
	if !holdsCut(&got) {
		assert.Equal(t, want, got.plain(), "%q", text)
	}
}

func holdsCut(n *node) bool {
	cut := n.cut || len(strings.Join(n.keys, "")) > maxText/2
	for i := range n.items {
		cut = cut || holdsCut(&n.items[i])
	}
	return cut
}

var jsonTexts = []string{
	``, ` `, `{}`, `[]`, `null`, `true`, `false`, `tru`, `nul`, `truex`, `0`, `-0`, `00`, `01`, `-`, `1.`, `.5`, `1.5`, `1e`, `1e5`, `1E+05`, `1e-`, `-1.25e-7`,
	`"a"`, `"a`, `"\n\t\"\\\/\b\f\r"`, `"\x"`, `"\u00e9"`, `"\u00g9"`, `"\ud83d\ude00"`, `"\ud83d"`, `"\ud83dx"`, `"\ud83d\u0041"`, `"\ude00"`, "\"\x01\"", "\"\n\"", `"é😀"`,
	`[1,2]`, `[1,]`, `[,1]`, `[1 2]`, `[1`, `{"a":1}`, `{"a":1,}`, `{"a" 1}`, `{a:1}`, `{"a":1 "b":2}`, `{"a":1,"a":2}`, `{"a":{"b":[{"c":null}]}}`, `{"a":1}}`, `{"a"`, `{"a":`, `{,}`, `1 2`, `"a" x`, "\t{\r\n\"a\" :\n1 }\n",
}

func TestScannerReadsAsTheStandardLibrary(t *testing.T) {
	t.Parallel()
	for _, text := range jsonTexts {
		alike(t, []byte(text))
	}
}

func TestScannerSaysWhereAndWhat(t *testing.T) {
	t.Parallel()
	for text, want := range map[string]broken{
		"{\n\"a\": 1,\n}":        {3, "the JSON has a comma before }"},
		"{\"a\": [1\n2]}":        {2, `the JSON is broken: '2' stands where a comma or ] belongs`},
		"{\"a\":\n":              {2, endsEarly},
		"\"a\xff\"":              {1, "the file holds a byte that is not UTF-8 text"},
		"\"\\ud83d\\uzzzz\"":     {1, `the JSON is broken: \u is not followed by four hexadecimal digits`},
		"[-]":                    {1, "the JSON is broken: a number is not complete"},
		"[\n\n'a']":              {3, `the JSON is broken: '\'' stands where a value belongs`},
		"[\"a\tb\"]":             {1, "the JSON is broken: a text holds the control character U+0009"},
		strings.Repeat("[", 200): {1, "the JSON is nested more than 100 levels deep"},
	} {
		s := newScanner(strings.NewReader(text))
		_, err := s.value(1)
		assert.Equal(t, &want, err, "%q", text)
	}
}

func TestScannerKeepsLittleOfMuch(t *testing.T) {
	t.Parallel()
	long := strings.Repeat("é", 1<<20)
	s := newScanner(strings.NewReader(`{"data": "` + long + `", "id": "a"}`))
	v, err := s.value(1)
	require.NoError(t, err)
	assert.True(t, v.at("data").cut)
	assert.LessOrEqual(t, len(v.at("data").text), maxText)
	assert.Equal(t, "a", v.at("id").text)
	assert.False(t, s.over)

	s = newScanner(strings.NewReader("[" + strings.Repeat(`0,`, 2*maxValues) + "0]"))
	v, err = s.value(1)
	require.NoError(t, err)
	assert.True(t, s.over)
	assert.LessOrEqual(t, len(v.items), maxValues)

	s = newScanner(strings.NewReader("[" + strings.Repeat(`"`+strings.Repeat("x", 1000)+`",`, 10_000) + "0]"))
	_, err = s.value(1)
	require.NoError(t, err)
	assert.True(t, s.over)
	assert.LessOrEqual(t, s.kept, 11<<20)
}

func TestScannerFindsKeysThatStandTwice(t *testing.T) {
	t.Parallel()
	many := `{"a": 1`
	for i := range 40 {
		many += fmt.Sprintf(`, "k%d": 1`, i)
	}
	for text, want := range map[string]string{
		`{"a": 1, "a": 2}`:          "a",
		`{"a": {"b": 1, "b": 1}}`:   "b",
		many + `, "k30": 1}`:        "k30",
		many + `}`:                  "",
		`[{"a": 1}, {"a": 1}]`:      "",
		`{"a": 1, "b": {"a": 1}}`:   "",
		many + `, "a": 1, "k1": 1}`: "a",
	} {
		s := newScanner(strings.NewReader(text))
		_, err := s.value(1)
		require.NoError(t, err)
		assert.Equal(t, want, s.twice, text)
	}
}

func FuzzScanner(f *testing.F) {
	for _, text := range jsonTexts {
		f.Add([]byte(text))
	}
	f.Fuzz(alike)
}
