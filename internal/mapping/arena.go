package mapping

import "encoding/binary"

// chunkSize is the number of bytes of a chunk of an arena. A longer piece gets a chunk of its own.
const chunkSize = 1 << 20

// arena keeps rows of records in few large pieces of memory. Rows of one record are chained.
type arena struct {
	chunks [][]byte
	piece  []byte // the row that is being written
}

// spot is where a row stands: the number of its chunk, and its place there.
type spot struct{ chunk, at uint32 }

const linkSize = 8

// add writes a row behind the last row of its record, if there is one.
func (a *arena) add(line int, values []Value, last spot, chained bool) spot {
	p := append(a.piece[:0], make([]byte, linkSize)...)
	p = binary.AppendUvarint(p, uint64(line))
	p = binary.AppendUvarint(p, uint64(len(values)))
	for _, v := range values {
		p = binary.AppendUvarint(p, uint64(v.Field))
		p = binary.AppendUvarint(p, uint64(v.Column))
		p = appendText(p, v.Text)
		p = appendText(p, v.Read)
	}
	a.piece = p
	n := len(a.chunks)
	if n == 0 || len(a.chunks[n-1])+len(p) > cap(a.chunks[n-1]) {
		a.chunks = append(a.chunks, make([]byte, 0, max(chunkSize, len(p))))
		n++
	}
	s := spot{uint32(n), uint32(len(a.chunks[n-1]))} // chunks count from 1, so that the zero spot is none
	a.chunks[n-1] = append(a.chunks[n-1], p...)
	if chained {
		link := a.chunks[last.chunk-1][last.at:]
		binary.LittleEndian.PutUint32(link, s.chunk)
		binary.LittleEndian.PutUint32(link[4:], s.at)
	}
	return s
}

func appendText(p []byte, s string) []byte {
	return append(binary.AppendUvarint(p, uint64(len(s))), s...)
}

// stored is a value as an arena holds it.
type stored struct {
	line, field, column int
	text, read          []byte
}

// each gives the rows of a record in order, and their values. A row without values gives none.
func (a *arena) each(s spot, row func(line int), value func(stored)) {
	for s.chunk > 0 {
		b := a.chunks[s.chunk-1][s.at:]
		next := spot{binary.LittleEndian.Uint32(b), binary.LittleEndian.Uint32(b[4:])}
		r := unpacker{b[linkSize:]}
		line := r.number()
		row(line)
		for range r.number() {
			v := stored{line: line, field: r.number(), column: r.number()}
			v.text, v.read = r.text(), r.text()
			value(v)
		}
		s = next
	}
}

type unpacker struct{ b []byte }

func (r *unpacker) number() int {
	v, n := binary.Uvarint(r.b)
	r.b = r.b[n:]
	return int(v)
}

func (r *unpacker) text() []byte {
	n := r.number()
	t := r.b[:n]
	r.b = r.b[n:]
	return t
}
