package intake

import (
	"bufio"
	"encoding/json"
	"errors"
	"io"
	"math"

	"hearduty/internal/record"
)

// arrayReader reads JSON: one array of objects. A row is the place of an object in the array, from 1.
type arrayReader struct {
	file   io.ReadSeeker
	dec    *json.Decoder
	raw    json.RawMessage
	object *objectReader
	count  int
}

func newArrayReader(f io.ReadSeeker, t *record.Table) (rowReader, error) {
	b := bufio.NewReader(f)
	skipMark(b)
	a := &arrayReader{file: f, dec: json.NewDecoder(b), object: newObjectReader(t)}
	const remedy = "Write the records as one array of objects, [{…}, {…}], or as NDJSON in a file that ends in .ndjson"
	first, err := a.dec.Token()
	switch {
	case err == io.EOF:
		return nil, &refusal{problem: "the file is empty", remedy: remedy}
	case err != nil:
		return nil, a.broken(err)
	case first != json.Delim('['):
		return nil, &refusal{problem: "the file does not hold a JSON array", remedy: remedy}
	}
	return a, nil
}

func (a *arrayReader) next(r *row) error {
	if !a.dec.More() {
		if _, err := a.dec.Token(); err != nil {
			return a.broken(err)
		}
		if _, err := a.dec.Token(); err != io.EOF {
			return a.refuse(a.dec.InputOffset(), "something follows the JSON array", "Keep one array to a file")
		}
		return io.EOF
	}
	a.raw = a.raw[:0]
	if err := a.dec.Decode(&a.raw); err != nil {
		return a.broken(err)
	}
	a.count++
	r.reset(a.count)
	if len(a.raw) > maxRow {
		r.fault = tooLongFault()
		return nil
	}
	a.object.read(a.raw, r)
	return nil
}

// broken says where the JSON is broken. The records before that place were read.
func (a *arrayReader) broken(err error) error {
	var syntax *json.SyntaxError
	switch {
	case errors.As(err, &syntax):
		return a.refuse(syntax.Offset, brokenJSON(err), "Mend the JSON there; nothing after that place was read")
	case errors.Is(err, io.EOF), errors.Is(err, io.ErrUnexpectedEOF):
		return a.refuse(math.MaxInt64, brokenJSON(err), "Export the file again; it may be cut off")
	}
	return err
}

// refuse names the line of an offset by counting line ends from the start of the file.
func (a *arrayReader) refuse(offset int64, problem, remedy string) error {
	line := 1
	if _, err := a.file.Seek(0, io.SeekStart); err != nil {
		return err
	}
	b := bufio.NewReader(a.file)
	skipMark(b)
	for n := int64(1); n < offset; n++ {
		c, err := b.ReadByte()
		if err != nil {
			break
		}
		if c == '\n' {
			line++
		}
	}
	return &refusal{line: line, problem: problem, remedy: remedy}
}
