package grid

import (
	"archive/zip"
	"bytes"
	"compress/flate"
	"io"
	"io/fs"
	"os"
	"strings"
	"testing"

	"github.com/stretchr/testify/require"
)

type entry struct {
	name, text string
	change     func(*zip.FileHeader)
}

// packed makes a ZIP archive.
func packed(t testing.TB, entries ...entry) string {
	t.Helper()
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	for _, e := range entries {
		h := &zip.FileHeader{Name: e.name, Method: zip.Deflate}
		if e.change != nil {
			e.change(h)
		}
		w, err := z.CreateHeader(h)
		require.NoError(t, err)
		_, err = io.WriteString(w, e.text)
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return b.String()
}

func TestMember(t *testing.T) {
	path := write(t, "export.zip", packed(t,
		entry{name: "2025/"}, entry{name: "2025/audiograms.csv", text: "a,b\n1,2\n"}, entry{name: `2025\workers.csv`, text: "c\n"},
		entry{name: "__MACOSX/._x"}, entry{name: "Pr\x81fer.csv", text: "ü\n", change: func(h *zip.FileHeader) { h.NonUTF8 = true }}))
	names, err := Members(path)
	require.NoError(t, err)
	require.Equal(t, []string{"2025/audiograms.csv", "2025/workers.csv", "Prüfer.csv"}, names)
	for member, want := range map[string]string{"2025/audiograms.csv": "a|b", "2025/workers.csv": "c", "Prüfer.csv": "ü"} {
		f, err := Open(path, member)
		require.NoError(t, err)
		rows, _ := table(t, f, Options{})
		require.Equal(t, want, rows[0])
		require.NoError(t, f.Close())
	}
	plain := open(t, "audiograms.csv", "a,b\n1,2\n")
	inZip, err := Open(path, "2025/audiograms.csv")
	require.NoError(t, err)
	defer inZip.Close()
	require.Equal(t, plain.SHA256, inZip.SHA256, "the digest is that of the member")
	require.Equal(t, "audiograms.csv", inZip.Name)
}

func TestUnpackedFilesAreRemoved(t *testing.T) {
	temp := t.TempDir()
	t.Setenv("TMPDIR", temp)
	path := write(t, "export.zip", packed(t, entry{name: "a.csv", text: "a\n"}, entry{name: "a.pdf", text: "%PDF-1.7"}))
	f, err := Open(path, "a.csv")
	require.NoError(t, err)
	require.NoError(t, f.Close())
	_, err = Open(path, "a.pdf")
	require.Error(t, err)
	left, err := os.ReadDir(temp)
	require.NoError(t, err)
	require.Empty(t, left)
}

func TestArchivesRefused(t *testing.T) {
	damaged := []byte(packed(t, entry{name: "a.csv", text: strings.Repeat("1,2\n", 1000)}))
	damaged[40] ^= 0xff
	method := func(m uint16) func(*zip.FileHeader) { return func(h *zip.FileHeader) { h.Method = m } }
	for _, c := range []struct{ name, archive, member, problem, remedy string }{
		{"no member stated", packed(t, entry{name: "a.csv"}, entry{name: "b.csv"}), "", "the file is a ZIP archive", "such as a.csv, b.csv"},
		{"no such member", packed(t, entry{name: "Audiograms.csv"}), "audiograms.csv", `the archive holds no file "audiograms.csv"`, "Write Audiograms.csv if that is meant; case counts"},
		{"folder", packed(t, entry{name: "a/"}), "a/", `the archive holds no file "a/"`, "Name one of its files"},
		{"two of a name", packed(t, entry{name: "a.csv"}, entry{name: "a.csv"}), "a.csv", `the archive holds two files named "a.csv"`, "Unpack"},
		{"path upwards", packed(t, entry{name: "a/../../b.csv"}), "a.csv", "whose name leads out of it", "ask where it comes from"},
		{"path upwards with backslashes", packed(t, entry{name: `..\b.csv`}), "a.csv", "whose name leads out of it", "ask"},
		{"absolute", packed(t, entry{name: "/etc/x"}), "/etc/x", "whose name leads out of it", "ask"},
		{"absolute with drive", packed(t, entry{name: `C:\x.csv`}), "C:/x.csv", "whose name leads out of it", "ask"},
		{"control character", packed(t, entry{name: "a\x00.csv"}), "a.csv", "whose name leads out of it", "ask"},
		{"link", packed(t, entry{"a.csv", "/etc/passwd", func(h *zip.FileHeader) { h.SetMode(fs.ModeSymlink | 0o777) }}), "a.csv", "is a link or a device", "Unpack"},
		{"password", packed(t, entry{"a.csv", "x", func(h *zip.FileHeader) { h.Flags |= 1 }}), "a.csv", "has a password", "without a password"},
		{"bomb", zeros80(t), "a.csv", "would fill more than 2 GiB, or 200 times its packed size", "Unpack the archive"},
		{"unknown packing", strings.ReplaceAll(packed(t, entry{"a.csv", "x", method(zip.Store)}), "\x14\x00\x08\x00\x00\x00", "\x14\x00\x08\x00\x63\x00"), "a.csv", "is packed in a way that cannot be read", "ordinary ZIP"},
		{"damaged member", string(damaged), "a.csv", "is damaged", "Copy or export"},
		{"cut off", packed(t, entry{name: "a.csv", text: "x"})[:40], "a.csv", "damaged or cut off", "again"},
		{"archive within", packed(t, entry{name: "a.zip", text: packed(t, entry{name: "b.csv"})}), "a.zip", "the file is a ZIP archive", "b.csv"},
		{"no archive", "a,b\n", "a.csv", "damaged or cut off", "again"},
		{"office document", packed(t, entry{name: "[Content_Types].xml"}, entry{name: "word/document.xml"}), "", "no workbook", "Export"},
		{"OpenDocument", packed(t, entry{name: "mimetype"}, entry{name: "META-INF/manifest.xml"}), "", "OpenDocument", ".xlsx"},
		{"binary workbook", packed(t, entry{name: "[Content_Types].xml"}, entry{name: "xl/workbook.bin"}), "", ".xlsb", ".xlsx"},
		{"empty", packed(t), "", "the file is a ZIP archive", "State member: with one of its files"},
	} {
		t.Run(c.name, func(t *testing.T) {
			_, err := Open(write(t, "x.zip", c.archive), c.member)
			f := problem(t, err)
			require.Contains(t, f.Problem, c.problem)
			require.Contains(t, f.Remedy, c.remedy)
		})
	}
}

// zeros80 packs 80 MiB of zeros into a few KiB.
func zeros80(t testing.TB) string {
	t.Helper()
	var b bytes.Buffer
	z := zip.NewWriter(&b)
	z.RegisterCompressor(zip.Deflate, func(w io.Writer) (io.WriteCloser, error) { return flate.NewWriter(w, flate.BestSpeed) })
	w, err := z.Create("a.csv")
	require.NoError(t, err)
	zeros := make([]byte, 1<<20)
	for range fairSize>>20 + 16 {
		_, err := w.Write(zeros)
		require.NoError(t, err)
	}
	require.NoError(t, z.Close())
	return b.String()
}
