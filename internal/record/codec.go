package record

import (
	"encoding/binary"
	"math"
	"reflect"

	"hearduty/internal/audiometry"
)

// The compact form of a record: a byte for the kind, the origin, four bytes that say which Go fields are
// present, and the values of those fields. It is not a file format: it lives as long as one run.
//
//	text       length, bytes
//	date       signed varint
//	number     signed varint of the tenths, shifted left by one; or 1 and the eight bytes of the float
//	answer     one byte
//	list       count, texts
//	threshold  signed varint of the tenths times four plus state
//	thresholds bits of the entries that are not empty, then each of them
//	bands      bits of the known numbers, then the numbers

// Append appends the compact form of r, with its origin, to b.
func Append(b []byte, r Record) []byte {
	t := tableOf[r.Kind()]
	at := r.At()
	b = append(b, t.number)
	b = binary.AppendVarint(b, int64(at.Source))
	b = binary.AppendVarint(b, int64(at.Row))
	mark := len(b)
	b = append(b, 0, 0, 0, 0)
	v := reflect.ValueOf(r).Elem()
	var present uint32
	for i, slot := range t.slots {
		before := len(b)
		b = appendValue(b, pointer(v, slot))
		if len(b) > before {
			present |= 1 << i
		}
	}
	binary.LittleEndian.PutUint32(b[mark:], present)
	return b
}

// appendValue appends the value of a Go field, and nothing if it is absent.
func appendValue(b []byte, pointer any) []byte {
	switch p := pointer.(type) {
	case *string:
		if *p != "" {
			b = appendText(b, *p)
		}
	case *Date:
		if *p != 0 {
			b = binary.AppendVarint(b, int64(*p))
		}
	case *Number:
		if p.Known {
			b = appendNumber(b, p.Value)
		}
	case *Answer:
		if *p != Unanswered {
			b = append(b, byte(*p))
		}
	case *List:
		if len(*p) > 0 {
			b = binary.AppendUvarint(b, uint64(len(*p)))
			for _, word := range *p {
				b = appendText(b, word)
			}
		}
	case *audiometry.Ear:
		b = appendEar(b, p)
	case *Threshold:
		if *p != (Threshold{}) {
			b = appendThresholdValue(b, *p)
		}
	case *Octaves:
		if p.Known() {
			b = appendNumbers(b, p[:])
		}
	case **Octaves:
		if *p != nil {
			b = appendNumbers(b, (*p)[:])
		}
	case **Deviation:
		if *p != nil {
			b = appendNumbers(b, (*p)[:])
		}
	}
	return b
}

func appendText(b []byte, s string) []byte {
	return append(binary.AppendUvarint(b, uint64(len(s))), s...)
}

// maxTenths bounds the numbers that are written as whole tenths.
const maxTenths = 1 << 40

func appendNumber(b []byte, v float64) []byte {
	if tenths := math.Round(v * 10); math.Abs(tenths) < maxTenths && tenths/10 == v && (tenths != 0 || !math.Signbit(v)) {
		return binary.AppendVarint(b, int64(tenths)<<1)
	}
	return binary.LittleEndian.AppendUint64(append(b, 2), math.Float64bits(v)) // 2 is the varint of 1
}

func appendNumbers(b []byte, numbers []Number) []byte {
	var known uint64
	for i, n := range numbers {
		if n.Known {
			known |= 1 << i
		}
	}
	b = binary.AppendUvarint(b, known)
	for _, n := range numbers {
		if n.Known {
			b = appendNumber(b, n.Value)
		}
	}
	return b
}

func appendEar(b []byte, ear *audiometry.Ear) []byte {
	var present uint64
	for i, t := range ear {
		if t != (audiometry.Threshold{}) {
			present |= 1 << i
		}
	}
	if present == 0 {
		return b
	}
	b = binary.AppendUvarint(b, present)
	for _, t := range ear {
		if t != (audiometry.Threshold{}) {
			b = appendThresholdValue(b, t)
		}
	}
	return b
}

func appendThresholdValue(b []byte, t Threshold) []byte {
	return binary.AppendVarint(b, int64(t.Tenths)<<2|int64(t.State&3))
}
