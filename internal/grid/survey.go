package grid

import (
	"bytes"
	"crypto/sha256"
	"encoding/binary"
	"encoding/hex"
	"fmt"
	"io"
	"unicode/utf8"
)

// headSize is the number of bytes at the beginning that tell what a file is.
const headSize = 64 << 10

// survey is what one pass over a file tells.
type survey struct {
	digest string
	head   []byte // the first bytes
	marked bool   // the file begins with a byte order mark
	wide   string // utf-16le or utf-16be, if it is that
	high   int    // line of the first character beyond ASCII in UTF-8; 0 if there is none before bad
	bad    int    // line of the first byte that is not UTF-8; 0 if there is none
}

// takeSurvey reads the whole file.
func takeSurvey(r io.Reader) (survey, error) {
	var s survey
	hash := sha256.New()
	buffer := make([]byte, headSize)
	kept, first, at := 0, true, lines{n: 1}
	for {
		n, err := io.ReadFull(r, buffer[kept:])
		hash.Write(buffer[kept : kept+n])
		chunk := buffer[:kept+n]
		end := err == io.EOF || err == io.ErrUnexpectedEOF
		if first {
			s.begin(chunk, end)
			first = false
		}
		kept = 0
		if s.wide == "" && s.bad == 0 {
			rest := chunk[s.utf8(chunk, &at, end):]
			if s.bad == 0 {
				kept = copy(buffer, rest)
			}
		}
		switch {
		case end:
			s.digest = hex.EncodeToString(hash.Sum(nil))
			return s, nil
		case err != nil:
			return s, err
		}
	}
}

// begin looks at the first bytes.
func (s *survey) begin(b []byte, whole bool) {
	s.head = bytes.Clone(b)
	switch {
	case bytes.HasPrefix(b, []byte("\xef\xbb\xbf")):
		s.marked = true
	case bytes.HasPrefix(b, []byte("\xff\xfe")):
		s.marked, s.wide = true, "utf-16le"
	case bytes.HasPrefix(b, []byte("\xfe\xff")):
		s.marked, s.wide = true, "utf-16be"
	default:
		s.wide = unmarkedWide(b, whole)
	}
}

// utf8 goes on with the search for bytes that are not UTF-8, and gives the length of what was looked at. What
// follows is the beginning of a character.
func (s *survey) utf8(chunk []byte, at *lines, end bool) int {
	valid := validPrefix(chunk)
	if s.high == 0 {
		begin := 0
		if s.marked && at.n == 1 {
			begin = len(chunk) - len(bytes.TrimPrefix(chunk, []byte("\xef\xbb\xbf")))
		}
		if ascii := begin + asciiPrefix(chunk[begin:valid]); ascii < valid {
			before := *at
			before.add(chunk[:ascii])
			s.high = before.n
		}
	}
	at.add(chunk[:valid])
	if rest := len(chunk) - valid; rest >= utf8.UTFMax || rest > 0 && (end || !partial(chunk[valid:])) {
		s.bad = at.n
	}
	return valid
}

// partial says whether b can be the beginning of a character in UTF-8.
func partial(b []byte) bool { return !utf8.FullRune(b) }

// validPrefix gives the length of the longest prefix that is UTF-8 text.
func validPrefix(b []byte) int {
	for cut := 0; cut < utf8.UTFMax && cut <= len(b); cut++ {
		if utf8.Valid(b[:len(b)-cut]) {
			return len(b) - cut
		}
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

// unmarkedWide finds UTF-16 text without a byte order mark: a fifth of its units at least are ASCII, so that
// one of their two bytes is NUL, and always the same one.
func unmarkedWide(b []byte, whole bool) string {
	if whole && len(b)%2 != 0 {
		return ""
	}
	b = b[:min(len(b), 4<<10)&^1]
	var even, odd int
	for i := 0; i < len(b); i += 2 {
		if b[i] == 0 {
			even++
		}
		if b[i+1] == 0 {
			odd++
		}
	}
	units := len(b) / 2
	switch {
	case units < 2 || max(even, odd)*5 < units || min(even, odd) > 0:
		return ""
	case odd > 0:
		return "utf-16le"
	}
	return "utf-16be"
}

// asciiPrefix gives the length of the longest prefix that is ASCII.
func asciiPrefix(b []byte) int {
	n := 0
	for n+8 <= len(b) && binary.NativeEndian.Uint64(b[n:])&0x8080808080808080 == 0 {
		n += 8
	}
	for n < len(b) && b[n] < utf8.RuneSelf {
		n++
	}
	return n
}

// notUTF8 is the fault of a file that is not UTF-8 although it is said to be, or nothing is said.
func (s *survey) notUTF8(stated string) *Fault {
	f := &Fault{Line: s.bad, Problem: "the line holds a byte that is not UTF-8 text", Remedy: "State encoding: with the code page of the file, such as windows-1252 for an export from Windows or cp850 for one from DOS, or save the file as UTF-8"}
	if s.high > 0 {
		f.Problem += fmt.Sprintf(", though line %d holds UTF-8", s.high)
		f.Remedy = fmt.Sprintf("Export the file again in one encoding; if line %d is UTF-8 by chance only, state encoding: with the code page of the file", s.high)
	}
	switch {
	case s.marked:
		f.Problem = "the file is marked as UTF-8, but the line holds a byte that is not UTF-8 text"
		f.Remedy = "Export the file again; it may have been put together from files in several encodings"
	case stated != "":
		f.Problem += ", and encoding: utf-8 is stated"
	}
	return f
}
