package intake

import (
	"bytes"
	"crypto/sha256"
	"encoding/hex"
	"errors"
	"io"
	"io/fs"
	"os"
	"path"
	"strings"
	"unicode/utf8"

	"hearduty/internal/record"
)

// openFile opens a record file, takes its digest and refuses what is not UTF-8 text. The file is read
// twice: once here as a whole, so that a file in another encoding is refused before any of its rows
// became a record, and once for its rows.
func openFile(name string) (f *os.File, digest string, refused *refusal) {
	info, err := os.Stat(name)
	switch {
	case errors.Is(err, fs.ErrNotExist):
		return nil, "", &refusal{problem: "the record file does not exist", remedy: "Correct the path in the program file, or put the file there"}
	case err == nil && info.IsDir():
		return nil, "", &refusal{problem: "this is a folder, not a record file", remedy: "Name the files in it one by one"}
	case err == nil && !info.Mode().IsRegular():
		return nil, "", &refusal{problem: "this is no regular file", remedy: "Save the records as a file and name that"}
	}
	if f, err = os.Open(name); err != nil {
		return nil, "", cannotRead(err)
	}
	digest, refused = survey(f)
	if refused == nil {
		if _, err := f.Seek(0, io.SeekStart); err != nil {
			refused = cannotRead(err)
		}
	}
	if refused != nil {
		f.Close()
		return nil, digest, refused
	}
	return f, digest, nil
}

func cannotRead(err error) *refusal {
	var e *fs.PathError
	if errors.As(err, &e) {
		err = e.Err
	}
	return &refusal{problem: "the record file cannot be read: " + err.Error(), remedy: "Check the file and its permissions"}
}

// survey reads the whole file for its digest and the first byte that is not UTF-8.
func survey(r io.Reader) (digest string, refused *refusal) {
	hash := sha256.New()
	buffer := make([]byte, 64<<10)
	line, kept, first := 1, 0, true
	for {
		n, err := io.ReadFull(r, buffer[kept:])
		hash.Write(buffer[kept : kept+n])
		chunk := buffer[:kept+n]
		if first {
			refused, first = signature(chunk), false
		}
		end := err == io.EOF || err == io.ErrUnexpectedEOF
		if refused == nil {
			valid := validPrefix(chunk)
			line += bytes.Count(chunk[:valid], []byte{'\n'})
			kept = copy(buffer, chunk[valid:])
			if kept >= utf8.UTFMax || kept > 0 && end {
				refused = &refusal{line: line, problem: "the line holds a byte that is not UTF-8 text", remedy: "Save the file as UTF-8 (in a spreadsheet: CSV UTF-8) and read it again"}
			}
		}
		if refused != nil {
			kept = 0
		}
		switch {
		case end:
			return hex.EncodeToString(hash.Sum(nil)), refused
		case err != nil:
			return "", cannotRead(err)
		}
	}
}

// validPrefix gives the length of the longest prefix that is UTF-8 text. What follows it is not, or is a
// character of which the end is missing.
func validPrefix(b []byte) int {
	if utf8.Valid(b) {
		return len(b)
	}
	n := 0
	for n < len(b) {
		r, size := utf8.DecodeRune(b[n:])
		if r == utf8.RuneError && size <= 1 {
			break
		}
		n += size
	}
	return n
}

// signature refuses files that are something else, by their first bytes.
func signature(b []byte) *refusal {
	const save = "Save the file as UTF-8 (in a spreadsheet: CSV UTF-8) and read it again"
	switch {
	case bytes.HasPrefix(b, []byte{0xff, 0xfe}), bytes.HasPrefix(b, []byte{0xfe, 0xff}), everySecondNUL(b):
		return &refusal{problem: "the file is UTF-16 text", remedy: save}
	case bytes.HasPrefix(b, []byte("PK\x03\x04")):
		return &refusal{problem: "the file is a workbook or a ZIP archive, whatever its name says", remedy: "Export the table as CSV UTF-8 and name that file"}
	case bytes.HasPrefix(b, []byte{0xd0, 0xcf, 0x11, 0xe0}):
		return &refusal{problem: "the file is an old workbook (.xls) or a workbook with a password, whatever its name says", remedy: "Export the table as CSV UTF-8 and name that file"}
	}
	return nil
}

// everySecondNUL finds UTF-16 text without a byte order mark.
func everySecondNUL(b []byte) bool {
	b = b[:min(len(b), 64)&^1]
	var even, odd int
	for i := 0; i < len(b); i += 2 {
		if b[i] == 0 {
			even++
		}
		if b[i+1] == 0 {
			odd++
		}
	}
	half := len(b) / 2
	return half > 1 && (even == half && odd == 0 || odd == half && even == 0)
}

// openRows gives the rows of a file in the format that its name tells.
func openRows(f *os.File, name string, t *record.Table) (rowReader, error) {
	switch strings.ToLower(path.Ext(name)) {
	case ".csv":
		return newCSVReader(f, t)
	case ".ndjson":
		return newLinesReader(f, t)
	case ".json":
		return newArrayReader(f, t)
	}
	return nil, &refusal{problem: "the file is neither CSV nor JSON nor NDJSON", remedy: "Export the table as CSV UTF-8 and name that file"}
}

// skipMark skips a UTF-8 byte order mark.
func skipMark(r interface {
	Peek(int) ([]byte, error)
	Discard(int) (int, error)
}) {
	if b, _ := r.Peek(3); string(b) == "\xef\xbb\xbf" {
		_, _ = r.Discard(3)
	}
}
