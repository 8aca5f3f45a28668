package record

import (
	"encoding/binary"
	"errors"
	"hash/maphash"
	"math"
	"reflect"

	"hearduty/internal/audiometry"
)

// Decoder reads the compact form that Append writes. It keeps the texts that it saw lately, so that
// repeated ids and words share memory. The zero Decoder is ready for use; it is not safe for use by
// several goroutines at once.
type Decoder struct {
	texts [internSize]string
}

const (
	internSize   = 1024 // a power of two
	internLength = 64   // longer texts are not shared
)

var (
	errShort = errors.New("the compact form of a record ends too early")
	errKind  = errors.New("the compact form of a record has an unknown kind")
	errValue = errors.New("the compact form of a record has a value that is not possible")

	internSeed = maphash.MakeSeed()
)

// Next reads the first record of b and returns what follows it.
func (d *Decoder) Next(b []byte) (r Record, rest []byte, err error) {
	if len(b) == 0 {
		return nil, nil, errShort
	}
	if int(b[0]) >= len(tables) {
		return nil, nil, errKind
	}
	t := tables[b[0]]
	c := cursor{b: b[1:], decoder: d}
	at := Origin{Source: c.int32(), Row: c.int32()}
	if len(c.b) < 4 {
		return nil, nil, errShort
	}
	present := binary.LittleEndian.Uint32(c.b)
	c.b = c.b[4:]
	if uint64(present)>>len(t.slots) != 0 {
		return nil, nil, errValue
	}
	r = t.New()
	r.SetAt(at)
	v := reflect.ValueOf(r).Elem()
	for i, slot := range t.slots {
		if present&(1<<i) != 0 {
			c.value(pointer(v, slot))
		}
	}
	if c.err != nil {
		return nil, nil, c.err
	}
	return r, c.b, nil
}

// cursor reads values from b until something is wrong; then err says what, and all reads give zero.
type cursor struct {
	b       []byte
	err     error
	decoder *Decoder
}

func (c *cursor) value(pointer any) {
	switch p := pointer.(type) {
	case *string:
		*p = c.text()
	case *Date:
		*p = Date(c.int32())
	case *Number:
		*p = c.number()
	case *Answer:
		*p = c.answer()
	case *List:
		*p = c.list()
	case *audiometry.Ear:
		c.ear(p)
	case *Threshold:
		*p = c.threshold()
	case *Octaves:
		c.numbers(p[:])
	case **Octaves:
		*p = new(Octaves)
		c.numbers((*p)[:])
	case **Deviation:
		*p = new(Deviation)
		c.numbers((*p)[:])
	}
}

func (c *cursor) fail(err error) {
	if c.err == nil {
		c.err = err
	}
	c.b = nil
}

func (c *cursor) varint() int64 {
	v, n := binary.Varint(c.b)
	if n <= 0 {
		c.fail(errShort)
		return 0
	}
	c.b = c.b[n:]
	return v
}

func (c *cursor) uvarint() uint64 {
	v, n := binary.Uvarint(c.b)
	if n <= 0 {
		c.fail(errShort)
		return 0
	}
	c.b = c.b[n:]
	return v
}

func (c *cursor) int32() int32 {
	v := c.varint()
	if v != int64(int32(v)) {
		c.fail(errValue)
		return 0
	}
	return int32(v)
}

func (c *cursor) text() string {
	n := c.uvarint()
	if n > uint64(len(c.b)) {
		c.fail(errShort)
		return ""
	}
	b := c.b[:n]
	c.b = c.b[n:]
	if len(b) > internLength {
		return string(b)
	}
	known := &c.decoder.texts[maphash.Bytes(internSeed, b)%internSize]
	if *known != string(b) {
		*known = string(b)
	}
	return *known
}

func (c *cursor) number() Number {
	v := c.varint()
	if v&1 == 0 {
		return Number{Value: float64(v>>1) / 10, Known: c.err == nil}
	}
	if v != 1 || len(c.b) < 8 {
		c.fail(errValue)
		return Number{}
	}
	bits := binary.LittleEndian.Uint64(c.b)
	c.b = c.b[8:]
	return Num(math.Float64frombits(bits))
}

func (c *cursor) answer() Answer {
	if len(c.b) == 0 {
		c.fail(errShort)
		return Unanswered
	}
	a := Answer(c.b[0])
	c.b = c.b[1:]
	if a > No {
		c.fail(errValue)
		return Unanswered
	}
	return a
}

func (c *cursor) list() List {
	n := c.uvarint()
	if n > uint64(len(c.b)) { // every text takes a byte at least
		c.fail(errShort)
		return nil
	}
	list := make(List, n)
	for i := range list {
		list[i] = c.text()
	}
	return list
}

func (c *cursor) numbers(numbers []Number) {
	known := c.bits(len(numbers))
	for i := range numbers {
		if known&(1<<i) != 0 {
			numbers[i] = c.number()
		}
	}
}

func (c *cursor) ear(ear *audiometry.Ear) {
	present := c.bits(len(ear))
	for i := range ear {
		if present&(1<<i) == 0 {
			continue
		}
		ear[i] = c.threshold()
	}
}

func (c *cursor) threshold() Threshold {
	v := c.varint()
	tenths := v >> 2
	if tenths != int64(int16(tenths)) {
		c.fail(errValue)
		return Threshold{}
	}
	return Threshold{Tenths: int16(tenths), State: audiometry.State(v & 3)}
}

// bits reads the presence bits of n entries.
func (c *cursor) bits(n int) uint64 {
	bits := c.uvarint()
	if bits>>n != 0 {
		c.fail(errValue)
		return 0
	}
	return bits
}
