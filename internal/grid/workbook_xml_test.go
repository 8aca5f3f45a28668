package grid

import (
	"encoding/xml"
	"fmt"
	"io"
	"strings"
	"testing"
	"testing/iotest"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// tokens reads all tokens of a text: tags with their attributes, texts that stand together joined.
func tokens(in io.Reader) (out []string, err error) {
	m := newMarkup(in)
	for {
		t, err := m.next()
		if err != nil {
			if err == io.EOF {
				err = nil
			}
			return out, err
		}
		switch t {
		case startTag:
			s := "<" + string(m.name)
			for {
				name, value, ok := m.attr()
				if !ok {
					break
				}
				s += fmt.Sprintf(" %s=%q", local(name), value)
			}
			out = append(out, s)
		case endTag:
			out = append(out, "/"+string(m.name))
		case characters:
			out = appendText(out, string(m.text), m.depth())
		}
	}
}

func appendText(out []string, text string, depth int) []string {
	switch n := len(out) - 1; {
	case text == "" || depth == 0:
	case n >= 0 && out[n][0] == '"':
		out[n] += text
	default:
		out = append(out, `"`+text)
	}
	return out
}

// standardTokens does the same by the standard library.
func standardTokens(in string) (out []string, err error) {
	d := xml.NewDecoder(strings.NewReader(in))
	depth := 0
	for {
		t, err := d.Token()
		if err != nil {
			if err == io.EOF {
				err = nil
			}
			return out, err
		}
		switch t := t.(type) {
		case xml.StartElement:
			s := "<" + t.Name.Local
			for _, a := range t.Attr {
				s += fmt.Sprintf(" %s=%q", a.Name.Local, a.Value)
			}
			out = append(out, s)
			depth++
		case xml.EndElement:
			out = append(out, "/"+t.Name.Local)
			depth--
		case xml.CharData:
			out = appendText(out, string(t), depth)
		}
	}
}

var markupText = rapid.SampledFrom([]string{"a", "é右", " ", "\n", "\r\n", "\r", "&amp;", "&lt;", "&#65;", "&#x1F600;", "&quot;", ">", "-", "]]", "'"})

func drawElement(t *rapid.T, depth int) string {
	name := rapid.SampledFrom([]string{"c", "row", "x:v", "f_1"}).Draw(t, "name")
	s := "<" + name
	for i := range rapid.IntRange(0, 3).Draw(t, "attributes") {
		quote := rapid.SampledFrom([]string{`"`, "'"}).Draw(t, "quote")
		value := strings.Join(rapid.SliceOfN(markupText, 0, 4).Draw(t, "value"), "")
		s += fmt.Sprintf("%sa%d%s=%s%s%s%s", rapid.SampledFrom([]string{" ", "\n\t"}).Draw(t, "gap"), i, rapid.SampledFrom([]string{"", " "}).Draw(t, "before"),
			rapid.SampledFrom([]string{"", " "}).Draw(t, "behind"), quote, strings.ReplaceAll(value, quote, ""), quote)
	}
	s += rapid.SampledFrom([]string{"", " "}).Draw(t, "end")
	if rapid.Bool().Draw(t, "closed") {
		return s + "/>"
	}
	s += ">"
	for range rapid.IntRange(0, 4).Draw(t, "children") {
		switch kind := rapid.IntRange(0, 4).Draw(t, "child"); {
		case kind == 0:
			s += "<!-- a > <b> - -->"
		case kind == 1:
			s += "<![CDATA[a<b>&amp;]]]]>"
		case kind == 2 || depth == 0:
			s += strings.ReplaceAll(strings.Join(rapid.SliceOfN(markupText, 1, 5).Draw(t, "text"), ""), "]]>", "")
		default:
			s += drawElement(t, depth-1)
		}
	}
	return s + "</" + name + " >"
}

// Well-formed markup is read as the standard library reads it, however it arrives.
func TestMarkupAgainstStandard(t *testing.T) {
	rapid.Check(t, func(t *rapid.T) {
		text := `<?xml version="1.0" encoding='utf-8' standalone="yes"?>` + "\r\n<!-- -->" + drawElement(t, 3) + rapid.SampledFrom([]string{"", "\n", "<!---->"}).Draw(t, "tail")
		want, err := standardTokens(text)
		require.NoError(t, err, text)
		got, err := tokens(strings.NewReader(text))
		require.NoError(t, err, text)
		require.Equal(t, want, got, text)
		got, err = tokens(iotest.OneByteReader(strings.NewReader(text)))
		require.NoError(t, err)
		require.Equal(t, want, got, text)
	})
}

// Nothing that is cut off is taken as whole.
func TestMarkupCut(t *testing.T) {
	const text = "<?xml version=\"1.0\"?><!-- c --><a b='1'><c/>t&amp;<![CDATA[x]]><d >e</d></a>"
	whole, err := tokens(strings.NewReader(text))
	require.NoError(t, err)
	require.Equal(t, []string{`<a b="1"`, "<c", "/c", `"t&x`, "<d", `"e`, "/d", "/a"}, whole)
	for n := range len(text) {
		_, err := tokens(strings.NewReader(text[:n]))
		require.Error(t, err, text[:n])
	}
	_, err = tokens(iotest.ErrReader(io.ErrNoProgress))
	require.ErrorIs(t, err, io.ErrNoProgress)
}
