package grid

import (
	"bytes"
	"encoding/csv"
	"io"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
	"pgregory.net/rapid"
)

// agrees holds the scanner to encoding/csv, which gives no blank lines: whatever that reads without an error,
// the scanner reads the same.
func agrees(t require.TestingT, text []byte) {
	if bytes.IndexByte(text, 0) >= 0 || bytes.IndexByte(text, '\r') >= 0 || bytes.HasPrefix(bytes.ToLower(bytes.TrimLeft(text, `"`)), []byte("sep=")) || len(text) > MaxCell {
		return
	}
	std := csv.NewReader(bytes.NewReader(text))
	std.FieldsPerRecord = -1
	want, err := std.ReadAll()
	if err != nil {
		return
	}
	s := NewScanner(bytes.NewReader(text), ScanOptions{Delimiter: ','})
	for _, cells := range want {
		if Blank(cells) {
			continue
		}
		got, err := nextFilled(s)
		require.NoError(t, err)
		require.Nil(t, got.Fault)
		require.Equal(t, cells, got.Cells)
	}
	_, err = nextFilled(s)
	require.Equal(t, io.EOF, err)
}

// wider checks that what is read strictly is read the same leniently, up to the first row that is not.
func wider(t require.TestingT, text []byte) {
	strict := NewScanner(bytes.NewReader(text), ScanOptions{})
	lenient := NewScanner(bytes.NewReader(text), ScanOptions{Lenient: true})
	for {
		want, err := strict.Next()
		if err == io.EOF || want.Fault != nil {
			return
		}
		require.NoError(t, err)
		got, err := lenient.Next()
		require.NoError(t, err)
		require.Equal(t, want, got)
	}
}

func nextFilled(s *Scanner) (Scanned, error) {
	for {
		got, err := s.Next()
		if err != nil || got.Fault != nil || !Blank(got.Cells) {
			return got, err
		}
	}
}

func TestScannerAgreesWithTheStandardLibrary(t *testing.T) {
	pieces := []string{"a", "bc", ",", "\n", "\"", "\"\"", " ", "é", "\"x,\ny\""}
	rapid.Check(t, func(t *rapid.T) {
		text := strings.Join(rapid.SliceOfN(rapid.SampledFrom(pieces), 0, 40).Draw(t, "text"), "")
		agrees(t, []byte(text))
		wider(t, []byte(text))
	})
}

// accounts checks that the rows of the scanner are all lines of the text, one after the other.
func accounts(t require.TestingT, text []byte, o ScanOptions) {
	s := NewScanner(bytes.NewReader(text), o)
	line := 1
	for {
		got, err := s.Next()
		if err == io.EOF {
			break
		}
		require.NoError(t, err)
		require.Equal(t, line, got.Line)
		require.GreaterOrEqual(t, got.Last, got.Line)
		require.True(t, got.Fault == nil || len(got.Cells) == 0)
		line = got.Last + 1
	}
	lines := bytes.Count(text, []byte{s.newline})
	if len(text) > 0 && text[len(text)-1] != s.newline {
		lines++
	}
	require.Equal(t, lines, line-1, "every line is in one row")
}

// rejoins checks that rows without quotes give the text again.
func rejoins(t require.TestingT, text []byte) {
	if bytes.ContainsAny(text, "\"\x00\r") || len(text) > MaxCell {
		return
	}
	s := NewScanner(bytes.NewReader(text), ScanOptions{})
	var out []string
	for {
		got, err := s.Next()
		if err == io.EOF {
			break
		}
		require.NoError(t, err)
		require.Nil(t, got.Fault)
		out = append(out, strings.Join(got.Cells, string(s.Delimiter()))+"\n")
	}
	require.Equal(t, strings.TrimSuffix(string(text), "\n"), strings.TrimSuffix(strings.Join(out, ""), "\n"))
}

func FuzzScanner(f *testing.F) {
	for _, text := range []string{"a,b\n1,2\n", "\"a\nb\",c\r\n", "a;b\r1;2", "6\" tube,1\n", "\"x", "sep=|\na|b", "a, \"b\"c\n", "\x1a"} {
		f.Add([]byte(text))
	}
	f.Fuzz(func(t *testing.T, text []byte) {
		for _, o := range []ScanOptions{{}, {Lenient: true}, {ByHeader: true}, {Delimiter: ' ', Lenient: true}, {Delimiter: '"'}} {
			accounts(t, text, o)
		}
		agrees(t, text)
		wider(t, text)
		rejoins(t, text)
	})
}

func BenchmarkDelimitedRows(b *testing.B) {
	text := strings.Repeat("A-000001,000123,2025-03-04,periodic,10,15,20,25,30,35,40,10,15,20,25,30,35,40,AM-1,R-1\n", 50_000)
	f := open(b, "x.csv", text)
	b.SetBytes(int64(len(text)))
	rows := 0
	for b.Loop() {
		r, err := f.Rows(Options{})
		require.NoError(b, err)
		var row Row
		for r.Next(&row) == nil {
			rows++
		}
	}
	b.ReportMetric(float64(rows)/b.Elapsed().Seconds(), "rows/s")
}
