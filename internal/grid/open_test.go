package grid

import (
	"crypto/sha256"
	"encoding/hex"
	"io"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

func TestFormat(t *testing.T) {
	workbook := packed(t, entry{name: "[Content_Types].xml"}, entry{name: "xl/workbook.xml"})
	for _, c := range []struct {
		name, content string
		want          Format
	}{
		{"x.csv", "a,b\n", Delimited}, {"x.TSV", "a\tb\n", Delimited}, {"x.txt", "a\n", Delimited}, {"x.dat", "", Delimited},
		{"x.xlsx", "a,b\n", Delimited}, {"x.xls", "a\tb\n", Delimited},
		{"x.csv", workbook, Workbook}, {"x.xlsx", workbook, Workbook}, {"x.zip", workbook, Workbook},
		{"x.json", "[]", JSON}, {"x.json", "{\"a\":1}\n{\"a\":2}\n", Lines}, {"x.json", "{\"a\":\n{\"a\":2}}\n", JSON},
		{"x.ndjson", "", Lines}, {"x.jsonl", "", Lines}, {"x.yaml", "", YAML}, {"x.yml", "", YAML},
		{"x.csv", "BZ,Hz\n", Delimited},
	} {
		require.Equal(t, c.want, open(t, c.name, c.content).Format, "%s %q", c.name, c.content)
	}
}

func TestFilesRefused(t *testing.T) {
	for _, c := range []struct{ name, content, problem, remedy string }{
		{"~$x.xlsx", "x", "being edited", "name it instead: x.xlsx"},
		{"x.xls", "\xd0\xcf\x11\xe0\xa1\xb1\x1a\xe1", "an old workbook (.xls) or a workbook with a password", "without a password"},
		{"x.csv.gz", "\x1f\x8b\x08", "packed (gzip)", "Unpack it"},
		{"x.csv", "%PDF-1.7", "a PDF document", "Ask for the table itself"},
		{"x.xls", " \n<!DOCTYPE html><table>", "a web page", "save it as a workbook"},
		{"x.xls", "\xff\xfe<\x00h\x00t\x00m\x00l\x00>\x00", "a web page", "save it as a workbook"},
		{"x.xls", "\xef\xbb\xbf<?xml version=\"1.0\"?>", "XML", "save it as a workbook"},
		{"x.csv", "\xff\xfe\x00\x00a\x00\x00\x00", "UTF-32", "UTF-8"},
		{"x", "a,b\n", "has no ending", ".csv"},
		{"x.dbf", "a", "files that end in .dbf cannot be read", "Export"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := Open(write(t, c.name, c.content), "")
			f := problem(t, err)
			require.Contains(t, f.Problem, c.problem)
			require.Contains(t, f.Remedy, c.remedy)
		})
	}
	_, err := Open(t.TempDir()+"/x.csv", "")
	require.Contains(t, problem(t, err).Problem, "does not exist")
	_, err = Open(t.TempDir(), "")
	require.Contains(t, problem(t, err).Problem, "a folder")
	_, err = Open(os.DevNull, "")
	require.Contains(t, problem(t, err).Problem, "no regular file")
	_, err = Members(t.TempDir())
	require.Contains(t, problem(t, err).Problem, "a folder")
}

func TestDigest(t *testing.T) {
	text := "\xff\xfe" + strings.Repeat("a\x00,\x00", 100_000)
	sum := sha256.Sum256([]byte(text))
	f := open(t, "x.csv", text)
	require.Equal(t, hex.EncodeToString(sum[:]), f.SHA256, "of the file as it lies, in whatever encoding")
	raw, err := f.Raw()
	require.NoError(t, err)
	b, err := io.ReadAll(raw)
	require.NoError(t, err)
	require.Equal(t, text, string(b))
}
