package intake

import (
	"crypto/sha256"
	"encoding/binary"
)

// digest stands for a text among many: 128 bits of its SHA-256, so that no two texts of a program are taken for
// one, and a million of them take little memory and no work of the garbage collector.
type digest [16]byte

func digestOf(text []byte) digest {
	sum := sha256.Sum256(text)
	return digest(sum[:16])
}

func (d digest) hash() uint64 { return binary.LittleEndian.Uint64(d[:]) }

// sum is a quick digest of 64 bits (FNV-1a, a number at a time), for what only draws attention.
type sum uint64

func (s sum) hash() uint64 { return max(uint64(s), 1) }

const (
	offset = 14695981039346656037
	prime  = 1099511628211
)

func (s sum) text(t string) sum {
	for i := range len(t) {
		s = (s ^ sum(t[i])) * prime
	}
	return s.number(int64(len(t)))
}

func (s sum) number(n int64) sum {
	s = (s ^ sum(n)) * prime
	return s ^ s>>32
}
