package grid

import (
	"fmt"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestObjects(t *testing.T) {
	for _, c := range []struct {
		name, file, text string
		want             []string
	}{
		{"array", "x.json", `[{"id":"007","left":{"500":10,"1000":12.50}},{"id":"8","by":null,"left":{"2000":1e1},"ok":true}]`,
			[]string{"id|left.500|left.1000|by|left.2000|ok", "007|10|12.50", "8||||1e1|true"}},
		{"lists", "x.json", `[{"a":["x","y"],"b":[],"c":[1],"d":["x;y"],"e":[{}],"f":[null]}]`, []string{"a|b|c|d|e|f", "x;y||1|[…]|[…]|[…]"}},
		{"list within an object", "x.json", `{"site":"kiln-hill","codes":[1,2],"rows":[{"a":1},{"a":2}],"end":{"rows":[{}]}}`, []string{"a", "1", "2"}},
		{"empty list within an object", "x.json", `{"rows":[]}`, []string{""}},
		{"escapes", "x.json", `[{"a\"b":"x\ny\u00e4"}]`, []string{`a"b`, "x\nyä"}},
		{"key twice", "x.json", `[{"a":1,"a":2},{"a":{"b":1},"a.b":2},{"a":3}]`, []string{"a", `! the key "a" stands twice`, `! the key "a.b" stands twice`, "3"}},
		{"no objects", "x.json", `[1,{"a":2},[]]`, []string{"a", "! this is no JSON object", "2", "! this is no JSON object"}},
		{"broken", "x.json", "[{\"a\":1},\n{\"a\":}]", []string{"a", "1", "!! the JSON is broken: invalid character '}' looking for beginning of value"}},
		{"cut off", "x.json", `{"rows":[{"a":1},{"a"`, []string{"a", "1", "!! the JSON ends too early"}},
		{"something after", "x.json", `[{"a":1}]x`, []string{"a", "1", "!! something follows the JSON array"}},
		{"deep", "x.json", "[" + strings.Repeat(`{"a":`, 20) + "1" + strings.Repeat("}", 20) + `,{"b":1}]`, []string{"b", "! objects stand within objects 16 times", "1"}},
		{"very deep", "x.json", strings.Repeat("[", 200_000), []string{"", "!! the JSON is broken: invalid character '[' exceeded max depth"}},
		{"long row", "x.json", `[{"a":"` + strings.Repeat("x", MaxRow) + `"},{"a":1}]`, []string{"a", "! the row is longer than 1024 KiB", "1"}},
		{"endless row", "x.json", `[{"a":1},{"a":"` + strings.Repeat("x", maxObject+1<<20) + `"},{"a":1}]`, []string{"a", "1", "!! a value is longer than 16 MiB"}},
		{"UTF-16", "x.json", "\xff\xfe[\x00{\x00\"\x00a\x00\"\x00:\x001\x00}\x00]\x00", []string{"a", "1"}},
		{"lines", "x.ndjson", "{\"a\":1}\n\n{\"b\":\"x\"}\r\n{\"a\":\n", []string{"a|b", "1", "", "|x", "! the JSON ends too early"}},
		{"lines under the name of JSON", "x.json", "{\"a\":1}\n{\"a\":2}\n", []string{"a", "1", "2"}},
		{"YAML", "x.yaml", "- {id: 00123, on: 2025-03-04, sex: no, ok: true, v: 1.10, t: 7:45, n: ~, q: 'null'}\n- id: 8\n  left: {500: 10}\n  topics: [a, b]\n",
			[]string{"id|on|sex|ok|v|t|n|q|left.500|topics", "00123|2025-03-04|no|true|1.10|7:45||null", "8||||||||10|a;b"}},
		{"YAML, list within an object", "x.yml", "site: kiln-hill\nrows:\n  - a: 1\n", []string{"a", "1"}},
		{"YAML, aliases", "x.yaml", "- &base {room: R1, by: T1}\n- <<: *base\n  by: T2\n- *base\n- all: *base\n", []string{"room|by|all.room|all.by", "R1|T1", "R1|T2", "R1|T1", "||R1|T1"}},
		{"YAML, faults of rows", "x.yaml", "- a: 1\n  a: 2\n- x\n-\n- [1]\n- {[1]: 2}\n- a: 1\n", []string{"a", `! the key "a" stands twice`, "! the item of the list is no object", "", "! the item of the list is no object", "! a key of the object is no single value", "1"}},
		{"YAML, recursion", "x.yaml", "- &a {b: *a}\n", []string{"", "! objects stand within objects 16 times"}},
		{"YAML, laughs", "x.yaml", laughs(), []string{"", "! the aliases of the YAML stand for too many values"}},
	} {
		t.Run(c.name, func(t *testing.T) {
			got, about := table(t, open(t, c.file, c.text), Options{})
			require.Equal(t, c.want, got)
			require.NotEmpty(t, about.Encoding)
		})
	}
}

// laughs makes an object of ten to the sixth members from a few aliases.
func laughs() string {
	text := "- a0: &a0 {x: 1}\n"
	for i := 1; i <= 6; i++ {
		text += fmt.Sprintf("  a%d: &a%d {", i, i)
		for j := range 10 {
			text += fmt.Sprintf("k%d: *a%d, ", j, i-1)
		}
		text += "}\n"
	}
	return text
}

func TestObjectsRefused(t *testing.T) {
	keys := make([]string, maxKeys+1)
	for i := range keys {
		keys[i] = fmt.Sprintf("%q:1", fmt.Sprint("k", i))
	}
	for _, c := range []struct {
		name, file, text, problem string
		line                      int
	}{
		{"empty", "x.json", " ", "the file is empty", 0},
		{"single value", "x.json", "1", "the file does not hold a JSON array", 0},
		{"object without a list", "x.json", `{"a":{"rows":[{}]},"b":[1]}`, "the object of the file holds no list of objects", 0},
		{"two lists", "x.json", `{"a":[{}],"b":[{}]}`, "the object holds several lists: a, b", 0},
		{"broken at once", "x.json", "\n\n]", "the JSON is broken: invalid character ']' looking for beginning of value", 3},
		{"too many keys", "x.json", "[{" + strings.Join(keys, ",") + "}]", "more than 10000 different keys", 0},
		{"YAML, empty", "x.yaml", "# nothing\n", "the file is empty", 0},
		{"YAML, nothing", "x.yaml", "~\n", "the file is empty", 0},
		{"YAML, no list", "x.yaml", "a: 1\n", "the object of the file holds no list of objects", 0},
		{"YAML, text", "x.yaml", "a\n", "the file does not hold a YAML list", 0},
		{"YAML, tab", "x.yaml", "- a: 1\n\tb: 2\n", "the YAML is broken: found a tab character that violates indentation", 2},
		{"YAML, two documents", "x.yaml", "- a: 1\n---\n- a: 2\n", "the file holds several YAML documents", 2},
		{"YAML, unknown alias", "x.yaml", "- *a\n", "unknown anchor 'a' referenced", 0},
		{"YAML, long", "x.yaml", "- a: " + strings.Repeat("x", maxYAML) + "\n", "the YAML file is longer than 8 MiB", 0},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := open(t, c.file, c.text).Rows(Options{})
			f := problem(t, err)
			require.Contains(t, f.Problem, c.problem)
			require.Equal(t, c.line, f.Line)
		})
	}
}

func TestKindsOfCells(t *testing.T) {
	rows, err := open(t, "x.yaml", "- {n: 12.5, z: 007, t: x, b: TRUE, e: ~, l: [{}], d: 2025-03-04}\n").Rows(Options{})
	require.NoError(t, err)
	var r Row
	require.NoError(t, rows.Next(&r))
	require.Zero(t, r.Line, "the header is made")
	require.NoError(t, rows.Next(&r))
	require.Equal(t, 1, r.Line)
	require.Equal(t, []Cell{{"12.5", Number}, {"007", Text}, {"x", Text}, {"true", Bool}, {"", Text}, {"[…]", Broken}, {"2025-03-04", Text}}, r.Cells)
}
