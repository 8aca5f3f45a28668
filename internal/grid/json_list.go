package grid

import (
	"bytes"
	"encoding/json"
	"errors"
	"fmt"
	"io"
	"math"
)

// Elements gives the elements of a JSON array, one after the other.
type Elements struct {
	file     *File
	encoding string
	text     *Decoded
	bound    *bounded
	dec      *json.Decoder
	raw      json.RawMessage
	within   bool // the array stands in an object
	count    int
}

const asArray = "Write the records as one array of objects, [{…}, {…}], or as NDJSON in a file that ends in .ndjson"

// Elements reads the file as a JSON array or, if within is true, also as an object that holds one list of objects
// beside whatever else. The error is a *Fault if it is neither.
func (f *File) Elements(encoding string, within bool) (*Elements, error) {
	e := &Elements{file: f, encoding: encoding}
	if err := e.begin(); err != nil {
		return nil, err
	}
	first, err := e.dec.Token()
	switch {
	case err == io.EOF:
		return nil, faultf(asArray, "the file is empty")
	case err != nil:
		return nil, e.broken(err)
	case first == json.Delim('['):
		return e, nil
	case first != json.Delim('{') || !within:
		return nil, faultf(asArray, "the file does not hold a JSON array")
	}
	key, err := e.onlyList()
	if err != nil {
		return nil, err
	}
	return e, e.seek(key)
}

func (e *Elements) begin() (err error) {
	if e.text, err = e.file.Text(e.encoding); err != nil {
		return err
	}
	e.bound = &bounded{r: e.text}
	e.dec = json.NewDecoder(e.bound)
	e.dec.UseNumber()
	return nil
}

// Next gives the next element as it stands in the file. It is valid until the following call. At the end the
// error is io.EOF, and a *Fault if the rest cannot be read.
func (e *Elements) Next() (json.RawMessage, error) {
	e.bound.from = e.dec.InputOffset()
	if !e.dec.More() {
		return nil, e.end()
	}
	e.raw = e.raw[:0]
	if err := e.dec.Decode(&e.raw); err != nil {
		return nil, e.broken(err)
	}
	e.count++
	return e.raw, nil
}

// Count gives the number of elements read so far, which is the place of the last one.
func (e *Elements) Count() int { return e.count }

// About tells the encoding.
func (e *Elements) About() About { return e.text.About() }

// end reads what follows the array.
func (e *Elements) end() error {
	if _, err := e.dec.Token(); err != nil {
		return e.broken(err)
	}
	for e.within && e.dec.More() {
		if _, err := e.dec.Token(); err != nil { // the key
			return e.broken(err)
		}
		if err := e.skip(); err != nil {
			return err
		}
	}
	if e.within {
		if _, err := e.dec.Token(); err != nil {
			return e.broken(err)
		}
	}
	if _, err := e.dec.Token(); err != io.EOF {
		return e.refuse(e.dec.InputOffset(), "something follows the JSON array", "Keep one array to a file")
	}
	return io.EOF
}

// skip passes over a value.
func (e *Elements) skip() error {
	for depth := 0; ; {
		e.bound.from = e.dec.InputOffset()
		token, err := e.dec.Token()
		if err != nil {
			return e.broken(err)
		}
		switch token {
		case json.Delim('['), json.Delim('{'):
			depth++
		case json.Delim(']'), json.Delim('}'):
			depth--
		}
		if depth == 0 {
			return nil
		}
	}
}

// broken says where the JSON is broken. The elements before that place were read.
func (e *Elements) broken(err error) error {
	var syntax *json.SyntaxError
	switch {
	case errors.As(err, &syntax) && syntax.Offset == e.dec.InputOffset(): // the offending character follows the offset
		return e.refuse(syntax.Offset+1, BrokenJSON(err), "Mend the JSON there; nothing after that place was read")
	case errors.As(err, &syntax):
		return e.refuse(syntax.Offset, BrokenJSON(err), "Mend the JSON there; nothing after that place was read")
	case errors.Is(err, io.EOF), errors.Is(err, io.ErrUnexpectedEOF):
		return e.refuse(math.MaxInt64, BrokenJSON(err), "Export the file again; it may be cut off")
	case errors.Is(err, errUnbounded):
		return e.refuse(e.bound.from+1, fmt.Sprintf("a value is longer than %d MiB", maxObject>>20), "Write each record as one object; nothing after that place was read")
	}
	return cannotRead(err)
}

// refuse names the line of an offset by counting line ends from the beginning of the text.
func (e *Elements) refuse(offset int64, problem, remedy string) error {
	f := faultf(remedy, "%s", problem)
	text, err := e.file.Text(e.encoding)
	if err != nil {
		return err
	}
	f.Line = 1
	rest := io.LimitReader(text, offset-1)
	buffer := make([]byte, 32<<10)
	for {
		n, err := rest.Read(buffer)
		f.Line += bytes.Count(buffer[:n], []byte{'\n'})
		if err != nil {
			return f
		}
	}
}

var errUnbounded = errors.New("a value is too long")

// bounded refuses to go on when a value that began at from has not ended maxObject bytes later.
type bounded struct {
	r          io.Reader
	from, read int64
}

func (b *bounded) Read(p []byte) (int, error) {
	room := maxObject - (b.read - b.from)
	if room <= 0 {
		return 0, errUnbounded
	}
	n, err := b.r.Read(p[:min(int64(len(p)), room)])
	b.read += int64(n)
	return n, err
}
