package grid

import (
	"bytes"
	"encoding/json"
	"io"
	"slices"
	"strings"
	"testing"
	"unicode/utf8"

	"github.com/stretchr/testify/require"
	"golang.org/x/text/encoding/unicode"
)

func FuzzDelimiter(f *testing.F) {
	for _, text := range []string{"a;b\n1,5;2,5\n", "a,b\n\"1;2\",3\n", "sep=|\na|b\n", "Name, first;Born\nDoe, Jo;1980\n", "", "\r\r", "a\tb", "\"\n\"\"\n"} {
		f.Add([]byte(text))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		if len(text) > MaxCell {
			return
		}
		s := NewScanner(bytes.NewReader(text), ScanOptions{})
		if d, ok := separatorLine(text, s.newline); ok {
			require.Equal(t, d, s.Delimiter())
			return
		}
		require.Contains(t, string(candidates[:]), string(s.Delimiter()))
		if !slices.ContainsFunc(candidates[:], func(c byte) bool { return bytes.IndexByte(text, c) >= 0 }) {
			require.Equal(t, byte(','), s.Delimiter())
		}
		if words := bytes.FieldsFunc(text, func(r rune) bool { return r < 'a' || r > 'z' }); len(words) > 1 { // a table without any doubt
			for _, c := range candidates {
				row := string(bytes.Join(words, []byte{c})) + "\n"
				if len(row) < 1<<10 {
					require.Equal(t, string(c), string(NewScanner(strings.NewReader(row+row+row), ScanOptions{}).Delimiter()))
				}
			}
		}
	})
}

func FuzzEncoding(f *testing.F) {
	for _, name := range []string{"", "utf-8", "windows-1252", "cp850", "shift_jis", "gb18030", "utf-16le", "iso-2022-jp", "macintosh", "x"} {
		f.Add(name, []byte("Pr\xfcfer,\x81\r\n1,2\n"))
		f.Add(name, []byte("\xff\xfea\x00\n\x00"))
		f.Add(name, []byte("\xef\xbb\xbfa,\xc3\xa4\n"))
		f.Add(name, []byte("a\x00\n\x00\x00\xd8"))
	}
	f.Fuzz(func(t *testing.T, name string, b []byte) {
		file, err := inMemory("x.csv", b)
		if err != nil {
			problem(t, err)
			return
		}
		text, err := file.Text(name)
		if err != nil {
			within := 1 + bytes.Count(b, []byte{'\n'}) + bytes.Count(b, []byte{'\r'})
			require.LessOrEqual(t, problem(t, err).Line, within)
			return
		}
		out, err := io.ReadAll(text)
		require.NoError(t, err)
		require.True(t, utf8.Valid(out))
		a := text.About()
		require.Equal(t, a.Replaced > 0, a.FirstReplace > 0)
		require.LessOrEqual(t, a.FirstReplace, 1+bytes.Count(out, []byte{'\n'})+bytes.Count(out, []byte{'\r'}))
		switch {
		case a.Encoding == utf8Name:
			require.Equal(t, bytes.TrimPrefix(b, []byte("\xef\xbb\xbf")), out)
		case file.survey.wide != "" && a.Replaced == 0:
			order := map[string]unicode.Endianness{"utf-16le": unicode.LittleEndian, "utf-16be": unicode.BigEndian}[a.Encoding]
			again, err := unicode.UTF16(order, unicode.IgnoreBOM).NewEncoder().Bytes(out)
			require.NoError(t, err)
			content := b
			if file.survey.marked {
				content = b[2:]
			}
			require.Equal(t, content, again)
		}
	})
}

// rowsOf reads a file in memory as objects and checks what must hold of them.
func rowsOf(t *testing.T, name string, text []byte) (lines []int, faults int) {
	file, err := inMemory(name, text)
	if err != nil {
		problem(t, err)
		return nil, 0
	}
	rows, err := file.Rows(Options{Encoding: "windows-1252"})
	if err != nil {
		problem(t, err)
		return nil, 0
	}
	var r Row
	require.NoError(t, rows.Next(&r))
	require.Zero(t, r.Line)
	keys := map[string]bool{}
	for _, key := range r.Texts() {
		require.False(t, keys[key], "each key is one column")
		keys[key] = true
	}
	for {
		err := rows.Next(&r)
		if err == io.EOF {
			return lines, faults
		}
		if err != nil {
			problem(t, err)
			return nil, 0
		}
		if r.Fault != nil {
			problem(t, r.Fault)
			require.Equal(t, r.Line, r.Fault.Line)
			require.Empty(t, r.Cells)
			faults++
		}
		require.LessOrEqual(t, len(r.Cells), len(keys))
		lines = append(lines, r.Line)
	}
}

func FuzzObjects(f *testing.F) {
	for _, text := range []string{`[{"a":1,"b":{"c":"x"}},{"a":[1,"y"]}]`, `{"rows":[{"a":1}],"x":[]}`, "{\"a\":1}\n\n{\"a\":\"\\u00e4\"}\n", `[{"a":1,"a":2}]`, `[1`, `[]x`, ` `} {
		f.Add([]byte(text))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		lines, _ := rowsOf(t, "x.json", text)
		var list []any
		if utf8.Valid(text) && json.Unmarshal(text, &list) == nil && lines != nil {
			require.Len(t, lines, len(list))
		}
		lines, _ = rowsOf(t, "x.ndjson", text)
		for i, line := range lines {
			require.Equal(t, i+1, line, "every line is a row")
		}
	})
}

func FuzzYAML(f *testing.F) {
	for _, text := range []string{"- {a: 1, b: no}\n- a: 00123\n  c: {d: [x, y]}\n", "rows:\n  - a: 1\n", "- &a {b: *a}\n", laughs(), "- &x {a: 1}\n- <<: [*x, *x]\n", "- a: |\n    x\n", "---\n- a\n...\n", "? [a]\n: b\n", "- ? {a: b}\n  : c\n", "\"\\"} {
		f.Add([]byte(text))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		lines, _ := rowsOf(t, "x.yaml", text)
		within := 1 + strings.Count(string(text), "\n") + strings.Count(string(text), "\r") + strings.Count(string(text), "\u2028") + strings.Count(string(text), "\u2029") + strings.Count(string(text), "\u0085") + strings.Count(string(text), "\x85")
		for _, line := range lines {
			require.LessOrEqual(t, line, within)
		}
	})
}
